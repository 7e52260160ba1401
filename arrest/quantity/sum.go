package quantity

import "strings"

// Sum returns a + b, low to low, value to value, high to high. The figures
// are added as written and rounded once: the Sum of "300 lb" and "10 lb" is
// "310 lb" to the last bit.
//
// The result is a Range (Value NaN) if a or b is, else PlusMinus if a or b is,
// else Untold: that says how to read its figures, not that somebody wrote a
// spread for both. Its Text is "300 lb + 10 lb", a spread in brackets; its
// Unit is that of both, or the zero Unit if they differ.
//
// A Band that was put together by hand, or whose figures were changed after
// Parse, counts with the float64 it shows. Sum panics if a and b are of
// different dimensions.
func Sum(a, b Band) Band {
	if d, e := a.Unit.Dimension, b.Unit.Dimension; d != e && d != 0 && e != 0 {
		panic("quantity: Sum of a " + d.String() + " and a " + e.String())
	}
	sum := Band{Tolerance: max(a.Tolerance, b.Tolerance), Text: terms(a, b)}
	sum.low, sum.Low = add(a.low, a.Low, b.low, b.Low)
	sum.value, sum.Value = add(a.value, a.Value, b.value, b.Value)
	sum.high, sum.High = add(a.high, a.High, b.high, b.High)
	if a.Unit == b.Unit {
		sum.Unit = a.Unit
	}
	return sum
}

// plusSign stands between the terms of a sum.
const plusSign = " + "

// add returns the sum of two figures, exactly and rounded. If one of them is
// not finite there is no exact sum.
func add(x exact, xFloat float64, y exact, yFloat float64) (exact, float64) {
	x, y = x.standingFor(xFloat), y.standingFor(yFloat)
	if !x.known() || !y.known() {
		return exact{}, xFloat + yFloat
	}
	sum := x.plus(y)
	return sum, sum.float()
}

// standingFor returns x if it is what f was rounded from, else f itself;
// unknown if f is not finite.
func (x exact) standingFor(f float64) exact {
	if x.known() && x.float() == f {
		return x
	}
	return exactOf(f)
}

// terms returns the texts of a and b as they stand in a sum.
func terms(a, b Band) string {
	var room [128]byte
	text := append(a.appendTerm(room[:0]), plusSign...)
	return string(b.appendTerm(text))
}

func (b *Band) appendTerm(to []byte) []byte {
	if b.Tolerance == Untold || strings.Contains(b.Text, plusSign) {
		return append(to, b.Text...)
	}
	return append(append(append(to, '('), b.Text...), ')')
}
