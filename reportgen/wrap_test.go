package reportgen

import (
	"strings"
	"testing"

	"github.com/google/go-cmp/cmp"
	"github.com/olekukonko/tablewriter/pkg/twwidth"
	"pgregory.net/rapid"
)

func TestWrap(t *testing.T) {
	for _, c := range []struct {
		in      string
		columns int
		out     []string
	}{
		{"", 5, []string{""}},
		{"one two three", 7, []string{"one two", "three"}},
		{"one two three", 80, []string{"one two three"}},
		{"abcdefghij k", 4, []string{"abcd", "efgh", "ij k"}},
		{"a 3.42" + noBreak + "kN", 7, []string{"a", "3.42" + noBreak + "kN"}},
		{"安全安全", 5, []string{"安全", "安全"}}, // each takes two columns
		{"moving_load.time", 12, []string{"moving_load.", "time"}},
		{"a/bcdefghijkl", 6, []string{"a/", "bcdefg", "hijkl"}},
		{"\u0301 a", 5, []string{"\u0301 a"}},
		{"_A安", 2, []string{"_", "A", "安"}}, // what stands behind a joint may need a line of its own
	} {
		if diff := cmp.Diff(c.out, wrap(c.in, c.columns)); diff != "" {
			t.Errorf("wrap(%q, %d): %s", c.in, c.columns, diff)
		}
	}
}

// Nothing is lost in wrapping but blanks, and no line is too wide.
func TestWrapKeepsEverything(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		s := printable(rapid.String().Draw(t, "s"), false)
		columns := rapid.IntRange(2, 90).Draw(t, "columns")
		lines := wrap(s, columns)
		for _, l := range lines {
			if w := twwidth.WidthWithOptions(l, twwidth.Options{}); w > columns {
				t.Fatalf("%q takes %d of %d columns", l, w, columns)
			}
		}
		squeeze := func(s string) string { return strings.ReplaceAll(s, " ", "") }
		if got := squeeze(strings.Join(lines, "")); got != squeeze(s) {
			t.Fatalf("%q became %q", s, got)
		}
	})
}

// What is taken to be one wide without asking is so.
func TestWidthOfLatinLetters(t *testing.T) {
	for r := rune(' '); r <= 0x17f; r++ {
		if r >= 0x7f && r < noBreakRune {
			continue // control characters are escaped before
		}
		if want := twwidth.WidthWithOptions(string(r), twwidth.Options{}); runeWidth(r) != want {
			t.Errorf("%q is %d wide, want %d", r, runeWidth(r), want)
		}
	}
}
