package reportgen

import (
	"math"

	"arrestcheck/arrest/rig"
)

// A plane is the upright plane that an elevation shows. u is measured in plan from
// the anchor, positive towards where the body falls.
type plane struct {
	x, y   float64 // plan of u = 0
	dx, dy float64 // unit vector in plan
	side   float64 // 1: u is drawn to the right, -1: to the left
	pivot  float64 // u of what the body swings about

	edge float64 // u where the plane crosses the edge line; NaN: nowhere
	in   float64 // 1 or -1: the direction of u in which the structure lies
	face bool    // the plane runs along the structure, which is seen from outside
}

// parallel is the share across the edge below which a plane runs along it.
const parallel = 1e-6

// planeOf returns the plane of the swing; where there is none, that through anchor
// and start; and where these are above each other, one across the edge. A swing
// towards lower x is drawn to the left, so that it looks as it does in plan.
func planeOf(l *rig.Layout, p *rig.Place, start rig.Spot) plane {
	c := plane{x: l.Anchor.X, y: l.Anchor.Y, dx: 1, edge: math.NaN()}
	along, out := start.X-l.Anchor.X, start.Y-l.Anchor.Y
	switch {
	case p.Status == rig.Known && p.Plane.Flat && p.Plane.Offset > 0:
		c.dx, c.dy = p.Plane.DX, p.Plane.DY
	case p.Status == rig.Known && p.Plane.Flat && l.Edge != rig.NoEdge:
		c.dx, c.dy = 0, 1
	case math.Hypot(along, out) > parallel:
		c.dx, c.dy = along/math.Hypot(along, out), out/math.Hypot(along, out)
	case l.Edge != rig.NoEdge:
		c.dx, c.dy = 0, 1
	}
	c.side = 1
	if c.dx < 0 || c.dx == 0 && c.dy < 0 {
		c.side = -1
	}
	c.pivot = c.of(p.Plane.X, p.Plane.Y)
	if l.Edge == rig.NoEdge {
		return c
	}
	if c.face = math.Abs(c.dy) < parallel; !c.face {
		c.edge, c.in = -c.y/c.dy, -math.Copysign(1, c.dy)
	}
	return c
}

// of returns the u of a point in plan.
func (c *plane) of(x, y float64) float64 {
	return float64((x-c.x)*c.dx) + float64((y-c.y)*c.dy)
}

// oblique reports whether the plane crosses the edge at an angle.
func (c *plane) oblique() bool {
	return !math.IsNaN(c.edge) && math.Abs(c.dx) > parallel
}

// inside reports whether a point is in the structure.
func (c *plane) inside(u, z float64) bool {
	return !math.IsNaN(c.edge) && z < 0 && (u-c.edge)*c.in > 0
}

// through returns between which u the plane cuts a box, and whether it does;
// where it does not, what the box covers when seen from the side.
func (c *plane) through(o *rig.Obstacle) (low, high float64, cuts bool) {
	low, high = math.Inf(-1), math.Inf(1)
	narrow := func(at, by, from, to float64) {
		if by == 0 {
			if at < from || at > to {
				low, high = math.Inf(1), math.Inf(-1)
			}
			return
		}
		a, b := (from-at)/by, (to-at)/by
		low, high = max(low, min(a, b)), min(high, max(a, b))
	}
	narrow(c.x, c.dx, o.Low.X, o.High.X)
	narrow(c.y, c.dy, o.Low.Y, o.High.Y)
	if low <= high {
		return low, high, true
	}
	low, high = math.Inf(1), math.Inf(-1)
	for _, x := range []float64{o.Low.X, o.High.X} {
		for _, y := range []float64{o.Low.Y, o.High.Y} {
			low, high = min(low, c.of(x, y)), max(high, c.of(x, y))
		}
	}
	return low, high, false
}
