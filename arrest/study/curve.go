package study

import (
	"cmp"
	"context"
	"math"
	"slices"
)

// A curve is one figure along one input: known at points, and workable between
// them.
type curve struct {
	xs, ys []float64 // rising xs; NaN in ys where the figure is not known
	at     func(x float64) float64
	levels []level
}

// A level is a figure that a curve is held against, after the curve is widened
// by the allowance for the error of a model.
type level struct {
	figure  float64
	atLeast bool    // beyond is below
	widen   float64 // share that is added
}

// compared is the figure that is held against the level.
func (l *level) compared(y float64) float64 {
	if l.widen == 0 {
		return y
	}
	return y + float64(l.widen*y)
}

func (l *level) beyond(y float64) bool {
	if y = l.compared(y); l.atLeast {
		return y < l.figure
	}
	return y > l.figure
}

// A turn is a place where a curve has a greatest or a least figure between its
// ends.
type turn struct {
	x, y     float64
	greatest bool
}

// A crossing is a place where a curve passes a level. x is the last float64
// at which it is not beyond; y is what is compared there.
type crossing struct {
	level int
	x, y  float64
	up    bool // not beyond for greater x
}

// noise is the relative change between two neighbouring points that says
// nothing about where a curve goes: about a thousand roundings.
const noise = 1e-13

// heading says where a curve goes from y0 to y1: 1 up, -1 down, 0 unknown or
// level.
func heading(y0, y1 float64) int {
	d := y1 - y0
	switch limit := noise * math.Abs(y0); {
	case d > limit:
		return 1
	case d < -limit:
		return -1
	}
	return 0
}

// A survey is what the intervals between neighbouring points show. Interval i
// lies between the points i and i+1.
type survey struct {
	turns  [][2]int // the last interval of one heading and the first of the other
	gaps   []int    // known at one end only
	passes []int    // a level lies between the ends

	first, firstAt int  // heading seen first, before any gap; 0: none
	last, lastAt   int  // heading seen last, since any gap; 0: none
	gap            bool // something is unknown
}

// survey looks at the intervals [from, to).
func (c *curve) survey(from, to int) survey {
	var s survey
	for i := from; i < to; i++ {
		y0, y1 := c.ys[i], c.ys[i+1]
		if y0 != y0 || y1 != y1 {
			if y0 == y0 || y1 == y1 {
				s.gaps = append(s.gaps, i)
			}
			s.gap, s.last = true, 0
			continue
		}
		s.head(heading(y0, y1), i)
		for k := range c.levels {
			if l := &c.levels[k]; l.beyond(y0) != l.beyond(y1) {
				s.passes = append(s.passes, i)
				break
			}
		}
	}
	return s
}

func (s *survey) head(h, i int) {
	switch {
	case h == 0:
		return
	case s.last == -h:
		s.turns = append(s.turns, [2]int{s.lastAt, i})
	case s.last == 0 && !s.gap:
		s.first, s.firstAt = h, i
	}
	s.last, s.lastAt = h, i
}

// join adds what the next intervals show.
func (s *survey) join(next survey) {
	if next.first != 0 && s.last == -next.first {
		s.turns = append(s.turns, [2]int{s.lastAt, next.firstAt})
	}
	s.turns = append(s.turns, next.turns...)
	s.gaps = append(s.gaps, next.gaps...)
	s.passes = append(s.passes, next.passes...)
	if next.last != 0 || next.gap {
		s.last, s.lastAt = next.last, next.lastAt
	}
	s.gap = s.gap || next.gap
}

// surveyAll surveys a curve in blocks.
func (c *curve) surveyAll(ctx context.Context, workers int) (survey, error) {
	n := len(c.ys) - 1
	if n < 1 {
		return survey{}, nil
	}
	parts := make([]survey, (n+blockSize-1)/blockSize)
	err := blocks(ctx, n, blockSize, workers, func() func(int, int, int) {
		return func(block, from, to int) { parts[block] = c.survey(from, to) }
	})
	all := survey{}
	for _, p := range parts {
		all.join(p)
	}
	return all, err
}

// A knot is a point that was worked out between two points of a curve.
type knot struct {
	interval int
	x, y     float64
	turn     int // 1 greatest, -1 least, 0 none
}

// follow works out the turns and the crossings that a survey points to.
//
// Between neighbouring points a curve is taken to have at most one turn; in
// the first and the last interval of each known stretch, where no third point
// shows it, it is looked for among 16 parts.
func (c *curve) follow(s survey) ([]turn, []crossing) {
	if len(c.xs) < 2 {
		return nil, nil
	}
	return c.followFrom(s, c.edges(s.gaps))
}

// followFrom is follow with the edges of the known stretches already found.
func (c *curve) followFrom(s survey, edges []knot) ([]turn, []crossing) {
	knots := append(slices.Clone(edges), c.hidden(s.gaps, edges)...)
	for _, t := range s.turns {
		knots = append(knots, c.knotIn(c.xs[t[0]:t[1]+2], heading(c.ys[t[0]], c.ys[t[0]+1])))
	}
	knots = settle(knots)
	var turns []turn
	visit := slices.Clone(s.passes)
	for _, k := range knots {
		if k.turn != 0 {
			turns = append(turns, turn{k.x, k.y, k.turn > 0})
		}
		visit = append(visit, k.interval)
	}
	slices.Sort(visit)
	var found []crossing
	for _, i := range slices.Compact(visit) {
		found = c.crossings(found, i, knots)
	}
	return turns, found
}

// settle puts knots in order. Turns of one kind that follow each other are one
// turn found twice: the farther one stays.
func settle(knots []knot) []knot {
	slices.SortFunc(knots, func(a, b knot) int { return cmp.Compare(a.x, b.x) })
	var kept []knot
	for _, k := range knots {
		n := len(kept) - 1
		switch {
		case n < 0 || kept[n].turn != k.turn || k.turn == 0:
			kept = append(kept, k)
		case float64(k.turn)*k.y > float64(k.turn)*kept[n].y:
			kept[n] = k
		}
	}
	return kept
}

// edges finds, in each interval known at one end only, the last float64 up to
// which the curve is known.
func (c *curve) edges(gaps []int) []knot {
	var knots []knot
	for _, i := range gaps {
		a, b := c.xs[i], c.xs[i+1]
		if math.IsNaN(c.ys[i]) {
			a, b = b, a
		}
		x, y := change(c.at, math.IsNaN, math.NaN(), a, b)
		knots = append(knots, knot{interval: i, x: x, y: y})
	}
	return knots
}

// knotIn finds the turn of the given sign between the first and the last of
// some rising figures.
func (c *curve) knotIn(xs []float64, sign int) knot {
	x, y := turning(c.at, xs[0], xs[len(xs)-1], float64(sign))
	i, found := slices.BinarySearch(c.xs, x)
	if !found || i == len(c.xs)-1 {
		i--
	}
	return knot{interval: i, x: x, y: y, turn: sign}
}

// hidden looks for turns in the first and the last interval of each known
// stretch, which the edges found at gaps end.
func (c *curve) hidden(gaps []int, edges []knot) []knot {
	last := len(c.xs) - 2
	ends := []int{0, last}
	for _, g := range gaps {
		ends = append(ends, g-1, g, g+1)
	}
	slices.Sort(ends)
	var knots []knot
	for _, i := range slices.Compact(ends) {
		if 0 <= i && i <= last {
			knots = append(knots, c.hiddenIn(i, edges)...)
		}
	}
	return knots
}

// hiddenIn looks at one interval in parts, up to the edge within it if there is
// one, and at the interval before or after that edge's stretch as a whole.
func (c *curve) hiddenIn(i int, edges []knot) []knot {
	const parts = 16
	a, b := c.xs[i], c.xs[i+1]
	fine := curve{at: c.at}
	add := func(x float64) { fine.xs, fine.ys = append(fine.xs, x), append(fine.ys, c.at(x)) }
	left, right := math.IsNaN(c.ys[i]), math.IsNaN(c.ys[i+1])
	if left || right {
		k := slices.IndexFunc(edges, func(k knot) bool { return k.interval == i })
		if k < 0 {
			return nil
		}
		if left {
			a = edges[k].x
		} else {
			b = edges[k].x
			if i > 0 {
				add(c.xs[i-1])
			}
		}
	}
	for n := range parts {
		add(a + (b-a)*(float64(n)/parts))
	}
	add(b)
	if left && i+2 < len(c.xs) {
		add(c.xs[i+2])
	}
	var knots []knot
	for _, t := range fine.survey(0, len(fine.xs)-1).turns {
		knots = append(knots, c.knotIn(fine.xs[t[0]:t[1]+2], heading(fine.ys[t[0]], fine.ys[t[0]+1])))
	}
	return knots
}

// crossings adds the crossings of interval i, in which the knots lie that say
// so.
func (c *curve) crossings(found []crossing, i int, knots []knot) []crossing {
	x0, y0 := c.xs[i], c.ys[i]
	step := func(x1, y1 float64) {
		if x1 != x0 && !math.IsNaN(y0) && !math.IsNaN(y1) {
			found = c.between(found, x0, y0, x1, y1)
		}
		x0, y0 = x1, y1
	}
	for _, k := range knots[lowest(knots, i):] {
		if k.interval > i {
			break
		}
		step(k.x, k.y)
	}
	step(c.xs[i+1], c.ys[i+1])
	return found
}

// lowest returns the index of the first knot not before interval i.
func lowest(knots []knot, i int) int {
	n, _ := slices.BinarySearchFunc(knots, i, func(k knot, i int) int { return cmp.Compare(k.interval, i) })
	return n
}

func (c *curve) between(found []crossing, x0, y0, x1, y1 float64) []crossing {
	first := len(found)
	for n := range c.levels {
		l := &c.levels[n]
		if l.beyond(y0) == l.beyond(y1) {
			continue
		}
		a, b := x0, x1
		if l.beyond(y0) {
			a, b = x1, x0
		}
		x, y := change(c.at, l.beyond, l.figure/(1+l.widen), a, b)
		found = append(found, crossing{level: n, x: x, y: l.compared(y), up: a == x1})
	}
	slices.SortFunc(found[first:], func(a, b crossing) int { return cmp.Compare(a.x, b.x) })
	return found
}

// A stretch is a part of a curve that is known throughout, as far as its points
// show.
type stretch struct{ x0, y0, x1, y1 float64 }

// stretches returns the known parts, out to the edges found at gaps.
func (c *curve) stretches(edges []knot) []stretch {
	var list []stretch
	edge := func(interval int, x, y float64) (float64, float64) {
		for _, k := range edges {
			if k.interval == interval {
				return k.x, k.y
			}
		}
		return x, y
	}
	for i := 0; i < len(c.xs); i++ {
		if math.IsNaN(c.ys[i]) {
			continue
		}
		var s stretch
		s.x0, s.y0 = edge(i-1, c.xs[i], c.ys[i])
		for i+1 < len(c.xs) && !math.IsNaN(c.ys[i+1]) {
			i++
		}
		s.x1, s.y1 = edge(i, c.xs[i], c.ys[i])
		list = append(list, s)
	}
	return list
}
