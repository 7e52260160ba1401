package arrest

import "math"

// An extreme is the least or greatest value of one output, and the case that
// gives it.
type extreme struct {
	value float64
	at    Case
}

// A span is what one output comes to over everything the entries allow.
// NaN until something is known.
type span struct{ low, high extreme }

func (s *span) known() bool { return !math.IsNaN(s.low.value) }

// take widens the span by one point's value; NaN widens nothing.
func (s *span) take(x float64, c *Case) {
	if math.IsNaN(x) {
		return
	}
	if !s.known() || x < s.low.value {
		s.low = extreme{x, *c}
	}
	if !(x <= s.high.value) {
		s.high = extreme{x, *c}
	}
}

// spans holds the span of every output, in the order of the table outputs.
type spans []span

func newSpans() spans {
	s := make(spans, len(outputs))
	for i := range s {
		s[i].low.value, s[i].high.value = nan, nan
	}
	return s
}

// take widens all spans by one point. What hangs on distance or time is left
// out where the two cannot go together (M-05).
func (s spans) take(c *Case, p *Point) {
	for i := range outputs {
		if p.Impossible && outputs[i].rests&(onDistance|onTime) != 0 {
			continue
		}
		s[i].take(outputs[i].of(p), c)
	}
}

// corners calls visit with every corner of the bands (M-50). visit must not
// keep the pointer.
func corners(j *Job, visit func(*Case)) {
	free := make([]*Input, 0, len(j.Inputs))
	base := j.Point
	for i := range j.Inputs {
		in := &j.Inputs[i]
		if in.Set == nil {
			continue
		}
		in.Set(&base, in.Band.Low)
		if in.Band.High > in.Band.Low {
			free = append(free, in)
		}
	}
	for mask := range 1 << len(free) {
		c := base
		for i, in := range free {
			if mask>>i&1 == 1 {
				in.Set(&c, in.Band.High)
			}
		}
		visit(&c)
	}
}

// overCorners fills the spans from all corners and, where some of them cannot
// happen, from the edge of what can.
func overCorners(j *Job) (s spans, partImpossible bool) {
	s = newSpans()
	var p Point
	corners(j, func(c *Case) {
		At(c, &p)
		s.take(c, &p)
		partImpossible = partImpossible || p.Impossible
	})
	if partImpossible {
		overEdge(j, s)
	}
	if i := indexOf(PeakForce, Given); s[i].known() {
		lowerFloor(j, s)
	}
	return s, partImpossible
}

// overEdge widens the spans by the points where an edge of the box of speed,
// distance and time meets the surface d = v*t + g*t^2/2, beyond which nothing
// can happen. Every extreme of the means and their ratio over the possible
// part lies at a corner or at such a point; the floor has no upper end there.
func overEdge(j *Job, s spans) {
	lo, hi := ends(j)
	g := lo.Gravity
	var a, b Point
	At(&lo, &a)
	At(&hi, &b)
	masses := [...]float64{a.TotalMass, b.TotalMass}
	speeds := [...]float64{a.Speed, b.Speed}
	lengths := [...]float64{lo.Distance, hi.Distance}
	times := [...]float64{lo.Time, hi.Time}
	for i := range speeds {
		for k := range times {
			v, d, t := speeds[i], lengths[i], times[k]
			edgePoint(s, &lo, masses, v, reachable(v, g, times[k]), t, inside(lengths, reachable(v, g, t)))
			for n := range speeds {
				w := speeds[n]
				tt := 2 * d / (w + math.Sqrt(float64(w*w)+float64(2*g*d)))
				edgePoint(s, &lo, masses, w, d, tt, inside(times, tt))
			}
			vv := (d - float64(g*t*t)/2) / t
			edgePoint(s, &lo, masses, vv, d, t, inside(speeds, vv))
		}
	}
}

func inside(ends [2]float64, x float64) bool { return ends[0] < x && x < ends[1] }

// edgePoint widens the spans that hang on the stop by one point of the edge,
// for the lightest and the heaviest mass. The floor has no upper end there.
func edgePoint(s spans, base *Case, masses [2]float64, v, d, t float64, within bool) {
	if !within {
		return
	}
	var p Point
	for _, m := range masses {
		c := atSpeed(*base, m, v)
		c.Distance, c.Time = d, t
		At(&c, &p)
		p.Impossible = false
		p.Floor, p.FloorOverWeight, p.FloorDeceleration = math.Inf(1), math.Inf(1), math.Inf(1)
		for i := range outputs {
			if outputs[i].rests&(onDistance|onTime) != 0 {
				s[i].take(outputs[i].of(&p), &c)
			}
		}
	}
}

// atSpeed returns c with the mass m in all and the speed v when the arrest
// begins, exactly: the square root of a square is exact.
func atSpeed(c Case, m, v float64) Case {
	c.Mass, c.Tools, c.FreeFall, c.InitialSpeed = m, 0, 0, v
	return c
}

// ends returns the case with every input at its low end and the one with every
// input at its high end.
func ends(j *Job) (lo, hi Case) {
	lo, hi = j.Point, j.Point
	for i := range j.Inputs {
		if in := &j.Inputs[i]; in.Set != nil {
			in.Set(&lo, in.Band.Low)
			in.Set(&hi, in.Band.High)
		}
	}
	return lo, hi
}

// lowerFloor lowers the floor of the peak to its least over the whole box. The
// floor is not monotone in distance, time and speed; its least is at
//
//	m = m1, t = t2, v = clamp(2*d1/t2, v1, v2), d = clamp(v*t2/2, d1, d2)
//
// M-06. Only needed where both distance and time are given: else corners do.
func lowerFloor(j *Job, s spans) {
	lo, hi := ends(j)
	if lo.Distance <= 0 || lo.Time <= 0 {
		return
	}
	var a, b Point
	At(&lo, &a)
	At(&hi, &b)
	v := min(max(2*lo.Distance/hi.Time, a.Speed), b.Speed)
	c := atSpeed(lo, a.TotalMass, v)
	c.Time = hi.Time
	c.Distance = min(max(v*hi.Time/2, lo.Distance), hi.Distance)
	var p Point
	At(&c, &p)
	if p.Impossible {
		return
	}
	for _, q := range [...]Quantity{PeakForce, ForceOverWeight, PeakDeceleration} {
		i := indexOf(q, Given)
		s[i].take(outputs[i].of(&p), &c)
	}
}
