package connector

import (
	"errors"
	"math"
)

// A Law is a law of force that need not be straight between its corners, for
// IntegrateLaw.
type Law struct {
	// Slack in m before the first pull.
	Slack float64

	// Load returns the force in N of the loading curve at the extension in m. It
	// must be smooth between the corners and must not fall. It is asked for
	// extensions a little outside of the stretch it is on.
	Load func(x float64) float64

	// Corners are the extensions in m, rising, at which Load bends or jumps.
	Corners []float64

	// Unloading is the stiffness in N/m of the way back, which must nowhere be
	// below the slope of Load. Zero: along Load.
	Unloading float64

	// Damping returns the force in N of a dashpot beside the path at the speed v
	// in m/s downwards: zero at rest, and never against the sign of v. Nil: none.
	Damping func(v float64) float64
}

var errLaw = errors.New("connector: a law needs a loading curve, slack and unloading stiffness of zero or more, and rising corners above zero")

func (l *Law) check() error {
	before := 0.0
	for _, x := range l.Corners {
		if !(x > before) {
			return errLaw
		}
		before = x
	}
	if l.Load == nil || !(l.Slack >= 0) || !(l.Unloading >= 0) || math.IsInf(l.Slack, 1) {
		return errLaw
	}
	return nil
}

// A stretch is a piece of a law on which the force of the path is smooth.
type stretch struct {
	low, high float64 // extensions in m
	x, f, k   float64 // straight through (x, f) with k in N/m,
	curve     func(x float64) float64
	rigid     bool // nothing gives way here
}

func (s *stretch) force(x float64) float64 {
	if s.curve != nil {
		return s.curve(x)
	}
	return s.f + s.k*(x-s.x)
}

// A source tells the integrator about a law. It is written apart from the
// events of Run, and looks everything up instead of walking along.
type source interface {
	// loose returns the slack.
	loose() float64
	// ahead returns the stretch of the loading curve from x on.
	ahead(x float64) stretch
	// behind returns the stretch of the way back from (reach, f) that lies below x,
	// or above it.
	behind(x, reach, f float64, above bool) stretch
	// damp returns the force of the dashpot and, if it is proportional to the
	// speed, its coefficient, else NaN.
	damp(v float64) float64
	coefficient() float64
}

func (l *Law) loose() float64 { return l.Slack }

func (l *Law) ahead(x float64) stretch {
	s := stretch{high: math.Inf(1), curve: l.Load}
	for _, c := range l.Corners {
		if c > x {
			s.high = c
			break
		}
		s.low = c
	}
	return s
}

func (l *Law) behind(x, reach, f float64, above bool) stretch {
	if l.Unloading > 0 {
		return stretch{low: reach - f/l.Unloading, high: reach, x: reach, f: f, k: l.Unloading, rigid: math.IsInf(l.Unloading, 1)}
	}
	s := stretch{high: reach, curve: l.Load}
	for _, c := range l.Corners {
		if c > x || c == x && !above {
			s.high = min(c, reach)
			break
		}
		s.low = c
	}
	return s
}

func (l *Law) damp(v float64) float64 {
	if l.Damping == nil {
		return 0
	}
	return l.Damping(v)
}

func (l *Law) coefficient() float64 {
	if l.Damping == nil {
		return 0
	}
	return math.NaN()
}

func (p *Path) loose() float64         { return p.slack }
func (p *Path) damp(v float64) float64 { return p.viscous * v }
func (p *Path) coefficient() float64   { return p.viscous }

func (p *Path) ahead(x float64) stretch {
	for i := range p.spans {
		if s := &p.spans[i]; x < s.x1 {
			return stretch{low: s.x0, high: s.x1, x: s.x0, f: s.f0, k: s.k}
		}
	}
	return stretch{rigid: true}
}

// behind adds up what the elements give back, between the forces at which their
// sum bends.
func (p *Path) behind(x, reach, f float64, above bool) stretch {
	high, fHigh := reach, f
	for j := len(p.back) - 1; j >= 0; j-- {
		fLow := p.back[j].from
		if fLow >= f && j > 0 {
			continue
		}
		low := reach
		for e := range p.elements {
			low -= p.elements[e].released(f, fLow)
		}
		if x > low || above && x == low || j == 0 {
			return stretch{low: low, high: high, x: high, f: fHigh, k: (fHigh - fLow) / (high - low), rigid: low == high}
		}
		high, fHigh = low, fLow
	}
	panic("connector: the way back has no stretch")
}
