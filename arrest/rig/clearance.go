package rig

import (
	"math"
	"slices"
)

// An Item is one entry of a clearance.
type Item uint8

// The items of a clearance.
const (
	ItemFreeFall     Item = iota // of the D-ring
	ItemConnector                // from the anchor down to the D-ring, hanging straight below at the first pull
	ItemDeceleration             // travel from the first pull to rest
	ItemLineStretch
	ItemHarness   // stretch of the harness and shift of the D-ring
	ItemFeet      // D-ring to feet, hanging
	ItemAnchor    // give of the anchor or the line it is on
	ItemSwingDrop // from the first pull to the lowest point of the swing
	ItemMargin
	ItemCount
)

// Items is a set of items.
type Items uint16

// Of returns the set of the items given.
func Of(items ...Item) Items {
	var set Items
	for _, it := range items {
		set |= 1 << it
	}
	return set
}

// Has reports whether the item is in the set.
func (s Items) Has(it Item) bool { return s&(1<<it) != 0 }

// A Datum is the plane from which a clearance is measured downwards.
type Datum uint8

const (
	// BelowFeet: from the feet where the worker stands, the walking surface.
	BelowFeet Datum = iota + 1

	// BelowAnchor: from the anchor.
	BelowAnchor
)

// items returns what a clearance from the datum has to count, each once. Both
// end at the feet. From the feet themselves the length of the body drops out;
// from the anchor the connector hanging straight below holds free fall and
// swing drop in itself.
func (d Datum) items() Items {
	both := Of(ItemDeceleration, ItemLineStretch, ItemHarness, ItemAnchor, ItemMargin)
	switch d {
	case BelowFeet:
		return both | Of(ItemFreeFall, ItemSwingDrop)
	case BelowAnchor:
		return both | Of(ItemConnector, ItemFeet)
	}
	panic("rig: not a datum")
}

// An Entry is one item as known.
type Entry struct {
	Present bool // false: missing, which is not zero
	Value   float64

	// Includes are the other items that Value already holds, such as a margin
	// that counts the stretch of the harness, or a modelled travel that counts
	// every stretch of its path.
	Includes Items
}

// A Clearance is the room that a fall needs, item by item (M-21). It may hold
// the items of both datums.
type Clearance struct{ Entries [ItemCount]Entry }

// Enter sets an item.
func (c *Clearance) Enter(it Item, value float64, includes ...Item) {
	c.Entries[it] = Entry{true, value, Of(includes...)}
}

// A Sum is a clearance from one datum.
type Sum struct {
	// Needed is the room needed below the datum, m: NaN while an item is missing
	// or counted twice. It is also the shortest room that would do.
	Needed float64

	// Present is the sum of the items that are there, m. With nothing counted
	// twice the room needed is not less.
	Present float64

	Counted Items // what Present adds up
	Missing Items // of the datum, neither entered nor included in another
	Twice   Items // entered and included in another, or included in two
	Foreign Items // entered, but of the other datum: left out
}

// Below returns the room needed below the datum:
//
//	needed = sum of the items of the datum, each once
//
// An item that is neither entered nor included in another entered item is
// missing, never zero; one that is there more than once is counted twice. NaN
// counts as missing. Either way there is no sum.
//
// It errs as its items do: a margin is no measured travel. Source: definitions of
// 29 CFR 1926.500(b), restated; the sums are common practice.
func (c *Clearance) Below(d Datum) Sum {
	var s Sum
	of := d.items()
	var held Items
	for it := range ItemCount {
		e := &c.Entries[it]
		switch {
		case !e.Present || math.IsNaN(e.Value):
			continue
		case !of.Has(it):
			s.Foreign |= Of(it)
			continue
		}
		s.Twice |= held & e.Includes
		held |= e.Includes &^ Of(it)
		s.Counted |= Of(it)
		s.Present += e.Value
	}
	s.Twice = (s.Twice | held&s.Counted) & of
	s.Missing = of &^ (s.Counted | held)
	s.Needed = s.Present
	if s.Missing|s.Twice != 0 {
		s.Needed = math.NaN()
	}
	return s
}

// Apart returns by how much the sums of the two datums contradict each other, in
// m: the room below the anchor, less its height above the surface, less the
// room below the feet. It is zero where every item fits the layout, but for the
// difference of the D-ring to the feet hanging and standing; NaN where one of
// them is not known.
func (c *Clearance) Apart(anchorHeight float64) float64 {
	return c.Below(BelowAnchor).Needed - anchorHeight - c.Below(BelowFeet).Needed
}

// A Left is what a clearance leaves to one obstacle, in m.
type Left struct {
	Obstacle int     // its index
	Room     float64 // from the walking surface down to its top
	Left     float64 // Room less the room needed; negative: the body is there before it rests
}

// Lefts is the clearance left to every obstacle in the way, nearest first.
type Lefts struct {
	List  [MaxObstacles]Left
	Count int

	// Aside are the obstacles, by bit, that the body does not come over at this
	// position: boxes beside the swing, and boxes wholly above the D-ring.
	Aside uint16
}

// Left returns what is left of the room when the fall from the place needs the
// room needed, in m below the feet:
//
//	left = room - needed
//
// A box is in the way if the swing from the position to the same distance beyond
// the pivot passes over it in plan, HalfWidth to either side; it then counts with
// the lowest point of the whole fall. A moving one is always in the way; so is
// every level, and every obstacle whose window is not known or where the motion
// is out of plane.
//
// It errs low, at the edge of a swing by up to its drop. Equal ones keep their
// order; an unknown one comes first. Derived.
func (l *Layout) Left(p *Place, needed float64) Lefts {
	var r Lefts
	for i, o := range l.obstacles() {
		w := l.window(&p.Plane, &o)
		if w.known() && (w.empty() || w.u1 < -p.Plane.Offset || w.u0 > p.Plane.Offset || w.z0 > p.Start.Z) {
			r.Aside |= 1 << i
			continue
		}
		r.List[r.Count] = Left{i, -o.High.Z, Remains(-o.High.Z, needed)}
		r.Count++
	}
	list := r.List[:r.Count]
	slices.SortStableFunc(list, func(a, b Left) int { return compare(a.Left, b.Left) })
	return r
}

// Remains returns the room less the room needed, in m: 0 where they are the same to
// 12 digits, as two sums of decimals that come to the same seldom are the same bits.
func Remains(room, needed float64) float64 {
	left := room - needed
	if math.Abs(left) <= 1e-12*max(math.Abs(room), math.Abs(needed)) {
		return 0
	}
	return left
}

// compare puts NaN first.
func compare(a, b float64) int {
	switch {
	case a < b || math.IsNaN(a) && !math.IsNaN(b):
		return -1
	case a > b || math.IsNaN(b) && !math.IsNaN(a):
		return 1
	}
	return 0
}
