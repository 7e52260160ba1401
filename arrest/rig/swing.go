package rig

import "math"

// A Body is what falls. SI units.
type Body struct {
	Mass         float64 // kg
	InitialSpeed float64 // downwards at the start of the fall, m/s
	Gravity      float64 // m/s2
}

// speed2 returns the square of the speed in m2/s2 after a vertical fall of h:
// u^2 + 2 g h.
func (b *Body) speed2(h float64) float64 {
	return square(b.InitialSpeed) + float64(2*b.Gravity*h)
}

// A Swing is what an inextensible connector does after the first pull (M-22).
// Figures that cannot be had are NaN.
type Swing struct {
	Speed      float64 // at the first pull, m/s
	Tangential float64 // the part of it along the swing, which no connector takes away, m/s

	// LowestLow and LowestHigh bound the speed at the lowest point, m/s: all of
	// the speed along the connector lost at the first pull, and nothing lost. With
	// a soft connector neither is a bound; see SoftSpeed.
	LowestLow, LowestHigh float64

	// Time from the first pull to the lowest point with LowestLow, s: the longer
	// of the two.
	Time float64

	Height float64 // of a straight fall with LowestHigh, m

	Passes [MaxObstacles]Pass
}

// A Pass is the first touch of an obstacle on the way down and through one swing.
type Pass struct {
	Reached bool
	Unknown bool    // a figure is missing, or the motion is out of plane
	Falling bool    // before the first pull
	Angle   float64 // of the swing there, rad, negative beyond the lowest point
	Z       float64 // height of the D-ring there, m

	// Low and High bound the speed there, m/s, as in Swing. Low is NaN where the
	// body comes only with more speed than that.
	Low, High float64

	Height float64 // of a straight fall with High, m
}

// Swing works out the swing from a place:
//
//	v^2 = u^2 + 2 g h,  H = R (1 - cos a)
//	sqrt(v^2 sin^2 a + 2 g H) <= speed at the lowest point <= sqrt(v^2 + 2 g H)
//
// and with the drop z in place of H at an obstacle. u initial speed downwards m/s;
// h free fall m; R radius m and a angle of the swing at the first pull rad.
//
// Preconditions: none; what the place does not know is NaN. Special case: no
// offset, where the first bound is zero.
//
// It errs low for a connector that stretches, on both bounds, because the body
// goes deeper; it errs high by the drag of the air. Derived from the energy.
func (l *Layout) Swing(p *Place, b *Body) Swing {
	v2 := b.speed2(p.FreeFall)
	tangential := math.Sqrt(v2) * math.Sin(p.SwingAngle)
	drop := float64(2 * b.Gravity * p.SwingDrop)
	s := Swing{
		Speed: math.Sqrt(v2), Tangential: tangential,
		LowestLow:  math.Sqrt(square(tangential) + drop),
		LowestHigh: math.Sqrt(v2 + drop),
		Time:       SwingTime(p.Plane.Radius, p.SwingAngle, tangential, b.Gravity),
	}
	s.Height = StraightFall(s.LowestHigh, b.Gravity)
	for i, o := range l.obstacles() {
		w := l.window(&p.Plane, &o)
		s.Passes[i] = s.pass(&w, p, b)
	}
	return s
}

// pass returns the first touch of an obstacle.
func (s *Swing) pass(w *window, p *Place, b *Body) Pass {
	nan := math.NaN()
	no := Pass{Angle: nan, Z: nan, Low: nan, High: nan, Height: nan}
	if no.Unknown = p.Status != Known || !p.Plane.Flat || !w.known(); no.Unknown || w.empty() {
		return no
	}
	if z, ok := w.falling(p.Plane.Offset, p.Start.Z, p.Taut.Z); ok {
		v := math.Sqrt(b.speed2(p.Start.Z - z))
		return Pass{Reached: true, Falling: true, Angle: p.SwingAngle, Z: z, Low: v, High: v, Height: StraightFall(v, b.Gravity)}
	}
	angle, ok := s.touch(w, p, b)
	if !ok {
		return no
	}
	z := p.Plane.Pivot - p.Plane.Radius*math.Cos(angle)
	drop := float64(2 * b.Gravity * (p.Taut.Z - z))
	high := math.Sqrt(square(s.Speed) + drop)
	return Pass{Reached: true, Angle: angle, Z: z, Low: math.Sqrt(square(s.Tangential) + drop), High: high, Height: StraightFall(high, b.Gravity)}
}

// touch returns the angle at which the arc of the swing first enters the window,
// up to as far as the whole energy would carry the body.
func (s *Swing) touch(w *window, p *Place, b *Body) (float64, bool) {
	r := p.Plane.Radius
	far := math.Cos(p.SwingAngle) - square(s.Speed)/(2*b.Gravity*r)
	end := -math.Acos(max(-1, far))
	within := func(a float64) bool {
		sin, cos := math.Sincos(a)
		// The corners of the window count in spite of rounding.
		const give = 1e-12
		return w.near(r*sin, p.Plane.Pivot-r*cos, give*r)
	}
	// The arc enters where it starts, through a side, from above or from below.
	down, up := math.Acos((p.Plane.Pivot-w.z1)/r), -math.Acos((p.Plane.Pivot-w.z0)/r)
	in, over := math.Asin(w.u1/r), -math.Pi-math.Asin(w.u0/r)
	best, ok := 0.0, false
	for _, a := range [...]float64{p.SwingAngle, down, up, in, over} {
		if a <= p.SwingAngle && a >= end && (!ok || a > best) && within(a) {
			best, ok = a, true
		}
	}
	return best, ok
}

// SoftSpeed returns a bound of the speed in m/s at any moment of a swing in which
// a linear elastic connector stretches:
//
//	v <= sqrt(u^2 + 2 g (h + H) + g^2 m/k)
//
// b the body: u initial speed downwards m/s, m mass kg, g gravity m/s2; drop =
// h + H, free fall and swing drop together, m; k stiffness N/m. Preconditions: k
// > 0, drop >= 0. Special case: k = +Inf gives the upper bound of the
// inextensible swing. It errs high. Derived: below the lowest point of the
// inextensible swing the weight does g x m more work over the stretch x and the
// connector takes k x^2/2, the difference of which is at most g^2 m^2/(2 k).
func SoftSpeed(b *Body, drop, k float64) float64 {
	return math.Sqrt(b.speed2(drop) + float64(b.Gravity*b.Gravity*b.Mass)/k)
}

// StraightFall returns the height in m of a straight fall from rest that gives
// the speed v in m/s: v^2/(2 g). Precondition: g > 0. Without air drag: it errs low. Derived.
func StraightFall(v, g float64) float64 { return square(v) / (2 * g) }

// HitForce returns the mean force in N on a body that hits something and is
// stopped by it over a stated distance (M-02):
//
//	F = m v^2/(2 d) + m g n
//
// b the body: m mass kg, g gravity m/s2; v speed m/s; d distance over which the
// body comes to rest along its way, m; n share of the motion downwards, 1 for
// straight down, 0 for level. Preconditions: d > 0, |n| <= 1. It is a floor: the
// peak is above the mean; and what the connector still carries is left out, which
// errs high. Derived from work and energy.
func HitForce(b *Body, v, d, n float64) float64 {
	return b.Mass*square(v)/(2*d) + float64(b.Mass*b.Gravity*n)
}
