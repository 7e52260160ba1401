package study

import (
	"errors"
	"math"
	"testing"

	"arrestcheck/arrest"
	"arrestcheck/arrest/quantity"
	"arrestcheck/limits"
)

func solve(t testing.TB, j *arrest.Job, q Question) *Answer {
	t.Helper()
	a, err := Solve(j, q)
	if err != nil {
		t.Fatal(err)
	}
	return a
}

// only returns the one solution of the one goal.
func only(t testing.TB, a *Answer) Solution {
	t.Helper()
	m := a.Goals[0]
	if m.Verdict != One || len(m.Solutions) != 1 {
		t.Fatalf("%s, %d solutions: %+v", m.Verdict, len(m.Solutions), m)
	}
	return m.Solutions[0]
}

// F = W*(1 + h/d): over 1 m a mean of 4 kN comes from h = 4000/980.665 - 1.
func TestFreeFallForAMean(t *testing.T) {
	s := only(t, solve(t, fall(t), Question{Find: "fall.free_fall", Low: 0, High: 6,
		Goals: []Goal{{Of: arrest.MeanForceOverDistance, Target: 4000}}}))
	near(t, "free fall", s.X, 4000/980.665-1, 1e-15)
	near(t, "free fall", s.X, 3.07886, 2e-6)
	meter := quantity.Length.SI()
	if got := quantity.Format(s.X, meter, 3, s.Lower); got != "3.07 m" {
		t.Errorf("three digits: %s", got)
	}
	if got := quantity.Format(s.X, meter, 5, s.Lower); got != "3.0788 m" {
		t.Errorf("five digits: %s", got)
	}
}

// Put back, a solution gives its goal within 1e-12, and printed to any number
// of digits it is not beyond it.
func TestSolutionPutBack(t *testing.T) {
	peak := rule(t, "peak", arrest.PeakForce, "3.5 kN")
	mean := rule(t, "mean", arrest.MeanForceOverDistance, "2600 N")
	speed := rule(t, "speed", arrest.FallSpeed, "20 ft/s")
	for _, c := range []struct {
		find      string
		low, high float64
		limit     *limits.Limit
	}{
		{"fall.free_fall", 0, 6, &peak}, {"fall.free_fall", 0, 6, &mean}, {"fall.free_fall", 0, 6, &speed},
		{"stop.distance", 0.1, 3, &mean}, {"worker.mass", 30, 200, &peak}, {"worker.mass", 30, 200, &mean},
	} {
		j := banded(t)
		a := solve(t, j, Question{Find: c.find, Low: c.low, High: c.high, Goals: []Goal{{Limit: c.limit}}})
		m := &a.Goals[0]
		if len(m.Solutions) == 0 {
			t.Errorf("%s for %s: %s", c.find, c.limit.ID, m.Verdict)
		}
		demand := func(x float64) float64 {
			res, _, _, err := Check(j, nil, Move{c.find, x})
			if err != nil {
				t.Fatal(err)
			}
			e := m.Column.in(&res)
			return m.End.of(&arrest.Ends{Low: e.Low, Value: e.Value, High: e.High, Reach: e.Reach})
		}
		for _, s := range m.Solutions {
			near(t, c.find+" for "+c.limit.ID, demand(s.X), c.limit.Bound.Value, 1e-12)
			if y := demand(s.X); y != s.Y || y > c.limit.Bound.Value {
				t.Errorf("%s: %v put back gives %v, found %v", c.find, s.X, y, s.Y)
			}
			k, _ := find(j, c.find)
			dimension := j.Inputs[k].Band.Unit.Dimension
			for digits := 3; digits <= 11; digits++ {
				b := band(t, dimension, quantity.Format(s.X, dimension.SI(), digits, s.Lower))
				if y := demand(b.Value); y > c.limit.Bound.Value {
					t.Errorf("%s: printed %s gives %v, beyond %s", c.find, b.Text, y, c.limit.Bound.Text)
				}
			}
		}
	}
}

// The floor of the peak over distance and time together is least at d = v*t/2:
// a limit a little above W + m*v/t is met twice, in closed form: on the short
// side d = m*v^2/2/(F - W), on the long side room = (v^2 + 2*g*d)/(F/m - g).
func TestTwoSolutions(t *testing.T) {
	j := entries{"worker.mass": "100 kg", "fall.free_fall": "1.8 m", "stop.distance": "0.9 m", "stop.time": "0.3 s"}.job(t)
	limit := rule(t, "peak", arrest.PeakForce, "3.2 kN")
	a := solve(t, j, Question{Find: "stop.distance", Low: 0.3, High: 2.5, Goals: []Goal{{Limit: &limit}}})
	m := a.Goals[0]
	if m.Verdict != Several || len(m.Solutions) != 2 {
		t.Fatalf("%s: %+v", m.Verdict, m.Solutions)
	}
	const g, w, f, mass, tm = 9.80665, 980.665, 3200.0, 100.0, 0.3
	v := math.Sqrt(2 * g * 1.8)
	short := mass * v * v / 2 / (f - w)
	// (v^2 + 2*g*d)/(2*v*t + g*t^2 - 2*d) = b  =>  d = (b*(2*v*t + g*t^2) - v^2)/(2*(g + b))
	b := f/mass - g
	long := (b*(2*v*tm+g*tm*tm) - v*v) / (2 * (g + b))
	near(t, "short", m.Solutions[0].X, short, 1e-13)
	near(t, "long", m.Solutions[1].X, long, 1e-13)
	if m.Solutions[0].Lower != quantity.Up || m.Solutions[1].Lower != quantity.Down {
		t.Errorf("%+v", m.Solutions)
	}
	if len(m.Turns) != 1 || m.Turns[0].Greatest {
		t.Fatalf("turns %+v", m.Turns)
	}
	near(t, "turn", m.Turns[0].X, v*tm/2, 1e-12)
	near(t, "least floor", m.Turns[0].Y, w+mass*v/tm, 1e-14)
	if len(a.Fits) != 1 || a.Fits[0].LowBy != 0 || a.Fits[0].HighBy != 0 {
		t.Errorf("%+v", a.Fits)
	}
	// Beyond d = v*t + g*t^2/2 nothing can happen.
	near(t, "end of what can happen", a.Known[0].High, v*tm+g*tm*tm/2, 1e-14)
}

func TestWhyThereIsNoSolution(t *testing.T) {
	j := fall(t)
	for _, c := range []struct {
		find    string
		goal    Goal
		want    Verdict
		moves   bool
		fitting int
	}{
		{"stop.distance", Goal{Of: arrest.MeanForceOverDistance, Target: 900}, AllOver, true, 0},
		{"stop.distance", Goal{Of: arrest.MeanForceOverDistance, Target: 1e6}, AllUnder, true, 1},
		{"stop.distance", Goal{Of: arrest.FallSpeed, Target: 3}, AllOver, false, 0},
		{"stop.distance", Goal{Of: arrest.FallSpeed, Target: 30}, AllUnder, false, 1},
		{"stop.distance", Goal{Of: arrest.PeakForce, Target: 3, Column: Column{Quantity: arrest.PeakForce, Evidence: arrest.Shape}}, Unknown, false, 0},
	} {
		a := solve(t, j, Question{Find: c.find, Low: 0.1, High: 3, Goals: []Goal{c.goal}})
		m := a.Goals[0]
		if m.Verdict != c.want || m.Moves != c.moves || len(m.Solutions) != 0 || len(a.Fits) != c.fitting {
			t.Errorf("%s for %v: %s, moves %v, fits %v", c.goal.Of, c.goal.Target, m.Verdict, m.Moves, a.Fits)
		}
	}
}

// A rated ceiling leaps to no figure where its conditions end; nothing is met.
func TestLeapIsNoSolution(t *testing.T) {
	step := func(c *arrest.Case, p *arrest.Point) float64 {
		if c.FreeFall > 2 {
			return 9
		}
		return 1
	}
	a := solve(t, fall(t), Question{Find: "fall.free_fall", Low: 0, High: 6, Goals: []Goal{{Of: arrest.PeakForce, Target: 5, Measure: step}}})
	m := a.Goals[0]
	if m.Verdict != Jumped || !m.Solutions[0].Jumps || m.Solutions[0].X != 2 || len(a.Fits) != 1 || a.Fits[0].High != 2 {
		t.Errorf("%+v", m)
	}
}

// Of several limits the one that ends the part that fits governs: the mean asks
// for d >= 1.8/(4000/980.665 - 1), the ratio of the routes for no more than one
// end, the travel itself for d <= 1 m.
func TestGoverningLimit(t *testing.T) {
	mean4 := rule(t, "mean-4", arrest.MeanForceOverDistance, "4 kN")
	mean6 := rule(t, "mean-6", arrest.MeanForceOverDistance, "6 kN")
	travel := rule(t, "travel", arrest.DecelerationDistance, "1 m")
	goals := []Goal{{Limit: &mean6}, {Limit: &mean4}, {Limit: &travel}}
	a := solve(t, fall(t), Question{Find: "stop.distance", Low: 0.1, High: 3, Goals: goals})
	if len(a.Fits) != 1 {
		t.Fatalf("%+v", a.Fits)
	}
	f := a.Fits[0]
	near(t, "low end", f.Low, 1.8/(4000/980.665-1), 1e-15)
	if f.LowBy != 1 || f.HighBy != 2 || f.High != 1 {
		t.Errorf("%+v", f)
	}
	mean2 := rule(t, "mean-2", arrest.MeanForceOverDistance, "2 kN")
	a = solve(t, fall(t), Question{Find: "stop.distance", Low: 0.1, High: 3, Goals: append(goals, Goal{Limit: &mean2})})
	if len(a.Fits) != 0 {
		t.Errorf("2 kN asks for more than 1 m: %+v", a.Fits)
	}
}

// What moves is followed, not the ceiling of a document, which stays what it is;
// that only if nothing else is there.
func TestEstimateFollowed(t *testing.T) {
	j := fall(t)
	peak := band(t, quantity.Force, "6 kN")
	j.Ratings = []arrest.Rating{{Document: "label", TotalMass: band(t, quantity.Mass, "59 kg .. 140 kg"),
		FreeFallAtMost: band(t, quantity.Length, "1.8 m"), PeakForceAtMost: &peak}}
	q := Question{Find: "fall.free_fall", Low: 0, High: 1.8, Goals: []Goal{{Of: arrest.PeakForce, Target: 2000}}}
	if m := solve(t, j, q).Goals[0]; m.Column.Evidence != arrest.Given || m.Bound != arrest.AtLeast || m.End != TheReach || m.Verdict != One {
		t.Errorf("%+v", m)
	}
	bare := entries{"worker.mass": "100 kg", "fall.free_fall": "1.8 m"}.job(t)
	bare.Ratings = j.Ratings
	if m := solve(t, bare, q).Goals[0]; m.Column.Evidence != arrest.Rated || m.Bound != arrest.AtMost || m.End != TheHigh || m.Moves || m.Verdict != AllOver {
		t.Errorf("%+v", m)
	}
	// Beyond its conditions the rating is no figure.
	q.High = 4
	a := solve(t, bare, q)
	if len(a.Known) != 1 || a.Known[0] != (Span{0, 1.8}) {
		t.Errorf("%+v", a.Known)
	}
}

func TestStricterOfAPrintedPair(t *testing.T) {
	l := rule(t, "mean", arrest.MeanForceOverDistance, "1800 lbf")
	also := band(t, quantity.Force, "8 kN")
	l.AlsoPrinted = &also
	m := solve(t, fall(t), Question{Find: "stop.distance", Low: 0.1, High: 3, Goals: []Goal{{Limit: &l}}}).Goals[0]
	if m.Figure != 8000 || !m.Printed {
		t.Errorf("1800 lbf is 8.007 kN: the stricter figure is 8 kN, not %v", m.Figure)
	}
}

// x = m*v^2/2/(Fa - W): h = x*(Fa - W)/W, 0.62*(4000 - 980.665)/980.665.
func TestFreeFallBehindATravel(t *testing.T) {
	goals := TravelFound(band(t, quantity.Force, "4 kN"), band(t, quantity.Length, "0.62 m"))
	a := solve(t, fall(t), Question{Find: "fall.free_fall", Low: 0, High: 10, Goals: goals[:]})
	for _, m := range a.Goals {
		near(t, "free fall", m.Solutions[0].X, 0.62*(4000-980.665)/980.665, 1e-14)
	}
	j := entries{"worker.mass": "90 kg .. 110 kg", "fall.free_fall": "1.8 m"}.job(t)
	goals = TravelFound(band(t, quantity.Force, "3.5 kN .. 4.5 kN"), band(t, quantity.Length, "0.60 m .. 0.64 m"))
	a = solve(t, j, Question{Find: "fall.free_fall", Low: 0, High: 10, Goals: goals[:]})
	near(t, "least", a.Goals[0].Solutions[0].X, 0.60*(3500-110*9.80665)/(110*9.80665), 1e-14)
	near(t, "greatest", a.Goals[1].Solutions[0].X, 0.64*(4500-90*9.80665)/(90*9.80665), 1e-14)
}

func TestEndOfAQuantityWithoutABetterSide(t *testing.T) {
	q := Question{Find: "stop.distance", Low: 0.3, High: 1.5, Goals: []Goal{{Of: arrest.ShapeRatio, Target: 1}}}
	_, err := Solve(banded(t), q)
	if r := (&Refusal{}); !errors.As(err, &r) || r.ID != NeedsEnd {
		t.Errorf("%v", err)
	}
	q.Goals[0].End = TheLow
	if m := solve(t, banded(t), q).Goals[0]; m.Verdict != One || m.Solutions[0].Lower != quantity.Nearest {
		t.Errorf("%+v", m)
	}
}

// Where more is better the least figure is followed, and lower demand lies
// where the figure is greater.
func TestSolveForWhatMustRemain(t *testing.T) {
	left := func(c *arrest.Case, p *arrest.Point) float64 { return 5 - c.FreeFall }
	a := solve(t, fall(t), Question{Find: "fall.free_fall", Low: 0, High: 6,
		Goals: []Goal{{Of: arrest.ClearanceLeft, Target: 3, Measure: left}}})
	if s := only(t, a); s.X != 2 || s.Lower != quantity.Down || a.Goals[0].End != TheLow {
		t.Errorf("%+v", a.Goals[0])
	}
}

func TestSolveRefuses(t *testing.T) {
	goals := []Goal{{Of: arrest.MeanForceOverDistance, Target: 4000}}
	for want, q := range map[RefusalID]Question{
		UnknownKey:   {Find: "stop.length", Low: 1, High: 2, Goals: goals},
		NothingAsked: {Find: "stop.distance", Low: 1, High: 2},
		EmptyRange:   {Find: "stop.distance", Low: 2, High: 1, Goals: goals},
		OutOfRange:   {Find: "stop.distance", Low: 0, High: 1, Goals: goals},
		NotComputed:  {Find: "stop.distance", Low: 1, High: 2, Goals: []Goal{{Of: arrest.LineSag, Target: 1}}},
	} {
		_, err := Solve(fall(t), q)
		if r := (&Refusal{}); !errors.As(err, &r) || r.ID != want {
			t.Errorf("%v, want %s", err, want)
		}
	}
}
