package reportgen

import (
	"arrestcheck/arrest"
	"arrestcheck/arrest/connector"
)

// This file holds what is said about the connector path. It is under the same
// rules as wording.go.

const (
	pathHeading    = "The connector path, worked out in time"
	pathOrder      = "From the anchor to the body, one behind the other: the same force in every part, their travels add."
	lengthWord     = "length"
	travelWord     = "travel at most"
	activationWord = "activation force"
	riseWord       = "force rises over"
	lockingWord    = "travel before locking, part of the free fall:"
	heldForceWord  = "held force"
	lifelineWords  = "its stretch is left out of the deceleration distance"
	rigidWords     = "does not give way"
	notReached     = "not reached"

	exhaustedWord = "EXHAUSTED"
	endsWord      = "how it ends"
	beyondWord    = "beyond the last loading point"
	peakWord      = "peak force, the same at both ends"
	peakTimeWord  = "time from the first pull to the peak"
	restTimeWord  = "time from the first pull to rest"
	reboundWord   = "second peak, after the rebound"
	noSecondPeak  = "none: no second pull was followed"

	ledgerRemark    = "What is left over measures the arithmetic. It says nothing about the model: whether parts and body behave as entered."
	momentumHead    = "account of the momentum"
	energyHead      = "account of the energy"
	partsEnergyHead = "account of the energy of the parts"
	leftOver        = "= left over"
	lessThan        = "less than"
	weightEntry     = "+ weight, over the time"
	pullEntry       = "- pull of the path, over the time"
	motionEntry     = "- gain of momentum of the body"
	beforeEntry     = "+ energy of motion at the beginning"
	fallenEntry     = "+ work of the weight"
	afterEntry      = "- energy of motion at the end"
	workEntry       = "- work done on the parts"
	viscousEntry    = "- work done on dashpots"
	workOnParts     = "+ work done on the parts"
	storedEntry     = "- energy the parts still give back"
	lostEntry       = "- energy the parts do not give back"
)

var (
	partsHead  = []string{"no.", "part", "kind", "as entered"}
	travelHead = []string{"travel by part", "at the peak", "at the first rest", "that stays"}
)

var (
	runHeading     = phrase{[]string{"corner"}, "The arrest in time, {corner}"}
	droppedCase    = phrase{[]string{"mass", "fall"}, "For a total mass of {mass} and a free fall of {fall}."}
	thrownCase     = phrase{[]string{"mass", "fall", "speed"}, "For a total mass of {mass} and a free fall of {fall} that begins with {speed}."}
	exhaustedRun   = phrase{[]string{"parts", "energy"}, "the travel of {parts} is used up, with {energy} of motion left"}
	secondPeak     = phrase{[]string{"peak", "time"}, "{peak}, {time} after the first pull"}
	pointWords     = phrase{[]string{"extension", "force"}, "loading point: {extension}, {force}"}
	partDocument   = phrase{[]string{"document"}, "document: \"{document}\""}
	unloadingWords = phrase{[]string{"stiffness"}, "unloads with {stiffness}"}
)

// cornerWords says at which of the entries a run was made.
var cornerWords = map[arrest.Corner]string{
	arrest.AtWritten: "as written",
	arrest.AtLow:     "at the least peak",
	arrest.AtHigh:    "at the greatest peak",
	arrest.AtLongest: "at the longest stop",
}

var basisWords = map[arrest.Basis]string{
	arrest.ByStiffness:     "stiffness",
	arrest.ByModulus:       "modulus",
	arrest.ByImpactForce:   "rated impact force",
	arrest.ByStaticStretch: "static stretch",
}

// forceWords is what the held force of a part is called by the trade.
var forceWords = map[connector.Kind]string{
	connector.Absorber:    "deployment force",
	connector.Retractable: "braking force",
	connector.RopeGrab:    "slip force",
}

// statusWords says how a run ends.
var statusWords = map[connector.Status]string{
	connector.Stopped:  "the body comes to rest",
	connector.Tending:  "the body creeps to where it hangs, without a time of rest",
	connector.TimedOut: "not at rest when the time worked out was up",
	connector.Endless:  "nothing stops the body",
	connector.Rigid:    "a blow on something rigid",
}

// Assumptions that the model makes.
const pathAssumption = "The parts of the connector path stand in the order entered, have no mass, behave as entered in a fast pull, and nothing pulls to one side or over an edge."

var allowanceAssumption = phrase{[]string{"allowance"}, "The model is off by no more than the allowance entered, {allowance}, for these very parts and this fall."}

// What is said about the model beside published drops.
const (
	comparedHeading = "The model beside published drops"
	comparedText    = "Lanyards with a rigid mass on a fixed anchor; one elastic part (M-10), whose modulus was taken from the other drops of the same type. A minus stands where the peak of the model is below the measured one, the harmful side. The last column is arithmetic on the worst drop of a type, no advice: another lanyard, a path of several parts, or a body can be further off."
	stiffensWords   = "stiffens in hard falls"
)

var (
	comparedHead    = []string{"type of lanyard", "drops", "model's peak off the measured one", "allowance it would have taken"}
	signedRange     = phrase{[]string{"low", "high"}, "{low} to {high}"}
	comparedRopes   = phrase{[]string{"ropes", "least", "most", "middle"}, "Ropes by their rated impact force (M-11): over the catalogues of {ropes} ropes the stretch of the model is {least} to {most} times the dynamic elongation, {middle} times in the middle. It errs high in travel."}
	validationModel = phrase{[]string{"tests", "types", "low", "high"}, "Modelled figures: the simplest model of this kind was held against {tests} published drops of {types} types of lanyard, a rigid mass on a fixed anchor; its peaks lay {low} to {high} off the measured ones. That promises nothing for other parts, other falls, or for a body in place of a mass."}
)
