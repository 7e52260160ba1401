package arrest

import (
	"math"
	"testing"

	"arrestcheck/arrest/quantity"
)

func bounded(ev Evidence, low, high, reach float64) Estimate {
	return Estimate{Quantity: PeakForce, Evidence: ev, Low: low, Value: nan, High: high, Reach: reach}
}

// Two estimates that touch do not contradict each other, one step further they
// do; a floor whose reach goes beyond a ceiling does so in part. It does not
// matter which of the two stands first.
func TestEdgeOfAContradiction(t *testing.T) {
	up := math.Nextafter(2, 3)
	for _, c := range []struct {
		name        string
		a, b        Estimate
		whole, part bool
	}{
		{"bands that touch", bounded(Given, 1, 2, nan), bounded(Modelled, 2, 3, nan), false, false},
		{"bands apart", bounded(Given, 1, 2, nan), bounded(Modelled, up, 3, nan), true, false},
		{"bands that overlap", bounded(Given, 1, 2.5, nan), bounded(Modelled, 2, 3, nan), false, false},
		{"floor up to the ceiling", bounded(Given, 1, nan, 2), bounded(Rated, nan, 2, nan), false, false},
		{"floor at the ceiling", bounded(Given, 2, nan, 2), bounded(Rated, nan, 2, nan), false, false},
		{"floor that reaches beyond the ceiling", bounded(Given, 1, nan, up), bounded(Rated, nan, 2, nan), false, true},
		{"floor beyond the ceiling", bounded(Given, up, nan, 3), bounded(Rated, nan, 2, nan), true, false},
		{"two floors", bounded(Given, 1, nan, 2), bounded(Measured, 5, nan, 6), false, false},
		{"two ceilings", bounded(Rated, nan, 1, nan), bounded(Measured, nan, 5, nan), false, false},
	} {
		for _, pair := range [][]Estimate{{c.a, c.b}, {c.b, c.a}} {
			ev := evaluation{job: &Job{}}
			ev.res.Estimates = pair
			ev.contradictions()
			list := ev.res.Contradictions
			if any := c.whole || c.part; any != (len(list) == 1) || any && list[0].Part != c.part {
				t.Errorf("%s: %v", c.name, list)
			}
		}
	}
}

// A stop as long as the longest that can happen cannot happen: it would need no
// force. With u = 1 m/s, g = 10 m/s2 and t = 1 s that is 6 m, in exact figures.
func TestEdgeOfTheImpossible(t *testing.T) {
	job := func(distance string) *Job {
		return figures{mass: "100 kg", fall: "0 m", speed: "1 m/s", distance: distance, time: "1 s", gravity: "10 m/s2"}.job(t)
	}
	if limit, impossible := Impossible(job("6 m")); limit != 6 || !impossible {
		t.Errorf("6 m: limit %v, impossible %v", limit, impossible)
	}
	if _, impossible := Impossible(job("5.999 m")); impossible {
		t.Error("5.999 m is impossible")
	}
	for _, j := range []*Job{
		figures{mass: "100 kg", fall: "1 m", time: "1 s"}.job(t),
		figures{mass: "100 kg", fall: "1 m", distance: "9 m"}.job(t),
	} {
		if limit, impossible := Impossible(j); limit != 0 || impossible {
			t.Errorf("with one of the two: limit %v, impossible %v", limit, impossible)
		}
	}
}

// A free fall from rest is as entered; with a speed at the start it is worked
// out.
func TestFreeFallAsEntered(t *testing.T) {
	for speed, method := range map[string]string{"": Entered, "1 m/s": "M-01"} {
		res := Evaluate(figures{mass: "100 kg", fall: "6 ft", speed: speed}.job(t))
		e := find(t, &res, FreeFall, Given)
		if e.Method != method || (e.Typed.Symbol == "ft") != (method == Entered) {
			t.Errorf("speed %q: method %q, typed in %q", speed, e.Method, e.Typed.Symbol)
		}
	}
}

// Whatever settles an allowance for the error of the model, an assumption does
// not; it needs no tolerance.
func TestSourceOfAnAllowance(t *testing.T) {
	for _, source := range append(Sources(), NoSource) {
		in := Input{Role: OfModel, Source: source, Band: parse(t, quantity.Ratio, "25 %")}
		want := Settled
		switch source {
		case FromAssumed:
			want = OpenSource
		case NoSource:
			want = OpenNoSource
		}
		if got := in.Open(); got != want {
			t.Errorf("%q: %q, want %q", source, got, want)
		}
	}
}

// A constant force asks for d = v*t/2, 0.891257 m here; entries are read to half
// a per cent. So 0.886800 m and 0.895713 m are the ends of what does not
// contradict the shape, and the figures below lie a step on either side.
func TestEdgeOfAShape(t *testing.T) {
	for distance, contradicted := range map[string]bool{"0.8867 m": true, "0.8869 m": false, "0.8957 m": false, "0.8958 m": true,
		"0.5 m .. 0.8867 m": true, "0.5 m .. 0.8869 m": false, "0.8957 m .. 2 m": false, "0.8958 m .. 2 m": true} {
		res := Evaluate(figures{mass: "100 kg", fall: "1.8 m", distance: distance, time: "0.30 s", pulse: Constant}.job(t))
		if hasWarning(&res, ShapeContradicted) != contradicted || res.estimate(PeakForce, Shape) >= 0 == contradicted {
			t.Errorf("%s: contradicted %v", distance, !contradicted)
		}
	}
}

// Nothing about the stop is nothing: no distance, no time, no document, no path.
// Means are told of wherever one of the first two is there, and with both.
func TestNothingAboutTheStop(t *testing.T) {
	peak := parse(t, quantity.Force, "6 kN")
	rating := []Rating{{Document: "label", TotalMass: parse(t, quantity.Mass, "59 kg .. 140 kg"), FreeFallAtMost: parse(t, quantity.Length, "2 m"), PeakForceAtMost: &peak}}
	for _, c := range []struct {
		name           string
		job            *Job
		nothing, means bool
	}{
		{"nothing", fall100(t), true, false},
		{"document", figures{mass: "100 kg", fall: "1.8 m", ratings: rating}.job(t), false, false},
		{"path", onPath(t, fall100(t), FromLabel, ropePart), false, false},
		{"distance", figures{mass: "100 kg", fall: "1.8 m", distance: "1 m"}.job(t), false, true},
		{"time", figures{mass: "100 kg", fall: "1.8 m", time: "0.3 s"}.job(t), false, true},
		{"both", figures{mass: "100 kg", fall: "1.8 m", distance: "1 m", time: "0.3 s"}.job(t), false, true},
		{"both and a document", figures{mass: "100 kg", fall: "1.8 m", distance: "1 m", time: "0.3 s", ratings: rating}.job(t), false, true},
	} {
		res := Evaluate(c.job)
		if hasWarning(&res, NothingAboutStop) != c.nothing || hasWarning(&res, MeansAreNotPeaks) != c.means {
			t.Errorf("%s: nothing told %v, means told %v", c.name, hasWarning(&res, NothingAboutStop), hasWarning(&res, MeansAreNotPeaks))
		}
	}
}

// A narrow range about v*t/2, 0.891257 m here, agrees closely as one figure does;
// the middle of the range decides.
func TestRoutesThatAgreeOverARange(t *testing.T) {
	for distance, told := range map[string]bool{"0.8900 m .. 0.8925 m": true, "0.8800 m .. 0.8820 m": false, "0.8913 m": true, "0.8800 m": false} {
		res := Evaluate(figures{mass: "100 kg", fall: "1.8 m", distance: distance, time: "0.30 s"}.job(t))
		if hasWarning(&res, RoutesAgreeClosely) != told {
			t.Errorf("%s: told %v", distance, !told)
		}
	}
}

// The edge of what can happen goes exactly through the corner of the shorter
// time: 1 m/s and 10 m/s2 cover 1 + 5 = 6 m in 1 s. The mean over the time comes
// as near as one likes to W + m v/t there: 1000 + 100 N, and 1000 + 80 N at 1.25 s.
func TestEdgeThroughACorner(t *testing.T) {
	j := figures{mass: "100 kg", fall: "0 m", speed: "1 m/s", distance: "6 m", time: "1 s .. 1.25 s", gravity: "10 m/s2"}.job(t)
	res := Evaluate(j)
	e := given(t, &res, MeanForceOverTime, Given)
	near(t, "least mean", e.Low, 1080, 1e-12)
	near(t, "greatest mean", e.High, 1100, 1e-12)
}
