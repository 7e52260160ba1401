package connector

import (
	"fmt"
	"math"
	"testing"
)

// agreements is the number of random paths on which the exact run is held
// against the integration. There is no shorter form of the test.
const agreements = 20000

// worst keeps the greatest difference of each figure.
type worst map[string]float64

// see notes the difference of two figures relative to a scale and reports
// whether it is within the tolerance. Two NaN agree, as do two equal infinities.
func (w worst) see(name string, a, b, scale, tolerance float64) bool {
	if a == b || math.IsNaN(a) && math.IsNaN(b) {
		return true
	}
	off := math.Abs(a-b) / scale
	w[name] = max(w[name], off)
	return off <= tolerance
}

// timeTolerance returns the tolerance for the time of the first rest. A body that
// creeps to where it hangs has a rest, but hardly a moment of it.
func timeTolerance(p *Path, f *Fall, r *Result) float64 {
	if r.RestTime == r.End.Time {
		return math.Inf(1)
	}
	weight := f.Mass * f.Gravity
	return 1e-9 + 1e-9*weight/math.Abs(p.Force(r.StoppingDistance, 0)-weight)
}

// differ returns what two results differ in, or nothing.
func (w worst) differ(a, b *Result, tie bool, inTime float64) string {
	switch {
	case a.Status != b.Status:
		return fmt.Sprintf("status: %s, %s", a.Status, b.Status)
	case a.Exhausted != b.Exhausted || a.FirstExhausted != b.FirstExhausted:
		return fmt.Sprintf("exhausted: %b, %b", a.Exhausted, b.Exhausted)
	case !tie && a.Events != b.Events || a.Events.Rests != b.Events.Rests:
		return fmt.Sprintf("events: %+v, %+v", a.Events, b.Events)
	}
	force := 1 + a.Peak
	if math.IsInf(force, 1) {
		force = 1
	}
	for _, f := range []struct {
		name             string
		a, b, scale, tol float64
	}{
		{"peak", a.Peak, b.Peak, force, 1e-8},
		{"second peak", a.SecondPeak, b.SecondPeak, force, 1e-8},
		{"x", a.End.X, b.End.X, 1, 1e-9},
		{"v", a.End.V, b.End.V, 1, 1e-8},
		{"first pull", a.FirstPull, b.FirstPull, 1, 1e-9},
		{"stopping time", a.StoppingTime, b.StoppingTime, 1, inTime},
		{"stopping distance", a.StoppingDistance, b.StoppingDistance, 1, 1e-9},
		{"deceleration distance", a.DecelerationDistance, b.DecelerationDistance, 1, 1e-9},
		{"absorber travel", a.AbsorberTravel, b.AbsorberTravel, 1, 1e-9},
		{"mean over time", a.MeanOverTime, b.MeanOverTime, force, 10 * inTime},
		{"mean over distance", a.MeanOverDistance, b.MeanOverDistance, force, 1e-7},
		{"energy left", a.EnergyLeft, b.EnergyLeft, 1 + a.Ledger.Turned, 1e-8},
		// A body that hangs ends its run at a time that differs by rounding.
		{"impulse", a.Ledger.Impulse - a.Ledger.Weight, b.Ledger.Impulse - b.Ledger.Weight, 1 + a.Ledger.Impulse, 1e-8},
		{"work", a.Ledger.Work, b.Ledger.Work, 1 + a.Ledger.Turned, 1e-8},
		{"viscous work", a.Ledger.Viscous, b.Ledger.Viscous, 1 + a.Ledger.Turned + a.Ledger.Viscous, 1e-8},
	} {
		if !w.see(f.name, f.a, f.b, f.scale, f.tol) {
			return fmt.Sprintf("%s: %v, %v", f.name, f.a, f.b)
		}
	}
	for i := range a.Parts {
		p, q := &a.Parts[i], &b.Parts[i]
		if !w.see("travel at rest", p.AtRest, q.AtRest, 1, 1e-9) || !w.see("permanent travel", p.Permanent, q.Permanent, 1, 1e-9) {
			return fmt.Sprintf("part %d: %+v, %+v", i+1, p, q)
		}
	}
	return ""
}

// TestAgree holds the exact run against the integration at 1e-12 on random
// paths: every event, the peaks, the state at the end, the parts.
//
// A body that begins at rest with the path just taut and without a dashpot comes
// back to where it began with no speed: whether it leaves the path is decided by
// rounding alone. Events of such ties are not compared. A body that creeps to
// where it hangs is there, in the integration, as soon as its speed is rounding,
// and has a rest that the exact run does not have; it is compared but for that.
func TestAgree(t *testing.T) {
	w, statuses := worst{}, map[Status]int{}
	var p Path
	var a, b Result
	events, ties, still, exhausted, second, left := 0, 0, 0, 0, 0, 0.0
	for i := range uint64(agreements) {
		d := newDice(1, i)
		f, parts := d.fall(), d.parts()
		if err := p.Set(parts...); err != nil {
			t.Fatal(i, err)
		}
		if err := Run(&p, &f, &a); err != nil {
			t.Fatal(i, err)
		}
		if err := Integrate(&p, &f, 1e-12, &b); err != nil {
			t.Fatal(i, err)
		}
		tie := f.speed() == 0 && p.slack == 0 && p.viscous == 0
		if math.Abs(a.End.V) < 1e-9 && hangs(a.End.F, f.Mass*f.Gravity) && a.Events.Total() != b.Events.Total() {
			still++
			if diff := w.differ(&a, restOf(&a, b), true, math.Inf(1)); diff != "" {
				t.Fatalf("path %d, as good as at rest: exact and integrated differ in %s\n%+v\n%+v", i, diff, f, parts)
			}
			continue
		}
		if diff := w.differ(&a, &b, tie, timeTolerance(&p, &f, &a)); diff != "" {
			t.Fatalf("path %d: exact and integrated differ in %s\n%+v\n%+v", i, diff, f, parts)
		}
		left = max(left, a.Ledger.open())
		statuses[a.Status]++
		events += a.Events.Total()
		if tie {
			ties++
		}
		if a.Exhausted != 0 {
			exhausted++
		}
		if a.SecondPeak > 0 {
			second++
		}
	}
	t.Logf("%d paths, %d events, %d ties, %d as good as at rest; %v; %d with an exhausted part, %d with a second peak", agreements, events, ties, still, statuses, exhausted, second)
	t.Logf("greatest differences: %v; ledgers of the exact runs open by %.1e at most", w, left)
}

// restOf returns r with what hangs on a rest taken from the other result.
func restOf(other *Result, r Result) *Result {
	r.Status, r.Events = other.Status, other.Events
	r.StoppingTime, r.StoppingDistance, r.DecelerationDistance = other.StoppingTime, other.StoppingDistance, other.DecelerationDistance
	r.MeanOverTime, r.MeanOverDistance, r.SecondPeak = other.MeanOverTime, other.MeanOverDistance, other.SecondPeak
	for i := range r.Parts {
		r.Parts[i].AtRest = other.Parts[i].AtRest
	}
	return &r
}

// open returns the greatest difference of the ledger relative to what was turned
// over.
func (l *Ledger) open() float64 {
	p := math.Abs(l.Weight) + math.Abs(l.Impulse) + math.Abs(l.Motion) + l.Carried
	e := l.Before + l.After + math.Abs(l.Fallen) + l.Turned
	if p == 0 || e == 0 {
		return 0
	}
	return max(math.Abs(l.MomentumLeft)/p, math.Abs(l.EnergyLeft)/e, math.Abs(l.PartsLeft)/e)
}

// TestAgreeToTheEnd compares runs without a duration.
func TestAgreeToTheEnd(t *testing.T) {
	w, n := worst{}, 0
	var p Path
	var a, b Result
	for i := range uint64(2000) {
		d := newDice(2, i)
		f, parts := d.fall(), d.parts()
		f.Duration = 0
		if err := p.Set(parts...); err != nil {
			t.Fatal(i, err)
		}
		if err := Run(&p, &f, &a); err != nil {
			t.Fatal(i, err)
		}
		if a.End.Time > 5 || a.Status == Endless || f.speed() == 0 {
			continue // the integration has to give up on these
		}
		if err := Integrate(&p, &f, 1e-12, &b); err != nil {
			t.Fatal(i, err)
		}
		if diff := w.differ(&a, &b, false, timeTolerance(&p, &f, &a)); diff != "" {
			t.Fatalf("path %d: exact and integrated differ in %s\n%+v\n%+v", i, diff, f, parts)
		}
		n++
	}
	t.Logf("%d paths of 2000 compared: %v", n, w)
	if n < 1000 {
		t.Errorf("only %d paths of 2000 could be compared", n)
	}
}

// TestShortVisit is the case that a look at the ends of steps misses: the body
// goes beyond a corner for less than a step and comes back. The travel of the
// absorber is short of what it needs by a little, and the path nearly rigid
// after it.
func TestShortVisit(t *testing.T) {
	fall := Fall{Mass: 100, FreeFall: 1.8, Gravity: StandardGravity}
	var free, a, b Result
	var p Path
	path := func(travel float64) {
		if err := p.Set(Part{Kind: Absorber, Stiffness: 500000, Plateau: Plateau{Force: 4000, Travel: travel}}, NewDashpot(200)); err != nil {
			t.Fatal(err)
		}
	}
	path(2)
	if err := Run(&p, &fall, &free); err != nil {
		t.Fatal(err)
	}
	for _, short := range []float64{1e-2, 1e-3, 1e-4, 1e-5, 1e-6, 1e-7, 1e-8} {
		path(free.AbsorberTravel - short)
		if err := Run(&p, &fall, &a); err != nil {
			t.Fatal(err)
		}
		for _, tolerance := range []float64{1e-5, 1e-8, 1e-11} {
			if short < 100*tolerance {
				continue
			}
			if err := Integrate(&p, &fall, tolerance, &b); err != nil {
				t.Fatal(err)
			}
			if a.Exhausted == 0 || a.Exhausted != b.Exhausted || a.Events != b.Events {
				t.Errorf("short by %g, tolerance %g: exhausted %b and %b, events %+v and %+v", short, tolerance, a.Exhausted, b.Exhausted, a.Events, b.Events)
			}
			if math.Abs(a.Peak-b.Peak) > 1e3*tolerance*a.Peak {
				t.Errorf("short by %g, tolerance %g: peak %v and %v", short, tolerance, a.Peak, b.Peak)
			}
		}
	}
}
