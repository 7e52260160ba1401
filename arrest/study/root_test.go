package study

import (
	"math"
	"testing"

	"pgregory.net/rapid"
)

// Roots known in closed form, and functions that are hard on secants: the
// bracket closes to neighbouring figures in few steps.
func TestChange(t *testing.T) {
	for name, c := range map[string]struct {
		f            func(float64) float64
		target, a, b float64
		want         float64
		calls        int
	}{
		"square":       {func(x float64) float64 { return x * x }, 2, 0, 5, math.Sqrt2, 25},
		"inverse":      {func(x float64) float64 { return 1 / x }, 4, 10, 0.01, 0.25, 40},
		"cube":         {func(x float64) float64 { return x * x * x }, 27, 0, 100, 3, 40},
		"exponential":  {math.Exp, math.E, -30, 2, 1, 40},
		"steep":        {func(x float64) float64 { return math.Atan(1e6 * (x - 0.3)) }, 0.1, 0, 1, 0.3 + math.Tan(0.1)/1e6, 60},
		"other way":    {func(x float64) float64 { return -x }, -2, 7, 0, 2, 15},
		"infinite end": {func(x float64) float64 { return 1 / x }, 5, 1, 0, 0.2, 90},
	} {
		calls := 0
		f := func(x float64) float64 { calls++; return c.f(x) }
		beyond := func(y float64) bool { return y > c.target }
		a, b := c.a, c.b
		if beyond(c.f(a)) {
			a, b = b, a
		}
		x, y := change(f, beyond, c.target, a, b)
		if math.Abs(x-c.want) > 4e-16*max(1, math.Abs(c.want)) || y != c.f(x) {
			t.Errorf("%s: %.17g, want %.17g", name, x, c.want)
		}
		if beyond(y) || !beyond(c.f(math.Nextafter(x, b))) {
			t.Errorf("%s: %.17g is not the last figure on its side", name, x)
		}
		if calls > c.calls {
			t.Errorf("%s: %d evaluations, want at most %d", name, calls, c.calls)
		}
	}
}

func TestChangeFindsLeaps(t *testing.T) {
	leap := func(x float64) float64 {
		if x < 0.1 {
			return 1
		}
		return math.Inf(1)
	}
	x, y := change(leap, func(y float64) bool { return y > 5 }, 5, 0, 1)
	if x != math.Nextafter(0.1, 0) || y != 1 {
		t.Errorf("%.17g, %v", x, y)
	}
	if x, _ := change(leap, func(y float64) bool { return y > 5 }, 5, 1, 0); x != x {
		t.Error("a change from beyond is not found")
	}
}

// A rising polynomial, anywhere: put back, the figure is the target to the
// rounding of its evaluation.
func TestChangeOfPolynomials(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		p := rapid.SliceOfN(rapid.Float64Range(0.01, 10), 3, 3).Draw(t, "factors")
		root := rapid.Float64Range(0.01, 5).Draw(t, "root")
		f := func(x float64) float64 { return p[0]*x + p[1]*x*x + p[2]*x*x*x }
		target := f(root)
		x, y := change(f, func(y float64) bool { return y > target }, target, 0, 6)
		if y > target || math.Abs(x-root) > 1e-14*root {
			t.Fatalf("%.17g, want %.17g", x, root)
		}
	})
}

func TestTurning(t *testing.T) {
	for name, c := range map[string]struct {
		f       func(float64) float64
		a, b    float64
		sign    float64
		x, y    float64
		closeTo float64
	}{
		"parabola": {func(x float64) float64 { return (x - 0.7) * (x - 0.7) }, 0, 2, -1, 0.7, 0, 1e-7},
		"cosine":   {math.Cos, -1, 2, 1, 0, 1, 1e-7},
		"kink":     {func(x float64) float64 { return math.Abs(x - 0.3) }, 0, 2, -1, 0.3, 0, 1e-15},
		"end":      {func(x float64) float64 { return x }, 0, 2, 1, 2, 2, 0},
	} {
		x, y := turning(c.f, c.a, c.b, c.sign)
		if math.Abs(x-c.x) > c.closeTo || math.Abs(y-c.y) > 1e-14 {
			t.Errorf("%s: %.17g at %.17g", name, y, x)
		}
	}
}
