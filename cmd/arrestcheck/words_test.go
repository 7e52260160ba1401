package main

import (
	"regexp"
	"strings"
	"testing"

	"arrestcheck/arrest"
)

// neverPrinted are the words that would reassure where the program must not.
var neverPrinted = regexp.MustCompile(`(?i)\b(safe|pass(es|ed)?|ok|compliant|approved|adequate|sufficient|acceptable|` +
	`allowable|permitted|harmless|verified|guaranteed|conservative|met|green)\b|[✓✔✅☑]`)

func TestNoReassuringWord(t *testing.T) {
	calls := [][]string{
		{"help"}, {"methods"}, {"units"}, {"version"}, {"demo"}, {"demo", "--format", "json"}, {"demo", "--input"},
		{}, {"chek"}, {"check"}, {"check", "--nope"}, {"check", "--format", "xml", "x"}, {"check", "--force", "x"},
		{"check", "-", "-"}, {"check", "nowhere.toml"}, {"check", "--out", "", "x"}, {"methods", "x"}, {"completion", "x"},
	}
	for _, c := range newRoot(nil, &outcome{}, surroundings{}).Commands() {
		calls = append(calls, []string{"help", c.Name()})
	}
	for _, m := range arrest.Methods() {
		calls = append(calls, []string{"methods", m.ID})
	}
	for _, args := range calls {
		_, stdout, stderr := try(args...)
		for line := range strings.Lines(stdout + "\n" + stderr) {
			if word := neverPrinted.FindString(line); word != "" {
				t.Errorf("%q prints %q: %s", args, word, line)
			}
		}
	}
}

// Nothing that the program lays out itself is wider than a page.
func TestHelpWidth(t *testing.T) {
	calls := [][]string{{"help"}, {"methods"}, {"units"}}
	for _, c := range newRoot(nil, &outcome{}, surroundings{}).Commands() {
		calls = append(calls, []string{"help", c.Name()})
	}
	for _, args := range calls {
		_, stdout, _ := try(args...)
		if stdout == "" {
			t.Errorf("%q prints nothing", args)
		}
		for line := range strings.Lines(stdout) {
			if n := len([]rune(strings.TrimRight(line, "\n"))); n > 80 {
				t.Errorf("%q prints a line of %d: %s", args, n, line)
			}
		}
	}
}
