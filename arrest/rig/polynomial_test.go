package rig

import (
	"math"
	"testing"
)

// with makes a quartic of its zeros.
func with(lead float64, zeros ...float64) quartic {
	c := quartic{lead}
	for n, z := range zeros {
		for i := n + 1; i > 0; i-- {
			c[i] = c[i-1] - z*c[i]
		}
		c[0] *= -z
	}
	return c
}

func TestCrossingFindsTheFirstZero(t *testing.T) {
	for i := range 20000 {
		d := newDice(50, uint64(i))
		n := 1 + d.IntN(4)
		zeros := make([]float64, n)
		first := math.Inf(1)
		for k := range zeros {
			zeros[k] = d.within(-1, 2)
			if k == 1 && d.chance(0.5) {
				// Close behind: a step across both ends with the sign it began with.
				zeros[k] = zeros[k-1] + d.spread(1e-4, 1e-1)
			}
		}
		for _, z := range zeros {
			if z > 0 {
				first = min(first, z)
			}
		}
		p := with(d.within(0.5, 2), zeros...)
		at, ok := p.crossing()
		switch {
		case math.Abs(first-1) < 1e-9:
		case ok != (first < 1):
			t.Fatalf("polynomial %d: zeros %v, found %v %g", i, zeros, ok, at)
		case ok && math.Abs(at-first) > 1e-7:
			t.Fatalf("polynomial %d: zeros %v, found at %.15g", i, zeros, at)
		}
	}
}

func TestCrossingAtTheEnds(t *testing.T) {
	for _, c := range []struct {
		what string
		p    quartic
		at   float64
		ok   bool
	}{
		{"zero where it begins, then up", quartic{0, 1}, 0, false},
		{"zero where it begins, then up and down through zero", quartic{0, 1, -2}, 0.5, true},
		{"zero three times where it begins", quartic{0, 0, 0, -1, 1}, 1, true},
		{"zero at the end", quartic{-1, 1}, 1, true},
		{"nothing at all", quartic{}, 0, false},
		{"no zero", quartic{1, 0, 1}, 0, false},
		{"a touch that does not cross", with(1, 0.5, 0.5), 0.5, true},
	} {
		at, ok := c.p.crossing()
		if ok != c.ok || ok && math.Abs(at-c.at) > 1e-7 {
			t.Errorf("%s: %v at %g, want %v at %g", c.what, ok, at, c.ok, c.at)
		}
	}
}
