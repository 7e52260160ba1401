package rig

import "math"

// A window is what an obstacle takes away from the D-ring in the plane of the
// swing: the body, HalfWidth wide and Feet long, touches the obstacle while the
// D-ring is within.
type window struct {
	u0, u1 float64 // distance from the pivot in plan, towards the position
	z0, z1 float64 // height
}

// window returns the window of an obstacle. It errs large: the body is an
// upright box with its sides along the axes.
func (l *Layout) window(p *Plane, o *Obstacle) window {
	w := window{math.Inf(-1), math.Inf(1), math.Inf(-1), o.High.Z + l.Feet}
	if o.Kind == Level {
		return w
	}
	w.z0 = o.Low.Z
	if o.Moving || !p.Flat {
		return w
	}
	w.clip(p.X, p.DX, o.Low.X-l.HalfWidth, o.High.X+l.HalfWidth)
	w.clip(p.Y, p.DY, o.Low.Y-l.HalfWidth, o.High.Y+l.HalfWidth)
	return w
}

// clip keeps the part of the line at + u by that lies between lo and hi. What is
// empty ends before it begins.
func (w *window) clip(at, by, lo, hi float64) {
	if by == 0 {
		if at < lo || at > hi {
			w.u0, w.u1 = math.Inf(1), math.Inf(-1)
		}
		return
	}
	a, b := (lo-at)/by, (hi-at)/by
	w.u0, w.u1 = max(w.u0, min(a, b)), min(w.u1, max(a, b))
}

// empty reports whether the D-ring can never be within.
func (w *window) empty() bool { return !(w.u0 <= w.u1 && w.z0 <= w.z1) }

// known reports whether every figure of the window is. Without the height or the
// width of the body, or the place of the obstacle, nothing is said about it.
func (w *window) known() bool {
	return !math.IsNaN(w.u0) && !math.IsNaN(w.u1) && !math.IsNaN(w.z0) && !math.IsNaN(w.z1)
}

// near reports whether the window is within the distance d of (u, z) in both
// directions.
func (w *window) near(u, z, d float64) bool {
	return u >= w.u0-d && u <= w.u1+d && z >= w.z0-d && z <= w.z1+d
}

// falling returns the height at which the D-ring, falling straight down at u,
// first is in the window, if it is so above the height end.
func (w *window) falling(u, start, end float64) (float64, bool) {
	if u < w.u0 || u > w.u1 || w.z1 < end || w.z0 > start {
		return 0, false
	}
	return min(start, w.z1), true
}
