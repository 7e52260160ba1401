package arrest

import (
	"math"

	"arrestcheck/arrest/rig"
)

// Impossible reports whether nothing in the whole of the job's bands can
// happen (M-05): a force that only pulls needs
//
//	d < v*t + g*t^2/2
//
// and limit, m, is the greatest right side the entries allow. Both distance
// and time must be given; else nothing is impossible.
func Impossible(j *Job) (limit float64, impossible bool) {
	if !bothGiven(j) {
		return 0, false
	}
	if j.Point.Layout != nil {
		spans, _ := overCorners(j)
		return impossibleWithin(j, spans)
	}
	least, greatest := ends(j)
	var p Point
	return beyondReach(&least, &greatest, &p)
}

// impossibleWithin is Impossible for a layout, of which the spans are known.
func impossibleWithin(j *Job, s *spans) (limit float64, impossible bool) {
	least, greatest := ends(j)
	greatest = atSpeed(greatest, greatest.Mass+greatest.Tools, s.speeds()[1])
	var p Point
	return beyondReach(&least, &greatest, &p)
}

// bothGiven reports whether distance and time of the stop are both given.
func bothGiven(j *Job) bool { return j.Point.Distance > 0 && j.Point.Time > 0 }

// beyondReach is Impossible for a job with these ends; p is room for a point.
func beyondReach(least, greatest *Case, p *Point) (limit float64, impossible bool) {
	At(greatest, p)
	limit = reachable(p.Speed, greatest.Gravity, greatest.Time)
	return limit, least.Distance >= limit
}

// Refused reports whether no result can be had of the job with these bands:
// nothing in them can happen (Impossible), or for a part of them nobody can
// stand where the layout says (LayoutFault).
func Refused(j *Job) bool {
	if _, position := LayoutFault(j); position >= 0 {
		return true
	}
	_, never := Impossible(j)
	return never
}

// LayoutFault returns the first position, from 0, that nobody can stand at as
// drawn, for a part of the entries or for all, and why: out of reach of the
// connector, or with the anchor inside the structure. It returns rig.Known where
// there is none, and for a job without a layout. The distance of anchor and D-ring
// is greatest at a corner of the bands, or at the edge itself, behind which the
// connector may only restrain.
func LayoutFault(j *Job) (status rig.Status, position int) {
	if j.Point.Layout == nil {
		return rig.Known, -1
	}
	var p Point
	for k := range j.Point.Layout.Positions {
		at := *j
		at.Point.Position = k
		g := newSiting(&at)
		g.geometry(func(int) bool { return false })
		g.lo.Position, g.lo.Path = k, nil
		for n := range 1 << len(g.axes) {
			corner := cornerOf(&g.lo, g.axes, n)
			for _, c := range g.about(corner) {
				At(&c, &p)
				switch s := p.Layout.Place.Status; {
				case s == rig.OutOfReach || s == rig.InStructure || s == rig.SlackTwice:
					return s, k
				case s == rig.Restrained && tooFar(&c, &p.Layout.Layout):
					return rig.OutOfReach, k
				}
			}
		}
	}
	return rig.Known, -1
}

// tooFar reports whether a worker who is held back behind the edge could not even
// stand upright where the layout says: the position itself, not the edge beside
// it, is farther from the anchor than the connector reaches.
func tooFar(c *Case, l *rig.Layout) bool {
	at := l.Positions[c.Position]
	plan := math.Hypot(at.X-l.Anchor.X, at.Y-l.Anchor.Y)
	return math.Hypot(plan, l.Anchor.Z-l.DRing) > l.Length+l.Slack
}

// about returns the points that a corner of the axes stands for square to the
// edge: position and anchor each at its ends, the position at the edge too.
func (g *siting) about(corner Case) []Case {
	out, behind := g.pos.Out, g.plan.BehindEdge
	lo, hi := &g.lo.Figures, &g.hi.Figures
	var list []Case
	for _, y := range [...]float64{lo[out], hi[out], min(max(0, lo[out]), hi[out])} {
		corner.Figures[out] = y
		if behind == NoFigure {
			list = append(list, corner)
			continue
		}
		for _, b := range [...]float64{lo[behind], hi[behind]} {
			corner.Figures[behind] = b
			list = append(list, corner)
		}
	}
	return list
}
