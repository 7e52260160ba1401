package quantity

import (
	"math"
	"math/big"
	"math/bits"
)

// exact is a rational number. It is num/den with den > 0, not always in lowest
// terms, as long as both fit into 64 bits, which the figures people write do;
// beyond that it is wide, and num and den are zero. The zero exact is no
// number. An exact is a value: nothing changes *wide once it is made.
type exact struct {
	num, den int64
	wide     *big.Rat
}

// whole returns n as an exact.
func whole(n int64) exact { return exact{num: n, den: 1} }

// exactOf returns f as an exact, unknown if it is not finite.
func exactOf(f float64) exact {
	const widest = 62 // binary places that a den has room for
	fraction, exponent := math.Frexp(f)
	num := int64(fraction * (1 << 53)) // whole: a float64 has 53 binary digits
	if exponent -= 53; exponent < 0 && num != 0 {
		even := min(bits.TrailingZeros64(uint64(num)), -exponent)
		num, exponent = num>>even, exponent+even
	}
	switch {
	case math.IsInf(f, 0) || math.IsNaN(f):
		return exact{}
	case num == 0:
		return whole(0)
	case exponent <= 0 && exponent >= -widest:
		return exact{num: num, den: 1 << -exponent}
	}
	return exact{wide: new(big.Rat).SetFloat64(f)}
}

// known reports whether x is a number at all.
func (x exact) known() bool { return x.den != 0 || x.wide != nil }

// rat returns x as a new or shared big.Rat, to be read only.
func (x exact) rat() *big.Rat {
	if x.wide != nil {
		return x.wide
	}
	return big.NewRat(x.num, x.den)
}

// sign returns -1, 0 or 1.
func (x exact) sign() int {
	switch {
	case x.wide != nil:
		return x.wide.Sign()
	case x.num < 0:
		return -1
	case x.num > 0:
		return 1
	}
	return 0
}

// minus returns -x.
func (x exact) minus() exact {
	if x.wide != nil {
		return exact{wide: new(big.Rat).Neg(x.wide)}
	}
	if x.num == math.MinInt64 {
		return exact{wide: new(big.Rat).Neg(x.rat())}
	}
	return exact{num: -x.num, den: x.den}
}

// times returns x y.
func (x exact) times(y exact) exact {
	if y.num == 1 && y.den == 1 {
		return x
	}
	if x.wide == nil && y.wide == nil {
		if z, ok := narrowProduct(x, y); ok {
			return z
		}
		x, y = exact{num: x.num, den: y.den}.lowest(), exact{num: y.num, den: x.den}.lowest()
		if z, ok := narrowProduct(x, y); ok {
			return z
		}
	}
	return exact{wide: new(big.Rat).Mul(x.rat(), y.rat())}
}

// narrowProduct returns x y if it fits without reduction.
func narrowProduct(x, y exact) (exact, bool) {
	num, ok := product(x.num, y.num)
	if !ok {
		return exact{}, false
	}
	den, ok := product(x.den, y.den)
	return exact{num: num, den: den}, ok
}

// plus returns x + y.
func (x exact) plus(y exact) exact {
	if x.wide == nil && y.wide == nil {
		if z, ok := narrowSum(x, y); ok {
			return z
		}
		if z, ok := narrowSum(x.lowest(), y.lowest()); ok {
			return z
		}
	}
	return exact{wide: new(big.Rat).Add(x.rat(), y.rat())}
}

// narrowSum returns x + y if it fits without reduction.
func narrowSum(x, y exact) (exact, bool) {
	den := x.den
	if x.den != y.den {
		var fits [3]bool
		x.num, fits[0] = product(x.num, y.den)
		y.num, fits[1] = product(y.num, x.den)
		den, fits[2] = product(x.den, y.den)
		if fits != [3]bool{true, true, true} {
			return exact{}, false
		}
	}
	num, ok := total(x.num, y.num)
	return exact{num: num, den: den}, ok
}

// product returns a b, and whether it fits.
func product(a, b int64) (int64, bool) {
	high, low := bits.Mul64(magnitude(a), magnitude(b))
	if high != 0 || low > math.MaxInt64 {
		return 0, false
	}
	if (a < 0) != (b < 0) {
		return -int64(low), true
	}
	return int64(low), true
}

// total returns a + b, and whether it fits.
func total(a, b int64) (int64, bool) {
	sum := a + b
	return sum, (sum > a) == (b > 0)
}

// magnitude returns |a|, which fits for every a.
func magnitude(a int64) uint64 {
	if a < 0 {
		return -uint64(a)
	}
	return uint64(a)
}

// lowest returns x in lowest terms.
func (x exact) lowest() exact {
	if x.wide != nil {
		return x
	}
	a, b := magnitude(x.num), uint64(x.den)
	for b != 0 {
		a, b = b, a%b
	}
	return exact{num: x.num / int64(a), den: x.den / int64(a)}
}

// float returns the float64 nearest to x, ties to even.
func (x exact) float() float64 {
	if x.wide != nil {
		nearest, _ := x.wide.Float64()
		return nearest
	}
	const limit = 1 << 53 // whole numbers up to here are float64 exactly
	if -limit <= x.num && x.num <= limit && x.den <= limit {
		return float64(x.num) / float64(x.den)
	}
	if x.num < 0 {
		return -quotient(magnitude(x.num), uint64(x.den))
	}
	return quotient(uint64(x.num), uint64(x.den))
}

// quotient returns the float64 nearest to num/den, ties to even; both are
// above zero. It divides once in integers, to 63 bits or more, and keeps in
// the last bit whether anything was left over, so that the conversion to 53
// bits rounds as the endless quotient would.
func quotient(num, den uint64) float64 {
	up, down := bits.LeadingZeros64(num), bits.LeadingZeros64(den)
	num, den = num<<up, den<<down
	q, rest := bits.Div64(num>>1, num<<63, den)
	if rest != 0 {
		q |= 1
	}
	return math.Ldexp(float64(q), down-up-63)
}

// rounded returns x as float does, or NaN if it is unknown.
func (x exact) rounded() float64 {
	if !x.known() {
		return math.NaN()
	}
	return x.float()
}

// String returns x as a decimal if it ends, else as a fraction in lowest terms.
func (x exact) String() string {
	r := x.rat()
	digits, ends := r.FloatPrec()
	if !ends {
		return r.String()
	}
	return r.FloatString(digits)
}
