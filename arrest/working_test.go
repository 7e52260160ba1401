package arrest

import (
	"slices"
	"testing"

	"arrestcheck/arrest/connector"
)

// shownFormulas lists the formulas of the working of a job.
func shownFormulas(j *Job) (list []string) {
	var res Result
	ShowWorking(j, &res)
	for _, w := range res.Working {
		list = append(list, w.Formula)
	}
	return list
}

// A stop of just v*t = 2*d is an even braking over the distance, shown once: 2
// m/s, 1 s and 1 m, in exact figures.
func TestWorkingOfAnEvenBraking(t *testing.T) {
	shown := shownFormulas(figures{mass: "100 kg", fall: "0 m", speed: "2 m/s", distance: "1 m", time: "1 s"}.job(t))
	if !slices.Contains(shown, "a = v^2/(2*d)") || slices.Contains(shown, "tau = (2*d - v*t)/(v + g*t)") {
		t.Errorf("%q", shown)
	}
}

// The closed form of an elastic part is no formula of a loading curve, and that
// of an absorber none where the force held is the weight: nothing stops the body.
func TestWorkingOfPartsWithoutAClosedForm(t *testing.T) {
	curve := onPath(t, fall100(t), FromLabel, testPart{kind: connector.Curve, basis: ByPoints})
	curve.Point.Path.Parts[0].Points = []connector.Point{{Extension: 0, Force: 0}, {Extension: 1, Force: 40000}}
	if shown := shownFormulas(curve); slices.Contains(shown, "F_elastic = W + sqrt(W^2 + k_path*m*v^2)") {
		t.Errorf("%q", shown)
	}
	held := onPath(t, figures{mass: "100 kg", fall: "1.8 m", gravity: "10 m/s2"}.job(t), FromLabel, absorber("1 kN", "9 m"))
	if shown := shownFormulas(held); slices.Contains(shown, "x_a = m*v^2/2/(F_a - W)") {
		t.Errorf("%q", shown)
	}
}

// Components of the weight and of the drive: with up at (0.6, 0, 0.8) 100 kg
// weigh 588.399 N and 784.532 N along x and z; what stands still has no
// direction that a drive could push in.
func TestSymbolsOfALoad(t *testing.T) {
	figure := func(symbol string, c Case) float64 {
		var p Point
		At(&c, &p)
		return findSymbol(symbol).of(&c, &p)
	}
	c := Case{Gravity: StandardGravity, Load: Load{Mass: 100, Before: [3]float64{1, 2, 3}, Time: 1, Up: [3]float64{0.6, 0, 0.8}, Axes: 3}}
	near(t, "W_x", figure("W_x", c), -588.399, 1e-15)
	near(t, "W_z", figure("W_z", c), -784.532, 1e-15)
	for before, want := range map[float64]float64{2: 50, -2: -50, 0: 0} {
		c := Case{Gravity: StandardGravity, Load: Load{Mass: 100, Before: [3]float64{before, 0, 0}, Time: 1, Driving: 50, Axes: 1}}
		if got := figure("D_x", c); got != want {
			t.Errorf("drive along x at %g m/s: %g N, want %g", before, got, want)
		}
	}
}

// The letters of a formula are those of its words, each once; numbers, pi and
// functions are none.
func TestLettersOfAFormula(t *testing.T) {
	got := identifiers("a_0 = A_9*z + Z - 3*pi*sqrt(b90) + z/a_0")
	if want := []string{"a_0", "A_9", "z", "Z", "b90"}; !slices.Equal(got, want) {
		t.Errorf("%q, want %q", got, want)
	}
	if got = identifiers("n = 9*x9 + 0.5 - 90"); !slices.Equal(got, []string{"n", "x9"}) {
		t.Errorf("%q", got)
	}
}
