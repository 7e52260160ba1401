package rig

import "math"

// agm returns the arithmetic-geometric mean of a and b, both above zero, to
// about 2e-16. It stops when the next step would change nothing: the mean of two
// that differ by d is off by d^2/(16 a).
func agm(a, b float64) float64 {
	for math.Abs(a-b) > 1e-8*a {
		a, b = (a+b)/2, math.Sqrt(a*b)
	}
	return (a + b) / 2
}

// EllipticK returns the complete elliptic integral of the first kind,
//
//	K(m) = integral over 0 <= t <= pi/2 of dt/sqrt(1 - m sin^2 t) = pi/(2 agm(1, sqrt(1 - m)))
//
// m is the parameter, the square of the modulus. Precondition: m < 1; m = 1 gives
// +Inf, more gives NaN. Relative error below 1e-15 for the m that is given. Source: Abramowitz and Stegun, 17.6.3.
func EllipticK(m float64) float64 {
	if m == 1 {
		return math.Inf(1)
	}
	return math.Pi / (2 * agm(1, math.Sqrt(1-m)))
}

// EllipticF returns the incomplete elliptic integral of the first kind,
//
//	F(a, m) = integral over 0 <= t <= a of dt/sqrt(1 - m sin^2 t)
//
// by the arithmetic-geometric mean: with a_0 = 1, b_0 = sqrt(1 - m), f_0 = a and
// tan(f_n+1 - f_n) = (b_n/a_n) tan f_n it is the limit of f_n/(2^n a_n).
//
// a amplitude rad; m parameter. Preconditions: |a| <= pi/2, m <= 1. Special
// cases: a = pi/2 gives K(m); m = 1 gives asinh(tan a). Relative error below 1e-13
// for m <= 0.99. Source: Abramowitz and Stegun, 17.6.8.
func EllipticF(amplitude, m float64) float64 {
	if m == 1 {
		return math.Asinh(math.Tan(amplitude))
	}
	return ellipticF(math.Sin(amplitude), math.Cos(amplitude), math.Sqrt(1-m))
}

// ellipticF is EllipticF of the angle whose sine and cosine are as s to c, c not
// below zero, with the complementary modulus kc > 0. The two are not rounded to
// an angle first, which near pi/2 would cost half the digits.
func ellipticF(s, c, kc float64) float64 {
	a, b := 1.0, kc
	f := math.Atan2(s, c)
	scale := 1.0
	for last := false; !last; scale *= 2 {
		// The angle is off by as much as the two means differ, not by its square:
		// one step more than they need.
		last = !(math.Abs(a-b) > 1e-8*a)
		step := math.Atan2(b*s, a*c)
		// The step lies within a quarter turn of f: the turns are those of f.
		step += 2 * math.Pi * math.Round((f-step)/(2*math.Pi))
		f += step
		a, b = (a+b)/2, math.Sqrt(a*b)
		s, c = math.Sincos(f)
	}
	return f / (scale * a)
}

// Period returns the period in s of a pendulum, there and back:
//
//	T = 2 pi sqrt(L/g)/agm(1, cos(A/2))
//
// L length m; A amplitude from straight down rad; g gravity m/s2. Preconditions:
// L, g > 0, |A| < pi. Special cases: A = 0 gives 2 pi sqrt(L/g); A = pi gives
// +Inf, but for rounding. Without friction and air: it errs low. Derived from the energy; the
// mean is Abramowitz and Stegun, 17.6.3.
func Period(length, amplitude, g float64) float64 {
	return 2 * math.Pi * math.Sqrt(length/g) / agm(1, math.Cos(amplitude/2))
}

// SwingTime returns the time in s in which a pendulum that begins at the angle a
// with the speed v towards the lowest point comes to it:
//
//	kappa^2 = sin^2(a/2) + v^2/(4 g L)
//	t = sqrt(L/g) F(asin(sin(a/2)/kappa), kappa^2)
//
// L length m; a angle from straight down rad; v speed m/s; g gravity m/s2.
// Preconditions: L, g > 0, 0 <= a < pi, v >= 0. Special cases: a = 0 gives 0; v = 0
// gives a quarter of Period; kappa > 1, a swing that would go over the top, gives
// sqrt(L/g)/kappa F(a/2, 1/kappa^2). Relative error below 1e-9, as tested.
// Without friction and air: it errs low. Derived from the energy.
func SwingTime(length, angle, speed, g float64) float64 {
	if angle == 0 {
		return 0
	}
	w := math.Sqrt(g / length)
	s, c := math.Sincos(angle / 2)
	e := speed / (2 * w * length)
	kappa := math.Hypot(s, e)
	left := (c - e) * (c + e) // 1 - kappa^2
	switch {
	case left == 0:
		return math.Asinh(s/e) / w
	case left > 0:
		return ellipticF(s, e, math.Sqrt(left)) / w
	}
	return ellipticF(s, c, math.Sqrt(-left)/kappa) / (w * kappa)
}
