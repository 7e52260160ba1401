package archive

import (
	"bytes"
	"slices"
	"strings"

	"arrestcheck/arrest"
	"arrestcheck/limits"
	"arrestcheck/reportgen"
)

// A Reproduction is an archive worked out again.
type Reproduction struct {
	Archive string // name of its folder, as given
	*Opened
	Was, Is     *Results // archived and worked out now; nil where there are none
	Unreadable  error    // why the archived result file is not read
	Refused     error    // why the archived job is no longer read
	WasDigest   string   // of the canonical results, as recorded
	Differences []Difference
	Texts       []TextDifference
	Model       string // of the mechanics now
	Tool        string // of the program now
	Again       *Reassessment
}

// A TextDifference is a report that is not the one made now from the archived
// job.
type TextDifference struct {
	Path    string
	Line    int    // the first line that differs
	Was, Is string // that line, or what of a long one differs
	Lines   int    // how many lines of the archived file differ
}

// Reproduce works an opened archive out again. work makes a sheet of what it is
// given, or says why it does not; tool is the version of the program. Where
// there are later sets, the sheet is also held against their limits alone.
func Reproduce(name string, o *Opened, tool string, work func(*Inputs) (*reportgen.Sheet, error), later []limits.Set) *Reproduction {
	r := &Reproduction{Archive: name, Opened: o, WasDigest: o.Record.Results, Tool: tool, Model: arrest.ModelVersion}
	if was, err := ReadResults(o.files[jsonFile].Data); err != nil {
		r.Unreadable = err
	} else {
		r.Was = &was
	}
	sheet, err := work(o.Inputs())
	if err != nil {
		r.Refused = err
		return r
	}
	// The version in the report is that of the program which wrote it; that this
	// one may be another is told apart from it.
	sheet.Tool = o.Record.Tool.Version
	is := Of(sheet)
	r.Is = &is
	if r.Was != nil {
		r.Differences = Differences(r.Was, r.Is)
	}
	for _, f := range render(sheet, unitChoices[o.Record.Options.Units]) {
		if was := o.files[f.Path].Data; !bytes.Equal(was, f.Data) {
			r.Texts = append(r.Texts, textDifference(f.Path, was, f.Data))
		}
	}
	if len(later) > 0 {
		r.Again = reassess(r.Was, sheet, later)
	}
	return r
}

// Same reports whether everything is as it was archived and comes out as it
// did, also under later limits where there are any.
func (r *Reproduction) Same() bool {
	return r.SameFigures() && len(r.Touched)+len(r.Texts) == 0 && (r.Again == nil || !r.Again.Differs())
}

// SameFigures reports whether all figures and outcomes came out as archived.
func (r *Reproduction) SameFigures() bool {
	return r.Was != nil && r.Is != nil && len(r.Differences) == 0 && r.WasDigest == r.Is.Digest()
}

// A Cause says why a difference can be.
type Cause string

const (
	InputsTouched Cause = "inputs_touched" // the job or a limit file is not the archived one
	ReportTouched Cause = "report_touched" // a report or the result file is not the archived one
	RecordTouched Cause = "record_touched" // a tag file is not the archived one
	ModelDiffers  Cause = "model_differs"  // another version of the mechanics
	ToolDiffers   Cause = "tool_differs"   // another version of the program: wording may differ
	ReportEdited  Cause = "report_edited"  // a report is not what the job gives, and its digest agrees
	NoCause       Cause = "no_cause"       // figures differ, and none of these
)

// Causes returns why the differences can be, none where there are none.
func (r *Reproduction) Causes() []Cause {
	var causes []Cause
	add := func(c Cause, is bool) {
		if is && !slices.Contains(causes, c) {
			causes = append(causes, c)
		}
	}
	touched := make(map[string]bool)
	for _, t := range r.Touched {
		report := slices.Contains([]string{textFile, mdFile, jsonFile}, t.Path)
		touched[t.Path] = true
		add(ReportTouched, report)
		add(RecordTouched, !strings.HasPrefix(t.Path, payload))
		add(InputsTouched, !report && strings.HasPrefix(t.Path, payload) && t.Path != programFile)
	}
	model, tool := r.Record.Tool.Model != r.Model, r.Record.Tool.Version != r.Tool
	if r.SameFigures() && len(r.Texts)+len(r.Touched) == 0 {
		return nil
	}
	add(ModelDiffers, model)
	add(ToolDiffers, tool)
	for _, t := range r.Texts {
		add(ReportEdited, !touched[t.Path] && !model && !tool && !slices.Contains(causes, InputsTouched))
	}
	add(NoCause, len(causes) == 0)
	return causes
}

// textDifference finds where two texts differ.
func textDifference(path string, was, is []byte) TextDifference {
	a, b := strings.Split(string(was), "\n"), strings.Split(string(is), "\n")
	first := 0
	for first < len(a) && first < len(b) && a[first] == b[first] {
		first++
	}
	d := TextDifference{Path: path, Line: first + 1, Lines: linesOff(a, b)}
	d.Was, d.Is = window(lineAt(a, first), lineAt(b, first))
	return d
}

// linesOff counts the lines of a that differ from b: line by line where both
// have as many, else all between the beginning and the end they share.
func linesOff(a, b []string) int {
	n := 0
	if len(a) == len(b) {
		for i := range a {
			if a[i] != b[i] {
				n++
			}
		}
		return n
	}
	for n < len(a) && n < len(b) && a[n] == b[n] {
		n++
	}
	end := 0
	for end < len(a)-n && end < len(b)-n && a[len(a)-1-end] == b[len(b)-1-end] {
		end++
	}
	return max(len(a)-n-end, 1)
}

func lineAt(lines []string, i int) string {
	if i < len(lines) {
		return lines[i]
	}
	return ""
}

// window cuts two lines down to where they differ, a few words around it kept.
func window(a, b string) (string, string) {
	const around, most = 30, 90
	if len(a) <= most && len(b) <= most {
		return strings.TrimSpace(a), strings.TrimSpace(b)
	}
	from := 0
	for from < len(a) && from < len(b) && a[from] == b[from] {
		from++
	}
	from = max(0, from-around)
	cut := func(s string) string {
		return strings.ToValidUTF8(s[min(from, len(s)):min(from+most, len(s))], "")
	}
	return cut(a), cut(b)
}

// A Reassessment holds the archived entries against later limits.
type Reassessment struct {
	Rows []ReassessedRow
	Was  Counts // as archived
	Is   Counts // under the later limits
	Sets []Set  // the later ones

	Left    []string // subjects that nobody entered a later limit for
	Persons int
}

// A ReassessedRow is a limit as archived beside the later one of the same
// quantity; nil where there is no such.
type ReassessedRow struct{ Was, Is *Finding }

// reassess holds a sheet against the limits of other sets alone.
func reassess(was *Results, sheet *reportgen.Sheet, later []limits.Set) *Reassessment {
	again := *sheet
	file := *sheet.File
	file.Sets = later
	assessment := limits.Assess(sheet.Result, later, file.Elsewhere)
	again.File, again.Assessment = &file, &assessment
	is := Of(&again)
	r := &Reassessment{Is: is.Counts, Sets: is.Sets, Left: is.NotEntered, Persons: is.Job.Persons}
	var before []Finding
	if was != nil {
		before, r.Was = was.Findings, was.Counts
	}
	r.pair(before, is.Findings)
	return r
}

// pair puts limits side by side: those of one quantity and name first, then
// those of one quantity in their order.
func (r *Reassessment) pair(was, is []Finding) {
	taken := make([]bool, len(is))
	find := func(of func(*Finding) bool) *Finding {
		for j := range is {
			if !taken[j] && of(&is[j]) {
				taken[j] = true
				return &is[j]
			}
		}
		return nil
	}
	for i := range was {
		w := &was[i]
		r.Rows = append(r.Rows, ReassessedRow{w, find(func(f *Finding) bool { return f.Quantity == w.Quantity && f.Limit == w.Limit })})
	}
	for i := range r.Rows {
		if w := r.Rows[i].Was; r.Rows[i].Is == nil {
			r.Rows[i].Is = find(func(f *Finding) bool { return f.Quantity == w.Quantity })
		}
	}
	for j := range is {
		if !taken[j] {
			r.Rows = append(r.Rows, ReassessedRow{nil, &is[j]})
		}
	}
}

// Differs reports whether a limit came to another outcome, or stands on one
// side only.
func (r *Reassessment) Differs() bool {
	return slices.ContainsFunc(r.Rows, func(row ReassessedRow) bool {
		return row.Was == nil || row.Is == nil || row.Was.Outcome != row.Is.Outcome
	})
}
