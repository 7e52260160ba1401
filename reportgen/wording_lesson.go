package reportgen

// This file holds what a lesson says. It is under the same rules as wording.go.

var lessonOnly = statement{"S-76", loud, phrase{nil,
	"This is a lesson. Its fall, stops and shapes were chosen to teach, and the sums marked WRONG are wrong on purpose. No figure in it is one of your system."}}

const (
	lessonTitle    = "One fall, stopped in several ways"
	lessonHowFast  = "How fast, and with how much energy"
	lessonMean     = "The mean force over the stopping distance"
	lessonBeside   = "The same fall, stop beside stop"
	lessonShapes   = "A mean is not a peak: one stop, four shapes"
	lessonDrawn    = "The four shapes, drawn"
	lessonPeaks    = "Every stop in every shape: the peaks"
	lessonEnd      = "What to take home"
	lessonMass     = "moving mass"
	lessonFall     = "free fall"
	lessonSpeed    = "speed at first"
	lessonGravity  = "gravity"
	lessonOwn      = "The fall:"
	lessonStops    = "The stops, each by the travel of the D-ring from the first pull to rest:"
	lessonNever    = "Never drop a person to find out."
	lessonEnergy   = "The energy grows with the height, the speed with its square root. The body weight goes on pulling during the stop: it belongs into every sum."
	lessonMeanWhy  = "The stop takes the energy out of the body, E = m*v^2/2, over the distance d, and carries the weight W all the while:"
	lessonFloor    = "These are means. No stop over such a distance has a lower peak; a real one has a higher, and often a far higher one."
	lessonPeaksWhy = "If the stop had the shape, its peak would be (force on the body):"
	askTwice       = "Twice the free fall: what become v and E?"
	askSketch      = "Sketch all four: the time to the right, the force upwards. What do the areas under them have in common?"
	askWhich       = "Which would you rather take, and what do you know of your own stop?"
	askOff         = "By how much is the wrong sum off, and to which side?"
	whichAnswer    = "The longest and most even one. Of your own stop you know what was measured, or what a document promises while its conditions hold. A label, a guess or a test mass is not this stop."
	barsOf         = "Mean force:"
	shapeHead      = "shape of the force"
	overHead       = "peak over mean"
	shapeTimeHead  = "time of the stop"
	meanTimeHead   = "mean over the time"
	stopHead       = "stop"
	distanceHead   = "distance"
	meanHead       = "mean force"
	timesHead      = "times the weight"
	brakeHead      = "net, in g"
	tookHead       = "time if even"
	peakHead       = "peak"
	timeAxis       = "time from the first pull"
	forceAxis      = "force on the body"
	weightLevel    = "weight"
	wrongLabel     = "WRONG"
	rightLabel     = "Right"
	gravityFactor  = "32.17 lb*ft/s2 per lbf"

	speedFromRest  = "v = sqrt(2*g*h)"
	speedFromSpeed = "v = sqrt(u^2 + 2*g*h)"
	meanFormula    = "F = W + m*v^2/(2*d)"

	lessonMeanShort = "Ten centimetres more or less hardly change a long stop. They decide a short one."
)

// lessonAsk stands on the first screen, without and with answers.
var lessonAsk = map[bool]string{
	false: "Work out what is left blank. The answers: the same call with --answers.",
	true:  "With answers. The questions: the same call without --answers.",
}

var (
	lessonFrom      = phrase{[]string{"job"}, "The fall, at the greatest mass and the deepest fall entered in the job \"{job}\":"}
	twoFactors      = phrase{[]string{"m", "g"}, "({m})*({g})"}
	fallFigures     = phrase{[]string{"g", "h"}, "2*({g})*({h})"}
	energyFigures   = phrase{[]string{"m", "v"}, "({m})*({v})^2/2"}
	brakeFigures    = phrase{[]string{"m", "v", "d"}, "({m})*({v})^2/(2*({d}))"}
	meanFigures     = phrase{[]string{"W", "m", "v", "d"}, "({W}) + ({m})*({v})^2/(2*({d}))"}
	meanTimeFigures = phrase{[]string{"W", "m", "v", "t"}, "({W}) + ({m})*({v})/({t})"}
	asFast          = phrase{[]string{"speed"}, "That is {speed} when the stop begins."}
	howMuch         = phrase{[]string{"first", "times", "last"}, "The stop \"{first}\" asks for {times} times the mean force of the stop \"{last}\"."}
	ifPulse         = phrase{[]string{"shape"}, "if {shape}"}
	sameMean        = phrase{[]string{"stop", "distance", "mean"}, "The stop \"{stop}\", {distance}, in four shapes. The mean over the distance is the same in each, {mean}; the peak is not."}
	pulsesTitle     = phrase{[]string{"distance"}, "Four ways to stop the same fall over {distance}"}
	tooLowBy        = phrase{[]string{"off", "share", "why"}, "Too low by {off}, {share} of the right sum: {why}."}
	tooHighBy       = phrase{[]string{"factor"}, "Too high by the factor {factor}: standard gravity in ft/s2."}
	withWeight      = phrase{[]string{"weight", "mean"}, "To the right figure the weight is added, {weight}: the mean is {mean}."}
	freeFallIs      = phrase{[]string{"fall"}, "with a free fall of {fall}"}
	screenOf        = phrase{[]string{"number", "of"}, "Lesson, screen {number} of {of}"}
	wrongFeetWhy    = phrase{[]string{"lanyard", "ring", "fall"}, "A lanyard of {lanyard}, hooked at the height of the D-ring, lets the body fall its own length. Hooked at the feet, {ring} below the D-ring, the body first falls to the hook and then the length of the lanyard below it: {fall}. (D-ring above the feet: common practice 1.1 to 1.7 m.)"}
)

const (
	wrongWeight    = "WRONG: the body weight forgotten"
	wrongWeightWhy = "The energy is right, and the sum is not: during the stop the weight goes on pulling downwards, and the connector must carry it as well."
	wrongWeightBy  = "the body weight"
	wrongPeak      = "WRONG: the mean read as the peak"
	wrongPeakWhy   = "A limit for the force on the body is one for the peak. If the force rises evenly to the end of the stop, a rising ramp, half of the peak is its mean."
	wrongPeakBy    = "as much again as the mean"
	wrongFeet      = "WRONG: the anchor at the feet"
	wrongFeetBy    = "the body weight times the height of the D-ring over the stopping distance"
	wrongPounds    = "WRONG: lb for lbf"
	wrongPoundsWhy = "The braking part in US customary units. A mass in lb times an acceleration in ft/s2 is no lbf: it is in lb*ft/s2, of which 32.17 make one lbf."
)

// shapesMean say what the shapes stand for.
var shapesMean = []string{
	"constant: an absorber that holds one force all the way",
	"rising ramp: something that stiffens evenly up to the end",
	"spring-like rise: a rope or webbing that stretches",
	"early peak: hardly any give at first, then less and less force",
}

var lessonRemember = []string{
	"The stopping distance decides. A short stop is brutal, whatever the fall.",
	"The mean is a floor. The peak lies above it, and nobody feels a mean.",
	"The body weight belongs into the sum.",
	"The free fall depends on where the anchor is: above is short, at the feet is long.",
	"lb is a mass, lbf a force. Write the unit with every figure.",
	"Measure your own stop, with a tolerance, and enter where the figure comes from.",
}
