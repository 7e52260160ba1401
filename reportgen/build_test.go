package reportgen

import (
	"strings"
	"testing"

	"arrestcheck/arrest"
	"arrestcheck/arrest/quantity"
	"arrestcheck/limits"

	"github.com/google/go-cmp/cmp"
)

// Page 1 has one order, and nothing may stand above its first line.
func TestPageOrder(t *testing.T) {
	s := fixture(t)
	s.Result.Example = true
	out := asText(t, s, BothUnits, TextOptions{})
	if !strings.HasPrefix(out, notAPermission+"\n\n"+exampleBanner+"\n") {
		t.Fatalf("begins with %q", out[:200])
	}
	order := []string{
		notAPermission, exampleBanner, // and again below
		"Question", "how hard is the stop", "Lamp change", "Revision", "1 of 2", "Datum", "System",
		"1 in all: 0 exceeded, 1 undecided, 0 not compared, 0 within as entered.",
		"Nobody entered", "clearance below", "Elsewhere", "anchor register",
		"Worst row", "undecided in row 1, peak force on the body:", "at most 1800 lbf", "site rule 4",
		warningHeading, "! S-31", "S-01", "S-10",
		limitsHeading, exampleBanner, peaksHeading, meansHeading, motionHeading[aPerson], openHeading, "stop.distance",
		statusHeading, "Verification", "Validation", beforeHeading, "stop. Measure", namesHeading, exampleBanner, "signature", "____",
		behindHeading, inputsHeading, limitTextsHeading, registerHeading, workingHeading, forgottenHeading[aPerson],
		notCheckedHeading, referencesHeading, filesHeading, "10b", "5e7", "version 0",
	}
	out = strings.Join(strings.Fields(out), " ") // a sentence may be broken anywhere
	at := 0
	for _, want := range order {
		i := strings.Index(out[at:], want)
		if i < 0 {
			t.Fatalf("%q is missing, or stands before its place", want)
		}
		at += i + len(want)
	}
}

// EXAMPLE VALUES also stands where only a limit set is an example.
func TestExampleSet(t *testing.T) {
	s := fixture(t)
	if out := asText(t, s, BothUnits, TextOptions{}); strings.Contains(out, exampleBanner) {
		t.Error("banner on a sheet without examples")
	}
	s.File.Sets[0].Example = true
	if out := asText(t, s, BothUnits, TextOptions{}); !strings.Contains(out, exampleBanner) || !strings.Contains(out, "S-31") {
		t.Error("no banner for an example set")
	}
}

// Rows come exceeded, undecided, not compared, within, each as entered.
func TestRowOrder(t *testing.T) {
	s := fixture(t)
	first := s.Assessment.Findings[0]
	s.Assessment.Findings = nil
	for _, o := range []limits.Outcome{limits.Within, limits.NotCompared, limits.Exceeded, limits.Undecided, limits.Exceeded} {
		first.Outcome = o
		s.Assessment.Findings = append(s.Assessment.Findings, first)
	}
	b := builder{s: s}
	if diff := cmp.Diff([]int{2, 4, 3, 1, 0}, b.rowOrder()); diff != "" {
		t.Error(diff)
	}
}

// The printed words of the outcomes, with and without a reason.
func TestOutcomeWords(t *testing.T) {
	s := fixture(t)
	b := builder{s: s, d: display{SIUnits, quantity.Metric}}
	f := &s.Assessment.Findings[0]
	for o, want := range map[limits.Outcome]string{
		limits.Exceeded:    "exceeded",
		limits.Undecided:   "undecided: only a floor is known, 3.41 kN; the true figure may lie beyond the limit",
		limits.NotCompared: "not compared: only a floor is known, 3.41 kN; the true figure may lie beyond the limit",
		limits.Within:      "within as entered",
	} {
		f.Outcome = o
		if got := breakable(b.outcome(f)); got != want {
			t.Errorf("%s: %q, want %q", o, got, want)
		}
	}
}

// A row shows demand and limit in the unit of the limit as typed, then the
// other; 3419.97623 N is 768.84 lbf (NIST SP 811, B.8), a floor rounds down.
func TestDemandAndLimit(t *testing.T) {
	s := fixture(t)
	for units, want := range map[UnitChoice][2]string{
		BothUnits: {"not less than 768 lbf (3.419 kN)", "at most 1800 lbf (8.007 kN)"},
		SIUnits:   {"not less than 3.419 kN", "at most 1800 lbf (8.007 kN)"},
		USUnits:   {"not less than 768 lbf", "at most 1800 lbf"},
	} {
		b := builder{s: s, d: display{units, quantity.Metric}}
		demand, limit := b.demandAndLimit(&s.Assessment.Findings[0])
		if breakable(demand) != want[0] || breakable(limit) != want[1] {
			t.Errorf("choice %d: %q and %q, want %q", units, breakable(demand), breakable(limit), want)
		}
	}
}

// A demand just beyond the limit never prints as the limit, in either system.
func TestDemandNextToTheLimit(t *testing.T) {
	s := fixture(t)
	f := &s.Assessment.Findings[0]
	f.Limit.Bound = band(t, quantity.Force, "8 kN")
	b := builder{s: s}
	for demand, want := range map[float64]string{
		8000:   "not less than 8.00 kN (1798 lbf)",
		8000.1: "not less than 8.0001 kN (1798.49 lbf)",
		7999:   "not less than 7.99 kN (1798.2 lbf)",
	} {
		f.Demand = demand
		if got, _ := b.demandAndLimit(f); breakable(got) != want {
			t.Errorf("%g N: %q, want %q", demand, breakable(got), want)
		}
	}
}

func TestEstimateTexts(t *testing.T) {
	s := fixture(t)
	b := builder{s: s, d: display{SIUnits, quantity.Metric}}
	for _, c := range []struct {
		e            arrest.Estimate
		figure, from string
	}{
		{s.Result.Estimates[0], "not less than 3.41 kN", "from the entries, M-06"},
		{s.Result.Estimates[1], "2.60 to 2.66 kN", "from the entries, M-02: floor, not what the body feels"},
		{s.Result.Estimates[2], "at most 6.00 kN", `by "label of the lanyard" while its conditions hold, M-09`},
		{s.Result.Estimates[3], "99.0 to 101 kg", "as entered"},
		{arrest.Estimate{Quantity: arrest.PeakForce, Evidence: arrest.Shape, Method: "M-07", Bound: arrest.Between, Low: 6805.84025, High: 6805.84025, From: "rising ramp"},
			"6.81 kN", `if the stop were a pulse "rising ramp", M-07`},
		{arrest.Estimate{Quantity: arrest.PeakForce, Evidence: arrest.Rated, Method: "M-09", Bound: arrest.AtMost, Low: nan, High: nan, From: "label", Outside: true},
			outsideRemark, `by "label" while its conditions hold, M-09`},
		{arrest.Estimate{Quantity: arrest.PeakForce, Evidence: arrest.Rated, Method: "M-09", Bound: arrest.AtMost, Low: nan, High: 6001, From: "label"},
			"at most 6.01 kN", `by "label" while its conditions hold, M-09`},
	} {
		if got := breakable(b.estimate(&c.e, pageDigits)); got != c.figure {
			t.Errorf("%q, want %q", got, c.figure)
		}
		if got := b.from(&c.e); got != c.from {
			t.Errorf("%q, want %q", got, c.from)
		}
	}
}

// Every quantity is in exactly one of the tables of page 1.
func TestEveryQuantityHasItsTable(t *testing.T) {
	for _, q := range arrest.Quantities() {
		n := 0
		for _, in := range []bool{isPeak(q.ID), isMean(q.ID), isMotion(q.ID), isOfVector(q.ID), isLayout(q.ID)} {
			if in {
				n++
			}
		}
		if n != 1 {
			t.Errorf("%s is in %d tables", q.ID, n)
		}
	}
}

// The assumption register names every open input, and each line asks for
// confirmation.
func TestRegister(t *testing.T) {
	b := builder{s: fixture(t)}
	list := b.register()
	if !strings.Contains(list[0].Text, "stop.distance") || !strings.Contains(list[0].Text, "does not settle it") {
		t.Errorf("first: %s", list[0].Text)
	}
	if len(list) != 1+len(standingAssumptions[aPerson]) {
		t.Errorf("%d lines", len(list))
	}
	for _, l := range list {
		if !strings.HasSuffix(l.Text, needsConfirmation) {
			t.Errorf("%s: %s", l.Label, l.Text)
		}
	}
}
