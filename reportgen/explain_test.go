package reportgen

import (
	"slices"
	"strings"
	"testing"

	"arrestcheck/arrest"
	"arrestcheck/limits"
)

// Each reason has a way out and a place in the order; no place is given twice.
func TestEveryReasonIsExplained(t *testing.T) {
	ids := constants(t, "../limits", "ReasonID")
	for _, id := range ids {
		id := limits.ReasonID(id)
		p, ok := settledWhen[id]
		if !ok || !strings.HasSuffix(p.text, ".") {
			t.Errorf("%s: no way out: %q", id, p.text)
		}
		usesAll(t, string(id), p, len(p.args))
		if n := len(slices.DeleteFunc(slices.Clone(byImportance), func(x limits.ReasonID) bool { return x != id })); n != 1 {
			t.Errorf("%s stands %d times in the order", id, n)
		}
	}
	if len(byImportance) != len(ids) || len(settledWhen) != len(ids) {
		t.Errorf("%d ids, %d in the order, %d with a way out", len(ids), len(byImportance), len(settledWhen))
	}
	for _, o := range limits.Outcomes() {
		if explainLead[o] == "" {
			t.Errorf("no lead for %s", o)
		}
	}
}

func explained(t *testing.T, s *Sheet, limit string) string {
	t.Helper()
	r, ok := Explain(s, limit, SIUnits)
	if !ok {
		t.Fatal("no limit ", limit)
	}
	var all []string
	eachText(r, func(text string) { all = append(all, breakable(text)) })
	return strings.Join(all, "\n")
}

// What is missing is named: the tolerance and source of an input, the rating,
// the allowance, the date of the check.
func TestExplain(t *testing.T) {
	for name, c := range map[string]struct {
		rest string
		want []string
	}{
		"floor": {overDistance + peakLimit, []string{
			"Only a floor is known, 2.63 kN; the true figure may lie beyond the limit. A floor never settles this. Enter from its document a rating with peak_force_at_most",
		}},
		"open input": {strings.Replace(overDistance, "measured", "label", 1) + strings.Replace(peakLimit, "peak_force", "mean_force_over_distance", 1), []string{
			"To settle it enter it from a source that settles it (measured).",
			"stop.distance\n1.07 m ± 0 m\nopen (label): its source does not settle it\nenter it from a source that settles it (measured)",
		}},
		"no tolerance": {"[stop]\ndistance = { value = \"1.07 m\", source = \"measured\" }\n" + strings.Replace(peakLimit, "peak_force", "mean_force_over_distance", 1), []string{
			"keep its source (measured), and with a tolerance (a range, or a ± that may be 0)",
		}},
		"no allowance": {tailRope + tearAbsorber("0.40 m") + peakLimit, []string{
			"Somewhere in the entries a device is exhausted. Change the system", "Enter model.allowance, your own figure",
		}},
		"not checked": {lanyard + strings.Replace(peakLimit, "checked_on = \"5 May 2025\"\n", "", 1), []string{"write when that was done as checked_on"}},
		"outside":     {strings.Replace(lanyard, "1.8 m", "1.5 m", 1) + peakLimit, []string{"within the conditions of \"label\" over the whole of the entries"}},
		"condition": {overDistance + peakLimit + "total_mass_at_most = \"90 kg\"\n", []string{
			"The limit was not compared.", "The limit does not speak of this case.",
		}},
		"exceeded": {overDistance + strings.Replace(peakLimit, "8 kN", "2 kN", 1), []string{"even the most favourable figure that the entries allow is beyond the limit"}},
		"within":   {tearAbsorber("1.75 m") + quarter + peakLimit, []string{"Nothing that was entered keeps this row open."}},
		"nothing":  {strings.Replace(peakLimit, "peak_force", "anchor_force", 1), []string{"Enter the connector path with an allowance of your own."}},
	} {
		out := explained(t, pathSheet(t, c.rest), "peak")
		for _, want := range c.want {
			if !strings.Contains(out, want) {
				t.Errorf("%s: no %q in\n%s", name, want, out)
			}
		}
		if !strings.HasPrefix(out, notAPermission) || !strings.HasSuffix(out, explainLast[aPerson]) {
			t.Errorf("%s: begins or ends otherwise", name)
		}
	}
}

// A rating cannot be entered for a moving load, and no sheet gives its peak an
// upper end.
func TestExplainPeakOfLoad(t *testing.T) {
	s := worked(t, "job.toml", []byte(trolleyJob+stopLimit))
	if out := explained(t, s, "post"); !strings.Contains(out, peakOfLoadWanted) || strings.Contains(out, "rating") {
		t.Errorf("got %s", out)
	}
}

// Reasons come the most important first, whatever their order in the row.
func TestExplainOrder(t *testing.T) {
	s := fixture(t)
	f := &s.Assessment.Findings[0]
	f.Reasons = []limits.Reason{{ID: limits.ExampleValues}, {ID: limits.NotChecked}, {ID: limits.DeviceExhausted}, {ID: limits.NoAllowance}}
	r, _ := Explain(s, "peak", SIUnits)
	list := r.Sections[0].Blocks[1].Lines
	for i, id := range []limits.ReasonID{limits.DeviceExhausted, limits.NoAllowance, limits.NotChecked, limits.ExampleValues} {
		if !strings.HasSuffix(list[i].Text, settledWhen[id].text) {
			t.Errorf("%d: %s", i+1, list[i].Text)
		}
	}
}

func TestExplainUnknownLimit(t *testing.T) {
	if _, ok := Explain(fixture(t), "peaks", SIUnits); ok {
		t.Error("a limit that is not on the sheet is explained")
	}
}

// Every row of every job can be explained, and fits the page.
func TestExplainEveryRow(t *testing.T) {
	n := 0
	for _, name := range jobNames(t) {
		s := sheet(t, name)
		for i := range s.Assessment.Findings {
			r, ok := Explain(s, s.Assessment.Findings[i].Limit.ID, BothUnits)
			if !ok {
				t.Fatal(name)
			}
			var b strings.Builder
			if err := Text(&b, r, TextOptions{}); err != nil {
				t.Fatal(err)
			}
			checkLines(t, name, b.String(), false)
			if w := forbidden.FindString(b.String()); w != "" {
				t.Errorf("%s: %q", name, w)
			}
			n++
		}
	}
	if n < 20 {
		t.Errorf("%d rows", n)
	}
}

// Which sources settle an input comes from the rules themselves.
func TestSettlingSources(t *testing.T) {
	for role, want := range map[arrest.Role]string{
		arrest.OfStop: "measured", arrest.OfFall: "measured drawing plan", arrest.OfPart: "measured label standard",
	} {
		if got := strings.Join(settlingSources(&arrest.Input{Role: role}), " "); got != want {
			t.Errorf("role %d: %s, want %s", role, got, want)
		}
	}
}

// A row that rests on an entry set on the command line is explained: no source
// can be given there, so the way out is the same figure in the file.
func TestExplainOverride(t *testing.T) {
	job := []byte(pieces{rest: overDistance + lanyard + peakLimit}.toml())
	for set, want := range map[[2]string]string{
		{"fall.free_fall", "1.7 m"}:               "To settle it enter it in the file, from a source that settles it (measured, drawing, plan), and with a tolerance",
		{"fall.free_fall", "1.7 m ± 0 m"}:         "To settle it enter it in the file, from a source that settles it (measured, drawing, plan).",
		{"rated[1].peak_force_at_most", "7 kN"}:   "as its document states it",
		{"rated[1].total_mass", "50 kg .. 60 kg"}: "within the conditions of \"label\"",
	} {
		if out := explained(t, workedWith(t, "job.toml", job, set[0], set[1]), "peak"); !strings.Contains(out, want) {
			t.Errorf("%s: no %q in\n%s", set[0], want, out)
		}
	}
}

// No input of any role is left without words for what settles it.
func TestEveryRoleIsSettled(t *testing.T) {
	b := builder{}
	for role := arrest.OfWorker; role <= arrest.OfModel; role++ {
		for _, set := range []bool{false, true} {
			if words := b.howToSettle(&arrest.Input{Role: role, Overridden: set}); !strings.HasPrefix(words, "enter it") {
				t.Errorf("role %d, overridden %t: %q", role, set, words)
			}
		}
	}
}

// What can be measured is to be measured, and what is entered already is not
// asked for again.
func TestWaysToAnEntry(t *testing.T) {
	floor := pathSheet(t, overDistance)
	rated := pathSheet(t, overDistance+strings.Replace(lanyard, "1.8 m", "1.5 m", 1))
	both := pathSheet(t, tearAbsorber("1.75 m")+strings.Replace(lanyard, "1.8 m", "1.5 m", 1))
	for _, c := range []struct {
		s    *Sheet
		q    arrest.Quantity
		want string
	}{
		{floor, arrest.PeakForce, peakRating + ", or " + pathWay},
		{rated, arrest.PeakForce, pathWay},
		{both, arrest.PeakForce, nothingMissing},
		{floor, arrest.DecelerationDistance, measureDistance + ", or " + travelRating + ", or " + pathWay},
		{floor, arrest.LineSag, otherWay},
	} {
		b := newBuilder(c.s, SIUnits)
		if got := b.entryWanted(c.q); got != c.want {
			t.Errorf("%s: %q, want %q", c.q, got, c.want)
		}
	}
}
