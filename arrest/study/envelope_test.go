package study

import (
	"context"
	"errors"
	"math"
	"math/rand/v2"
	"testing"

	"arrestcheck/arrest"
	"arrestcheck/arrest/quantity"
	"arrestcheck/limits"
)

func envelop(t testing.TB, j *arrest.Job, l Layout) *Envelope {
	t.Helper()
	e, err := Envelop(context.Background(), j, l)
	if err != nil {
		t.Fatal(err)
	}
	return e
}

// fields are jobs with limits, over two inputs each, that show every zone.
func fields(t testing.TB) map[string]struct {
	job    *arrest.Job
	layout Layout
} {
	unchecked := rule(t, "unchecked", arrest.MeanForceOverDistance, "4 kN")
	unchecked.CheckedOn = ""
	light := rule(t, "light", arrest.MeanForceOverDistance, "3 kN")
	mass := band(t, quantity.Mass, "97 kg")
	light.TotalMassAtMost = &mass
	peak := rule(t, "peak", arrest.PeakForce, "4 kN")
	mean := rule(t, "mean", arrest.MeanForceOverDistance, "3 kN")
	travel := rule(t, "travel", arrest.StoppingDistance, "1.07 m")
	noTime := entries{"worker.mass": "92 kg ± 1 kg", "worker.tools": "0 kg .. 10 kg", "fall.free_fall": "1.6 m .. 1.8 m", "stop.distance": "1 m"}.job(t)
	distance, freeFall := Range{"stop.distance", 0.3, 2, false}, Range{"fall.free_fall", 0, 4, false}
	return map[string]struct {
		job    *arrest.Job
		layout Layout
	}{
		"distance and fall":  {noTime, Layout{Across: distance, Up: freeFall, Sets: set(mean, unchecked, light, travel)}},
		"mass and fall":      {noTime, Layout{Across: Range{"worker.mass", 40, 140, false}, Up: freeFall, Sets: set(mean, light)}},
		"distance and time":  {banded(t), Layout{Across: distance, Up: Range{"stop.time", 0.1, 0.6, false}, Sets: set(peak, mean)}},
		"ratio of distances": {noTime, Layout{Across: Range{"stop.distance", 0.1, 3, true}, Up: freeFall, Sets: set(mean)}},
	}
}

// Every point of the grid comes to what its own check gives: by brute force
// over all points of a coarser grid.
func TestEnvelopeIsTheDenseGrid(t *testing.T) {
	seen := map[Zone]bool{}
	for name, f := range fields(t) {
		f.layout.Steps = 96
		e := envelop(t, f.job, f.layout)
		tr := e.trial()
		for j, y := range e.Up.Values {
			for i, x := range e.Across.Values {
				zones := e.check(tr, x, y)
				for k := range e.Limits {
					seen[Zone(zones[k])] = true
					if got := e.Zone(k, i, j); got != Zone(zones[k]) {
						t.Fatalf("%s, %s at %v, %v: %s, its own check %s", name, e.Limits[k].ID, x, y, got, Zone(zones[k]))
					}
				}
			}
		}
	}
	for _, z := range Zones() {
		if !seen[z] {
			t.Errorf("no point is %s: the zone is not tried", z)
		}
	}
}

// At the usual resolution at most 2 % of the points are evaluated, and a sample
// of the others is what their own checks give.
func TestEnvelopeEvaluatesFewPoints(t *testing.T) {
	r := rand.New(rand.NewPCG(41, 42))
	for name, f := range fields(t) {
		f.layout.Workers = 2
		e := envelop(t, f.job, f.layout)
		share := float64(e.Evaluations) / float64(e.Dense)
		t.Logf("%s: %d of %d points, %.2f %%", name, e.Evaluations, e.Dense, 100*share)
		if share > 0.02 {
			t.Errorf("%s: %.2f %% of the points evaluated", name, 100*share)
		}
		tr := e.trial()
		for range 2000 {
			i, j := r.IntN(len(e.Across.Values)), r.IntN(len(e.Up.Values))
			zones := e.check(tr, e.Across.Values[i], e.Up.Values[j])
			for k := range e.Limits {
				if got := e.Zone(k, i, j); got != Zone(zones[k]) {
					t.Fatalf("%s, %s at %d, %d: %s, its own check %s", name, e.Limits[k].ID, i, j, got, Zone(zones[k]))
				}
			}
		}
	}
}

// A point of an envelope is limits.Assess of the job as a user would type it,
// each of the two figures measured to ± 0.
func TestEnvelopeIsAssess(t *testing.T) {
	f := fields(t)["distance and fall"]
	f.layout.Steps = 32
	e := envelop(t, f.job, f.layout)
	for _, at := range [][2]int{{3, 5}, {10, 20}, {31, 2}, {16, 16}, {25, 30}} {
		typed := *f.job
		typed.Inputs = append([]arrest.Input(nil), f.job.Inputs...)
		for n, a := range []*Axis{&e.Across, &e.Up} {
			in := &typed.Inputs[e.inputs[n]]
			in.Band = band(t, quantity.Length, quantity.Of(quantity.Length, a.Values[at[n]]).Text+" ± 0 m")
			in.Set(&typed.Point, in.Band.Value)
		}
		res := arrest.Evaluate(&typed)
		a := limits.Assess(&res, f.layout.Sets, nil)
		for k := range a.Findings {
			if got := e.Zone(k, at[0], at[1]); got != ZoneOf(&a.Findings[k]) {
				t.Errorf("%v %s: %s, assessed %s", at, e.Limits[k].ID, got, a.Findings[k].Outcome)
			}
		}
	}
}

// Exact but for the distance: F = W*(1 + h/d) <= 3 kN changes from exceeded to
// within at d = h/(3000/980.665 - 1), and nothing lies between.
func TestEdgesOfAnEnvelope(t *testing.T) {
	j := entries{"worker.mass": "100 kg ± 0 kg", "worker.tools": "0 kg", "fall.free_fall": "1.8 m", "stop.distance": "1 m"}.job(t)
	e := envelop(t, j, Layout{Across: Range{"stop.distance", 0.1, 2, false}, Up: Range{"fall.free_fall", 0.5, 2.5, false},
		Sets: set(rule(t, "mean", arrest.MeanForceOverDistance, "3 kN")), Steps: 100})
	up := 50
	edges := e.Edges(0, up)
	if len(edges) != 1 || edges[0].Below != Exceeded || edges[0].Over != Within || edges[0].Lower != quantity.Up {
		t.Fatalf("%+v", edges)
	}
	near(t, "edge", edges[0].X, e.Up.Values[up]/(3000/980.665-1), 1e-14)
	runs := e.Runs(0, up)
	if len(runs) != 2 || runs[0].From != 0 || runs[0].To+1 != runs[1].From || runs[1].To != 100 {
		t.Errorf("%+v", runs)
	}
}

// F = W*(1 + h/d) = 3 kN is the straight line h = d*(3000/980.665 - 1).
func TestBoundaryIsALine(t *testing.T) {
	j := entries{"worker.mass": "100 kg ± 0 kg", "worker.tools": "0 kg", "fall.free_fall": "1.8 m", "stop.distance": "1 m"}.job(t)
	e := envelop(t, j, Layout{Across: Range{"stop.distance", 0.1, 2.1, false}, Up: Range{"fall.free_fall", 0.5, 2.5, false},
		Sets: set(rule(t, "mean", arrest.MeanForceOverDistance, "3 kN")), Steps: 400})
	lines := e.Boundaries(0)
	if len(lines) != 1 || lines[0].Closed || len(lines[0].Points) > 12 {
		t.Fatalf("%+v", lines)
	}
	for _, p := range lines[0].Points {
		d, h := 0.1+p[0]*2/400, 0.5+p[1]*2/400
		if away := math.Abs(h/(3000/980.665-1) - d); away > 2.0/400 {
			t.Errorf("%v, %v: %v off the line", d, h, away)
		}
	}
}

// An island, made by hand: its border is closed and goes once round it; three
// zones that touch in a point give three lines that end there.
func TestBoundariesThatCloseAndBranch(t *testing.T) {
	draw := func(rows ...string) *Envelope {
		e := &Envelope{Limits: make([]*limits.Limit, 1)}
		e.Across.Values, e.Up.Values = make([]float64, len(rows[0])), make([]float64, len(rows))
		for _, row := range rows {
			for _, c := range row {
				e.labels = append(e.labels, uint16(c-'0'))
			}
		}
		for z := range Within + 1 {
			e.zones = append(e.zones, string([]byte{byte(z)}))
		}
		return e
	}
	island := draw("11111", "12221", "12221", "11111").Boundaries(0)
	if len(island) != 1 || !island[0].Closed {
		t.Errorf("%+v", island)
	}
	if three := draw("112", "112", "333").Boundaries(0); len(three) != 3 {
		t.Errorf("%+v", three)
	}
	if none := draw("111", "111").Boundaries(0); len(none) != 0 {
		t.Errorf("%+v", none)
	}
}

func TestEnvelopeWorkers(t *testing.T) {
	f := fields(t)["distance and fall"]
	f.layout.Steps = 200
	one := envelop(t, f.job, f.layout)
	f.layout.Workers = 8
	eight := envelop(t, f.job, f.layout)
	if one.Evaluations != eight.Evaluations {
		t.Errorf("%d and %d evaluations", one.Evaluations, eight.Evaluations)
	}
	for i := range one.labels {
		if one.zones[one.labels[i]-1] != eight.zones[eight.labels[i]-1] || one.labels[i] != eight.labels[i] {
			t.Fatalf("point %d differs", i)
		}
	}
}

func TestEnvelopeRefuses(t *testing.T) {
	sets := set(rule(t, "mean", arrest.MeanForceOverDistance, "3 kN"))
	d, h := Range{"stop.distance", 0.3, 2, false}, Range{"fall.free_fall", 0, 4, false}
	for want, l := range map[RefusalID]Layout{
		NothingAsked: {Across: d, Up: h},
		Twice:        {Across: d, Up: d, Sets: sets},
		TooMany:      {Across: d, Up: h, Sets: sets, Steps: MaxSteps + 1},
		UnknownKey:   {Across: d, Up: Range{"stop.time", 0.1, 0.2, false}, Sets: sets},
		OutOfRange:   {Across: Range{"stop.distance", 0, 2, false}, Up: h, Sets: sets},
		EmptyRange:   {Across: d, Up: Range{"fall.free_fall", 4, 4, false}, Sets: sets},
	} {
		_, err := Envelop(context.Background(), fall(t), l)
		if r := (&Refusal{}); !errors.As(err, &r) || r.ID != want {
			t.Errorf("%v, want %s", err, want)
		}
	}
	ctx, stop := context.WithCancel(context.Background())
	stop()
	if _, err := Envelop(ctx, fall(t), Layout{Across: d, Up: h, Sets: sets}); !errors.Is(err, context.Canceled) {
		t.Errorf("%v", err)
	}
}
