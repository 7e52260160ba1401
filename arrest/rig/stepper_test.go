package rig

import (
	"math"
	"testing"
)

// table writes the weights out as the method has them.
func table() (a [7][6]float64, e [7]float64) {
	a[1] = [6]float64{a10}
	a[2] = [6]float64{a20, a21}
	a[3] = [6]float64{a30, a31, a32}
	a[4] = [6]float64{a40, a41, a42, a43}
	a[5] = [6]float64{a50, a51, a52, a53, a54}
	a[6] = [6]float64{b0, 0, b2, b3, b4, b5}
	return a, [7]float64{e0, 0, e2, e3, e4, e5, e6}
}

// The order conditions of E. Hairer, S. Norsett, G. Wanner, Solving Ordinary
// Differential Equations I, II.2, from memory: the sums over all rooted trees of
// up to five nodes, which no weight written wrongly can hold.
func TestOrderConditions(t *testing.T) {
	a, e := table()
	b := a[6]
	var c [7]float64
	for i := range a {
		for _, w := range a[i] {
			c[i] += w
		}
	}
	apply := func(x [7]float64) (y [7]float64) {
		for i := range a {
			for j, w := range a[i] {
				y[i] += w * x[j]
			}
		}
		return y
	}
	power := func(n float64) (y [7]float64) {
		for i := range y {
			y[i] = math.Pow(c[i], n)
		}
		return y
	}
	times := func(x, y [7]float64) [7]float64 {
		for i := range x {
			x[i] *= y[i]
		}
		return x
	}
	one := power(0)
	trees := []struct {
		x     [7]float64
		want  float64
		order int
	}{
		{one, 1, 1}, {c, 1. / 2, 2},
		{power(2), 1. / 3, 3}, {apply(c), 1. / 6, 3},
		{power(3), 1. / 4, 4}, {times(c, apply(c)), 1. / 8, 4}, {apply(power(2)), 1. / 12, 4}, {apply(apply(c)), 1. / 24, 4},
		{power(4), 1. / 5, 5}, {times(power(2), apply(c)), 1. / 10, 5}, {times(apply(c), apply(c)), 1. / 20, 5},
		{times(c, apply(power(2))), 1. / 15, 5}, {times(c, apply(apply(c))), 1. / 30, 5},
		{apply(power(3)), 1. / 20, 5}, {apply(times(c, apply(c))), 1. / 40, 5},
		{apply(apply(power(2))), 1. / 60, 5}, {apply(apply(apply(c))), 1. / 120, 5},
	}
	for i, tree := range trees {
		sum, lower := 0.0, 0.0
		for j := range c {
			w := 0.0
			if j < 6 {
				w = b[j]
			}
			sum += w * tree.x[j]
			lower += (w - e[j]) * tree.x[j]
		}
		if math.Abs(sum-tree.want) > 1e-14 {
			t.Errorf("tree %d: %g, want %g", i, sum, tree.want)
		}
		if tree.order <= 4 && math.Abs(lower-tree.want) > 1e-14 {
			t.Errorf("tree %d with the lower order: %g, want %g", i, lower, tree.want)
		}
		// The dense output meets the trees of order four at every share q of a step.
		if tree.order > 4 {
			continue
		}
		for _, q := range []float64{0.3, 0.7, 1} {
			sum := 0.0
			for j := range dense {
				w := 0.0
				for n, x := range dense[j] {
					w += x * math.Pow(q, float64(n+1))
				}
				sum += w * tree.x[j]
			}
			if want := tree.want * math.Pow(q, float64(tree.order)); math.Abs(sum-want) > 1e-13 {
				t.Errorf("tree %d at %g of a step: %g, want %g", i, q, sum, want)
			}
		}
	}
}

// Steps of half the length leave about a thirty-second of the error.
func TestStepHasOrderFive(t *testing.T) {
	run := func(n int) state {
		s := stepper{g: gravity, mass: 100, c: 80, radius: 2, on: segment{0, math.Inf(1), 0, 9000}}
		y := state{0.1, 3, 0.6, -2}
		for range n {
			s.start(&y)
			y, _ = s.step(&y, 0.2/float64(n))
		}
		return y
	}
	exact := run(4096)
	off := func(n int) float64 {
		y := run(n)
		return math.Abs(y[stretch]-exact[stretch]) + math.Abs(y[angle]-exact[angle])
	}
	for _, n := range []int{16, 32} {
		if ratio := off(n) / off(2*n); ratio < 25 || ratio > 45 {
			t.Errorf("%d steps: error falls by %g", n, ratio)
		}
	}
}

func TestShortSeriesOfSineAndCosine(t *testing.T) {
	for i := range 5001 {
		d := float64(i-2500) / 10000
		sin, cos := sincos(d)
		if math.Abs(sin-math.Sin(d)) > 2.3e-16*max(math.Abs(d), 0.1) || math.Abs(cos-math.Cos(d)) > 2.3e-16 {
			t.Fatalf("at %g: %.17g %.17g", d, sin, cos)
		}
	}
}

// A stage far from the first one turns by more than the series is for.
func TestStageFarFromTheFirst(t *testing.T) {
	s := stepper{g: gravity, mass: 1, radius: 2, free: true}
	s.start(&state{angle: 0.3})
	for _, a := range []float64{0.3, 0.5, 0.56, 0.9, -2} {
		s.stage(1, &state{angle: a})
		near(t, "sine", s.sin[1], math.Sin(a), 1e-15)
		near(t, "cosine", s.cos[1], math.Cos(a), 1e-15)
	}
}

func TestFifthRoot(t *testing.T) {
	for x := 1e-12; x < 1e6; x *= 1.37 {
		near(t, "fifth root", fifthRoot(x), math.Pow(x, 0.2), 2e-3)
	}
}
