package connector

import (
	"math"
	"slices"
)

// account draws up the ledger of the motion so far, unless that has been done.
func (m *motion) account() {
	l := &m.r.Ledger
	if m.accounted {
		return
	}
	m.accounted = true
	l.Weight = m.weight * m.t
	l.Motion = m.mass * (m.v - m.start)
	l.After = m.mass * m.v * m.v / 2
	l.Fallen = m.weight * (m.x + m.path.slack)
	m.share()
	for i := range m.r.Parts {
		l.Stored += m.r.Parts[i].Stored
		l.Lost += m.r.Parts[i].Lost
	}
}

// now returns where the way back begins at this moment, and the force of the
// path without the dashpot.
func (m *motion) now() (top, float64) {
	if m.r.Events.Pulls == 0 || len(m.path.spans) == 0 {
		return top{}, 0
	}
	if m.x >= m.top.x {
		return m.top, m.top.f
	}
	return m.top, max(0, m.path.lineAt(m.x, m.top).at(m.x))
}

// finish fills the result in at the end of the run.
func (m *motion) finish() error {
	r := m.r
	m.account()
	if r.Status == 0 {
		r.Status = TimedOut
	}
	if r.Status == Tending {
		m.share()
	}
	r.End = State{m.t, m.x, m.v, m.force}
	m.decelerate()
	r.close()
	return r.Ledger.settle(closes, r.grain(m.weight, m.path.slack))
}

// decelerate takes the stretch of lifeline parts off the stopping distance.
func (m *motion) decelerate() {
	m.r.DecelerationDistance = m.r.StoppingDistance
	for i := range m.path.parts {
		if m.path.parts[i].Lifeline {
			m.r.DecelerationDistance -= m.r.Parts[i].AtRest
		}
	}
}

// share tells the parts what is theirs.
func (m *motion) share() {
	r, p := m.r, m.path
	r.Parts, r.AbsorberTravel, r.BeyondPoints = slices.Grow(r.Parts[:0], len(p.parts))[:len(p.parts)], 0, 0
	clear(r.Parts)
	if len(p.spans) == 0 {
		return
	}
	t, f := m.now()
	n := len(p.elements)
	s := &p.spans[t.span]
	dx := t.x - s.x0
	onto := dx * (s.f0 + float64(s.k*dx)/2)
	for e := range p.elements {
		el := &p.elements[e]
		q := &r.Parts[el.part]
		i := t.span*n + e
		reached := p.ext[i] + float64(p.share[i]*dx)
		stored, whole := el.recoverable(f), el.recoverable(t.f)
		q.Stored += stored
		q.Lost += p.work[i] + float64(p.share[i]*onto) - whole
		q.Permanent += reached - el.released(t.f, 0)
		q.AtPeak += m.peak.extension(p, e)
		q.AtRest += m.still.extension(p, e)
		if reached > el.measured {
			r.BeyondPoints |= 1 << el.part
		}
		if p.parts[el.part].Kind == Absorber && (el.plateau || p.parts[el.part].Points != nil) {
			r.AbsorberTravel += reached
		}
	}
}

// extension returns the extension of the element e at the mark, NaN without one.
func (k *mark) extension(p *Path, e int) float64 {
	if !k.set {
		return math.NaN()
	}
	return p.extension(e, k.top, k.f)
}
