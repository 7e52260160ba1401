package arrest

import (
	"math"
	"testing"

	"arrestcheck/arrest/quantity"
)

// figures are the entries of a test job, as a user would write them.
type figures struct {
	mass, tools, fall, speed, distance, time, rise string
	gravity                                        string
	pulse                                          Pulse
	source, stopSource                             Source
	ratings                                        []Rating
	persons                                        int
}

// setters are the inputs of the one list in its order.
var setters = []struct {
	key  string
	role Role
	dim  quantity.Dimension
	of   func(*figures) string
	set  func(*Case, float64)
}{
	{"worker.mass", OfWorker, quantity.Mass, func(f *figures) string { return f.mass }, func(c *Case, x float64) { c.Mass = x }},
	{"worker.tools", OfWorker, quantity.Mass, func(f *figures) string { return f.tools }, func(c *Case, x float64) { c.Tools = x }},
	{"fall.free_fall", OfFall, quantity.Length, func(f *figures) string { return f.fall }, func(c *Case, x float64) { c.FreeFall = x }},
	{"fall.initial_speed", OfFall, quantity.Speed, func(f *figures) string { return f.speed }, func(c *Case, x float64) { c.InitialSpeed = x }},
	{"stop.distance", OfStop, quantity.Length, func(f *figures) string { return f.distance }, func(c *Case, x float64) { c.Distance = x }},
	{"stop.time", OfStop, quantity.Time, func(f *figures) string { return f.time }, func(c *Case, x float64) { c.Time = x }},
	{"stop.rise_fraction", OfStop, quantity.Ratio, func(f *figures) string { return f.rise }, func(c *Case, x float64) { c.Rise = x }},
	{"gravity", OfPlace, quantity.Acceleration, func(f *figures) string { return f.gravity }, func(c *Case, x float64) { c.Gravity = x }},
}

// job makes a Job of the figures; tools default to "0 kg", gravity to the
// standard, as the reader of files does for gravity alone.
func (f figures) job(t testing.TB) *Job {
	t.Helper()
	if f.tools == "" {
		f.tools = "0 kg"
	}
	if f.gravity == "" {
		f.gravity = "9.80665 m/s2"
	}
	j := &Job{Persons: max(1, f.persons), Ratings: f.ratings}
	j.Point.Pulse = f.pulse
	for _, s := range setters {
		text := s.of(&f)
		if text == "" {
			continue
		}
		in := Input{Key: s.key, Role: s.role, Band: parse(t, s.dim, text), Source: f.source, Set: s.set}
		if s.role == OfStop && f.stopSource != NoSource {
			in.Source = f.stopSource
		}
		written := in.Band.Value
		if math.IsNaN(written) {
			written = in.Band.Low
		}
		s.set(&j.Point, written)
		j.Inputs = append(j.Inputs, in)
	}
	return j
}

func parse(t testing.TB, d quantity.Dimension, text string) quantity.Band {
	t.Helper()
	b, err := quantity.Parse(d, text)
	if err != nil {
		t.Fatalf("%q: %v", text, err)
	}
	return b
}

// find returns the one estimate of a quantity by an evidence.
func find(t testing.TB, r *Result, q Quantity, e Evidence) *Estimate {
	t.Helper()
	i := r.estimate(q, e)
	if i < 0 {
		t.Fatalf("no %s estimate of %s", e, q)
	}
	return &r.Estimates[i]
}

func hasWarning(r *Result, id WarningID) bool {
	for _, w := range r.Warnings {
		if w.ID == id {
			return true
		}
	}
	return false
}
