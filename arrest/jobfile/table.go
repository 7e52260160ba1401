package jobfile

import (
	"fmt"
	"slices"
	"strconv"
	"strings"
	"time"
)

// A table is one section, or one inline table, as decoded. Its methods take
// the keys out and record what is wrong with them.
type table struct {
	page  *page
	path  string // dotted key, "rated[2]"; "" at the top
	group *group
	keys  map[string]any

	meant   []string // keys that a misspelt one probably stands for: not missing too
	useless []string // keys that the word of a Choice has no use for: told already
}

// open begins with a section and records the keys that do not belong in it.
func (pg *page) open(section, path string, keys map[string]any) *table {
	t := &table{page: pg, path: path, group: pg.groups[section], keys: keys}
	var strange []string
	for name := range keys {
		if _, known := t.group.named[name]; !known {
			strange = append(strange, name)
		}
	}
	slices.Sort(strange)
	for _, name := range strange {
		t.unknown(name)
	}
	return t
}

// key returns the dotted key of a name in the table.
func (t *table) key(name string) string { return join(t.path, name) }

// fault records a fault of a key that is written in the table.
func (t *table) fault(name, text, reason, hint string) {
	t.page.fault(t.key(name), t.key(name), text, reason, hint)
}

// has reports whether a key is written.
func (t *table) has(name string) bool {
	_, ok := t.keys[name]
	return ok
}

// take returns the value of a key and its record; ok is false where the key is
// not written, which is a fault where it is required.
func (t *table) take(name string) (v any, k *Key, ok bool) {
	k = t.group.named[name]
	v, ok = t.keys[name]
	if !ok && k.Required {
		t.missing(k)
	}
	return v, k, ok
}

func (t *table) missing(k *Key) {
	if slices.Contains(t.meant, k.Name) {
		return
	}
	if k.Kind == Section {
		t.page.fault("", "["+k.Name+"]", "", "the section is missing", t.page.groups.sectionHint(k))
		return
	}
	t.page.fault(t.path, t.key(k.Name), "", "the key is missing: "+k.Help, k.hint())
}

// text returns words, empty where none are written.
func (t *table) text(name string) string {
	v, k, ok := t.take(name)
	if !ok {
		return ""
	}
	s, isText := v.(string)
	switch {
	case !isText:
		t.wrongKind(k, v)
	case strings.TrimSpace(s) == "":
		hint := k.hint()
		if !k.Required {
			hint = "take out: " + t.key(name) + or + "write: what is so here, in the form of " + k.line()
		}
		t.fault(name, "", "nothing is written in it: "+k.Help, hint)
		return ""
	case k.Dated && !holdsYear(s):
		t.fault(name, s, "this is no date: it holds no year of four digits",
			"take out: "+t.key(name)+", "+k.undated()+or+"write: the day, with its year, in the form of "+k.line())
		return ""
	}
	return s
}

// undated says when a date is left out.
func (k *Key) undated() string {
	if k.Name == "superseded_on" {
		return "as long as the limit holds"
	}
	return "until somebody has checked"
}

// choice returns one word of the closed set, empty where none is written or it
// is refused.
func (t *table) choice(name string) string {
	v, k, ok := t.take(name)
	if !ok {
		return ""
	}
	s, isText := v.(string)
	switch {
	case !isText:
		t.wrongKind(k, v)
	case slices.Contains(k.Choices, s):
		return s
	default:
		t.unknownWord(k, s)
	}
	return ""
}

// unknownWord records a word that is not in the closed set of its key.
func (t *table) unknownWord(k *Key, word string) {
	hint := "write: one of " + listed(k.Choices)
	if near, ok := nearest(word, k.Choices); ok {
		hint = "write: " + k.Name + " = " + strconv.Quote(near)
	} else if meant := shortFor(word, k.Choices); len(meant) > 0 {
		hint = "did you mean: " + k.Name + " = " + enumerate(meant, " or ") + "?"
	} else if len(k.Choices) == 1 {
		hint = k.hint()
	}
	t.fault(k.Name, word, "no such word here", hint)
}

// listed joins the words of a closed set, with line breaks where they are many.
func listed(words []string) string {
	var b strings.Builder
	width := 0
	for i, w := range words {
		switch {
		case i > 0 && width > 70:
			b.WriteString(",\n       ")
			width = 0
		case i > 0:
			b.WriteString(", ")
		}
		b.WriteString(strconv.Quote(w))
		width += len(w) + 4
	}
	return b.String()
}

// words returns the words of a list, none where it is not written. A word that
// is refused, or stands twice, is left out.
func (t *table) words(name string) []string {
	v, k, ok := t.take(name)
	if !ok {
		return nil
	}
	list, isList := v.([]any)
	switch {
	case !isList:
		t.wrongKind(k, v)
		return nil
	case len(list) == 0:
		t.fault(name, "", "no word stands in the list", k.hint()+or+"take out "+t.key(name))
	}
	var words []string
	for i, v := range list {
		at := spot{key: element(t.key(name), i)}
		s, isText := v.(string)
		switch {
		case !isText:
			t.page.wrongKind(at, &Key{Kind: Text, Name: k.Name, Example: strconv.Quote(k.Choices[0])}, v)
		case !slices.Contains(k.Choices, s):
			t.unknownElement(k, at, s)
		case slices.Contains(words, s):
			t.page.fault(at.key, at.key, s, "the word stands twice in the list", "take out: one of the two")
		default:
			words = append(words, s)
		}
	}
	return words
}

// unknownElement records a word of a list that is not in the closed set of its
// key.
func (t *table) unknownElement(k *Key, at spot, word string) {
	hint := "write: one of " + listed(k.Choices)
	near, ok := sameLetters(word, k.Choices)
	if !ok {
		near, ok = nearest(word, k.Choices)
	}
	if ok {
		hint = at.write(near)
	}
	t.page.fault(at.key, at.key, word, "no such word here", hint)
}

// boolean returns true or false, false where nothing is written.
func (t *table) boolean(name string) bool {
	v, k, ok := t.take(name)
	if !ok {
		return false
	}
	b, isBool := v.(bool)
	if !isBool {
		t.wrongKind(k, v)
	}
	return b
}

// integer returns a whole number, 0 where none is written or it is refused.
func (t *table) integer(name string) int {
	v, k, ok := t.take(name)
	if !ok {
		return 0
	}
	n, isInt := v.(int64)
	switch {
	case !isInt:
		t.wrongKind(k, v)
	case !k.Possible.holds(float64(n), float64(n)):
		t.fault(name, strconv.FormatInt(n, 10),
			fmt.Sprintf("a whole number from %g to %g is asked for", k.Possible.Low, k.Possible.High), k.hint())
	default:
		return int(n)
	}
	return 0
}

// section returns a [section]; nil where it is not written or refused.
func (t *table) section(name string) *table {
	v, k, ok := t.take(name)
	if !ok {
		return nil
	}
	keys, isTable := v.(map[string]any)
	if !isTable {
		t.wrongKind(k, v)
		return nil
	}
	s := t.page.open(name, name, keys)
	s.whole(k)
	return s
}

// sections returns every [[section]] of a name, and the one [section] where
// both ways are open.
func (t *table) sections(name string) []*table {
	v, k, ok := t.take(name)
	if !ok {
		return nil
	}
	list, isList := v.([]map[string]any)
	if _, isTable := v.(map[string]any); isTable && k.Several {
		return []*table{t.section(name)}
	}
	if !isList {
		t.wrongKind(k, v)
		return nil
	}
	all := make([]*table, len(list))
	for i, keys := range list {
		all[i] = t.page.open(name, element(name, i), keys)
		all[i].whole(k)
	}
	return all
}

// whole records what is wrong with the keys of a section together: k is the
// record of the section.
func (s *table) whole(k *Key) {
	s.anyOf(k)
	s.together()
}

// wrongKind records a value that is not of the kind of its key.
func (t *table) wrongKind(k *Key, v any) { t.page.wrongKind(spot{t.key(k.Name), k.Name}, k, v) }

func (pg *page) wrongKind(at spot, k *Key, v any) {
	text, found := pg.written(at.key, v)
	reason := "this is " + found + "; " + k.asked() + " is asked for"
	hint := at.hint(k)
	switch {
	case k.Kind == Sections && (found == "a section" || found == "a list"):
		reason = "this may stand several times, each with a heading of its own"
		hint = "write: [[" + k.Name + "]]"
	case k.Kind == Section && found == "a list of sections":
		reason = "this stands once in a file"
	case found == "a date" && (k.Kind == Text || k.Kind == Choice):
		reason = "a date is written as text, in double quotes"
		hint = at.write(text)
	case found == "a number" && (k.Kind == Text || k.Kind == Choice):
		reason = "words are asked for, in double quotes"
		if k.Kind == Text {
			hint = at.write(text)
		}
	}
	pg.fault(at.key, at.key, text, reason, hint)
}

// written returns a value as it is written, where that is short, and what it
// is in words.
func (pg *page) written(key string, v any) (text, found string) {
	if pg.marks == nil {
		pg.marks = scan(pg.data)
	}
	text = pg.marks[key].text
	switch v := v.(type) {
	case string:
		return v, "text"
	case bool:
		return text, "true or false"
	case int64, float64:
		return text, "a number"
	case time.Time:
		return text, "a date"
	case map[string]any:
		return "", "a section"
	case []map[string]any:
		return "", "a list of sections"
	}
	return "", "a list"
}

// asked says in words what a key asks for.
func (k *Key) asked() string {
	switch k.Kind {
	case Section, Sections:
		return "a section"
	case Files:
		return "a list of file names in square brackets"
	case Quantity:
		return "text with a unit"
	case Velocity:
		return "text with a unit, a list of one to three of them, or a table of speed and direction"
	case Points:
		return "a list of pairs of extension and force"
	case Words:
		return "a list of words in square brackets"
	case Integer:
		return "a whole number without quotes"
	case Boolean:
		return "true or false, without quotes,"
	}
	return "text in double quotes"
}

// line returns the key as it is typed with its example.
func (k *Key) line() string {
	switch k.Kind {
	case Section:
		return "[" + k.Name + "]"
	case Sections:
		return "[[" + k.Name + "]]"
	}
	return k.Name + " = " + k.Example
}

// or stands between two next actions.
const or = "\n   or: "

// lines returns the key as it is typed, with each word it can hold.
func (k *Key) lines() string {
	if k.Kind != Choice {
		return k.line()
	}
	lines := make([]string, len(k.Choices))
	for i, w := range k.Choices {
		lines[i] = k.Name + " = " + strconv.Quote(w)
	}
	return strings.Join(lines, or)
}

// hint returns the next action for a key that is missing or wrong.
func (k *Key) hint() string { return "write: " + k.line() }

// sectionHint returns a section with all the keys it has to have, or has in most
// files.
func (all groups) sectionHint(k *Key) string {
	hint := k.hint()
	g := all[k.Name]
	for _, in := range g.keys {
		if in.Required || in.Wanted {
			hint += "\n       " + in.line()
		}
	}
	if len(k.AnyOf) > 0 {
		hint += "\n       " + g.named[k.AnyOf[0]].line()
	}
	return hint
}
