package connector

import (
	"math"
	"testing"
)

// weights are the rows of the method, the last one the result of order 5.
var weights = [7][]float64{
	{}, {n10}, {n20, n21}, {n30, n31, n32}, {n40, n41, n42, n43}, {n50, n51, n52, n53, n54},
	{n60, 0, n62, n63, n64, n65},
}

// TestOrderConditions holds the coefficients against the conditions of order: b
// sums c^p to 1/(p+1), and rows sum to their node.
func TestOrderConditions(t *testing.T) {
	nodes := [7]float64{0, 1. / 5, 3. / 10, 4. / 5, 8. / 9, 1, 1}
	for i, row := range weights {
		sum := 0.0
		for _, w := range row {
			sum += w
		}
		if math.Abs(sum-nodes[i]) > 1e-14 {
			t.Errorf("row %d sums to %v, want %v", i, sum, nodes[i])
		}
	}
	difference := [7]float64{w0, 0, w2, w3, w4, w5, w6}
	for p := range 5 {
		b, e := 0.0, 0.0
		for i, c := range nodes {
			power := math.Pow(c, float64(p))
			if i < 6 {
				b += weights[6][i] * power
			}
			e += difference[i] * power
		}
		if math.Abs(b-1/float64(p+1)) > 1e-14 {
			t.Errorf("condition %d of order 5: %v, want %v", p, b, 1/float64(p+1))
		}
		if p < 4 && math.Abs(e) > 1e-15 {
			t.Errorf("condition %d of the difference: %v, want 0", p, e)
		}
	}
	for i, row := range dense {
		sum := row[0] + row[1] + row[2] + row[3]
		want := 0.0
		if i < 6 {
			want = weights[6][i]
		}
		if math.Abs(sum-want) > 1e-13 {
			t.Errorf("the dense output of stage %d ends at %v, want %v", i, sum, want)
		}
	}
}

// swing is a damped swing on one straight stretch, from its beginning.
func swing(h float64) (s stepper, x, v float64, exact func(t float64) (x, v float64)) {
	const mass, k, c, g = 90, 30000, 400, StandardGravity
	s = stepper{law: &Path{}, g: g, mass: mass, perMass: 1. / mass, c: c, on: stretch{k: k}}
	s.stage(0, 0, 5)
	a := newArc(5, g, k/float64(mass), c/float64(2*mass))
	return s, 0, 5, func(t float64) (float64, float64) { return a.at(a.basis(t)) }
}

// TestOrder holds the order of convergence: the error of a fixed step goes with
// its fifth power, that of the dense output within it with its fourth.
func TestOrder(t *testing.T) {
	atEnd, within := map[int]float64{}, map[int]float64{}
	for _, n := range []int{20, 40, 80, 160} {
		h := 0.3 / float64(n)
		s, x, v, exact := swing(h)
		for i := range n {
			x1, v1, _, _ := s.step(x, v, h)
			px, _ := s.between(x, v, h)
			for _, q := range []float64{0.25, 0.5, 0.75} {
				want, _ := exact((float64(i) + q) * h)
				within[n] = max(within[n], math.Abs(px.at(q)-want))
			}
			x, v = x1, v1
			s.stage(0, x, v)
		}
		want, _ := exact(0.3)
		atEnd[n] = math.Abs(x - want)
	}
	for n := 20; n < 160; n *= 2 {
		if p := math.Log2(atEnd[n] / atEnd[2*n]); p < 4.8 || p > 5.6 {
			t.Errorf("order of a step, %d to %d steps: %.2f, want 5", n, 2*n, p)
		}
		if p := math.Log2(within[n] / within[2*n]); p < 3.8 {
			t.Errorf("order of the dense output, %d to %d steps: %.2f, want at least 4", n, 2*n, p)
		}
	}
}

// TestTolerance: the error of the peak goes with the tolerance.
func TestTolerance(t *testing.T) {
	want := one(t, fiveFall, fiveParts()...).Peak
	var p Path
	var r Result
	if err := p.Set(fiveParts()...); err != nil {
		t.Fatal(err)
	}
	for _, tolerance := range []float64{1e-5, 1e-6, 1e-7, 1e-8, 1e-9, 1e-10, 1e-11, 1e-12} {
		if err := Integrate(&p, &fiveFall, tolerance, &r); err != nil {
			t.Fatal(err)
		}
		if off := math.Abs(r.Peak-want) / want; off > 10*tolerance {
			t.Errorf("tolerance %g: the peak is off by %.1e", tolerance, off)
		}
	}
}

func TestFifthRoot(t *testing.T) {
	for x := 1e-9; x < 1e9; x *= 1.37 {
		if got, want := fifthRoot(x), math.Pow(x, 0.2); !closeTo(got, want, 2e-3) {
			t.Errorf("fifth root of %g: %v, want %v", x, got, want)
		}
	}
}

// TestResize: the next step has the error that is wanted, with some reserve.
func TestResize(t *testing.T) {
	for err, want := range map[float64]float64{1: 0.9, 32: 0.45, 1. / 32: 1.8, 1e9: 0.2, 1e-4: 5, 0: 5} {
		if got := resize(err); !closeTo(got, want, 2e-3) {
			t.Errorf("error %g: step by %v, want %v", err, got, want)
		}
	}
}

// TestFirstZero finds zeros of quartics made of their zeros, also close
// together, double, and at the ends.
func TestFirstZero(t *testing.T) {
	made := func(zeros [4]float64) quartic {
		c := quartic{1}
		for n, z := range zeros {
			for i := n + 1; i > 0; i-- {
				c[i] = c[i-1] - z*c[i]
			}
			c[0] *= -z
		}
		return c
	}
	for _, c := range []struct {
		zeros [4]float64
		want  float64
		found bool
	}{
		{[4]float64{0.3, 2, 3, -1}, 0.3, true},
		{[4]float64{0.5, 0.5 + 1e-6, 3, -1}, 0.5, true},
		{[4]float64{0.9, 0.2, 0.4, 0.6}, 0.2, true},
		{[4]float64{2, 3, -1, -2}, 0, false},
		{[4]float64{0, 0.7, 2, 3}, 0.7, true},
		{[4]float64{0, 2, 3, -1}, 0, false},
		{[4]float64{1, 2, 3, -1}, 1, true},
	} {
		q, ok := made(c.zeros).firstZero()
		if ok != c.found || ok && math.Abs(q-c.want) > 1e-7 {
			t.Errorf("zeros %v: %v %v, want %v %v", c.zeros, q, ok, c.want, c.found)
		}
	}
	for i := range uint64(20000) {
		d := newDice(20, i)
		zeros := [4]float64{d.within(-1, 2), d.within(-1, 2), d.within(-1, 2), d.within(-1, 2)}
		want, ok := math.Inf(1), false
		for _, z := range zeros {
			if z > 0 && z <= 1 {
				want, ok = min(want, z), true
			}
		}
		q, found := made(zeros).firstZero()
		if found != ok || ok && math.Abs(q-want) > 1e-9 {
			t.Fatalf("zeros %v: %v %v, want %v %v", zeros, q, found, want, ok)
		}
	}
}
