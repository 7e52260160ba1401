package jobfile

import (
	"regexp"
	"testing"

	"pgregory.net/rapid"
)

// What a reader takes for a year is what the schema takes for one.
func TestYearIsThatOfTheSchema(t *testing.T) {
	pattern := regexp.MustCompile(yearPattern)
	check := func(t interface{ Errorf(string, ...any) }, s string) {
		if got, want := holdsYear(s), pattern.MatchString(s); got != want {
			t.Errorf("%q: %v, want %v", s, got, want)
		}
	}
	for _, s := range []string{"", "2025", "3 June 2025", "June 25", "20250603", "2025-06-03", "٢٠٢٥", "x2025y", "12 345 6789", "2025\xff", "12345 2025"} {
		check(t, s)
	}
	rapid.Check(t, func(t *rapid.T) { check(t, rapid.StringMatching(`[0-9 x.-]{0,12}`).Draw(t, "text")) })
}
