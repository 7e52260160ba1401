package connector

import (
	"math"
	"testing"
)

// TestTrace holds the series against the pieces it was made of: nowhere is a
// straight line between two of its states further from the force than 0.1 per
// cent of the peak, and the points of both ends are the run's own.
func TestTrace(t *testing.T) {
	points, states := 0, 0
	worstOff := 0.0
	for i := range uint64(1500) {
		d := newDice(60, i)
		f := d.fall()
		var p Path
		var r Result
		if err := p.Set(d.parts()...); err != nil {
			t.Fatal(err)
		}
		series, err := Trace(&p, &f, &r, nil)
		if err != nil {
			t.Fatal(err)
		}
		var pieces []piece
		if err := run(&p, &f, &r, &pieces); err != nil {
			t.Fatal(err)
		}
		if math.IsInf(r.Peak, 1) || r.Peak == 0 {
			continue
		}
		at := 0
		for k := range pieces {
			q := &pieces[k]
			for j := 1; j < 200; j++ {
				s := q.at(q.last*float64(j)/200, f.Gravity)
				for at+1 < len(series) && series[at+1].Time < s.Time {
					at++
				}
				a, b := series[at], series[at+1]
				if b.Time == a.Time {
					continue
				}
				line := a.F + (b.F-a.F)*(s.Time-a.Time)/(b.Time-a.Time)
				if off := math.Abs(line-s.F) / r.Peak; off > seriesTolerance*(1+1e-6) {
					t.Fatalf("run %d, piece %d, t %v: the line is off by %v of the peak", i, k, s.Time, off)
				} else {
					worstOff = max(worstOff, off)
				}
			}
		}
		peak := 0.0
		for k, s := range series {
			peak = max(peak, s.F)
			if k > 0 && s.Time < series[k-1].Time {
				t.Fatalf("run %d: time goes back", i)
			}
		}
		if peak < r.Peak*(1-seriesTolerance) || peak > r.Peak*(1+1e-9) {
			t.Fatalf("run %d: greatest force of the series %v, peak %v", i, peak, r.Peak)
		}
		if last := series[len(series)-1]; last != r.End && !math.IsInf(r.End.Time, 1) && math.Abs(last.X-r.End.X)+math.Abs(last.V-r.End.V)+math.Abs(last.F-r.End.F) > 1e-6 {
			t.Fatalf("run %d: the series ends at %+v, the run at %+v", i, last, r.End)
		}
		points += len(series)
		states++
	}
	t.Logf("%d series, %d points on the average, lines off by %.2g of the peak at most", states, points/states, worstOff)
}

// TestTraceRigid: a rigid stop has a series up to the blow.
func TestTraceRigid(t *testing.T) {
	var p Path
	var r Result
	if err := p.Set(NewAbsorber(Plateau{Force: 4000, Travel: 0.1})); err != nil {
		t.Fatal(err)
	}
	series, err := Trace(&p, &fall18, &r, nil)
	if err != nil || r.Status != Rigid {
		t.Fatal(r.Status, err)
	}
	last := series[len(series)-1]
	if !closeTo(last.X, 0.1, 1e-12) || last.F != 4000 || !(last.V > 0) {
		t.Errorf("the series ends at %+v", last)
	}
}
