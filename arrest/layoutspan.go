package arrest

import (
	"math"

	"arrestcheck/arrest/rig"
)

// A strike is what comes of one obstacle over the bands: the speeds with which
// the body comes to it, m/s, and the position where the greatest is.
type strike struct {
	position  int
	falling   bool // before the first pull
	low, high float64
	force     float64 // least mean force of the hit where its stop is stated, N; NaN else
}

// layoutNotes are what one position came to over the bands that no estimate
// tells.
type layoutNotes struct {
	position   int
	tried      int // points tried, and of them those of which ...
	known      int
	restrained int
	unflat     int
	edge       int
	unrated    int
	face       int
	strikes    []strike // by obstacle; high is NaN where the body never comes to it
	straight   int      // the points without an offset
	touched    int      // the points at which a swing without stretch comes to an obstacle
	fastest    float64  // greatest speed of such a swing, m/s
	passed     int      // the points at which the swing in time comes to an obstacle
	short      bool     // a room left is below zero
	fall       float64  // greatest free fall, m
	travel     float64  // greatest travel of the path in a room, m
	peak       float64  // greatest peak of a swing, N, and that of any later one
	later      float64
	givenFloor bool // an item is missing
	modelFloor bool
}

// note takes one point into the notes.
func (n *layoutNotes) note(c *Case, p *Point) {
	r := p.Layout
	n.position = c.Position
	if n.tried == 0 {
		n.fall, n.travel, n.peak, n.later, n.fastest = nan, nan, nan, nan, nan
		n.strikes = make([]strike, r.Layout.ObstacleCount)
		for i := range n.strikes {
			n.strikes[i] = strike{c.Position, false, nan, nan, nan}
		}
	}
	n.tried++
	count := func(to *int, is bool) {
		if is {
			*to++
		}
	}
	known := r.Place.Status == rig.Known
	count(&n.known, known)
	count(&n.restrained, r.Place.Status == rig.Restrained)
	if !known {
		return
	}
	count(&n.unflat, !r.Place.Plane.Flat)
	count(&n.straight, !r.swings())
	count(&n.edge, r.Place.OverEdge || r.Place.EdgeLater)
	count(&n.unrated, r.Place.Unrated)
	count(&n.face, r.Place.Plane.IntoFace && r.swings())
	n.fall = greater(n.fall, r.Place.FreeFall)
	count(&n.touched, !math.IsNaN(r.fastestPass()))
	n.fastest = greater(n.fastest, r.Swing.LowestHigh)
	n.givenFloor = n.givenFloor || r.Given.Floor
	n.modelFloor = n.modelFloor || r.Modelled.Floor
	n.short = n.short || r.Given.Known && r.Given.Left < 0 || r.Modelled.Known && r.Modelled.Left < 0
	if c.Path != nil {
		count(&n.passed, !math.IsNaN(r.swungPass()))
		n.travel = greater(n.travel, p.Model.travel(r))
		if p.Model.Swings && r.swungPeak() > n.peak || math.IsNaN(n.peak) && p.Model.Swings {
			n.peak, n.later = r.swungPeak(), r.Planar.PeakBound
		}
	}
	for i := range n.strikes {
		n.strike(c, p, i)
	}
}

// greater returns the greater of two figures of which the first may be NaN.
func greater(a, b float64) float64 {
	if b > a || math.IsNaN(a) {
		return b
	}
	return a
}

// strike notes with what speed the body comes to the obstacle i: in time where
// a path says so, else as if the connector did not stretch.
func (n *layoutNotes) strike(c *Case, p *Point, i int) {
	r := p.Layout
	s, pass := &n.strikes[i], &r.Swing.Passes[i]
	low, high, down, exact := pass.Low, pass.High, 0.0, pass.Falling
	reached := pass.Reached
	if p.Model != nil && c.Path != nil && p.Model.Swings && r.Planar.Status != 0 {
		q := &r.Planar.Passes[i]
		reached, low, high, down, exact = q.Reached, q.Speed, q.Speed, max(0, q.Down), true
	}
	if !reached {
		return
	}
	if pass.Reached && pass.Falling {
		down = 1
		s.falling = true
	}
	if math.IsNaN(low) {
		low = 0
	}
	s.high = greater(s.high, high)
	if !(s.low <= low) {
		s.low = low
	}
	if over := c.Layout.Obstacles[i].StopOver; over != NoFigure && exact {
		body := rig.Body{Mass: p.TotalMass, InitialSpeed: c.InitialSpeed, Gravity: c.Gravity}
		if f := rig.HitForce(&body, low, c.Figures[over], down); !(s.force <= f) {
			s.force = f
		}
	}
}

// struck reports whether the body comes to anything.
func (n *layoutNotes) struck() bool {
	for i := range n.strikes {
		if n.strikes[i].high >= 0 {
			return true
		}
	}
	return n.face > 0 || n.short
}

// overLayout fills the spans position by position. The worst position counts
// for each figure; its spans say where.
func overLayout(j *Job) (s *spans, partImpossible bool) {
	var parts []*spans
	for k := range j.Point.Layout.Positions {
		at := *j
		at.Point.Position = k
		part, impossible := overBox(&at)
		parts, partImpossible = append(parts, part), partImpossible || impossible
	}
	if len(parts) == 1 {
		return parts[0], partImpossible
	}
	s = newSpans(j)
	s.parts = parts
	for _, i := range s.live {
		s.of[i] = worst(s, i)
	}
	for _, part := range parts {
		s.layouts = append(s.layouts, part.layouts...)
		s.path.join(&part.path)
	}
	return s, partImpossible
}

// worst returns the span of one output over all positions. Of the position that
// comes out worst everywhere, both ends are its own; else the ends are the worst
// of either end: the figure of the worst position is neither below nor above.
func worst(s *spans, i int) span {
	var w span
	w.forget()
	for k, part := range s.parts {
		e := part.of[i]
		if !e.known() {
			continue
		}
		left := outputs[i].quantity == ClearanceLeft
		take := func(to *extreme, from extreme, bad bool) {
			if better := left && from.value < to.value || !left && from.value > to.value; !better && !math.IsNaN(to.value) {
				return
			}
			*to = extreme{from.value, s.add(part.caseAt(from))}
			if bad {
				s.at[i] = k
			}
		}
		take(&w.low, e.low, left)
		take(&w.high, e.high, !left)
	}
	return w
}

// join takes the notes of another position in.
func (n *pathNotes) join(o *pathNotes) {
	n.rigid, n.beyond = n.rigid || o.rigid, n.beyond|o.beyond
	if o.used > n.used {
		n.used, n.usedBy, n.usedUp, n.usedOf = o.used, o.usedBy, o.usedUp, o.usedOf
	}
	if o.exhausted && (!n.exhausted || o.left > n.left) {
		n.exhausted, n.part, n.left, n.peak = true, o.part, o.left, o.peak
	}
	if n.failed == nil {
		n.failed = o.failed
	}
}

// noOffset widens the spans by the points beside the corners at which an offset
// between anchor and position is least: where a band holds it, at none at all.
// Every figure that grows or shrinks with the offset has an end there.
func noOffset(j *Job, s *spans) {
	lo, hi := ends(j)
	plan, pos := j.Point.Layout, &j.Point.Layout.Positions[j.Point.Position]
	var p Point
	for n := range s.corners() {
		corner := s.corner(n)
		along := corner
		along.Figures[pos.Along] = clamp(0, &lo, &hi, pos.Along)
		out, both := corner, along
		for _, c := range [...]*Case{&out, &both} {
			anchor := 0.0
			if plan.Edge != rig.NoEdge {
				anchor = -c.Figures[plan.BehindEdge]
			}
			c.Figures[pos.Out] = clamp(anchor, &lo, &hi, pos.Out)
			if plan.Edge != rig.NoEdge {
				c.Figures[plan.BehindEdge] = clamp(-c.Figures[pos.Out], &lo, &hi, plan.BehindEdge)
			}
		}
		for _, c := range [...]*Case{&along, &out, &both} {
			if *c != corner {
				At(c, &p)
				s.takeBeside(&p, c)
			}
		}
	}
}

// clamp returns the value nearest to x that the figure can have.
func clamp(x float64, lo, hi *Case, figure int) float64 {
	return min(max(x, lo.Figures[figure]), hi.Figures[figure])
}

// turned are the outputs of a layout that need not have their ends at corners:
// the free fall of a retractable whose line comes to its end, the speeds of a
// swing, and what is left to obstacles that are in the way for a part of the
// bands only.
var turned = [...]struct {
	quantity Quantity
	evidence Evidence
}{
	{FreeFall, Given}, {SwingSpeed, Shape}, {SpeedAtObstacle, Shape},
	{SwingDrop, Given}, {ClearanceNeeded, Given}, {ClearanceLeft, Given},
}

// searchLayout widens the spans by turning points inside the bands of the
// layout, and carries those of the free fall to every corner of all else.
func searchLayout(s *spans) {
	if !s.freeLayout() {
		return
	}
	for _, t := range turned {
		s.search(indexOf(t.quantity, t.evidence), true)
	}
	fall := &s.of[indexOf(FreeFall, Given)]
	for _, e := range [...]extreme{fall.low, fall.high} {
		if fall.known() && e.where < 0 {
			s.spread(s.caseAt(e))
		}
	}
}

// freeLayout reports whether a figure of the layout has two ends.
func (s *spans) freeLayout() bool {
	for _, in := range s.free {
		if in.Role == OfLayout {
			return true
		}
	}
	return false
}

// spread widens the spans by a point with every corner of what is not of the
// layout.
func (s *spans) spread(at Case) {
	var p Point
	for n := range s.corners() {
		c, same := at, true
		for i, in := range s.free {
			high := n>>i&1 == 1
			switch {
			case in.Role == OfLayout:
				same = same && !high
			case high:
				in.Set(&c, in.Band.High)
			default:
				in.Set(&c, in.Band.Low)
			}
		}
		if same {
			At(&c, &p)
			s.takeBeside(&p, &c)
		}
	}
}
