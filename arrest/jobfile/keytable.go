package jobfile

import (
	"math"
	"slices"
	"strings"
	"sync"

	"arrestcheck/arrest"
	"arrestcheck/arrest/quantity"
	"arrestcheck/limits"
)

// The words of the format line.
const (
	jobFormat    = "arrestcheck job 1"
	limitsFormat = "arrestcheck limits 1"
)

// keyRecords is the ONE table. Usual and possible spans are common practice,
// no rule of any document: the usual span catches the slip of a decimal, the
// possible span what no fall of a person can be.
var keyRecords = sync.OnceValue(func() []Key {
	return slices.Concat(topKeys, documentKeys, workerKeys, toolKeys, loadKeys(), fallKeys, layoutKeys(), clearanceKeys(), stopKeys,
		connectorKeys(), modelKeys, ratedKeys(), limitKeys(), elsewhereKeys(), entryKeys(), polarKeys)
})

var topKeys = []Key{
	{Name: "format", Places: InJob, Kind: Choice, Required: true, Fixed: true, Choices: []string{jobFormat},
		Help: "what the file is, and the version of its form", Example: `"` + jobFormat + `"`},
	{Name: "format", Places: InLimits, Kind: Choice, Required: true, Fixed: true, Choices: []string{limitsFormat},
		Help: "what the file is, and the version of its form", Example: `"` + limitsFormat + `"`},
	{Name: "limits", Places: InJob, Kind: Files, Fixed: true,
		Help: "limit files in the folder of the job, each with or without the digest it has to have", Example: `["site-limits.toml"]`},
	{Section: "limits", Name: "file", Places: InJob, Kind: Text, Required: true, Fixed: true,
		Help: "name of the limit file, in the folder of the job or below it", Example: `"site-limits.toml"`},
	{Section: "limits", Name: "sha256", Places: InJob, Kind: Text, Fixed: true,
		Help: "digest of the limit file's bytes, 64 hexadecimal digits: the file is refused when it differs", Example: `"` + strings.Repeat("0123456789abcdef", 4) + `"`},
	{Name: "gravity", Places: InJob, Kind: Quantity, Dimension: quantity.Acceleration, Spread: NoSpread, Sign: Positive,
		Usual: Span{9.76, 9.84}, Possible: Span{9.5, 10.1},
		Help: "acceleration of free fall where the job needs another than the standard 9.80665 m/s2", Example: `"9.80 m/s2"`},
	{Name: "example", Places: InJob | InLimits, Kind: Boolean, Fixed: true,
		Help: "true when the figures are examples: the report is stamped and no limit comes out as within", Example: `true`},

	{Name: "title", Places: InLimits, Kind: Text, Required: true,
		Help: "what the limits are for", Example: `"Site rules, river terminal"`},
	{Name: "jurisdiction", Places: InLimits, Kind: Text,
		Help: "where and for what work the limits hold", Example: `"general industry, this site"`},
	{Name: "entered_by", Places: InLimits, Kind: Text,
		Help: "role of whoever typed the limits in", Example: `"safety planner"`},
	{Name: "entered_on", Places: InLimits, Kind: Text,
		Help: "date of the entry, as text", Example: `"2 June 2025"`},
	{Name: "checked_on", Places: InLimits, Kind: Text, Dated: true,
		Help: "date on which the figures were last held against the documents; without it no limit comes out as within", Example: `"3 June 2025"`},
	{Name: "note", Places: InLimits, Kind: Text,
		Help: "anything the reader has to know", Example: `"read in the site binder, tab 4"`},
}

var documentKeys = []Key{
	{Name: "document", Places: InJob, Kind: Section, Required: true,
		Help: "what the sheet is about, in words"},
	{Section: "document", Name: "title", Places: InJob, Kind: Text, Required: true,
		Help: "the question, in one line", Example: `"Lamp change, loader boom"`},
	{Section: "document", Name: "site", Places: InJob, Kind: Text,
		Help: "where the work is done", Example: `"river terminal, berth 2"`},
	{Section: "document", Name: "reference", Places: InJob, Kind: Text,
		Help: "number of the job or plan", Example: `"RT-0417"`},
	{Section: "document", Name: "revision", Places: InJob, Kind: Text,
		Help: "revision of the sheet", Example: `"B"`},
	{Section: "document", Name: "date", Places: InJob, Kind: Text,
		Help: "date of the sheet, as text", Example: `"4 June 2025"`},
	{Section: "document", Name: "purpose", Places: InJob, Kind: Text,
		Help: "what the answer is wanted for", Example: `"choice of the lanyard"`},
	{Section: "document", Name: "system", Places: InJob, Kind: Text,
		Help: "the fall-arrest system in words", Example: `"2 m lanyard with absorber to a beam clamp"`},
	{Section: "document", Name: "rescue", Places: InJob, Kind: Text,
		Help: "how a person hanging in the harness is brought down, and by whom", Example: `"platform on site, two trained persons at the lift"`},
	{Section: "document", Name: "prepared_by", Places: InJob, Kind: Text,
		Help: "role of the preparer; named in the file, not a signature", Example: `"safety planner"`},
	{Section: "document", Name: "checked_by", Places: InJob, Kind: Text,
		Help: "role of the checker; named in the file, not a signature", Example: `"qualified person of the site"`},
	{Section: "document", Name: "review_date", Places: InJob, Kind: Text,
		Help: "when the sheet is to be looked at again, as text", Example: `"before the season, at the latest 1 March 2026"`},
}

// What is stopped: of the three sections exactly one stands in a job.
var whatIsStopped = []string{"worker", "tool", "moving_load"}

var workerKeys = []Key{
	{Name: "worker", Places: InJob, Kind: Section, Several: true, Either: whatIsStopped,
		Help: "who hangs on the system; several [[worker]] are those who may use it one at a time, the lightest to the heaviest"},
	{Section: "worker", Name: "name", Places: InJob, Kind: Text,
		Help: "role of the worker, to tell several apart", Example: `"rigger"`},
	{Section: "worker", Name: "mass", Places: InJob, Kind: Quantity, Required: true, Dimension: quantity.Mass, Sourced: true, Sign: Positive,
		Usual: Span{50, 140}, Possible: Span{10, 1000},
		Help: "body and clothing; of all persons on the system together", Example: `"92 kg ± 1 kg"`},
	{Section: "worker", Name: "tools", Places: InJob, Kind: Quantity, Required: true, Dimension: quantity.Mass, Sourced: true, Sign: NotNegative,
		Usual: Span{0, 25}, Possible: Span{0, 500},
		Help: "tools, harness and whatever else hangs on the body, of all persons together; may be 0 kg", Example: `"0 kg .. 10 kg"`},
	{Section: "worker", Name: "persons", Places: InJob, Kind: Integer, Possible: Span{1, 20},
		Help: "how many persons hang on one system at once; mass and tools are then those of all of them together", Example: `2`},
}

var toolKeys = []Key{
	{Name: "tool", Places: InJob, Kind: Section, Either: whatIsStopped, Not: []string{"layout"},
		Help: "a tool that falls into its tether, in place of a worker"},
	{Section: "tool", Name: "mass", Places: InJob, Kind: Quantity, Required: true, Dimension: quantity.Mass, Sourced: true, Sign: Positive,
		Usual: Span{0.1, 40}, Possible: Span{0.001, 1000},
		Help: "the tool with all that hangs on it", Example: `"3.2 kg ± 0.1 kg"`},
}

// How gravity acts on a moving load: exactly one of the three is said.
var howGravityActs = []string{"path", "slope_down", "up"}

func loadKeys() []Key {
	const in = "moving_load"
	return []Key{
		{Name: in, Places: InJob, Kind: Section, Either: whatIsStopped, Not: []string{"layout", "stop", "connector", "model", "rated"}, AnyOf: []string{"time", "distance"},
			Help: "a load that is stopped or slowed; it stands alone, without a fall"},
		{Section: in, Name: "mass", Places: InJob, Kind: Quantity, Required: true, Dimension: quantity.Mass, Sourced: true, Sign: Positive,
			Usual: Span{1, 20e3}, Possible: Span{0.001, 1e7},
			Help: "what moves, with all that moves with it", Example: `"900 kg ± 5 kg"`},
		{Section: in, Name: "velocity_before", Places: InJob, Kind: Velocity, Required: true, Dimension: quantity.Speed, Sourced: true, Sign: AnySign,
			Usual: Span{-20, 20}, Possible: Span{-1000, 1000},
			Help: "before the stop: one figure along a straight path, a list of the components along x, y and z, or a speed with its direction", Example: `"1.1 m/s"`},
		{Section: in, Name: "velocity_after", Places: InJob, Kind: Velocity, Required: true, Dimension: quantity.Speed, Sourced: true, Sign: AnySign,
			Usual: Span{-20, 20}, Possible: Span{-1000, 1000},
			Help: "after the stop, with as many components as before; 0 m/s where it comes to rest, below zero where it bounces back", Example: `"0 m/s"`},
		{Section: in, Name: "time", Places: InJob, Kind: Quantity, Dimension: quantity.Time, Sourced: true, Sign: Positive,
			Usual: Span{0.01, 60}, Possible: Span{1e-5, 1e4},
			Help: "from the first touch until the velocity is that after the stop", Example: `"0.30 s ± 0.02 s"`},
		{Section: in, Name: "distance", Places: InJob, Kind: Quantity, Dimension: quantity.Length, Sourced: true, Sign: Positive,
			Usual: Span{0.005, 100}, Possible: Span{1e-5, 1e4},
			Help: "travel along a straight path during the stop; with one component only", Example: `"0.200 m"`},
		{Section: in, Name: "driving_force", Places: InJob, Kind: Quantity, Dimension: quantity.Force, Sourced: true, Sign: NotNegative,
			Usual: Span{0, 50e3}, Possible: Span{0, 1e8},
			Help: "what goes on pushing along the motion during the stop, a drive or a rope, not the weight; with one component it has to be said, and may be 0 N", Example: `"0 N"`},
		{Section: in, Name: "path", Places: InJob, Kind: Choice, Either: howGravityActs, Choices: []string{"level"},
			Help: "level where gravity does not act along the motion", Example: `"level"`},
		{Section: in, Name: "slope_down", Places: InJob, Kind: Quantity, Either: howGravityActs, Dimension: quantity.Angle, Sourced: true, Sign: AnySign,
			Usual: Span{-0.525, 0.525}, Possible: Span{-math.Pi / 2, math.Pi / 2},
			Help: "slope of a straight path, above zero where the load runs downhill; with one component only", Example: `"3 deg"`},
		{Section: in, Name: "up", Places: InJob, Kind: Choice, Either: howGravityActs, Choices: []string{"+x", "-x", "+y", "-y", "+z", "-z"},
			Help: "which of the components given points up, or down with a -", Example: `"+y"`},
	}
}

var fallKeys = []Key{
	{Name: "fall", Places: InJob, Kind: Section, Either: []string{"fall", "moving_load"}, Unless: "layout", AnyOf: []string{"free_fall", "initial_speed"},
		Help: "the motion before the system begins to pull"},
	{Section: "fall", Name: "free_fall", Places: InJob, Kind: Quantity, Dimension: quantity.Length, Sourced: true, Sign: NotNegative,
		Usual: Span{0, 4}, Possible: Span{0, 100},
		Help: "vertical travel of the D-ring from the start of the fall until the system begins to pull; slide and payout count, stretch and the stop do not", Example: `"1.6 m .. 1.8 m"`},
	{Section: "fall", Name: "initial_speed", Places: InJob, Kind: Quantity, Dimension: quantity.Speed, Sourced: true, Sign: NotNegative,
		Usual: Span{0, 3}, Possible: Span{0, 45},
		Help: "downward speed at the start of the free fall", Example: `"1.2 m/s"`},
}

var stopKeys = []Key{
	{Name: "stop", Places: InJob, Kind: Section, AnyOf: []string{"distance", "time"},
		Help: "how the fall is stopped, as far as it is known"},
	{Section: "stop", Name: "distance", Places: InJob, Kind: Quantity, Dimension: quantity.Length, Sourced: true, Sign: Positive,
		Usual: Span{0.1, 3}, Possible: Span{0.001, 50},
		Help: "vertical travel of the D-ring from the first pull to rest, every stretch included", Example: `"0.95 m .. 1.10 m"`},
	{Section: "stop", Name: "time", Places: InJob, Kind: Quantity, Dimension: quantity.Time, Sourced: true, Sign: Positive,
		Usual: Span{0.05, 2}, Possible: Span{0.001, 60},
		Help: "from the first pull to the first rest, without any bounce", Example: `"0.34 s ± 10 %"`},
	{Section: "stop", Name: "shape", Places: InJob, Kind: Choice, Choices: pulseWords(),
		Help: "the shape the force is assumed to have over time; figures from it are conditional", Example: `"rising ramp"`},
	{Section: "stop", Name: "rise_fraction", Places: InJob, Kind: Quantity, Dimension: quantity.Ratio, Sourced: true, Sign: NotNegative,
		Possible: Span{0, 1}, Beside: Companion{"shape", arrest.RisePlateau.String()},
		Help: "part of the stopping time during which the force rises", Example: `"25 %"`},
}

// The words of layout.edge.
const (
	noEdge    = "none"
	roundEdge = "round"
	sharpEdge = "sharp"
)

// layoutKeys are those of the layout, its positions and what lies below. A
// height is above the walking surface, along and out are measured as the keys
// of a position say.
func layoutKeys() []Key {
	behind, rated := [][]string{{"anchor_behind_edge"}}, []string{"edge_rated_by"}
	const in = "layout"
	keys := []Key{
		{Name: in, Places: InJob, Kind: Section, Beside: Companion{Name: "position"},
			Help: "where the anchor is, how high the D-ring and how long the connector; the free fall is worked out from it"},
		{Section: in, Name: "anchor_height", Places: InJob, Kind: Quantity, Required: true, Dimension: quantity.Length, Sourced: true, Sign: AnySign,
			Usual: Span{-2, 15}, Possible: Span{-100, 200},
			Help: "anchor above the walking surface, below zero where it lies below", Example: `"3.0 m"`},
		{Section: in, Name: "edge", Places: InJob, Kind: Choice, Required: true, Fixed: true, Choices: []string{noEdge, roundEdge, sharpEdge},
			Variants: []Variant{{noEdge, nil, nil}, {roundEdge, behind, rated}, {sharpEdge, behind, rated}},
			Help:     "the edge that the worker falls over and the connector can come to; none where there is none between anchor and worker", Example: `"` + noEdge + `"`},
		{Section: in, Name: "anchor_behind_edge", Places: InJob, Kind: Quantity, Dimension: quantity.Length, Sourced: true, Sign: AnySign,
			Usual: Span{-3, 15}, Possible: Span{-100, 1000},
			Help: "in plan from the edge back to the anchor, square to the edge; below zero where the anchor is out beyond the edge", Example: `"0.4 m"`},
		{Section: in, Name: "edge_rated_by", Places: InJob, Kind: Text, Fixed: true,
			Help: "the document by which a part of the connector is made to run over this edge", Example: `"manual of the lanyard, section on edges"`},
		{Section: in, Name: "d_ring_height", Places: InJob, Kind: Quantity, Required: true, Dimension: quantity.Length, Sourced: true, Sign: Positive,
			Usual: Span{1.1, 1.7}, Possible: Span{0.1, 10},
			Help: "D-ring above the walking surface when the fall begins", Example: `"1.5 m"`},
		{Section: in, Name: "d_ring_to_feet", Places: InJob, Kind: Quantity, Dimension: quantity.Length, Sourced: true, Sign: Positive,
			Usual: Span{1.1, 2.1}, Possible: Span{0.1, 10},
			Help: "from the D-ring down to the feet of the hanging body, not standing", Example: `"1.7 m"`},
		{Section: in, Name: "half_width", Places: InJob, Kind: Quantity, Dimension: quantity.Length, Sourced: true, Sign: Positive,
			Usual: Span{0.2, 1}, Possible: Span{0.01, 10},
			Help: "how far the body reaches to either side of the D-ring; without it every obstacle with sides counts as in the way", Example: `"0.5 m"`},
		{Section: in, Name: "connector_length", Places: InJob, Kind: Quantity, Wanted: true, Dimension: quantity.Length, Sourced: true, Sign: Positive,
			Usual: Span{0.3, 50}, Possible: Span{0.01, 1000},
			Help: "from the anchor to the D-ring, taut, hooks and rings counted, of a retractable its whole line; asked for unless every [[connector]] states its length", Example: `"2.0 m"`},
		{Section: in, Name: "slack", Places: InJob, Kind: Quantity, Wanted: true, Dimension: quantity.Length, Sourced: true, Sign: NotNegative, Not: []string{"travel_before_locking"},
			Usual: Span{0, 1}, Possible: Span{0, 50},
			Help: "what the connector gives before it pulls, beyond its length; asked for unless a retractable holds the worker, and may be 0 m", Example: `"0 m"`},
		{Section: in, Name: "travel_before_locking", Places: InJob, Kind: Quantity, Dimension: quantity.Length, Sourced: true, Sign: NotNegative,
			Usual: Span{0, 1.5}, Possible: Span{0, 20},
			Help: "line paid out before a retractable locks; with it the connector is one, unless a [[connector]] is and states its own", Example: `"0.3 m .. 0.6 m"`},
	}
	return slices.Concat(keys, positionKeys, obstacleKeys)
}

var positionKeys = []Key{
	{Name: "position", Places: InJob, Kind: Sections, Beside: Companion{Name: "layout"},
		Help: "one place where a fall may begin; of several the worst governs"},
	{Section: "position", Name: "name", Places: InJob, Kind: Text,
		Help: "what the place is called on the sheet; asked for where there are several", Example: `"end of the walkway"`},
	{Section: "position", Name: "along", Places: InJob, Kind: Quantity, Required: true, Dimension: quantity.Length, Sourced: true, Sign: AnySign,
		Usual: Span{-10, 10}, Possible: Span{-1000, 1000},
		Help: "from the anchor along the edge, to one side above zero and to the other below; without an edge in a direction of your choice", Example: `"1.2 m"`},
	{Section: "position", Name: "out", Places: InJob, Kind: Quantity, Required: true, Dimension: quantity.Length, Sourced: true, Sign: AnySign,
		Usual: Span{-10, 10}, Possible: Span{-1000, 1000},
		Help: "outwards from the edge, 0 m just outside it, below zero behind it; without an edge from the anchor, square to along", Example: `"0 m"`},
}

// The sides of an obstacle stand together.
var sidesOfObstacle = []string{"along_from", "along_to", "out_from", "out_to"}

var obstacleKeys = []Key{
	{Name: "obstacle", Places: InJob, Kind: Sections, Beside: Companion{Name: "layout"},
		Help: "something below or beside the fall; without sides it is a level that goes on to all sides"},
	{Section: "obstacle", Name: "name", Places: InJob, Kind: Text, Required: true,
		Help: "what it is called on the sheet", Example: `"concrete floor"`},
	{Section: "obstacle", Name: "below", Places: InJob, Kind: Quantity, Required: true, Dimension: quantity.Length, Sourced: true, Sign: AnySign,
		Usual: Span{-5, 100}, Possible: Span{-100, 10e3},
		Help: "from the walking surface down to its top, below zero where it rises above the surface", Example: `"6.4 m"`},
	{Section: "obstacle", Name: "moving", Places: InJob, Kind: Boolean, Fixed: true,
		Help: "true where it can be anywhere in plan, as a vehicle can; it has no sides then", Example: `false`},
	{Section: "obstacle", Name: "height", Places: InJob, Kind: Quantity, Dimension: quantity.Length, Sourced: true, Sign: Positive,
		Usual: Span{0.02, 30}, Possible: Span{0.001, 1000},
		Help: "from its top down to its underside, where it has one; a level has none", Example: `"0.4 m"`},
	sideKey("along_from", "one side of it, in the direction of along of a position", `"-1 m"`),
	sideKey("along_to", "the other side of it, in the same direction", `"2 m"`),
	sideKey("out_from", "one side of it, in the direction of out of a position", `"0 m"`),
	sideKey("out_to", "the other side of it, in the same direction", `"1.5 m"`),
	{Section: "obstacle", Name: "stop_over", Places: InJob, Kind: Quantity, Dimension: quantity.Length, Sourced: true, Sign: Positive,
		Usual: Span{0.005, 1}, Possible: Span{1e-4, 50},
		Help: "distance over which a body that hits it comes to rest; without it nothing is said about the force of the hit", Example: `"50 mm"`},
}

func sideKey(name, help, example string) Key {
	return Key{Section: "obstacle", Name: name, Places: InJob, Kind: Quantity, With: sidesOfObstacle, Dimension: quantity.Length, Sourced: true, Sign: AnySign,
		Usual: Span{-50, 50}, Possible: Span{-1000, 1000}, Help: help, Example: example}
}

// The words of clearance.datum.
const (
	belowFeet   = "feet"
	belowAnchor = "anchor"
)

// heldItems are the items that the figure of another can hold already.
var heldItems = []string{"line_stretch", "harness_stretch", "anchor_give"}

func clearanceKeys() []Key {
	const in = "clearance"
	item := func(name string, usual Span, help, example string) Key {
		return Key{Section: in, Name: name, Places: InJob, Kind: Quantity, Dimension: quantity.Length, Sourced: true, Sign: NotNegative,
			Usual: usual, Possible: Span{0, 50}, Help: help, Example: example}
	}
	includes := func(name, of, example string) Key {
		return Key{Section: in, Name: name, Places: InJob, Kind: Words, Fixed: true, Beside: Companion{Name: of}, Choices: heldItems,
			Help: "what the figure of " + of + " counts already: it is not counted again", Example: example}
	}
	return []Key{
		{Name: in, Places: InJob, Kind: Section, Beside: Companion{Name: "layout"},
			Help: "the room that the fall needs below, item by item; free fall, swing and connector come from the layout. An item that is left out is missing, not zero"},
		{Section: in, Name: "datum", Places: InJob, Kind: Choice, Required: true, Choices: []string{belowFeet, belowAnchor},
			Help: "from where the room is measured downwards: from the feet where the worker stands, or from the anchor", Example: `"` + belowFeet + `"`},
		item("deceleration_distance", Span{0.1, 3}, "from the first pull to rest; left out where [stop] gives the distance, or where [[connector]] alone is to give it", `"1.07 m"`),
		includes("deceleration_includes", "deceleration_distance", `["line_stretch"]`),
		item("line_stretch", Span{0, 3}, "stretch of a lifeline or rope beside the deceleration distance", `"0.2 m"`),
		item("harness_stretch", Span{0.2, 0.5}, "stretch of the harness and shift of the D-ring", `"0.3 m"`),
		item("anchor_give", Span{0, 1}, "how far the anchor, or the line it is on, comes down under the pull; may be 0 m", `"0.05 m"`),
		item("margin", Span{0.6, 1}, "room to keep beyond all that is counted", `"0.8 m"`),
		includes("margin_includes", "margin", `["harness_stretch"]`),
	}
}

// The words of connector.part.
const (
	aRope        = "rope"
	aWebbing     = "webbing"
	aWireRope    = "wire rope"
	anAbsorber   = "absorber"
	aRetractable = "retractable"
	aRopeGrab    = "rope grab"
	aHarness     = "harness and body"
	anAnchor     = "anchor"
	aCurve       = "curve"
)

// partVariants says which figures each part of a path has. Only what runs as a
// line can be a lifeline, whose stretch is kept out of the deceleration distance.
func partVariants() []Variant {
	elastic := [][]string{{"stiffness", "modulus"}}
	return []Variant{
		{aRope, [][]string{{"stiffness", "modulus", "impact_force", "static_stretch"}}, []string{"length", "lifeline"}},
		{aWebbing, elastic, []string{"length", "lifeline"}},
		{aWireRope, elastic, []string{"length", "lifeline"}},
		{anAbsorber, [][]string{{"deployment_force"}, {"travel_at_most"}}, []string{"activation_force", "activation_travel"}},
		{aRetractable, [][]string{{"travel_before_locking"}, {"braking_force"}, {"travel_at_most"}}, nil},
		{aRopeGrab, [][]string{{"slip_force"}, {"travel_at_most"}}, nil},
		{aHarness, elastic, []string{"length"}},
		{anAnchor, elastic, []string{"length"}},
		{aCurve, [][]string{{"points"}}, []string{"unloading", "lifeline"}},
	}
}

func connectorKeys() []Key {
	const in = "connector"
	length := Companion{Name: "length"}
	variants := partVariants()
	words := make([]string, len(variants))
	for i := range variants {
		words[i] = variants[i].Word
	}
	return []Key{
		{Name: in, Places: InJob, Kind: Sections,
			Help: "one part of the path from the anchor to the body, in this order; with it the arrest is worked out in time"},
		{Section: in, Name: "part", Places: InJob, Kind: Choice, Required: true, Choices: words, Variants: variants,
			Help: "what the part is; it decides which figures are asked for", Example: `"` + anAbsorber + `"`},
		{Section: in, Name: "name", Places: InJob, Kind: Text,
			Help: "what the part is called on the sheet; no other part has the name", Example: `"tear-out lanyard"`},
		{Section: in, Name: "lifeline", Places: InJob, Kind: Boolean,
			Help: "true where the stretch of the part is no deceleration distance", Example: `true`},
		{Section: in, Name: "source", Places: InJob, Kind: Choice, Fixed: true, Choices: wordsOf(arrest.Sources()),
			Help: "how all figures of the part are known that have no source of their own", Example: `"label"`},
		{Section: in, Name: "note", Places: InJob, Kind: Text,
			Help: "where the figures of the part were read", Example: `"data sheet 12, page 2"`},
		{Section: in, Name: "length", Places: InJob, Kind: Quantity, Dimension: quantity.Length, Sourced: true, Sign: Positive,
			Usual: Span{0.1, 50}, Possible: Span{0.001, 1000},
			Help: "length of the part without load", Example: `"2.5 m"`},
		{Section: in, Name: "stiffness", Places: InJob, Kind: Quantity, Dimension: quantity.Stiffness, Sourced: true, Sign: Positive,
			Usual: Span{1e3, 10e6}, Possible: Span{1, 1e10},
			Help: "force over stretch of the part as it is, in a fast pull", Example: `"9 kN/m"`},
		{Section: in, Name: "modulus", Places: InJob, Kind: Quantity, Beside: length, Dimension: quantity.Force, Sourced: true, Sign: Positive,
			Usual: Span{2e3, 20e6}, Possible: Span{10, 1e10},
			Help: "force over strain in a fast pull: the force that would stretch the part to twice its length", Example: `"22.5 kN"`},
		{Section: in, Name: "impact_force", Places: InJob, Kind: Quantity, Beside: length, Dimension: quantity.Force, Sourced: true, Sign: Positive,
			Usual: Span{6e3, 12e3}, Possible: Span{1e3, 100e3},
			Help: "rated impact force of a dynamic rope, from the drop test of EN 892 with 80 kg", Example: `"8.6 kN"`},
		{Section: in, Name: "static_stretch", Places: InJob, Kind: Quantity, Beside: length, Dimension: quantity.Ratio, Sourced: true, Sign: Positive,
			Usual: Span{0.01, 0.12}, Possible: Span{1e-4, 1},
			Help: "stretch of a rope under a hung load of 80 kg; alone it makes the rope about half as stiff as it is in a fall", Example: `"7 %"`},
		{Section: in, Name: "deployment_force", Places: InJob, Kind: Quantity, Dimension: quantity.Force, Sourced: true, Sign: Positive,
			Usual: Span{1e3, 10e3}, Possible: Span{1, 200e3},
			Help: "force at which the absorber pays out", Example: `"4 kN ± 0.5 kN"`},
		{Section: in, Name: "travel_at_most", Places: InJob, Kind: Quantity, Dimension: quantity.Length, Sourced: true, Sign: Positive,
			Usual: Span{0.1, 3}, Possible: Span{0.001, 50},
			Help: "travel after which the part is used up and holds", Example: `"1.07 m"`},
		{Section: in, Name: "activation_force", Places: InJob, Kind: Quantity, Dimension: quantity.Force, Sourced: true, Sign: Positive,
			Usual: Span{500, 12e3}, Possible: Span{1, 200e3},
			Help: "force that starts the absorber, where it differs from the deployment force", Example: `"2 kN"`},
		{Section: in, Name: "activation_travel", Places: InJob, Kind: Quantity, Beside: Companion{Name: "activation_force"}, Dimension: quantity.Length, Sourced: true, Sign: Positive,
			Usual: Span{0.01, 1}, Possible: Span{1e-4, 50},
			Help: "travel over which the force grows from the activation force to a greater deployment force", Example: `"100 mm"`},
		{Section: in, Name: "travel_before_locking", Places: InJob, Kind: Quantity, Dimension: quantity.Length, Sourced: true, Sign: NotNegative,
			Usual: Span{0, 1.5}, Possible: Span{0, 20},
			Help: "line paid out before the retractable locks; it is a part of fall.free_fall, or of the free fall that comes from [layout]", Example: `"0.3 m .. 0.6 m"`},
		{Section: in, Name: "braking_force", Places: InJob, Kind: Quantity, Dimension: quantity.Force, Sourced: true, Sign: Positive,
			Usual: Span{1e3, 10e3}, Possible: Span{1, 200e3},
			Help: "force at which the brake of the retractable slips", Example: `"4 kN ± 0.5 kN"`},
		{Section: in, Name: "slip_force", Places: InJob, Kind: Quantity, Dimension: quantity.Force, Sourced: true, Sign: Positive,
			Usual: Span{1e3, 10e3}, Possible: Span{1, 200e3},
			Help: "force at which the rope grab slips along the line", Example: `"3 kN .. 4 kN"`},
		{Section: in, Name: "points", Places: InJob, Kind: Points, Fixed: true,
			Help: "loading curve of the part: pairs of extension and force, both rising", Example: `[["0 mm", "0 kN"], ["60 mm", "4 kN"]]`},
		{Section: in, Name: "unloading", Places: InJob, Kind: Quantity, Dimension: quantity.Stiffness, Sourced: true, Spread: NoWidth, Sign: Positive,
			Usual: Span{1e3, 10e6}, Possible: Span{1, 1e10},
			Help: "stiffness on the way back, not below the steepest stretch of the curve; without it the part gives back all of its stretch", Example: `"120 kN/m"`},
	}
}

var modelKeys = []Key{
	{Name: "model", Places: InJob, Kind: Section, Beside: Companion{Name: "connector"},
		Help: "what the user allows for the error of the model of the path"},
	{Section: "model", Name: "allowance", Places: InJob, Kind: Quantity, Required: true, Dimension: quantity.Ratio, Sourced: true, MustSource: true, Spread: NoSpread, Sign: NotNegative,
		Usual: Span{0.05, 0.5}, Possible: Span{0, 1},
		Help: "how far a real stop may lie beyond the modelled figures; there is no default", Example: `{ value = "25 %", source = "measured", note = "drop tests of this lanyard, report 3" }`},
}

func ratedKeys() []Key {
	const in = "rated"
	return []Key{
		{Name: in, Places: InJob, Kind: Sections, AnyOf: []string{"peak_force_at_most", "mean_force_at_most", "travel_at_most"},
			Help: "what the document of a device promises, and under which conditions"},
		{Section: in, Name: "document", Places: InJob, Kind: Text, Required: true, Fixed: true,
			Help: "the label, manual or certificate that promises it", Example: `"label of the lanyard"`},
		{Section: in, Name: "total_mass", Places: InJob, Kind: Quantity, Required: true, Dimension: quantity.Mass, Spread: MustSpread, Sign: NotNegative,
			Usual: Span{0, 200}, Possible: Span{0, 1000},
			Help: "masses for which the document promises it, person and tools together", Example: `"59 kg .. 140 kg"`},
		{Section: in, Name: "free_fall_at_most", Places: InJob, Kind: Quantity, Required: true, Dimension: quantity.Length, Spread: NoSpread, Sign: NotNegative,
			Usual: Span{0, 4}, Possible: Span{0, 100},
			Help: "free fall up to which the document promises it", Example: `"1.8 m"`},
		{Section: in, Name: "peak_force_at_most", Places: InJob, Kind: Quantity, Dimension: quantity.Force, Spread: NoSpread, Sign: Positive,
			Usual: Span{2e3, 12e3}, Possible: Span{100, 100e3},
			Help: "greatest force on the body", Example: `"6 kN"`},
		{Section: in, Name: "mean_force_at_most", Places: InJob, Kind: Quantity, Dimension: quantity.Force, Spread: NoSpread, Sign: Positive,
			Usual: Span{1e3, 10e3}, Possible: Span{100, 100e3},
			Help: "greatest mean force above a level, as test documents state it", Example: `"4 kN"`},
		{Section: in, Name: "travel_at_most", Places: InJob, Kind: Quantity, Dimension: quantity.Length, Spread: NoSpread, Sign: Positive,
			Usual: Span{0.1, 3}, Possible: Span{0.001, 50}, Beside: Companion{Name: "travel_is"},
			Help: "greatest travel while the device works", Example: `"1.07 m"`},
		{Section: in, Name: "travel_is", Places: InJob, Kind: Choice, Choices: []string{travelOfBody, travelOfDevice}, Beside: Companion{Name: "travel_at_most"},
			Help: "whether the travel is the whole deceleration distance of the body or what the absorber alone pays out", Example: `"` + travelOfDevice + `"`},
		{Section: in, Name: "part", Places: InJob, Kind: Text,
			Help: "name of the [[connector]] part that the document belongs to", Example: `"tear-out lanyard"`},
		{Section: in, Name: "conditions", Places: InJob, Kind: Text,
			Help: "conditions of the document that cannot be calculated, in words; printed", Example: `"anchor above the D-ring, dry, no edge"`},
		{Section: in, Name: "note", Places: InJob, Kind: Text,
			Help: "anything the reader has to know", Example: `"photo of the label in the job folder"`},
	}
}

// The words of rated.travel_is.
const (
	travelOfBody   = "deceleration distance"
	travelOfDevice = "absorber travel"
)

func limitKeys() []Key {
	const in, both = "limit", InJob | InLimits
	return []Key{
		{Name: in, Places: both, Kind: Sections, Fixed: true,
			Help: "one limit, as its document states it"},
		{Section: in, Name: "id", Places: both, Kind: Text, Fixed: true, Required: true,
			Help: "short name of the limit; no other limit of the job or its files may have it", Example: `"peak-on-body"`},
		{Section: in, Name: "quantity", Places: both, Kind: Choice, Fixed: true, Required: true, Choices: limitedQuantities(),
			Help: "what is limited", Example: `"peak_force"`},
		{Section: in, Name: "at_most", Places: both, Kind: Quantity, Fixed: true, Spread: NoSpread, Sign: NotNegative,
			Help: "the limit, where the demand must not be above it; in the unit of the document", Example: `"1800 lbf"`},
		{Section: in, Name: "at_least", Places: both, Kind: Quantity, Fixed: true, Spread: NoSpread, Sign: NotNegative,
			Help: "the limit, where the demand must not be below it; in the unit of the document", Example: `"0.6 m"`},
		{Section: in, Name: "also_printed", Places: both, Kind: Quantity, Fixed: true, Spread: NoSpread, Sign: NotNegative,
			Help: "the same limit as the document prints it in another unit", Example: `"8 kN"`},
		{Section: in, Name: "authority", Places: both, Kind: Text, Fixed: true, Required: true,
			Help: "title and clause of the document that sets the limit", Example: `"site rule 7, working at height, clause 3"`},
		{Section: in, Name: "edition", Places: both, Kind: Text, Fixed: true, Required: true,
			Help: "edition, or when and where the text was read", Example: `"rev 5, as read on 2 June 2025"`},
		{Section: in, Name: "kind", Places: both, Kind: Choice, Fixed: true, Required: true, Choices: wordsOf(limits.Kinds()),
			Help: "what the limit protects; a product test is no limit for a site", Example: `"person"`},
		{Section: in, Name: "applies_when", Places: both, Kind: Text, Fixed: true,
			Help: "condition in words; printed, not calculated", Example: `"full body harness"`},
		{Section: in, Name: "any_of", Places: both, Kind: Text, Fixed: true,
			Help: "name of a group: of its rows under one authority, one within is enough", Example: `"either"`},
		{Section: in, Name: "total_mass_at_most", Places: both, Kind: Quantity, Fixed: true, Dimension: quantity.Mass, Spread: NoSpread, Sign: Positive,
			Possible: Span{1, 1000},
			Help:     "the limit holds up to this mass of person and tools", Example: `"310 lb"`},
		{Section: in, Name: "free_fall_at_most", Places: both, Kind: Quantity, Fixed: true, Dimension: quantity.Length, Spread: NoSpread, Sign: NotNegative,
			Possible: Span{0, 100},
			Help:     "the limit holds up to this free fall", Example: `"6 ft"`},
		{Section: in, Name: "persons_at_most", Places: both, Kind: Integer, Fixed: true, Possible: Span{1, 20},
			Help: "the limit holds up to this number of persons on the system", Example: `1`},
		{Section: in, Name: "superseded_on", Places: both, Kind: Text, Fixed: true, Dated: true,
			Help: "date from which the limit no longer holds; with it the limit never comes out as within", Example: `"1 January 2025"`},
		{Section: in, Name: "checked_on", Places: both, Kind: Text, Fixed: true, Dated: true,
			Help: "date on which the figure was last held against the document; in a limit file that of the file counts where this is missing", Example: `"3 June 2025"`},
		{Section: in, Name: "note", Places: both, Kind: Text, Fixed: true,
			Help: "anything the reader has to know", Example: `"figure from memory, to be looked up"`},
	}
}

func elsewhereKeys() []Key {
	const in = "elsewhere"
	return []Key{
		{Name: in, Places: InJob, Kind: Sections, Fixed: true,
			Help: "a quantity that another document handles"},
		{Section: in, Name: "quantity", Places: InJob, Kind: Choice, Fixed: true, Required: true, Choices: limitedQuantities(),
			Help: "what is handled there", Example: `"clearance_left"`},
		{Section: in, Name: "where", Places: InJob, Kind: Text, Fixed: true, Required: true,
			Help: "the document that handles it", Example: `"clearance drawing 12 rev B"`},
	}
}

func entryKeys() []Key {
	return []Key{
		{Section: Entry, Name: "value", Places: InJob, Kind: Text, Fixed: true, Required: true,
			Help: "the figure with its unit and spread", Example: `"92 kg ± 1 kg"`},
		{Section: Entry, Name: "source", Places: InJob, Kind: Choice, Fixed: true, Choices: wordsOf(arrest.Sources()),
			Help: "how the figure is known; without it the input stays open", Example: `"measured"`},
		{Section: Entry, Name: "note", Places: InJob, Kind: Text, Fixed: true,
			Help: "where it was read or how it was measured", Example: `"site scale"`},
	}
}

// polarKeys are those of a velocity that is written as a speed with its
// direction in the plane of x and y.
var polarKeys = []Key{
	{Section: Polar, Name: "speed", Places: InJob, Kind: Quantity, Required: true, Dimension: quantity.Speed, Sourced: true, Sign: NotNegative,
		Usual: Span{0, 20}, Possible: Span{0, 1000},
		Help: "how fast", Example: `"9.5 m/s"`},
	{Section: Polar, Name: "direction", Places: InJob, Kind: Quantity, Required: true, Dimension: quantity.Angle, Sourced: true, Spread: NoWidth, Sign: AnySign,
		Possible: Span{-2 * math.Pi, 2 * math.Pi},
		Help:     "direction of the motion from +x towards +y", Example: `"30 deg"`},
}
