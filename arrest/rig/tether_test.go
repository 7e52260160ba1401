package rig

import (
	"math"
	"strings"
	"testing"

	"arrestcheck/arrest/connector"
)

// TestTetherHasTheForceOfThePath holds the law as read against the path's own,
// on the loading curve and on ways back, over random paths.
func TestTetherHasTheForceOfThePath(t *testing.T) {
	compared := 0
	for i := range 1500 {
		d := newDice(60, uint64(i))
		_, place := d.reached()
		p := path(t, d.parts()...)
		b := Body{Mass: d.within(50, 140), Gravity: gravity}
		var tether Tether
		if err := tether.Set(p, &place, &b); err != nil {
			t.Fatal(err)
		}
		if tether.endless || len(tether.segments) == 0 {
			continue
		}
		last := tether.segments[len(tether.segments)-1]
		end := last.x0 + 0.1
		if tether.rigid {
			end = last.x1
		}
		for range 20 {
			reach := end * d.Float64()
			x := reach
			if d.chance(0.6) {
				x = reach * d.Float64()
			}
			want, got := p.Force(x, reach), tether.force(x, reach)
			compared++
			// Where the force jumps, a last bit decides between before and after.
			if math.Abs(got-want) > 1e-8*(1+want) && math.Abs(tether.force(x, reach+1e-9)-want) > 1e-2 {
				t.Fatalf("path %d: %.12g N at %.12g of %.12g, want %.12g\n%+v\n%+v", i, got, x, reach, want, tether.segments, tether.back)
			}
		}
	}
	if compared < 20000 {
		t.Errorf("%d forces compared", compared)
	}
}

// A law is read as far as it can be needed, and as short as it is: one segment a
// straight piece.
func TestTetherOfKnownPaths(t *testing.T) {
	place := overhead(1.5, 0, 2).At(0)
	b := Body{Mass: 100, Gravity: gravity}
	rope := connector.Elastic(connector.Rope, 9000)
	absorber := connector.NewAbsorber(connector.Plateau{Force: 4000, Travel: 0.3})
	for _, c := range []struct {
		what     string
		parts    []connector.Part
		segments int
		corners  []float64
		held     bool
	}{
		{"rope", []connector.Part{rope}, 1, nil, false},
		{"rope and dashpot", []connector.Part{rope, connector.NewDashpot(100)}, 1, nil, false},
		{"rope and absorber", []connector.Part{rope, absorber}, 3, []float64{4. / 9, 4./9 + 0.3}, false},
		{"absorber", []connector.Part{absorber}, 1, []float64{0.3}, true},
		{"slack first", []connector.Part{connector.Loose(0.2), rope}, 1, nil, false},
		{"slack alone", []connector.Part{connector.Loose(0.2)}, 0, nil, true},
	} {
		var tether Tether
		if err := tether.Set(path(t, c.parts...), &place, &b); err != nil {
			t.Fatal(err)
		}
		if len(tether.segments) != c.segments || tether.held() != c.held {
			t.Errorf("%s: %+v, held %v", c.what, tether.segments, tether.held())
			continue
		}
		for i, x := range c.corners {
			near(t, c.what+": corner", tether.segments[i].x1, x, 1e-12)
		}
	}
}

func TestTetherIsForOneFall(t *testing.T) {
	l := overhead(1.5, 0.5, 2)
	place := l.At(0)
	b := Body{Mass: 100, Gravity: gravity}
	var tether Tether
	var r Planar
	panics(t, "a tether that was never set", func() { _ = l.Planar(&place, &tether, &b, 1e-8, &r) })
	far := overhead(3, 0, 1).At(0)
	panics(t, "a place out of reach", func() { _ = tether.Set(path(t, connector.Elastic(connector.Rope, 9000)), &far, &b) })
	panics(t, "a position that is not there", func() { l.At(1) })
	if err := tether.Set(path(t, connector.Elastic(connector.Rope, 9000)), &place, &Body{Mass: -1, Gravity: gravity}); err == nil {
		t.Error("a mass below zero is taken")
	}
	if err := tether.Set(path(t, connector.Elastic(connector.Rope, 9000)), &place, &b); err != nil {
		t.Fatal(err)
	}
	heavier := b
	heavier.Mass++
	longer := overhead(1.5, 0.5, 2.1)
	elsewhere := longer.At(0)
	lower := overhead(1.2, 0.5, 2)
	deeper := lower.At(0)
	for what, err := range map[string]error{
		"another mass":    l.Planar(&place, &tether, &heavier, 1e-8, &r),
		"another length":  longer.Planar(&elsewhere, &tether, &b, 1e-8, &r),
		"another height":  lower.Planar(&deeper, &tether, &b, 1e-8, &r),
		"no tolerance":    l.Planar(&place, &tether, &b, 0, &r),
		"no mass":         l.Planar(&place, &tether, &Body{Gravity: gravity}, 1e-8, &r),
		"infinite speed":  l.Planar(&place, &tether, &Body{Mass: 1, Gravity: 1, InitialSpeed: math.Inf(1)}, 1e-8, &r),
		"unknown gravity": l.Planar(&place, &tether, &Body{Mass: 1, Gravity: math.NaN()}, 1e-8, &r),
	} {
		if err == nil {
			t.Errorf("%s is taken", what)
		}
	}
}

// panics reports a call that does not panic with the name of the package.
func panics(t *testing.T, what string, call func()) {
	t.Helper()
	defer func() {
		if text, _ := recover().(string); !strings.HasPrefix(text, "rig: ") {
			t.Errorf("%s: panic %q", what, text)
		}
	}()
	call()
}
