package reportgen

import (
	"arrestcheck/arrest"
	"arrestcheck/arrest/study"
)

// This file holds what is said about studies: sweeps, solutions, regions, what
// to measure first. It is under the same rules as wording.go.

// The statements of studies.
var (
	studyOnly = statement{"S-70", loud, phrase{nil,
		"A study asks one job many times, with figures that nobody has measured. It helps to plan and to teach, and decides nothing. Settle the figures you choose, enter them, and make a sheet of that job: it holds the warnings that are not repeated here."}}
	figuresOnly = statement{"S-71", quiet, phrase{nil,
		"Where a figure equals a limit was looked for by the figures alone. Open inputs, conditions and caps are looked at by a check: what one says with that figure typed in stands beside it."}}
	floorClearsNothing = statement{"S-72", loud, phrase{nil,
		"Where a floor equals a limit, the other side of that place is not cleared: there the floor is below the limit, and the true peak may lie beyond it all the same."}}
	afterEvent = statement{"S-78", loud, phrase{nil,
		"A torn absorber tells of the absorber only, at the force entered: every other stretch took energy as well, so that the fall may have been deeper than this. What has arrested a fall stays out of use, and as it was found, until a competent person has looked into the event."}}
	countedAsMeasured = statement{"S-73", loud, phrase{[]string{"across", "up"},
		"The regions say what would come out if {across} and {up} were measured so, to ± 0. Nobody has measured them so. All other entries keep their bands and sources."}}
	eachByItself = statement{"S-77", quiet, phrase{[]string{"limits"},
		"Each limit is looked at by itself, also where limits are ways to fulfil one rule, of which one counts: {limits}."}}
	aloneAsEntered = statement{"S-75", quiet, phrase{nil,
		"What to measure first: each input is looked at alone, all others as entered. The order hangs on the bands as entered: a band that was guessed too narrow moves its input down, and an open input has no band that anybody vouches for."}}
	betweenPoints = statement{"S-74", quiet, phrase{nil,
		"Between two points of a study, what is the same on both sides is taken to be the same. Something narrower than their distance can be missed."}}
)

// The head of a study.
const (
	movedLabel, shownLabel = "Moved", "Shown"
)

// Headings of studies.
const (
	placesHeading   = "Where figures equal limits, and where they turn"
	pointsHeading   = "Point by point"
	drawnHeading    = "Drawn"
	rowWorking      = "Working of row "
	constantHeading = "The same at every point"
)

const (
	noPlace      = "No figure crosses a limit or turns in this range."
	cannotHappen = "cannot be: a check refuses it"
	cannotShort  = "cannot be"
	noneShort    = "-"
	rowLabel     = "row"
	sideGreater  = "greater"
	sideSmaller  = "smaller"
	turnGreatest = "greatest"
	turnLeast    = "least"
	bandNote     = "Two figures in a cell: the least and the greatest over the bands of the other entries."
	bareNote     = "Figures by the model stand as they are; with limits they are compared after the allowance for its error is added."
	noneNote     = "-: nothing entered gives this figure at this point."
	cannotNote   = "cannot be: a check refuses these figures. No force that only pulls could stop the body so, or, for a part of the other entries or for all, nobody could stand where the layout then is."
)

// endWords say which figure over the bands of the other entries is meant.
var endWords = map[study.End]string{
	study.TheValue: "",
	study.TheLow:   " (at its least over the entries)",
	study.TheHigh:  " (at its greatest over the entries)",
	study.TheReach: " (the floor at its greatest over the entries)",
}

var (
	byDocument   = phrase{[]string{"document"}, "by \"{document}\""}
	limitNamed   = phrase{[]string{"limit", "sense", "figure"}, "limit {limit} ({sense} {figure})"}
	movedList    = phrase{[]string{"key", "figures"}, "{key}: {figures}"}
	movedOver    = phrase{[]string{"key", "low", "high", "count"}, "{key} from {low} to {high}, {count} figures"}
	insteadOf    = phrase{[]string{"moved", "text"}, "{moved}; in the job: {text}"}
	crossedAt    = phrase{[]string{"place", "what", "limit", "side"}, "{place}: {what} equals the {limit}. For {side} figures it is not beyond."}
	leapAt       = phrase{[]string{"place", "what", "limit", "side", "figure"}, "{place}: {what} leaps past the {limit}. The last figure that is not beyond is {figure}, and it lies on the side of the {side} ones."}
	checkSays    = phrase{[]string{"typed", "outcome"}, "With {typed} typed in, a check says: {outcome}."}
	onlyIfShape  = "This holds only if the stop were such a pulse, and decides no limit."
	turnsAt      = phrase{[]string{"place", "what", "kind", "figure"}, "{place}: {what} is {kind} between the ends, {figure}."}
	placeWith    = phrase{[]string{"first", "second"}, "{first}, {second}"}
	placeOne     = phrase{[]string{"key", "figure"}, "{key} {figure}"}
	alwaysBeyond = phrase{[]string{"what", "limit"}, "{what}: beyond the {limit} at every point."}
	neverBeyond  = phrase{[]string{"what", "limit"}, "{what}: not beyond the {limit} at any point."}
	neverFloor   = phrase{[]string{"what", "limit"}, "{what}: the floor does not reach the {limit} at any point, which clears nothing."}
	alwaysSplit  = phrase{[]string{"what", "limit"}, "{what}: the {limit} lies within the spread of the other entries at every point."}
	sweepTitle   = phrase{[]string{"what", "key", "job"}, "{what}, by {key}: {job}"}
	bothKeys     = phrase{[]string{"first", "second"}, "{first} and {second}"}
	limitDrawn   = phrase{[]string{"limit", "sense", "figure"}, "{limit}: {sense} {figure}"}
	limitOn      = phrase{[]string{"limit", "quantity"}, "{limit}, on {quantity}"}
	jobPoint     = phrase{[]string{"at", "figure"}, "this job: {at}, {figure}"}
	jobEnd       = phrase{[]string{"at"}, "this job: {at}"}
	fromTo       = phrase{[]string{"what", "first", "last"}, "{what}: from {first} at the low end to {last} at the high end."}
	floorDrawn   = phrase{[]string{"what"}, "{what} (floor)"}
	firstDrawn   = phrase{[]string{"what"}, "Drawn: {what}. The table has the others."}
	someRows     = phrase{[]string{"key"}, "Not all figures of {key} are drawn; the table has them all."}
	floorTitle   = phrase{[]string{"what"}, "{what}, not less than"}
	ceilingTitle = phrase{[]string{"what"}, "{what}, at most"}
)

// What stands below figures.
const (
	exampleStamp = "EXAMPLE VALUES"
	twoLines     = "Two lines of one kind: the least (fine) and the greatest over the bands of the other entries."
	floorNote    = "Not less than: a floor can show that a limit is exceeded, never that it is not."
	shapeNote    = "Of an assumed shape: holds only if the stop were such a pulse."
)

var meanNote = texts{
	"A mean is a floor, not what the body feels.",
	"A mean is a floor: the peak lies above it.",
	"A mean is a floor: the peak lies above it.",
}

// shortTitles are names of quantities for the ends of lines.
var shortTitles = map[arrest.Quantity]string{
	arrest.PeakForce:             "peak",
	arrest.MeanForceOverDistance: "mean, distance",
	arrest.MeanForceOverTime:     "mean, time",
	arrest.StoppingForce:         "mean stopping force",
}

// What is said of a solution.
const (
	askedLabel, rangeLabel = "Asked", "Looked for"
	answerHeading          = "Answer"
	typedInHeading         = "What a check says with that figure typed in"
	solveWorkingHeading    = "Working (in SI units, five digits)"
	governsLabel           = "Governs"
	endOfRange             = "the end of the range"
	noFits                 = "Nowhere in the range are all of these figures on the good side of their limits."
	noLimitsHere           = "No limit is entered in this job, so a check compares nothing."
	ownRange               = "as asked for"
	usualRange             = "nothing was said: up to ten times the entry"
	travelAsked            = "the free fall behind the travel an absorber was found torn by"
	solvedMark             = ": "
)

var (
	askedFor     = phrase{[]string{"key", "what", "figure"}, "which {key} brings {what} to {figure}"}
	askedLimit   = phrase{[]string{"key", "what", "limit"}, "which {key} brings {what} to the {limit}"}
	rangeText    = phrase{[]string{"low", "high", "why"}, "from {low} to {high} ({why})"}
	oneAnswer    = phrase{[]string{"key", "figure", "side"}, "{key} = {figure}, rounded to the side of the lower demand, that of {side} figures"}
	plainAnswer  = phrase{[]string{"key", "figure"}, "{key} = {figure}"}
	leapAnswer   = phrase{[]string{"key", "figure", "side"}, "{key} = {figure} is the last figure that is not beyond, and not a solution: what is asked for is leapt over there. Lower demand lies on the side of {side} figures"}
	severalIn    = phrase{[]string{"count"}, "{count} figures do so:"}
	allUnder     = phrase{[]string{"what", "goal", "least", "greatest"}, "None: {what} stays on the good side of {goal} over the whole range, from {least} to {greatest}."}
	allOver      = phrase{[]string{"what", "goal", "least", "greatest"}, "None: {what} is beyond {goal} over the whole range, from {least} to {greatest}."}
	neverThere   = phrase{[]string{"what", "goal", "least", "greatest"}, "None: {what} does not come to {goal} in the range; it goes from {least} to {greatest}."}
	notMoved     = phrase{[]string{"what", "key", "figure"}, "None: {what} does not move with {key}; it is {figure} throughout."}
	neverKnown   = phrase{[]string{"what"}, "None: nothing entered gives {what} anywhere in the range."}
	onlyJumped   = phrase{[]string{"goal"}, "None: {goal} is leapt over only."}
	fitsFrom     = phrase{[]string{"key", "low", "high"}, "Over all of these limits: {key} from {low} to {high}. There no figure that was followed is beyond its limit."}
	governsLow   = phrase{[]string{"limit", "figure"}, "at the low end, {figure}: {limit}"}
	governsHigh  = phrase{[]string{"limit", "figure"}, "at the high end, {figure}: {limit}"}
	thePair      = phrase{[]string{"goal"}, "{goal}, the stricter figure of a printed pair"}
	floorFollows = phrase{[]string{"what"}, "What was followed is a floor: {what}. It clears nothing."}
	turnIn       = phrase{[]string{"key", "at", "what", "kind", "figure"}, "Between the ends {what} turns: it is {kind} at {key} {at}, {figure}."}
	knownIn      = phrase{[]string{"spans"}, "The entries can happen, and the figure is known, only for {spans}."}
	followed     = phrase{[]string{"what", "end"}, "followed: {what}{end}"}
	solvedAt     = phrase{[]string{"key", "figure", "left"}, "{key} = {figure}; put back, it misses the goal by a share of {left}"}
	withShare    = phrase{[]string{"what", "share"}, "{what}, with the allowance of {share}"}
	workedAt     = phrase{[]string{"key", "figure"}, "With {key} = {figure}:"}
	rowSays      = phrase{[]string{"quantity", "limit", "outcome"}, "{quantity}, {limit}: {outcome}"}
	foundTravel  = phrase{[]string{"travel", "force"}, "the absorber was found torn by {travel}, and holds {force}"}
	foundFall    = phrase{[]string{"fall"}, "free fall {fall}, if nothing but the absorber gave way; deeper if anything else did"}
)

// What is said of an envelope.
const (
	zonesHeading  = "What the words mean"
	stillHeading  = "Limits that come to the same all over"
	effortHeading = "How finely it was looked at"
	thisJob       = "this job"
)

// zoneWords are what regions are called; zoneMeaning says what that means.
var (
	zoneWords = map[study.Zone]string{
		study.Impossible:  "cannot happen",
		study.NotCompared: "not compared",
		study.Exceeded:    "exceeded",
		study.Undecided:   "undecided",
		study.Capped:      "undecided by a cap",
		study.Within:      "within as entered",
	}
	zoneMeaning = map[study.Zone]string{
		study.Impossible:  "a check refuses it: no force that only pulls could stop the body so, or, for a part of the other entries or for all, nobody could stand where the layout then is.",
		study.NotCompared: "no figure, or a condition of the limit is not fulfilled.",
		study.Exceeded:    "even the most favourable of what the other entries allow is beyond the limit.",
		study.Undecided:   "the figures leave it open.",
		study.Capped:      "the figures are not beyond, but the row is never within as long as a cap holds: another input is open, the limit was not checked, the values are examples, and the like.",
		study.Within:      "with these two measured so, the least favourable of what the other entries allow is not beyond the limit, and no cap holds.",
	}
)

var (
	overRange     = phrase{[]string{"key", "low", "high"}, "{key} from {low} to {high}"}
	oneZone       = phrase{[]string{"quantity", "limit", "zone"}, "{quantity}, {limit}: {zone}."}
	effort        = phrase{[]string{"made", "points"}, "{made} checks were made for {points} points: boundaries were followed at the full resolution, and the edges in the tables worked out to the last figure. A region that meets none of 33 lines each way can be missed."}
	throughout    = phrase{[]string{"zone"}, "{zone} throughout"}
	upToHere      = phrase{[]string{"zone", "at"}, "{zone} up to {at}"}
	fromHere      = phrase{[]string{"zone", "from", "to"}, "{zone} from there to {to}"}
	beyondHere    = phrase{[]string{"zone", "at"}, "{zone} beyond"}
	envelopeTitle = phrase{[]string{"quantity", "limit", "job"}, "{quantity}, {limit}: {job}"}
	asIfMeasured  = phrase{[]string{"across", "up"}, "If {across} and {up} were measured so. Nobody has measured them."}
	regionsAre    = phrase{[]string{"zones"}, "Regions of the figure: {zones}."}
)

// What is said of what to measure first.
const (
	measureHeading  = "What to measure first"
	measureAsked    = "which inputs move each row, and how closely they must be measured"
	measureIntro    = "Row by row: open inputs first, then those that move the demand most while all others are as entered. A tolerance is that of one input alone, by the figures: a cap that stays keeps the row from being within whatever is measured."
	pathTakesLonger = "Not worked out on this sheet: each figure takes a run of the model. Call: arrestcheck sensitivity JOB."
	nothingMoves    = "No row rests on an entry that is open or has a band: nothing moves the rows."
	movesNot        = "does not move it"
	noHelp          = "no tolerance of it alone does"
	noBandWritten   = "nobody knows: no tolerance is written"
	openMark        = "open"
	aloneNote       = "Each input alone over its band as entered, all others at their least favourable."
)

// thenWords say what a row comes to by its figures.
var thenWords = map[study.Zone]string{
	study.Impossible:  zoneWords[study.Impossible],
	study.NotCompared: zoneWords[study.NotCompared],
	study.Exceeded:    zoneWords[study.Exceeded],
	study.Undecided:   zoneWords[study.Undecided],
	study.Capped:      "not beyond by its figures, and a cap stays",
	study.Within:      zoneWords[study.Within],
}

var rankHead = []string{"input", "moves the demand", "to be decided, MEASURED to within"}

var (
	rankedRow     = phrase{[]string{"row", "quantity", "limit", "zone"}, "Row {row}, {quantity}, {limit}: {zone} as entered."}
	rankedBy      = phrase{[]string{"figure"}, "The figure looked at: {figure}."}
	centresSettle = phrase{[]string{"zone"}, "With every input measured to ± 0 at its middle figure the row would be {zone}."}
	centresDoNot  = phrase{[]string{"zone"}, "With every input measured to ± 0 at its middle figure it would still be {zone}: measuring alone does not settle it."}
	movesBy       = phrase{[]string{"spread"}, "by {spread}"}
	middleOf      = phrase{[]string{"figure"}, "{figure}, the middle of the range"}
	mustMeasure   = phrase{[]string{"by", "about", "zone"}, "± {by} about {about}; then {zone}"}
	mayBeOff      = phrase{[]string{"by", "about"}, "decided, and stays so within ± {by} about {about}"}
	anyTolerance  = phrase{[]string{"zone"}, "any tolerance of it: {zone}"}
	barsTitle     = phrase{[]string{"quantity", "limit", "job"}, "What moves {quantity}, {limit}: {job}"}
	barsDesc      = phrase{[]string{"key"}, "The first bar is {key}; each bar goes from the least to the greatest demand."}
	asEnteredAt   = phrase{[]string{"figure"}, "as entered, at its least favourable {figure}"}
)

// rowInShort is a row of limits on a terminal where a job is watched.
var rowInShort = phrase{[]string{"outcome", "quantity", "demand", "limit", "figure"}, "{outcome}: {quantity}, {demand}; {limit}: {figure}"}
