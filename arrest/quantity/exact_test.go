package quantity

import (
	"math"
	"math/big"
	"testing"

	"pgregory.net/rapid"
)

// number draws an int64 of any size, the ends of the range among them.
func number(t *rapid.T, label string) int64 {
	shift := rapid.IntRange(0, 63).Draw(t, label+" shift")
	return rapid.Int64().Draw(t, label) >> shift
}

// anyExact draws an exact, narrow or wide.
func anyExact(t *rapid.T, label string) exact {
	x := exact{num: number(t, label+" num"), den: max(1, number(t, label+" den"))}
	if rapid.Bool().Draw(t, label+" wide") {
		return exact{wide: x.rat()}
	}
	return x
}

func TestExactArithmetic(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		x, y := anyExact(t, "x"), anyExact(t, "y")
		same := func(what string, got exact, want *big.Rat) {
			if got.rat().Cmp(want) != 0 {
				t.Fatalf("%s of %v and %v: %v, want %v", what, x.rat(), y.rat(), got.rat(), want)
			}
			if got.wide == nil && got.den <= 0 {
				t.Fatalf("%s has the denominator %d", what, got.den)
			}
			nearest, _ := want.Float64()
			if got.float() != nearest {
				t.Fatalf("%v as a float64: %v, want %v", want, got.float(), nearest)
			}
		}
		same("product", x.times(y), new(big.Rat).Mul(x.rat(), y.rat()))
		same("sum", x.plus(y), new(big.Rat).Add(x.rat(), y.rat()))
		same("negative", x.minus(), new(big.Rat).Neg(x.rat()))
		same("lowest", x.lowest(), x.rat())
		if x.sign() != x.rat().Sign() {
			t.Fatalf("sign of %v: %d", x.rat(), x.sign())
		}
	})
}

// The quotient rounds as big.Rat does, for ties and their neighbours too.
func TestQuotient(t *testing.T) {
	check := func(t interface{ Fatalf(string, ...any) }, num, den uint64) {
		want, _ := new(big.Rat).SetFrac(new(big.Int).SetUint64(num), new(big.Int).SetUint64(den)).Float64()
		if got := quotient(num, den); got != want {
			t.Fatalf("%d / %d = %v, want %v", num, den, got, want)
		}
		if num > math.MaxInt64 || den > math.MaxInt64 {
			return
		}
		x := exact{num: int64(num), den: int64(den)}
		if got := x.float(); got != want {
			t.Fatalf("%d / %d = %v, want %v", num, den, got, want)
		}
		if got := x.minus().float(); got != -want {
			t.Fatalf("-%d / %d = %v, want %v", num, den, got, -want)
		}
	}
	const limit = 1 << 53
	for _, num := range []uint64{1, 2, 3, 11, 45359237, limit/3 + 7, limit - 1, limit, limit + 1, limit + 2, limit + 3, 1<<54 + 2, 1<<54 + 6, 1<<63 + 1<<10, 1<<63 + 1<<10 + 1, 1<<63 + 1<<10 - 1, 1<<63 - 1, 1 << 63, math.MaxUint64} {
		for _, den := range []uint64{1, 2, 3, 7, 10, limit, limit + 1, limit + 3, 3*limit + 1, 5*limit + 7, 1e18, 1<<63 - 1, 1 << 63, math.MaxUint64} {
			check(t, num, den)
		}
	}
	rapid.Check(t, func(t *rapid.T) {
		num := rapid.Uint64Min(1).Draw(t, "num")
		den := rapid.Uint64Min(1).Draw(t, "den")
		check(t, num, den)
		// Half way between two float64, times an odd number above and below.
		odd := rapid.Uint64Range(1, 511).Draw(t, "odd") | 1
		half := (limit | rapid.Uint64Range(0, limit-1).Draw(t, "half")) | 1
		check(t, half*odd*2+odd, odd*2)
		check(t, half*odd*2+odd+1, odd*2)
		check(t, half*odd*2+odd-1, odd*2)
	})
}

func TestExactLimits(t *testing.T) {
	if _, ok := product(math.MinInt64, 1); ok {
		t.Error("the product keeps the one number whose negative does not fit")
	}
	for _, c := range []struct {
		a, b int64
		fits bool
	}{
		{math.MaxInt64, 0, true}, {math.MaxInt64, 1, false}, {math.MinInt64, 0, true}, {math.MinInt64, -1, false}, {math.MinInt64, math.MaxInt64, true}, {-1, 1, true},
	} {
		if sum, ok := total(c.a, c.b); ok != c.fits {
			t.Errorf("total(%d, %d) = %d, %v", c.a, c.b, sum, ok)
		}
	}
	if x := (exact{num: math.MinInt64, den: 1}).minus(); x.rat().Cmp(new(big.Rat).SetFloat64(1<<63)) != 0 {
		t.Errorf("the negative of -2^63 is %v", x.rat())
	}
}

// A float64 is the fraction that math/big makes of it, of any size.
func TestExactOfFloat(t *testing.T) {
	check := func(t interface{ Fatalf(string, ...any) }, f float64) {
		want := new(big.Rat).SetFloat64(f)
		switch got := exactOf(f); {
		case want == nil && got.known():
			t.Fatalf("%v is %v", f, got.rat())
		case want != nil && (got.rat().Cmp(want) != 0 || got.wide == nil && got.den <= 0 || got.float() != f):
			t.Fatalf("%v is %v, want %v", f, got.rat(), want)
		}
	}
	for _, f := range []float64{0, math.Copysign(0, -1), 1, -1, 1 << 52, 1 << 53, 1<<53 + 2, 1 << 62, 1 << 63, math.MaxFloat64,
		math.SmallestNonzeroFloat64, 0x1p-62, 0x1p-63, 0x1.8p-62, 0x1.8p-61, math.NaN(), math.Inf(1), math.Inf(-1)} {
		check(t, f)
		check(t, -f)
	}
	rapid.Check(t, func(t *rapid.T) {
		check(t, rapid.Float64().Draw(t, "f"))
		check(t, rapid.Float64Range(-1e4, 1e4).Draw(t, "near"))
	})
}
