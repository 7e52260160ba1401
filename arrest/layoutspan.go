package arrest

import (
	"math"

	"arrestcheck/arrest/rig"
)

// A strike is what comes of one obstacle over the bands: the speeds with which
// the body comes to it, m/s.
type strike struct {
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
	strikes    []strike  // by obstacle; high is NaN where the body never comes to it
	straight   int       // the points without an offset
	touched    int       // the points at which a swing without stretch comes to an obstacle
	fastest    float64   // greatest speed of such a swing, m/s
	passed     int       // the points at which the swing in time comes to an obstacle
	short      bool      // a room left is below zero
	left       []float64 // by obstacle: the least that is left to it, m; NaN where it is nowhere in the way
	travel     float64   // greatest travel of the path in a room, m
	peak       float64   // greatest peak of a swing, N, and that of any later one
	later      float64
	givenFloor bool // an item is missing
	modelFloor bool

	plan  rectangle  // all places that the body swings over
	start rectangle  // all places that it falls from
	feet  float64    // the lowest that the feet come to, m; NaN where no point says
	clear [2]float64 // greatest left to levels and to what moves, m: given, modelled; NaN where there are none
	aside []int      // by obstacle: the points at which it is not in the way
	need  [2]float64 // greatest room needed below the feet, m: given, modelled
	open  [2]bool    // what is left comes from a box that is at no point tried in the way
}

// note takes one point into the notes.
func (n *layoutNotes) note(c *Case, p *Point) {
	r := p.Layout
	n.position = c.Position
	if n.tried == 0 {
		n.travel, n.peak, n.later, n.fastest = nan, nan, nan, nan
		n.strikes = make([]strike, r.Layout.ObstacleCount)
		for i := range n.strikes {
			n.strikes[i] = strike{false, nan, nan, nan}
		}
		n.aside, n.left = make([]int, len(n.strikes)), make([]float64, len(n.strikes))
		for i := range n.left {
			n.left[i] = nan
		}
		n.need, n.clear, n.feet = [...]float64{nan, nan}, [...]float64{nan, nan}, nan
		n.start = rectangle{math.Inf(1), math.Inf(-1), math.Inf(1), math.Inf(-1)}
		n.plan = rectangle{math.Inf(1), math.Inf(-1), math.Inf(1), math.Inf(-1)}
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
	count(&n.touched, !math.IsNaN(r.fastestPass()))
	n.fastest = greater(n.fastest, r.Swing.LowestHigh)
	n.givenFloor = n.givenFloor || r.Given.Floor
	n.modelFloor = n.modelFloor || r.Modelled.Floor
	if c.Path != nil {
		count(&n.passed, !math.IsNaN(r.swungPass()))
		n.travel = greater(n.travel, p.Model.travel(r))
		if p.Model.Swings && r.swungPeak() > n.peak || math.IsNaN(n.peak) && p.Model.Swings {
			n.peak, n.later = r.swungPeak(), r.Planar.PeakBound
		}
	}
	n.places(r)
	if z := lowestFeet(p); !(n.feet <= z) {
		n.feet = z
	}
	for i := range n.strikes {
		n.strike(c, p, i)
	}
}

// places notes where in plan the body can come and what is in the way there.
func (n *layoutNotes) places(r *LayoutRun) {
	pl := &r.Place.Plane
	n.plan.take(r.Place.Start.X, r.Place.Start.Y)
	n.start.take(r.Place.Start.X, r.Place.Start.Y)
	if pl.Flat {
		n.plan.take(pl.X-float64(pl.DX*pl.Offset), pl.Y-float64(pl.DY*pl.Offset))
	}
	for k, room := range [...]*Room{&r.Given, &r.Modelled} {
		if !room.Known || k == 1 && r.Given.Known {
			continue
		}
		for i := range n.aside {
			if room.Lefts.Aside>>i&1 == 1 {
				n.aside[i]++
			}
		}
	}
	for k, room := range [...]*Room{&r.Given, &r.Modelled} {
		if room.Known {
			n.need[k] = greater(n.need[k], room.Counts)
			least := nan
			for _, l := range room.Lefts.List[:room.Lefts.Count] {
				n.leaves(l.Obstacle, l.Left)
				if o := &r.Layout.Obstacles[l.Obstacle]; (o.Kind == rig.Level || o.Moving) && !(least <= l.Left) {
					least = l.Left
				}
			}
			n.clear[k] = greater(n.clear[k], least)
		}
	}
}

// lowestFeet returns the lowest height that the feet come to at one point, m:
// hanging below the connector, and after its travel where a path gives it.
func lowestFeet(p *Point) float64 {
	r := p.Layout
	z := r.Place.Lowest
	if p.Model != nil && p.Model.Swings {
		z = r.Planar.Lowest.Z
	} else if p.Model != nil && !p.Model.NoFall && p.Model.Failed == nil {
		z -= p.Model.Run.StoppingDistance
	}
	return z - r.Layout.Feet
}

// leaves notes what is left to an obstacle.
func (n *layoutNotes) leaves(obstacle int, left float64) {
	if left < n.left[obstacle] || math.IsNaN(n.left[obstacle]) {
		n.left[obstacle] = left
	}
	n.short = n.short || left < 0
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

// overSite fills the spans of a layout at one position: what hangs on the
// geometry alone over the axes of the geometry; what hangs on the fall over its
// least and greatest free fall with all that is not of the layout; and what a
// path gives over both together.
func overSite(j *Job, s *spans) (partImpossible bool) {
	g := newSiting(j)
	g.geometry(func(int) bool { return false })
	g.room()
	s.overGeometry(g)
	partImpossible = s.overFalls(g)
	if j.Point.Path != nil {
		g := newSiting(j)
		g.geometry(j.madeOfParts)
		g.room()
		s.overRuns(g)
	}
	s.boxes(j)
	return partImpossible
}

// widen widens the spans of some outputs by a point, of which a copy is kept
// only where it widens one.
func (s *spans) widen(p *Point, c *Case, list []int) {
	for _, i := range list {
		o := &outputs[i]
		if p.Impossible && o.rests&onStop != 0 && o.rests&ofLayout == 0 {
			continue
		}
		low, high := o.low(p), o.of(p)
		if low < s.of[i].low.value || high > s.of[i].high.value || !s.of[i].known() && !math.IsNaN(high) {
			where := s.add(*c)
			s.take(p, where, list)
			return
		}
	}
}

// listed returns the live outputs that the test picks.
func (s *spans) listed(picks func(*output) bool) []int {
	var list []int
	for _, i := range s.live {
		if picks(&outputs[i]) {
			list = append(list, i)
		}
	}
	return list
}

// ofSite reports whether the output hangs on the layout and on no path.
func ofSite(o *output) bool {
	return o.rests&ofLayout != 0 || o.quantity == FreeFall && o.evidence == Given
}

func ofRun(o *output) bool { return o.rests&(ofPath|ofModel) != 0 }

// overGeometry works the layout out at every corner of its axes, without a path.
func (s *spans) overGeometry(g *siting) {
	motion := s.alone(func(in *Input) bool { return in.place() == 1 || in.Role == OfPlace })
	axes := append(motion, g.axes...)
	modelled := s.base.Path != nil
	list := s.listed(func(o *output) bool {
		// With a path its travel is the one that counts where none was entered.
		rooms := o.rests&onClearance != 0
		return ofSite(o) && !(rooms && modelled && g.plan.Clearance != nil && !g.plan.Clearance.entered(&s.base))
	})
	base := s.base
	base.Path = nil
	var p Point
	try := func(c *Case) {
		At(c, &p)
		at := *c
		at.Path = s.base.Path
		if !modelled {
			s.note(c, &p)
		}
		s.widen(&p, &at, list)
	}
	for n := range 1 << len(axes) {
		c := cornerOf(&base, axes, n)
		try(&c)
		g.kinks(&c, try)
	}
}

// overFalls works out what hangs on the fall at its least and greatest height,
// with every corner of what is not of the layout.
func (s *spans) overFalls(g *siting) (partImpossible bool) {
	s.axes = s.alone(func(in *Input) bool { return in.Role != OfPart })
	heights := [...]float64{nan, nan}
	if fall := &s.of[indexOf(FreeFall, Given)]; fall.known() {
		low, high := s.caseAt(fall.low), s.caseAt(fall.high)
		heights = [...]float64{s.fallAt(&low), s.fallAt(&high)}
		figures := g.plan.figures(g.pos) // of the layout, none of the path
		s.axes = append(s.axes, func(c *Case, end bool) {
			from := &low
			if end {
				from = &high
			}
			for _, n := range figures {
				c.Figures[n] = from.Figures[n]
			}
		})
	}
	list := s.listed(func(o *output) bool { return !ofSite(o) && !ofRun(o) })
	var p Point
	for n := range 1 << len(s.axes) {
		c := cornerOf(&s.base, s.axes, n)
		bare := c
		bare.Layout, bare.Path = nil, nil
		bare.FreeFall = heights[n>>max(0, len(s.axes)-1)&1]
		At(&bare, &p)
		partImpossible = partImpossible || p.Impossible
		s.widen(&p, &c, list)
	}
	return partImpossible
}

// fallAt returns the free fall of a point, m.
func (s *spans) fallAt(c *Case) float64 {
	var l rig.Layout
	c.Layout.fill(c, &l)
	return decimal(l.At(c.Position).FreeFall)
}

// figures lists the figures of the layout that a position has.
func (pl *LayoutPlan) figures(pos *PlannedPosition) []int {
	var list []int
	for _, n := range [...]int{pl.AnchorHeight, pl.BehindEdge, pl.DRing, pl.Length, pl.Slack, pl.Locking, pos.Along, pos.Out} {
		if n != NoFigure {
			list = append(list, n)
		}
	}
	return list
}

// overRuns runs the path at every corner of the geometry with every corner of
// what is not of the layout, and closes in on what lies between.
func (s *spans) overRuns(g *siting) {
	axes := append(s.alone(func(in *Input) bool { return in.Role != OfStop }), g.axes...)
	list := s.listed(ofRun)
	var p Point
	try := func(c *Case) {
		At(c, &p)
		s.note(c, &p)
		s.widen(&p, c, list)
	}
	for n := range 1 << len(axes) {
		c := cornerOf(&s.base, axes, n)
		try(&c)
		g.kinks(&c, try)
	}
	searchPath(s)
}

// boxes puts right what boxes do over bands of their sides or of the place of the
// body: the points tried may have one in the way, or beside it, that is not so at
// some point between. The plan of all swings, as one rectangle, says which may be
// in the way at all; the places that the body falls from, which surely are.
func (s *spans) boxes(j *Job) {
	n, plan := &s.layouts[0], j.Point.Layout
	lo, hi := ends(j)
	for i := range plan.Obstacles {
		o := &plan.Obstacles[i]
		if o.level() || o.Moving || !n.shifts(plan, o, &lo, &hi) {
			continue
		}
		if n.plan.meets(o, &lo, &hi, plan.HalfWidth) {
			s.mayBeInTheWay(i, lo.Figures[o.Below])
		}
		if !n.start.within(o, &lo, &hi, plan.HalfWidth) {
			s.mayBeAside()
		}
	}
}

// mayBeInTheWay lowers what is left to a box at the depth room, m, that is beside
// the fall at some of the points tried, and has the body come to it where it goes
// so deep.
func (s *spans) mayBeInTheWay(i int, room float64) {
	n := &s.layouts[0]
	if k := &n.strikes[i]; math.IsNaN(k.high) && n.feet <= -room && !math.IsNaN(n.fastest) {
		k.low, k.high = 0, n.fastest
		if of := &s.of[indexOf(SpeedAtObstacle, Shape)]; !of.known() {
			*of = span2(n.fastest, s.of[indexOf(FreeFall, Given)].high.where)
		}
	}
	if n.aside[i] == 0 {
		return
	}
	for k, e := range [...]Evidence{Given, Modelled} {
		left := rig.Remains(room, n.need[k])
		if math.IsNaN(left) {
			continue
		}
		n.leaves(i, left)
		where := s.of[indexOf(ClearanceNeeded, e)].high.where
		switch of := &s.of[indexOf(ClearanceLeft, e)]; {
		case !of.known():
			*of = span2(left, where)
			n.open[k] = true
		case left < of.low.value:
			of.low = extreme{left, where}
		}
	}
}

// mayBeAside raises the favourable end of what is left to what it is without any
// box; where nothing else lies below, that end is open.
func (s *spans) mayBeAside() {
	n := &s.layouts[0]
	for k, e := range [...]Evidence{Given, Modelled} {
		of := &s.of[indexOf(ClearanceLeft, e)]
		switch {
		case !of.known():
		case math.IsNaN(n.clear[k]):
			n.open[k] = true
		case n.clear[k] > of.high.value:
			of.high = extreme{n.clear[k], of.high.where}
		}
	}
}

// shifts reports whether anything that a box is in the way by has two ends.
func (n *layoutNotes) shifts(plan *LayoutPlan, o *PlannedObstacle, lo, hi *Case) bool {
	pos := &plan.Positions[n.position]
	for _, f := range [...]int{
		pos.Along, pos.Out, plan.BehindEdge, plan.HalfWidth, plan.DRing,
		o.Below, o.Height, o.AlongFrom, o.AlongTo, o.OutFrom, o.OutTo,
	} {
		if f != NoFigure && lo.Figures[f] < hi.Figures[f] {
			return true
		}
	}
	return plan.Edge != rig.NoEdge && n.tried > 1 // whether the connector is over it
}

func span2(x float64, where int) span { return span{extreme{x, where}, extreme{x, where}} }

// A rectangle is a part of the plan, m.
type rectangle struct{ x0, x1, y0, y1 float64 }

// take widens the rectangle by a point.
func (r *rectangle) take(x, y float64) {
	r.x0, r.x1, r.y0, r.y1 = min(r.x0, x), max(r.x1, x), min(r.y0, y), max(r.y1, y)
}

// meets reports whether a box, as large as its bands allow, comes into the
// rectangle, to either side of which the body reaches. Without a half width it
// does.
func (r *rectangle) meets(o *PlannedObstacle, lo, hi *Case, halfWidth int) bool {
	if halfWidth == NoFigure {
		return true
	}
	w := hi.Figures[halfWidth]
	x0, x1 := order(min(lo.Figures[o.AlongFrom], lo.Figures[o.AlongTo]), max(hi.Figures[o.AlongFrom], hi.Figures[o.AlongTo]))
	y0, y1 := order(min(lo.Figures[o.OutFrom], lo.Figures[o.OutTo]), max(hi.Figures[o.OutFrom], hi.Figures[o.OutTo]))
	return x0-w <= r.x1 && x1+w >= r.x0 && y0-w <= r.y1 && y1+w >= r.y0
}

// within reports whether the rectangle lies in the plan of a box as small as its
// bands allow, to either side of which the body reaches. One with an underside may
// be above the body: of it nothing is sure.
func (r *rectangle) within(o *PlannedObstacle, lo, hi *Case, halfWidth int) bool {
	if halfWidth == NoFigure {
		return true // counted as in the way at every point
	}
	if o.Height != NoFigure {
		return false
	}
	inner := func(from, to int) (a, b float64) {
		a, b = hi.Figures[from], lo.Figures[to]
		if lo.Figures[from] > hi.Figures[to] { // written the other way round
			a, b = hi.Figures[to], lo.Figures[from]
		}
		return a - lo.Figures[halfWidth], b + lo.Figures[halfWidth]
	}
	x0, x1 := inner(o.AlongFrom, o.AlongTo)
	y0, y1 := inner(o.OutFrom, o.OutTo)
	return x0 <= r.x0 && r.x1 <= x1 && y0 <= r.y0 && r.y1 <= y1
}
