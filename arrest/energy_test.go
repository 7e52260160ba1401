package arrest

import (
	"math"
	"testing"

	"arrestcheck/arrest/connector"
)

// A give is the law of one part by itself: what a force makes of it.
type give struct {
	x, energy func(f float64) float64 // extension, m, and energy taken, J
	at        float64                 // force, N, at which it travels; 0 where it only stretches
	travel    float64                 // m, under that force
}

func linear(k float64) give {
	return give{x: func(f float64) float64 { return f / k }, energy: func(f float64) float64 { return f * f / 2 / k }}
}

// bent stretches along k1 up to the force corner and along k2 beyond.
func bent(corner, k1, k2 float64) give {
	return give{
		x: func(f float64) float64 { return min(f, corner)/k1 + max(0, f-corner)/k2 },
		energy: func(f float64) float64 {
			low, high := min(f, corner), max(f, corner)
			return low*low/2/k1 + (high*high-corner*corner)/2/k2
		},
	}
}

// held begins to travel at the force from, which rises evenly to the force at
// over the travel rise, and travels on under it.
func held(from, at, rise, travel float64) give {
	risen := func(f float64) float64 {
		if from == at {
			return 0
		}
		return rise * (min(max(f, from), at) - from) / (at - from)
	}
	return give{
		x:      risen,
		energy: func(f float64) float64 { return risen(f) * (from + min(max(f, from), at)) / 2 },
		at:     at, travel: travel - rise,
	}
}

// stopped returns the peak force and the distance of a stop by energy alone:
// m*v^2/2 + W*x is what the parts take, all of them under one force. It goes up
// through the forces, and at each plateau through its travel.
func stopped(m, v, g float64, parts []give) (peak, distance float64) {
	// done is the share of the travel of a plateau at just this force.
	taken := func(f, done float64) (x, energy float64) {
		for _, p := range parts {
			part := 0.0
			switch {
			case p.at == 0:
			case p.at < f:
				part = 1
			case p.at == f:
				part = done
			}
			x += p.x(f) + part*p.travel
			energy += p.energy(f) + part*p.travel*p.at
		}
		return x, energy
	}
	rests := func(f, done float64) bool {
		x, energy := taken(f, done)
		return m*v*v/2+m*g*x <= energy
	}
	least := func(lo, hi float64, is func(float64) bool) float64 {
		for range 200 {
			if mid := (lo + hi) / 2; is(mid) {
				hi = mid
			} else {
				lo = mid
			}
		}
		return hi
	}
	for _, p := range parts {
		if p.at > 0 && !rests(p.at, 0) && rests(p.at, 1) {
			distance, _ = taken(p.at, least(0, 1, func(done float64) bool { return rests(p.at, done) }))
			return p.at, distance
		}
	}
	peak = least(0, 1e6, func(f float64) bool { return rests(f, 0) })
	distance, _ = taken(peak, 0)
	return peak, distance
}

// Every kind of part gives way as it should beside a piece of webbing: peak and
// distance follow from the energy alone. A part left out, or taken for another,
// moves them by far more than the tolerance.
func TestEveryKindOfPartByEnergy(t *testing.T) {
	curve := []connector.Point{{Extension: 0, Force: 0}, {Extension: 0.05, Force: 1000}, {Extension: 0.10, Force: 4000}}
	for _, c := range []struct {
		name string
		part testPart
		rise float64
		law  give
	}{
		{"rope", testPart{kind: connector.Rope, basis: ByModulus, length: "2 m", give: "20 kN"}, 0, linear(20000.0 / 2)},
		{"webbing", testPart{kind: connector.Webbing, basis: ByStiffness, give: "30 kN/m"}, 0, linear(30e3)},
		{"wire rope", testPart{kind: connector.WireRope, basis: ByModulus, length: "10 m", give: "1600 kN"}, 0, linear(1.6e6 / 10)},
		{"absorber", testPart{kind: connector.Absorber, force: "4 kN", travel: "1 m"}, 0, held(4000, 4000, 0, 1)},
		{"absorber at its end", testPart{kind: connector.Absorber, force: "3 kN", travel: "0.3 m"}, 0, held(3000, 3000, 0, 0.3)},
		{"absorber that rises", testPart{kind: connector.Absorber, force: "4 kN", travel: "1 m", activate: "2 kN"}, 0.3, held(2000, 4000, 0.3, 1)},
		{"retractable", testPart{kind: connector.Retractable, force: "3.5 kN", travel: "0.9 m"}, 0, held(3500, 3500, 0, 0.9)},
		{"rope grab", testPart{kind: connector.RopeGrab, force: "2.5 kN", travel: "0.4 m"}, 0, held(2500, 2500, 0, 0.4)},
		{"harness", testPart{kind: connector.Harness, basis: ByStiffness, give: "100 kN/m"}, 0, linear(100e3)},
		{"anchor", testPart{kind: connector.Anchor, basis: ByStiffness, give: "80 kN/m"}, 0, linear(80e3)},
		{"curve", testPart{kind: connector.Curve, basis: ByPoints}, 0, bent(1000, 1000/0.05, 3000/0.05)},
	} {
		j := onPath(t, fall100(t), FromLabel, testPart{kind: connector.Webbing, basis: ByStiffness, give: "60 kN/m"}, c.part)
		part := &j.Point.Path.Parts[1]
		if c.part.basis == ByPoints {
			part.Points = curve
		}
		if c.rise > 0 {
			part.Rise = MaxFigures - 1
			j.Point.Figures[part.Rise] = c.rise
		}
		res := Evaluate(j)
		v := math.Sqrt(2 * StandardGravity * 1.8)
		peak, distance := stopped(100, v, StandardGravity, []give{linear(60e3), c.law})
		near(t, c.name+": peak", find(t, &res, PeakForce, Modelled).Value, peak, 1e-9)
		near(t, c.name+": distance", find(t, &res, StoppingDistance, Modelled).Value, distance, 1e-9)

		travels := 0.0
		for _, e := range res.Estimates {
			if e.Quantity == AbsorberTravel && e.Value > 0 {
				travels = e.Value
			}
		}
		if is := c.part.kind == connector.Absorber; is != (travels > 0) {
			t.Errorf("%s: travel of the absorber %v", c.name, travels)
		}
	}
}

// What a rope grab slips is no travel of the absorber beside it.
func TestAbsorberTravelLeavesOtherTravelOut(t *testing.T) {
	res := Evaluate(onPath(t, fall100(t), FromLabel,
		testPart{kind: connector.RopeGrab, force: "2.5 kN", travel: "0.1 m"},
		testPart{kind: connector.Webbing, basis: ByStiffness, give: "60 kN/m"},
		testPart{kind: connector.Absorber, force: "4 kN", travel: "1 m"}))
	v := math.Sqrt(2 * StandardGravity * 1.8)
	_, distance := stopped(100, v, StandardGravity, []give{linear(60e3), held(2500, 2500, 0, 0.1), held(4000, 4000, 0, 1)})
	near(t, "travel", find(t, &res, AbsorberTravel, Modelled).Value, distance-0.1-4000.0/60e3, 1e-9)
}
