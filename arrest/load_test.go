package arrest

import (
	"fmt"
	"math"
	"math/rand/v2"
	"testing"

	"arrestcheck/arrest/quantity"
)

// loadFigures are the entries of a moving load as a user would write them.
type loadFigures struct {
	mass, time, distance, driving string
	before, after                 []string
	up                            [3]float64
}

func (f loadFigures) job(t testing.TB) *Job {
	t.Helper()
	j := &Job{}
	j.Point.Gravity = StandardGravity
	j.Point.Load.Up, j.Point.Load.Axes = f.up, len(f.before)
	add := func(key string, role Role, d quantity.Dimension, text string, set func(*Case, float64)) {
		if text == "" {
			return
		}
		b := parse(t, d, text)
		x := b.Value
		if math.IsNaN(x) {
			x = b.Low
		}
		set(&j.Point, x)
		j.Inputs = append(j.Inputs, Input{Key: key, Role: role, Band: b, Set: set})
	}
	add("moving_load.mass", OfWorker, quantity.Mass, f.mass, func(c *Case, x float64) { c.Load.Mass = x })
	for i := range f.before {
		add(fmt.Sprintf("moving_load.velocity_before[%d]", i+1), OfFall, quantity.Speed, f.before[i], func(c *Case, x float64) { c.Load.Before[i] = x })
		add(fmt.Sprintf("moving_load.velocity_after[%d]", i+1), OfFall, quantity.Speed, f.after[i], func(c *Case, x float64) { c.Load.After[i] = x })
	}
	add("moving_load.distance", OfStop, quantity.Length, f.distance, func(c *Case, x float64) { c.Load.Distance = x })
	add("moving_load.time", OfStop, quantity.Time, f.time, func(c *Case, x float64) { c.Load.Time = x })
	add("moving_load.driving_force", OfDrive, quantity.Force, f.driving, func(c *Case, x float64) { c.Load.Driving = x })
	return j
}

// loadJobs use every line of M-60 between them.
func loadJobs(t testing.TB) map[string]*Job {
	rest := []string{"0 m/s", "0 m/s", "0 m/s"}
	return map[string]*Job{
		"bumper":      loadFigures{mass: "900 kg", before: []string{"1.1 m/s"}, after: rest[:1], distance: "0.200 m", driving: "150 N"}.job(t),
		"both routes": loadFigures{mass: "900 kg ± 5 kg", before: []string{"1.1 m/s"}, after: rest[:1], distance: "0.200 m", time: "0.3 s", driving: "0 N"}.job(t),
		"slope":       loadFigures{mass: "900 kg", before: []string{"1.1 m/s"}, after: rest[:1], time: "0.3 s", up: [3]float64{-0.1, 0, 0}}.job(t),
		"plane":       loadFigures{mass: "65 kg", before: []string{"3 m/s", "-9 m/s"}, after: rest[:2], time: "0.2 s", up: [3]float64{0, 1, 0}}.job(t),
		"space":       loadFigures{mass: "65 kg", before: []string{"3 m/s", "-9 m/s", "1 m/s .. 2 m/s"}, after: rest, time: "0.2 s", up: [3]float64{0, 0, 1}}.job(t),
	}
}

// 65 kg at (3, -9) m/s brought to rest: 616.64 N*s at 108.43 degrees, published
// rows imp-2d-mag and imp-2d-dir of testdata/reference/worked.toml; 900 kg at
// 1.1 m/s over 0.200 m: 2722.5 N, row we-bumper.
func TestMovingLoad(t *testing.T) {
	res := Evaluate(loadJobs(t)["plane"])
	near(t, "impulse", find(t, &res, Impulse, Given).Value, 616.644143733, 1e-11)
	near(t, "direction", find(t, &res, ImpulseDirection, Given).Value*180/math.Pi, 108.434948823, 1e-11)
	near(t, "F_y", find(t, &res, StoppingForceY, Given).Value, 65*9/0.2+65*StandardGravity, 1e-14)
	res = Evaluate(loadFigures{mass: "900 kg", before: []string{"1.1 m/s"}, after: []string{"0 m/s"}, distance: "0.200 m"}.job(t))
	near(t, "bumper", find(t, &res, StoppingForce, Given).Value, 2722.5, 1e-14)
	near(t, "deceleration", find(t, &res, MeanDeceleration, Given).Value, 1.1*1.1/0.4, 1e-14)
	if res.estimate(ImpulseX, Given) >= 0 {
		t.Error("one component is no vector")
	}
	res = Evaluate(loadJobs(t)["both routes"])
	near(t, "ratio", find(t, &res, ShapeRatio, Given).Value, 1.1*0.3/0.4, 1e-14)
	if len(res.Contradictions) != 0 {
		t.Error("two means of one stop are no contradiction")
	}
}

// One component: exact entries leave no spread, and a band keeps its low end.
func TestOneComponentKeepsItsLowEnd(t *testing.T) {
	res := Evaluate(loadJobs(t)["bumper"])
	if e := find(t, &res, Impulse, Given); e.Low != e.High || !quantity.Close(e.Low, 990, 1e-15) {
		t.Errorf("impulse %g .. %g, want 900*1.1", e.Low, e.High)
	}
	res = Evaluate(loadFigures{mass: "900 kg", before: []string{"1.0 m/s .. 1.2 m/s"}, after: []string{"0 m/s"}, time: "0.3 s"}.job(t))
	for _, q := range []Quantity{StoppingForce, PeakForce} {
		if e := find(t, &res, q, Given); !quantity.Close(e.Low, 900*1.0/0.3, 1e-15) {
			t.Errorf("%s from %g, want 3000", q, e.Low)
		}
	}
	if e := find(t, &res, MeanDeceleration, Given); !quantity.Close(e.Low, 1/0.3, 1e-15) {
		t.Errorf("deceleration from %g", e.Low)
	}
}

func randomLoad(r *rand.Rand) Case {
	c := Case{Gravity: StandardGravity}
	l := &c.Load
	l.Mass, l.Time, l.Axes = 1+1000*r.Float64(), 0.05+r.Float64(), 3
	for i := range l.Before {
		l.Before[i], l.After[i] = 10*r.NormFloat64(), 3*r.NormFloat64()
	}
	l.Up = direction([3]float64{r.NormFloat64(), r.NormFloat64(), r.NormFloat64()})
	return c
}

// Turning the axes leaves every magnitude as it is.
func TestTurningTheAxesLeavesMagnitudes(t *testing.T) {
	r := rand.New(rand.NewPCG(11, 12))
	for range 2000 {
		c := randomLoad(r)
		turned := c
		x, y := direction([3]float64{r.NormFloat64(), r.NormFloat64(), r.NormFloat64()}), direction([3]float64{r.NormFloat64(), r.NormFloat64(), r.NormFloat64()})
		z := direction(cross(x, y))
		y = cross(z, x)
		turn := func(v [3]float64) [3]float64 { return [3]float64{dot(x, v), dot(y, v), dot(z, v)} }
		turned.Load.Before, turned.Load.After, turned.Load.Up = turn(c.Load.Before), turn(c.Load.After), turn(c.Load.Up)
		var p, q Point
		At(&c, &p)
		At(&turned, &q)
		near(t, "impulse", q.Load.Impulse, p.Load.Impulse, 1e-12)
		near(t, "force", q.Load.OverTime, p.Load.OverTime, 1e-11)
		near(t, "energy", q.Load.Energy, p.Load.Energy, 1e-10)
	}
}

func cross(a, b [3]float64) [3]float64 {
	return [3]float64{a[1]*b[2] - a[2]*b[1], a[2]*b[0] - a[0]*b[2], a[0]*b[1] - a[1]*b[0]}
}

// A stop cut in two adds up: the impulses as vectors, and the mean force as
// the mean of both parts by their times.
func TestSplittingAnImpulseAddsUp(t *testing.T) {
	r := rand.New(rand.NewPCG(13, 14))
	for range 2000 {
		c := randomLoad(r)
		first, second := c, c
		share := r.Float64()
		for i := range c.Load.Before {
			middle := c.Load.Before[i] + r.Float64()*(c.Load.After[i]-c.Load.Before[i])
			first.Load.After[i], second.Load.Before[i] = middle, middle
		}
		first.Load.Time, second.Load.Time = share*c.Load.Time, (1-share)*c.Load.Time
		var p, a, b Point
		At(&c, &p)
		At(&first, &a)
		At(&second, &b)
		for i := range p.Load.Change {
			scale := math.Abs(p.Load.Change[i]) + math.Abs(a.Load.Change[i]) + p.Load.Impulse
			if d := a.Load.Change[i] + b.Load.Change[i] - p.Load.Change[i]; math.Abs(d) > 1e-13*scale {
				t.Fatalf("impulse %d is off by %g", i, d)
			}
			sum := share*a.Load.Force[i] + (1-share)*b.Load.Force[i]
			if d := sum - p.Load.Force[i]; math.Abs(d) > 1e-10*(scale/c.Load.Time+math.Abs(sum)) {
				t.Fatalf("force %d is off by %g", i, d)
			}
		}
	}
}

// A fall is a moving load with the weight along the path: both must agree.
func TestFallAsMovingLoad(t *testing.T) {
	r := rand.New(rand.NewPCG(15, 16))
	var p, q Point
	for range 2000 {
		c := randomCase(r)
		At(&c, &p)
		l := Case{Gravity: c.Gravity, Load: Load{Mass: p.TotalMass, Before: [3]float64{-p.Speed}, Time: c.Time, Distance: c.Distance, Up: [3]float64{1}, Axes: 1}}
		At(&l, &q)
		near(t, "over distance", q.Load.OverDistance, p.MeanOverDistance, 1e-13)
		near(t, "over time", q.Load.OverTime, p.MeanOverTime, 1e-13)
		near(t, "ratio", q.Load.Ratio, p.ShapeRatio, 1e-13)
	}
}

// Bands: no point inside lies beyond the ends, also where components go
// through zero.
func TestLoadSpansHoldRandomPoints(t *testing.T) {
	r := rand.New(rand.NewPCG(17, 18))
	band := func(unit string, x, w float64) string {
		return fmt.Sprintf("%.6f %s .. %.6f %s", x-w, unit, x+w, unit)
	}
	for range 300 {
		f := loadFigures{mass: band("kg", 100, 20), time: band("s", 0.3, 0.1), up: direction([3]float64{r.NormFloat64(), r.NormFloat64(), r.NormFloat64()})}
		for range 3 {
			f.before = append(f.before, band("m/s", 2*r.NormFloat64(), 2*r.Float64()))
			f.after = append(f.after, band("m/s", r.NormFloat64(), r.Float64()))
		}
		j := f.job(t)
		s, _ := overCorners(j)
		var p Point
		for range 100 {
			c := randomInside(r, j)
			At(&c, &p)
			for _, i := range s.live {
				x, o := outputs[i].of(&p), &s.of[i]
				if o.known() && (x < o.low.value-1e-9*math.Abs(x) || x > o.high.value+1e-9*math.Abs(x)) {
					t.Fatalf("%s = %.12g outside %.12g .. %.12g", outputs[i].quantity, x, o.low.value, o.high.value)
				}
			}
		}
	}
}

// With a time and a distance the peak is not below the greater mean, and exact
// entries leave it there: 100 kg from 2 m/s to rest, m*v/t = 400 N in 0.5 s,
// m*v^2/(2*d) = 800 N over 0.25 m; and the other way round 800 N and 400 N.
func TestFloorOfALoadIsTheGreaterMean(t *testing.T) {
	for distance, time := range map[string]string{"0.25 m": "0.5 s", "0.5 m": "0.25 s"} {
		j := loadFigures{mass: "100 kg", before: []string{"2 m/s"}, after: []string{"0 m/s"}, distance: distance, time: time}.job(t)
		res := Evaluate(j)
		if e := find(t, &res, PeakForce, Given); e.Low != 800 || e.Reach != 800 {
			t.Errorf("%s in %s: %g .. %g N, want 800", distance, time, e.Low, e.Reach)
		}
	}
}
