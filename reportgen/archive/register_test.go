package archive

import (
	"bytes"
	"encoding/csv"
	"encoding/json"
	"errors"
	"fmt"
	"slices"
	"strings"
	"testing"
	"unsafe"

	"github.com/google/go-cmp/cmp"

	"arrestcheck/arrest/jobfile"
	"arrestcheck/limits"
	"arrestcheck/reportgen"
)

// register writes rows in one form.
func register(t testing.TB, layout Layout, early bool, rows ...Row) string {
	t.Helper()
	var b bytes.Buffer
	r, err := NewRegister(&b, layout, false, early)
	if err != nil {
		t.Fatal(err)
	}
	for i := range rows {
		if err := r.Add(&rows[i]); err != nil {
			t.Fatal(err)
		}
	}
	if _, err := r.Close(); err != nil {
		t.Fatal(err)
	}
	return b.String()
}

// codeLike stands in for the exit codes that the command decides.
func codeLike(a *limits.Assessment) int {
	switch {
	case a.Exceeded():
		return 1
	case a.Settled():
		return 0
	}
	return 2
}

func rowOf(t testing.TB, name string) Row {
	t.Helper()
	s := sheet(t, name)
	return RowOf("jobs/"+name, s, codeLike(s.Assessment))
}

// Every cell of a row against what the job says.
func TestRowOf(t *testing.T) {
	row := rowOf(t, "settled.toml")
	if row.Job.Reference != "WM-0210" || row.Job.Revision != "D" || row.Job.Site != "wool mill, hall 2" || row.Counts != (Counts{Within: 4}) ||
		len(row.Open) != 0 || row.Inputs != 8 || len(row.NotEntered) != 0 || row.Checker != Another || len(row.Sets) != 1 || row.Broken() {
		t.Errorf("%+v", row)
	}
	// 6 kN promised against 6 kN: the row nearest to its limit.
	if w := row.Worst; w == nil || w.Limit != "mill-peak" || w.Outcome != limits.Within || w.demandNumber() != "6.00000" || w.Row != 1 {
		t.Errorf("%+v", w)
	}
}

// A floor that is far below its limit comes before a bounded demand that nearly
// reaches its own: nobody knows how far the floor is from the truth.
func TestAFloorIsNeverTheMostHarmless(t *testing.T) {
	row := RowOf("x", sheetOf(t, `format = "arrestcheck job 1"
[document]
title = "x"
[worker]
mass = { value = "100 kg ± 0 kg", source = "measured" }
tools = { value = "0 kg", source = "measured" }
[fall]
free_fall = { value = "1.8 m ± 0 m", source = "measured" }
[stop]
distance = { value = "1.07 m ± 0 m", source = "measured" }
`+limit("low-floor", "peak_force", "100 kN")+limit("near", "total_mass", "100 kg")), 2)
	if row.Worst.Limit != "low-floor" || row.Worst.Bound != "at least" || row.Worst.Ratio == row.Worst.Ratio {
		t.Errorf("%+v", row.Worst)
	}
}

func limit(id, quantity, most string) string {
	return fmt.Sprintf("[[limit]]\nid = %q\nquantity = %q\nat_most = %q\nauthority = \"rule\"\nedition = \"first\"\nkind = \"person\"\nchecked_on = \"5 May 2025\"\n", id, quantity, most)
}

func TestChecker(t *testing.T) {
	for _, c := range []struct {
		prepared, checked string
		want              Checker
	}{
		{"", "", Nobody}, {"planner", "", Nobody}, {"planner", " \t", Nobody},
		{"planner", "planner", ThePreparer}, {"safety planner", " Safety  PLANNER ", ThePreparer},
		{"planner", "engineer", Another}, {"", "engineer", Another},
	} {
		if got := checkerOf(c.prepared, c.checked); got != c.want {
			t.Errorf("%q, %q: %s, want %s", c.prepared, c.checked, got, c.want)
		}
	}
}

func TestBrokenRow(t *testing.T) {
	_, err := jobfile.Read("a\n.toml", []byte("format = \"arrestcheck job 1\"\n[worker]\nmass = \"100\"\n"), nil)
	row := BrokenRow("a\n.toml", []byte("x"), err, 3, testTool)
	if !row.Broken() || row.Code != 3 || len(row.Errors) < 3 || row.Job.SHA256 != digest([]byte("x")) || row.Results != "" {
		t.Errorf("%+v", row)
	}
	for _, e := range row.Errors {
		if strings.Contains(e, "\n") {
			t.Errorf("%q", e)
		}
	}
	many := &jobfile.Faults{List: slices.Repeat([]jobfile.Fault{{File: "a", Reason: "r"}}, 25)}
	if row := BrokenRow("a", nil, many, 3, testTool); len(row.Errors) != 21 || row.Errors[20] != "and 5 more" {
		t.Errorf("%q", row.Errors)
	}
	if row := BrokenRow("a", nil, errors.New("cannot read"), 4, testTool); !slices.Equal(row.Errors, []string{"cannot read"}) {
		t.Errorf("%q", row.Errors)
	}
}

// The three forms hold the same rows, the text within 80 columns.
func TestRegisterForms(t *testing.T) {
	var rows []Row
	for _, name := range jobNames(t) {
		rows = append(rows, rowOf(t, name))
	}
	rows = append(rows, BrokenRow("jobs/broken.toml", nil, errors.New("cannot read"), 4, testTool))

	lines := strings.SplitAfter(strings.TrimSuffix(register(t, Lines, false, rows...), "\n"), "\n")
	cells, err := csv.NewReader(strings.NewReader(register(t, CSV, false, rows...))).ReadAll()
	if err != nil || len(lines) != len(rows) || len(cells) != len(rows)+1 {
		t.Fatalf("%d lines, %d lines of cells, %d rows, %v", len(lines), len(cells), len(rows), err)
	}
	page := register(t, Text, false, rows...)
	for i, row := range rows {
		var j jsonRow
		if err := json.Unmarshal([]byte(lines[i]), &j); err != nil || j.File != row.File || j.Format != RegisterFormat || j.Results != row.Results {
			t.Errorf("%v: %s", err, lines[i])
		}
		if len(cells[i+1]) != len(csvHead) || cells[i+1][0] != row.File {
			t.Errorf("%q", cells[i+1])
		}
		if !strings.Contains(strings.Join(strings.Fields(page), ""), strings.Join(strings.Fields(row.Job.Title), "")) && row.Job.Title != "" &&
			!strings.Contains(page, row.Job.Reference) {
			t.Errorf("%s is not on the page", row.File)
		}
	}
	for line := range strings.Lines(page) {
		if n := len([]rune(strings.TrimSuffix(line, "\n"))); n > 80 {
			t.Errorf("%d wide: %s", n, line)
		}
	}
	if !strings.Contains(page, "S-83") || !strings.Contains(page, fmt.Sprintf("Jobs: %d.", len(rows))) {
		t.Error("the statement or the count is missing")
	}
}

// Text pages of many rows keep their columns: every head is the same line.
func TestRegisterPagesLineUp(t *testing.T) {
	long, short := rowOf(t, "settled.toml"), BrokenRow("x", nil, errors.New("no"), 4, testTool)
	rows := append(slices.Repeat([]Row{long}, pageRows), slices.Repeat([]Row{short}, pageRows)...)
	heads := map[string]int{}
	for line := range strings.Lines(register(t, Text, false, rows...)) {
		if strings.HasPrefix(line, "no ") {
			heads[line]++
		}
	}
	if len(heads) != 1 {
		t.Errorf("%v", heads)
	}
	for _, n := range heads {
		if n != 2 {
			t.Errorf("%d heads", n)
		}
	}
}

// A register of jobs without a person speaks of none.
func TestRegisterWithoutPersons(t *testing.T) {
	page := register(t, Text, false, rowOf(t, "tool-tether.toml"), rowOf(t, "load-slope.toml"))
	_, rows, _ := strings.Cut(page, "Register of jobs")
	for _, word := range []string{"the body", "person", "rescue"} {
		if strings.Contains(rows, word) {
			t.Errorf("%q in\n%s", word, rows)
		}
	}
}

// A word for none is no rescue method in any form of the register, and a job
// without a person is not asked for one.
func TestRegisterRescue(t *testing.T) {
	for _, c := range []struct {
		job, text string
		want      Rescue
		line      string
	}{
		{"settled.toml", "hoist on the rail, two persons", RescueNamed, "rescue: hoist on the"},
		{"settled.toml", "", RescueNotNamed, "rescue: nothing"},
		{"settled.toml", "n/a", RescueNotNamed, `rescue: "n/a", which`},
		{"settled.toml", "TBD", RescueNotNamed, `rescue: "TBD", which`},
		{"settled.toml", "-", RescueNotNamed, `rescue: "-", which is`},
		{"settled.toml", "None.", RescueNotNamed, `rescue: "None.",`},
		{"tool-tether.toml", "", RescueNotAsked, ""},
		{"tool-tether.toml", "none", RescueNotAsked, "rescue: none"},
	} {
		s := sheet(t, c.job)
		s.File.Document.Rescue = c.text
		row := RowOf(c.job, s, 2)
		if row.Rescue != c.want {
			t.Errorf("%q: %s, want %s", c.text, row.Rescue, c.want)
		}
		page := register(t, Text, false, row)
		if !strings.Contains(page, c.line) || strings.Contains(page, "Without a rescue method: 1.") != (c.want == RescueNotNamed) {
			t.Errorf("%q:\n%s", c.text, page)
		}
		if lines := register(t, Lines, false, row); !strings.Contains(lines, `"rescue_method":"`+string(c.want)+`"`) {
			t.Errorf("%q:\n%s", c.text, lines)
		}
		cells, err := csv.NewReader(strings.NewReader(register(t, CSV, false, row))).ReadAll()
		if err != nil || cells[1][slices.Index(csvHead, "rescue_method")] != string(c.want) ||
			cells[1][slices.Index(csvHead, "rescue")] != reportgen.GuardCell(c.text) {
			t.Errorf("%q: %q, %v", c.text, cells, err)
		}
	}
}

// A detached row says the same, in texts of its own.
func TestDetach(t *testing.T) {
	row, want := rowOf(t, "metric-basic.toml"), rowOf(t, "metric-basic.toml")
	before := unsafe.StringData(row.Job.Title)
	row.Detach()
	if diff := cmp.Diff(want, row, absent); diff != "" {
		t.Error(diff)
	}
	if unsafe.StringData(row.Job.Title) == before {
		t.Error("the title is still part of the file")
	}
}
