package reportgen

import (
	"arrestcheck/arrest"
	"arrestcheck/limits"
)

// This file and those named after it hold every sentence, heading and label that
// the program prints about a job. Formulas, and the prose about them, are in the
// method records.
// Some words are never used, neither here nor anywhere in output; a test holds
// the list.

// The first line of every report.
const notAPermission = "Arithmetic check. Not a permission to work, not a design, not a certificate."

// The banner of a report on example values.
const exampleBanner = "EXAMPLE VALUES * EXAMPLE VALUES * EXAMPLE VALUES * EXAMPLE VALUES"

// A statement is a numbered caution. Its number is never used again for
// anything else, and its text is word for word the one in SAFETY.md.
type statement struct {
	number string
	weight weight
	phrase
}

// A weight says how loud a statement is. Loud ones come first and are marked,
// the loudest before them.
type weight uint8

const (
	quiet weight = iota
	loud
	loudest
)

// The statements on the ten subjects that a reader must have in mind.
var (
	whoDecides = statement{"S-01", quiet, phrase{nil,
		"This sheet is arithmetic on the figures that were entered. It does not decide whether anyone may work at height. That is for the competent or qualified person in charge, for a licensed engineer where the law asks for one, and for the local code."}}
	limitsAreTheUsers = statement{"S-02", quiet, phrase{nil,
		"Every limit here was entered by a user; the program brings none of its own. Read each in its current text, with its conditions, before relying on a row."}}
	notLookedAt = statement{"S-03", quiet, phrase{nil,
		"Much that can hurt a person was not looked at: the list under \"Not looked at\" names it. Silence about a hazard does not mean that it is absent."}}
	hanging = statement{"S-04", quiet, phrase{nil,
		"An arrested person is left hanging and may be hurt, and hanging still in a harness can turn deadly within minutes. Have the rescue planned, rehearsed, equipped and at hand before anyone starts, for every person."}}
	floorsNotPeaks = statement{"S-05", quiet, phrase{nil,
		"A peak worked out from a stopping distance or time is a floor: no stop with these entries has a lower peak, and the true one can be several times as high. A floor can show that a limit is exceeded, never that it is not."}}
	notThisStop = statement{"S-06", quiet, phrase{nil,
		"A label, an assumed shape, a model or a drop test is not this stop. Test masses are not bodies: they do not bend, slump or bruise, and the same fall can load a body otherwise. Never drop a person to find out."}}
	measureFirst = statement{"S-07", loud, phrase{[]string{"open", "all"},
		"Open inputs: {open} of {all}. Nobody has settled them with a source and a tolerance. Measure them first. A row that rests on an open input is never within."}}
	outsideData = statement{"S-08", loud, phrase{nil,
		"Part of the entries lies outside the conditions under which the data hold. There the data say nothing and no figure was made from them: find data for this case, or change the case."}}
	thisLayoutOnly = statement{"S-09", quiet, phrase{nil,
		"The figures hold for a fall straight below the anchor and for the positions entered. To one side of the anchor a person also swings, and an edge can load or cut the connector: neither was worked out."}}
	anchorAndLine = statement{"S-10", quiet, phrase{nil,
		"The anchor, the line and what they are fixed to were not worked out. A line near level is pulled with a multiple of the force on the body, and each further person on a system adds load and can pull the others down."}}
	meansAreNotPeaks = statement{"S-32", quiet, phrase{nil,
		"Mean forces are floors, not what the body feels. Never compare a mean with a limit that is written for a peak."}}
	nothingAbsorbs = statement{"S-41", loud, phrase{[]string{"peak"},
		"Nothing in the path absorbs: the peak of the model goes up to {peak}. Such a system holds a person back, it does not arrest a fall."}}
	setOutside = statement{"S-52", loud, phrase{[]string{"keys"},
		"Set on the command line, and not as the job file has it: {keys}. The file alone does not give this sheet. Enter in the file what is to be kept."}}
	noRescueEntered = statement{"S-34", loud, phrase{nil,
		"No rescue method is entered in this job. Do not begin before there is one that works for a person who cannot help."}}
)

// meanOnRow is added to S-32 and S-48 for each limit on a mean that protects
// something which feels the peak.
var meanOnRow = phrase{[]string{"row", "quantity", "limit", "kind"}, " Row {row} holds a mean, {quantity}, against {limit}, a limit for kind \"{kind}\": the peak is above the mean."}

// ofWarnings holds the statement of each warning.
var ofWarnings = map[arrest.WarningID]statement{
	arrest.NothingAboutStop: {"S-11", loud, phrase{nil,
		"Nothing about the stop is entered, neither a distance nor a time, a rating or a connector path. No force can be worked out, only speed and energy."}},
	arrest.PartImpossible: {"S-12", loud, phrase{[]string{"reach", "distance"},
		"Some of the distances and times entered cannot go together: a connector pulls and never pushes, and a falling body cannot travel so far in so short a time (the slowest fall covers {reach} in the shortest time, and the entries go up to {distance}). Only what can happen was used, and upper ends stay open. Measure both again."}},
	arrest.RoutesAgreeClosely: {"S-13", quiet, phrase{[]string{"ratio"},
		"Distance and time agree closely: the ratio of the two routes is {ratio}. Was one of them calculated from the other? Then it tells nothing new: leave it out. Agreement confirms neither, for both routes share the mass and the speed."}},
	arrest.RatioNearHalf: {"S-14", loud, phrase{[]string{"ratio"},
		"The ratio of the two routes is {ratio}, close to one half. Was the time taken as distance over speed? A body that slows down needs longer: measure the time or leave it out."}},
	arrest.ForceLate: {"S-15", quiet, phrase{[]string{"least", "greatest"},
		"The force comes late in the stop (ratio of the two routes {least .. greatest}, below 1), as where something stiffens while it stretches. The peak then lies well above the means."}},
	arrest.ForceEarly: {"S-16", quiet, phrase{[]string{"least", "greatest"},
		"The force comes early in the stop (ratio of the two routes {least .. greatest}, above 1), or the time entered contains hanging or a bounce. Check where the time begins and ends."}},
	arrest.RatioUndecided: {"S-17", quiet, phrase{[]string{"least", "greatest"},
		"The entries do not tell whether the force comes early or late in the stop: the ratio of the two routes is {least .. greatest}."}},
	arrest.FloorIllConditioned: {"S-18", loud, phrase{[]string{"floor", "mean"},
		"The floor of the peak, {floor}, lies far above the greater mean, {mean}, and depends on the last digits of distance and time. Measure both, with tolerances, before using it."}},
	arrest.ShapeContradicted: {"S-19", loud, phrase{[]string{"shape", "asked low", "asked high", "entered low", "entered high"},
		"The entries contradict the assumed shape ({shape}): with the time entered it asks for a stopping distance of {asked low .. asked high}, and {entered low .. entered high} is entered. No figure was made from the shape."}},
	arrest.ShapeAssumed: {"S-20", quiet, phrase{[]string{"shape"},
		"A shape of the stop is assumed ({shape}). What follows from it holds only if the stop were such, and decides no limit."}},
	arrest.RatingMassOutside: {"S-21", loud, phrase{[]string{"document", "mass low", "mass high", "rated low", "rated high"},
		"The total mass, {mass low .. mass high}, leaves the range of the rating of \"{document}\", {rated low .. rated high}. What that document promises does not hold here and is not used."}},
	arrest.RatingFallOutside: {"S-22", loud, phrase{[]string{"document", "fall", "rated"},
		"The free fall, up to {fall}, is greater than the rating of \"{document}\" covers, {rated}. What that document promises does not hold here and is not used."}},
	arrest.RatingSpeedCounted: {"S-23", quiet, phrase{[]string{"speed", "fall"},
		"The fall begins with a speed of up to {speed}. Limits and conditions on free fall were tested with the height that gives the same speed from rest, up to {fall}."}},
	arrest.RatingContradicted: {"S-24", loud, phrase{[]string{"document", "floor", "rated"},
		"The document \"{document}\" contradicts this job: over the travel it states, no stop of this fall has a peak below {floor}, and it promises at most {rated}. One of the entries is wrong, or the device cannot hold this fall."}},
	arrest.EstimatesDisjoint: {"S-25", loud, phrase{[]string{"quantity", "evidence A", "figure A", "evidence B", "figure B", "bound A", "bound B"},
		"Two figures for one thing cannot both be right: {quantity} is {bound A} {figure A} {evidence A}, and {bound B} {figure B} {evidence B}. Neither is averaged away. Find out which entry is wrong."}},
	arrest.CeilingBelowFloor: {"S-26", loud, phrase{[]string{"document", "rated", "floor"},
		"Part of the entries contradicts \"{document}\": it promises at most {rated}, and the floor from the entries goes up to {floor}. Measure the stop more closely."}},
	arrest.Unusual: {"S-27", loud, phrase{[]string{"key", "as written", "usual low", "usual high"},
		"{key} is \"{as written}\", which is unusual: {usual low .. usual high} is common practice. A slip of the pen? The figure was used as entered."}},
	arrest.SeveralPersons: {"S-28", loud, phrase{[]string{"persons"},
		"{persons} persons are on one system. The sheet works out one fall at a time. Falls together, or one after another, load anchor and line more, and a person who falls can pull another."}},
	arrest.GravityStated: {"S-29", quiet, phrase{[]string{"gravity"},
		"Gravity is taken as entered, {gravity}, and not as the standard value 9.80665 m/s2."}},
	arrest.DragLeftOut: {"S-30", quiet, phrase{[]string{"fall"},
		"The drag of the air is left out. For a free fall of up to {fall} that makes the speed too high by some per cent, and the forces with it."}},
	arrest.ExampleValues: {"S-31", loud, phrase{nil,
		"This job or one of its limit sets holds example values. They describe no real place, user or device, and nothing here may be used for work."}},
	arrest.PathExhausted: {"S-35", loudest, phrase{[]string{"part", "energy", "peak"},
		"EXHAUSTED: the travel of \"{part}\" is used up before the body is at rest. The energy then left, {energy}, goes into the stiff parts, and in the model the force rises to {peak}. Change the system, or shorten the fall."}},
	arrest.PathExhaustedInAllowance: {"S-53", loud, phrase{[]string{"part", "needed", "travel"},
		"NEARLY EXHAUSTED: the model alone does not use up the travel of \"{part}\", but within your allowance for its error it may: then {needed} is needed, and there are at most {travel}. The stop would end in the stiff parts. Change the system, or shorten the fall."}},
	arrest.PathRigid: {"S-36", loud, phrase{nil,
		"Somewhere in the entries nothing stops the body, or it ends in a blow on something rigid. What follows then has no upper end by anything that was entered."}},
	arrest.PathBeyondCurve: {"S-37", loud, phrase{[]string{"parts"},
		"The model leaves the loading points that were entered for \"{parts}\". Beyond the last point nobody knows the force: measure further, or keep the part below it."}},
	arrest.StaticStretchOnly: {"S-38", loud, phrase{[]string{"part"},
		"The stiffness of \"{part}\" comes from a static stretch alone. In a fall a rope is about twice as stiff as that, and the peak is higher than the model says."}},
	arrest.SeveralAbsorbers: {"S-39", loud, phrase{[]string{"parts"},
		"Several absorbers are in one path (\"{parts}\"). The one that gives at the lower force is used up first, and their documents do not say how they behave together."}},
	arrest.AbsorberOnRetractable: {"S-40", loud, phrase{[]string{"parts"},
		"A lanyard with an absorber and a retractable are in one path (\"{parts}\"). That lengthens the fall, and the retractable may not lock. Ask the makers of both whether the two may go together at all."}},
	arrest.NothingAbsorbs: nothingAbsorbs,
	arrest.NoAllowanceEntered: {"S-42", loud, phrase{[]string{"tests", "types", "low", "high"},
		"No allowance for the error of the model is entered, so modelled figures decide no limit. Enter your own, with where it comes from. For comparison: of {tests} published drops of {types} types of lanyard the simplest model, told of the other drops of a type, gave peaks {low} to {high} off the measured ones. The table below the warnings has every type, the worst first."}},
	arrest.RatedAgainstModel: {"S-43", loud, phrase{[]string{"document", "quantity", "rated", "modelled"},
		"The model exceeds what \"{document}\" promises: {quantity} at most {rated} by the document, up to {modelled} in the model. Find out which of them describes this device."}},
	arrest.LedgersClose: {"S-44", quiet, phrase{[]string{"momentum", "energy"},
		"In the model a share of {momentum} of the momentum and of {energy} of the energy is not accounted for. That measures the arithmetic, not whether the model is like the real stop."}},
	arrest.LayoutRestrained:       layoutRestrained,
	arrest.LayoutRestrainedInPart: layoutRestrained,
	arrest.LayoutGoneOver:         layoutGoneOver,
	arrest.LayoutEdge:             layoutEdge,
	arrest.LayoutEdgeUnrated:      layoutEdgeUnrated,
	arrest.LayoutAnchorLow:        layoutAnchorLow,
	arrest.LayoutOutOfPlane:       layoutOutOfPlane,
	arrest.LayoutIntoFace:         layoutIntoFace,
	arrest.LayoutStrikes:          layoutStrikes,
	arrest.LayoutStrikesFalling:   layoutStrikesFalling,
	arrest.LayoutShort:            layoutShort,
	arrest.LayoutStrikeForce:      layoutStrikeForce,
	arrest.LayoutNothingBelow:     roomUnknown,
	arrest.LayoutNoClearance:      roomUnknown,
	arrest.LayoutItemsMissing:     layoutItemsMissing,
	arrest.LayoutDatumsApart:      layoutDatumsApart,
	arrest.LayoutFeetStanding:     bodySizeUnknown,
	arrest.LayoutWidthUnknown:     bodySizeUnknown,
	arrest.LayoutLaterSwing:       layoutLaterSwing,
	arrest.LayoutInextensible:     layoutInextensible,
	arrest.MeansAreNotPeaks:       meansAreNotPeaks,
	arrest.NoMiddle: {"S-33", quiet, phrase{[]string{"keys"},
		"Entered as ranges: {keys}. A range has no middle figure, and none was made up; results stand at both ends."}},
}

// reasons holds the words of each reason, as they follow "undecided:" or "not
// compared:", or stand beside any outcome.
var reasons = map[limits.ReasonID]phrase{
	limits.OnlyFloor:            {[]string{"floor"}, "only a floor is known, {floor}; the true figure may lie beyond the limit"},
	limits.OnlyCeiling:          {[]string{"ceiling"}, "only a ceiling is known, {ceiling}; it lies beyond the limit, the true figure may not"},
	limits.Straddles:            {[]string{"least", "greatest"}, "the entries allow {least .. greatest}, and the limit lies between"},
	limits.FloorReaches:         {[]string{"reach"}, "over the entries the floor reaches {reach}, beyond the limit"},
	limits.PairDiffers:          {[]string{"typed", "also printed"}, "the printed pair differs ({typed}, {also printed}) and the figure lies between the two"},
	limits.AssumedShape:         {[]string{"shape"}, "figures of an assumed shape ({shape}) decide no limit"},
	limits.OpenInput:            {[]string{"key", "why"}, "open input {key}: {why}"},
	limits.OutsideRating:        {[]string{"document"}, "a condition of \"{document}\" does not hold, so it promises nothing here"},
	limits.Contradicted:         {[]string{"evidence A", "evidence B"}, "figures contradict each other: the one {evidence A} and the one {evidence B}"},
	limits.SeveralPersons:       {[]string{"persons"}, "{persons} persons on one system"},
	limits.ExampleValues:        {nil, "example values"},
	limits.NotChecked:           {nil, "nobody has checked this limit against its current text (no checked_on)"},
	limits.Superseded:           {[]string{"date"}, "the limit is superseded since \"{date}\""},
	limits.IsProductTest:        {nil, "a figure of a product test is no limit for a site"},
	limits.ConditionUnfulfilled: {[]string{"condition", "demand", "bound"}, "the limit holds for {condition} {bound}, and here it is not less than {demand}"},
	limits.ConditionStraddles:   {[]string{"condition", "least", "greatest", "bound"}, "the limit holds for {condition} {bound}, and here it is {least .. greatest}"},
	limits.AlsoBeyond:           {nil, "also beyond the figure of the limit"},
	limits.NoAllowance:          {nil, "the figure of the model needs the user's own allowance for its error (model.allowance), and none is entered"},
	limits.DeviceExhausted:      {nil, "somewhere in the entries a device is exhausted"},
	limits.BeyondModel:          {nil, "somewhere in the entries a part is loaded beyond what is known of it, or the stop is a blow on something rigid"},
	limits.EdgeContact:          edgeContact,
	limits.BodyStrikes:          bodyStrikes,
	limits.PlaceUnknown:         placeUnknown,
	limits.NotComputed:          {nil, "nothing entered gives this figure"},
}

// contradictsItself is Contradicted where both figures come from one thing.
var contradictsItself = phrase{[]string{"evidence A"}, "the figures {evidence A} contradict each other in this job"}

// reasonsAtLeast holds the words of reasons that read otherwise where a limit
// is one from below.
var reasonsAtLeast = map[limits.ReasonID]phrase{
	limits.OnlyFloor:   {[]string{"floor"}, "only a floor is known, {floor}; it is short of the limit, the true figure need not be"},
	limits.OnlyCeiling: {[]string{"ceiling"}, "only a ceiling is known, {ceiling}; no lower figure is known, and the true one may be short of the limit"},
}

// shapeBeside is AssumedShape where another reason comes first.
var shapeBeside = phrase{[]string{"shape"}, "beside it stand figures of an assumed shape ({shape}), which decide no limit"}

// untestedCondition is NotComputed for a condition of the limit.
var untestedCondition = phrase{[]string{"condition"}, "nothing entered tells whether the limit's condition is fulfilled: {condition} a given figure"}

// Words for ids that come as arguments. The name of the argument says which
// words are meant; what a user typed is never taken for an id.
var (
	openWords = map[string]string{
		string(arrest.OpenNoSource):    "no source is given",
		string(arrest.OpenSource):      "its source does not settle it",
		string(arrest.OpenNoTolerance): "no tolerance is written",
	}
	evidenceWords = map[string]string{
		string(arrest.Given):    "by the entries for fall and stop",
		string(arrest.Shape):    "by the assumed shape",
		string(arrest.Rated):    "by the rating",
		string(arrest.Modelled): "by the model",
		string(arrest.Measured): "by the record",
	}
	// namedEnd says what end of a figure a contradiction names.
	namedEnd = map[string]string{string(arrest.AtLeast): "not less than", string(arrest.AtMost): "at most", string(arrest.Between): "up to"}

	conditionWords = map[string]string{
		"total_mass_at_most": "a total mass of at most",
		"free_fall_at_most":  "a free fall of at most",
		"persons_at_most":    "persons on one system of at most",
	}
	reachWords = map[string]string{openEnd.Text: noUpperEnd}

	idArguments = map[string]map[string]string{
		"why": openWords, "evidence A": evidenceWords, "evidence B": evidenceWords, "bound A": namedEnd, "bound B": namedEnd,
		"condition": conditionWords, "reach": reachWords, "evidence": evidenceWords, "extent": extentWords, "room": roomWords, "size": sizeWords,
	}
)

// outcomeWords holds the printed words of the outcomes.
var outcomeWords = map[limits.Outcome]string{
	limits.Exceeded:    "exceeded",
	limits.Undecided:   "undecided",
	limits.NotCompared: "not compared",
	limits.Within:      "within as entered",
}

// noRescueWords are what people write who have no rescue method.
var noRescueWords = []string{
	"none", "no", "nil", "n/a", "na", "n.a", "not applicable", "not available", "tbd", "tba", "tbc", "to do", "todo",
	"to be decided", "to be determined", "to be defined", "to be confirmed", "to be planned", "to be arranged",
	"not yet", "none yet", "not yet decided", "not known", "unknown", "not decided", "not planned", "nothing", "later", "pending", "open",
}

// expectedWords says what a job with a fall is expected to be held against.
var expectedWords = map[string]string{
	"peak":      "peak force on the body",
	"free_fall": "free fall",
	"clearance": "clearance below",
	"anchor":    "strength of the anchor",
	"mass":      "total mass",
}

var boundWords = map[arrest.Bound]string{
	arrest.AtLeast: "not less than",
	arrest.AtMost:  "at most",
}

var senseWords = map[limits.Sense]string{
	limits.AtMost:  "at most",
	limits.AtLeast: "at least",
}

// The rest of page 1.
const (
	warningHeading = "WARNING: read first"
	limitsHeading  = "Limits as entered, and what the arithmetic says to them"
	peaksHeading   = "Peaks"
	meansHeading   = "Means"
	openHeading    = "Open inputs"
	statusHeading  = "How far this program can be trusted"
	beforeHeading  = "Before anybody relies on this sheet"
	namesHeading   = "Names"
	noLimits       = "No limit was entered, so nothing was compared."
	noPeak         = "No figure for a peak follows from what was entered."
	noOpenInputs   = "No input is open: each has a source that settles it and a tolerance."
	verification   = "Is the mathematics right? Tests hold the formulas against published values and against independent routes. They show that the arithmetic does what the formulas say, no more."
	namedInFile    = "named in the file, not a signature"
)

// The labels of the head of page 1.
const (
	questionLabel, jobLabel, siteLabel          = "Question", "Job", "Site"
	referenceLabel, revisionLabel, dateLabel    = "Reference", "Revision", "Date"
	systemLabel, rescueLabel, sheetLabel        = "System", "Rescue", "Sheet"
	datumLabel, limitsLabel, missingLabel       = "Datum", "Limits", "Nobody entered"
	setLabel, reviewLabel                       = "Set by hand", "Review"
	elsewhereLabel, worstLabel, nothingEntered  = "Elsewhere", "Worst row", "(not entered)"
	insideLabel, usedUpLabel, nearlyLabel       = "Inside a group", "EXHAUSTED", "NEARLY EXHAUSTED"
	preparedLabel, checkedLabel, signLabel      = "Prepared by", "Checked by", "Signatures"
	verificationLabel, validationLabel          = "Verification", "Validation"
	rowHead, demandHead, limitHead, outcomeHead = "row", "what, and how much", "limit, and where it stands", "outcome"
	whatHead, figureHead, fromHead              = "what", "figure", "from"
)

// signRoles are those who sign. Each gets an empty line.
var signRoles = []string{"prepared", "checked by another", "decided by competent or qualified person"}

var openHead = []string{"input", "why it is open"}

var signHead = []string{"role", "name", "date", "signature"}

// What stands behind page 1.
const (
	behindHeading     = "Behind page 1: what it rests on"
	longTextsHeading  = "Texts that page 1 cuts, whole"
	inputsHeading     = "Inputs"
	limitTextsHeading = "The limits in full"
	registerHeading   = "Assumptions: each needs confirmation"
	workingHeading    = "Working (in SI units, five digits)"
	notCheckedHeading = "Not looked at"
	referencesHeading = "References"
	filesHeading      = "Files and versions"
	needsConfirmation = "Needs confirmation."
	documentSource    = "document"
	noWorking         = "No line of working: see the entries."
)

// Assumptions that depend on the job.
var (
	openAssumption  = phrase{[]string{"key", "as written", "why"}, "{key} = \"{as written}\" is open: {why}."}
	shapeAssumption = phrase{[]string{"shape"}, "The stop has the shape called {shape}, in the figures that say so."}
	ratedAssumption = phrase{[]string{"document"}, "The device in use is the one that \"{document}\" describes, and it is in the state that document asks for."}
	wordsCondition  = phrase{[]string{"document", "words"}, "What \"{document}\" asks for in words is fulfilled: \"{words}\"."}
	wordsOfLimit    = phrase{[]string{"limit", "words"}, "The limit {limit} applies here: \"{words}\"."}
)

// Remarks beside figures.
const (
	outsideRemark = "no figure: a condition does not hold"
	noFigure      = "no figure"
	entriesRemark = "from the entries"
	modelRemark   = "by the model"
	recordRemark  = "by the record"
	enteredRemark = "as entered"

	noUpperEnd      = "no upper end"
	endlessFigure   = "a figure with no upper end"
	exhaustedRemark = "a device is exhausted"
	beyondRemark    = "beyond what was entered"
	bareRemark      = "by the model, no allowance entered"
	endlessModel    = "no upper end, by the model"
	timeRoute       = " over the time"
	distanceRoute   = " over the distance"
	moreOnRows      = "More on the rows:"
)

// Sentences of page 1 with figures in them.
var (
	shapeRemark           = phrase{[]string{"shape"}, "if the stop were a pulse \"{shape}\""}
	shareOfLimit          = phrase{[]string{"share"}, "{share} of the limit"}
	setInPlace            = phrase{[]string{"key", "value", "former"}, "{key} = \"{value}\", in place of \"{former}\" in the file"}
	setAnew               = phrase{[]string{"key", "value"}, "{key} = \"{value}\", of which the file says nothing"}
	setByHand             = phrase{nil, "(set on the command line)"}
	setByHandFor          = phrase{[]string{"former"}, "(set on the command line; \"{former}\" in the file)"}
	openAbove             = phrase{[]string{"low"}, "{low} and more, no upper end"}
	openBelow             = phrase{[]string{"high"}, "up to {high}, no lower end"}
	withAllowance         = phrase{[]string{"figure", "share", "wider"}, "{figure}, with the allowance of {share}: {wider}"}
	allowanceNote         = phrase{[]string{"share"}, "with the allowance of {share}"}
	quoted                = phrase{[]string{"text"}, "\"{text}\""}
	settledBy             = phrase{[]string{"source"}, "settled ({source})"}
	openFrom              = phrase{[]string{"source", "why"}, "open ({source}): {why}"}
	openWhy               = phrase{[]string{"why"}, "open: {why}"}
	ratedRemark           = phrase{[]string{"document"}, "by \"{document}\" while its conditions hold"}
	countSentence         = phrase{[]string{"all", "exceeded", "undecided", "not compared", "within"}, "{all} in all: {exceeded} exceeded, {undecided} undecided, {not compared} not compared, {within} within as entered."}
	worstSentence         = phrase{[]string{"row", "outcome", "quantity", "demand", "limit", "clause"}, "{outcome} in row {row}, {quantity}: {demand}, against the limit {limit}, by \"{clause}\"."}
	worstBeside           = phrase{[]string{"sentence", "reason"}, "{sentence} Beside it stands: {reason}."}
	insideRow             = phrase{[]string{"rows", "outcome"}, "row {rows} is {outcome}"}
	insideRows            = phrase{[]string{"rows", "outcome"}, "rows {rows} are {outcome}"}
	insideWithin          = phrase{[]string{"group", "rows"}, "Inside the group \"{group}\" {rows}; by its rule one row within is enough."}
	insideOpen            = phrase{[]string{"group", "rows"}, "Inside the group \"{group}\" {rows}; by its rule one row within is enough, and none is."}
	usedUpHead            = phrase{[]string{"part"}, "the travel of \"{part}\" is used up before the body is at rest (S-35)."}
	noRescueText          = phrase{[]string{"text"}, "\"{text}\": that is no rescue method (S-34)"}
	worstReason           = phrase{[]string{"sentence", "reason"}, "{sentence} Reason: {reason}."}
	alternative           = phrase{[]string{"group", "outcome"}, "one of several ways to fulfil \"{group}\", which counts once: {outcome}"}
	usedUpInAllowanceHead = phrase{[]string{"part"}, "the travel of \"{part}\" may be used up within the allowance (S-53)."}
	openSentence          = phrase{[]string{"open", "all"}, "Open: {open} of {all} inputs. Measure these first:"}
	sheetOf               = phrase{[]string{"number", "of"}, "{number} of {of}"}
	alsoPrintedNote       = phrase{[]string{"text"}, "also printed as {text}"}
	elsewhereLine         = phrase{[]string{"quantity", "where"}, "{quantity}: handled in \"{where}\", not looked at here"}
	wrongSum              = phrase{[]string{"formula", "figure", "corner"}, "WRONG: {formula} = {figure}, {corner}"}
	rightSum              = phrase{[]string{"formula", "figure"}, "Right: {formula} = {figure}"}
)

// Labels of limits and sets behind page 1.
const (
	quantityWord, editionWord, kindWord   = "bounds", "edition", "kind"
	appliesWord, conditionWord, checkWord = "applies when", "only for", "checked on"
	setWord, noteWord, groupWord          = "set", "note", "any of"
	supersededWord, notCheckedWord        = "superseded on", "nobody (no checked_on)"
	inlineSet                             = "limits of the job file itself"
	jobFileLabel, setFileLabel            = "Job file", "Limit set"
	toolLabel, modelLabel, sourceWord     = "Program", "Model", "Source"
	digestLabel                           = "  SHA-256"
	enteredByWord, jurisdictionWord       = "entered by", "jurisdiction"
)

var inputsHead = []string{"input", "as written", "SI: low, written, high", "source, settled or open"}
