package jobfile_test

import (
	"errors"
	"slices"
	"strings"
	"testing"

	"arrestcheck/arrest/jobfile"
)

func TestFaultsAsText(t *testing.T) {
	for _, c := range []struct {
		name   string
		faults []jobfile.Fault
		want   string
	}{
		{"everything", []jobfile.Fault{{File: "a.toml", Line: 5, Key: "worker.mass", Text: "100", Reason: "a bare number has no unit", Hint: "write: mass = \"100 kg\"\n   or: nothing"}},
			"a.toml:5: worker.mass: \"100\": a bare number has no unit\n    write: mass = \"100 kg\"\n       or: nothing\n1 fault; nothing was calculated"},
		{"as little as can be, from standard input", []jobfile.Fault{{File: "-", Reason: "the file is empty", Hint: "write: something"}},
			"standard input: the file is empty\n    write: something\n1 fault; nothing was calculated"},
		{"two files", []jobfile.Fault{{File: "a", Reason: "x", Hint: "y"}, {File: "b", Reason: "x", Hint: "y"}},
			"a: x\n    y\nb: x\n    y\n2 faults in 2 files; nothing was calculated"},
		{"nothing raw", []jobfile.Fault{{File: "a\x1b[2J", Key: "k\ney", Text: "t\u202e\x00", Reason: "r\a\xff", Hint: "h\t\u200b"}},
			"a\\x1b[2J: k\\ney: \"t\\u202e\\x00\": r\\a\\xff\n    h\\t\\u200b\n1 fault; nothing was calculated"},
		{"a line of a file", []jobfile.Fault{{File: "a", Text: `title = "x`, Reason: "r", Hint: "h"}},
			"a: `title = \"x`: r\n    h\n1 fault; nothing was calculated"},
		{"a long text", []jobfile.Fault{{File: "a", Text: strings.Repeat("ä", 81), Reason: "r", Hint: "h"}},
			"a: \"" + strings.Repeat("ä", 80) + "...\": r\n    h\n1 fault; nothing was calculated"},
	} {
		if got := (&jobfile.Faults{List: c.faults}).Error(); got != c.want {
			t.Errorf("%s:\n%s\nwant\n%s", c.name, got, c.want)
		}
	}
}

func TestManyFaults(t *testing.T) {
	text := (&jobfile.Faults{List: slices.Repeat([]jobfile.Fault{{File: "a", Reason: "r", Hint: "h"}}, 203)}).Error()
	if n := strings.Count(text, "a: r\n"); n != 200 || !strings.HasSuffix(text, "\nand 3 faults more, not printed\n203 faults; nothing was calculated") {
		t.Errorf("%d faults printed, %s", n, text[len(text)-100:])
	}
}

func TestUnreadable(t *testing.T) {
	f := &jobfile.Faults{List: []jobfile.Fault{{Reason: "refused"}}}
	if f.Unreadable() {
		t.Error("a refused file counts as unreadable")
	}
	f.List = append(f.List, jobfile.Fault{Reason: "broken disk", Unreadable: true})
	if !f.Unreadable() {
		t.Error("an unreadable file is not told")
	}
}

// refusal reads a job that has to be refused and returns its faults.
func refusal(t *testing.T, job string) *jobfile.Faults {
	t.Helper()
	_, err := jobfile.Read("job.toml", []byte(job), nil)
	var faults *jobfile.Faults
	if !errors.As(err, &faults) {
		t.Fatalf("no *Faults: %v", err)
	}
	wellFormed(t, faults)
	return faults
}

func TestFilesBeyondReason(t *testing.T) {
	const top = "format = \"arrestcheck job 1\"\n"
	for _, c := range []struct{ name, job, reason string }{
		{"one byte over 1 MiB", top + "#" + strings.Repeat("x", 1<<20-len(top)), "larger than 1048576 bytes"},
		{"a deep list", top + "a = " + strings.Repeat("[", 500000), "nested too deeply"},
		{"deep tables", top + "a = " + strings.Repeat("{a=", 300000), "nested too deeply"},
		{"a long key", top + strings.Repeat("a.", 500000) + "b = 1", "nested too deeply"},
		{"a long heading", top + "[" + strings.Repeat("a.", 500000) + "b]", "nested too deeply"},
		{"more sections than anybody reads", top + strings.Repeat("[[limit]]\n", 401), "more than 400 sections"},
		{"more keys than anybody reads", top + strings.Repeat("k=1\n", 6001), "6000 keys"},
		{"NUL", "\x00" + top, "control character"},
	} {
		faults := refusal(t, c.job)
		if len(faults.List) != 1 || !strings.Contains(faults.List[0].Reason, c.reason) {
			t.Errorf("%s: %.300v", c.name, faults)
		}
	}
}

// What is just within bounds is read as far as it goes.
func TestFilesWithinReason(t *testing.T) {
	good := minimalJob
	padded := good + "#" + strings.Repeat("x", 1<<20-len(good)-1)
	if _, err := jobfile.Read("job.toml", []byte(padded), nil); err != nil {
		t.Error(err)
	}
	dotted := good + strings.Repeat("# 1.0\n", 3000)
	if _, err := jobfile.Read("job.toml", []byte(dotted), nil); err != nil {
		t.Error(err)
	}
	if faults := refusal(t, good+strings.Repeat("[[rated]]\n", 300)); len(faults.List) != 4*300 {
		t.Errorf("%d faults, 4 for each of 300 empty ratings expected", len(faults.List))
	}
	if faults := refusal(t, good+"deep = "+strings.Repeat("[", 500)+strings.Repeat("]", 500)+"\n"); len(faults.List) != 1 {
		t.Errorf("a list of 500 lists: %v", faults)
	}
}

func TestByteOrderMark(t *testing.T) {
	if _, err := jobfile.Read("job.toml", []byte("\xef\xbb\xbf"+minimalJob), nil); err != nil {
		t.Error(err)
	}
	faults := refusal(t, "\xef\xbb\xbf"+strings.Replace(minimalJob, `"92 kg"`, "92", 1))
	if f := faults.List[0]; f.Line != 5 || f.Text != "92" {
		t.Errorf("behind a byte order mark: %+v", f)
	}
	if f := refusal(t, "\xef\xbb\xbfexample = 1\n"+minimalJob).List[0]; f.Line != 1 || f.Text != "1" {
		t.Errorf("on the line of a byte order mark: %+v", f)
	}
	if f := refusal(t, "\xef\xbb\xbf[document]\n= 3\n").List[0]; f.Line != 2 || f.Text != "= 3" {
		t.Errorf("broken behind a byte order mark: %+v", f)
	}
}

// The decoder gives a map: its order must not show.
func TestOrderOfFaultsOnOneLine(t *testing.T) {
	job := strings.Replace(minimalJob, `"92 kg"`, `{ value = "92 kg", h = 1, c = 1, a = 1, f = 1, e = 1, g = 1, b = 1, d = 1 }`, 1)
	var keys []string
	for _, f := range refusal(t, job).List {
		keys = append(keys, strings.TrimPrefix(f.Key, "worker.mass."))
	}
	if want := []string{"a", "b", "c", "d", "e", "f", "g", "h"}; !slices.Equal(keys, want) {
		t.Errorf("%v, want %v", keys, want)
	}
}

const minimalJob = `format = "arrestcheck job 1"
[document]
title = "Roof light, boiler house"
[worker]
mass = "92 kg"
tools = "4 kg"
[fall]
free_fall = "1.5 m"
`
