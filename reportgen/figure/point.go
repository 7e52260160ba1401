package figure

import "math"

// A Point is a place in a scene, mm from its upper left corner.
type Point struct{ X, Y float64 }

// finite reports whether p is a place at all.
func (p Point) finite() bool { return finite(p.X) && finite(p.Y) }

func finite(x float64) bool { return !math.IsNaN(x) && !math.IsInf(x, 0) }

// farthest is as far from the origin as a point is kept apart, mm. What lies
// beyond is out of every drawing; without an end, sums of it would overflow.
const farthest = 1e6

// grain returns x to the micrometre. Everything enters a scene in this form,
// so that the last bits of a processor decide nothing.
func grain(x float64) float64 {
	return math.Round(reached(x)*1000)/1000 + 0
}

func reached(x float64) float64 { return min(max(x, -farthest), farthest) }

func (p Point) reached() Point { return Point{reached(p.X), reached(p.Y)} }

func (p Point) grain() Point { return Point{grain(p.X), grain(p.Y)} }

// A Box is an upright rectangle, mm.
type Box struct{ Left, Top, Right, Bottom float64 }

// touch is how far two boxes may reach into each other and still only touch, mm.
const touch = 1e-6

// Overlaps reports whether b and c share more than an edge.
func (b Box) Overlaps(c Box) bool {
	return b.Left < c.Right-touch && c.Left < b.Right-touch &&
		b.Top < c.Bottom-touch && c.Top < b.Bottom-touch
}

// Contains reports whether no part of c lies outside b.
func (b Box) Contains(c Box) bool {
	return c.Left >= b.Left-touch && c.Right <= b.Right+touch &&
		c.Top >= b.Top-touch && c.Bottom <= b.Bottom+touch
}

// held returns p, moved to the edge of b if rounding has put it outside.
func (b Box) held(p Point) Point {
	return Point{min(max(p.X, b.Left), b.Right), min(max(p.Y, b.Top), b.Bottom)}
}

func (b Box) moved(dx, dy float64) Box {
	return Box{b.Left + dx, b.Top + dy, b.Right + dx, b.Bottom + dy}
}

// around returns the box of points, which are finite and at least one.
func around(points []Point) Box {
	b := Box{points[0].X, points[0].Y, points[0].X, points[0].Y}
	for _, p := range points[1:] {
		b.Left, b.Right = min(b.Left, p.X), max(b.Right, p.X)
		b.Top, b.Bottom = min(b.Top, p.Y), max(b.Bottom, p.Y)
	}
	return b
}
