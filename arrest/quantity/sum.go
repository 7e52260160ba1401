package quantity

import (
	"math"
	"math/big"
)

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
	sum := newBand(
		add(a.low, a.Low, b.low, b.Low),
		add(a.value, a.Value, b.value, b.Value),
		add(a.high, a.High, b.high, b.High))
	sum.Low = orPlain(sum.Low, a.Low, b.Low)
	sum.High = orPlain(sum.High, a.High, b.High)
	sum.Value = orPlain(sum.Value, a.Value, b.Value)
	sum.Tolerance = max(a.Tolerance, b.Tolerance)
	if a.Unit == b.Unit {
		sum.Unit = a.Unit
	}
	sum.Text = term(a) + " + " + term(b)
	return sum
}

// add returns the exact sum of two figures, unknown if one of them is not
// finite.
func add(x exact, xf float64, y exact, yf float64) exact {
	x, y = x.standingFor(xf), y.standingFor(yf)
	if !x.known() || !y.known() {
		return exact{}
	}
	return x.plus(y)
}

// orPlain returns exactly, or a + b where no exact sum exists.
func orPlain(exactly, a, b float64) float64 {
	if math.IsNaN(exactly) {
		return a + b
	}
	return exactly
}

// standingFor returns x if it is what f was rounded from, else f itself;
// unknown if f is not finite.
func (x exact) standingFor(f float64) exact {
	if x.known() && x.float() == f {
		return x
	}
	if r := new(big.Rat).SetFloat64(f); r != nil {
		return exact{wide: r}
	}
	return exact{}
}

// rounded returns x as a float64, NaN if it is unknown.
func (x exact) rounded() float64 {
	if !x.known() {
		return math.NaN()
	}
	return x.float()
}

// term returns the text of b as it stands in a sum.
func term(b Band) string {
	if b.Tolerance == Untold {
		return b.Text
	}
	return "(" + b.Text + ")"
}
