package arrest

import (
	"math"
	"testing"
)

// cases is a ring of points, so that nothing can be worked out ahead.
func benchCases() []Case {
	cs := make([]Case, 1024)
	for i := range cs {
		x := float64(i) / 1024
		cs[i] = Case{Mass: 80 + 40*x, Tools: 5 * x, FreeFall: 0.5 + 2*x, InitialSpeed: x, Gravity: StandardGravity, Distance: 0.8 + x/2, Time: 0.3 + x/10}
	}
	return cs
}

var sink float64

// BenchmarkAt and BenchmarkBareArithmetic run the same formulas on the same
// points: the ratio of the two is the price of At (goal: at most 1.5).
func BenchmarkAt(b *testing.B) {
	cs := benchCases()
	var p Point
	b.ReportAllocs()
	for i := 0; b.Loop(); i++ {
		At(&cs[i&1023], &p)
		sink += p.Floor
	}
}

func BenchmarkBareArithmetic(b *testing.B) {
	cs := benchCases()
	b.ReportAllocs()
	for i := 0; b.Loop(); i++ {
		c := &cs[i&1023]
		m, g, d, t := c.Mass+c.Tools, c.Gravity, c.Distance, c.Time
		v2 := c.InitialSpeed*c.InitialSpeed + 2*g*c.FreeFall
		v := math.Sqrt(v2)
		w := m * g
		fd := w + m*v2/(2*d)
		ft := w + m*v/t
		r := v * t / (2 * d)
		a := v2 / (2 * d)
		if v*t < 2*d {
			tau := (2*d - v*t) / (v + g*t)
			a = (v + g*tau) / (t - tau)
		}
		h := c.FreeFall + c.InitialSpeed*c.InitialSpeed/(2*g)
		sink += m*v2/2 + m*v + fd + ft + r + a/g + h + m*(g+a)
	}
}

func BenchmarkEvaluate(b *testing.B) {
	j := figures{mass: "92 kg ± 1 kg", tools: "0 kg .. 10 kg", fall: "1.6 m .. 1.8 m", distance: "0.95 m .. 1.10 m", time: "0.34 s ± 10 %"}.job(b)
	b.ReportAllocs()
	for b.Loop() {
		res := Evaluate(j)
		sink += res.Estimates[0].Low
	}
}

func TestAtAllocatesNothing(t *testing.T) {
	c := benchCases()[3]
	c.Pulse, c.Rise = RisePlateau, 0.2
	var p Point
	if n := testing.AllocsPerRun(100, func() { At(&c, &p) }); n != 0 {
		t.Errorf("At allocates %v times", n)
	}
}
