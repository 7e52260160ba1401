// Package limits compares the results of the mechanics with the limits a user
// entered. It holds no limit of its own: not one figure.
//
// The usual call is Assess, with the result of a job and the sets of limits
// that were read with it:
//
//	a := limits.Assess(&result, file.Sets, file.Elsewhere)
//	for i := range a.Findings { ... }
//
// # What a row comes to
//
// Figures are compared as float64 in SI units, each rounded once from what was
// written, with no tolerance: a demand equal to its limit is not beyond it.
// The closed set of outcomes is
//
//   - exceeded: even the most favourable figure the entries allow is beyond;
//   - within: the least favourable figure is known and not beyond, nothing
//     speaks against it, and no cap applies;
//   - not compared: nothing was computed, or a condition of the limit does not
//     hold or cannot be tested;
//   - undecided: all else.
//
// Of several estimates any one that is exceeded wins. Every estimate with both
// ends known must be inside for the row to be within; of one-sided estimates
// the least favourable of one evidence governs, and one evidence is enough. A
// floor shows that a limit is exceeded and never the contrary. A figure that
// holds only under an assumption is shown and decides nothing.
//
// Where a limit is printed in two units, a demand between the two figures is
// undecided, unless it was typed in the unit of the limit.
//
// # Caps
//
// A cap turns a row that would be within into undecided, and softens nothing
// else: an open input under the governing evidence or under a condition that
// was tested, several persons on one system, example values, a limit nobody
// checked, one that is superseded, one that comes from a product test.
//
// # What is not promised
//
// The words under which a limit applies are printed and not tested. That a row
// is within says something about the entries; it permits nothing.
package limits

import (
	"arrestcheck/arrest"
	"arrestcheck/arrest/quantity"
)

// Kind says what a limit protects.
type Kind string

const (
	Person      Kind = "person"
	Motion      Kind = "motion"
	Anchor      Kind = "anchor"
	Structure   Kind = "structure"
	ProductTest Kind = "product test" // never a site limit: a row of this kind is never within
)

// Kinds returns the words a limit may use, in print order.
func Kinds() []Kind { return []Kind{Person, Motion, Anchor, Structure, ProductTest} }

// Sense says on which side of a limit the demand must stay. It is fixed by
// the quantity.
type Sense string

const (
	AtMost  Sense = "at_most"
	AtLeast Sense = "at_least"
)

// A Limit is one row the user entered.
type Limit struct {
	ID           string
	Quantity     arrest.Quantity
	Sense        Sense
	Bound        quantity.Band  // a single figure, as typed
	AlsoPrinted  *quantity.Band // the same limit as printed in another unit; nil where none
	Authority    string         // title and clause
	Edition      string
	Kind         Kind
	AppliesWhen  string // words, printed
	AnyOf        string // rows of one authority with one AnyOf form a group: one within is enough
	SupersededOn string // text; a limit with it is never within
	CheckedOn    string // its own, or its set's; empty: never within
	Note         string

	// Conditions that can be checked; nil or 0 where none.
	TotalMassAtMost *quantity.Band
	FreeFallAtMost  *quantity.Band
	PersonsAtMost   int
}

// A Set is one file of limits, or the inline limits of a job (Name empty).
type Set struct {
	Name         string // file name as the user gave it; empty for the limits of the job itself
	SHA256       string // of the file's bytes; empty for inline limits
	Title        string
	Jurisdiction string
	EnteredBy    string
	EnteredOn    string
	CheckedOn    string
	Note         string
	Example      bool // the set says its values are examples: never within
	Limits       []Limit
}

// Elsewhere names a quantity that another document handles.
type Elsewhere struct {
	Quantity arrest.Quantity
	Where    string
}
