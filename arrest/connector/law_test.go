package connector

import (
	"math"
	"testing"
)

// TestLawOfAPath integrates a straight law as a function and holds it against
// the run of the path.
func TestLawOfAPath(t *testing.T) {
	const k1, k2, corner, back, c = 60000., 9000., 0.05, 80000., 300.
	law := Law{
		Slack:     0.2,
		Load:      func(x float64) float64 { return min(k1*x, k1*corner+k2*(x-corner)) },
		Corners:   []float64{corner},
		Unloading: back,
		Damping:   func(v float64) float64 { return c * v },
	}
	fall := Fall{Mass: 100, FreeFall: 1.5, Gravity: StandardGravity, Duration: 1.2}
	want := one(t, fall, Loose(0.2), NewDashpot(c),
		FromPoints([]Point{{0, 0}, {corner, k1 * corner}, {1, k1*corner + k2*(1-corner)}}, back))
	var got Result
	if err := IntegrateLaw(&law, &fall, 1e-12, &got); err != nil {
		t.Fatal(err)
	}
	if got.Events != want.Events {
		t.Errorf("events %+v, want %+v", got.Events, want.Events)
	}
	for _, f := range [][2]float64{{got.Peak, want.Peak}, {got.SecondPeak, want.SecondPeak}, {got.StoppingTime, want.StoppingTime},
		{got.StoppingDistance, want.StoppingDistance}, {got.End.X, want.End.X}, {got.End.V, want.End.V}, {got.Ledger.Viscous, want.Ledger.Viscous}} {
		if !closeTo(f[0], f[1], 1e-9) {
			t.Errorf("integrated %v, want %v", f[0], f[1])
		}
	}
}

// TestStiffening holds a law F = k x + b x^3, which has no exact run, against its
// energy: at rest the work k x^2/2 + b x^4/4 is m v^2/2 + W x.
func TestStiffening(t *testing.T) {
	for i := range uint64(200) {
		d := newDice(30, i)
		k, b := d.spread(2000, 50000), d.spread(100, 1e6)
		f := d.fall()
		f.Duration = 0
		law := Law{Load: func(x float64) float64 { return k*x + b*x*x*x }}
		var r Result
		if err := IntegrateLaw(&law, &f, 1e-11, &r); err != nil {
			t.Fatal(err)
		}
		low, high := 0.0, 20.0
		for range 100 {
			x := (low + high) / 2
			if x*x*(k/2+b*x*x/4) < f.Mass*f.speed()*f.speed()/2+f.Mass*f.Gravity*x {
				low = x
			} else {
				high = x
			}
		}
		if !closeTo(r.StoppingDistance, low, 1e-9) || !closeTo(r.Peak, law.Load(low), 1e-9) || !closeTo(r.SecondPeak, r.Peak, 1e-8) {
			t.Errorf("%+v, k %v, b %v: distance %v, want %v; peak %v, want %v; second %v", f, k, b, r.StoppingDistance, low, r.Peak, law.Load(low), r.SecondPeak)
		}
	}
}

// TestOtherDamping: a dashpot that goes with the square of the speed, on a path
// that holds a constant force. From v' = -a - b v^2 follows the distance
// log(1 + b v^2/a)/(2 b) and the time atan(v sqrt(b/a))/sqrt(a b).
func TestOtherDamping(t *testing.T) {
	const held, square = 3000., 60.
	f := Fall{Mass: 100, FreeFall: 2, Gravity: StandardGravity}
	law := Law{
		Load:      func(float64) float64 { return held },
		Unloading: math.Inf(1),
		Damping:   func(v float64) float64 { return square * v * math.Abs(v) },
	}
	var r Result
	if err := IntegrateLaw(&law, &f, 1e-11, &r); err != nil {
		t.Fatal(err)
	}
	a, b, v := held/f.Mass-f.Gravity, square/f.Mass, f.speed()
	if want := math.Log(1+b*v*v/a) / (2 * b); !closeTo(r.StoppingDistance, want, 1e-9) {
		t.Errorf("distance %v, want %v", r.StoppingDistance, want)
	}
	if want := math.Atan(v*math.Sqrt(b/a)) / math.Sqrt(a*b); !closeTo(r.StoppingTime, want, 1e-9) {
		t.Errorf("time %v, want %v", r.StoppingTime, want)
	}
	if want := held + square*v*v; !closeTo(r.Peak, want, 1e-12) || r.PeakTime != r.FirstPull {
		t.Errorf("peak %v at %v, want %v at once", r.Peak, r.PeakTime, want)
	}
}

func TestLawChecks(t *testing.T) {
	line := func(x float64) float64 { return x }
	var r Result
	for name, l := range map[string]Law{
		"no curve":         {},
		"negative slack":   {Load: line, Slack: -1},
		"unloading NaN":    {Load: line, Unloading: math.NaN()},
		"corner at zero":   {Load: line, Corners: []float64{0}},
		"corners not rise": {Load: line, Corners: []float64{2, 1}},
	} {
		if err := IntegrateLaw(&l, &fall18, 1e-8, &r); err != errLaw {
			t.Errorf("%s: %v", name, err)
		}
	}
	if err := IntegrateLaw(&Law{Load: line}, &fall18, 1e-2, &r); err != errTolerance {
		t.Errorf("tolerance 1e-2: %v", err)
	}
}
