package reportgen

import "arrestcheck/arrest"

// This file holds what reads otherwise on a sheet about a tool or a moving load
// than on one about a person. What it says is under the same rules as
// wording.go.

// withoutPersons holds, by the number of a statement that speaks of persons,
// the one that stands in its place where no person is part of the job.
var withoutPersons = map[string]statement{
	whoDecides.number: {"S-45", quiet, phrase{nil,
		"This sheet is arithmetic on the figures that were entered. It does not decide whether anything may be moved, used, tied up or stood under. That is for the competent or qualified person in charge, for a licensed engineer where the law asks for one, and for the local code."}},
	notLookedAt.number: {"S-46", quiet, phrase{nil,
		"Much that can do harm was not looked at: the list under \"Not looked at\" names it. Silence about a hazard does not mean that it is absent."}},
	notThisStop.number: {"S-47", quiet, phrase{nil,
		"A label, an assumed shape, a model or a test is not this stop. Another mass, another speed, or parts in another state stop otherwise."}},
	meansAreNotPeaks.number: {"S-48", quiet, phrase{nil,
		"Mean forces are floors: the peak lies above them. Never compare a mean with a limit that is written for a peak."}},
	nothingAbsorbs.number: {"S-49", loud, phrase{[]string{"peak"},
		"Nothing in the path absorbs: the peak of the model goes up to {peak}. Such a path holds back, it does not arrest a fall."}},
}

// layoutOnly says for what positions and paths the figures hold.
var layoutOnly = [subjects][]statement{
	aPerson: {hanging, thisLayoutOnly, anchorAndLine},
	aTool: {{"S-50", quiet, phrase{nil,
		"The figures hold for a fall straight below the point that the tool is tied to. Swing, edges, the tether's own fixings, that point, and whatever is below were not worked out."}}},
	aLoad: {{"S-51", quiet, phrase{nil,
		"The figures hold for one body on the path and in the directions entered. Swinging back, tipping, turning, what comes loose, and whatever the force goes on into were not worked out."}}},
}

// holdsFor is the datum of the sheet.
var holdsFor = texts{
	aPerson: "The attachment point on the harness. Distances are vertical; the free fall ends and the stop begins with the first pull.",
	aTool:   "The point at which the tool is tied. Distances are vertical; the free fall ends and the stop begins with the first pull.",
	aLoad:   "The middle of the mass of the load. Components run along the axes as entered; a distance runs along a straight path; directions are in degrees from +x towards +y.",
}

var motionHeading = texts{"The fall and the stop", "The fall and the stop", "The motion and the stop"}

var forgottenHeading = texts{
	"Body weight forgotten: wrong sums, shown so that they are recognised",
	"Weight forgotten: wrong sums, shown so that they are recognised",
	"Weight forgotten: wrong sums, shown so that they are recognised",
}

var floorRemark = texts{"floor, not what the body feels", "floor, not the peak", "floor, not the peak"}

var stopMeasureAgain = texts{
	"If anything on the site differs from this sheet, or changes, stop. Measure again, enter it, and make a new sheet before anyone goes on.",
	"If anything on the site differs from this sheet, or changes, stop. Measure again, enter it, and make a new sheet before the work goes on.",
	"If anything on the site differs from this sheet, or changes, stop. Measure again, enter it, and make a new sheet before the load is moved.",
}

// titlesWithoutPersons holds the quantities whose usual title has a person in mind.
var titlesWithoutPersons = map[arrest.Quantity]string{
	arrest.PeakForce: "peak force",
}

// validation says what has been compared with measurements.
var validation = texts{
	"Does it match measured falls? Nobody has compared the figures that follow from the entries with measured falls so far. None of them is validated.",
	"Does it match measured falls? Nobody has compared the figures that follow from the entries with measured falls so far. None of them is validated.",
	"Does it match measured stops? Nobody has compared the figures that follow from the entries with measured stops so far. None of them is validated.",
}

// wrongBy says by how much a sum without the weight is wrong.
var wrongBy = [subjects]phrase{
	{[]string{"weight", "share"}, "The body weight W is left out: too low by exactly {weight}, {share} of the right figure."},
	{[]string{"weight", "share"}, "The weight W is left out: too low by exactly {weight}, {share} of the right figure."},
	{[]string{"weight", "share"}, "The weight W is left out: too low by exactly {weight}, {share} of the right figure."},
}

// standingAssumptions are made on every sheet.
var standingAssumptions = lists{
	aPerson: {
		"The drag of the air is left out; it makes the speed too high, and the more the deeper the fall.",
		"The body falls straight down, does not swing and hits nothing on the way.",
		"The body moves as one lump; limbs, head and what hangs on the person do not lag behind.",
		"The connector pulls and never pushes, and lets the body come to rest once, at the end of the stop.",
		"The stopping distance is the whole vertical travel of the attachment point from the first pull to rest: absorber, stretch of every part, slip and harness.",
		"The stopping time runs from the first pull to the first rest, without hanging or bounce.",
		"The free fall contains every slack, slide and payout before the first pull.",
		"The parts are whole, dry, put together as their documents ask, and not loaded by a fall before.",
		"The limits entered are the ones that bind on this site, in their current text.",
	},
	aTool: {
		"The drag of the air is left out; it makes the speed too high, and the more the deeper the fall.",
		"The tool falls straight down, does not swing and hits nothing on the way.",
		"The tool is one piece; nothing falls out of it or lags behind.",
		"The tether pulls and never pushes, and lets the tool come to rest once, at the end of the stop.",
		"The stopping distance is the whole vertical travel of the tool from the first pull to rest, every stretch and slip included.",
		"The stopping time runs from the first pull to the first rest, without hanging or bounce.",
		"The free fall contains every slack, slide and payout before the first pull.",
		"The parts are whole, dry, put together as their documents ask, and not loaded by a fall before.",
		"The limits entered are the ones that bind on this site, in their current text.",
	},
	aLoad: {
		"The load moves as one body: it does not turn, tip or swing within itself, and nothing comes loose from it.",
		"The mass is the whole of what moves: the load, what carries it, and what goes with it.",
		"Rolling, friction and the drag of the air are left out, unless they are part of the driving force entered.",
		"The driving force, where one is entered, stays the same until the end of the stop.",
		"Velocity before and after belong to the beginning and the end of the time or distance entered.",
		"The distance runs along one straight path, and the load does not spring back within the time.",
		"Gravity acts as the entries say; on a level path it does no work.",
		"The parts that stop the load are whole, in place and not used up by a stop before.",
		"The limits entered are the ones that bind on this site, in their current text.",
	},
}

// notChecked is what no sheet of this kind looks at (S-03, S-46).
var notChecked = lists{
	aPerson: {
		"whether the figures and limits entered are right, current and complete",
		"clearance: what a falling person may strike below or beside",
		"swing, side offset, and obstacles in its way",
		"edges, cutting, chafing, heat, chemicals, electricity",
		"anchors, structure, lines, bridles, redirects and their fixings",
		"connectors, knots, gates, loading over a corner, parts that do not go together",
		"the harness: fit, attachment point, how the person hangs after the stop",
		"age, wear, damage, storage, inspection and earlier falls of the equipment",
		"wet, ice, cold, wind and dirt",
		"several persons falling together or one after another",
		"injury, health, and what a body can bear",
		"hanging after the fall, rescue, first aid",
		"training, supervision, other ways to do the work without a fall",
		"a second peak after the first stop, where no connector path is entered",
	},
	aTool: {
		"whether the figures and limits entered are right, current and complete",
		"what the tool strikes below or beside, and who or what is there",
		"swing on the tether, side offset, and obstacles in its way",
		"edges, cutting, chafing, heat, chemicals, electricity",
		"the point the tool is tied to, and whatever carries that point",
		"the way the tether is fixed to the tool: hooks, gates, loops, knots, tape",
		"parts of the tool that come off, batteries, blades, contents",
		"a load on whoever the tool may be tied to",
		"age, wear, damage, storage, inspection and earlier falls of the equipment",
		"wet, ice, cold, wind and dirt",
		"other ways to do the work without a fall",
		"a second peak after the first stop, where no connector path is entered",
	},
	aLoad: {
		"whether the figures and limits entered are right, current and complete",
		"who or what stands in the way of the load, or beside it",
		"what the force goes on into: buffer, rail, structure, anchors, ground, and their fixings",
		"tipping, turning, swinging, sliding and shifting of the load",
		"ropes, slings, hooks, brakes, drives and controls",
		"springing back, a second blow, and what follows after the stop",
		"how the force rises and falls in the time: only its mean was worked out",
		"age, wear, damage, inspection and earlier stops of the equipment",
		"wet, ice, cold, wind and dirt",
		"other ways to do the work without such a stop",
	},
}

// What stands about a moving load on page 1.
const (
	vectorHeading     = "The stop by components"
	routesHeading     = "The mean stopping force by two routes"
	notFromEntries    = "does not follow from the entries"
	anyDirection      = "open: a component may have either sign"
	inSpace           = "in space: the components give it"
	oneRouteOnly      = "only one route can be gone"
	magnitudeName     = "magnitude"
	directionName     = "direction"
	timeRouteName     = "over the time"
	distanceRouteName = "over the distance"
	ratioName         = "ratio of the two"
)

var (
	axisNames    = [3]string{"along x", "along y", "along z"}
	vectorHead   = []string{"", "impulse of all forces", "mean stopping force"}
	straightOnly = phrase{[]string{"axes"}, "only on a straight path along one axis; {axes} components are entered"}
)
