package arrest

// A WarningID names a sentence about a job; its words and its number S-nn are
// the report's. The comment gives the arguments in order.
type WarningID string

const (
	NothingAboutStop         WarningID = "nothing_about_stop"          // none: neither stop nor rating entered
	PartImpossible           WarningID = "part_impossible"             // distance that the slowest fall covers in the shortest time (length), greatest distance entered (length): part of the bands cannot happen
	RoutesAgreeClosely       WarningID = "routes_agree_closely"        // ratio: was one of distance and time computed from the other?
	RatioNearHalf            WarningID = "ratio_near_half"             // ratio: was t = d/v used?
	ForceLate                WarningID = "force_late"                  // ratio low, ratio high: r < 1
	ForceEarly               WarningID = "force_early"                 // ratio low, ratio high: r > 1, or the time holds hanging or bounce
	RatioUndecided           WarningID = "ratio_either"                // ratio low, ratio high: the bands hold 1
	FloorIllConditioned      WarningID = "floor_ill_conditioned"       // floor (force), greater mean (force): tolerances wanted on distance and time
	ShapeContradicted        WarningID = "shape_contradicted"          // shape, distance the shape asks for low, high, distance entered low, high (lengths)
	ShapeAssumed             WarningID = "shape_assumed"               // shape
	RatingMassOutside        WarningID = "rating_mass_outside"         // document, total mass low, high, rating low, high
	RatingFallOutside        WarningID = "rating_fall_outside"         // document, free fall high, rating at most
	RatingSpeedCounted       WarningID = "initial_speed_counted"       // initial speed high, free fall that gives the same speed high: how free-fall limits were tested
	RatingContradicted       WarningID = "rating_contradicted"         // document, floor of the peak at the rated travel (force), rated peak (force)
	EstimatesDisjoint        WarningID = "estimates_disjoint"          // quantity title, evidence A, figure A, evidence B, figure B
	CeilingBelowFloor        WarningID = "ceiling_below_floor"         // document, rated peak, floor at its upper end (force): part of the entries contradicts the rating
	Unusual                  WarningID = "unusual"                     // key, as written, usual low, usual high: common practice
	SeveralPersons           WarningID = "several_persons"             // number as text
	GravityStated            WarningID = "gravity_stated"              // gravity as written
	DragLeftOut              WarningID = "drag_left_out"               // free fall high (length): speed overstated without air drag
	ExampleValues            WarningID = "example_values"              // none
	PathExhausted            WarningID = "path_exhausted"              // part, energy left (J), peak then (force): the loudest line
	PathExhaustedInAllowance WarningID = "path_exhausted_in_allowance" // part, travel needed with the allowance, travel at most (lengths)
	PathRigid                WarningID = "path_rigid"                  // none: somewhere in the entries the stop is a blow on something rigid
	PathBeyondCurve          WarningID = "path_beyond_curve"           // parts, comma separated: beyond their last loading point
	StaticStretchOnly        WarningID = "static_stretch_only"         // part
	SeveralAbsorbers         WarningID = "several_absorbers"           // parts, comma separated
	AbsorberOnRetractable    WarningID = "absorber_on_retractable"     // parts, comma separated
	NothingAbsorbs           WarningID = "nothing_absorbs"             // greatest modelled peak (force)
	NoAllowanceEntered       WarningID = "no_allowance"                // none: the report prints the published comparison beside it
	RatedAgainstModel        WarningID = "rated_against_model"         // document, quantity title, rated figure, greatest modelled figure
	LedgersClose             WarningID = "ledgers_close"               // momentum left over momentum, energy left over energy (ratios): arithmetic only
	MeansAreNotPeaks         WarningID = "means_are_not_peaks"         // none: means are printed
	NoMiddle                 WarningID = "no_middle"                   // keys, comma separated: ranges have no middle figure
)

var warningIDs = [...]WarningID{
	NothingAboutStop,
	PartImpossible,
	RoutesAgreeClosely,
	RatioNearHalf,
	ForceLate,
	ForceEarly,
	RatioUndecided,
	FloorIllConditioned,
	ShapeContradicted,
	ShapeAssumed,
	RatingMassOutside,
	RatingFallOutside,
	RatingSpeedCounted,
	RatingContradicted,
	EstimatesDisjoint,
	CeilingBelowFloor,
	Unusual,
	SeveralPersons,
	GravityStated,
	DragLeftOut,
	ExampleValues,
	PathExhausted,
	PathExhaustedInAllowance,
	PathRigid,
	PathBeyondCurve,
	StaticStretchOnly,
	SeveralAbsorbers,
	AbsorberOnRetractable,
	NothingAbsorbs,
	NoAllowanceEntered,
	RatedAgainstModel,
	LedgersClose,
	MeansAreNotPeaks,
	NoMiddle,
}

// WarningIDs returns every id, in the order above.
func WarningIDs() []WarningID { return warningIDs[:] }
