package arrest

import "math"

var nan = math.NaN()

// At works out one exact point. It allocates nothing (a connector path
// makes room in p once) and never fails: what cannot happen is told by
// Point.Impossible. c must hold a positive total mass
// and gravity, and no negative figure; the readers of files see to that.
func At(c *Case, p *Point) {
	if c.Load.Mass > 0 {
		loadAt(c, p)
		return
	}
	m, lost := sum(c.Mass, c.Tools)
	g := c.Gravity
	fallen := 2 * g * c.FreeFall
	square := fallen + math.FMA(c.InitialSpeed, c.InitialSpeed, math.FMA(2*g, c.FreeFall, -fallen))
	v := math.Sqrt(square)
	p.TotalMass = m
	p.Weight = m * g
	p.FreeFall = c.FreeFall
	if c.InitialSpeed > 0 {
		p.FreeFall = c.FreeFall + float64(c.InitialSpeed*c.InitialSpeed)/(2*g)
	}
	p.Speed = v
	p.Energy = math.FMA(m, square, lost*square) / 2
	p.Momentum = math.FMA(m, v, lost*v)
	stopAt(p, &stop{m, lost, square, v, g}, c.Distance, c.Time)
	if c.Path != nil {
		modelAt(c, p)
	}
	if c.Pulse == NoPulse {
		p.Assumed = Assumed{nan, nan, nan, nan, nan, nan}
		return
	}
	assumedAt(p, c)
}

// A stop is what the body brings to it: its mass (and what its sum lost to
// rounding), the square of the speed, the speed; and gravity.
type stop struct{ m, lost, square, v, g float64 }

// sum is a+b and what it lost to rounding, exact (D. Knuth, The Art of Computer
// Programming 2, 4.2.2).
func sum(a, b float64) (s, lost float64) {
	s = a + b
	t := s - a
	return s, (a - (s - t)) + (b - t)
}

// force returns m*n/x, N, rounded about once; inverse is 1/x. FMA is exact on
// every machine, so that the digits are the same everywhere.
func (s *stop) force(n, x, inverse float64) float64 {
	p := s.m * n
	q := p * inverse
	return math.FMA(math.FMA(-q, x, p)+math.FMA(s.lost, n, math.FMA(s.m, n, -p)), inverse, q)
}

// stopAt fills in what follows from the stop: both means, their ratio and the
// floor of the peak. d and t are 0 where not given.
//
//	F_d = W + m*v^2/(2*d) = m*(v^2 + 2*g*d)/(2*d)
//	F_t = W + m*v/t       = m*(v + g*t)/t
//	r   = v*t/(2*d)
func stopAt(p *Point, s *stop, d, t float64) {
	p.MeanOverDistance, p.MeanOverTime, p.ShapeRatio = nan, nan, nan
	p.Impossible = false
	brake, floor := nan, nan
	if d > 0 {
		inverse := 1 / (2 * d)
		p.MeanOverDistance = s.force(math.FMA(2*s.g, d, s.square), 2*d, inverse)
		brake, floor = s.square*inverse, p.MeanOverDistance
		if t > 0 {
			vt := s.v * t
			r := vt * inverse
			p.ShapeRatio = math.FMA(math.FMA(-r, 2*d, vt)+math.FMA(s.v, t, -vt), inverse, r)
		}
	}
	if t > 0 {
		inverse := 1 / t
		p.MeanOverTime = s.force(math.FMA(s.g, t, s.v), t, inverse)
		if !(d > 0) {
			brake, floor = s.v*inverse, p.MeanOverTime
		} else if !(p.ShapeRatio >= 1) {
			brake, floor = s.shorter(d, t)
			p.Impossible = math.IsInf(floor, 1)
		}
	}
	p.FloorDeceleration = brake
	p.FloorOverWeight = floor / p.Weight
	p.Floor = floor
}

// shorter returns the least peak of any stop from the speed v to rest over the
// distance d in a time t below 2*d/v (M-06): the net deceleration, m/s2, and
// the force, N. The body falls on freely for tau, then brakes evenly:
//
//	tau = (2*d - v*t)/(v + g*t)
//	a   = (v + g*tau)/(t - tau) = (v^2 + 2*g*d)/(2*v*t + g*t^2 - 2*d)
//	F   = m*(g + a)
//
// +Inf when no force that only pulls can do it (M-05). Near that edge the
// result hangs on the last digits of v, t and d.
func (s *stop) shorter(d, t float64) (brake, floor float64) {
	room := math.FMA(2*s.v, t, math.FMA(s.g*t, t, -2*d))
	if room <= 0 {
		return math.Inf(1), math.Inf(1)
	}
	inverse := 1 / room
	n := math.FMA(2*s.g, d, s.square)
	return n * inverse, s.force(math.FMA(s.g, room, n), room, inverse)
}

// reachable returns the distance, m, that the body would cover in the time t
// without any force of the connector: a stop must be shorter (M-05).
func reachable(v, g, t float64) float64 { return float64(v*t) + float64(g*t*t)/2 }

// assumedAt fills in what would hold if the stop had the shape of c. Where
// both distance and time are given the time is used; Evaluate looks at both.
func assumedAt(p *Point, c *Case) {
	a := &p.Assumed
	*a = Assumed{nan, nan, nan, nan, nan, nan}
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
