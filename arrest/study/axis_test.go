package study

import (
	"errors"
	"math"
	"testing"

	"pgregory.net/rapid"

	"arrestcheck/arrest"
	"arrestcheck/arrest/quantity"
)

// The figures of a grid are those a person would type.
func TestLinearIsAsTyped(t *testing.T) {
	xs := linear(t, 0.1, 2, 20)
	for i, x := range xs {
		want := band(t, quantity.Length, quantity.Number(float64(i+1)/10, quantity.Length.SI(), 3, quantity.Nearest)+" m").Value
		if x != want {
			t.Errorf("point %d is %.17g, typed %.17g", i, x, want)
		}
	}
	if feet := linear(t, 0.3048, 0.3048*6, 6); feet[1] != 0.6096 || feet[3] != 1.2192 {
		t.Errorf("%v", feet)
	}
}

func TestLogarithmicHasEvenRatios(t *testing.T) {
	xs, err := Logarithmic(0.01, 100, 5)
	if err != nil {
		t.Fatal(err)
	}
	for i, want := range []float64{0.01, 0.1, 1, 10, 100} {
		if xs[i] != want {
			t.Errorf("point %d is %.17g, want %g", i, xs[i], want)
		}
	}
}

func TestGridsRise(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		low := rapid.Float64Range(1e-6, 1e6).Draw(t, "low")
		high := low * rapid.Float64Range(1.0001, 1e4).Draw(t, "times")
		n := rapid.IntRange(2, 2000).Draw(t, "n")
		for _, grid := range []func(float64, float64, int) ([]float64, error){Linear, Logarithmic} {
			xs, err := grid(low, high, n)
			if err != nil || len(xs) != n || xs[0] != low || xs[n-1] != high {
				t.Fatalf("%v, %d points", err, len(xs))
			}
			for i := range xs[1:] {
				if xs[i+1] <= xs[i] {
					t.Fatalf("%v after %v", xs[i+1], xs[i])
				}
				if i > 0 && quantity.Snap(xs[i]) != xs[i] {
					t.Fatalf("%.17g has more than 12 digits", xs[i])
				}
			}
		}
	})
}

func TestGridsRefuse(t *testing.T) {
	for _, c := range []struct {
		low, high float64
		n         int
		want      RefusalID
	}{
		{1, 1, 3, EmptyRange}, {2, 1, 3, EmptyRange}, {math.NaN(), 1, 3, EmptyRange}, {1, math.Inf(1), 3, EmptyRange},
		{1, 2, 1, TooFewPoints}, {1, 2, MaxPoints + 1, TooMany}, {1, 1 + 1e-11, 1000, TooClose},
	} {
		if _, err := Linear(c.low, c.high, c.n); !refused(err, c.want) {
			t.Errorf("%v to %v, %d points: %v", c.low, c.high, c.n, err)
		}
	}
	if _, err := Logarithmic(0, 1, 3); !refused(err, OutOfRange) {
		t.Errorf("%v", err)
	}
}

func refused(err error, want RefusalID) bool {
	r := &Refusal{}
	return errors.As(err, &r) && r.ID == want
}

func TestWhatAnInputCanBe(t *testing.T) {
	j := entries{"worker.mass": "100 kg", "fall.free_fall": "1.8 m", "fall.initial_speed": "1 m/s", "stop.distance": "1 m",
		"stop.time": "0.3 s", "stop.rise_fraction": "20 %"}.job(t)
	zero := map[string]bool{"worker.tools": true, "fall.free_fall": true, "fall.initial_speed": true, "stop.rise_fraction": true}
	for i := range j.Inputs {
		in := &j.Inputs[i]
		if got := possible(in, 0); got != zero[in.Key] {
			t.Errorf("%s 0: %v", in.Key, got)
		}
		if possible(in, -1) || possible(in, math.NaN()) || possible(in, math.Inf(1)) || !possible(in, 0.5) {
			t.Errorf("%s takes what it cannot have, or not what it can", in.Key)
		}
	}
	if rise := &j.Inputs[6]; possible(rise, 1.1) {
		t.Error("a rise fraction above 1")
	}
	side := arrest.Input{Key: "moving_load.velocity", Role: arrest.OfFall, Band: band(t, quantity.Speed, "1 m/s")}
	if !possible(&side, -3) {
		t.Error("a velocity has a direction")
	}
	for key, least := range map[string]float64{
		"layout.anchor_height": -1, "layout.anchor_behind_edge": -1, "layout.slack": 0, "layout.travel_before_locking": 0,
		"layout.d_ring_height": 0.5, "layout.d_ring_to_feet": 0.5, "layout.half_width": 0.5, "layout.connector_length": 0.5,
		"position[1].along": -1, "position[2].out": -1, "obstacle[1].below": -1, "obstacle[1].height": 0.5,
		"obstacle[2].along_from": -1, "obstacle[2].out_to": -1, "obstacle[1].stop_over": 0.5,
	} {
		in := arrest.Input{Key: key, Role: arrest.OfLayout, Band: band(t, quantity.Length, "1 m")}
		for _, x := range []float64{-1, 0, 0.5} {
			if possible(&in, x) != (x >= least) {
				t.Errorf("%s %v: %v", key, x, !(x >= least))
			}
		}
	}
}
