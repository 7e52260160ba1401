package limits

import (
	"slices"
	"testing"

	"arrestcheck/arrest"
	"arrestcheck/arrest/quantity"
)

// Each cap alone turns a row that would be within into undecided, with its own
// reason and no other, and leaves a row that is exceeded as it is.
func TestEachCap(t *testing.T) {
	const peak = arrest.PeakForce
	caps := []struct {
		name  string
		apply func(*arrest.Result, *Set)
		want  ReasonID
	}{
		{"open input", func(r *arrest.Result, s *Set) { r.Estimates[0].Uses = []int{0, 1} }, OpenInput},
		{"open input of the tested mass", func(r *arrest.Result, s *Set) {
			r.Estimates[1].Uses = []int{1}
			s.Limits[0].TotalMassAtMost = bandAt(t, quantity.Mass, "140 kg")
		}, OpenInput},
		{"open input of the tested fall", func(r *arrest.Result, s *Set) {
			r.Estimates[2].Uses = []int{3}
			s.Limits[0].FreeFallAtMost = bandAt(t, quantity.Length, "1.8 m")
		}, OpenInput},
		{"several persons", func(r *arrest.Result, s *Set) { r.Persons = 2 }, SeveralPersons},
		{"example job", func(r *arrest.Result, s *Set) { r.Example = true }, ExampleValues},
		{"example set", func(r *arrest.Result, s *Set) { s.Example = true }, ExampleValues},
		{"nobody checked the limit", func(r *arrest.Result, s *Set) { s.Limits[0].CheckedOn = "" }, NotChecked},
		{"superseded", func(r *arrest.Result, s *Set) { s.Limits[0].SupersededOn = "in May" }, Superseded},
		{"product test", func(r *arrest.Result, s *Set) { s.Limits[0].Kind = ProductTest }, IsProductTest},
	}
	for _, c := range caps {
		for demand, want := range map[float64]Outcome{8000: Undecided, 8001: Exceeded} {
			res := result(between(peak, demand, demand), between(arrest.TotalMass, 100, 100), between(arrest.FreeFall, 1.8, 1.8))
			sets := []Set{{Limits: []Limit{limit(t, peak, "8 kN")}}}
			c.apply(res, &sets[0])
			f := Assess(res, sets, nil).Findings[0]
			reasons := []ReasonID{c.want}
			if want == Exceeded {
				reasons = nil
			}
			if f.Outcome != want || !slices.Equal(ids(&f), reasons) {
				t.Errorf("%s, %v N: %s %v, want %s %v", c.name, demand, f.Outcome, ids(&f), want, reasons)
			}
		}
	}
}

// The set's own date stands in for a limit without one.
func TestCheckedOnOfTheSet(t *testing.T) {
	l := limit(t, arrest.PeakForce, "8 kN")
	l.CheckedOn = ""
	sets := []Set{{CheckedOn: "2 May", Limits: []Limit{l}}}
	a := Assess(result(between(arrest.PeakForce, 3000, 4000)), sets, nil)
	if got := a.Findings[0].Outcome; got != Within {
		t.Errorf("a limit of a checked set: %s", got)
	}
}

// Caps that do not touch the row.
func TestCapsOfOthers(t *testing.T) {
	const peak = arrest.PeakForce
	res := result(
		using(between(peak, 3000, 4000), 0),
		using(floor(peak, 3000, 3500), 2),
		using(shape(peak, "spring", 5000), 2),
		using(between(arrest.TotalMass, 100, 100), 1), // no condition asks for it
	)
	f := assess(res, limit(t, peak, "8 kN"))
	if f.Outcome != Within || f.Used[0] != 0 {
		t.Errorf("%s %v, used %v", f.Outcome, ids(&f), f.Used)
	}
}

func TestOrderOfCaps(t *testing.T) {
	res := result(using(between(arrest.PeakForce, 3000, 4000), 3, 1, 1), using(between(arrest.TotalMass, 100, 100), 2, 1))
	res.Persons, res.Example = 2, true
	l := limit(t, arrest.PeakForce, "8 kN")
	l.CheckedOn, l.SupersededOn, l.Kind = "", "in May", ProductTest
	l.TotalMassAtMost = bandAt(t, quantity.Mass, "140 kg")
	f := assess(res, l)
	want := rs(OpenInput, OpenInput, OpenInput, SeveralPersons, ExampleValues, NotChecked, Superseded, IsProductTest)
	if f.Outcome != Undecided || !slices.Equal(ids(&f), want) {
		t.Errorf("%s %v", f.Outcome, ids(&f))
	}
	for i, key := range []string{"worker.tools", "stop.distance", "fall.free_fall"} {
		if got := f.Reasons[i].Args[0].Text; got != key {
			t.Errorf("open input %d is %s, want %s: each once, in the order of the inputs", i, got, key)
		}
	}
}

// Where several estimates would do, one that rests on nothing open settles the
// row, and is the one named.
func TestUncappedEstimateSettles(t *testing.T) {
	const peak = arrest.PeakForce
	cases := []struct {
		name      string
		estimates []arrest.Estimate
		want      Outcome
		governing int
		open      int // reasons naming open inputs
	}{
		{"rating on settled inputs", es(using(between(peak, 3000, 7000), 1), using(ceiling(peak, 6000), 0)), Within, 1, 0},
		{"band on settled inputs", es(using(ceiling(peak, 7000), 1), using(between(peak, 3000, 6000), 0)), Within, 1, 0},
		{"both open: the fewer", es(using(ceiling(peak, 7000), 1, 2), using(between(peak, 3000, 6000), 3)), Undecided, 1, 1},
		{"both open alike: the greater", es(using(ceiling(peak, 7000), 1), using(between(peak, 3000, 6000), 3)), Undecided, 0, 1},
		{"the smaller rating is part of the promise", es(using(ceiling(peak, 5000), 1), using(ceiling(peak, 6000), 0)), Undecided, 1, 1},
	}
	for _, c := range cases {
		f := assess(result(c.estimates...), limit(t, peak, "8 kN"))
		open := 0
		for _, id := range ids(&f) {
			if id == OpenInput {
				open++
			}
		}
		if f.Outcome != c.want || f.Used[0] != c.governing || open != c.open {
			t.Errorf("%s: %s %v, governed by %d", c.name, f.Outcome, ids(&f), f.Used[0])
		}
	}
}

// A row that is undecided for another reason names its caps after it.
func TestCapsBehindTheMainReason(t *testing.T) {
	const peak = arrest.PeakForce
	cases := []struct {
		name      string
		estimates []arrest.Estimate
		want      []ReasonID
	}{
		{"floor", es(using(floor(peak, 3000, 4000), 2)), rs(OnlyFloor, OpenInput, NotChecked)},
		{"band", es(using(between(peak, 3000, 9000), 2), shape(peak, "spring", 5000)), rs(Straddles, OpenInput, NotChecked, AssumedShape)},
		{"shape", es(shape(peak, "spring", 5000)), rs(AssumedShape, NotChecked)},
		{"reach", es(using(ceiling(peak, 6000), 1), floor(peak, 3000, inf), shape(peak, "spring", 5000)), rs(FloorReaches, OpenInput, NotChecked, AssumedShape)},
		{"cap beside a rating outside", es(between(peak, 3000, 6000), outside(peak, "label A")), rs(NotChecked, OutsideRating)},
	}
	for _, c := range cases {
		l := limit(t, peak, "8 kN")
		l.CheckedOn = ""
		f := assess(result(c.estimates...), l)
		if f.Outcome != Undecided || !slices.Equal(ids(&f), c.want) {
			t.Errorf("%s: %s %v, want %v", c.name, f.Outcome, ids(&f), c.want)
		}
	}
}
