package rig

import (
	"math"
	"math/big"
	"testing"

	"github.com/BurntSushi/toml"
)

// integral is the integral of f from a to b by Simpson's rule on n pairs.
func integral(f func(float64) float64, a, b float64, n int) float64 {
	h := (b - a) / float64(2*n)
	sum := f(a) + f(b)
	for i := 1; i < 2*n; i++ {
		sum += float64(2+2*(i&1)) * f(a+float64(i)*h)
	}
	return sum * h / 3
}

// The integrals by their definition, over parameters on both sides of zero.
func TestEllipticIntegralsByQuadrature(t *testing.T) {
	for _, m := range []float64{-30, -1, -0.01, 0, 0.1, 0.5, 0.9, 0.99} {
		f := func(x float64) float64 { return 1 / math.Sqrt(1-m*square(math.Sin(x))) }
		near(t, "complete", EllipticK(m), integral(f, 0, math.Pi/2, 4000), 1e-13)
		for _, a := range []float64{1e-9, 0.1, 0.7, 1.2, 1.5, 1.5707, math.Pi / 2, -0.8} {
			near(t, "incomplete", EllipticF(a, m), integral(f, 0, a, 4000), 1e-13)
		}
	}
	if !math.IsInf(EllipticK(1), 1) || !math.IsNaN(EllipticK(1.5)) || !math.IsNaN(EllipticK(math.NaN())) {
		t.Errorf("K(1) = %g, K(1.5) = %g", EllipticK(1), EllipticK(1.5))
	}
	near(t, "F(a, 1)", EllipticF(1.2, 1), math.Asinh(math.Tan(1.2)), 1e-15)
}

// The complete integral in 200-bit arithmetic. pi to 60 digits is from memory,
// held by the published K(0) = pi/2 and by math.Pi.
func TestEllipticKInLongArithmetic(t *testing.T) {
	const bits = 200
	number := func(x float64) *big.Float { return new(big.Float).SetPrec(bits).SetFloat64(x) }
	pi, _, err := big.ParseFloat("3.14159265358979323846264338327950288419716939937510582097494", 10, bits, big.ToNearestEven)
	if err != nil {
		t.Fatal(err)
	}
	for i := range 2000 {
		d := newDice(3, uint64(i))
		m := 1 - d.spread(1e-12, 100)
		a, b := number(1), number(1)
		b.Sqrt(b.Sub(b, number(m)))
		for range 12 {
			c := new(big.Float).Mul(a, b)
			a.Quo(a.Add(a, b), number(2))
			b.Sqrt(c)
		}
		want, _ := new(big.Float).Quo(pi, a.Mul(a, number(2))).Float64()
		near(t, "K", EllipticK(m), want, 1e-15)
	}
}

// The two integrals are one at a quarter turn, and nothing jumps there: a turn
// told wrongly would be off by a whole one.
func TestEllipticFMeetsEllipticK(t *testing.T) {
	for i := range 20000 {
		d := newDice(1, uint64(i))
		m := 1 - d.spread(1e-9, 3)
		k := EllipticK(m)
		// pi/2 is rounded, by up to 1e-16, where the integrand is 1/sqrt(1 - m).
		if f := EllipticF(math.Pi/2, m); math.Abs(f-k) > 4e-15*k+1.2e-16/math.Sqrt(1-m) {
			t.Fatalf("F(pi/2, %.17g) = %.17g, K = %.17g", m, f, k)
		}
		if f := ellipticF(1, d.spread(1e-18, 1e-6), math.Sqrt(1-m)); f > k*(1+1e-14) || f < k*(1-1e-6/math.Sqrt(1-m)) {
			t.Fatalf("just below a quarter turn, m %.17g: %.17g, K = %.17g", m, f, k)
		}
	}
}

// A row is one published figure of testdata/reference/pendulum.toml.
type row struct {
	ID, What, Unit, Mark, Source, Remark string
	Expected, Tolerance, Recomputed      float64
	Agrees                               bool
	Inputs                               map[string]float64
}

// small is the period of a pendulum of one metre at small amplitude.
func small(g float64) float64 { return Period(1, 0, g) }

// lengthFor turns the period round: it goes with the root of the length.
func lengthFor(t, g float64) float64 { return square(t / small(g)) }

// bottomPull is the pull in a connector that keeps its length, straight below
// the pivot.
func bottomPull(mass, speed, radius, g float64) float64 {
	s := stepper{g: g, mass: mass, radius: radius, held: true}
	s.start(&state{turning: speed * radius})
	return s.pull[0]
}

func exactPeriod(in map[string]float64) float64 {
	return Period(in["length_m"], in["angle_deg"]*degree, in["g_mps2"])
}

// expressed says how each published row comes out of this package. None is left
// out.
var expressed = map[string]func(in map[string]float64) float64{
	"pen-K0":     func(in map[string]float64) float64 { return EllipticK(in["m"]) },
	"pen-Km1":    func(in map[string]float64) float64 { return EllipticK(in["m"]) },
	"pen-T05":    func(in map[string]float64) float64 { return 100 * lengthFor(in["period_s"], in["g_mps2"]) },
	"pen-T1":     func(in map[string]float64) float64 { return 100 * lengthFor(in["period_s"], in["g_mps2"]) },
	"pen-big-20": exactPeriod, "pen-big-30": exactPeriod, "pen-big-40": exactPeriod,
	"pen-big-50": exactPeriod, "pen-big-70": exactPeriod, "pen-big-80": exactPeriod,
	"pen-err-0p1": func(in map[string]float64) float64 {
		lo, hi := 0.0, 1.0
		for range 60 {
			if a := (lo + hi) / 2; 100*(1-small(1)/Period(1, a, 1)) < in["percent"] {
				lo = a
			} else {
				hi = a
			}
		}
		return lo
	},
	"pen-g": func(in map[string]float64) float64 { return square(Period(in["length_m"], 0, 1) / in["period_s"]) },
	"pen-gshift": func(in map[string]float64) float64 {
		return square(Period(lengthFor(in["T0_s"], in["g0_mps2"]), 0, 1) / in["T1_s"])
	},
	"pen-move": func(in map[string]float64) float64 {
		return Period(lengthFor(in["T0_s"], in["g0_mps2"]), 0, in["g1_mps2"])
	},
	"pen-swing-F": func(in map[string]float64) float64 {
		b := Body{Gravity: in["g_mps2"]}
		return bottomPull(in["mass_kg"], math.Sqrt(b.speed2(2*in["radius_m"])), in["radius_m"], b.Gravity)
	},
	"pen-swing-T": func(in map[string]float64) float64 {
		return bottomPull(in["mass_kg"], in["speed_mps"], in["radius_m"], in["g_mps2"])
	},
	"pen-swing-a": func(in map[string]float64) float64 { return bottomPull(1, in["speed_mps"], in["radius_m"], 0) },
	"pen-swing-v": func(in map[string]float64) float64 {
		b := Body{Gravity: in["g_mps2"]}
		return math.Sqrt(b.speed2(2 * in["radius_m"]))
	},
}

// TestPublishedPendulums compares every row with its published answer, within
// the row's own tolerance, and with the recomputed one to its twelve digits.
func TestPublishedPendulums(t *testing.T) {
	var file struct{ Check []row }
	if _, err := toml.DecodeFile("../../testdata/reference/pendulum.toml", &file); err != nil {
		t.Fatal(err)
	}
	if len(file.Check) != 18 || len(expressed) != 18 {
		t.Errorf("%d rows, %d expressed, want 18 of each", len(file.Check), len(expressed))
	}
	for i := range file.Check {
		r := &file.Check[i]
		value, ok := expressed[r.ID]
		if !ok {
			t.Errorf("%s is not expressed", r.ID)
			continue
		}
		got := value(r.Inputs)
		if math.Abs(got-r.Expected) > r.Tolerance*(1+1e-9) {
			t.Errorf("%s: %s: %.12g %s, published %.12g ± %g (%s)", r.ID, r.What, got, r.Unit, r.Expected, r.Tolerance, r.Source)
		}
		near(t, r.ID+" recomputed", got, r.Recomputed, 1e-9)
	}
}

// TestSwingTimeByIntegration follows the pendulum step by step from its angle to
// the lowest point.
func TestSwingTimeByIntegration(t *testing.T) {
	for i := range 300 {
		d := newDice(2, uint64(i))
		length, a, v := d.within(0.3, 6), d.within(0.01, 3), d.within(0, 8)
		switch {
		case d.chance(0.2):
			v = 0
		case d.chance(0.2):
			v = d.spread(1e-8, 1e-2)
		}
		near(t, "time of a swing", SwingTime(length, a, v, gravity), stepDown(length, a, v), 1e-9)
	}
	near(t, "a quarter of the period", SwingTime(2, 1, 0, gravity), Period(2, 1, gravity)/4, 1e-15)
	near(t, "a small swing", Period(1, 1e-9, gravity), 2*math.Pi/math.Sqrt(gravity), 1e-15)
	// Just over the top and just not: one time to the digits the two have in common.
	top := math.Sqrt(4 * gravity * 2 * square(math.Cos(0.5)))
	near(t, "over the top", SwingTime(2, 1, top*(1+1e-9), gravity), SwingTime(2, 1, top*(1-1e-9), gravity), 1e-7)
	near(t, "right to the top", SwingTime(2, 1, top, gravity), SwingTime(2, 1, top*(1-1e-9), gravity), 1e-7)
	if SwingTime(2, 0, 3, gravity) != 0 || !math.IsNaN(SwingTime(2, math.NaN(), 3, gravity)) {
		t.Error("a swing without an angle takes no time; one without a known angle has none")
	}
}

// stepDown is the time to the lowest point by the classical method of order
// four, the last step of which is halved until it fits.
func stepDown(length, a, v float64) float64 {
	w := -v / length
	acc := func(a float64) float64 { return -gravity / length * math.Sin(a) }
	step := func(a, w, h float64) (float64, float64) {
		k1, l1 := w, acc(a)
		k2, l2 := w+h/2*l1, acc(a+h/2*k1)
		k3, l3 := w+h/2*l2, acc(a+h/2*k2)
		k4, l4 := w+h*l3, acc(a+h*k3)
		return a + h/6*(k1+2*k2+2*k3+k4), w + h/6*(l1+2*l2+2*l3+l4)
	}
	const h = 2e-4
	for n := 0; ; n++ {
		a1, w1 := step(a, w, h)
		if a1 > 0 {
			a, w = a1, w1
			continue
		}
		lo, hi := 0.0, h
		for range 50 {
			mid := (lo + hi) / 2
			if a1, _ := step(a, w, mid); a1 > 0 {
				lo = mid
			} else {
				hi = mid
			}
		}
		return float64(n)*h + lo
	}
}
