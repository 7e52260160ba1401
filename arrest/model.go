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

// peak returns the greatest force, N, of the stop, or the greatest that the swing
// or any later one can have (see rig.Planar.PeakBound); +Inf where nothing gives
// way or nothing stops the body.
func (m *PathRun) peak(p *Point) float64 {
	if !m.Swings || m.Failed != nil || m.NoFall {
		return m.stopped(m.Run.Peak)
	}
	peak := p.Layout.swungPeak()
	if bound := p.Layout.Planar.PeakBound; bound > peak {
		return bound
	}
	return peak
}

// swungPeak returns the greatest force, N, of the swing that was worked out.
func (m *PathRun) swungPeak(p *Point) float64 {
	if m.Failed != nil || m.NoFall {
		return nan
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
	passes = 12 // over all inputs, at most

	settled = 1e-7 // the share of a figure by which a pass has to better it
)

// searchPath widens the spans of the modelled outputs by turning points inside
// the bands: the peak is not monotone in an absorber's force, nor always in a
// stiffness (M-50). From either end and from the middle it goes along one input
// after the other. What it finds is no proof: outputs jump where a travel is just
// used up. In 60 random jobs of rope and absorber 20,000 random points each lay
// beyond the ends by no part of the spread of the peak and of the distances, by at
// most 0.0011 of that of the peak over the weight, 0.012 of that of the ratio of
// the routes and 0.11 of that of the onset.
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
		for _, from := range [...]Case{s.caseAt(s.of[i].low), s.caseAt(s.of[i].high), s.middle()} {
			w := walkPath{s: s, at: from, of: func(p *Point) float64 { return sign * of(p) }}
			w.walk()
		}
	}
}

// A walkPath looks for the least of a function along one input after another.
type walkPath struct {
	s     *spans
	at    Case
	of    func(*Point) float64
	p     Point
	here  []float64 // the figures of the free inputs, as far as they were set
	least float64   // the function at the last point that was best along a line
}

// walk goes along all inputs and, from the second time on, along the way that
// going along them has led: a valley that lies across the inputs is followed so.
// It ends where that leads no further.
func (w *walkPath) walk() {
	free := w.s.free
	w.here = make([]float64, len(free))
	before, least := make([]float64, len(free)), math.Inf(1)
	for pass := range passes {
		copy(before, w.here)
		for k, in := range free {
			w.here[k] = w.along(in)
		}
		if pass > 0 {
			w.onwards(before)
		}
		if !(w.least < least-settled*math.Abs(least)) && pass > 0 {
			return
		}
		least = w.least
	}
}

// onwards goes on in the direction from the point before to here, as far as the
// bands allow.
func (w *walkPath) onwards(before []float64) {
	free, room := w.s.free, math.Inf(1)
	for k, in := range free {
		switch d := w.here[k] - before[k]; {
		case d > 0:
			room = min(room, (in.Band.High-w.here[k])/d)
		case d < 0:
			room = min(room, (in.Band.Low-w.here[k])/d)
		}
	}
	if !(room > 0) || math.IsInf(room, 1) {
		return
	}
	to := func(k int, t float64) float64 {
		in := free[k]
		return min(max(w.here[k]+t*(w.here[k]-before[k]), in.Band.Low), in.Band.High)
	}
	t := w.line(func(c *Case, t float64) {
		for k, in := range free {
			in.Set(c, to(k, t))
		}
	}, 0, room)
	for k := range free {
		before[k], w.here[k] = w.here[k], to(k, t)
	}
}

// along sets one input to where the function is least, and returns that figure.
func (w *walkPath) along(in *Input) float64 { return w.line(in.Set, in.Band.Low, in.Band.High) }

// try works out one point, widens all spans by it and returns the function.
func (w *walkPath) try(set func(*Case, float64), x float64) float64 {
	c := w.at
	set(&c, x)
	At(&c, &w.p)
	w.s.takeBeside(&w.p, &c)
	y := w.of(&w.p)
	if math.IsNaN(y) {
		return math.Inf(1)
	}
	return y
}

// line goes to where the function is least between lo and hi. The golden section
// is spared where the least lies at an end and the function still rises half a
// step away from it.
func (w *walkPath) line(set func(*Case, float64), lo, hi float64) float64 {
	step := (hi - lo) / coarse
	best, least := lo, math.Inf(1)
	for k := range coarse + 1 {
		x := min(hi, lo+float64(k)*step)
		if y := w.try(set, x); y < least {
			best, least = x, y
		}
	}
	a, b := max(lo, best-step), min(hi, best+step)
	if !(a == best && w.try(set, best+step/2) >= least || b == best && w.try(set, best-step/2) >= least) {
		if x, y := w.golden(set, a, b); y < least {
			best, least = x, y
		}
	}
	set(&w.at, best)
	w.least = least
	return best
}

// golden closes in on the least of the function between a and b.
func (w *walkPath) golden(set func(*Case, float64), a, b float64) (x, y float64) {
	const ratio = 0.6180339887498949
	left, right := b-ratio*(b-a), a+ratio*(b-a)
	yl, yr := w.try(set, left), w.try(set, right)
	for range fine {
		if yl < yr {
			b, right, yr = right, left, yl
			left = b - ratio*(b-a)
			yl = w.try(set, left)
		} else {
			a, left, yl = left, right, yr
			right = a + ratio*(b-a)
			yr = w.try(set, right)
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

// middle returns the point in the middle of all bands.
func (s *spans) middle() Case {
	c := s.base
	for _, in := range s.free {
		in.Set(&c, (in.Band.Low+in.Band.High)/2)
	}
	return c
}
