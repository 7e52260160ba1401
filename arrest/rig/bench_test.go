package rig

import (
	"math"
	"testing"

	"arrestcheck/arrest/connector"
)

var sink float64

// ring is a row of layouts, so that nothing can be worked out ahead.
func ring() []Layout {
	ls := make([]Layout, 256)
	for i := range ls {
		x := float64(i) / 256
		ls[i] = *overhead(2+x, 1+x/2, 2.5+x)
	}
	return ls
}

// BenchmarkAt and BenchmarkBareTriangle run the same formulas on the same
// layouts: the ratio is the price of At.
func BenchmarkAt(b *testing.B) {
	ls := ring()
	b.ReportAllocs()
	for i := 0; b.Loop(); i++ {
		p := ls[i&255].At(0)
		sink += p.FreeFall
	}
}

func BenchmarkBareTriangle(b *testing.B) {
	ls := ring()
	b.ReportAllocs()
	for i := 0; b.Loop(); i++ {
		l := &ls[i&255]
		dx, dy, dz := l.Positions[0].X-l.Anchor.X, l.Positions[0].Y-l.Anchor.Y, l.Anchor.Z-l.DRing
		s := math.Hypot(dx, dy)
		r := l.Length + l.Slack
		z := l.Anchor.Z - leg(r, s)
		sink += math.Hypot(s, dz) + math.Atan2(s, dz) + math.Asin(s/r) + l.DRing - z + z - l.Anchor.Z + r
	}
}

// BenchmarkEllipticK against the last line of testdata/peer/planar.py (goal: at
// most twice as long), and against BenchmarkBareRoots, the four roots and means
// that it cannot do without.
func BenchmarkEllipticK(b *testing.B) {
	for i := 0; b.Loop(); i++ {
		sink += EllipticK(float64(i&1023) / 2200)
	}
}

func BenchmarkBareRoots(b *testing.B) {
	for i := 0; b.Loop(); i++ {
		x, y := 1.0, math.Sqrt(1-float64(i&1023)/2200)
		x, y = (x+y)/2, math.Sqrt(x*y)
		x, y = (x+y)/2, math.Sqrt(x*y)
		x, y = (x+y)/2, math.Sqrt(x*y)
		sink += math.Pi / (x + y)
	}
}

func BenchmarkSwing(b *testing.B) {
	l := overhead(3, 1.2, 2)
	p := l.At(0)
	body := Body{Mass: 100, Gravity: gravity}
	for b.Loop() {
		s := l.Swing(&p, &body)
		sink += s.Time
	}
}

// rope is the task of testdata/peer/planar.py.
func rope(b *testing.B) (*Layout, *Place, *connector.Path, *Body) {
	l := overhead(1.5, 1.2, 2)
	p := l.At(0)
	return l, &p, path(b, connector.FromModulus(connector.Rope, 22500, 2.5)), &Body{Mass: 100, Gravity: gravity}
}

// BenchmarkPlanar against the best method of testdata/peer/planar.py (goal: at
// least 60 times as fast), and against BenchmarkPlanarSteps, the bare steps of
// the same method with nothing looked for.
func BenchmarkPlanar(b *testing.B) {
	l, place, p, body := rope(b)
	var t Tether
	var r Planar
	if err := t.Set(p, place, body); err != nil {
		b.Fatal(err)
	}
	b.ReportAllocs()
	for b.Loop() {
		if err := l.Planar(place, &t, body, 1e-8, &r); err != nil {
			b.Fatal(err)
		}
	}
	b.ReportMetric(float64(r.Counts.Steps), "steps")
}

func BenchmarkPlanarSteps(b *testing.B) {
	l, place, p, body := rope(b)
	var t Tether
	var r Planar
	if err := t.Set(p, place, body); err != nil {
		b.Fatal(err)
	}
	if err := l.Planar(place, &t, body, 1e-8, &r); err != nil {
		b.Fatal(err)
	}
	s := stepper{g: gravity, mass: 100, radius: 2, on: t.segments[0]}
	for b.Loop() {
		y := state{0, 4, 0.6, -6}
		for range r.Counts.Steps {
			s.start(&y)
			y, _ = s.step(&y, 0.004)
		}
		sink += y[stretch]
	}
	b.ReportMetric(float64(r.Counts.Steps), "steps")
}

func BenchmarkTether(b *testing.B) {
	_, place, p, body := rope(b)
	var t Tether
	b.ReportAllocs()
	for b.Loop() {
		if err := t.Set(p, place, body); err != nil {
			b.Fatal(err)
		}
	}
}
