package study

import (
	"errors"
	"fmt"
	"math"
	"math/rand/v2"
	"slices"
	"testing"

	"arrestcheck/arrest"
	"arrestcheck/arrest/quantity"
	"arrestcheck/limits"
)

func ranked(t testing.TB, j *arrest.Job, l limits.Limit) *Ranking {
	t.Helper()
	r, err := Rank(j, set(l), 0)
	if err != nil {
		t.Fatal(err)
	}
	return r
}

func (r *Ranking) of(t testing.TB, key string) *Influence {
	t.Helper()
	for i := range r.Influences {
		if r.Influences[i].Key == key {
			return &r.Influences[i]
		}
	}
	t.Fatalf("%s is not ranked", key)
	return nil
}

// F = W*(1 + h/d) <= 3 kN with d about 1 m: it holds down to
// d = h/(3000/980.665 - 1), so 1 m must be known to within 1 m less that.
func TestMeasuredToWithin(t *testing.T) {
	j := entries{"worker.mass": "100 kg ± 0 kg", "fall.free_fall": "1.8 m ± 0 m", "stop.distance": "1 m ± 0.2 m"}.job(t)
	r := ranked(t, j, rule(t, "mean", arrest.MeanForceOverDistance, "3 kN"))
	if r.Zone != Undecided || r.AtCentres != Within {
		t.Errorf("%s, at the centres %s", r.Zone, r.AtCentres)
	}
	d := r.of(t, "stop.distance").Tolerance
	if d.Help != Enough || !d.Written || d.Then != Within {
		t.Errorf("%+v", d)
	}
	near(t, "± of the distance", d.By, 1-1.8/(3000/980.665-1), 1e-8)
	if got := quantity.Format(d.By, quantity.Length.SI(), 3, quantity.Down); got != "0.125 m" {
		t.Errorf("printed %s", got)
	}
	// The others are exact as entered, and the distance alone straddles.
	for _, key := range []string{"worker.mass", "fall.free_fall"} {
		if got := r.of(t, key).Tolerance; got.Help != NoHelp || !math.IsNaN(got.By) {
			t.Errorf("%s: %+v", key, got)
		}
	}
}

// The same with a range, which is measured about its middle, and with an open
// figure without any tolerance: that says how closely it has to be measured.
func TestMeasuredAboutTheMiddle(t *testing.T) {
	limit := rule(t, "mean", arrest.MeanForceOverDistance, "3 kN")
	j := entries{"worker.mass": "100 kg ± 0 kg", "fall.free_fall": "1.8 m ± 0 m", "stop.distance": "0.8 m .. 1.2 m"}.job(t)
	d := ranked(t, j, limit).of(t, "stop.distance").Tolerance
	near(t, "± of the range", d.By, 1-1.8/(3000/980.665-1), 1e-8)
	if d.Written || d.About != 1 {
		t.Errorf("%+v", d)
	}
	j = entries{"worker.mass": "100 kg", "fall.free_fall": "1.8 m ± 0 m", "stop.distance": "1 m ± 0 m"}.job(t)
	r := ranked(t, j, limit)
	m := r.Influences[0]
	if r.Zone != Capped || m.Key != "worker.mass" || m.Open != arrest.OpenNoTolerance {
		t.Fatalf("%s, first %+v", r.Zone, m)
	}
	near(t, "± of the mass", m.Tolerance.By, 3000/(9.80665*2.8)-100, 1e-8)
}

// A rating that holds to 140 kg: a mass of 130 kg .. 141 kg must be known to
// within 140 - 135.5.
func TestToleranceThatBringsARatingIn(t *testing.T) {
	peak := band(t, quantity.Force, "6 kN")
	j := entries{"worker.mass": "130 kg .. 141 kg", "fall.free_fall": "1.7 m ± 0 m"}.job(t)
	j.Ratings = []arrest.Rating{{Document: "label", TotalMass: band(t, quantity.Mass, "59 kg .. 140 kg"),
		FreeFallAtMost: band(t, quantity.Length, "1.8 m"), PeakForceAtMost: &peak}}
	r := ranked(t, j, rule(t, "peak", arrest.PeakForce, "8 kN"))
	if r.Zone != Undecided || r.Column != (Column{}) {
		t.Errorf("%s led by %+v", r.Zone, r.Column)
	}
	m := r.of(t, "worker.mass")
	near(t, "± of the mass", m.Tolerance.By, 4.5, 1e-8)
	if !math.IsNaN(m.Spread) || m.Tolerance.Then != Within {
		t.Errorf("%+v", m)
	}
}

// A figure typed in the unit of its limit is held against that figure alone,
// not against the one that is also printed, also where it is tried: 6 ft is not
// beyond 6 ft (1.8 m).
func TestTriedInTheUnitAsTyped(t *testing.T) {
	l := rule(t, "free-fall", arrest.FreeFall, "6 ft")
	also := band(t, quantity.Length, "1.8 m")
	l.AlsoPrinted = &also
	j := entries{"worker.mass": "100 kg ± 0 kg", "fall.free_fall": "5.5 ft .. 6.5 ft", "stop.distance": "1 m ± 0 m"}.job(t)
	if r := ranked(t, j, l); r.AtCentres != Within {
		t.Errorf("%s", r.AtCentres)
	}
}

// A floor alone clears nothing, however well it is known.
func TestNoToleranceOfAFloorHelps(t *testing.T) {
	r := ranked(t, fall(t), rule(t, "peak", arrest.PeakForce, "8 kN"))
	for _, i := range r.Influences {
		if i.Tolerance.Help != NoHelp {
			t.Errorf("%+v", i)
		}
	}
	if r.AtCentres != Undecided || r.End != TheReach {
		t.Errorf("%s, %s", r.AtCentres, r.End)
	}
}

func TestAnyToleranceOfWhatHardlyMoves(t *testing.T) {
	j := entries{"worker.mass": "100 kg ± 0 kg", "worker.tools": "0 kg", "fall.free_fall": "1.8 m ± 0 m", "stop.distance": "1 m ± 0 m"}.job(t)
	r := ranked(t, j, rule(t, "speed", arrest.FallSpeed, "1000 m/s"))
	if got := r.of(t, "fall.free_fall").Tolerance; got.Help != Whatever || got.Then != Within {
		t.Errorf("%+v", got)
	}
	r = ranked(t, j, rule(t, "mean", arrest.MeanForceOverDistance, "1000 kip"))
	for _, key := range []string{"worker.mass", "worker.tools"} {
		if got := r.of(t, key).Tolerance; got.Help != Whatever {
			t.Errorf("%s: %+v", key, got)
		}
	}
}

func TestConditionsAreRanked(t *testing.T) {
	l := rule(t, "travel", arrest.StoppingDistance, "1.2 m")
	most := band(t, quantity.Length, "1.8 m")
	l.FreeFallAtMost = &most
	j := entries{"worker.mass": "100 kg ± 0 kg", "fall.free_fall": "1.7 m .. 1.85 m", "stop.distance": "1 m ± 0.1 m"}.job(t)
	got := ranked(t, j, l).of(t, "fall.free_fall")
	near(t, "± of the free fall", got.Tolerance.By, 1.8-1.775, 1e-7)
	if got.Spread != 0 {
		t.Errorf("the free fall does not move the travel: %v", got.Spread)
	}
}

// The order and the spreads against brute force: the demand over a dense run of
// one input, the others at every corner.
func TestOrderAgainstBruteForce(t *testing.T) {
	r := rand.New(rand.NewPCG(51, 52))
	measure := map[arrest.Quantity]func(*arrest.Point) float64{
		arrest.MeanForceOverDistance: func(p *arrest.Point) float64 { return p.MeanOverDistance },
		arrest.MeanForceOverTime:     func(p *arrest.Point) float64 { return p.MeanOverTime },
		arrest.PeakForce:             func(p *arrest.Point) float64 { return p.Floor },
	}
	for q, of := range measure {
		for range 15 {
			j := randomBands(t, r)
			limit := rule(t, "row", q, "5 kN")
			rk := ranked(t, j, limit)
			last := math.Inf(1)
			for _, i := range rk.Influences {
				least, greatest := bruteSpread(j, i.Input, of)
				if math.IsInf(greatest, 1) {
					continue
				}
				near(t, "greatest", i.High, greatest, 1e-9)
				near(t, "least", i.Low, least, 5e-4) // the brute force steps over a kink
				if i.Low > least*(1+1e-12) {
					t.Errorf("%s: least %v, brute force finds %v", i.Key, i.Low, least)
				}
				if greatest-least > last*(1+1e-3) {
					t.Errorf("%s moves more than the one before it", i.Key)
				}
				last = greatest - least
			}
		}
	}
}

// randomBands is a job with a random band on everything.
func randomBands(t testing.TB, r *rand.Rand) *arrest.Job {
	j := banded(t)
	for i := range j.Inputs {
		in := &j.Inputs[i]
		if in.Role == arrest.OfPlace {
			continue
		}
		in.Band.Low *= 0.8 + 0.2*r.Float64()
		in.Band.High = max(in.Band.High, 1) * (1 + 0.1*r.Float64())
		if in.Key == "stop.time" {
			in.Band.Low, in.Band.High = 0.3+0.02*r.Float64(), 0.34+0.02*r.Float64()
		}
		in.Set(&j.Point, in.Band.Low)
	}
	return j
}

// bruteSpread is the least and the greatest demand of a dense run of input k,
// each with the others at their worst corner.
func bruteSpread(j *arrest.Job, k int, of func(*arrest.Point) float64) (least, greatest float64) {
	const parts = 500
	least, greatest = math.Inf(1), math.Inf(-1)
	others := slices.DeleteFunc([]int{0, 1, 2, 3, 4}, func(i int) bool { return i == k })
	var p arrest.Point
	for n := range parts + 1 {
		worst := math.Inf(-1)
		for mask := range 1 << len(others) {
			c := j.Point
			b := j.Inputs[k].Band
			j.Inputs[k].Set(&c, b.Low+(b.High-b.Low)*float64(n)/parts)
			for bit, o := range others {
				end := j.Inputs[o].Band.Low
				if mask>>bit&1 == 1 {
					end = j.Inputs[o].Band.High
				}
				j.Inputs[o].Set(&c, end)
			}
			arrest.At(&c, &p)
			if p.Impossible {
				return 0, math.Inf(1)
			}
			worst = max(worst, of(&p))
		}
		least, greatest = min(least, worst), max(greatest, worst)
	}
	return least, greatest
}

// Open inputs come first, however little they move.
func TestOpenInputsFirst(t *testing.T) {
	j := banded(t)
	j.Inputs[0].Source = arrest.FromAssumed // the mass
	r := ranked(t, j, rule(t, "mean", arrest.MeanForceOverDistance, "3 kN"))
	if r.Influences[0].Key != "worker.mass" || r.Influences[0].Open != arrest.OpenSource {
		t.Errorf("%+v", r.Influences[0])
	}
	if second := r.Influences[1]; second.Spread < r.Influences[2].Spread {
		t.Errorf("%+v", r.Influences)
	}
}

func TestRankRefuses(t *testing.T) {
	sets := set(rule(t, "sag", arrest.LineSag, "1 m"))
	for want, row := range map[RefusalID]int{NoSuchRow: 1, NoBand: 0} {
		_, err := Rank(fall(t), sets, row)
		if r := (&Refusal{}); !errors.As(err, &r) || r.ID != want {
			t.Errorf("%v, want %s", err, want)
		}
	}
	j := entries{"worker.mass": "100 kg", "fall.free_fall": "1.8 m", "stop.distance": "1.07 m", "stop.time": "0.15 s"}.job(t)
	_, err := Rank(j, sets, 0)
	if r := (&Refusal{}); !errors.As(err, &r) || r.ID != NoMotion {
		t.Errorf("%v", err)
	}
}

// Row after row by one Ranker is each row by itself: what was tried for one
// leaves no trace in the next.
func TestRankerIsRank(t *testing.T) {
	r := rand.New(rand.NewPCG(53, 54))
	peak := band(t, quantity.Force, "6 kN")
	most := band(t, quantity.Mass, "104 kg")
	for range 8 {
		j := randomBands(t, r)
		j.Inputs[r.IntN(2)].Source = arrest.FromAssumed
		j.Ratings = []arrest.Rating{{Document: "label", TotalMass: band(t, quantity.Mass, "59 kg .. 140 kg"),
			FreeFallAtMost: band(t, quantity.Length, "1.85 m"), PeakForceAtMost: &peak}}
		conditional := rule(t, "weight", arrest.ForceOverWeight, "900 %")
		conditional.TotalMassAtMost = &most
		sets := []limits.Set{{Limits: []limits.Limit{rule(t, "mean", arrest.MeanForceOverDistance, "3 kN"), rule(t, "peak", arrest.PeakForce, "6.5 kN"), conditional}},
			{Limits: []limits.Limit{rule(t, "mass", arrest.TotalMass, "100 kg"), rule(t, "speed", arrest.FallSpeed, "6 m/s")}}}
		res := arrest.Evaluate(j)
		a := limits.Assess(&res, sets, nil)
		n := NewRanker(j, &res)
		for row := range a.Findings {
			got, gotErr := n.Rank(&a.Findings[row])
			want, wantErr := Rank(j, sets, row)
			if gotErr != nil || wantErr != nil {
				t.Fatal(gotErr, wantErr)
			}
			// %v writes every digit, and NaN as NaN.
			if a, b := fmt.Sprint(got.Influences, got.Zone, got.Column, got.End, got.AtCentres), fmt.Sprint(want.Influences, want.Zone, want.Column, want.End, want.AtCentres); a != b {
				t.Errorf("row %d:\n%s\nwant\n%s", row, a, b)
			}
		}
	}
}

// What a document promises is the same wherever an input lies within its band:
// said without looking, and so where one looks.
func TestRatedFigureDoesNotMove(t *testing.T) {
	peak := band(t, quantity.Force, "6 kN")
	j := entries{"worker.mass": "92 kg ± 2 kg", "worker.tools": "0 kg .. 10 kg", "fall.free_fall": "1.6 m .. 1.8 m"}.job(t)
	j.Ratings = []arrest.Rating{{Document: "label", TotalMass: band(t, quantity.Mass, "59 kg .. 104 kg"),
		FreeFallAtMost: band(t, quantity.Length, "1.8 m"), PeakForceAtMost: &peak}}
	rk := ranked(t, j, rule(t, "peak", arrest.PeakForce, "8 kN"))
	if rk.Column.Evidence != arrest.Rated || len(rk.Influences) != 3 {
		t.Fatalf("led by %+v, %d inputs", rk.Column, len(rk.Influences))
	}
	for _, i := range rk.Influences {
		if i.Low != 6000 || i.High != 6000 || i.Spread != 0 {
			t.Errorf("%s: %v to %v", i.Key, i.Low, i.High)
		}
		b := &j.Inputs[i.Input].Band
		p := newProbe(j, []int{i.Input}, []Column{rk.Column})
		to := make([]arrest.Ends, 1)
		for n := range 11 {
			x := b.Low + (b.High-b.Low)*float64(n)/10
			if n == 10 {
				x = b.High
			}
			if p.At([]float64{x}, to); to[0].High != 6000 {
				t.Errorf("%s at %v: %v", i.Key, x, to[0].High)
			}
		}
	}
}
