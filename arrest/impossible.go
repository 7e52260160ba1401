package arrest

import "arrestcheck/arrest/rig"

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
// there is none, and for a job without a layout. The distance of anchor and D-ring is greatest at a corner of the
// bands, or at the edge itself, behind which the connector may only restrain.
func LayoutFault(j *Job) (status rig.Status, position int) {
	if j.Point.Layout == nil {
		return rig.Known, -1
	}
	lo, hi := ends(j)
	var p Point
	for k := range j.Point.Layout.Positions {
		at := *j
		at.Point.Position = k
		g := newSiting(&at)
		g.geometry(func(int) bool { return false })
		g.lo.Position = k
		out := g.pos.Out
		for n := range 1 << len(g.axes) {
			c := cornerOf(&g.lo, g.axes, n)
			c.Path = nil
			for _, y := range [...]float64{c.Figures[out], min(max(0, lo.Figures[out]), hi.Figures[out])} {
				c.Figures[out] = y
				At(&c, &p)
				switch p.Layout.Place.Status {
				case rig.OutOfReach, rig.InStructure, rig.SlackTwice:
					return p.Layout.Place.Status, k
				}
			}
		}
	}
	return rig.Known, -1
}
