package arrest

import (
	"math"

	"arrestcheck/arrest/connector"
	"arrestcheck/arrest/rig"
)

// A LayoutRun is what the layout comes to at one point and one position, SI.
// NaN where a figure cannot be had.
type LayoutRun struct {
	Layout    rig.Layout
	Place     rig.Place
	Swing     rig.Swing     // as if the connector did not stretch (M-22)
	Restraint rig.Restraint // M-23
	Planar    rig.Planar    // with a connector path and an offset (M-24); else not run

	// Given is the room with the deceleration distance as entered, Modelled with
	// the travel of the connector path. Neither where no clearance was entered.
	Given, Modelled Room

	modelledFall float64 // from the start to the lowest point, by the model; NaN without one
	tether       rig.Tether
}

// A Room is a clearance with what it leaves (M-21). Lengths in m.
type Room struct {
	Known     bool // there is something to add up
	Clearance rig.Clearance
	Feet      rig.Sum // below the feet where the worker stands
	Anchor    rig.Sum // below the anchor

	// Needed is the room needed below the datum of the plan. With Floor an item is
	// missing, and it is what the others come to: the room needed is not less.
	Needed float64
	Floor  bool

	Travel float64 // of Modelled: the part of Needed that the path gives
	Left   float64 // the least that is left to an obstacle; NaN where none is in the way
	Lefts  rig.Lefts

	// Counts is the room below the feet that is held against what lies below: where
	// both datums are known, the greater of their two sums.
	Counts float64
}

// Inextensible stands in Estimate.From of what holds only if the connector
// does not stretch (M-22): conditional, since a soft one passes either bound.
const Inextensible = "connector without stretch"

// tolerance of a planar run, relative.
const planarTolerance = 1e-9

// layoutAt fills in the layout and returns the free fall, m, NaN where none
// follows from it. The first call on a Point makes room; later ones allocate
// nothing.
func layoutAt(c *Case, p *Point) float64 {
	if p.Layout == nil {
		p.Layout = new(LayoutRun)
	}
	r := p.Layout
	c.Layout.fill(c, &r.Layout)
	r.Place = r.Layout.At(c.Position)
	for _, x := range [...]*float64{&r.Place.FreeFall, &r.Place.HeldFreeFall, &r.Place.SwingDrop, &r.Place.Depth} {
		*x = decimal(*x)
	}
	r.Restraint = r.Layout.Restrain()
	r.Planar.Status = 0
	return r.Place.FreeFall
}

// decimal returns x without what adding up lengths in binary has put behind its
// last decimal, m: entries in metres, feet and inches are decimals of a few places,
// and a sum of them that equals a limit has to equal it here too. Only what lies
// within a few units of the last binary place of a whole nanometre is moved there.
func decimal(x float64) float64 {
	if y := math.Round(x*1e9) / 1e9; math.Abs(x-y) <= 4e-15*(1+math.Abs(x)) {
		return y
	}
	return x
}

// swings reports whether the body goes sideways after the first pull.
func (r *LayoutRun) swings() bool { return !r.Place.Plane.Flat || r.Place.Plane.Offset > 0 }

// roomAt fills in what needs mass, speed and the run of the path as well.
func roomAt(c *Case, p *Point) {
	r := p.Layout
	body := rig.Body{Mass: p.TotalMass, InitialSpeed: c.InitialSpeed, Gravity: c.Gravity}
	r.Swing = r.Layout.Swing(&r.Place, &body)
	r.Given, r.Modelled, r.modelledFall = Room{}, Room{}, nan
	if c.Path != nil && r.Place.Status == rig.Known {
		r.modelledFall = r.Place.FreeFall + r.Place.SwingDrop + p.Model.travel(r)
	}
	plan := c.Layout.Clearance
	if plan == nil || r.Place.Status != rig.Known {
		return
	}
	if plan.entered(c) || c.Path == nil {
		plan.enter(c, r, &r.Given, false)
		if !plan.holds(rig.ItemDeceleration) && c.Distance > 0 {
			// The stopping distance is the whole travel of the D-ring.
			r.Given.Clearance.Enter(rig.ItemDeceleration, c.Distance, rig.ItemLineStretch, rig.ItemAnchor)
		}
		r.Given.sum(plan, r)
	}
	if c.Path != nil {
		plan.enter(c, r, &r.Modelled, true)
		held := rig.Of(rig.ItemLineStretch) | c.Path.holds()
		r.Modelled.Travel = p.Model.travel(r)
		r.Modelled.Clearance.Entries[rig.ItemDeceleration] = rig.Entry{Present: true, Value: r.Modelled.Travel, Includes: held}
		r.Modelled.sum(plan, r)
	}
}

// entered reports whether a travel to rest is, among the items or as the stop.
func (pl *ClearancePlan) entered(c *Case) bool {
	return pl.holds(rig.ItemDeceleration) || c.Distance > 0
}

// holds reports whether the item was entered.
func (pl *ClearancePlan) holds(it rig.Item) bool {
	for i := range pl.Items {
		if pl.Items[i].Item == it {
			return true
		}
	}
	return false
}

// enter puts the items as entered and those of the layout in. What a path works
// out itself is left out where it is counted on.
func (pl *ClearancePlan) enter(c *Case, r *LayoutRun, room *Room, modelled bool) {
	own := rig.Items(0)
	if modelled && pl.holds(rig.ItemDeceleration) {
		own = rig.Of(rig.ItemDeceleration, rig.ItemLineStretch) | c.Path.holds()
	}
	room.Known = true
	for i := range pl.Items {
		if it := &pl.Items[i]; !own.Has(it.Item) {
			room.Clearance.Entries[it.Item] = rig.Entry{Present: true, Value: c.Figures[it.Figure], Includes: it.Includes &^ own}
		}
	}
	room.Clearance.Enter(rig.ItemFreeFall, r.Place.FreeFall)
	room.Clearance.Enter(rig.ItemSwingDrop, r.Place.SwingDrop)
	room.Clearance.Enter(rig.ItemConnector, r.Place.Depth)
	if n := c.Layout.Feet; n != NoFigure {
		room.Clearance.Enter(rig.ItemFeet, c.Figures[n])
	}
}

// sum adds the items up and holds the sum against what lies below.
func (room *Room) sum(plan *ClearancePlan, r *LayoutRun) {
	room.Feet, room.Anchor = room.Clearance.Below(rig.BelowFeet), room.Clearance.Below(rig.BelowAnchor)
	s, below := &room.Feet, 0.0
	if plan.Datum == rig.BelowAnchor {
		s, below = &room.Anchor, r.Layout.Anchor.Z
	}
	room.Needed = decimal(s.Needed)
	if s.Missing != 0 && s.Twice == 0 {
		room.Floor, room.Needed = true, decimal(s.Present)
	}
	room.Counts = room.Needed - below
	for _, x := range [...]float64{room.Feet.Needed, room.Anchor.Needed - r.Layout.Anchor.Z} {
		if x > room.Counts {
			room.Counts = x // where the datums differ, the greater room counts
		}
	}
	room.Lefts = r.Layout.Left(&r.Place, room.Counts)
	room.Left = nan
	if room.Lefts.Count > 0 {
		room.Left = room.Lefts.List[0].Left
	}
}

// needed and left are the figures of a room, NaN where there is none.
func (room *Room) needed() float64 {
	if !room.Known {
		return nan
	}
	return room.Needed
}

func (room *Room) left() float64 {
	if !room.Known {
		return nan
	}
	return room.Left
}

// totalFall returns the way of the D-ring from the start to rest straight below
// with the travel as entered, m; NaN where the body swings or none was entered.
func (r *LayoutRun) totalFall(room *Room) float64 {
	if !room.Known || r.swings() || !room.Clearance.Entries[rig.ItemDeceleration].Present {
		return nan
	}
	return decimal(r.Place.FreeFall + room.Clearance.Entries[rig.ItemDeceleration].Value)
}

// swingSpeed is the greatest speed of a swing without stretch at its lowest
// point, m/s; NaN where the body does not swing.
func (r *LayoutRun) swingSpeed() float64 {
	if !(r.Place.Plane.Offset > 0) {
		return nan
	}
	return r.Swing.LowestHigh
}

// fastestPass is the greatest speed with which the body can come to an obstacle
// if the connector does not stretch, m/s; NaN where it comes to none.
func (r *LayoutRun) fastestPass() float64 {
	most := nan
	for i := range r.Layout.ObstacleCount {
		if p := &r.Swing.Passes[i]; p.Reached {
			most = greater(most, p.High)
		}
	}
	return most
}

// swungSpeed is the speed at the lowest point of the swing in time, m/s.
func (r *LayoutRun) swungSpeed() float64 {
	if r.Planar.Status == 0 {
		return nan
	}
	return r.Planar.Lowest.Speed
}

// swungPass is the greatest speed with which the swing in time comes to an
// obstacle, m/s; NaN where it comes to none.
func (r *LayoutRun) swungPass() float64 {
	most := nan
	if r.Planar.Status == 0 {
		return most
	}
	for i := range r.Layout.ObstacleCount {
		if p := &r.Planar.Passes[i]; p.Reached {
			most = greater(most, p.Speed)
		}
	}
	return most
}

// holds returns the items that the travel of the path counts besides the
// stretch of a line.
func (pl *PathPlan) holds() rig.Items {
	var set rig.Items
	for i := range pl.Parts {
		switch pl.Parts[i].Kind {
		case connector.Harness:
			set |= rig.Of(rig.ItemHarness)
		case connector.Anchor:
			set |= rig.Of(rig.ItemAnchor)
		}
	}
	return set
}

// swing works out the arrest in the plane of the swing with the path of m.
func (r *LayoutRun) swing(m *PathRun, body *rig.Body) error {
	if err := r.tether.Set(&m.path, &r.Place, body); err != nil {
		return err
	}
	return r.Layout.Planar(&r.Place, &r.tether, body, planarTolerance, &r.Planar)
}

// swungPeak is the peak of the planar run, NaN where it was none.
func (r *LayoutRun) swungPeak() float64 {
	switch r.Planar.Status {
	case rig.Endless, rig.Rigid:
		return math.Inf(1)
	}
	return r.Planar.Peak
}

// travel returns how far the body goes on below the first pull, beyond the
// drop of a swing without stretch, m.
func (m *PathRun) travel(r *LayoutRun) float64 {
	if !r.swings() || m.Failed != nil {
		return m.stopped(m.Run.StoppingDistance)
	}
	if math.IsInf(r.swungPeak(), 1) {
		return math.Inf(1)
	}
	return r.Planar.Lowest.Drop - r.Place.FreeFall - r.Place.SwingDrop
}

// LayoutAt returns what the layout of a case comes to; nil where it has none.
func LayoutAt(c *Case) *LayoutRun {
	var p Point
	At(c, &p)
	return p.Layout
}
