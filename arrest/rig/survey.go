package rig

import "math"

// A Worst is the greatest figure over all positions and where it is: -1 and NaN
// where no position has one. Of equal figures the first position counts.
type Worst struct {
	At    int
	Value float64
}

// take puts the figure of the position i in.
func (w *Worst) take(i int, x float64) {
	if w.At < 0 && !math.IsNaN(x) || x > w.Value {
		w.At, w.Value = i, x
	}
}

// A Survey is what a layout comes to at every position. The worst position
// governs, for each figure its own.
type Survey struct {
	Places [MaxPositions]Place
	Count  int

	// Status is Known where every position is, else that of the first position
	// that is not, at StatusAt; one that is Restrained gives way to any other.
	// Without a position it is Incomplete. StatusAt is -1 where no position has it.
	Status   Status
	StatusAt int

	FreeFall, OffsetAngle, SwingAngle, SwingDrop Worst

	// Depth is that of the D-ring hanging lowest below the anchor.
	Depth Worst

	Unrated int // first position from which the connector comes to an edge that no part is rated for, -1: none
}

// Survey works out every position into s.
func (l *Layout) Survey(s *Survey) {
	none := Worst{-1, math.NaN()}
	s.Count, s.Status, s.StatusAt, s.Unrated = l.PositionCount, Known, -1, -1
	s.FreeFall, s.OffsetAngle, s.SwingAngle, s.SwingDrop, s.Depth = none, none, none, none, none
	if s.Count == 0 {
		s.Status = Incomplete
	}
	for i := range s.Count {
		s.Places[i] = l.At(i)
		p := &s.Places[i]
		if p.Status != Known && (s.Status == Known || s.Status == Restrained && p.Status != Restrained) {
			s.Status, s.StatusAt = p.Status, i
		}
		s.FreeFall.take(i, p.FreeFall)
		s.OffsetAngle.take(i, p.OffsetAngle)
		s.SwingAngle.take(i, p.SwingAngle)
		s.SwingDrop.take(i, p.SwingDrop)
		s.Depth.take(i, p.Depth)
		if p.Unrated && s.Unrated < 0 {
			s.Unrated = i
		}
	}
}
