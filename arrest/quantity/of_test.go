package quantity

import (
	"math"
	"math/big"
	"testing"

	"pgregory.net/rapid"
)

func TestOf(t *testing.T) {
	for _, c := range []struct {
		dimension Dimension
		si        float64
		text      string
	}{
		{Mass, 140.6136347, "140.6136347 kg"},
		{Length, 0.1, "0.1 m"},
		{Length, 0, "0 m"},
		{Length, math.Copysign(0, -1), "0 m"},
		{Speed, -9.5, "-9.5 m/s"},
		{Force, 1e6, "1000000 N"},
		{Angle, 0.5, "0.5 rad"},
		{Ratio, 0.25, "25 %"},
		{Ratio, 1.5, "150 %"},
		{Ratio, 0.07, "7 %"},
		{Mass, math.NaN(), "not known"},
		{Mass, math.Inf(1), "no upper end"},
		{Mass, math.Inf(-1), "no lower end"},
	} {
		b := Of(c.dimension, c.si)
		if b.Text != c.text || b.Tolerance != Untold || b.Unit.Dimension != c.dimension {
			t.Errorf("Of(%v, %v) = %+v, want the text %q", c.dimension, c.si, b, c.text)
		}
		if !same(b.Low, c.si) || !same(b.Value, c.si) || !same(b.High, c.si) {
			t.Errorf("Of(%v, %v) = %v, %v, %v", c.dimension, c.si, b.Low, b.Value, b.High)
		}
	}
}

func TestOfIsReadBack(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		d := Dimension(rapid.IntRange(int(Mass), int(Ratio)).Draw(t, "dimension"))
		si := rapid.Float64Range(-1e15, 1e15).Draw(t, "si")
		b := Of(d, si)
		if len(b.Text) > longest {
			t.Skip("a figure too small to be typed in digits")
		}
		if read := must(t, d, b.Text); read.Value != si || read.Low != si || read.Unit != b.Unit {
			t.Fatalf("%v is written %q and read as %v", si, b.Text, read.Value)
		}
	})
}

// A figure that was worked out adds as the decimal it shows.
func TestSumOfWorkedOut(t *testing.T) {
	if sum := Sum(Of(Mass, 0.1), Of(Mass, 0.2)); sum.Value != 0.3 {
		t.Errorf("%s = %v", sum.Text, sum.Value)
	}
	if sum := Sum(Of(Mass, math.NaN()), Of(Mass, 0.2)); !math.IsNaN(sum.Value) {
		t.Errorf("%s = %v", sum.Text, sum.Value)
	}
}

// The exact figure is the decimal of the text, as math/big reads it.
func TestExactOfShortestDecimal(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		for _, x := range []float64{rapid.Float64().Draw(t, "x"), rapid.Float64Range(-1e4, 1e4).Draw(t, "near"), float64(rapid.Int32().Draw(t, "whole"))} {
			want, ok := new(big.Rat).SetString(shortest(x, 0))
			if !ok {
				t.Fatalf("%v is written %q", x, shortest(x, 0))
			}
			if got := shortestExact(x); got.rat().Cmp(want) != 0 || got.float() != x || got.wide == nil && got.den <= 0 {
				t.Fatalf("%v is %v, want %v", x, got.rat(), want)
			}
		}
	})
}
