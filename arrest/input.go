package arrest

import (
	"math"

	"arrestcheck/arrest/quantity"
)

// Source says how the user came by a figure.
type Source string

const (
	NoSource     Source = "" // nothing said: the input stays open
	FromMeasured Source = "measured"
	FromDrawing  Source = "drawing"
	FromPlan     Source = "plan"
	FromLabel    Source = "label"
	FromStandard Source = "standard"
	FromAssumed  Source = "assumed"
)

// Sources returns the words a job file may use, in print order.
func Sources() []Source {
	return []Source{FromMeasured, FromDrawing, FromPlan, FromLabel, FromStandard, FromAssumed}
}

// Role says what an input describes; it fixes which sources settle it.
type Role uint8

const (
	OfWorker    Role = iota + 1 // masses: measured, drawing or plan settle
	OfFall                      // free fall, speed: measured, drawing or plan settle
	OfStop                      // distance, time, shape: only measured settles (nobody plans a stopping distance)
	OfDocument                  // figures of a rating: the document is the source
	OfPlace                     // gravity, a stated constant
	OfDrive                     // what goes on driving a moving load: measured, drawing or plan settle
	OfPart                      // data of a connector part: measured, label or standard settle
	OfModel                     // the allowance for the error of the model: any source but an assumption settles
	OfLayout                    // what a tape measure gives: measured, drawing or plan settle; of the connector itself label or standard too
	OfClearance                 // items of a clearance: all but an assumption settle, a travel to rest only measured, label or standard
)

// An Input is one figure of the job. The inputs form the one list from which
// corners, sweeps, solves, samples and the table of inputs are made.
type Input struct {
	Key    string // "worker.mass", "rated[1].peak_force_at_most"
	Role   Role
	Band   quantity.Band
	Source Source
	Note   string

	// Derived marks an input that was made of others, which stand beside it with
	// Set nil: the lightest to the heaviest of several workers.
	Derived bool

	// Overridden marks a figure that was put in on the command line: nobody
	// has given a source for it, whatever the file says.
	Overridden bool

	// Position is the number, from 1, of the position of a layout that the input
	// belongs to; 0 where it belongs to none.
	Position int

	// Set writes an SI figure into a Case; nil where At does not use the input.
	Set func(*Case, float64)
}

// OpenReason says why an input is open; the empty reason means settled.
type OpenReason string

const (
	Settled         OpenReason = ""
	OpenNoSource    OpenReason = "no source"
	OpenSource      OpenReason = "source does not settle it"
	OpenNoTolerance OpenReason = "no tolerance"
)

// Open says whether and why the input is open. An input is settled by a
// source that can settle its role and a tolerance that is written (a range, or
// a ± that may be 0). An exact zero with a source needs no tolerance.
func (in *Input) Open() OpenReason {
	switch {
	case in.Overridden:
		return OpenNoSource
	case in.Role == OfDocument || in.Role == OfPlace:
		return Settled
	case in.Source == NoSource:
		return OpenNoSource
	case (in.Role == OfModel || in.Key == marginItem) && in.Source != FromAssumed:
		return Settled
	case !in.settles():
		return OpenSource
	case in.Band.Tolerance == quantity.Untold && !in.exactZero():
		return OpenNoTolerance
	}
	return Settled
}

func (in *Input) settles() bool {
	switch in.Source {
	case FromMeasured:
		return true
	case FromLabel, FromStandard:
		return in.Role == OfPart || in.Role == OfClearance || in.ofConnector()
	case FromDrawing, FromPlan:
		switch in.Role {
		case OfWorker, OfFall, OfDrive, OfLayout:
			return true
		case OfClearance:
			return in.Key != DecelerationItem // nobody plans a stopping distance
		}
	}
	return false
}

func (in *Input) exactZero() bool { return in.Band.Low == 0 && in.Band.High == 0 }

// ofConnector reports whether a figure of the layout is one of the connector
// itself, which its label may state.
func (in *Input) ofConnector() bool {
	return in.Key == "layout.connector_length" || in.Key == "layout.travel_before_locking"
}

// DecelerationItem is the key of the travel to rest among the items of a
// clearance.
const DecelerationItem = "clearance.deceleration_distance"

// marginItem is the key of the margin, which a rule or a plan sets to one
// figure: it has no tolerance.
const marginItem = "clearance.margin"

// HasValue reports whether a middle figure was written.
func (in *Input) HasValue() bool { return !math.IsNaN(in.Band.Value) }

// A Rating is what the document of a device promises, and the conditions
// under which it does.
type Rating struct {
	Document   string // required: the source of every figure here
	Conditions string // words of the document that cannot be checked; printed
	Note       string

	TotalMass      quantity.Band // required, a range
	FreeFallAtMost quantity.Band // required

	PeakForceAtMost *quantity.Band // nil where the document is silent
	MeanForceAtMost *quantity.Band
	TravelAtMost    *quantity.Band

	// Part is the number of the connector part the document belongs to, from 1;
	// 0 where it belongs to none.
	Part int

	// TravelIsDeceleration is true when the document says that its travel is
	// the whole deceleration distance; else it is the travel of the absorber.
	TravelIsDeceleration bool
}

// Moving reports whether the job is one of a moving load and not of a fall.
func (j *Job) Moving() bool { return j.Point.Load.Mass > 0 }

// A Job is everything the mechanics need to know of one fall and its stop.
type Job struct {
	Point   Case    // the figures as written (lower ends where a range has no middle)
	Inputs  []Input // the one list
	Ratings []Rating
	Persons int       // on one system; 0 where no person is part of the job
	Example bool      // the file says that its values are examples
	Notes   []Warning // what the reader of the file has to add: figures outside the usual
}
