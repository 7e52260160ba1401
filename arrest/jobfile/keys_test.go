package jobfile_test

import (
	"fmt"
	"regexp"
	"slices"
	"strconv"
	"strings"
	"testing"

	"arrestcheck/arrest/jobfile"
	"arrestcheck/arrest/quantity"
)

// A whole file holds every key of the table that can stand in one file.
type whole struct {
	place   jobfile.Places
	stopped string // "worker", "tool" or "moving_load"
	part    string // of the one [[connector]]
	layout  bool   // a layout stands in it, in place of the stop and of parts of the path
	wanted  string // of keys that exclude each other this one
}

// ofLayout are the sections that stand together with the layout only.
var ofLayout = []string{"layout", "position", "obstacle", "clearance"}

var wholeJob = whole{place: jobfile.InJob, stopped: "worker", part: "absorber"}

// holds reports whether a key stands in the file, and leaves out those that
// exclude it.
func (w whole) holds(k *jobfile.Key) bool {
	heading := k.Section
	if heading == "" {
		heading = k.Name
	}
	switch {
	case slices.Contains(ofLayout, heading):
		return w.layout && !slices.Contains(w.instead(), k.Name)
	case w.layout && slices.Contains([]string{"stop", "connector", "model"}, heading), w.layout && k.Path() == "rated.part":
		return false
	case k.Places&w.place == 0, k.Kind == jobfile.Files, k.Path() == "limit.at_least": // the example quantity is limited from above
		return false
	case k.Section == "" && w.stopped == "moving_load":
		return k.Name == w.stopped || len(k.Either) == 0 && !slices.Contains(record("moving_load").Not, k.Name)
	case k.Section == "" && slices.Contains(k.Either, "worker"):
		return k.Name == w.stopped
	case k.Section == "connector":
		return w.ofPart(k.Name)
	case len(k.Either) > 0 && k.Section != "":
		return k.Name == w.chosen(k.Either)
	}
	return true
}

// instead lists the keys of a layout that the one wanted, or a plain layout,
// leaves no room for.
func (w whole) instead() []string {
	out := []string{"travel_before_locking"}
	if w.wanted == "travel_before_locking" {
		out = []string{"slack"}
	}
	if strings.HasSuffix(w.wanted, "_includes") {
		return append(out, "line_stretch", "harness_stretch")
	}
	return append(out, "margin_includes", "deceleration_includes")
}

// chosen is the one of several keys that the file holds.
func (w whole) chosen(names []string) string {
	if slices.Contains(names, w.wanted) {
		return w.wanted
	}
	return names[0]
}

// ofPart reports whether the file's one part has a key.
func (w whole) ofPart(name string) bool {
	decided := false
	for _, v := range record("connector.part").Variants {
		all := append(slices.Concat(v.Needs...), v.May...)
		decided = decided || slices.Contains(all, name)
		if v.Word != w.part || !slices.Contains(all, name) {
			continue
		}
		for _, need := range v.Needs {
			if slices.Contains(need, name) {
				return name == w.chosen(need)
			}
		}
		return true
	}
	return !decided
}

// record returns the record of a key of a job file.
func record(path string) jobfile.Key {
	for _, k := range jobfile.Keys() {
		if k.Path() == path && k.Places&jobfile.InJob != 0 {
			return k
		}
	}
	panic("no key " + path)
}

// pairs writes every key of a section with its example.
func (w whole) pairs(section string) string {
	var b strings.Builder
	for _, k := range jobfile.Keys() {
		if k.Section != section || !w.holds(&k) || k.Kind == jobfile.Section || k.Kind == jobfile.Sections {
			continue
		}
		value := k.Example
		switch k.Path() {
		case "stop.shape":
			value = `"rise then plateau"` // what rise_fraction asks for
		case "connector.part":
			value = strconv.Quote(w.part)
		case "layout.edge":
			value = `"round"` // what has a distance and a document
		case "moving_load.up":
			value = `"+x"` // the one component of the example
		}
		fmt.Fprintf(&b, "%s = %s\n", k.Name, value)
	}
	return b.String()
}

func (w whole) text() string {
	text := w.pairs("")
	for _, k := range jobfile.Keys() {
		switch {
		case k.Section != "" || !w.holds(&k):
		case k.Kind == jobfile.Section:
			text += "[" + k.Name + "]\n" + w.pairs(k.Name)
		case k.Kind == jobfile.Sections:
			text += "[[" + k.Name + "]]\n" + w.pairs(k.Name)
		}
	}
	return text
}

// wholeWith returns a whole file that holds a key.
func wholeWith(k *jobfile.Key, place jobfile.Places) whole {
	w := wholeJob
	w.place, w.wanted = place, k.Name
	for _, stopped := range record("worker").Either {
		if k.Section == stopped || k.Section == "" && k.Name == stopped {
			w.stopped = stopped
		}
	}
	w.layout = slices.Contains(ofLayout, k.Section) || k.Section == "" && slices.Contains(ofLayout, k.Name)
	if k.Section == "connector" {
		for _, v := range record("connector.part").Variants {
			if w.part = v.Word; w.ofPart(k.Name) {
				break
			}
		}
	}
	return w
}

// The examples of the table are what every hint shows: together they must make
// files that are read without a fault, whatever is stopped and whatever part is
// in the path.
func TestExamplesAreRead(t *testing.T) {
	f, err := jobfile.Read("job", []byte(wholeJob.text()), nil)
	if err != nil {
		t.Fatal(err)
	}
	if len(f.Sets) != 1 || len(f.Sets[0].Limits) != 1 || len(f.Job.Ratings) != 1 || f.Job.Ratings[0].Part != 1 || len(f.Elsewhere) != 1 || !f.Job.Example {
		t.Errorf("not all of it was read: %+v", f)
	}
	n := 0
	for _, k := range jobfile.Keys() {
		if k.Places&jobfile.InJob == 0 {
			continue
		}
		n++
		text := wholeWith(&k, jobfile.InJob).text()
		if _, err := jobfile.Read("job", []byte(text), nil); err != nil {
			t.Errorf("with %s\n%v\n%s", k.Path(), err, text)
		}
	}
	for _, v := range record("connector.part").Variants {
		w := wholeJob
		w.part = v.Word
		if _, err := jobfile.Read("job", []byte(w.text()), nil); err != nil {
			t.Errorf("with a part %s\n%v", v.Word, err)
		}
	}
	if n < 130 {
		t.Errorf("%d keys of a job, at least 130 expected", n)
	}
	limits := whole{place: jobfile.InLimits}
	if _, err := jobfile.ReadLimits("limits", []byte(limits.text())); err != nil {
		t.Error(err)
	}
}

// Every key of the table is looked at: a value of a kind that no key has makes
// a fault that names the key.
func TestEveryKeyIsLookedAt(t *testing.T) {
	n := 0
	for _, k := range jobfile.Keys() {
		if k.Section == jobfile.Entry || k.Section == jobfile.Polar || k.Section == "limits" {
			continue // below
		}
		for _, place := range []jobfile.Places{jobfile.InJob, jobfile.InLimits} {
			if k.Places&place == 0 {
				continue
			}
			n++
			key, err := withValue(&k, place, "2025-06-04")
			if err == nil {
				t.Errorf("%s: a date is taken for its value", k.Path())
			} else if !strings.Contains(err.Error(), ": "+key+": ") {
				t.Errorf("%s: no fault names it\n%v", k.Path(), err)
			}
		}
	}
	load := wholeWith(&jobfile.Key{Name: "moving_load"}, jobfile.InJob).text()
	for _, c := range []struct{ name, job, old, new, key string }{
		{"value", wholeJob.text(), `mass = "92 kg ± 1 kg"`, `mass = { value = 2025-06-04 }`, "worker.mass.value"},
		{"source", wholeJob.text(), `mass = "92 kg ± 1 kg"`, `mass = { source = 2025-06-04 }`, "worker.mass.source"},
		{"note", wholeJob.text(), `mass = "92 kg ± 1 kg"`, `mass = { note = 2025-06-04 }`, "worker.mass.note"},
		{"file", wholeJob.text(), "format", "limits = [{ file = 2025-06-04 }]\nformat", "limits[1].file"},
		{"sha256", wholeJob.text(), "format", "limits = [{ sha256 = 2025-06-04 }]\nformat", "limits[1].sha256"},
		{"speed", load, `velocity_before = "1.1 m/s"`, `velocity_before = { speed = 2025-06-04, direction = "0 deg" }`, "moving_load.velocity_before.speed"},
		{"direction", load, `velocity_before = "1.1 m/s"`, `velocity_before = { speed = "1 m/s", direction = 2025-06-04 }`, "moving_load.velocity_before.direction"},
	} {
		n++
		job := strings.Replace(c.job, c.old, c.new, 1)
		if _, err := jobfile.Read("job", []byte(job), nil); job == c.job || err == nil || !strings.Contains(err.Error(), c.key+": ") {
			t.Errorf("%s: %v", c.name, err)
		}
	}
	if n < 150 {
		t.Errorf("%d keys, at least 150 expected", n)
	}
}

// withValue reads a whole file with one key or section replaced, and returns
// the dotted key at which it stands.
func withValue(k *jobfile.Key, place jobfile.Places, value string) (key string, err error) {
	text, line := wholeWith(k, place).text(), k.Name+" = "+value+"\n"
	key = k.Path()
	switch {
	case k.Kind == jobfile.Section || k.Kind == jobfile.Sections || k.Section == "":
		// Out goes the section or line; the key comes first in the file.
		text = regexp.MustCompile(`(?m)^\[+`+k.Name+`\]+\n([^\[].*\n)*`).ReplaceAllString(text, "")
		if k.Section == "" && k.Kind != jobfile.Section && k.Kind != jobfile.Sections {
			text = regexp.MustCompile(`^((?:[^\[\n].*\n)*?)`+k.Name+` = .*\n`).ReplaceAllString(text, "$1")
		}
		text = line + text
	default:
		heading := regexp.MustCompile(`(?m)^\[+` + k.Section + `\]+\n`)
		at := heading.FindStringIndex(text)[1]
		rest := regexp.MustCompile(`(?m)^`+k.Name+` = .*\n`).ReplaceAllString(text[at:], "")
		text = text[:at] + line + rest
		if heading.FindString(text)[1] == '[' {
			key = k.Section + "[1]." + k.Name
		}
	}
	if place == jobfile.InJob {
		_, err = jobfile.Read("f", []byte(text), nil)
	} else {
		_, err = jobfile.ReadLimits("f", []byte(text))
	}
	return key, err
}

func TestKeyTable(t *testing.T) {
	seen := map[string]jobfile.Places{}
	for _, k := range jobfile.Keys() {
		at := k.Section + "." + k.Name
		if seen[at]&k.Places != 0 {
			t.Errorf("%s stands twice in the table", at)
		}
		seen[at] |= k.Places
		if k.Help == "" || strings.HasSuffix(k.Help, ".") || strings.ContainsRune(k.Help, '\n') {
			t.Errorf("%s: help %q is not one line", at, k.Help)
		}
		isSection := k.Kind == jobfile.Section || k.Kind == jobfile.Sections
		if k.Example == "" && !isSection {
			t.Errorf("%s has no example", at)
		}
		if (k.Kind == jobfile.Choice || k.Kind == jobfile.Words) != (len(k.Choices) > 0) {
			t.Errorf("%s: choices %v", at, k.Choices)
		}
		if k.Kind == jobfile.Quantity && (k.Sign == 0 || (k.Dimension == 0) != (k.Section == "limit" && k.Usual == jobfile.Span{} && k.Possible == jobfile.Span{})) {
			t.Errorf("%s: sign %v, dimension %v", at, k.Sign, k.Dimension)
		}
		if k.Usual != (jobfile.Span{}) && k.Kind != jobfile.Quantity && k.Kind != jobfile.Velocity {
			t.Errorf("%s: a usual span for what is no figure", at)
		}
		if k.Unless != "" && len(k.Either) == 0 || len(k.With) > 0 && !slices.Contains(k.With, k.Name) {
			t.Errorf("%s: %+v", at, k)
		}
		if k.MustSource && !k.Sourced || k.Several && k.Kind != jobfile.Section {
			t.Errorf("%s: %+v", at, k)
		}
		for _, v := range k.Variants {
			if !slices.Contains(k.Choices, v.Word) {
				t.Errorf("%s: a variant for %q, which is no choice", at, v.Word)
			}
			for _, name := range append(slices.Concat(v.Needs...), v.May...) {
				record(k.Section + "." + name) // panics where there is none
			}
		}
		if k.Usual != (jobfile.Span{}) && !(k.Possible.Low <= k.Usual.Low && k.Usual.Low < k.Usual.High && k.Usual.High <= k.Possible.High) {
			t.Errorf("%s: usual %v not within possible %v", at, k.Usual, k.Possible)
		}
		if k.Kind == jobfile.Quantity && k.Usual != (jobfile.Span{}) {
			example := strings.Trim(k.Example, `"`)
			if k.MustSource {
				example = strings.Split(k.Example, `"`)[1]
			}
			b, err := quantity.Parse(k.Dimension, example)
			if err != nil || b.Low < k.Usual.Low || b.High > k.Usual.High {
				t.Errorf("%s: example %s is not usual", at, k.Example)
			}
		}
	}
	if got := jobfile.Keys(); !slices.ContainsFunc(got, func(k jobfile.Key) bool { return k.Path() == "worker.mass" }) {
		t.Error("worker.mass is not in the table")
	}
}

// never are words that nothing printed may hold: they reassure.
var never = regexp.MustCompile(`(?i)\b(safe|safely|pass|passed|passes|OK|compliant|approved|adequate|sufficient|acceptable|allowable|permitted|harmless|verified|guaranteed|conservative|met|green)\b|[✓✔☑]`)

func TestNoReassuringWord(t *testing.T) {
	for _, k := range jobfile.Keys() {
		if w := never.FindString(k.Help + " " + k.Example); w != "" {
			t.Errorf("%s: the table holds %q", k.Path(), w)
		}
	}
}
