package jobfile

import (
	"math"
	"strconv"

	"arrestcheck/arrest"
	"arrestcheck/arrest/quantity"
	"arrestcheck/arrest/rig"
)

// stands refuses a layout in which nobody can stand, whatever the bands allow,
// and a clearance that counts an item twice.
func (in *inputs) stands() {
	if in.layout == nil {
		return
	}
	counted := false
	for i := range in.layout.plan.Positions {
		c := in.nearest(i)
		run := arrest.LayoutAt(&c)
		switch run.Place.Status {
		case rig.InStructure:
			in.inStructure("")
			return
		case rig.OutOfReach:
			// Behind an edge who is not reached is held back, which can be meant.
			if run.Layout.Edge == rig.NoEdge || in.figures[in.layout.plan.Positions[i].Out].Low >= 0 {
				in.outOfReach(i, run)
			}
		case rig.Known:
			if in.layout.plan.Clearance != nil && !counted {
				counted = true
				in.counted(run)
			}
		}
	}
}

// nearest returns the point of the bands at which the anchor is nearest to the
// position i, for the longest connector: out of reach there, it is out of reach
// everywhere.
func (in *inputs) nearest(i int) arrest.Case {
	c, p := *in.point, &in.layout.plan
	c.Position = i
	at := func(n int) quantity.Band { return in.figures[n] }
	a, d := at(p.AnchorHeight), at(p.DRing)
	c.Figures[p.AnchorHeight] = clamp(d.Low, a)
	c.Figures[p.DRing] = clamp(c.Figures[p.AnchorHeight], d)
	c.Figures[p.Length] = at(p.Length).High
	if p.Slack != arrest.NoFigure {
		c.Figures[p.Slack] = at(p.Slack).High
	}
	pos := &p.Positions[i]
	c.Figures[pos.Along] = clamp(0, at(pos.Along))
	out := at(pos.Out)
	if p.Edge == rig.NoEdge {
		c.Figures[pos.Out] = clamp(0, out)
		return c
	}
	// Behind the edge the worker is taken to go over it: out counts from 0.
	over := out
	over.Low, over.High = max(0, out.Low), max(0, out.High)
	behind := clamp(-over.Low, at(p.BehindEdge))
	c.Figures[p.BehindEdge] = behind
	if c.Figures[pos.Out] = clamp(-behind, over); c.Figures[pos.Out] == 0 {
		c.Figures[pos.Out] = min(0, out.Low)
	}
	return c
}

// farthest returns how far, m, the D-ring at the position i can be from the anchor
// over all of the bands, and how far the connector reaches at its shortest.
func (in *inputs) farthest(i int) (far, reach float64) {
	p := &in.layout.plan
	pos := &p.Positions[i]
	off := func(a, b quantity.Band) float64 { return max(math.Abs(a.High-b.Low), math.Abs(a.Low-b.High)) }
	var anchor quantity.Band
	out := in.figures[pos.Out]
	if p.Edge != rig.NoEdge { // who stands behind the edge is taken to go over it
		out.Low, out.High = max(0, out.Low), max(0, out.High)
		behind := in.figures[p.BehindEdge]
		anchor.Low, anchor.High = -behind.High, -behind.Low
	}
	plan := math.Hypot(off(in.figures[pos.Along], quantity.Band{}), off(out, anchor))
	reach = in.figures[p.Length].Low
	if p.Slack != arrest.NoFigure {
		reach += in.figures[p.Slack].Low
	}
	return math.Hypot(plan, off(in.figures[p.AnchorHeight], in.figures[p.DRing])), reach
}

// clamp returns the figure of a band that is nearest to x.
func clamp(x float64, b quantity.Band) float64 { return max(b.Low, min(x, b.High)) }

// outOfReach records a position that the connector does not reach.
func (in *inputs) outOfReach(i int, run *arrest.LayoutRun) {
	in.refused = true
	l, s := in.layout, in.layout.positions[i]
	unit := l.table.unitOf(in.figures[l.plan.AnchorHeight])
	figure := func(x float64) string { return quantity.Format(x, unit, 5, quantity.Nearest) }
	length := l.plan.Length
	s.page.fault(s.path, s.path, "", "out of reach: from the anchor to the D-ring at "+strconv.Quote(l.plan.Positions[i].Name)+" it is "+
		figure(run.Place.Distance)+", and the connector reaches "+figure(in.figures[length].High+run.Layout.Slack),
		"measure: anchor, D-ring, position and connector again; on this connector nobody can stand there")
}

// unitOf is the unit a length is typed in, that of the SI where it is none.
func (t *table) unitOf(b quantity.Band) quantity.Unit {
	if b.Unit.Dimension == quantity.Length {
		return b.Unit
	}
	return quantity.Length.SI()
}

// inStructure records an anchor behind the edge and below the surface, for as
// much of the bands as is said first.
func (in *inputs) inStructure(where string) {
	in.refused = true
	s := in.layout.table
	s.fault("anchor_height", in.figures[in.layout.plan.AnchorHeight].Text, where+"the anchor is below the walking surface and behind the edge, inside the structure; how the connector comes out of it is not worked out",
		"measure: anchor_height from the walking surface up, and anchor_behind_edge from the edge back"+or+"write anchor_behind_edge below zero where the anchor is out beyond the edge")
}

// swings reports whether, at the figures as written or at either end of all of
// them, a fall onto the connector path goes sideways from some position.
func (in *inputs) swings() bool {
	if in.path == nil || in.layout == nil {
		return false
	}
	low, high := *in.point, *in.point
	for i := range in.inputs {
		if e := &in.inputs[i]; e.Set != nil {
			e.Set(&low, e.Band.Low)
			e.Set(&high, e.Band.High)
		}
	}
	for _, c := range []*arrest.Case{in.point, &low, &high} {
		for i := range in.layout.plan.Positions {
			c := *c
			c.Position = i
			if p := &arrest.LayoutAt(&c).Place; p.Status == rig.Known && (!p.Plane.Flat || p.Plane.Offset > 0) {
				return true
			}
		}
	}
	return false
}

// standsEverywhere refuses a layout in which for a part of the bands nobody can
// stand: what the free fall is between there and the rest of the bands, no corner
// of them tells.
func (in *inputs) standsEverywhere(j *arrest.Job) {
	if in.layout == nil {
		return
	}
	switch status, i := arrest.LayoutFault(j); status {
	case rig.OutOfReach:
		in.refused = true
		s := in.layout.positions[i]
		far, reach := in.farthest(i)
		unit := in.layout.table.unitOf(in.figures[in.layout.plan.AnchorHeight])
		figure := func(x float64) string { return quantity.Format(x, unit, 5, quantity.Nearest) }
		s.page.fault(s.path, s.path, "", "for a part of the bands out of reach: from the anchor to the D-ring at "+strconv.Quote(in.layout.plan.Positions[i].Name)+" it is up to "+
			figure(far)+", and the connector may reach no farther than "+figure(reach),
			"measure: anchor, D-ring, position and connector again, to a tolerance with which the worker can stand there throughout")
	case rig.InStructure:
		in.inStructure("for a part of the bands ")
	}
}
