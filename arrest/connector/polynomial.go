package connector

import "math"

// A quartic is c[0] + c[1] q + ... + c[4] q^4 on 0 <= q <= 1.
type quartic [5]float64

func (c *quartic) at(q float64) float64 {
	return c[0] + q*(c[1]+q*(c[2]+q*(c[3]+q*c[4])))
}

// firstZero returns the least q in (0, 1] at which the quartic is zero after
// it was not, and whether there is one. A zero at q = 0 itself does not count.
//
// It turns to the form of Bernstein, whose coefficients enclose the polynomial,
// and halves the interval until the coefficients change sign once or never: two
// zeros close together are told apart, not overlooked.
func (c quartic) firstZero() (float64, bool) {
	n := 4
	if c[0] == 0 {
		c, n = quartic{c[1], c[2], c[3], c[4], 0}, 3
	}
	var b quartic
	for j := 0; j <= n; j++ {
		for i := 0; i <= j; i++ {
			b[j] += c[i] * choose[j][i] / choose[n][i]
		}
	}
	return c.firstChange(b, n, 0, 1, 0)
}

var choose = [5][5]float64{{1}, {1, 1}, {1, 2, 1}, {1, 3, 3, 1}, {1, 4, 6, 4, 1}}

// firstChange returns the first zero within [lo, hi] of the polynomial whose
// Bernstein coefficients there are b[0..n].
func (c *quartic) firstChange(b quartic, n int, lo, hi float64, depth int) (float64, bool) {
	changes, sign := 0, b[0] < 0
	for _, x := range b[1 : n+1] {
		if x != 0 && (x < 0) != sign {
			changes, sign = changes+1, !sign
		}
	}
	switch {
	case changes == 0:
		return hi, b[n] == 0
	case changes == 1 && b[0] != 0 && b[n] != 0:
		return c.within(lo, hi, b[0], b[n]), true
	case depth == 50:
		return hi, true
	}
	right := b
	left := b
	for k := 1; k <= n; k++ {
		for j := n; j >= k; j-- {
			left[j] = (left[j] + left[j-1]) / 2
		}
		for j := 0; j <= n-k; j++ {
			right[j] = (right[j] + right[j+1]) / 2
		}
	}
	mid := (lo + hi) / 2
	if q, ok := c.firstChange(left, n, lo, mid, depth+1); ok {
		return q, true
	}
	return c.firstChange(right, n, mid, hi, depth+1)
}

// within returns the zero between lo and hi, where the quartic has the values f
// and g of different sign. It goes along the chord, and halves the value of an
// end that stays for a second time.
func (c *quartic) within(lo, hi, f, g float64) float64 {
	q, side := hi, 0
	for range 60 {
		before := q
		q = lo + (hi-lo)*f/(f-g)
		if !(q > lo && q < hi) {
			return before
		}
		y := c.at(q)
		if y == 0 || math.Abs(q-before) < 1e-15 {
			return q
		}
		if (y < 0) == (f < 0) {
			lo, f = q, y
			if side < 0 {
				g /= 2
			}
			side = -1
		} else {
			hi, g = q, y
			if side > 0 {
				f /= 2
			}
			side = 1
		}
	}
	return q
}
