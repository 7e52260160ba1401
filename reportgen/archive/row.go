package archive

import (
	"strings"

	"arrestcheck/arrest"
	"arrestcheck/arrest/quantity"
	"arrestcheck/limits"
	"arrestcheck/reportgen"
)

// RegisterFormat is the value of the key format of every row of a register in
// JSON.
const RegisterFormat = "arrestcheck register 1"

// A Row is one job in a register.
type Row struct {
	File   string // as the caller names it
	Code   int    // the exit code that check ends with for this job
	Job    Job
	Counts Counts
	Worst  *Worst // the row of the sheet furthest from settled; nil where there is no limit

	Inputs     int
	Open       []string // keys of the inputs that are open
	NotEntered []string // subjects that nobody entered a limit for
	Rescue     Rescue
	Checker    Checker
	Sets       []string // digests of the limit sets; empty ones are the limits of the job itself
	Results    string   // digest of the canonical results; empty of a broken job
	Tool       string
	Model      string

	Errors []string // what is wrong with the job, each in one line; of a broken job only

	Change Change   // against an earlier register; empty where there is none
	Worse  []string // in what the job is worse than it was
}

// A Checker says who is named as the checker of a job. A name in a file is no
// signature.
type Checker string

const (
	Another     Checker = "named"       // and not the preparer
	ThePreparer Checker = "is_preparer" // the same name as that of the preparer
	Nobody      Checker = "not_named"
)

// A Rescue says whether a job names a rescue method. The text itself is Job.Rescue.
type Rescue string

const (
	RescueNamed    Rescue = "named"
	RescueNotNamed Rescue = "not_named" // nothing, or a word for none such as "n/a"
	RescueNotAsked Rescue = "not_asked" // no person is part of the job
)

// rescueOf is told by the same function as the warning on the sheet.
func rescueOf(text string, persons int) Rescue {
	switch {
	case persons == 0:
		return RescueNotAsked
	case reportgen.IsRescue(text):
		return RescueNamed
	}
	return RescueNotNamed
}

// A Worst is the row of a sheet that is furthest from settled.
type Worst struct {
	Finding
	Row int // from 1, in the order in which the limits were read
}

// RowOf returns the row of a job that was worked out, and code, which the
// caller decides.
func RowOf(name string, s *reportgen.Sheet, code int) Row {
	r := unsnapped(s)
	row := Row{
		File: name, Code: code, Job: r.Job, Counts: r.Counts, Inputs: len(r.Inputs), NotEntered: r.NotEntered,
		Rescue:  rescueOf(r.Job.Rescue, r.Job.Persons),
		Checker: checkerOf(r.Job.PreparedBy, r.Job.CheckedBy), Results: r.Digest(), Tool: r.Tool, Model: r.Model,
	}
	for i := range r.Inputs {
		if r.Inputs[i].Open {
			row.Open = append(row.Open, r.Inputs[i].Key)
		}
	}
	for i := range r.Sets {
		row.Sets = append(row.Sets, r.Sets[i].SHA256)
	}
	if worst := s.Assessment.WorstRow(); worst >= 0 {
		row.Worst = &Worst{r.Findings[worst], worst + 1}
		row.Worst.snap()
	}
	return row
}

// BrokenRow returns the row of a job that is refused or cannot be read. data is
// the whole file, nil where it was not read to its end: a digest of a part of it
// would be that of another file.
func BrokenRow(name string, data []byte, err error, code int, tool string) Row {
	row := Row{File: name, Code: code, Tool: tool, Model: arrest.ModelVersion, Rescue: RescueNotAsked, Checker: Nobody, Errors: faultTexts(err)}
	if data != nil {
		row.Job.SHA256 = digest(data)
	}
	return row
}

// Detach copies the texts of the row, which else are parts of the whole file of
// the job and keep it in memory.
func (r *Row) Detach() {
	texts := []*string{
		&r.Job.Title, &r.Job.Site, &r.Job.Reference, &r.Job.Revision, &r.Job.Date, &r.Job.PreparedBy, &r.Job.CheckedBy,
		&r.Job.ReviewDate, &r.Job.Rescue,
	}
	if w := r.Worst; w != nil {
		texts = append(texts, &w.Limit, &w.Group, &w.LimitAsWritten, &w.Authority)
	}
	for i := range r.Open {
		texts = append(texts, &r.Open[i])
	}
	for _, t := range texts {
		*t = strings.Clone(*t)
	}
}

// Broken reports whether the job is refused or was not read.
func (r *Row) Broken() bool { return len(r.Errors) > 0 }

// checkerOf compares names as a reader does: capitals and blanks tell nobody
// apart.
func checkerOf(prepared, checked string) Checker {
	bare := func(s string) string { return strings.Join(strings.Fields(s), " ") }
	switch prepared, checked = bare(prepared), bare(checked); {
	case checked == "":
		return Nobody
	case strings.EqualFold(prepared, checked):
		return ThePreparer
	}
	return Another
}

// demandNumber returns the demand in the unit of the limit, without the unit.
func (f *Finding) demandNumber() string {
	if f.Demand != f.Demand {
		return ""
	}
	rounding := quantity.Nearest
	switch f.Bound {
	case arrest.AtLeast:
		rounding = quantity.Down
	case arrest.AtMost:
		rounding = quantity.Up
	}
	return quantity.Number(f.Demand, f.unit(), csvDigits, rounding)
}

// csvDigits is how many digits figures have in a CSV register.
const csvDigits = 6

type jsonRow struct {
	Format     string     `json:"format"`
	File       string     `json:"file"`
	Code       int        `json:"code"`
	Change     *Change    `json:"change"`
	Worse      []string   `json:"worse"`
	Reference  string     `json:"reference"`
	Revision   string     `json:"revision"`
	Site       string     `json:"site"`
	Title      string     `json:"title"`
	Date       string     `json:"date"`
	Persons    int        `json:"persons"`
	Example    bool       `json:"example"`
	Counts     jsonCounts `json:"outcome_counts"`
	Worst      *jsonWorst `json:"worst"`
	Inputs     int        `json:"inputs"`
	Open       []string   `json:"open_inputs"`
	NotEntered []string   `json:"not_entered"`
	Rescue     string     `json:"rescue"`
	Method     Rescue     `json:"rescue_method"`
	PreparedBy string     `json:"prepared_by"`
	CheckedBy  string     `json:"checked_by"`
	Checker    Checker    `json:"checker"`
	Review     string     `json:"review_date"`
	Job        string     `json:"job_sha256"`
	Sets       []string   `json:"limit_sets_sha256"`
	Results    string     `json:"results_sha256"`
	Tool       Versions   `json:"tool"`
	Errors     []string   `json:"errors"`
}

type jsonWorst struct {
	Row            int             `json:"row"`
	Limit          string          `json:"limit"`
	Quantity       arrest.Quantity `json:"quantity"`
	Sense          limits.Sense    `json:"sense"`
	LimitAsWritten string          `json:"limit_as_written"`
	LimitSI        *float64        `json:"limit_value"`
	Authority      string          `json:"authority"`
	Outcome        limits.Outcome  `json:"outcome"`
	Reasons        []string        `json:"reasons"`
	Bound          arrest.Bound    `json:"bound"`
	Demand         *float64        `json:"demand"`
	Unit           string          `json:"unit"`
	Ratio          *float64        `json:"ratio"`
}

// json returns the row as it stands in a JSON register, lists never null.
func (r *Row) json() *jsonRow {
	j := &jsonRow{
		Format: RegisterFormat, File: jsonName(r.File), Code: r.Code, Worse: list(r.Worse),
		Reference: r.Job.Reference, Revision: r.Job.Revision, Site: r.Job.Site, Title: r.Job.Title, Date: r.Job.Date,
		Persons: r.Job.Persons, Example: r.Job.Example, Counts: jsonCounts(r.Counts),
		Inputs: r.Inputs, Open: list(r.Open), NotEntered: list(r.NotEntered), Rescue: r.Job.Rescue, Method: r.Rescue,
		PreparedBy: r.Job.PreparedBy, CheckedBy: r.Job.CheckedBy, Checker: r.Checker, Review: r.Job.ReviewDate,
		Job: r.Job.SHA256, Sets: list(r.Sets), Results: r.Results, Tool: Versions{r.Tool, r.Model}, Errors: list(r.Errors),
	}
	if r.Change != "" {
		j.Change = &r.Change
	}
	if w := r.Worst; w != nil {
		j.Worst = &jsonWorst{
			w.Row, w.Limit, w.Quantity, w.Sense, w.LimitAsWritten, orNull(w.LimitSI), w.Authority, w.Outcome, list(w.Reasons),
			w.Bound, orNull(w.Demand), w.Unit, orNull(w.Ratio),
		}
	}
	return j
}

func list(of []string) []string {
	if of == nil {
		return []string{}
	}
	return of
}
