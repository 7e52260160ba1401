package study

import (
	"math"
	"testing"

	"arrestcheck/arrest"
	"arrestcheck/arrest/connector"
	"arrestcheck/arrest/quantity"
	"arrestcheck/limits"
)

// onRope is 100 kg over 1.8 m on 2.5 m of rope of modulus 22.5 kN and an
// absorber.
func onRope(t testing.TB, force, travel string) *arrest.Job {
	t.Helper()
	j := entries{"worker.mass": "100 kg ± 0 kg", "fall.free_fall": "1.8 m ± 0 m"}.job(t)
	for k, f := range []struct {
		key  string
		dim  quantity.Dimension
		text string
	}{
		{"connector[1].length", quantity.Length, "2.5 m"}, {"connector[1].modulus", quantity.Force, "22.5 kN"},
		{"connector[2].force", quantity.Force, force}, {"connector[2].travel", quantity.Length, travel},
	} {
		b := band(t, f.dim, f.text)
		set := func(c *arrest.Case, x float64) { c.Figures[k] = x }
		set(&j.Point, b.Low)
		j.Inputs = append(j.Inputs, arrest.Input{Key: f.key, Role: arrest.OfPart, Band: b, Source: arrest.FromLabel, Set: set})
	}
	none := arrest.NoFigure
	j.Point.Path = &arrest.PathPlan{Parts: []arrest.PlannedPart{
		{Name: "rope", Kind: connector.Rope, Basis: arrest.ByModulus, Length: 0, Give: 1, Force: none, Travel: none, Activate: none, Rise: none, Locking: none},
		{Name: "absorber", Kind: connector.Absorber, Length: none, Give: none, Force: 2, Travel: 3, Activate: none, Rise: none, Locking: none},
	}}
	return j
}

func withAllowance(t testing.TB, j *arrest.Job, text string) *arrest.Job {
	j.Inputs = append(j.Inputs, arrest.Input{Key: "model.allowance", Role: arrest.OfModel, Band: band(t, quantity.Ratio, text), Source: arrest.FromMeasured})
	return j
}

var modelledPeak = Column{Quantity: arrest.PeakForce, Evidence: arrest.Modelled}

func TestSweepOfAPathIsSingleChecks(t *testing.T) {
	for _, force := range []string{"4 kN", "3.5 kN .. 4.5 kN"} {
		j := withAllowance(t, onRope(t, force, "0.45 m"), "20 %")
		for key, xs := range map[string][]float64{
			"fall.free_fall": linear(t, 0, 4, 9), "connector[1].length": linear(t, 0.5, 4, 9), "connector[2].force": linear(t, 2000, 9000, 9),
		} {
			sameAsChecks(t, sweep(t, j, Plan{Axes: []Axis{{key, xs}}, Columns: Columns(j)}))
		}
	}
}

// Over the deployment force the peak has a valley where the travel is just not
// used up: less force uses the travel up, more is the peak itself. The peak
// there is the force, and all of the travel is used.
func TestValleyInTheDeploymentForce(t *testing.T) {
	j := onRope(t, "4 kN", "0.40 m")
	travel := Column{Quantity: arrest.AbsorberTravel, Evidence: arrest.Modelled}
	s := sweep(t, j, Plan{Axes: []Axis{{"connector[2].force", linear(t, 3000, 8000, 21)}}, Columns: []Column{modelledPeak, travel}})
	var valley *Turn
	for i := range s.Turns {
		if s.Turns[i].Column == 0 && !s.Turns[i].Greatest {
			valley = &s.Turns[i]
		}
	}
	if valley == nil {
		t.Fatalf("%+v", s.Turns)
	}
	near(t, "peak in the valley", valley.Y, valley.X, 1e-6)
	res, _, _, err := Check(j, nil, Move{"connector[2].force", valley.X})
	if err != nil {
		t.Fatal(err)
	}
	near(t, "travel in the valley", travel.in(&res).Value, 0.40, 1e-6)
}

// A limit is met by the modelled figure with the allowance, as limits.Assess
// compares it: put back, the demand is the limit.
func TestSolveCountsTheAllowance(t *testing.T) {
	j := withAllowance(t, onRope(t, "4 kN", "3 m"), "25 %")
	l := rule(t, "travel", arrest.AbsorberTravel, "0.6 m")
	a := solve(t, j, Question{Find: "fall.free_fall", Low: 0, High: 6, Goals: []Goal{{Limit: &l}}})
	s := only(t, a)
	near(t, "put back", s.Y, 0.6, 1e-12)
	if a.Goals[0].Allows != 0.25 {
		t.Errorf("%+v", a.Goals[0])
	}
	_, found, _, err := Check(j, set(l), Move{"fall.free_fall", s.X})
	if err != nil {
		t.Fatal(err)
	}
	near(t, "demand", found.Findings[0].Demand, 0.6, 1e-12)
	sw := sweep(t, j, Plan{Axes: []Axis{{"fall.free_fall", linear(t, 0.1, 6, 30)}}, Columns: []Column{a.Goals[0].Column}, Sets: set(l)})
	for _, c := range sw.Crossings {
		if c.End == TheHigh && c.X != s.X {
			t.Errorf("crossing at %v, solved %v", c.X, s.X)
		}
	}
	if len(sw.Crossings) != 2 {
		t.Errorf("%+v", sw.Crossings)
	}
}

// Backwards from an event through the whole path: the free fall that tears the
// absorber by 0.62 m. With nothing else stretching the closed form gives less.
func TestFreeFallBehindATravelOfThePath(t *testing.T) {
	a := solve(t, onRope(t, "4 kN", "2 m"), Question{Find: "fall.free_fall", Low: 0, High: 10,
		Goals: []Goal{{Of: arrest.AbsorberTravel, Target: 0.62}}})
	s := only(t, a)
	near(t, "put back", s.Y, 0.62, 1e-12)
	if bare := 0.62 * (4000 - 980.665) / 980.665; s.X <= bare || s.X > 1.5*bare {
		t.Errorf("%v with the rope, %v without", s.X, bare)
	}
}

// A device that is used up is no cap: measuring closer can settle it.
func TestExhaustedIsNotCapped(t *testing.T) {
	j := withAllowance(t, onRope(t, "4 kN", "0.40 m"), "5 %")
	j.Inputs[0].Source = arrest.NoSource
	f := newTrial(j, set(rule(t, "peak", arrest.PeakForce, "9 kN"))).assess()
	if got := ZoneOf(&f[0]); got != Undecided || f[0].Reasons[0].ID != limits.OpenInput {
		t.Errorf("%s: %+v", got, f[0].Reasons)
	}
}

func TestRankOfAPath(t *testing.T) {
	j := withAllowance(t, onRope(t, "3.8 kN .. 4.2 kN", "3 m"), "10 %")
	r := ranked(t, j, rule(t, "peak", arrest.PeakForce, "4.5 kN"))
	i := r.of(t, "connector[2].force")
	// The peak is the deployment force, compared with 10 % on it.
	near(t, "high", i.High, 4200*1.1, 1e-9)
	near(t, "± of the force", i.Tolerance.By, 4500/1.1-4000, 1e-7)
	for _, other := range r.Influences {
		if other.Key == "model.allowance" || math.IsNaN(other.Spread) {
			t.Errorf("%+v", other)
		}
	}
}
