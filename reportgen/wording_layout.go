package reportgen

import (
	"arrestcheck/arrest"
	"arrestcheck/arrest/rig"
)

// This file holds what is said about the layout: where the anchor is, where the
// body falls from, and what lies below. It is under the same rules as wording.go,
// and speaks of a body, so that it reads alike on a sheet about a tool.

// layoutEntered stands in the place of what says that no layout was looked at.
var layoutEntered = statement{"S-54", quiet, phrase{nil,
	"The figures hold for the anchor, the edge, the positions and the obstacles entered, and for nothing between or beside them: work from another place needs a position of its own. Not worked out are a step to the side, toppling and turning, a connector that catches or rubs, and motion out of the plane of the swing."}}

// The statements of the warnings of a layout. Some ids share one.
var (
	layoutRestrained = statement{"S-56", loud, phrase{[]string{"position", "extent"},
		"At \"{position}\" the connector ends before the edge, {extent}. It holds a body back there only while anchor, length and the place along the edge stay as entered: a part that stretches, a stumble or a step to the side reach farther."}}
	layoutGoneOver = statement{"S-87", loud, phrase{[]string{"position", "reach", "way"},
		"At \"{position}\" the connector ends before the edge only while the body is upright. Bent or kneeling, its point of attachment gets {reach} from the anchor in plan, and the edge is {way} away: it can be gone over there. No fall was worked out from there, and no row that rests on the layout is within."}}
	layoutEdge = statement{"S-57", loud, phrase{[]string{"position", "document"},
		"At \"{position}\" the connector comes to the edge. A part is rated for it by \"{document}\": read there for which edge, which fall, how far to the side and with which anchor. The wear on the edge, and what the edge does to the forces, were not worked out."}}
	layoutEdgeUnrated = statement{"S-58", loud, phrase{[]string{"position"},
		"At \"{position}\" the connector comes to an edge that no part is rated for. An edge can cut a loaded connector at once. No row that rests on this fall is within: move the anchor, shorten the connector, or use parts whose document names such an edge."}}
	layoutAnchorLow = statement{"S-59", loud, phrase{[]string{"fall", "length"},
		"The anchor is below the point of attachment: the free fall goes up to {fall}, more than the length of the connector, {length}. Look for an anchor higher up. Few documents of devices cover such a fall."}}
	layoutOutOfPlane = statement{"S-60", loud, phrase{[]string{"position"},
		"From \"{position}\" the swing is in no plane, as the connector runs over the edge and to the side of a place outside of it. Nothing is said about its speed, its depth and what it reaches, and no row that rests on it is within."}}
	layoutIntoFace = statement{"S-61", loud, phrase{[]string{"position"},
		"From \"{position}\" the swing goes towards the structure below the edge, and the body can strike it. That blow was not worked out. Bring the anchor in front of the place of work, or out beyond the edge."}}
	layoutStrikes = statement{"S-62", loud, phrase{[]string{"position", "obstacle", "least", "greatest"},
		"From \"{position}\" the body comes to \"{obstacle}\" after the first pull, with {least .. greatest}. What the sheet says of this fall holds only up to there, and no row that rests on it is within. A blow from the side hurts as one from below does."}}
	layoutStrikesFalling = statement{"S-63", loud, phrase{[]string{"position", "obstacle", "greatest"},
		"From \"{position}\" the body comes to \"{obstacle}\" before the first pull, with up to {greatest}: the connector does not arrest this fall, and no row that rests on it is within."}}
	layoutShort = statement{"S-86", loud, phrase{[]string{"position", "obstacle", "short"},
		"From \"{position}\" the room down to \"{obstacle}\" falls short of the room needed, margin counted in, by up to {short} as entered; an item that is missing, or the error of a model, comes on top. No row that rests on this fall is within: look for an anchor higher up, a shorter system, or take away what is below."}}
	layoutStrikeForce = statement{"S-64", loud, phrase{[]string{"obstacle", "distance", "force"},
		"If \"{obstacle}\" stops the body over {distance}, as entered, the mean force of the blow is not less than {force}, and its peak is higher. Nobody has measured this blow."}}
	roomUnknown = statement{"S-65", loud, phrase{[]string{"room"},
		"What is left below the fall is not known: {room}. Measure down to everything that the body could come to, also to what moves there, and enter it."}}
	layoutItemsMissing = statement{"S-66", loud, phrase{[]string{"evidence", "items", "room"},
		"Missing in the clearance {evidence}: {items}. What is missing is not zero: the room needed is not less than {room}, and no row on it is within. Enter every item, or in which other item it is included."}}
	layoutDatumsApart = statement{"S-67", loud, phrase{[]string{"evidence", "apart"},
		"The room needed {evidence} comes out otherwise from below the feet than from below the anchor: at least {apart} lie between the two, by which the length from D-ring to feet after the fall and the height of the D-ring before it differ. Measure both again; until then count with the greater room."}}
	bodySizeUnknown = statement{"S-68", quiet, phrase{[]string{"size"},
		"How far the body reaches from its D-ring was not entered in full: {size}."}}
	layoutLaterSwing = statement{"S-69", loud, phrase{[]string{"peak", "bound"},
		"A later swing can pull harder than the one worked out: the model comes to a peak of {peak}, and no swing on this path, this one or a later one, goes above {bound}. Limits are held against the greater of the two."}}
	layoutInextensible = statement{"S-79", quiet, phrase{nil,
		"The speeds of the swing and what follows from them are marked \"if the connector did not stretch\". With one that stretches, the body goes deeper and can be faster, so that neither end bounds anything. They decide no limit."}}
)

// Words for the arguments that the report puts into the statements that several
// warnings share.
var (
	extentWords = map[string]string{
		string(arrest.LayoutRestrained):       "over all of the entries; no fall was worked out from there",
		string(arrest.LayoutRestrainedInPart): "over part of the entries only; for the rest a fall was worked out",
	}
	roomWords = map[string]string{
		string(arrest.LayoutNothingBelow): "no obstacle was entered",
		string(arrest.LayoutNoClearance):  "no clearance was entered",
	}
	sizeWords = map[string]string{
		string(arrest.LayoutFeetStanding): "without D-ring to feet, the height of the D-ring of the standing body was taken to look for obstacles",
		string(arrest.LayoutWidthUnknown): "without half width, every obstacle with sides counts as in the way",
	}
)

// What stands about the layout on page 1 and behind it.
const (
	layoutHeading = "The layout: swing and the room below"

	positionsHeading = "The layout, position by position"
	placesText       = "Heights count from the walking surface, upwards. A position with several figures entered as bands stands at the point of them that gives it the greatest free fall, or, where no fall follows, lets the connector reach farthest; page 1 has what each figure lies between."
	worstPlacesText  = "The worst of the positions, and for what; page 1 has the figures:"
	followsWord      = "what follows"
	offsetInPlan     = "offset from the anchor in plan"
	heldFallWord     = "free fall, were the connector held on the edge"
	tautHeight       = "height of the D-ring at the first pull"
	lowestWord       = "height of the lowest point, straight below"
	edgeWord         = "the edge"
	swingWord        = "the swing"
	edgeAtPull       = "the connector runs over it at the first pull"
	edgeLater        = "the connector comes to it in the swing"
	edgeNever        = "the connector does not come to it"
	noPlane          = "in no plane"
	noSwing          = "none: straight down"
	intoFace         = "towards the structure"
	uprightPlane     = "in an upright plane"
	notKnown         = "not known"
	noFall           = "no fall"

	restraintHeading = "Does the connector end before the edge?"
	restraintText    = "How far from the anchor the D-ring can get in plan, at whatever height it is carried, against the way to the edge from there, at the point of the entries that lets it get farthest. What parts stretch under a stumble, and what of the body is beyond its D-ring, is not counted in."
	edgeCrossed      = "none: it can be gone over there"
	restraintHolds   = "As entered the connector ends before the edge everywhere along it."
)

var (
	restraintHead = []string{"position", "reach of the connector", "way to the edge", "left before the edge"}
	restraintOver = phrase{[]string{"nearest"}, "As entered the edge can be gone over, at one of the positions or at its point nearest to the anchor, {nearest} away: it is a fall that has to be arrested."}

	// placeCorners says at which of the entries a position stands.
	placeCorners = map[arrest.Corner]string{arrest.AtWritten: "as written", arrest.AtHigh: "at the greatest free fall", arrest.AtReach: "at the farthest reach"}

	placeStatus = map[rig.Status]string{
		rig.Known:       "a free fall",
		rig.Incomplete:  "nothing: a figure is missing",
		rig.OutOfReach:  "out of reach of the connector",
		rig.Restrained:  "held back before the edge",
		rig.SlackTwice:  "nothing: slack counted twice",
		rig.InStructure: "nothing: the anchor is inside the structure",
	}
)

// What stands about the clearance.
const (
	itemsHead1, itemsHead2 = "item", "from"

	belowFeet, belowAnchor                      = "below the feet", "below the anchor"
	isCounted, isMissing, isForeign, isIncluded = "counted", "MISSING", "left out", "included"
	isTwice, notOfIt                            = "TWICE", "-"
	notEntered                                  = "not entered"
	fromLayout, fromSwing                       = "the layout, M-20", "the layout, M-22"
	foreignText                                 = "\"left out\": entered, but of the other sum: below the feet the length of the body and of the connector drop out, below the anchor the connector straight down holds free fall and swing in itself."
	datumsAgree                                 = "none"
	differWord                                  = "between the two"
	shortestWord                                = "shortest room"
	asideWord                                   = "not in the way"
	nothingLeft                                 = "nothing: nothing stops the body"
	noObstacle                                  = "No obstacle was entered: the room needed is held against nothing."
	nothingInTheWay                             = "No obstacle is in the way from this position."
)

var (
	clearanceHeading = phrase{[]string{"evidence"}, "Clearance {evidence}, item by item"}
	tightestPlace    = phrase{[]string{"position", "corner"}, "From \"{position}\", {corner}."}
	tightestCorners  = map[arrest.Corner]string{
		arrest.AtWritten: "as written",
		arrest.AtHigh:    "at the point of the entries that leaves the least room, or, with nothing below, needs the most",
	}

	itemsIncluded = phrase{[]string{"items"}, "includes {items}"}
	includedIn    = phrase{[]string{"item"}, "in {item}"}
	sumNeeded     = phrase{[]string{"room"}, "{room} needed"}
	sumFloor      = phrase{[]string{"room", "items"}, "not less than {room}: {items} missing"}
	sumTwice      = phrase{[]string{"items"}, "no sum: {items} counted twice"}
	ofTheDatum    = phrase{[]string{"sum"}, "{sum}; limits on what is needed are held against this one"}
	sumsDiffer    = phrase{[]string{"apart"}, "{apart}, the height of the anchor taken off"}
	shortestRoom  = phrase{[]string{"feet", "anchor"}, "{feet} below the walking surface, which is {anchor} below the anchor, would do by the greater of the two sums"}
	shortestFloor = phrase{[]string{"feet", "anchor"}, "not known; not less than {feet} below the walking surface, which is {anchor} below the anchor"}
	shortestWider = phrase{[]string{"share", "feet", "anchor"}, "with the allowance of {share} on the travel of the path {feet} and {anchor}"}

	travelAllowance     = phrase{[]string{"figure", "share", "wider"}, "{figure}, with the allowance of {share} on the travel of the path: {wider}"}
	travelAllowanceNote = phrase{[]string{"share"}, "with the allowance of {share} on the travel of the path"}

	leftHead = []string{"obstacle, nearest first", "room down to it", "needed", "left"}
	movesToo = phrase{[]string{"obstacle"}, "{obstacle}, which moves"}
)

// What stands about the swing.
const (
	swingText       = "Where entries have bands, every obstacle stands as near below as they allow. The connector without stretch gives two ends: all of the speed along it lost at the first pull, and nothing lost. One that stretches lets the body go deeper and can make it faster than either."
	outOfPlane      = "The swing is in no plane (S-60): nothing is said about it."
	noStretchRemark = "if the connector did not stretch"

	speedAtPull    = "speed at the first pull"
	speedSideways  = "the part of it along the swing"
	speedAtLowest  = "speed at the lowest point"
	straightFall   = "as after a straight fall of"
	timeToLowest   = "time from the first pull to there"
	dropToLowest   = "drop from the start to there"
	swungPeak      = "peak force, the same at both ends"
	laterPeak      = "no swing, this or a later one, has a peak above"
	laterDrop      = "nor goes deeper, from the start, than"
	leftSideways   = "momentum to the side left over"
	leftDown       = "momentum downwards left over"
	leftEnergy     = "energy left over"
	notThere       = "does not come to it"
	atMostWord     = "at most"
	notOfThisModel = "-"
)

var (
	swingHeading  = phrase{[]string{"position", "corner"}, "The swing from \"{position}\", {corner}"}
	swingHead     = []string{whatHead, noStretchRemark, "by the model of the path"}
	speedAt       = phrase{[]string{"obstacle"}, "speed at {obstacle}"}
	speedAtBefore = phrase{[]string{"speed"}, "{speed}, before the first pull"}
	hitOver       = phrase{[]string{"distance"}, "mean force of the blow, stopped over {distance}, not less than"}
	fromPlace     = phrase{[]string{"position"}, "from \"{position}\""}

	plannedStatus = map[rig.PlanarStatus]string{
		rig.Swung:      "the body swings to the end and is sent back",
		rig.Rested:     "the body stops straight below",
		rig.TimedOut:   "still in motion when the time worked out was up",
		rig.Endless:    "nothing stops the body",
		rig.Rigid:      "a blow on something rigid",
		rig.OutOfPlane: "in no plane: not worked out",
		rig.Uncounted:  "not worked out: slack in layout and path",
	}
)

// What is said where figures hold only if the connector did not stretch.
var (
	noStretchReason = phrase{nil, "figures that hold only if the connector did not stretch decide no limit"}
	noStretchBeside = phrase{nil, "beside it stand figures that hold only if the connector did not stretch, and decide no limit"}
	noStretchWanted = phrase{[]string{"entries"}, "What holds only without stretch settles no row. {entries}."}
)

// The reasons that a layout gives to rows.
var (
	edgeContact  = phrase{nil, "somewhere in the entries the connector comes to an edge"}
	bodyStrikes  = phrase{nil, "somewhere in the entries the body comes to an obstacle or to the structure"}
	placeUnknown = phrase{nil, "for part of the entries, or only for an upright body, the connector ends before the edge, or the swing is in no plane"}
)

const layoutTakesLonger = "Not worked out on this sheet: for each figure the worst of the positions is looked for anew. Call: arrestcheck sensitivity JOB."

// What is to be entered before a row of a layout can be settled.
const (
	itemsWay    = "enter the clearance item by item, with its datum and the source of each item"
	obstacleWay = "enter each obstacle below, with its depth measured"
	swungWay    = "enter the connector path, with an allowance of your own, so that the swing is worked out in time"
)

var missingWay = phrase{[]string{"items"}, "enter what is missing of the clearance ({items}), or in which item it is included"}

// holdsForLayout is the datum of a sheet with a layout.
var holdsForLayout = texts{
	aPerson: "The attachment point on the harness (the D-ring). Heights count from the walking surface, upwards; the free fall ends and the stop begins with the first pull.",
	aTool:   "The point at which the tool is tied. Heights count from the walking surface, upwards; the free fall ends and the stop begins with the first pull.",
	aLoad:   holdsFor[aLoad],
}

const pathOfLayout = "The parts of the connector path stand in the order entered, have no mass, and behave as entered in a fast pull, also in a swing."

// layoutAssumptions stand in the place of assumptions that a layout takes away.
var layoutAssumptions = map[string]string{
	"The body falls straight down, does not swing and hits nothing on the way.":                          "The body falls straight down from where it stands to the first pull, and swings from there in an upright plane; what it comes to does not turn it aside.",
	"The tool falls straight down, does not swing and hits nothing on the way.":                          "The tool falls straight down from where it is to the first pull, and swings from there in an upright plane; what it comes to does not turn it aside.",
	"The free fall contains every slack, slide and payout before the first pull.":                        "The connector has no more slack, slide and payout before the first pull than was entered.",
	"The connector pulls and never pushes, and lets the body come to rest once, at the end of the stop.": "The connector pulls and never pushes.",
	"The tether pulls and never pushes, and lets the tool come to rest once, at the end of the stop.":    "The tether pulls and never pushes.",
}

// moreAssumptions are made of every layout.
var moreAssumptions = []string{
	"Anchor, edge and obstacles are where the entries say, and stay there in the fall; what moves may be anywhere.",
	"Over an edge the connector slides along it without friction.",
}

// layoutNotChecked stands in the place of what a layout looks at in part.
var layoutNotChecked = map[string]string{
	"clearance: what a falling person may strike below or beside":     "whatever lies below or beside and was not entered as an obstacle",
	"what the tool strikes below or beside, and who or what is there": "whatever lies below or beside and was not entered as an obstacle, and who is there",
	"swing, side offset, and obstacles in its way":                    "swing out of an upright plane, swinging back and to and fro, toppling and turning",
	"swing on the tether, side offset, and obstacles in its way":      "swing out of an upright plane, swinging back and to and fro, turning",
	"edges, cutting, chafing, heat, chemicals, electricity":           "cutting and chafing over edges and what an edge does to the forces, heat, chemicals, electricity",
}
