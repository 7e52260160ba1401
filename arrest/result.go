package arrest

import (
	"arrestcheck/arrest/quantity"
	"arrestcheck/arrest/rig"
)

// An Arg is one figure or text that a sentence about a result needs. The
// mechanics hold no sentences: they give ids and arguments.
type Arg struct {
	Text      string             // when Dimension is zero
	Dimension quantity.Dimension // when not zero, SI is a figure of it
	SI        float64
	Rounding  quantity.Rounding
}

// Text makes an Arg of words: a key, a document's name, a figure as typed.
func Text(s string) Arg { return Arg{Text: s} }

// Figure makes an Arg of an SI figure.
func Figure(d quantity.Dimension, si float64, r quantity.Rounding) Arg {
	return Arg{Dimension: d, SI: si, Rounding: r}
}

// A Warning is something the reader must know about this job.
type Warning struct {
	ID   WarningID
	Args []Arg
}

// A Term is one symbol of a formula with the figure put in for it.
type Term struct {
	Symbol    string
	Dimension quantity.Dimension
	SI        float64
}

// Corner says at which end of the entries a working line was calculated.
type Corner string

const (
	AtWritten Corner = "as written"     // the middle figures, where all are written
	AtLow     Corner = "low end"        // the least result the entries allow
	AtHigh    Corner = "high end"       // the greatest
	AtLongest Corner = "longest stop"   // of a ModelRun: the greatest stopping distance
	AtReach   Corner = "farthest reach" // of a LayoutPlace that no fall follows from: the connector reaches farthest
)

// A WorkingLine is one formula with the figures put in and its result. The
// formula is the text of the method record that Method and Formula name.
type WorkingLine struct {
	Method   string
	Formula  string // "F_d = W + m*v^2/(2*d)"
	Meaning  string // what the result is, in words
	Corner   Corner
	Terms    []Term
	Result   Term
	Rounding quantity.Rounding // which way the printed result may be rounded
}

// A Contradiction names two unconditional estimates of one quantity that
// cannot both be right: for all that the entries allow, or for a part of it,
// in which neither then bounds the quantity. A rating whose own travel asks
// for a greater peak than it promises contradicts the job by itself: A == B.
type Contradiction struct {
	A, B int  // indexes into Result.Estimates
	Part bool // only for a part of what the entries allow
}

// A Result is everything At and the bands say about a job. It holds no
// sentences and no limits.
type Result struct {
	Inputs         []Input
	Estimates      []Estimate
	Warnings       []Warning
	Working        []WorkingLine // empty until ShowWorking fills it
	Contradictions []Contradiction
	Runs           []ModelRun    // of the connector path: as written, at the greatest peak, at the longest stop
	Layout         *LayoutResult // nil where the job has no layout
	Persons        int
	Example        bool

	worked *evaluation // of Evaluate, for ShowWorking
}

// A LayoutResult is the layout of a job, position by position.
type LayoutResult struct {
	Plan   *LayoutPlan
	Places []LayoutPlace // one for each position, in the order of the plan
	Worst  int           // index of the position of the greatest free fall; -1 where none has one

	// Tightest is the position and the point that leave the least room; where
	// nothing lies below, those that need the most. Nil without a clearance.
	Tightest *LayoutPlace
}

// A LayoutPlace is one position at one point.
type LayoutPlace struct {
	Index  int    // of the position
	Corner Corner // AtWritten where all of the layout has middle figures, else AtHigh, the point of the greatest free fall from there, or, without a fall, AtReach
	Case   Case
	Run    LayoutRun

	// Farthest is the reach against the edge at the point of the entries where the
	// connector reaches farthest towards it and beyond, whatever the Corner.
	Farthest rig.Restraint
}
