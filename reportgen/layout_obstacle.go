package reportgen

import (
	"math"

	"arrestcheck/arrest/rig"
	drawing "arrestcheck/reportgen/figure"
)

// A reach is what of the world an elevation shows, m.
type reach struct{ left, right, bottom, top float64 }

func (r *reach) take(u, z float64) {
	if isNumber(u) && isNumber(z) {
		r.left, r.right = min(r.left, u), max(r.right, u)
		r.bottom, r.top = min(r.bottom, z), max(r.top, z)
	}
}

// How much more than the fall itself a drawing takes in to show what lies below
// and beside it.
const (
	deeper = 2.2
	wider  = 1.0
)

// reaches returns what the elevation has to show: all of the fall, the nearest
// obstacle unless it is far below, and other obstacles near by.
func (e *elevation) reaches() reach {
	l, p := e.layout(), e.place()
	r := reach{left: math.Inf(1), right: math.Inf(-1), bottom: math.Inf(1), top: math.Inf(-1)}
	spot := func(s rig.Spot) { r.take(e.cut.of(s.X, s.Y), s.Z) }
	spot(l.Anchor)
	spot(e.start())
	spot(p.Taut)
	r.take(e.cut.of(e.start().X, e.start().Y), 0)
	if !math.IsNaN(e.cut.edge) && math.Abs(e.cut.edge) < 4*(r.right-r.left) {
		r.take(e.cut.edge, 0)
	}
	if e.known() {
		r.take(e.cut.pivot, p.Lowest)
		r.take(e.cut.pivot, e.chain.end0())
	}
	if u, z, ok := e.rest(); ok {
		r.take(u, z)
		if e.room != nil {
			r.take(u, z-l.Feet)
		}
	}
	if e.swings() {
		for _, at := range append(e.cut.arc(p), e.modelledWay()...) {
			r.take(at.u, at.z)
		}
	}
	e.around(&r)
	return r
}

// end0 is where the chain ends without what is left below, m.
func (c *chain) end0() float64 {
	if c.to < 0 {
		return c.end()
	}
	if n := len(c.parts); n > 1 {
		return c.parts[n-2].end
	}
	return c.datum
}

// around takes obstacles in, and leaves a margin.
func (e *elevation) around(r *reach) {
	high := r.top - r.bottom
	floor, ceiling := r.top-deeper*high, r.top+0.3*high
	wide := max(r.right-r.left, high/2)
	left, right := r.left-wider*wide, r.right+wider*wide
	for i := range e.layout().ObstacleCount {
		o := &e.layout().Obstacles[i]
		if o.High.Z < floor || o.High.Z > ceiling {
			continue
		}
		if o.Kind == rig.Level || o.Moving {
			r.take(e.cut.pivot, o.High.Z)
			continue
		}
		from, to, cuts := e.cut.through(o)
		if !cuts && e.aside(i) || to < left || from > right {
			continue
		}
		r.take(max(from, left), o.High.Z)
		r.take(min(to, right), o.High.Z)
		if o.Low.Z > floor {
			r.take(e.cut.pivot, o.Low.Z)
		}
	}
	high, wide = r.top-r.bottom, r.right-r.left
	r.top += 0.02 * high
	r.bottom -= 0.03 * high
	r.left, r.right = r.left-0.06*wide, r.right+0.06*wide
}

// aside reports whether the body does not come over an obstacle.
func (e *elevation) aside(i int) bool {
	return e.room != nil && e.room.Lefts.Aside>>i&1 == 1
}

// obstacles draws what is in the plane, and lists what is not.
func (e *elevation) obstacles() {
	for i := range e.layout().ObstacleCount {
		o := &e.layout().Obstacles[i]
		y := e.at(0, o.High.Z).Y
		switch {
		case y > e.box.Bottom:
			e.below = append(e.below, e.obstacle(i))
		case o.Kind == rig.Level:
			e.level(i, y)
		case o.Moving:
			e.moving(i, y)
		default:
			e.block(i)
		}
	}
}

// outside returns where a level line outside of the structure begins and ends.
func (e *elevation) outside() (left, right float64) {
	left, right = e.box.Left, e.box.Right
	if x := e.at(e.cut.edge, 0).X; isNumber(x) && x > left && x < right {
		if e.inner() < 0 {
			return x, right
		}
		return left, x
	}
	return left, right
}

func (e *elevation) level(i int, y float64) {
	if y < e.box.Top {
		e.above = append(e.above, e.obstacle(i))
		return
	}
	left, right := e.outside()
	if e.layout().Obstacles[i].High.Z >= 0 {
		left, right = e.box.Left, e.box.Right
	}
	a, b := drawing.Point{X: left, Y: y}, drawing.Point{X: right, Y: y}
	e.scene.Line(a, b, drawing.Pen{Weight: drawing.Medium})
	e.strip(a, b, hatchDeep)
	e.lineName(e.obstacle(i), left, right, y)
}

// moving draws the heights of what can be anywhere.
func (e *elevation) moving(i int, y float64) {
	if y < e.box.Top {
		e.above = append(e.above, e.obstacle(i))
		return
	}
	left, right := e.outside()
	e.scene.Line(drawing.Point{X: left, Y: y}, drawing.Point{X: right, Y: y}, drawing.Pen{Weight: drawing.Medium, Dash: drawing.Dashes})
	if under := e.at(0, e.layout().Obstacles[i].Low.Z).Y; under < e.box.Bottom {
		e.scene.Line(drawing.Point{X: left, Y: under}, drawing.Point{X: right, Y: under}, drawing.Pen{Dash: drawing.Dashes})
	}
	e.lineName(e.say(withRemark, e.obstacle(i), movesRemark), left, right, y)
}

// block draws what has sides: with dashes if it lies beside the plane.
func (e *elevation) block(i int) {
	o := &e.layout().Obstacles[i]
	from, to, cuts := e.cut.through(o)
	if !cuts && e.aside(i) {
		e.apart = append(e.apart, e.obstacle(i))
		return
	}
	pen, name := drawing.Pen{Weight: drawing.Medium}, e.obstacle(i)
	if !cuts {
		pen.Dash, name = drawing.Dashes, e.say(withRemark, name, asideRemark)
	}
	a, b := e.at(from, o.High.Z), e.at(to, o.Low.Z)
	if isNegativeInf(o.Low.Z) {
		b.Y = e.under(o.High.Z)
	}
	shown := drawing.Box{Left: min(a.X, b.X), Right: max(a.X, b.X), Top: a.Y, Bottom: b.Y}
	if !outlined(e.scene, shown, e.box, pen, name) {
		e.apart = append(e.apart, e.obstacle(i))
	}
}

// under is where what stands on the ground ends, mm: at the next level below, or
// where the drawing does.
func (e *elevation) under(top float64) float64 {
	y := e.box.Bottom
	for i := range e.layout().ObstacleCount {
		if o := &e.layout().Obstacles[i]; o.Kind == rig.Level && o.High.Z < top {
			y = min(y, e.at(0, o.High.Z).Y)
		}
	}
	return y
}

func isNegativeInf(x float64) bool { return math.IsInf(x, -1) }

// outlined draws the sides of a box as far as they lie in the drawing, with its
// name; it reports whether any of it does.
func outlined(s *drawing.Scene, b, within drawing.Box, pen drawing.Pen, name string) bool {
	in := drawing.Box{Left: max(b.Left, within.Left), Right: min(b.Right, within.Right), Top: max(b.Top, within.Top), Bottom: min(b.Bottom, within.Bottom)}
	const onBorder = 1e-6 // mm: a side on the border of the drawing is in it, whatever its last bit
	if in.Left >= in.Right-onBorder || in.Top >= in.Bottom-onBorder {
		return false
	}
	p := func(x, y float64) drawing.Point { return drawing.Point{X: x, Y: y} }
	for _, side := range []struct {
		there bool
		a, b  drawing.Point
	}{
		{b.Top >= within.Top-onBorder, p(in.Left, in.Top), p(in.Right, in.Top)},
		{b.Right <= within.Right+onBorder, p(in.Right, in.Top), p(in.Right, in.Bottom)},
		{b.Bottom <= within.Bottom+onBorder, p(in.Right, in.Bottom), p(in.Left, in.Bottom)},
		{b.Left >= within.Left-onBorder, p(in.Left, in.Bottom), p(in.Left, in.Top)},
	} {
		if side.there {
			s.Line(side.a, side.b, pen)
		}
	}
	mid := p((in.Left+in.Right)/2, (in.Top+in.Bottom)/2)
	s.Text(drawing.Text{Text: name, Rank: drawing.RankNote, Spots: []drawing.Spot{
		{At: mid, Anchor: drawing.Middle},
		{At: p(mid.X, in.Top), Anchor: drawing.Middle, Lift: drawing.Below, Gap: 0.5},
		{At: p(mid.X, in.Bottom), Anchor: drawing.Middle, Lift: drawing.Above, Gap: 0.5},
		{At: p(mid.X, in.Top), Anchor: drawing.Middle, Lift: drawing.Above},
		{At: p(in.Left, in.Top), Anchor: drawing.Start, Lift: drawing.Above},
		{At: p(in.Right, in.Top), Anchor: drawing.End, Lift: drawing.Above},
		{At: p(in.Right, mid.Y), Anchor: drawing.Start}, {At: p(in.Left, mid.Y), Anchor: drawing.End},
		{At: p(mid.X, in.Bottom), Anchor: drawing.Middle, Lift: drawing.Below},
		{At: p(in.Right, in.Top), Anchor: drawing.Start}, {At: p(in.Left, in.Top), Anchor: drawing.End},
	}})
	return true
}

// obstacleSide is where a line from the chain to an obstacle ends, mm.
func (e *elevation) obstacleSide(i int) float64 {
	o := &e.layout().Obstacles[i]
	if o.Kind == rig.Level || o.Moving {
		if e.cut.side < 0 {
			return e.box.Left
		}
		return e.box.Right
	}
	from, to, _ := e.cut.through(o)
	a, b := e.at(from, 0).X, e.at(to, 0).X
	if e.cut.side < 0 {
		return max(min(a, b), e.box.Left)
	}
	return min(max(a, b), e.box.Right)
}
