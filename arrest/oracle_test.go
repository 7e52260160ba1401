package arrest

import (
	"math"
	"math/big"
	"math/rand/v2"
	"testing"
)

// The oracle works the closed forms out in 200-bit arithmetic, from the texts
// of M-01 to M-06 and not from the code: the floor by its two steps tau and
// (v + g*tau)/(t - tau), which the code contracts into one quotient.
type oracle struct{ speed, energy, momentum, overDistance, overTime, ratio, floor *big.Float }

func wide(x float64) *big.Float             { return new(big.Float).SetPrec(200).SetFloat64(x) }
func add(a, b *big.Float) *big.Float        { return wide(0).Add(a, b) }
func subtract(a, b *big.Float) *big.Float   { return wide(0).Sub(a, b) }
func times(a, b *big.Float) *big.Float      { return wide(0).Mul(a, b) }
func divided(a, b *big.Float) *big.Float    { return wide(0).Quo(a, b) }
func (o *oracle) total(c *Case) *big.Float  { return add(wide(c.Mass), wide(c.Tools)) }
func (o *oracle) weight(c *Case) *big.Float { return times(o.total(c), wide(c.Gravity)) }

func (o *oracle) at(c *Case) (possible bool) {
	m, w, g, d, t := o.total(c), o.weight(c), wide(c.Gravity), wide(c.Distance), wide(c.Time)
	two := wide(2)
	square := add(times(wide(c.InitialSpeed), wide(c.InitialSpeed)), times(two, times(g, wide(c.FreeFall))))
	v := wide(0).Sqrt(square)
	o.speed, o.momentum = v, times(m, v)
	o.energy = divided(times(m, square), two)
	o.overDistance = add(w, divided(times(m, square), times(two, d)))
	o.overTime = add(w, divided(times(m, v), t))
	o.ratio = divided(times(v, t), times(two, d))
	brake := divided(square, times(two, d))
	if times(v, t).Cmp(times(two, d)) < 0 {
		tau := divided(subtract(times(two, d), times(v, t)), add(v, times(g, t)))
		rest := subtract(t, tau)
		if rest.Sign() <= 0 {
			return false
		}
		brake = divided(add(v, times(g, tau)), rest)
	}
	o.floor = times(m, add(g, brake))
	return true
}

// ulps is how many units in the last place of want lie between the two.
func ulps(got float64, want *big.Float) float64 {
	near, _ := want.Float64()
	unit := math.Nextafter(math.Abs(near), math.Inf(1)) - math.Abs(near)
	diff, _ := subtract(wide(got), want).Float64()
	return math.Abs(diff) / unit
}

// Every closed form agrees with the oracle to 2 units in the last place. Near
// the edge of the possible the floor is the exact one of a speed, a time and a
// distance that are off by as much: there the 2 units are multiplied by how
// steeply the floor hangs on them.
func TestAgainstTheOracle(t *testing.T) {
	r := rand.New(rand.NewPCG(19, 20))
	worst := map[string]float64{}
	steep := 0
	var o oracle
	var p Point
	for n := 0; n < 100000; n++ {
		c := randomCase(r)
		At(&c, &p)
		if possible := o.at(&c); !possible || p.Impossible {
			if possible == p.Impossible && p.Floor < 1e9 {
				t.Fatalf("possible %v by the oracle: %+v", possible, c)
			}
			continue
		}
		for _, x := range []struct {
			name string
			got  float64
			want *big.Float
		}{
			{"speed", p.Speed, o.speed}, {"energy", p.Energy, o.energy}, {"momentum", p.Momentum, o.momentum},
			{"mean over distance", p.MeanOverDistance, o.overDistance}, {"mean over time", p.MeanOverTime, o.overTime},
			{"ratio", p.ShapeRatio, o.ratio}, {"floor", p.Floor, o.floor},
		} {
			u := ulps(x.got, x.want)
			if x.name == "floor" && edge(&c, &p) > 1 {
				steep++
				u /= edge(&c, &p)
			}
			worst[x.name] = max(worst[x.name], u)
		}
	}
	for name, u := range worst {
		if u > 2 {
			t.Errorf("%s is off by %.3g units in the last place", name, u)
		}
	}
	t.Logf("worst, in units of the last place: %v; %d floors near the edge", worst, steep)
}

// edge is the condition number of what the floor is divided by, 2*v*t + g*t^2
// - 2*d: what is subtracted and added over what is left.
func edge(c *Case, p *Point) float64 {
	vt, gt := p.Speed*c.Time, c.Gravity*c.Time*c.Time
	if vt >= 2*c.Distance {
		return 1
	}
	return (2*vt + gt + 2*c.Distance) / (2*vt + gt - 2*c.Distance)
}
