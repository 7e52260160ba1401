package rig

import "math"

// see looks along the step of the time h to y1 for the lowest point and for
// obstacles.
func (m *motion) see(w *watch, h float64, y1 *state) {
	u0, w0, vu0, vw0 := m.planar(&m.y, m.sin[0], m.cos[0])
	_, w1, vu1, vw1 := m.planar(y1, m.sin[6], m.cos[6])
	if vw0 > 0 && vw1 <= 0 && max(w0, w1)+h*vw0 > m.deepest {
		m.lowest(h, y1, vw1)
	}
	if m.trace != nil {
		m.record(w, h)
	}
	if m.pending == 0 {
		return
	}
	most := 0.0
	for _, f := range m.pull {
		most = max(most, math.Abs(f))
	}
	// A margin for a force that is greater between the stages than at any.
	most = max(math.Hypot(vu0, vw0), math.Hypot(vu1, vw1)) + h*(m.g+1.5*most/m.mass)
	pivot := m.place.Plane.Pivot
	for i := range m.count {
		win := &m.windows[i]
		if m.pending&(1<<i) == 0 || !win.near(u0, pivot-w0, most*h) {
			continue
		}
		x, a := m.path(stretch, &m.y, h), m.path(angle, &m.y, h)
		q, ok := win.seek(most*h, func(q float64) (float64, float64) {
			sin, cos := math.Sincos(a.at(q))
			r := m.radius + x.at(q)
			return r * sin, pivot - r*cos
		})
		if ok {
			m.pending &^= 1 << i
			m.r.Passes[i] = m.at(h * q)
		}
	}
}

// at returns the passage at the time h of the step, stepped on to so that it has
// the full order.
func (m *motion) at(h float64) Passage {
	keep := m.stepper
	y := m.y
	if h > 0 {
		y, _ = m.step(&m.y, h)
	}
	m.stepper = keep
	sin, cos := math.Sincos(y[angle])
	u, w, vu, vw := m.planar(&y, sin, cos)
	return m.passage(m.time+h, u, w, vu, vw, y[stretch])
}

// lowest finds the lowest point within the step, where the body stops going
// down, and keeps it if it is the lowest so far.
func (m *motion) lowest(h float64, y1 *state, vw1 float64) {
	x, v := m.path(stretch, &m.y, h), m.path(outwards, &m.y, h)
	a, j := m.path(angle, &m.y, h), m.path(turning, &m.y, h)
	at := 1.0
	if vw1 != 0 {
		at = zero(0, 1, false, func(q float64) float64 {
			sin, cos := math.Sincos(a.at(q))
			return float64(v.at(q)*cos) - float64(j.at(q)/(m.radius+x.at(q))*sin)
		})
	}
	var p Passage
	if at == 1 {
		u, w, vu, vw := m.planar(y1, m.sin[6], m.cos[6])
		p = m.passage(m.time+h, u, w, vu, vw, y1[stretch])
	} else {
		p = m.at(h * at)
	}
	if w := m.place.Plane.Pivot - p.Z; w > m.deepest {
		m.deepest, m.r.Lowest = w, p
	}
}

// touching is the distance in m from a window within which the D-ring counts as
// in it: a graze is a touch.
const touching = 1e-6

// seek returns the first share of a piece of the motion at which the D-ring is in
// the window. way is a bound of how far the D-ring goes during the piece: halves
// that stay clear of the window by that bound are left out, so that no touch is
// missed, however short.
func (w *window) seek(way float64, at func(q float64) (u, z float64)) (float64, bool) {
	return w.first(0, 1, way, at)
}

func (w *window) first(lo, hi, way float64, at func(q float64) (u, z float64)) (float64, bool) {
	u, z := at((lo + hi) / 2)
	give := way * (hi - lo) / 2
	if !w.near(u, z, give) {
		return 0, false
	}
	if give < touching {
		return w.edge(lo, hi, way, at), true
	}
	mid := (lo + hi) / 2
	if q, ok := w.first(lo, mid, way, at); ok {
		return q, true
	}
	return w.first(mid, hi, way, at)
}

// edge closes in on the touch within a short piece.
func (w *window) edge(lo, hi, way float64, at func(q float64) (u, z float64)) float64 {
	for range 24 {
		mid := (lo + hi) / 2
		u, z := at((lo + mid) / 2)
		if w.near(u, z, way*(mid-lo)/2) {
			hi = mid
		} else {
			lo = mid
		}
	}
	return hi
}

// record appends the moments of the step to the trace.
func (m *motion) record(w *watch, h float64) {
	var p [4]quartic
	for n := range p {
		p[n] = m.path(n, &m.y, h)
	}
	const points = 4
	for i := 0; i <= points; i++ {
		q := float64(i) / points
		y := state{p[0].at(q), p[1].at(q), p[2].at(q), p[3].at(q)}
		sin, cos := math.Sincos(y[angle])
		u, down, vu, vw := m.planar(&y, sin, cos)
		f := 0.0
		switch {
		case m.held:
			r := m.radius + y[stretch]
			f = min(w.cap, m.mass*(square(y[turning])/(r*r*r)+float64(m.g*cos)))
		case !m.free:
			f = m.force(&y)
		}
		if last := (*m.trace)[len(*m.trace)-1]; i == 0 && last.F == f {
			continue // where nothing jumps the moment is there already
		}
		*m.trace = append(*m.trace, PlanarState{m.time + q*h, u, m.place.Plane.Pivot - down, vu, -vw, f})
	}
}
