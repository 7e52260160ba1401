package quantity

import (
	"math"
	"testing"
)

func TestClose(t *testing.T) {
	inf, nan := math.Inf(1), math.NaN()
	for _, c := range []struct {
		a, want, relative float64
		close             bool
	}{
		{100, 100, 0, true},
		{100.1, 100, 1e-3, true},
		{99.9, 100, 1.1e-3, true},
		{100.2, 100, 1e-3, false},
		{100, 0, 1e9, false}, // nothing but 0 is close to 0
		{0, 0, 0, true},
		{0, math.Copysign(0, -1), 0, true},
		{0, 1e-300, 0.5, false},
		{1, -1, 1, false},
		{2, 1, 1, true}, // relative to the figure expected,
		{1, 2, 0.5, true},
		{2, 1, 0.5, false}, // not to the other
		{inf, inf, 0, true},
		{inf, -inf, 1, false},
		{1, inf, 1, false},
		{inf, 1, 1, false},
		{nan, nan, 1, false},
		{nan, 1, 1, false},
		{1, nan, 1, false},
	} {
		if got := Close(c.a, c.want, c.relative); got != c.close {
			t.Errorf("Close(%v, %v, %v) = %v", c.a, c.want, c.relative, got)
		}
	}
}
