package rig

import (
	"math"
	"testing"
)

func TestFreeFallOfPlainLayouts(t *testing.T) {
	// Sums in one's head: 3-4-5 triangles, and the vertical ones by addition.
	edge := &Layout{Anchor: Spot{Y: -1}, Edge: RoundEdge, DRing: 1.5, Length: 2, PositionCount: 1}
	sharp := *edge
	sharp.Edge, sharp.EdgeRated = SharpEdge, true
	slack := *overhead(3, 1.2, 1.75)
	slack.Slack = 0.25
	retractable := *overhead(3.5, 0, 6)
	retractable.Retractable, retractable.Locking = true, 0.6
	short := retractable
	short.Length = 2.5
	for _, c := range []struct {
		what                string
		l                   *Layout
		fall, taut, lowest  float64
		swing, offset, drop float64
		over                bool
	}{
		{"anchor 1.5 m above the D-ring, 1.2 m to the side", overhead(3, 1.2, 2), 0.1, 1.4, 1, 36.869897645844, 38.659808254090, 0.4, false},
		{"the same with the length in two parts", &slack, 0.1, 1.4, 1, 36.869897645844, 38.659808254090, 0.4, false},
		{"anchor at the feet", overhead(0, 0, 1.8), 3.3, -1.8, -1.8, 0, 180, 0, false},
		{"over an edge 1 m from the anchor", edge, 2.5, -1, -1, 0, 180 - math.Atan2(1, 1.5)/degree, 0, true},
		{"over a sharp edge", &sharp, 2.5, -1, -1, 0, 180 - math.Atan2(1, 1.5)/degree, 0, true},
		{"anchor at the D-ring", overhead(1.5, 0, 1.8), 1.8, -0.3, -0.3, 0, 0, 0, false},
		{"a retractable overhead", &retractable, 0.6, 0.9, 0.9, 0, 0, 0, false},
		{"a retractable at the end of its line", &short, 0.5, 1, 1, 0, 0, 0, false},
		{"a connector that is just long enough", overhead(3, 0, 1.5), 0, 1.5, 1.5, 0, 0, 0, false},
	} {
		p := c.l.At(0)
		if p.Status != Known {
			t.Errorf("%s: %v", c.what, p.Status)
		}
		near(t, c.what+": free fall", p.FreeFall, c.fall, 1e-12)
		near(t, c.what+": held free fall", p.HeldFreeFall, c.fall, 1e-12)
		near(t, c.what+": height when taut", p.Taut.Z, c.taut, 1e-12)
		near(t, c.what+": lowest", p.Lowest, c.lowest, 1e-12)
		near(t, c.what+": swing angle", p.SwingAngle/degree, c.swing, 1e-12)
		near(t, c.what+": offset angle", p.OffsetAngle/degree, c.offset, 1e-12)
		near(t, c.what+": drop", p.SwingDrop, c.drop, 1e-12)
		if p.OverEdge != c.over || p.Unrated != (c.over && !c.l.EdgeRated) {
			t.Errorf("%s: over an edge %v, unrated %v", c.what, p.OverEdge, p.Unrated)
		}
	}
}

// An anchor on the edge line itself: the connector grazes the edge, and counts as
// running over it.
func TestAnchorOnTheEdgeLine(t *testing.T) {
	l := &Layout{Edge: SharpEdge, DRing: 1.5, Length: 1.3, PositionCount: 1}
	l.Positions[0].X = 0.5
	p := l.At(0)
	if p.Status != OutOfReach {
		t.Errorf("1.3 m to a D-ring 1.5 m up: %v", p.Status)
	}
	l.Length = 1.7
	p = l.At(0)
	near(t, "free fall", p.FreeFall, 1.5+math.Sqrt(1.7*1.7-0.25), 1e-12)
	near(t, "held free fall", p.HeldFreeFall, 1.5+1.2, 1e-12)
	if !p.OverEdge || !p.Unrated {
		t.Errorf("over the edge %v, unrated %v", p.OverEdge, p.Unrated)
	}
	// An anchor on the face below the edge is beyond it.
	l.Anchor.Z, l.Length = -0.5, 2.2
	if p = l.At(0); p.OverEdge || p.EdgeLater || p.Status != Known {
		t.Errorf("an anchor below the edge: %+v", p)
	}
}

// What a straight connector comes to on the way down.
func TestEdgeAndFaceOnTheWayDown(t *testing.T) {
	l := &Layout{Anchor: Spot{Y: -1, Z: 2}, Edge: RoundEdge, DRing: 1.5, Length: 2.1, PositionCount: 1}
	for _, c := range []struct {
		what              string
		set               func(l *Layout)
		over, later, face bool
		unrated           bool
	}{
		// 2.1 m from the anchor straight down end 0.1 m below the surface.
		{"below the surface at its lowest", func(l *Layout) {}, false, true, true, true},
		{"the same with a rated part", func(l *Layout) { l.EdgeRated = true }, false, true, true, false},
		{"above the surface all the way", func(l *Layout) { l.Anchor.Z = 2.2 }, false, false, true, false},
		{"no edge", func(l *Layout) { l.Edge = NoEdge }, false, false, false, false},
		{"an anchor outside", func(l *Layout) { l.Anchor.Y = 0.5 }, false, false, false, false},
		{"over the edge when taut", func(l *Layout) { l.Length = 2.5 }, true, false, false, true},
		{"over the edge when taut, away from the face", func(l *Layout) { l.Length = 4; l.Positions[0].Y = 0.5 }, true, false, true, true},
	} {
		m := *l
		c.set(&m)
		p := m.At(0)
		if p.Status != Known || p.OverEdge != c.over || p.EdgeLater != c.later || p.Plane.IntoFace != c.face || p.Unrated != c.unrated {
			t.Errorf("%s: %v, over %v, later %v, face %v, unrated %v", c.what, p.Status, p.OverEdge, p.EdgeLater, p.Plane.IntoFace, p.Unrated)
		}
	}
}

// The offset angles of two published rules of 30 degrees.
func TestOffsetAngle(t *testing.T) {
	p := overhead(3, 1, 2.2).At(0)
	near(t, "offset 1.0 m, anchor 1.5 m above", p.OffsetAngle/degree, 33.690067525980, 1e-12)
	// A 1.3 m offset asks for 2.25 m of height under 30 degrees (as published, to
	// the centimetre); with 1.5 m it has 40.9 degrees.
	p = overhead(1.5+2.25, 1.3, 4).At(0)
	near(t, "offset 1.3 m at 2.25 m", p.OffsetAngle/degree, 30, 1e-3)
	if p = overhead(3, 1.3, 4).At(0); !(p.OffsetAngle > 30*degree) {
		t.Errorf("offset 1.3 m, anchor 1.5 m above: %g degrees", p.OffsetAngle/degree)
	}
}

func TestStatusOfAPlace(t *testing.T) {
	nan := math.NaN()
	layout := func(set func(l *Layout)) *Layout {
		l := overhead(3, 0, 2)
		set(l)
		return l
	}
	for _, c := range []struct {
		what string
		l    *Layout
		want Status
	}{
		{"connector 1.0 m, anchor 1.5 m above", overhead(3, 0, 1), OutOfReach},
		{"no height of the anchor", overhead(nan, 0, 2), Incomplete},
		{"no height of the D-ring", layout(func(l *Layout) { l.DRing = nan }), Incomplete},
		{"no length", overhead(3, 0, nan), Incomplete},
		{"no slack told", layout(func(l *Layout) { l.Slack = nan }), Incomplete},
		{"a retractable without its travel", layout(func(l *Layout) { l.Retractable, l.Locking = true, nan }), Incomplete},
		{"a retractable with slack", layout(func(l *Layout) { l.Retractable, l.Locking, l.Slack = true, 0.5, 0.1 }), SlackTwice},
		{"an anchor in the structure", layout(func(l *Layout) { l.Edge, l.Anchor = RoundEdge, Spot{Y: -1, Z: -1} }), InStructure},
		{"a worker held back from the edge", layout(func(l *Layout) {
			l.Edge, l.Anchor, l.Positions[0], l.Length = RoundEdge, Spot{Y: -3}, Position{0, -1.5}, 2.5
		}), Restrained},
		{"a worker not held back from the edge", layout(func(l *Layout) {
			l.Edge, l.Anchor, l.Positions[0], l.Length = RoundEdge, Spot{Y: -3}, Position{0, -1.5}, 3.5
		}), Known},
	} {
		p := c.l.At(0)
		if p.Status != c.want {
			t.Errorf("%s: %v, want %v", c.what, p.Status, c.want)
		}
		if known := !math.IsNaN(p.FreeFall); known != (c.want == Known) {
			t.Errorf("%s: free fall %g", c.what, p.FreeFall)
		}
	}
}

// through reports whether the straight line from a to b runs through the
// structure, by looking at points of it ever nearer to the edge line in plan.
func through(a, b Spot) bool {
	for y := a.Y; y < -1e-13; y /= 1.5 {
		q := (y - a.Y) / (b.Y - a.Y)
		if b.Y == a.Y {
			q = 1
		}
		if a.Z+q*(b.Z-a.Z) < 0 {
			return true
		}
	}
	return false
}

func apart(a, b Spot) float64 {
	return math.Hypot(math.Hypot(a.X-b.X, a.Y-b.Y), a.Z-b.Z)
}

// shortest is the length of the shortest connector from a to b: straight, or by
// the best point of the edge line, which is looked for.
func shortest(a, b Spot, edge bool) float64 {
	if !edge || !through(a, b) {
		return apart(a, b)
	}
	by := func(x float64) float64 { return apart(a, Spot{X: x}) + apart(Spot{X: x}, b) }
	lo, hi := min(a.X, b.X), max(a.X, b.X)
	for range 60 {
		x, y := lo+(hi-lo)/3, hi-(hi-lo)/3
		if by(x) < by(y) {
			hi = y
		} else {
			lo = x
		}
	}
	return by((lo + hi) / 2)
}

// TestTautPointByBruteForce lets 10,000 workers fall until the shortest way from
// anchor to D-ring is as long as the connector.
func TestTautPointByBruteForce(t *testing.T) {
	count, over := 0, 0
	for i := range 10000 {
		l, p := newDice(20, uint64(i)).reached()
		at := func(z float64) float64 {
			return shortest(l.Anchor, Spot{p.Start.X, p.Start.Y, z}, l.Edge != NoEdge)
		}
		// The way grows once the D-ring is below the anchor and the edge.
		hi := min(p.Start.Z, l.Anchor.Z)
		lo := hi - p.Radius - 1
		for range 48 {
			if mid := (lo + hi) / 2; at(mid) > p.Radius {
				lo = mid
			} else {
				hi = mid
			}
		}
		if math.Abs(p.Taut.Z-hi) > 1e-7 {
			t.Fatalf("layout %d: taut at %.9f, found at %.9f\n%+v\n%+v", i, p.Taut.Z, hi, l, p)
		}
		near(t, "free fall", p.FreeFall, p.Start.Z-p.Taut.Z, 1e-12)
		if p.HeldFreeFall > p.FreeFall+1e-12 {
			t.Errorf("layout %d: a held connector falls farther: %+v", i, p)
		}
		count++
		if p.OverEdge {
			over++
		}
	}
	if over < 2000 || over > 9000 {
		t.Errorf("%d of %d layouts over the edge", over, count)
	}
}

// The unfolded plane of a swing over the edge: wherever the D-ring is on the
// face, its distance from the pivot is the shortest way over the edge.
func TestUnfoldedPlane(t *testing.T) {
	checked := 0
	for i := range 3000 {
		d := newDice(21, uint64(i))
		l, p := d.reached()
		if !p.OverEdge || !p.Plane.Flat || p.Start.Y > 0 {
			continue
		}
		u, z := p.Plane.Offset*d.within(-1, 1), -d.within(0.1, 3)
		b := Spot{p.Plane.X + u*p.Plane.DX, 0, z}
		near(t, "distance on the face", math.Hypot(u, p.Plane.Pivot-z), shortest(l.Anchor, b, true), 1e-9)
		near(t, "the plane meets the taut point", math.Hypot(p.Plane.Offset, p.Plane.Pivot-p.Taut.Z), p.Plane.Radius, 1e-12)
		checked++
	}
	if checked < 500 {
		t.Errorf("only %d swings over an edge", checked)
	}
}

func TestPlaceIsTheSameInAMirrorAndElsewhere(t *testing.T) {
	for i := range 2000 {
		l, p := newDice(22, uint64(i)).reached()
		m := *l
		m.Anchor.X, m.Positions[0].X = -m.Anchor.X, -m.Positions[0].X
		q := m.At(0)
		if q.FreeFall != p.FreeFall || q.OffsetAngle != p.OffsetAngle || q.SwingDrop != p.SwingDrop || q.OverEdge != p.OverEdge {
			t.Fatalf("layout %d differs in a mirror: %+v and %+v", i, p, q)
		}
		m = *l
		m.Anchor.X += 8
		m.Positions[0].X += 8
		q = m.At(0)
		if math.Abs(q.FreeFall-p.FreeFall) > 1e-12 || math.Abs(q.SwingDrop-p.SwingDrop) > 1e-12 || math.Abs(q.OffsetAngle-p.OffsetAngle) > 1e-12 {
			t.Fatalf("layout %d differs elsewhere along the edge: %+v and %+v", i, p, q)
		}
	}
}

// A free fall grows with the connector, and all of free fall and swing drop
// together are the way from the start to the lowest point.
func TestFreeFallGrowsWithTheConnector(t *testing.T) {
	for i := range 2000 {
		l, p := newDice(23, uint64(i)).reached()
		near(t, "free fall and swing drop", p.FreeFall+p.SwingDrop, p.Start.Z-p.Lowest, 1e-12)
		near(t, "depth", p.Depth, l.Anchor.Z-p.Lowest, 1e-12)
		if l.Retractable {
			continue
		}
		m := *l
		m.Length += 0.1
		if q := m.At(0); !(q.FreeFall > p.FreeFall) {
			t.Errorf("layout %d: a longer connector, a shorter fall: %+v and %+v", i, p, q)
		}
	}
}

func TestSurveyNamesTheWorst(t *testing.T) {
	l := overhead(3, 0, 2.5)
	l.PositionCount = 4
	for i, x := range []float64{0.4, -1.6, 1.2, 1.6} {
		l.Positions[i].X = x
	}
	var s Survey
	l.Survey(&s)
	if s.Status != Known || s.StatusAt != -1 || s.Count != 4 || s.Unrated != -1 {
		t.Errorf("%v at %d, %d places, unrated %d", s.Status, s.StatusAt, s.Count, s.Unrated)
	}
	// The fall is greatest near the anchor, the swing farthest from it; the two
	// positions at 1.6 m are equal and the first is named.
	for _, c := range []struct {
		what string
		w    Worst
		at   int
		of   float64
	}{
		{"free fall", s.FreeFall, 0, s.Places[0].FreeFall},
		{"offset angle", s.OffsetAngle, 1, s.Places[1].OffsetAngle},
		{"swing angle", s.SwingAngle, 1, math.Asin(1.6 / 2.5)},
		{"swing drop", s.SwingDrop, 1, s.Places[3].SwingDrop},
		{"depth", s.Depth, 0, 2.5},
	} {
		if c.w.At != c.at {
			t.Errorf("%s: position %d, want %d", c.what, c.w.At, c.at)
		}
		near(t, c.what, c.w.Value, c.of, 1e-12)
	}

	l.Positions[2].X = 2.4
	l.Survey(&s)
	if s.Status != OutOfReach || s.StatusAt != 2 || s.FreeFall.At != 0 {
		t.Errorf("one position out of reach: %v at %d, free fall at %d", s.Status, s.StatusAt, s.FreeFall.At)
	}
	// One position held back from the edge hides no fault of another.
	l = &Layout{Anchor: Spot{Y: -3}, Edge: RoundEdge, DRing: 1.5, Length: 3.5, PositionCount: 3}
	l.Positions = [MaxPositions]Position{{0, -1}, {2, -1}, {0, 1.5}}
	l.Survey(&s)
	if s.Status != OutOfReach || s.StatusAt != 2 || s.Places[0].Status != Known || s.Places[1].Status != Restrained {
		t.Errorf("%v at %d: %v, %v, %v", s.Status, s.StatusAt, s.Places[0].Status, s.Places[1].Status, s.Places[2].Status)
	}
	l.PositionCount = 2
	if l.Survey(&s); s.Status != Restrained || s.StatusAt != 1 {
		t.Errorf("%v at %d", s.Status, s.StatusAt)
	}
	l.PositionCount = 0
	l.Survey(&s)
	if s.Status != Incomplete || s.StatusAt != -1 || s.FreeFall.At != -1 || !math.IsNaN(s.FreeFall.Value) {
		t.Errorf("no position: %v, %+v", s.Status, s.FreeFall)
	}
	if n := testing.AllocsPerRun(100, func() { l.Survey(&s) }); n != 0 {
		t.Errorf("a survey allocates %v times", n)
	}
}

func TestRestraint(t *testing.T) {
	l := &Layout{Anchor: Spot{Y: -2.5, Z: 1.2}, Edge: SharpEdge, DRing: 1.5, Length: 2, PositionCount: 2}
	l.Positions[1].X = 6
	r := l.Restrain()
	// The D-ring can be carried at the height of the anchor: the whole length
	// counts, sqrt(2^2 - 0.3^2) = 1.977 with it at 1.5 m.
	near(t, "reach", r.Reach, 2, 1e-12)
	near(t, "reach of who stands", r.StandingReach, math.Sqrt(4-0.09), 1e-12)
	near(t, "margin", r.Margin[0], 0.5, 1e-12)
	near(t, "margin 6 m along", r.Margin[1], 6.5-2, 1e-12) // 2.5-6-6.5 is a right triangle
	if r.Worst != 0 || r.Passed {
		t.Errorf("worst %d, passed %v", r.Worst, r.Passed)
	}

	// A position far along the edge does not make the edge unreachable elsewhere.
	l.Length, l.PositionCount = 3, 1
	l.Positions[0].X = 6
	if r = l.Restrain(); !r.Passed || r.Margin[0] <= 0 {
		t.Errorf("the edge in front of the anchor can be passed: %+v", r)
	}
	// An anchor high up: 4 m of which 2.4 m go up to it leave sqrt(4^2-2.4^2) = 3.2 m.
	l.Anchor.Z, l.Length = 1.5+2.4, 4
	near(t, "reach below a high anchor", l.Restrain().Reach, 3.2, 1e-12)
	for what, set := range map[string]func(*Layout){
		"no length":               func(l *Layout) { l.Length = math.NaN() },
		"anchor outside":          func(l *Layout) { l.Anchor.Y = 0.2 },
		"a line without an end":   func(l *Layout) { l.Retractable, l.Length = true, math.Inf(1) },
		"the last of the reach":   func(l *Layout) { l.Anchor = Spot{Y: -2}; l.Length = 2 },
		"anchor nobody can reach": func(l *Layout) { l.Anchor.Z = 40 },
	} {
		m := *l
		set(&m)
		if r := m.Restrain(); !r.Passed {
			t.Errorf("%s: the edge is not known to hold: %+v", what, r)
		}
	}

	// Restraint and free fall agree: where the standing D-ring cannot come over
	// the edge there is no fall, and the other way round.
	for i := range 2000 {
		l := newDice(24, uint64(i)).layout()
		if l.Retractable || l.Anchor.Y >= 0 {
			continue
		}
		l.Positions[0].Y = -0.01
		r := l.Restrain()
		held := math.IsNaN(r.StandingReach) || r.StandingReach < r.EdgeDistance[0]
		if status := l.At(0).Status; (status == Restrained) != held {
			t.Fatalf("layout %d: %v, but reach %g of %g", i, status, r.StandingReach, r.EdgeDistance[0])
		}
	}
}
