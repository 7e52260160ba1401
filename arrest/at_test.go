package arrest

import (
	"math"
	"math/rand/v2"
	"testing"
)

// reference is the job that the checks below start from: 100 kg, 1.8 m.
func reference() Case { return Case{Mass: 100, FreeFall: 1.8, Gravity: StandardGravity} }

// near fails unless got is want within the relative tolerance.
func near(t *testing.T, what string, got, want, rel float64) {
	t.Helper()
	if !(math.Abs(got-want) <= rel*math.Abs(want)) {
		t.Errorf("%s = %.12g, want %.12g within %g", what, got, want, rel)
	}
}

// The figures of the main job, worked out beside the program with 50 digits
// (python decimal): v = sqrt(2*9.80665*1.8), and so on.
func TestMainJob(t *testing.T) {
	c := reference()
	c.Distance, c.Time = 1.07, 0.30
	var p Point
	At(&c, &p)
	near(t, "speed", p.Speed, 5.94171187, 1e-9)
	near(t, "mean over distance", p.MeanOverDistance, 2630.38182, 1e-9)
	near(t, "mean over time", p.MeanOverTime, 2961.2356248, 1e-10)
	near(t, "ratio", p.ShapeRatio, 0.83295026, 1e-8)
	near(t, "floor", p.Floor, 3419.97623, 1e-9)
	c = reference()
	c.Distance, c.Pulse = 1.07, RisingRamp
	At(&c, &p)
	near(t, "ramp", p.Assumed.Peak, 6805.84025, 1e-9)
}

func TestTwoRoutesDifferByTheRatio(t *testing.T) {
	r := rand.New(rand.NewPCG(1, 2))
	var p Point
	for range 10000 {
		c := randomCase(r)
		At(&c, &p)
		near(t, "(F_d-W)/(F_t-W)", (p.MeanOverDistance-p.Weight)/(p.MeanOverTime-p.Weight), p.ShapeRatio, 1e-9)
	}
}

func randomCase(r *rand.Rand) Case {
	return Case{
		Mass: 40 + 100*r.Float64(), Tools: 20 * r.Float64(),
		FreeFall: 0.05 + 4*r.Float64(), InitialSpeed: 3 * r.Float64(), Gravity: 9.78 + 0.05*r.Float64(),
		Distance: 0.05 + 2*r.Float64(), Time: 0.02 + r.Float64(),
	}
}

// Of a fall from rest weight, energy and momentum are rounded once, though each
// is made of a sum and of products: what every step loses is put back. Against
// 200-bit arithmetic half a unit in the last place is all that may be missing.
func TestFallFromRestIsRoundedOnce(t *testing.T) {
	r := rand.New(rand.NewPCG(41, 42))
	var o oracle
	var p Point
	for range 5000 {
		c := randomCase(r)
		c.InitialSpeed, c.Tools = 0, c.Tools*r.Float64()
		At(&c, &p)
		o.at(&c)
		weight, energy, momentum := ulps(p.Weight, o.weight(&c)), ulps(p.Energy, o.energy), ulps(p.Momentum, o.momentum)
		if worst := max(weight, energy, momentum); worst > 0.501 {
			t.Fatalf("weight, energy, momentum off by %.4f, %.4f, %.4f units in the last place: %+v", weight, energy, momentum, c)
		}
	}
}

// Where time and distance fit an even braking the least peak is that braking:
// the mean over the distance, to the last bit (M-06, t >= 2*d/v). Figures with
// few binary digits make v*t = 2*d exact.
func TestFloorOfAnEvenBraking(t *testing.T) {
	r := rand.New(rand.NewPCG(43, 44))
	var p Point
	for range 500 {
		c := randomCase(r)
		c.FreeFall, c.InitialSpeed, c.Time = 0, float64(20+r.IntN(180))/16, float64(4+r.IntN(60))/64
		c.Distance = c.InitialSpeed * c.Time / 2
		At(&c, &p)
		if p.ShapeRatio != 1 || p.Floor != p.MeanOverDistance {
			t.Fatalf("ratio %.17g, floor %.17g, mean over the distance %.17g: %+v", p.ShapeRatio, p.Floor, p.MeanOverDistance, c)
		}
	}
}
