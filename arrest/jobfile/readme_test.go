package jobfile_test

import (
	"os"
	"strings"
	"testing"

	"arrestcheck/arrest"
	"arrestcheck/limits"
)

// The README names every quantity that a limit can bound and every source.
func TestReadmeNamesQuantitiesAndSources(t *testing.T) {
	data, err := os.ReadFile("../../README.md")
	if err != nil {
		t.Fatal(err)
	}
	readme := string(data)
	above, below, found := strings.Cut(readme, "limits from below (`at_least`) on")
	_, above, begins := strings.Cut(above, "Limits from above (`at_most`) can be set on")
	if !found || !begins {
		t.Fatal("the lists of quantities are not found")
	}
	below, _, _ = strings.Cut(below, ".")
	for _, r := range arrest.Quantities() {
		sense, can := limits.SenseOf(r.ID)
		name := "`" + string(r.ID) + "`"
		if strings.Contains(above, name) != (can && sense == limits.AtMost) || strings.Contains(below, name) != (can && sense == limits.AtLeast) {
			t.Errorf("%s stands in the wrong list, or in none", name)
		}
	}
	for _, s := range arrest.Sources() {
		if !strings.Contains(readme, "`"+string(s)+"`") {
			t.Errorf("no source %q", s)
		}
	}
}
