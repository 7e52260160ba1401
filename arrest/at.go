package arrest

import "math"

var (
	nan     = math.NaN()
	noShape = Assumed{nan, nan, nan, nan, nan, nan}
)

// At works out one exact point. It allocates nothing (a connector path
// makes room in p once) and never fails: what cannot happen is told by
// Point.Impossible; where a layout gives no free fall all that hangs on it is
// NaN. c must hold a positive total mass
// and gravity, and no negative figure; the readers of files see to that.
func At(c *Case, p *Point) {
	if c.Load.Mass > 0 {
		loadAt(c, p)
		return
	}
	h := c.FreeFall
	if c.Layout != nil {
		h = layoutAt(c, p)
	}
	m, lost := sum(c.Mass, c.Tools)
	g := c.Gravity
	fallen := float64(2 * g * h)
	square, rest := sum(fallen, math.FMA(c.InitialSpeed, c.InitialSpeed, math.FMA(2*g, h, -fallen)))
	v := math.Sqrt(square)
	p.TotalMass = m
	p.Weight = math.FMA(m, g, lost*g)
	p.FreeFall = h
	if c.InitialSpeed > 0 {
		p.FreeFall = h + float64(c.InitialSpeed*c.InitialSpeed)/(2*g)
	}
	p.Speed = v
	p.Energy = math.FMA(m, square, math.FMA(m, rest, lost*square)) / 2
	p.Momentum = m * v
	if v > 0 {
		p.Momentum = math.FMA(m, v, math.FMA(lost, v, m*(math.FMA(-v, v, square)+rest)/(2*v)))
	}
	stopAt(p, g, c.Distance, c.Time)
	if c.Path != nil {
		modelAt(c, p, h)
	}
	if c.Layout != nil {
		roomAt(c, p)
	}
	if c.Pulse == NoPulse {
		p.Assumed = noShape
		return
	}
	assumedAt(p, c)
}

// sum is a+b and what it lost to rounding, exact (D. Knuth, The Art of Computer
// Programming 2, 4.2.2).
func sum(a, b float64) (s, lost float64) {
	s = a + b
	t := s - a
	return s, (a - (s - t)) + (b - t)
}

// stopAt fills in what follows from the stop: both means, their ratio and the
// floor of the peak. p holds mass, weight, speed, energy and momentum. d and t
// are 0 where not given.
//
//	F_d = W + E/d
//	F_t = W + p/t
//	r   = v*t/(2*d)
func stopAt(p *Point, g, d, t float64) {
	p.MeanOverDistance, p.MeanOverTime, p.ShapeRatio = nan, nan, nan
	p.Impossible = false
	beyond := nan // what the floor has above the weight
	if d > 0 {
		beyond = p.Energy / d
		p.MeanOverDistance = p.Weight + beyond
	}
	if t > 0 {
		over := p.Momentum / t
		p.MeanOverTime = p.Weight + over
		if !(d > 0) {
			beyond = over
		} else if p.ShapeRatio = quotient(p.Speed, t, 2*d); !(p.ShapeRatio >= 1) {
			beyond = p.shorter(g, d, t)
			p.Impossible = math.IsInf(beyond, 1)
		}
	}
	p.FloorDeceleration = beyond / p.TotalMass
	p.Floor = p.Weight + beyond
	p.FloorOverWeight = p.Floor / p.Weight
}

// quotient is a*b/c, rounded about once: what the product and the division lost
// is put back. math.FMA is exact on every machine.
func quotient(a, b, c float64) float64 {
	inverse := 1 / c
	p := float64(a * b)
	q := float64(p * inverse)
	return math.FMA(math.FMA(-q, c, p)+math.FMA(a, b, -p), inverse, q)
}

// shorter returns what the least peak has above the weight, N, of any stop from the speed v to rest over
// the distance d in a time t below 2*d/v (M-06). The body falls on freely for
// tau, then brakes evenly:
//
//	tau = (2*d - v*t)/(v + g*t)
//	a   = (v + g*tau)/(t - tau) = (v^2 + 2*g*d)/(2*v*t + g*t^2 - 2*d)
//	m*a = 2*(E + W*d)/(2*v*t + g*t^2 - 2*d)
//
// +Inf when no force that only pulls can do it (M-05). Near that edge the
// result hangs on the last digits of v, t and d.
func (p *Point) shorter(g, d, t float64) float64 {
	room := 2*float64(p.Speed*t) + float64(g*t*t) - 2*d
	if room <= 0 {
		return math.Inf(1)
	}
	return 2 * (p.Energy + float64(p.Weight*d)) / room
}

// reachable returns the distance, m, that the body would cover in the time t
// without any force of the connector: a stop must be shorter (M-05).
func reachable(v, g, t float64) float64 { return float64(v*t) + float64(g*t*t)/2 }

// assumedAt fills in what would hold if the stop had the shape of c. Where
// both distance and time are given the time is used; Evaluate looks at both.
func assumedAt(p *Point, c *Case) {
	a := &p.Assumed
	*a = noShape
	t := c.Time
	switch {
	case t > 0:
		a.Distance = c.Pulse.DistanceOf(p.Speed, t, c.Gravity, c.Rise)
	case c.Distance > 0:
		t = c.Pulse.TimeOf(p.Speed, c.Distance, c.Gravity, c.Rise)
		a.Time = t
	default:
		return
	}
	a.Peak = c.Pulse.PeakOf(p.TotalMass, p.Speed, t, c.Gravity, c.Rise)
	a.OverWeight = a.Peak / p.Weight
	a.Deceleration = a.Peak/p.TotalMass - c.Gravity
	a.Onset = a.Peak / c.Pulse.riseTime(t, c.Rise)
}
