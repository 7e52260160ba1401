package rig

import (
	"math"
	"testing"

	"arrestcheck/arrest/connector"
)

// The run of an elastic rope beside testdata/peer/planar.py, which integrates the
// same swing with scipy 1.10.1, DOP853 at 1e-13, between its own events: output
// of /usr/bin/python3 testdata/peer/planar.py, last line, printed to 1e-6 N and
// 1e-9 elsewhere.
func TestPlanarBesideThePeer(t *testing.T) {
	l := overhead(1.5, 1.2, 2)
	r := swung(t, l, path(t, connector.FromModulus(connector.Rope, 22500, 2.5)), &Body{Mass: 100, Gravity: gravity}, 1e-12)
	if r.Status != Swung {
		t.Errorf("status %v", r.Status)
	}
	for _, c := range []struct {
		what             string
		got, want, digit float64
	}{
		{"peak", r.Peak, 5756.127932, 1e-6},
		{"lowest, below the anchor", 1.5 - r.Lowest.Z, 2.475877723, 1e-9},
		{"speed there", r.Lowest.Speed, 3.702598607, 1e-9},
		{"time there", r.Lowest.Time, 0.796293366, 1e-9},
		{"end", r.EndTime, 1.488199353, 1e-9},
	} {
		if math.Abs(c.got-c.want) > 0.6*c.digit {
			t.Errorf("%s: %.12g, the peer has %.12g", c.what, c.got, c.want)
		}
	}
}

// TestPlanarStraightDown holds a swing without an offset against the exact run
// straight down, over random paths with dashpots, absorbers and activation peaks.
func TestPlanarStraightDown(t *testing.T) {
	var exact connector.Result
	seen := map[connector.Status]int{}
	for i := range 1500 {
		d := newDice(70, uint64(i))
		l := overhead(d.within(0, 3), 0, 4)
		p := path(t, d.parts()...)
		b := Body{Mass: d.within(50, 140), InitialSpeed: d.within(0, 2), Gravity: gravity}
		place := l.At(0)
		r := swung(t, l, p, &b, 1e-13)
		fall := connector.Fall{Mass: b.Mass, FreeFall: place.FreeFall, InitialSpeed: b.InitialSpeed, Gravity: gravity}
		if err := connector.Run(p, &fall, &exact); err != nil {
			t.Fatal(err)
		}
		seen[exact.Status]++
		switch exact.Status {
		case connector.Stopped:
			near(t, "peak", r.Peak, exact.Peak, 1e-10)
			near(t, "travel", r.Travel, exact.StoppingDistance, 1e-10)
			near(t, "time", r.FirstTurn-r.FirstPull, exact.StoppingTime, 1e-9)
			if r.Status != Rested && r.Status != TimedOut {
				t.Errorf("path %d: %v", i, r.Status)
			}
			if r.Lowest.Speed != 0 || math.Abs(r.Lowest.Drop-place.FreeFall-r.Extension) > 1e-12 {
				t.Errorf("path %d: lowest %+v", i, r.Lowest)
			}
		case connector.Rigid:
			if r.Status != Rigid || !math.IsInf(r.Peak, 1) {
				t.Errorf("path %d: %v, %g N; straight down a rigid stop", i, r.Status, r.Peak)
			}
		case connector.Endless:
			if r.Status != Endless || !math.IsNaN(r.Peak) {
				t.Errorf("path %d: %v, %g N; straight down endless", i, r.Status, r.Peak)
			}
		}
		if t.Failed() {
			t.Fatalf("path %d: %+v\n%+v\n%+v", i, p.Parts(), r, exact)
		}
	}
	t.Log(seen)
	if seen[connector.Stopped] < 1000 {
		t.Errorf("%v", seen)
	}
}

// crude integrates the same swing with the classical method of order four in
// plane coordinates, with small even steps, with Path.Force and nothing else: no
// events, no polar coordinates, no law of its own.
type crude struct {
	peak, lowest, speed, extension float64
	first                          float64 // extension at its first maximum
}

func crudely(l *Layout, p *connector.Path, b *Body, until, h float64) crude {
	place := l.At(0)
	radius := place.Plane.Radius + p.Slack()
	u, w := place.Plane.Offset, leg(radius, place.Plane.Offset)
	vu, vw := 0.0, math.Sqrt(b.speed2(place.Start.Z-place.Plane.Pivot+w))
	reach := 0.0
	force := func(u, w, vu, vw float64) (f, x float64) {
		r := math.Hypot(u, w)
		x = r - radius
		top := max(reach, x)
		f = p.Force(x, top)
		if x > 0 && (f > 0 || x >= top) {
			f = max(0, f+p.Viscous()*(u*vu+w*vw)/r)
		} else {
			f = 0
		}
		return f, x
	}
	acc := func(u, w, vu, vw float64) (au, aw float64) {
		f, _ := force(u, w, vu, vw)
		r := math.Hypot(u, w)
		return -f * u / r / b.Mass, gravity - f*w/r/b.Mass
	}
	c := crude{lowest: math.Inf(-1), first: math.NaN()}
	for range int(until / h) {
		a1, b1 := acc(u, w, vu, vw)
		a2, b2 := acc(u+h/2*vu, w+h/2*vw, vu+h/2*a1, vw+h/2*b1)
		a3, b3 := acc(u+h/2*(vu+h/2*a1), w+h/2*(vw+h/2*b1), vu+h/2*a2, vw+h/2*b2)
		a4, b4 := acc(u+h*(vu+h/2*a2), w+h*(vw+h/2*b2), vu+h*a3, vw+h*b3)
		u += h * (vu + h/6*(a1+a2+a3))
		w += h * (vw + h/6*(b1+b2+b3))
		vu += h / 6 * (a1 + 2*a2 + 2*a3 + a4)
		vw += h / 6 * (b1 + 2*b2 + 2*b3 + b4)
		f, x := force(u, w, vu, vw)
		if math.IsNaN(c.first) && x < c.extension && c.extension > 0 {
			c.first = c.extension
		}
		reach = max(reach, x)
		c.extension = max(c.extension, x)
		c.peak = max(c.peak, f)
		if w > c.lowest {
			c.lowest, c.speed = w, math.Hypot(vu, vw)
		}
	}
	return c
}

// TestPlanarBesideCrudeIntegration compares runs of random layouts and paths
// with small even steps. What the steps cost shows in the tolerances: a corner of
// the law is met to within one of them.
func TestPlanarBesideCrudeIntegration(t *testing.T) {
	compared := 0
	for i := 0; compared < 25; i++ {
		d := newDice(71, uint64(i))
		l, place := d.reached()
		b := Body{Mass: d.within(60, 130), Gravity: gravity}
		p := path(t, d.parts()...)
		if !place.Plane.Flat || place.Plane.Offset < 0.05 || place.Plane.Radius < 0.5 {
			continue
		}
		r := swung(t, l, p, &b, 1e-10)
		if r.Status != Swung || r.EndTime-r.FirstPull > 3 {
			continue
		}
		compared++
		const h = 1e-5
		c := crudely(l, p, &b, r.EndTime-r.FirstPull+1e-9, h)
		for _, x := range []struct {
			what      string
			got, want float64
			off       float64
		}{
			{"peak", r.Peak, c.peak, 2e-3 * r.Peak},
			{"first extension", r.Travel, c.first, 3e-5},
			{"extension", r.Extension, c.extension, 1e-4},
			{"lowest", place.Plane.Pivot - r.Lowest.Z, c.lowest, 1e-4},
			// Near the lowest point the height hardly changes, but the speed does.
			{"speed there", r.Lowest.Speed, c.speed, 2e-2},
		} {
			if !(math.Abs(x.got-x.want) <= x.off) {
				t.Errorf("layout %d: %s %.9g, crudely %.9g\n%+v\n%+v\n%+v\n%+v", i, x.what, x.got, x.want, p.Parts(), place, r, c)
			}
		}
	}
}

// TestLedgersClose runs random layouts and paths: the ledgers are checked in the
// run, with the tolerance of the run, and here once more with figures of their own.
func TestLedgersClose(t *testing.T) {
	seen := map[PlanarStatus]int{}
	held := 0
	for i := range 3000 {
		d := newDice(72, uint64(i))
		l, place := d.reached()
		b := Body{Mass: d.within(50, 140), InitialSpeed: d.within(0, 2), Gravity: gravity}
		parts := d.parts()
		if d.chance(0.2) {
			// Nothing of it comes back: the body goes on as a pendulum.
			parts = []connector.Part{connector.NewAbsorber(connector.Plateau{Force: d.within(1500, 6000), Travel: d.within(0.5, 2)})}
		}
		p := path(t, parts...)
		r := swung(t, l, p, &b, 1e-9)
		seen[r.Status]++
		held += r.Counts.Held
		if r.Status != Swung && r.Status != Rested {
			continue
		}
		g := &r.Ledger
		e := g.Before + math.Abs(g.Fallen)
		if math.Abs(g.EnergyLeft) > 1e-6*e || math.Abs(g.SideLeft)+math.Abs(g.DownLeft) > 1e-6*(g.Weight+1) {
			t.Errorf("layout %d: %+v", i, g)
		}
		if g.Work < g.Stored-1e-6*e || g.Viscous < -1e-6*e {
			t.Errorf("layout %d: more given back than taken: %+v", i, g)
		}
		// The bounds of any swing, and the energy of the lowest point.
		if r.Peak > r.PeakBound*(1+1e-7) || r.Lowest.Drop > r.DropBound*(1+1e-7) {
			t.Errorf("layout %d: peak %g, bound %g; drop %g, bound %g", i, r.Peak, r.PeakBound, r.Lowest.Drop, r.DropBound)
		}
		if v2 := b.speed2(r.Lowest.Drop); square(r.Lowest.Speed) > v2*(1+1e-6) {
			t.Errorf("layout %d: %g m/s at the lowest point, more than a free fall of as much", i, r.Lowest.Speed)
		}
		if r.Lowest.Drop < 0 || math.Abs(r.Lowest.Down) > 1e-4 && r.Lowest.Speed > 1e-3 {
			t.Errorf("layout %d: lowest %+v", i, r.Lowest)
		}
		if t.Failed() {
			t.Fatalf("%+v\n%+v\n%+v\n%+v", l, place, p.Parts(), r)
		}
	}
	t.Log(seen, "held", held)
	if seen[Swung] < 1000 || seen[OutOfPlane] < 50 || seen[Rigid] < 20 || held < 100 {
		t.Errorf("%v, held %d", seen, held)
	}
}

// The speeds of an inextensible swing are the limits of the run in time: the
// lower one where all of the speed along the connector is taken away over no
// distance, the upper one, energy in the connector included, where none is.
func TestSwingSpeedsAreLimits(t *testing.T) {
	b := Body{Mass: 90, Gravity: gravity}
	for _, l := range []*Layout{overhead(3, 1.2, 2), overhead(2, 1.5, 2.5), overhead(1.2, 0.8, 1.9)} {
		place := l.At(0)
		s := l.Swing(&place, &b)
		last := math.Inf(1)
		for _, force := range []float64{1e4, 1e5, 1e6, 1e7} {
			absorber := connector.NewAbsorber(connector.Plateau{Force: force, Travel: 5})
			r := swung(t, l, path(t, absorber), &b, 1e-10)
			off := math.Abs(r.Lowest.Speed/s.LowestLow - 1)
			if !(off < last/3) {
				t.Errorf("absorber of %g N: off by %g, after %g", force, off, last)
			}
			last = off
			near(t, "time to the lowest point", r.Lowest.Time-r.FirstPull, s.Time, 20*off+1e-6)
		}
		if last > 1e-3 {
			t.Errorf("%g m/s of an inextensible swing still off by %g", s.LowestLow, last)
		}
	}
	// A connector that is taut where the fall begins has no speed to lose: both
	// bounds are one.
	l := overhead(3, 1.2, math.Hypot(1.2, 1.5))
	place := l.At(0)
	s := l.Swing(&place, &b)
	near(t, "both bounds", s.LowestHigh, s.LowestLow, 1e-7)
	last := math.Inf(1)
	for _, k := range []float64{1e5, 1e6, 1e7} {
		r := swung(t, l, path(t, connector.Elastic(connector.WireRope, k)), &b, 1e-10)
		off := math.Abs(r.Lowest.Speed/s.LowestHigh - 1)
		if !(off < last/4) {
			t.Errorf("%g N/m: off by %g, after %g", k, off, last)
		}
		last = off
	}
	if last > 1e-4 {
		t.Errorf("%g m/s of an inextensible swing still off by %g", s.LowestHigh, last)
	}
}

// No moment of a swing on a linear rope is faster than its bound, and none has
// more energy than it began with.
func TestNoMomentIsFasterThanTheBound(t *testing.T) {
	var series []PlanarState
	for i := range 200 {
		d := newDice(73, uint64(i))
		l, place := d.reached()
		if !place.Plane.Flat {
			continue
		}
		b := Body{Mass: d.within(50, 140), InitialSpeed: d.within(0, 2), Gravity: gravity}
		k := d.spread(3e3, 1e6)
		var tether Tether
		var r Planar
		if err := tether.Set(path(t, connector.Elastic(connector.Rope, k)), &place, &b); err != nil {
			t.Fatal(err)
		}
		var err error
		if series, err = l.TracePlanar(&place, &tether, &b, 1e-9, &r, series[:0]); err != nil {
			t.Fatal(err)
		}
		bound := SoftSpeed(&b, place.FreeFall+place.SwingDrop, k)
		peak, before, lowest := 0.0, -1.0, math.Inf(1)
		for _, s := range series {
			v := math.Hypot(s.VU, s.VZ)
			if v > bound*(1+1e-6) {
				t.Fatalf("layout %d: %g m/s at %g s, bound %g", i, v, s.Time, bound)
			}
			x := max(0, math.Hypot(s.U, place.Plane.Pivot-s.Z)-place.Plane.Radius)
			energy := v*v/2 + gravity*(s.Z-place.Start.Z) + k*x*x/2/b.Mass
			if want := square(b.InitialSpeed) / 2; s.Time > r.FirstPull && math.Abs(energy-want) > 1e-5*(1+bound*bound) {
				t.Fatalf("layout %d: energy %g at %g s, began with %g", i, energy, s.Time, want)
			}
			if s.Time < before {
				t.Fatalf("layout %d: time goes back from %g to %g", i, before, s.Time)
			}
			peak, before, lowest = max(peak, s.F), s.Time, min(lowest, s.Z)
		}
		if lowest < r.Lowest.Z-1e-6 {
			t.Fatalf("layout %d: a moment at the height %g, the lowest point at %g", i, lowest, r.Lowest.Z)
		}
		near(t, "peak of the moments", peak, r.Peak, 1e-3)
		near(t, "last moment", before, r.EndTime, 1e-12)
	}
}

func TestPlanarIsTheSameInAMirrorAndElsewhere(t *testing.T) {
	for i := range 300 {
		d := newDice(74, uint64(i))
		l, _ := d.reached()
		l.ObstacleCount = 2
		l.Obstacles[0] = NewLevel(d.within(-4, 0))
		l.Obstacles[1] = NewBox(Spot{d.within(-2, 0), -1, -4}, Spot{d.within(0, 2), 1, d.within(-3, 1)})
		p := path(t, d.parts()...)
		b := Body{Mass: 100, Gravity: gravity}
		r := swung(t, l, p, &b, 1e-10)
		m := *l
		m.Anchor.X, m.Positions[0].X = -m.Anchor.X, -m.Positions[0].X
		m.Obstacles[1] = NewBox(Spot{-l.Obstacles[1].Low.X, -1, -4}, Spot{-l.Obstacles[1].High.X, 1, l.Obstacles[1].High.Z})
		compareRuns(t, i, r, swung(t, &m, p, &b, 1e-10), 1e-9)
		m = *l
		for _, x := range []*float64{&m.Anchor.X, &m.Positions[0].X, &m.Obstacles[1].Low.X, &m.Obstacles[1].High.X} {
			*x += 16
		}
		compareRuns(t, i, r, swung(t, &m, p, &b, 1e-10), 1e-6)
	}
}

func compareRuns(t *testing.T, i int, a, b *Planar, relative float64) {
	t.Helper()
	if a.Status != b.Status {
		t.Fatalf("layout %d: %v and %v", i, a.Status, b.Status)
	}
	if a.Status == Rigid || a.Status == Endless || a.Status == OutOfPlane {
		return
	}
	near(t, "peak", b.Peak, a.Peak, relative)
	near(t, "drop", b.Lowest.Drop, a.Lowest.Drop, relative)
	near(t, "end", b.EndTime, a.EndTime, relative)
	for k := range 2 {
		x, y := &a.Passes[k], &b.Passes[k]
		if x.Reached != y.Reached {
			t.Fatalf("layout %d: obstacle %d: %+v and %+v", i, k, x, y)
		}
		if x.Reached {
			near(t, "speed at an obstacle", y.Speed, x.Speed, 10*relative)
			near(t, "height at an obstacle", y.Z, x.Z, 10*relative)
		}
	}
	if t.Failed() {
		t.Fatalf("layout %d: %+v\n%+v", i, a, b)
	}
}

// TestObstaclesOnTheWay looks along the moments of runs for the first touch of
// obstacles.
func TestObstaclesOnTheWay(t *testing.T) {
	touched, clear := 0, 0
	var series []PlanarState
	for i := range 600 {
		d := newDice(75, uint64(i))
		l, place := d.reached()
		if !place.Plane.Flat {
			continue
		}
		l.ObstacleCount = 1
		z := place.Lowest - l.Feet + d.within(-1.5, 1.5)
		at := place.Plane.Offset * d.within(-1.2, 1.2)
		x, y := place.Plane.X+at*place.Plane.DX, place.Plane.Y+at*place.Plane.DY
		l.Obstacles[0] = NewBox(Spot{x - d.within(0, 0.3), y - 0.1, z - 3}, Spot{x + d.within(0, 0.3), y + 0.1, z})
		if d.chance(0.3) {
			l.Obstacles[0] = NewLevel(z)
		}
		b := Body{Mass: 100, Gravity: gravity}
		var tether Tether
		var r Planar
		if err := tether.Set(path(t, d.parts()...), &place, &b); err != nil {
			t.Fatal(err)
		}
		var err error
		if series, err = l.TracePlanar(&place, &tether, &b, 1e-9, &r, series[:0]); err != nil {
			t.Fatal(err)
		}
		pass := &r.Passes[0]
		first := math.Inf(1)
		for n := 1; n < len(series) && math.IsInf(first, 1); n++ {
			// Straight between the moments, which are close together.
			const parts = 200
			for k := range parts {
				q := float64(k) / parts
				s, e := &series[n-1], &series[n]
				if meets(l, &place, s.U+q*(e.U-s.U), s.Z+q*(e.Z-s.Z)) {
					first = s.Time + q*(e.Time-s.Time)
					break
				}
			}
		}
		switch {
		case pass.Reached && math.Abs(pass.Time-first) < 5e-3:
			touched++
		case !pass.Reached && math.IsInf(first, 1):
			clear++
		default:
			// A graze within the straightness of the moments.
			m := *l
			grow := 0.004
			if pass.Reached {
				grow = -0.004
			}
			m.HalfWidth, m.Feet = m.HalfWidth+grow, m.Feet+grow
			var again Planar
			if err := m.Planar(&place, &tether, &b, 1e-9, &again); err != nil {
				t.Fatal(err)
			}
			if again.Passes[0].Reached == pass.Reached && math.Abs(again.Passes[0].Time-pass.Time) < 5e-3 {
				t.Fatalf("layout %d: %+v, first seen at %g\n%+v\n%+v", i, pass, first, l, place)
			}
		}
	}
	if touched < 100 || clear < 50 {
		t.Errorf("%d touched, %d clear", touched, clear)
	}
}

// A body that goes beyond a corner of the law and back within one step must not
// pass for one that never was there: every run at a coarse tolerance comes to
// the events of a fine one.
func TestNoCornerIsSteppedOver(t *testing.T) {
	for i := range 2000 {
		d := newDice(76, uint64(i))
		l, place := d.reached()
		if !place.Plane.Flat {
			continue
		}
		b := Body{Mass: d.within(50, 140), Gravity: gravity}
		p := path(t, d.parts()...)
		fine := swung(t, l, p, &b, 1e-12)
		rough := swung(t, l, p, &b, 1e-6)
		if fine.Status == Rigid || rough.Status == Rigid {
			if fine.Status != rough.Status && math.Abs(fine.Extension-rough.Extension) > 1e-4 {
				t.Fatalf("layout %d: %v and %v", i, fine.Status, rough.Status)
			}
			continue
		}
		if math.Abs(rough.Travel-fine.Travel) > 1e-4*(1+fine.Travel) {
			t.Fatalf("layout %d: first extension %g, finely %g\n%+v", i, rough.Travel, fine.Travel, p.Parts())
		}
		if rough.Counts.Turns == fine.Counts.Turns && math.Abs(rough.Peak-fine.Peak) > 1e-2*fine.Peak {
			t.Fatalf("layout %d: peak %g, finely %g\n%+v", i, rough.Peak, fine.Peak, p.Parts())
		}
	}
}

// A body that dips beyond a corner into something stiff and is back within one
// step: at a tolerance that allows long steps the peak must not come out low. The
// exact run straight down says how high it is.
func TestDipBeyondACornerWithinAStep(t *testing.T) {
	const soft, stiff, mass = 5000., 5e6, 100.
	b := Body{Mass: mass, Gravity: gravity}
	var exact connector.Result
	missed := 0.0
	for _, dip := range []float64{1e-7, 1e-6, 1e-5, 1e-4, 1e-3} {
		// On the soft part alone the body would come to rest at the dip beyond the
		// corner: soft x^2/2 = m g (h + x).
		const corner = 0.8
		x := corner + dip
		h := soft*x*x/2/(mass*gravity) - x
		for _, s := range []float64{0, 1e-6} {
			l := overhead(3, s, 1.5+h)
			p := path(t, connector.FromPoints([]connector.Point{{}, {Extension: corner, Force: soft * corner}, {Extension: corner + 1, Force: soft*corner + stiff}}, 0))
			if err := connector.Run(p, &connector.Fall{Mass: mass, FreeFall: l.At(0).FreeFall, Gravity: gravity}, &exact); err != nil {
				t.Fatal(err)
			}
			missed = max(missed, exact.Peak/(soft*x)-1)
			for _, tolerance := range []float64{1e-3, 1e-5, 1e-8, 1e-11} {
				// What the tolerance does to the speed at the corner, as energy, shows
				// as a force in the stiff part.
				give := 0.01*exact.Peak + math.Sqrt(stiff*mass*200*tolerance)
				if r := swung(t, l, p, &b, tolerance); math.Abs(r.Peak-exact.Peak) > give {
					t.Errorf("dip %g, offset %g, tolerance %g: peak %g, straight down %g", dip, s, tolerance, r.Peak, exact.Peak)
				}
			}
		}
	}
	if missed < 0.5 {
		t.Errorf("the dip hardly shows: %g", missed)
	}
}

// An absorber alone, straight down: the closed form of its travel, and rest.
func TestAbsorberAloneStraightDown(t *testing.T) {
	b := Body{Mass: 100, Gravity: gravity}
	l := overhead(1.5, 0, 1.8)
	r := swung(t, l, path(t, connector.NewAbsorber(connector.Plateau{Force: 4000, Travel: 1.75})), &b, 1e-9)
	near(t, "travel", r.Travel, connector.AbsorberTravel(100, math.Sqrt(2*gravity*1.8), 4000, gravity), 1e-9)
	near(t, "lowest", r.Lowest.Drop, 1.8+r.Travel, 1e-12)
	if r.Status != Rested || r.Peak != 4000 || r.Lowest.Speed != 0 || r.EndTime != r.FirstTurn {
		t.Errorf("%v, %g N, %+v", r.Status, r.Peak, r.Lowest)
	}
	// Just taut and at rest, it bears the weight and nothing happens.
	r = swung(t, overhead(3, 0, 1.5), path(t, connector.NewAbsorber(connector.Plateau{Force: 4000, Travel: 1.75})), &b, 1e-9)
	if r.Status != Rested || r.Travel != 0 || r.EndTime != 0 {
		t.Errorf("at rest: %v, travel %g, end %g", r.Status, r.Travel, r.EndTime)
	}
	near(t, "weight", r.Peak, 100*gravity, 1e-15)
}

// A connector that keeps its length goes on as a pendulum: its far end follows
// from the speed at the lowest point.
func TestHeldConnectorSwingsAsAPendulum(t *testing.T) {
	for i := range 200 {
		d := newDice(77, uint64(i))
		l := overhead(d.within(1, 3), d.within(0.2, 1.4), 2.2)
		p := path(t, connector.NewAbsorber(connector.Plateau{Force: d.within(6000, 20000), Travel: 3}))
		if l.At(0).Status != Known {
			continue
		}
		r := swung(t, l, p, &Body{Mass: 80, Gravity: gravity}, 1e-12)
		radius := 2.2 + r.Extension
		near(t, "far end", math.Cos(r.EndAngle), 1-square(r.Lowest.Speed)/(2*gravity*radius), 1e-9)
		near(t, "lowest", l.Anchor.Z-r.Lowest.Z, radius, 1e-12)
		amplitude := -r.EndAngle
		near(t, "time from the lowest point", r.EndTime-r.Lowest.Time, Period(radius, amplitude, gravity)/4, 1e-9)
		if r.Status != Swung || r.EndAngle >= 0 || r.Counts.Held == 0 {
			t.Errorf("swing %d: %+v", i, r)
		}
	}
}

// A held connector goes slack above the level of the pivot. From there the body
// flies along a parabola whose circle of curvature is the swing itself, which it
// meets again at three times the angle on the other side of the level (a theorem
// on conics and their circles of curvature, from memory; the angles of the four
// points in common sum to a whole turn).
func TestFlightFromAHeldConnector(t *testing.T) {
	flown := 0
	for i := range 300 {
		d := newDice(78, uint64(i))
		l := overhead(d.within(1.4, 1.8), d.within(1.6, 2.1), 2.2)
		place := l.At(0)
		b := Body{Mass: 80, InitialSpeed: d.within(0, 7), Gravity: gravity}
		var tether Tether
		var r Planar
		if err := tether.Set(path(t, connector.NewAbsorber(connector.Plateau{Force: 1e5, Travel: 3})), &place, &b); err != nil {
			t.Fatal(err)
		}
		series, err := l.TracePlanar(&place, &tether, &b, 1e-11, &r, nil)
		if err != nil {
			t.Fatal(err)
		}
		if r.Counts.Slacks == 0 {
			continue
		}
		if r.Status != Swung {
			t.Errorf("swing %d: %v", i, r.Status)
		}
		var free []PlanarState
		for _, s := range series {
			if s.F == 0 && s.Time > r.FirstPull+1e-9 {
				free = append(free, s)
			} else if len(free) > 0 {
				break
			}
		}
		last := free[len(free)-1]
		// The last eight moments are those of the flight, the first of them an eighth
		// of it after the departure; go back along the parabola.
		free = free[len(free)-8:]
		dt := free[1].Time - free[0].Time
		u, z := free[0].U-free[0].VU*dt, free[0].Z-free[0].VZ*dt-gravity*dt*dt/2
		depart := math.Atan2(z-l.Anchor.Z, -u)
		again := math.Atan2(last.Z-l.Anchor.Z, -last.U)
		if off := math.Remainder(again+3*depart, 2*math.Pi); math.Abs(off) > 1e-6 {
			t.Fatalf("swing %d: slack at %g, taut again at %g: off by %g", i, depart, again, off)
		}
		flown++
	}
	if flown < 50 {
		t.Errorf("%d flights", flown)
	}
}

// A connector level with its anchor and just taut: it bears nothing at first, and
// all of the radius is drop.
func TestSwingFromLevel(t *testing.T) {
	l := overhead(1.5, 2, 2)
	p := path(t, connector.Elastic(connector.Rope, 20000))
	b := Body{Mass: 100, Gravity: gravity}
	r := swung(t, l, p, &b, 1e-11)
	c := crudely(l, p, &b, r.EndTime-r.FirstPull, 1e-5)
	near(t, "peak", r.Peak, c.peak, 1e-6)
	near(t, "lowest", l.Anchor.Z-r.Lowest.Z, c.lowest, 1e-6)
	near(t, "extension", r.Extension, c.extension, 1e-6)
	if v := SoftSpeed(&b, 2, 20000); r.Lowest.Speed > v || r.Lowest.Speed < 0.9*v {
		t.Errorf("%g m/s at the lowest point, bound %g", r.Lowest.Speed, v)
	}
}

func TestPlanarThatIsNotRun(t *testing.T) {
	b := Body{Mass: 100, Gravity: gravity}
	l := &Layout{Anchor: Spot{Y: -1}, Edge: RoundEdge, DRing: 1.5, Feet: 1.5, Length: 3, PositionCount: 1, ObstacleCount: 1}
	l.Positions[0] = Position{0.5, 0.5}
	l.Obstacles[0] = NewLevel(-9)
	r := swung(t, l, path(t, connector.Elastic(connector.Rope, 9000)), &b, 1e-8)
	if r.Status != OutOfPlane || !math.IsNaN(r.Peak) || !r.Passes[0].Unknown {
		t.Errorf("out of plane: %v, %g N", r.Status, r.Peak)
	}
	l = overhead(3, 1, 2)
	l.Slack = 0.1
	r = swung(t, l, path(t, connector.Loose(0.1), connector.Elastic(connector.Rope, 9000)), &b, 1e-8)
	if r.Status != Uncounted || !math.IsNaN(r.Peak) {
		t.Errorf("slack twice: %v, %g N", r.Status, r.Peak)
	}
	// The same slack told once, in the one place or in the other, is one fall.
	one := swung(t, l, path(t, connector.Elastic(connector.Rope, 9000)), &b, 1e-11)
	l.Slack = 0
	other := swung(t, l, path(t, connector.Loose(0.1), connector.Elastic(connector.Rope, 9000)), &b, 1e-11)
	near(t, "peak with slack", other.Peak, one.Peak, 1e-9)
	near(t, "lowest with slack", other.Lowest.Z, one.Lowest.Z, 1e-9)
}

func TestPlanarAllocatesNothing(t *testing.T) {
	l := overhead(1.5, 1.2, 2)
	l.ObstacleCount = 2
	l.Obstacles[0] = NewLevel(-3)
	l.Obstacles[1] = NewBox(Spot{-1, -1, -3}, Spot{0, 1, -2})
	place := l.At(0)
	b := Body{Mass: 100, Gravity: gravity}
	var tether Tether
	var r Planar
	p := path(t, connector.Elastic(connector.Rope, 9000), connector.NewAbsorber(connector.Plateau{Force: 4000, Travel: 0.3}), connector.NewDashpot(100))
	if err := tether.Set(p, &place, &b); err != nil {
		t.Fatal(err)
	}
	if n := testing.AllocsPerRun(50, func() {
		if err := l.Planar(&place, &tether, &b, 1e-8, &r); err != nil {
			t.Fatal(err)
		}
	}); n != 0 {
		t.Errorf("a run allocates %v times", n)
	}
}
