package arrest

import (
	"math"

	"arrestcheck/arrest/rig"
)

// An axis is one direction in which the entries of a layout are taken to their
// ends: an input alone, or several that act on every figure in the same sense
// and therefore go together.
type axis func(c *Case, high bool)

// cornerOf returns the point at one corner of the axes, of which bit i of its
// number says whether axis i is at its high end.
func cornerOf(base *Case, axes []axis, number int) Case {
	c := *base
	for i, to := range axes {
		to(&c, number>>i&1 == 1)
	}
	return c
}

// alone returns the axes of the free inputs that are not of the layout and that
// the test picks.
func (s *spans) alone(picks func(*Input) bool) []axis {
	var axes []axis
	for _, in := range s.free {
		if in.Role == OfLayout || in.Role == OfClearance || !picks(in) {
			continue
		}
		axes = append(axes, func(c *Case, high bool) {
			if high {
				in.Set(c, in.Band.High)
			} else {
				in.Set(c, in.Band.Low)
			}
		})
	}
	return axes
}

// A siting makes the axes of one position of a layout. lo and hi hold every
// figure at its ends.
type siting struct {
	plan   *LayoutPlan
	pos    *PlannedPosition
	lo, hi Case
	axes   []axis
	drawn  rig.Layout // memory to look at one point

	near, far Case // anchor and position nearest to each other in plan, and farthest apart
}

func newSiting(j *Job) *siting {
	g := &siting{plan: j.Point.Layout, pos: &j.Point.Layout.Positions[j.Point.Position]}
	g.lo, g.hi = ends(j)
	g.near, g.far = g.offsets()
	return g
}

// free reports whether the figure has two ends.
func (g *siting) free(figure int) bool {
	return figure != NoFigure && g.lo.Figures[figure] < g.hi.Figures[figure]
}

// together adds an axis along which the up figures rise and the down figures
// fall; none where all have one end.
func (g *siting) together(up, down []int) {
	some := false
	for _, list := range [...][]int{up, down} {
		for _, n := range list {
			some = some || g.free(n)
		}
	}
	if !some {
		return
	}
	lo, hi := &g.lo.Figures, &g.hi.Figures
	g.axes = append(g.axes, func(c *Case, high bool) {
		rising, falling := lo, hi
		if high {
			rising, falling = hi, lo
		}
		for _, n := range up {
			if n != NoFigure {
				c.Figures[n] = rising[n]
			}
		}
		for _, n := range down {
			if n != NoFigure {
				c.Figures[n] = falling[n]
			}
		}
	})
}

// madeOfParts reports whether a figure of the layout is that of parts of the
// path, or their sum: their inputs then write it as well.
func (j *Job) madeOfParts(figure int) bool {
	if figure == NoFigure {
		return false
	}
	for i := range j.Inputs {
		if in := &j.Inputs[i]; in.Role == OfPart && in.Set != nil {
			var c Case
			in.Set(&c, 1)
			if c.Figures[figure] != 0 {
				return true
			}
		}
	}
	return false
}

// geometry adds the axes that free fall, angles and swing hang on: the offset in
// plan, the heights, the length, the travel before locking. Every figure is
// monotone along each of them, but for those of a retractable (see kinks). What
// is alone has an axis of its own among the inputs.
func (g *siting) geometry(alone func(figure int) bool) {
	p := g.plan
	shared := func(figure int) int {
		if alone(figure) {
			return NoFigure
		}
		return figure
	}
	if p.Edge == rig.NoEdge {
		g.apart(g.pos.Along, g.pos.Out)
	} else { // along an edge and square to it are not one offset to a connector over it
		g.apart(g.pos.Along)
		g.apart(g.pos.Out, p.BehindEdge)
	}
	// The greater of the two rooms is lower with a higher anchor, and of a retractable
	// with a higher D-ring as well; else only their difference counts.
	if p.Edge == rig.NoEdge && p.Locking == NoFigure {
		g.together([]int{p.AnchorHeight}, []int{p.DRing})
	} else {
		g.together([]int{p.AnchorHeight}, nil)
		g.together([]int{p.DRing}, nil)
	}
	g.together([]int{shared(p.Length), p.Slack}, nil)
	g.together([]int{shared(p.Locking)}, nil)
}

// apart adds an axis from the least to the greatest offset in plan by the figures;
// none where all have one end.
func (g *siting) apart(figures ...int) {
	for _, n := range figures {
		if g.free(n) {
			g.axes = append(g.axes, func(c *Case, high bool) {
				from := &g.near
				if high {
					from = &g.far
				}
				for _, n := range figures {
					c.Figures[n] = from.Figures[n]
				}
			})
			return
		}
	}
}

// room adds the axes that only a clearance or an obstacle hangs on: all items
// and what lies below against each other, and how far bodies and boxes reach.
// The deceleration distance may be the stopping distance.
func (g *siting) room() {
	p := g.plan
	items, below := []int{p.Feet}, []int{}
	if p.Clearance != nil {
		for i := range p.Clearance.Items {
			items = append(items, p.Clearance.Items[i].Figure)
		}
	}
	wide, narrow := []int{p.HalfWidth}, []int{}
	for i := range p.Obstacles {
		o := &p.Obstacles[i]
		below = append(below, o.Below)
		wide = append(wide, o.AlongTo, o.OutTo, o.Height, o.StopOver)
		narrow = append(narrow, o.AlongFrom, o.OutFrom)
	}
	n := len(g.axes)
	g.together(items, below)
	g.together(wide, narrow)
	if p.Clearance == nil || p.Clearance.holds(rig.ItemDeceleration) || g.lo.Distance == g.hi.Distance {
		return
	}
	distance := func(c *Case, high bool) {
		c.Distance = g.lo.Distance
		if high {
			c.Distance = g.hi.Distance
		}
	}
	if n == len(g.axes) {
		g.axes = append(g.axes, distance)
		return
	}
	first := g.axes[n]
	g.axes[n] = func(c *Case, high bool) { first(c, high); distance(c, high) }
}

// offsets returns the points at which anchor and position are nearest to each
// other in plan and farthest apart, in both directions.
func (g *siting) offsets() (near, far Case) {
	near, far = g.lo, g.lo
	lo, hi := &g.lo.Figures, &g.hi.Figures
	along, out := g.pos.Along, g.pos.Out
	near.Figures[along] = min(max(0, lo[along]), hi[along])
	far.Figures[along] = lo[along]
	if math.Abs(hi[along]) > math.Abs(lo[along]) {
		far.Figures[along] = hi[along]
	}
	if g.plan.BehindEdge == NoFigure {
		near.Figures[out] = min(max(0, lo[out]), hi[out])
		far.Figures[out] = lo[out]
		if math.Abs(hi[out]) > math.Abs(lo[out]) {
			far.Figures[out] = hi[out]
		}
		return near, far
	}
	behind := g.plan.BehindEdge
	at := func(c *Case, y, b float64) { c.Figures[out], c.Figures[behind] = y, b }
	// Behind the edge a worker goes over it at the edge line itself.
	least, most := max(lo[out], 0), max(hi[out], 0)
	switch y := max(least, -hi[behind]); {
	case y <= min(most, -lo[behind]): // they can be at one place
		at(&near, min(y, hi[out]), -y)
	case least > -lo[behind]:
		at(&near, lo[out], lo[behind])
	default:
		at(&near, hi[out], hi[behind])
	}
	apart := func(y, b float64) float64 { return math.Abs(max(y, 0) + b) }
	at(&far, hi[out], hi[behind])
	if apart(lo[out], lo[behind]) > apart(hi[out], hi[behind]) {
		at(&far, lo[out], lo[behind])
	}
	return near, far
}

// kinks calls the function with the points beside a corner at which a figure has
// an end between corners: those of a retractable, and those of a connector that
// comes to an edge.
func (g *siting) kinks(corner *Case, yield func(*Case)) {
	if g.plan.Edge != rig.NoEdge {
		g.square(corner, yield)
		g.grazing(corner, yield)
	}
	if g.plan.Locking != NoFigure {
		g.lineEnds(corner, yield)
	}
}

// square calls the function with the other points square to the edge. To a
// connector over the edge place and anchor are two distances from it, each at its
// end, and an anchor straight above it may be the nearest.
func (g *siting) square(corner *Case, yield func(*Case)) {
	out, behind := g.pos.Out, g.plan.BehindEdge
	is := func(c *Case) bool {
		return corner.Figures[out] == c.Figures[out] && corner.Figures[behind] == c.Figures[behind]
	}
	if !g.free(behind) || !is(&g.near) {
		return
	}
	c := *corner
	lo, hi := &g.lo.Figures, &g.hi.Figures
	for _, y := range [...]float64{lo[out], hi[out]} {
		for _, b := range [...]float64{lo[behind], hi[behind], min(max(0, lo[behind]), hi[behind])} {
			c.Figures[out], c.Figures[behind] = y, b
			if !is(&c) {
				yield(&c)
			}
		}
	}
}

// grazing calls the function with the points on both sides of where, on the way
// from one corner to the next, the connector just comes to the edge: the swing
// turns about another point there, and its figures leap.
func (g *siting) grazing(corner *Case, yield func(*Case)) {
	over := func(c *Case) bool {
		g.plan.fill(c, &g.drawn)
		place := g.drawn.At(c.Position)
		return place.OverEdge
	}
	for _, to := range g.axes {
		low, high := *corner, *corner
		if to(&low, false); low != *corner {
			continue
		}
		to(&high, true)
		first := over(&low)
		if first == over(&high) {
			continue
		}
		var moved []int
		for i := range low.Figures {
			if low.Figures[i] != high.Figures[i] {
				moved = append(moved, i)
			}
		}
		a, b, m := low, high, low
		for range halvings {
			for _, i := range moved {
				m.Figures[i] = a.Figures[i] + (b.Figures[i]-a.Figures[i])/2
			}
			end := &b
			if over(&m) == first {
				end = &a
			}
			for _, i := range moved {
				end.Figures[i] = m.Figures[i]
			}
		}
		yield(&a)
		yield(&b)
	}
}

// halvings close in on a point of a band to about the last digit of a figure.
const halvings = 52

// lineEnds calls the function with the points beside a corner at which a figure of
// a retractable has an end: its line comes to its end on the way from the nearest
// to the farthest offset, where the free fall is greatest; or anchor and D-ring
// are at one height.
func (g *siting) lineEnds(corner *Case, yield func(*Case)) {
	p := g.plan
	lo, hi := &g.lo.Figures, &g.hi.Figures
	level := *corner
	z := min(max(lo[p.DRing], lo[p.AnchorHeight]), hi[p.AnchorHeight])
	level.Figures[p.AnchorHeight], level.Figures[p.DRing] = z, min(max(z, lo[p.DRing]), hi[p.DRing])
	if level != *corner {
		yield(&level)
	}
	near, far := &g.near, &g.far
	from := func(t float64) Case {
		c := *corner
		for _, n := range [...]int{g.pos.Along, g.pos.Out, p.BehindEdge} {
			if n != NoFigure {
				c.Figures[n] = near.Figures[n] + t*(far.Figures[n]-near.Figures[n])
			}
		}
		return c
	}
	left := func(t float64) float64 {
		c := from(t)
		p.fill(&c, &g.drawn)
		place := g.drawn.At(c.Position)
		return g.drawn.Length - g.drawn.Locking - place.Distance
	}
	if !(left(0) > 0 && left(1) < 0) {
		return
	}
	a, b := 0.0, 1.0
	for range halvings {
		if m := (a + b) / 2; left(m) > 0 {
			a = m
		} else {
			b = m
		}
	}
	c := from(b)
	yield(&c)
}
