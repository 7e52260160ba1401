package arrest

import (
	"math"
	"testing"
)

// pulseAt is p(s) of each shape, written apart from the closed forms; the
// early peak is a net deceleration that falls evenly and is handled below.
func pulseAt(p Pulse, s, rise float64) float64 {
	switch p {
	case RisingRamp:
		return 2 * s
	case SpringLike:
		return math.Pi / 2 * math.Sin(math.Pi*s/2)
	case RisePlateau:
		top := 1 / (1 - rise/2)
		if s < rise {
			return top * s / rise
		}
		return top
	}
	return 1
}

// Each shape is integrated in time with the midpoint rule: the body must come
// to rest at t, after the distance the closed form says, with the peak it says.
func TestShapesAgainstIntegration(t *testing.T) {
	const v, dur, n = 5.9, 0.27, 20000
	m, g := 92.0, StandardGravity
	for _, rec := range Pulses() {
		for _, rise := range []float64{0.25, 0.8} {
			speed, x, peak := v, 0.0, 0.0
			dt := dur / n
			for i := range n {
				s := (float64(i) + 0.5) / n
				force := (m*g + m*v/dur) * pulseAt(rec.Pulse, s, rise)
				if rec.Pulse == EarlyPeak {
					force = m*g + 2*m*v/dur*(1-s)
				}
				x += speed*dt + (g-force/m)*dt*dt/2
				speed += (g - force/m) * dt
				peak = math.Max(peak, force)
			}
			if math.Abs(speed) > 1e-6*v {
				t.Errorf("%s: still %g m/s at the end", rec.Name, speed)
			}
			near(t, rec.Name+" distance", rec.Pulse.DistanceOf(v, dur, g, rise), x, 1e-6)
			near(t, rec.Name+" peak", rec.Pulse.PeakOf(m, v, dur, g, rise), peak, 2e-4)
			near(t, rec.Name+" time", rec.Pulse.TimeOf(v, rec.Pulse.DistanceOf(v, dur, g, rise), g, rise), dur, 1e-12)
		}
	}
}

func TestPlateauBetweenConstantAndRamp(t *testing.T) {
	k0, c0 := RisePlateau.factors(0)
	k1, c1 := RisePlateau.factors(1)
	k, c := Constant.factors(0)
	kr, cr := RisingRamp.factors(0)
	near(t, "k at 0", k0, k, 1e-15)
	near(t, "c at 0", c0, c, 1e-15)
	near(t, "k at 1", k1, kr, 1e-15)
	near(t, "c at 1", c1, cr, 1e-15)
}

// 100 kg, 1.8 m, 1.07 m, 0.30 s: a ramp in 0.30 s would take 1.335 m.
func TestShapeContradictedByBothFigures(t *testing.T) {
	res := Evaluate(figures{mass: "100 kg", fall: "1.8 m", distance: "1.07 m", time: "0.30 s", pulse: RisingRamp}.job(t))
	if !hasWarning(&res, ShapeContradicted) {
		t.Error("the contradiction is not told")
	}
	if res.estimate(PeakForce, Shape) >= 0 {
		t.Error("a contradicted shape still gives a peak")
	}
	res = Evaluate(figures{mass: "100 kg", fall: "1.8 m", distance: "1.25 m .. 1.40 m", time: "0.30 s", pulse: RisingRamp}.job(t))
	if hasWarning(&res, ShapeContradicted) {
		t.Error("a band that holds the shape's distance is called a contradiction")
	}
	e := find(t, &res, PeakForce, Shape)
	var p Point
	c := Case{Mass: 100, FreeFall: 1.8, Gravity: StandardGravity, Time: 0.3, Pulse: RisingRamp}
	At(&c, &p)
	if !(e.Low <= p.Assumed.Peak && p.Assumed.Peak <= e.High) || !e.Conditional() {
		t.Errorf("peak by the time %g outside %g .. %g", p.Assumed.Peak, e.Low, e.High)
	}
}

func TestRampByDistanceAlone(t *testing.T) {
	res := Evaluate(figures{mass: "100 kg", fall: "1.8 m", distance: "1.07 m", pulse: RisingRamp}.job(t))
	e := find(t, &res, PeakForce, Shape)
	near(t, "peak", e.Value, 6805.84024688, 1e-11) // quadratic solved with 50 digits, python decimal
	if e.From != "rising ramp" || e.Bound != Between {
		t.Errorf("%+v", e)
	}
}

// A shape alone is no stop: without a distance or a time nothing follows of it.
func TestShapeWithoutAStop(t *testing.T) {
	c := reference()
	c.Pulse = RisingRamp
	var p Point
	At(&c, &p)
	for name, x := range map[string]float64{"peak": p.Assumed.Peak, "over weight": p.Assumed.OverWeight, "deceleration": p.Assumed.Deceleration,
		"distance": p.Assumed.Distance, "time": p.Assumed.Time, "onset": p.Assumed.Onset} {
		if !math.IsNaN(x) {
			t.Errorf("%s = %g of a stop that nothing is known of", name, x)
		}
	}
}

// Half a per cent off the line of a shape is not yet a contradiction. A constant
// force stops 2 m/s in 1 s over 1 m, in exact figures.
func TestHalfAPerCentOffAShape(t *testing.T) {
	for distance, contradicted := range map[string]bool{"1.005 m": false, "1.00500001 m": true, "0.995 m": false, "0.99499999 m": true} {
		res := Evaluate(figures{mass: "100 kg", fall: "0 m", speed: "2 m/s", distance: distance, time: "1 s", pulse: Constant}.job(t))
		if hasWarning(&res, ShapeContradicted) != contradicted {
			t.Errorf("%s: contradicted %v", distance, !contradicted)
		}
	}
}
