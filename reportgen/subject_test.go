package reportgen

import (
	"encoding/json"
	"regexp"
	"slices"
	"strings"
	"testing"

	"arrestcheck/arrest"
	"arrestcheck/arrest/quantity"
	"arrestcheck/limits"
)

// Jobs without a person: a sack thrown on a chute, a trolley on its buffer, a
// tool on its tether.
const (
	loadTop = "format = \"arrestcheck job 1\"\n[document]\ntitle = \"End of the track\"\n[moving_load]\n"

	sackJob = loadTop + `mass = { value = "65 kg ± 0 kg", source = "measured" }
velocity_before = [ { value = "3 m/s ± 0 m/s", source = "measured" }, { value = "-9 m/s ± 0 m/s", source = "measured" } ]
velocity_after = [ { value = "0 m/s", source = "plan" }, { value = "0 m/s", source = "plan" } ]
time = { value = "0.2 s ± 0 s", source = "measured" }
up = "+y"
`
	trolleyJob = loadTop + `mass = { value = "900 kg ± 0 kg", source = "measured" }
velocity_before = { value = "1.1 m/s ± 0 m/s", source = "measured" }
velocity_after = { value = "0 m/s", source = "plan" }
distance = { value = "0.200 m ± 0 m", source = "measured" }
time = { value = "0.3 s ± 0 s", source = "measured" }
driving_force = { value = "0 N", source = "plan" }
path = "level"
`
	toolJob = `format = "arrestcheck job 1"
[document]
title = "Wrench on its tether"
[tool]
mass = { value = "3.2 kg ± 0 kg", source = "measured" }
[fall]
free_fall = { value = "1.5 m ± 0 m", source = "drawing" }
`
	toolStop = `[stop]
distance = { value = "0.2 m", source = "assumed" }
time = { value = "0.06 s ± 0 s", source = "measured" }
`
	toolRated = `[[rated]]
document = "label of the tether"
total_mass = "1 kg .. 5 kg"
free_fall_at_most = "1.8 m"
peak_force_at_most = "1 kN"
`
	stopLimit = `[[limit]]
id = "post"
quantity = "peak_force"
at_most = "8 kN"
authority = "drawing of the post"
edition = "second"
kind = "structure"
checked_on = "5 May 2025"
`
)

// jobsWithoutPersons call for every statement that a sheet without a person can
// hold, between them.
var jobsWithoutPersons = map[string]string{
	"sack": sackJob + stopLimit, "trolley": trolleyJob + stopLimit, "example": strings.Replace(trolleyJob, "[document]", "example = true\n[document]", 1) + stopLimit,
	"tool": toolJob + toolStop + stopLimit, "rated tool": toolJob + toolRated + stopLimit,
	"tool outside":   strings.Replace(toolJob, "3.2 kg", "6 kg", 1) + toolRated,
	"tool on a path": toolJob + tearAbsorber("0.01 m") + tailRope + stopLimit,
	"stiff tool":     toolJob + tailRope + quarter,
	"stiffness":      toolJob + "[[connector]]\npart = \"webbing\"\nstiffness = { value = \"90 kN/m ± 0 kN/m\", source = \"label\" }\n",
	"bare tool":      toolJob,
}

var (
	// onPersons finds what speaks of persons; roles takes out who decides, and
	// hanging that is not that of a person.
	onPersons = regexp.MustCompile(`(?i)\b(persons?|people|workers?|harness(es)?|rescue[sd]?|hang(s|ing)?|suspen\w+|injur\w+|health|limbs|head|hurt|deadly|body weight|what the body feels|work at height|body bears?|bodies)\b`)
	roles     = strings.NewReplacer("competent or qualified person", "", "qualified person", "", "without hanging or bounce", "", "contains hanging or a bounce", "", "where it hangs", "")
)

// Every text of a sheet without a person is free of persons; those who decide
// are named by their roles.
func TestNoWordOnPersons(t *testing.T) {
	n := 0
	for name, toml := range jobsWithoutPersons {
		s := worked(t, "job.toml", []byte(toml))
		visit := func(text string) {
			n++
			if w := onPersons.FindString(roles.Replace(breakable(text))); w != "" {
				t.Errorf("%s: %q in %q", name, w, text)
			}
		}
		eachText(Build(s, BothUnits), visit)
		for i := range s.Assessment.Findings {
			r, ok := Explain(s, s.Assessment.Findings[i].Limit.ID, BothUnits)
			if !ok {
				t.Errorf("%s: nothing to explain", name)
			}
			eachText(r, visit)
		}
	}
	if n < 500 {
		t.Fatalf("only %d texts seen", n)
	}
}

// A statement that has no other in its place, and is not one of those that only
// a sheet about a person calls for, speaks of no person.
func TestStatementsSpeakOfNoPerson(t *testing.T) {
	onlyPersons := []string{hanging.number, thisLayoutOnly.number, anchorAndLine.number, noRescueEntered.number, ofWarnings[arrest.SeveralPersons].number}
	list := map[string]statement{measureFirst.number: measureFirst, outsideData.number: outsideData, floorsNotPeaks.number: floorsNotPeaks, limitsAreTheUsers.number: limitsAreTheUsers, setOutside.number: setOutside}
	for _, st := range ofWarnings {
		list[st.number] = st
	}
	for number, st := range list {
		if slices.Contains(onlyPersons, number) {
			continue
		}
		for _, sub := range []subject{aTool, aLoad} {
			if w := onPersons.FindString(roles.Replace(sub.about(st).text)); w != "" {
				t.Errorf("%s: %q", number, w)
			}
		}
	}
}

// eachText visits every text of a report.
func eachText(r Report, visit func(string)) {
	block := func(b *Block) {
		visit(b.Text)
		for _, l := range b.Lines {
			visit(l.Label)
			visit(l.Text)
		}
		if b.Table != nil {
			for _, c := range b.Table.Header {
				visit(c)
			}
			for _, row := range b.Table.Rows {
				for _, c := range row.Cells {
					visit(c)
				}
			}
		}
	}
	for i := range r.Head {
		block(&r.Head[i])
	}
	for _, l := range r.Warnings {
		visit(l.Text)
	}
	for i := range r.Sections {
		visit(r.Sections[i].Heading)
		for j := range r.Sections[i].Blocks {
			block(&r.Sections[i].Blocks[j])
		}
	}
}

// Each statement without persons is printed where it belongs, and the one in
// whose place it stands is not.
func TestStatementsWithoutPersons(t *testing.T) {
	for _, c := range []struct{ job, number, not string }{
		{"trolley", "S-45", "S-01"}, {"trolley", "S-46", "S-03"}, {"rated tool", "S-47", "S-06"},
		{"trolley", "S-48", "S-32"}, {"tool", "S-50", "S-09"}, {"sack", "S-51", "S-10"},
		{"stiffness", "S-49", "S-41"}, {"tool", "S-45", "S-04"}, {"tool", "S-46", "S-34"},
	} {
		var printed []string
		for _, l := range Build(worked(t, "job.toml", []byte(jobsWithoutPersons[c.job])), SIUnits).Warnings {
			printed = append(printed, strings.TrimLeft(l.Label, "! "))
		}
		if !slices.Contains(printed, c.number) || slices.Contains(printed, c.not) {
			t.Errorf("%s prints %v, want %s and not %s", c.job, printed, c.number, c.not)
		}
	}
}

// The datum, the lists and the coverage are those of the subject.
func TestSubjects(t *testing.T) {
	for name, sub := range map[string]subject{"trolley": aLoad, "tool": aTool} {
		s := worked(t, "job.toml", []byte(jobsWithoutPersons[name]))
		b := newBuilder(s, SIUnits)
		out := strings.Join(strings.Fields(asText(t, s, SIUnits, TextOptions{})), " ")
		for _, want := range []string{holdsFor[sub], standingAssumptions[sub][1], notChecked[sub][2], motionHeading[sub], stopMeasureAgain[sub]} {
			if !strings.Contains(out, want) {
				t.Errorf("%s: no %q", name, want)
			}
		}
		if b.sub != sub || strings.Contains(out, "Rescue") {
			t.Errorf("%s: subject %d", name, b.sub)
		}
		if has := strings.Contains(out, missingLabel); has != (sub == aTool) {
			t.Errorf("%s: limits that nobody entered: %t", name, has)
		}
	}
}

// 65 kg at (3, -9) m/s to rest: 616.64 N*s at 108.43 degrees, the rows
// imp-2d-mag and imp-2d-dir of testdata/reference/worked.toml. The force over
// 0.2 s holds the weight too, 65*9.80665 = 637.43 N upwards.
func TestVectors(t *testing.T) {
	s := worked(t, "job.toml", []byte(sackJob))
	b := newBuilder(s, SIUnits)
	var got []string
	for _, r := range b.vectorTable().Rows {
		got = append(got, breakable(strings.Join(r.Cells, "|")))
	}
	want := []string{
		"along x|-195 N*s|-975 N", "along y|585 N*s|3.56 kN", "magnitude|617 N*s|3.69 kN", "direction|108 deg|105 deg",
	}
	if strings.Join(got, "\n") != strings.Join(want, "\n") {
		t.Errorf("got\n%s", strings.Join(got, "\n"))
	}
	var doc struct {
		Job     struct{ Subject string }
		Vectors []struct {
			Quantity                   arrest.Quantity
			X, Y, Magnitude, Direction *struct{ Low, Value, High *float64 }
			Z                          *struct{}
		}
	}
	if err := json.Unmarshal([]byte(asJSON(t, s)), &doc); err != nil {
		t.Fatal(err)
	}
	impulse := doc.Vectors[0]
	if doc.Job.Subject != "moving_load" || len(doc.Vectors) != 2 || impulse.Quantity != arrest.Impulse || impulse.Z != nil {
		t.Errorf("%+v", doc)
	}
	if !quantity.Close(*impulse.Magnitude.Value, 616.64, 1e-5) || !quantity.Close(*impulse.Direction.Low*180/3.141592653589793, 108.43, 1e-4) {
		t.Errorf("%v at %v", *impulse.Magnitude.Value, *impulse.Direction.Low)
	}
}

// 900 kg at 1.1 m/s over 0.200 m: 2722.5 N; over 0.3 s 3300 N; the ratio is
// v*t/(2*d) = 0.825.
func TestRoutes(t *testing.T) {
	b := newBuilder(worked(t, "job.toml", []byte(trolleyJob)), SIUnits)
	var got []string
	for _, l := range b.routes() {
		got = append(got, l.Label+" "+breakable(l.Text))
	}
	if want := "over the time 3.30 kN|over the distance 2.72 kN|ratio of the two 0.825"; strings.Join(got, "|") != want {
		t.Errorf("%q", got)
	}
	b = newBuilder(worked(t, "job.toml", []byte(sackJob)), SIUnits)
	list := b.routes()
	if !strings.Contains(list[1].Text, "2 components") || list[2].Text != oneRouteOnly {
		t.Errorf("%+v", list)
	}
}

// Each of the two means of a moving load says by which route it came.
func TestRouteOfMean(t *testing.T) {
	b := newBuilder(worked(t, "job.toml", []byte(trolleyJob)), SIUnits)
	var from []string
	for i := range b.res().Estimates {
		if e := &b.res().Estimates[i]; e.Quantity == arrest.StoppingForce {
			from = append(from, b.from(e))
		}
	}
	if want := "from the entries over the time, M-60: floor, not the peak|from the entries over the distance, M-60: floor, not the peak"; strings.Join(from, "|") != want {
		t.Errorf("%q", from)
	}
}

// Entries of the command line stand on page 1, in the warnings and in the table
// of inputs, with what the file has in their place (S-52).
func TestOverrides(t *testing.T) {
	data := []byte(pieces{rest: overDistance}.toml())
	s := workedWith(t, "job.toml", data, "worker.mass", "105 kg ± 1 kg", "stop.time", "0.4 s")
	r := Build(s, BothUnits)
	var head []string
	for _, b := range r.Head {
		for _, l := range b.Lines {
			if l.Label == setLabel {
				head = append(head, l.Text)
			}
		}
	}
	want := []string{
		`worker.mass = "105 kg ± 1 kg", in place of "100 kg ± 0 kg" in the file`,
		`stop.time = "0.4 s", of which the file says nothing`,
	}
	if !slices.Equal(head, want) {
		t.Errorf("page 1 says %q", head)
	}
	if i := slices.IndexFunc(r.Warnings, func(l Line) bool { return l.Label == "! S-52" }); i < 0 || !strings.Contains(r.Warnings[i].Text, "worker.mass, stop.time") {
		t.Error("S-52 is not printed")
	}
	table := newBuilder(s, SIUnits)
	for _, row := range table.inputTable().Rows {
		if row.Cells[0] == "worker.mass" && row.Cells[1] != "105 kg ± 1 kg\n(set on the command line; \"100 kg ± 0 kg\" in the file)" {
			t.Errorf("inputs: %q", row.Cells[1])
		}
		if row.Cells[0] == "stop.time" && row.Cells[1] != "0.4 s\n(set on the command line)" {
			t.Errorf("inputs: %q", row.Cells[1])
		}
	}
	if !strings.Contains(asJSON(t, s), `"overrides":[{"key":"worker.mass","value":"105 kg ± 1 kg","former":"100 kg ± 0 kg"},{"key":"stop.time","value":"0.4 s","former":null}]`) {
		t.Error("JSON has no overrides")
	}
}

// In a limit from below a ceiling leaves the side open that counts, and a floor
// may be short of it.
func TestReasonsOfLimitsFromBelow(t *testing.T) {
	s := fixture(t)
	b := newBuilder(s, SIUnits)
	f := &s.Assessment.Findings[0]
	for id, want := range map[limits.ReasonID][2]string{
		limits.OnlyCeiling: {"only a ceiling is known, 3.42 kN; it lies beyond the limit, the true figure may not", "only a ceiling is known, 3.42 kN; no lower figure is known, and the true one may be short of the limit"},
		limits.OnlyFloor:   {"only a floor is known, 3.42 kN; the true figure may lie beyond the limit", "only a floor is known, 3.42 kN; it is short of the limit, the true figure need not be"},
	} {
		f.Limit.Bound.Unit = mustUnit("kN")
		for i, sense := range []limits.Sense{limits.AtMost, limits.AtLeast} {
			f.Limit.Sense = sense
			r := limits.Reason{ID: id, Args: []arrest.Arg{arrest.Figure(quantity.Force, 3419.97623, quantity.Nearest)}}
			if got := breakable(b.reason(f, &r)); got != want[i] {
				t.Errorf("%s, %s: %q", id, sense, got)
			}
		}
	}
}
