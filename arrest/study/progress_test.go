package study

import (
	"context"
	"sync/atomic"
	"testing"

	"arrestcheck/arrest"
	"arrestcheck/limits"
)

// Every point of a sweep and every check of an envelope is told once.
func TestProgressCountsPoints(t *testing.T) {
	var told atomic.Int64
	ctx := WithProgress(context.Background(), func(n int) { told.Add(int64(n)) })
	for _, workers := range []int{1, 2} {
		told.Store(0)
		_, err := Sweep(ctx, fall(t), Plan{Axes: []Axis{{"stop.distance", linear(t, 0.1, 2, 9000)}}, Columns: []Column{meanOverDistance}, Workers: workers})
		if err != nil || told.Load() != 9000 {
			t.Errorf("%d workers: %d of 9000 points, %v", workers, told.Load(), err)
		}
		told.Store(0)
		e, err := Envelop(ctx, fall(t), Layout{Across: Range{Key: "stop.distance", Low: 0.1, High: 2}, Up: Range{Key: "fall.free_fall", Low: 0, High: 2},
			Sets: []limits.Set{{Limits: []limits.Limit{rule(t, "mean", arrest.MeanForceOverDistance, "4 kN")}}}, Steps: 64, Workers: workers})
		if err != nil || told.Load() != int64(e.Evaluations) {
			t.Errorf("%d workers: %d of %d checks, %v", workers, told.Load(), e.Evaluations, err)
		}
	}
}

// Points that are whole checks go out to the workers in small parts.
func TestDearPointsAreShared(t *testing.T) {
	parts := 0
	ctx := WithProgress(context.Background(), func(int) { parts++ })
	j := onRope(t, "3.5 kN .. 4.5 kN", "0.45 m")
	if _, err := Sweep(ctx, j, Plan{Axes: []Axis{{"fall.free_fall", linear(t, 0, 4, 40)}}, Columns: []Column{modelledPeak}}); err != nil {
		t.Fatal(err)
	}
	if parts != 5 {
		t.Errorf("%d parts of 40 points, want 5 of 8", parts)
	}
}
