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
	LayoutRestrained         WarningID = "layout_restrained"           // position: over all of the entries the connector ends before the edge
	LayoutRestrainedInPart   WarningID = "layout_restrained_in_part"   // position: over part of the entries only
	LayoutGoneOver           WarningID = "layout_gone_over"            // position, reach in plan (length), way to the edge (length): upright the connector ends before the edge, but it can be gone over there
	LayoutEdge               WarningID = "layout_edge"                 // position, document that rates a part for the edge: the connector comes to the edge
	LayoutEdgeUnrated        WarningID = "layout_edge_unrated"         // position: it comes to an edge that no part is rated for
	LayoutAnchorLow          WarningID = "layout_anchor_low"           // greatest free fall (length), least connector length (length): the anchor is below the D-ring, the fall longer than the connector
	LayoutOutOfPlane         WarningID = "layout_out_of_plane"         // position: the swing is in no plane, nothing is said about it
	LayoutIntoFace           WarningID = "layout_into_face"            // position: the swing goes into the structure below the edge
	LayoutStrikes            WarningID = "layout_strikes"              // position, obstacle, least speed, greatest speed: the body comes to it
	LayoutStrikesFalling     WarningID = "layout_strikes_falling"      // position, obstacle, greatest speed: it comes to it before the first pull
	LayoutShort              WarningID = "layout_short"                // position, obstacle, length: by so much the room down to it is less than the room needed
	LayoutStrikeForce        WarningID = "layout_strike_force"         // obstacle, distance stated, mean force of the hit not less than
	LayoutNothingBelow       WarningID = "layout_nothing_below"        // none: no obstacle was entered, so nothing is left to anything
	LayoutNoClearance        WarningID = "layout_no_clearance"         // none: no [clearance] was entered
	LayoutItemsMissing       WarningID = "layout_items_missing"        // evidence, items missing, comma separated, room not less than (length)
	LayoutDatumsApart        WarningID = "layout_datums_apart"         // evidence, length: the sums from feet and from anchor differ by it
	LayoutFeetStanding       WarningID = "layout_feet_standing"        // none: D-ring to feet not entered, the standing height was taken to look for obstacles
	LayoutWidthUnknown       WarningID = "layout_width_unknown"        // none: half width not entered, every box counts as in the way
	LayoutLaterSwing         WarningID = "layout_later_swing"          // modelled peak (force), bound of any later swing (force)
	LayoutInextensible       WarningID = "layout_inextensible"         // none: swing speeds of a connector without stretch are no bounds
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
	LayoutRestrained,
	LayoutRestrainedInPart,
	LayoutGoneOver,
	LayoutEdge,
	LayoutEdgeUnrated,
	LayoutAnchorLow,
	LayoutOutOfPlane,
	LayoutIntoFace,
	LayoutStrikes,
	LayoutStrikesFalling,
	LayoutShort,
	LayoutStrikeForce,
	LayoutNothingBelow,
	LayoutNoClearance,
	LayoutItemsMissing,
	LayoutDatumsApart,
	LayoutFeetStanding,
	LayoutWidthUnknown,
	LayoutLaterSwing,
	LayoutInextensible,
	MeansAreNotPeaks,
	NoMiddle,
}

// WarningIDs returns every id, in the order above.
func WarningIDs() []WarningID { return warningIDs[:] }
