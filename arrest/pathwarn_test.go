package arrest

import (
	"math"
	"slices"
	"testing"

	"github.com/google/go-cmp/cmp"

	"arrestcheck/arrest/connector"
	"arrestcheck/arrest/quantity"
)

// aboutPaths are the warnings that only a connector path raises.
var aboutPaths = []WarningID{PathExhausted, PathExhaustedInAllowance, PathRigid, PathBeyondCurve, StaticStretchOnly,
	SeveralAbsorbers, AbsorberOnRetractable, NothingAbsorbs, NoAllowanceEntered, RatedAgainstModel, LedgersClose}

func pathWarnings(r *Result) (list []WarningID) {
	for _, w := range r.Warnings {
		if slices.Contains(aboutPaths, w.ID) {
			list = append(list, w.ID)
		}
	}
	return list
}

// Each path is told just what there is to say of it, and in this order. 100 kg
// fall 1.8 m unless the case says otherwise.
func TestWhatIsToldOfAPath(t *testing.T) {
	part := func(k connector.Kind, b Basis, length, give string) testPart {
		return testPart{kind: k, basis: b, length: length, give: give}
	}
	block := testPart{kind: connector.Retractable, force: "4 kN", travel: "1 m"}
	webbing := part(connector.Webbing, ByStiffness, "", "60 kN/m")
	plain := []WarningID{NoAllowanceEntered, LedgersClose}
	and := func(ids ...WarningID) []WarningID { return append(ids, plain...) }
	for _, c := range []struct {
		name  string
		fall  string
		parts []testPart
		want  []WarningID
	}{
		{"rope and absorber", "1.8 m", []testPart{ropePart, absorber("4 kN", "1 m")}, plain},
		{"absorber used up", "1.8 m", []testPart{ropePart, absorber("4 kN", "0.40 m")}, and(PathExhausted)},
		{"nothing behind the absorber", "1.8 m", []testPart{absorber("4 kN", "0.20 m")}, and(PathExhausted, PathRigid)},
		{"dynamic rope by its modulus", "1.8 m", []testPart{ropePart}, plain},
		{"dynamic rope by its impact force", "1.8 m", []testPart{part(connector.Rope, ByImpactForce, "2.5 m", "8.6 kN")}, plain},
		{"rope by a stiffness", "1.8 m", []testPart{part(connector.Rope, ByStiffness, "2.5 m", "9 kN/m")}, and(NothingAbsorbs)},
		{"webbing", "1.8 m", []testPart{webbing}, and(NothingAbsorbs)},
		{"webbing without a fall", "0 m", []testPart{webbing}, plain},
		{"wire rope by its modulus", "1.8 m", []testPart{part(connector.WireRope, ByModulus, "10 m", "1600 kN")}, and(NothingAbsorbs)},
		{"static stretch", "1.8 m", []testPart{part(connector.Rope, ByStaticStretch, "2.5 m", "8 %")}, and(StaticStretchOnly, NothingAbsorbs)},
		{"two absorbers", "1.8 m", []testPart{webbing, absorber("4 kN", "1 m"), absorber("5 kN", "1 m")}, and(SeveralAbsorbers)},
		{"absorber on a retractable", "1.8 m", []testPart{webbing, block, absorber("5 kN", "1 m")}, and(AbsorberOnRetractable)},
		{"retractable", "1.8 m", []testPart{webbing, block}, plain},
		{"two retractables", "1.8 m", []testPart{webbing, block, block}, plain},
	} {
		res := Evaluate(onPath(t, figures{mass: "100 kg", fall: c.fall}.job(t), FromLabel, c.parts...))
		if diff := cmp.Diff(c.want, pathWarnings(&res)); diff != "" {
			t.Errorf("%s: %s", c.name, diff)
		}
		if e := find(t, &res, PeakForce, Modelled); e.Beyond != slices.Contains(c.want, PathRigid) {
			t.Errorf("%s: beyond the model: %v", c.name, e.Beyond)
		}
	}
}

// A rope known by its static stretch alone is as stiff as 80 kg at rest make it:
// M-10 with the modulus 80 kg * g / stretch.
func TestStaticStretch(t *testing.T) {
	res := Evaluate(onPath(t, fall100(t), FromLabel, testPart{kind: connector.Rope, basis: ByStaticStretch, length: "2.5 m", give: "8 %"}))
	const g = StandardGravity
	want := connector.ElasticPeakFromRest(100*g, 80*g/0.08, 1.8/2.5)
	near(t, "peak", find(t, &res, PeakForce, Modelled).Value, want, 1e-12)
	near(t, "times the weight", find(t, &res, ForceOverWeight, Modelled).Value, want/(100*g), 1e-12)
	near(t, "net deceleration", find(t, &res, PeakDeceleration, Modelled).Value, want/100-g, 1e-12)
}

// A curve left at its last point is named, and its figures are beyond the model.
func TestCurveLeft(t *testing.T) {
	for force, beyond := range map[float64]bool{4000: true, 40000: false} {
		j := onPath(t, fall100(t), FromMeasured, testPart{kind: connector.Curve, basis: ByPoints})
		j.Point.Path.Parts[0].Points = []connector.Point{{Extension: 0, Force: 0}, {Extension: force / 40000, Force: force}}
		res := Evaluate(j)
		if hasWarning(&res, PathBeyondCurve) != beyond || find(t, &res, PeakForce, Modelled).Beyond != beyond {
			t.Errorf("last point at %v N: %v", force, pathWarnings(&res))
		}
	}
}

// The allowance is taken on the travel too: 0.4346 m of 0.45 m are used, and a
// quarter more is not there. The figures of the case were given with the method.
func TestTravelWithTheAllowance(t *testing.T) {
	for travel, short := range map[string]bool{"0.45 m": true, "0.60 m": false} {
		res := Evaluate(withAllowance(t, onPath(t, fall100(t), FromLabel, ropePart, absorber("4 kN", travel)), "25 %"))
		at := slices.IndexFunc(res.Warnings, func(w Warning) bool { return w.ID == PathExhaustedInAllowance })
		if at >= 0 != short || hasWarning(&res, PathExhausted) || hasWarning(&res, NoAllowanceEntered) {
			t.Errorf("%s: %v", travel, pathWarnings(&res))
		}
		if at >= 0 {
			near(t, "travel with the allowance", res.Warnings[at].Args[1].SI, 0.4346*1.25, 1e-3)
			near(t, "travel there is", res.Warnings[at].Args[2].SI, 0.45, 1e-12)
		}
	}
}

// What is left over in the ledgers is told as a share, and is rounding alone.
func TestLedgersAreToldAsShares(t *testing.T) {
	res := Evaluate(pathJobs(t)["rope alone"])
	at := slices.IndexFunc(res.Warnings, func(w Warning) bool { return w.ID == LedgersClose })
	if at < 0 {
		t.Fatal("nothing told of the ledgers")
	}
	l := res.Runs[0].Run.Ledger
	near(t, "momentum", res.Warnings[at].Args[0].SI+1, math.Abs(l.MomentumLeft)/math.Abs(l.Impulse)+1, 1e-15)
	near(t, "energy", res.Warnings[at].Args[1].SI+1, math.Abs(l.EnergyLeft)/(l.Before+math.Abs(l.Fallen))+1, 1e-15)
	for _, a := range res.Warnings[at].Args {
		if !(a.SI < 1e-12) {
			t.Errorf("a share of %v is left over", a.SI)
		}
	}
}

// The runs that are kept: as written where every figure has a middle, and where
// the peak is greatest if that is another point.
func TestRunsKept(t *testing.T) {
	for mass, want := range map[string][]Corner{
		"100 kg": {AtWritten}, "100 kg ± 5 kg": {AtWritten, AtHigh}, "95 kg .. 105 kg": {AtHigh},
	} {
		res := Evaluate(onPath(t, figures{mass: mass, fall: "1.8 m"}.job(t), FromLabel, ropePart))
		var got []Corner
		for _, r := range res.Runs {
			got = append(got, r.Corner)
		}
		if diff := cmp.Diff(want, got); diff != "" {
			t.Errorf("%s: %s", mass, diff)
		}
	}
}

// The rope's model comes to 6702 N: a document that promises less is
// contradicted, one that promises more is not, nor one whose conditions do not
// hold.
func TestDocumentAgainstTheModel(t *testing.T) {
	for _, c := range []struct {
		mass, peak string
		told       bool
	}{{"59 kg .. 140 kg", "6 kN", true}, {"59 kg .. 140 kg", "7 kN", false}, {"59 kg .. 90 kg", "6 kN", false}} {
		peak := parse(t, quantity.Force, c.peak)
		j := onPath(t, fall100(t), FromLabel, ropePart)
		j.Ratings = []Rating{{Document: "label", TotalMass: parse(t, quantity.Mass, c.mass), FreeFallAtMost: parse(t, quantity.Length, "2 m"), PeakForceAtMost: &peak}}
		res := Evaluate(j)
		if hasWarning(&res, RatedAgainstModel) != c.told {
			t.Errorf("%s, %s: told %v", c.mass, c.peak, !c.told)
		}
	}
}

// What a rated peak means for the lightest body, and that its figures are those
// of its own document and of no other. 59 kg in all is inside "59 kg .. 140 kg".
func TestRatedSeverity(t *testing.T) {
	peak := parse(t, quantity.Force, "6 kN")
	r := Rating{Document: "label", TotalMass: parse(t, quantity.Mass, "59 kg .. 140 kg"), FreeFallAtMost: parse(t, quantity.Length, "1.8 m"), PeakForceAtMost: &peak}
	j := figures{mass: "57 kg .. 100 kg", tools: "2 kg .. 5 kg", fall: "1.8 m", ratings: []Rating{r, r}}.job(t)
	first := len(j.Inputs)
	j.Inputs = append(j.Inputs, Input{Key: "rated[1].peak_force_at_most", Role: OfDocument}, Input{Key: "rated[2].peak_force_at_most", Role: OfDocument})
	res := Evaluate(j)
	if hasWarning(&res, RatingMassOutside) || hasWarning(&res, RatingFallOutside) {
		t.Error("equal figures lie inside the conditions")
	}
	near(t, "times the weight", find(t, &res, ForceOverWeight, Rated).High, 6000/(59*StandardGravity), 1e-12)
	near(t, "net deceleration", find(t, &res, PeakDeceleration, Rated).High, 6000.0/59-StandardGravity, 1e-12)
	var own []int
	for i := range res.Estimates {
		if e := &res.Estimates[i]; e.Quantity == PeakForce && e.Evidence == Rated {
			for k := range 2 {
				if slices.Contains(e.Uses, first+k) {
					own = append(own, k)
				}
			}
		}
	}
	if diff := cmp.Diff([]int{0, 1}, own); diff != "" {
		t.Errorf("documents that the rated peaks rest on: %s", diff)
	}
}

// The onset of a shape is its peak over the time of its rise; a shape that
// begins with its peak has none.
func TestOnsetOfShapes(t *testing.T) {
	for _, c := range []struct {
		pulse      Pulse
		rise, time float64
	}{{Constant, 0, nan}, {EarlyPeak, 0, nan}, {RisePlateau, 0, nan}, {RisingRamp, 0, 0.3}, {SpringLike, 0, 0.3}, {RisePlateau, 0.4, 0.12}} {
		var p Point
		At(&Case{Mass: 100, FreeFall: 1.8, Gravity: StandardGravity, Time: 0.3, Pulse: c.pulse, Rise: c.rise}, &p)
		if math.IsNaN(c.time) != math.IsNaN(p.Assumed.Onset) {
			t.Errorf("%v: onset %v", c.pulse, p.Assumed.Onset)
		} else if !math.IsNaN(c.time) {
			near(t, c.pulse.String(), p.Assumed.Onset, p.Assumed.Peak/c.time, 1e-14)
		}
	}
}

func TestRecordOfAQuantity(t *testing.T) {
	for _, q := range Quantities() {
		if r, ok := q.ID.Record(); !ok || r != q {
			t.Errorf("%s gives %+v", q.ID, r)
		}
	}
	if _, ok := Quantity("peak").Record(); ok {
		t.Error("peak is no quantity")
	}
}
