package jobfile_test

import (
	"os"
	"regexp"
	"slices"
	"strings"
	"testing"
	"testing/fstest"

	"arrestcheck/arrest"
	"arrestcheck/arrest/jobfile"
	"arrestcheck/limits"
)

// readStarter reads a starter; a limit file comes with a job to hold it against.
func readStarter(t *testing.T, kind, text string) *jobfile.File {
	t.Helper()
	if kind == "limits" {
		set, err := jobfile.ReadLimits(kind, []byte(text))
		if err != nil {
			t.Fatalf("%s: %v", kind, err)
		}
		f, err := jobfile.Read("job", []byte(minimalJob+"[stop]\ndistance = \"0.9 m\"\n"), nil)
		if err != nil {
			t.Fatal(err)
		}
		f.Sets, f.Job.Example = []limits.Set{*set}, set.Example
		return f
	}
	f, err := jobfile.Read(kind, []byte(text), nil)
	if err != nil {
		t.Fatalf("%s: %v", kind, err)
	}
	return f
}

// Every starter is read as it stands, is an example, holds its schema, and has
// at least one row, none of which is within; every row says why.
func TestStartersAreReadAndCapped(t *testing.T) {
	if got := jobfile.Starters(); !slices.Equal(got, []string{"fall", "moving-load", "connector-path", "layout", "limits"}) {
		t.Fatalf("%q", got)
	}
	for _, kind := range jobfile.Starters() {
		text := starter(t, kind)
		f := readStarter(t, kind, text)
		if !f.Job.Example {
			t.Errorf("%s is no example", kind)
		}
		for i := range f.Job.Inputs {
			in := &f.Job.Inputs[i]
			if kind != "limits" && in.Role != arrest.OfDocument && in.Role != arrest.OfPlace && in.Source != arrest.FromAssumed {
				t.Errorf("%s: nobody has measured %s, and its source is %q", kind, in.Key, in.Source)
			}
		}
		res := arrest.Evaluate(&f.Job)
		a := limits.Assess(&res, f.Sets, nil)
		if len(a.Findings) == 0 {
			t.Errorf("%s: no row", kind)
		}
		for i := range a.Findings {
			row := &a.Findings[i]
			capped := slices.ContainsFunc(row.Reasons, func(r limits.Reason) bool { return r.ID == limits.ExampleValues })
			if row.Outcome != limits.Undecided || !capped {
				t.Errorf("%s: %s is %s, %v", kind, row.Limit.ID, row.Outcome, row.Reasons)
			}
		}
		schema := "job"
		if kind == "limits" {
			schema = "limits"
		}
		if _, err := held(compiled(t, schema), []byte(text)); err != nil {
			t.Errorf("%s: %v", kind, err)
		}
	}
	if _, err := jobfile.Starter("falls"); err == nil || !strings.Contains(err.Error(), `no starter "falls"; there are: fall, moving-load, connector-path, layout, limits`) {
		t.Errorf("an unknown kind: %v", err)
	}
}

func starter(t *testing.T, kind string) string {
	t.Helper()
	text, err := jobfile.Starter(kind)
	if err != nil {
		t.Fatal(err)
	}
	if again, _ := jobfile.Starter(kind); again != text {
		t.Errorf("%s: two texts of one starter differ", kind)
	}
	return text
}

// The statement above every starter is S-01 of the safety page, word for word.
func TestStartersSayWhoDecides(t *testing.T) {
	page, err := os.ReadFile("../../SAFETY.md")
	if err != nil {
		t.Fatal(err)
	}
	said := regexp.MustCompile(`\*\*S-01\*\* (.*)\n`).FindSubmatch(page)
	if said == nil {
		t.Fatal("SAFETY.md has no S-01")
	}
	for _, kind := range jobfile.Starters() {
		head, _, _ := strings.Cut(starter(t, kind), "\nformat = ")
		words := strings.Join(strings.Fields(strings.ReplaceAll(head, "\n#", " ")), " ")
		if !strings.HasPrefix(words, "# EXAMPLE VALUES.") || !strings.Contains(words, string(said[1])) {
			t.Errorf("%s begins with\n%s", kind, head)
		}
	}
}

func TestStartersAreWellFormed(t *testing.T) {
	for _, kind := range jobfile.Starters() {
		text := starter(t, kind)
		if w := never.FindString(text); w != "" {
			t.Errorf("%s holds %q", kind, w)
		}
		for line := range strings.Lines(text) {
			line = strings.TrimSuffix(line, "\n")
			if strings.HasPrefix(line, "# ") && len([]rune(line)) > 80 || strings.HasSuffix(line, " ") {
				t.Errorf("%s: %q", kind, line)
			}
		}
	}
}

// The keys of a section stand in the order of the table, and all of them are
// there; only a part of the path that is shown again is shortened.
func TestStartersFollowTheTable(t *testing.T) {
	for _, kind := range jobfile.Starters() {
		place := jobfile.InJob
		if kind == "limits" {
			place = jobfile.InLimits
		}
		seen := map[string]bool{}
		for _, part := range strings.Split("\n[]\n"+starter(t, kind), "\n[")[1:] {
			for _, section := range regexp.MustCompile(`(?m)^#\[`).Split(part, -1) {
				heading, body, _ := strings.Cut(section, "]\n")
				name := strings.Trim(heading, "[]")
				var got []string
				for _, m := range regexp.MustCompile(`(?m)^#?([a-z_0-9]+) = `).FindAllStringSubmatch(body, -1) {
					got = append(got, m[1])
				}
				var all []string
				for _, k := range jobfile.Keys() {
					if k.Section == name && k.Places&place != 0 && k.Kind != jobfile.Section && k.Kind != jobfile.Sections {
						all = append(all, k.Name)
					}
				}
				if !seen[name] && !slices.Equal(got, all) {
					t.Errorf("%s: [%s] has %q, the table has %q", kind, name, got, all)
				}
				seen[name] = true
			}
		}
		if len(seen) < 2 {
			t.Errorf("%s: sections %v", kind, seen)
		}
	}
}

// Keys that cannot be used alone as they stand behind their #, with what the
// reader says to them.
var notAlone = map[string]string{
	"limit.at_least":                  "is exceeded above it",
	"limit.at_most":                   "is exceeded below it",
	"layout.anchor_behind_edge":       `edge = "none"`,
	"layout.edge_rated_by":            `edge = "none"`,
	"layout.travel_before_locking":    "cannot stand beside layout.slack",
	"obstacle.height":                 "a level has no underside",
	"obstacle.along_from":             "stands only together",
	"obstacle.along_to":               "stands only together",
	"obstacle.out_from":               "stands only together",
	"obstacle.out_to":                 "stands only together",
	"clearance.deceleration_includes": "it would be counted twice",
	"clearance.margin_includes":       "it would be counted twice",
	"stop.rise_fraction":              "stands only beside",
	"rated.travel_at_most":            "stands only beside",
	"rated.travel_is":                 "stands only beside",
	"rated.part of a fall":            "it names a [[connector]]",
	"moving_load.slope_down":          "exactly one is asked for",
	"moving_load.up":                  "exactly one is asked for",
	"connector.lifeline":              `part = "absorber"`,
	"connector.length":                `part = "absorber"`,
	"connector.stiffness":             `part = "absorber"`,
	"connector.modulus":               `part = "absorber"`,
	"connector.impact_force":          `part = "absorber"`,
	"connector.static_stretch":        `part = "absorber"`,
	"connector.activation_force":      "the travel is asked for",
	"connector.activation_travel":     "stands only beside",
	"connector.travel_before_locking": `part = "absorber"`,
	"connector.braking_force":         `part = "absorber"`,
	"connector.slip_force":            `part = "absorber"`,
	"connector.points":                `part = "absorber"`,
	"connector.unloading":             `part = "absorber"`,
}

// Each key behind a # is read once the # is taken away, but for those that
// need another beside them, which say so.
func TestStarterKeysComeAlive(t *testing.T) {
	folder := fstest.MapFS{"site-limits.toml": {Data: []byte(strings.ReplaceAll(oneLimit, "peak-on-body", "another"))}}
	alive, told := 0, map[string]bool{}
	for _, kind := range jobfile.Starters() {
		for key, text := range uncommented(starter(t, kind)) {
			var err error
			if kind == "limits" {
				_, err = jobfile.ReadLimits(kind, []byte(text))
			} else {
				_, err = jobfile.Read(kind, []byte(text), folder)
			}
			if key == "rated.part" && kind != "connector-path" {
				key = "rated.part of a fall"
			}
			switch says, is := notAlone[key]; {
			case err == nil && !is:
				alive++
			case err == nil:
				t.Errorf("%s: %s is read alone", kind, key)
			case !is || !strings.Contains(err.Error(), says):
				t.Errorf("%s: %s\n%v", kind, key, err)
			default:
				told[key] = true
			}
		}
	}
	if len(told) != len(notAlone) || alive < 60 {
		t.Errorf("%d keys come alive, %d say what they need: %v", alive, len(told), told)
	}
}

var (
	headingLine = regexp.MustCompile(`^(#?)\[+([a-z_]+)\]+$`)
	offLine     = regexp.MustCompile(`^#([a-z_0-9]+) = `)
)

// uncommented returns, for each key behind a #, the text with that # taken
// away, and in a section that is behind a # itself those of the heading and the
// keys it has to have.
func uncommented(text string) map[string]string {
	lines := strings.Split(text, "\n")
	all := map[string]string{}
	section, asleep := "", -1
	for i, line := range lines {
		if m := headingLine.FindStringSubmatch(line); m != nil {
			section, asleep = m[2], -1
			if m[1] != "" {
				asleep = i
			}
		}
		m := offLine.FindStringSubmatch(line)
		if m == nil {
			continue
		}
		with := slices.Clone(lines)
		for j := asleep; asleep >= 0 && j < len(with); j++ {
			if j > asleep && headingLine.MatchString(with[j]) {
				break
			}
			if k := offLine.FindStringSubmatch(with[j]); j == asleep || k != nil && has(section, k[1]) {
				with[j] = with[j][1:]
			}
		}
		with[i] = line[1:]
		all[strings.TrimPrefix(section+"."+m[1], ".")] = strings.Join(with, "\n")
	}
	return all
}

// has reports whether a section has to have a key.
func has(section, name string) bool {
	return slices.ContainsFunc(jobfile.Keys(), func(k jobfile.Key) bool {
		return k.Section == section && k.Name == name && k.Required ||
			k.Section == "" && k.Name == section && len(k.AnyOf) > 0 && k.AnyOf[0] == name
	})
}

// Whoever limits the mean stopping force is told that it is no peak.
func TestStarterOfALoadTellsMeanFromPeak(t *testing.T) {
	text := strings.Join(strings.Fields(strings.ReplaceAll(starter(t, "moving-load"), "\n#", " ")), " ")
	i := strings.Index(text, "stopping_force is a mean over the stop, and the peak lies above it: a limit that is written for a peak belongs to peak_force.")
	if j := strings.Index(text, `quantity = "stopping_force"`); i < 0 || j < i {
		t.Errorf("the remark stands at %d, the key at %d", i, j)
	}
}
