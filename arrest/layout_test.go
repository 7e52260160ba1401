package arrest

import (
	"fmt"
	"math"
	"math/rand/v2"
	"strings"
	"testing"

	"arrestcheck/arrest/connector"
	"arrestcheck/arrest/quantity"
	"arrestcheck/arrest/rig"
)

// A testLayout is a layout as a user would write it; an empty text is a figure
// that is not there.
type testLayout struct {
	anchor, behind, dring, feet, width, length, slack, locking string
	edge                                                       rig.Edge
	rated                                                      string
	positions                                                  [][2]string // along, out
	obstacles                                                  []testObstacle
	datum                                                      rig.Datum
	items                                                      map[rig.Item]string
	includes                                                   map[rig.Item]rig.Items
}

type testObstacle struct {
	below, height string
	sides         [4]string
	moving        bool
	stopOver      string
}

// overhead is the layout with the anchor 3 m above the surface.
func overhead(along string) testLayout {
	return testLayout{anchor: "3.0 m", dring: "1.5 m", length: "2.0 m", slack: "0 m", positions: [][2]string{{along, "0 m"}}}
}

// layOut puts a layout into a job. A free fall that is typed stays beside it.
func layOut(t testing.TB, j *Job, tl testLayout) *Job {
	t.Helper()
	next := 24 // behind the figures of a path
	position := 0
	add := func(key, text string, role Role) int {
		if text == "" {
			return NoFigure
		}
		n := next
		next++
		in := Input{Key: key, Role: role, Band: parse(t, quantity.Length, text), Source: FromMeasured, Position: position,
			Set: func(c *Case, x float64) { c.Figures[n] = x }}
		written := in.Band.Value
		if math.IsNaN(written) {
			written = in.Band.Low
		}
		in.Set(&j.Point, written)
		j.Inputs = append(j.Inputs, in)
		return n
	}
	of := func(name, text string) int { return add("layout."+name, text, OfLayout) }
	plan := &LayoutPlan{Edge: tl.edge, RatedBy: tl.rated,
		AnchorHeight: of("anchor_height", tl.anchor), BehindEdge: of("anchor_behind_edge", tl.behind), DRing: of("d_ring_height", tl.dring),
		Feet: of("d_ring_to_feet", tl.feet), HalfWidth: of("half_width", tl.width), Length: of("connector_length", tl.length),
		Slack: of("slack", tl.slack), Locking: of("travel_before_locking", tl.locking)}
	for i, p := range tl.positions {
		position = i + 1
		key := fmt.Sprintf("position[%d].", i+1)
		plan.Positions = append(plan.Positions, PlannedPosition{fmt.Sprintf("place %d", i+1), add(key+"along", p[0], OfLayout), add(key+"out", p[1], OfLayout)})
	}
	position = 0
	for i, o := range tl.obstacles {
		key := fmt.Sprintf("obstacle[%d].", i+1)
		po := PlannedObstacle{Name: fmt.Sprintf("thing %d", i+1), Moving: o.moving,
			Below: add(key+"below", o.below, OfLayout), Height: add(key+"height", o.height, OfLayout), StopOver: add(key+"stop_over", o.stopOver, OfLayout)}
		for k, to := range [...]*int{&po.AlongFrom, &po.AlongTo, &po.OutFrom, &po.OutTo} {
			*to = add(key+[...]string{"along_from", "along_to", "out_from", "out_to"}[k], o.sides[k], OfLayout)
		}
		plan.Obstacles = append(plan.Obstacles, po)
	}
	if tl.datum != 0 {
		plan.Clearance = &ClearancePlan{Datum: tl.datum}
		for it := range rig.ItemCount {
			key := "clearance." + strings.ReplaceAll(ItemWord(it), " ", "_")
			if n := add(key, tl.items[it], OfClearance); n != NoFigure {
				plan.Clearance.Items = append(plan.Clearance.Items, PlannedItem{it, n, tl.includes[it]})
			}
		}
	}
	for i := range j.Inputs {
		if j.Inputs[i].Key == "fall.free_fall" {
			j.Inputs[i].Set = nil
		}
	}
	j.Point.Layout = plan
	return j
}

// laidOutJob is a job of 100 kg on a layout, without a typed free fall.
func laidOutJob(t testing.TB, tl testLayout) *Job {
	t.Helper()
	return layOut(t, figures{mass: "100 kg", source: FromMeasured}.job(t), tl)
}

// given returns the estimate of a quantity by an evidence.
func given(t testing.TB, r *Result, q Quantity, e Evidence) *Estimate {
	t.Helper()
	i := r.estimate(q, e)
	if i < 0 {
		t.Fatalf("no %s estimate of %s", e, q)
	}
	return &r.Estimates[i]
}

// The figures are those of plane trigonometry: sqrt(2^2 - 1.2^2) = 1.6, and so
// on, exact in decimals but for the angles (python decimal, 30 digits).
func TestLayoutOfOneJob(t *testing.T) {
	degrees := math.Pi / 180
	for _, c := range []struct {
		name string
		tl   testLayout
		want map[Quantity]float64
	}{
		{"anchor above, to the side", overhead("1.2 m"), map[Quantity]float64{
			FreeFall: 0.1, SwingAngle: 36.8698976458440 * degrees, OffsetAngle: 38.6598082540901 * degrees, SwingDrop: 0.4,
		}},
		{"anchor at the feet", testLayout{anchor: "0 m", dring: "1.5 m", length: "1.8 m", slack: "0 m", positions: [][2]string{{"0 m", "0 m"}}}, map[Quantity]float64{
			FreeFall: 3.3, SwingDrop: 0, OffsetAngle: math.Pi,
		}},
		{"over an edge", testLayout{anchor: "0 m", behind: "1 m", edge: rig.RoundEdge, dring: "1.5 m", length: "2 m", slack: "0 m", positions: [][2]string{{"0 m", "0 m"}}}, map[Quantity]float64{
			FreeFall: 2.5, RestraintReach: 2,
		}},
		{"30 degree rule", testLayout{anchor: "3 m", dring: "1.5 m", length: "2.2 m", slack: "0 m", positions: [][2]string{{"0 m", "1 m"}}}, map[Quantity]float64{
			OffsetAngle: 33.6900675259798 * degrees,
		}},
		{"retractable", testLayout{anchor: "3 m", dring: "1.5 m", length: "6 m", locking: "0.6 m", positions: [][2]string{{"0 m", "0 m"}}}, map[Quantity]float64{
			FreeFall: 0.6,
		}},
	} {
		res := Evaluate(laidOutJob(t, c.tl))
		for q, want := range c.want {
			e := given(t, &res, q, Given)
			if math.Abs(e.Value-want) > 1e-12 || e.Low != e.Value || e.High != e.Value {
				t.Errorf("%s: %s = %.12g (%.12g .. %.12g), want %.12g", c.name, q, e.Value, e.Low, e.High, want)
			}
		}
	}
}

// Lengths that a tape gives add up as they do on paper: 3 - 1.5 is 1.5 less than
// 1.6 by 0.1 and no bit more, and 1.36 + 0.5 - 1 is 0.86.
func TestLengthsAddUpAsOnPaper(t *testing.T) {
	for _, c := range []struct {
		tl   testLayout
		want float64
	}{
		{overhead("1.2 m"), 0.1},
		{testLayout{anchor: "1 m", dring: "1.36 m", length: "0.5 m", slack: "0 m", positions: [][2]string{{"0 m", "0 m"}}}, 0.86},
		{testLayout{anchor: "1 ft", dring: "5 ft", length: "6 ft", slack: "0 ft", positions: [][2]string{{"0 ft", "0 ft"}}}, 3.048}, // 10 ft
	} {
		res := Evaluate(laidOutJob(t, c.tl))
		if e := given(t, &res, FreeFall, Given); e.Value != c.want || e.High != c.want || e.Low != c.want {
			t.Errorf("%v, want %v exactly", e.Value, c.want)
		}
	}
}

// The free fall of a layout goes into everything as a typed one does.
func TestLayoutFallIsTypedFall(t *testing.T) {
	parts := []testPart{ropePart, absorber("4 kN", "1.2 m")}
	f := figures{mass: "100 kg", fall: "3.3 m", distance: "1.1 m", time: "0.5 s", ratings: []Rating{label(t)}}
	plain := f.job(t)
	onPath(t, plain, FromLabel, parts...)
	want := Evaluate(plain)
	f.fall = ""
	laid := f.job(t)
	onPath(t, laid, FromLabel, parts...)
	layOut(t, laid, testLayout{anchor: "0 m", dring: "1.5 m", length: "1.8 m", slack: "0 m", positions: [][2]string{{"0 m", "0 m"}}})
	got := Evaluate(laid)
	for i := range want.Estimates {
		w := &want.Estimates[i]
		k := got.estimate(w.Quantity, w.Evidence)
		if k < 0 {
			t.Errorf("no %s of %s", w.Evidence, w.Quantity)
			continue
		}
		g := &got.Estimates[k]
		for _, pair := range [...][2]float64{{g.Low, w.Low}, {g.High, w.High}, {g.Value, w.Value}, {g.Reach, w.Reach}} {
			if math.IsNaN(pair[0]) != math.IsNaN(pair[1]) || math.Abs(pair[0]-pair[1]) > 1e-12*math.Abs(pair[1]) {
				t.Errorf("%s %s: %v, want %v", w.Evidence, w.Quantity, *g, *w)
			}
		}
	}
}

// Of several positions the worst counts for each figure and is named.
func TestWorstPositionGoverns(t *testing.T) {
	tl := overhead("0 m")
	tl.positions = [][2]string{{"0 m", "0 m"}, {"1.2 m", "0 m"}, {"0.5 m ± 0.1 m", "0 m"}}
	res := Evaluate(laidOutJob(t, tl))
	fall, drop := given(t, &res, FreeFall, Given), given(t, &res, SwingDrop, Given)
	if fall.Place != "place 1" || math.Abs(fall.High-0.5) > 1e-15 || math.Abs(fall.Low-0.5) > 1e-15 {
		t.Errorf("free fall %v of %q", *fall, fall.Place)
	}
	if drop.Place != "place 2" || math.Abs(drop.High-0.4) > 1e-15 || math.Abs(drop.Low-0.4) > 1e-15 {
		t.Errorf("drop of the swing %v of %q", *drop, drop.Place)
	}
	if res.Layout.Worst != 0 || len(res.Layout.Places) != 3 {
		t.Errorf("worst %d of %d", res.Layout.Worst, len(res.Layout.Places))
	}
}

// A typed free fall that no point of the layout has is a contradiction; one
// that some have is none.
func TestTypedFallAgainstLayout(t *testing.T) {
	for fall, want := range map[string]bool{"0.1 m": false, "0.05 m .. 0.2 m": false, "0.5 m": true} {
		j := layOut(t, figures{mass: "100 kg", fall: fall}.job(t), overhead("1.2 m"))
		res := Evaluate(j)
		found := false
		for _, c := range res.Contradictions {
			found = found || res.Estimates[c.A].Quantity == FreeFall
		}
		// 0.1 m typed and 3 - 1.5 less 1.6 differ in their last bit.
		if fall != "0.1 m" && found != want {
			t.Errorf("%s: contradiction %v, want %v", fall, found, want)
		}
	}
}

// The room: every item once, from either datum, by hand.
func TestClearanceOfALayout(t *testing.T) {
	tl := overhead("0 m")
	tl.datum, tl.feet = rig.BelowFeet, "1.5 m"
	tl.items = map[rig.Item]string{rig.ItemDeceleration: "1.0 m ± 0.1 m", rig.ItemLineStretch: "0 m", rig.ItemHarness: "0.3 m", rig.ItemAnchor: "0 m", rig.ItemMargin: "1 m"}
	tl.obstacles = []testObstacle{{below: "4 m"}, {below: "3 m"}}
	res := Evaluate(laidOutJob(t, tl))
	needed, left := given(t, &res, ClearanceNeeded, Given), given(t, &res, ClearanceLeft, Given)
	// 0.5 + 1.0 + 0.3 + 1 = 2.8
	for _, c := range [...][2]float64{{needed.Low, 2.7}, {needed.Value, 2.8}, {needed.High, 2.9}, {left.Low, 0.1}, {left.Value, 0.2}, {left.High, 0.3}} {
		if math.Abs(c[0]-c[1]) > 1e-12 {
			t.Errorf("%.12g, want %.12g", c[0], c[1])
		}
	}
	if needed.Bound != Between || left.Bound != Between {
		t.Errorf("bounds %s and %s", needed.Bound, left.Bound)
	}
	tight := res.Layout.Tightest
	if tight == nil || tight.Run.Given.Lefts.List[0].Obstacle != 1 || math.Abs(tight.Run.Given.Clearance.Apart(3)) > 1e-12 {
		t.Errorf("tightest %+v", tight)
	}

	delete(tl.items, rig.ItemMargin)
	res = Evaluate(laidOutJob(t, tl))
	needed, left = given(t, &res, ClearanceNeeded, Given), given(t, &res, ClearanceLeft, Given)
	if needed.Bound != AtLeast || !math.IsNaN(needed.High) || math.Abs(needed.Low-1.7) > 1e-12 {
		t.Errorf("without a margin: %v", *needed)
	}
	if left.Bound != AtMost || !math.IsNaN(left.Low) || math.Abs(left.High-1.3) > 1e-12 {
		t.Errorf("without a margin: %v", *left)
	}
}

// The two datums are apart by what the D-ring to the feet has more, hanging, than
// the D-ring is high, standing: by hand for one layout, and nothing where the
// bands of both meet.
func TestDatumsApart(t *testing.T) {
	for feet, want := range map[string]float64{"1.8 m": 0.3, "1.7 m ± 0.1 m": 0.1, "1.4 m .. 1.7 m": 0, "1.2 m": -0.3} {
		tl := overhead("0 m")
		tl.datum, tl.feet = rig.BelowAnchor, feet
		tl.items = map[rig.Item]string{rig.ItemDeceleration: "1 m", rig.ItemLineStretch: "0 m", rig.ItemHarness: "0 m", rig.ItemAnchor: "0 m", rig.ItemMargin: "0 m"}
		j := laidOutJob(t, tl)
		res := Evaluate(j)
		ev, _ := begin(j, nil, false)
		if got := ev.datumsApart(j.Point.Layout); math.Abs(got-want) > 1e-12 {
			t.Errorf("%s: %g, want %g", feet, got, want)
		}
		if tells(&res, LayoutDatumsApart) != (want != 0) {
			t.Errorf("%s: told %v", feet, want == 0)
		}
		if room := res.Layout.Tightest.Run.Given; feet == "1.8 m" && math.Abs(room.Clearance.Apart(3)-want) > 1e-12 {
			t.Errorf("%s: the sums lie %g apart", feet, room.Clearance.Apart(3))
		}
	}
}

// The allowance is taken on the travel of the path and on nothing that was
// measured with a tape.
func TestAllowanceOnTheTravelAlone(t *testing.T) {
	tl := overhead("0 m")
	tl.datum = rig.BelowFeet
	tl.items = map[rig.Item]string{rig.ItemHarness: "0.3 m", rig.ItemAnchor: "0 m", rig.ItemMargin: "1 m"}
	tl.obstacles = []testObstacle{{below: "4 m"}}
	j := figures{mass: "100 kg"}.job(t)
	withAllowance(t, onPath(t, j, FromLabel, absorber("4 kN", "1.5 m")), "25 %")
	res := Evaluate(layOut(t, j, tl))
	needed := given(t, &res, ClearanceNeeded, Modelled)
	w := 100 * StandardGravity
	travel := w * 0.5 / (4000 - w) // M-12: m v^2/2 = W h
	if want := 0.5 + travel + 0.3 + 1; math.Abs(needed.Value-want) > 1e-9 {
		t.Errorf("needed %.12g, want %.12g", needed.Value, want)
	}
	low, high := needed.Ends()
	if math.Abs(high-needed.High-0.25*travel) > 1e-9 || math.Abs(needed.Low-low-0.25*travel) > 1e-9 {
		t.Errorf("from %.12g to %.12g about %.12g with a travel of %.12g", low, high, needed.Value, travel)
	}
}

// A layout in the plane and one straight down: the swing in time is used for
// the one and the straight run for the other; both with the same bound.
func TestSwingIsWorkedOutInTime(t *testing.T) {
	for _, along := range []string{"0 m", "1.2 m"} {
		j := figures{mass: "100 kg"}.job(t)
		onPath(t, j, FromLabel, ropePart, absorber("4 kN", "1.5 m"))
		tl := overhead(along)
		tl.obstacles = []testObstacle{{below: "0.2 m"}}
		res := Evaluate(layOut(t, j, tl))
		peak := given(t, &res, PeakForce, Modelled)
		if swings := along != "0 m"; swings != (peak.Method == "M-24") || swings != (res.estimate(SwingSpeed, Modelled) >= 0) || swings == (len(res.Runs) > 0) {
			t.Errorf("%s: %s, %d runs", along, peak.Method, len(res.Runs))
		}
		place := &res.Layout.Places[0]
		if along == "0 m" {
			continue
		}
		// An independent call of the packages below, with figures of its own.
		layout := rig.Layout{Anchor: rig.Spot{Z: 3}, DRing: 1.5, Feet: 1.5, HalfWidth: math.NaN(), Length: 2, PositionCount: 1, ObstacleCount: 1}
		layout.Positions[0].X = 1.2
		layout.Obstacles[0] = rig.NewLevel(-0.2)
		at := layout.At(0)
		body := rig.Body{Mass: 100, Gravity: StandardGravity}
		var path connector.Path
		if err := path.Set(j.Point.Path.fill(&place.Case, nil)...); err != nil {
			t.Fatal(err)
		}
		var tether rig.Tether
		var planar rig.Planar
		if err := tether.Set(&path, &at, &body); err != nil {
			t.Fatal(err)
		}
		if err := layout.Planar(&at, &tether, &body, 1e-9, &planar); err != nil {
			t.Fatal(err)
		}
		near(t, "peak", peak.Value, planar.Peak, 1e-11)
		if math.Abs(given(t, &res, SwingSpeed, Modelled).Value-planar.Lowest.Speed) > 1e-11 || given(t, &res, TotalFallDistance, Modelled).Value-planar.Lowest.Drop > 1e-11 {
			t.Errorf("peak %v, want %v", peak.Value, planar.Peak)
		}
		// What is held against a limit is the peak of any later swing too.
		near(t, "least peak", peak.Low, planar.Peak, 1e-11)
		near(t, "greatest peak", peak.High, planar.PeakBound, 1e-11)
		if !(peak.High > peak.Low) {
			t.Errorf("peak from %v to %v", peak.Low, peak.High)
		}
	}
}

// No point inside the bands comes to more or less than the spans say, and the
// spans are no wider than the corners and turning points make them: every end
// is a figure of a point inside the bands.
func TestLayoutSpansHoldEveryPoint(t *testing.T) {
	r := rand.New(rand.NewPCG(20, 24))
	band := func(mid, half float64) string {
		if r.IntN(3) == 0 {
			return fmt.Sprintf("%.3f m", mid)
		}
		return fmt.Sprintf("%.3f m ± %.3f m", mid, half*r.Float64())
	}
	tried := 0
	for n := range 600 {
		tl := testLayout{anchor: band(2+2*r.Float64(), 0.3), dring: band(1.5, 0.2), length: band(2.5+r.Float64(), 0.2), width: "0.3 m",
			positions: [][2]string{{band(r.Float64()-0.5, 0.6), band(r.Float64()-0.3, 0.5)}},
			obstacles: []testObstacle{{below: band(2.5, 0.5)}}, datum: rig.BelowFeet,
			items: map[rig.Item]string{rig.ItemDeceleration: band(1, 0.2), rig.ItemHarness: "0.3 m", rig.ItemLineStretch: "0 m", rig.ItemAnchor: "0 m", rig.ItemMargin: "0 m"}}
		if n%4 == 0 {
			tl.obstacles = append(tl.obstacles, testObstacle{below: band(1.5, 0.3), sides: [4]string{band(-0.5, 0.2), band(0.5, 0.2), band(0.4, 0.2), band(1.5, 0.2)}})
		}
		if n%5 == 0 {
			tl.positions[0] = [2]string{"0 m", "0 m"}
		}
		switch n % 3 {
		case 0:
			tl.slack = "0.1 m"
		case 1:
			tl.locking = band(0.6, 0.3)
		case 2:
			tl.slack, tl.edge, tl.behind = "0 m", rig.RoundEdge, band(0.8, 0.4)
			tl.anchor = band(0.6, 0.5)
			tl.positions[0][1] = "0 m"
		}
		j := layOut(t, figures{mass: "90 kg .. 110 kg", speed: "0 m/s .. 1 m/s"}.job(t), tl)
		if status, _ := LayoutFault(j); status != rig.Known {
			continue
		}
		tried++
		res := Evaluate(j)
		var p Point
		for range 60 {
			c := j.Point
			for i := range j.Inputs {
				if in := &j.Inputs[i]; in.Set != nil {
					in.Set(&c, in.Band.Low+(in.Band.High-in.Band.Low)*r.Float64())
				}
			}
			At(&c, &p)
			for i := range outputs {
				o := &outputs[i]
				if !o.applies(&c) || o.evidence == Shape && o.rests&ofLayout == 0 {
					continue
				}
				low, high := o.low(&p), o.of(&p)
				k := res.estimate(o.quantity, o.evidence)
				if math.IsNaN(high) || k < 0 {
					// A box beyond the height that the body comes from, which only a
					// swing without any loss reaches, may be missed between the corners.
					if !math.IsNaN(high) && !(o.quantity == SpeedAtObstacle && onlyWithoutLoss(p.Layout)) {
						t.Fatalf("%d: no estimate of %s", n, o.quantity)
					}
					continue
				}
				e := &res.Estimates[k]
				top := e.High
				if e.Bound == AtLeast {
					top = e.Reach
				}
				give := 1e-9 * (1 + math.Abs(high))
				if e.Bound == AtMost {
					low = math.Inf(1)
				}
				if low < e.Low-give || high > top+give {
					t.Fatalf("%d: %s %s: %.12g .. %.12g at a point, %.12g .. %.12g over the bands (%+v)", n, o.evidence, o.quantity, low, high, e.Low, top, tl)
				}
			}
		}
	}
	if tried < 200 {
		t.Errorf("only %d layouts were tried", tried)
	}
}

// onlyWithoutLoss reports whether the swing comes to no obstacle but with more
// speed than the least.
func onlyWithoutLoss(r *LayoutRun) bool {
	for i := range r.Layout.ObstacleCount {
		if p := &r.Swing.Passes[i]; p.Reached && !math.IsNaN(p.Low) {
			return false
		}
	}
	return true
}

// Somebody stands out of reach in a part of the entries or in all: told before
// anything is worked out.
func TestLayoutFault(t *testing.T) {
	for along, want := range map[string]rig.Status{"1.2 m": rig.Known, "1 m .. 1.5 m": rig.OutOfReach, "5 m": rig.OutOfReach} {
		if got, _ := LayoutFault(laidOutJob(t, overhead(along))); got != want {
			t.Errorf("%s: %s", along, got)
		}
	}
	inside := testLayout{anchor: "-0.1 m .. 0.1 m", behind: "1 m", edge: rig.RoundEdge, dring: "1.5 m", length: "3 m", slack: "0 m", positions: [][2]string{{"0 m", "0 m"}}}
	if got, k := LayoutFault(laidOutJob(t, inside)); got != rig.InStructure || k != 0 {
		t.Errorf("inside the structure: %s at %d", got, k)
	}
	// hypot(2, 4 - 1.5) = 3.2 m from the anchor in plan, on 3 m of connector, though
	// the edge beside would be farther still.
	back := testLayout{anchor: "1.5 m", behind: "4 m", edge: rig.RoundEdge, dring: "1.5 m", length: "3 m", slack: "0 m", positions: [][2]string{{"2 m", "-1.5 m"}}}
	if got, _ := LayoutFault(laidOutJob(t, back)); got != rig.OutOfReach {
		t.Errorf("behind the edge, too far: %s", got)
	}
	back.length = "3.3 m"
	if got, _ := LayoutFault(laidOutJob(t, back)); got != rig.Known {
		t.Errorf("behind the edge, within reach: %s", got)
	}
}

// A saying is a layout of which something has to be said, for its own reason.
type saying struct {
	id WarningID
	tl testLayout
}

// sayings are one layout of which nothing has to be said and, for each thing that
// can be, one of which it has.
func sayings() (quiet testLayout, list []saying) {
	level := []testObstacle{{below: "4 m"}}
	one := [][2]string{{"0 m", "0 m"}}
	items := map[rig.Item]string{rig.ItemDeceleration: "1 m", rig.ItemHarness: "0.3 m", rig.ItemLineStretch: "0 m", rig.ItemAnchor: "0 m", rig.ItemMargin: "1 m"}
	base := testLayout{anchor: "3 m", dring: "1.5 m", length: "2 m", slack: "0 m", positions: one, feet: "1.5 m", width: "0.3 m", obstacles: level, datum: rig.BelowFeet, items: items}
	edge := base
	edge.edge, edge.anchor, edge.behind = rig.SharpEdge, "0 m", "1 m"
	with := func(of testLayout, change func(*testLayout)) testLayout { change(&of); return of }
	return base, []saying{
		{LayoutRestrained, with(edge, func(l *testLayout) { l.behind, l.positions = "3 m", [][2]string{{"0 m", "-1.5 m"}} })},
		{LayoutRestrainedInPart, with(edge, func(l *testLayout) { l.behind, l.positions = "1 m .. 3 m", [][2]string{{"0 m", "-0.5 m"}} })},
		{LayoutGoneOver, with(edge, func(l *testLayout) { l.behind, l.positions = "1.9 m", [][2]string{{"0 m", "-0.5 m"}} })},
		{LayoutShort, with(base, func(l *testLayout) { l.obstacles = []testObstacle{{below: "2.2 m", moving: true}} })},
		{LayoutEdge, with(edge, func(l *testLayout) { l.rated = "document of the lanyard" })},
		{LayoutEdgeUnrated, edge},
		{LayoutAnchorLow, with(base, func(l *testLayout) { l.anchor = "0 m" })},
		{LayoutOutOfPlane, with(edge, func(l *testLayout) { l.length, l.positions = "3 m", [][2]string{{"0.5 m", "0.5 m"}} })},
		{LayoutIntoFace, with(edge, func(l *testLayout) { l.length, l.positions = "3 m", [][2]string{{"0 m", "0.5 m"}} })},
		{LayoutStrikes, with(base, func(l *testLayout) {
			l.positions, l.obstacles = [][2]string{{"1.2 m", "0 m"}}, []testObstacle{{below: "0.3 m"}}
		})},
		{LayoutStrikesFalling, with(base, func(l *testLayout) { l.anchor, l.obstacles = "0 m", []testObstacle{{below: "1 m"}} })},
		{LayoutStrikeForce, with(base, func(l *testLayout) {
			l.anchor, l.obstacles = "0 m", []testObstacle{{below: "1 m", stopOver: "0.1 m"}}
		})},
		{LayoutNothingBelow, with(base, func(l *testLayout) { l.obstacles = nil })},
		{LayoutNoClearance, with(base, func(l *testLayout) { l.datum = 0 })},
		{LayoutItemsMissing, with(base, func(l *testLayout) { l.items = nil })},
		{LayoutDatumsApart, with(base, func(l *testLayout) { l.feet = "1.8 m" })},
		{LayoutFeetStanding, with(base, func(l *testLayout) { l.feet = "" })},
		{LayoutWidthUnknown, with(base, func(l *testLayout) {
			l.width, l.obstacles = "", []testObstacle{{below: "4 m", sides: [4]string{"0 m", "1 m", "0 m", "1 m"}}}
		})},
		{LayoutInextensible, with(base, func(l *testLayout) { l.positions = [][2]string{{"1.2 m", "0 m"}} })},
	}
}

// What a layout has to say is said, and only then.
func TestLayoutWarnings(t *testing.T) {
	base, list := sayings()
	plain := Evaluate(laidOutJob(t, base))
	for _, c := range list {
		res := Evaluate(laidOutJob(t, c.tl))
		if !tells(&res, c.id) {
			t.Errorf("%s is not told", c.id)
		}
		if tells(&plain, c.id) {
			t.Errorf("%s is told of a layout that has nothing of it", c.id)
		}
	}
}

// An upright body 1.5 m tall to the D-ring, on 2.00 m +- 0.15 m from an anchor on
// the surface 2.10 m +- 0.02 m behind the edge, does not get to it: its D-ring
// would have to be sqrt(2.10^2 + 1.5^2) = 2.58 m away. On its knees it gets over:
// 2.15 m reach against 2.08 m of way. The figures as written, 2.00 m and 2.10 m,
// do not tell.
func TestAnEdgeThatIsGoneOverOnTheKnees(t *testing.T) {
	tl := testLayout{edge: rig.SharpEdge, anchor: "0 m", behind: "2.10 m ± 0.02 m", dring: "1.5 m", length: "2.00 m ± 0.15 m",
		slack: "0 m", positions: [][2]string{{"0.5 m ± 0.5 m", "-0.5 m"}, {"3 m", "-0.5 m"}}}
	res := Evaluate(laidOutJob(t, tl))
	if !tells(&res, LayoutGoneOver) || !tells(&res, LayoutRestrained) || tells(&res, LayoutRestrainedInPart) {
		t.Errorf("%v", res.Warnings)
	}
	for k, way := range []float64{2.08, math.Hypot(3, 2.08)} {
		r := &res.Layout.Places[k].Farthest
		if !quantity.Close(r.Reach, 2.15, 1e-12) || !quantity.Close(r.EdgeDistance[k], way, 1e-12) || !r.Passed {
			t.Errorf("position %d: %+v", k, r)
		}
	}
	for i := range res.Estimates {
		if e := &res.Estimates[i]; e.Quantity == RestraintReach && !e.Unreached {
			t.Error("the reach is taken to settle a row")
		}
	}
	tl.behind = "2.20 m ± 0.02 m"
	if res = Evaluate(laidOutJob(t, tl)); tells(&res, LayoutGoneOver) || !tells(&res, LayoutRestrained) {
		t.Errorf("%v", res.Warnings)
	}
}

// Of two levels the room needed reaches one: 0.5 m free fall, 1 m to rest, 0.3 m
// in the harness and 1 m margin below the feet, 2.8 m in all, above 2.2 m.
func TestWhatIsShortIsNamed(t *testing.T) {
	tl, _ := sayings()
	tl.obstacles = []testObstacle{{below: "2.9 m"}, {below: "2.2 m"}}
	res := Evaluate(laidOutJob(t, tl))
	var short []Warning
	for _, w := range res.Warnings {
		if w.ID == LayoutShort {
			short = append(short, w)
		}
	}
	if len(short) != 1 || short[0].Args[1].Text != "thing 2" || !quantity.Close(short[0].Args[2].SI, 0.6, 1e-12) {
		t.Errorf("%v", short)
	}
}

// layoutJobs use every line of the working of a layout, and have all that can be
// said of one.
func layoutJobs(t testing.TB) map[string]*Job {
	jobs := map[string]*Job{}
	_, list := sayings()
	for _, c := range list {
		jobs["layout "+string(c.id)] = laidOutJob(t, c.tl)
	}
	locked := overhead("0.4 m ± 0.1 m")
	locked.slack, locked.locking, locked.length = "", "0.6 m", "6 m"
	jobs["layout of a retractable"] = laidOutJob(t, locked)
	swung := figures{mass: "100 kg"}.job(t)
	onPath(t, swung, FromLabel, testPart{kind: connector.WireRope, basis: ByStiffness, give: "20 kN/m"})
	jobs["layout of a swing"] = layOut(t, swung, overhead("1.2 m"))
	return jobs
}

func tells(r *Result, id WarningID) bool {
	for _, w := range r.Warnings {
		if w.ID == id {
			return true
		}
	}
	return false
}
