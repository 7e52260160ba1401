package study

import "math"

// A mark is one figure of a function beside what it is held against.
type mark struct {
	x, off float64 // off: the figure less the target
	beyond bool
}

// change finds where a function f goes from one side of a target to the other:
//
//	a -> x, b -> the float64 beside x,  beyond(f(x)) = beyond(f(a)) != beyond(f(b))
//
// a and b are one on each side, in either order. target guides the search
// (Brent's method: secant and inverse quadratic steps, kept in a bracket by
// halving); beyond alone decides, so that a jump is found as well, where f(x)
// is not near target.
//
// The bracket is closed to two neighbouring float64: no rounding of the search
// is left in the result, only that of f. Of several changes one is found.
// NaN is beyond nothing.
func change(f func(float64) float64, beyond func(float64) bool, target, a, b float64) (x, y float64) {
	at := func(x float64) mark {
		y := f(x)
		return mark{x, y - target, beyond(y)}
	}
	from, to := brent(at, at(a), at(b))
	for {
		mid := from.x + (to.x-from.x)/2
		if mid == from.x || mid == to.x {
			return from.x, f(from.x)
		}
		if m := at(mid); m.beyond == from.beyond {
			from = m
		} else {
			to = m
		}
	}
}

func finite(x float64) bool { return !math.IsNaN(x) && !math.IsInf(x, 0) }

// brent narrows the bracket from a to b, which are on different sides, to a few
// float64 where its figures are finite, and keeps the order of the sides.
func brent(at func(float64) mark, a, b mark) (mark, mark) {
	const ulp = 0x1p-52
	best, other, last := b, a, a // newest point, the one across, the one before
	step, before := b.x-a.x, b.x-a.x
	for range 200 {
		if !finite(best.off) || !finite(other.off) {
			break
		}
		if math.Abs(other.off) < math.Abs(best.off) {
			last, best, other = best, other, best
		}
		tolerance := 2 * ulp * math.Abs(best.x)
		half := (other.x - best.x) / 2
		if math.Abs(half) <= tolerance {
			break
		}
		step, before = stride(best, other, last, half, tolerance, step, before)
		if math.Abs(step) < tolerance {
			step = math.Copysign(tolerance, half)
		}
		last, best = best, at(best.x+step)
		if best.beyond == other.beyond {
			other = last
			step, before = best.x-last.x, best.x-last.x
		}
	}
	if best.beyond == a.beyond {
		return best, other
	}
	return other, best
}

// stride proposes a step from the best point: along the parabola or the secant
// where that lands well within the bracket and shrinks faster than halving
// would, else to the middle. then is the step before it.
func stride(best, other, last mark, half, tolerance, step, before float64) (now, then float64) {
	if math.Abs(before) < tolerance || !(math.Abs(last.off) > math.Abs(best.off)) {
		return half, half
	}
	s := best.off / last.off
	var p, q float64
	if last.x == other.x {
		p, q = 2*half*s, 1-s
	} else {
		r, u := best.off/other.off, last.off/other.off
		p = s * (2*half*u*(u-r) - (best.x-last.x)*(r-1))
		q = (u - 1) * (r - 1) * (s - 1)
	}
	if p > 0 {
		q = -q
	}
	p = math.Abs(p)
	if 2*p < math.Min(3*half*q-math.Abs(tolerance*q), math.Abs(before*q)) {
		return p / q, step
	}
	return half, half
}

// turning finds the greatest (sign 1) or least (sign -1) figure of f between a
// and b, where it has one hump or one valley, by golden sections. Where f is
// smooth the place is good to about 1e-8 of it, where f has a kink to the last
// bits; the figure is good to the last bits in both.
func turning(f func(float64) float64, a, b, sign float64) (x, y float64) {
	const golden = 0.6180339887498949 // (sqrt(5) - 1)/2
	x, y = a, f(a)
	try := func(u float64) float64 {
		v := f(u)
		if sign*v > sign*y {
			x, y = u, v
		}
		return sign * v
	}
	try(b)
	for range 100 {
		u, v := b-golden*(b-a), a+golden*(b-a)
		if !(a < u && u < v && v < b) {
			break
		}
		switch yu, yv := try(u), try(v); {
		case yu > yv:
			b = v
		case yv > yu:
			a = u
		default:
			a, b = u, v
		}
	}
	return x, y
}
