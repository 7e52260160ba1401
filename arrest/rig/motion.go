package rig

import "math"

// A mode says what holds for the body after the first pull.
type mode uint8

const (
	flying  mode = iota // not taut
	taut                // on the loading curve or the way back
	lagging             // going in faster than the dashpot lets the path follow: no force
)

// longest is the time in s after which a run gives up, counted from the first
// pull; mostSteps ends one that would never end.
const (
	longest   = 20
	mostSteps = 1000000
)

// loose is the share of the tolerance of a step with which the ledgers close.
const loose = 1e4

// slow is the speed in m/s below which a body sent back counts as no longer going
// down or outwards.
const slow = 1e-6

// stick is by how much, relatively, the force has to exceed what a held
// connector bears before it gives way again. It keeps rounding from deciding.
const stick = 1e-9

// A motion is a run on its way.
type motion struct {
	stepper
	t     *Tether
	r     *Planar
	place *Place
	trace *[]PlanarState

	weight, tolerance float64

	y            state
	time, h, end float64
	mode         mode
	top          top
	contact      float64 // extension at which the connector is taut again
	departing    int     // how many derivatives of r^2 are zero where a flight begins, r^2 less its own included
	swung, over  bool

	windows [MaxObstacles]window
	count   int
	pending uint16 // windows that have not been touched

	deepest        float64 // lowest point so far below the pivot, m
	vw             float64 // at the first pull, m/s down
	begin, startZ  float64 // time of the first pull, height there
	lastU, lastW   float64 // where the body is, below the pivot, m
	lastVU, lastVW float64
}

// windowsOf takes the obstacles of the layout.
func (m *motion) windowsOf(l *Layout) {
	for i, o := range l.obstacles() {
		m.windows[i] = l.window(&m.place.Plane, &o)
		switch w := &m.windows[i]; {
		case !w.known():
			m.r.Passes[i].Unknown = true
		case !w.empty():
			m.pending |= 1 << i
		}
		m.count = i + 1
	}
}

// fall is the fall straight down up to the first pull.
func (m *motion) fall(b *Body) {
	p := m.place
	u, w := p.Plane.Offset, leg(m.radius, p.Plane.Offset)
	m.startZ = p.Plane.Pivot - w
	h := max(0, p.Start.Z-m.startZ)
	v := math.Sqrt(b.speed2(h))
	m.begin = fallTime(h, b.InitialSpeed, v)
	for i := range m.count {
		win := &m.windows[i]
		z, ok := win.falling(u, p.Start.Z, m.startZ)
		if !ok || m.pending&(1<<i) == 0 {
			continue
		}
		m.pending &^= 1 << i
		speed := math.Sqrt(b.speed2(p.Start.Z - z))
		x := math.Hypot(u, p.Plane.Pivot-z) - m.radius
		m.r.Passes[i] = m.passage(fallTime(p.Start.Z-z, b.InitialSpeed, speed), u, p.Plane.Pivot-z, 0, speed, min(0, x))
	}
	if m.trace != nil {
		for i := range 9 {
			t := m.begin * float64(i) / 8
			fallen := float64(b.InitialSpeed*t) + float64(m.g*t*t)/2
			*m.trace = append(*m.trace, PlanarState{t, u, p.Start.Z - fallen, 0, -b.InitialSpeed - float64(m.g*t), 0})
		}
	}
	r := m.radius
	m.time, m.end = m.begin, m.begin+longest
	m.y = state{0, v * w / r, math.Atan2(u, w), -u * v}
	m.mode, m.top = taut, m.t.top(0, 0)
	m.lastU, m.lastW, m.vw, m.lastVW = u, w, v, v
	m.r.FirstPull = m.begin
	m.r.Counts.Pulls = 1
	m.r.Peak, m.r.PeakTime, m.r.PeakAngle = 0, m.begin, m.y[angle]
	m.r.Extension = 0
	m.r.Ledger.Before = m.mass * square(v) / 2
	m.deepest = math.Inf(-1)
}

// fallTime returns the time of a fall over h that begins with the speed u and
// ends with the speed v.
func fallTime(h, u, v float64) float64 {
	if h == 0 {
		return 0
	}
	return 2 * h / (u + v)
}

// run goes from event to event.
func (m *motion) run() error {
	if m.t.endless {
		nan := math.NaN()
		m.r.Status, m.r.Peak, m.r.PeakTime, m.r.PeakAngle, m.r.Extension = Endless, nan, nan, nan, nan
		return nil
	}
	for n := 0; !m.over; n++ {
		switch {
		case n > mostSteps || m.r.Counts.Steps > mostSteps:
			return errManySteps
		case m.mode == flying:
			m.fly()
		case m.mode == lagging:
			m.lag()
		default:
			m.pulling()
		}
	}
	return m.finish()
}

// upright reports whether the motion is straight up and down.
func (m *motion) upright() bool { return m.y[angle] == 0 && m.y[turning] == 0 }

// lift is the force in N that would hold the body at its distance.
func (m *motion) lift() float64 {
	r := m.radius + m.y[stretch]
	return m.mass * (float64(square(m.y[turning])/(r*r*r)) + float64(m.g*math.Cos(m.y[angle])))
}

// pulling is one piece of the law of force.
func (m *motion) pulling() {
	x, v := m.y[stretch], m.y[outwards]
	if x < m.top.x {
		m.wayBack(x, v)
		return
	}
	on, ok := m.t.ahead(x)
	if v > 0 {
		if ok {
			m.load(on)
		} else {
			m.strike()
		}
		return
	}
	bears := math.Inf(1)
	if ok {
		bears = on.at(x)
	}
	lift := m.lift()
	switch {
	case m.upright() && m.t.held() && lift <= bears:
		m.hang()
	case lift > bears, lift == bears && !m.t.held():
		m.load(on)
	case m.t.held():
		m.hold(bears, on)
	default:
		m.wayBack(x, v)
	}
}

// strike is the end of a path that is rigid from here on.
func (m *motion) strike() {
	m.over = true
	m.r.Status, m.r.Peak, m.r.PeakTime, m.r.PeakAngle = Rigid, math.Inf(1), m.time, m.y[angle]
}

// nudge is the speed in m/s with which the connector begins to stretch, or to go
// back, from rest: more than rounding makes of the forces there, less than
// anything that is told.
const nudge = 1e-12

// load is one segment of the loading curve, outwards.
func (m *motion) load(on segment) {
	m.y[outwards] = max(nudge, m.y[outwards])
	m.on, m.free, m.held = on, false, false
	by := m.follow(watch{turn: true, bound: on.x1, direction: 1})
	m.top = m.t.top(m.y[stretch], on.at(m.y[stretch]))
	m.r.Extension = max(m.r.Extension, m.top.x)
	if by == byTurn {
		m.turned()
	}
}

// wayBack is one piece of the way back, in or out again.
func (m *motion) wayBack(x, v float64) {
	m.free, m.held = false, false
	m.on = m.t.behind(x, m.top, v > 0)
	if v > 0 || v == 0 && m.lift() >= m.on.at(x) {
		m.y[outwards] = max(nudge, v)
		m.on = m.t.behind(x, m.top, true)
		if m.follow(watch{turn: true, bound: m.on.x1, direction: 1}) == byTurn {
			m.turned()
		}
		return
	}
	m.y[outwards] = min(-nudge, v)
	switch m.follow(watch{turn: true, bound: m.on.x0, direction: -1, gone: m.c != 0}) {
	case byBound:
		m.below()
	case byForce:
		m.mode = lagging
		m.r.Counts.Slacks++
	}
}

// below is a corner of the way back, the last one of which is its end.
func (m *motion) below() {
	if m.on.f0 > 0 {
		return
	}
	if m.mode == taut {
		m.r.Counts.Slacks++
	}
	m.mode, m.contact, m.departing = flying, m.y[stretch], 1
}

// lag is the motion while the dashpot holds the path back.
func (m *motion) lag() {
	m.on = m.t.behind(m.y[stretch], m.top, false)
	m.free, m.held = true, false
	switch m.follow(watch{bound: m.on.x0, direction: -1, back: true}) {
	case byBound:
		m.below()
	case byForce:
		m.mode = taut
		m.r.Counts.Pulls++
	}
}

// hold is the motion of a pendulum on a connector that keeps its length: one that
// gives nothing back and bears more than it has to.
func (m *motion) hold(bears float64, on segment) {
	m.y[outwards] = 0
	m.on, m.free, m.held = on, false, true
	m.r.Counts.Held++
	switch m.follow(watch{held: true, high: bears * (1 + stick), cap: bears}) {
	case byHigh:
		m.load(on)
	case byLow:
		m.mode, m.contact, m.departing = flying, m.y[stretch], 3
		m.r.Counts.Slacks++
	}
}

// turned is a moment at which the connector stops stretching.
func (m *motion) turned() {
	m.y[outwards] = 0
	m.r.Counts.Turns++
	if m.r.Counts.Turns == 1 {
		m.r.FirstTurn, m.r.Travel = m.time, m.y[stretch]
	}
	if m.upright() && m.r.Counts.Turns == 2 {
		m.r.Status, m.over = Rested, true
	}
}

// hang ends a run straight down with the body at rest for good.
func (m *motion) hang() {
	if m.r.Counts.Turns == 0 {
		m.turned()
	}
	if r := m.r; r.Peak < m.weight {
		r.Peak, r.PeakTime = m.weight, m.time
	}
	if !m.r.Lowest.Reached {
		m.r.Lowest = m.passage(m.time, m.lastU, m.lastW, 0, 0, m.y[stretch])
	}
	m.r.Status, m.over = Rested, true
}

// fly is the free flight up to where the connector is taut again: the first zero
// of the distance from the pivot squared, less its square when taut, which is a
// polynomial of order four in time.
func (m *motion) fly() {
	sin, cos := math.Sincos(m.y[angle])
	contact := m.radius + m.contact
	r := m.radius + m.y[stretch]
	u, w := r*sin, r*cos
	spin := m.y[turning] / r
	vu, vw := float64(m.y[outwards]*sin)+float64(spin*cos), float64(m.y[outwards]*cos)-float64(spin*sin)
	// By then the body is as far below the pivot as the connector is long.
	d := contact - w
	last := (math.Sqrt(max(0, square(vw)+float64(2*m.g*d))) - vw) / m.g
	last *= 1 + 1e-9
	p := quartic{
		float64(r*r) - float64(contact*contact),
		2 * (float64(u*vu) + float64(w*vw)) * last,
		(float64(vu*vu) + float64(vw*vw) + float64(m.g*w)) * last * last,
		m.g * vw * last * last * last,
		float64(m.g*m.g) / 4 * square(last) * square(last),
	}
	for i := range m.departing {
		p[i] = 0
	}
	q, ok := p.crossing()
	if !ok {
		q = 1
	}
	t := min(q*last, m.end-m.time)
	// From above the level of the pivot the body falls into the connector: that ends
	// the swing as being sent back does.
	m.swung = m.swung || w < 0
	f := flight{u, w, vu, vw, m.g}
	m.flown(&f, t)
	m.time += t
	u, w, vu, vw = f.at(t)
	m.lastU, m.lastW, m.lastVU, m.lastVW = u, w, vu, vw
	m.y = state{m.contact, (float64(u*vu) + float64(w*vw)) / math.Hypot(u, w), math.Atan2(u, w), float64(w*vu) - float64(u*vw)}
	if u == 0 && vu == 0 && w > 0 {
		m.y[angle], m.y[turning] = 0, 0
	}
	if m.time >= m.end {
		m.y[stretch] = math.Hypot(u, w) - m.radius
		m.over = true
		return
	}
	m.mode = taut
	m.r.Counts.Pulls++
	// A graze is no rest.
	m.y[outwards] = max(nudge, m.y[outwards])
}

// A flight is a free flight, below the pivot.
type flight struct{ u, w, vu, vw, g float64 }

func (f *flight) at(t float64) (u, w, vu, vw float64) {
	return f.u + float64(f.vu*t), f.w + float64(f.vw*t) + float64(f.g*t*t)/2, f.vu, f.vw + float64(f.g*t)
}

// flown looks along a flight of the time t.
func (m *motion) flown(f *flight, t float64) {
	if m.trace != nil {
		for i := 1; i <= 8; i++ {
			s := t * float64(i) / 8
			u, w, vu, vw := f.at(s)
			*m.trace = append(*m.trace, PlanarState{m.time + s, u, m.place.Plane.Pivot - w, vu, -vw, 0})
		}
	}
	if m.pending == 0 {
		return
	}
	_, _, _, vw := f.at(t)
	most := math.Hypot(f.vu, max(math.Abs(f.vw), math.Abs(vw)))
	for i := range m.count {
		if m.pending&(1<<i) == 0 {
			continue
		}
		q, ok := m.windows[i].seek(most*t, func(q float64) (float64, float64) {
			u, w, _, _ := f.at(q * t)
			return u, m.place.Plane.Pivot - w
		})
		if ok {
			u, w, vu, vw := f.at(q * t)
			m.pending &^= 1 << i
			m.r.Passes[i] = m.passage(m.time+q*t, u, w, vu, vw, math.Hypot(u, w)-m.radius)
		}
	}
}

// passage fills in a moment at (u, w) below the pivot.
func (m *motion) passage(time, u, w, vu, vw, x float64) Passage {
	z := m.place.Plane.Pivot - w
	v := math.Hypot(vu, vw)
	p := Passage{
		Reached: true, Time: time, U: u, Z: z, Drop: m.place.Start.Z - z, Speed: v,
		Height: StraightFall(v, m.g), Extension: x,
	}
	if v > 0 {
		p.Down = vw / v
	}
	return p
}

// finish fills the result in.
func (m *motion) finish() error {
	r, l := m.r, &m.r.Ledger
	if r.Status == 0 {
		r.Status = TimedOut
	}
	r.EndTime, r.EndAngle = m.time, m.y[angle]
	if r.Counts.Turns == 0 {
		r.FirstTurn, r.Travel = math.NaN(), math.NaN()
	}
	l.Weight = m.weight * (m.time - m.begin)
	l.MotionSide = m.mass * m.lastVU
	l.MotionDown = m.mass * (m.lastVW - m.vw)
	l.After = m.mass * (square(m.lastVU) + square(m.lastVW)) / 2
	l.Fallen = m.weight * (m.startZ - m.place.Plane.Pivot + m.lastW)
	l.Stored = m.stored()
	return l.settle(m.mass, loose*m.tolerance)
}

// stored returns the energy in J that the path still gives back.
func (m *motion) stored() float64 {
	x := min(m.y[stretch], m.top.x)
	if m.t.held() || x <= m.top.stays {
		return 0
	}
	sum := 0.0
	for x > m.top.stays {
		s := m.t.behind(x, m.top, false)
		if s.x0 >= x {
			break
		}
		sum += (x - s.x0) * (s.f0 + s.at(x)) / 2
		x = s.x0
	}
	return sum
}
