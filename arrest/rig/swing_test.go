package rig

import (
	"math"
	"testing"
)

func TestSwingOfAPlainLayout(t *testing.T) {
	l := overhead(3, 1.2, 2)
	p := l.At(0)
	b := Body{Mass: 100, Gravity: gravity}
	s := l.Swing(&p, &b)
	// h = 0.1, H = 0.4, sin = 0.6: v^2 = 0.2 g, of which 0.36 goes on.
	near(t, "speed at the first pull", s.Speed, math.Sqrt(0.2*gravity), 1e-14)
	near(t, "low", s.LowestLow, math.Sqrt((0.2*0.36+0.8)*gravity), 1e-14)
	near(t, "high", s.LowestHigh, math.Sqrt(gravity), 1e-14)
	near(t, "height", s.Height, 0.5, 1e-14)
	near(t, "time", s.Time, stepDown(2, math.Asin(0.6), s.Tangential), 1e-9)

	b.InitialSpeed = 1.5
	s = l.Swing(&p, &b)
	near(t, "high with an initial speed", s.LowestHigh, math.Sqrt(gravity+2.25), 1e-14)
	near(t, "low with an initial speed", s.LowestLow, math.Sqrt(0.36*(0.2*gravity+2.25)+0.8*gravity), 1e-14)

	b.InitialSpeed = 0
	near(t, "soft", SoftSpeed(&b, 0.5, 9000), math.Sqrt(gravity+gravity*gravity*100/9000), 1e-14)
	near(t, "not soft", SoftSpeed(&b, 0.5, math.Inf(1)), math.Sqrt(gravity), 1e-14)
	near(t, "hit", HitForce(&b, 3, 0.25, 1), 100*9/0.5+100*gravity, 1e-14)
	near(t, "hit on the level", HitForce(&b, 3, 0.25, 0), 1800, 1e-14)

	straight := overhead(3, 0, 2)
	p = straight.At(0)
	if s = straight.Swing(&p, &b); s.LowestLow != 0 || s.Time != 0 {
		t.Errorf("no offset: low %g, time %g", s.LowestLow, s.Time)
	}
}

// The lowest point is as high as the geometry of a circle has it, by walking the
// arc.
func TestSwingDropByWalkingTheArc(t *testing.T) {
	for i := range 500 {
		_, p := newDice(40, uint64(i)).reached()
		if !p.Plane.Flat || p.Plane.Radius == 0 {
			continue
		}
		q := &p.Plane
		lowest := math.Inf(1)
		for n := 0; n <= 20000; n++ {
			u := q.Offset * float64(n) / 20000
			lowest = min(lowest, q.Pivot-math.Sqrt(square(q.Radius)-square(u)))
		}
		near(t, "lowest", lowest, p.Lowest, 1e-9)
	}
}

// TestTouchByWalkingTheArc looks for the first touch of obstacles by going along
// the whole way of the D-ring in small steps, with the body drawn as a box.
func TestTouchByWalkingTheArc(t *testing.T) {
	touched, clear, falling, over := 0, 0, 0, 0
	for i := range 1500 {
		d := newDice(41, uint64(i))
		b := Body{Mass: 100, Gravity: gravity}
		if d.chance(0.4) {
			b.InitialSpeed = d.within(0, 12)
		}
		l, p := d.reached()
		if !p.Plane.Flat {
			continue
		}
		if d.chance(0.2) {
			l.Edge = NoEdge
			p = l.At(0)
		}
		l.ObstacleCount = 1
		at := Spot{p.Plane.X + d.within(-2, 2), p.Plane.Y + d.within(-1, 1), p.Lowest - 1.5 + d.within(-0.5, 1.5)}
		if d.chance(0.3) {
			at.Z = p.Plane.Pivot + d.within(0, p.Plane.Radius)
		}
		l.Obstacles[0] = NewBox(at, Spot{at.X + d.within(0.1, 1), at.Y + d.within(0.1, 1), at.Z - d.within(0.1, 2)})
		if d.chance(0.3) {
			l.Obstacles[0] = NewLevel(at.Z)
		}
		pass := l.Swing(&p, &b).Passes[0]
		reached, down, angle, z := walk(l, &p, &b)
		if pass.Reached != reached || pass.Falling != (reached && down) {
			// A graze within the step of the walk can be seen by one alone.
			m := *l
			m.HalfWidth -= 2e-4
			m.Feet -= 2e-4
			if again, _, _, _ := walk(&m, &p, &b); again == reached {
				t.Fatalf("layout %d: %+v, walked %v %v at %g, %g\n%+v", i, pass, reached, down, angle, z, l)
			}
			continue
		}
		switch {
		case !reached:
			clear++
			continue
		case down:
			falling++
		default:
			touched++
			if angle < -math.Pi/2 {
				over++
			}
			if math.Abs(pass.Angle-angle) > 2e-4 {
				t.Fatalf("layout %d: touched at %.9f, walked to %.9f", i, pass.Angle, angle)
			}
			if !(pass.Low <= pass.High) && !math.IsNaN(pass.Low) {
				t.Fatalf("layout %d: speeds %g and %g", i, pass.Low, pass.High)
			}
		}
		if math.Abs(pass.Z-z) > 1e-3 {
			t.Fatalf("layout %d: touched at the height %.9f, walked to %.9f", i, pass.Z, z)
		}
		near(t, "speed from the energy", square(pass.High), b.speed2(p.Start.Z-pass.Z), 1e-9)
	}
	if touched < 100 || clear < 100 || falling < 50 || over < 3 {
		t.Errorf("%d touched, %d clear, %d while falling, %d on the way over the top", touched, clear, falling, over)
	}
}

// walk goes from the start down to the first pull and along the arc as far as
// the energy carries the body.
func walk(l *Layout, p *Place, b *Body) (reached, falling bool, angle, z float64) {
	const n = 20000
	for k := 0; k <= n; k++ {
		z := p.Start.Z + (p.Taut.Z-p.Start.Z)*float64(k)/n
		if meets(l, p, p.Plane.Offset, z) {
			return true, true, p.SwingAngle, z
		}
	}
	q := &p.Plane
	for k := 0; k <= 4*n; k++ {
		a := p.SwingAngle - (p.SwingAngle+math.Pi)*float64(k)/(4*n)
		z := q.Pivot - q.Radius*math.Cos(a)
		if b.speed2(p.Start.Z-z) < 0 {
			break
		}
		if meets(l, p, q.Radius*math.Sin(a), z) {
			return true, false, a, z
		}
	}
	return false, false, 0, 0
}

// meets reports whether the body, a box from the D-ring down to the feet, has a
// point in common with the obstacle.
func meets(l *Layout, p *Place, u, z float64) bool {
	o := &l.Obstacles[0]
	x, y := p.Plane.X+u*p.Plane.DX, p.Plane.Y+u*p.Plane.DY
	if o.Kind == Level {
		return z-l.Feet <= o.High.Z
	}
	return z-l.Feet <= o.High.Z && z >= o.Low.Z &&
		x+l.HalfWidth >= o.Low.X && x-l.HalfWidth <= o.High.X &&
		y+l.HalfWidth >= o.Low.Y && y-l.HalfWidth <= o.High.Y
}

func TestTouchWithoutItsFigures(t *testing.T) {
	l := overhead(3, 1.2, 2)
	l.Feet = math.NaN()
	l.ObstacleCount = 1
	l.Obstacles[0] = NewLevel(0)
	p := l.At(0)
	if s := l.Swing(&p, &Body{Mass: 100, Gravity: gravity}).Passes[0]; s.Reached || !s.Unknown {
		t.Errorf("no length of the body: %+v", s)
	}
}
