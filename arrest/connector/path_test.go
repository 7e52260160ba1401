package connector

import (
	"errors"
	"math"
	"strings"
	"testing"

	"pgregory.net/rapid"
)

// drawn returns random parts from a number that rapid draws and may shrink.
func drawn(t *rapid.T) (dice, *Path) {
	d := newDice(rapid.Uint64().Draw(t, "seed"), 7)
	var p Path
	if err := p.Set(d.parts()...); err != nil {
		t.Fatal(err)
	}
	return d, &p
}

// TestSeriesOfParts holds the loading curve against the parts: their extensions add up
// to that of the path, it never falls but by an activation peak, and the work
// done on the path is done on its parts.
func TestSeriesOfParts(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		_, p := drawn(t)
		n := len(p.elements)
		work, peaks := 0.0, 0
		for i := range p.spans {
			s := &p.spans[i]
			sum, shares, done := 0.0, 0.0, 0.0
			for e := range n {
				sum += p.ext[i*n+e]
				shares += p.share[i*n+e]
				done += p.work[i*n+e]
				if p.share[i*n+e] < 0 {
					t.Fatalf("span %d: an element shrinks while the path grows", i)
				}
			}
			if !closeTo(sum, s.x0, 1e-12) && math.Abs(sum-s.x0) > 1e-12 || !closeTo(shares, 1, 1e-12) {
				t.Fatalf("span %d begins at %v, its elements at %v; shares %v", i, s.x0, sum, shares)
			}
			if math.Abs(done-work) > 1e-9*(1+work) {
				t.Fatalf("span %d: work %v, of the elements %v", i, work, done)
			}
			work += (s.x1 - s.x0) * (s.f0 + s.f1) / 2
			if i > 0 && s.f0 < p.spans[i-1].f1 {
				peaks++
			}
			if s.k < 0 || s.x1 <= s.x0 || s.f1 < s.f0 {
				t.Fatalf("span %d: %+v", i, s)
			}
		}
		activations := 0
		for _, q := range p.parts {
			if q.Plateau.Activation > q.Plateau.Force {
				activations++
			}
		}
		if peaks > activations {
			t.Fatalf("the curve falls %d times, %d plateaus have a peak", peaks, activations)
		}
	})
}

// TestWayBack: the way back lies below the loading curve or on it, falls with
// the extension, and ends at what stays.
func TestWayBack(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		d, p := drawn(t)
		if len(p.spans) == 0 {
			return
		}
		end := p.spans[len(p.spans)-1].x0 + 0.3
		reach := d.within(0, end)
		before := p.Force(reach, reach)
		if math.IsInf(before, 1) {
			return
		}
		for i := 100; i >= 0; i-- {
			x := reach * float64(i) / 100
			f := p.Force(x, reach)
			if f > before+1e-9*before || f > p.Force(x, x)+1e-6 && !p.peaked() {
				t.Fatalf("reach %v: force %v at %v, after %v; loading %v", reach, f, x, before, p.Force(x, x))
			}
			before = f
		}
	})
}

func (p *Path) peaked() bool {
	for _, q := range p.parts {
		if q.Plateau.Activation > q.Plateau.Force {
			return true
		}
	}
	return false
}

// TestTwoOfAForce: of two plateaus under one force the one nearer to the anchor
// goes first.
func TestTwoOfAForce(t *testing.T) {
	plateau := Plateau{Force: 3000, Travel: 0.2}
	r := one(t, Fall{Mass: 100, FreeFall: 0.25, Gravity: StandardGravity}, Elastic(Rope, 20000), NewAbsorber(plateau), NewRopeGrab(plateau))
	if r.Parts[1].AtRest <= 0 || r.Parts[2].AtRest != 0 {
		t.Errorf("travel %v nearer to the anchor, %v nearer to the body", r.Parts[1].AtRest, r.Parts[2].AtRest)
	}
}

// TestActivationPeak works a peak out by hand: spring 20 kN/m, absorber 4 kN that
// starts at 5 kN. At 5 kN the spring holds 0.25 m; it falls back to 4 kN and
// gives 0.05 m to the absorber, with (5^2-4^2)/(2*20) kJ = 225 J of energy, all
// of it lost.
func TestActivationPeak(t *testing.T) {
	var p Path
	if err := p.Set(Elastic(Rope, 20000), NewAbsorber(Plateau{Force: 4000, Travel: 0.5, Activation: 5000})); err != nil {
		t.Fatal(err)
	}
	for _, c := range []struct{ x, force float64 }{{0.1, 2000}, {0.25, 5000}, {0.2500001, 4000}, {0.6, 4000}, {0.7, 4000}, {0.75, 5000}, {1, 10000}} {
		if got := p.Force(c.x, 0); !closeTo(got, c.force, 1e-9) {
			t.Errorf("force at %v: %v, want %v", c.x, got, c.force)
		}
	}
	r := one(t, Fall{Mass: 100, FreeFall: 1, Gravity: StandardGravity}, p.parts...)
	if r.Peak != 5000 {
		t.Errorf("peak %v, want the activation peak 5000", r.Peak)
	}
	at := r.StoppingDistance - 0.2 // the spring holds 4 kN at rest
	if !closeTo(r.AbsorberTravel, at, 1e-12) || !closeTo(r.Parts[1].Lost, 225+4000*(at-0.05), 1e-12) {
		t.Errorf("travel %v, want %v; lost %v", r.AbsorberTravel, at, r.Parts[1].Lost)
	}

	// With less travel than the spring gives back, the rest stays in the spring.
	if err := p.Set(Elastic(Rope, 20000), NewAbsorber(Plateau{Force: 4000, Travel: 0.03, Activation: 5000})); err != nil {
		t.Fatal(err)
	}
	for _, c := range []struct{ x, force float64 }{{0.25, 5000}, {0.2500001, 4400}, {0.28, 5000}} {
		if got := p.Force(c.x, 0); !closeTo(got, c.force, 1e-6) {
			t.Errorf("short travel, force at %v: %v, want %v", c.x, got, c.force)
		}
	}
	if p.spans[0].exhausts != 2 {
		t.Errorf("the short travel is not noted as used up: %b", p.spans[0].exhausts)
	}
}

// TestPermanent works the way back out by hand: webbing 60 kN/m that comes back
// along 100 kN/m, an absorber, and a rope that comes back along its corner.
func TestPermanent(t *testing.T) {
	webbing := Elastic(Webbing, 60000)
	webbing.Unloading = 100000
	rope := FromPoints([]Point{{0, 0}, {0.1, 1000}, {0.2, 6000}}, 0)
	r := one(t, Fall{Mass: 100, FreeFall: 1.8, Gravity: StandardGravity}, webbing, NewAbsorber(Plateau{Force: 4000, Travel: 0.4}), rope)
	if r.Exhausted != 2 {
		t.Fatalf("exhausted %b", r.Exhausted)
	}
	for i, want := range []float64{r.Peak/60000 - r.Peak/100000, 0.4, 0} {
		if got := r.Parts[i].Permanent; math.Abs(got-want) > 1e-12 {
			t.Errorf("part %d: permanent %v, want %v", i+1, got, want)
		}
	}
	if want := 0.1 + (r.Peak-1000)/50000; !closeTo(r.Parts[2].AtRest, want, 1e-12) {
		t.Errorf("rope at rest %v, want %v", r.Parts[2].AtRest, want)
	}
	if r.BeyondPoints != 0 && r.Peak <= 6000 {
		t.Errorf("beyond points %b at a peak of %v", r.BeyondPoints, r.Peak)
	}
}

func TestBeyondPoints(t *testing.T) {
	rope := FromPoints([]Point{{0, 0}, {0.1, 1000}, {0.2, 3000}}, 0)
	if r := one(t, fall18, Elastic(Webbing, 50000), rope); r.BeyondPoints != 2 || r.Peak <= 3000 {
		t.Errorf("beyond points %b at a peak of %v, want part 2", r.BeyondPoints, r.Peak)
	}
	late := FromPoints([]Point{{0.3, 0}, {0.4, 1000}, {0.5, 3000}}, 0)
	if r := one(t, Fall{Mass: 100, FreeFall: 0.5, Gravity: StandardGravity}, late); r.BeyondPoints != 1 || r.Peak <= 3000 || r.Parts[0].AtRest > 0.5 {
		t.Errorf("after slack: beyond points %b at a peak of %v and a travel of %v", r.BeyondPoints, r.Peak, r.Parts[0].AtRest)
	}
	if r := one(t, Fall{Mass: 100, FreeFall: 0.01, Gravity: StandardGravity}, rope); r.BeyondPoints != 0 {
		t.Errorf("beyond points %b at a peak of %v, want none", r.BeyondPoints, r.Peak)
	}
}

// TestLeadingSlack: points that begin with an extension without force are slack.
func TestLeadingSlack(t *testing.T) {
	a := one(t, fall18, FromPoints([]Point{{0.1, 0}, {0.3, 0}, {0.4, 2000}, {0.5, 6000}}, 0))
	b := one(t, fall18, Loose(0.3), FromPoints([]Point{{0, 0}, {0.1, 2000}, {0.2, 6000}}, 0))
	if a.FirstPull != b.FirstPull || !closeTo(a.Peak, b.Peak, 1e-12) {
		t.Errorf("peak %v after %v s, want %v after %v s", a.Peak, a.FirstPull, b.Peak, b.FirstPull)
	}
}

// TestLifeline: the stretch of a lifeline is no part of the deceleration distance.
func TestLifeline(t *testing.T) {
	line := Elastic(Rope, 20000)
	line.Lifeline = true
	r := one(t, fall18, line, NewAbsorber(Plateau{Force: 4000, Travel: 1}))
	if want := r.StoppingDistance - 4000./20000; !closeTo(r.DecelerationDistance, want, 1e-12) {
		t.Errorf("deceleration distance %v, want %v", r.DecelerationDistance, want)
	}
}

func TestPartChecks(t *testing.T) {
	plateau := func(p Plateau) Part { return NewAbsorber(p) }
	inf, nan := math.Inf(1), math.NaN()
	for name, c := range map[string]struct {
		part Part
		want error
	}{
		"negative slack":       {Loose(-1), errNegative},
		"slack NaN":            {Loose(nan), errNegative},
		"endless slack":        {Loose(inf), errEndless},
		"endless stiffness":    {Elastic(Rope, inf), errEndless},
		"no plateau force":     {plateau(Plateau{Travel: 1}), errNoForce},
		"no travel":            {plateau(Plateau{Force: 1}), errNoTravel},
		"rise needed":          {plateau(Plateau{Force: 2, Travel: 1, Activation: 1}), errRiseNeeded},
		"rise unwanted":        {plateau(Plateau{Force: 2, Travel: 1, Rise: 1}), errRiseUnwanted},
		"rise above":           {plateau(Plateau{Force: 2, Travel: 1, Activation: 3, Rise: 1}), errRiseUnwanted},
		"rise too long":        {plateau(Plateau{Force: 2, Travel: 1, Activation: 1, Rise: 2}), errRiseLong},
		"two curves":           {Part{Stiffness: 1, Points: []Point{{0, 0}, {1, 1}}}, errTwoCurves},
		"unloading of nothing": {Part{Unloading: 1}, errPointsNoForce},
		"shallow way back":     {Part{Stiffness: 2, Unloading: 1}, errUnloadShallow},
		"one point":            {FromPoints([]Point{{0, 0}}, 0), errFewPoints},
		"points start":         {FromPoints([]Point{{1, 1}, {2, 2}}, 0), errPointStart},
		"points held":          {FromPoints([]Point{{0, 1}, {2, 2}}, 5), errPointHeld},
		"points NaN":           {FromPoints([]Point{{0, 0}, {nan, 2}}, 0), errPointNumber},
		"points endless":       {FromPoints([]Point{{0, 0}, {1, inf}}, 0), errPointNumber},
		"points stand":         {FromPoints([]Point{{0, 0}, {0, 2}}, 0), errPointOrder},
		"points fall":          {FromPoints([]Point{{0, 0}, {1, 2}, {2, 1}}, 0), errPointFalls},
		"points flat":          {FromPoints([]Point{{0, 0}, {1, 2}, {2, 2}, {3, 4}}, 0), errPointFlat},
		"points without force": {FromPoints([]Point{{0, 0}, {1, 0}}, 0), errPointForce},
		"points end flat":      {FromPoints([]Point{{0, 0}, {1, 2}, {2, 2}}, 9), errLastFlat},
		"points shallow":       {FromPoints([]Point{{0, 0}, {1, 2}, {2, 6}}, 3), errUnloadShallow},
	} {
		var p Path
		err := p.Set(Elastic(Rope, 1), c.part)
		if !errors.Is(err, c.want) || !strings.HasPrefix(err.Error(), "connector: part 2 (") {
			t.Errorf("%s: %v, want %v of part 2", name, err, c.want)
		}
	}
	var p Path
	if err := p.Set(); err != errNoParts {
		t.Errorf("no parts: %v", err)
	}
	if err := p.Set(make([]Part, MaxParts+1)...); err != errManyParts {
		t.Errorf("too many parts: %v", err)
	}
}

func TestKindNames(t *testing.T) {
	seen := map[string]bool{}
	for k := Rope; k <= Dashpot; k++ {
		if name := k.String(); strings.HasPrefix(name, "kind") || seen[name] {
			t.Errorf("kind %d is called %q", k, name)
		} else {
			seen[name] = true
		}
	}
	if got := Kind(99).String(); got != "kind 99" {
		t.Errorf("kind 99 is called %q", got)
	}
}
