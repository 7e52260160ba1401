package rig

// A quartic is c[0] + c[1] q + ... + c[4] q^4 on 0 <= q <= 1.
type quartic [5]float64

func (c *quartic) at(q float64) float64 {
	return c[0] + float64(q*(c[1]+float64(q*(c[2]+float64(q*(c[3]+float64(q*c[4])))))))
}

// slope returns the derivative as a polynomial.
func (c *quartic) slope() quartic { return quartic{c[1], 2 * c[2], 3 * c[3], 4 * c[4], 0} }

// crossing returns the least q in (0, 1] at which the quartic comes to zero or
// to the other sign, and whether there is one. A zero at q = 0 itself does not
// count: the sign is that just after it.
//
// Between the zeros of its derivative a polynomial has one zero at most, so that
// two zeros close together are told apart and not overlooked.
func (c *quartic) crossing() (float64, bool) {
	sign := 0.0
	for _, x := range c {
		if x != 0 {
			sign = x
			break
		}
	}
	if sign == 0 {
		return 0, false
	}
	var turns [4]float64
	n := c.turns(&turns)
	from := 0.0
	for _, to := range turns[:n] {
		if y := c.at(to); y == 0 || (y < 0) != (sign < 0) {
			return c.between(from, to, sign < 0), true
		}
		from = to
	}
	return 0, false
}

// turns sets the ends of the intervals on which the quartic is monotone, the
// last of which is 1, and returns their number.
func (c *quartic) turns(ends *[4]float64) int {
	d := c.slope()
	e := d.slope()
	f := e.slope()
	// f is a line, e a parabola, d a cubic: the zeros of each part the next.
	var ef, de [4]float64
	n := 0
	if f[1] != 0 {
		n = add(&ef, n, -f[0]/f[1])
	}
	n = add(&ef, n, 1)
	n = e.zeros(&ef, n, &de)
	return d.zeros(&de, n, ends)
}

// add appends q where it lies within (0, 1].
func add(to *[4]float64, n int, q float64) int {
	if q > 0 && q <= 1 && n < 4 {
		to[n] = q
		n++
	}
	return n
}

// zeros sets the zeros within (0, 1) of a polynomial that is monotone between
// the ends, and 1 after them.
func (c *quartic) zeros(ends *[4]float64, n int, to *[4]float64) int {
	from, negative, m := 0.0, c[0] < 0, 0
	for _, end := range ends[:n] {
		if y := c.at(end); (y < 0) != negative {
			m = add(to, m, c.between(from, end, negative))
			negative = !negative
		}
		from = end
	}
	if m == 0 || to[m-1] < 1 {
		m = add(to, m, 1)
	}
	return m
}

// between returns the zero between lo, where the sign is as told, and hi, where
// it is not.
func (c *quartic) between(lo, hi float64, negative bool) float64 {
	return zero(lo, hi, negative, c.at)
}

// zero returns a zero of f between lo, where the sign is as told, and hi, where it
// is not, from the side of hi. It goes along the chord and halves the value of an
// end that stays for a second time.
func zero(lo, hi float64, negative bool, of func(float64) float64) float64 {
	f, g := of(lo), of(hi)
	if g == 0 {
		return hi
	}
	side := 0
	for range 100 {
		q := lo + (hi-lo)*f/(f-g)
		if !(q > lo && q < hi) || f == 0 {
			q = lo + (hi-lo)/2
		}
		if hi-lo < 1e-15 || q <= lo || q >= hi {
			break
		}
		if y := of(q); y != 0 && (y < 0) == negative {
			lo, f = q, y
			if side < 0 {
				g /= 2
			}
			side = -1
		} else {
			hi, g = q, y
			if y == 0 {
				return q
			}
			if side > 0 {
				f /= 2
			}
			side = 1
		}
	}
	return hi
}
