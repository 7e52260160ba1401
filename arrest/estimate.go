package arrest

import (
	"math"

	"arrestcheck/arrest/quantity"
)

// Evidence says where an estimate comes from. Estimates of different evidence
// stand side by side; they are never averaged.
type Evidence string

const (
	Given    Evidence = "given"    // the stop and fall as entered
	Shape    Evidence = "shape"    // a pulse shape the user assumes: conditional, decides no limit
	Rated    Evidence = "rated"    // what a device's document promises while its conditions hold
	Modelled Evidence = "modelled" // the connector path, worked out in time
	Measured Evidence = "measured" // a load-cell record
)

// Bound says what an estimate promises, and so which way it can err.
type Bound string

const (
	AtLeast Bound = "at least" // a floor: the true figure is not below Low
	AtMost  Bound = "at most"  // a ceiling: the true figure is not above High
	Between Bound = "between"  // the true figure lies from Low to High
)

// Entered stands in the place of a method where a figure is as entered, or a
// plain sum of such.
const Entered = "entered"

// An Estimate is one figure for one quantity from one kind of evidence, SI.
// NaN stands for what is absent: High of a floor, Low of a ceiling, Value
// where an input was written as a range and so has no middle.
type Estimate struct {
	Quantity         Quantity
	Evidence         Evidence
	Method           string // id of the method, "M-06"
	Bound            Bound
	Low, Value, High float64

	// Reach is the upper end of a floor over everything the entries allow,
	// +Inf where that is open. NaN for estimates that are no floors.
	Reach float64

	// Typed is the unit the figure was typed in when it is printed and
	// compared as typed; the zero Unit when it was calculated.
	Typed quantity.Unit

	// From names the document of a rating or the assumed shape.
	From string

	// Uses lists the inputs the figure rests on, as indexes into Result.Inputs.
	Uses []int

	// Allowance is the user's own allowance for the error of the model, as a
	// share: NaN where none was entered and for all other evidence.
	Allowance float64

	// Harder is the upper end with every travel under a held force shortened by
	// the allowance: where the model nearly uses a travel up, its error may use
	// it up, and the stop then ends in the stiff parts. NaN where no travel comes
	// near its end.
	Harder float64

	// Exhausted is true for a modelled figure when, somewhere in the entries, a
	// travel is used up; Beyond when a loading curve is left, or a run ends in
	// nothing or in a rigid stop.
	Exhausted, Beyond bool

	// Travel is the part of a modelled length that the path gives, m: the
	// allowance is taken on it alone, since the rest of the length is no model. 0
	// where the whole figure is modelled.
	Travel float64

	// Place names the position of a layout that the figure is of, the worst of
	// several; empty where there is only one.
	Place string

	// Edge is true where, somewhere in the entries, the connector comes to an edge;
	// Strikes where the body comes to an obstacle or into the structure; Unreached
	// where for part of the entries the connector ends before the edge, or a swing
	// is in no plane: then nothing is known there.
	Edge, Strikes, Unreached bool

	// Part is the number, from 1, of the connector part that the document of a
	// rated estimate belongs to; 0 where it belongs to none.
	Part int

	// Outside is true for a rating some of whose conditions do not hold over
	// the whole of the entries: then the figure is no number (all NaN).
	Outside bool
}

// Ends returns the figures that a limit is compared with: Low and High, for a
// modelled estimate widened by the allowance where there is one: on the figure
// itself, and on the travel that was counted on.
func (e *Estimate) Ends() (low, high float64) {
	if e.Evidence != Modelled || math.IsNaN(e.Allowance) {
		return e.Low, e.High
	}
	low, high = e.Low, e.High
	if e.Harder > high {
		high = e.Harder
	}
	if e.Quantity == ClearanceLeft && e.Harder < low {
		low = e.Harder
	}
	if e.sum() { // of which nothing but the travel is modelled, where there is one
		return low - float64(e.Allowance*e.Travel), high + float64(e.Allowance*e.Travel)
	}
	return low - float64(e.Allowance*low), high + float64(e.Allowance*high)
}

// sum reports whether the estimate is a sum of M-21.
func (e *Estimate) sum() bool {
	switch e.Quantity {
	case TotalFallDistance, ClearanceNeeded, ClearanceLeft:
		return true
	}
	return false
}

// Conditional reports whether the estimate holds only under an assumption of
// the user's and so decides no limit either way.
func (e *Estimate) Conditional() bool { return e.Evidence == Shape }
