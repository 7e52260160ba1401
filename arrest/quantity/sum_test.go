package quantity

import (
	"math"
	"math/big"
	"testing"

	"pgregory.net/rapid"
)

// must parses text.
func must(t interface{ Fatalf(string, ...any) }, d Dimension, text string) Band {
	b, err := Parse(d, text)
	if err != nil {
		t.Fatalf("%v", err)
	}
	return b
}

func TestSum(t *testing.T) {
	none := math.NaN()
	for _, c := range []struct {
		a, b             string
		low, value, high float64
		tolerance        Tolerance
		unit, text       string
	}{
		{"300 lb", "10 lb", 140.6136347, 140.6136347, 140.6136347, Untold, "lb", "300 lb + 10 lb"},
		{"0.1 kg", "0.2 kg", 0.3, 0.3, 0.3, Untold, "kg", "0.1 kg + 0.2 kg"},
		{"92 kg ± 1 kg", "5 kg", 96, 97, 98, PlusMinus, "kg", "(92 kg ± 1 kg) + 5 kg"},
		{"92 kg ± 1 kg", "0 kg .. 10 kg", 91, none, 103, Range, "kg", "(92 kg ± 1 kg) + (0 kg .. 10 kg)"},
		{"0 kg .. 10 kg", "92 kg", 92, none, 102, Range, "kg", "(0 kg .. 10 kg) + 92 kg"},
		{"92 kg", "10 lb", 96.5359237, 96.5359237, 96.5359237, Untold, "", "92 kg + 10 lb"},
	} {
		sum := Sum(must(t, Mass, c.a), must(t, Mass, c.b))
		if sum.Low != c.low || !same(sum.Value, c.value) || sum.High != c.high {
			t.Errorf("%s + %s = %v, %v, %v, want %v, %v, %v", c.a, c.b, sum.Low, sum.Value, sum.High, c.low, c.value, c.high)
		}
		if sum.Tolerance != c.tolerance || sum.Unit.Symbol != c.unit || sum.Text != c.text {
			t.Errorf("%s + %s: tolerance %d, unit %q, text %q", c.a, c.b, sum.Tolerance, sum.Unit.Symbol, sum.Text)
		}
	}
}

// 300 lb and 10 lb are 310 lb to the last bit, though the rounded figures do
// not always add up to it.
func TestSumIsExact(t *testing.T) {
	if got, want := Sum(must(t, Mass, "300 lb"), must(t, Mass, "10 lb")).Value, must(t, Mass, "310 lb").Value; got != want {
		t.Errorf("300 lb + 10 lb = %v, 310 lb = %v", got, want)
	}
	apart := 0
	rapid.Check(t, func(t *rapid.T) {
		u := rapid.SampledFrom(Units()).Draw(t, "unit")
		digits := rapid.StringMatching(`[0-9]{1,14}`)
		a, b := digits.Draw(t, "a"), digits.Draw(t, "b")
		after := rapid.IntRange(0, 8).Draw(t, "after")
		x, _ := new(big.Int).SetString(a, 10)
		y, _ := new(big.Int).SetString(b, 10)
		first := must(t, u.Dimension, decimalText(a, after)+" "+u.Symbol)
		second := must(t, u.Dimension, decimalText(b, after)+" "+u.Symbol)
		want := must(t, u.Dimension, decimalText(x.Add(x, y).String(), after)+" "+u.Symbol)
		got := Sum(first, second)
		if got.Low != want.Low || got.Value != want.Value || got.High != want.High || got.Unit != u {
			t.Fatalf("%s = %v, %s = %v", got.Text, got.Value, want.Text, want.Value)
		}
		if first.Value+second.Value != want.Value {
			apart++
		}
	})
	if apart == 0 {
		t.Error("no draw in which the rounded figures add up to something else: the test shows nothing")
	}
}

// Bands of any form add end by end, in any order.
func TestSumOfBands(t *testing.T) {
	band := rapid.Custom(func(t *rapid.T) Band {
		u := rapid.SampledFrom(table[Mass]).Draw(t, "unit").unit.Symbol
		text := rapid.StringMatching(`[0-9]{1,5}\.[0-9]{1,6}`).Draw(t, "figure") + " " + u
		switch rapid.IntRange(0, 2).Draw(t, "form") {
		case 1:
			text += " ± " + rapid.StringMatching(`[0-9]{1,2}\.[0-9]{1,3}`).Draw(t, "share") + " %"
		case 2:
			text += " .. 9" + rapid.StringMatching(`[0-9]{9}`).Draw(t, "end") + " " + u
		}
		return must(t, Mass, text)
	})
	rapid.Check(t, func(t *rapid.T) {
		a, b, c := band.Draw(t, "a"), band.Draw(t, "b"), band.Draw(t, "c")
		one, other := Sum(Sum(a, b), c), Sum(b, Sum(c, a))
		inOrder(t, one)
		if one.Low != other.Low || !same(one.Value, other.Value) || one.High != other.High || one.Tolerance != other.Tolerance {
			t.Fatalf("%+v is not %+v", one, other)
		}
		want, _ := new(big.Rat).Add(new(big.Rat).Add(a.low.rat(), b.low.rat()), c.low.rat()).Float64()
		if one.Low != want {
			t.Fatalf("%s from %v, want %v", one.Text, one.Low, want)
		}
	})
}

// A Band counts with the figures it shows, wherever they come from.
func TestSumOfOtherBands(t *testing.T) {
	kg, _ := LookUp("kg")
	byHand := Band{Low: 1, Value: 2, High: 3, Tolerance: PlusMinus, Unit: kg, Text: "by hand"}
	changed := must(t, Mass, "10 kg")
	changed.Low, changed.High, changed.Tolerance = 9.5, 10.5, PlusMinus
	if sum := Sum(byHand, changed); sum.Low != 10.5 || sum.Value != 12 || sum.High != 13.5 {
		t.Errorf("sum of changed bands: %+v", sum)
	}
	open := Band{Low: 1, Value: math.NaN(), High: math.Inf(1), Tolerance: Range, Unit: kg, Text: "open"}
	if sum := Sum(open, changed); sum.Low != 10.5 || !math.IsNaN(sum.Value) || !math.IsInf(sum.High, 1) {
		t.Errorf("sum with an open end: %+v", sum)
	}
	if sum := Sum(changed, open); sum.Low != 10.5 || !math.IsNaN(sum.Value) || !math.IsInf(sum.High, 1) {
		t.Errorf("sum with an open end: %+v", sum)
	}
	tenth := Band{Low: 0.1, Value: 0.1, High: 0.1, Unit: kg, Text: "by hand"}
	if sum := Sum(tenth, must(t, Mass, "0.2 kg")); sum.Value != 0.3 {
		t.Errorf("float64(0.1) + 2/10 = %v, want it rounded once", sum.Value)
	}
}

func TestSumText(t *testing.T) {
	a, b, c := must(t, Mass, "92 kg ± 1 kg"), must(t, Mass, "5 kg"), must(t, Mass, "0 .. 2 kg")
	if got, want := Sum(Sum(a, b), c).Text, "(92 kg ± 1 kg) + 5 kg + (0 .. 2 kg)"; got != want {
		t.Errorf("text %q, want %q", got, want)
	}
}

func TestSumOfKindsPanics(t *testing.T) {
	panics(t, "a mass and a force", func() { Sum(must(t, Mass, "1 kg"), must(t, Force, "1 N")) })
}

func BenchmarkSum(b *testing.B) {
	x, y := must(b, Mass, "300 lb ± 2 lb"), must(b, Mass, "10 lb")
	b.ReportAllocs()
	for b.Loop() {
		Sum(x, y)
	}
}
