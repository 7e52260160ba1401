package reportgen

import (
	"flag"
	"os"
	"path/filepath"
	"strings"
	"testing"

	"github.com/google/go-cmp/cmp"
)

var update = flag.Bool("update", false, "write the golden files anew")

const goldenFolder = "../testdata/golden"

// Whole reports of jobs in testdata/jobs. They prove sameness, not rightness:
// read the difference before you write them anew with
//
//	go test ./reportgen -run Golden -update
//
// and raise arrest.ModelVersion if a number of an unchanged job changed.
func TestGolden(t *testing.T) {
	expected := map[string]bool{demoGolden: true}
	golden(t, filepath.Join(goldenFolder, demoGolden), asMarkdown(t, demoSheet(t), MarkdownOptions{}))
	for _, g := range []struct {
		file, job string
		write     func(*Sheet) string
	}{
		{"metric-settled.txt", "metric-settled.toml", func(s *Sheet) string { return asText(t, s, BothUnits, TextOptions{}) }},
		{"feet-and-pounds.txt", "feet-and-pounds.toml", func(s *Sheet) string { return asText(t, s, BothUnits, TextOptions{}) }},
		{"bands-si.txt", "bands.toml", func(s *Sheet) string { return asText(t, s, SIUnits, TextOptions{}) }},
		{"rated-too-far-us-ascii.txt", "rated-too-far.toml", func(s *Sheet) string { return asText(t, s, USUnits, TextOptions{ASCII: true}) }},
		{"example-values-color.txt", "example-values.toml", func(s *Sheet) string { return asText(t, s, BothUnits, TextOptions{Color: true}) }},
		{"path-exhausted.txt", "path-rope-absorber-40.toml", func(s *Sheet) string { return asText(t, s, BothUnits, TextOptions{}) }},
		{"path-exhausted.json", "path-rope-absorber-40.toml", func(s *Sheet) string { return asJSON(t, s) }},
		{"path-no-allowance.md", "path-no-allowance.toml", func(s *Sheet) string { return asMarkdown(t, s, MarkdownOptions{}) }},
		{"load-swing.txt", "load-swing.toml", func(s *Sheet) string { return asText(t, s, BothUnits, TextOptions{}) }},
		{"load-swing.json", "load-swing.toml", func(s *Sheet) string { return asJSON(t, s) }},
		{"tool-tether-si.txt", "tool-tether.toml", func(s *Sheet) string { return asText(t, s, SIUnits, TextOptions{}) }},
		{"layout-two-positions.txt", "layout-two-positions.toml", func(s *Sheet) string { return asText(t, s, BothUnits, TextOptions{}) }},
		{"layout-path.json", "layout-path.toml", func(s *Sheet) string { return asJSON(t, s) }},
		{"layout-edge.md", "layout-edge.toml", func(s *Sheet) string { return asMarkdown(t, s, MarkdownOptions{}) }},
		{"explain-peak.txt", "feet-and-pounds.toml", func(s *Sheet) string { return explainText(t, s) }},
		{"metric-settled.json", "metric-settled.toml", func(s *Sheet) string { return asJSON(t, s) }},
		{"two-persons.json", "two-persons.toml", func(s *Sheet) string { return asJSON(t, s) }},
	} {
		expected[g.file] = true
		golden(t, filepath.Join(goldenFolder, g.file), g.write(sheet(t, g.job)))
	}
	found, err := filepath.Glob(filepath.Join(goldenFolder, "*"))
	if err != nil {
		t.Fatal(err)
	}
	for _, path := range found {
		if !expected[filepath.Base(path)] {
			t.Errorf("%s belongs to no test", path)
		}
	}
}

const demoGolden = "demo.md"

// demoSheet works out the demo of the command.
func demoSheet(t *testing.T) *Sheet {
	t.Helper()
	const folder = "../cmd/arrestcheck/demo"
	data, err := os.ReadFile(filepath.Join(folder, "job.toml"))
	if err != nil {
		t.Fatal(err)
	}
	return workedIn(t, folder, "job.toml", data)
}

// explainText explains the first row of a sheet.
func explainText(t *testing.T, s *Sheet) string {
	t.Helper()
	r, ok := Explain(s, s.Assessment.Findings[0].Limit.ID, BothUnits)
	var b strings.Builder
	if err := Text(&b, r, TextOptions{}); err != nil || !ok {
		t.Fatal(err, ok)
	}
	return b.String()
}

func golden(t *testing.T, path, got string) {
	t.Helper()
	if *update {
		if err := os.MkdirAll(filepath.Dir(path), 0o777); err != nil {
			t.Fatal(err)
		}
		if err := os.WriteFile(path, []byte(got), 0o666); err != nil {
			t.Fatal(err)
		}
	}
	want, err := os.ReadFile(path)
	if err != nil {
		t.Fatal(err)
	}
	if diff := cmp.Diff(strings.Split(string(want), "\n"), strings.Split(got, "\n")); diff != "" {
		t.Errorf("%s differs (- golden, + now):\n%s", path, diff)
	}
}

// No report of any job says a forbidden word, in any form.
func TestReportsSayNoForbiddenWord(t *testing.T) {
	for _, name := range jobNames(t) {
		s := sheet(t, name)
		for _, out := range []string{asText(t, s, BothUnits, TextOptions{}), asJSON(t, s), asMarkdown(t, s, MarkdownOptions{})} {
			if w := forbidden.FindString(out); w != "" {
				t.Errorf("%s: %q", name, w)
			}
		}
	}
}

// The same sheet gives the same bytes.
func TestSameBytes(t *testing.T) {
	for _, name := range jobNames(t) {
		a, b := sheet(t, name), sheet(t, name)
		if asText(t, a, BothUnits, TextOptions{}) != asText(t, b, BothUnits, TextOptions{}) || asJSON(t, a) != asJSON(t, b) {
			t.Errorf("%s: two runs differ", name)
		}
	}
}
