package quantity

import (
	"math"
	"math/big"
	"strconv"
	"strings"
	"testing"

	"pgregory.net/rapid"
)

func TestFormat(t *testing.T) {
	for _, c := range []struct {
		si     float64
		unit   string
		digits int
		r      Rounding
		want   string
	}{
		{8006.7989074689, "kN", 3, Nearest, "8.01 kN"},
		{8006.7989074689, "kN", 3, Down, "8.00 kN"},
		{8006.7989074689, "kN", 3, Up, "8.01 kN"},
		{8006.7989074689, "lbf", 3, Down, "1800 lbf"}, // 1800 from the snap, not 1790
		{8006.7989074689, "lbf", 5, Up, "1800.0 lbf"},
		{8006.7989074689, "N", 14, Nearest, "8006.79890747 N"},
		{8006.7989074689, "N", 1, Nearest, "8000 N"},
		{8006.7989074689, "N", 0, Up, "9000 N"},
		{8006.7989074689, "N", -5, Nearest, "8000 N"},
		{8000, "kN", 3, Nearest, "8.00 kN"},
		{8000, "kN", 3, Down, "8.00 kN"},
		{8000, "kN", 3, Up, "8.00 kN"},
		{9999, "kN", 3, Nearest, "10.0 kN"},
		{9999, "kN", 3, Down, "9.99 kN"},
		{9991, "kN", 3, Up, "10.0 kN"},
		{-9991, "kN", 3, Down, "-10.0 kN"},
		{-9999, "kN", 3, Up, "-9.99 kN"},
		{-9994, "kN", 3, Nearest, "-9.99 kN"},
		{123456, "N", 3, Nearest, "123000 N"},
		{123456, "N", 3, Up, "124000 N"},
		{1e9, "kN", 3, Nearest, "1000000 kN"},
		{0.000123456, "m", 3, Nearest, "0.000123 m"},
		{0.05, "mm", 3, Nearest, "50.0 mm"},
		{0.3048, "in", 3, Nearest, "12.0 in"},
		{0, "kN", 3, Nearest, "0 kN"},
		{math.Copysign(0, -1), "kN", 3, Down, "0 kN"},
		{2.675, "m", 3, Nearest, "2.68 m"}, // the tie as written, though the float64 is below it
		{-2.675, "m", 3, Nearest, "-2.68 m"},
		{0.1 + 0.2, "m", 12, Up, "0.300000000000 m"},
		{2.6000000000000005, "m", 2, Up, "2.6 m"},
		{2.5999999999999996, "m", 2, Down, "2.6 m"},
		{2.59999999999949, "m", 2, Down, "2.6 m"}, // snapped to 2.60000000000 first
		{0.25, "%", 3, Nearest, "25.0 %"},
		{1.0483, "1", 3, Up, "1.05"},
		{math.Pi / 6, "deg", 3, Nearest, "30.0 deg"},
		{math.NaN(), "kN", 3, Nearest, "not known"},
		{math.Inf(1), "kN", 3, Nearest, "no upper end"},
		{math.Inf(-1), "kN", 3, Nearest, "no lower end"},
	} {
		u, _ := LookUp(c.unit)
		if got := Format(c.si, u, c.digits, c.r); got != c.want {
			t.Errorf("Format(%v, %s, %d, %d) = %q, want %q", c.si, c.unit, c.digits, c.r, got, c.want)
		}
		want := strings.TrimSuffix(c.want, " "+c.unit)
		if got := Number(c.si, u, c.digits, c.r); got != want {
			t.Errorf("Number(%v, %s, %d, %d) = %q, want %q", c.si, c.unit, c.digits, c.r, got, want)
		}
	}
}

// anyFloat draws a float64 of any size or near a short decimal.
func anyFloat(t *rapid.T) float64 {
	if rapid.Bool().Draw(t, "short") {
		x := float64(rapid.IntRange(-99999, 99999).Draw(t, "digits")) / math.Pow(10, float64(rapid.IntRange(0, 6).Draw(t, "after")))
		for range rapid.IntRange(0, 3).Draw(t, "steps") {
			x = math.Nextafter(x, math.Inf(1))
		}
		return x
	}
	return rapid.Float64().Draw(t, "x")
}

// What is printed is the snapped figure rounded the way that was asked for,
// with as many digits, in plain notation; checked in rational numbers.
func TestRoundingDirections(t *testing.T) {
	one := Ratio.SI()
	rapid.Check(t, func(t *rapid.T) {
		x, digits := anyFloat(t), rapid.IntRange(1, 12).Draw(t, "digits")
		snapped := ratOf(t, strconv.FormatFloat(x, 'e', 11, 64))
		down, up := ratOf(t, Number(x, one, digits, Down)), ratOf(t, Number(x, one, digits, Up))
		if down.Cmp(snapped) > 0 || up.Cmp(snapped) < 0 {
			t.Fatalf("%v: down to %v, up to %v", x, down.FloatString(20), up.FloatString(20))
		}
		nearest := ratOf(t, Number(x, one, digits, Nearest))
		below, above := new(big.Rat).Sub(snapped, down), new(big.Rat).Sub(up, snapped)
		want := down
		if above.Cmp(below) < 0 || above.Cmp(below) == 0 && snapped.Sign() > 0 {
			want = up
		}
		if nearest.Cmp(want) != 0 {
			t.Fatalf("%v: down to %v, up to %v, nearest %v", x, down.FloatString(20), up.FloatString(20), nearest.FloatString(20))
		}
		if x != 0 {
			step := stepAt(snapped, digits)
			if below.Cmp(step) >= 0 || above.Cmp(step) >= 0 {
				t.Fatalf("%v: down to %v, up to %v", x, down.FloatString(20), up.FloatString(20))
			}
			if width := new(big.Rat).Sub(up, down); width.Sign() != 0 && width.Cmp(step) != 0 {
				t.Fatalf("%v: %v apart, want %v", x, width, step)
			}
		}
	})
}

// ratOf reads a printed number.
func ratOf(t *rapid.T, text string) *big.Rat {
	r, ok := new(big.Rat).SetString(text)
	if !ok {
		t.Fatalf("%q is no number", text)
	}
	return r
}

// stepAt returns one unit of the last of the digits of x.
func stepAt(x *big.Rat, digits int) *big.Rat {
	ten := big.NewRat(10, 1)
	step, size := big.NewRat(1, 1), new(big.Rat).Abs(x)
	for size.Cmp(ten) >= 0 {
		size.Quo(size, ten)
		step.Mul(step, ten)
	}
	for size.Cmp(big.NewRat(1, 1)) < 0 {
		size.Mul(size, ten)
		step.Quo(step, ten)
	}
	for range digits - 1 {
		step.Quo(step, ten)
	}
	return step
}

// Numbers are in plain notation, have the digits asked for, and no figure is
// ever -0.
func TestNotation(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		x, digits := anyFloat(t), rapid.IntRange(1, 12).Draw(t, "digits")
		r := rapid.SampledFrom([]Rounding{Nearest, Down, Up}).Draw(t, "rounding")
		text := Number(x, Ratio.SI(), digits, r)
		if strings.Trim(text, "-.0123456789") != "" || strings.Count(text, ".") > 1 || strings.LastIndex(text, "-") > 0 {
			t.Fatalf("%v is printed as %q", x, text)
		}
		plain := strings.TrimPrefix(text, "-")
		if plain == "0" {
			if text != "0" || x != 0 {
				t.Fatalf("%v is printed as %q", x, text)
			}
			return
		}
		significant := len(strings.TrimLeft(strings.Replace(plain, ".", "", 1), "0"))
		if point := strings.Contains(plain, "."); point && significant != digits || !point && significant < digits {
			t.Fatalf("%v with %d digits is printed as %q", x, digits, text)
		}
	})
}

func TestSnap(t *testing.T) {
	for _, c := range []struct{ x, want float64 }{
		{0.1 + 0.2, 0.3},
		{8006.7989074689, 8006.79890747},
		{-1e-9, -1e-9},
		{1234567890123, 1234567890120},
		{123456789012.5, 123456789012}, // exactly half way: to even, as strconv does
		{0, 0},
		{math.MaxFloat64, 1.79769313486e308},
		{math.SmallestNonzeroFloat64, math.SmallestNonzeroFloat64},
		{math.Inf(1), math.Inf(1)},
		{math.Inf(-1), math.Inf(-1)},
		{math.NaN(), math.NaN()},
	} {
		if got := Snap(c.x); !same(got, c.want) {
			t.Errorf("Snap(%v) = %v, want %v", c.x, got, c.want)
		}
	}
	if math.Signbit(Snap(math.Copysign(0, -1))) {
		t.Error("Snap gives -0")
	}
	rapid.Check(t, func(t *rapid.T) {
		x := anyFloat(t)
		once := Snap(x)
		if Snap(once) != once || x != 0 && math.Abs(x) > 1e-300 && !Close(once, x, 5.1e-12) {
			t.Fatalf("Snap(%v) = %v, then %v", x, once, Snap(once))
		}
	})
}

func BenchmarkFormat(b *testing.B) {
	kN, _ := LookUp("kN")
	b.ReportAllocs()
	for b.Loop() {
		Format(8006.7989074689, kN, 3, Down)
	}
}

func BenchmarkSnap(b *testing.B) {
	b.ReportAllocs()
	for b.Loop() {
		Snap(8006.7989074689)
	}
}
