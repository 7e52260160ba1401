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
