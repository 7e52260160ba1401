package archive

import (
	"bytes"
	"encoding/csv"
	"encoding/json"
	"fmt"
	"regexp"
	"strings"
	"testing"
	"unicode"

	"arrestcheck/reportgen"
)

// hostile holds texts that terminals, spreadsheets, tables and shells could
// take for more than text.
var hostile = []string{
	"\x1b]0;title\x07\x1b[2J\x1b[31m", "a\r\nb\tc\x00d", "\u202egnp.exe\u2066", "=HYPERLINK(\"http://x\";\"y\")", "+cmd|' /C calc'!A0", "@SUM(1)", "-2+3",
	"a | b || c\n|---|", "```\n# h\n<script>alert(1)</script>", "$(touch x)`touch y`; rm -rf *", "%s%n%d {title} {0}", "Z\u0351\u0352\u0353\u0354algo", "名前が長い名前が長い名前が長い名前が長い",
	strings.Repeat("W", 300), "\u200b\u200d\ufeff", "\"quoted\", 'so'",
}

// hostileJob is a job with a hostile text wherever there is a text.
func hostileJob(s string) string {
	q, err := json.Marshal(s)
	if err != nil {
		panic(err)
	}
	// A text of TOML is one of JSON but for the escape of a slash, which JSON
	// does not write, and for DEL, which stands in none of the texts.
	text := string(q)
	return fmt.Sprintf(`format = "arrestcheck job 1"
[document]
title = %[1]s
site = %[1]s
reference = %[1]s
revision = %[1]s
date = %[1]s
purpose = %[1]s
system = %[1]s
rescue = %[1]s
prepared_by = %[1]s
checked_by = %[1]s
review_date = %[1]s
[worker]
mass = { value = "92 kg ± 1 kg", source = "measured", note = %[1]s }
tools = "4 kg"
[fall]
free_fall = { value = "1.5 m", source = "drawing", note = %[1]s }
[[rated]]
document = %[1]s
total_mass = "59 kg .. 140 kg"
free_fall_at_most = "1.8 m"
peak_force_at_most = "6 kN"
[[limit]]
id = %[1]s
quantity = "peak_force"
at_most = "6 kN"
authority = %[1]s
edition = %[1]s
kind = "person"
applies_when = %[1]s
note = %[1]s
`, text)
}

// outputs are all that this package writes about one job.
func outputs(t *testing.T, s string) map[string]string {
	t.Helper()
	name := s + ".toml"
	in := &Inputs{Name: name, Job: []byte(hostileJob(s))}
	first, err := work(t)(in)
	if err != nil {
		t.Fatalf("%q: %v", s, err)
	}
	files, err := Pack(&Contents{Sheet: first, Job: in.Job, Units: "both"})
	if err != nil {
		t.Fatal(err)
	}
	row := RowOf(name, first, 2)
	a, b := Of(first), Of(sheet(t, "settled.toml"))
	comparison := Compare(&a, &b)
	changed := reproduced(t, change(t, files, jobFile, replace("92 kg", "93 kg")), set(t, [3]string{"x", "peak_force", "5 kN"}))
	changed.Archive = name
	refusal := &Refusal{[]string{s}}

	all := map[string]string{
		"register text": register(t, Text, true, row, Row{File: name, Errors: []string{s}}, Row{File: name, Change: Gone}),
		"register csv":  register(t, CSV, true, row, Row{File: name, Errors: []string{s}}),
		"register json": register(t, Lines, true, row, Row{File: name, Errors: []string{s}}),
		"packed text":   text(t, Packed(name, files, first)),
		"bag-info":      string(fileNamed(files, infoFile).Data),
		"record":        string(fileNamed(files, recordFile).Data),
	}
	for title, report := range map[string]reportgen.Report{"reproduced": changed.Report(), "compared": comparison.Report(), "refused": RefusedReport(name, refusal)} {
		all[title+" text"] = text(t, report)
		var md bytes.Buffer
		if err := reportgen.Markdown(&md, report, reportgen.MarkdownOptions{}); err != nil {
			t.Fatal(err)
		}
		all[title+" markdown"] = md.String()
	}
	for title, write := range map[string]func(*bytes.Buffer) error{
		"reproduced json": func(b *bytes.Buffer) error { return changed.JSON(b) },
		"compared json":   func(b *bytes.Buffer) error { return comparison.JSON(b) },
		"refused json":    func(b *bytes.Buffer) error { return RefusedJSON(b, name, refusal) },
	} {
		var b bytes.Buffer
		if err := write(&b); err != nil {
			t.Fatal(err)
		}
		all[title] = b.String()
	}
	return all
}

// Nothing that anybody typed reaches a terminal as more than text, breaks a
// line or a table, or begins a formula.
func TestHostileTexts(t *testing.T) {
	for _, s := range hostile {
		for name, out := range outputs(t, s) {
			for _, r := range out {
				if r != '\n' && !unicode.IsPrint(r) && r != unicode.ReplacementChar {
					t.Errorf("%q: %s holds %U", s, name, r)
				}
			}
			switch _, form, _ := strings.Cut(name, " "); form {
			case "text":
				within80(t, s, name, out)
			case "csv":
				cellsHold(t, s, out)
			case "json":
				for line := range strings.Lines(out) {
					if !json.Valid([]byte(line)) {
						t.Errorf("%q: %s: %s", s, name, line)
					}
				}
			case "markdown":
				tablesHold(t, s, name, out)
			}
		}
	}
}

func within80(t *testing.T, s, name, out string) {
	for line := range strings.Lines(out) {
		n := 0
		for _, r := range strings.TrimSuffix(line, "\n") {
			if !unicode.Is(unicode.Mn, r) { // combining marks stand on other letters
				n++
			}
		}
		if n > 80 {
			t.Errorf("%q: %s: %d wide: %s", s, name, n, line)
		}
	}
}

// cellsHold looks at a CSV as a spreadsheet does: as many cells in each row, no
// formula in any, no line break in any.
func cellsHold(t *testing.T, s, out string) {
	rows, err := csv.NewReader(strings.NewReader(out)).ReadAll()
	if err != nil || len(rows) != 3 {
		t.Errorf("%q: %d rows, %v", s, len(rows), err)
	}
	for _, cells := range rows {
		for _, cell := range cells {
			if bare := strings.TrimSpace(cell); bare != "" && strings.ContainsRune("=+-@", rune(bare[0])) || strings.ContainsAny(cell, "\n\r\t") {
				t.Errorf("%q: a cell %q", s, cell)
			}
		}
	}
}

var bar = regexp.MustCompile(`(^|[^\\])\|`)

// tablesHold counts the cells of every line of a table.
func tablesHold(t *testing.T, s, name, out string) {
	cells := 0
	for line := range strings.Lines(out) {
		n := len(bar.FindAllString(line, -1))
		switch {
		case !strings.HasPrefix(line, "|"):
			if n > 0 {
				t.Errorf("%q: %s: a bar outside of a table: %s", s, name, line)
			}
			cells = 0
		case cells == 0:
			cells = n
		case n != cells:
			t.Errorf("%q: %s: %d bars in place of %d: %s", s, name, n, cells, line)
		}
		if strings.Contains(line, "<script") {
			t.Errorf("%q: %s: %s", s, name, line)
		}
	}
}

// The user's text itself is untouched in JSON.
func TestHostileTextsComeBack(t *testing.T) {
	for _, s := range hostile {
		var j jsonRow
		if err := json.Unmarshal([]byte(strings.SplitAfter(outputs(t, s)["register json"], "\n")[0]), &j); err != nil || j.Title != s || j.File != s+".toml" {
			t.Errorf("%q comes back as %q, %v", s, j.Title, err)
		}
	}
}
