package rig

import (
	"math"
	"math/rand/v2"
	"testing"

	"arrestcheck/arrest/connector"
	"arrestcheck/arrest/quantity"
)

// gravity is standard gravity, as the jobs have it.
const gravity = connector.StandardGravity

const degree = math.Pi / 180

// near reports a figure that is not close enough to the one wanted, relative to
// it; a figure that is zero or hardly more may be off by relative times 1.
func near(t *testing.T, what string, got, want, relative float64) {
	t.Helper()
	if !quantity.Close(got, want, relative) && !(math.Abs(want) < 1 && math.Abs(got-want) <= relative*1e-3) {
		t.Errorf("%s: %.17g, want %.17g to %g", what, got, want, relative)
	}
}

// overhead is a layout without an edge: the anchor at the height z above the
// surface, the D-ring at 1.5 m and the offset s, all in m.
func overhead(z, s, length float64) *Layout {
	l := &Layout{Anchor: Spot{Z: z}, DRing: 1.5, Feet: 1.5, HalfWidth: 0.3, Length: length, PositionCount: 1}
	l.Positions[0].X = s
	return l
}

// path makes a path of parts.
func path(t testing.TB, parts ...connector.Part) *connector.Path {
	t.Helper()
	var p connector.Path
	if err := p.Set(parts...); err != nil {
		t.Fatal(err)
	}
	return &p
}

// swung runs a layout in time from its first position.
func swung(t testing.TB, l *Layout, p *connector.Path, b *Body, tolerance float64) *Planar {
	t.Helper()
	place := l.At(0)
	var tether Tether
	if err := tether.Set(p, &place, b); err != nil {
		t.Fatal(err)
	}
	var r Planar
	if err := l.Planar(&place, &tether, b, tolerance, &r); err != nil {
		t.Fatalf("%v: %v, %+v", err, r.Status, r.Ledger)
	}
	return &r
}

// A dice draws layouts and paths. Equal seeds draw equal ones.
type dice struct{ *rand.Rand }

func newDice(seed, stream uint64) dice { return dice{rand.New(rand.NewPCG(seed, stream))} }

func (d dice) within(a, b float64) float64 { return a + (b-a)*d.Float64() }
func (d dice) spread(a, b float64) float64 { return a * math.Pow(b/a, d.Float64()) }
func (d dice) chance(p float64) bool       { return d.Float64() < p }

// layout draws a layout with an edge, with the anchor anywhere but inside of the
// structure, and one position.
func (d dice) layout() *Layout {
	l := &Layout{
		Anchor: Spot{d.within(-2, 2), d.within(-3, 1), d.within(0, 4)},
		Edge:   RoundEdge, DRing: d.within(1.1, 1.7), Length: d.within(1, 5),
		Feet: 1.5, HalfWidth: 0.3, PositionCount: 1,
	}
	if d.chance(0.3) {
		l.Anchor.Z = 0
	}
	if d.chance(0.3) {
		l.Slack = d.within(0, 0.4)
	}
	if d.chance(0.2) {
		l.Retractable, l.Locking, l.Slack, l.Length = true, d.within(0.1, 0.6), 0, 8
	}
	l.Positions[0] = Position{d.within(-2, 2), 0}
	if d.chance(0.4) {
		l.Positions[0].Y = d.within(0, 1)
	}
	if d.chance(0.1) {
		l.Positions[0].X = l.Anchor.X
	}
	return l
}

// reached draws layouts with one position that is Known.
func (d dice) reached() (*Layout, Place) {
	for {
		l := d.layout()
		if p := l.At(0); p.Status == Known {
			return l, p
		}
	}
}

// parts draws a path: rope or webbing, at times an absorber, a dashpot, an
// activation peak, stretch that stays.
func (d dice) parts() []connector.Part {
	k := connector.Elastic(connector.Rope, d.spread(5e3, 2e5))
	switch {
	case d.chance(0.3):
		k.Unloading = k.Stiffness * d.within(1, 3)
	case d.chance(0.1):
		k = connector.FromPoints([]connector.Point{{}, {Extension: 0.1, Force: 800}, {Extension: 0.2, Force: 5000}}, 0)
	}
	parts := []connector.Part{k}
	if d.chance(0.6) {
		q := connector.Plateau{Force: d.within(2000, 6000), Travel: d.within(0.1, 1.8)}
		switch {
		case d.chance(0.3):
			q.Activation = q.Force * d.within(1, 1.4)
		case d.chance(0.3):
			q.Activation, q.Rise = q.Force*0.7, q.Travel*0.5
		}
		parts = append(parts, connector.NewAbsorber(q))
	}
	if d.chance(0.3) {
		parts = append(parts, connector.NewDashpot(d.spread(20, 2000)))
	}
	return parts
}
