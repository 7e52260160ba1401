package quantity

import "math"

// Close reports whether a is close enough to want:
//
//	|a - want| <= relative |want|
//
// a and want are in one unit, relative is a fraction (1e-12), not negative.
// It is the one definition of "close enough" in this module, and it is
// relative to the figure that was expected: nothing but 0 is close to 0, and
// Close(a, b, r) is not always Close(b, a, r). Equal infinities are close;
// NaN is close to nothing, itself included.
func Close(a, want, relative float64) bool {
	if a == want {
		return true
	}
	if math.IsInf(a, 0) || math.IsInf(want, 0) {
		return false
	}
	return math.Abs(a-want) <= float64(relative*math.Abs(want))
}
