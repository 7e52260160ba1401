package quantity

import (
	"fmt"
	"math"
	"math/big"
	"math/rand/v2"
	"strings"
	"testing"

	"pgregory.net/rapid"
)

func TestParse(t *testing.T) {
	none := math.NaN()
	for _, c := range []struct {
		dimension        Dimension
		text             string
		low, value, high float64
		tolerance        Tolerance
		unit             string
	}{
		{Mass, "100 kg", 100, 100, 100, Untold, "kg"},
		{Mass, "100kg", 100, 100, 100, Untold, "kg"},
		{Mass, "  100   kg  ", 100, 100, 100, Untold, "kg"},
		{Mass, "0100.50 kg", 100.5, 100.5, 100.5, Untold, "kg"},
		{Mass, "0 kg", 0, 0, 0, Untold, "kg"},
		{Mass, "-0 kg ± 0", 0, 0, 0, PlusMinus, "kg"},
		{Mass, "250 g", 0.25, 0.25, 0.25, Untold, "g"},
		{Mass, "0.1 t", 100, 100, 100, Untold, "t"},
		{Mass, "310 lb", 140.6136347, 140.6136347, 140.6136347, Untold, "lb"},
		{Mass, "100 kg ± 5 kg", 95, 100, 105, PlusMinus, "kg"},
		{Mass, "100kg±5kg", 95, 100, 105, PlusMinus, "kg"},
		{Mass, "100 kg +/- 5 kg", 95, 100, 105, PlusMinus, "kg"},
		{Mass, "100 kg+/-5 %", 95, 100, 105, PlusMinus, "kg"},
		{Mass, "92.5 kg ± 0.1 %", 92.4075, 92.5, 92.5925, PlusMinus, "kg"},
		{Mass, "100 kg ± 0 kg", 100, 100, 100, PlusMinus, "kg"},
		{Mass, "100 kg ± 0", 100, 100, 100, PlusMinus, "kg"},
		{Mass, "100 kg ± 0.0", 100, 100, 100, PlusMinus, "kg"},
		{Mass, "100 kg ± 0 %", 100, 100, 100, PlusMinus, "kg"},
		{Mass, "100 kg ± 10 lb", 95.4640763, 100, 104.5359237, PlusMinus, "kg"},
		{Mass, "1 kg ± 5 kg", -4, 1, 6, PlusMinus, "kg"},
		{Mass, "86 kg .. 104 kg", 86, none, 104, Range, "kg"},
		{Mass, "86 .. 104 kg", 86, none, 104, Range, "kg"},
		{Mass, "86..104kg", 86, none, 104, Range, "kg"},
		{Mass, "86.5..104.5 kg", 86.5, none, 104.5, Range, "kg"},
		{Mass, "86 kg .. 86 kg", 86, none, 86, Range, "kg"},
		{Mass, "59 kg .. 310 lb", 59, none, 140.6136347, Range, "kg"},
		{Mass, "0 .. 0 kg", 0, none, 0, Range, "kg"},
		{Length, "6 ft", 1.8288, 1.8288, 1.8288, Untold, "ft"},
		{Length, "6 ft 4 in", 1.9304, 1.9304, 1.9304, Untold, "ft"},
		{Length, "6 ft 4 1/2 in", 1.9431, 1.9431, 1.9431, Untold, "ft"},
		{Length, "6ft 4.5in", 1.9431, 1.9431, 1.9431, Untold, "ft"},
		{Length, "6 ft 0 in", 1.8288, 1.8288, 1.8288, Untold, "ft"},
		{Length, "6 ft 11 127/128 in", 2.1334015625, 2.1334015625, 2.1334015625, Untold, "ft"},
		{Length, "4 1/2 in", 0.1143, 0.1143, 0.1143, Untold, "in"},
		{Length, "1/2 in", 0.0127, 0.0127, 0.0127, Untold, "in"},
		{Length, "1/128 in", 0.0001984375, 0.0001984375, 0.0001984375, Untold, "in"},
		{Length, "6 ft 11.999 in", 2.1335746, 2.1335746, 2.1335746, Untold, "ft"},
		{Length, "1/3 ft", 0.1016, 0.1016, 0.1016, Untold, "ft"},
		{Length, "6 1/2 ft", 1.9812, 1.9812, 1.9812, Untold, "ft"},
		{Length, "-6 ft 4 in", -1.9304, -1.9304, -1.9304, Untold, "ft"},
		{Length, "6 ft ± 1 in", 1.8034, 1.8288, 1.8542, PlusMinus, "ft"},
		{Length, "6 ft 4 1/2 in ± 1/4 in", 1.93675, 1.9431, 1.94945, PlusMinus, "ft"},
		{Length, "6 ft 4 in ± 10 %", 1.73736, 1.9304, 2.12344, PlusMinus, "ft"},
		{Length, "6 ft 4 in .. 6 ft 6 in", 1.9304, none, 1.9812, Range, "ft"},
		{Length, "5 .. 6 1/2 ft", 1.524, none, 1.9812, Range, "ft"},
		{Length, "0.95 m .. 1.10 m", 0.95, none, 1.1, Range, "m"},
		{Time, "0.34 s ± 10 %", 0.306, 0.34, 0.374, PlusMinus, "s"},
		{Time, "340 ms", 0.34, 0.34, 0.34, Untold, "ms"},
		{Force, "1800 lbf", 8006.7989074689, 8006.7989074689, 8006.7989074689, Untold, "lbf"},
		{Force, "5 kip", 22241.1080763025, 22241.1080763025, 22241.1080763025, Untold, "kip"},
		{Force, "6 kN .. 8 kN", 6000, none, 8000, Range, "kN"},
		{Speed, "-9 m/s", -9, -9, -9, Untold, "m/s"},
		{Speed, "- 9 m/s", -9, -9, -9, Untold, "m/s"},
		{Speed, "+9 m/s", 9, 9, 9, Untold, "m/s"},
		{Speed, "-9 m/s ± 10 %", -9.9, -9, -8.1, PlusMinus, "m/s"},
		{Speed, "-9 m/s .. -8 m/s", -9, none, -8, Range, "m/s"},
		{Speed, "36 km/h", 10, 10, 10, Untold, "km/h"},
		{Acceleration, "9.80 m/s2", 9.8, 9.8, 9.8, Untold, "m/s2"},
		{Angle, "1.5 rad", 1.5, 1.5, 1.5, Untold, "rad"},
		{Energy, "1 ft*lbf", 1.3558179483314004, 1.3558179483314004, 1.3558179483314004, Untold, "ft*lbf"},
		{Stiffness, "20 kN/m", 20000, 20000, 20000, Untold, "kN/m"},
		{Ratio, "25 %", 0.25, 0.25, 0.25, Untold, "%"},
		{Ratio, "25 % ± 0 %", 0.25, 0.25, 0.25, PlusMinus, "%"},
		{Ratio, "20 .. 30 %", 0.2, none, 0.3, Range, "%"},
	} {
		b, err := Parse(c.dimension, c.text)
		if err != nil {
			t.Errorf("Parse(%v, %q): %v; write %s", c.dimension, c.text, err, err.(*Error).Example)
			continue
		}
		if b.Low != c.low || !same(b.Value, c.value) || b.High != c.high {
			t.Errorf("Parse(%v, %q) = %v, %v, %v, want %v, %v, %v", c.dimension, c.text, b.Low, b.Value, b.High, c.low, c.value, c.high)
		}
		if b.Tolerance != c.tolerance || b.Unit.Symbol != c.unit || b.Unit.Dimension != c.dimension || b.Text != c.text {
			t.Errorf("Parse(%v, %q): tolerance %d, unit %+v, text %q", c.dimension, c.text, b.Tolerance, b.Unit, b.Text)
		}
		if b.Low == 0 && math.Signbit(b.Low) {
			t.Errorf("Parse(%v, %q) gives -0", c.dimension, c.text)
		}
	}
}

// A text of 120 bytes is read, one of 121 is not, whatever it says.
func TestLongestText(t *testing.T) {
	text := "100 kg" + strings.Repeat(" ", longest-len("100 kg"))
	if b, err := Parse(Mass, text); err != nil || b.Value != 100 {
		t.Errorf("%d bytes: %v, %v", len(text), b.Value, err)
	}
	if b, err := Parse(Mass, text+" "); err == nil {
		t.Errorf("%d bytes: %v", len(text)+1, b.Value)
	}
	tiny := "0." + strings.Repeat("0", longest-len("0.5 g ± 1 %")) + "5 g ± 1 %"
	huge := strings.Repeat("9", longest-len(" kip ± 99 %")) + " kip ± 99 %"
	for _, b := range []Band{must(t, Mass, tiny[:2]+tiny[4:]), must(t, Force, huge)} {
		inOrder(t, b)
		if !(0 < b.Low && b.Low < b.Value && b.Value < b.High) {
			t.Errorf("%q: %v, %v, %v", b.Text, b.Low, b.Value, b.High)
		}
	}
}

// same reports whether a and b are equal, NaN included.
func same(a, b float64) bool { return a == b || math.IsNaN(a) && math.IsNaN(b) }

// A job in customary units is the same job: figures converted with 12 digits
// and more come out alike to 12 digits.
func TestCustomaryIsMetric(t *testing.T) {
	for _, c := range []struct {
		dimension         Dimension
		metric, customary string
	}{
		{Mass, "100 kg", "220.462262184878 lb"},
		{Length, "1.8 m", "5.90551181102362 ft"},
		{Length, "1.8 m", "70.8661417322835 in"},
		{Length, "1.9431 m", "6 ft 4 1/2 in"},
		{Force, "6 kN", "1348.85365859826 lbf"},
		{Force, "22.2411080763025 kN", "5 kip"},
		{Speed, "5 m/s", "11.1846814602720 mph"},
		{Speed, "5 m/s", "16.4041994750656 ft/s"},
		{Stiffness, "10 kN/m", "685.217658567918 lbf/ft"},
		{Stiffness, "10 kN/m", "57.1014715473265 lbf/in"},
		{Energy, "1.5 kJ", "1106.34322391590 ft*lbf"},
		{Impulse, "500 N*s", "112.404471549855 lbf*s"},
	} {
		metric, err := Parse(c.dimension, c.metric)
		customary, other := Parse(c.dimension, c.customary)
		if err != nil || other != nil {
			t.Errorf("%v, %v", err, other)
			continue
		}
		if !Close(customary.Value, metric.Value, 1e-13) || Snap(customary.Value) != Snap(metric.Value) {
			t.Errorf("%s is %v, %s is %v", c.metric, metric.Value, c.customary, customary.Value)
		}
	}
}

// decimalText returns digits as a decimal, with after of them behind the point.
func decimalText(digits string, after int) string {
	if after == 0 {
		return digits
	}
	if missing := after + 1 - len(digits); missing > 0 {
		digits = strings.Repeat("0", missing) + digits
	}
	return digits[:len(digits)-after] + "." + digits[len(digits)-after:]
}

// Every figure is the decimal times the factor, rounded once: the arithmetic in
// 64 bits gives what rational numbers of any size give, in every unit.
func TestParseIsExact(t *testing.T) {
	draw := rand.New(rand.NewPCG(1, 2))
	rat := func(text string) *big.Rat {
		r, _ := new(big.Rat).SetString(text)
		return r
	}
	nearest := func(r *big.Rat) float64 { f, _ := r.Float64(); return f }
	text := func() string {
		digits := make([]byte, 1+draw.IntN(1+draw.IntN(28)))
		for i := range digits {
			digits[i] = '0' + byte(draw.IntN(10))
		}
		return decimalText(string(digits), draw.IntN(1+draw.IntN(24)))
	}
	units := Units()
	for range 60_000 {
		u := units[draw.IntN(len(units))]
		value, by, share := text(), text(), text()
		factor := factorOf(u)
		middle := rat(value)
		spread := rat(by)
		of := new(big.Rat).Mul(middle, new(big.Rat).Quo(rat(share), big.NewRat(100, 1)))
		check := func(written string, spread *big.Rat) {
			b, err := Parse(u.Dimension, written)
			if err != nil {
				t.Fatal(err)
			}
			low := nearest(new(big.Rat).Mul(new(big.Rat).Sub(middle, spread), factor))
			high := nearest(new(big.Rat).Mul(new(big.Rat).Add(middle, spread), factor))
			if want := nearest(new(big.Rat).Mul(middle, factor)); b.Value != want || b.Low != low || b.High != high {
				t.Fatalf("%s = %v, %v, %v, want %v, %v, %v", written, b.Low, b.Value, b.High, low, want, high)
			}
		}
		check(value+" "+u.Symbol, new(big.Rat))
		if u.Dimension != Ratio {
			check(value+" "+u.Symbol+" ± "+by+" "+u.Symbol, spread)
			check(value+" "+u.Symbol+" ± "+share+" %", of)
			other := units[draw.IntN(len(units))]
			if other.Dimension == u.Dimension {
				check(value+" "+u.Symbol+" ± "+by+" "+other.Symbol, spread.Mul(spread, factorOf(other)).Quo(spread, factor))
			}
		}
	}
}

// Low <= Value <= High for whatever is written, and a range keeps its order.
func TestParseOrder(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		u := rapid.SampledFrom(Units()).Draw(t, "unit")
		figure := rapid.Custom(func(t *rapid.T) string {
			return rapid.StringMatching(`-?[0-9]{1,9}(\.[0-9]{1,9})?`).Draw(t, "figure") + " " + u.Symbol
		})
		a, b := figure.Draw(t, "a"), figure.Draw(t, "b")
		for _, text := range []string{a, a + " ± " + strings.TrimPrefix(b, "-"), a + " .. " + b} {
			band, err := Parse(u.Dimension, text)
			if err != nil {
				if u.Dimension == Ratio || strings.Contains(err.Error(), "backwards") {
					continue
				}
				t.Fatal(err)
			}
			inOrder(t, band)
		}
	})
}

// inOrder checks what a Band promises of its figures.
func inOrder(t interface{ Fatalf(string, ...any) }, b Band) {
	switch {
	case !isFinite(b.Low) || !isFinite(b.High) || b.Low > b.High:
		t.Fatalf("%q: from %v to %v", b.Text, b.Low, b.High)
	case b.Tolerance == Range && !math.IsNaN(b.Value):
		t.Fatalf("%q: a range with the value %v", b.Text, b.Value)
	case b.Tolerance != Range && !(b.Low <= b.Value && b.Value <= b.High):
		t.Fatalf("%q: %v, %v, %v", b.Text, b.Low, b.Value, b.High)
	case b.Tolerance == Untold && b.Low != b.High:
		t.Fatalf("%q: from %v to %v without a spread", b.Text, b.Low, b.High)
	}
}

// A figure that is printed with 12 digits is read back to 12 digits.
func TestRoundTrip(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		u := rapid.SampledFrom(Units()).Draw(t, "unit")
		si := rapid.Float64Range(1e-9, 1e9).Draw(t, "si")
		text := Format(si, u, 12, Nearest)
		b, err := Parse(u.Dimension, text)
		if err != nil {
			t.Fatal(err)
		}
		if !Close(b.Value, si, 5.1e-12) || Format(b.Value, u, 12, Nearest) != text {
			t.Fatalf("%v is printed as %s and read as %v", si, text, b.Value)
		}
	})
}

// The figures that people write are read without using memory.
func TestParseAllocatesNothing(t *testing.T) {
	for _, c := range []struct {
		dimension Dimension
		text      string
	}{
		{Mass, "100 kg ± 5 kg"}, {Mass, "203.5 lb ± 2.5 %"}, {Force, "1800 lbf"}, {Force, "6 kN .. 8 kN"},
		{Length, "6 ft 4 1/2 in"}, {Length, "6 ft ± 1 in"}, {Time, "0.34 s ± 10 %"},
		{Speed, "12.5 km/h"}, {Stiffness, "20.5 lbf/in"},
	} {
		if n := testing.AllocsPerRun(20, func() { Parse(c.dimension, c.text) }); n != 0 {
			t.Errorf("%q: %v allocations", c.text, n)
		}
	}
}

func FuzzParse(f *testing.F) {
	for _, c := range refusals {
		f.Add(uint8(c.dimension), c.text)
	}
	for d := Mass; d <= Ratio; d++ {
		f.Add(uint8(d), d.Example())
		f.Add(uint8(d), dimensions[d].span)
	}
	for _, text := range []string{"6 ft 4 1/2 in ± 1/4 in", "1,234,5.6,7 m", "1e5e5 m", "- - 5 m", "5 m -5 m", "5 m, 5 m", "1.1.1.1 m", "1'1'1\"\"' m"} {
		f.Add(uint8(Length), text)
	}
	f.Fuzz(func(t *testing.T, dimension uint8, text string) {
		d := Dimension(dimension%uint8(Ratio) + 1)
		b, err := Parse(d, text)
		if err != nil {
			presentable(t, d, err.(*Error))
			return
		}
		inOrder(t, b)
		if b.Text != text || b.Unit.Dimension != d {
			t.Errorf("%q read as %+v", text, b)
		}
		doubled := Sum(b, b)
		inOrder(t, doubled)
		if doubled.Low != 2*b.Low || doubled.High != 2*b.High {
			t.Errorf("%q twice is %+v", text, doubled)
		}
	})
}

func BenchmarkParse(b *testing.B) {
	for _, c := range []struct {
		dimension Dimension
		text      string
	}{
		{Mass, "100 kg"}, {Mass, "100 kg ± 5 kg"}, {Mass, "203.5 lb ± 2.5 %"}, {Force, "1800 lbf"}, {Force, "6 kN .. 8 kN"},
		{Length, "6 ft 4 1/2 in"}, {Length, "6 ft ± 1 in"}, {Angle, "30 deg"}, {Mass, "0.1234567890123456789 lb"},
		{Force, "1,800 lbs"},
	} {
		b.Run(strings.ReplaceAll(fmt.Sprint(c.text), " ", "_"), func(b *testing.B) {
			b.ReportAllocs()
			for b.Loop() {
				Parse(c.dimension, c.text)
			}
		})
	}
}
