package jobfile

import (
	"slices"
	"strconv"
	"strings"
)

// unknown records a key that does not belong in its section, with the key that
// was probably meant.
func (t *table) unknown(name string) {
	v := t.keys[name]
	text, found := t.page.written(t.key(name), v)
	heading := found == "a section" || found == "a list of sections"
	if heading || found == "text" && len(text) > shown {
		text = ""
	}
	reason, hint := t.meaning(name, heading)
	t.fault(name, text, reason, hint)
}

// meaning says what is wrong with the name of an unknown key.
func (t *table) meaning(name string, heading bool) (reason, hint string) {
	names := make([]string, len(t.group.keys))
	for i, k := range t.group.keys {
		names[i] = k.Name
	}
	if near, ok := sameLetters(name, names); ok {
		return t.spelling(name, near)
	}
	if where := t.page.groups.find(name); len(where) > 0 && !heading && t.group.section != "limits" {
		return t.elsewhere(name, where)
	}
	if other, file := t.otherFile(name); other {
		return "this key belongs in " + file, "move: the line to " + file + ", or take it out"
	}
	if near, ok := nearest(name, names); ok {
		t.meant = append(t.meant, near)
		return "no such " + thing(heading), "write: " + t.renamed(name, near) + "   (if that is what was meant)"
	}
	if heading && t.path == "" {
		return "no such section", "write: one of " + t.page.groups.headings()
	}
	return "no such key here", "write: one of " + strings.Join(names, ", ")
}

func thing(heading bool) string {
	if heading {
		return "section"
	}
	return "key"
}

// spelling is the meaning of a key that differs in case or in its joints only.
func (t *table) spelling(name, near string) (reason, hint string) {
	if t.has(near) {
		return "no such key, and " + t.key(near) + " is written too: which of the two is meant?",
			"take out: one of the two; the key is " + near
	}
	hint = "write: " + t.renamed(name, near)
	t.meant = append(t.meant, near)
	if strings.EqualFold(name, near) {
		return "keys are written in small letters", hint
	}
	return "words in a key are joined with _", hint
}

// elsewhere is the meaning of a key that stands in other sections.
func (t *table) elsewhere(name string, where []string) (reason, hint string) {
	if sourced := t.group.sourced(); sourced != nil && slices.Contains(where, Entry) {
		return "this key belongs beside the value of a figure", "write: " + sourced.Name +
			" = { value = " + sourced.Example + ", " + t.page.groups[Entry].named[name].line() + " }"
	}
	k := t.page.groups[where[0]].named[name]
	if list := t.page.groups[""].named[k.Section]; list != nil && list.Kind == Files {
		return "this key belongs in the list " + list.Name,
			`write: limits = [{ file = "site-limits.toml", sha256 = "..." }]`
	}
	place := t.page.groups.placeOf(where[0])
	for _, section := range where[1:] {
		place += " or " + t.page.groups.placeOf(section)
	}
	return "this key belongs " + place, "move: the line " + place
}

// sourced returns the first key of the section whose figure may be a table.
func (g *group) sourced() *Key {
	for _, k := range g.keys {
		if k.Sourced {
			return k
		}
	}
	return nil
}

// placeOf names a section as the place of a key.
func (all groups) placeOf(section string) string {
	switch section {
	case "":
		return "to the top of the file, before the first section"
	case Entry:
		return "beside the value of a figure"
	case Polar:
		return "in the table of a velocity, beside its direction"
	}
	return "under " + all[""].named[section].line()
}

// otherFile reports whether a key stands in the other kind of file only.
func (t *table) otherFile(name string) (stands bool, file string) {
	other, file := limitGroups(), "a limit file"
	if _, isJob := t.page.groups["worker"]; !isJob {
		other, file = jobGroups(), "a job file"
	}
	return len(other.find(name)) > 0, file
}

// renamed returns what is typed at a wrong name as it would stand at the right one.
func (t *table) renamed(name, right string) string {
	k := t.group.named[right]
	if k.Kind == Section || k.Kind == Sections {
		return k.line()
	}
	text, found := t.page.written(t.key(name), t.keys[name])
	switch {
	case found == "text" && len(text) <= shown:
		return right + " = " + strconv.Quote(text)
	case found != "text" && text != "":
		return right + " = " + text
	}
	return right + " = ..."
}

// shortWords holds what people call a quantity for short, with the words of the
// closed set that can be meant.
var shortWords = map[string][]string{
	"clearance": {"clearance_left", "clearance_needed"}, "anchor": {"anchor_strength_per_person", "anchor_force"},
	"anchorstrength": {"anchor_strength_per_person"}, "peak": {"peak_force"}, "force": {"peak_force"},
	"arrestforce": {"peak_force"}, "arrestingforce": {"peak_force"}, "maximumarrestforce": {"peak_force"},
	"maximumarrestingforce": {"peak_force"}, "maf": {"peak_force"}, "fall": {"free_fall"}, "fallheight": {"free_fall"},
	"falldistance": {"free_fall", "total_fall_distance"}, "totalfall": {"total_fall_distance"},
	"mass": {"total_mass"}, "weight": {"total_mass"}, "capacity": {"total_mass"},
	"deceleration": {"deceleration_distance", "peak_deceleration"}, "distance": {"stopping_distance", "deceleration_distance"},
	"swing": {"swing_drop", "swing_speed"}, "sag": {"line_sag"}, "tension": {"line_tension"},
	"energy": {"fall_energy"}, "speed": {"fall_speed"}, "factor": {"fall_factor"}, "meanforce": {"mean_force_over_distance", "mean_force_over_time"},
}

// shortFor returns the words of a closed set that a short one can stand for,
// quoted.
func shortFor(word string, choices []string) []string {
	var meant []string
	for _, w := range shortWords[letters(word)] {
		if slices.Contains(choices, w) {
			meant = append(meant, strconv.Quote(w))
		}
	}
	return meant
}

// sameLetters finds the name that differs from s in case, or in what joins its
// words, only.
func sameLetters(s string, names []string) (string, bool) {
	s = letters(s)
	for _, name := range names {
		if s == letters(name) {
			return name, true
		}
	}
	return "", false
}

var joints = strings.NewReplacer("_", "", "-", "", " ", "", ".", "")

func letters(s string) string { return joints.Replace(strings.ToLower(s)) }

// nearest finds the name that a slip or two of the fingers turn into s.
func nearest(s string, names []string) (string, bool) {
	s = strings.ToLower(s)
	best, least := "", 3
	for _, name := range names {
		if d := slips(s, name, least); d < least && 3*d <= max(len(name), 3) {
			best, least = name, d
		}
	}
	return best, best != ""
}

// slips counts the letters dropped, added, changed or swapped between two
// words: the edit distance with transpositions. It returns many where there
// are that many or more.
func slips(a, b string, many int) int {
	if len(a)-len(b) >= many || len(b)-len(a) >= many {
		return many
	}
	before := make([]int, len(b)+1) // the row before the last
	last := make([]int, len(b)+1)
	row := make([]int, len(b)+1)
	for j := range last {
		last[j] = j
	}
	for i := 1; i <= len(a); i++ {
		row[0] = i
		for j := 1; j <= len(b); j++ {
			change := 1
			if a[i-1] == b[j-1] {
				change = 0
			}
			row[j] = min(last[j]+1, row[j-1]+1, last[j-1]+change)
			if i > 1 && j > 1 && a[i-1] == b[j-2] && a[i-2] == b[j-1] {
				row[j] = min(row[j], before[j-2]+1)
			}
		}
		before, last, row = last, row, before
	}
	return min(last[len(b)], many)
}
