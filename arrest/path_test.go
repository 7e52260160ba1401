package arrest

import (
	"errors"
	"fmt"
	"math"
	"testing"

	"arrestcheck/arrest/connector"
	"arrestcheck/arrest/quantity"
)

// A testPart is one part of a path with its figures as a user would write them.
type testPart struct {
	kind                    connector.Kind
	basis                   Basis
	length, give            string
	force, travel, activate string
	lifeline                bool
}

// onPath adds a connector path to a job, as the reader of files does.
func onPath(t testing.TB, j *Job, source Source, parts ...testPart) *Job {
	t.Helper()
	plan := &PathPlan{}
	n := 0
	figure := func(key string, d quantity.Dimension, text string) int {
		if text == "" {
			return NoFigure
		}
		k := n
		n++
		b := parse(t, d, text)
		set := func(c *Case, x float64) { c.Figures[k] = x }
		x := b.Value
		if math.IsNaN(x) {
			x = b.Low
		}
		set(&j.Point, x)
		j.Inputs = append(j.Inputs, Input{Key: key, Role: OfPart, Band: b, Source: source, Set: set})
		return k
	}
	giveDim := map[Basis]quantity.Dimension{ByStiffness: quantity.Stiffness, ByModulus: quantity.Force, ByImpactForce: quantity.Force, ByStaticStretch: quantity.Ratio}
	for i, p := range parts {
		key := func(s string) string { return fmt.Sprintf("connector[%d].%s", i+1, s) }
		plan.Parts = append(plan.Parts, PlannedPart{
			Name: p.kind.String(), Kind: p.kind, Basis: p.basis, Lifeline: p.lifeline,
			Length: figure(key("length"), quantity.Length, p.length), Give: figure(key("give"), giveDim[p.basis], p.give),
			Force: figure(key("force"), quantity.Force, p.force), Travel: figure(key("travel"), quantity.Length, p.travel),
			Activate: figure(key("activation"), quantity.Force, p.activate), Rise: NoFigure, Locking: NoFigure,
		})
	}
	j.Point.Path = plan
	return j
}

func withAllowance(t testing.TB, j *Job, text string) *Job {
	j.Inputs = append(j.Inputs, Input{Key: "model.allowance", Role: OfModel, Band: parse(t, quantity.Ratio, text), Source: FromMeasured})
	return j
}

func absorber(force, travel string) testPart {
	return testPart{kind: connector.Absorber, force: force, travel: travel}
}

var ropePart = testPart{kind: connector.Rope, basis: ByModulus, length: "2.5 m", give: "22.5 kN"}

func fall100(t testing.TB) *Job { return figures{mass: "100 kg", fall: "1.8 m"}.job(t) }

// pathJobs use every line of the working of paths.
func pathJobs(t testing.TB) map[string]*Job {
	return map[string]*Job{
		"absorber alone": onPath(t, fall100(t), FromLabel, absorber("4 kN", "1.75 m")),
		"rope alone":     onPath(t, fall100(t), FromLabel, ropePart),
		"rated rope":     onPath(t, fall100(t), FromLabel, testPart{kind: connector.Rope, basis: ByImpactForce, length: "2.5 m ± 0.1 m", give: "8.2 kN"}),
	}
}

// The figures below were given with the method, worked out apart from this
// program; the first is m*v^2/2/(F_a - W), the second W + sqrt(W^2 + 2*W*M*f).
func TestPathFigures(t *testing.T) {
	res := Evaluate(pathJobs(t)["absorber alone"])
	near(t, "absorber travel", find(t, &res, AbsorberTravel, Modelled).Value, 0.584631053, 1e-9)
	res = Evaluate(pathJobs(t)["rope alone"])
	near(t, "rope peak", find(t, &res, PeakForce, Modelled).Value, 6702.13770, 1e-9)
	near(t, "rope time", find(t, &res, StoppingTime, Modelled).Value, 0.183733356, 2e-9)
	near(t, "fall factor", find(t, &res, FallFactor, Given).Value, 1.8/2.5, 1e-15)
	res = Evaluate(onPath(t, fall100(t), FromLabel, ropePart, absorber("4 kN", "0.45 m")))
	near(t, "travel", find(t, &res, AbsorberTravel, Modelled).Value, 0.4346, 1e-4)
	if find(t, &res, PeakForce, Modelled).Exhausted || hasWarning(&res, PathExhausted) {
		t.Error("0.45 m is not exhausted")
	}
	res = Evaluate(onPath(t, fall100(t), FromLabel, ropePart, absorber("4 kN", "0.40 m")))
	near(t, "peak", find(t, &res, PeakForce, Modelled).Value, 4296.7, 2e-5)
	if !find(t, &res, PeakForce, Modelled).Exhausted || res.Warnings[0].ID != PathExhausted {
		t.Errorf("0.40 m is exhausted and told first: %v", res.Warnings)
	}
}

// The peak over the deployment force has a valley where the travel is just not
// used up: its least lies inside the band and not at a corner.
func TestTurningPointInTheDeploymentForce(t *testing.T) {
	res := Evaluate(onPath(t, fall100(t), FromLabel, ropePart, absorber("3 kN .. 8 kN", "0.40 m")))
	e := find(t, &res, PeakForce, Modelled)
	least := math.Inf(1)
	for f := 3000.0; f <= 8000; f += 0.5 {
		var p connector.Path
		var r connector.Result
		if err := p.Set(connector.FromModulus(connector.Rope, 22500, 2.5), connector.NewAbsorber(connector.Plateau{Force: f, Travel: 0.4})); err != nil {
			t.Fatal(err)
		}
		if err := connector.Run(&p, &connector.Fall{Mass: 100, FreeFall: 1.8, Gravity: StandardGravity}, &r); err != nil {
			t.Fatal(err)
		}
		least = min(least, r.Peak)
	}
	if e.Low > least*(1+1e-6) || e.Low < least*(1-1e-3) {
		t.Errorf("least peak %.9g, by trying 10,000 forces %.9g", e.Low, least)
	}
	if !e.Exhausted {
		t.Error("a part of the band is exhausted")
	}
}

func TestAllowanceWidensWhatIsCompared(t *testing.T) {
	j := withAllowance(t, onPath(t, fall100(t), FromLabel, absorber("4 kN", "1.75 m")), "25 %")
	res := Evaluate(j)
	e := find(t, &res, PeakForce, Modelled)
	low, high := e.Ends()
	if low != 3000 || high != 5000 || e.Low != 4000 || e.High != 4000 {
		t.Errorf("%g .. %g", low, high)
	}
	if hasWarning(&res, NoAllowanceEntered) {
		t.Error("the allowance was entered")
	}
}

// With h = 0 the peak of one elastic part is 2 W.
func TestSuddenLoadIsTwiceTheWeight(t *testing.T) {
	res := Evaluate(onPath(t, figures{mass: "100 kg", fall: "0 m"}.job(t), FromLabel, ropePart))
	near(t, "peak", find(t, &res, PeakForce, Modelled).Value, 2*100*StandardGravity, 1e-12)
}

func TestModelBelowTheFloorIsAContradiction(t *testing.T) {
	j := onPath(t, figures{mass: "100 kg", fall: "1.8 m", distance: "0.2 m"}.job(t), FromLabel, absorber("4 kN", "1.75 m"))
	res := Evaluate(j) // the floor over 0.2 m is 9806.65 N
	if len(res.Contradictions) == 0 || !hasWarning(&res, EstimatesDisjoint) {
		t.Error("a modelled peak below the floor is not told")
	}
}

func TestModelAllocatesOnce(t *testing.T) {
	j := onPath(t, fall100(t), FromLabel, ropePart, absorber("4 kN", "0.40 m"))
	var p Point
	At(&j.Point, &p)
	if n := testing.AllocsPerRun(100, func() { At(&j.Point, &p) }); n != 0 {
		t.Errorf("At with a path allocates %v times", n)
	}
}

func TestSeriesStaysNearThePeakTolerance(t *testing.T) {
	j := onPath(t, fall100(t), FromLabel, ropePart, absorber("4 kN", "0.40 m"))
	series, err := Series(&j.Point)
	if err != nil || len(series) < 10 {
		t.Fatalf("%d moments, %v", len(series), err)
	}
	peak := 0.0
	for i, s := range series {
		peak = max(peak, s.F)
		if i > 0 && s.Time < series[i-1].Time {
			t.Fatalf("time runs back at %d", i)
		}
	}
	near(t, "peak of the series", peak, 4296.7, 1e-3)
}

// A part that cannot be is named, and a path that can be is not refused.
func TestCheckNamesThePart(t *testing.T) {
	good := onPath(t, fall100(t), FromLabel, ropePart, absorber("4 kN", "0.40 m"))
	if err := good.Point.Path.Check(&good.Point); err != nil {
		t.Error(err)
	}
	bad := onPath(t, fall100(t), FromLabel, ropePart, absorber("4 kN", "0.40 m"))
	bad.Point.Path.Parts[1].Name = "tear-out pack"
	bad.Point.Figures[3] = 0 // the travel of the absorber
	err := bad.Point.Path.Check(&bad.Point)
	var part *PartError
	if !errors.As(err, &part) || part.Part != 2 || err.Error() != "part 2 (tear-out pack): a plateau needs a travel above zero" {
		t.Errorf("%v", err)
	}
	if err := (&PathPlan{}).Check(&bad.Point); err == nil || errors.As(err, &part) {
		t.Errorf("no part at all: %v", err)
	}
}

// 0.5846 m of travel, 0.60 m at hand: within 25 % for the error of the model the
// absorber may be used up, and the stop then ends in the rope; the greatest
// figure compared is that of a travel shortened by the allowance.
func TestExhaustedWithinTheAllowance(t *testing.T) {
	for _, c := range []struct {
		allowance string
		want      bool
	}{{"25 %", true}, {"4 %", true}, {"3 %", false}} {
		res := Evaluate(withAllowance(t, onPath(t, fall100(t), FromLabel, ropePart, absorber("4 kN", "0.45 m")), c.allowance))
		e := find(t, &res, PeakForce, Modelled)
		if e.Exhausted || hasWarning(&res, PathExhausted) || hasWarning(&res, PathExhaustedInAllowance) != c.want {
			t.Errorf("allowance %s: %+v", c.allowance, e)
		}
		if !c.want {
			continue
		}
		short := fmt.Sprintf("%.12g m", 0.45/(1+e.Allowance))
		alone := Evaluate(onPath(t, fall100(t), FromLabel, ropePart, absorber("4 kN", short)))
		hard := find(t, &alone, PeakForce, Modelled).High
		_, high := e.Ends()
		near(t, "compared", high, hard*(1+e.Allowance), 1e-9)
		if !(high > e.High*(1+e.Allowance)) {
			t.Errorf("allowance %s: the shortened travel changes nothing", c.allowance)
		}
	}
}

// Where the peak is the same all over a band the longest stop is shown too.
func TestLongestStopIsKept(t *testing.T) {
	j := onPath(t, figures{mass: "80 kg .. 120 kg", fall: "1.0 m .. 1.8 m"}.job(t), FromLabel, absorber("4 kN", "2 m"))
	res := Evaluate(j)
	e := find(t, &res, StoppingDistance, Modelled)
	last := res.Runs[len(res.Runs)-1]
	if last.Corner != AtLongest || last.Run.StoppingDistance != e.High || last.Case.Mass != 120 || last.Case.FreeFall != 1.8 {
		t.Errorf("%s: %g, want %g", last.Corner, last.Run.StoppingDistance, e.High)
	}
}
