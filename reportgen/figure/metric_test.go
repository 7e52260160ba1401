package figure

import (
	"strings"
	"testing"
	"unicode/utf8"

	"pgregory.net/rapid"
)

// Widths of the sans-serif font in thousandths, from its table hmtx; the digits
// are all 556, so that columns of figures stand in line.
func TestTextWidth(t *testing.T) {
	for text, want := range map[string]float64{
		"": 0, " ": 278, "iii": 666, "MW": 833 + 944, "0123456789": 5560, "~": 584, "ÿ": 500, "±": 549, "≤": 549, "é": 556,
	} {
		if got, exact := textWidth(text, 1000); got != want || !exact {
			t.Errorf("%q is %v wide, not %v", text, got, want)
		}
	}
	for _, text := range []string{"落", "Ж", "ĳ", "x\u0301"} {
		if _, exact := textWidth(text, 1000); exact {
			t.Errorf("the width of %q is taken from a table that does not have it", text)
		}
	}
}

func TestColumns(t *testing.T) {
	for text, want := range map[string]int{"": 0, "6 kN": 4, "落下": 4, "e\u0301": 1, "±": 1, "👷": 2, "한": 2, "ｱ": 1} {
		if got := columns(text); got != want {
			t.Errorf("%q takes %d columns, not %d", text, got, want)
		}
	}
}

// Wrapped lines fit, lose nothing but blanks, and break words only where they
// must.
func TestWrap(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		text := clean(anyText(t, "text"))
		room := rapid.IntRange(2, 30).Draw(t, "room")
		lines := wrap(text, func(s string) bool { return columns(s) <= room })
		for _, line := range lines {
			if columns(line) > room || line == "" || !utf8.ValidString(line) {
				t.Errorf("the line %q of %d", line, room)
			}
		}
		if strings.Join(strings.Fields(strings.Join(lines, "")), "") != squeezed(text) {
			t.Errorf("%q becomes %q", text, lines)
		}
	})
}
