package figure

import "slices"

// A Chain is a row of dimensions on one line: from the datum to the end of the
// first, from there to the end of the second, and so on. It stands upright, or
// level if Level is set. Its texts stand at its right, or below it; those that
// have no room beside their own part are moved along and joined to it by a
// line.
type Chain struct {
	Level bool
	At    float64 // x of an upright chain, y of a level one, mm
	Datum float64 // where the first part begins along it, mm
	Name  string  // of the datum; stands across it
	Parts []Dimension
	Far   bool // texts at the left, or above

	// Low and High bound the texts along the chain, mm. Equal: the scene.
	Low, High float64
}

// A Dimension is one part of a chain.
type Dimension struct {
	End  float64 // where it ends along the chain, mm
	Text string

	// Witness is where the line begins, across the chain, that leads to this
	// end, mm. 0 is none.
	Witness float64
}

const (
	chainTick   = 1.3 // half a tick, mm
	chainLeader = 4.0 // from the chain to a text that was moved, mm
)

// Chain adds a chain of dimensions. Parts of no length and ends that are not
// finite are refused by a panic: a caller knows its own lengths.
func (s *Scene) Chain(c Chain) {
	stops := []float64{c.Datum}
	for _, d := range c.Parts {
		if !finite(d.End) {
			panic("figure: a dimension without an end")
		}
		stops = append(stops, d.End)
	}
	s.Line(c.point(slices.Min(stops), 0), c.point(slices.Max(stops), 0), Pen{})
	for _, stop := range stops {
		s.Line(c.point(stop, 0), c.point(stop, chainTick), Pen{Weight: Medium})
		s.Line(c.point(stop, 0), c.point(stop, -chainTick), Pen{Weight: Medium})
	}
	for _, d := range c.Parts {
		if d.Witness != 0 {
			s.Line(c.point(d.End, 0), c.point(d.End, d.Witness-c.At), Pen{Dash: Dots})
		}
	}
	s.chainTexts(&c, stops)
	s.chainDatum(&c, !c.Level && c.Datum == slices.Min(stops))
}

// point returns the point at a place along the chain and a distance across it,
// to the right or downwards.
func (c *Chain) point(along, across float64) Point {
	if c.Level {
		return Point{along, c.At + across}
	}
	return Point{c.At + across, along}
}

// side is 1 where the texts stand at the right or below, else -1.
func (c *Chain) side() float64 {
	if c.Far {
		return -1
	}
	return 1
}

// chainDatum writes the name of the datum: above an upright chain that begins
// with it, else on the side where no dimensions are.
func (s *Scene) chainDatum(c *Chain, first bool) {
	at := c.point(c.Datum, -c.side()*chainTick)
	spots := Around(at, 0.4)
	if !c.Level {
		anchor := End
		if c.Far {
			anchor = Start
		}
		on := c.point(c.Datum, 0)
		spots = append([]Spot{{At: at, Anchor: anchor}}, spots...)
		if first {
			spots = append([]Spot{{At: c.point(c.Datum, -c.side()*3), Anchor: Start + End - anchor, Lift: Above, Gap: chainTick}}, spots...)
		}
		spots = append(spots, Spot{At: on, Anchor: Middle, Lift: Above, Lines: 1}, Spot{At: on, Anchor: Middle, Lift: Below, Lines: 1})
	}
	s.Text(Text{Text: c.Name, Rank: RankAxis, Spots: spots})
}

// chainTexts writes the dimensions, spread so that none overlap.
func (s *Scene) chainTexts(c *Chain, stops []float64) {
	low, high := c.Low, c.High
	if low == high {
		low, high = 0, s.Height
		if c.Level {
			high = s.Width
		}
	}
	wanted, size := make([]float64, len(c.Parts)), make([]float64, len(c.Parts))
	for i, d := range c.Parts {
		wanted[i] = (stops[i] + stops[i+1]) / 2
		size[i] = Normal.pitch() * 1.05
		if c.Level {
			size[i] = RoomFor(d.Text) + 2*cellWidth
		}
	}
	got := spread(wanted, size, low, high)
	moved := !slices.EqualFunc(got, wanted, func(a, b float64) bool { return a-b < 0.3 && b-a < 0.3 })
	for i, d := range c.Parts {
		s.chainText(c, d.Text, wanted[i], got[i], moved)
	}
}

// chainText writes one dimension at a place along the chain; where texts were
// moved, a line leads to its part at from.
func (s *Scene) chainText(c *Chain, text string, from, along float64, moved bool) {
	across := c.side() * chainTick
	if moved {
		across = c.side() * chainLeader
		s.Line(c.point(from, 0), c.point(along, across), Pen{})
	}
	at := c.point(along, across)
	spot := Spot{At: at, Anchor: Start}
	switch {
	case c.Level && c.Far:
		spot = Spot{At: at, Anchor: Middle, Lift: Above}
	case c.Level:
		spot = Spot{At: at, Anchor: Middle, Lift: Below}
	case c.Far:
		spot.Anchor = End
	}
	s.Text(Text{Text: text, Rank: RankAxis, Spots: []Spot{spot}})
}

// spread moves things of the given sizes along a line from low to high until
// none overlap, each as near to where it is wanted as the others let it. Where
// they have no room together they are packed from low upwards.
//
// It works like this: things in the order in which they are wanted form groups;
// a group that reaches into the one before it is joined to that, and stands
// where the mean of its members' wishes puts it.
func spread(wanted, size []float64, low, high float64) []float64 {
	order := make([]int, len(wanted))
	for i := range order {
		order[i] = i
	}
	slices.SortStableFunc(order, func(a, b int) int {
		switch {
		case wanted[a] < wanted[b]:
			return -1
		case wanted[a] > wanted[b]:
			return 1
		}
		return 0
	})
	var groups []group
	for k, i := range order {
		g := group{first: k, last: k, start: wanted[i] - size[i]/2, wish: wanted[i] - size[i]/2, length: size[i]}
		g.keep(low, high)
		for len(groups) > 0 && groups[len(groups)-1].end() > g.start {
			g = groups[len(groups)-1].joined(g)
			g.keep(low, high)
			groups = groups[:len(groups)-1]
		}
		groups = append(groups, g)
	}
	got := make([]float64, len(wanted))
	for _, g := range groups {
		at := g.start
		for _, i := range order[g.first : g.last+1] {
			got[i] = grain(at + size[i]/2)
			at += size[i]
		}
	}
	return got
}

// A group is a run of things that touch. wish is the sum of where its members
// would have it start.
type group struct {
	first, last         int
	start, wish, length float64
}

func (g group) end() float64 { return g.start + g.length }

// joined returns g with h behind it.
func (g group) joined(h group) group {
	n, m := float64(g.last-g.first+1), float64(h.last-h.first+1)
	g.wish += h.wish - float64(m*g.length)
	g.length += h.length
	g.last = h.last
	g.start = g.wish / (n + m)
	return g
}

// keep moves g into the room from low to high.
func (g *group) keep(low, high float64) {
	g.start = max(min(g.start, high-g.length), low)
}
