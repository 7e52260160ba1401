package arrest

import (
	"math"
	"math/rand/v2"
	"testing"
)

// No pulse may have a peak below the floor of M-06 for its own distance and
// time. Each pulse is a random run of force levels of random length, scaled so
// that it stops the body, and integrated exactly piece by piece.
func TestFloorAgainstRandomPulses(t *testing.T) {
	r := rand.New(rand.NewPCG(3, 4))
	tried, nearest := 0, math.Inf(1)
	for tried < 10000 {
		c := Case{Mass: 100, FreeFall: 4 * r.Float64(), InitialSpeed: 2 * r.Float64(), Gravity: StandardGravity}
		var p Point
		At(&c, &p)
		distance, time, peak, ok := randomStop(r, &p, c.Gravity)
		if !ok {
			continue
		}
		tried++
		for _, known := range [...]Case{{Distance: distance}, {Time: time}, {Distance: distance, Time: time}} {
			c.Distance, c.Time = known.Distance, known.Time
			At(&c, &p)
			if p.Impossible {
				t.Fatalf("a stop that happened is called impossible: %+v", c)
			}
			if p.Floor > peak*(1+1e-9) {
				t.Fatalf("floor %.12g above the peak %.12g of a stop: %+v", p.Floor, peak, c)
			}
			nearest = math.Min(nearest, peak/p.Floor)
		}
	}
	if nearest > 1.05 {
		t.Errorf("no random pulse came nearer than %.3f to the floor: the test shows little", nearest)
	}
	t.Logf("%d pulses, the nearest %.6f times its floor", tried, nearest)
}

// randomStop draws force levels and lets the body run through them until it
// rests. ok is false when it does not come to rest.
func randomStop(r *rand.Rand, p *Point, g float64) (distance, time, peak float64, ok bool) {
	v := p.Speed
	levels := 1 + r.IntN(6)
	top := p.Weight * (1.05 + 8*r.Float64())
	for range levels {
		force := top * math.Sqrt(r.Float64())
		if r.IntN(3) == 0 {
			force = 0
		}
		dt := (0.02 + 0.3*r.Float64()) * p.TotalMass * (v + 0.1) / top
		a := g - force/p.TotalMass
		end := v + a*dt
		if end <= 0 && a < 0 {
			dt = -v / a
			return distance + v*dt + a*dt*dt/2, time + dt, math.Max(peak, force), distance+v*dt > 1e-6
		}
		distance, time, peak, v = distance+v*dt+a*dt*dt/2, time+dt, math.Max(peak, force), end
	}
	a := g - top/p.TotalMass
	dt := -v / a
	return distance + v*dt/2, time + dt, math.Max(peak, top), distance+v*dt > 1e-6
}

// Over bands the floor must not lie above the least peak of any point inside,
// and must be reached by one: the least of a fine search is compared with it.
func TestFloorOverRandomBoxes(t *testing.T) {
	r := rand.New(rand.NewPCG(5, 6))
	points, boxes, loosest := 0, 0, 0.0
	for points < 100000 {
		j := randomBox(r)
		if _, impossible := Impossible(j); impossible {
			continue
		}
		s, _ := overCorners(j)
		floor := s.of[indexOf(PeakForce, Given)]
		boxes++
		least := math.Inf(1)
		var p Point
		for range 100 {
			c := randomInside(r, j)
			At(&c, &p)
			points++
			if p.Impossible {
				continue
			}
			least = math.Min(least, p.Floor)
			if p.Floor < floor.low.value*(1-1e-13) {
				t.Fatalf("floor over the band %.15g above the floor %.15g of %+v", floor.low.value, p.Floor, c)
			}
			if p.Floor > floor.high.value*(1+1e-13) {
				t.Fatalf("reach over the band %.15g below the floor %.15g of %+v", floor.high.value, p.Floor, c)
			}
		}
		loosest = math.Max(loosest, searchedFloor(j)/floor.low.value-1)
	}
	if !(loosest <= 1e-9) {
		t.Errorf("the least floor found by search lies %g above the floor over the band, want 1e-9", loosest)
	}
	t.Logf("%d boxes, %d points, loosest %.2g", boxes, points, loosest)
}

// randomBox makes a job with bands from nothing to wide.
func randomBox(r *rand.Rand) *Job {
	c := randomCase(r)
	j := &Job{Persons: 1, Point: c}
	add := func(role Role, key string, x float64, set func(*Case, float64)) {
		w := 0.0
		if r.IntN(4) > 0 {
			w = 0.4 * r.Float64()
		}
		in := Input{Key: key, Role: role, Set: set}
		in.Band.Low, in.Band.Value, in.Band.High = x*(1-w), x, x*(1+w)
		j.Inputs = append(j.Inputs, in)
	}
	add(OfWorker, "worker.mass", c.Mass, func(c *Case, x float64) { c.Mass = x })
	add(OfWorker, "worker.tools", c.Tools, func(c *Case, x float64) { c.Tools = x })
	add(OfFall, "fall.free_fall", c.FreeFall, func(c *Case, x float64) { c.FreeFall = x })
	add(OfFall, "fall.initial_speed", c.InitialSpeed, func(c *Case, x float64) { c.InitialSpeed = x })
	add(OfStop, "stop.distance", c.Distance, func(c *Case, x float64) { c.Distance = x })
	add(OfStop, "stop.time", c.Time, func(c *Case, x float64) { c.Time = x })
	return j
}

func randomInside(r *rand.Rand, j *Job) Case {
	c := j.Point
	for i := range j.Inputs {
		in := &j.Inputs[i]
		f := r.Float64()
		if r.IntN(4) == 0 {
			f = float64(r.IntN(2))
		}
		in.Set(&c, in.Band.Low+f*(in.Band.High-in.Band.Low))
	}
	return c
}

// searchedFloor looks for the least floor of a box by nested golden sections
// over the distance and the speed, at the least mass and the longest time: a
// route that knows nothing of the turning point.
func searchedFloor(j *Job) float64 {
	lo, hi := ends(j)
	var a, b Point
	At(&lo, &a)
	At(&hi, &b)
	least := math.Inf(1)
	for _, t := range [...]float64{lo.Time, (lo.Time + hi.Time) / 2, hi.Time} {
		overSpeed := golden(a.Speed, b.Speed, func(v float64) float64 {
			return golden(lo.Distance, hi.Distance, func(d float64) float64 {
				p := Point{TotalMass: a.TotalMass, Weight: a.Weight, Speed: v, Energy: a.TotalMass * v * v / 2, Momentum: a.TotalMass * v}
				stopAt(&p, lo.Gravity, d, t)
				return p.Floor
			})
		})
		least = math.Min(least, overSpeed)
	}
	return least
}

// golden returns the least value of a function with one valley on [a, b].
func golden(a, b float64, f func(float64) float64) float64 {
	const ratio = 0.6180339887498949
	least := math.Min(f(a), f(b))
	for range 80 {
		x, y := b-ratio*(b-a), a+ratio*(b-a)
		fx, fy := f(x), f(y)
		least = math.Min(least, math.Min(fx, fy))
		if fx < fy || math.IsInf(fx, 1) && math.IsInf(fy, 1) {
			b = y
		} else {
			a = x
		}
	}
	return least
}

// Every extreme of the means and their ratio over the part of the box that can
// happen contains every point inside.
func TestSpansHoldRandomPoints(t *testing.T) {
	r := rand.New(rand.NewPCG(7, 8))
	var p Point
	parts := 0
	for range 2000 {
		j := randomBox(r)
		if _, impossible := Impossible(j); impossible {
			continue
		}
		s, part := overCorners(j)
		if part {
			parts++
		}
		for range 50 {
			c := randomInside(r, j)
			At(&c, &p)
			if p.Impossible {
				continue
			}
			for _, i := range s.live {
				x := outputs[i].of(&p)
				if x < s.of[i].low.value*(1-1e-12) || x > s.of[i].high.value*(1+1e-12) {
					t.Fatalf("%s = %.15g outside %.15g .. %.15g at %+v", outputs[i].quantity, x, s.of[i].low.value, s.of[i].high.value, c)
				}
			}
		}
	}
	if parts < 50 {
		t.Errorf("only %d boxes partly impossible: the edge is not tried", parts)
	}
}

// mass 94..106 kg, free fall 1.75..1.85 m, distance 0.80..1.10 m, time
// 0.29..0.31 s: the least floor lies at the shortest distance d for which the
// even braking takes 0.31 s; worked out beside the program with 50 digits.
func TestFloorOverBands(t *testing.T) {
	j := figures{mass: "94 kg .. 106 kg", fall: "1.75 m .. 1.85 m", distance: "0.80 m .. 1.10 m", time: "0.29 s .. 0.31 s"}.job(t)
	res := Evaluate(j)
	e := find(t, &res, PeakForce, Given)
	near(t, "floor", e.Low, 2698.30591, 2e-9)
	if e.Bound != AtLeast || !math.IsNaN(e.High) || !math.IsNaN(e.Value) {
		t.Errorf("a floor over ranges has neither upper end nor middle: %+v", e)
	}
}

func TestImpossible(t *testing.T) {
	j := figures{mass: "100 kg", fall: "1.8 m", distance: "1.07 m", time: "0.15 s"}.job(t)
	limit, impossible := Impossible(j)
	if !impossible {
		t.Error("1.07 m in 0.15 s is called possible")
	}
	near(t, "limit", limit, 1.00158159368, 1e-11) // v*t + g*t^2/2, python decimal, 50 digits
	j = figures{mass: "100 kg", fall: "1.8 m", distance: "1.00 m .. 1.07 m", time: "0.15 s"}.job(t)
	if _, impossible := Impossible(j); impossible {
		t.Error("a box that is possible in part is refused")
	}
	res := Evaluate(j)
	if e := find(t, &res, PeakForce, Given); !math.IsInf(e.Reach, 1) || !hasWarning(&res, PartImpossible) {
		t.Errorf("reach %v: the upper end must be open and told", e.Reach)
	}
}
