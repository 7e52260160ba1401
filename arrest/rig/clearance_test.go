package rig

import (
	"math"
	"testing"
)

const foot = 0.3048

// full is a clearance with every item of both datums, in m: an anchor 1.5 m
// above a D-ring at 1.5 m, a connector of 2 m, no offset.
func full() *Clearance {
	var c Clearance
	c.Enter(ItemFreeFall, 0.5)
	c.Enter(ItemConnector, 2)
	c.Enter(ItemDeceleration, 1.1)
	c.Enter(ItemLineStretch, 0.2)
	c.Enter(ItemHarness, 0.3)
	c.Enter(ItemFeet, 1.5)
	c.Enter(ItemAnchor, 0)
	c.Enter(ItemSwingDrop, 0)
	c.Enter(ItemMargin, 1)
	return &c
}

// Published sums, in feet. The restated Washington rule: free fall 6 +
// deceleration 3.5 + line stretch 2 = 11.5, with a body of 5 below the D-ring
// 16.5, counted from an anchor at the D-ring where the connector of 6 hangs down
// by its length; and lanyard 6 + absorber 3.5 + height 6 + margin 3 = 18.5 from
// the anchor.
func TestPublishedClearances(t *testing.T) {
	zero := []Item{ItemHarness, ItemAnchor}
	enter := func(c *Clearance, items map[Item]float64) *Clearance {
		for it, x := range items {
			c.Enter(it, x*foot)
		}
		for _, it := range zero {
			c.Enter(it, 0)
		}
		return c
	}
	c := enter(&Clearance{}, map[Item]float64{ItemFreeFall: 6, ItemDeceleration: 3.5, ItemLineStretch: 2, ItemSwingDrop: 0, ItemMargin: 0})
	near(t, "total fall distance", c.Below(BelowFeet).Needed, 11.5*foot, 1e-15)
	c = enter(&Clearance{}, map[Item]float64{ItemConnector: 6, ItemDeceleration: 3.5, ItemLineStretch: 2, ItemFeet: 5, ItemMargin: 0})
	near(t, "below the anchor", c.Below(BelowAnchor).Needed, 16.5*foot, 1e-15)
	c = enter(&Clearance{}, map[Item]float64{ItemConnector: 6, ItemDeceleration: 3.5, ItemLineStretch: 0, ItemFeet: 6, ItemMargin: 3})
	near(t, "below the anchor, with a margin", c.Below(BelowAnchor).Needed, 18.5*foot, 1e-15)
}

func TestClearanceFromBothDatums(t *testing.T) {
	c := full()
	feet, anchor := c.Below(BelowFeet), c.Below(BelowAnchor)
	near(t, "below the feet", feet.Needed, 3.1, 1e-15)     // 0.5+1.1+0.2+0.3+0+0+1
	near(t, "below the anchor", anchor.Needed, 6.1, 1e-15) // 2+1.1+0.2+0.3+1.5+0+1
	if a := c.Apart(3); math.Abs(a) > 1e-14 {
		t.Errorf("the datums are apart by %g m", a)
	}
	if feet.Foreign != Of(ItemConnector, ItemFeet) || anchor.Foreign != Of(ItemFreeFall, ItemSwingDrop) {
		t.Errorf("items of the other datum: %b, %b", feet.Foreign, anchor.Foreign)
	}
	// A layout's own figures fit each other whatever the offset.
	for i := range 1000 {
		l, p := newDice(30, uint64(i)).reached()
		c := full()
		c.Enter(ItemFreeFall, p.FreeFall)
		c.Enter(ItemSwingDrop, p.SwingDrop)
		c.Enter(ItemConnector, p.Depth)
		c.Enter(ItemFeet, l.DRing)
		if a := c.Apart(l.Anchor.Z); math.Abs(a) > 1e-12 {
			t.Fatalf("layout %d: the datums are apart by %g m", i, a)
		}
	}
}

// Every item alone can be missing, and is never zero.
func TestMissingItems(t *testing.T) {
	for _, d := range []Datum{BelowFeet, BelowAnchor} {
		for it := range ItemCount {
			c := full()
			c.Entries[it].Present = false
			s := c.Below(d)
			if !d.items().Has(it) {
				if s.Missing != 0 || math.IsNaN(s.Needed) {
					t.Errorf("datum %d does not count item %d: %+v", d, it, s)
				}
				continue
			}
			if s.Missing != Of(it) || !math.IsNaN(s.Needed) || s.Present > full().Below(d).Needed {
				t.Errorf("datum %d without item %d: %+v", d, it, s)
			}
			c.Enter(it, math.NaN())
			if s := c.Below(d); s.Missing != Of(it) || !math.IsNaN(s.Needed) || math.IsNaN(s.Present) {
				t.Errorf("datum %d, item %d not known: %+v", d, it, s)
			}
		}
	}
}

// Every pair of items can be counted twice: one entered that the other holds.
func TestItemsCountedTwice(t *testing.T) {
	for _, d := range []Datum{BelowFeet, BelowAnchor} {
		for a := range ItemCount {
			for b := range ItemCount {
				if a == b || !d.items().Has(a) {
					continue
				}
				c := full()
				c.Entries[a].Includes = Of(b)
				s := c.Below(d)
				if !d.items().Has(b) {
					if s.Twice != 0 {
						t.Errorf("datum %d: %d in %d does not matter: %+v", d, b, a, s)
					}
					continue
				}
				if s.Twice != Of(b) || !math.IsNaN(s.Needed) {
					t.Errorf("datum %d: %d in %d: %+v", d, b, a, s)
				}
				c.Entries[b].Present = false
				if s = c.Below(d); s.Twice != 0 || s.Missing != 0 || math.IsNaN(s.Needed) {
					t.Errorf("datum %d: %d in %d alone is once: %+v", d, b, a, s)
				}
			}
		}
	}
	// Held by two others, entered by neither.
	c := full()
	c.Entries[ItemHarness].Present = false
	c.Entries[ItemMargin].Includes = Of(ItemHarness)
	c.Entries[ItemDeceleration].Includes = Of(ItemHarness, ItemLineStretch)
	if s := c.Below(BelowFeet); s.Twice != Of(ItemHarness, ItemLineStretch) {
		t.Errorf("held twice: %b", s.Twice)
	}
}

func TestLeftToWhatLiesBelow(t *testing.T) {
	l := overhead(3, 1.2, 2)
	l.ObstacleCount = 6
	l.Obstacles = [MaxObstacles]Obstacle{
		NewLevel(-6),
		NewBox(Spot{-0.5, -1, -4}, Spot{0.5, 1, -3}),     // below the swing
		NewBox(Spot{-0.5, 1, -4}, Spot{0.5, 2, -2}),      // 0.7 m beside it
		NewBox(Spot{-3, -1, -4}, Spot{-1.4, 1, -2.5}),    // 0.2 m beyond its far end
		NewBox(Spot{30, 30, -4}, Spot{31, 31, -2.4}),     // a vehicle elsewhere
		NewBox(Spot{-0.5, -0.5, 1.6}, Spot{0.5, 0.5, 2}), // a beam above the D-ring
	}
	l.Obstacles[4].Moving = true
	p := l.At(0)
	r := l.Left(&p, 3.1)
	want := []Left{{4, 2.4, -0.7}, {3, 2.5, -0.6}, {1, 3, -0.1}, {0, 6, 2.9}}
	if r.Count != len(want) || r.Aside != 1<<2|1<<5 {
		t.Fatalf("%d obstacles in the way, %b aside: %+v", r.Count, r.Aside, r)
	}
	for i, w := range want {
		if got := r.List[i]; got.Obstacle != w.Obstacle || math.Abs(got.Left-w.Left) > 1e-12 || math.Abs(got.Room-w.Room) > 1e-12 {
			t.Errorf("obstacle %d: %+v, want %+v", i, got, w)
		}
	}
	// A body as wide as the gap is beside nothing.
	l.HalfWidth = 1.01
	if r = l.Left(&p, 3.1); r.Aside != 1<<5 {
		t.Errorf("a wide body: %b aside", r.Aside)
	}
	// A width that nobody told puts nothing aside.
	l.HalfWidth = math.NaN()
	if r = l.Left(&p, 3.1); r.Aside != 0 || r.Count != 6 {
		t.Errorf("an unknown body: %b aside", r.Aside)
	}
	// A room that is not known comes first.
	l.Obstacles[0].High.Z = math.NaN()
	if r = l.Left(&p, 3.1); r.List[0].Obstacle != 0 || !math.IsNaN(r.List[0].Left) {
		t.Errorf("an unknown level: %+v", r.List[0])
	}
}

// Published cases in which nobody must be content, as far as they are geometry.
func TestPublishedCasesOfTooLittleRoom(t *testing.T) {
	// A system of 50 ft over a drop of 17 ft: the length alone is too much, with
	// nothing known of the stop.
	l := overhead(0, 0, 50*foot)
	l.ObstacleCount = 1
	l.Obstacles[0] = NewLevel(-17 * foot)
	p := l.At(0)
	var c Clearance
	c.Enter(ItemFreeFall, p.FreeFall)
	s := c.Below(BelowFeet)
	left := l.Left(&p, s.Present).List[0].Left
	if !math.IsNaN(s.Needed) || !(left < 0) {
		t.Errorf("50 ft over 17 ft: needed %g, at most %g m left", s.Needed, left)
	}
	near(t, "left at most", left, (17-50)*foot-1.5, 1e-12)

	// A device at foot level over an edge: it runs over an edge that no part is
	// rated for, and the worker falls by more than the height of the D-ring before
	// it even locks.
	l = &Layout{Anchor: Spot{Y: -1}, Edge: SharpEdge, DRing: 1.5, Length: 6, Retractable: true, Locking: 0.6, PositionCount: 1}
	if p = l.At(0); !p.OverEdge || !p.Unrated || !(p.FreeFall > 1.8) {
		t.Errorf("foot level over an edge: %+v", p)
	}
	// sqrt(1 + 1.5^2) + 0.6 of line from the start, 1 m of it up to the edge.
	near(t, "its free fall", p.FreeFall, 1.5+math.Sqrt(3.25)+0.6-1, 1e-12)
}

// 1.61 + 0.1 + 1.1 m and 2.81 m are one length, not 4e-16 m apart.
func TestNothingRemainsOfEqualSums(t *testing.T) {
	sum, tenth, more := 1.61, 0.1, 1.1
	sum = sum + tenth + more
	if sum == 2.81 {
		t.Fatal("the two sums are the same bits")
	}
	for _, c := range []struct{ room, needed, want float64 }{{2.81, sum, 0}, {sum, 2.81, 0}, {0, 0, 0}, {3, 2, 1}, {2, 3, -1}} {
		if got := Remains(c.room, c.needed); got != c.want {
			t.Errorf("%v less %v: %v, want %v", c.room, c.needed, got, c.want)
		}
	}
	if got := Remains(2.81, 2.81+1e-9); math.Abs(got+1e-9) > 1e-15 {
		t.Errorf("a nanometre too little: %v", got)
	}
}
