package connector

import (
	"math"
	"testing"

	"github.com/BurntSushi/toml"
)

// A published is one row of testdata/reference/connector.toml.
type published struct {
	ID, Topic, What, Unit, Mark, Source, Remark string
	Expected, Tolerance, Recomputed             float64
	Agrees                                      bool
	Inputs                                      map[string]any
}

func (r *published) in(t *testing.T, key string) float64 {
	t.Helper()
	switch x := r.Inputs[key].(type) {
	case float64:
		return x
	case int64:
		return float64(x)
	}
	t.Fatalf("%s has no input %q", r.ID, key)
	return 0
}

const openStaxGravity = 9.8

// shock is the velocity shock of a spring and a dashpot side by side, mass 1,
// stiffness 1, speed 1. Gravity is a hundred-millionth of what the rows print.
func shock(t *testing.T, r *published) Result {
	zeta := r.in(t, "zeta")
	return one(t, Fall{Mass: 1, InitialSpeed: 1, Gravity: 1e-10, Duration: 4}, Elastic(Rope, 1), NewDashpot(2*zeta))
}

func shockForce(t *testing.T, r *published) float64  { return shock(t, r).Peak }
func shockTravel(t *testing.T, r *published) float64 { return shock(t, r).StoppingDistance }
func factor(t *testing.T, r *published) float64      { return ImpactFactor(r.in(t, "h_over_dst"), 1) }

// rod is the elastic rod of the handbook, in pounds and inches.
func rod(t *testing.T, r *published) Part {
	return FromModulus(Rope, r.in(t, "area_in2")*r.in(t, "E_psi"), r.in(t, "length_in"))
}

// bilinear is the element of two slopes, drawn on to where the row asks for.
func bilinear(t *testing.T, r *published) Part {
	k1, knee, k2, x := r.in(t, "k1_Npm"), r.in(t, "knee_m"), r.in(t, "k2_Npm"), r.in(t, "x_m")
	return FromPoints([]Point{{0, 0}, {knee, k1 * knee}, {x, k1*knee + k2*(x-knee)}}, 0)
}

// expressed are the rows that this package can express.
var expressed = map[string]func(*testing.T, *published) float64{
	"if-gere-dst": func(t *testing.T, r *published) float64 { return r.in(t, "weight_lbf") / rod(t, r).Stiffness },
	"if-gere-IF": func(t *testing.T, r *published) float64 {
		// In inches, pounds and seconds: the run does not mind.
		g := 386.0886
		w := r.in(t, "weight_lbf")
		run := one(t, Fall{Mass: w / g, FreeFall: r.in(t, "drop_in"), Gravity: g}, rod(t, r))
		return run.Peak / w
	},
	"if-hall-rel": func(t *testing.T, r *published) float64 {
		// A force that stops the body over just this distance.
		w, h, d := r.in(t, "weight_N"), r.in(t, "drop_m"), r.in(t, "stop_distance_m")
		run := one(t, Fall{Mass: w / openStaxGravity, FreeFall: h, Gravity: openStaxGravity}, NewAbsorber(Plateau{Force: w * (1 + h/d), Travel: 9}))
		if !closeTo(run.StoppingDistance, d, 1e-12) {
			t.Errorf("%s: stopped over %v, want %v", r.ID, run.StoppingDistance, d)
		}
		return run.MeanOverDistance
	},
	"if-table-0": factor, "if-table-2p5": factor, "if-table-5": factor, "if-table-7p5": factor, "if-table-10": factor,
	"pile-bj-v": func(t *testing.T, r *published) float64 { return FallSpeed(0, r.in(t, "drop_m"), r.in(t, "g_mps2")) },

	"kv-f-0": shockForce, "kv-f-0p1": shockForce, "kv-f-0p265": shockForce, "kv-f-0p5": shockForce, "kv-f-0p7": shockForce,
	"kv-x-0": shockTravel, "kv-x-0p265": shockTravel, "kv-x-0p4": shockTravel, "kv-x-0p7": shockTravel,
	"sdof-loss": func(t *testing.T, r *published) float64 {
		// A body let go on a spring, damped so that a swing loses that share: the
		// energy above the hanging position at two lowest points, one swing apart.
		decay := -math.Log(1-r.in(t, "amplitude_loss_pct")/100) / (2 * math.Pi)
		zeta := decay / math.Sqrt(1+decay*decay)
		period := 2 * math.Pi / math.Sqrt(1-zeta*zeta)
		fall := Fall{Mass: 1, Gravity: 1, Duration: 0.75 * period}
		parts := []Part{Elastic(Rope, 1), NewDashpot(2 * zeta)}
		first := one(t, fall, parts...)
		fall.Duration = first.RestTime + period
		a, b := first.StoppingDistance-1, one(t, fall, parts...).End.X-1
		return 100 * (1 - b*b/(a*a))
	},

	"we-bilin-T": func(t *testing.T, r *published) float64 {
		var p Path
		if err := p.Set(bilinear(t, r)); err != nil {
			t.Fatal(err)
		}
		return p.Force(r.in(t, "x_m"), 0)
	},
	"we-bilin-W": func(t *testing.T, r *published) float64 {
		// The fall whose lowest point is at x, found by halving; then the work.
		low, high := 0.0, 100.0
		var run Result
		for range 60 {
			h := (low + high) / 2
			run = one(t, Fall{Mass: 80, FreeFall: h, Gravity: openStaxGravity}, bilinear(t, r))
			if run.StoppingDistance < r.in(t, "x_m") {
				low = h
			} else {
				high = h
			}
		}
		return run.MeanOverDistance * run.StoppingDistance
	},
	"we-sudden": func(t *testing.T, r *published) float64 {
		return one(t, Fall{Mass: r.in(t, "weight_N") / openStaxGravity, Gravity: openStaxGravity}, Elastic(Rope, r.in(t, "k_Npm"))).StoppingDistance
	},
	"we-sudden-force": func(t *testing.T, r *published) float64 {
		return one(t, Fall{Mass: 1, FreeFall: r.in(t, "drop_m"), Gravity: openStaxGravity}, Elastic(Rope, 100)).Peak / openStaxGravity
	},
	"we-tramp": func(t *testing.T, r *published) float64 {
		return 100 * one(t, Fall{Mass: r.in(t, "mass_kg"), FreeFall: r.in(t, "drop_m"), Gravity: openStaxGravity}, Elastic(Rope, r.in(t, "k_Npm"))).StoppingDistance
	},
	"we-rubber-a": func(t *testing.T, r *published) float64 {
		// The force is proportional to the coefficient, and so is the work: the
		// coefficient is the work asked for over the work of the coefficient one.
		l0, x := r.in(t, "L0_m"), r.in(t, "x_m")
		return r.in(t, "work_J") / rubberWork(t, l0, x)
	},
}

// rubberWork returns the work up to the stretch x of the law that
// we-rubber-a gives, for the coefficient one, from runs that stop there.
func rubberWork(t *testing.T, l0, x float64) float64 {
	law := Law{Load: func(x float64) float64 { return (x+l0)/l0 - l0*l0/((x+l0)*(x+l0)) }}
	var r Result
	low, high := 0.0, 20.0
	for range 80 {
		v := (low + high) / 2
		f := Fall{Mass: 1, InitialSpeed: v, Gravity: 1e-9}
		if err := IntegrateLaw(&law, &f, 1e-10, &r); err != nil {
			t.Fatal(err)
		}
		if r.StoppingDistance < x {
			low = v
		} else {
			high = v
		}
	}
	return low * low / 2
}

// notExpressed are the rows that it cannot, and why.
var notExpressed = map[string]string{
	"pile-bj-R":      "a blow of two bodies comes before the stop",
	"sdof-mr-tri":    "a pulse acts on the body as a given function of time, there is no path",
	"sdof-mr-vers":   "as sdof-mr-tri",
	"sdof-zero-half": "as sdof-mr-tri",
	"sdof-zero-rect": "as sdof-mr-tri",
	"sdof-zero-vers": "as sdof-mr-tri",
}

// A figure is one figure of the program's own method, worked out apart from it.
type figure struct {
	ID, What, Unit, Source string
	Expected, Tolerance    float64
}

// figures are this program's results for the rows of [[figure]].
var figures = map[string]func(*testing.T) float64{
	"absorber-alone": func(t *testing.T) float64 {
		return one(t, fall18, NewAbsorber(Plateau{Force: 4000, Travel: 1.75})).AbsorberTravel
	},
	"rope-alone-peak": func(t *testing.T) float64 { return one(t, fall18, rope225).Peak },
	"rope-alone-time": func(t *testing.T) float64 { return one(t, fall18, rope225).StoppingTime },
	"rope-absorber-travel": func(t *testing.T) float64 {
		r := one(t, fall18, rope225, NewAbsorber(Plateau{Force: 4000, Travel: 0.45}))
		if r.Exhausted != 0 {
			t.Error("an absorber with 0.45 m is exhausted")
		}
		return r.AbsorberTravel
	},
	"rope-absorber-short-peak": func(t *testing.T) float64 {
		r := one(t, fall18, rope225, NewAbsorber(Plateau{Force: 4000, Travel: 0.40}))
		if r.Exhausted != 2 || r.FirstExhausted != 1 || !(r.EnergyLeft > 0) {
			t.Errorf("an absorber with 0.40 m: exhausted %b, first %d, energy left %v", r.Exhausted, r.FirstExhausted, r.EnergyLeft)
		}
		return r.Peak
	},
	"five-part-peak": func(t *testing.T) float64 { return one(t, fiveFall, fiveParts()...).Peak },
}

var (
	fall18  = Fall{Mass: 100, FreeFall: 1.8, Gravity: StandardGravity}
	rope225 = FromModulus(Rope, 22500, 2.5)

	fiveFall = Fall{Mass: 100, FreeFall: 1.6, Gravity: StandardGravity, Duration: 0.5}
)

// fiveParts is the path that the figures, the benchmarks and the peers share.
func fiveParts() []Part {
	const corner = 4000. / 60000
	points := []Point{{0, 0}, {corner, 4000}, {corner + 0.4, 4800}, {corner + 0.5, 12800}}
	return []Part{Loose(0.2), FromPoints(points, 100000), NewDashpot(150)}
}

func TestReference(t *testing.T) {
	var file struct {
		Check  []published
		Figure []figure
	}
	if _, err := toml.DecodeFile("../../testdata/reference/connector.toml", &file); err != nil {
		t.Fatal(err)
	}
	topics := map[string]int{}
	for i := range file.Check {
		r := &file.Check[i]
		topics[r.Topic]++
		method, can := expressed[r.ID]
		why, cannot := notExpressed[r.ID]
		switch {
		case can == cannot:
			t.Errorf("%s must be either expressed or not", r.ID)
		case cannot && why == "":
			t.Errorf("%s is not expressed, and nobody says why", r.ID)
		case can:
			want := r.Expected
			if !r.Agrees {
				want = r.Recomputed
			}
			if got := method(t, r); math.Abs(got-want) > r.Tolerance {
				t.Errorf("%s (%s): %v, want %v within %v %s", r.ID, r.Source, got, want, r.Tolerance, r.Unit)
			}
		}
	}
	if n := len(file.Check); n != 31 || n != len(expressed)+len(notExpressed) || topics["impact-factor"] != 10 || topics["sdof"] != 15 || topics["work-energy"] != 6 {
		t.Errorf("%d rows, %d expressed, %d not; by topic %v", n, len(expressed), len(notExpressed), topics)
	}
	t.Logf("%d rows: %d expressed, %d not", len(file.Check), len(expressed), len(notExpressed))
	for _, f := range file.Figure {
		if got := figures[f.ID](t); !closeTo(got, f.Expected, f.Tolerance) {
			t.Errorf("%s (%s): %v, want %v %s", f.ID, f.Source, got, f.Expected, f.Unit)
		}
	}
	if len(file.Figure) != len(figures) {
		t.Errorf("%d figures in the file, %d here", len(file.Figure), len(figures))
	}
}
