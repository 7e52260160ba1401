package connector

import "math"

// A watch says which events end a stretch of an integration.
type watch struct {
	rest      bool    // the speed is zero
	low, high float64 // extensions
	down, up  bool    // whether low, high is watched
	gone      bool    // the force on the body has gone
	back      bool    // the force on the body would be back
	peak      bool    // forces are taken into the peaks
}

// A cause is what has ended a stretch.
type cause uint8

const (
	byNothing cause = iota
	byClock
	byRest
	byLow
	byHigh
	byForce
)

// follow integrates until one of the watched events.
func (d *integral) follow(w watch) cause {
	h := d.guess()
	if d.h > 0 && !d.free {
		h = min(h, d.h)
	}
	d.stage(0, d.x, d.v)
	for {
		last := h >= d.end-d.t
		if last {
			h = d.end - d.t
		}
		x1, v1, dx, dv := d.step(d.x, d.v, h)
		err := max(math.Abs(dx)/(1+math.Abs(d.x)), math.Abs(dv)/(1+math.Abs(d.v))) / d.tolerance
		if err > 1 {
			h *= resize(err)
			continue
		}
		by, q := d.look(&w, h)
		if by != byNothing {
			x1, v1, h = d.land(&w, by, h*q, h)
		}
		if w.peak {
			d.crest(h, x1, v1)
		}
		d.commit(h, x1, v1)
		if by != byNothing {
			return by
		}
		if last {
			d.over = true
			return byClock
		}
		d.v0()
		h *= resize(err)
		d.h = h
	}
}

// v0 makes the last stage the first one of the next step.
func (d *integral) v0() {
	s := &d.stepper
	s.v[0], s.a[0], s.path[0], s.dash[0] = s.v[6], s.a[6], s.path[6], s.dash[6]
}

// guess returns a first step for the stretch: a share of the time that its
// stiffness and its dashpot set.
func (d *integral) guess() float64 {
	if d.free && !d.lost {
		return 0.1
	}
	const dx = 1e-4
	k := d.on.k
	if d.on.curve != nil {
		k = (d.on.curve(d.x+dx) - d.on.curve(d.x)) / dx
	}
	c := d.c
	if c != c {
		c = (d.law.damp(d.v+dx) - d.law.damp(d.v)) / dx
	}
	return 4 * fifthRoot(d.tolerance) / (1 + math.Sqrt(math.Abs(k)/d.mass) + c/d.mass)
}

// commit takes the step of the time h over.
func (d *integral) commit(h, x1, v1 float64) {
	if !d.free || d.lost {
		impulse, path, dash := d.sums(h)
		l := &d.r.Ledger
		l.Impulse += impulse
		l.Work += path
		l.Turned += math.Abs(path)
		l.Viscous += dash
	}
	d.t += h
	d.x, d.v = x1, v1
	d.force = 0
	if !d.free {
		d.force = d.on.force(x1) + d.law.damp(v1)
	}
}

// look returns the first watched event within the step of the time h, and the
// share of the step at which it is.
func (d *integral) look(w *watch, h float64) (cause, float64) {
	px, pv := d.between(d.x, d.v, h)
	by, q := byNothing, 1.0
	if w.rest {
		if at, ok := pv.firstZero(); ok {
			by, q = byRest, at
		}
	}
	if w.gone || w.back {
		if at, ok := d.forceZero(&px, &pv, q, w.gone); ok {
			by, q = byForce, at
		}
	}
	// Up to q the motion has one direction.
	bound, sign, what := w.high, 1.0, byHigh
	if w.down {
		bound, sign, what = w.low, -1, byLow
	}
	if !(w.up || w.down) || math.IsInf(bound, 0) || sign*(px.at(q)-bound) < 0 {
		return by, q
	}
	if px[0] -= bound; px[0] == 0 {
		return what, 0
	}
	return what, px.within(0, q, px[0], px.at(q))
}

// straight reports whether path and dashpot are proportional to travel and speed.
func (d *integral) straight() bool { return d.on.curve == nil && d.c == d.c }

// forceZero returns the first share of the step, up to q, at which the force of
// path and dashpot is gone, or is back.
func (d *integral) forceZero(px, pv *quartic, q float64, gone bool) (float64, bool) {
	if d.straight() {
		var f quartic
		for i := range f {
			f[i] = d.on.k*px[i] + d.c*pv[i]
		}
		f[0] += d.on.f - d.on.k*d.on.x
		if math.Abs(f[0]) < 1e-9*math.Abs(d.c*d.v) {
			f[0] = 0
		}
		if f[0] < 0 && gone {
			return 0, true
		}
		at, ok := f.firstZero()
		if ok && f[0] == 0 && (f[1] < 0) == gone && gone {
			return 0, true
		}
		return at, ok && at <= q
	}
	const parts = 16
	for i := 1; i <= parts; i++ {
		at := q * float64(i) / parts
		if f := d.both(px.at(at), pv.at(at)); (f <= 0) == gone {
			lo, hi := at-q/parts, at
			for range 60 {
				mid := (lo + hi) / 2
				if f := d.both(px.at(mid), pv.at(mid)); (f <= 0) == gone {
					hi = mid
				} else {
					lo = mid
				}
			}
			return hi, true
		}
	}
	return 0, false
}

// both returns the force of the stretch and the dashpot.
func (d *integral) both(x, v float64) float64 { return d.on.force(x) + d.law.damp(v) }

// land steps on to the event near the time h and not after most, so that it has
// the full order, and returns the state there and the time.
func (d *integral) land(w *watch, by cause, h, most float64) (x1, v1, at float64) {
	const dt = 1e-7
	for range 10 {
		x1, v1, _, _ = d.step(d.x, d.v, h)
		var off, slope float64
		switch by {
		case byRest:
			off, slope = v1, d.stepper.a[6]
		case byHigh:
			off, slope = x1-w.high, v1
		case byLow:
			off, slope = x1-w.low, v1
		case byForce:
			a := d.stepper.a[6]
			off = d.both(x1, v1)
			slope = (d.both(x1+dt*v1, v1+dt*a) - d.both(x1-dt*v1, v1-dt*a)) / (2 * dt)
		}
		to := min(max(h-off/slope, 0), most)
		if to != to {
			break
		}
		dh := to - h
		h = to
		if math.Abs(dh) <= 1e-8*most {
			// So short a way is straight.
			x1 += dh * v1
			v1 += dh * d.stepper.a[6]
			break
		}
	}
	switch by {
	case byRest:
		v1 = 0
	case byHigh:
		x1 = w.high
	case byLow:
		x1 = w.low
	}
	return x1, v1, h
}

// crest takes the greatest force of the step into the peaks.
func (d *integral) crest(h, x1, v1 float64) {
	s := &d.stepper
	if d.c != 0 && (!d.straight() || d.on.k*s.v[0]+d.c*s.a[0] > 0 && d.on.k*s.v[6]+d.c*s.a[6] < 0) {
		px, pv := d.between(d.x, d.v, h)
		if q, ok := d.turn(&px, &pv); ok {
			// One step more, since the force is what counts and not the moment.
			keep := d.stepper
			x, v, _, _ := d.step(d.x, d.v, q*h)
			d.stepper = keep
			d.pushAt(d.on.force(x), d.t+q*h, x, v)
		}
	}
	d.pushAt(d.on.force(x1), d.t+h, x1, v1)
}

// turn returns the share of the step at which the force is greatest, if it rises
// first and falls at last.
func (d *integral) turn(px, pv *quartic) (float64, bool) {
	if d.straight() {
		var f quartic
		for i := range f[1:] {
			f[i] = float64(i+1) * (d.on.k*px[i+1] + d.c*pv[i+1])
		}
		first, last := f[0], f.at(1)
		return f.within(0, 1, first, last), first > 0 && last < 0
	}
	if d.rate(px, pv, 0) <= 0 || d.rate(px, pv, 1) >= 0 {
		return 0, false
	}
	lo, hi := 0.0, 1.0
	for range 40 {
		if mid := (lo + hi) / 2; d.rate(px, pv, mid) > 0 {
			lo = mid
		} else {
			hi = mid
		}
	}
	return lo, true
}

// rate returns the change of the force about the share q of the step.
func (d *integral) rate(px, pv *quartic, q float64) float64 {
	const dq = 1e-5
	return d.both(px.at(q+dq), pv.at(q+dq)) - d.both(px.at(q-dq), pv.at(q-dq))
}
