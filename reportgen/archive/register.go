package archive

import (
	"encoding/csv"
	"encoding/json"
	"io"
	"strconv"
	"strings"

	"arrestcheck/limits"
	"arrestcheck/reportgen"
)

// A Layout is the form of a register.
type Layout uint8

const (
	Text  Layout = iota // for people, 80 columns
	CSV                 // for a spreadsheet, a head line first
	Lines               // JSON, a document a line and nothing else: registers of parts can be put together
)

// A Register writes rows as they come, so that a register can be of any length.
type Register struct {
	w      io.Writer
	layout Layout
	ascii  bool
	early  bool // rows say how they changed against an earlier register
	rows   int
	total  Summary

	page  *reportgen.Table // of Text: the rows of the page being filled
	pages int
	csv   *csv.Writer
	lines *json.Encoder
	line  strings.Builder
}

// A Summary is what all rows of a register come to together.
type Summary struct {
	Jobs, Exceeded, Settled, Otherwise, Broken int
	NoRescue                                   int // with a person and no rescue method
	New, Changed, Worse, Gone, Same            int
}

// NewRegister begins a register. early says that its rows are compared with an
// earlier one.
func NewRegister(w io.Writer, layout Layout, ascii, early bool) (*Register, error) {
	r := &Register{w: w, layout: layout, ascii: ascii, early: early}
	switch layout {
	case CSV:
		r.csv = csv.NewWriter(w)
		return r, r.csv.Write(csvHead)
	case Lines:
		r.lines = json.NewEncoder(&r.line)
		r.lines.SetEscapeHTML(false)
		return r, nil
	}
	return r, r.report(reportgen.Report{
		Head:     []reportgen.Block{{Text: reportgen.NotAPermission, Loud: true}},
		Warnings: warnings([]caution{{words.RowsAreNotSheets, nil}}),
		Sections: []reportgen.Section{{Heading: reportgen.RegisterHeading}},
	})
}

// Add writes a row. The error is that of the writer.
func (r *Register) Add(row *Row) error {
	r.rows++
	r.count(row)
	switch r.layout {
	case CSV:
		return r.csv.Write(r.csvRow(row))
	case Lines:
		return r.lineRow(row)
	}
	return r.textRow(row)
}

// Close writes what is left to write; the Summary is that of all rows.
func (r *Register) Close() (Summary, error) {
	switch r.layout {
	case CSV:
		r.csv.Flush()
		return r.total, r.csv.Error()
	case Lines:
		return r.total, nil
	}
	if err := r.flush(); err != nil {
		return r.total, err
	}
	block := reportgen.Block{Text: r.total.Text()}
	if n := r.total.NoRescue; n > 0 {
		block.Lines = append(block.Lines, reportgen.Line{Text: words.WithoutRescue.Say(strconv.Itoa(n)), Loud: true})
	}
	if r.early {
		block.Lines = append(block.Lines, reportgen.Line{Text: r.total.Changes()})
	}
	if _, err := io.WriteString(r.w, "\n"); err != nil {
		return r.total, err
	}
	return r.total, r.report(reportgen.Report{Head: []reportgen.Block{block}})
}

func (r *Register) count(row *Row) {
	t := &r.total
	for change, n := range map[Change]*int{New: &t.New, Changed: &t.Changed, Worsened: &t.Worse, Gone: &t.Gone, AsBefore: &t.Same} {
		if row.Change == change {
			*n++
		}
	}
	if row.Change == Gone {
		return
	}
	t.Jobs++
	if row.Rescue == RescueNotNamed {
		t.NoRescue++
	}
	switch {
	case row.Broken():
		t.Broken++
	case row.Counts.Exceeded > 0:
		t.Exceeded++
	case row.Code == 0:
		t.Settled++
	default:
		t.Otherwise++
	}
}

// Text returns the summary in words.
func (s *Summary) Text() string {
	n := strconv.Itoa
	return words.JobsCounted.Say(n(s.Jobs), n(s.Exceeded), n(s.Settled), n(s.Otherwise), n(s.Broken))
}

// Changes returns in words how the rows changed against an earlier register.
func (s *Summary) Changes() string {
	n := strconv.Itoa
	return words.ChangesCounted.Say(n(s.New), n(s.Changed), n(s.Worse), n(s.Gone), n(s.Same))
}

func (r *Register) report(report reportgen.Report) error {
	return reportgen.Text(r.w, report, reportgen.TextOptions{ASCII: r.ascii})
}

// lineRow writes a row as one JSON document on one line.
func (r *Register) lineRow(row *Row) error {
	r.line.Reset()
	if err := r.lines.Encode(row.json()); err != nil {
		panic("archive: register: " + err.Error()) // a struct of texts and numbers
	}
	_, err := io.WriteString(r.w, reportgen.EscapeJSON(r.line.String()))
	return err
}

// csvHead names the columns of a CSV register.
var csvHead = []string{
	"file", "code", "change", "worse", "reference", "revision", "site", "title", "date", "exceeded", "undecided", "not_compared", "within",
	"worst_outcome", "worst_quantity", "worst_bound", "worst_demand", "worst_unit", "worst_limit", "worst_authority", "worst_reasons",
	"inputs", "open_inputs", "open_keys", "not_entered", "rescue", "rescue_method", "prepared_by", "checked_by", "checker", "review_date",
	"persons", "example", "job_sha256", "results_sha256", "tool", "model", "errors",
}

// csvRow returns the cells of a row, in the order of csvHead.
func (r *Register) csvRow(row *Row) []string {
	n := strconv.Itoa
	worst := [8]string{}
	if w := row.Worst; w != nil {
		worst = [...]string{
			string(w.Outcome), string(w.Quantity), string(w.Bound), w.demandNumber(), w.unit().Symbol,
			reportgen.SenseWords(w.Sense) + " " + w.LimitAsWritten, w.Authority, strings.Join(w.Reasons, "; "),
		}
	}
	cells := []string{
		fileName(row.File), n(row.Code), string(row.Change), strings.Join(row.Worse, "; "), row.Job.Reference, row.Job.Revision, row.Job.Site,
		row.Job.Title, row.Job.Date, n(row.Counts.Exceeded), n(row.Counts.Undecided), n(row.Counts.NotCompared), n(row.Counts.Within),
		worst[0], worst[1], worst[2], worst[3], worst[4], worst[5], worst[6], worst[7],
		n(row.Inputs), n(len(row.Open)), strings.Join(row.Open, "; "), strings.Join(row.NotEntered, "; "), row.Job.Rescue, string(row.Rescue),
		row.Job.PreparedBy, row.Job.CheckedBy, string(row.Checker), row.Job.ReviewDate,
		n(row.Job.Persons), strconv.FormatBool(row.Job.Example), row.Job.SHA256, row.Results, row.Tool, row.Model, strings.Join(row.Errors, "; "),
	}
	for i := range cells {
		cells[i] = reportgen.GuardCell(r.printable(cells[i]))
	}
	return cells
}

func (r *Register) printable(s string) string {
	if r.ascii {
		return reportgen.PrintableASCII(s)
	}
	return reportgen.Printable(s)
}

// Columns of a register as text, 80 wide with two blanks between.
var (
	registerHead   = []string{reportgen.NumberHead, reportgen.JobHead, reportgen.WorstHead, reportgen.OpenHead}
	registerWidths = []int{5, 22, 25, 22}
)

// pageRows is how many rows stand under one head.
const pageRows = 40

func (r *Register) textRow(row *Row) error {
	if r.page == nil {
		r.page = &reportgen.Table{Header: padded(registerHead, registerWidths), Widths: registerWidths, Rules: true}
	}
	r.page.Rows = append(r.page.Rows, reportgen.Row{
		Cells: []string{r.numberCell(row), row.jobCell(), row.limitsCell(), row.openCell()},
	})
	if len(r.page.Rows) < pageRows {
		return nil
	}
	return r.flush()
}

// flush writes the page being filled.
func (r *Register) flush() error {
	if r.page == nil {
		return nil
	}
	if r.pages++; r.pages > 1 {
		if _, err := io.WriteString(r.w, "\n"); err != nil {
			return err
		}
	}
	page := r.page
	r.page = nil
	return r.report(reportgen.Report{Sections: []reportgen.Section{{Blocks: []reportgen.Block{{Table: page}}}}})
}

// padded makes every head as wide as its column, so that all pages have the
// same columns whatever stands in them.
func padded(heads []string, widths []int) []string {
	list := make([]string, len(heads))
	for i, h := range heads {
		list[i] = strings.ReplaceAll(h, " ", "\u00a0") + strings.Repeat("\u00a0", widths[i]-len(h))
	}
	return list
}

func (r *Register) numberCell(row *Row) string {
	if !r.early {
		return strconv.Itoa(r.rows)
	}
	return strconv.Itoa(r.rows) + "\n" + string(row.Change)
}

// shownDigits is how many digits of a digest a register for people shows; the
// other forms have all of them.
const shownDigits = 12

// jobCell is which job it is.
func (r *Row) jobCell() string {
	var lines []string
	if reference := strings.TrimSpace(r.Job.Reference + " " + r.Job.Revision); reference != "" {
		lines = append(lines, reference)
	}
	for _, text := range []string{r.Job.Site, r.Job.Title, fileName(r.File)} {
		if text != "" {
			lines = append(lines, text)
		}
	}
	if sum := r.Job.SHA256; len(sum) > shownDigits {
		lines = append(lines, words.FileDigest.Say(sum[:shownDigits]))
	}
	if sum := r.Results; len(sum) > shownDigits {
		lines = append(lines, words.ResultsDigest.Say(sum[:shownDigits]))
	}
	return strings.Join(lines, "\n")
}

// rescueText is what is entered about rescue, empty where nobody asks.
func (r *Row) rescueText() string {
	switch text := r.Job.Rescue; {
	case r.Rescue == RescueNotNamed && text != "":
		return words.RescueIsNone.Say(text)
	case r.Rescue == RescueNotNamed:
		return words.NoRescue.Say()
	case text != "":
		return words.RescueLine.Say(text)
	}
	return ""
}

// limitsCell is how many limits came to each outcome, and the worst of them; or
// what is wrong with the job.
func (r *Row) limitsCell() string {
	switch {
	case r.Change == Gone:
		return reportgen.NothingThere
	case r.Broken():
		return strings.Join(r.Errors, "\n")
	}
	lines := []string{r.countText()}
	if r.Job.Example {
		lines = append(lines, words.ExampleLine.Say())
	}
	if w := r.Worst; w != nil {
		lines = append(lines, words.WorstLine.Say(w.outcome(), titleOf(&w.Finding, r.Job.Persons), w.demand(), w.limit()), w.Authority)
	}
	return strings.Join(lines, "\n")
}

// countText leaves out what no limit came to.
func (r *Row) countText() string {
	var list []string
	for i, o := range limits.Outcomes() {
		if n := r.Counts.list()[i]; n > 0 {
			list = append(list, strconv.Itoa(n)+" "+reportgen.OutcomeWords(o))
		}
	}
	if len(list) == 0 {
		return words.NoLimits.Say()
	}
	return strings.Join(list, ", ")
}

// openCell is what is open, and who is named.
func (r *Row) openCell() string {
	if r.Broken() || r.Change == Gone {
		return reportgen.NothingThere
	}
	n := strconv.Itoa
	lines := append([]string{}, r.Worse...)
	lines = append(lines, words.OpenOf.Say(n(len(r.Open)), n(r.Inputs)))
	if len(r.NotEntered) > 0 {
		lines = append(lines, words.LeftOut.Say(leftOut(r.NotEntered, r.Job.Persons)))
	}
	if text := r.rescueText(); text != "" {
		lines = append(lines, text)
	}
	switch r.Checker {
	case Another:
		lines = append(lines, words.CheckerLine.Say(r.Job.CheckedBy))
	case ThePreparer:
		lines = append(lines, words.CheckerIsPreparer.Say())
	default:
		lines = append(lines, words.NoChecker.Say())
	}
	if r.Job.ReviewDate != "" {
		lines = append(lines, words.ReviewLine.Say(r.Job.ReviewDate))
	}
	return strings.Join(lines, "\n")
}
