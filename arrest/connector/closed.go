package connector

import "math"

// StandardGravity is the standard acceleration of free fall in m/s2, exact by
// definition (NIST SP 811, appendix B).
const StandardGravity = 9.80665

// ElasticPeak returns the greatest force in N of one linear elastic part
// (M-10):
//
//	F = W + sqrt(W^2 + k m v^2),  W = m g
//
// m mass kg; v speed at the first pull m/s; k stiffness N/m; g gravity m/s2.
// Preconditions: m, k, g > 0, v >= 0. Special case: v = 0 gives 2 W.
//
// Published drops lie up to 30 per cent above it at high mass and fall factor
// (Weber 2002, abstract): it errs low there.
//
// Source: A. Wexler 1950 (from memory); derived again in the tests from the run.
func ElasticPeak(m, v, k, g float64) float64 {
	w := m * g
	return w + math.Sqrt(float64(w*w)+float64(k*m)*float64(v*v))
}

// ElasticPeakFromRest returns the greatest force in N of one linear elastic
// part after a fall from rest (M-10):
//
//	F = W + sqrt(W^2 + 2 W M f),  f = h/L
//
// w weight N; modulus M force per unit strain N; f fall factor, free fall over
// length. Preconditions: w, M > 0, f >= 0. Special case: f = 0 gives 2 W. The
// length does not appear: at one modulus and fall factor a short rope pulls as
// hard as a long one. It errs as ElasticPeak does, and from the same source.
func ElasticPeakFromRest(w, modulus, f float64) float64 {
	return w + math.Sqrt(float64(w*w)+2*w*float64(modulus*f))
}

// ElasticStretch returns the extension in m at the peak of ElasticPeak, F/k.
func ElasticStretch(m, v, k, g float64) float64 { return ElasticPeak(m, v, k, g) / k }

// ElasticStopTime returns the time in s from the first pull of one linear
// elastic part to the first rest (M-10):
//
//	t = (pi - atan2(v w, g))/w,  w = sqrt(k/m)
//
// Symbols and preconditions as for ElasticPeak. Special cases: v = 0 gives
// pi/w, half a swing; v large gives pi/(2 w), a quarter. Derived from
// Newton's law with the force k x.
func ElasticStopTime(m, v, k, g float64) float64 {
	w := math.Sqrt(k / m)
	return (math.Pi - math.Atan2(v*w, g)) / w
}

// ImpactFactor returns the handbook factor by which a weight dropped by h on an
// elastic part exceeds the weight at rest (M-10):
//
//	1 + sqrt(1 + 2 h/delta)
//
// h drop and delta static stretch under the weight, in the same unit.
// Preconditions: h >= 0, delta > 0. Special case: h = 0 gives 2. It equals
// ElasticPeakFromRest over the weight.
//
// Source: J. Gere, Mechanics of Materials, 6th edition, solution 2.8-1.
func ImpactFactor(h, delta float64) float64 { return 1 + math.Sqrt(1+2*h/delta) }

// A Rating is what the drop test of a dynamic rope states.
type Rating struct {
	ImpactForce float64 // N
	Mass        float64 // kg; 80 for a single rope
	FallFactor  float64 // about 1.77 for a single rope
	Gravity     float64 // m/s2
}

// SingleRope returns the rating of a single rope with the impact force in N, as
// of the test of EN 892: 80 kg and a fall factor of about 1.77.
func SingleRope(impactForce float64) Rating {
	return Rating{ImpactForce: impactForce, Mass: 80, FallFactor: 1.77, Gravity: StandardGravity}
}

// Modulus returns the modulus in N, force per unit strain, of a rope whose
// rated impact force is taken for the peak of ElasticPeakFromRest (M-11):
//
//	M = U (U - 2 W0)/(2 W0 f0)
//
// U rated impact force N; W0 weight of the test mass N; f0 fall factor of the
// test. Precondition: U > 2 W0; otherwise the result is not positive.
//
// The modulus is that of the test: a smaller fall meets a softer rope, so that
// peaks of small falls err high and those of harder falls than the test err
// low. The stretch that follows from it lies above the dynamic elongation of
// catalogues by a fifth in the middle of 101 ropes; see Published.
func Modulus(r Rating) float64 {
	u, w := r.ImpactForce, r.Mass*r.Gravity
	return u * (u - 2*w) / (2 * w * r.FallFactor)
}

// AbsorberTravel returns the travel in m of an absorber when nothing else
// stretches (M-12):
//
//	x = m v^2/2/(Fa - W)
//
// m mass kg; v speed at the first pull m/s; force Fa held by the absorber N; g
// gravity m/s2. Preconditions: m, g > 0, v >= 0. Special case: Fa <= W stops
// nothing and gives +Inf, unless v = 0.
//
// It errs high: every other stretch of the path takes energy as well. Whether
// the absorber is used up only the run of the whole path can say.
func AbsorberTravel(m, v, force, g float64) float64 {
	switch net := force - float64(m*g); {
	case v == 0:
		return 0
	case net <= 0:
		return math.Inf(1)
	default:
		return m * float64(v*v) / 2 / net
	}
}

// FallSpeed returns the speed in m/s after a free fall of h in m from the speed
// u in m/s downwards (M-01):
//
//	v = sqrt(u^2 + 2 g h)
//
// Preconditions: h, g >= 0. Air drag is left out: it errs high.
func FallSpeed(u, h, g float64) float64 { return math.Sqrt(float64(u*u) + 2*g*h) }
