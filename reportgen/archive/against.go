package archive

import (
	"bufio"
	"bytes"
	"encoding/csv"
	"encoding/json"
	"errors"
	"fmt"
	"io"
	"slices"
	"strconv"

	"arrestcheck/reportgen"
)

// A Change says how a job stands against an earlier register.
type Change string

const (
	New      Change = "new"
	Changed  Change = "changed" // other files, other results, or other versions
	Worsened Change = "worse"   // and worse in something
	Gone     Change = "gone"
	AsBefore Change = "same"
)

// Earlier is a register that was read, to hold a later one against. Jobs are
// known by the name of their file: both registers have to name it alike.
type Earlier struct {
	rows  map[string]*earlierRow
	order []string
}

type earlierRow struct {
	row  Row
	open int
	seen bool
}

// byteOrderMark is what spreadsheets put before CSV in UTF-8.
const byteOrderMark = "\xef\xbb\xbf"

// mostLine is the greatest length of a line of a register that is read, in bytes.
const mostLine = 16 << 20

// ReadEarlier reads a register as JSON lines or as CSV, also as a spreadsheet
// saved it. The error says on which line it is none. A file without anything in
// it is none: it may be what is left of one.
func ReadEarlier(r io.Reader) (*Earlier, error) {
	e := &Earlier{rows: make(map[string]*earlierRow)}
	buffered := bufio.NewReader(r)
	if mark, _ := buffered.Peek(len(byteOrderMark)); string(mark) == byteOrderMark {
		_, _ = buffered.Discard(len(byteOrderMark))
	}
	first, err := buffered.Peek(1)
	switch {
	case errors.Is(err, io.EOF):
		return nil, errors.New("the file is empty")
	case err != nil:
		return nil, err
	case first[0] == '{':
		return e, e.readLines(buffered)
	}
	return e, e.readCSV(buffered)
}

func (e *Earlier) add(line int, row earlierRow) error {
	key := earlierKey(row.row.File)
	if row.row.Change == Gone {
		return nil // it was no job of that register
	}
	if e.rows[key] != nil {
		return fmt.Errorf("line %d: a second row of %q", line, row.row.File)
	}
	e.rows[key] = &row
	e.order = append(e.order, key)
	return nil
}

// earlierKey is the name of a file as a CSV register has it.
func earlierKey(file string) string { return reportgen.Printable(fileName(file)) }

func (e *Earlier) readLines(r io.Reader) error {
	scan := bufio.NewScanner(r)
	scan.Buffer(make([]byte, 0, 64<<10), mostLine)
	for line := 1; scan.Scan(); line++ {
		if len(bytes.TrimSpace(scan.Bytes())) == 0 {
			continue
		}
		var head struct {
			Format string `json:"format"`
		}
		var j jsonRow
		err := json.Unmarshal(scan.Bytes(), &head)
		if err == nil && head.Format != RegisterFormat {
			err = fmt.Errorf("the format %.40q is not known; this program reads %q", head.Format, RegisterFormat)
		}
		if err == nil {
			err = json.Unmarshal(scan.Bytes(), &j)
		}
		if err != nil {
			return fmt.Errorf("line %d: %v", line, err)
		}
		if err := e.add(line, j.earlier()); err != nil {
			return err
		}
	}
	return scan.Err()
}

func (j *jsonRow) earlier() earlierRow {
	r := earlierRow{open: len(j.Open), row: Row{
		File: j.File, Code: j.Code, Counts: Counts(j.Counts), NotEntered: j.NotEntered, Results: j.Results,
		Tool: j.Tool.Version, Model: j.Tool.Model, Rescue: j.Method,
		Job: Job{SHA256: j.Job, Reference: j.Reference, Revision: j.Revision, Site: j.Site, Title: j.Title},
	}}
	if j.Change != nil {
		r.row.Change = *j.Change
	}
	return r
}

// readCSV reads a register in CSV; columns are known by their heads, and those
// it does not need may be missing.
func (e *Earlier) readCSV(r io.Reader) error {
	rows := csv.NewReader(r)
	rows.ReuseRecord = true
	head, err := rows.Read()
	if err != nil {
		return err
	}
	column := make(map[string]int, len(head))
	for i, name := range head {
		column[name] = i
	}
	for _, name := range neededColumns {
		if _, found := column[name]; !found {
			return fmt.Errorf("line 1: no column %q: this is no register", name)
		}
	}
	for {
		cells, err := rows.Read()
		switch {
		case errors.Is(err, io.EOF):
			return nil
		case err != nil:
			return err
		}
		line, _ := rows.FieldPos(0)
		row, err := earlierCells(func(name string) string {
			if i, found := column[name]; found {
				return reportgen.UnguardCell(cells[i])
			}
			return ""
		})
		if err == nil {
			err = e.add(line, row)
		} else {
			err = fmt.Errorf("line %d: %v", line, err)
		}
		if err != nil {
			return err
		}
	}
}

var neededColumns = []string{
	"file", "code", "exceeded", "undecided", "not_compared", "within", "open_inputs", "not_entered", "job_sha256", "results_sha256", "model",
}

// earlierCells makes a row of cells by their heads.
func earlierCells(cell func(string) string) (earlierRow, error) {
	r := earlierRow{row: Row{
		File: cell("file"), Results: cell("results_sha256"), Tool: cell("tool"), Model: cell("model"), Change: Change(cell("change")),
		Rescue: Rescue(cell("rescue_method")),
		Job:    Job{SHA256: cell("job_sha256"), Reference: cell("reference"), Revision: cell("revision"), Site: cell("site"), Title: cell("title")},
	}}
	for name, to := range map[string]*int{
		"code": &r.row.Code, "exceeded": &r.row.Counts.Exceeded, "undecided": &r.row.Counts.Undecided,
		"not_compared": &r.row.Counts.NotCompared, "within": &r.row.Counts.Within, "open_inputs": &r.open,
	} {
		n, err := strconv.Atoi(cell(name))
		if err != nil {
			return r, fmt.Errorf("column %q: %q is no number", name, cell(name))
		}
		*to = n
	}
	if text := cell("not_entered"); text != "" {
		for range 1 + bytes.Count([]byte(text), []byte("; ")) {
			r.row.NotEntered = append(r.row.NotEntered, "")
		}
	}
	return r, nil
}

// Hold says of a row how it stands against the earlier register. worse tells
// whether the first of two exit codes is worse than the second; the caller
// decides about codes.
func (e *Earlier) Hold(row *Row, worse func(now, then int) bool) {
	was := e.rows[earlierKey(row.File)]
	if was == nil {
		row.Change = New
		return
	}
	was.seen = true
	row.Worse = was.grown(row, worse)
	switch {
	case len(row.Worse) > 0:
		row.Change = Worsened
	case was.row.Job.SHA256 != row.Job.SHA256 || was.row.Results != row.Results || was.row.Model != row.Model || was.row.Code != row.Code:
		row.Change = Changed
	default:
		row.Change = AsBefore
	}
}

// grown says in what a job is worse than it was.
func (was *earlierRow) grown(row *Row, worse func(now, then int) bool) []string {
	var list []string
	if worse(row.Code, was.row.Code) {
		list = append(list, grew("code", row.Code, was.row.Code))
	}
	if row.Broken() {
		return list
	}
	for _, c := range []struct {
		what    string
		is, was int
	}{
		{"exceeded", row.Counts.Exceeded, was.row.Counts.Exceeded},
		{"not within", row.Counts.notWithin(), was.row.Counts.notWithin()},
		{"open inputs", len(row.Open), was.open},
		{"not entered", len(row.NotEntered), len(was.row.NotEntered)},
	} {
		if c.is > c.was && was.row.Results != "" {
			list = append(list, grew(c.what, c.is, c.was))
		}
	}
	if row.Rescue == RescueNotNamed && was.row.Rescue == RescueNamed {
		list = append(list, words.RescueLost.Say())
	}
	return list
}

// notWithin is how many limits came to anything but within.
func (c Counts) notWithin() int { return c.Exceeded + c.Undecided + c.NotCompared }

func grew(what string, is, was int) string {
	return words.Grew.Say(what, strconv.Itoa(is), strconv.Itoa(was))
}

// Gone returns a row for each job of the earlier register that Hold was not
// asked about, in their order there.
func (e *Earlier) Gone() []Row {
	var rows []Row
	for _, key := range e.order {
		if was := e.rows[key]; !was.seen {
			rows = append(rows, Row{
				File: was.row.File, Change: Gone, Checker: Nobody, Tool: was.row.Tool, Model: was.row.Model,
				Job: Job{Reference: was.row.Job.Reference, Revision: was.row.Job.Revision, Site: was.row.Job.Site, Title: was.row.Job.Title},
			})
		}
	}
	return slices.Clip(rows)
}
