package rig

import "math"

// A Status says what a layout comes to at a position.
type Status uint8

const (
	// Known: the figures hold.
	Known Status = iota

	// Incomplete: a figure is missing that the free fall hangs on, or the connector
	// has no length.
	Incomplete

	// OutOfReach: the D-ring at the start is farther from the anchor than the
	// connector reaches. Nobody can stand there as drawn.
	OutOfReach

	// Restrained: the worker stands behind the edge and the connector ends
	// before the D-ring is over the edge here. No fall follows from the layout;
	// see Restrain for every other place on the edge.
	Restrained

	// SlackTwice: slack on a retractable, which has none; or slack of the layout
	// and of the connector path, each of which would be counted.
	SlackTwice

	// InStructure: the anchor lies behind the edge and below the surface; how the
	// connector leaves the structure is not part of a layout.
	InStructure
)

// String returns the status in plain words.
func (s Status) String() string {
	switch s {
	case Known:
		return "known"
	case Incomplete:
		return "a figure is missing"
	case OutOfReach:
		return "out of reach"
	case Restrained:
		return "the connector ends before the edge"
	case SlackTwice:
		return "slack counted twice"
	case InStructure:
		return "anchor inside the structure"
	}
	return "not a status"
}

// A Place is what a layout comes to at one position, before any force acts
// (M-20). Lengths in m, angles in rad. Where Status is not Known, the figures
// that cannot be had are NaN.
type Place struct {
	Status Status
	Index  int  // of the position
	Start  Spot // of the D-ring

	Distance float64 // anchor to D-ring at the start
	Offset   float64 // the same in plan
	Radius   float64 // way from anchor to D-ring along the connector at the first pull

	// FreeFall is the vertical travel of the D-ring up to the first pull. Over an
	// edge the connector is taken to slide along it to its shortest way, which
	// gives the longer fall. HeldFreeFall is that of a connector held on the edge
	// where the worker went over; the two are one without an edge or without an
	// offset along it. NaN where a connector so held would not let the worker over.
	FreeFall, HeldFreeFall float64

	Taut   Spot    // the D-ring at the first pull
	Lowest float64 // height of the D-ring hanging straight below at Radius
	Depth  float64 // the same below the anchor: the connector item of a clearance

	OffsetAngle float64 // at work, between the vertical and the line from anchor to D-ring
	SwingAngle  float64 // at the first pull; NaN out of the plane
	SwingDrop   float64 // from the first pull to Lowest

	OverEdge  bool // the connector runs over the edge at the first pull
	EdgeLater bool // it comes to the edge while the body goes down to Lowest
	Unrated   bool // one of them, and no part is rated for it

	Plane Plane
}

// A Plane is the upright plane in which the body swings. A connector over an
// edge is unfolded about it: without friction it swings as from a pivot as high
// above the edge as the anchor is away from it.
type Plane struct {
	Flat   bool    // false: the motion is out of any plane, nothing is said about it
	X, Y   float64 // plan of the pivot
	DX, DY float64 // unit vector in plan from the pivot to the position
	Pivot  float64 // height of the pivot
	Offset float64 // of the position from the pivot
	Radius float64 // of the swing at the first pull

	// IntoFace: behind the edge the swing goes through y < 0, where below the
	// surface the structure is.
	IntoFace bool
}

// At returns what the layout comes to at the position i:
//
//	h = z_D - z_taut,  z_taut = z_A - sqrt(R^2 - s^2)
//
// and, where the straight connector would run through the structure,
//
//	h = z_D + sqrt(d^2 - y^2),  d = sqrt(R^2 - x^2) - b
//
// z_D, z_A heights of D-ring and anchor above the surface m; s offset in plan m;
// R = Length + Slack, or of a retractable the distance at the start + Locking,
// at most Length; b distance of the anchor from the edge line and d of the
// D-ring at the first pull m; x offset along the edge and y of the position
// outwards m. With x = y = 0 that is h = z_D + R - b.
//
// Preconditions: 0 <= i < PositionCount. Special cases: an anchor below the
// D-ring gives a fall of more than the connector length; D-ring and anchor
// farther apart than R: OutOfReach.
//
// It errs high over an edge, which in truth holds the connector back, and for a
// retractable below the D-ring, which is taken not to wind in while the D-ring
// comes nearer. It errs low where a connector has slack that was not entered.
// Derived: the connector is taut when its shortest way is as long as it is.
func (l *Layout) At(i int) Place {
	pos := l.position(i)
	p := Place{Index: i}
	l.start(pos, &p)
	if p.Status = l.reach(pos, &p); p.Status != Known {
		p.forget()
		return p
	}
	if l.behindEdge() && l.crosses(&p) {
		l.overEdge(&p)
	} else {
		l.straight(&p)
	}
	p.SwingDrop = p.Taut.Z - p.Lowest
	p.Depth = l.Anchor.Z - p.Lowest
	p.Unrated = (p.OverEdge || p.EdgeLater) && !l.EdgeRated
	return p
}

// start sets what is known before the fall.
func (l *Layout) start(pos Position, p *Place) {
	p.Start = Spot{pos.X, pos.Y, l.DRing}
	if l.Edge != NoEdge {
		p.Start.Y = max(pos.Y, 0)
	}
	dx, dy, dz := p.Start.X-l.Anchor.X, p.Start.Y-l.Anchor.Y, l.Anchor.Z-p.Start.Z
	p.Offset = math.Hypot(dx, dy)
	p.Distance = math.Hypot(p.Offset, dz)
	p.OffsetAngle = math.Atan2(p.Offset, dz)
	p.Radius = l.Length + l.Slack
	if l.Retractable {
		p.Radius = min(p.Distance+l.Locking, l.Length)
	}
}

func (l *Layout) reach(pos Position, p *Place) Status {
	switch {
	case l.Retractable && l.Slack > 0:
		return SlackTwice
	case math.IsNaN(p.Distance) || !(p.Radius > 0):
		return Incomplete
	case l.Edge != NoEdge && l.Anchor.Y < 0 && l.Anchor.Z < 0:
		return InStructure
	case p.Distance <= p.Radius:
		return Known
	case l.Edge != NoEdge && pos.Y < 0:
		return Restrained
	}
	return OutOfReach
}

// forget leaves no figure behind that the status does not allow.
func (p *Place) forget() {
	nan := math.NaN()
	p.FreeFall, p.HeldFreeFall, p.Taut = nan, nan, Spot{nan, nan, nan}
	p.Lowest, p.Depth, p.SwingAngle, p.SwingDrop = nan, nan, nan, nan
}

// behindEdge reports whether the connector may have to come over the edge. An
// anchor right above the edge line counts: the connector grazes it.
func (l *Layout) behindEdge() bool {
	return l.Edge != NoEdge && l.Anchor.Y <= 0 && l.Anchor.Z >= 0
}

// crosses reports whether the straight connector, taut, would run through the
// structure: below the surface where it passes the edge line in plan.
func (l *Layout) crosses(p *Place) bool {
	z := l.Anchor.Z - leg(p.Radius, p.Offset)
	out := p.Start.Y - l.Anchor.Y
	if out == 0 {
		return z < 0
	}
	return l.Anchor.Z+float64((z-l.Anchor.Z)*(-l.Anchor.Y/out)) < 0
}

// straight is the first pull of a connector that touches nothing.
func (l *Layout) straight(p *Place) {
	p.Taut = Spot{p.Start.X, p.Start.Y, l.Anchor.Z - leg(p.Radius, p.Offset)}
	p.FreeFall = fallen(p.Start.Z - p.Taut.Z)
	p.HeldFreeFall = p.FreeFall
	p.Lowest = l.Anchor.Z - p.Radius
	p.Plane = Plane{Flat: true, X: l.Anchor.X, Y: l.Anchor.Y, DX: 1, Pivot: l.Anchor.Z, Offset: p.Offset, Radius: p.Radius}
	if p.Offset > 0 {
		p.Plane.DX, p.Plane.DY = (p.Start.X-l.Anchor.X)/p.Offset, (p.Start.Y-l.Anchor.Y)/p.Offset
	}
	p.SwingAngle = math.Asin(min(1, p.Offset/p.Radius))
	if l.behindEdge() {
		p.Plane.IntoFace = l.Anchor.Y < p.Start.Y
		p.EdgeLater = p.Lowest < 0
	}
}

// overEdge is the first pull of a connector that runs over the edge.
func (l *Layout) overEdge(p *Place) {
	p.OverEdge = true
	b := math.Hypot(l.Anchor.Y, l.Anchor.Z)
	along, y := p.Start.X-l.Anchor.X, p.Start.Y
	d := leg(p.Radius, along) - b
	p.Taut = Spot{p.Start.X, y, -leg(d, y)}
	p.FreeFall = fallen(p.Start.Z - p.Taut.Z)
	p.HeldFreeFall = p.Start.Z + leg(p.Radius-math.Hypot(along, b), y)
	if p.Radius-math.Hypot(along, b) < 0 {
		p.HeldFreeFall = math.NaN()
	}
	p.Lowest = b - p.Radius
	p.SwingAngle = math.NaN()
	switch {
	case y == 0:
		p.Plane = Plane{Flat: true, X: l.Anchor.X, DX: math.Copysign(1, along), Pivot: b, Offset: math.Abs(along), Radius: p.Radius}
	case along == 0:
		p.Plane = Plane{Flat: true, X: l.Anchor.X, DY: 1, Offset: y, Radius: p.Radius - b, IntoFace: true}
	default:
		return
	}
	p.SwingAngle = math.Asin(min(1, p.Plane.Offset/p.Plane.Radius))
}

// fallen keeps the last bits of a start that is just taut from making a fall
// upwards of it.
func fallen(h float64) float64 { return max(0, h) }
