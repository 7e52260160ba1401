package reportgen

import (
	"io/fs"
	"os"
	"path/filepath"
	"regexp"
	"slices"
	"strings"
	"testing"
)

// allStatements are the numbered statements of wording.go.
func allStatements() map[string]statement {
	list := make(map[string]statement)
	for _, st := range []statement{
		whoDecides, limitsAreTheUsers, notLookedAt, hanging, floorsNotPeaks, notThisStop,
		measureFirst, outsideData, thisLayoutOnly, anchorAndLine, noRescueEntered,
	} {
		list[st.number] = st
	}
	for _, st := range ofWarnings {
		list[st.number] = st
	}
	return list
}

// No two statements share a number: the literal S-nn stands once each in
// wording.go.
func TestNumbersAreNotReused(t *testing.T) {
	source, err := os.ReadFile("wording.go")
	if err != nil {
		t.Fatal(err)
	}
	found := regexp.MustCompile(`"S-\d\d"`).FindAllString(string(source), -1)
	slices.Sort(found)
	if unique := slices.Compact(slices.Clone(found)); len(unique) != len(found) || len(found) != len(allStatements()) {
		t.Errorf("%d numbers, %d different, %d statements", len(found), len(unique), len(allStatements()))
	}
}

// SAFETY.md and wording.go say the same, number by number, and SAFETY.md says
// when each is printed and when it is louder.
func TestSafetyPage(t *testing.T) {
	page, err := os.ReadFile("../SAFETY.md")
	if err != nil {
		t.Fatal(err)
	}
	entry := regexp.MustCompile(`(?m)^\*\*(S-\d\d)\*\* (.+)\n\n- Printed: .+\.\n- Louder: (.+)\.$`)
	written := make(map[string]bool)
	for _, m := range entry.FindAllStringSubmatch(string(page), -1) {
		number, text, louder := m[1], m[2], m[3]
		st, ok := allStatements()[number]
		switch {
		case !ok:
			t.Errorf("%s is in SAFETY.md only", number)
		case written[number]:
			t.Errorf("%s stands twice in SAFETY.md", number)
		case st.text != text:
			t.Errorf("%s:\nSAFETY.md  %s\nprinted    %s", number, text, st.text)
		case st.loud != strings.HasPrefix(louder, "always marked"):
			t.Errorf("%s: loud %t, and SAFETY.md says %q", number, st.loud, louder)
		}
		written[number] = true
	}
	for number := range allStatements() {
		if !written[number] {
			t.Errorf("%s is not in SAFETY.md", number)
		}
	}
	if mentions := regexp.MustCompile(`(?m)^\*\*S-`).FindAllString(string(page), -1); len(mentions) != len(written) {
		t.Errorf("%d entries in SAFETY.md, %d complete", len(mentions), len(written))
	}
}

// Every statement is cited by a test, by its number.
func TestEveryStatementIsCited(t *testing.T) {
	var tests strings.Builder
	for _, path := range testFiles(t, "..") {
		source, err := os.ReadFile(path)
		if err != nil {
			t.Fatal(err)
		}
		tests.Write(source)
	}
	for number := range allStatements() {
		if !strings.Contains(tests.String(), number) {
			t.Errorf("no test cites %s", number)
		}
	}
}

func testFiles(t *testing.T, root string) []string {
	t.Helper()
	var list []string
	err := filepath.WalkDir(root, func(path string, d fs.DirEntry, err error) error {
		if err == nil && strings.HasSuffix(path, "_test.go") {
			list = append(list, path)
		}
		return err
	})
	if err != nil {
		t.Fatal(err)
	}
	return list
}

func goFiles(t *testing.T, folder string) []string {
	t.Helper()
	list, err := filepath.Glob(filepath.Join(folder, "*.go"))
	if err != nil || len(list) == 0 {
		t.Fatal("no files in ", folder, err)
	}
	return list
}
