package arrest

import (
	"fmt"
	"math/rand/v2"
	"testing"

	"arrestcheck/arrest/quantity"
)

// sameAsEvaluate fails unless a Repeat says of its job as it stands just what
// Evaluate says: %v writes every digit of a float64.
func sameAsEvaluate(t *testing.T, r *Repeat) {
	t.Helper()
	want := Evaluate(&r.Job)
	got := r.Evaluate()
	if a, b := fmt.Sprint(got.Estimates), fmt.Sprint(want.Estimates); a != b {
		t.Fatalf("estimates\n%s\nwant\n%s", a, b)
	}
	if a, b := fmt.Sprint(got.Contradictions), fmt.Sprint(want.Contradictions); a != b {
		t.Fatalf("contradictions %s, want %s", a, b)
	}
	if len(got.Inputs) != len(want.Inputs) || got.Persons != want.Persons || got.Example != want.Example {
		t.Fatalf("%d inputs, %d persons, example %v", len(got.Inputs), got.Persons, got.Example)
	}
}

// Random boxes with a rating that holds for some of them, one input changed at
// a time: what stood in the memory before leaves no trace.
func TestRepeatIsEvaluate(t *testing.T) {
	r := rand.New(rand.NewPCG(61, 62))
	peak, travel := parse(t, quantity.Force, "6 kN"), parse(t, quantity.Length, "1.2 m")
	var outside, contradicted, partly int
	for n := range 300 {
		j := randomBox(r)
		inUnits(j)
		switch n % 4 {
		case 0:
			drop(j, "stop.time")
		case 1:
			drop(j, "stop.distance")
		}
		if n%3 == 0 {
			j.Point.Pulse = Pulses()[n%5].Pulse
		}
		j.Ratings = []Rating{{Document: "label", TotalMass: parse(t, quantity.Mass, "59 kg .. 140 kg"),
			FreeFallAtMost: parse(t, quantity.Length, "1.8 m"), PeakForceAtMost: &peak, TravelAtMost: &travel, TravelIsDeceleration: n%2 == 0}}
		repeat := NewRepeat(j)
		for range 4 {
			_, never := Impossible(&repeat.Job)
			if repeat.Refused() != never {
				t.Fatalf("impossible %v, want %v: %+v", !never, never, repeat.Job.Point)
			}
			if !never {
				sameAsEvaluate(t, repeat)
				rated := repeat.Evaluate().estimate(PeakForce, Rated)
				outside += count(repeat.ev.res.Estimates[rated].Outside)
				contradicted += count(len(repeat.ev.res.Contradictions) > 0)
				partly += count(len(repeat.spans.beside) > 2)
			}
			in := &repeat.Job.Inputs[r.IntN(len(j.Inputs))]
			x := in.Band.Low + r.Float64()*(in.Band.High-in.Band.Low)
			in.Band = Single(in, x)
			in.Band.Low *= 0.9
			in.Set(&repeat.Job.Point, x)
		}
	}
	if outside < 20 || contradicted < 20 || partly < 20 {
		t.Errorf("%d outside a rating, %d contradicted, %d partly impossible: not enough to try them", outside, contradicted, partly)
	}
}

func count(yes bool) int {
	if yes {
		return 1
	}
	return 0
}

// A moving load in the plane, whose components go through zero.
func TestRepeatOfALoad(t *testing.T) {
	j := loadFigures{mass: "90 kg .. 110 kg", before: []string{"-1 m/s .. 2 m/s", "1 m/s"}, after: []string{"0 m/s", "0 m/s"}, time: "0.2 s .. 0.3 s"}.job(t)
	repeat := NewRepeat(j)
	sameAsEvaluate(t, repeat)
	for i := range repeat.Job.Inputs {
		in := &repeat.Job.Inputs[i]
		in.Band.High = in.Band.Low
		sameAsEvaluate(t, repeat)
	}
}

// A Repeat gets no memory once it has some, but for the text of the sum of the
// masses and the list of inputs behind a figure that is entered.
func TestRepeatKeepsItsMemory(t *testing.T) {
	j := figures{mass: "92 kg ± 1 kg", fall: "1.7 m .. 1.8 m", distance: "1 m ± 0.1 m"}.job(t)
	repeat := NewRepeat(j)
	repeat.Evaluate()
	if n := testing.AllocsPerRun(20, func() { repeat.Evaluate() }); n > 3 {
		t.Errorf("%v allocations", n)
	}
}

func BenchmarkRepeat(b *testing.B) {
	repeat := NewRepeat(figures{mass: "92 kg ± 1 kg", tools: "0 kg .. 10 kg", fall: "1.7 m .. 1.8 m", distance: "1 m ± 0.1 m"}.job(b))
	b.ReportAllocs()
	for b.Loop() {
		repeat.Evaluate()
	}
}

// A layout in which nobody can stand, for a part of the bands, is refused in a
// repeat too: 2 m of connector do not get to a D-ring 1.5 m below and 1.4 m
// beside the anchor, sqrt(1.5^2 + 1.4^2) = 2.05 m away.
func TestRepeatRefusesALayoutOutOfReach(t *testing.T) {
	for along, want := range map[string]bool{"1.2 m": false, "1.2 m ± 0.2 m": true, "1.4 m": true, "3 m": true} {
		j := laidOutJob(t, overhead(along))
		if got, repeated := Refused(j), NewRepeat(j).Refused(); got != want || repeated != want {
			t.Errorf("%s: %v and, repeated, %v", along, got, repeated)
		}
	}
}
