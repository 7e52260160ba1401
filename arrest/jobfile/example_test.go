package jobfile_test

import (
	"fmt"
	"regexp"
	"slices"
	"strings"
	"testing"

	"arrestcheck/arrest"
	"arrestcheck/arrest/jobfile"
	"arrestcheck/limits"
)

// What stands in the example sets: the rows of the documents named in each,
// as far as they were read there (SEEN) or in a page that restates them
// (SEEN-T). Rows from memory are not shipped.
var exampleRows = map[string][]string{
	"alberta": {
		"SEEN anchor_strength_per_person at_least 16 kN any_of anchor",
		"SEEN strength_over_arrest_force at_least 200 % any_of anchor", // twice the greatest arresting force
	},
	"european-product-tests": {
		"SEEN peak_force at_most 6 kN",           // EN 355
		"SEEN absorber_travel at_most 1.75 m",    // EN 355
		"SEEN peak_force at_most 6 kN",           // EN 353-1, EN 353-2
		"SEEN-T peak_force at_most 6 kN",         // EN 360
		"SEEN-T total_fall_distance at_most 2 m", // EN 360
		"SEEN-T peak_force at_most 12 kN",        // EN 892, UIAA 101
		"SEEN-T peak_force at_most 6 kN",         // EN 1891 A
	},
	"international-product-tests": {
		"SEEN peak_force at_most 4.0 kN", // ISO 10333-2, type 1
		"SEEN peak_force at_most 6.0 kN", // type 2
	},
	"ontario": {
		"SEEN free_fall at_most 1.5 m",
		"SEEN peak_force at_most 8.0 kN",
	},
	"quebec": {
		"SEEN peak_force at_most 6 kN any_of either",
		"SEEN free_fall at_most 1.8 m any_of either",
	},
	"queensland": {
		"SEEN anchor_strength_per_person at_least 12 kN",
		"SEEN anchor_strength_per_person at_least 15 kN",
	},
	"us-construction": {
		"SEEN peak_force at_most 1800 lbf = 8 kN",
		"SEEN-T free_fall at_most 6 ft = 1.8 m",
		"SEEN deceleration_distance at_most 3.5 ft = 1.07 m",
		"SEEN total_mass at_most 310 lb = 140 kg",
		"SEEN anchor_strength_per_person at_least 5000 lbf any_of anchorage",
		"SEEN strength_over_arrest_force at_least 200 % any_of anchorage",
	},
	"us-general-industry": {
		"SEEN-T peak_force at_most 1800 lbf",
		"SEEN-T deceleration_distance at_most 3.5 ft",
	},
	"us-product-tests": {
		"SEEN-T mean_above_level at_most 1350 lbf",
		"SEEN-T peak_force at_most 1800 lbf",
	},
	"washington": {
		"SEEN peak_force at_most 1800 lbf = 8 kN",
		"SEEN free_fall at_most 6 ft",
		"SEEN deceleration_distance at_most 3.5 ft = 1.08 m",
		"SEEN total_mass at_most 310 lb",
	},
}

// exampleSet reads an example set.
func exampleSet(t *testing.T, name string) (text string, set *limits.Set) {
	t.Helper()
	text, err := jobfile.Example(name)
	if err != nil {
		t.Fatal(err)
	}
	set, err = jobfile.ReadLimits(name, []byte(text))
	if err != nil {
		t.Fatalf("%s\n%v", name, err)
	}
	return text, set
}

func TestExampleFigures(t *testing.T) {
	var named []string
	for name := range exampleRows {
		named = append(named, name)
	}
	slices.Sort(named)
	if got := jobfile.Examples(); !slices.Equal(got, named) {
		t.Fatalf("sets %q, the test has %q", got, named)
	}
	for _, name := range named {
		_, set := exampleSet(t, name)
		var rows []string
		for i := range set.Limits {
			l := &set.Limits[i]
			mark, _, _ := strings.Cut(l.Note, ": ")
			row := fmt.Sprintf("%s %s %s %s", mark, l.Quantity, l.Sense, l.Bound.Text)
			if l.AlsoPrinted != nil {
				row += " = " + l.AlsoPrinted.Text
			}
			if l.AnyOf != "" {
				row += " any_of " + l.AnyOf
			}
			rows = append(rows, row)
		}
		if !slices.Equal(rows, exampleRows[name]) {
			t.Errorf("%s:\n%s\nwant\n%s", name, strings.Join(rows, "\n"), strings.Join(exampleRows[name], "\n"))
		}
	}
}

// How a row was read stands in its note and in the comment above it, in one of
// two wordings; nothing is shipped from memory.
func TestExampleMarks(t *testing.T) {
	says := map[string]string{
		"SEEN":   "SEEN: read in the rule, a regulator's letter or an official summary",
		"SEEN-T": "SEEN-T: read only in a page that restates it",
	}
	comment := regexp.MustCompile(`(?m)^# (SEEN(?:-T)?)\b(?:[^\n]*\n#)*[^\n]*\n\[\[limit\]\]\nid +="? ?"([^"]*)"`)
	for _, name := range jobfile.Examples() {
		text, set := exampleSet(t, name)
		above := map[string]string{}
		for _, m := range comment.FindAllStringSubmatch(text, -1) {
			above[m[2]] = m[1]
		}
		for i := range set.Limits {
			l := &set.Limits[i]
			if mark := above[l.ID]; mark == "" || l.Note != says[mark] {
				t.Errorf("%s: %s has the mark %q above it and the note %q", name, l.ID, mark, l.Note)
			}
			if restated := strings.HasPrefix(l.Note, "SEEN-T"); restated != strings.Contains(l.Edition, "restated") {
				t.Errorf("%s: %s: note %q, edition %q", name, l.ID, l.Note, l.Edition)
			}
			if l.Authority == "" || strings.Contains(strings.ToLower(text), "memory") {
				t.Errorf("%s: %s: authority %q", name, l.ID, l.Authority)
			}
		}
	}
}

// A set is an example that nobody checked; product tests have that kind, and
// nothing else has.
func TestExamplesAreCapped(t *testing.T) {
	job, err := jobfile.Read("job", []byte(minimalJob+"[stop]\ndistance = \"0.9 m\"\n"), nil)
	if err != nil {
		t.Fatal(err)
	}
	res := arrest.Evaluate(&job.Job)
	schema := compiled(t, "limits")
	for _, name := range jobfile.Examples() {
		text, set := exampleSet(t, name)
		if !set.Example || set.CheckedOn != "" || !strings.Contains(text, "\n#checked_on  = \"\"\n") || set.Title == "" || set.Jurisdiction == "" {
			t.Errorf("%s: %+v", name, set)
		}
		if _, err := held(schema, []byte(text)); err != nil {
			t.Errorf("%s: %v", name, err)
		}
		if w := never.FindString(text); w != "" {
			t.Errorf("%s holds %q", name, w)
		}
		tests := strings.HasSuffix(name, "product-tests")
		for i := range set.Limits {
			l := &set.Limits[i]
			if (l.Kind == limits.ProductTest) != tests || l.CheckedOn != "" || l.SupersededOn != "" {
				t.Errorf("%s: %+v", name, l)
			}
		}
		a := limits.Assess(&res, []limits.Set{*set}, nil)
		for i := range a.Findings {
			row := &a.Findings[i]
			if row.Outcome == limits.Within {
				t.Errorf("%s: %s is within", name, row.Limit.ID)
			}
			for _, id := range []limits.ReasonID{limits.ExampleValues, limits.NotChecked} {
				if row.Outcome == limits.Undecided && !slices.ContainsFunc(row.Reasons, func(r limits.Reason) bool { return r.ID == id }) {
					t.Errorf("%s: %s does not say %s", name, row.Limit.ID, id)
				}
			}
		}
	}
	if _, err := jobfile.Example("Ontario"); err == nil || !strings.Contains(err.Error(), `no example limit set "Ontario"; there are: alberta, `) {
		t.Errorf("an unknown name: %v", err)
	}
}

// No two rows of all sets have one id, so that several sets can stand in a job.
func TestExampleSetsGoTogether(t *testing.T) {
	seen := map[string]string{}
	for _, name := range jobfile.Examples() {
		_, set := exampleSet(t, name)
		for i := range set.Limits {
			if other, is := seen[set.Limits[i].ID]; is {
				t.Errorf("%s stands in %s and %s", set.Limits[i].ID, other, name)
			}
			seen[set.Limits[i].ID] = name
		}
	}
}
