package rig

import (
	"errors"
	"math"
)

// A PlanarStatus says how a planar run ended.
type PlanarStatus uint8

const (
	// Swung: the body swung to the end of its way to the other side, was sent back
	// and goes down no more.
	Swung PlanarStatus = iota + 1

	// Rested: without an offset, the body came to its second lowest point or hangs
	// at rest.
	Rested

	// TimedOut: neither of them came within the time that a run is given.
	TimedOut

	// Endless: nothing ever stops the body, the path does not hold its weight.
	Endless

	// Rigid: the path was used up and had nothing left to stretch while the body
	// was going outwards. The peak is +Inf: no path of this kind has an answer.
	Rigid

	// OutOfPlane: the motion from this place is in no plane; nothing was run.
	OutOfPlane

	// Uncounted: layout and path both have slack, so that one of them would be
	// counted twice; nothing was run.
	Uncounted
)

// String returns the status in plain words.
func (s PlanarStatus) String() string {
	switch s {
	case Swung:
		return "swung to the end"
	case Rested:
		return "stopped straight below"
	case TimedOut:
		return "still in motion when the time was up"
	case Endless:
		return "never stopped"
	case Rigid:
		return "rigid stop"
	case OutOfPlane:
		return "out of the plane"
	case Uncounted:
		return "slack in the layout and in the path"
	}
	return "not run"
}

// A Planar is an arrest in the plane of the swing, in time (M-24). Figures that a
// run did not come to are NaN. The zero value is ready for use; a used one may be
// used again. Times count from the start of the fall, heights from the surface.
type Planar struct {
	Status PlanarStatus

	FirstPull float64 // s
	Peak      float64 // N, greatest force in the connector in the run
	PeakTime  float64 // s
	PeakAngle float64 // rad

	// PeakBound and DropBound are the peak, in N, and the drop from the start to
	// rest, in m, of the same path without its dashpots in a fall straight down to
	// Lowest of the place. No swing goes deeper, this one or a later one; and none
	// has a greater peak, but with a dashpot, where PeakBound is NaN.
	PeakBound, DropBound float64

	FirstTurn float64 // s, when the connector first stops stretching
	Travel    float64 // m, extension then; without an offset the stopping distance
	Extension float64 // m, greatest extension in the run

	Lowest Passage
	Passes [MaxObstacles]Passage // the first touch of every obstacle

	EndTime  float64 // s
	EndAngle float64 // rad, beyond straight below negative
	Counts   Counts
	Ledger   Ledger
}

// A Passage is a moment of a run. Without one, Reached is false and all figures
// are NaN.
type Passage struct {
	Reached   bool
	Unknown   bool    // of an obstacle: a figure is missing to look for it
	Time      float64 // s
	U, Z      float64 // of the D-ring, m: distance from the pivot in plan, height
	Drop      float64 // m, from the start down to Z
	Speed     float64 // m/s
	Down      float64 // share of the motion that is downwards, -1 to 1
	Height    float64 // m, of a straight fall with Speed
	Extension float64 // m; negative while the connector is slack
}

// Counts are the events of a run.
type Counts struct {
	Pulls  int // the connector became taut
	Slacks int // the force went to zero
	Turns  int // it stopped stretching
	Held   int // it kept its length, the body going on as a pendulum
	Steps  int
}

// A Ledger is the account of a run from the first pull on. The differences
// measure the arithmetic, not the model.
type Ledger struct {
	ImpulseSide, ImpulseUp float64 // N s, of the force in the connector, towards the pivot in plan and upwards
	Weight                 float64 // N s, of the weight
	MotionSide, MotionDown float64 // N s, gain of momentum, away from the pivot and downwards

	Before, After float64 // J, energy of motion
	Fallen        float64 // J, work of the weight
	Work          float64 // J, work done on the path, dashpot left out
	Viscous       float64 // J, work done on the dashpot
	Stored        float64 // J, what the path still gives back

	SideLeft   float64 // N s, ImpulseSide + MotionSide
	DownLeft   float64 // N s, Weight - ImpulseUp - MotionDown
	EnergyLeft float64 // J, Before + Fallen - After - Work - Viscous
}

// A PlanarState is a moment of a run for a figure.
type PlanarState struct {
	Time   float64 // s from the start of the fall
	U, Z   float64 // m
	VU, VZ float64 // m/s, away from the pivot and upwards
	F      float64 // N
}

var (
	errTolerance = errors.New("rig: the tolerance must lie between 1e-13 and 1e-3")
	errMass      = errors.New("rig: mass and gravity must be above zero and finite, an initial speed zero or more and finite")
	errOtherFall = errors.New("rig: the tether was read for another fall")
	errManySteps = errors.New("rig: the swing takes more than a million steps")

	// ErrLedger is the error of a run whose ledgers do not close: a fault of the
	// program, never of its input.
	ErrLedger = errors.New("rig: internal error: the momentum or energy of a swing does not close")
)

func (b *Body) check() error {
	if !(b.Mass > 0 && b.Gravity > 0 && b.InitialSpeed >= 0) || math.IsInf(b.Mass+b.Gravity+b.InitialSpeed, 1) {
		return errMass
	}
	return nil
}

// Planar works out the arrest from a place in the plane of its swing, step by
// step, into r. The body falls straight down to the first pull and from there
//
//	m r'' = W + T,  |T| = F(x, history) + c x' towards the pivot,  x = |r| - R
//
// while the path of the tether is taut; free flight in between. R radius of the
// place and slack of the path m; F the law of the path N; c its dashpot N s/m.
// The run ends where the body has been sent back from the other side, the
// connector stretches no more and the body goes down no more; without an offset at
// the second lowest point, as a run straight down does.
//
// tolerance is the error allowed to a step, relative to 1 m and to 1 m/s or
// more; the peak is then within about a hundred times the tolerance. Every step
// is searched for a turn of the motion before it is searched for a corner of the
// law; a moment found is stepped on to once more, so that it has the full order.
//
// It errs high, for want of friction and air drag; and low where a later swing
// without loss is harder or deeper (see PeakBound, DropBound). The edge of an
// unfolded swing holds nothing back, which errs high for the speed and either way
// for the peak. See the package for what is not modelled. Derived from Newton's
// laws.
//
// It returns an error for a figure out of range, for a tether that was read for
// another fall, and ErrLedger. It panics if the place is not Known or the tether
// was never set. A run allocates nothing.
func (l *Layout) Planar(p *Place, t *Tether, b *Body, tolerance float64, r *Planar) error {
	return l.planar(p, t, b, tolerance, r, nil)
}

// TracePlanar runs as Planar does and appends the moments of the run to the
// series, from the start of the fall: the ends of all steps and three moments
// within each. Where the force jumps, two states have the same time.
func (l *Layout) TracePlanar(p *Place, t *Tether, b *Body, tolerance float64, r *Planar, series []PlanarState) ([]PlanarState, error) {
	err := l.planar(p, t, b, tolerance, r, &series)
	return series, err
}

func (l *Layout) planar(p *Place, t *Tether, b *Body, tolerance float64, r *Planar, trace *[]PlanarState) error {
	if p.Status != Known || len(t.back) == 0 {
		panic("rig: a planar run needs a place that is known and a tether that was set")
	}
	r.reset()
	if err := b.check(); err != nil {
		return err
	}
	if !(tolerance >= 1e-13 && tolerance <= 1e-3) {
		return errTolerance
	}
	if !t.isFor(p, b) {
		return errOtherFall
	}
	switch {
	case !p.Plane.Flat:
		r.Status = OutOfPlane
		for i := range l.obstacles() {
			r.Passes[i].Unknown = true
		}
		return nil
	case t.slack > 0 && (l.Slack > 0 || l.Retractable):
		r.Status = Uncounted
		return nil
	}
	m := motion{
		stepper: stepper{g: b.Gravity, mass: b.Mass, c: t.viscous, radius: p.Plane.Radius + t.slack},
		t:       t, r: r, place: p, weight: b.Mass * b.Gravity, tolerance: tolerance, trace: trace,
	}
	r.PeakBound, r.DropBound = t.bound, t.drop
	m.windowsOf(l)
	m.fall(b)
	return m.run()
}

// reset empties the result.
func (r *Planar) reset() {
	nan := math.NaN()
	none := Passage{Time: nan, U: nan, Z: nan, Drop: nan, Speed: nan, Down: nan, Height: nan, Extension: nan}
	*r = Planar{
		FirstPull: nan, Peak: nan, PeakTime: nan, PeakAngle: nan, PeakBound: nan, DropBound: nan,
		FirstTurn: nan, Travel: nan, Extension: nan, Lowest: none, EndTime: nan, EndAngle: nan,
	}
	for i := range r.Passes {
		r.Passes[i] = none
	}
}

// settle works out the differences and returns ErrLedger if one of them is above
// the tolerance relative to what was turned over, or to a speed of 1 m/s.
func (l *Ledger) settle(mass, tolerance float64) error {
	l.SideLeft = l.ImpulseSide + l.MotionSide
	l.DownLeft = l.Weight - l.ImpulseUp - l.MotionDown
	l.EnergyLeft = l.Before + l.Fallen - l.After - l.Work - l.Viscous
	p := tolerance * (mass + l.Weight + math.Abs(l.ImpulseUp) + math.Abs(l.ImpulseSide) + math.Abs(l.MotionDown))
	e := tolerance * (mass + l.Before + l.After + math.Abs(l.Fallen) + math.Abs(l.Work))
	if math.Abs(l.SideLeft) <= p && math.Abs(l.DownLeft) <= p && math.Abs(l.EnergyLeft) <= e {
		return nil
	}
	return ErrLedger
}
