package connector

import (
	"errors"
	"fmt"
	"math"
)

// MaxParts is the greatest number of parts of one path.
const MaxParts = 64

// A Path is a row of parts from the anchor to the body. Set fills it; Run and
// Integrate only read it.
type Path struct {
	parts    []Part
	elements []element
	slack    float64 // m
	viscous  float64 // N s/m

	// The loading curve, straight from span to span. ext, share and work have
	// one figure for each element and span.
	spans []span
	ext   []float64 // extension in m of the element at the start of the span
	share []float64 // its share of the stretch within the span
	work  []float64 // work in J done on the element up to the start of the span
	rigid bool      // nothing gives way beyond the last span

	// The way back: the compliance of the path between forces.
	back []step

	walk []walker // state of the elements while the loading curve is added up
}

// A span is one straight piece of the loading curve.
type span struct {
	x0, x1   float64 // extensions in m; x1 is +Inf in a last span that never ends
	f0, k    float64 // force in N at x0, stiffness in N/m
	f1       float64 // force in N at x1
	exhausts uint64  // the parts whose travel is used up at x1
}

// A step is one range of forces of the way back.
type step struct {
	from       float64 // force in N at the lower end
	compliance float64 // m/N
}

var (
	errNoParts   = errors.New("connector: a path needs at least one part")
	errManyParts = errors.New("connector: a path has at most 64 parts")
)

// Set makes the path of the parts, from the anchor to the body, and works out
// its loading curve: at equal force the extensions of the parts add. Where two
// parts travel under the same force, the one nearer to the anchor goes first.
//
// Preconditions, each with an error that names the part by its place: no figure
// is negative or NaN; only a travel and an unloading stiffness may be infinite;
// loading points rise; an unloading stiffness is not below the steepest stretch
// of its loading curve.
//
// The path keeps the parts and their loading points; it allocates only while it
// grows and for loading points that begin with slack.
func (p *Path) Set(parts ...Part) error {
	switch {
	case len(parts) == 0:
		return errNoParts
	case len(parts) > MaxParts:
		return errManyParts
	}
	for i := range parts {
		if err := parts[i].check(); err != nil {
			return fmt.Errorf("connector: part %d (%s): %w", i+1, parts[i].Kind, err)
		}
	}
	p.parts = append(p.parts[:0], parts...)
	p.split()
	p.addBack()
	p.addSpans()
	p.addWork()
	return nil
}

// Parts returns the parts of the path. They must not be changed.
func (p *Path) Parts() []Part { return p.parts }

// Slack returns the travel in m before the first pull.
func (p *Path) Slack() float64 { return p.slack }

// Viscous returns the coefficient in N s/m of the dashpot beside the path.
func (p *Path) Viscous() float64 { return p.viscous }

// Force returns the force in N of the resting path at the extension x while the
// greatest extension so far is reach, both in m from the first pull. At x above
// reach it is the loading curve. Where the loading curve jumps it is the force
// that is left by the lesser extension. Beyond the end of a path that is rigid
// there it is +Inf.
func (p *Path) Force(x, reach float64) float64 {
	if x <= 0 {
		return 0
	}
	top := p.topAt(max(x, reach))
	if x >= top.x || math.IsInf(top.f, 1) {
		return top.f
	}
	return max(0, p.lineAt(x, top).at(x))
}

// split sets the elements, the slack and the dashpot.
func (p *Path) split() {
	p.slack, p.viscous = 0, 0
	p.elements = p.elements[:0]
	for i := range p.parts {
		part := &p.parts[i]
		p.slack += part.Slack
		p.viscous += part.Viscous
		if part.Points != nil {
			p.slack += leadingSlack(part.Points)
		}
		if !p.add().stretch(i, part) {
			p.drop()
		}
		if !p.add().hold(i, part) {
			p.drop()
		}
	}
	for i := range p.elements {
		// Corners held in the element itself have moved with it.
		if el := &p.elements[i]; el.measured == math.Inf(1) {
			el.points = el.small[:len(el.points)]
		}
	}
}

// add returns a new element at the end of the row, drop takes it away again.
func (p *Path) add() *element {
	p.elements = append(p.elements, element{})
	return &p.elements[len(p.elements)-1]
}

func (p *Path) drop() { p.elements = p.elements[:len(p.elements)-1] }

// addBack adds up the compliance of the way back. It changes only at the
// corners of curves that are returned along.
func (p *Path) addBack() {
	p.back = append(p.back[:0], step{})
	for i := range p.elements {
		el := &p.elements[i]
		if !el.reversing {
			continue
		}
		for _, q := range el.points[1:] {
			p.addStep(q.Force)
		}
	}
	for j := range p.back {
		for i := range p.elements {
			el := &p.elements[i]
			c := el.give
			if el.reversing {
				c, _ = el.slope(el.corner(p.back[j].from))
			}
			p.back[j].compliance += c
		}
	}
}

// addStep keeps the forces in order and each of them once.
func (p *Path) addStep(f float64) {
	i := len(p.back)
	for p.back[i-1].from > f {
		i--
	}
	if p.back[i-1].from == f {
		return
	}
	p.back = append(p.back, step{})
	copy(p.back[i+1:], p.back[i:])
	p.back[i] = step{from: f}
}

// stepBelow returns the range of the way back that ends at or contains f, seen
// from above.
func (p *Path) stepBelow(f float64) int {
	j := len(p.back) - 1
	for j > 0 && p.back[j].from >= f {
		j--
	}
	return j
}

// A top is where the way back begins: the reach of the path.
type top struct {
	x, f float64 // extension in m and force in N
	span int     // the span it lies on
}

// topAt returns the top at the reach x, found by search.
func (p *Path) topAt(x float64) top {
	for i := range p.spans {
		if s := &p.spans[i]; x <= s.x1 {
			return top{x, s.f0 + float64(s.k*(x-s.x0)), i}
		}
	}
	f := math.Inf(1)
	if len(p.spans) == 0 && x == 0 {
		f = 0
	}
	return top{x, f, max(0, len(p.spans)-1)}
}

// A line is one straight piece of the way back.
type line struct {
	x0, f0 float64 // lower end
	x1, f1 float64 // upper end
	k      float64 // N/m; +Inf where nothing is given back
	step   int
}

// at returns the force at the extension x.
func (l line) at(x float64) float64 { return l.f1 - float64(l.k*(l.x1-x)) }

// lineFrom returns the piece of the way back that begins downwards at (x, f).
func (p *Path) lineFrom(x, f float64) line {
	j := p.stepBelow(f)
	b := p.back[j]
	return line{x0: x - float64(b.compliance*(f-b.from)), f0: b.from, x1: x, f1: f, k: 1 / b.compliance, step: j}
}

// lineAbove returns the piece of the way back above l, which ends at the top at
// the latest.
func (p *Path) lineAbove(l line, t top) line {
	j := l.step + 1
	b := p.back[j]
	if j == len(p.back)-1 || p.back[j+1].from >= t.f {
		return line{x0: l.x1, f0: l.f1, x1: t.x, f1: t.f, k: 1 / b.compliance, step: j}
	}
	f1 := p.back[j+1].from
	return line{x0: l.x1, f0: l.f1, x1: l.x1 + float64(b.compliance*(f1-l.f1)), f1: f1, k: 1 / b.compliance, step: j}
}

// lineAt returns the piece of the way back from the top on which x lies.
func (p *Path) lineAt(x float64, t top) line {
	l := p.lineFrom(t.x, t.f)
	for x < l.x0 && l.f0 > 0 {
		l = p.lineFrom(l.x0, l.f0)
	}
	return l
}

// extension returns the extension in m of the element e at the force f of the
// way back from the top.
func (p *Path) extension(e int, t top, f float64) float64 {
	if len(p.spans) == 0 {
		return 0
	}
	i := t.span*len(p.elements) + e
	x := p.ext[i] + float64(p.share[i]*(t.x-p.spans[t.span].x0))
	return x - p.elements[e].released(t.f, f)
}
