package limits

import (
	"slices"
	"testing"

	"arrestcheck/arrest"
)

func subjects(list []Expected) []string {
	var names []string
	for _, e := range list {
		names = append(names, e.Subject)
	}
	return names
}

func TestNotEntered(t *testing.T) {
	all := []string{"peak", "free_fall", "clearance", "anchor", "mass"}
	without := func(s string) []string {
		return slices.DeleteFunc(slices.Clone(all), func(x string) bool { return x == s })
	}
	cases := []struct {
		quantity arrest.Quantity
		text     string
		want     []string
	}{
		{arrest.PeakForce, "8 kN", without("peak")},
		{arrest.FreeFall, "1.8 m", without("free_fall")},
		{arrest.ClearanceLeft, "0.6 m", without("clearance")},
		{arrest.ClearanceNeeded, "5 m", without("clearance")},
		{arrest.AnchorForce, "12 kN", without("anchor")},
		{arrest.AnchorStrengthPerPerson, "5000 lbf", without("anchor")},
		{arrest.StrengthOverArrestForce, "200 %", without("anchor")},
		{arrest.TotalMass, "140 kg", without("mass")},
		{arrest.MeanForceOverTime, "4 kN", all}, // a mean is no peak
		{arrest.TotalFallDistance, "5 m", all},
	}
	for _, c := range cases {
		l := limit(t, c.quantity, c.text)
		if got := subjects(Assess(result(), []Set{{}, {Limits: []Limit{l}}}, nil).NotEntered); !slices.Equal(got, c.want) {
			t.Errorf("limit on %s: not entered %v, want %v", c.quantity, got, c.want)
		}
		l.Kind = ProductTest
		if got := subjects(Assess(result(), []Set{{Limits: []Limit{l}}}, nil).NotEntered); !slices.Equal(got, all) {
			t.Errorf("product test of %s: not entered %v, want all", c.quantity, got)
		}
		e := []Elsewhere{{Quantity: c.quantity, Where: "drawing 12"}}
		a := Assess(result(), nil, e)
		if got := subjects(a.NotEntered); !slices.Equal(got, c.want) {
			t.Errorf("%s elsewhere: not entered %v, want %v", c.quantity, got, c.want)
		}
		if !slices.Equal(a.Elsewhere, e) {
			t.Errorf("elsewhere %v is not handed on", a.Elsewhere)
		}
	}
	if got := subjects(Assess(result(), nil, nil).NotEntered); !slices.Equal(got, all) {
		t.Errorf("nothing entered: not entered %v, want %v", got, all)
	}
}

// Nobody falls with a moving load: no subject of a fall is missing from it.
func TestNotEnteredOfAMovingLoad(t *testing.T) {
	l := limit(t, arrest.StoppingForce, "50 kN")
	a := Assess(result(between(arrest.StoppingForce, 1, 2), between(arrest.EnergyTaken, 1, 2)), []Set{{Limits: []Limit{l}}}, nil)
	if len(a.NotEntered) != 0 || !a.Settled() {
		t.Errorf("not entered %v, settled %v", subjects(a.NotEntered), a.Settled())
	}
}
