package figure

import (
	"math"
	"slices"
	"strconv"
	"strings"
	"testing"

	"pgregory.net/rapid"
)

func tickLabels(ticks []Tick) string {
	var list []string
	for _, t := range ticks {
		list = append(list, t.Label)
	}
	return strings.Join(list, " ")
}

// The ticks that a draughtsman would choose, by hand.
func TestTicks(t *testing.T) {
	for _, c := range []struct {
		low, high float64
		most      int
		want      string
	}{
		{0, 10, 6, "0 2 4 6 8 10"},
		{0, 10, 5, "0 5 10"},
		{0, 1, 6, "0.0 0.2 0.4 0.6 0.8 1.0"},
		{0.1, 2, 5, "0.5 1.0 1.5 2.0"},
		{0.3, 0.9, 8, "0.3 0.4 0.5 0.6 0.7 0.8 0.9"},
		{-3, 3, 7, "-3 -2 -1 0 1 2 3"},
		{-0.1, 0.3, 5, "-0.1 0.0 0.1 0.2 0.3"},
		{0, 20000, 5, "0 5000 10000 15000 20000"},
		{2630, 2640, 3, "2630 2635 2640"},
		{0, 3e9, 4, "0 1e9 2e9 3e9"},
		{0, 3e-7, 4, "0.0000000 0.0000001 0.0000002 0.0000003"},
		{0, 3e-8, 4, "0e0 1e-8 2e-8 3e-8"},
		{1, 1.2, 2, "1.0 1.2"},
		{0.97, 1.02, 2, "0.98 1.00 1.02"},
	} {
		if got := tickLabels(Ticks(c.low, c.high, c.most)); got != c.want {
			t.Errorf("Ticks(%v, %v, %d) = %s, not %s", c.low, c.high, c.most, got, c.want)
		}
	}
}

func TestLogTicks(t *testing.T) {
	for _, c := range []struct {
		low, high float64
		most      int
		want      string
	}{
		{1, 10, 10, "1 2 3 4 5 6 7 8 9 10"},
		{1, 10, 6, "1 2 5 10"},
		{0.1, 2, 8, "0.1 0.2 0.5 1 2"},
		{0.1, 1000, 6, "0.1 1 10 100 1000"},
		{0.1, 1000, 3, "1 100"},
		{1, 2, 6, "1.0 1.2 1.4 1.6 1.8 2.0"},
		{0.001, 1e6, 4, "0.001 1 1000 1000000"},
		{3, 40, 6, "5 10 20"},
		{21, 70, 2, "40 60"},
	} {
		if got := tickLabels(LogTicks(c.low, c.high, c.most)); got != c.want {
			t.Errorf("LogTicks(%v, %v, %d) = %s, not %s", c.low, c.high, c.most, got, c.want)
		}
	}
}

// Ticks are in the range, in order, evenly apart, no more than asked for, and
// their figures read back as their values; none is -0.
func TestTicksOfAnyRange(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		low := rapid.Float64Range(-1e6, 1e6).Draw(t, "low")
		high := low + max(math.Abs(low)*1e-6, 1e-6)*rapid.Float64Range(1, 1e6).Draw(t, "spread")
		most := rapid.IntRange(2, 12).Draw(t, "most")
		ticks := Ticks(low, high, most)
		if len(ticks) < 2 || len(ticks) > max(most, 5) {
			t.Fatalf("%d ticks: %v", len(ticks), ticks)
		}
		slack := 1e-8 * max(math.Abs(low), math.Abs(high), high-low)
		for i, k := range ticks {
			if k.Value < low-slack || k.Value > high+slack {
				t.Errorf("%v is not from %v to %v", k, low, high)
			}
			if got, err := strconv.ParseFloat(k.Label, 64); err != nil || math.Abs(got-k.Value) > 1e-12*math.Abs(k.Value) || strings.HasPrefix(k.Label, "-0 ") {
				t.Errorf("%q stands at %v", k.Label, k.Value)
			}
			if i >= 2 && math.Abs(k.Value-2*ticks[i-1].Value+ticks[i-2].Value) > slack {
				t.Errorf("not evenly apart: %v", ticks)
			}
		}
		if slices.ContainsFunc(ticks, func(k Tick) bool { return strings.HasPrefix(k.Label, "-") && k.Value == 0 }) {
			t.Errorf("minus nought: %v", ticks)
		}
	})
}

func TestAxisReach(t *testing.T) {
	inf, nan := math.Inf(1), math.NaN()
	for _, c := range []struct {
		axis      Axis
		values    []float64
		low, high float64
	}{
		{Axis{}, []float64{0.1, 18.6}, 0, 20},
		{Axis{}, []float64{17, 18.6}, 17, 18.6},
		{Axis{}, []float64{5}, 4.4, 5.6},
		{Axis{}, []float64{0, 0}, -1, 1},
		{Axis{}, []float64{-4, -1}, -4, 0},
		{Axis{}, []float64{nan, 3, inf, 1, -inf}, 0, 3},
		{Axis{Log: true}, []float64{0.1, 18.6}, 0.1, 20},
		{Axis{Log: true}, []float64{-1, 0, 0.3, 4}, 0.2, 5},
		{Axis{Log: true}, []float64{3}, 1, 10},
		{Axis{Low: 1, High: 2}, []float64{50}, 1, 2},
	} {
		got, err := c.axis.fitted(c.values)
		if err != nil || math.Abs(got.Low-c.low) > 1e-12 || math.Abs(got.High-c.high) > 1e-12 {
			t.Errorf("%v over %v: from %v to %v, not %v to %v (%v)", c.axis, c.values, got.Low, got.High, c.low, c.high, err)
		}
	}
}

func TestAxisRefused(t *testing.T) {
	nan, inf := math.NaN(), math.Inf(1)
	for _, c := range []struct {
		axis   Axis
		values []float64
		want   string
	}{
		{Axis{Name: "time", Unit: "s"}, nil, `figure: nothing to draw along the axis "time, s"`},
		{Axis{Name: "time", Unit: "s"}, []float64{nan, inf}, `figure: nothing to draw along the axis "time, s"`},
		{Axis{Name: "mass", Log: true}, []float64{-1, 0}, `figure: nothing to draw along the axis "mass"`},
		{Axis{Name: "mass", Low: 2, High: 1}, nil, `figure: the axis "mass" cannot reach from 2 to 1`},
		{Axis{Name: "mass", Low: nan, High: 1}, nil, `figure: the axis "mass" cannot reach from NaN to 1`},
		{Axis{Name: "mass", Low: 0, High: 1, Log: true}, nil, `figure: the logarithmic axis "mass" cannot begin at 0`},
		{Axis{Name: "mass", Low: 0, High: 1e16}, nil, `figure: no figures can be written along the axis "mass" from 0 to 1e+16`},
		{Axis{Name: "mass", Low: 1, High: 1 + 1e-12}, nil, `figure: no figures can be written along the axis "mass" from 1 to 1.000000000001`},
	} {
		if _, err := c.axis.fitted(c.values); err == nil || err.Error() != c.want {
			t.Errorf("%v: %v, not %s", c.axis, err, c.want)
		}
	}
}

// On a logarithmic axis equal factors are equal lengths.
func TestLogScale(t *testing.T) {
	s := scale{Axis{Low: 0.1, High: 1000, Log: true}, 20, 120}
	for v, want := range map[float64]float64{0.1: 20, 1: 45, 10: 70, 100: 95, 1000: 120, math.Sqrt(10): 57.5} {
		if got := s.at(v); math.Abs(got-want) > 1e-9 {
			t.Errorf("%v is at %v mm, not %v", v, got, want)
		}
	}
	if got := s.at(0); !math.IsNaN(got) {
		t.Errorf("nought has a place: %v", got)
	}
}
