package arrest

import (
	"math"
	"testing"

	"arrestcheck/arrest/rig"
)

// An anchor that may be on either side of the edge is nearest to the worker right
// above it, also for one who goes over the edge from behind. By hand: 2.72 m of
// connector 1.02 m to the side of an anchor 1.66 m up reach sqrt(2.72^2 - 1.02^2)
// = 2.5215 m down; 0.03 m behind the edge it lies hypot(0.03, 1.66) m from it.
func TestAnchorOnEitherSideOfTheEdge(t *testing.T) {
	tl := testLayout{anchor: "1.66 m", edge: rig.RoundEdge, behind: "-0.03 m .. 0.03 m", dring: "1.13 m", length: "2.72 m", slack: "0 m",
		positions: [][2]string{{"-1.02 m", "-0.26 m"}}}
	r := Evaluate(laidOutJob(t, tl))
	e := given(t, &r, FreeFall, Given)
	reach := math.Sqrt(2.72*2.72 - 1.02*1.02)
	near(t, "least free fall", e.Low, 1.13+reach-math.Hypot(0.03, 1.66), 1e-12)
	near(t, "greatest free fall", e.High, 1.13-1.66+reach, 1e-12)
	angle := given(t, &r, OffsetAngle, Given)
	near(t, "least offset angle", angle.Low, math.Atan2(1.02, 1.66-1.13), 1e-12)
}

// Where the connector just comes to the edge, the swing under the anchor is at its
// deepest: R^2 = 2.38^2 + 0.63^2 + 0.06^2, the D-ring R - 2.38 m below the surface.
// A longer connector turns about the edge and hangs less deep.
func TestDeepestWhereTheConnectorComesToTheEdge(t *testing.T) {
	tl := testLayout{anchor: "2.38 m", edge: rig.SharpEdge, behind: "0.63 m", dring: "1.31 m", length: "2.35 m ± 0.06 m", slack: "0 m .. 0.08 m",
		positions: [][2]string{{"-0.06 m", "0 m"}}, datum: rig.BelowFeet,
		items: map[rig.Item]string{rig.ItemDeceleration: "1 m"}}
	r := Evaluate(laidOutJob(t, tl))
	deepest := 1.31 - 2.38 + math.Sqrt(2.38*2.38+0.63*0.63+0.06*0.06) + 1
	near(t, "greatest room", given(t, &r, ClearanceNeeded, Given).Reach, deepest, 1e-12)
}

// Of a retractable the room below the anchor shrinks with the D-ring as it rises:
// the least is left with both low, 2.5 m apart and 1 m in plan.
func TestRetractableRoomWithBothHeightsLow(t *testing.T) {
	tl := testLayout{anchor: "4 m ± 0.1 m", dring: "1.5 m ± 0.1 m", feet: "1.7 m", length: "10 m", locking: "0.5 m",
		positions: [][2]string{{"1 m", "0 m"}}, obstacles: []testObstacle{{below: "10 m"}}, datum: rig.BelowFeet,
		items: map[rig.Item]string{rig.ItemDeceleration: "1 m", rig.ItemLineStretch: "0 m", rig.ItemHarness: "0 m",
			rig.ItemAnchor: "0 m", rig.ItemMargin: "1 m"}}
	r := Evaluate(laidOutJob(t, tl))
	needed := math.Hypot(1, 2.5) + 0.5 - 3.9 + 1.7 + 1 + 1
	near(t, "least left", given(t, &r, ClearanceLeft, Given).Low, 10-needed, 1e-12)
}

// An item is missing, and for a part of the entries the connector ends before the
// edge: the room needed stays a floor, down to nothing, and what is left has no
// bound at all.
func TestFloorStaysAFloorInRestraint(t *testing.T) {
	tl := testLayout{anchor: "0 m", behind: "1 m .. 3 m", edge: rig.RoundEdge, dring: "1.5 m", length: "2 m", slack: "0 m",
		positions: [][2]string{{"0 m", "-0.9 m"}}, obstacles: []testObstacle{{below: "4 m"}}, datum: rig.BelowFeet,
		items: map[rig.Item]string{rig.ItemDeceleration: "1 m", rig.ItemHarness: "0.3 m", rig.ItemLineStretch: "0 m", rig.ItemAnchor: "0 m"}}
	res := Evaluate(laidOutJob(t, tl))
	if !tells(&res, LayoutRestrainedInPart) || !tells(&res, LayoutItemsMissing) {
		t.Fatal("the layout is not restrained in part with an item missing")
	}
	if e := given(t, &res, ClearanceNeeded, Given); e.Bound != AtLeast || !math.IsNaN(e.High) || e.Low != 0 {
		t.Errorf("needed: %s, %v to %v", e.Bound, e.Low, e.High)
	}
	// Less than the sum may be left, and more where nobody falls: nothing bounds it.
	if i := res.estimate(ClearanceLeft, Given); i >= 0 {
		t.Errorf("left: %+v", res.Estimates[i])
	}
}

// A body that swings comes to rest nobody knows where without a path, so that the
// total fall of one that does not is a floor for both together.
func TestTotalFallBesideASwingIsAFloor(t *testing.T) {
	tl := testLayout{anchor: "4 m", dring: "1.5 m", length: "10 m", locking: "0.5 m", positions: [][2]string{{"0 m", "0 m"}, {"3 m", "0 m"}},
		datum: rig.BelowFeet, items: map[rig.Item]string{rig.ItemDeceleration: "1 m"}}
	r := Evaluate(laidOutJob(t, tl))
	if e := given(t, &r, TotalFallDistance, Given); e.Bound != AtLeast || e.Low != 1.5 {
		t.Errorf("beside a swing: %s %v", e.Bound, e.Low)
	}
	tl.positions = [][2]string{{"0 m ± 0.5 m", "0 m"}}
	r = Evaluate(laidOutJob(t, tl))
	fall := given(t, &r, FreeFall, Given)
	if e := given(t, &r, TotalFallDistance, Given); e.Bound != AtLeast || e.Low != fall.Low {
		t.Errorf("swinging for a part of the entries: %s %v, least free fall %v", e.Bound, e.Low, fall.Low)
	}
	tl.positions = [][2]string{{"0 m", "0 m"}}
	r = Evaluate(laidOutJob(t, tl))
	if e := given(t, &r, TotalFallDistance, Given); e.Bound != Between || e.High != 1.5 {
		t.Errorf("straight down: %s %v", e.Bound, e.High)
	}
}

// A box beside the swing of an exact layout leaves nothing to be reached: from
// (-1.33, -0.54) to (1.33, 0.54) the body, 0.37 m wide, is above y = -0.17 before it
// is at x = -0.33. With a wider band of the place it may be in the way.
func TestBoxBesideAnExactSwing(t *testing.T) {
	tl := testLayout{anchor: "2.5 m", dring: "1.5 m", feet: "1.5 m", width: "0.37 m", length: "2 m", slack: "0 m",
		positions: [][2]string{{"-1.33 m", "-0.54 m"}}, obstacles: []testObstacle{{below: "2.48 m", sides: [4]string{"0.04 m", "3.05 m", "-1.63 m", "-0.54 m"}}},
		datum: rig.BelowFeet, items: map[rig.Item]string{rig.ItemDeceleration: "1 m ± 0.1 m", rig.ItemLineStretch: "0 m",
			rig.ItemHarness: "0 m", rig.ItemAnchor: "0 m", rig.ItemMargin: "1 m"}}
	r := Evaluate(laidOutJob(t, tl))
	if i := r.estimate(ClearanceLeft, Given); i >= 0 {
		t.Errorf("left to a box beside the swing: %+v", r.Estimates[i])
	}
	if given(t, &r, FreeFall, Given).Strikes {
		t.Error("it strikes what it does not come over")
	}
	tl.positions[0][0] = "-1.33 m ± 0.01 m"
	r = Evaluate(laidOutJob(t, tl))
	if e := given(t, &r, ClearanceLeft, Given); e.Bound != AtLeast {
		t.Errorf("with a band of the place: %s", e.Bound)
	}
}

// A sum without a travel of the path has no error of the model.
func TestNoAllowanceWithoutTravel(t *testing.T) {
	e := Estimate{Quantity: ClearanceNeeded, Evidence: Modelled, Low: 2, High: 2, Allowance: 0.25, Harder: nan}
	if low, high := e.Ends(); low != 2 || high != 2 {
		t.Errorf("without: %v to %v", low, high)
	}
	e.Travel = 1
	if low, high := e.Ends(); low != 1.75 || high != 2.25 {
		t.Errorf("with 1 m of travel: %v to %v", low, high)
	}
}
