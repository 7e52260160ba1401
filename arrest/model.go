package arrest

import (
	"errors"
	"math"
	"math/bits"

	"arrestcheck/arrest/connector"
	"arrestcheck/arrest/rig"
)

// A PathRun is what the connector path does at one point, SI (M-15). NaN where
// the run did not come to it, +Inf where nothing stops the body.
type PathRun struct {
	Run        connector.Result
	Absorber   float64 // deployed travel of the absorbers, m; NaN where the path has none
	FallFactor float64 // free fall over the length of the parts that state one; NaN where none does
	Failed     error   // a run that does not close: an internal error

	// Swings is true where a layout has the body go sideways: Run is then of a fall
	// straight down to the lowest point that any swing has, and only Peak is of the
	// swing itself (see LayoutRun.Planar).
	Swings bool
	NoFall bool // no fall follows from the layout, nothing was run

	path  connector.Path
	parts []connector.Part
}

// modelAt runs the path of c. The first call on a Point makes room; later ones
// allocate nothing.
// h is the free fall, m.
func modelAt(c *Case, p *Point, h float64) {
	if p.Model == nil {
		p.Model = new(PathRun)
	}
	m := p.Model
	m.parts = c.Path.fill(c, m.parts)
	m.FallFactor = p.FreeFall / c.Path.length(c)
	if math.IsInf(m.FallFactor, 0) {
		m.FallFactor = nan
	}
	if m.Failed = m.path.Set(m.parts...); m.Failed != nil {
		return
	}
	m.Swings, m.NoFall = false, math.IsNaN(h)
	if m.NoFall {
		return
	}
	if c.Layout != nil && p.Layout.swings() {
		m.Swings = true
		h += p.Layout.Place.SwingDrop
	}
	fall := connector.Fall{Mass: p.TotalMass, FreeFall: h, InitialSpeed: c.InitialSpeed, Gravity: c.Gravity}
	m.Failed = connector.Run(&m.path, &fall, &m.Run)
	if m.Swings && m.Failed == nil {
		m.Failed = p.Layout.swing(m, &rig.Body{Mass: p.TotalMass, InitialSpeed: c.InitialSpeed, Gravity: c.Gravity})
	}
	m.Absorber = nan
	for i := range m.parts {
		if m.parts[i].Kind == connector.Absorber {
			m.Absorber = m.Run.AbsorberTravel
		}
	}
}

// stopped returns x, or +Inf where the path never stops the body. It is NaN of
// a swing: what is not of the swing itself says nothing about it.
func (m *PathRun) stopped(x float64) float64 {
	if m.Failed != nil || m.NoFall || m.Swings {
		return nan
	}
	if m.Run.Status == connector.Endless {
		return math.Inf(1)
	}
	return x
}

// peak returns the greatest force, N, of the stop or of the swing; +Inf where
// nothing gives way or nothing stops the body.
func (m *PathRun) peak(p *Point) float64 {
	if !m.Swings || m.Failed != nil || m.NoFall {
		return m.stopped(m.Run.Peak)
	}
	return p.Layout.swungPeak()
}

// ratio is r of M-04 for the modelled stop.
func (m *PathRun) ratio(p *Point) float64 {
	if m.NoFall || m.Swings {
		return nan
	}
	return p.Speed * m.Run.StoppingTime / (2 * m.Run.StoppingDistance)
}

// Series returns the modelled arrest at one point as moments so close that
// straight lines between them stay within 0.1 % of the peak.
func Series(c *Case) ([]connector.State, error) {
	var p Point
	At(c, &p)
	switch {
	case p.Model.Failed != nil:
		return nil, p.Model.Failed
	case p.Model.NoFall || p.Model.Swings:
		return nil, ErrNoStraightStop
	case c.Layout != nil:
		return series(c, &p, p.Layout.Place.FreeFall)
	}
	return series(c, &p, c.FreeFall)
}

// ErrNoStraightStop is the error of Series for a layout from which the body does
// not fall and stop straight down.
var ErrNoStraightStop = errors.New("arrest: no straight stop: the body swings, or does not fall at all")

func series(c *Case, p *Point, h float64) ([]connector.State, error) {
	fall := connector.Fall{Mass: p.TotalMass, FreeFall: h, InitialSpeed: c.InitialSpeed, Gravity: c.Gravity}
	series, err := connector.Trace(&p.Model.path, &fall, &p.Model.Run, nil)
	for i := range series {
		series[i].F = max(0, series[i].F) // the path never pushes; rounding may
	}
	return series, err
}

// pathNotes are what the runs over the bands came to that no estimate tells.
type pathNotes struct {
	exhausted      bool
	part           int     // the part that is exhausted with the most energy left
	left           float64 // that energy, J
	peak           float64 // the peak then, N
	rigid          bool    // a blow on something rigid, or nothing that stops the body
	beyond         uint64  // parts that went beyond their last loading point
	used           float64 // the greatest share of a travel that is used, 0..1
	usedBy         int     // the part that uses it
	usedUp, usedOf float64 // that travel and the most that the part has, m
	failed         error
}

// note takes one run into the notes.
func (n *pathNotes) note(m *PathRun) {
	if m.Failed != nil || m.NoFall {
		n.failed = m.Failed
		return
	}
	r := &m.Run
	n.rigid = n.rigid || r.Status == connector.Rigid || r.Status == connector.Endless
	n.beyond |= r.BeyondPoints
	for i := range r.Parts {
		most := m.parts[i].Plateau.Travel
		if share := r.Parts[i].Permanent / most; most > 0 && share > n.used {
			n.used, n.usedBy, n.usedUp, n.usedOf = share, i, r.Parts[i].Permanent, most
		}
	}
	if r.FirstExhausted >= 0 && (!n.exhausted || r.EnergyLeft > n.left) {
		n.exhausted, n.part, n.left, n.peak = true, r.FirstExhausted, r.EnergyLeft, r.Peak
	}
}

// searched are the modelled outputs whose ends are looked for between the
// corners; every point tried widens all the others too.
var searched = [...]Quantity{
	PeakForce, ForceOverWeight, PeakDeceleration, AbsorberTravel, StoppingDistance, DecelerationDistance,
	StoppingTime, OnsetRate, MeanForceOverDistance, MeanForceOverTime, ShapeRatio,
}

// searchedSwing are those of a layout.
var searchedSwing = [...]Quantity{TotalFallDistance, ClearanceNeeded, ClearanceLeft, SwingSpeed, SpeedAtObstacle}

const (
	coarse = 8  // points tried along one input before the best is closed in on
	fine   = 24 // golden sections after that
	passes = 2  // over all inputs
)

// searchPath widens the spans of the modelled outputs by turning points inside
// the bands: the peak is not monotone in an absorber's force, nor always in a
// stiffness (M-50). From the best corner it goes along one input after the
// other.
func searchPath(s *spans) {
	for _, q := range searched {
		s.search(indexOf(q, Modelled))
	}
	if s.base.Layout != nil {
		for _, q := range searchedSwing {
			s.search(indexOf(q, Modelled))
		}
	}
}

// search closes in on both ends of one output, along one input after the other.
func (s *spans) search(i int) {
	for _, sign := range [...]float64{1, -1} {
		x, of := s.of[i].low, outputs[i].low
		if sign < 0 {
			x, of = s.of[i].high, outputs[i].of
		}
		if !s.of[i].known() || math.IsInf(x.value, 0) {
			continue
		}
		w := walkPath{s: s, at: s.caseAt(x), of: func(p *Point) float64 { return sign * of(p) }}
		for range passes {
			for _, in := range s.free {
				w.along(in)
			}
		}
	}
}

// A walkPath looks for the least of a function along one input after another.
type walkPath struct {
	s  *spans
	at Case
	of func(*Point) float64
	p  Point
}

// try works out one point, widens all spans by it and returns the function.
func (w *walkPath) try(in *Input, x float64) float64 {
	c := w.at
	in.Set(&c, x)
	At(&c, &w.p)
	w.s.takeBeside(&w.p, &c)
	y := w.of(&w.p)
	if math.IsNaN(y) {
		return math.Inf(1)
	}
	return y
}

// along sets one input to where the function is least. The golden section is
// spared where the least lies at an end and the function still rises half a
// step away from it.
func (w *walkPath) along(in *Input) {
	lo, hi := in.Band.Low, in.Band.High
	step := (hi - lo) / coarse
	best, least := lo, math.Inf(1)
	for k := range coarse + 1 {
		x := min(hi, lo+float64(k)*step)
		if y := w.try(in, x); y < least {
			best, least = x, y
		}
	}
	a, b := max(lo, best-step), min(hi, best+step)
	if a == best && w.try(in, best+step/2) >= least || b == best && w.try(in, best-step/2) >= least {
		in.Set(&w.at, best)
		return
	}
	if x, y := w.golden(in, a, b); y < least {
		best = x
	}
	in.Set(&w.at, best)
}

// golden closes in on the least of the function between a and b.
func (w *walkPath) golden(in *Input, a, b float64) (x, y float64) {
	const ratio = 0.6180339887498949
	left, right := b-ratio*(b-a), a+ratio*(b-a)
	yl, yr := w.try(in, left), w.try(in, right)
	for range fine {
		if yl < yr {
			b, right, yr = right, left, yl
			left = b - ratio*(b-a)
			yl = w.try(in, left)
		} else {
			a, left, yl = left, right, yr
			right = a + ratio*(b-a)
			yr = w.try(in, right)
		}
	}
	if yl < yr {
		return left, yl
	}
	return right, yr
}

// beyondNames lists the parts whose bits are set.
func (pl *PathPlan) beyondNames(set uint64) []string {
	var names []string
	for ; set != 0; set &= set - 1 {
		names = append(names, pl.Parts[bits.TrailingZeros64(set)].Name)
	}
	return names
}

// A ModelRun is the modelled arrest at one point, for the report.
type ModelRun struct {
	Corner Corner // AtWritten, or AtHigh for the point of the greatest peak
	Case   Case
	Run    connector.Result
}
