package reportgen

import (
	"go/ast"
	"go/token"
	"io/fs"
	"os"
	"path/filepath"
	"regexp"
	"strconv"
	"strings"
	"testing"
)

// allStatements returns the numbered statements by number. They are read from
// the sources, so that none is forgotten: a statement is a literal that begins
// with its number, S-nn.
func allStatements(t *testing.T) map[string]statement {
	t.Helper()
	weights := map[string]weight{"quiet": quiet, "loud": loud, "loudest": loudest}
	list := make(map[string]statement)
	for _, f := range parsed(t, token.NewFileSet(), ".") {
		ast.Inspect(f, func(n ast.Node) bool {
			lit, ok := n.(*ast.CompositeLit)
			if !ok || len(lit.Elts) != 3 || !statementNumber.MatchString(literalText(lit.Elts[0])) {
				return true
			}
			number := literalText(lit.Elts[0])
			if _, twice := list[number]; twice {
				t.Errorf("%s stands for two statements", number)
			}
			name, named := lit.Elts[1].(*ast.Ident)
			words, worded := lit.Elts[2].(*ast.CompositeLit)
			if !named || !worded || len(words.Elts) != 2 {
				t.Fatalf("%s is written in a way that is not known here", number)
			}
			list[number] = statement{number, weights[name.Name], phrase{text: literalText(words.Elts[1])}}
			return true
		})
	}
	return list
}

var statementNumber = regexp.MustCompile(`^S-\d\d$`)

// literalText returns the text of a string literal, empty where it is none.
func literalText(e ast.Expr) string {
	lit, ok := e.(*ast.BasicLit)
	if !ok || lit.Kind != token.STRING {
		return ""
	}
	s, _ := strconv.Unquote(lit.Value)
	return s
}

// The statements that are read from the sources are those that are printed, and
// no number stands for two.
func TestAllStatements(t *testing.T) {
	list := allStatements(t)
	for _, st := range ofWarnings {
		if read := list[st.number]; read.text != st.text || read.weight != st.weight {
			t.Errorf("%s is read as %+v", st.number, read)
		}
	}
	if len(list) < 52 {
		t.Errorf("only %d statements", len(list))
	}
}

// SAFETY.md and wording.go say the same, number by number, and SAFETY.md says
// when each is printed and when it is louder.
func TestSafetyPage(t *testing.T) {
	page, err := os.ReadFile("../SAFETY.md")
	if err != nil {
		t.Fatal(err)
	}
	all := allStatements(t)
	entry := regexp.MustCompile(`(?m)^\*\*(S-\d\d)\*\* (.+)\n\n- Printed: .+\.\n- Louder: (.+)\.$`)
	written := make(map[string]bool)
	for _, m := range entry.FindAllStringSubmatch(string(page), -1) {
		number, text, louder := m[1], m[2], m[3]
		st, ok := all[number]
		switch {
		case !ok:
			t.Errorf("%s is in SAFETY.md only", number)
		case written[number]:
			t.Errorf("%s stands twice in SAFETY.md", number)
		case st.text != text:
			t.Errorf("%s:\nSAFETY.md  %s\nprinted    %s", number, text, st.text)
		case (st.weight > quiet) != strings.HasPrefix(louder, "always marked"):
			t.Errorf("%s: weight %d, and SAFETY.md says %q", number, st.weight, louder)
		}
		written[number] = true
	}
	for number := range all {
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
	for number := range allStatements(t) {
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

// README, SAFETY.md and the sheet count the published drops alike.
func TestPagesCountTheSameDrops(t *testing.T) {
	args := publishedArguments()
	want := args[0].Text + " published drops of " + args[1].Text + " types of lanyard"
	for _, page := range []string{"../README.md", "../SAFETY.md"} {
		text, err := os.ReadFile(page)
		if err != nil {
			t.Fatal(err)
		}
		if !strings.Contains(strings.Join(strings.Fields(string(text)), " "), want) {
			t.Errorf("%s does not say %q", page, want)
		}
	}
}
