package jobfile_test

import (
	"fmt"
	"regexp"
	"slices"
	"strings"
	"testing"

	"arrestcheck/arrest/jobfile"
	"arrestcheck/arrest/quantity"
)

// pairs writes every key of a section with its example, but for those that
// exclude each other.
func pairs(keys []jobfile.Key, place jobfile.Places, section string) string {
	var b strings.Builder
	for _, k := range keys {
		if k.Section != section || k.Places&place == 0 || k.Kind == jobfile.Section || k.Kind == jobfile.Sections || k.Kind == jobfile.Files {
			continue
		}
		if k.Path() == "limit.at_least" {
			continue // the example quantity is limited from above
		}
		value := k.Example
		if k.Path() == "stop.shape" {
			value = `"rise then plateau"` // what rise_fraction asks for
		}
		fmt.Fprintf(&b, "%s = %s\n", k.Name, value)
	}
	return b.String()
}

// wholeFile writes a file that holds every key of the table.
func wholeFile(place jobfile.Places) string {
	keys := jobfile.Keys()
	text := pairs(keys, place, "")
	for _, k := range keys {
		if k.Places&place == 0 {
			continue
		}
		switch k.Kind {
		case jobfile.Section:
			text += "[" + k.Name + "]\n" + pairs(keys, place, k.Name)
		case jobfile.Sections:
			text += "[[" + k.Name + "]]\n" + pairs(keys, place, k.Name)
		}
	}
	return text
}

// The examples of the table are what every hint shows: together they must make
// files that are read without a fault.
func TestExamplesAreRead(t *testing.T) {
	f, err := jobfile.Read("job", []byte(wholeFile(jobfile.InJob)), nil)
	if err != nil {
		t.Fatal(err)
	}
	if len(f.Sets) != 1 || len(f.Sets[0].Limits) != 1 || len(f.Job.Ratings) != 1 || len(f.Elsewhere) != 1 || !f.Job.Example {
		t.Errorf("not all of it was read: %+v", f)
	}
	if _, err := jobfile.ReadLimits("limits", []byte(wholeFile(jobfile.InLimits))); err != nil {
		t.Error(err)
	}
}

// Every key of the table is looked at: a value of a kind that no key has makes
// a fault that names the key.
func TestEveryKeyIsLookedAt(t *testing.T) {
	n := 0
	for _, k := range jobfile.Keys() {
		if k.Section == jobfile.Entry || k.Section == "limits" {
			continue // below
		}
		for _, place := range []jobfile.Places{jobfile.InJob, jobfile.InLimits} {
			if k.Places&place == 0 {
				continue
			}
			n++
			key, err := withValue(k, place, "2025-06-04")
			if err == nil {
				t.Errorf("%s: a date is taken for its value", k.Path())
			} else if !strings.Contains(err.Error(), ": "+key+": ") {
				t.Errorf("%s: no fault names it\n%v", k.Path(), err)
			}
		}
	}
	for _, name := range []string{"value", "source", "note"} {
		n++
		job := strings.Replace(wholeFile(jobfile.InJob), `mass = "92 kg ± 1 kg"`, `mass = { `+name+` = 2025-06-04 }`, 1)
		if _, err := jobfile.Read("job", []byte(job), nil); err == nil || !strings.Contains(err.Error(), "worker.mass."+name+": ") {
			t.Errorf("%s in a figure: %v", name, err)
		}
	}
	for _, name := range []string{"file", "sha256"} {
		n++
		if _, err := jobfile.Read("job", []byte("limits = [{ "+name+" = 2025-06-04 }]\n"+wholeFile(jobfile.InJob)), nil); err == nil || !strings.Contains(err.Error(), "limits[1]."+name+": ") {
			t.Errorf("%s in the list of limit files: %v", name, err)
		}
	}
	if n < 80 {
		t.Errorf("%d keys, at least 80 expected", n)
	}
}

// withValue reads a whole file with one key or section replaced, and returns
// the dotted key at which it stands.
func withValue(k jobfile.Key, place jobfile.Places, value string) (key string, err error) {
	text, line := wholeFile(place), k.Name+" = "+value+"\n"
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
		if (k.Kind == jobfile.Choice) != (len(k.Choices) > 0) {
			t.Errorf("%s: choices %v", at, k.Choices)
		}
		if k.Kind == jobfile.Quantity && (k.Sign == 0 || (k.Dimension == 0) != (k.Section == "limit" && k.Usual == jobfile.Span{} && k.Possible == jobfile.Span{})) {
			t.Errorf("%s: sign %v, dimension %v", at, k.Sign, k.Dimension)
		}
		if k.Usual != (jobfile.Span{}) && !(k.Possible.Low <= k.Usual.Low && k.Usual.Low < k.Usual.High && k.Usual.High <= k.Possible.High) {
			t.Errorf("%s: usual %v not within possible %v", at, k.Usual, k.Possible)
		}
		if k.Kind == jobfile.Quantity && k.Usual != (jobfile.Span{}) {
			b, err := quantity.Parse(k.Dimension, strings.Trim(k.Example, `"`))
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
