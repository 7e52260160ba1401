package limits

import "arrestcheck/arrest"

// Outcome is what a comparison came to. The set is closed.
type Outcome string

const (
	Exceeded    Outcome = "exceeded"
	Undecided   Outcome = "undecided"
	NotCompared Outcome = "not_compared"
	Within      Outcome = "within"
)

// Outcomes returns the closed set in print order.
func Outcomes() []Outcome { return []Outcome{Exceeded, Undecided, NotCompared, Within} }

// A ReasonID names why a row is not settled, or what else must be said of it.
// Its words are the report's; the comment gives the arguments in order.
type ReasonID string

// The words "floor" and "ceiling" keep their sense in a limit that is at_least:
// there a ceiling leaves the bad side open, and a floor short of the limit does
// not show that the demand is.
const (
	OnlyFloor            ReasonID = "only_floor"            // floor: no upper figure is known (at_least: the floor is short of the limit)
	OnlyCeiling          ReasonID = "only_ceiling"          // ceiling: beyond the limit, which does not show that the demand is (at_least: no lower figure is known)
	Straddles            ReasonID = "straddles"             // least, greatest: the limit lies between
	FloorReaches         ReasonID = "floor_reaches"         // reach of the floor over the entries is beyond the limit ("open" as text when infinite)
	PairDiffers          ReasonID = "pair_differs"          // at_most as typed, also_printed as typed
	AssumedShape         ReasonID = "assumed_shape"         // shape: conditional figures decide no row
	OpenInput            ReasonID = "open_input"            // key, why (arrest.OpenReason as text)
	OutsideRating        ReasonID = "outside_rating"        // document
	Contradicted         ReasonID = "contradicted"          // evidence A, evidence B
	SeveralPersons       ReasonID = "several_persons"       // number as text
	ExampleValues        ReasonID = "example_values"        // none: the job's or the set's values are examples
	NotChecked           ReasonID = "limit_not_checked"     // none: limit without checked_on
	Superseded           ReasonID = "superseded"            // the date as text
	IsProductTest        ReasonID = "product_test"          // none
	ConditionUnfulfilled ReasonID = "condition_unfulfilled" // condition key, demand, condition as typed
	ConditionStraddles   ReasonID = "condition_straddles"   // condition key, least, greatest, condition as typed
	AlsoBeyond           ReasonID = "also_beyond"           // none: not compared, and also beyond the figure
	NoAllowance          ReasonID = "no_allowance"          // none: a modelled figure without the user's allowance is not compared
	DeviceExhausted      ReasonID = "exhausted_device"      // none: somewhere in the entries a travel is used up
	BeyondModel          ReasonID = "beyond_model"          // none: a loading curve is left, or the stop is a blow on something rigid
	EdgeContact          ReasonID = "edge_contact"          // none: somewhere in the entries the connector comes to an edge
	BodyStrikes          ReasonID = "body_strikes"          // none: somewhere in the entries the body comes to an obstacle or the structure
	PlaceUnknown         ReasonID = "place_unknown"         // none: for part of the entries the connector ends before the edge, or the swing is in no plane
	NotComputed          ReasonID = "not_computed"          // none: nothing to compare; or the key of the condition that nothing was entered to test
)

// A Reason is an id with its arguments.
type Reason struct {
	ID   ReasonID
	Args []arrest.Arg
}

// A Finding is one limit compared.
//
// Reasons: an undecided or not compared row has at least one, the main one
// first, and names whatever else would keep it from being within, so that all
// can be mended in one go. A row that is within or exceeded has none, or
// remarks: OutsideRating beside a row that another estimate settled,
// Contradicted beside one that is exceeded all the same.
//
// Demand is the figure of the governing estimate to print: its least
// favourable end, or, where that side is open, the favourable end, with the
// Bound that says so. Exceeded rows are governed by the greatest such figure
// that is beyond the limit (the least for at_least).
type Finding struct {
	Limit   *Limit
	Set     *Set
	Outcome Outcome
	Reasons []Reason
	Used    []int // estimates shown, governing first where Bound is not empty: indexes into Result.Estimates
	Bound   arrest.Bound
	Demand  float64 // SI; NaN where no estimate governs
	Ratio   float64 // demand over limit (over the stricter one of a printed pair); NaN for a floor, a limit of 0 and where there is none
}

// A Group is what is counted once: a single row, or the any_of rows of one authority.
type Group struct {
	AnyOf     string // empty for a row that asks for no group
	Authority string
	Rows      []int // indexes into Assessment.Findings
	Outcome   Outcome
}

// An Expected is a subject a job with a fall is expected to be held against.
type Expected struct {
	Subject    string            // id: "peak", "free_fall", "clearance", "anchor", "mass"
	Quantities []arrest.Quantity // a limit on any of them covers it
}

// An Assessment is a whole job compared.
type Assessment struct {
	Findings   []Finding
	Groups     []Group
	NotEntered []Expected // neither a limit nor an [[elsewhere]] covers it
	Elsewhere  []Elsewhere
}

// Counts returns how many groups came to each outcome.
func (a *Assessment) Counts() map[Outcome]int {
	n := make(map[Outcome]int, len(Outcomes()))
	for _, g := range a.Groups {
		n[g.Outcome]++
	}
	return n
}
