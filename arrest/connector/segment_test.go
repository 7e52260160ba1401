package connector

import (
	"math"
	"testing"
)

// plain returns e, s and h by the functions of the machine, where those lose no
// digits.
func plain(a *arc, t float64) (e, s, h float64) {
	fade := math.Exp(-a.sigma * t)
	switch {
	case a.d > 0:
		sin, cos := math.Sincos(a.root * t)
		e, s = fade*cos, fade*sin/a.root
	case a.d < 0:
		e, s = fade*math.Cosh(a.root*t), fade*math.Sinh(a.root*t)/a.root
	default:
		e, s = fade, fade*t
	}
	if a.w2 > 0 {
		return e, s, (1 - e - a.sigma*s) / a.w2
	}
	if a.sigma > 0 {
		return e, s, (t + math.Expm1(-2*a.sigma*t)/(2*a.sigma)) / (2 * a.sigma)
	}
	return e, s, t * t / 2
}

// TestBasis holds the one series against the separate solutions: no dashpot,
// flat, under-, over- and critically damped, and near-critical ones.
func TestBasis(t *testing.T) {
	for _, c := range []struct {
		name      string
		w2, sigma float64
	}{
		{"no dashpot", 600, 0}, {"flat", 0, 0}, {"flat with dashpot", 0, 2}, {"flat with much dashpot", 0, 60},
		{"soft with dashpot", 1e-3, 5}, {"light", 600, 0.75}, {"strong", 600, 20}, {"critical", 625, 25},
		{"just under", 625, 25 * (1 - 1e-9)}, {"just over", 625, 25 * (1 + 1e-9)}, {"over", 600, 40}, {"far over", 600, 900},
	} {
		a := newArc(5, -30, c.w2, c.sigma)
		for x := 1e-3; x < 1.5; x *= 1.17 {
			b := a.basis(x)
			e, s, h := plain(&a, x)
			// The plain h loses digits as 1 - e - sigma s becomes small.
			lost := 4e-16 / max(1e-6, a.w2*h)
			if math.Abs(b.e-e) > 1e-12*math.Abs(e)+1e-16 || math.Abs(b.s-s) > 1e-12*math.Abs(s)+1e-16 ||
				(c.w2 == 0 || a.w2*h > 1e-3) && math.Abs(b.h-h) > (1e-12+lost)*h {
				t.Errorf("%s, t %.4g: %+v, want %v %v %v", c.name, x, b, e, s, h)
			}
		}
	}
}

// TestAddition: the moment at a sum of times is the same in one step and in two.
func TestAddition(t *testing.T) {
	for i := range uint64(5000) {
		d := newDice(40, i)
		a := newArc(d.within(0, 9), d.within(-60, 60), d.arcStiffness(), d.arcDamping())
		x, dx := d.within(0.001, 0.4), d.within(-0.02, 0.02)
		if x+dx <= 0 {
			continue
		}
		got, want := a.later(a.basis(x), dx), a.basis(x+dx)
		y1, v1 := a.at(got)
		y2, v2 := a.at(want)
		if math.Abs(y1-y2) > 1e-12*(1+math.Abs(y2)) || math.Abs(v1-v2) > 1e-11*(1+math.Abs(v2)) {
			t.Fatalf("%+v at %v + %v: %v %v, want %v %v", a, x, dx, y1, v1, y2, v2)
		}
	}
}

func (d dice) arcStiffness() float64 {
	if d.chance(0.2) {
		return 0
	}
	return d.spread(0.01, 4000)
}

func (d dice) arcDamping() float64 {
	if d.chance(0.2) {
		return 0
	}
	return d.spread(0.01, 300)
}

// TestZero: what zero finds is a zero, and the first.
func TestZero(t *testing.T) {
	for i := range uint64(20000) {
		d := newDice(43, i)
		sigma := d.spread(0.01, 60)
		w2 := sigma * sigma * d.spread(0.01, 100)
		if d.chance(0.5) {
			w2 = sigma * sigma * (1 + d.within(-1, 1)*d.spread(1e-9, 0.1))
		}
		a := newArc(1, 1, w2, sigma)
		p, q := d.within(-9, 9), d.within(-900, 900)
		at := a.zero(p, q)
		if math.IsInf(at, 1) {
			at = 9
			if a.d > 0 {
				t.Fatalf("%+v: no zero of %v C + %v S", a, p, q)
			}
		} else {
			// A late zero lies where all has long decayed, and hangs on the last
			// digits of D.
			b := a.basis(at)
			left, whole := p*b.e+q*b.s, math.Abs(p*b.e)+math.Abs(q*b.s)
			if a.d > 0 {
				whole += math.Abs(q) / a.root * math.Exp(-sigma*at)
			}
			if sigma*at < 20 && math.Abs(left) > 1e-13*(1+sigma*at)*(1+sigma*at)*whole {
				t.Fatalf("%+v: %v C + %v S is %v of %v at %v", a, p, q, left, whole, at)
			}
		}
		for j := 1; j < 10; j++ {
			b := a.basis(at * float64(j) / 10)
			if sigma*b.t > 20 {
				break
			}
			if (p*b.e+q*b.s)*p <= 0 {
				t.Fatalf("%+v: %v C + %v S has changed its sign before %v", a, p, q, at)
			}
		}
	}
}

// TestMotion: every arc obeys its equation, at its beginning and further on, and
// the work of its dashpot is the sum of the speed squared.
func TestMotion(t *testing.T) {
	for i := range uint64(5000) {
		d := newDice(41, i)
		a := newArc(d.within(0, 9), d.within(-60, 60), d.arcStiffness(), d.arcDamping())
		end := d.within(0.001, 0.3)
		for j := range 5 {
			b := a.basis(end * float64(j) / 4)
			y, v := a.at(b)
			acc, _ := a.bends(b)
			left := acc + 2*a.sigma*v + a.w2*y - a.as
			if scale := math.Abs(a.as) + 2*a.sigma*(math.Abs(v)+a.v0) + a.w2*math.Abs(y); math.Abs(left) > 1e-12*scale {
				t.Fatalf("%+v at %v: the equation is off by %v", a, b.t, left)
			}
		}
		sum, n := 0.0, 1+math.Ceil(end*(a.sigma+a.root)*2)
		for k := 0.0; k < n; k++ {
			for _, q := range gauss {
				for _, sign := range [...]float64{-1, 1} {
					_, v := a.at(a.basis(end / n * (k + 0.5 + sign*q[0]/2)))
					sum += q[1] * end / n / 2 * v * v
				}
			}
		}
		got := a.viscous(a.basis(end))
		// Where little is lost, what is lost is a small difference of large terms.
		whole := a.v0*a.v0 + a.as*a.as*end*end
		if want := 2 * a.sigma * sum; math.Abs(got-want) > 1e-11*(want+whole) {
			t.Fatalf("%+v over %v: work of the dashpot %v, want %v", a, end, got, want)
		}
	}
}

// TestFirstOfItsKind: the moment that the quick search finds is the one that the
// careful search finds.
func TestFirstOfItsKind(t *testing.T) {
	found, both := 0, 0
	for i := range uint64(50000) {
		d := newDice(42, i)
		w2 := d.spread(1, 4000)
		a := newArc(0, d.within(0.1, 90), w2, d.spread(0.01, 200))
		if d.chance(0.5) {
			a = newArc(d.within(0, 9), d.within(-60, 60), w2, a.sigma)
		}
		back := d.chance(0.5)
		travel, clock := d.within(0.001, 1), d.within(0.01, 2)
		quick, ok := a.likely(travel, clock, StandardGravity, back)
		if !ok {
			continue
		}
		found++
		t0 := min(clock, a.zero(a.v0, a.as-a.sigma*a.v0))
		if back {
			if b := a.letsGo(StandardGravity, t0); math.Abs(b.t-quick.b.t) > 1e-9 {
				t.Fatalf("%+v: the force is gone at %v, quickly %v", a, b.t, quick.b.t)
			}
			both++
			continue
		}
		if math.IsInf(t0, 1) {
			continue
		}
		careful, reached := a.solve(travel, t0)
		if !reached || math.Abs(careful.b.t-quick.b.t) > 1e-9 {
			t.Fatalf("%+v: %v reached at %v (%v), quickly %v", a, travel, careful.b.t, reached, quick.b.t)
		}
		both++
	}
	if found < 5000 {
		t.Errorf("only %d quick ends in 50000", found)
	}
	t.Logf("%d quick ends in 50000, %d of them compared", found, both)
}
