package connector

import (
	"math"
	"testing"
)

// The brute force route: no merged loading curve, no events, no spans. The
// common force of the parts is found by halving, from the figures of the parts
// alone, and the motion by small steps of equal length.

// drawOut returns the extension in m of a part under a rising force f, with all
// the travel that f holds.
func drawOut(p *Part, f float64) float64 {
	x := 0.0
	switch {
	case p.Points != nil:
		x = alongPoints(p.Points, f)
	case p.Stiffness > 0:
		x = f / p.Stiffness
	}
	q := p.Plateau
	switch {
	case q.Force == 0:
	case f >= q.Force:
		x += q.Travel
	case q.Activation > 0 && f > q.Activation:
		x += q.Rise * (f - q.Activation) / (q.Force - q.Activation)
	}
	return x
}

func alongPoints(points []Point, f float64) float64 {
	slack := leadingSlack(points)
	last := Point{Extension: slack}
	for _, q := range points {
		if q.Extension <= slack {
			continue
		}
		if f < q.Force {
			return last.Extension - slack + (q.Extension-last.Extension)*(f-last.Force)/(q.Force-last.Force)
		}
		last = q
	}
	n := len(points)
	a, b := points[n-2], points[n-1]
	return b.Extension - slack + (f-b.Force)*(b.Extension-a.Extension)/(b.Force-a.Force)
}

// givenBack returns what a part gives back in m from one force down to another.
func givenBack(p *Part, from, to float64) float64 {
	switch {
	case p.Points == nil && p.Stiffness == 0:
		return 0
	case p.Unloading > 0:
		return (from - to) / p.Unloading
	case p.Points != nil:
		return alongPoints(p.Points, from) - alongPoints(p.Points, to)
	}
	return (from - to) / p.Stiffness
}

const greatest = 1e7 // N, above every force of the test

// bruteForce returns the force of the parts at the extension x after the reach.
func bruteForce(parts []Part, x, reach, hold float64) float64 {
	sum := func(f float64) float64 {
		total := 0.0
		for i := range parts {
			if x >= reach {
				total += drawOut(&parts[i], f)
			} else {
				total -= givenBack(&parts[i], hold, f)
			}
		}
		return total
	}
	target, high := x, greatest
	if x < reach {
		target, high = x-reach, hold
		if sum(0) >= target {
			return 0
		}
	}
	low := 0.0
	for range 40 {
		f := (low + high) / 2
		if sum(f) < target {
			low = f
		} else {
			high = f
		}
	}
	return high
}

// brute runs the fall by steps of the time h, each of the method of Runge and
// Kutta, and returns the peak and the state at the end.
func brute(parts []Part, f *Fall, slack, c, h float64) (peak, x, v float64) {
	x, v = -slack, f.speed()
	reach, hold, taut := 0.0, 0.0, 0.0
	force := func(x, v float64) float64 {
		if x <= taut {
			return 0
		}
		return max(0, bruteForce(parts, x, reach, hold)+c*v)
	}
	for n := int(math.Round(f.Duration / h)); n > 0; n-- {
		a := func(x, v float64) float64 { return f.Gravity - force(x, v)/f.Mass }
		a1 := a(x, v)
		a2 := a(x+h/2*v, v+h/2*a1)
		a3 := a(x+h/2*(v+h/2*a1), v+h/2*a2)
		a4 := a(x+h*(v+h/2*a2), v+h*a3)
		x, v = x+h*v+h*h/6*(a1+a2+a3), v+h/6*(a1+2*a2+2*a3+a4)
		peak = max(peak, force(x, v))
		if x > reach {
			reach, hold = x, bruteForce(parts, x, 0, 0)
			taut = x
			for i := range parts {
				taut -= givenBack(&parts[i], hold, 0)
			}
		}
	}
	return peak, x, v
}

// TestBrute holds the exact run against brute force, on random paths that keep
// to what both can do: no activation peak, and something that stretches.
func TestBrute(t *testing.T) {
	const step = 4e-5
	n, second := 0, 0
	for i := uint64(0); n < 30; i++ {
		d := newDice(70, i)
		f, parts := d.fall(), append(d.parts(), d.elastic())
		if i%2 == 1 { // what rebounds
			parts = []Part{Loose(d.within(0, 0.2)), d.elastic(), d.points(), NewDashpot(d.spread(5, 1000))}
		}
		f.FreeFall /= 5
		f.Duration = math.Round(d.within(0.5, 1)/step) * step
		for k := range parts {
			if q := &parts[k].Plateau; q.Activation > q.Force {
				q.Activation = 0
			}
		}
		var p Path
		var r Result
		if err := p.Set(parts...); err != nil {
			t.Fatal(err)
		}
		if err := Run(&p, &f, &r); err != nil {
			t.Fatal(err)
		}
		if p.viscous > 3000 || r.Status == Rigid {
			continue // too stiff for steps of equal length
		}
		n++
		if r.SecondPeak > 0 {
			second++
		}
		peak, x, v := brute(parts, &f, p.slack, p.viscous, step)
		// A step goes on for a moment where the law has a corner or a blow.
		if math.Abs(peak-r.Peak) > 0.004*r.Peak+2 || math.Abs(x-r.End.X) > 0.002 || math.Abs(v-r.End.V) > 0.03 {
			t.Errorf("path %d: peak %v, x %v, v %v; by brute force %v, %v, %v\n%+v\n%+v", i, r.Peak, r.End.X, r.End.V, peak, x, v, f, parts)
		}
	}
	t.Logf("%d paths, %d with a second peak", n, second)
	if second < 10 {
		t.Errorf("only %d paths with a second peak", second)
	}
}
