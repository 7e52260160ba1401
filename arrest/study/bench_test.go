package study

import (
	"context"
	"math"
	"sync"
	"testing"
	"time"

	"arrestcheck/arrest"
	"arrestcheck/arrest/quantity"
	"arrestcheck/limits"
)

const benchPoints = 1_000_000

var (
	benchSink int
	benchUnit = quantity.Force.SI()
)

// printed formats one row of a table: the input and the figure.
func printed(x, y float64) {
	benchSink += len(quantity.Number(x, quantity.Length.SI(), 5, quantity.Nearest)) + len(quantity.Number(y, benchUnit, 5, quantity.Nearest))
}

// bareLoop is what a sweep of an exact job cannot do without: At at every
// point, and its row as text.
func bareLoop(c arrest.Case, xs []float64, text bool) {
	var p arrest.Point
	for _, x := range xs {
		c.Distance = x
		arrest.At(&c, &p)
		if text {
			printed(x, p.MeanOverDistance)
		} else if p.MeanOverDistance < 0 {
			benchSink++
		}
	}
}

func benchPlan(b *testing.B, xs []float64, workers int) Plan {
	b.Helper()
	return Plan{Axes: []Axis{{"stop.distance", xs}}, Columns: []Column{meanOverDistance}, Workers: workers,
		Sets: []limits.Set{{Limits: []limits.Limit{{ID: "mean-6", Quantity: arrest.MeanForceOverDistance, Sense: limits.AtMost,
			Bound: band(b, quantity.Force, "6 kN")}}}}}
}

func wholeSweep(b *testing.B, j *arrest.Job, p Plan, text bool) {
	s, err := Sweep(context.Background(), j, p)
	if err != nil || len(s.Crossings) != 1 {
		b.Fatal(err, len(s.Crossings))
	}
	if text {
		for i, y := range s.Series[0].Value {
			printed(s.Axes[0].Values[i], y)
		}
	}
}

// rounds runs two pieces of work by turns and reports how many times longer the
// second takes, by the shortest run of each: what else the machine does only
// makes runs longer.
func rounds(b *testing.B, name string, floor, work func()) {
	b.Run(name, func(b *testing.B) {
		least := [2]time.Duration{math.MaxInt64, math.MaxInt64}
		for b.Loop() {
			for i, f := range []func(){floor, work} {
				start := time.Now()
				f()
				least[i] = min(least[i], time.Since(start))
			}
		}
		b.ReportMetric(float64(least[1])/float64(least[0]), "x-floor")
		b.ReportMetric(0, "ns/op")
	})
}

// BenchmarkSweep holds a sweep of a million points against its floors, turn by
// turn in one run: the bare loop of At with and without formatting (goal: at
// most 1.3 with), and one worker against two (goal: at least 1.8, where two bare
// loops beside each other gain 2).
func BenchmarkSweep(b *testing.B) {
	j := fall(b)
	xs, err := Linear(0.1, 2, benchPoints)
	if err != nil {
		b.Fatal(err)
	}
	rounds(b, "text", func() { bareLoop(j.Point, xs, true) }, func() { wholeSweep(b, j, benchPlan(b, xs, 1), true) })
	rounds(b, "no-text", func() { bareLoop(j.Point, xs, false) }, func() { wholeSweep(b, j, benchPlan(b, xs, 1), false) })
	rounds(b, "two-workers", func() { wholeSweep(b, j, benchPlan(b, xs, 2), false) }, func() { wholeSweep(b, j, benchPlan(b, xs, 1), false) })
	rounds(b, "two-bare-loops", func() { twoBareLoops(j.Point, xs) }, func() { bareLoop(j.Point, xs, false) })
	bands := entries{"worker.mass": "92 kg ± 1 kg", "worker.tools": "0 kg .. 10 kg", "fall.free_fall": "1.6 m .. 1.8 m", "stop.distance": "1 m"}.job(b)
	rounds(b, "bands-two-workers", func() { wholeSweepOf(b, bands, benchPlan(b, xs, 2)) }, func() { wholeSweepOf(b, bands, benchPlan(b, xs, 1)) })
}

// twoBareLoops is the most that two workers can do on this machine at this
// moment.
func twoBareLoops(c arrest.Case, xs []float64) {
	var both sync.WaitGroup
	for _, half := range [][]float64{xs[:len(xs)/2], xs[len(xs)/2:]} {
		both.Go(func() {
			var p arrest.Point
			c, odd := c, false
			for _, x := range half {
				c.Distance = x
				arrest.At(&c, &p)
				odd = odd != (p.MeanOverDistance < 0)
			}
			if odd {
				panic("a negative force")
			}
		})
	}
	both.Wait()
}

func wholeSweepOf(b *testing.B, j *arrest.Job, p Plan) {
	if _, err := Sweep(context.Background(), j, p); err != nil {
		b.Fatal(err)
	}
}

func BenchmarkSolve(b *testing.B) {
	j := fall(b)
	q := Question{Find: "fall.free_fall", Low: 0, High: 6, Goals: []Goal{{Of: arrest.MeanForceOverDistance, Target: 4000}}}
	for b.Loop() {
		if a, err := Solve(j, q); err != nil || a.Goals[0].Verdict != One {
			b.Fatal(err)
		}
	}
}

func BenchmarkRank(b *testing.B) {
	j := banded(b)
	sets := set(rule(b, "mean", arrest.MeanForceOverDistance, "3 kN"))
	for b.Loop() {
		if _, err := Rank(j, sets, 0); err != nil {
			b.Fatal(err)
		}
	}
}

func BenchmarkEnvelop(b *testing.B) {
	j := banded(b)
	l := Layout{Across: Range{"stop.distance", 0.3, 2, false}, Up: Range{"fall.free_fall", 0.2, 4, false},
		Sets: set(rule(b, "mean", arrest.MeanForceOverDistance, "3 kN"))}
	for b.Loop() {
		e, err := Envelop(context.Background(), j, l)
		if err != nil {
			b.Fatal(err)
		}
		b.ReportMetric(100*float64(e.Evaluations)/float64(e.Dense), "%-of-dense")
	}
}
