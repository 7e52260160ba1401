package limits

import (
	"math"
	"strings"
	"testing"

	"arrestcheck/arrest"
	"arrestcheck/arrest/quantity"
)

// Findings come in the order of the sets and of the limits in them, and point
// at both.
func TestSeveralSets(t *testing.T) {
	loose, strict := limit(t, arrest.PeakForce, "8 kN"), limit(t, arrest.PeakForce, "2 kN")
	fall := limit(t, arrest.FreeFall, "1.8 m")
	sets := []Set{
		{Name: "site.toml", Limits: []Limit{loose, fall}},
		{Name: "empty.toml"},
		{Name: "", Example: true, Limits: []Limit{strict, loose}},
	}
	a := Assess(result(between(arrest.PeakForce, 3000, 4000)), sets, nil)
	want := []struct {
		set, limit int
		outcome    Outcome
	}{{0, 0, Within}, {0, 1, NotCompared}, {2, 0, Exceeded}, {2, 1, Undecided}}
	if len(a.Findings) != len(want) {
		t.Fatalf("%d findings, want %d", len(a.Findings), len(want))
	}
	for i, w := range want {
		f := &a.Findings[i]
		if f.Set != &sets[w.set] || f.Limit != &sets[w.set].Limits[w.limit] || f.Outcome != w.outcome {
			t.Errorf("finding %d: set %q, limit %s %s: %s", i, f.Set.Name, f.Limit.Quantity, f.Limit.Bound.Text, f.Outcome)
		}
		if g := a.Groups[i]; len(g.Rows) != 1 || g.Rows[0] != i || g.Outcome != w.outcome {
			t.Errorf("group %d: %+v", i, g)
		}
	}
	if n := a.Counts(); n[Within] != 1 || n[NotCompared] != 1 || n[Exceeded] != 1 || n[Undecided] != 1 {
		t.Errorf("counts %v", n)
	}
}

// Nothing of one row is left over in the next.
func TestRowsDoNotMix(t *testing.T) {
	res := clashing(between(arrest.PeakForce, 3000, 4000), by(arrest.Modelled, between(arrest.PeakForce, 5000, 6000)))
	res.Estimates = append(res.Estimates, outside(arrest.PeakForce, "label A"), shape(arrest.PeakForce, "spring", 5000),
		between(arrest.FreeFall, 1.7, 1.8))
	a := Assess(res, []Set{{Limits: []Limit{
		limit(t, arrest.PeakForce, "8 kN"), limit(t, arrest.FreeFall, "1.8 m"), limit(t, arrest.PeakForce, "8 kN"),
	}}}, nil)
	first, fall, second := &a.Findings[0], &a.Findings[1], &a.Findings[2]
	if fall.Outcome != Within || len(fall.Reasons) != 0 || len(fall.Used) != 1 {
		t.Errorf("free fall: %s %v, used %v", fall.Outcome, ids(fall), fall.Used)
	}
	for _, f := range []*Finding{first, second} {
		if got := ids(f); len(got) != 3 || f.Outcome != Undecided || len(f.Used) != 4 {
			t.Errorf("peak: %s %v, used %v", f.Outcome, got, f.Used)
		}
	}
}

// A limit no reader of limits makes is a mistake of the program.
func TestMisuse(t *testing.T) {
	cases := map[string]Limit{
		"cannot be bounded by":  change(limit(t, arrest.PeakForce, "8 kN"), func(l *Limit) { l.Sense = AtLeast }),
		"shape_ratio cannot be": {Quantity: arrest.ShapeRatio, Sense: AtMost},
		"nothing cannot be":     {Quantity: "nothing"},
		`"7 kN .. 8 kN" is no`:  limit(t, arrest.PeakForce, "7 kN .. 8 kN"),
		`"7 kN .. 9 kN" is no`:  change(limit(t, arrest.PeakForce, "8 kN"), func(l *Limit) { l.AlsoPrinted = bandAt(t, quantity.Force, "7 kN .. 9 kN") }),
		`"59 kg .. 140 kg" is no`: change(limit(t, arrest.PeakForce, "8 kN"), func(l *Limit) {
			l.TotalMassAtMost = bandAt(t, quantity.Mass, "59 kg .. 140 kg")
		}),
		`"1 m .. 2 m" is no`: change(limit(t, arrest.PeakForce, "8 kN"), func(l *Limit) {
			l.FreeFallAtMost = bandAt(t, quantity.Length, "1 m .. 2 m")
		}),
	}
	for want, l := range cases {
		func() {
			defer func() {
				text, _ := recover().(string)
				if !strings.HasPrefix(text, "limits: ") || !strings.Contains(text, want) {
					t.Errorf("panic %q, want %q in it", text, want)
				}
			}()
			Assess(result(), []Set{{Limits: []Limit{l}}}, nil)
		}()
	}
}

// Five limits on a result of ordinary size; the goal is a few microseconds.
func BenchmarkAssess(b *testing.B) {
	var es []arrest.Estimate
	for _, r := range arrest.Quantities() {
		if r.ID == arrest.EnergyTaken {
			continue // of a moving load: nothing would be missed
		}
		es = append(es, using(between(r.ID, 1, 1.5), 0))
	}
	es = append(es, floor(arrest.PeakForce, 1, 1.2), ceiling(arrest.PeakForce, 1.5))
	res := result(es...)
	peak := printed(b, arrest.PeakForce, "1800 lbf", "8 kN")
	peak.TotalMassAtMost = bandAt(b, quantity.Mass, "140 kg")
	sets := []Set{{Limits: []Limit{
		peak, limit(b, arrest.FreeFall, "6 ft"), limit(b, arrest.DecelerationDistance, "3.5 ft"),
		limit(b, arrest.TotalMass, "310 lb"), limit(b, arrest.ClearanceLeft, "0.6 m"),
	}}}
	elsewhere := []Elsewhere{{Quantity: arrest.AnchorForce}}
	b.ReportAllocs()
	for b.Loop() {
		a := Assess(res, sets, elsewhere)
		if math.IsNaN(a.Findings[0].Ratio) || len(a.NotEntered) != 0 {
			b.Fatal("not what is to be measured")
		}
	}
}
