package arrest

import (
	"math"
	"math/rand/v2"
	"testing"

	"github.com/google/go-cmp/cmp"

	"arrestcheck/arrest/connector"
	"arrestcheck/arrest/quantity"
)

// missed is the share of the spread by which a random point may lie beyond an
// end that is searched for and not proved. These outputs jump where an absorber
// is just used up, and the search goes along one input at a time.
var missed = map[Quantity]float64{ForceOverWeight: 0.003, PeakDeceleration: 0.003, OnsetRate: 0.04}

// The ends over a box hold what random points of the box come to, for every
// output of the model, and lie not far beyond them.
func TestPathSpansHoldRandomPoints(t *testing.T) {
	r := rand.New(rand.NewPCG(3, 5))
	for name, j := range map[string]*Job{
		"absorber that is used up in part": onPath(t, figures{mass: "95 kg .. 105 kg", fall: "1.6 m .. 1.9 m"}.job(t), FromLabel,
			testPart{kind: connector.Rope, basis: ByModulus, length: "2.5 m", give: "20 kN .. 25 kN"}, absorber("3 kN .. 8 kN", "0.30 m .. 0.45 m")),
		"elastic": onPath(t, figures{mass: "95 kg .. 105 kg", fall: "0.5 m .. 1.9 m"}.job(t), FromLabel,
			testPart{kind: connector.Webbing, basis: ByStiffness, give: "40 kN/m .. 80 kN/m"}),
	} {
		res := Evaluate(j)
		least, greatest := make([]float64, len(outputs)), make([]float64, len(outputs))
		for i := range outputs {
			least[i], greatest[i] = math.Inf(1), math.Inf(-1)
		}
		var p Point
		for range 20000 {
			c := pointInside(r, j)
			At(&c, &p)
			for i := range outputs {
				if outputs[i].evidence == Modelled {
					x := outputs[i].of(&p)
					least[i], greatest[i] = min(least[i], x), max(greatest[i], x)
				}
			}
		}
		held := 0
		for i := range outputs {
			at := res.estimate(outputs[i].quantity, Modelled)
			if outputs[i].evidence != Modelled || at < 0 {
				continue
			}
			held++
			e, spread := &res.Estimates[at], greatest[i]-least[i]
			below, above := (e.Low-least[i])/spread, (greatest[i]-e.High)/spread
			if most := missed[e.Quantity] + 1e-9; below > most || above > most || below < -0.04 || above < -0.04 {
				t.Errorf("%s: %s is %v..%v, random points %v..%v", name, e.Quantity, e.Low, e.High, least[i], greatest[i])
			}
		}
		if held < 8 {
			t.Errorf("%s: only %d outputs", name, held)
		}
	}
}

// pointInside draws a point of the box, on its faces and corners too: ends are
// often there.
func pointInside(r *rand.Rand, j *Job) Case {
	c := j.Point
	for k := range j.Inputs {
		if in := &j.Inputs[k]; in.Set != nil {
			x := r.Float64()
			if r.IntN(3) == 0 {
				x = float64(r.IntN(2))
			}
			in.Set(&c, in.Band.Low+x*(in.Band.High-in.Band.Low))
		}
	}
	return c
}

// One constant force, whatever it is, makes both means equal: the ratio of the
// routes is 1. A spring's is v*t/(2*d) of the closed forms of M-10.
func TestRatioOfTheModel(t *testing.T) {
	res := Evaluate(pathJobs(t)["absorber alone"])
	near(t, "absorber", find(t, &res, ShapeRatio, Modelled).Value, 1, 1e-12)
	res = Evaluate(pathJobs(t)["rope alone"])
	v, k := connector.FallSpeed(0, 1.8, StandardGravity), 22500/2.5
	want := v * connector.ElasticStopTime(100, v, k, StandardGravity) / 2 / connector.ElasticStretch(100, v, k, StandardGravity)
	near(t, "rope", find(t, &res, ShapeRatio, Modelled).Value, want, 1e-12)
}

// Of several runs over the bands the notes keep the one with the most energy
// left when a part was used up, the first of equal ones, and every trouble.
func TestNotesOfRuns(t *testing.T) {
	run := func(first int, left, peak float64, status connector.Status) *PathRun {
		m := &PathRun{}
		m.Run.FirstExhausted, m.Run.EnergyLeft, m.Run.Peak, m.Run.Status = first, left, peak, status
		return m
	}
	var n pathNotes
	n.note(run(-1, math.NaN(), 9000, connector.Stopped))
	if n.exhausted || n.rigid {
		t.Fatalf("nothing happened yet: %+v", n)
	}
	n.note(run(0, 10, 5000, connector.Stopped))
	n.note(run(2, 30, 6000, connector.Stopped))
	n.note(run(1, 30, 7000, connector.Stopped))
	n.note(run(1, 20, 8000, connector.Stopped))
	if !n.exhausted || n.part != 2 || n.left != 30 || n.peak != 6000 || n.rigid {
		t.Errorf("%+v", n)
	}
	for _, status := range []connector.Status{connector.Rigid, connector.Endless} {
		var n pathNotes
		n.note(run(-1, math.NaN(), 0, status))
		n.note(run(-1, math.NaN(), 0, connector.Stopped))
		if !n.rigid {
			t.Errorf("status %v is not told", status)
		}
	}
}

// The record of a method is the one of its id, has no formula twice, and no
// other id has one.
func TestMethodByID(t *testing.T) {
	for _, m := range Methods() {
		if got, ok := MethodByID(m.ID); !ok || got.ID != m.ID || got.Title != m.Title {
			t.Errorf("%s gives %q", m.ID, got.ID)
		}
		seen := map[string]bool{}
		for _, f := range m.Formulas {
			if seen[f] {
				t.Errorf("%s has the formula %q twice", m.ID, f)
			}
			seen[f] = true
		}
	}
	if m, _ := MethodByID("M-12"); len(m.Formulas) != 1 || m.Formulas[0] != "x_a = m*v^2/2/(F_a - W)" {
		t.Errorf("M-12 has the formulas %q", m.Formulas)
	}
	if _, ok := MethodByID("M-999"); ok {
		t.Error("M-999 is a method")
	}
}

// The direction of an impulse is known as long as each of its components keeps
// its sign; zero is of either.
func TestDirectionOverBands(t *testing.T) {
	for x, known := range map[string]bool{"0 m/s .. 3 m/s": true, "-3 m/s .. 0 m/s": true, "-1 m/s .. 3 m/s": false} {
		res := Evaluate(loadFigures{mass: "65 kg", before: []string{x, "-9 m/s"}, after: []string{"0 m/s", "0 m/s"}}.job(t))
		if at := res.estimate(ImpulseDirection, Given); at >= 0 != known {
			t.Errorf("%s: direction known: %v", x, at >= 0)
		}
	}
}

// A figure rests on the masses, whether or not At reads each of them, but never
// on gravity, which is a constant of the place, nor on a document.
func TestWhatAFigureRestsOn(t *testing.T) {
	j := figures{mass: "100 kg", fall: "1.8 m", distance: "1 m"}.job(t)
	other := Input{Key: "worker[2].mass", Role: OfWorker, Band: parse(t, quantity.Mass, "90 kg")}
	document := Input{Key: "rated[1].total_mass", Role: OfDocument, Band: parse(t, quantity.Mass, "59 kg .. 140 kg")}
	j.Inputs = append(j.Inputs, other, document)
	res := Evaluate(j)
	var keys []string
	for _, i := range find(t, &res, MeanForceOverDistance, Given).Uses {
		keys = append(keys, j.Inputs[i].Key)
	}
	if diff := cmp.Diff([]string{"worker.mass", "worker.tools", "worker[2].mass", "fall.free_fall", "stop.distance"}, keys); diff != "" {
		t.Error(diff)
	}
}
