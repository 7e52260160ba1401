package connector

import "math"

// An arc is the motion on one straight piece of the law of force, counted from
// where it begins and in the direction in which the body goes:
//
//	y'' + 2 sigma y' + w2 y = as,  y(0) = 0,  y'(0) = v0
//
// y travel m; v0 >= 0 speed m/s; as acceleration at the beginning without the
// dashpot m/s2; w2 = k/m >= 0 in 1/s2; sigma = c/2m >= 0 in 1/s. With
// D = w2 - sigma^2 and C, S the free motions of the stiffness D and the mass 1
// that begin as (1, 0) and (0, 1), that is cos and sin/w for D = w^2 > 0, 1 and t
// for D = 0, cosh and sinh/l for D = -l^2 < 0,
//
//	e = exp(-sigma t) C,  s = exp(-sigma t) S,  h = (1 - e - sigma s)/w2
//	y = v0 s + as h,      y' = v0 (e - sigma s) + as s
//
// e, s and h come from power series, which do not tell the cases apart: no
// dashpot, flat, under-, over- and critically damped are one. The series is
// summed for a part of the time, which is then doubled by the theorem of
// addition; the quotient for h is taken only where w2 t^2 is not small. No digits
// are lost, and no function of the machine is asked, so that every machine gives
// the same ones. Only far into an overdamped arc the two rates of decay are used.
//
// The acceleration is a0 e + ra s and its rate j0 e + rj s.
type arc struct {
	v0, as         float64
	w2, sigma      float64
	d, root        float64 // D and the root of its amount
	a0, j0, ra, rj float64
}

func newArc(v0, as, w2, sigma float64) arc {
	d := w2 - float64(sigma*sigma)
	a0 := as - float64(2*sigma*v0)
	j0 := -float64(2*sigma*a0) - float64(w2*v0)
	return arc{
		v0: v0, as: as, w2: w2, sigma: sigma, d: d, root: math.Sqrt(math.Abs(d)),
		a0: a0, j0: j0, ra: j0 + float64(sigma*a0), rj: -float64(sigma*j0) - float64(w2*a0),
	}
}

// A moment is the time t of an arc with e, s and h there.
type moment struct{ t, e, s, h float64 }

// basis returns the moment at the time t.
func (a *arc) basis(t float64) moment {
	if a.d < 0 && a.root*t > 2 {
		return a.overdamped(t)
	}
	n, dt := 0, t
	for !a.short(dt) {
		n, dt = n+1, dt/2
	}
	if a.w2*t*t > 0.04 {
		e, s := a.turns(dt)
		for range n {
			e, s = float64(e*e)-float64(a.d*s*s), 2*e*s
		}
		return moment{t, e, s, (1 - e - float64(a.sigma*s)) / a.w2}
	}
	b := a.early(dt)
	for range n {
		b = a.add(b, b)
	}
	return b
}

// later returns the moment at the time dt after b, which may be negative.
func (a *arc) later(b moment, dt float64) moment {
	t := b.t + dt
	if !a.short(dt) {
		return a.basis(t)
	}
	if a.w2*t*t > 0.04 {
		e, s := a.turns(dt)
		e, s = float64(b.e*e)-float64(a.d*b.s*s), float64(b.s*e)+float64(b.e*s)
		return moment{t, e, s, (1 - e - float64(a.sigma*s)) / a.w2}
	}
	return a.add(b, a.early(dt))
}

// add returns the moment at the sum of two times.
func (a *arc) add(b, n moment) moment {
	return moment{
		t: b.t + n.t,
		e: float64(b.e*n.e) - float64(a.d*b.s*n.s),
		s: float64(b.s*n.e) + float64(b.e*n.s),
		h: float64(b.h*(n.e+float64(a.sigma*n.s))) + float64(b.s*n.s) + n.h,
	}
}

// turns returns e and s at a short time from the series of C, S and exp.
func (a *arc) turns(t float64) (e, s float64) {
	x, z := -a.d*t*t, a.sigma*t
	c := 1./40320 + float64(x*(1./3628800))
	c = 1./24 + float64(x*(1./720+float64(x*c)))
	c = 1 + float64(x*(1./2+float64(x*c)))
	s = 1./362880 + float64(x*(1./39916800))
	s = 1./120 + float64(x*(1./5040+float64(x*s)))
	s = 1 + float64(x*(1./6+float64(x*s)))
	y := z * z
	even := 1./720 + float64(y*(1./40320))
	even = 1 + float64(y*(1./2+float64(y*(1./24+float64(y*even)))))
	odd := 1./120 + float64(y*(1./5040))
	odd = 1 + float64(y*(1./6+float64(y*odd)))
	f := even - float64(z*odd)
	return f * c, f * s * t
}

// short reports whether early is good for the time t.
func (a *arc) short(t float64) bool { return a.sigma*math.Abs(t) < 0.05 && a.w2*t*t < 0.04 }

// early sums the power series of s/t, the response to a blow, and of h/t^2. Up
// to u11 it leaves less than 1e-17 of them over a short time; over a very short
// time fewer terms do.
func (a *arc) early(t float64) moment {
	p, q := 2*a.sigma*t, a.w2*t*t
	u2 := -p / 2
	u3 := -(float64(2*p*u2) + q) / 6
	s, h := u2+u3, u2/3+u3/4
	if size := math.Abs(p) + q; size > 1e-11 {
		u4 := -(float64(3*p*u3) + float64(q*u2)) * (1. / 12)
		u5 := -(float64(4*p*u4) + float64(q*u3)) * (1. / 20)
		s += u4 + u5
		h += float64(u4*(1./5)) + float64(u5*(1./6))
		if size > 1e-6 {
			u6 := -(float64(5*p*u5) + float64(q*u4)) * (1. / 30)
			u7 := -(float64(6*p*u6) + float64(q*u5)) * (1. / 42)
			u8 := -(float64(7*p*u7) + float64(q*u6)) * (1. / 56)
			u9 := -(float64(8*p*u8) + float64(q*u7)) * (1. / 72)
			u10 := -(float64(9*p*u9) + float64(q*u8)) * (1. / 90)
			u11 := -(float64(10*p*u10) + float64(q*u9)) * (1. / 110)
			s += u6 + u7 + (u8 + u9 + (u10 + u11))
			h += float64(u6*(1./7)) + float64(u7*(1./8)) + (float64(u8*(1./9)) + float64(u9*(1./10)) +
				(float64(u10*(1./11)) + float64(u11*(1./12))))
		}
	}
	s = t + float64(t*s)
	h = float64(t*t) * (0.5 + h)
	return moment{t, 1 - float64(a.sigma*s) - float64(a.w2*h), s, h}
}

// overdamped uses the two rates of decay, the slower one free of cancellation.
func (a *arc) overdamped(t float64) moment {
	fast := a.sigma + a.root
	slow := a.w2 / fast
	e1, e2 := math.Exp(-slow*t), math.Exp(-fast*t)
	h := t
	if slow > 0 {
		h = -math.Expm1(-slow*t) / slow
	}
	return moment{t, (e1 + e2) / 2, (e1 - e2) / (2 * a.root), (h - (1-e2)/fast) / (2 * a.root)}
}

// at returns travel and speed at the moment b.
func (a *arc) at(b moment) (y, v float64) {
	return float64(a.v0*b.s) + float64(a.as*b.h), float64(a.v0*(b.e-float64(a.sigma*b.s))) + float64(a.as*b.s)
}

// bends returns acceleration and its rate at the moment b.
func (a *arc) bends(b moment) (acc, jerk float64) {
	return float64(a.a0*b.e) + float64(a.ra*b.s), float64(a.j0*b.e) + float64(a.rj*b.s)
}

// zero returns the first time above zero at which p C + q S = 0, +Inf if there
// is none.
func (a *arc) zero(p, q float64) float64 {
	r := -p / q
	u := a.d * r * r
	switch {
	case r > 0 && math.Abs(u) < 1e-3:
		return r * (1 - u*(1./3-u*(1./5-u*(1./7-u*(1./9-u/11)))))
	case a.d > 0 && p == 0:
		return math.Pi / a.root
	case a.d > 0:
		return math.Atan2(math.Abs(p)*a.root, -q*math.Copysign(1, p)) / a.root
	case r > 0 && u > -1:
		return math.Atanh(a.root*r) / a.root
	}
	return math.Inf(1)
}

// An end says what an arc has come to.
type end uint8

const (
	atBound end = iota // the travel of the straight piece is used up
	atRest             // the speed is zero
	atClock            // the time is up
	slack              // the force is zero, on the way back
	endless            // none of them, ever
)

// A stride is one arc up to its end, at the moment b unless that is endless.
type stride struct {
	b    moment
	y, v float64
	end  end
}

// advance follows the arc until it has travelled d (which may be +Inf) or rests
// or the clock (which may be +Inf) has run down. On the way back with a dashpot
// it also ends when the force is gone: at an acceleration of -g in the
// direction of the motion.
func (a *arc) advance(d, clock, g float64, back bool) stride {
	if a.sigma > 0 {
		return a.damped(d, clock, g, back)
	}
	st := a.undamped(d)
	if st.b.t > clock {
		return a.until(clock, atClock)
	}
	if st.end != endless {
		st.b = a.basis(st.b.t)
	}
	return st
}

// until returns the stride that ends at the time t.
func (a *arc) until(t float64, why end) stride {
	st := stride{b: a.basis(t), end: why}
	st.y, st.v = a.at(st.b)
	return st
}

// undamped needs no iteration: the speed at d follows from the energy, the time
// from the turn of the phase.
func (a *arc) undamped(d float64) stride {
	if !math.IsInf(d, 1) {
		if vv := float64(a.v0*a.v0) + float64(d*(float64(2*a.as)-float64(a.w2*d))); vv > 0 {
			v := math.Sqrt(vv)
			return stride{moment{t: a.turn(d, v)}, d, v, atBound}
		}
	}
	q := math.Sqrt(float64(a.as*a.as) + float64(a.w2*a.v0*a.v0))
	var y float64
	switch {
	case a.as <= 0 && q > 0:
		y = a.v0 * a.v0 / (q - a.as)
	case a.w2 > 0:
		y = (a.as + q) / a.w2
	default:
		return stride{moment{t: math.Inf(1)}, math.Inf(1), a.v0, endless}
	}
	return stride{moment{t: a.zero(a.v0, a.as)}, min(y, d), 0, atRest}
}

// turn returns the time in which the undamped arc travels d to the speed v.
func (a *arc) turn(d, v float64) float64 {
	if d == 0 {
		return 0
	}
	if a.w2 == 0 {
		return 2 * d / (a.v0 + v)
	}
	wd := a.w2 * d
	lost := d * (wd - 2*a.as) / (a.v0 + v)
	sin := a.root * (float64(wd*a.v0) - float64(a.as*lost))
	cos := float64(a.w2*a.v0*v) + float64(a.as*(a.as-wd))
	return math.Atan2(sin, cos) / a.root
}

// damped tries the likely end first. If that is not it, it finds the first rest
// in closed form, so that the travel up to there is monotone and d lies before
// it or nowhere; then the moment at d.
func (a *arc) damped(d, clock, g float64, back bool) stride {
	if st, ok := a.likely(d, clock, g, back); ok {
		return st
	}
	why, t := atRest, a.zero(a.v0, a.as-float64(a.sigma*a.v0))
	if t > clock {
		why, t = atClock, clock
	}
	var st stride
	switch {
	case back:
		st.b, st.end = a.letsGo(g, t), slack
		if st.b.t == t {
			st.end = why
		}
		if math.IsInf(st.b.t, 1) {
			return a.onwards(d)
		}
		st.y, st.v = a.at(st.b)
		if st.y >= d {
			st, _ = a.solve(d, st.b.t)
		}
	case math.IsInf(t, 1):
		return a.onwards(d)
	default:
		var ok bool
		if st, ok = a.solve(d, t); !ok {
			st.end = why
		}
	}
	if st.end == atRest {
		st.v = 0
	}
	return st
}

// likely tries the end that most arcs come to, the travel d downwards and the
// loss of the force on the way back, by Halley's steps without a bracket. It
// gives up unless the moment found is certainly the first of its kind.
//
// Speed and rate of the force both go as the combinations of C and S that zero
// takes, whose zeros are pi/w apart, or which have one at most. One that had its
// first sign at the beginning and has it again before pi/w has kept it.
func (a *arc) likely(d, clock, g float64, back bool) (stride, bool) {
	if a.d > 0 {
		clock = min(clock, math.Pi/a.root)
	}
	var st stride
	if !back {
		if math.IsInf(d, 1) || d == 0 {
			return st, false
		}
		st.b.t = a.guess(d)
	} else {
		if a.j0 >= 0 {
			return st, false
		}
		st.b.t = a.guessGone(g)
	}
	if !(st.b.t < clock) {
		return st, false
	}
	st.b = a.basis(st.b.t)
	for range 8 {
		st.y, st.v = a.at(st.b)
		to, done := 0.0, false
		if back {
			to, done = a.stepGone(&st, g)
		} else {
			to, done = a.stepTo(&st, d)
		}
		switch {
		case !(st.v > 0 && to > 0 && to < clock):
			return st, false
		case done && back:
			st.end = slack
			_, jerk := a.bends(st.b)
			return st, jerk < 0 && st.y < d
		case done:
			st.y, st.end = d, atBound
			return st, true
		}
		st.b = a.later(st.b, to-st.b.t)
		st.b.t = to
	}
	return st, false
}

// guess returns about when the travel d is reached. The speed there follows from
// the energy, with the work of the dashpot as of a motion of constant
// deceleration; the time from the mean of both speeds and, since the
// deceleration is not constant, from its rate at the beginning.
func (a *arc) guess(d float64) float64 {
	vv := float64(a.v0*a.v0) + float64(d*(float64(2*a.as)-float64(a.w2*d)))
	v := math.Sqrt(max(0, vv-4*a.sigma*d*a.v0))
	v = math.Sqrt(max(0, vv-8./3*a.sigma*d*(a.v0+v-a.v0*v/(a.v0+v))))
	return 2 * d / (a.v0 + v)
}

// stepTo returns the time to try next for the travel d, and whether the stride
// is there but for rounding.
func (a *arc) stepTo(st *stride, d float64) (to float64, done bool) {
	off := st.y - d
	if math.Abs(off) <= 0x1p-47*(d+math.Abs(float64(a.v0*st.b.s))+math.Abs(float64(a.as*st.b.h))) {
		return st.b.t, true
	}
	acc, _ := a.bends(st.b)
	newton := off / st.v
	return st.b.t - newton/(1-bent(newton*acc/(2*st.v))), false
}

// bent returns the share of Halley's correction to a step of Newton, none where
// it would be large: there the curvature is not to be trusted.
func bent(share float64) float64 {
	if math.Abs(share) > 0.5 {
		return 0
	}
	return share
}

// guessGone returns about when the force of an arc on the way back is gone. From
// rest and with little damping it is a quarter of a swing, corrected for both
// the dashpot and the weight; else, the force over the mass is g + a0 + j0 t +
// ... at first.
func (a *arc) guessGone(g float64) float64 {
	if a.v0 == 0 && a.d > 0 && 2*g < a.as {
		fade := a.sigma / a.root
		x := g / a.as * (1 + fade*(math.Pi/2))
		return (math.Pi/2 - fade + x + x*x*x/6) / a.root
	}
	f, j := g+a.a0, a.j0
	q := float64(2*a.sigma*j) + float64(a.w2*a.a0)
	return 2 * f / (math.Sqrt(max(0, float64(j*j)+float64(2*f*q))) - j)
}

// stepGone returns the time to try next for the loss of the force, and whether
// the stride is there but for rounding.
func (a *arc) stepGone(st *stride, g float64) (to float64, done bool) {
	acc, jerk := a.bends(st.b)
	f := g + acc
	if math.Abs(f) <= 0x1p-47*(g+math.Abs(a.as)+float64(4*a.sigma*a.v0)) {
		return st.b.t, true
	}
	newton := f / jerk
	return st.b.t - newton/(1+bent(newton*(float64(2*a.sigma*jerk)+float64(a.w2*acc))/(2*jerk))), false
}

// onwards is the stride of an arc that never rests.
func (a *arc) onwards(d float64) stride {
	y := a.limit()
	if y <= d {
		return stride{moment{t: math.Inf(1)}, y, 0, endless}
	}
	t, y := 1/a.sigma, 0.0
	for y < d {
		t *= 2
		y, _ = a.at(a.basis(t))
	}
	st, _ := a.solve(d, t)
	return st
}

// limit returns the travel that an arc without rest tends to.
func (a *arc) limit() float64 {
	switch {
	case a.w2 > 0:
		return a.as / a.w2
	case a.as > 0:
		return math.Inf(1)
	}
	return a.v0 / (2 * a.sigma)
}

// quick is the number of steps after which a search halves its bracket only.
const quick = 25

// solve returns the stride to the travel d, if the arc, which must be monotone
// up to the time hi, comes to it; else the stride to hi and false. It goes by
// Halley's steps, held by a bracket.
func (a *arc) solve(d, hi float64) (stride, bool) {
	last := a.until(hi, atBound)
	if last.y < d {
		return last, false
	}
	lo, st := 0.0, last
	if t := a.guess(d); t < hi {
		st = a.until(t, atBound)
	}
	for n := range 100 {
		to, done := a.stepTo(&st, d)
		if done {
			break
		}
		if st.y > d {
			hi = st.b.t
		} else {
			lo = st.b.t
		}
		if n > quick || !(to > lo && to < hi) {
			if to = lo + (hi-lo)/2; to == lo || to == hi {
				break
			}
		}
		st.b = a.later(st.b, to-st.b.t)
		st.b.t = to
		st.y, st.v = a.at(st.b)
	}
	st.y, st.v = d, max(0, st.v)
	return st, true
}

// topTime returns the moment within the stride, downwards, at which the force is
// greatest, and whether it is not at one of its ends. The force turns where the
// acceleration does, and once at most between two rests.
func (a *arc) topTime(st *stride) (moment, bool) {
	if a.sigma == 0 {
		return moment{}, false
	}
	if a.j0 >= 0 {
		return moment{}, false
	}
	// Most arcs end with the force still rising; near zero the sign is rounding.
	if p, q := float64(a.j0*st.b.e), float64(a.rj*st.b.s); p+q < -1e-6*(math.Abs(p)+math.Abs(q)) {
		return moment{}, false
	}
	t := a.zero(a.j0, a.rj)
	if !(t < st.b.t) {
		return moment{}, false
	}
	if st.end == endless {
		return a.basis(t), true
	}
	return a.later(st.b, t-st.b.t), true
}

// letsGo returns the first moment within (0, t] at which the force of an arc on
// the way back is gone, that is the acceleration -g, or the moment t. The arc must
// not go beyond a rest: then the force turns once at most, and it is looked at
// before and after the turn, so that no crossing is missed.
func (a *arc) letsGo(g, t float64) moment {
	from := 0.0
	for _, to := range [...]float64{min(a.zero(a.j0, a.rj), t), t} {
		if math.IsInf(to, 1) {
			return moment{t: to}
		}
		b := a.basis(to)
		if acc, _ := a.bends(b); g+acc <= 0 {
			return a.gone(g, from, b)
		}
		if to == t {
			return b
		}
		from = to
	}
	panic("unreachable")
}

// gone returns the moment between the time lo and b, where the force is
// monotone, at which it is zero.
func (a *arc) gone(g, lo float64, b moment) moment {
	hi, st := b.t, stride{b: b}
	for n := range 100 {
		to, done := a.stepGone(&st, g)
		if done {
			break
		}
		if acc, _ := a.bends(st.b); g+acc > 0 {
			lo = st.b.t
		} else {
			hi = st.b.t
		}
		if n > quick || !(to > lo && to < hi) {
			if to = lo + (hi-lo)/2; to == lo || to == hi {
				break
			}
		}
		st.b = a.later(st.b, to-st.b.t)
		st.b.t = to
	}
	return st.b
}

// spring returns the integral over the arc of w2 y, which is the impulse of the
// stretch over the mass, in m/s.
func (a *arc) spring(b moment) float64 {
	return float64(a.v0*a.w2*b.h) + float64(a.as*(b.t-b.s-float64(2*a.sigma*b.h)))
}

// viscous returns the integral over the arc of 2 sigma y'^2, which is the work
// of the dashpot over the mass, in J/kg.
func (a *arc) viscous(b moment) float64 {
	t, e, s := b.t, b.e, b.s
	switch {
	case a.sigma == 0:
		return 0
	case a.sigma*t < 0.05 && a.w2*t*t < 0.0025:
		return a.earlyViscous(t)
	case a.d < 0 && (a.root*t > 2 || a.w2 < 0.01*a.sigma*a.sigma):
		return a.overdampedViscous(t)
	}
	// With J1, J2, J3 the integrals of e^2, e s, s^2: the derivatives of e^2, e s
	// and s^2 are combinations of the three, which are solved for them.
	left := 1 - float64(e*e) - float64(a.d*s*s)
	j3 := (left/(2*a.sigma) - float64(e*s) - float64(a.sigma*s*s)) / (2 * a.w2)
	j2 := float64(s*s)/2 + float64(a.sigma*j3)
	j1 := float64(e*s) + float64(a.d*j3) + float64(2*a.sigma*j2)
	q := a.as - float64(a.sigma*a.v0)
	return 2 * a.sigma * (float64(a.v0*a.v0*j1) + float64(2*a.v0*q*j2) + float64(q*q*j3))
}

func (a *arc) overdampedViscous(t float64) float64 {
	fast := a.sigma + a.root
	slow := a.w2 / fast
	p, q := (a.as-a.v0*slow)/(2*a.root), (a.v0*fast-a.as)/(2*a.root)
	return 2 * a.sigma * (p*p*decay(2*slow, t) + 2*p*q*decay(slow+fast, t) + q*q*decay(2*fast, t))
}

// decay returns the integral of exp(-r t) from 0 to t.
func decay(r, t float64) float64 {
	if r == 0 {
		return t
	}
	return -math.Expm1(-r*t) / r
}

// earlyViscous sums the power series of v^2, whose coefficients follow from
// v' = a and a' = -2 sigma a - w2 v.
func (a *arc) earlyViscous(t float64) float64 {
	inverse := [...]float64{0, 1, 1. / 2, 1. / 3, 1. / 4, 1. / 5, 1. / 6, 1. / 7, 1. / 8, 1. / 9, 1. / 10}
	vv, va, aa := a.v0*a.v0, a.v0*a.a0, a.a0*a.a0
	sum := vv
	for n := 1; n < 10; n++ {
		x := t * inverse[n]
		vv, va, aa = x*2*va,
			x*(aa-float64(2*a.sigma*va)-float64(a.w2*vv)),
			-x*(float64(4*a.sigma*aa)+float64(2*a.w2*va))
		sum += vv * inverse[n+1]
	}
	return 2 * a.sigma * sum * t
}
