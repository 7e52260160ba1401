package arrest

import (
	"math"
	"testing"
)

// Of equal extremes the first one found stays, so that a figure is shown at the
// lowest corner that gives it.
func TestFirstOfEqualExtremes(t *testing.T) {
	var s span
	s.forget()
	s.take(5, 0)
	s.take(5, 1)
	s.take(nan, 2)
	if s.low != (extreme{5, 0}) || s.high != (extreme{5, 0}) {
		t.Errorf("%+v", s)
	}
	s.take(4, 3)
	s.take(6, 4)
	s.take(4, 5)
	s.take(6, 6)
	if s.low != (extreme{4, 3}) || s.high != (extreme{6, 4}) {
		t.Errorf("%+v", s)
	}
}

// Only bands make corners: two for each, one point where there are none.
func TestCorners(t *testing.T) {
	for n, f := range map[int]figures{
		1: {mass: "100 kg", tools: "0 kg ± 0 kg", fall: "1.8 m .. 1.8 m"},
		2: {mass: "100 kg ± 1 kg", fall: "1.8 m"},
		8: {mass: "100 kg ± 1 kg", tools: "0 kg .. 2 kg", fall: "1.6 m .. 1.8 m", distance: "1 m"},
	} {
		if got := newSpans(f.job(t)).corners(); got != n {
			t.Errorf("%d corners, want %d", got, n)
		}
	}
}

// A point beside the corners is found again by its extreme.
func TestCaseOfAnExtreme(t *testing.T) {
	s := newSpans(figures{mass: "100 kg ± 1 kg", fall: "1.6 m .. 1.8 m"}.job(t))
	for n := range 3 {
		c := s.base
		c.FreeFall = 1.7 + float64(n)/100
		if at := s.add(c); s.caseAt(extreme{0, at}) != c || s.caseAt(extreme{0, 1}).Mass != 101 {
			t.Errorf("point %d is not found again", n)
		}
	}
}

// Of the points beside the corners those are kept that widen a span.
func TestPointsBesideTheCorners(t *testing.T) {
	s, _ := overCorners(figures{mass: "100 kg ± 1 kg", fall: "1.8 m"}.job(t))
	i := indexOf(TotalMass, Given)
	s.live = []int{i}
	for _, x := range []struct {
		mass float64
		kept int
	}{{100, 0}, {99, 0}, {101, 0}, {98, 1}, {102, 2}, {100, 2}} {
		c, p := s.base, Point{}
		c.Mass = x.mass
		At(&c, &p)
		s.takeBeside(&p, &c)
		if len(s.beside) != x.kept {
			t.Errorf("%g kg: %d points kept, want %d", x.mass, len(s.beside), x.kept)
		}
	}
	if s.of[i].low.value != 98 || s.of[i].high.value != 102 {
		t.Errorf("%+v", s.of[i])
	}
}

// Where a part of the entries cannot happen the ends of the means lie on the
// edge of what can: d = v*t + g*t^2/2, with g = 10 m/s2 the three figures 6 m,
// 1 m/s and 1 s. The means over the distance, 1000 N + 50 J*v^2/d, and over the
// time, 1000 N + 100 N*s*v/t, are worked out by hand from M-02 and M-03.
func TestEndsOnTheEdgeOfWhatCanHappen(t *testing.T) {
	for _, c := range []struct {
		speed, distance, time string
		overDistance          [2]float64
		overTime              [2]float64
		ratio                 [2]float64
	}{
		{"1 m/s", "5 m .. 7 m", "1 s", [2]float64{1000 + 50./6, 1010}, [2]float64{1100, 1100}, [2]float64{1. / 12, 1. / 10}},
		{"1 m/s", "6 m", "0.8 s .. 1.25 s", [2]float64{1000 + 50./6, 1000 + 50./6}, [2]float64{1080, 1100}, [2]float64{1. / 12, 1.25 / 12}},
		{"0.5 m/s .. 2 m/s", "6 m", "1 s", [2]float64{1000 + 50./6, 1000 + 200./6}, [2]float64{1100, 1200}, [2]float64{1. / 12, 2. / 12}},
	} {
		res := Evaluate(figures{mass: "100 kg", fall: "0 m", speed: c.speed, distance: c.distance, time: c.time, gravity: "10 m/s2"}.job(t))
		for q, want := range map[Quantity][2]float64{MeanForceOverDistance: c.overDistance, MeanForceOverTime: c.overTime, ShapeRatio: c.ratio} {
			e := find(t, &res, q, Given)
			name := c.speed + ", " + c.distance + ", " + c.time + ": " + string(q)
			near(t, name, e.Low, want[0], 1e-12)
			near(t, name, e.High, want[1], 1e-12)
		}
		if e := find(t, &res, PeakForce, Given); !math.IsInf(e.Reach, 1) {
			t.Errorf("%s, %s, %s: the floor reaches %g", c.speed, c.distance, c.time, e.Reach)
		}
	}
}
