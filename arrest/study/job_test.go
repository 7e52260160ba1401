package study

import (
	"math"
	"testing"

	"arrestcheck/arrest"
	"arrestcheck/arrest/quantity"
	"arrestcheck/limits"
)

// entries are the inputs of a test job by key, as a user would write them.
type entries map[string]string

// list is the one list of inputs in its order.
var list = []struct {
	key  string
	role arrest.Role
	dim  quantity.Dimension
	set  func(*arrest.Case, float64)
}{
	{"worker.mass", arrest.OfWorker, quantity.Mass, func(c *arrest.Case, x float64) { c.Mass = x }},
	{"worker.tools", arrest.OfWorker, quantity.Mass, func(c *arrest.Case, x float64) { c.Tools = x }},
	{"fall.free_fall", arrest.OfFall, quantity.Length, func(c *arrest.Case, x float64) { c.FreeFall = x }},
	{"fall.initial_speed", arrest.OfFall, quantity.Speed, func(c *arrest.Case, x float64) { c.InitialSpeed = x }},
	{"stop.distance", arrest.OfStop, quantity.Length, func(c *arrest.Case, x float64) { c.Distance = x }},
	{"stop.time", arrest.OfStop, quantity.Time, func(c *arrest.Case, x float64) { c.Time = x }},
	{"stop.rise_fraction", arrest.OfStop, quantity.Ratio, func(c *arrest.Case, x float64) { c.Rise = x }},
	{"gravity", arrest.OfPlace, quantity.Acceleration, func(c *arrest.Case, x float64) { c.Gravity = x }},
}

// job makes a Job whose entries are all measured.
func (e entries) job(t testing.TB) *arrest.Job {
	t.Helper()
	j := &arrest.Job{Persons: 1}
	for key, fallback := range map[string]string{"worker.tools": "0 kg", "gravity": "9.80665 m/s2"} {
		if e[key] == "" {
			e[key] = fallback
		}
	}
	for _, in := range list {
		if e[in.key] == "" {
			continue
		}
		input := arrest.Input{Key: in.key, Role: in.role, Band: band(t, in.dim, e[in.key]), Source: arrest.FromMeasured, Set: in.set}
		written := input.Band.Value
		if math.IsNaN(written) {
			written = input.Band.Low
		}
		in.set(&j.Point, written)
		j.Inputs = append(j.Inputs, input)
	}
	return j
}

func band(t testing.TB, d quantity.Dimension, text string) quantity.Band {
	t.Helper()
	b, err := quantity.Parse(d, text)
	if err != nil {
		t.Fatalf("%q: %v", text, err)
	}
	return b
}

// fall is 100 kg over 1.8 m, stopped over 1 m: the job of the checks below.
func fall(t testing.TB) *arrest.Job {
	return entries{"worker.mass": "100 kg", "fall.free_fall": "1.8 m", "stop.distance": "1 m"}.job(t)
}

// banded is a job with a band on everything.
func banded(t testing.TB) *arrest.Job {
	return entries{"worker.mass": "92 kg ± 1 kg", "worker.tools": "0 kg .. 10 kg", "fall.free_fall": "1.6 m .. 1.8 m",
		"stop.distance": "0.95 m .. 1.10 m", "stop.time": "0.34 s ± 10 %"}.job(t)
}

// rule is a limit to which no cap applies.
func rule(t testing.TB, id string, q arrest.Quantity, text string) limits.Limit {
	t.Helper()
	record, _ := q.Record()
	sense, ok := limits.SenseOf(q)
	if !ok {
		t.Fatalf("%s cannot be bounded", q)
	}
	return limits.Limit{ID: id, Quantity: q, Sense: sense, Bound: band(t, record.Dimension, text),
		Authority: "site rule", Edition: "first", Kind: limits.Person, CheckedOn: "2 May"}
}

func set(rules ...limits.Limit) []limits.Set { return []limits.Set{{Name: "site", Limits: rules}} }

// near fails unless got is want within the relative tolerance.
func near(t *testing.T, what string, got, want, relative float64) {
	t.Helper()
	if !quantity.Close(got, want, relative) {
		t.Errorf("%s = %.15g, want %.15g within %g", what, got, want, relative)
	}
}

func sameFloat(a, b float64) bool { return a == b || math.IsNaN(a) && math.IsNaN(b) }
