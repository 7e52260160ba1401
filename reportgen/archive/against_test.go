package archive

import (
	"slices"
	"strings"
	"testing"
)

// worseCode is the order of the exit codes: 4, 3, 1, 2, 0.
func worseCode(now, then int) bool {
	order := []int{0, 2, 1, 3, 4}
	return slices.Index(order, now) > slices.Index(order, then)
}

// A register in CSV and one in JSON lines say the same of a later one.
func TestAgainst(t *testing.T) {
	settled, basic, rated := rowOf(t, "settled.toml"), rowOf(t, "metric-basic.toml"), rowOf(t, "rated.toml")
	hostile := settled
	hostile.File = "=jobs/\x1b[2J,\"a\".toml"
	before := []Row{settled, basic, rated, hostile}
	for _, layout := range []Layout{CSV, Lines} {
		earlier, err := ReadEarlier(strings.NewReader(register(t, layout, false, before...)))
		if err != nil {
			t.Fatal(err)
		}
		hold := func(row Row, to func(*Row)) (Change, []string) {
			to(&row)
			earlier.Hold(&row, worseCode)
			return row.Change, row.Worse
		}
		for _, c := range []struct {
			name string
			row  Row
			to   func(*Row)
			want Change
			more []string
		}{
			{"as it was", settled, func(*Row) {}, AsBefore, nil},
			{"as it was, a hostile name", hostile, func(*Row) {}, AsBefore, nil},
			{"new", settled, func(r *Row) { r.File = "other.toml" }, New, nil},
			{"another job file", settled, func(r *Row) { r.Job.SHA256 = "0" }, Changed, nil},
			{"other results", settled, func(r *Row) { r.Results = "0" }, Changed, nil},
			{"other mechanics", settled, func(r *Row) { r.Model = "0" }, Changed, nil},
			{"a better code", basic, func(r *Row) { r.Code = 2 }, Changed, nil},
			{"a worse code", settled, func(r *Row) { r.Code = 2 }, Worsened, []string{"code 2, was 0"}},
			{"exceeded is worse than undecided", rated, func(r *Row) { r.Code = 1 }, Worsened, []string{"code 1, was 2"}},
			{"one more exceeded", basic, func(r *Row) { r.Counts.Exceeded, r.Counts.Within = 2, r.Counts.Within-1 }, Worsened,
				[]string{"exceeded 2, was 1"}},
			{"one more not compared", settled, func(r *Row) { r.Counts = Counts{NotCompared: 1, Within: 3} }, Worsened, []string{"not within 1, was 0"}},
			{"one more open", settled, func(r *Row) { r.Open = []string{"x"} }, Worsened, []string{"open inputs 1, was 0"}},
			{"one more left out", settled, func(r *Row) { r.NotEntered = []string{"mass"} }, Worsened, []string{"not entered 1, was 0"}},
			{"rescue lost", settled, func(r *Row) { r.Rescue = RescueNotNamed }, Worsened, []string{"no rescue method, was named"}},
			{"now broken", settled, func(r *Row) { *r = Row{File: r.File, Code: 3, Errors: []string{"x"}} }, Worsened, []string{"code 3, was 0"}},
		} {
			got, worse := hold(c.row, c.to)
			if c.name == "one more exceeded" {
				worse = worse[:1] // what else grows depends on the job
			}
			if got != c.want || !slices.Equal(worse, c.more) {
				t.Errorf("form %d, %s: %s %q, want %s %q", layout, c.name, got, worse, c.want, c.more)
			}
		}
		if gone := earlier.Gone(); len(gone) != 0 {
			t.Errorf("%d gone", len(gone))
		}
	}
}

func TestGone(t *testing.T) {
	rows := []Row{rowOf(t, "settled.toml"), rowOf(t, "rated.toml"), rowOf(t, "bands.toml")}
	for _, layout := range []Layout{CSV, Lines} {
		earlier, err := ReadEarlier(strings.NewReader(register(t, layout, false, rows...)))
		if err != nil {
			t.Fatal(err)
		}
		row := rows[1]
		earlier.Hold(&row, worseCode)
		gone := earlier.Gone()
		if len(gone) != 2 || gone[0].File != rows[0].File || gone[1].File != rows[2].File || gone[0].Change != Gone || gone[0].Job.Reference != "WM-0210" {
			t.Fatalf("%+v", gone)
		}
		// A job that is gone is counted as such and as no job, and a register
		// that tells so can itself be held against.
		again := register(t, layout, true, append([]Row{row}, gone...)...)
		next, err := ReadEarlier(strings.NewReader(again))
		if err != nil || len(next.Gone()) != 1 {
			t.Errorf("form %d: %v, %d", layout, err, len(next.Gone()))
		}
	}
	page := register(t, Text, true, Row{File: "x.toml", Change: Gone}, rows[1])
	if !strings.Contains(page, "Jobs: 1.") || !strings.Contains(page, "1 gone") {
		t.Error(page)
	}
}

func TestReadEarlierRefuses(t *testing.T) {
	row := rowOf(t, "settled.toml")
	lines, cells := register(t, Lines, false, row), register(t, CSV, false, row)
	for name, c := range map[string]struct{ data, why string }{
		"a report":                {"Arithmetic check.\n", `no column "file"`},
		"another CSV":             {"a,b\n1,2\n", `no column "file"`},
		"another version":         {strings.Replace(lines, "register 1", "register 2", 1), "is not known"},
		"a result":                {old, "is not known"},
		"half a line":             {lines[:40], "line 1"},
		"a job twice":             {lines + lines, "line 2: a second row"},
		"a job twice in CSV":      {cells + strings.SplitAfter(cells, "\n")[1], "line 3: a second row"},
		"a word for a number":     {strings.Replace(cells, ",4,", ",four,", 1), "is no number"},
		"cells that do not match": {cells + "a,b\n", "wrong number of fields"},
		"nothing":                 {"", "the file is empty"},
		"a mark and nothing":      {byteOrderMark, "the file is empty"},
	} {
		if _, err := ReadEarlier(strings.NewReader(c.data)); err == nil || !strings.Contains(err.Error(), c.why) {
			t.Errorf("%s: %v, want %q", name, err, c.why)
		}
	}
	if e, err := ReadEarlier(strings.NewReader(byteOrderMark + cells)); err != nil || len(e.Gone()) != 1 {
		t.Errorf("as a spreadsheet saves it: %v", err)
	}
}

func FuzzReadEarlier(f *testing.F) {
	row := rowOf(f, "settled.toml")
	f.Add(register(f, Lines, false, row))
	f.Add(register(f, CSV, false, row))
	f.Fuzz(func(t *testing.T, data string) {
		e, err := ReadEarlier(strings.NewReader(data))
		if err != nil {
			return
		}
		row := Row{File: "a", Code: 2}
		e.Hold(&row, worseCode)
		rows := append(e.Gone(), row)
		register(t, CSV, true, rows...)
		if len(data) < 4<<10 { // laying out tables takes its time, and is tried elsewhere
			register(t, Text, true, rows...)
		}
	})
}
