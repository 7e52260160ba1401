package connector

import "math"

// A walker is the state of one element while the path is drawn out once, by a
// rising extension, to find its loading curve.
type walker struct {
	at    int     // corner last passed; -1 before the first
	x     float64 // extension in m
	force float64 // greatest force so far in N: below it, the way back is followed
}

// addSpans draws the path out once. The force rises from corner to corner of
// the elements; it stands still while an element travels; and it falls at once
// when a plateau with an activation peak lets go and the rest shrinks back.
func (p *Path) addSpans() {
	p.spans, p.ext, p.share, p.rigid = p.spans[:0], p.ext[:0], p.share[:0], false
	p.walk = p.walk[:0]
	for range p.elements {
		p.walk = append(p.walk, walker{at: -1})
	}
	x, f := 0.0, 0.0
	for {
		if e, ok := p.startNext(f); ok {
			f = p.start(e, f)
			continue
		}
		if e, ok := p.flatNext(f); ok {
			if x = p.addFlat(e, x, f); math.IsInf(x, 1) {
				return
			}
			continue
		}
		c, next := p.rise(f)
		if c == 0 && math.IsInf(next, 1) {
			p.rigid = true
			return
		}
		if c > 0 {
			x = p.addRise(x, f, next, c)
		}
		if math.IsInf(next, 1) {
			return
		}
		p.climb(f, next)
		f = next
	}
}

// startNext returns an element that begins to move at the force f.
func (p *Path) startNext(f float64) (int, bool) {
	for e := range p.walk {
		if p.walk[e].at < 0 && f >= p.elements[e].starts {
			return e, true
		}
	}
	return 0, false
}

// start sets the element e off and returns the force that is left. Without an
// activation peak that is f. With one, the other elements give back extension
// to e until the force of its plateau, or until its travel is used up.
func (p *Path) start(e int, f float64) float64 {
	el, w := &p.elements[e], &p.walk[e]
	w.at, w.force = 0, el.points[0].Force
	if el.starts <= el.points[0].Force {
		return f
	}
	travel := el.points[1].Extension
	left, taken := p.shrink(f, el.points[0].Force, travel)
	for i := range p.walk {
		if q, o := &p.elements[i], &p.walk[i]; i != e && o.at >= 0 {
			o.x -= q.released(f, left)
			if q.reversing {
				o.at, o.force = q.corner(left), left
			}
		}
	}
	w.x = taken
	if taken == travel {
		w.at, w.force = 1, left
		p.exhaust(el.part)
	}
	return left
}

// shrink returns the force at which the way back from f has given back the
// travel, or the floor if it gives back less, and what it has given back.
func (p *Path) shrink(f, floor, travel float64) (left, taken float64) {
	for f > floor {
		b := p.back[p.stepBelow(f)]
		to := max(b.from, floor)
		if more := b.compliance * (f - to); taken+more < travel {
			taken, f = taken+more, to
			continue
		}
		return f - (travel-taken)/b.compliance, travel
	}
	return f, taken
}

// exhaust notes that the travel of a part is used up where the last span ends.
func (p *Path) exhaust(part int) {
	if n := len(p.spans); n > 0 {
		p.spans[n-1].exhausts |= 1 << part
	}
}

// flatNext returns an element that travels under the force f.
func (p *Path) flatNext(f float64) (int, bool) {
	for e := range p.walk {
		el, w := &p.elements[e], &p.walk[e]
		if w.at >= 0 && w.at+1 < len(el.points) && f >= w.force && el.points[w.at+1].Force <= f {
			return e, true
		}
	}
	return 0, false
}

// addFlat adds the travel of the element e under the force f.
func (p *Path) addFlat(e int, x, f float64) float64 {
	el, w := &p.elements[e], &p.walk[e]
	to := el.points[w.at+1].Extension
	end := x + (to - w.x)
	p.note()
	for i := range p.elements {
		p.share = append(p.share, 0)
		if i == e {
			p.share[len(p.share)-1] = 1
		}
	}
	p.spans = append(p.spans, span{x0: x, x1: end, f0: f, f1: f})
	w.at, w.x = w.at+1, to
	if el.plateau && w.at+1 == len(el.points) {
		p.exhaust(el.part)
	}
	return end
}

// note keeps the extensions of the elements at the start of the next span.
func (p *Path) note() {
	for i := range p.walk {
		p.ext = append(p.ext, p.walk[i].x)
	}
}

// rise returns the compliance of the path in m/N at a rising force f and the
// force at which it changes.
func (p *Path) rise(f float64) (c, next float64) {
	next = math.Inf(1)
	for e := range p.walk {
		ce, ne := p.riseOf(e, f)
		c, next = c+ce, min(next, ne)
	}
	return c, next
}

func (p *Path) riseOf(e int, f float64) (c, next float64) {
	el, w := &p.elements[e], &p.walk[e]
	switch {
	case w.at < 0:
		return 0, el.starts
	case f < w.force:
		return el.give, w.force
	}
	return el.slope(w.at)
}

// addRise adds the stretch of the path of the compliance c between two forces.
func (p *Path) addRise(x, f, next, c float64) float64 {
	end := x + float64(c*(next-f))
	p.note()
	for e := range p.elements {
		ce, _ := p.riseOf(e, f)
		p.share = append(p.share, ce/c)
	}
	p.spans = append(p.spans, span{x0: x, x1: end, f0: f, k: 1 / c, f1: next})
	return end
}

// climb moves the elements on to the next force.
func (p *Path) climb(f, next float64) {
	for e := range p.walk {
		el, w := &p.elements[e], &p.walk[e]
		if w.at < 0 {
			continue
		}
		c, to := p.riseOf(e, f)
		w.x += float64(c * (next - f))
		if f < w.force {
			continue
		}
		w.force = next
		if next == to {
			w.at++
			w.x = el.points[w.at].Extension
			if el.plateau && w.at+1 == len(el.points) {
				p.exhaust(el.part)
			}
		}
	}
}

// addWork adds up the work done on each element. At a fall of the force within
// no time, the element that let go takes what the others give back.
func (p *Path) addWork() {
	n := len(p.elements)
	p.work = p.work[:0]
	for i := range p.spans {
		s := &p.spans[i]
		for e := range n {
			if i == 0 {
				p.work = append(p.work, 0)
				continue
			}
			q := &p.spans[i-1]
			dx := q.x1 - q.x0
			done := p.share[(i-1)*n+e] * float64(dx*(q.f0+q.f1)) / 2
			p.work = append(p.work, p.work[(i-1)*n+e]+done)
		}
		if i > 0 && s.f0 < p.spans[i-1].f1 {
			p.passOn(i)
		}
	}
}

// passOn moves the energy that a fall of the force before span i sets free to
// the elements whose extension grew in it.
func (p *Path) passOn(i int) {
	n, high, low := len(p.elements), p.spans[i-1].f1, p.spans[i].f0
	var free, grown float64
	for e := range n {
		el := &p.elements[e]
		set := el.recoverable(high) - el.recoverable(low)
		p.work[i*n+e] -= set
		free += set
		grown += max(0, p.grown(i, e))
	}
	for e := range n {
		if g := p.grown(i, e); g > 0 {
			p.work[i*n+e] += free * g / grown
		}
	}
}

// grown returns by how much the element e has grown between spans i-1 and i.
func (p *Path) grown(i, e int) float64 {
	n, q := len(p.elements), &p.spans[i-1]
	return p.ext[i*n+e] - (p.ext[(i-1)*n+e] + float64(p.share[(i-1)*n+e]*(q.x1-q.x0)))
}
