package connector

import (
	"math"
	"math/big"
	"testing"
)

// closeTo is the one measure of "equal" in these tests: relative to the expected
// value.
func closeTo(got, want, tolerance float64) bool {
	return got == want || math.Abs(got-want) <= tolerance*math.Abs(want)
}

// one runs a fall on a path of parts.
func one(t testing.TB, f Fall, parts ...Part) Result {
	t.Helper()
	var p Path
	var r Result
	if err := p.Set(parts...); err != nil {
		t.Fatal(err)
	}
	if err := Run(&p, &f, &r); err != nil {
		t.Fatal(err)
	}
	return r
}

// TestElastic holds M-10 against the run of one elastic part.
func TestElastic(t *testing.T) {
	for i := range uint64(2000) {
		d := newDice(10, i)
		f := d.fall()
		f.Duration = 0
		k, v := d.spread(1000, 1e6), f.speed()
		r := one(t, f, Elastic(Rope, k))
		for _, c := range []struct {
			name      string
			got, want float64
		}{
			{"peak", r.Peak, ElasticPeak(f.Mass, v, k, f.Gravity)},
			{"stretch", r.StoppingDistance, ElasticStretch(f.Mass, v, k, f.Gravity)},
			{"time", r.StoppingTime, ElasticStopTime(f.Mass, v, k, f.Gravity)},
			{"second peak", r.SecondPeak, r.Peak},
		} {
			if !closeTo(c.got, c.want, 1e-12) {
				t.Errorf("%+v, k %v: %s %v, want %v", f, k, c.name, c.got, c.want)
			}
		}
	}
}

// TestAbsorber holds M-12 against the run of an absorber that is rigid otherwise.
func TestAbsorber(t *testing.T) {
	for i := range uint64(2000) {
		d := newDice(11, i)
		f := d.fall()
		f.Duration = 0
		force := f.Mass * f.Gravity * d.within(1.01, 9)
		r := one(t, f, NewAbsorber(Plateau{Force: force, Travel: math.Inf(1)}))
		want := AbsorberTravel(f.Mass, f.speed(), force, f.Gravity)
		if !closeTo(r.AbsorberTravel, want, 1e-12) || !closeTo(r.StoppingDistance, want, 1e-12) {
			t.Errorf("%+v, force %v: travel %v and distance %v, want %v", f, force, r.AbsorberTravel, r.StoppingDistance, want)
		}
	}
	if x := AbsorberTravel(100, 5, 900, StandardGravity); !math.IsInf(x, 1) {
		t.Errorf("an absorber below the weight travels %v", x)
	}
	if x := AbsorberTravel(100, 0, 900, StandardGravity); x != 0 {
		t.Errorf("an absorber without a fall travels %v", x)
	}
}

// TestClosedIn200Bits holds the closed forms against arithmetic of 200 bits.
func TestClosedIn200Bits(t *testing.T) {
	n := func(x float64) *big.Float { return new(big.Float).SetPrec(200).SetFloat64(x) }
	op := func(f func(z, x, y *big.Float) *big.Float) func(x, y *big.Float) *big.Float {
		return func(x, y *big.Float) *big.Float { return f(new(big.Float).SetPrec(200), x, y) }
	}
	add, sub, mul, quo := op((*big.Float).Add), op((*big.Float).Sub), op((*big.Float).Mul), op((*big.Float).Quo)
	root := func(x *big.Float) *big.Float { return new(big.Float).SetPrec(200).Sqrt(x) }
	for i := range uint64(500) {
		d := newDice(12, i)
		m, v, k, g := n(d.within(1, 200)), n(d.within(0, 12)), n(d.spread(100, 1e7)), n(d.within(1, 20))
		h, delta, u := n(d.within(0, 9)), n(d.within(0.001, 1)), n(d.within(3000, 12000))
		w := mul(m, g)
		f := func(x *big.Float) float64 { y, _ := x.Float64(); return y }
		w0 := mul(n(80), n(StandardGravity))
		force := add(mul(n(2), w), u)
		for _, c := range []struct {
			name string
			got  float64
			want *big.Float
		}{
			{"elastic peak", ElasticPeak(f(m), f(v), f(k), f(g)), add(w, root(add(mul(w, w), mul(mul(k, m), mul(v, v)))))},
			{"peak from rest", ElasticPeakFromRest(f(m), f(k), f(h)), add(m, root(add(mul(m, m), mul(n(2), mul(m, mul(k, h))))))},
			{"impact factor", ImpactFactor(f(h), f(delta)), add(n(1), root(add(n(1), quo(mul(n(2), h), delta))))},
			{"modulus", Modulus(SingleRope(f(u))), quo(mul(u, sub(u, mul(n(2), w0))), mul(mul(n(2), w0), n(1.77)))},
			{"absorber travel", AbsorberTravel(f(m), f(v), f(force), f(g)), quo(quo(mul(m, mul(v, v)), n(2)), sub(n(f(force)), w))},
			{"fall speed", FallSpeed(f(v), f(h), f(g)), root(add(mul(v, v), mul(n(2), mul(g, h))))},
		} {
			if want := f(c.want); !closeTo(c.got, want, 1e-14) {
				t.Errorf("%s: %v, want %v", c.name, c.got, want)
			}
		}
	}
}

// TestIdentities are relations that need no outside figure.
func TestIdentities(t *testing.T) {
	fall := Fall{Mass: 100, FreeFall: 1.8, Gravity: StandardGravity}
	w := fall.Mass * fall.Gravity

	// No fall: twice the weight, in half a swing.
	r := one(t, Fall{Mass: 100, Gravity: StandardGravity}, Elastic(Rope, 9000))
	if !closeTo(r.Peak, 2*w, 1e-12) || !closeTo(r.StoppingTime, math.Pi*math.Sqrt(100./9000), 1e-12) {
		t.Errorf("without a fall: peak %v, want %v; time %v", r.Peak, 2*w, r.StoppingTime)
	}

	// At one modulus and fall factor the length does not matter.
	long := one(t, fall, FromModulus(Rope, 22500, 2.5))
	half := fall
	half.FreeFall /= 2
	short := one(t, half, FromModulus(Rope, 22500, 1.25))
	if !closeTo(short.Peak, long.Peak, 1e-13) {
		t.Errorf("half the length at the same fall factor: peak %v, want %v", short.Peak, long.Peak)
	}

	// The handbook factor is the peak over the weight, the static stretch W/k.
	if got := ImpactFactor(1.8, w/9000) * w; !closeTo(got, long.Peak, 1e-13) {
		t.Errorf("by the handbook factor %v, by the run %v", got, long.Peak)
	}

	// A rope with the modulus of its rating pulls with the rated force in the test.
	rating := SingleRope(8200)
	test := Fall{Mass: rating.Mass, FreeFall: rating.FallFactor * 2.8, Gravity: rating.Gravity}
	if got := one(t, test, RopeFromRating(rating, 2.8)).Peak; !closeTo(got, 8200, 1e-12) {
		t.Errorf("the test of its rating pulls with %v, want 8200", got)
	}

	// Two equal springs in a row are one of half the stiffness; slack is more fall.
	two := one(t, fall, Elastic(Rope, 18000), Elastic(Webbing, 18000))
	loose := one(t, half, Loose(0.9), Elastic(Rope, 9000))
	if !closeTo(two.Peak, long.Peak, 1e-13) || !closeTo(loose.Peak, long.Peak, 1e-13) {
		t.Errorf("peaks of two springs %v and of slack %v, want %v", two.Peak, loose.Peak, long.Peak)
	}
}

// TestStaticStretchErrsLow holds what the caution says.
func TestStaticStretchErrsLow(t *testing.T) {
	fall := Fall{Mass: 80, FreeFall: 3, Gravity: StandardGravity}
	dynamic := one(t, fall, FromModulus(Rope, 20000, 2))
	load := 80 * StandardGravity
	p := RopeFromStaticStretch(load, load/10000, 2)
	if p.Caution != StaticStretch {
		t.Error("a rope from its static stretch carries no caution")
	}
	static := one(t, fall, p)
	if ratio := static.Peak / dynamic.Peak; ratio > 1 || ratio < 0.71 || static.StoppingDistance < dynamic.StoppingDistance {
		t.Errorf("half the modulus: peak %v of %v, distance %v of %v", static.Peak, dynamic.Peak, static.StoppingDistance, dynamic.StoppingDistance)
	}
}
