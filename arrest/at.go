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
	m := c.Mass + c.Tools
	g := c.Gravity
	v2 := float64(c.InitialSpeed*c.InitialSpeed) + float64(2*g*c.FreeFall)
	v := math.Sqrt(v2)
	p.TotalMass = m
	p.Weight = m * g
	p.FreeFall = c.FreeFall
	if c.InitialSpeed > 0 {
		p.FreeFall = c.FreeFall + float64(c.InitialSpeed*c.InitialSpeed)/(2*g)
	}
	p.Speed = v
	p.Energy = m * v2 / 2
	p.Momentum = m * v
	stopAt(p, v2, g, c.Distance, c.Time)
	if c.Path != nil {
		modelAt(c, p)
	}
	if c.Pulse == NoPulse {
		p.Assumed = Assumed{nan, nan, nan, nan, nan, nan}
		return
	}
	assumedAt(p, c)
}

// stopAt fills in what follows from the stop: both means, their ratio and the
// floor of the peak. p holds mass, weight and speed; v2 is the square of the
// speed. d and t are 0 where not given.
func stopAt(p *Point, v2, g, d, t float64) {
	p.MeanOverDistance, p.MeanOverTime, p.ShapeRatio = nan, nan, nan
	p.Impossible = false
	brake := nan // least peak of the net deceleration
	switch {
	case d > 0 && t > 0:
		vt := p.Speed * t
		p.MeanOverDistance = p.Weight + p.TotalMass*v2/(2*d)
		p.MeanOverTime = p.Weight + float64(p.TotalMass*(p.Speed/t))
		p.ShapeRatio = vt / (2 * d)
		brake = leastBrake(v2, p.Speed, g, d, t)
		p.Impossible = math.IsInf(brake, 1)
	case d > 0:
		brake = v2 / (2 * d)
		p.MeanOverDistance = p.Weight + float64(p.TotalMass*brake)
	case t > 0:
		brake = p.Speed / t
		p.MeanOverTime = p.Weight + float64(p.TotalMass*brake)
	}
	p.FloorDeceleration = brake
	p.FloorOverWeight = 1 + brake/g
	p.Floor = p.Weight + float64(p.TotalMass*brake)
}

// leastBrake returns the least peak of the net deceleration, m/s2, of any stop
// from the speed v to rest over the distance d in the time t (M-06):
//
//	t >= 2*d/v    a = v^2/(2*d)
//	t <  2*d/v    fall on freely for tau = (2*d - v*t)/(v + g*t), then brake evenly:
//	              a = (v + g*tau)/(t - tau) = (v^2 + 2*g*d)/(2*v*t + g*t^2 - 2*d)
//
// +Inf when no force that only pulls can do it (M-05). Near that edge the
// result hangs on the last digits of t and d.
func leastBrake(v2, v, g, d, t float64) float64 {
	vt := v * t
	if vt >= 2*d {
		return v2 / (2 * d)
	}
	room := 2*vt + float64(g*t*t) - 2*d
	if room <= 0 {
		return math.Inf(1)
	}
	return (v2 + 2*float64(g*d)) / room
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
