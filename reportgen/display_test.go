package reportgen

import (
	"math"
	"strconv"
	"strings"
	"testing"

	"arrestcheck/arrest"
	"arrestcheck/arrest/quantity"

	"pgregory.net/rapid"
)

// Every dimension has units to be shown in, and each is a unit of it.
func TestShownIn(t *testing.T) {
	for d := quantity.Mass; d <= quantity.Ratio; d++ {
		for _, system := range []quantity.System{quantity.Metric, quantity.Customary} {
			for _, size := range []float64{1e-3, 1e6} {
				if u := unit(d, system, size); u.Dimension != d {
					t.Errorf("%v is shown in %s", d, u.Symbol)
				}
			}
		}
	}
}

// 8.006798... kN is 1800 lbf: the pound-force is 4.4482216152605 N, exact (NIST
// SP 811, B.8); a foot is 0.3048 m, exact (same).
func TestFigure(t *testing.T) {
	n := func(s string) string { return strings.ReplaceAll(s, " ", noBreak) }
	const lbf = 4.4482216152605
	for _, c := range []struct {
		d    quantity.Dimension
		as   string // typed unit
		si   float64
		r    quantity.Rounding
		si3  string // --units si
		us3  string // --units us
		both string
	}{
		{quantity.Force, "", 1800 * lbf, quantity.Nearest, "8.01 kN", "1800 lbf", "8.01 kN (1800 lbf)"},
		{quantity.Force, "", 1800 * lbf, quantity.Down, "8.00 kN", "1800 lbf", "8.00 kN (1800 lbf)"},
		{quantity.Force, "lbf", 1800 * lbf, quantity.Up, "8.01 kN", "1800 lbf", "1800 lbf (8.01 kN)"},
		{quantity.Force, "N", 3419.9, quantity.Down, "3410 N", "768 lbf", "3410 N (768 lbf)"},
		{quantity.Force, "", 892.4, quantity.Nearest, "892 N", "201 lbf", "892 N (201 lbf)"},
		{quantity.Length, "in", 48 * 0.0254, quantity.Nearest, "1.22 m", "48.0 in", "48.0 in (1.22 m)"},
		{quantity.Length, "", 6 * 0.3048, quantity.Nearest, "1.83 m", "6.00 ft", "1.83 m (6.00 ft)"},
		{quantity.Time, "", 0.3, quantity.Nearest, "0.300 s", "0.300 s", "0.300 s"},
		{quantity.Time, "ms", 0.3, quantity.Nearest, "300 ms", "300 ms", "300 ms"},
		{quantity.Ratio, "", 0.83295026, quantity.Nearest, "0.833", "0.833", "0.833"},
		{quantity.Mass, "", 0, quantity.Nearest, "0 kg", "0 lb", "0 kg"},
		{quantity.Force, "", math.Inf(1), quantity.Down, "no upper end", "no upper end", "no upper end"},
	} {
		var typed quantity.Unit
		if c.as != "" {
			typed = mustUnit(c.as)
		}
		for units, want := range map[UnitChoice]string{SIUnits: c.si3, USUnits: c.us3, BothUnits: c.both} {
			got := display{units, quantity.Metric}.figureAs(c.d, typed, c.si, pageDigits, c.r)
			if got = strings.ReplaceAll(got, " (", "_"); got != strings.ReplaceAll(n(want), noBreak+"(", "_") {
				t.Errorf("%g as %q, choice %d: %q, want %q", c.si, c.as, units, got, want)
			}
		}
	}
}

// The system of most inputs comes first; a draw is metric.
func TestMajority(t *testing.T) {
	in := func(symbols ...string) (list []arrest.Input) {
		for _, s := range symbols {
			list = append(list, arrest.Input{Band: quantity.Band{Unit: mustUnit(s)}})
		}
		return list
	}
	for _, c := range []struct {
		inputs []arrest.Input
		want   quantity.System
	}{
		{in("lb", "ft", "m/s2", "s"), quantity.Customary},
		{in("lb", "m", "s"), quantity.Metric},
		{in("s"), quantity.Metric},
	} {
		if got := newDisplay(BothUnits, c.inputs).system; got != c.want {
			t.Errorf("%d inputs: system %d, want %d", len(c.inputs), got, c.want)
		}
	}
}

// Floors are never printed above their value and ceilings never below, in any
// unit and to any number of digits. The printed text is read back.
func TestRoundingNeverFlatters(t *testing.T) {
	units := quantity.Units()
	rapid.Check(t, func(t *rapid.T) {
		u := rapid.SampledFrom(units).Draw(t, "unit")
		si := rapid.Float64Range(1e-6, 1e9).Draw(t, "si")
		digits := rapid.IntRange(1, 12).Draw(t, "digits")
		value := quantity.Snap(u.From(si))
		down, up := readBack(t, format(si, u, digits, quantity.Down)), readBack(t, format(si, u, digits, quantity.Up))
		if down > value || up < value {
			t.Fatalf("%g %s lies not between %g and %g", value, u.Symbol, down, up)
		}
	})
}

func readBack(t *rapid.T, s string) float64 {
	x, err := strconv.ParseFloat(strings.Split(s, noBreak)[0], 64)
	if err != nil {
		t.Fatal(err)
	}
	return x
}

// A demand and a limit never print alike unless they are alike, and the
// printed ones stand in the order of the true ones.
func TestDigitsBeside(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		u := rapid.SampledFrom(quantity.Units()).Draw(t, "unit")
		limit := rapid.Float64Range(1e-3, 1e6).Draw(t, "limit")
		demand := limit * (1 + rapid.SampledFrom([]float64{0, 1, -1}).Draw(t, "side")*math.Pow(10, -rapid.Float64Range(0, 10).Draw(t, "gap")))
		r := rapid.SampledFrom([]quantity.Rounding{quantity.Down, quantity.Up, quantity.Nearest}).Draw(t, "rounding")
		digits := digitsBeside(demand, limit, u, r, pageDigits)
		d := number(quantity.Number(demand, u, digits, r))
		l := number(quantity.Number(limit, u, digits, quantity.Nearest))
		if got, want := side(d, l), side(quantity.Snap(u.From(demand)), quantity.Snap(u.From(limit))); got != want {
			t.Fatalf("%g beside %g %s: printed %g and %g with %d digits", demand, limit, u.Symbol, d, l, digits)
		}
		if digits > pageDigits {
			d, l := number(quantity.Number(demand, u, digits-1, r)), number(quantity.Number(limit, u, digits-1, quantity.Nearest))
			if side(d, l) == side(demand, limit) && demand != limit {
				t.Fatalf("%d digits were enough", digits-1)
			}
		}
	})
}
