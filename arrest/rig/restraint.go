package rig

import "math"

// A Restraint says whether the edge can be passed at all (M-23). Lengths in m.
type Restraint struct {
	// Reach is how far from the anchor the D-ring can get in plan, at whatever
	// height between the surface and DRing it is carried: a worker bends, kneels
	// and crawls. NaN where a figure is missing or the anchor is out of reach at
	// any height, +Inf for a retractable whose line has no end.
	Reach float64

	// StandingReach is the same with the D-ring at DRing; NaN where the connector
	// is too short for it.
	StandingReach float64

	EdgeDistance [MaxPositions]float64 // from the anchor in plan to the edge at the X of each position
	Margin       [MaxPositions]float64 // EdgeDistance less Reach; not above zero: the edge can be passed there
	Worst        int                   // position of the least margin, -1: none

	// Nearest is the distance in plan to the nearest point of the edge line,
	// which need not be at a position.
	Nearest float64

	// Passed: the edge can be passed at a position or at its nearest point, so
	// that the layout is one of arrest. False only where that is known.
	Passed bool
}

// Restrain returns the reach of the connector against the edge from every
// position:
//
//	reach = sqrt(L^2 - dz^2),  dz the least of |z_A - z| for 0 <= z <= z_D
//
// L = Length + Slack, the whole line of a retractable, m; z_A, z_D heights of
// anchor and D-ring m. An anchor on or outside the edge restrains nobody.
//
// It errs high against a worker who stands upright, and low by what a connector
// stretches under a stumble and by what of the body is beyond its D-ring. A
// retractable pays out at walking speed: it restrains only at the end of its
// line. Derived.
func (l *Layout) Restrain() Restraint {
	length := l.Length + l.Slack
	dz := max(0, max(l.Anchor.Z-l.DRing, -l.Anchor.Z))
	r := Restraint{
		Reach:         leg(length, dz),
		StandingReach: leg(length, l.Anchor.Z-l.DRing),
		Nearest:       max(0, -l.Anchor.Y),
		Worst:         -1,
	}
	if math.IsInf(length, 1) {
		r.Reach, r.StandingReach = length, length
	}
	r.Passed = l.Edge != NoEdge && !(r.Reach < r.Nearest)
	for i := range l.PositionCount {
		r.EdgeDistance[i] = 0
		if r.Nearest > 0 {
			r.EdgeDistance[i] = math.Hypot(l.position(i).X-l.Anchor.X, r.Nearest)
		}
		r.Margin[i] = r.EdgeDistance[i] - r.Reach
		if r.Worst < 0 || r.Margin[i] < r.Margin[r.Worst] {
			r.Worst = i
		}
	}
	return r
}
