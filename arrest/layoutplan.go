package arrest

import (
	"math"

	"arrestcheck/arrest/rig"
)

// A LayoutPlan says which figures of a Case make the geometry of a job. The
// figures are indexes into Case.Figures, or NoFigure. It is never changed once a
// job holds it.
type LayoutPlan struct {
	Edge    rig.Edge
	RatedBy string // the document that rates a part for the edge; empty: none does

	AnchorHeight int // above the walking surface, m; below it negative
	BehindEdge   int // anchor to the edge line in plan, m; beyond the edge negative; NoFigure without an edge
	DRing        int // height of the D-ring above the surface at the start, m
	Feet         int // D-ring to feet of the hanging body, m; NoFigure: not known
	HalfWidth    int // reach of the body to either side of the D-ring, m; NoFigure: not known
	Length       int // of the connector, m; of a retractable the whole line
	Slack        int // m; NoFigure of a retractable, which has none
	Locking      int // travel of a retractable before it locks, m; NoFigure: no retractable

	Positions []PlannedPosition // one to rig.MaxPositions
	Obstacles []PlannedObstacle // up to rig.MaxObstacles
	Clearance *ClearancePlan    // nil where no clearance was entered
}

// A PlannedPosition is one place where a fall may begin, in plan.
type PlannedPosition struct {
	Name  string // as the user calls it, or "position 2"
	Along int    // along the edge from the anchor, m
	Out   int    // outwards from the edge, without an edge from the anchor, m
}

// A PlannedObstacle is something below or beside the fall. Without any of the
// four sides it is a level, or, when it moves, may be anywhere in plan.
type PlannedObstacle struct {
	Name   string
	Moving bool

	Below  int // depth of its top below the walking surface, m; above it negative
	Height int // from its top down to its underside, m; NoFigure: it has none

	AlongFrom, AlongTo, OutFrom, OutTo int // its sides, in the directions of a position; NoFigure: none

	StopOver int // distance over which a body that hits it comes to rest, m; NoFigure: not stated
}

// level reports whether the obstacle is everything below a height.
func (po *PlannedObstacle) level() bool { return po.AlongFrom == NoFigure && !po.Moving }

// boxed reports whether an obstacle has sides.
func (pl *LayoutPlan) boxed() bool {
	for i := range pl.Obstacles {
		if o := &pl.Obstacles[i]; !o.level() && !o.Moving {
			return true
		}
	}
	return false
}

// A ClearancePlan holds the items of a clearance that were entered; free fall,
// swing and the connector come from the layout, a modelled travel from the path.
type ClearancePlan struct {
	Datum rig.Datum // the plane that clearance_needed is measured from
	Items []PlannedItem
}

// A PlannedItem is one item as entered.
type PlannedItem struct {
	Item     rig.Item
	Figure   int
	Includes rig.Items // what the figure already holds
}

// fill makes the geometry of the figures of one point.
func (pl *LayoutPlan) fill(c *Case, l *rig.Layout) {
	figure := func(i int) float64 {
		if i == NoFigure {
			return nan
		}
		return c.Figures[i]
	}
	l.Anchor = rig.Spot{Z: figure(pl.AnchorHeight)}
	l.Edge, l.EdgeRated = pl.Edge, pl.RatedBy != ""
	if pl.Edge != rig.NoEdge {
		l.Anchor.Y = -figure(pl.BehindEdge)
	}
	l.DRing, l.Feet, l.HalfWidth = figure(pl.DRing), figure(pl.Feet), figure(pl.HalfWidth)
	if pl.Feet == NoFigure {
		l.Feet = l.DRing
	}
	l.Length, l.Slack, l.Retractable, l.Locking = figure(pl.Length), 0, pl.Locking != NoFigure, 0
	if l.Retractable {
		l.Locking = figure(pl.Locking)
	} else if pl.Slack != NoFigure {
		l.Slack = figure(pl.Slack)
	}
	l.PositionCount = len(pl.Positions)
	for i := range pl.Positions {
		l.Positions[i] = rig.Position{X: figure(pl.Positions[i].Along), Y: figure(pl.Positions[i].Out)}
	}
	l.ObstacleCount = len(pl.Obstacles)
	for i := range pl.Obstacles {
		l.Obstacles[i] = pl.Obstacles[i].at(figure)
	}
}

// at makes the obstacle at one point. What has no underside goes down without
// end.
func (po *PlannedObstacle) at(figure func(int) float64) rig.Obstacle {
	top := -figure(po.Below)
	if po.level() {
		return rig.NewLevel(top)
	}
	bottom := math.Inf(-1)
	if po.Height != NoFigure {
		bottom = top - figure(po.Height)
	}
	o := rig.Obstacle{Kind: rig.Box, Moving: po.Moving, Low: rig.Spot{Z: bottom}, High: rig.Spot{Z: top}}
	if !po.Moving {
		o.Low.X, o.High.X = order(figure(po.AlongFrom), figure(po.AlongTo))
		o.Low.Y, o.High.Y = order(figure(po.OutFrom), figure(po.OutTo))
	}
	return o
}

// order returns the lesser and the greater of two figures.
func order(a, b float64) (low, high float64) { return min(a, b), max(a, b) }
