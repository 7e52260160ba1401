package arrest

import (
	"math"
	"math/rand/v2"
	"strings"
	"testing"

	"arrestcheck/arrest/connector"
	"arrestcheck/arrest/quantity"
)

func label(t testing.TB) Rating {
	peak := parse(t, quantity.Force, "6 kN")
	return Rating{
		Document:  "label of the lanyard",
		TotalMass: parse(t, quantity.Mass, "59 kg .. 140 kg"), FreeFallAtMost: parse(t, quantity.Length, "1.8 m"),
		PeakForceAtMost: &peak,
	}
}

func TestRatingHoldsOnlyInsideItsConditions(t *testing.T) {
	for name, c := range map[string]struct {
		f       figures
		outside bool
		warning WarningID
	}{
		"inside":       {figures{mass: "100 kg ± 2 kg", fall: "1.7 m .. 1.8 m"}, false, ""},
		"too heavy":    {figures{mass: "152 kg", fall: "1.7 m .. 1.8 m"}, true, RatingMassOutside},
		"band leaves":  {figures{mass: "130 kg .. 141 kg", fall: "1.7 m"}, true, RatingMassOutside},
		"too light":    {figures{mass: "58 kg", fall: "1.7 m"}, true, RatingMassOutside},
		"with tools":   {figures{mass: "135 kg", tools: "0 kg .. 6 kg", fall: "1.7 m"}, true, RatingMassOutside},
		"too far":      {figures{mass: "100 kg", fall: "2.0 m"}, true, RatingFallOutside},
		"band too far": {figures{mass: "100 kg", fall: "1.7 m .. 1.81 m"}, true, RatingFallOutside},
		"moving":       {figures{mass: "100 kg", fall: "1.7 m", speed: "6 m/s"}, true, RatingFallOutside},
		"edge exact":   {figures{mass: "140 kg", fall: "1.8 m"}, false, ""},
	} {
		c.f.ratings = []Rating{label(t)}
		res := Evaluate(c.f.job(t))
		e := find(t, &res, PeakForce, Rated)
		if e.Outside != c.outside || math.IsNaN(e.High) != c.outside || c.outside && !hasWarning(&res, c.warning) {
			t.Errorf("%s: outside %v, high %v", name, e.Outside, e.High)
		}
		if !c.outside && (e.High != 6000 || e.Bound != AtMost || !math.IsNaN(e.Low) || !math.IsNaN(e.Value)) {
			t.Errorf("%s: a ceiling is no actual value: %+v", name, e)
		}
	}
}

// 310 lb over 6 ft in a travel of 12 in asks for a mean of 310*(1+6) = 2170
// lbf: a label that promises 1800 lbf cannot be right for this job.
func TestRatingContradictedByItsOwnTravel(t *testing.T) {
	peak, travel := parse(t, quantity.Force, "1800 lbf"), parse(t, quantity.Length, "12 in")
	r := Rating{
		Document: "label", TotalMass: parse(t, quantity.Mass, "130 lb .. 310 lb"), FreeFallAtMost: parse(t, quantity.Length, "6 ft"),
		PeakForceAtMost: &peak, TravelAtMost: &travel, TravelIsDeceleration: true,
	}
	res := Evaluate(figures{mass: "310 lb", fall: "6 ft", ratings: []Rating{r}}.job(t))
	if len(res.Contradictions) != 1 || res.Contradictions[0].A != res.Contradictions[0].B || res.Contradictions[0].Part {
		t.Fatalf("contradictions %+v", res.Contradictions)
	}
	w := res.Warnings[0]
	if w.ID != RatingContradicted {
		t.Fatalf("%+v", res.Warnings)
	}
	near(t, "floor", w.Args[1].SI, 2170*4.4482216152605, 1e-12)
	res = Evaluate(figures{mass: "200 lb .. 310 lb", fall: "6 ft", ratings: []Rating{r}}.job(t))
	if len(res.Contradictions) != 1 || !res.Contradictions[0].Part {
		t.Errorf("only the heavy end contradicts: %+v", res.Contradictions)
	}
}

func TestGivenFloorAgainstRatedCeiling(t *testing.T) {
	f := figures{mass: "100 kg", fall: "1.8 m", distance: "0.2 m", ratings: []Rating{label(t)}}
	res := Evaluate(f.job(t)) // F_d = 980.665*(1+9) = 9806.65 N > 6 kN
	if len(res.Contradictions) == 0 || res.Contradictions[0].Part || !hasWarning(&res, EstimatesDisjoint) {
		t.Errorf("a floor above the ceiling: %+v", res.Contradictions)
	}
	f.distance = "0.2 m .. 1.5 m"
	res = Evaluate(f.job(t))
	if len(res.Contradictions) == 0 || !res.Contradictions[0].Part || !hasWarning(&res, CeilingBelowFloor) {
		t.Errorf("a floor above the ceiling for a part: %+v", res.Contradictions)
	}
	f.distance = "1.0 m .. 1.5 m"
	if res = Evaluate(f.job(t)); len(res.Contradictions) != 0 {
		t.Errorf("no contradiction: %+v", res.Contradictions)
	}
}

func TestSameJobInCustomaryUnits(t *testing.T) {
	si := Evaluate(figures{mass: "45.359237 kg", tools: "4.5359237 kg", fall: "1.8288 m", distance: "1.0668 m", time: "0.3 s"}.job(t))
	us := Evaluate(figures{mass: "100 lb", tools: "10 lb", fall: "6 ft", distance: "42 in", time: "300 ms"}.job(t))
	if len(si.Estimates) != len(us.Estimates) {
		t.Fatal("not the same estimates")
	}
	for i := range si.Estimates {
		a, b := si.Estimates[i], us.Estimates[i]
		if a.Quantity != b.Quantity || quantity.Snap(a.Low) != quantity.Snap(b.Low) && !math.IsNaN(a.Low) {
			t.Errorf("%s: %.15g and %.15g", a.Quantity, a.Low, b.Low)
		}
	}
}

func TestTotalMassIsTheExactSum(t *testing.T) {
	res := Evaluate(figures{mass: "300 lb", tools: "10 lb", fall: "6 ft"}.job(t))
	if e := find(t, &res, TotalMass, Given); e.High != parse(t, quantity.Mass, "310 lb").High || e.Typed.Symbol != "lb" {
		t.Errorf("%.17g %q", e.High, e.Typed.Symbol)
	}
}

func TestFreeFallThatGivesTheSameSpeed(t *testing.T) {
	res := Evaluate(figures{mass: "100 kg", fall: "1.8 m", speed: "6 m/s"}.job(t))
	near(t, "free fall", find(t, &res, FreeFall, Given).High, 1.8+36/(2*StandardGravity), 1e-15)
	if !hasWarning(&res, RatingSpeedCounted) {
		t.Error("not told")
	}
}

func TestRangesHaveNoMiddle(t *testing.T) {
	res := Evaluate(figures{mass: "92 kg ± 1 kg", tools: "0 kg .. 10 kg", fall: "1.8 m ± 0 m", distance: "1 m ± 0 m"}.job(t))
	if e := find(t, &res, MeanForceOverDistance, Given); !math.IsNaN(e.Value) || !(e.Low < e.High) {
		t.Errorf("%+v", e)
	}
	if e := find(t, &res, FallSpeed, Given); math.IsNaN(e.Value) || e.Low != e.High {
		t.Errorf("%+v", e)
	}
	if !hasWarning(&res, NoMiddle) {
		t.Error("not told")
	}
}

func TestDecelerationDistanceIsAtMostTheStoppingDistance(t *testing.T) {
	res := Evaluate(figures{mass: "92 kg", fall: "1.8 m", distance: "1.0 m .. 1.1 m"}.job(t))
	e := find(t, &res, DecelerationDistance, Given)
	if e.Bound != AtMost || e.High != 1.1 || !math.IsNaN(e.Low) {
		t.Errorf("%+v", e)
	}
}

func TestOpenInputs(t *testing.T) {
	band := func(text string) quantity.Band { return parse(t, quantity.Mass, text) }
	for _, c := range []struct {
		role   Role
		source Source
		text   string
		want   OpenReason
	}{
		{OfWorker, FromMeasured, "92 kg ± 1 kg", Settled},
		{OfWorker, FromMeasured, "92 kg ± 0 kg", Settled},
		{OfWorker, FromPlan, "0 kg .. 10 kg", Settled},
		{OfWorker, FromDrawing, "0 kg", Settled},
		{OfWorker, FromPlan, "0 kg", Settled},
		{OfWorker, NoSource, "0 kg", OpenNoSource},
		{OfWorker, FromMeasured, "92 kg", OpenNoTolerance},
		{OfWorker, FromLabel, "92 kg ± 1 kg", OpenSource},
		{OfWorker, FromStandard, "92 kg ± 1 kg", OpenSource},
		{OfWorker, FromAssumed, "92 kg ± 1 kg", OpenSource},
		{OfFall, FromDrawing, "1 kg .. 2 kg", Settled},
		{OfStop, FromPlan, "1 kg .. 2 kg", OpenSource},
		{OfStop, FromDrawing, "1 kg .. 2 kg", OpenSource},
		{OfStop, FromLabel, "1 kg .. 2 kg", OpenSource},
		{OfStop, FromMeasured, "1 kg .. 2 kg", Settled},
		{OfStop, FromMeasured, "1 kg", OpenNoTolerance},
		{OfDocument, NoSource, "1 kg", Settled},
		{OfPlace, NoSource, "1 kg", Settled},
	} {
		in := Input{Role: c.role, Source: c.source, Band: band(c.text)}
		if over := (&Input{Role: c.role, Source: c.source, Band: in.Band, Overridden: true}); over.Open() != OpenNoSource {
			t.Errorf("%v: a figure of the command line is settled", c.role)
		}
		if got := in.Open(); got != c.want {
			t.Errorf("%v %q %q: %q, want %q", c.role, c.source, c.text, got, c.want)
		}
	}
}

// What settles a layout: a tape, a drawing or a plan, and of the connector itself
// its label; and a clearance: anything that somebody stands for, but for the
// travel to rest a measurement or a document. A margin is one figure.
func TestOpenClearance(t *testing.T) {
	for _, c := range []struct {
		key    string
		role   Role
		source Source
		text   string
		want   OpenReason
	}{
		{"layout.anchor_height", OfLayout, FromPlan, "1 m ± 1 cm", Settled},
		{"layout.anchor_height", OfLayout, FromLabel, "1 m ± 1 cm", OpenSource},
		{"layout.anchor_height", OfLayout, FromMeasured, "1 m", OpenNoTolerance},
		{"layout.connector_length", OfLayout, FromLabel, "1 m ± 1 cm", Settled},
		{"layout.travel_before_locking", OfLayout, FromStandard, "0 m .. 1 m", Settled},
		{"clearance.harness_stretch", OfClearance, FromPlan, "0.3 m ± 0 m", Settled},
		{"clearance.harness_stretch", OfClearance, FromAssumed, "0.3 m ± 0 m", OpenSource},
		{DecelerationItem, OfClearance, FromPlan, "1 m ± 0 m", OpenSource},
		{DecelerationItem, OfClearance, FromLabel, "0 m .. 1 m", Settled},
		{"clearance.margin", OfClearance, FromStandard, "1 m", Settled},
		{"clearance.margin", OfClearance, FromAssumed, "1 m", OpenSource},
	} {
		in := Input{Key: c.key, Role: c.role, Source: c.source, Band: parse(t, quantity.Length, c.text)}
		if got := in.Open(); got != c.want {
			t.Errorf("%s %q %q: %q, want %q", c.key, c.source, c.text, got, c.want)
		}
	}
}

// Scaling: twice the mass doubles the forces and leaves ratio and deceleration;
// the mean over the distance goes to the weight as the distance grows.
func TestScalingAndLimits(t *testing.T) {
	r := rand.New(rand.NewPCG(9, 10))
	var p, q Point
	for range 1000 {
		c := randomCase(r)
		At(&c, &p)
		twice := c
		twice.Mass, twice.Tools = 2*c.Mass, 2*c.Tools
		At(&twice, &q)
		near(t, "mean over distance", q.MeanOverDistance, 2*p.MeanOverDistance, 1e-14)
		near(t, "mean over time", q.MeanOverTime, 2*p.MeanOverTime, 1e-14)
		near(t, "ratio", q.ShapeRatio, p.ShapeRatio, 1e-14)
		if !p.Impossible {
			near(t, "floor", q.Floor, 2*p.Floor, 1e-13)
		}
		c.Distance = 1e9
		At(&c, &p)
		near(t, "far stop", p.MeanOverDistance, p.Weight, 1e-7)
		c.Distance = 0.7
		c.Time = 2 * c.Distance / p.Speed
		At(&c, &p)
		near(t, "t = 2d/v, means", p.MeanOverTime, p.MeanOverDistance, 1e-12)
		near(t, "t = 2d/v, floor", p.Floor, p.MeanOverDistance, 1e-12)
	}
}

func TestWarningsAboutTheRatio(t *testing.T) {
	for _, c := range []struct {
		time string
		want []WarningID
	}{
		{"0.30 s", []WarningID{ForceLate}},
		{"0.36016 s", []WarningID{RoutesAgreeClosely}},
		{"0.180 s", []WarningID{ForceLate, RatioNearHalf}},
		{"0.50 s", []WarningID{ForceEarly}},
		{"0.30 s .. 0.45 s", []WarningID{RatioUndecided}},
	} {
		f := figures{mass: "100 kg", fall: "1.8 m", distance: "1.07 m", time: c.time}
		if c.time == "0.180 s" {
			f.distance = "1.0695 m"
		}
		res := Evaluate(f.job(t))
		for _, id := range c.want {
			if !hasWarning(&res, id) {
				t.Errorf("%s: %s not told: %v", c.time, id, res.Warnings)
			}
		}
	}
}

func TestEveryWarningIsReached(t *testing.T) {
	reached := map[WarningID]bool{}
	take := func(f figures, change func(*Job)) {
		j := f.job(t)
		if change != nil {
			change(j)
		}
		res := Evaluate(j)
		for _, w := range res.Warnings {
			reached[w.ID] = true
		}
	}
	base := figures{mass: "100 kg", fall: "1.8 m"}
	take(base, nil)
	take(base, func(j *Job) { j.Example, j.Persons = true, 2 })
	take(figures{mass: "100 kg", fall: "7 m .. 8 m", distance: "1 m", gravity: "9.80 m/s2", speed: "1 m/s"}, nil)
	take(figures{mass: "100 kg", fall: "1.8 m", distance: "1.00 m .. 1.07 m", time: "0.15 s"}, nil)
	take(figures{mass: "100 kg", fall: "1.8 m", distance: "0.99 m", time: "0.15 s"}, nil)
	for _, tm := range []string{"0.30 s", "0.36016 s", "0.50 s", "0.30 s .. 0.45 s", "0.18 s"} {
		take(figures{mass: "100 kg", fall: "1.8 m", distance: "1.07 m", time: tm}, nil)
	}
	take(figures{mass: "100 kg", fall: "1.8 m", distance: "1.07 m", time: "0.30 s", pulse: RisingRamp}, nil)
	take(figures{mass: "100 kg", fall: "1.8 m", distance: "1.07 m", pulse: RisingRamp}, nil)
	for _, d := range []string{"0.2 m", "0.2 m .. 1.5 m"} {
		take(figures{mass: "152 kg", fall: "2 m", distance: d, ratings: []Rating{label(t)}}, nil)
		take(figures{mass: "100 kg", fall: "1.8 m", distance: d, ratings: []Rating{label(t)}}, nil)
	}
	short := label(t)
	travel := parse(t, quantity.Length, "0.1 m")
	short.TravelAtMost = &travel
	take(figures{mass: "100 kg", fall: "1.8 m", ratings: []Rating{short}}, nil)
	heavy := testPart{kind: connector.WireRope, basis: ByStiffness, give: "500 kN/m"}
	curve := testPart{kind: connector.Curve, basis: ByPoints}
	for _, parts := range [][]testPart{
		{ropePart, absorber("4 kN", "0.2 m"), absorber("5 kN", "0.1 m")},
		{absorber("4 kN", "0.2 m")}, {absorber("500 N", "0.2 m")}, {heavy}, {curve},
		{{kind: connector.Rope, basis: ByStaticStretch, length: "10 m", give: "8 %"}},
		{absorber("4 kN", "1 m"), {kind: connector.Retractable, force: "4 kN", travel: "1 m"}},
		{{kind: connector.Absorber, force: "500 N", travel: "1000 m"}},
	} {
		take(figures{mass: "100 kg", fall: "1.8 m", ratings: []Rating{label(t)}}, func(j *Job) {
			onPath(t, j, FromLabel, parts...)
			if parts[0].basis == ByPoints {
				j.Point.Path.Parts[0].Points = []connector.Point{{}, {Extension: 0.1, Force: 1000}}
			}
		})
	}
	take(base, func(j *Job) {
		withAllowance(t, onPath(t, j, FromLabel, absorber("4 kN", "0.60 m")), "25 %")
	})
	for _, j := range layoutJobs(t) {
		res := Evaluate(j)
		for _, w := range res.Warnings {
			reached[w.ID] = true
		}
	}
	take(base, func(j *Job) { j.Notes = []Warning{{ID: Unusual}} })
	for _, id := range WarningIDs() {
		if !reached[id] {
			t.Errorf("%s is never told", id)
		}
	}
}

func TestContradictionsAreNotAveraged(t *testing.T) {
	res := Evaluate(figures{mass: "100 kg", fall: "1.8 m", distance: "0.2 m", ratings: []Rating{label(t)}}.job(t))
	n := 0
	for _, e := range res.Estimates {
		if e.Quantity == PeakForce {
			n++
		}
	}
	if n != 2 {
		t.Errorf("%d estimates of the peak, want both side by side", n)
	}
	if !strings.Contains(find(t, &res, PeakForce, Rated).From, "label") {
		t.Error("the document is not named")
	}
}
