package arrest

import (
	"math"
	"testing"

	"arrestcheck/arrest/connector"
)

// A give is the law of one part by itself: extension and energy taken at a
// force, and at a plateau from when it begins to travel to when it ends.
type give struct {
	force, travel float64                 // of a plateau, N and m
	x, energy     func(f float64) float64 // of what stretches
}

func linear(k float64) give {
	return give{x: func(f float64) float64 { return f / k }, energy: func(f float64) float64 { return f * f / 2 / k }}
}

func held(force, travel float64) give { return give{force: force, travel: travel} }

// bent is a part with two straight stretches that goes on along the second.
func bent(corner, stiff1, stiff2 float64) give {
	x := func(f float64) float64 {
		if f <= corner {
			return f / stiff1
		}
		return corner/stiff1 + (f-corner)/stiff2
	}
	energy := func(f float64) float64 {
		if f <= corner {
			return f * f / 2 / stiff1
		}
		return corner*corner/2/stiff1 + (f*f-corner*corner)/2/stiff2
	}
	return give{x: x, energy: energy}
}

// stopped returns the peak force and the distance of a stop by energy alone:
// m*v^2/2 + W*x = energy taken, every part under the same force.
func stopped(m, v, g float64, parts []give) (peak, distance float64) {
	left := func(f float64, part float64, at float64) float64 {
		// What is left of the energy at the force f, the plateau of the force at
		// having done the part of its travel.
		e, x := m*v*v/2, 0.0
		for _, p := range parts {
			switch {
			case p.x != nil:
				e, x = e-p.energy(f), x+p.x(f)
			case p.force < f && p.force != at:
				e, x = e-p.force*p.travel, x+p.travel
			case p.force == at:
				e, x = e-p.force*p.travel*part, x+p.travel*part
			}
		}
		distance = x
		return e + m*g*x
	}
	bisect := func(lo, hi float64, rest func(float64) float64) float64 {
		for range 200 {
			if mid := (lo + hi) / 2; rest(mid) > 0 {
				lo = mid
			} else {
				hi = mid
			}
		}
		return hi
	}
	for _, p := range parts {
		if p.x == nil && left(p.force, 0, p.force) > 0 && left(p.force, 1, p.force) <= 0 {
			part := bisect(0, 1, func(part float64) float64 { return left(p.force, part, p.force) })
			left(p.force, part, p.force)
			return p.force, distance
		}
	}
	peak = bisect(0, 1e6, func(f float64) float64 { return left(f, 0, -1) })
	left(peak, 0, -1)
	return peak, distance
}

// Every kind of part gives way as it should when it stands beside a piece of
// webbing: peak and distance follow from the energy alone. One part left out,
// or taken for another, moves them by far more than the tolerance.
func TestEveryKindOfPartByEnergy(t *testing.T) {
	curve := []connector.Point{{Extension: 0, Force: 0}, {Extension: 0.05, Force: 1000}, {Extension: 0.10, Force: 4000}}
	for _, c := range []struct {
		name string
		part testPart
		law  give
	}{
		{"rope", testPart{kind: connector.Rope, basis: ByModulus, length: "2 m", give: "20 kN"}, linear(20000.0 / 2)},
		{"webbing", testPart{kind: connector.Webbing, basis: ByStiffness, give: "30 kN/m"}, linear(30000)},
		{"wire rope", testPart{kind: connector.WireRope, basis: ByModulus, length: "10 m", give: "1600 kN"}, linear(1.6e6 / 10)},
		{"absorber", testPart{kind: connector.Absorber, force: "4 kN", travel: "1 m"}, held(4000, 1)},
		{"absorber at its end", testPart{kind: connector.Absorber, force: "3 kN", travel: "0.3 m"}, held(3000, 0.3)},
		{"retractable", testPart{kind: connector.Retractable, force: "3.5 kN", travel: "0.9 m"}, held(3500, 0.9)},
		{"rope grab", testPart{kind: connector.RopeGrab, force: "2.5 kN", travel: "0.4 m"}, held(2500, 0.4)},
		{"harness", testPart{kind: connector.Harness, basis: ByStiffness, give: "100 kN/m"}, linear(100e3)},
		{"anchor", testPart{kind: connector.Anchor, basis: ByStiffness, give: "80 kN/m"}, linear(80e3)},
		{"curve", testPart{kind: connector.Curve, basis: ByPoints}, bent(1000, 1000/0.05, 3000/0.05)},
	} {
		j := onPath(t, fall100(t), FromLabel, testPart{kind: connector.Webbing, basis: ByStiffness, give: "60 kN/m"}, c.part)
		if c.part.basis == ByPoints {
			j.Point.Path.Parts[1].Points = curve
		}
		res := Evaluate(j)
		v := math.Sqrt(2 * StandardGravity * 1.8)
		peak, distance := stopped(100, v, StandardGravity, []give{linear(60e3), c.law})
		near(t, c.name+": peak", find(t, &res, PeakForce, Modelled).Value, peak, 1e-9)
		near(t, c.name+": distance", find(t, &res, StoppingDistance, Modelled).Value, distance, 1e-9)
	}
}
