package connector

import (
	"errors"
	"math"
	"testing"
)

// TestStatus is one run for every way to end.
func TestStatus(t *testing.T) {
	drop := func(seconds float64) Fall {
		return Fall{Mass: 100, FreeFall: 1, Gravity: StandardGravity, Duration: seconds}
	}
	for _, c := range []struct {
		name  string
		fall  Fall
		parts []Part
		want  Status
	}{
		{"spring", drop(0), []Part{Elastic(Rope, 9000)}, Stopped},
		{"absorber alone", drop(0), []Part{NewAbsorber(Plateau{Force: 4000, Travel: 1})}, Stopped},
		{"time too short", drop(0.1), []Part{Elastic(Rope, 9000)}, TimedOut},
		{"time ends in the slack", drop(0.001), []Part{Loose(2), Elastic(Rope, 9000)}, TimedOut},
		{"weak plateau", drop(0), []Part{NewAbsorber(Plateau{Force: 900, Travel: math.Inf(1)})}, Endless},
		{"weak plateau with dashpot", drop(0), []Part{Elastic(Rope, 9000), NewAbsorber(Plateau{Force: 900, Travel: math.Inf(1)}), NewDashpot(100)}, Endless},
		{"weak plateau, some time", drop(1), []Part{NewAbsorber(Plateau{Force: 900, Travel: math.Inf(1)})}, TimedOut},
		{"used up and rigid", drop(0), []Part{NewAbsorber(Plateau{Force: 4000, Travel: 0.1})}, Rigid},
		{"nothing stretches", drop(0), []Part{Loose(1)}, Rigid},
		{"overdamped from above", Fall{Mass: 100, Gravity: StandardGravity}, []Part{Elastic(Rope, 9000), NewDashpot(9000)}, Tending},
		{"held without a fall", Fall{Mass: 100, Gravity: StandardGravity}, []Part{NewAbsorber(Plateau{Force: 4000, Travel: 1})}, Stopped},
		{"rigid without a fall", Fall{Mass: 100, Gravity: StandardGravity}, []Part{Loose(0)}, Stopped},
	} {
		var r Result
		var p Path
		if err := p.Set(c.parts...); err != nil {
			t.Fatal(err)
		}
		if err := Run(&p, &c.fall, &r); err != nil {
			t.Errorf("%s: %v", c.name, err)
		}
		if r.Status != c.want {
			t.Errorf("%s: %v, want %v", c.name, r.Status, c.want)
		}
		if r.Status == Rigid != math.IsInf(r.Peak, 1) {
			t.Errorf("%s: %v with a peak of %v", c.name, r.Status, r.Peak)
		}
	}
	if got := Status(0).String(); got != "not run" {
		t.Errorf("the zero status is called %q", got)
	}
}

// TestTending: the limit that a body creeps to is where it hangs.
func TestTending(t *testing.T) {
	r := one(t, Fall{Mass: 100, Gravity: StandardGravity}, Elastic(Rope, 9000), NewDashpot(9000))
	if want := 980.665 / 9000; !closeTo(r.StoppingDistance, want, 1e-12) || !closeTo(r.Parts[0].AtRest, want, 1e-12) ||
		!math.IsInf(r.StoppingTime, 1) || r.MeanOverTime != 980.665 || !closeTo(r.MeanOverDistance, 980.665, 1e-12) || !math.IsInf(r.End.Time, 1) {
		t.Errorf("%+v", r)
	}
	// The force is greatest on the way, spring and dashpot together, which a long
	// time of the same run shows too.
	if !(r.Peak > 980.665 && r.Peak < 1000) || !(r.PeakTime < 1) {
		t.Errorf("peak %v at %v", r.Peak, r.PeakTime)
	}
	for i := range uint64(300) {
		d := newDice(51, i)
		f := d.fall()
		parts := []Part{Elastic(Rope, d.spread(4000, 100000)), NewDashpot(d.spread(5000, 40000))}
		f.Duration = 0
		tending := one(t, f, parts...)
		f.Duration = 100
		long := one(t, f, parts...)
		if !closeTo(tending.Peak, long.Peak, 1e-9) || tending.Status == Tending && !closeTo(tending.StoppingDistance, long.End.X, 1e-5) {
			t.Errorf("%v: peak %v, %v after a long time; distance %v, %v", tending.Status, tending.Peak, long.Peak, tending.StoppingDistance, long.End.X)
		}
	}
}

// TestHeldWithoutAFall: what holds the weight without moving pulls with it.
func TestHeldWithoutAFall(t *testing.T) {
	r := one(t, Fall{Mass: 100, Gravity: StandardGravity}, NewAbsorber(Plateau{Force: 4000, Travel: 1}))
	if r.Peak != 980.665 || r.StoppingDistance != 0 || r.AbsorberTravel != 0 || r.End.F != 980.665 {
		t.Errorf("%+v", r)
	}
}

// TestExhausted works the moment out by hand: 100 kg, 1.8 m, an absorber of 4 kN
// that ends after 0.4 m, then a rope of 9 kN/m.
func TestExhausted(t *testing.T) {
	r := one(t, fall18, rope225, NewAbsorber(Plateau{Force: 4000, Travel: 0.40}))
	x := 4000./9000 + 0.4
	if want := 980.665*(1.8+x) - 4000*4000/18000. - 4000*0.4; !closeTo(r.EnergyLeft, want, 1e-12) {
		t.Errorf("energy left %v, want %v", r.EnergyLeft, want)
	}
	if !(r.ExhaustedTime > r.FirstPull && r.ExhaustedTime < r.RestTime) {
		t.Errorf("exhausted at %v, first pull %v, rest %v", r.ExhaustedTime, r.FirstPull, r.RestTime)
	}
}

// TestRebound: a way back that is retraced loses nothing more, so that without a
// dashpot the second peak is as high as the first, whatever stayed; a dashpot
// takes it down; and a path that gives nothing back leaves the body hanging.
func TestRebound(t *testing.T) {
	elastic := one(t, fall18, Elastic(Webbing, 20000))
	lossy := Elastic(Webbing, 20000)
	lossy.Unloading = 30000
	r := one(t, fall18, lossy)
	for _, q := range []Result{elastic, r} {
		if q.PeakTime != q.RestTime {
			t.Errorf("the first of two equal peaks is at %v, not at %v", q.RestTime, q.PeakTime)
		}
		if !closeTo(q.SecondPeak, q.Peak, 1e-12) || q.Events.Slacks != 1 || q.Events.Tops != 1 {
			t.Errorf("second peak %v after %v without a dashpot, %+v", q.SecondPeak, q.Peak, q.Events)
		}
	}
	if !closeTo(r.Parts[0].Stored+r.Parts[0].Lost, r.Peak*r.Peak/40000, 1e-12) || !closeTo(r.Parts[0].Stored, r.Peak*r.Peak/60000, 1e-12) {
		t.Errorf("of %v J stored %v and lost %v", r.Peak*r.Peak/40000, r.Parts[0].Stored, r.Parts[0].Lost)
	}
	if high, low := elastic.SecondPeakTime-elastic.RestTime, r.SecondPeakTime-r.RestTime; low >= high {
		t.Errorf("%v s to the second peak with less given back, %v s with more", low, high)
	}
	damped := one(t, fall18, lossy, NewDashpot(200))
	if !(damped.SecondPeak < 0.9*damped.Peak) {
		t.Errorf("second peak %v after %v with a dashpot", damped.SecondPeak, damped.Peak)
	}
	lossy.Unloading = math.Inf(1)
	dead := one(t, fall18, lossy)
	if !math.IsNaN(dead.SecondPeak) || dead.End.F != 980.665 || dead.End.X != dead.StoppingDistance || dead.Events.Tops != 0 {
		t.Errorf("nothing given back: %+v", dead)
	}
}

// TestBlow: a dashpot pulls at once.
func TestBlow(t *testing.T) {
	r := one(t, fall18, Elastic(Rope, 1000), NewDashpot(3000))
	if want := 3000 * fall18.speed(); !closeTo(r.Peak, want, 1e-12) || r.PeakTime != r.FirstPull || !math.IsInf(r.Onset, 1) {
		t.Errorf("peak %v at %v, want %v at %v; onset %v", r.Peak, r.PeakTime, want, r.FirstPull, r.Onset)
	}
}

func TestFallChecks(t *testing.T) {
	var p Path
	var r Result
	if err := p.Set(rope225); err != nil {
		t.Fatal(err)
	}
	inf, nan := math.Inf(1), math.NaN()
	for name, c := range map[string]struct {
		fall Fall
		want error
	}{
		"no mass":           {Fall{Gravity: 9.8}, errMass},
		"mass NaN":          {Fall{Mass: nan, Gravity: 9.8}, errMass},
		"endless mass":      {Fall{Mass: inf, Gravity: 9.8}, errMass},
		"no gravity":        {Fall{Mass: 1}, errGravity},
		"endless gravity":   {Fall{Mass: 1, Gravity: inf}, errGravity},
		"negative fall":     {Fall{Mass: 1, Gravity: 9.8, FreeFall: -1}, errFall},
		"endless fall":      {Fall{Mass: 1, Gravity: 9.8, FreeFall: inf}, errFall},
		"negative speed":    {Fall{Mass: 1, Gravity: 9.8, InitialSpeed: -1}, errFall},
		"negative duration": {Fall{Mass: 1, Gravity: 9.8, Duration: -1}, errDuration},
		"endless duration":  {Fall{Mass: 1, Gravity: 9.8, Duration: inf}, errDuration},
	} {
		if err := Run(&p, &c.fall, &r); !errors.Is(err, c.want) {
			t.Errorf("%s: %v, want %v", name, err, c.want)
		}
		if err := Integrate(&p, &c.fall, 1e-8, &r); !errors.Is(err, c.want) {
			t.Errorf("%s, integrated: %v, want %v", name, err, c.want)
		}
	}
	for name, run := range map[string]func(){
		"Run":       func() { Run(&Path{}, &fall18, &r) },
		"Integrate": func() { Integrate(&Path{}, &fall18, 1e-8, &r) },
	} {
		func() {
			defer func() {
				if recover() == nil {
					t.Errorf("%s of a path that was never set does not panic", name)
				}
			}()
			run()
		}()
	}
}

// TestManyEvents: hours of a swing without loss are refused, not run for ever.
func TestManyEvents(t *testing.T) {
	var p Path
	var r Result
	if err := p.Set(Elastic(Rope, 1e8)); err != nil {
		t.Fatal(err)
	}
	if err := Run(&p, &Fall{Mass: 1, FreeFall: 1e-9, Gravity: StandardGravity, Duration: 1e6}, &r); err != errManyEvents {
		t.Errorf("%v after %+v", err, r.Events)
	}
}

// TestNoAllocation: nothing is allocated once path and result have grown.
func TestNoAllocation(t *testing.T) {
	var p Path
	var r Result
	parts := append(fiveParts(), rope225, NewAbsorber(Plateau{Force: 4000, Travel: 0.3}))
	for name, work := range map[string]func() error{
		"Set":       func() error { return p.Set(parts...) },
		"Run":       func() error { return Run(&p, &fiveFall, &r) },
		"Integrate": func() error { return Integrate(&p, &fiveFall, 1e-8, &r) },
	} {
		if err := p.Set(parts...); err != nil {
			t.Fatal(err)
		}
		if n := testing.AllocsPerRun(100, func() {
			if err := work(); err != nil {
				t.Fatal(err)
			}
		}); n != 0 {
			t.Errorf("%s allocates %v times", name, n)
		}
	}
}

// TestUsedAgain: a result and a path that were used give the same as new ones.
func TestUsedAgain(t *testing.T) {
	var p Path
	var r Result
	for i := range uint64(500) {
		d := newDice(50, i)
		f, parts := d.fall(), d.parts()
		if err := p.Set(parts...); err != nil {
			t.Fatal(err)
		}
		if err := Run(&p, &f, &r); err != nil {
			t.Fatal(err)
		}
		if diff := (worst{}).differ(&r, ptr(one(t, f, parts...)), false, 0); diff != "" {
			t.Fatalf("path %d, used again, differs in %s", i, diff)
		}
	}
}

func ptr(r Result) *Result { return &r }

// TestExtremes: figures far from any path that could be, grams to a hundred
// tonnes and dashpots to 1e9 N s/m, close their ledgers too, or say that they
// have too many events. Half of them run without a duration.
func TestExtremes(t *testing.T) {
	var p Path
	var r Result
	refused, n := 0, uint64(4000)
	for i := range n {
		d := newDice(77, i)
		f := Fall{Mass: d.spread(1e-3, 1e5), FreeFall: d.spread(1e-6, 1e3), Gravity: d.spread(1e-3, 1e3), Duration: d.spread(1e-3, 10)}
		if d.chance(0.3) {
			f.FreeFall = 0
		}
		if d.chance(0.5) {
			f.Duration = 0
		}
		var parts []Part
		for range 1 + d.IntN(4) {
			q := d.part()
			q.Stiffness *= d.spread(1e-4, 1e6)
			if q.Points == nil && q.Unloading > 0 {
				q.Unloading = q.Stiffness * d.spread(1, 1e6)
			}
			scale := d.spread(1e-4, 1e4)
			q.Plateau.Force *= scale
			q.Plateau.Activation *= scale
			parts = append(parts, q)
		}
		if d.chance(0.6) {
			parts = append(parts, NewDashpot(d.spread(1e-6, 1e9)))
		}
		if err := p.Set(parts...); err != nil {
			t.Fatalf("path %d: %v", i, err)
		}
		switch err := Run(&p, &f, &r); {
		case err == errManyEvents:
			refused++
		case err != nil:
			t.Fatalf("path %d: %v\n%+v\n%+v\n%+v", i, err, f, parts, r.Ledger)
		case math.IsNaN(r.Peak) || r.Status != Endless && math.IsNaN(r.End.X):
			t.Fatalf("path %d: %v with a peak of %v at %+v", i, r.Status, r.Peak, r.End)
		}
	}
	t.Logf("%d paths, %d with too many events", n, refused)
	if refused > 20 {
		t.Errorf("%d of %d paths have too many events", refused, n)
	}
}
