package arrest

import (
	"math"

	"arrestcheck/arrest/quantity"
)

// shapeSlack is how far, relative, a distance may lie off the line of an
// assumed shape before the entries contradict it: entries are read to about
// that. The same figure decides when two routes agree closely (M-04).
const shapeSlack = 0.005

// assumedShape puts the spans of the assumed shape right where both distance
// and time are given: they are worked out from each of the two and the wider
// span is kept, unless the entries contradict the shape: then there is none.
func (ev *evaluation) assumedShape() {
	c := &ev.job.Point
	if c.Pulse == NoPulse || c.Distance <= 0 || c.Time <= 0 {
		return
	}
	var shapes []int
	for _, i := range ev.spans.live {
		if outputs[i].evidence == Shape {
			shapes = append(shapes, i)
			ev.spans.of[i].forget()
		}
	}
	least, greatest := ev.shapeDistances()
	if greatest*(1+shapeSlack) < ev.lo.Distance || least*(1-shapeSlack) > ev.hi.Distance {
		ev.tell(ShapeContradicted, Text(c.Pulse.String()), length(least), length(greatest), length(ev.lo.Distance), length(ev.hi.Distance))
		return
	}
	var p Point
	for at := range ev.spans.all {
		for _, c := range [...]Case{withoutTime(at), withoutDistance(at)} {
			At(&c, &p)
			ev.spans.take(&p, ev.spans.add(c), shapes)
		}
	}
	ev.written.Assumed = noShape
}

func withoutTime(c Case) Case     { c.Time = 0; return c }
func withoutDistance(c Case) Case { c.Distance = 0; return c }

// shapeDistances returns the least and greatest stopping distance the assumed
// shape asks for over the bands of all else. It grows with every input.
func (ev *evaluation) shapeDistances() (least, greatest float64) {
	least, greatest = math.Inf(1), math.Inf(-1)
	var p Point
	for c := range ev.spans.all {
		At(&c, &p)
		least, greatest = min(least, p.Assumed.Distance), max(greatest, p.Assumed.Distance)
	}
	return least, greatest
}

func length(x float64) Arg { return Figure(quantity.Length, x, quantity.Nearest) }
