package connector

import "math"

// A piece is one arc of a run, as Trace needs it.
type piece struct {
	time, last float64 // s, begin and duration
	x, v       float64 // at the beginning, m and m/s downwards
	free       bool    // no force
	arc        arc
	sign       float64 // direction of the arc, 1 downwards
	force      float64 // N of the path at the beginning, dashpot left out
	k, c       float64 // N/m, N s/m
}

// at returns the state at the time t from the beginning of the piece.
func (p *piece) at(t, g float64) State {
	if p.free {
		return State{p.time + t, p.x + float64(p.v*t) + float64(g*t*t)/2, p.v + float64(g*t), 0}
	}
	y, v := p.arc.at(p.arc.basis(t))
	y, v = p.sign*y, p.sign*v
	return State{p.time + t, p.x + y, v, p.force + float64(p.k*y) + float64(p.c*v)}
}

// A bend is the second derivative of the force of a piece in N/s2. It goes as
// the combinations of C and S that arc.zero takes; so does its own derivative,
// whose zeros are where it is greatest.
type bend struct {
	a             *arc
	mass, u, rate float64
	turn          float64 // first time at which its derivative is zero, +Inf: none
}

func (p *piece) bend(mass float64) bend {
	a := &p.arc
	if p.free {
		return bend{turn: math.Inf(1)}
	}
	// j is the rate of the acceleration, u its derivative, w that of u, z of w.
	u := -2*a.sigma*a.j0 - a.w2*a.a0
	w := -2*a.sigma*u - a.w2*a.j0
	z := -2*a.sigma*w - a.w2*u
	return bend{a: a, mass: mass, u: u, rate: w + a.sigma*u, turn: a.zero(w, z+a.sigma*w)}
}

// at returns its amount at the time t of the piece.
func (b *bend) at(t float64) float64 {
	if b.a == nil {
		return 0
	}
	m := b.a.basis(t)
	return b.mass * math.Abs(b.u*m.e+b.rate*m.s)
}

// within returns its greatest amount between two times of the piece.
func (b *bend) within(lo, hi float64) float64 {
	most := max(b.at(lo), b.at(hi))
	for t := b.turn; t < hi; t += math.Pi / b.a.root {
		if t > lo {
			most = max(most, b.at(t))
		}
		if b.a.d <= 0 {
			break
		}
	}
	return most
}

// Tolerance of a series: the greatest distance of a straight line between two
// points from the force, as a share of the peak.
const seriesTolerance = 0.001

// Trace runs the fall and appends the states of the run to the series, close
// enough for straight lines between them to stay within 0.1 per cent of the
// peak from the force. The bound is rigorous: a chord over the time T lies
// within T^2/8 times the greatest second derivative.
//
// Where the force jumps, two states have the same time, before and after. The
// series begins at the end of the free fall and ends with the run. After a
// rigid stop it ends with the last state before the blow.
func Trace(p *Path, f *Fall, r *Result, series []State) ([]State, error) {
	var pieces []piece
	err := run(p, f, r, &pieces)
	peak := r.Peak
	if math.IsInf(peak, 1) {
		peak = 0
		for i := range pieces {
			peak = max(peak, pieces[i].at(0, f.Gravity).F, pieces[i].at(pieces[i].last, f.Gravity).F)
		}
	}
	for i := range pieces {
		p := &pieces[i]
		if last := len(series) - 1; last < 0 || series[last] != p.at(0, f.Gravity) {
			series = append(series, p.at(0, f.Gravity))
		}
		b := p.bend(f.Mass)
		series = p.points(series, &b, 0, p.last, peak*seriesTolerance, f.Gravity)
	}
	if end := r.End; len(pieces) > 0 && !math.IsInf(end.Time, 1) && end.F != series[len(series)-1].F {
		series = append(series, end)
	}
	return series, err
}

// points appends states of the piece after the time lo up to hi, halving the time
// until the chord is within the tolerance in N.
func (p *piece) points(series []State, b *bend, lo, hi, tolerance, g float64) []State {
	h := hi - lo
	if mid := lo + h/2; h*h/8*b.within(lo, hi) > tolerance && lo < mid && mid < hi {
		series = p.points(series, b, lo, mid, tolerance, g)
		return p.points(series, b, mid, hi, tolerance, g)
	}
	return append(series, p.at(hi, g))
}
