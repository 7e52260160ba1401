package limits

import (
	"math"
	"testing"

	"github.com/google/go-cmp/cmp"

	"arrestcheck/arrest"
	"arrestcheck/arrest/quantity"
)

// A condition that several estimates test is told with the least and the
// greatest figure of them all, whichever comes first.
func TestConditionIsToldWithTheEndsOfAll(t *testing.T) {
	low, high := between(arrest.FreeFall, 1.6, 1.9), by(arrest.Measured, between(arrest.FreeFall, 1.7, 2.0))
	inner := by(arrest.Modelled, between(arrest.FreeFall, 1.65, 1.95))
	inner.Allowance = 0
	for _, order := range [][]arrest.Estimate{{low, high, inner}, {high, low, inner}, {inner, high, low}} {
		l := limit(t, arrest.PeakForce, "8 kN")
		l.FreeFallAtMost = bandAt(t, quantity.Length, "1.8 m")
		f := assess(result(append(es(between(arrest.PeakForce, 3000, 4000)), order...)...), l)
		want := Reason{ConditionStraddles, []arrest.Arg{arrest.Text("free_fall_at_most"), arrest.Figure(quantity.Length, 1.6, quantity.Nearest), arrest.Figure(quantity.Length, 2.0, quantity.Nearest), arrest.Text("1.8 m")}}
		if len(f.Reasons) == 0 || cmp.Diff(want, f.Reasons[0]) != "" {
			t.Errorf("reasons %v", f.Reasons)
		}
	}
}

// Each assumed shape is named once, in the order of the estimates.
func TestEachShapeIsNamedOnce(t *testing.T) {
	const peak = arrest.PeakForce
	f := assess(result(shape(peak, "ramp", 5000), shape(peak, "ramp", 5100), shape(peak, "spring", 5200), shape(peak, "ramp", 5300)), limit(t, peak, "8 kN"))
	var named []string
	for _, r := range f.Reasons {
		if r.ID == AssumedShape {
			named = append(named, r.Args[0].Text)
		}
	}
	if diff := cmp.Diff([]string{"ramp", "spring"}, named); diff != "" {
		t.Error(diff)
	}
}

// A model without an allowance is shown at its unfavourable end: the high one of
// what must not be too great, the low one of what must not be too small.
func TestBareModelIsShownAtItsBadEnd(t *testing.T) {
	for _, c := range []struct {
		q     arrest.Quantity
		limit string
		want  float64
	}{
		{arrest.PeakForce, "8 kN", 2},
		{arrest.ClearanceLeft, "0.5 m", 1},
	} {
		e := by(arrest.Modelled, between(c.q, 1, 2))
		e.Allowance = math.NaN()
		if f := assess(result(e), limit(t, c.q, c.limit)); f.Demand != c.want {
			t.Errorf("%s: %v is shown, want %v", c.q, f.Demand, c.want)
		}
	}
}

// A demand of nothing against a limit of nothing lies on the limit and no times
// beyond it: another row within comes first.
func TestNothingAgainstNothingIsNotWorst(t *testing.T) {
	res := result(between(arrest.SwingAngle, 0, 0), between(arrest.TotalMass, 100, 100))
	rows := []Limit{limit(t, arrest.SwingAngle, "0 deg"), limit(t, arrest.TotalMass, "110 kg")}
	a := Assess(res, []Set{{Limits: rows}}, nil)
	if got := a.WorstRow(); got != 1 || a.Findings[0].Outcome != Within {
		t.Errorf("worst row %d, the first is %s", got, a.Findings[0].Outcome)
	}
}

// Beyond a limit of nothing is infinitely far beyond.
func TestBeyondNothingIsWorst(t *testing.T) {
	res := result(between(arrest.TotalMass, 220, 220), between(arrest.SwingAngle, 0.1, 0.1))
	rows := []Limit{limit(t, arrest.TotalMass, "110 kg"), limit(t, arrest.SwingAngle, "0 deg")}
	a := Assess(res, []Set{{Limits: rows}}, nil)
	if got := a.WorstRow(); got != 1 || a.Findings[1].Outcome != Exceeded {
		t.Errorf("worst row %d, the second is %s", got, a.Findings[1].Outcome)
	}
}

// Reasons that differ in their arguments alone, or in their id alone, are two; a
// reason that is there already is one.
func TestAddOnce(t *testing.T) {
	var list []Reason
	for _, r := range []Reason{{ID: NotChecked}, {ID: ExampleValues}, words(Superseded, "in May"), words(Superseded, "in June"), {ID: NotChecked}, words(Superseded, "in May")} {
		list = addOnce(list, r)
	}
	want := []Reason{{ID: NotChecked}, {ID: ExampleValues}, words(Superseded, "in May"), words(Superseded, "in June")}
	if diff := cmp.Diff(want, list); diff != "" {
		t.Error(diff)
	}
}
