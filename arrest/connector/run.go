package connector

import (
	"errors"
	"math"
)

// A phase says which law holds for the body.
type phase uint8

const (
	falling   phase = iota // not taut
	loading                // on the loading curve, downwards
	returning              // on the way back, up or down
	lagging                // on the way back, upwards faster than the dashpot lets the path follow: no force
	over
)

// mostEvents ends a run that would never end, such as hours of an undamped
// swing.
const mostEvents = 1000000

var errManyEvents = errors.New("connector: the run has more than a million events; shorten its duration")

// A motion is a run on its way.
type motion struct {
	path *Path
	r    *Result

	mass, g, weight, sigma float64
	t, end                 float64
	x, v, contact          float64
	force                  float64 // on the body
	phase                  phase
	start                  float64 // speed at the beginning
	once                   bool    // ends at the second lowest point
	accounted              bool

	span int  // loading: the span the body is on
	top  top  // returning: where the way back begins
	line line // returning: the piece of it the body is on

	peak  mark
	still mark // at the first rest

	trace *[]piece // of Trace
}

// A mark keeps what is needed to tell the travel of every part at a moment.
type mark struct {
	top top
	f   float64 // force of the path without the dashpot
	set bool
}

// Run works out the arrest of the fall by the path, exactly from event to
// event, into the result.
//
// It returns an error for a fall with a figure out of range, and ErrLedger if
// the ledgers do not close. A body that is never stopped, or is stopped by
// something rigid, is no error: see Result.Status. Run panics if the path was
// never set. It allocates nothing once the result has grown to the path.
func Run(p *Path, f *Fall, r *Result) error {
	return run(p, f, r, nil)
}

func run(p *Path, f *Fall, r *Result, trace *[]piece) error {
	if len(p.parts) == 0 {
		panic("connector: run of a path that was never set")
	}
	r.reset()
	if err := f.check(); err != nil {
		return err
	}
	m := motion{
		path: p, r: r, mass: f.Mass, g: f.Gravity, weight: f.Mass * f.Gravity,
		sigma: p.viscous / (2 * f.Mass), end: f.Duration, x: -p.slack, v: f.speed(), trace: trace,
	}
	if f.Duration == 0 {
		m.once, m.end = true, math.Inf(1)
	}
	m.start = m.v
	r.Ledger.Before, r.Ledger.Carried = f.Mass*m.v*m.v/2, f.Mass*m.v
	for n := 0; m.phase != over; n++ {
		if n > mostEvents {
			return errManyEvents
		}
		m.next()
	}
	return m.finish()
}

// next goes on to the next event.
func (m *motion) next() {
	switch m.phase {
	case falling:
		if m.v < 0 {
			m.rise()
		} else {
			m.drop()
		}
	case loading:
		m.load()
	case returning:
		m.back()
	case lagging:
		m.lag()
	}
}

// fly moves the body freely for the time t and reports whether it lasts so long.
func (m *motion) fly(t float64) bool {
	ok := t <= m.end-m.t
	if !ok {
		t = m.end - m.t
		m.phase = over
	}
	if m.trace != nil {
		m.record(piece{time: m.t, last: t, x: m.x, v: m.v, free: true})
	}
	m.x += float64(m.v*t) + float64(m.g*t*t)/2
	m.v += float64(m.g * t)
	m.t += t
	m.force = 0
	return ok
}

// rise is the free motion up to the highest point.
func (m *motion) rise() {
	if m.fly(-m.v / m.g) {
		m.v = 0
		m.r.Events.Tops++
	}
}

// drop is the free motion down to where the path becomes taut.
func (m *motion) drop() {
	d := m.contact - m.x
	v := math.Sqrt(float64(m.v*m.v) + float64(2*m.g*d))
	t := 0.0
	if d > 0 {
		t = 2 * d / (m.v + v)
	}
	if !m.fly(t) {
		return
	}
	m.x, m.v = m.contact, v
	m.pull()
	m.phase = returning
	if m.r.Events.Pulls == 1 {
		m.phase = loading
		m.r.FirstPull = m.t
	}
}

// pull notes that the path is taut.
func (m *motion) pull() { m.r.Events.Pulls++ }

// load is one span of the loading curve.
func (m *motion) load() {
	if m.span == len(m.path.spans) {
		m.strike()
		return
	}
	s := &m.path.spans[m.span]
	f := s.f0 + float64(s.k*(m.x-s.x0))
	as := m.g - f/m.mass
	if m.v == 0 && as <= 0 {
		m.hang()
		return
	}
	a := newArc(m.v, as, s.k/m.mass, m.sigma)
	st := a.advance(s.x1-m.x, m.end-m.t, m.g, false)
	m.press(&a, &st, f, s.k)
	f = m.move(&a, &st, f, s.k, 1)
	switch st.end {
	case atBound:
		m.x = s.x1
		m.top = top{m.x, s.f1, m.span}
		m.r.exhaust(s.exhausts, m.t, m.mass*m.v*m.v/2)
		if m.span++; m.span < len(m.path.spans) {
			m.r.Events.Corners++
		}
	case atRest:
		m.top = top{m.x, f, m.span}
		m.rest(f)
	case atClock:
		m.top = top{m.x, f, m.span}
		m.phase = over
	}
}

// strike is the end of a path that is rigid from here on.
func (m *motion) strike() {
	if m.v == 0 {
		m.hang()
		return
	}
	m.phase = over
	m.r.Status, m.r.Peak, m.r.PeakTime = Rigid, math.Inf(1), m.t
}

// back is one piece of the way back, or of the same way down again.
func (m *motion) back() {
	l := &m.line
	f := l.at(m.x)
	as := m.g - f/m.mass
	switch {
	case m.v > 0 || m.v == 0 && as > 0:
		m.backDown(f, as)
	case m.v < 0 || as < 0:
		m.backUp(f, as)
	default:
		m.hang()
	}
}

// backDown follows the way back downwards. Without a dashpot nothing is lost on
// it: the body comes to rest where it was at rest before, at the reach, and
// rounding must not decide whether it goes beyond.
func (m *motion) backDown(f, as float64) {
	l := &m.line
	st := stride{v: m.v, end: atBound}
	if d := l.x1 - m.x; d > 0 {
		a := newArc(m.v, as, l.k/m.mass, m.sigma)
		again := m.sigma == 0 && l.x1 >= m.top.x
		if again {
			d = math.Inf(1)
		}
		st = a.advance(d, m.end-m.t, m.g, false)
		if again && st.end == atRest {
			st.y = l.x1 - m.x
		}
		m.press(&a, &st, f, l.k)
		f = m.move(&a, &st, f, l.k, 1)
		if again && st.end == atRest {
			m.x = l.x1
		}
	}
	switch st.end {
	case atBound:
		m.x = l.x1
		if l.x1 < m.top.x {
			m.line = m.path.lineAbove(*l, m.top)
			m.r.Events.Corners++
			return
		}
		m.phase, m.span = loading, m.top.span
		m.r.Events.Rejoins++
	case atRest:
		m.rest(f)
	case atClock:
		m.phase = over
	}
}

func (m *motion) backUp(f, as float64) {
	l := &m.line
	st := stride{v: -m.v, end: atBound}
	if d := m.x - l.x0; d > 0 {
		a := newArc(-m.v, -as, l.k/m.mass, m.sigma)
		st = a.advance(d, m.end-m.t, m.g, true)
		f = m.move(&a, &st, f, l.k, -1)
	}
	switch st.end {
	case atBound:
		m.x = l.x0
		m.lower()
	case atRest:
		if hangs(f, m.weight) {
			m.hang()
			return
		}
		m.r.Events.Tops++
	case slack:
		m.phase = lagging
		m.r.Events.Slacks++
	case atClock:
		m.phase = over
	}
}

// lower goes on to the piece of the way back below, or off the path.
func (m *motion) lower() {
	if m.line.f0 > 0 {
		m.line = m.path.lineFrom(m.line.x0, m.line.f0)
		m.r.Events.Corners++
		return
	}
	if m.phase == returning {
		m.r.Events.Slacks++
	}
	m.phase, m.contact = falling, m.line.x0
}

// lag is the motion upwards while path and dashpot together would push. The
// force would be zero again when
//
//	f + c v + (k v + c g) t + k g t^2/2 = 0
//
// with f the force of the path where the body is.
func (m *motion) lag() {
	l := m.line
	c := 2 * m.sigma * m.mass
	b := float64(l.k*m.v) + float64(c*m.g)
	f := l.at(m.x)
	// Where lagging has just begun, f + c v is zero but for rounding.
	push := min(0, f+float64(c*m.v))
	if -push < 1e-12*(f-c*m.v) {
		push = 0
	}
	root := math.Sqrt(float64(b*b) - float64(2*l.k*m.g*push))
	again := -2 * push / (b + root)
	if b <= 0 {
		again = (root - b) / (l.k * m.g)
	}
	leave := math.Inf(1)
	d := m.x - l.x0
	if v := float64(m.v*m.v) - float64(2*m.g*d); v >= 0 {
		leave = 2 * d / (math.Sqrt(v) - m.v)
	}
	from := m.x
	if again < leave {
		if m.fly(again) {
			m.v = min(m.v, 0)
			m.phase = returning
			m.pull()
		}
	} else if m.fly(leave) {
		m.x = l.x0
		m.lower()
	}
	// What the path gives back meanwhile goes into the dashpot.
	given := float64((from - m.x) * (f - float64(l.k*(from-m.x))/2))
	m.r.Ledger.Work -= given
	m.r.Ledger.Viscous += given
}

// press takes the forces of an arc downwards into the peaks: at both ends, and
// where the force turns in between.
func (m *motion) press(a *arc, st *stride, f, k float64) {
	c := 2 * m.sigma * m.mass
	m.pushAt(f+float64(c*a.v0), m.t, m.x, f)
	if b, ok := a.topTime(st); ok {
		y, v := a.at(b)
		f := f + float64(k*y)
		m.pushAt(f+float64(c*v), m.t+b.t, m.x+y, f)
	}
	if !math.IsInf(st.y, 1) {
		f += float64(k * st.y)
		m.pushAt(f+float64(c*st.v), m.t+st.b.t, m.x+st.y, f)
	}
}

// pushAt takes the force on the body into the peaks; f is that of the path
// alone.
func (m *motion) pushAt(force, t, x, f float64) {
	if m.r.push(force, t) {
		m.peak = mark{m.top, f, true}
		if m.phase == loading {
			m.peak.top = top{x, f, m.span}
		}
	}
}

// move carries the body to the end of the arc, in the direction sign, books
// impulse and work, and returns the force of the path there.
func (m *motion) move(a *arc, st *stride, f, k, sign float64) float64 {
	if st.end == endless {
		m.tend(sign*st.y, f, k)
		return f
	}
	c := 2 * m.sigma * m.mass
	if m.trace != nil {
		m.record(piece{time: m.t, last: st.b.t, x: m.x, v: m.v, arc: *a, sign: sign, force: f, k: k, c: c})
	}
	l := &m.r.Ledger
	y := sign * st.y
	l.Impulse += float64(f*st.b.t) + sign*float64(m.mass*a.spring(st.b)) + float64(c*y)
	work := float64(y * (f + float64(k*y)/2))
	l.Work += work
	l.Turned += math.Abs(work)
	l.Viscous += float64(m.mass * a.viscous(st.b))
	m.t += st.b.t
	m.x += y
	m.v = sign * st.v
	f += float64(k * y)
	m.force = f + float64(c*m.v)
	return f
}

// hanging is the difference between force and weight, relative to the weight,
// below which a body at rest hangs: what is left of the swing is less than that.
const hanging = 1e-6

func hangs(f, weight float64) bool { return math.Abs(f-weight) <= hanging*weight }

// rest is a lowest point under the force f of the path.
func (m *motion) rest(f float64) {
	m.v = 0
	if hangs(f, m.weight) {
		m.hang()
		return
	}
	m.r.Events.Rests++
	if m.r.Events.Rests == 1 {
		m.settled(f)
	}
	switch {
	case m.once && m.r.Events.Rests == 2:
		m.phase = over
	case m.phase == loading:
		m.line = m.path.lineFrom(m.top.x, m.top.f)
		m.phase = returning
		if math.IsInf(m.line.k, 1) {
			m.hang()
		}
	}
}

// settled notes the first rest.
func (m *motion) settled(f float64) {
	m.still = mark{m.top, f, true}
	m.r.rest(m.t, m.x, m.r.Ledger.Impulse, m.r.Ledger.Work+m.r.Ledger.Viscous)
}

// hang ends the run with the body at rest for good, under its weight.
func (m *motion) hang() {
	if m.r.Events.Rests == 0 {
		m.r.Events.Rests++
		m.pushAt(m.weight, m.t, m.x, m.weight)
		m.settled(m.weight)
	}
	m.force = m.weight
	m.phase = over
}

// tend follows an arc that no event ends any more: the body creeps by y towards
// its hanging position, or falls on for ever. The ledger is drawn up before it.
func (m *motion) tend(y, f, k float64) {
	m.account()
	m.phase = over
	f += float64(k * y)
	if math.IsInf(y, 0) || f < m.weight*(1-hanging) {
		m.r.Status = Endless
		return
	}
	m.t, m.x, m.v, m.force = math.Inf(1), m.x+y, 0, m.weight
	if m.x > m.top.x {
		m.top = top{m.x, f, m.span}
	}
	if m.r.Events.Rests == 0 {
		m.settled(m.weight)
		m.r.Status = Tending
		m.r.MeanOverTime = m.weight
		m.r.MeanOverDistance = (m.r.Ledger.Before + m.weight*(m.x+m.path.slack)) / m.x
	}
}

// record keeps a piece of the motion for Trace.
func (m *motion) record(p piece) {
	if p.last > 0 {
		*m.trace = append(*m.trace, p)
	}
}
