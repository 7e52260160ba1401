package main

import (
	"slices"
	"strings"
	"testing"

	"arrestcheck/arrest"
	"arrestcheck/arrest/quantity"
	"arrestcheck/arrest/study"
)

// movedJob has one input of each of two dimensions, and one that nothing moves.
func movedJob(t *testing.T) *arrest.Job {
	t.Helper()
	j := &arrest.Job{}
	add := func(key string, d quantity.Dimension, text string, set func(*arrest.Case, float64)) {
		b, err := quantity.Parse(d, text)
		if err != nil {
			t.Fatal(err)
		}
		j.Inputs = append(j.Inputs, arrest.Input{Key: key, Role: arrest.OfStop, Band: b, Set: set})
	}
	add("stop.distance", quantity.Length, "1 m", func(c *arrest.Case, x float64) { c.Distance = x })
	add("stop.time", quantity.Time, "0.3 s", func(c *arrest.Case, x float64) { c.Time = x })
	add("rated[1].peak_force_at_most", quantity.Force, "6 kN", nil)
	return j
}

func TestParseVary(t *testing.T) {
	for text, want := range map[string][]float64{
		"stop.distance=0.5m..2m,4":            {0.5, 1, 1.5, 2},
		"stop.distance = 0.5 .. 2 m , 4 ":     {0.5, 1, 1.5, 2},
		"stop.distance=1m..100m,log,3":        {1, 10, 100},
		"stop.distance=1m..100m,3,log":        {1, 10, 100},
		"stop.distance=2 m, 0.5m,1 m":         {0.5, 1, 2},
		"stop.distance=1 ft, 2 ft":            {0.3048, 0.6096},
		"stop.time=300 ms":                    {0.3},
		"stop.distance=1 ft .. 3 ft, 3":       {0.3048, 0.6096, 0.9144},
		"stop.distance=6 ft 4 1/2 in, 6 ft":   {1.8288, 1.9431},
		"stop.distance=1000 mm .. 2000 mm, 2": {1, 2},
	} {
		v, err := parseVary(text, movedJob(t))
		if err != nil {
			t.Errorf("%q: %v", text, err)
			continue
		}
		a, err := v.axis()
		if err != nil || !slices.Equal(a.Values, want) {
			t.Errorf("%q: %v, %v; want %v", text, a.Values, err, want)
		}
	}
	v, err := parseVary("stop.distance=1m..2m", movedJob(t))
	if a, wrong := v.axis(); err != nil || wrong != nil || len(a.Values) != defaultPoints {
		t.Errorf("%v, %v", err, wrong)
	}
}

func TestParseVaryRefuses(t *testing.T) {
	for text, want := range map[string]string{
		"stop.distance":      "is not KEY=FIGURES",
		"=1m..2m":            "is not KEY=FIGURES",
		"stop.distance=":     "is not KEY=FIGURES",
		"stop.length=1m..2m": `"stop.length" is no input of this job that can be moved`,
		"rated[1].peak_force_at_most=1 kN .. 2kN": `is no input of this job that can be moved`,
		"stop.distance=1 kg .. 2 kg":              "--vary stop.distance",
		"stop.distance=1..2":                      "--vary stop.distance",
		"stop.distance=1m..2m,":                   `"" is neither log nor a number of figures`,
		"stop.distance=1m..2m,ln":                 `"ln" is neither log nor a number of figures`,
		"stop.distance=1,8 m":                     `"1"`,
		"stop.distance=1 m ± 1 m, 3 m":            "is no single figure",
		"stop.distance=1 m, 100 cm":               `"1 m" and "100 cm" are one figure`,
	} {
		if _, err := parseVary(text, movedJob(t)); err == nil || !strings.Contains(describe(err), want) {
			t.Errorf("%q: %v, want %q", text, err, want)
		}
	}
}

// Every refusal of a study has words, and none keeps a place that is not filled.
func TestEveryRefusalHasWords(t *testing.T) {
	ids := []study.RefusalID{study.UnknownKey, study.NotMoved, study.Twice, study.OutOfRange, study.EmptyRange, study.NotRising, study.TooFewPoints,
		study.TooMany, study.TooClose, study.NoAxes, study.NothingAsked, study.NotComputed, study.NeedsEnd, study.NoSuchRow, study.NoBand, study.NoMotion}
	if len(ids) != len(refusalWords) {
		t.Errorf("%d refusals, %d with words", len(ids), len(refusalWords))
	}
	for _, id := range ids {
		err := refusedStudy(&study.Refusal{ID: id, Key: "stop.distance", Quantity: arrest.PeakForce, SI: 2, Have: []string{"a", "b"}}, quantity.Length.SI())
		text := describe(err)
		if !strings.HasPrefix(text, "arrestcheck: ") || strings.Contains(text, "%!") || strings.Contains(text, "\x00") || strings.Count(text, "\n") != 2 {
			t.Errorf("%s: %q", id, text)
		}
		if codeOfError(err) != exitRefused {
			t.Errorf("%s: exit code %d", id, codeOfError(err))
		}
		if word := neverPrinted.FindString(text); word != "" {
			t.Errorf("%s: %q", id, word)
		}
	}
}
