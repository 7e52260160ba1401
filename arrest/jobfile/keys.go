package jobfile

import (
	"slices"
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
	Velocity                 // a Quantity, a list of one to three of them, or a table of the keys under Polar
	Points                   // a list of pairs of texts, extension and force: [["0 mm", "0 kN"], ["60 mm", "4 kN"]]
	Words                    // a list of words of a closed set, each once
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
	NoWidth                  // one figure, also with ± 0: nothing between two ends is calculated
)

// Sign says which figures of a Quantity can be at all.
type Sign uint8

const (
	Positive    Sign = iota + 1 // above zero
	NotNegative                 // zero or above
	AnySign
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

// A Variant says what stands beside one word of a Choice. A key that some
// variant of the Choice names stands beside no other word.
type Variant struct {
	Word  string
	Needs [][]string // of each list exactly one key has to be there
	May   []string   // may be there besides
}

// A Key is everything the program knows about one key or section of its files.
// Strictness, hints, schema and starter files all come from these records.
type Key struct {
	Section string // "worker"; "" at the top of the file, Entry inside a sourced quantity
	Name    string // "mass"
	Places  Places
	Kind    Kind

	Required bool
	Wanted   bool      // most files have to have it; hints and starter files show it
	Several  bool      // of a Section: may stand several times too, as [[name]]
	AnyOf    []string  // of a section: at least one of these keys has to be there
	Either   []string  // exactly one of these keys has to be there; the key itself is one of them
	Unless   string    // with this key there none of Either has to be
	With     []string  // these keys stand together, all of them or none; the key itself is one of them
	Not      []string  // keys that cannot stand beside it
	Beside   Companion // what has to stand beside the key

	Dimension  quantity.Dimension // of a Quantity or Velocity; 0 where the quantity of the row decides
	Sourced    bool               // may be a table of value, source and note
	MustSource bool               // has to be such a table, with a source in it
	Spread     Spread
	Sign       Sign
	Usual      Span // common practice: outside it a note, no fault
	Possible   Span // of a Quantity, Velocity or Integer; outside it the figure is refused

	Dated    bool      // of a Text: a date, with a year of four digits in it
	Choices  []string  // of a Choice, or of Words
	Variants []Variant // of a Choice that decides over other keys: one for each word, in their order

	Fixed bool // nothing but the file itself says it: an Override is refused

	Help    string // one line
	Example string // the right side as it is typed, `"92 kg ± 1 kg"`
}

// Entry is the Section of the keys of the inline table in which a figure
// stands with its source: mass = { value = "92 kg ± 1 kg", source = "measured" }.
const Entry = "{}"

// Polar is the Section of the keys of the inline table in which a velocity
// stands as a speed with its direction:
// velocity_before = { speed = "9.5 m/s", direction = "-71.6 deg" }.
const Polar = "{speed}"

// Path returns the dotted key, "worker.mass"; the bare name at the top.
func (k *Key) Path() string {
	if k.Section == "" || k.Section == Entry || k.Section == Polar {
		return k.Name
	}
	return k.Section + "." + k.Name
}

// Keys returns the records of all keys and sections in the order in which a
// file is best written. The caller owns the slice.
func Keys() []Key { return slices.Clone(keyRecords()) }

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
