package rig

import "math"

// A watch says which events end a piece of a swing.
type watch struct {
	turn             bool    // the speed along the connector is zero
	bound, direction float64 // extension at which the piece ends, and which way: 1 out, -1 in, 0 not
	gone, back       bool    // the force has gone, would be back
	held             bool    // the force to hold the length comes to high, or to zero
	high, cap        float64 // N; cap is the most that counts as a peak
}

// A cause is what has ended a piece.
type cause uint8

const (
	byNothing cause = iota
	byClock
	byTurn
	byBound
	byForce
	byHigh
	byLow
	byPass // straight below, held
	byEnd  // the body begins to come back
)

// follow goes on until one of the watched events, or the end of the swing.
func (m *motion) follow(w watch) cause {
	h := m.guess()
	if m.h > 0 {
		h = min(h, m.h)
	}
	m.start(&m.y)
	m.push(&w, 0, m.time, m.y[angle])
	for {
		last := h >= m.end-m.time
		if last {
			h = m.end - m.time
		}
		y1, off := m.step(&m.y, h)
		m.r.Counts.Steps++
		err := m.error(&y1, &off)
		if err > 1 {
			h *= resize(err)
			continue
		}
		by, q := m.look(&w, h, &y1)
		if by != byNothing {
			y1, h = m.land(&w, by, h*q, h)
		}
		m.crest(&w, h, &y1)
		m.see(&w, h, &y1)
		m.commit(h, &y1)
		m.swung = m.swung || by == byEnd
		if m.swung && m.y[outwards] <= slow && m.lastVW <= slow {
			m.r.Status, m.over = Swung, true
			return byEnd
		}
		if by != byNothing {
			return by
		}
		if last || m.settled() || m.r.Counts.Steps > mostSteps {
			m.over = last || m.over
			return byClock
		}
		m.next(&m.y)
		h *= resize(err)
		m.h = h
	}
}

// error returns the error of a step over the tolerance.
func (m *motion) error(y1, off *state) float64 {
	r := m.radius + y1[stretch]
	e := math.Abs(off[stretch])/(1+math.Abs(y1[stretch])) + math.Abs(off[outwards])/(1+math.Abs(y1[outwards]))
	e = max(e, math.Abs(off[angle])*r/(1+r))
	e = max(e, math.Abs(off[turning])/(r+math.Abs(y1[turning])))
	return e / m.tolerance
}

// settled ends a run straight down that creeps towards rest.
func (m *motion) settled() bool {
	if !m.upright() || math.Abs(m.y[outwards]) > 1e-7 || math.Abs(m.rate[6][outwards]) > 1e-7*m.g || m.held {
		return false
	}
	m.hang()
	return true
}

// guess returns a first step for the piece: a share of the time that stiffness,
// dashpot and pendulum set.
func (m *motion) guess() float64 {
	r := m.radius + m.y[stretch]
	rate := math.Sqrt(m.g/r) + math.Abs(m.y[turning])/(r*r)
	if !m.held && !m.free {
		rate += math.Sqrt(m.on.k/m.mass) + m.c/m.mass
	}
	return 4 * fifthRoot(m.tolerance) / (1 + rate)
}

// push takes the force of a stage into the peak.
func (m *motion) push(w *watch, i int, time, at float64) {
	f := m.pull[i]
	if w.held {
		f = min(f, w.cap)
	}
	if f > m.r.Peak {
		m.r.Peak, m.r.PeakTime, m.r.PeakAngle = f, time, at
	}
}

// commit takes the step of the time h over.
func (m *motion) commit(h float64, y1 *state) {
	l := &m.r.Ledger
	side, up, dash := m.sums(h)
	l.ImpulseSide += side
	l.ImpulseUp += up
	if dx := y1[stretch] - m.y[stretch]; !m.held {
		work := dx * (m.on.at(m.y[stretch]) + float64(m.on.k*dx)/2)
		l.Work += work
		if m.free {
			l.Viscous -= work
		} else {
			l.Viscous += dash
		}
	}
	m.time += h
	m.y = *y1
	m.lastU, m.lastW, m.lastVU, m.lastVW = m.planar(&m.y, m.sin[6], m.cos[6])
}

// planar returns where the body is below the pivot and its speeds to the side
// and down.
func (m *motion) planar(y *state, sin, cos float64) (u, w, vu, vw float64) {
	r := m.radius + y[stretch]
	across := y[turning] / r
	return r * sin, r * cos, float64(y[outwards]*sin) + float64(across*cos), float64(y[outwards]*cos) - float64(across*sin)
}

// look returns the first watched event within the step of the time h to y1, and
// the share of the step at which it is.
func (m *motion) look(w *watch, h float64, y1 *state) (cause, float64) {
	by, q := byNothing, 1.0
	if w.turn && !m.steady(h, y1) {
		p := m.path(outwards, &m.y, h)
		if at, ok := p.crossing(); ok {
			by, q = byTurn, at
		}
	}
	if w.gone || w.back {
		if at, ok := m.forceZero(h, w.gone); ok && at <= q {
			by, q = byForce, at
		}
	}
	if w.direction != 0 && !math.IsInf(w.bound, 0) {
		if at, ok := m.bound(w, h, y1, q, by != byNothing); ok {
			by, q = byBound, at
		}
	}
	if w.held {
		if c, at, ok := m.holding(w, h, y1); ok {
			by, q = c, at
		}
	}
	if at, ok := m.reversal(h, y1); ok && at <= q {
		by, q = byEnd, at
	}
	return by, q
}

// reversal returns where in the step the body, on its way to the other side,
// begins to come back. Above the level of the pivot that is no end: the body goes
// around, or falls into the connector once more.
func (m *motion) reversal(h float64, y1 *state) (float64, bool) {
	if m.swung || m.lastVU >= 0 {
		return 0, false
	}
	if _, w, vu, _ := m.planar(y1, m.sin[6], m.cos[6]); vu < 0 || w < 0 {
		return 0, false
	}
	x, v := m.path(stretch, &m.y, h), m.path(outwards, &m.y, h)
	a, j := m.path(angle, &m.y, h), m.path(turning, &m.y, h)
	return zero(0, 1, true, func(q float64) float64 {
		sin, cos := math.Sincos(a.at(q))
		return float64(v.at(q)*sin) + float64(j.at(q)/(m.radius+x.at(q))*cos)
	}), true
}

// steady reports whether the speed along the connector cannot have been zero
// within the step.
func (m *motion) steady(h float64, y1 *state) bool {
	most := 0.0
	for i := range m.rate {
		most = max(most, math.Abs(m.rate[i][outwards]))
	}
	v0, v1 := m.y[outwards], y1[outwards]
	return v0*v1 > 0 && min(math.Abs(v0), math.Abs(v1)) > h*most
}

// bound returns where the extension comes to the bound, up to the share q of the
// step, to which the motion has one direction.
func (m *motion) bound(w *watch, h float64, y1 *state, q float64, inside bool) (float64, bool) {
	if !inside && w.direction*(y1[stretch]-w.bound) < 0 {
		return 0, false
	}
	p := m.path(stretch, &m.y, h)
	p[0] -= w.bound
	if w.direction*p.at(q) < 0 && inside {
		return 0, false
	}
	return p.between(0, q, w.direction > 0), true
}

// forceZero returns the first share of the step at which the force of path and
// dashpot is gone, or is back.
func (m *motion) forceZero(h float64, gone bool) (float64, bool) {
	x, v := m.path(stretch, &m.y, h), m.path(outwards, &m.y, h)
	var f quartic
	for i := range f {
		f[i] = float64(m.on.k*x[i]) + float64(m.c*v[i])
	}
	f[0] += m.on.f0 - float64(m.on.k*m.on.x0)
	if math.Abs(f[0]) < 1e-9*math.Abs(m.c*m.y[outwards]) {
		f[0] = 0
	}
	if gone && (f[0] < 0 || f[0] == 0 && f[1] < 0) {
		return 0, true
	}
	return f.crossing()
}

// holding returns the first event of a held connector. Up to straight below the
// force grows, after it shrinks.
func (m *motion) holding(w *watch, h float64, y1 *state) (cause, float64, bool) {
	by, q := byNothing, 1.0
	a := m.path(angle, &m.y, h)
	if m.y[angle] != 0 && (m.y[angle] > 0) != (y1[angle] > 0) {
		if at, ok := a.crossing(); ok {
			by, q = byPass, at
		}
	}
	j := m.path(turning, &m.y, h)
	r := m.radius + m.y[stretch]
	pull := func(q float64) float64 {
		return m.mass * (square(j.at(q))/(r*r*r) + m.g*math.Cos(a.at(q)))
	}
	high := pull(q) >= w.high
	if low := pull(q) <= 0; !high && !low {
		return by, q, by != byNothing
	}
	lo, hi := 0.0, q
	for range 60 {
		mid := (lo + hi) / 2
		if f := pull(mid); f >= w.high || f <= 0 {
			hi = mid
		} else {
			lo = mid
		}
	}
	if high {
		return byHigh, hi, true
	}
	return byLow, hi, true
}

// land steps on to the event near the time h and not after most, so that it has
// the full order, and returns the state there and the time.
func (m *motion) land(w *watch, by cause, h, most float64) (state, float64) {
	y1, _ := m.step(&m.y, h)
	for range 8 {
		off, slope := m.miss(w, by, &y1)
		to := min(max(h-off/slope, 0), most)
		if to != to || math.Abs(to-h) <= 4e-16*max(m.time, h) {
			break
		}
		h = to
		y1, _ = m.step(&m.y, h)
	}
	switch by {
	case byTurn:
		y1[outwards] = 0
	case byBound:
		y1[stretch] = w.bound
	case byPass:
		y1[angle], m.sin[6], m.cos[6] = 0, 0, 1
	}
	return y1, h
}

// miss returns by how much the last stage misses the event, and how fast that
// changes.
func (m *motion) miss(w *watch, by cause, y1 *state) (off, slope float64) {
	k := &m.rate[6]
	switch by {
	case byTurn:
		return y1[outwards], k[outwards]
	case byBound:
		return y1[stretch] - w.bound, y1[outwards]
	case byPass:
		return y1[angle], k[angle]
	case byEnd:
		_, _, vu, _ := m.planar(y1, m.sin[6], m.cos[6])
		return vu, -m.pull[6] * m.sin[6] / m.mass
	case byForce:
		return m.force(y1), float64(m.on.k*y1[outwards]) + float64(m.c*k[outwards])
	}
	target := w.high
	if by == byLow {
		target = 0
	}
	return m.pull[6] - target, -3 * m.mass * m.g * m.sin[6] * k[angle]
}

// crest takes the greatest force of the step into the peak.
func (m *motion) crest(w *watch, h float64, y1 *state) {
	if m.c != 0 && !m.held && !m.free {
		x, v := m.path(stretch, &m.y, h), m.path(outwards, &m.y, h)
		var f quartic
		for i := range f {
			f[i] = float64(m.on.k*x[i]) + float64(m.c*v[i])
		}
		f = f.slope()
		if f.at(0) > 0 && f.at(1) < 0 {
			if q, ok := f.crossing(); ok {
				// One step more, since the force is what counts and not the moment.
				keep := m.stepper
				y, _ := m.step(&m.y, q*h)
				m.push(w, 6, m.time+q*h, y[angle])
				m.stepper = keep
			}
		}
	}
	m.push(w, 6, m.time+h, y1[angle])
}
