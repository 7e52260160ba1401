package rig

import "math"

// Room for the positions and the obstacles of a layout.
const (
	MaxPositions = 8
	MaxObstacles = 8
)

// A Spot is a point in space, in m: x along the edge, y outwards from it, z
// upwards from the walking surface.
type Spot struct{ X, Y, Z float64 }

// A Position is where a fall begins, in plan, in m. Y is 0 just outside the
// edge. Behind an edge (Y < 0) the worker is taken to go over it at the same X.
type Position struct{ X, Y float64 }

// An Edge says over what a connector may have to run.
type Edge uint8

// The kinds of edge.
const (
	NoEdge Edge = iota
	RoundEdge
	SharpEdge
)

// A Layout is the geometry of one job at one point: plain figures in SI units,
// no pointers, so that a copy shares nothing. NaN is a figure that is missing.
type Layout struct {
	Anchor Spot

	Edge      Edge
	EdgeRated bool // a part of the connector is rated to run over this edge

	DRing float64 // height of the D-ring above the surface at the start, m

	// Feet is how far the hanging body reaches below its D-ring, m. It serves
	// the search for obstacles; DRing in its place errs low by the give of the
	// harness.
	Feet float64

	// HalfWidth is how far the body reaches sideways of the D-ring, m. It serves
	// the search for obstacles; 0 finds only what the D-ring itself would meet.
	HalfWidth float64

	Positions     [MaxPositions]Position
	PositionCount int

	// Length of the connector from anchor to D-ring when it is taut, the sum of
	// its parts, m. Of a retractable: the length of its line fully paid out, +Inf
	// where it is never used up.
	Length float64

	// Slack is what the connector gives before it pulls beyond Length: a lifeline
	// not drawn tight, knots, a rope grab that slides before it bites, m. A
	// retractable has none.
	Slack float64

	// Retractable: the line follows the worker without slack and locks after
	// Locking, m, of payout from the start of the fall. Only then is Locking read.
	Retractable bool
	Locking     float64

	Obstacles     [MaxObstacles]Obstacle
	ObstacleCount int
}

// An ObstacleKind says what an obstacle is.
type ObstacleKind uint8

// A level is everything below a height; a box has sides along the axes.
const (
	Level ObstacleKind = iota + 1
	Box
)

// An Obstacle is something the body can meet. Its number in the layout is its
// name.
type Obstacle struct {
	Kind ObstacleKind

	// Moving: it can be anywhere in plan (a vehicle, a load), so that only its
	// heights count.
	Moving bool

	Low, High Spot // corners of the box, Low at or below High in every axis; a level has High.Z alone
}

// NewLevel returns the level at the height z in m, negative below the surface.
func NewLevel(z float64) Obstacle { return Obstacle{Kind: Level, High: Spot{Z: z}} }

// NewBox returns the box between two opposite corners, in any order.
func NewBox(a, b Spot) Obstacle {
	return Obstacle{
		Kind: Box,
		Low:  Spot{min(a.X, b.X), min(a.Y, b.Y), min(a.Z, b.Z)},
		High: Spot{max(a.X, b.X), max(a.Y, b.Y), max(a.Z, b.Z)},
	}
}

// position returns the position i and panics where there is none.
func (l *Layout) position(i int) Position {
	if i < 0 || i >= l.PositionCount || l.PositionCount > MaxPositions {
		panic("rig: no such position")
	}
	return l.Positions[i]
}

// obstacles returns the obstacles that are there.
func (l *Layout) obstacles() []Obstacle {
	if l.ObstacleCount < 0 || l.ObstacleCount > MaxObstacles {
		panic("rig: too many obstacles")
	}
	return l.Obstacles[:l.ObstacleCount]
}

// square returns the product of x with itself, rounded.
func square(x float64) float64 { return float64(x * x) }

// leg returns the other leg of a right triangle with the hypotenuse c and the
// leg a, NaN where a is the longer.
//
//	sqrt((c - a) (c + a))
func leg(c, a float64) float64 { return math.Sqrt((c - a) * (c + a)) }
