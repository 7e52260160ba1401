package limits

import (
	"slices"
	"testing"

	"arrestcheck/arrest"
	"arrestcheck/arrest/quantity"
)

// A condition at 140 kg, a limit of 8 kN: the mass moves about the condition,
// the peak about the limit.
func TestConditionTable(t *testing.T) {
	const mass, peak = arrest.TotalMass, arrest.PeakForce
	masses := []struct {
		name      string
		estimates []arrest.Estimate
		fails     bool
		reason    ReasonID // empty where the condition holds
	}{
		{"below", es(between(mass, 90, 130)), false, ""},
		{"one step below", es(between(mass, 90, down(140))), false, ""},
		{"equal", es(between(mass, 140, 140)), false, ""},
		{"one step above", es(between(mass, up(140), up(140))), true, ConditionUnfulfilled},
		{"up to one step above", es(between(mass, 140, up(140))), false, ConditionStraddles},
		{"across", es(between(mass, 130, 150)), false, ConditionStraddles},
		{"above", es(between(mass, 141, 150)), true, ConditionUnfulfilled},
		{"floor below", es(floor(mass, 90, 100)), false, ConditionStraddles},
		{"floor above", es(floor(mass, 141, 150)), true, ConditionUnfulfilled},
		{"ceiling", es(ceiling(mass, 140)), false, ""},
		{"every estimate must hold", es(between(mass, 100, 130), by(arrest.Measured, between(mass, 130, 150))), false, ConditionStraddles},
		{"one of two above", es(between(mass, 100, 130), by(arrest.Measured, between(mass, 141, 150))), true, ConditionUnfulfilled},
		{"nothing entered", nil, true, NotComputed},
		{"nothing but a shape", es(shape(mass, "spring", 100)), true, NotComputed},
		{"nothing but a rating outside", es(outside(mass, "label A")), true, NotComputed},
	}
	peaks := []struct {
		estimate arrest.Estimate
		outcome  Outcome
		reasons  []ReasonID
	}{
		{between(peak, 3000, 8000), Within, nil},
		{between(peak, 3000, 9000), Undecided, rs(Straddles)},
		{floor(peak, 3000, 4000), Undecided, rs(OnlyFloor)},
		{floor(peak, 8001, 9000), Exceeded, nil},
	}
	cases := 0
	for _, m := range masses {
		for _, p := range peaks {
			cases++
			l := limit(t, peak, "8 kN")
			l.TotalMassAtMost = bandAt(t, quantity.Mass, "140 kg")
			f := assess(result(append(es(p.estimate), m.estimates...)...), l)

			want, reasons := p.outcome, p.reasons
			if m.reason != "" {
				want, reasons = Undecided, rs(m.reason)
				if p.outcome == Exceeded {
					reasons = append(reasons, AlsoBeyond)
				}
				if m.fails {
					want = NotCompared
				} else {
					reasons = append(reasons, p.reasons...)
				}
			}
			if f.Outcome != want || !slices.Equal(ids(&f), reasons) {
				t.Errorf("mass %s, peak %v..%v: %s %v, want %s %v", m.name, p.estimate.Low, p.estimate.High, f.Outcome, ids(&f), want, reasons)
			}
			if len(f.Used) == 0 || f.Demand != f.Demand {
				t.Errorf("mass %s: the figures of the row are not shown", m.name)
			}
		}
	}
	if cases != 60 {
		t.Errorf("%d cases, want 60", cases)
	}
}

func TestEachConditionIsTested(t *testing.T) {
	const peak = arrest.PeakForce
	res := func() *arrest.Result {
		return persons(2, result(between(peak, 9000, 9000), between(arrest.TotalMass, 150, 150), between(arrest.FreeFall, 1.7, 1.9)))
	}
	mass := func(l *Limit) { l.TotalMassAtMost = bandAt(t, quantity.Mass, "140 kg") }
	fall := func(l *Limit) { l.FreeFallAtMost = bandAt(t, quantity.Length, "1.8 m") }
	one := func(l *Limit) { l.PersonsAtMost = 1 }
	two := func(l *Limit) { l.PersonsAtMost = 2 }
	cases := []struct {
		name   string
		set    []func(*Limit)
		want   Outcome
		reason []ReasonID
		keys   []string
	}{
		{"mass", fs(mass), NotCompared, rs(ConditionUnfulfilled, AlsoBeyond), []string{"total_mass_at_most"}},
		{"fall", fs(fall), Undecided, rs(ConditionStraddles, AlsoBeyond), []string{"free_fall_at_most"}},
		{"persons", fs(one), NotCompared, rs(ConditionUnfulfilled, AlsoBeyond), []string{"persons_at_most"}},
		{"persons as many", fs(two), Exceeded, nil, nil},
		{"all", fs(mass, fall, one), NotCompared, rs(ConditionUnfulfilled, ConditionStraddles, ConditionUnfulfilled, AlsoBeyond),
			[]string{"total_mass_at_most", "free_fall_at_most", "persons_at_most"}},
	}
	for _, c := range cases {
		l := limit(t, peak, "8 kN")
		for _, set := range c.set {
			set(&l)
		}
		f := assess(res(), l)
		if f.Outcome != c.want || !slices.Equal(ids(&f), c.reason) {
			t.Errorf("%s: %s %v, want %s %v", c.name, f.Outcome, ids(&f), c.want, c.reason)
		}
		for i, key := range c.keys {
			if got := f.Reasons[i].Args[0].Text; got != key {
				t.Errorf("%s: reason %d names %s, want %s", c.name, i, got, key)
			}
		}
	}
}

func fs(list ...func(*Limit)) []func(*Limit) { return list }
