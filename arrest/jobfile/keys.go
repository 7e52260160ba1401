package jobfile

import (
	"slices"
	"strings"
	"sync"

	"arrestcheck/arrest"
	"arrestcheck/arrest/quantity"
	"arrestcheck/limits"
)

// Kind says what a key holds.
type Kind uint8

const (
	Section  Kind = iota + 1 // [name], written once
	Sections                 // [[name]], written once for each
	Files                    // a list of limit files: texts, or tables of file and sha256
	Quantity                 // text with a unit, "92 kg ± 1 kg"
	Text                     // words, printed as typed
	Choice                   // one word of a closed set
	Integer                  // a whole number without quotes
	Boolean                  // true or false without quotes
)

// Places says in which files a key stands.
type Places uint8

const (
	InJob Places = 1 << iota
	InLimits
)

// Spread says how a Quantity may be written.
type Spread uint8

const (
	AnySpread  Spread = iota // one figure, ± or a range
	NoSpread                 // one figure only
	MustSpread               // a range or ±
)

// Sign says which figures of a Quantity can be at all.
type Sign uint8

const (
	Positive    Sign = iota + 1 // above zero
	NotNegative                 // zero or above
)

// A Span goes from Low to High, both included, in the SI unit of its key. The
// zero Span stands for no rule.
type Span struct{ Low, High float64 }

// none reports whether the span states no rule.
func (s Span) none() bool { return s == Span{} }

// holds reports whether all from low to high lies in the span.
func (s Span) holds(low, high float64) bool { return s.Low <= low && high <= s.High }

// A Companion is a key of the same section that has to stand beside another.
// With a Choice it has to hold that word, and that word asks for the other key
// in return.
type Companion struct{ Name, Choice string }

// A Key is everything the program knows about one key or section of its files.
// Strictness, hints, schema and starter files all come from these records.
type Key struct {
	Section string // "worker"; "" at the top of the file, Entry inside a sourced quantity
	Name    string // "mass"
	Places  Places
	Kind    Kind

	Required bool
	AnyOf    []string  // of a section: at least one of these keys has to be there
	Beside   Companion // what has to stand beside the key

	Dimension quantity.Dimension // of a Quantity; 0 where the quantity of the row decides
	Sourced   bool               // may be a table of value, source and note
	Spread    Spread
	Sign      Sign
	Usual     Span // common practice: outside it a note, no fault
	Possible  Span // of a Quantity or Integer; outside it the figure is refused

	Choices []string // of a Choice

	Help    string // one line
	Example string // the right side as it is typed, `"92 kg ± 1 kg"`
}

// Entry is the Section of the keys of the inline table in which a figure
// stands with its source: mass = { value = "92 kg ± 1 kg", source = "measured" }.
const Entry = "{}"

// Path returns the dotted key, "worker.mass"; the bare name at the top.
func (k *Key) Path() string {
	if k.Section == "" || k.Section == Entry {
		return k.Name
	}
	return k.Section + "." + k.Name
}

// Keys returns the records of all keys and sections in the order in which a
// file is best written. The caller owns the slice.
func Keys() []Key { return slices.Clone(keyRecords()) }

// The words of the format line.
const (
	jobFormat    = "arrestcheck job 1"
	limitsFormat = "arrestcheck limits 1"
)

// keyRecords is the ONE table. Usual and possible spans are common practice,
// no rule of any document: the usual span catches the slip of a decimal, the
// possible span what no fall of a person can be.
var keyRecords = sync.OnceValue(func() []Key {
	return slices.Concat(topKeys, documentKeys, workerKeys, fallKeys, stopKeys,
		ratedKeys(), limitKeys(), elsewhereKeys(), entryKeys())
})

var topKeys = []Key{
	{Name: "format", Places: InJob, Kind: Choice, Required: true, Choices: []string{jobFormat},
		Help: "what the file is, and the version of its form", Example: `"` + jobFormat + `"`},
	{Name: "format", Places: InLimits, Kind: Choice, Required: true, Choices: []string{limitsFormat},
		Help: "what the file is, and the version of its form", Example: `"` + limitsFormat + `"`},
	{Name: "limits", Places: InJob, Kind: Files,
		Help: "limit files in the folder of the job, each with or without the digest it has to have", Example: `["site-limits.toml"]`},
	{Section: "limits", Name: "file", Places: InJob, Kind: Text, Required: true,
		Help: "name of the limit file, in the folder of the job or below it", Example: `"site-limits.toml"`},
	{Section: "limits", Name: "sha256", Places: InJob, Kind: Text,
		Help: "digest of the limit file's bytes, 64 hexadecimal digits: the file is refused when it differs", Example: `"` + strings.Repeat("0123456789abcdef", 4) + `"`},
	{Name: "gravity", Places: InJob, Kind: Quantity, Dimension: quantity.Acceleration, Spread: NoSpread, Sign: Positive,
		Usual: Span{9.76, 9.84}, Possible: Span{9.5, 10.1},
		Help: "acceleration of free fall where the job needs another than the standard 9.80665 m/s2", Example: `"9.80 m/s2"`},
	{Name: "example", Places: InJob | InLimits, Kind: Boolean,
		Help: "true when the figures are examples: the report is stamped and no limit comes out as within", Example: `true`},

	{Name: "title", Places: InLimits, Kind: Text, Required: true,
		Help: "what the limits are for", Example: `"Site rules, river terminal"`},
	{Name: "jurisdiction", Places: InLimits, Kind: Text,
		Help: "where and for what work the limits hold", Example: `"general industry, this site"`},
	{Name: "entered_by", Places: InLimits, Kind: Text,
		Help: "role of whoever typed the limits in", Example: `"safety planner"`},
	{Name: "entered_on", Places: InLimits, Kind: Text,
		Help: "date of the entry, as text", Example: `"2 June 2025"`},
	{Name: "checked_on", Places: InLimits, Kind: Text,
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
}

var workerKeys = []Key{
	{Name: "worker", Places: InJob, Kind: Section, Required: true,
		Help: "who hangs on the system"},
	{Section: "worker", Name: "mass", Places: InJob, Kind: Quantity, Required: true, Dimension: quantity.Mass, Sourced: true, Sign: Positive,
		Usual: Span{50, 140}, Possible: Span{10, 1000},
		Help: "body and clothing; of all persons on the system together", Example: `"92 kg ± 1 kg"`},
	{Section: "worker", Name: "tools", Places: InJob, Kind: Quantity, Required: true, Dimension: quantity.Mass, Sourced: true, Sign: NotNegative,
		Usual: Span{0, 25}, Possible: Span{0, 500},
		Help: "tools, harness and whatever else hangs on the body, of all persons together; may be 0 kg", Example: `"0 kg .. 10 kg"`},
	{Section: "worker", Name: "persons", Places: InJob, Kind: Integer, Possible: Span{1, 20},
		Help: "how many persons hang on one system at once; mass and tools are then those of all of them together", Example: `2`},
}

var fallKeys = []Key{
	{Name: "fall", Places: InJob, Kind: Section, Required: true, AnyOf: []string{"free_fall", "initial_speed"},
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

func ratedKeys() []Key {
	const in = "rated"
	return []Key{
		{Name: in, Places: InJob, Kind: Sections, AnyOf: []string{"peak_force_at_most", "mean_force_at_most", "travel_at_most"},
			Help: "what the document of a device promises, and under which conditions"},
		{Section: in, Name: "document", Places: InJob, Kind: Text, Required: true,
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
		{Name: in, Places: both, Kind: Sections,
			Help: "one limit, as its document states it"},
		{Section: in, Name: "id", Places: both, Kind: Text, Required: true,
			Help: "short name of the limit; no other limit of the job or its files may have it", Example: `"peak-on-body"`},
		{Section: in, Name: "quantity", Places: both, Kind: Choice, Required: true, Choices: limitedQuantities(),
			Help: "what is limited", Example: `"peak_force"`},
		{Section: in, Name: "at_most", Places: both, Kind: Quantity, Spread: NoSpread, Sign: NotNegative,
			Help: "the limit, where the demand must not be above it; in the unit of the document", Example: `"1800 lbf"`},
		{Section: in, Name: "at_least", Places: both, Kind: Quantity, Spread: NoSpread, Sign: NotNegative,
			Help: "the limit, where the demand must not be below it; in the unit of the document", Example: `"0.6 m"`},
		{Section: in, Name: "also_printed", Places: both, Kind: Quantity, Spread: NoSpread, Sign: NotNegative,
			Help: "the same limit as the document prints it in another unit", Example: `"8 kN"`},
		{Section: in, Name: "authority", Places: both, Kind: Text, Required: true,
			Help: "title and clause of the document that sets the limit", Example: `"site rule 7, working at height, clause 3"`},
		{Section: in, Name: "edition", Places: both, Kind: Text, Required: true,
			Help: "edition, or when and where the text was read", Example: `"rev 5, as read on 2 June 2025"`},
		{Section: in, Name: "kind", Places: both, Kind: Choice, Required: true, Choices: wordsOf(limits.Kinds()),
			Help: "what the limit protects; a product test is no limit for a site", Example: `"person"`},
		{Section: in, Name: "applies_when", Places: both, Kind: Text,
			Help: "condition in words; printed, not calculated", Example: `"full body harness"`},
		{Section: in, Name: "any_of", Places: both, Kind: Text,
			Help: "name of a group: of its rows under one authority, one within is enough", Example: `"either"`},
		{Section: in, Name: "total_mass_at_most", Places: both, Kind: Quantity, Dimension: quantity.Mass, Spread: NoSpread, Sign: Positive,
			Possible: Span{1, 1000},
			Help:     "the limit holds up to this mass of person and tools", Example: `"310 lb"`},
		{Section: in, Name: "free_fall_at_most", Places: both, Kind: Quantity, Dimension: quantity.Length, Spread: NoSpread, Sign: NotNegative,
			Possible: Span{0, 100},
			Help:     "the limit holds up to this free fall", Example: `"6 ft"`},
		{Section: in, Name: "persons_at_most", Places: both, Kind: Integer, Possible: Span{1, 20},
			Help: "the limit holds up to this number of persons on the system", Example: `1`},
		{Section: in, Name: "superseded_on", Places: both, Kind: Text,
			Help: "date from which the limit no longer holds; with it the limit never comes out as within", Example: `"1 January 2025"`},
		{Section: in, Name: "checked_on", Places: both, Kind: Text,
			Help: "date on which the figure was last held against the document; in a limit file that of the file counts where this is missing", Example: `"3 June 2025"`},
		{Section: in, Name: "note", Places: both, Kind: Text,
			Help: "anything the reader has to know", Example: `"figure from memory, to be looked up"`},
	}
}

func elsewhereKeys() []Key {
	const in = "elsewhere"
	return []Key{
		{Name: in, Places: InJob, Kind: Sections,
			Help: "a quantity that another document handles"},
		{Section: in, Name: "quantity", Places: InJob, Kind: Choice, Required: true, Choices: limitedQuantities(),
			Help: "what is handled there", Example: `"clearance_left"`},
		{Section: in, Name: "where", Places: InJob, Kind: Text, Required: true,
			Help: "the document that handles it", Example: `"clearance drawing 12 rev B"`},
	}
}

func entryKeys() []Key {
	return []Key{
		{Section: Entry, Name: "value", Places: InJob, Kind: Text, Required: true,
			Help: "the figure with its unit and spread", Example: `"92 kg ± 1 kg"`},
		{Section: Entry, Name: "source", Places: InJob, Kind: Choice, Choices: wordsOf(arrest.Sources()),
			Help: "how the figure is known; without it the input stays open", Example: `"measured"`},
		{Section: Entry, Name: "note", Places: InJob, Kind: Text,
			Help: "where it was read or how it was measured", Example: `"site scale"`},
	}
}

func pulseWords() []string {
	var words []string
	for _, p := range arrest.Pulses() {
		words = append(words, p.Name)
	}
	return words
}

func wordsOf[T ~string](list []T) []string {
	words := make([]string, len(list))
	for i, w := range list {
		words[i] = string(w)
	}
	return words
}

// limitedQuantities returns the ids of the quantities that can be limited.
func limitedQuantities() []string {
	var ids []string
	for _, r := range arrest.Quantities() {
		if _, can := limits.SenseOf(r.ID); can {
			ids = append(ids, string(r.ID))
		}
	}
	return ids
}

// A group is the keys of one section of one file, in the order of the table.
type group struct {
	section string
	keys    []*Key
	named   map[string]*Key
}

// groups holds the sections of one kind of file by name.
type groups map[string]*group

// groupsOf sorts the table by section, once for each kind of file.
var (
	jobGroups   = sync.OnceValue(func() groups { return groupsOf(InJob) })
	limitGroups = sync.OnceValue(func() groups { return groupsOf(InLimits) })
)

func groupsOf(place Places) groups {
	all := groups{}
	records := keyRecords()
	for i := range records {
		k := &records[i]
		if k.Places&place == 0 {
			continue
		}
		g := all[k.Section]
		if g == nil {
			g = &group{section: k.Section, named: map[string]*Key{}}
			all[k.Section] = g
		}
		g.keys = append(g.keys, k)
		g.named[k.Name] = k
	}
	return all
}

// find returns the names of the sections in which a key of this name stands,
// in the order of the table.
func (all groups) find(name string) []string {
	var in []string
	records := keyRecords()
	for i := range records {
		k := &records[i]
		if g := all[k.Section]; k.Name == name && g != nil && g.named[name] == k {
			in = append(in, k.Section)
		}
	}
	return in
}
