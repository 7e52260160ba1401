package connector

import "math"

// A Status says how a run ended for the body.
type Status uint8

const (
	// Stopped: the body came to rest for the first time.
	Stopped Status = iota + 1

	// Tending: the body creeps towards its hanging position and is at rest
	// only in the limit. RestTime and StoppingTime are +Inf.
	Tending

	// TimedOut: Duration ended before the first rest.
	TimedOut

	// Endless: nothing ever stops the body, the path holds no more than its
	// weight.
	Endless

	// Rigid: the path was used up and had nothing left to stretch while the
	// body was moving. The peak is +Inf: no path of this kind has an answer.
	Rigid
)

// String returns the status in plain words.
func (s Status) String() string {
	switch s {
	case Stopped:
		return "stopped"
	case Tending:
		return "at rest only in the limit"
	case TimedOut:
		return "not yet at rest when the time was up"
	case Endless:
		return "never stopped"
	case Rigid:
		return "rigid stop"
	}
	return "not run"
}

// A Result is what a run gives. Figures that a run did not come to are NaN. The
// zero value is ready for use; a used one may be used again.
//
// Times count from the end of the free fall, when the slack of the path begins;
// StoppingTime counts from the first pull.
type Result struct {
	Status Status

	FirstPull float64 // s, the first arrest force
	RestTime  float64 // s, the first rest

	Peak        float64 // N, greatest force on the body in the whole run
	PeakTime    float64 // s
	AnchorForce float64 // N; the peak, since the path has no mass

	StoppingTime         float64 // s, first arrest force to first rest
	StoppingDistance     float64 // m, travel of the body from the first pull to the first rest
	DecelerationDistance float64 // m, the same without the stretch of lifeline parts
	AbsorberTravel       float64 // m, deployed travel of the absorbers in the whole run

	MeanOverTime     float64 // N, impulse from first pull to first rest over the time
	MeanOverDistance float64 // N, work up to the first rest over the distance
	Onset            float64 // N/s, peak over the time from first pull to peak; +Inf for a blow

	// SecondPeak is the greatest force in N between the first highest point of
	// the rebound and the second lowest point. Only a dashpot makes it less than
	// the first peak, since a way back is retraced without loss: it errs high.
	SecondPeak     float64
	SecondPeakTime float64 // s

	Exhausted      uint64  // bit i: the travel of part i was used up
	FirstExhausted int     // the first part it happened to, -1: none
	ExhaustedTime  float64 // s
	EnergyLeft     float64 // J, energy of motion that was left at that moment

	BeyondPoints uint64 // bit i: part i went beyond its last loading point

	Parts  []PartResult // one for each part of the path; none from IntegrateLaw
	End    State
	Events Events
	Ledger Ledger
}

// A PartResult is the share of one part. Its travel leaves its slack out.
type PartResult struct {
	AtPeak, AtRest float64 // m, travel at the peak and at the first rest
	Permanent      float64 // m, travel that stays after the run
	Stored, Lost   float64 // J, energy that it gives back, and that it does not, at the end
}

// A State is a moment of a run.
type State struct {
	Time, X, V, F float64 // s, m from the first pull, m/s downwards, N
}

// Events counts what happened in a run.
type Events struct {
	Pulls   int // the path became taut
	Slacks  int // the force went to zero
	Corners int // the force passed a corner of the law
	Rejoins int // the way back was retraced up to the reach
	Rests   int // lowest points
	Tops    int // highest points of the rebound
}

// Total returns the number of all events.
func (e Events) Total() int { return e.Pulls + e.Slacks + e.Corners + e.Rejoins + e.Rests + e.Tops }

// blank is a result in which nothing has happened.
var blank = func() Result {
	nan := math.NaN()
	return Result{
		FirstPull: nan, RestTime: nan, PeakTime: nan,
		StoppingTime: nan, StoppingDistance: nan, DecelerationDistance: nan,
		MeanOverTime: nan, MeanOverDistance: nan, Onset: nan,
		SecondPeak: nan, SecondPeakTime: nan,
		FirstExhausted: -1, ExhaustedTime: nan, EnergyLeft: nan,
	}
}()

// reset empties the result and keeps its memory.
func (r *Result) reset() {
	parts := r.Parts[:0]
	*r = blank
	r.Parts = parts
}

// exhaust notes parts whose travel is used up.
func (r *Result) exhaust(parts uint64, at, left float64) {
	fresh := parts &^ r.Exhausted
	if fresh == 0 {
		return
	}
	r.Exhausted |= fresh
	if r.FirstExhausted >= 0 {
		return
	}
	r.FirstExhausted = 0
	for fresh&1 == 0 {
		fresh >>= 1
		r.FirstExhausted++
	}
	r.ExhaustedTime, r.EnergyLeft = at, left
}

// sameForce is the relative difference up to which a later force is no new peak:
// on a plateau, or without damping, peaks repeat but for rounding.
const sameForce = 1e-12

// push takes a force into the peaks and reports whether it is a new peak.
func (r *Result) push(f, at float64) bool {
	if r.Events.Tops > 0 && r.Events.Rests < 2 && !(f <= r.SecondPeak*(1+sameForce)) {
		r.SecondPeak, r.SecondPeakTime = f, at
	}
	if f <= r.Peak*(1+sameForce) {
		return false
	}
	r.Peak, r.PeakTime = f, at
	return true
}

// rest notes the first rest at the time and travel given; impulse and work are
// those of the path up to then.
func (r *Result) rest(at, x, impulse, work float64) {
	r.Status = Stopped
	r.RestTime, r.StoppingTime, r.StoppingDistance = at, at-r.FirstPull, x
	if r.StoppingTime > 0 {
		r.MeanOverTime = impulse / r.StoppingTime
	}
	if x > 0 {
		r.MeanOverDistance = work / x
	}
}

// close sets the figures that follow from others.
func (r *Result) close() {
	r.AnchorForce = r.Peak
	if rise := r.PeakTime - r.FirstPull; rise >= 0 {
		r.Onset = r.Peak / rise
	}
}
