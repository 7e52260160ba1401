package rig

import (
	"math"

	"arrestcheck/arrest/connector"
)

// A Tether is the law of force of a connector path, read off the path once for
// as many runs as wanted. Set fills it and may fill it again; a Planar run only
// reads it.
//
// The loading curve is read off an arrest straight down of more energy than the
// swing can have, without the dashpot: a trace that is exact at its corners. The
// way back is the sum of what the parts give back at equal force. Tests hold
// both against Path.Force.
type Tether struct {
	slack, viscous float64 // m, N s/m
	segments       []segment
	back           []giving
	rigid          bool    // nothing gives way beyond the last segment
	endless        bool    // the path does not hold the weight
	bound          float64 // peak of a fall straight down by as much as the swing can go down, N
	drop           float64 // from the start to rest of that fall, m
	radius, fall   float64 // of the place that it was read for: radius, and free fall with swing drop, m
	body           Body

	bare   connector.Path // the path without its dashpots
	parts  []connector.Part
	run    connector.Result
	series []connector.State
}

// isFor reports whether the tether was read for this fall: what it holds beyond it
// is guessed.
func (t *Tether) isFor(p *Place, b *Body) bool {
	return t.radius == p.Radius && t.body == *b && math.Abs(t.fall-p.FreeFall-p.SwingDrop) <= 1e-9*(1+t.fall)
}

// A segment is a straight piece of the loading curve: force f0 + k (x - x0).
type segment struct{ x0, x1, f0, k float64 }

func (s *segment) at(x float64) float64 { return s.f0 + float64(s.k*(x-s.x0)) }

// A giving is one range of forces of the way back: the extension rho that the
// path gives back from the force f down to zero, and the compliance above f.
type giving struct{ f, rho, c float64 }

// more is by how much the fall off which the law is read exceeds the one it is
// for, m of height.
const more = 0.5

// Set reads the law of the path, as far as a fall of the body from the place can
// come. Errors are those of the path's own run: a figure of the body out of
// range. It panics if the path was never set or the place is not Known.
func (t *Tether) Set(path *connector.Path, p *Place, b *Body) error {
	if p.Status != Known {
		panic("rig: a tether for a place that is not known")
	}
	t.back = t.back[:0] // nothing to run on until all of it is read
	t.slack, t.viscous = path.Slack(), path.Viscous()
	law := path
	if t.viscous != 0 {
		t.parts = append(t.parts[:0], path.Parts()...)
		for i := range t.parts {
			t.parts[i].Viscous = 0
		}
		if err := t.bare.Set(t.parts...); err != nil {
			return err
		}
		law = &t.bare
	}
	t.radius, t.fall, t.body = p.Radius, p.FreeFall+p.SwingDrop, *b
	fall := connector.Fall{Mass: b.Mass, FreeFall: t.fall, InitialSpeed: b.InitialSpeed, Gravity: b.Gravity}
	if err := connector.Run(law, &fall, &t.run); err != nil {
		return err
	}
	t.bound, t.drop = t.run.Peak, t.fall+law.Slack()+t.run.StoppingDistance
	if t.viscous != 0 {
		t.bound = math.NaN()
	}
	fall.FreeFall += more
	var err error
	t.series, err = connector.Trace(law, &fall, &t.run, t.series[:0])
	if err != nil {
		return err
	}
	t.rigid = t.run.Status == connector.Rigid
	t.endless = t.run.Status == connector.Endless
	t.load()
	t.give(path.Parts())
	return nil
}

// level is the extension in m below which two states of a trace are at one
// extension: there the force jumps.
const level = 1e-12

// load takes the segments from the trace, up to the first rest.
func (t *Tether) load() {
	t.segments = t.segments[:0]
	for i := 1; i < len(t.series); i++ {
		a, b := t.series[i-1], t.series[i]
		switch {
		case a.X < -level || b.X-a.X <= level && b.X-a.X >= -level:
			continue
		case b.X < a.X:
			i = len(t.series)
			continue
		}
		t.segment(max(0, a.X), b.X, a.F, b.F)
	}
	if n := len(t.segments); n > 0 && !t.rigid {
		t.segments[n-1].x1 = math.Inf(1)
	}
}

// segment adds a piece, to the last one if it goes straight on.
func (t *Tether) segment(x0, x1, f0, f1 float64) {
	k := (f1 - f0) / (x1 - x0)
	if n := len(t.segments); n > 0 {
		last := &t.segments[n-1]
		if same := 1e-7 * (math.Abs(k) + math.Abs(last.k)); math.Abs(k-last.k) <= same && math.Abs(last.at(x0)-f0) <= 1e-9*f0 {
			last.k = (f1 - last.f0) / (x1 - last.x0)
			last.x1 = x1
			return
		}
	}
	t.segments = append(t.segments, segment{x0, x1, f0, k})
}

// give adds up what the parts give back: along their curve, or along their
// unloading stiffness, and nothing of a plateau.
func (t *Tether) give(parts []connector.Part) {
	t.back = append(t.back[:0], giving{})
	for i := range parts {
		if q := &parts[i]; q.Unloading == 0 && q.Points != nil {
			for _, point := range q.Points[1 : len(q.Points)-1] {
				t.corner(point.Force)
			}
		}
	}
	for j := range t.back {
		g := &t.back[j]
		for i := range parts {
			g.c += compliance(&parts[i], g.f)
		}
		if j > 0 {
			h := &t.back[j-1]
			g.rho = h.rho + float64(h.c*(g.f-h.f))
		}
	}
}

// corner keeps the forces at which the way back bends in order, each once.
func (t *Tether) corner(f float64) {
	i := len(t.back)
	for t.back[i-1].f > f {
		i--
	}
	if t.back[i-1].f == f {
		return
	}
	t.back = append(t.back, giving{})
	copy(t.back[i+1:], t.back[i:])
	t.back[i] = giving{f: f}
}

// compliance returns what a part gives back just above the force f, in m/N.
func compliance(p *connector.Part, f float64) float64 {
	switch {
	case p.Unloading != 0:
		return 1 / p.Unloading
	case p.Points != nil:
		i := 1
		for i < len(p.Points)-1 && p.Points[i].Force <= f {
			i++
		}
		a, b := p.Points[i-1], p.Points[i]
		return (b.Extension - a.Extension) / (b.Force - a.Force)
	case p.Stiffness > 0:
		return 1 / p.Stiffness
	}
	return 0
}

// held reports whether the way back is rigid: whatever the path has travelled
// stays.
func (t *Tether) held() bool { return t.back[0].c == 0 }

// given returns the extension in m given back from the force f down to zero.
func (t *Tether) given(f float64) float64 {
	g := &t.back[t.band(f)]
	return g.rho + float64(g.c*(f-g.f))
}

// band returns the range of forces that f lies in, seen from above.
func (t *Tether) band(f float64) int {
	j := len(t.back) - 1
	for j > 0 && t.back[j].f >= f {
		j--
	}
	return j
}

// A top is where the way back begins: the greatest extension so far in m, the
// force there in N, and the extension that would stay.
type top struct{ x, f, stays float64 }

func (t *Tether) top(x, f float64) top { return top{x, f, x - t.given(f)} }

// behind returns the piece of the way back from the top on which x lies: that
// below x, or that above it.
func (t *Tether) behind(x float64, from top, above bool) segment {
	x1 := from.x
	for j := t.band(from.f); ; j-- {
		g := &t.back[j]
		x0 := from.stays + g.rho
		if x > x0 || above && x == x0 || j == 0 {
			return segment{x0, x1, g.f, 1 / g.c}
		}
		x1 = x0
	}
}

// ahead returns the segment of the loading curve from x on, false where the path
// is used up.
func (t *Tether) ahead(x float64) (segment, bool) {
	for i := range t.segments {
		if x < t.segments[i].x1 {
			return t.segments[i], true
		}
	}
	return segment{}, false
}

// force is Path.Force of the law as read.
func (t *Tether) force(x, reach float64) float64 {
	if x <= 0 {
		return 0
	}
	from := max(x, reach)
	f := math.Inf(1)
	for i := range t.segments {
		if s := &t.segments[i]; from <= s.x1 {
			f = s.at(from)
			break
		}
	}
	if x >= from || math.IsInf(f, 1) {
		return f
	}
	tp := t.top(from, f)
	if x <= tp.stays || t.held() {
		return 0
	}
	s := t.behind(x, tp, false)
	return s.at(x)
}
