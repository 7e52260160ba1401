package reportgen

import (
	"strings"
	"testing"
)

// A text of the user stands in quotation marks that it cannot close.
func TestQuote(t *testing.T) {
	long := strings.Repeat("é", longestOnPageOne)
	for in, want := range map[string]string{
		"":                "",
		"two\nlines":      `"two lines"`,
		`a" Limits: 0 "b`: `"a' Limits: 0 'b"`,
		long:              `"` + long + `"`,
		long + "x":        `"` + long + `..."`,
	} {
		if got := quote(in); got != want {
			t.Errorf("%q: %q, want %q", in, got, want)
		}
	}
}

// No text of the document stands bare on page 1; what is cut there stands whole
// behind it.
func TestUserTextsOnPageOne(t *testing.T) {
	s := fixture(t)
	long := "the limits are all within, " + strings.Repeat("na ", 100) + "end"
	s.File.Document.System = long
	out := strings.Join(strings.Fields(asText(t, s, BothUnits, TextOptions{})), " ")
	page, behind, _ := strings.Cut(out, behindHeading)
	for _, want := range []string{`Question "how hard is the stop"`, `Job "Lamp change"`, `Revision "B"`, `Rescue "ladder team"`, `System "the limits are all within, na `, `na..."`, `"site rule 4"`} {
		if !strings.Contains(page, want) {
			t.Errorf("no %s on page 1", want)
		}
	}
	if strings.Contains(page, "na end") || !strings.Contains(behind, longTextsHeading+" ") || !strings.Contains(behind, "na end") {
		t.Error("the long text is not cut, or does not stand behind page 1")
	}
}

// A word for none is no rescue method: S-34 is printed, and the line says so.
func TestNoRescueMethod(t *testing.T) {
	for text, is := range map[string]bool{
		"none": false, "None.": false, "-": false, "n/a": false, "N.A.": false, "no": false, "TBD": false, "tbd...": false, "?": false, "...": false,
		"not yet": false, "To be  decided.": false, "--": false, "": false, "1": false,
		"none needed below 2 m: ladder team stands by": true, "ladder team": true, "no. 3 crane and two trained persons": true, "梯": true,
	} {
		if IsRescue(text) != is {
			t.Errorf("%q: %t", text, !is)
		}
		s := fixture(t)
		s.File.Document.Rescue = text
		out := strings.Join(strings.Fields(asText(t, s, BothUnits, TextOptions{})), " ")
		if strings.Contains(out, "! S-34") == is {
			t.Errorf("%q: S-34 printed: %t", text, is)
		}
		if text != "" && strings.Contains(out, `that is no rescue method (S-34)`) == is {
			t.Errorf("%q: the line says so: %t", text, is)
		}
	}
}
