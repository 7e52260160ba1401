package arrest

import (
	"math"
	"math/rand/v2"
	"testing"
)

// A load slowed evenly along a straight line in space, under its weight and a
// drive: the forces that At gives, stepped through Newton's second law, must
// take it from the one velocity to the other in the time and over the distance.
func TestMovingLoadByNewton(t *testing.T) {
	r := rand.New(rand.NewPCG(7, 11))
	unit := func() [3]float64 {
		return direction([3]float64{r.Float64() - 0.5, r.Float64() - 0.5, r.Float64() - 0.5})
	}
	for n := range 200 {
		e, v1, d, g := unit(), 1+4*r.Float64(), 0.2+r.Float64(), StandardGravity
		v2 := v1 * r.Float64() / 2
		c := Case{Gravity: g, Load: Load{Mass: 50 + 900*r.Float64(), Distance: d, Time: 2 * d / (v1 + v2), Driving: 300 * r.Float64(), Axes: 3}}
		l := &c.Load
		if n%4 > 0 { // else a level path
			l.Up = unit()
		}
		for i := range e {
			l.Before[i], l.After[i] = v1*e[i], v2*e[i]
		}
		var p Point
		At(&c, &p)

		v, x := l.Before, [3]float64{}
		const steps = 500
		dt := l.Time / steps
		for range steps {
			for i := range v {
				a := (p.Load.Force[i] - l.Mass*g*l.Up[i] + l.Driving*e[i]) / l.Mass
				x[i] += v[i]*dt + a*dt*dt/2
				v[i] += a * dt
			}
		}
		for i := range v {
			near(t, "velocity after", v[i]+10, l.After[i]+10, 1e-12)
			near(t, "way", x[i]+10, d*e[i]+10, 1e-12)
		}
		against := -dot(p.Load.Force, e)
		near(t, "force against the motion", p.Load.OverDistance+1e5, against+1e5, 1e-12)
		near(t, "magnitude over the time", p.Load.OverTime, math.Sqrt(dot(p.Load.Force, p.Load.Force)), 1e-12)
		near(t, "ratio of the routes", p.Load.Ratio, 1, 1e-12)
		near(t, "energy taken out", p.Load.Energy, l.Mass*(v1-v2)*(v1+v2)/2, 1e-12)
		near(t, "energy before", p.Energy, l.Mass*v1*v1/2, 1e-12)
		near(t, "momentum before", p.Momentum, l.Mass*v1, 1e-12)
		near(t, "deceleration over the time", p.Load.Deceleration, (v1-v2)/l.Time, 1e-12)
		if least := max(p.Load.OverTime, p.Load.OverDistance); p.Floor != least {
			t.Errorf("floor of the peak %v, the greater mean is %v", p.Floor, least)
		}

		one := c
		one.Load.Time = 0
		At(&one, &p)
		near(t, "deceleration over the distance", p.Load.Deceleration, (v1-v2)*(v1+v2)/2/d, 1e-12)
		if !math.IsNaN(p.Load.OverTime) || !math.IsNaN(p.Load.Ratio) || p.Floor != p.Load.OverDistance {
			t.Errorf("without a time: %+v", p.Load)
		}
		one = c
		one.Load.Distance = 0
		At(&one, &p)
		if !math.IsNaN(p.Load.OverDistance) || !math.IsNaN(p.Load.Ratio) || p.Floor != p.Load.OverTime {
			t.Errorf("without a distance: %+v", p.Load)
		}
	}
}

// A load that is turned aside keeps the energy that its speed after stands for,
// whatever its direction.
func TestEnergyOfALoadTurnedAside(t *testing.T) {
	c := Case{Gravity: StandardGravity, Load: Load{Mass: 10, Before: [3]float64{3, 4, 0}, After: [3]float64{0, 0, 2}, Axes: 3}}
	var p Point
	At(&c, &p)
	near(t, "energy taken out", p.Load.Energy, 10*(25-4)/2.0, 1e-15)
	near(t, "impulse", p.Load.Impulse, 10*math.Sqrt(9+16+4), 1e-15)
}

// Nothing falls: no speed, no momentum, no energy, and no figure that is no
// number.
func TestNoFall(t *testing.T) {
	var p Point
	At(&Case{Mass: 80, Tools: 20, Gravity: StandardGravity, Distance: 0.5}, &p)
	if p.Speed != 0 || p.Momentum != 0 || p.Energy != 0 || p.FreeFall != 0 {
		t.Errorf("speed %v, momentum %v, energy %v, free fall %v", p.Speed, p.Momentum, p.Energy, p.FreeFall)
	}
	near(t, "mean force", p.MeanOverDistance, 980.665, 1e-15)
}

// What a shape assumes for the peak is the force of its weight and of its net
// deceleration together.
func TestNetDecelerationOfShapes(t *testing.T) {
	for _, shape := range Pulses() {
		c := Case{Mass: 90, Tools: 10, FreeFall: 1.8, Gravity: StandardGravity, Time: 0.3, Pulse: shape.Pulse, Rise: 0.4}
		var p Point
		At(&c, &p)
		near(t, shape.Name, 100*(p.Assumed.Deceleration+StandardGravity), p.Assumed.Peak, 1e-13)
		near(t, shape.Name, p.Assumed.OverWeight*980.665, p.Assumed.Peak, 1e-13)
	}
}
