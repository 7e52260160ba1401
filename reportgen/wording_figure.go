package reportgen

import (
	"arrestcheck/arrest"
	"arrestcheck/arrest/rig"
)

// This file holds what stands in the figures of a job, and why one cannot be
// drawn. It is under the same rules as wording.go.

// Why there is no figure, and what to do.
const (
	noLayoutDrawn   = "has no layout: there is nothing to draw to scale"
	noLayoutHint    = "describe anchor, edge and positions in [layout] and [[position]]"
	noPathDrawn     = "has no connector path: nothing is worked out in time"
	noPathHint      = "describe the parts between anchor and body, [[connector]]"
	noRestDrawn     = "is not brought to rest by the model, or only by a blow on something rigid"
	noRestHint      = "change the path: up to the blow the curve would mislead"
	noFallDrawn     = "has no fall that could be worked out in time: none follows from the layout, or its swing is in no plane"
	noFallHint      = "look at the elevation and at the warnings of the sheet"
	nothingOfASize  = "has a layout in which nothing has a size that could be drawn"
	nothingSizeHint = "look at heights and lengths in the inputs of the sheet"
)

// Titles.
var (
	elevationTitle = phrase{[]string{"place", "at", "job"}, "Elevation from \"{place}\", {at}: {job}"}
	planTitle      = phrase{[]string{"at", "job"}, "Plan, {at}: {job}"}
	timeTitle      = phrase{[]string{"at", "job"}, "Force over time, by the model, {at}: {job}"}
	travelTitle    = phrase{[]string{"at", "job"}, "Force over travel, by the model, {at}: {job}"}
)

// drawnAt says at which of the entries a figure was drawn.
var drawnAt = map[arrest.Corner]string{
	arrest.AtWritten: "as written",
	arrest.AtLow:     "at the low end of the entries",
	arrest.AtHigh:    "at the greatest free fall over the entries",
	arrest.AtLongest: "at the longest stop over the entries",
	arrest.AtReach:   "where the connector reaches farthest over the entries",
}

const (
	peakAt     = "at the greatest peak over the entries"
	tightestAt = "where the entries leave the least room"
)

var placeAndCorner = phrase{[]string{"place", "at"}, "from \"{place}\", {at}"}

// The names of points, lines and dimensions, for a person, a tool, a load.
var (
	bodyPoint    = texts{"D-ring at the start", "attachment at the start", "attachment at the start"}
	heldPoint    = texts{"D-ring at the position", "attachment at the position", "attachment at the position"}
	bodyDatum    = texts{"datum: D-ring at the start", "datum: attachment at the start", "datum: attachment at the start"}
	feetDatum    = texts{"datum: feet at the start", "datum: surface at the start", "datum: surface at the start"}
	feetWords    = texts{"D-ring to feet", "attachment to underside", "attachment to underside"}
	surfaceWords = texts{"walking surface", "surface at the start", "surface at the start"}
)

const (
	anchorWord    = "anchor"
	anchorDatum   = "datum: anchor"
	tautWord      = "first pull"
	restWord      = "at rest"
	restAtLeast   = "at rest, or lower"
	lowestModel   = "lowest point"
	lowestTaut    = "lowest, if nothing stretched"
	edgeSeen      = "seen from outside"
	offsetWord    = "offset"
	behindWord    = "behind the edge"
	outWord       = "out"
	freeFallPart  = "free fall"
	swingDropPart = "swing drop"
	modelPart     = "stop, by the model"
	movesRemark   = "can be anywhere"
	asideRemark   = "beside the plane"
	noneDrawn     = "none"
)

var edgeKinds = map[rig.Edge]string{rig.RoundEdge: "round edge", rig.SharpEdge: "sharp edge"}

// drawnItems name the items of a clearance that a chain of dimensions calls
// otherwise than the tables do.
var drawnItems = map[rig.Item]string{
	rig.ItemConnector: "connector, taut",
	rig.ItemSwingDrop: swingDropPart,
}

// otherDatumPart is what the sum from the other datum has more, which counts.
const otherDatumPart = "by the other datum more"

// Labels with figures.
var (
	atHeight      = phrase{[]string{"what", "height"}, "{what} ({height})"}
	lengthOf      = phrase{[]string{"what", "length"}, "{what} {length}"}
	leftRoom      = phrase{[]string{"length"}, "left {length}"}
	leftTo        = phrase{[]string{"length", "obstacle"}, "left {length} to {obstacle}"}
	leftAtMost    = phrase{[]string{"length"}, "left at most {length}"}
	leftAtMostTo  = phrase{[]string{"length", "obstacle"}, "left at most {length} to {obstacle}"}
	roomShort     = phrase{[]string{"length"}, "{length} short"}
	goesOn        = phrase{[]string{"what"}, "{what}, ends below"}
	withRemark    = phrase{[]string{"what", "remark"}, "{what}, {remark}"}
	reachLabel    = phrase{[]string{"length"}, "reach of the connector {length}"}
	fromAnchor    = phrase{[]string{"position", "length"}, "{position}: {length} from the anchor"}
	meanDistance  = phrase{[]string{"force"}, "mean over the distance {force}"}
	meanTime      = phrase{[]string{"force"}, "mean over the time {force}"}
	peakPoint     = phrase{[]string{"force"}, "peak by the model {force}"}
	firstRestTime = phrase{[]string{"time"}, "first rest, {time}"}
	lowestTime    = phrase{[]string{"time"}, "lowest point, {time}"}
	firstRestAt   = phrase{[]string{"length"}, "first rest, {length}"}
)

// Axes of the modelled arrest.
const (
	pullTimeAxis   = "time from the first pull"
	pullTravelAxis = "travel from the first pull"
	stretchAxis    = "stretch of the connector"
)

var arrestForceAxis = texts{"force on the body", "force on the tool", "force on the load"}

// Notes below the figures.
const (
	heightsNote   = "Heights in brackets are above (+) or below (-) the surface at the start."
	noStretchNote = "The dotted arc is a swing without stretch; with a connector that stretches the body goes deeper."
	traceNote     = "The line from the first pull on is the way of the point of attachment by the model."
	unfoldedNote  = "Seen along the structure, from outside: the connector runs over the edge, and the anchor lies behind it."
	obliqueNote   = "Drawn in the plane of the swing, which crosses the edge at an angle: distances from the edge are longer here than in plan."
	notFlatNote   = "From here the swing is in no plane and is not drawn; the elevation is through the anchor and the start."
	edgeAwayNote  = "The edge lies outside of the drawing."
	noFallNote    = "No fall follows from the layout at this position, so none is drawn."
	restrainNote  = "The connector ends before the edge, so no fall is drawn; the sheet says where along the edge it does not."
	noBelowNote   = "No obstacle was entered: what is left below is not known."
	noRoomNote    = "No clearance was entered: the chain ends where the figures end."
	neverRestNote = "The model does not bring the body to rest, or only by a blow on something rigid: no place of rest is drawn."
	arrowNote     = "Arrows show the way of the swing, to the same distance on the other side or to the structure."
	heldFlatNote  = "The connector carries the body in a swing: means and stopping distance are not worked out for it."
)

var (
	anglesNote   = phrase{[]string{"work", "taut"}, "Offset angle {work} at the start, swing angle {taut} at the first pull."}
	missingNote  = phrase{[]string{"items"}, "Not entered, so that more room is needed than is drawn: {items}."}
	belowNote    = phrase{[]string{"obstacles"}, "Below the drawing: {obstacles}."}
	aboveNote    = phrase{[]string{"obstacles"}, "Above the drawing: {obstacles}."}
	besideNote   = phrase{[]string{"obstacles"}, "Not in the plane of the drawing: {obstacles}."}
	anywhereNote = phrase{[]string{"obstacles"}, "Not drawn, since they can be anywhere: {obstacles}."}
	levelsNote   = phrase{[]string{"obstacles"}, "Under all of the plan: {obstacles}."}
	awayNote     = phrase{[]string{"obstacles"}, "Outside of the drawing: {obstacles}."}
	noPlaneNote  = phrase{[]string{"positions"}, "Swing in no plane, and without an arrow: {positions}."}
	stayNote     = phrase{[]string{"positions"}, "No fall follows from the layout: {positions}."}
)

// What figures show, in words, for those who do not see them.
var (
	elevationDesc = phrase{[]string{"place", "anchor", "start"}, "Elevation to scale of the fall from \"{place}\": anchor at {anchor}, point of attachment at the start at {start}, its way down, what lies below, and a chain of dimensions."}
	planDesc      = phrase{[]string{"count"}, "Plan to scale: the anchor, the edge if there is one, the positions ({count}), obstacles with sides, and which way the body swings."}
	timeDesc      = phrase{[]string{"peak", "limits"}, "The force over the time from the first pull, with a peak of {peak}; limits on the peak force drawn: {limits}."}
	travelDesc    = phrase{[]string{"peak", "limits"}, "The force over the travel, with a peak of {peak}; limits on the peak force drawn: {limits}."}
)
