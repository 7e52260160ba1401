package connector

import (
	"errors"
	"math"
)

// longest is the time in s after which Integrate gives up waiting for a second
// lowest point.
const longest = 20

// loose is the share of the tolerance of a step with which the ledgers of an
// integration close.
const loose = 1e4

var errTolerance = errors.New("connector: the tolerance must lie between 1e-13 and 1e-3")

// Integrate works out the same run as Run, step by step: the independent check.
// tolerance is the error allowed to a step, relative to travel plus 1 m and to
// speed plus 1 m/s; the peak is then within about ten times the tolerance.
//
// Every step is searched for a turn of the motion before it is searched for a
// corner of the law, because a body that goes beyond a corner and comes back
// within one step would otherwise pass for one that never was there. A moment
// found is stepped on to once more, so that it has the full order.
//
// Errors and panics are those of Run, and the tolerance must lie between 1e-13
// and 1e-3. Without a duration it gives up after 20 s.
func Integrate(p *Path, f *Fall, tolerance float64, r *Result) error {
	if len(p.parts) == 0 {
		panic("connector: integration of a path that was never set")
	}
	return integrate(p, p, f, tolerance, r)
}

// IntegrateLaw works out an arrest by a law of force that is no path of parts.
// The result has no parts, no absorber travel and no exhaustion; Ledger.Lost
// includes what is stored. The law is looked up between the steps: a force that
// turns more than once within a sixteenth of a step may be missed.
func IntegrateLaw(l *Law, f *Fall, tolerance float64, r *Result) error {
	if err := l.check(); err != nil {
		return err
	}
	return integrate(l, nil, f, tolerance, r)
}

// An integral is an integration on its way.
type integral struct {
	stepper
	r      *Result
	parts  *Path // nil for a law
	weight float64

	t, x, v, h, end float64
	start           float64
	tolerance       float64
	once            bool

	reach, hold float64 // greatest extension so far in m, and the force there
	contact     float64 // extension at which the path is taut again
	force       float64 // on the body at the end
	taut, over  bool

	peak, still mark
}

func integrate(law source, p *Path, f *Fall, tolerance float64, r *Result) error {
	r.reset()
	if err := f.check(); err != nil {
		return err
	}
	if !(tolerance >= 1e-13 && tolerance <= 1e-3) {
		return errTolerance
	}
	d := integral{
		stepper: stepper{law: law, g: f.Gravity, mass: f.Mass, perMass: 1 / f.Mass, c: law.coefficient()},
		r:       r, parts: p, weight: f.Mass * f.Gravity,
		x: -law.loose(), v: f.speed(), end: f.Duration, tolerance: tolerance,
	}
	if f.Duration == 0 {
		d.once, d.end = true, longest
	}
	d.start = d.v
	r.Ledger.Before, r.Ledger.Carried = f.Mass*d.v*d.v/2, f.Mass*d.v
	for n := 0; !d.over; n++ {
		switch {
		case n > mostEvents:
			return errManyEvents
		case !d.taut:
			d.flight()
		case d.lost:
			d.lagging()
		default:
			d.pulling()
		}
	}
	return d.finish()
}

// flight is the motion without the path.
func (d *integral) flight() {
	d.free, d.on = true, stretch{}
	if d.v < 0 {
		if d.follow(watch{rest: true}) == byRest {
			d.r.Events.Tops++
		}
		return
	}
	if d.x < d.contact && d.follow(watch{high: d.contact, up: true}) != byHigh {
		return
	}
	d.free, d.taut = false, true
	d.r.Events.Pulls++
	if d.r.Events.Pulls == 1 {
		d.r.FirstPull = d.t
	}
}

// pulling is the motion on one stretch of the law.
func (d *integral) pulling() {
	down := d.v > 0
	if d.x >= d.reach {
		on := d.law.ahead(d.x)
		switch {
		case d.v == 0 && d.hold > d.weight:
			on = d.law.behind(d.x, d.reach, d.hold, false)
			if on.rigid {
				d.hang()
				return
			}
		case d.v == 0 && (on.rigid || on.force(d.x) >= d.weight):
			d.hang()
			return
		case on.rigid:
			d.r.Status, d.r.Peak, d.r.PeakTime, d.over = Rigid, math.Inf(1), d.t, true
			return
		default:
			down = true
		}
		d.on = on
	} else {
		d.on = d.law.behind(d.x, d.reach, d.hold, down)
		if d.v == 0 {
			f := d.on.force(d.x)
			down = f < d.weight
			d.on = d.law.behind(d.x, d.reach, d.hold, down)
		}
	}
	if down {
		d.downwards()
	} else {
		d.upwards()
	}
}

func (d *integral) downwards() {
	fresh := d.x >= d.reach
	d.pushAt(d.on.force(d.x), d.t, d.x, d.v)
	// Without a dashpot the way back ends at rest, where it began.
	again := !fresh && d.c == 0 && d.on.high >= d.reach
	by := d.follow(watch{rest: true, high: d.on.high, up: !again, peak: true})
	if again && by == byRest {
		d.x = d.reach
	}
	if fresh {
		d.reach, d.hold = d.x, d.on.force(d.x)
	}
	switch by {
	case byRest:
		d.rest()
	case byHigh:
		switch {
		case fresh:
			d.corner()
		case d.x >= d.reach:
			d.r.Events.Rejoins++
		default:
			d.r.Events.Corners++
		}
	}
}

// corner is a corner of the loading curve.
func (d *integral) corner() {
	if !d.law.ahead(d.x).rigid {
		d.r.Events.Corners++
	}
	if d.parts == nil {
		return
	}
	for i := range d.parts.spans {
		if s := &d.parts.spans[i]; s.x1 == d.x {
			d.r.exhaust(s.exhausts, d.t, d.mass*d.v*d.v/2)
		}
	}
}

func (d *integral) upwards() {
	switch d.follow(watch{rest: true, low: d.on.low, down: true, gone: d.c != 0}) {
	case byRest:
		if hangs(d.on.force(d.x), d.weight) {
			d.hang()
			return
		}
		d.r.Events.Tops++
	case byLow:
		d.below()
	case byForce:
		d.lost, d.free = true, true
		d.r.Events.Slacks++
	}
}

// below is a corner of the way back, the last one of which is its end.
func (d *integral) below() {
	if d.on.force(d.on.low) > 1e-9*d.hold {
		d.r.Events.Corners++
		return
	}
	if !d.lost {
		d.r.Events.Slacks++
	}
	d.contact, d.taut, d.lost = d.on.low, false, false
}

// lagging is the motion while the dashpot holds the path back.
func (d *integral) lagging() {
	d.on = d.law.behind(d.x, d.reach, d.hold, false)
	switch d.follow(watch{low: d.on.low, down: true, back: true}) {
	case byLow:
		d.below()
	case byForce:
		d.lost, d.free = false, false
		d.r.Events.Pulls++
	}
}

func (d *integral) rest() {
	if hangs(d.on.force(d.x), d.weight) {
		d.hang()
		return
	}
	d.r.Events.Rests++
	if d.r.Events.Rests == 1 {
		d.settled(d.on.force(d.x))
	}
	d.over = d.over || d.once && d.r.Events.Rests == 2
}

func (d *integral) settled(f float64) {
	d.still = d.mark(d.x, f)
	d.r.rest(d.t, d.x, d.r.Ledger.Impulse, d.r.Ledger.Work+d.r.Ledger.Viscous)
}

func (d *integral) hang() {
	d.over = true
	if d.r.Events.Rests == 0 {
		d.r.Events.Rests++
		d.pushAt(d.weight, d.t, d.x, 0)
		d.settled(d.weight)
	}
	d.force = d.weight
}

// pushAt takes the force at the extension x and the speed v downwards into the
// peaks; f is that of the path alone.
func (d *integral) pushAt(f, t, x, v float64) {
	if d.r.push(f+d.law.damp(v), t) {
		d.peak = d.mark(x, f)
	}
}

// mark keeps what is needed to tell the travel of every part.
func (d *integral) mark(x, f float64) mark {
	if d.parts == nil {
		return mark{}
	}
	return mark{d.parts.topAt(max(x, d.reach)), f, true}
}

// finish fills the result in.
func (d *integral) finish() error {
	r, l := d.r, &d.r.Ledger
	if r.Status == 0 {
		r.Status = TimedOut
	}
	r.End = State{d.t, d.x, d.v, d.force}
	l.Weight = d.weight * d.t
	l.Motion = d.mass * (d.v - d.start)
	l.After = d.mass * d.v * d.v / 2
	l.Fallen = d.weight * (d.x + d.law.loose())
	if d.parts == nil {
		l.Lost = l.Work
		r.DecelerationDistance = r.StoppingDistance
		r.close()
		return l.settle(loose*d.tolerance, r.grain(d.weight, d.law.loose()))
	}
	// The parts are told their share by the same words as in a run.
	m := motion{path: d.parts, r: r, x: d.x, peak: d.peak, still: d.still, top: d.parts.topAt(d.reach)}
	m.share()
	for i := range r.Parts {
		l.Stored += r.Parts[i].Stored
		l.Lost += r.Parts[i].Lost
	}
	m.decelerate()
	r.close()
	return l.settle(loose*d.tolerance, r.grain(d.weight, d.law.loose()))
}
