package study

import (
	"bytes"
	"context"
	"errors"
	"fmt"
	"math"
	"testing"

	"pgregory.net/rapid"

	"arrestcheck/arrest"
	"arrestcheck/arrest/quantity"
)

func sweep(t testing.TB, j *arrest.Job, p Plan) *Swept {
	t.Helper()
	s, err := Sweep(context.Background(), j, p)
	if err != nil {
		t.Fatal(err)
	}
	return s
}

func linear(t testing.TB, low, high float64, n int) []float64 {
	t.Helper()
	xs, err := Linear(low, high, n)
	if err != nil {
		t.Fatal(err)
	}
	return xs
}

var meanOverDistance = Column{Quantity: arrest.MeanForceOverDistance, Evidence: arrest.Given}
var floorOfPeak = Column{Quantity: arrest.PeakForce, Evidence: arrest.Given}

// 100 kg, 1.8 m: F = W*(1 + h/d), W = 980.665 N, so F(0.1) = 980.665*19 and
// F(1) = 980.665*2.8; 6 kN at d = 1.8/(6000/980.665 - 1).
func TestDistanceBuysForce(t *testing.T) {
	sets := set(rule(t, "mean-6", arrest.MeanForceOverDistance, "6 kN"))
	s := sweep(t, fall(t), Plan{Axes: []Axis{{"stop.distance", []float64{0.1, 1}}}, Columns: []Column{meanOverDistance}, Sets: sets})
	v := s.Series[0].Value
	near(t, "mean over 0.1 m", v[0], 18632.635, 1e-14)
	near(t, "mean over 1 m", v[1], 2745.862, 1e-14)
	if len(s.Crossings) != 1 {
		t.Fatalf("%d crossings", len(s.Crossings))
	}
	c := s.Crossings[0]
	near(t, "crossing", c.X, 1.8/(6000/980.665-1), 1e-15)
	near(t, "crossing", c.X, 0.351679, 2e-6)
	if c.Limit.ID != "mean-6" || c.Lower != quantity.Up || c.Jumps || c.Y > 6000 || c.End != TheValue {
		t.Errorf("%+v", c)
	}
	for _, side := range []struct {
		x      float64
		beyond bool
	}{{c.X, false}, {math.Nextafter(c.X, 0), true}} {
		res, _, _, err := Check(fall(t), nil, Move{"stop.distance", side.x})
		if err != nil {
			t.Fatal(err)
		}
		if y := meanOverDistance.in(&res).Value; (y > 6000) != side.beyond {
			t.Errorf("%v gives %v", side.x, y)
		}
	}
}

// at returns the figures of a series at a point, NaN where it has none.
func (c *Series) at(i int) arrest.Ends {
	pick := func(xs []float64) float64 {
		if xs == nil {
			return math.NaN()
		}
		return xs[i]
	}
	return arrest.Ends{Low: pick(c.Low), Value: pick(c.Value), High: pick(c.High), Reach: pick(c.Reach)}
}

// sameAsChecks holds every figure of a sweep against a single check.
func sameAsChecks(t *testing.T, s *Swept) {
	t.Helper()
	for i := range s.Len() {
		res, _, can, err := Check(s.Job, nil, s.At(i)...)
		if err != nil {
			t.Fatal(err)
		}
		if impossible := s.Impossible != nil && s.Impossible[i]; impossible == can {
			t.Fatalf("point %d: impossible %v, check %v", i, impossible, can)
		}
		for k := range s.Series {
			c := &s.Series[k]
			want, bound := absent, c.Bound
			if e := c.in(&res); e != nil {
				want, bound = arrest.Ends{Low: e.Low, Value: e.Value, High: e.High, Reach: e.Reach}, e.Bound
			}
			got := c.at(i)
			if !sameFloat(got.Low, want.Low) || !sameFloat(got.Value, want.Value) || !sameFloat(got.High, want.High) ||
				!sameFloat(got.Reach, want.Reach) || bound != c.Bound {
				t.Fatalf("%+v at %+v: swept %+v %s, checked %+v %s", c.Column, s.At(i), got, c.Bound, want, bound)
			}
		}
	}
}

// Every column of every job, quick or by single checks, along every input, and
// along two.
func TestSweepIsSingleChecks(t *testing.T) {
	label := arrest.Rating{Document: "label of the lanyard", TotalMass: band(t, quantity.Mass, "59 kg .. 140 kg"),
		FreeFallAtMost: band(t, quantity.Length, "1.7 m")}
	peak := band(t, quantity.Force, "6 kN")
	label.PeakForceAtMost = &peak
	jobs := map[string]*arrest.Job{
		"exact": fall(t),
		"bands": banded(t),
		"time":  entries{"worker.mass": "100 kg", "worker.tools": "0 kg .. 5 kg", "fall.free_fall": "1.8 m", "fall.initial_speed": "1 m/s", "stop.time": "0.3 s"}.job(t),
		"both":  entries{"worker.mass": "100 kg", "fall.free_fall": "1.8 m", "stop.distance": "1.07 m", "stop.time": "0.3 s"}.job(t),
		"rated": entries{"worker.mass": "135 kg", "worker.tools": "0.1 kg .. 0.3 kg", "fall.free_fall": "1.6 m .. 1.7 m", "stop.distance": "1 m"}.job(t),
		"ramp":  entries{"worker.mass": "100 kg", "fall.free_fall": "1.8 m", "stop.distance": "1 m .. 1.1 m"}.job(t),
		"ramps": entries{"worker.mass": "100 kg", "fall.free_fall": "1.8 m", "stop.distance": "1 m .. 1.1 m", "stop.time": "0.25 s .. 0.27 s"}.job(t),
	}
	jobs["rated"].Ratings = []arrest.Rating{label}
	jobs["ramp"].Point.Pulse, jobs["ramps"].Point.Pulse = arrest.RisingRamp, arrest.RisingRamp
	for name, j := range jobs {
		for i := range j.Inputs {
			in := &j.Inputs[i]
			low, high := in.Band.Low/3, 3*max(in.Band.High, 0.1)
			axis := Axis{in.Key, linear(t, max(low, 0.01), high, 40)}
			t.Run(name+" "+in.Key, func(t *testing.T) {
				sameAsChecks(t, sweep(t, j, Plan{Axes: []Axis{axis}, Columns: Columns(j)}))
			})
		}
		second := j.Inputs[len(j.Inputs)-2]
		axes := []Axis{{"worker.mass", linear(t, 50, 150, 7)}, {second.Key, linear(t, second.Band.Low/2, second.Band.High*2, 9)}}
		sameAsChecks(t, sweep(t, j, Plan{Axes: axes, Columns: Columns(j)}))
	}
}

// With a time of 0.3 s the floor of the peak over the distance is least at
// d = v*t/2 and is W + m*v/t there (M-06); beyond d = v*t + g*t^2/2 nothing can
// happen.
func TestFloorTurnsInDistance(t *testing.T) {
	j := entries{"worker.mass": "100 kg", "fall.free_fall": "1.8 m", "stop.distance": "1.07 m", "stop.time": "0.30 s"}.job(t)
	s := sweep(t, j, Plan{Axes: []Axis{{"stop.distance", linear(t, 0.3, 2.8, 26)}}, Columns: []Column{floorOfPeak, meanOverDistance}})
	if len(s.Turns) != 1 {
		t.Fatalf("%+v", s.Turns)
	}
	v := math.Sqrt(2 * 9.80665 * 1.8)
	turn := s.Turns[0]
	near(t, "where", turn.X, v*0.3/2, 1e-12)
	near(t, "least floor", turn.Y, 980.665+100*v/0.3, 1e-14)
	if turn.Greatest || turn.Column != 0 || turn.End != TheValue {
		t.Errorf("%+v", turn)
	}
	for i := range s.Len() {
		if beyond := s.At(i)[0].To >= v*0.3+9.80665*0.09/2; s.Impossible[i] != beyond {
			t.Errorf("%v impossible: %v", s.At(i), s.Impossible[i])
		}
	}
}

// Over bands both ends cross a limit of their own: up to the first the limit is
// exceeded for all that the entries allow, from the second on for nothing. A
// printed pair gives a crossing for each figure.
func TestCrossingsOfBothEnds(t *testing.T) {
	j := entries{"worker.mass": "90 kg .. 110 kg", "fall.free_fall": "1.8 m", "stop.distance": "1 m"}.job(t)
	l := rule(t, "mean", arrest.MeanForceOverDistance, "1800 lbf")
	also := band(t, quantity.Force, "8 kN")
	l.AlsoPrinted = &also
	s := sweep(t, j, Plan{Axes: []Axis{{"stop.distance", linear(t, 0.05, 2, 40)}}, Columns: []Column{meanOverDistance}, Sets: set(l)})
	if len(s.Crossings) != 4 {
		t.Fatalf("%+v", s.Crossings)
	}
	for i, want := range []struct {
		end     End
		mass    float64
		printed bool
		limit   float64
	}{
		{TheLow, 90, false, 1800 * 4.4482216152605}, {TheLow, 90, true, 8000},
		{TheHigh, 110, false, 1800 * 4.4482216152605}, {TheHigh, 110, true, 8000},
	} {
		c := s.Crossings[i]
		near(t, "crossing", c.X, 1.8/(want.limit/(want.mass*9.80665)-1), 1e-14)
		if c.End != want.end || c.Printed != want.printed || c.Lower != quantity.Up {
			t.Errorf("%+v, want %+v", c, want)
		}
	}
}

// text is everything a sweep holds, written out.
func (s *Swept) text() []byte {
	var b bytes.Buffer
	for i := range s.Series {
		c := &s.Series[i]
		fmt.Fprintf(&b, "%v %s %x %x %x %x\n", c.Column, c.Bound, c.Low, c.Value, c.High, c.Reach)
	}
	fmt.Fprintf(&b, "%v\n", s.Impossible)
	for _, t := range s.Turns {
		fmt.Fprintf(&b, "%+v %x %x\n", t, t.X, t.Y)
	}
	for _, c := range s.Crossings {
		fmt.Fprintf(&b, "%s %v %d %s %d %x %x %v %v\n", c.Limit.ID, c.Printed, c.Column, c.End, c.Row, c.X, c.Y, c.Lower, c.Jumps)
	}
	return b.Bytes()
}

// Any number of workers gives the same bytes: a long sweep, one over two
// inputs, one by single checks.
func TestSweepWorkers(t *testing.T) {
	sets := set(rule(t, "mean", arrest.MeanForceOverDistance, "3 kN"), rule(t, "peak", arrest.PeakForce, "3.2 kN"))
	long := Plan{Axes: []Axis{{"stop.distance", linear(t, 0.3, 2, 20001)}}, Columns: []Column{floorOfPeak, meanOverDistance}, Sets: sets}
	two := Plan{Axes: []Axis{{"stop.time", linear(t, 0.2, 0.5, 30)}, {"stop.distance", linear(t, 0.3, 2, 300)}}, Columns: long.Columns, Sets: sets}
	checked := Plan{Axes: []Axis{{"stop.distance", linear(t, 0.3, 2, 500)}}, Columns: Columns(banded(t)), Sets: sets}
	for name, p := range map[string]Plan{"long": long, "two": two, "checked": checked} {
		p.Workers = 1
		one := sweep(t, banded(t), p)
		p.Workers = 8
		eight := sweep(t, banded(t), p)
		if !bytes.Equal(one.text(), eight.text()) {
			t.Errorf("%s: one and eight workers differ", name)
		}
		if len(one.Crossings) == 0 || len(one.Turns) == 0 {
			t.Errorf("%s: %d crossings, %d turns", name, len(one.Crossings), len(one.Turns))
		}
	}
}

// Rows of a sweep over two inputs are the sweeps of the last one alone.
func TestSweepOfTwoInputs(t *testing.T) {
	sets := set(rule(t, "mean", arrest.MeanForceOverDistance, "3 kN"))
	falls, distances := linear(t, 1, 2, 5), linear(t, 0.3, 2, 12)
	both := sweep(t, fall(t), Plan{Axes: []Axis{{"fall.free_fall", falls}, {"stop.distance", distances}}, Columns: []Column{meanOverDistance}, Sets: sets})
	for row, h := range falls {
		j, err := Substitute(fall(t), Move{"fall.free_fall", h})
		if err != nil {
			t.Fatal(err)
		}
		alone := sweep(t, &j, Plan{Axes: []Axis{{"stop.distance", distances}}, Columns: []Column{meanOverDistance}, Sets: sets})
		for i := range distances {
			if alone.Series[0].Value[i] != both.Series[0].Value[row*len(distances)+i] {
				t.Fatalf("row %d, point %d", row, i)
			}
		}
		if c := both.Crossings[row]; c.Row != row || c.X != alone.Crossings[0].X {
			t.Errorf("%+v, alone %+v", c, alone.Crossings[0])
		}
	}
}

// A crossing put back gives the limit within 1e-12 and is not beyond it, for
// any job and limit.
func TestCrossingsPutBack(t *testing.T) {
	columns := []Column{meanOverDistance, floorOfPeak}
	rapid.Check(t, func(rt *rapid.T) {
		j := fall(t)
		for i, within := range map[int][2]float64{0: {50, 140}, 2: {0.2, 4}} {
			x := rapid.Float64Range(within[0], within[1]).Draw(rt, j.Inputs[i].Key)
			moved, err := Substitute(j, Move{j.Inputs[i].Key, x})
			if err != nil {
				rt.Fatal(err)
			}
			j = &moved
		}
		l := rule(t, "row", arrest.MeanForceOverDistance, "1 kN")
		l.Bound.Value = rapid.Float64Range(1000, 20000).Draw(rt, "limit")
		s := sweep(t, j, Plan{Axes: []Axis{{"stop.distance", linear(t, 0.05, 3, 15)}}, Columns: columns, Sets: set(l)})
		for _, c := range s.Crossings {
			res, _, _, err := Check(j, nil, Move{"stop.distance", c.X})
			if err != nil {
				rt.Fatal(err)
			}
			y := columns[c.Column].in(&res).Value
			if y > l.Bound.Value || !quantity.Close(y, l.Bound.Value, 1e-12) || c.Jumps || y != c.Y {
				rt.Fatalf("%v gives %v, limit %v", c.X, y, l.Bound.Value)
			}
		}
	})
}

func TestWorkingOfARow(t *testing.T) {
	s := sweep(t, fall(t), Plan{Axes: []Axis{{"stop.distance", []float64{0.1, 1}}}, Columns: []Column{meanOverDistance}})
	res, can, err := s.Working(1)
	if err != nil || !can || len(res.Working) == 0 {
		t.Fatal(err, can)
	}
	found := false
	for _, w := range res.Working {
		if w.Formula == "F_d = W + m*v^2/(2*d)" {
			found = true
			near(t, "worked", w.Result.SI, 2745.862, 1e-14)
		}
	}
	if !found {
		t.Error("no line of the mean over the distance")
	}
	for _, in := range res.Inputs {
		if in.Key == "stop.distance" && in.Band.Text != "1 m" {
			t.Errorf("the row is worked at %q", in.Band.Text)
		}
	}
	if _, _, err := s.Working(2); !refused(err, NoSuchRow) {
		t.Errorf("%v", err)
	}
}

func TestSweepRefuses(t *testing.T) {
	columns := []Column{meanOverDistance}
	j := fall(t)
	j.Inputs = append(j.Inputs, arrest.Input{Key: "rated[1].total_mass", Role: arrest.OfDocument})
	d := Axis{"stop.distance", []float64{1, 2}}
	for want, p := range map[RefusalID]Plan{
		NoAxes:       {Columns: columns},
		NothingAsked: {Axes: []Axis{d}},
		UnknownKey:   {Axes: []Axis{{"stop.length", d.Values}}, Columns: columns},
		NotMoved:     {Axes: []Axis{{"rated[1].total_mass", d.Values}}, Columns: columns},
		Twice:        {Axes: []Axis{d, d}, Columns: columns},
		OutOfRange:   {Axes: []Axis{{"stop.distance", []float64{0, 1}}}, Columns: columns},
		NotRising:    {Axes: []Axis{{"stop.distance", []float64{1, 1}}}, Columns: columns},
		TooFewPoints: {Axes: []Axis{{"stop.distance", nil}}, Columns: columns},
	} {
		if _, err := Sweep(context.Background(), j, p); !refused(err, want) {
			t.Errorf("%v, want %s", err, want)
		}
	}
	many := make([]float64, 4000)
	for i := range many {
		many[i] = float64(i + 1)
	}
	p := Plan{Axes: []Axis{{"stop.distance", many}, {"worker.mass", many}}, Columns: columns}
	if _, err := Sweep(context.Background(), j, p); !refused(err, TooMany) {
		t.Errorf("%v", err)
	}
}

func TestSweepIsCancelled(t *testing.T) {
	ctx, stop := context.WithCancel(context.Background())
	stop()
	for _, workers := range []int{1, 4} {
		p := Plan{Axes: []Axis{{"stop.distance", linear(t, 0.1, 2, 20000)}}, Columns: []Column{meanOverDistance}, Workers: workers}
		if s, err := Sweep(ctx, fall(t), p); !errors.Is(err, context.Canceled) || s != nil {
			t.Errorf("%v", err)
		}
	}
}
