package archive

import (
	"errors"
	"slices"
	"strconv"
	"strings"

	"arrestcheck/arrest/jobfile"
	"arrestcheck/arrest/quantity"
	"arrestcheck/reportgen"
)

var words = &reportgen.ArchiveWords

// Report returns a reproduction as a report.
func (r *Reproduction) Report() reportgen.Report {
	report := reportgen.Report{
		Head: []reportgen.Block{
			{Text: reportgen.NotAPermission, Loud: true},
			{Lines: r.identity()},
		},
		Warnings: r.warnings(),
	}
	add := func(heading string, blocks ...reportgen.Block) {
		report.Sections = append(report.Sections, reportgen.Section{Heading: heading, Blocks: blocks})
	}
	if len(r.Touched) > 0 {
		add(reportgen.FilesHeading, reportgen.Block{Table: r.touchedTable()})
	}
	if r.Refused != nil {
		add(reportgen.RefusedHeading, reportgen.Block{Lines: bullets(faultTexts(r.Refused))})
	}
	if len(r.Differences) > 0 {
		add(reportgen.DiffersHeading, reportgen.Block{Table: differenceTable(r.Differences)})
	}
	if len(r.Texts) > 0 {
		add(reportgen.TextsHeading, r.textBlocks()...)
	}
	if causes := r.causeTexts(); len(causes) > 0 {
		add(reportgen.CausesHeading, reportgen.Block{Lines: bullets(causes)})
	}
	if r.Again != nil {
		add(reportgen.AgainHeading, r.Again.blocks()...)
	}
	return report
}

// identity says which archive it is and what it came to.
func (r *Reproduction) identity() []reportgen.Line {
	lines := []reportgen.Line{{Label: reportgen.ArchiveLabel, Text: r.Archive}}
	if of := r.Was; of != nil || r.Is != nil {
		if of == nil {
			of = r.Is
		}
		lines = append(lines, reportgen.Line{Label: reportgen.ArchivedJobLabel, Text: of.Job.line()})
	}
	lines = append(lines, reportgen.Line{Label: reportgen.ComesToLabel, Text: r.verdict(), Loud: !r.sameAsArchived()})
	if r.Unreadable != nil {
		lines = append(lines, reportgen.Line{Text: words.ResultUnreadable.Say(r.Unreadable.Error())})
	}
	if r.Is != nil && len(r.Is.Counts.text()) > 0 {
		lines = append(lines, reportgen.Line{Label: reportgen.ArchivedLabel, Text: r.countsWas()})
	}
	return append(lines,
		reportgen.Line{Label: reportgen.ProgramLabel, Text: versions(r.Record.Tool.Version, r.Tool)},
		reportgen.Line{Label: reportgen.MechanicsLabel, Text: versions(r.Record.Tool.Model, r.Model)},
		reportgen.Line{Label: reportgen.DigestLabel, Text: r.Digest},
	)
}

func (r *Reproduction) countsWas() string {
	if r.Was == nil {
		return reportgen.NothingThere
	}
	return r.Was.Counts.text()
}

// sameAsArchived is Same, later limits left aside.
func (r *Reproduction) sameAsArchived() bool {
	return r.SameFigures() && len(r.Touched)+len(r.Texts) == 0
}

func (r *Reproduction) verdict() string {
	switch {
	case r.Refused != nil:
		return words.NotRead.Say()
	case r.sameAsArchived():
		n := strconv.Itoa
		return words.SameDigits.Say(n(len(r.Is.Inputs)), n(len(r.Is.Estimates)), n(len(r.Is.Findings)))
	case r.SameFigures():
		return words.SameFiguresOnly.Say()
	}
	n := len(r.Differences)
	if n == 0 {
		n = 1 // the digest of the results alone
	}
	return words.Differs.Say(strconv.Itoa(n))
}

func versions(was, is string) string {
	if was == is {
		return words.OneVersion.Say(was)
	}
	return words.OtherVersion.Say(was, is)
}

// line is a job in one line.
func (j *Job) line() string {
	return words.JobLine.Say(orNothing(j.Title), orNothing(j.Reference), orNothing(j.Revision))
}

func orNothing(s string) string {
	if s == "" {
		return reportgen.NotEntered
	}
	return s
}

func (c Counts) text() string {
	n := strconv.Itoa
	return words.CountLine.Say(n(c.Exceeded), n(c.Undecided), n(c.NotCompared), n(c.Within))
}

// cautions are the statements of a reproduction with what they name.
func (r *Reproduction) cautions() []caution {
	var list []caution
	if len(r.Touched) > 0 {
		paths := make([]string, len(r.Touched))
		for i, t := range r.Touched {
			paths[i] = t.Path
		}
		list = append(list, caution{words.TouchedFiles, []string{strings.Join(paths, ", ")}})
	}
	if r.Again != nil {
		list = append(list, caution{words.LaterLimits, nil})
	}
	return append(list, caution{words.SameIsNotRight, nil}, caution{words.NoSignature, nil})
}

func (r *Reproduction) warnings() []reportgen.Line { return warnings(r.cautions()) }

// A caution is a numbered statement with its texts.
type caution struct {
	sentence reportgen.Sentence
	texts    []string
}

func warnings(list []caution) []reportgen.Line {
	lines := make([]reportgen.Line, len(list))
	for i, c := range list {
		lines[i] = c.sentence.Warning(c.texts...)
	}
	return lines
}

func (r *Reproduction) touchedTable() *reportgen.Table {
	t := &reportgen.Table{Header: []string{reportgen.WhatHead, reportgen.ArchivedHead, reportgen.NowHead}, Widths: []int{28, 24, 24}, Rules: true}
	for _, f := range r.Touched {
		t.Rows = append(t.Rows, reportgen.Row{Cells: []string{f.Path, f.Was, f.Is}})
	}
	return t
}

func differenceTable(list []Difference) *reportgen.Table {
	t := &reportgen.Table{
		Header: []string{reportgen.WhatHead, reportgen.ArchivedHead, reportgen.NowHead, reportgen.ByHead},
		Widths: []int{26, 17, 17, 14}, Rules: true,
	}
	for i := range list {
		d := &list[i]
		t.Rows = append(t.Rows, reportgen.Row{Cells: []string{
			strings.TrimSpace(string(d.Part) + " " + d.What + "\n" + d.Field), orDash(d.Was), orDash(d.Is), d.by()}})
	}
	return t
}

func orDash(s string) string {
	if s == "" {
		return reportgen.NothingThere
	}
	return s
}

func (r *Reproduction) textBlocks() []reportgen.Block {
	var blocks []reportgen.Block
	for _, t := range r.Texts {
		blocks = append(blocks, reportgen.Block{
			Text: words.TextDiffers.Say(t.Path, strconv.Itoa(t.Lines), strconv.Itoa(t.Line)),
			Lines: []reportgen.Line{
				{Label: reportgen.InArchiveLabel, Text: orDash(t.Was)},
				{Label: reportgen.AnewLabel, Text: orDash(t.Is)},
			},
		})
	}
	return blocks
}

func (r *Reproduction) causeTexts() []string {
	var texts []string
	for _, c := range r.Causes() {
		switch s := words.Causes[string(c)]; c {
		case ModelDiffers:
			texts = append(texts, s.Say(r.Model, r.Record.Tool.Model))
		case ToolDiffers:
			texts = append(texts, s.Say(r.Tool, r.Record.Tool.Version))
		default:
			texts = append(texts, s.Say())
		}
	}
	return texts
}

func bullets(texts []string) []reportgen.Line {
	lines := make([]reportgen.Line, len(texts))
	for i, t := range texts {
		lines[i] = reportgen.Line{Label: "-", Text: t}
	}
	return lines
}

// mostFaults is how many faults of one job are named.
const mostFaults = 20

// faultTexts returns what is wrong with a job, each fault on one line without
// its hint.
func faultTexts(err error) []string {
	var faults *jobfile.Faults
	var refusal *Refusal
	switch {
	case errors.As(err, &refusal):
		return capped(refusal.Reasons, func(s string) string { return s })
	case errors.As(err, &faults):
		return capped(faults.List, faultText)
	}
	return []string{err.Error()}
}

// faultText is one fault as the messages of check have it, its hint left out.
func faultText(f jobfile.Fault) string {
	one := jobfile.Faults{List: []jobfile.Fault{f}}
	line, _, _ := strings.Cut(one.Error(), "\n")
	return line
}

func capped[T any](list []T, text func(T) string) []string {
	var texts []string
	for i, one := range list {
		if i == mostFaults {
			return append(texts, words.MoreFaults.Say(strconv.Itoa(len(list)-mostFaults)))
		}
		texts = append(texts, text(one))
	}
	return texts
}

func (a *Reassessment) blocks() []reportgen.Block {
	t := &reportgen.Table{
		Header: []string{reportgen.WhatHead, reportgen.ArchivedHead, reportgen.LaterHead},
		Widths: []int{18, 28, 30}, Rules: true,
	}
	differ := 0
	for _, row := range a.Rows {
		f := row.Was
		if f == nil {
			f = row.Is
		}
		other := row.Was == nil || row.Is == nil || row.Was.Outcome != row.Is.Outcome
		if other {
			differ++
		}
		t.Rows = append(t.Rows, reportgen.Row{Cells: []string{titleOf(f, a.Persons), row.Was.cell(), row.Is.cell()}, Loud: other})
	}
	lines := []reportgen.Line{
		{Label: reportgen.ArchivedLabel, Text: a.Was.text()},
		{Label: reportgen.LaterLabel, Text: a.Is.text()},
	}
	for _, s := range a.Sets {
		lines = append(lines, reportgen.Line{Label: reportgen.LaterSetLabel, Text: words.SetLine.Say(s.Title, s.Name)})
	}
	if len(a.Left) > 0 {
		lines = append(lines, reportgen.Line{Label: reportgen.LeftOutHeading, Text: leftOut(a.Left, a.Persons)})
	}
	text := words.AgainLine.Say(strconv.Itoa(differ), strconv.Itoa(len(a.Rows)))
	return []reportgen.Block{{Text: text, Lines: lines}, {Table: t}}
}

func titleOf(f *Finding, persons int) string { return reportgen.QuantityTitle(f.Quantity, persons) }

// cell is a limit and what it came to, "-" where there is none.
func (f *Finding) cell() string {
	if f == nil {
		return reportgen.NothingThere
	}
	return f.outcome() + ":\n" + f.demand() + "\n" + f.limit() + "\n" + f.Authority
}

func (f *Finding) outcome() string { return reportgen.OutcomeWords(f.Outcome) }

func (f *Finding) demand() string {
	return reportgen.DemandText(f.Bound, f.Demand, f.LimitSI, f.unit())
}

func (f *Finding) limit() string {
	return reportgen.SenseWords(f.Sense) + " " + f.LimitAsWritten
}

// unit is the unit that the limit was typed in, that of SI where it cannot be
// told.
func (f *Finding) unit() quantity.Unit {
	record, _ := f.Quantity.Record()
	if band, err := quantity.Parse(record.Dimension, f.LimitAsWritten); err == nil {
		return band.Unit
	}
	return record.Dimension.SI()
}

func leftOut(subjects []string, persons int) string {
	list := make([]string, len(subjects))
	for i, s := range subjects {
		list[i] = reportgen.SubjectWords(s, persons)
	}
	return strings.Join(list, ", ")
}

// RefusedReport returns the report of a folder that is no archive.
func RefusedReport(name string, err error) reportgen.Report {
	return reportgen.Report{
		Head: []reportgen.Block{
			{Text: reportgen.NotAPermission, Loud: true},
			{Lines: []reportgen.Line{
				{Label: reportgen.ArchiveLabel, Text: name},
				{Label: reportgen.ComesToLabel, Text: words.NotAnArchive.Say(), Loud: true},
			}},
		},
		Sections: []reportgen.Section{
			{Heading: reportgen.RefusedHeading, Blocks: []reportgen.Block{{Lines: bullets(slices.Clone(faultTexts(err)))}}},
		},
	}
}

// A Tally is what several archives came to together.
type Tally struct{ Same, Differ, Refused int }

// Report says in one sentence what they came to.
func (t Tally) Report() reportgen.Report {
	n := strconv.Itoa
	text := words.ArchivesCounted.Say(n(t.Same+t.Differ+t.Refused), n(t.Same), n(t.Differ), n(t.Refused))
	return reportgen.Report{Head: []reportgen.Block{{Text: text}}}
}
