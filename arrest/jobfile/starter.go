package jobfile

import (
	"slices"
	"strconv"
	"strings"

	"github.com/BurntSushi/toml"

	"arrestcheck/arrest"
	"arrestcheck/limits"
)

// A starter is a file to begin with: which sections of the table it shows.
type starter struct {
	kind  string
	title string // what the file is for, in its first line
	place Places
	shown []shownSection
}

// A shownSection is one section of a starter file, with the table's examples.
type shownSection struct {
	name    string
	off     bool              // may be left out: all of it stands behind #
	brief   bool              // shown before: without help, and without what may be left out
	instead map[string]string // right sides in place of the examples
	remark  map[string]string // what is said of a key beside its help
	also    []string          // keys that are written although they may be left out
}

var starters = []starter{
	{"fall", "job file for one fall and its stop", InJob, []shownSection{
		{name: "document"}, {name: "worker"}, {name: "fall"}, {name: "stop"}, {name: "rated"}, {name: "limit"},
		{name: "elsewhere", off: true},
	}},
	{"moving-load", "job file for a moving load and its stop", InJob, []shownSection{
		{name: "document", instead: map[string]string{
			"title": `"Trolley on its end stop"`, "purpose": `"choice of the bumper"`, "system": `"two bumpers at the end of the track"`}},
		{name: "moving_load", also: []string{"driving_force"}},
		{name: "limit", remark: map[string]string{"quantity": meanRemark}, instead: map[string]string{
			"id": `"end-stop"`, "quantity": `"stopping_force"`, "at_most": `"6 kN"`, "also_printed": `"1350 lbf"`,
			"kind": `"structure"`, "authority": `"drawing of the end stop, note 4"`, "applies_when": `"both bumpers in place"`}},
		{name: "elsewhere", off: true, instead: map[string]string{
			"quantity": `"energy_taken"`, "where": `"data sheet of the bumper"`}},
	}},
	{"connector-path", "job file for one fall, its stop worked out from the parts between anchor and body", InJob, []shownSection{
		{name: "document"}, {name: "worker"}, {name: "fall"},
		{name: "connector", also: []string{"name"}},
		{name: "connector", brief: true, instead: map[string]string{"part": `"webbing"`, "stiffness": `"60 kN/m"`}},
		{name: "connector", brief: true, instead: map[string]string{"part": `"harness and body"`, "stiffness": `"100 kN/m"`}},
		{name: "model"}, {name: "limit"},
		{name: "rated", off: true}, {name: "elsewhere", off: true},
	}},
	{"layout", "job file for one fall, worked out from where the anchor is, with the room it needs below", InJob, []shownSection{
		{name: "document", instead: map[string]string{"purpose": `"choice of the anchor"`}},
		{name: "worker"}, {name: "fall", off: true},
		{name: "layout", also: []string{"d_ring_to_feet", "half_width"}}, {name: "position"}, {name: "obstacle"},
		{name: "clearance", also: []string{"deceleration_distance", "line_stretch", "harness_stretch", "anchor_give", "margin"}},
		{name: "limit", instead: map[string]string{
			"id": `"room-below"`, "quantity": `"clearance_left"`, "at_least": `"0.3 m"`, "also_printed": `"1 ft"`, "applies_when": `"full body harness, nobody below"`}},
		{name: "rated", off: true},
		{name: "elsewhere", off: true, instead: map[string]string{
			"quantity": `"anchor_strength_per_person"`, "where": `"anchor register, clamp 7"`}},
	}},
	{"limits", "limit file for one document or site", InLimits, []shownSection{{name: "limit"}}},
}

// Starters returns the kinds of starter files, in print order.
func Starters() []string {
	var kinds []string
	for i := range starters {
		kinds = append(kinds, starters[i].kind)
	}
	return kinds
}

// Starter returns a commented file to begin with, of a kind of Starters: every
// key of its sections in the order of the table of Keys, with help and example,
// what may be left out behind a #. It says that its values are examples, so
// that no limit comes out as within before its user has said otherwise, and is
// read without a fault as it stands. Its bytes are always the same.
//
// The error is about the kind.
func Starter(kind string) (text string, err error) {
	i := slices.IndexFunc(starters, func(s starter) bool { return s.kind == kind })
	if i < 0 {
		return "", unknownKind("starter", kind, Starters())
	}
	s := &starters[i]
	all := jobGroups()
	if s.place == InLimits {
		all = limitGroups()
	}
	w := &starterWriter{}
	w.head(s.title, all)
	w.keys(all[""], &shownSection{also: []string{"example"}})
	for i := range s.shown {
		w.section(all, &s.shown[i])
	}
	return w.String(), nil
}

// decides is S-01 of the numbered statements, word for word.
const decides = "This sheet is arithmetic on the figures that were entered. It does not decide whether anyone may work at height. " +
	"That is for the competent or qualified person in charge, for a licensed engineer where the law asks for one, and for the local code."

const (
	stamp = "Every figure and word in it is an example. Put in your own, and take out the line example = true last: " +
		"as long as it stands, the report says EXAMPLE VALUES and no limit comes out as within."
	meanRemark = "stopping_force is a mean over the stop, and the peak lies above it: a limit that is written for a peak belongs to peak_force."
	howToRead  = "A line with # and a space explains the key below it. A line with # and no space is a key that may be left out: take the # away to use it."
	sources    = "A figure may stand with its source and a note, { value = ..., source = ..., note = ... }:"
)

// width is the greatest width of a line of comment.
const width = 80

// A starterWriter writes a starter file.
type starterWriter struct{ strings.Builder }

// head writes what stands above the keys.
func (w *starterWriter) head(title string, all groups) {
	w.comment("EXAMPLE VALUES. This is the beginning of a " + title + ". " + stamp)
	w.comment("")
	w.comment(decides)
	w.comment("")
	w.comment(howToRead)
	entry := all[Entry]
	if entry == nil {
		return
	}
	w.comment("")
	w.comment(sources)
	for _, k := range entry.keys {
		help := k.Help
		if len(k.Choices) > 0 {
			help += "; one of " + strings.Join(k.Choices, ", ")
		}
		w.comment("- " + k.Name + ": " + help)
	}
}

// comment writes words as comment, in lines of the width.
func (w *starterWriter) comment(words string) {
	line := "#"
	for word := range strings.FieldsSeq(words) {
		if len([]rune(line))+1+len([]rune(word)) > width && line != "#" {
			w.WriteString(line + "\n")
			line = "#"
		}
		line += " " + word
	}
	w.WriteString(line + "\n")
}

// section writes the heading of a section and its keys.
func (w *starterWriter) section(all groups, s *shownSection) {
	heading := all[""].named[s.name]
	w.WriteString("\n")
	if !s.brief {
		w.comment(heading.Help)
	}
	w.line(heading.line(), s.off)
	w.keys(all[s.name], s)
}

// line writes a key or heading, behind a # where it is off.
func (w *starterWriter) line(text string, off bool) {
	if off {
		w.WriteString("#")
	}
	w.WriteString(text + "\n")
}

// keys writes the keys of a section, at the top those of the file itself.
func (w *starterWriter) keys(g *group, s *shownSection) {
	heading := jobGroups()[""].named[s.name]
	on := s.needed(g, heading)
	for _, k := range g.keys {
		switch off := s.off || !slices.Contains(on, k.Name); {
		case k.Kind == Section || k.Kind == Sections || s.brief && off:
		case s.brief:
			w.line(s.typed(k), false)
		default:
			w.WriteString("\n")
			w.comment(g.explained(k))
			if words, is := s.remark[k.Name]; is {
				w.comment(words)
			}
			w.line(s.typed(k), off)
		}
	}
}

// explained is the help of a key with the words it can hold, and what it stands
// beside.
func (g *group) explained(k *Key) string {
	help := k.Help
	if k.Kind == Words {
		help += "; any of: " + strings.Join(k.Choices, ", ")
	} else if len(k.Choices) > 1 {
		help += "; one of: " + strings.Join(k.Choices, ", ")
	}
	if words := g.wordsFor(k); len(words) > 0 {
		help += "; with: " + strings.Join(words, ", ")
	}
	if c := k.Beside; c.Choice != "" {
		help += "; only beside " + c.Name + " = " + strconv.Quote(c.Choice)
	} else if c.Name != "" {
		help += "; only beside " + c.Name
	}
	if len(k.Either) > 0 {
		help += "; exactly one of: " + strings.Join(k.Either, ", ")
	}
	return help
}

// wordsFor returns the words of a choice of the section beside which a key can
// stand, where it is not all of them.
func (g *group) wordsFor(k *Key) []string {
	var words []string
	for _, choice := range g.keys {
		for i := range choice.Variants {
			if v := &choice.Variants[i]; slices.Contains(v.names(), k.Name) {
				words = append(words, v.Word)
			}
		}
	}
	return words
}

// right returns what stands right of the =, as the section shows it.
func (s *shownSection) right(k *Key) string {
	if other, is := s.instead[k.Name]; is {
		return other
	}
	return k.Example
}

// typed returns a key with its example, as an assumption where a source belongs
// to it: nobody has measured an example.
func (s *shownSection) typed(k *Key) string {
	right := s.right(k)
	if k.Sourced {
		if value := figureOf(k, right); value != "" {
			right = "{ value = " + strconv.Quote(value) + ", source = " + strconv.Quote(string(arrest.FromAssumed)) + " }"
		}
	}
	return k.Name + " = " + right
}

// figureOf returns the figure of a right side that is a text, or a table of
// value, source and note; empty for lists.
func figureOf(k *Key, right string) string {
	var line struct{ X any }
	if _, err := toml.Decode("x = "+right, &line); err != nil {
		panic("jobfile: starter of " + k.Path() + ": " + err.Error())
	}
	switch x := line.X.(type) {
	case string:
		return x
	case map[string]any:
		value, _ := x["value"].(string)
		return value
	}
	return ""
}

// needed returns the keys that are written without a #: those that all or most
// files have to have, the
// first of those of which one has to be there, what stands beside the word that
// is shown, and the side of a limit that its quantity asks for.
func (s *shownSection) needed(g *group, heading *Key) []string {
	on := slices.Clone(s.also)
	if heading != nil && len(heading.AnyOf) > 0 {
		on = append(on, heading.AnyOf[0])
	}
	for _, k := range g.keys {
		word := strings.Trim(s.right(k), `"`)
		switch {
		case k.Required || k.Wanted:
			on = append(on, k.Name)
		case len(k.Either) > 0 && s.name != "":
			on = append(on, k.Either[0])
		}
		for i := range k.Variants {
			if v := &k.Variants[i]; v.Word == word {
				for _, names := range v.Needs {
					on = append(on, names[0])
				}
			}
		}
		if k.Name == "quantity" {
			sense, _ := limits.SenseOf(arrest.Quantity(word))
			on = append(on, string(sense))
		}
	}
	return on
}
