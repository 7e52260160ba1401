package connector

import (
	"math"
	"math/rand/v2"
)

// A dice draws paths and falls for the tests. Equal seeds draw equal paths.
type dice struct{ *rand.Rand }

func newDice(seed, stream uint64) dice { return dice{rand.New(rand.NewPCG(seed, stream))} }

// within draws evenly, spread evenly in the logarithm.
func (d dice) within(a, b float64) float64 { return a + float64((b-a)*d.Float64()) }
func (d dice) spread(a, b float64) float64 {
	// By whole octaves: no function whose last digit depends on the machine.
	octaves := 0
	for x := a; 2*x < b; x *= 2 {
		octaves++
	}
	return min(b, math.Ldexp(a, d.IntN(octaves+1))*(1+d.Float64()))
}
func (d dice) chance(p float64) bool { return d.Float64() < p }

// fall draws a fall that ends after a given time.
func (d dice) fall() Fall {
	f := Fall{Mass: d.within(40, 160), FreeFall: d.within(0, 4), Gravity: StandardGravity, Duration: d.within(0.2, 1.6)}
	if d.chance(0.1) {
		f.FreeFall = 0
	}
	if d.chance(0.2) {
		f.InitialSpeed = d.within(0, 3)
	}
	return f
}

// parts draws one to five parts of any kind, in any order, and now and then a
// dashpot from hardly noticeable to overdamped.
func (d dice) parts() []Part {
	var parts []Part
	for range 1 + d.IntN(5) {
		parts = append(parts, d.part())
	}
	if d.chance(0.9) {
		parts = append(parts, d.elastic())
	}
	if d.chance(0.6) {
		parts = append(parts, NewDashpot(d.spread(5, 40000)))
	}
	for i := range parts {
		parts[i].Lifeline = d.chance(0.2)
	}
	return parts
}

func (d dice) part() Part {
	switch d.IntN(7) {
	case 0, 1:
		return d.elastic()
	case 2:
		return d.points()
	case 3:
		return NewAbsorber(d.plateau())
	case 4:
		return NewRetractable(d.within(0, 0.6), d.plateau())
	case 5:
		p := NewRopeGrab(d.plateau())
		p.Stiffness = d.spread(2e4, 5e5)
		return p
	}
	return Loose(d.within(0, 0.5))
}

func (d dice) elastic() Part {
	p := Elastic(Kind(1+d.IntN(3)), d.spread(4e3, 3e5))
	switch {
	case d.chance(0.4):
		p.Unloading = p.Stiffness * d.within(1, 3)
	case d.chance(0.1):
		p.Unloading = math.Inf(1)
	}
	return p
}

func (d dice) plateau() Plateau {
	q := Plateau{Force: d.spread(600, 9000), Travel: d.spread(0.02, 1.8)}
	switch {
	case d.chance(0.25):
		q.Activation = q.Force * d.within(1, 1.6)
	case d.chance(0.25):
		q.Activation = q.Force * d.within(0.3, 1)
		q.Rise = q.Travel * d.within(0.05, 1)
	case d.chance(0.05):
		q.Travel = math.Inf(1)
	}
	return q
}

func (d dice) points() Part {
	x, f, steepest := 0.0, 0.0, 0.0
	if d.chance(0.3) {
		x = d.within(0, 0.3)
	}
	points := []Point{{x, f}}
	back := d.chance(0.4)
	n := 1 + d.IntN(4)
	for i := range n {
		k := d.spread(1e3, 3e5)
		df := d.spread(200, 4000)
		if !back && i > 0 && i < n-1 && d.chance(0.3) {
			df = 0
			x += d.within(0.01, 0.4)
		} else {
			x += df / k
		}
		f += df
		last := points[len(points)-1]
		points = append(points, Point{x, f})
		steepest = max(steepest, (f-last.Force)/(x-last.Extension))
	}
	if back {
		return FromPoints(points, 0)
	}
	return FromPoints(points, steepest*d.within(1, 2))
}
