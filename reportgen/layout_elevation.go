package reportgen

import (
	"math"
	"slices"
	"strings"

	"arrestcheck/arrest"
	"arrestcheck/arrest/quantity"
	"arrestcheck/arrest/rig"
	drawing "arrestcheck/reportgen/figure"
)

// An elevation is a layout from the side, in the plane of the swing.
type elevation struct {
	*drawnFall
	cut   plane
	chain chain
	reach reach

	scene *drawing.Scene
	view  drawing.View
	box   drawing.Box // of the drawing without its dimensions
	below []string    // what lies below the drawing, above it, and outside its plane
	above []string
	apart []string
}

// The sheet of an elevation, mm.
const (
	elevationMost  = 135.0 // height of what is drawn to scale
	elevationLeast = 62.0
	aboveElevation = 19.0 // room for the dimensions across
	belowElevation = 15.0 // room for the scale
	chainGap       = 9.0  // from the drawing to its chain
	chainMost      = 66.0 // room for the texts of the chain
	sideLeast      = 3.0
	besideLeft     = 14.0 // room for names beside what is drawn
	besideRight    = 26.0
)

// elevation draws the layout from the side.
func (b *builder) elevation() (*drawing.Scene, error) {
	f, err := b.drawn()
	if err != nil {
		return nil, err
	}
	return f.elevation()
}

func (f *drawnFall) elevation() (*drawing.Scene, error) {
	e := &elevation{drawnFall: f, cut: planeOf(f.layout(), f.place(), f.start())}
	e.chain = f.dimensions()
	e.reach = e.reaches()
	if err := e.sheet(); err != nil {
		return nil, err
	}
	e.structure()
	e.obstacles()
	e.connector()
	e.swing()
	e.points()
	e.upright()
	e.across()
	e.scaleBar(e.scene, e.view)
	e.scene.Notes = e.notes()
	return e.scene, nil
}

// sheet chooses scale and size.
func (e *elevation) sheet() error {
	room := 0.0
	for _, p := range e.chain.parts {
		room = max(room, drawing.RoomFor(p.text))
	}
	room = min(room, chainMost) + chainGap + 8
	wide := drawing.Box{Left: sideLeast, Right: drawing.FullWidth - room, Top: aboveElevation, Bottom: aboveElevation + elevationMost}
	r := e.reach
	inner := wide
	inner.Left, inner.Right = inner.Left+besideLeft, inner.Right-besideRight
	v, err := drawing.Fit(r.left, r.right, r.bottom, r.top, inner)
	if err != nil {
		return &NoFigure{nothingOfASize, nothingSizeHint}
	}
	inner.Bottom = inner.Top + max(v.Length(r.top-r.bottom), elevationLeast)
	wide.Bottom = inner.Bottom
	if e.cut.side < 0 {
		wide, inner = mirrored(wide), mirrored(inner)
	}
	if e.view, err = drawing.Fit(min(e.cut.side*r.left, e.cut.side*r.right), max(e.cut.side*r.left, e.cut.side*r.right), r.bottom, r.top, inner); err != nil {
		return &NoFigure{nothingOfASize, nothingSizeHint}
	}
	e.box = wide
	e.scene = e.builder.scene(e.say(elevationTitle, e.position(e.index), e.where, orNothing(e.s.File.Document.Title)), wide.Bottom+belowElevation)
	e.scene.Desc = e.say(elevationDesc, e.position(e.index), e.length(e.layout().Anchor.Z), e.length(e.layout().DRing))
	return nil
}

// mirrored returns a box where it is on a sheet seen from behind.
func mirrored(b drawing.Box) drawing.Box {
	b.Left, b.Right = drawing.FullWidth-b.Right, drawing.FullWidth-b.Left
	return b
}

// at returns where a point of the plane is on paper.
func (e *elevation) at(u, z float64) drawing.Point { return e.view.At(e.cut.side*u, z) }

// spot returns where a point in space is on paper, seen along the plane.
func (e *elevation) spot(s rig.Spot) drawing.Point { return e.at(e.cut.of(s.X, s.Y), s.Z) }

// inner is the direction on paper in which the structure lies.
func (e *elevation) inner() float64 { return e.cut.in * e.cut.side }

// structure draws the surface and the edge.
func (e *elevation) structure() {
	s, b := e.scene, e.box
	y := e.at(0, 0).Y
	if y < b.Top-1 || y > b.Bottom+1 {
		return
	}
	left, right := drawing.Point{X: b.Left, Y: y}, drawing.Point{X: b.Right, Y: y}
	switch {
	case e.layout().Edge == rig.NoEdge:
		s.Line(left, right, drawing.Pen{Dash: drawing.LongDashes})
		e.lineName(e.height(surfaceWords[e.sub], 0), left.X, right.X, y)
	case e.cut.face:
		s.Line(left, right, drawing.Pen{Weight: drawing.Medium})
		e.strip(left, right, hatchDeep)
		e.lineName(e.height(e.say(withRemark, edgeKinds[e.layout().Edge], edgeSeen), 0), left.X, right.X, y)
	default:
		e.edgeCorner(y)
	}
}

// strip hatches along a level line, downwards.
func (e *elevation) strip(a, b drawing.Point, deep float64) {
	e.scene.Hatch([]drawing.Point{a, b, {X: b.X, Y: b.Y + deep}, {X: a.X, Y: a.Y + deep}}, drawing.Rising)
}

// edgeCorner draws the surface up to the edge and the face below it.
func (e *elevation) edgeCorner(y float64) {
	s, b := e.scene, e.box
	x := e.at(e.cut.edge, 0).X
	far := b.Right
	if e.inner() < 0 {
		far = b.Left
	}
	if x < b.Left || x > b.Right {
		return
	}
	deep := b.Bottom
	s.Polyline([]drawing.Point{{X: far, Y: y}, {X: x, Y: y}, {X: x, Y: deep}}, drawing.Pen{Weight: drawing.Medium})
	in := x + e.inner()*hatchDeep
	s.Hatch([]drawing.Point{{X: far, Y: y}, {X: x, Y: y}, {X: x, Y: deep}, {X: in, Y: deep}, {X: in, Y: y + hatchDeep}, {X: far, Y: y + hatchDeep}}, drawing.Rising)
	e.lineName(e.height(surfaceWords[e.sub], 0), min(far, x), max(far, x), y)
	away := drawing.Start
	if e.inner() > 0 {
		away = drawing.End
	}
	inside := drawing.Start + drawing.End - away
	spots := []drawing.Spot{
		{At: drawing.Point{X: in, Y: y + hatchDeep}, Anchor: inside, Lift: drawing.Below, Gap: 0.6},
		{At: drawing.Point{X: x, Y: y}, Anchor: away, Lift: drawing.Below, Gap: 0.6},
		{At: drawing.Point{X: in, Y: y + hatchDeep}, Anchor: inside, Lift: drawing.Below, Lines: 1},
		{At: drawing.Point{X: x, Y: y}, Anchor: away, Lift: drawing.Below, Lines: 1},
	}
	for i := 1; i < 6; i++ {
		spots = append(spots, drawing.Spot{At: drawing.Point{X: in, Y: y + hatchDeep + float64(6*i)}, Anchor: inside})
	}
	s.Text(drawing.Text{Text: edgeKinds[e.layout().Edge], Rank: drawing.RankNote, Spots: spots})
}

// lineName names a level line at one of its ends, above it or below its
// hatching.
func (e *elevation) lineName(name string, left, right, y float64) {
	e.scene.Text(drawing.Text{Text: name, Rank: drawing.RankNote, Spots: lineSpots(left, right, y)})
}

// lineSpots are places along a level line: above it from both ends, then below
// its hatching, then nearer to the middle.
func lineSpots(left, right, y float64) []drawing.Spot {
	var spots []drawing.Spot
	under := drawing.Point{Y: y + hatchDeep}
	for i := range 7 {
		off := float64(i) / 12 * (right - left)
		for _, lift := range []drawing.Lift{drawing.Above, drawing.Below} {
			from, to := drawing.Point{X: left + off, Y: y}, drawing.Point{X: right - off, Y: y}
			if lift == drawing.Below {
				from.Y, to.Y = under.Y, under.Y
			}
			spots = append(spots, drawing.Spot{At: from, Anchor: drawing.Start, Lift: lift, Gap: 0.3}, drawing.Spot{At: to, Anchor: drawing.End, Lift: lift, Gap: 0.3})
		}
	}
	for _, lift := range []drawing.Lift{drawing.Above, drawing.Below} {
		spots = append(spots, drawing.Spot{At: drawing.Point{X: left, Y: y}, Anchor: drawing.Start, Lift: lift, Lines: 1, Gap: 1}, drawing.Spot{At: drawing.Point{X: right, Y: y}, Anchor: drawing.End, Lift: lift, Lines: 1, Gap: 1})
	}
	return spots
}

// connector draws the connector at the start and at the first pull, and the way
// between.
func (e *elevation) connector() {
	s, p := e.scene, e.place()
	anchor, start := e.spot(e.layout().Anchor), e.spot(e.start())
	s.Line(anchor, start, drawing.Pen{Dash: drawing.Dashes})
	if !e.known() {
		return
	}
	taut := e.spot(p.Taut)
	s.Polyline(e.overEdge(anchor, taut), drawing.Pen{})
	if e.view.Length(p.FreeFall) > 4 {
		s.Arrow(start, taut, drawing.CurvePen)
	} else {
		s.Line(start, taut, drawing.CurvePen)
	}
	if rest, ok := e.resting(); ok {
		s.Polyline(e.overEdge(anchor, rest), drawing.Pen{Dash: drawing.LongDashes})
	}
}

// overEdge returns the way of the connector from the anchor to a point, by the
// edge where it runs over it.
func (e *elevation) overEdge(anchor, to drawing.Point) []drawing.Point {
	p := e.place()
	if straight := []drawing.Point{anchor, to}; !p.OverEdge && !e.throughStructure(anchor, to) {
		return straight
	}
	if !e.cut.face {
		return []drawing.Point{anchor, e.at(e.cut.edge, 0), to}
	}
	// Unfolded, the connector is straight from the pivot above the edge.
	pivot := e.at(e.cut.pivot, p.Plane.Pivot)
	y := e.at(0, 0).Y
	x := pivot.X
	if to.Y != pivot.Y {
		x += (to.X - pivot.X) * (y - pivot.Y) / (to.Y - pivot.Y)
	}
	return []drawing.Point{anchor, {X: x, Y: y}, to}
}

// throughStructure reports whether the straight line from the anchor to a point
// would run through the structure.
func (e *elevation) throughStructure(anchor, to drawing.Point) bool {
	edge := e.at(e.cut.edge, 0)
	if e.cut.face || !isNumber(edge.X) || (to.X-edge.X)*(anchor.X-edge.X) >= 0 {
		return false
	}
	return anchor.Y+float64((to.Y-anchor.Y)*((edge.X-anchor.X)/(to.X-anchor.X))) > edge.Y
}

// resting returns where the body comes to rest, or to its lowest point.
func (e *elevation) resting() (drawing.Point, bool) {
	u, z, ok := e.rest()
	return e.at(u, z), ok
}

func (e *elevation) rest() (u, z float64, ok bool) {
	p := e.place()
	if !e.known() || !p.Plane.Flat || !isNumber(e.travel) {
		return 0, 0, false
	}
	u, z = e.cut.pivot, p.Lowest-e.travel
	if p.Plane.Offset == 0 {
		u = e.cut.of(p.Start.X, p.Start.Y)
	}
	if len(e.trace) > 0 {
		u = e.cut.pivot + e.run.Planar.Lowest.U
	}
	return u, z, true
}

// swing draws the way after the first pull: that of the model, and the arc of a
// connector that does not stretch.
func (e *elevation) swing() {
	if !e.swings() {
		return
	}
	e.scene.Polyline(e.onPaper(e.cut.arc(e.place())), drawing.HelpPen)
	if len(e.trace) > 0 {
		e.scene.Polyline(e.onPaper(e.modelledWay()), drawing.Pen{Weight: drawing.Medium})
	}
}

// swings reports whether there is a swing in the plane.
func (e *elevation) swings() bool {
	return e.known() && e.place().Plane.Flat && e.place().Plane.Offset > 0
}

// A place in the plane of an elevation, m.
type inPlane struct{ u, z float64 }

func (e *elevation) onPaper(list []inPlane) []drawing.Point {
	points := make([]drawing.Point, len(list))
	for i, p := range list {
		points[i] = e.at(p.u, p.z)
	}
	return points
}

// arc is the swing without stretch, to the same angle on the other side or to
// the structure.
func (c *plane) arc(p *rig.Place) []inPlane {
	const n = 90
	var list []inPlane
	for i := range 2*n + 1 {
		sin, cos := math.Sincos(p.SwingAngle * (1 - float64(i)/n))
		at := inPlane{c.pivot + float64(p.Plane.Radius*sin), p.Plane.Pivot - float64(p.Plane.Radius*cos)}
		if c.inside(at.u, at.z) && i > 0 {
			break
		}
		list = append(list, at)
	}
	return list
}

// modelledWay is the way of the model from the first pull on, up to where it comes
// into the structure.
func (e *elevation) modelledWay() []inPlane {
	var list []inPlane
	for _, m := range e.trace {
		at := inPlane{e.cut.pivot + m.U, m.Z}
		if m.Time < e.run.Planar.FirstPull*(1-1e-9) {
			continue
		}
		if e.cut.inside(at.u, at.z) && len(list) > 0 {
			break
		}
		list = append(list, at)
	}
	return list
}

// points marks and names the anchor and the places of the D-ring.
func (e *elevation) points() {
	s, p := e.scene, e.place()
	s.Named(e.spot(e.layout().Anchor), drawing.Cross, e.height(anchorWord, e.layout().Anchor.Z))
	name := bodyPoint
	if p.Status == rig.Restrained {
		name = heldPoint
	}
	s.Named(e.spot(e.start()), drawing.Open, e.height(name[e.sub], p.Start.Z))
	if !e.known() {
		return
	}
	s.Named(e.spot(p.Taut), drawing.Open, e.height(tautWord, p.Taut.Z))
	if u, z, ok := e.rest(); ok {
		s.Named(e.at(u, z), drawing.Filled, e.height(e.restName(), z))
	} else if e.swings() {
		s.Named(e.at(e.cut.pivot, p.Lowest), drawing.Open, e.height(lowestTaut, p.Lowest))
	}
	e.feet()
}

// restName says what the lowest point is.
func (e *elevation) restName() string {
	switch {
	case e.path && e.swings():
		return lowestModel
	case e.room != nil && e.room.Floor:
		return restAtLeast
	}
	return restWord
}

// feet draws how far the body reaches below its D-ring at rest, where the chain
// does not say so.
func (e *elevation) feet() {
	u, z, ok := e.rest()
	if !ok || e.room == nil || e.plan.Feet == arrest.NoFigure || e.plan.Clearance.Datum == rig.BelowAnchor {
		return
	}
	from, to := e.at(u, z), e.at(u, z-e.layout().Feet)
	e.scene.Line(from, to, drawing.HelpPen)
	e.scene.Line(drawing.Point{X: to.X - 1.3, Y: to.Y}, drawing.Point{X: to.X + 1.3, Y: to.Y}, drawing.Pen{})
	mid := drawing.Point{X: to.X, Y: (from.Y + to.Y) / 2}
	e.scene.Text(drawing.Text{Text: e.say(lengthOf, feetWords[e.sub], e.length(e.layout().Feet)), Rank: drawing.RankNote, Spots: []drawing.Spot{
		{At: mid, Anchor: drawing.Start}, {At: mid, Anchor: drawing.End}, {At: to, Anchor: drawing.Start}, {At: to, Anchor: drawing.End},
		{At: mid, Anchor: drawing.Start, Lift: drawing.Above}, {At: mid, Anchor: drawing.End, Lift: drawing.Above},
	}})
}

// across dimensions how far the start is from the anchor, at the top.
func (e *elevation) across() {
	anchor, start := e.spot(e.layout().Anchor), e.spot(e.start())
	if math.Abs(start.X-anchor.X) < 0.499 { // half a millimetre is drawn, whatever its last bit
		return
	}
	c := drawing.Chain{Level: true, Far: true, At: 11, Datum: anchor.X, Low: 0, High: e.scene.Width}
	add := func(word string, u float64, length float64, down float64) {
		c.Parts = append(c.Parts, drawing.Dimension{End: e.at(u, 0).X, Text: e.say(lengthOf, word, e.length(length)), Witness: down})
	}
	u := e.cut.of(e.start().X, e.start().Y)
	edge := e.cut.edge
	if !math.IsNaN(edge) && !e.cut.oblique() && edge > 0 && edge <= u {
		add(behindWord, edge, edge, e.at(edge, 0).Y)
		if u-edge > noise {
			add(outWord, u, u-edge, start.Y)
		}
	} else {
		add(offsetWord, u, u, start.Y)
	}
	e.scene.Line(drawing.Point{X: anchor.X, Y: c.At}, anchor, drawing.HelpPen)
	e.scene.Chain(c)
}

// notes says what the drawing leaves open.
func (e *elevation) notes() []string {
	notes := []string{heightsNote}
	add := func(when bool, text string) {
		if when {
			notes = append(notes, text)
		}
	}
	list := func(p phrase, names []string) {
		add(len(names) > 0, e.say(p, strings.Join(names, ", ")))
	}
	p := e.place()
	switch {
	case p.Status == rig.Restrained:
		add(true, restrainNote)
	case !e.known():
		add(true, noFallNote)
	case !p.Plane.Flat:
		add(true, notFlatNote)
	}
	add(e.cut.face && p.OverEdge, unfoldedNote)
	add(e.cut.oblique(), obliqueNote)
	if e.swings() {
		degrees := func(a float64) string { return e.d.figure(quantity.Angle, a, pageDigits, quantity.Nearest) }
		add(true, e.say(anglesNote, degrees(p.OffsetAngle), degrees(p.SwingAngle)))
		add(true, noStretchNote)
	}
	add(len(e.trace) > 0, traceNote)
	notes = append(notes, e.chain.notes...)
	list(belowNote, e.below)
	list(aboveNote, e.above)
	list(besideNote, e.apart)
	add(len(e.plan.Obstacles) == 0, noBelowNote)
	return slices.Clip(notes)
}
