package study

import (
	"slices"
	"strings"
	"testing"

	"arrestcheck/arrest"
	"arrestcheck/arrest/quantity"
	"arrestcheck/limits"
)

func TestSubstitute(t *testing.T) {
	j := banded(t)
	j.Notes = []arrest.Warning{
		{ID: arrest.Unusual, Args: []arrest.Arg{arrest.Text("stop.distance")}},
		{ID: arrest.Unusual, Args: []arrest.Arg{arrest.Text("worker.mass")}},
	}
	to, err := Substitute(j, Move{"stop.distance", 0.9})
	if err != nil {
		t.Fatal(err)
	}
	k, _ := find(j, "stop.distance")
	in := to.Inputs[k]
	if in.Band.Text != "0.9 m" || in.Band.Low != 0.9 || in.Band.High != 0.9 || to.Point.Distance != 0.9 || in.Source != arrest.FromMeasured {
		t.Errorf("%+v", in)
	}
	if len(to.Notes) != 1 || to.Notes[0].Args[0].Text != "worker.mass" {
		t.Errorf("%+v", to.Notes)
	}
	if j.Inputs[k].Band.Text != "0.95 m .. 1.10 m" || len(j.Notes) != 2 || j.Point.Distance != 0.95 {
		t.Error("the job itself was changed")
	}
	if _, err := Substitute(j, Move{"stop.distance", 1}, Move{"stop.distance", 2}); !refused(err, Twice) {
		t.Errorf("%v", err)
	}
}

func TestCheckOfTheImpossible(t *testing.T) {
	j := entries{"worker.mass": "100 kg", "fall.free_fall": "1.8 m", "stop.distance": "1 m", "stop.time": "0.3 s"}.job(t)
	if _, _, can, err := Check(j, nil, Move{"stop.time", 0.1}); can || err != nil {
		t.Error(can, err)
	}
	if _, can, err := Working(j, Move{"stop.time", 0.1}); can || err != nil {
		t.Error(can, err)
	}
}

func TestRefusalNamesWhatThereIs(t *testing.T) {
	_, err := Substitute(fall(t), Move{"stop.length", 1})
	if got := err.Error(); got != "study: unknown key: stop.length; known: worker.mass, worker.tools, fall.free_fall, stop.distance, gravity" {
		t.Error(got)
	}
	r := &Refusal{ID: NotComputed, Quantity: arrest.LineSag}
	if !strings.Contains(r.Error(), "line_sag") {
		t.Error(r)
	}
}

func TestColumnsTellAlikeApart(t *testing.T) {
	j := fall(t)
	peak := band(t, quantity.Force, "6 kN")
	rating := arrest.Rating{Document: "label", TotalMass: band(t, quantity.Mass, "59 kg .. 140 kg"), FreeFallAtMost: band(t, quantity.Length, "1.8 m"), PeakForceAtMost: &peak}
	j.Ratings = []arrest.Rating{rating, rating}
	cs := Columns(j, arrest.PeakForce)
	if len(cs) != 3 || cs[1].Nth != 0 || cs[2].Nth != 1 || cs[1].From != "label" {
		t.Errorf("%+v", cs)
	}
	res := arrest.Evaluate(j)
	for _, c := range Columns(j) {
		if e := c.in(&res); e == nil || e.Quantity != c.Quantity {
			t.Errorf("%+v is not found again", c)
		}
	}
	impossible := entries{"worker.mass": "100 kg", "fall.free_fall": "1.8 m", "stop.distance": "1.07 m", "stop.time": "0.15 s"}.job(t)
	if got := Columns(impossible); got != nil {
		t.Errorf("%+v", got)
	}
}

// A row is capped when the figures alone would be within: mending the caps
// brings it within, and nothing else is so.
func TestCappedRowsAreWithinWithoutTheirCaps(t *testing.T) {
	l := rule(t, "mean", arrest.MeanForceOverDistance, "3 kN")
	tight := rule(t, "tight", arrest.MeanForceOverDistance, "2.7 kN")
	peak := rule(t, "peak", arrest.PeakForce, "8 kN")
	for name, spoil := range map[string]func(*arrest.Job, *limits.Set){
		"open input":   func(j *arrest.Job, s *limits.Set) { j.Inputs[0].Source = arrest.NoSource },
		"two persons":  func(j *arrest.Job, s *limits.Set) { j.Persons = 2 },
		"example job":  func(j *arrest.Job, s *limits.Set) { j.Example = true },
		"example set":  func(j *arrest.Job, s *limits.Set) { s.Example = true },
		"unchecked":    func(j *arrest.Job, s *limits.Set) { each(s, func(l *limits.Limit) { l.CheckedOn = "" }) },
		"superseded":   func(j *arrest.Job, s *limits.Set) { each(s, func(l *limits.Limit) { l.SupersededOn = "3 May" }) },
		"product test": func(j *arrest.Job, s *limits.Set) { each(s, func(l *limits.Limit) { l.Kind = limits.ProductTest }) },
	} {
		j := entries{"worker.mass": "100 kg ± 1 kg", "fall.free_fall": "1.8 m ± 0 m", "stop.distance": "0.95 m .. 1.1 m"}.job(t)
		sets := set(l, tight, peak)
		clean := newTrial(j, sets).assess()
		if got := []Zone{ZoneOf(&clean[0]), ZoneOf(&clean[1]), ZoneOf(&clean[2])}; !slices.Equal(got, []Zone{Within, Undecided, Undecided}) {
			t.Fatalf("%v", got)
		}
		sets = set(l, tight, peak)
		spoil(j, &sets[0])
		spoilt := newTrial(j, sets).assess()
		if got := []Zone{ZoneOf(&spoilt[0]), ZoneOf(&spoilt[1]), ZoneOf(&spoilt[2])}; !slices.Equal(got, []Zone{Capped, Undecided, Undecided}) {
			t.Errorf("%s: %v", name, got)
		}
	}
}

func each(s *limits.Set, change func(*limits.Limit)) {
	for i := range s.Limits {
		change(&s.Limits[i])
	}
}

func TestZonesHaveNames(t *testing.T) {
	if len(Zones()) != len(zoneNames) {
		t.Error("a zone is not listed")
	}
	seen := map[string]bool{}
	for _, z := range Zones() {
		seen[z.String()] = true
	}
	if len(seen) != len(zoneNames) {
		t.Errorf("%v", seen)
	}
}
