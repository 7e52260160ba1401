package reportgen

import (
	"arrestcheck/arrest"
	"arrestcheck/limits"
)

// This file holds what is said about one row and what would settle it. It is
// under the same rules as wording.go.

const (
	explainHeading     = "What would settle this row, the most important first"
	explainOpenHeading = "Its open inputs"
	explainUsedHeading = "The figures it rests on, the one it goes by first"
	explainWhoHeading  = "Who decides"

	explainLimitLabel, explainDemandLabel, explainOutcomeLabel = "Limit", "Figure", "Outcome"
	explainGroupLabel                                          = "Group"

	besideStands     = "Beside that stands:"
	untestedWanted   = "Enter what the condition asks about, settled."
	peakOfLoadWanted = "Nothing that can be entered settles it: of a moving load the sheet works out means, and a floor of the peak. Have the peak measured, or the stop worked out by a qualified person."
	settleInFile     = "enter it in the file, as its document states it: what is set on the command line has no source"
	toleranceToo     = ", and with a tolerance (a range, or a ± that may be 0)"
)

var explainOpenHead = []string{"input", "as written", "state, and what settles it"}

var (
	explainLimit     = phrase{[]string{"limit", "quantity", "bound", "clause"}, "{limit}: {quantity} {bound}, by \"{clause}\""}
	explainReason    = phrase{[]string{"reason", "settling"}, "{reason}. {settling}"}
	settleBySource   = phrase{[]string{"sources"}, "enter it from a source that settles it ({sources})"}
	itselfWanted     = phrase{[]string{"evidence A"}, "Find out which of the figures {evidence A} is wrong for this job, and mend the entry behind it. None is left out by the program."}
	settleInFileFrom = phrase{[]string{"sources"}, "enter it in the file, from a source that settles it ({sources})"}
	settleKeepSource = phrase{[]string{"source"}, "keep its source ({source})"}
)

// explainLead says what the list below it is.
var explainLead = map[limits.Outcome]string{
	limits.Exceeded:    "Nothing that is missing would help this row: even the most favourable figure that the entries allow is beyond the limit. Change the system, the fall or the load, or show by measuring that an entry is wrong.",
	limits.Undecided:   "Each of these keeps the row from being settled by itself. All of them have to go before it can come out one way or the other:",
	limits.NotCompared: "The limit was not compared. Before it can be:",
	limits.Within:      "Nothing that was entered keeps this row open. It stays so only while every input it rests on stays as it is.",
}

// explainLast is the last word on every row.
var explainLast = texts{
	"A settled row is still arithmetic on what was entered. Whether anyone may work there is decided by the competent or qualified person in charge, by a licensed engineer where the law asks for one, and by the local code.",
	"A settled row is still arithmetic on what was entered. Whether the tool may be used so is decided by the competent or qualified person in charge, by a licensed engineer where the law asks for one, and by the local code.",
	"A settled row is still arithmetic on what was entered. Whether the load may be moved so is decided by the competent or qualified person in charge, by a licensed engineer where the law asks for one, and by the local code.",
}

// byImportance is the order in which the reasons of a row are to be looked at:
// what is wrong, what is missing, what is not settled, what is about the limit.
var byImportance = []limits.ReasonID{
	limits.DeviceExhausted, limits.BodyStrikes, limits.EdgeContact, limits.BeyondModel, limits.Contradicted, limits.AlsoBeyond, limits.PlaceUnknown,
	limits.ConditionUnfulfilled, limits.ConditionStraddles, limits.OutsideRating, limits.SeveralPersons,
	limits.NotComputed, limits.OnlyFloor, limits.OnlyCeiling, limits.Straddles, limits.FloorReaches,
	limits.NoAllowance, limits.OpenInput, limits.AssumedShape, limits.PairDiffers,
	limits.IsProductTest, limits.Superseded, limits.NotChecked, limits.ExampleValues,
}

// settledWhen says what would take a reason away. Where a phrase has an
// argument that the reason has not, it is what to enter.
var settledWhen = map[limits.ReasonID]phrase{
	limits.DeviceExhausted:      {nil, "Change the system: less free fall, less mass, or a device with more travel or a greater force within its document. A row is never within while a device is used up anywhere in the entries; narrow them by measuring if it is used up only at their end."},
	limits.BodyStrikes:          {nil, "Bring the obstacle out of the way of fall and swing, bring the anchor nearer to above the place of work, or shorten the connector. Narrow the entries by measuring if the body comes to it only at their end."},
	limits.EdgeContact:          {nil, "Not by a figure: move the anchor or shorten the connector, so that it comes to no edge. A document that rates a part for the edge is named on the sheet and leaves the row open all the same, as what the edge does to the forces is not worked out."},
	limits.PlaceUnknown:         {nil, "Measure anchor, length and positions more closely, so that over all of the entries the connector either ends before the edge, however low the D-ring is carried, or lets a body over it; or choose an anchor from which the swing stays in a plane."},
	limits.BeyondModel:          {nil, "Enter loading points up to the forces that occur, or a part that gives way, so that the model stays within what is known."},
	limits.Contradicted:         {[]string{"evidence A", "evidence B"}, "Find out which is wrong, the figure {evidence A} or the one {evidence B}, and mend the entry behind it. Neither is left out by the program."},
	limits.AlsoBeyond:           {nil, "Do not look for a way round the condition: change the system first."},
	limits.ConditionUnfulfilled: {nil, "The limit does not speak of this case. Enter the limit that does, or bring the case under the condition."},
	limits.ConditionStraddles:   {nil, "Measure more closely, so that all of the entries lie on one side of the condition, or enter the limit that holds on the other side too."},
	limits.OutsideRating:        {[]string{"document"}, "Bring total mass and free fall within the conditions of \"{document}\" over the whole of the entries, or enter a document that covers this case."},
	limits.SeveralPersons:       {nil, "Not by an entry: a system with several persons on it is for a qualified person to work out."},
	limits.NotComputed:          {[]string{"entries"}, "{entries}."},
	limits.OnlyFloor:            {[]string{"entries"}, "A floor never settles this. {entries}."},
	limits.OnlyCeiling:          {[]string{"entries"}, "A ceiling never settles this. {entries}."},
	limits.Straddles:            {nil, "Narrow the inputs behind the figure by measuring, the widest first; or change the system so that the whole range lies on one side."},
	limits.FloorReaches:         {nil, "Measure stopping distance and time more closely: part of what is entered has a floor beyond the limit."},
	limits.NoAllowance:          {nil, "Enter model.allowance, your own figure for the error of the model, with its source: from drop tests of these very parts, say. There is none built in; the table below shows how far off such models have been."},
	limits.OpenInput:            {[]string{"how"}, "To settle it {how}."},
	limits.AssumedShape:         {[]string{"entries"}, "No shape settles a row. {entries}."},
	limits.PairDiffers:          {nil, "Enter the figure in the unit in which the limit binds, or take the stricter of the two as the limit."},
	limits.IsProductTest:        {nil, "Enter the limit that binds on the site; a figure of a product test never does."},
	limits.Superseded:           {nil, "Enter the limit that is in force, from its current text."},
	limits.NotChecked:           {nil, "Hold the limit against its current text, and write when that was done as checked_on."},
	limits.ExampleValues:        {nil, "Not by any figure: replace every example by what holds on the site, then take out the word example."},
}

// waysTo says what would give a quantity an end on the side that a limit needs.
// What can be measured is measured; what a document says is copied from it.
var waysTo = map[arrest.Quantity]ways{
	arrest.PeakForce:               {rating: peakRating, path: pathWay},
	arrest.ForceOverWeight:         {rating: peakRating, path: pathWay},
	arrest.PeakDeceleration:        {rating: peakRating, path: pathWay},
	arrest.MeanAboveLevel:          {rating: "enter from its document a rating with mean_force_at_most whose conditions hold"},
	arrest.OnsetRate:               {path: pathWay},
	arrest.MeanForceOverDistance:   {other: measureDistance},
	arrest.MeanForceOverTime:       {other: "measure the stopping time, and enter it with its tolerance"},
	arrest.StoppingDistance:        {other: measureDistance, path: pathWay},
	arrest.DecelerationDistance:    {other: measureDistance, rating: travelRating, path: pathWay},
	arrest.AbsorberTravel:          {rating: travelRating, path: pathWay},
	arrest.AnchorForce:             {path: pathWay},
	arrest.AnchorStrengthPerPerson: {other: anchorWay},
	arrest.StrengthOverArrestForce: {other: anchorWay},
	arrest.ClearanceLeft:           {other: clearanceWay},
	arrest.ClearanceNeeded:         {other: clearanceWay},
	arrest.TotalFallDistance:       {other: clearanceWay},
	arrest.OffsetAngle:             {other: layoutWay},
	arrest.SwingAngle:              {other: layoutWay},
	arrest.SwingDrop:               {other: layoutWay},
	arrest.RestraintReach:          {other: layoutWay},
	arrest.SwingSpeed:              {other: swingWay},
	arrest.SpeedAtObstacle:         {other: swingWay},
	arrest.FallFactor:              {other: "enter the connector path with the length of its parts"},
	arrest.StoppingForce:           {other: measureLoad},
	arrest.MeanDeceleration:        {other: measureLoad},
}

// The ways to an entry.
const (
	measureDistance = "measure the stopping distance in a stop of these very parts, and enter it with its tolerance"
	measureLoad     = "measure the time, or the distance on a straight path, and enter it with its tolerance"
	peakRating      = "enter from its document a rating with peak_force_at_most whose conditions hold"
	travelRating    = "enter from its document a rating with its travel"
	pathWay         = "enter the connector path with an allowance of your own"
	anchorWay       = "enter the anchor with a known rating; or name under [[elsewhere]] the document that handles it"
	layoutWay       = "enter the layout: anchor, edge, D-ring, connector and positions; or name under [[elsewhere]] the document that handles it"
	swingWay        = "enter the layout and the connector path, with an allowance of your own; or name under [[elsewhere]] the document that handles it"
	clearanceWay    = "enter the layout, what lies below, and the clearance item by item; or name under [[elsewhere]] the document that handles it"
	otherWay        = "enter what this figure is worked out from; or name under [[elsewhere]] the document that handles it"
	orWord          = ", or "
	nothingMissing  = "nothing of this kind is missing: mend what is entered, by the other lines of this list"
)
