package arrest

import (
	"slices"

	"arrestcheck/arrest/quantity"
)

// A Symbol is one letter of a formula.
type Symbol struct {
	Name      string // as in the formula text
	Meaning   string
	Dimension quantity.Dimension
}

// A Method is the record of one way to a result: what the methods listing,
// the working and the list of references print.
type Method struct {
	ID       string // "M-02"
	Title    string
	Formulas []string // explicit formulas as text, "F_d = W + m*v^2/(2*d)"
	Symbols  []Symbol
	Valid    string // when it holds
	Errs     string // which way it errs
	Source   string // published source, or derivation, or "common practice"
}

const derived = "derived here from Newton's laws; "

// methods holds all but the formulas and symbols, which are those of passages.
var methods = [...]Method{
	{
		ID: "M-01", Title: "speed, energy and momentum at the start of the arrest",
		Valid:  "the body falls freely, in the direction of gravity, without the drag of the air",
		Errs:   "overstates the speed, by about 0.3 % to 3 % at a free fall of 6 m, depending on the body",
		Source: derived + "standard gravity from NIST SP 811",
	},
	{
		ID: "M-02", Title: "mean force over the stopping distance, from work and energy",
		Valid:  "the distance is the whole vertical travel of the body from the first pull to rest, every stretch included",
		Errs:   "a mean: the peak is above it. A distance that is too long understates. Without W the sum is too low by the body weight",
		Source: derived + "the same relation as a worked example: OpenStax, College Physics 2e, Work, Energy, and Power in Humans (reaction of a landing, the weight included)",
	},
	{
		ID: "M-03", Title: "mean force over the stopping time, from impulse and momentum",
		Valid:  "the time runs from the first pull to the first rest, no hanging and no bounce in it",
		Errs:   "a mean: the peak is above it. A time that is too long understates. Without W the sum is too low by the body weight",
		Source: derived + "worked examples of the net force: OpenStax, University Physics Vol. 1, Impulse and Collisions",
	},
	{
		ID: "M-04", Title: "do distance and time fit each other",
		Valid:  "distance and time describe one and the same stop",
		Errs:   "a ratio of 1 confirms neither figure: both routes share the mass, the speed and Newton. Below 1 the force comes late, above 1 early, or the time holds hanging or bounce",
		Source: derived + "(F_d - W)/(F_t - W) = r holds exactly",
	},
	{
		ID: "M-05", Title: "what is possible",
		Valid:  "the connector pulls and never pushes, and the body does not rise before rest",
		Errs:   "not at all: beyond d_limit no stop is possible",
		Source: derived + "the body covers less than it would falling on freely",
	},
	{
		ID: "M-06", Title: "floor of the peak: not less than",
		Valid:  "any stop of this body over this distance and in this time, whatever the force does in between",
		Errs:   "always low: the true peak is not below the floor and can be far above it. It hangs on the last digits of the time where it lies far above both means",
		Source: derived + "the least peak is that of falling on freely for tau and braking evenly after it; for a longer stop the even braking over d",
	},
	{
		ID: "M-07", Title: "if the stop had an assumed shape",
		Valid:  "only if the force really has the assumed shape from the first pull to rest; the shape is the user's assumption",
		Errs:   "either way: it decides no limit",
		Source: derived + "shapes as the classical shock pulses (half sine, terminal-peak sawtooth, trapezoid) of IEC 60068-2-27, their names from memory",
	},
	{
		ID: "M-08", Title: "severity: force over weight, net deceleration, onset",
		Valid:  "as its force: force over weight and net deceleration in g differ by 1",
		Errs:   "as its force. Says nothing about injury",
		Source: derived + "onset is the peak over the time of the rise",
	},
	{
		ID: "M-09", Title: "what a device's document promises",
		Valid:  "while every condition of the document holds over the whole of the entries: total mass, free fall, and its words about anchor, edge, wet and cold",
		Errs:   "a ceiling: the true figure may be far below. Outside any condition it is no number",
		Source: "the document named with it, as entered by the user",
	},
	{
		ID: "M-10", Title: "linear elastic part, and the fall factor",
		Valid:  "one part that stretches in proportion to the force and nothing else that gives way",
		Errs:   "published drops lie up to 30 % above it at high mass and fall factor (A. Weber 2002, abstract)",
		Source: "A. Wexler, The Theory of Belaying, American Alpine Journal 7 (1950)",
	},
	{
		ID: "M-11", Title: "modulus from a rated rope",
		Valid:  "the rated impact force of a single dynamic rope in the test of EN 892: 80 kg, fall factor about 1.77",
		Errs:   "the modulus is that of the test: peaks of smaller falls err high, those of harder falls low",
		Source: "M-10 turned round for the test of EN 892",
	},
	{
		ID: "M-12", Title: "travel of an absorber alone",
		Valid:  "nothing else stretches, and the deployment force is above the weight",
		Errs:   "high: every other stretch takes energy too; whether the absorber is exhausted only the whole path can say",
		Source: derived + "work and energy at a constant force",
	},
	{
		ID: "M-15", Title: "the arrest worked out in time: parts in series, one massless path",
		Valid:  "a fall straight down with no side offset; the parts are as entered; m*x'' = W - F(x, history) with equal force in all parts",
		Errs:   "either way: the residuals of momentum and energy measure the arithmetic and say nothing about the model; only the user's own allowance does",
		Source: derived + "piecewise exact between events; checked against step-by-step integration",
	},
	{
		ID: "M-16", Title: "allowance for the error of the model",
		Valid:  "the user's own figure with its source; there is none built in",
		Errs:   "as the user's figure",
		Source: "the user; our comparison with published drops is printed beside the request",
	},
	{
		ID: "M-20", Title: "free fall from the layout",
		Valid:  "a fall straight down from the position to the first pull of a straight connector; over an edge with the connector sliding along it to its shortest way, without friction; out to where the line of a retractable ends",
		Errs:   "high over an edge, which in truth holds the connector back, and for a retractable below the D-ring, which is taken not to wind in; low where a connector has slack that was not entered",
		Source: derived + "what counts as free fall: 29 CFR 1926.500(b), restated",
	},
	{
		ID: "M-21", Title: "clearance, item by item from one datum",
		Valid:  "every item is entered once, or held in another that says so; nothing gives way that was not entered",
		Errs:   "as its items do; where an item is missing the sum is a floor, never the room needed. A margin is no measured travel. Left to a box at the edge of a swing it errs low by up to the drop of the swing",
		Source: "definitions of 29 CFR 1926.500(b), restated; the sums are common practice",
	},
	{
		ID: "M-22", Title: "angles of the layout, and a swing as if the connector did not stretch",
		Valid:  "angles and drop of the geometry; the speeds only for a connector that does not stretch at all",
		Errs:   "the speeds either way: a soft connector brings the body deeper and faster, an absorber slower. They decide no limit. Without friction and air drag",
		Source: derived + "energy on the arc; the angle at work is that of the published 30 degree rules",
	},
	{
		ID: "M-23", Title: "restraint: the reach of the connector against the edge",
		Valid:  "the D-ring is carried at any height between the surface and its standing height; a straight connector",
		Errs:   "high against a worker who stands upright; low by what a connector stretches under a stumble and by what of the body is beyond its D-ring. A retractable pays out at walking speed: it restrains only at the end of its line",
		Source: derived + "a right triangle",
	},
	{
		ID: "M-24", Title: "the arrest of a swing worked out in time, in its plane",
		Valid:  "a fall from rest beside the anchor, straight down to the first pull; the parts as entered; tension along the connector, none when slack; motion in one upright plane",
		Errs:   "high for want of friction and air drag, low where a later swing is harder: the fall straight down to the lowest point bounds any. Toppling, motion out of the plane and friction on an edge are not in it",
		Source: derived + "two components step by step with momentum and energy accounts; checked against an independent integration",
	},
	{
		ID: "M-50", Title: "bands: corners and turning points",
		Valid:  "every figure lies somewhere in its band, in any combination",
		Errs:   "wide: the ends are those of the least and most favourable combination. A range has no middle figure unless one was written. The ends of a model are searched for, not proved: where a travel is used up for a part of the bands, those of the onset can fall short by about a tenth of their spread",
		Source: derived + "each output but the floor is monotone in every input; the floor's least is at m = m1, t = t2, v = clamp(2*d1/t2, v1, v2), d = clamp(v*t2/2, d1, d2)",
	},
	{
		ID: "M-60", Title: "a moving load stopped or slowed: impulse, mean force, work",
		Valid:  "the mass is one body; a distance is that of a straight path along the velocity before; the driving force goes on along that velocity; gravity acts as the entries say",
		Errs:   "means: the peak is above them. A time or a distance that is too long understates",
		Source: derived + "worked examples in the plane: OpenStax, University Physics Vol. 1, Impulse and Collisions",
	},
}

// Methods returns the records of all methods, in order of their ids.
func Methods() []Method {
	list := slices.Clone(methods[:])
	for i := range list {
		m := &list[i]
		for j := range passages {
			for _, l := range passages[j].lines {
				if l.method == m.ID && !slices.Contains(m.Formulas, l.text) {
					m.Formulas = append(m.Formulas, l.text)
				}
			}
		}
		m.Symbols = symbolsOf(m.Formulas)
	}
	return list
}

// MethodByID returns the record of one method and whether there is one.
func MethodByID(id string) (Method, bool) {
	for _, m := range Methods() {
		if m.ID == id {
			return m, true
		}
	}
	return Method{}, false
}

// symbolsOf lists the letters of some formulas, each once, in order.
func symbolsOf(formulas []string) []Symbol {
	var list []Symbol
	for _, f := range formulas {
		for _, name := range identifiers(f) {
			s := findSymbol(name).Symbol
			if !slices.Contains(list, s) {
				list = append(list, s)
			}
		}
	}
	return list
}
