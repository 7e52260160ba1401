package reportgen

import "arrestcheck/arrest/study"

// A grid is the zones of one limit, point by point.
type grid struct {
	across, up int
	zones      []study.Zone
}

func gridOf(e *study.Envelope, limit int) grid {
	g := grid{across: len(e.Across.Values), up: len(e.Up.Values)}
	g.zones = make([]study.Zone, 0, g.across*g.up)
	for j := range g.up {
		for _, r := range e.Runs(limit, j) {
			for range r.To - r.From + 1 {
				g.zones = append(g.zones, r.Zone)
			}
		}
	}
	return g
}

// A gridPart is a connected part of one zone. Its ring runs along its outer edge
// and, over bridges that cancel, around its holes; places are counted in steps,
// and an edge lies half way between two points.
type gridPart struct {
	zone   study.Zone
	points int
	ring   [][2]float64
}

// parts takes the grid apart, from the lower left.
func (g *grid) parts() []gridPart {
	owner := make([]int32, len(g.zones)) // number of the part, from 1
	var parts []gridPart
	for start := range g.zones {
		if owner[start] != 0 {
			continue
		}
		number := int32(len(parts) + 1)
		points := g.flood(start, number, owner)
		parts = append(parts, gridPart{g.zones[start], points, g.ring(number, owner)})
	}
	return parts
}

// flood gives all points that hang together with start by sides their number.
func (g *grid) flood(start int, number int32, owner []int32) (points int) {
	stack := []int{start}
	owner[start] = number
	for len(stack) > 0 {
		p := stack[len(stack)-1]
		stack = stack[:len(stack)-1]
		points++
		for side := range 4 {
			if q, ok := g.beside(p, side); ok && owner[q] == 0 && g.zones[q] == g.zones[start] {
				owner[q] = number
				stack = append(stack, q)
			}
		}
	}
	return points
}

// The sides of a point, anticlockwise from below, and the step across and up.
var sideSteps = [4][2]int{{0, -1}, {1, 0}, {0, 1}, {-1, 0}}

// beside is the point on a side of another.
func (g *grid) beside(p, side int) (int, bool) {
	i, j := p%g.across+sideSteps[side][0], p/g.across+sideSteps[side][1]
	if i < 0 || j < 0 || i >= g.across || j >= g.up {
		return 0, false
	}
	return j*g.across + i, true
}

// ring joins the edges of a part: each point is a square, and its sides towards
// other parts are walked with the part on the left.
func (g *grid) ring(number int32, owner []int32) [][2]float64 {
	wide := g.across + 1
	next := map[int][]int{} // corner to corner
	var corners []int
	for p, of := range owner {
		if of != number {
			continue
		}
		lower := p/g.across*wide + p%g.across
		square := [4]int{lower, lower + 1, lower + 1 + wide, lower + wide}
		for side := range 4 {
			if q, ok := g.beside(p, side); ok && owner[q] == number {
				continue
			}
			from, to := square[side], square[(side+1)%4]
			next[from] = append(next[from], to)
			corners = append(corners, from)
		}
	}
	var ring [][2]float64
	for _, c := range corners {
		if len(next[c]) == 0 {
			continue
		}
		loop := g.walk(c, next)
		ring = append(ring, loop...)
		ring = append(ring, ring[0]) // back over the bridge
	}
	return ring
}

// walk follows edges from a corner back to it, corners between straight edges
// left out, and takes them away.
func (g *grid) walk(start int, next map[int][]int) [][2]float64 {
	wide := g.across + 1
	loop := [][2]float64{g.place(start)}
	at, step := start, 0
	for {
		to := next[at][0]
		for k, c := range next[at] {
			if turnsLeft(step, c-at, wide) { // keeps parts apart that touch at a corner
				to = c
				next[at][0], next[at][k] = next[at][k], next[at][0]
				break
			}
		}
		next[at] = next[at][1:]
		if step != 0 && to-at != step {
			loop = append(loop, g.place(at))
		}
		step, at = to-at, to
		if at == start {
			return append(loop, g.place(start))
		}
	}
}

// turnsLeft reports whether one step along the lattice of corners turns left into
// the other.
func turnsLeft(step, to, wide int) bool {
	switch step {
	case 1:
		return to == wide
	case wide:
		return to == -1
	case -1:
		return to == -wide
	case -wide:
		return to == 1
	}
	return false
}

// place is where a corner lies, counted in steps; the outermost lie on the ends.
func (g *grid) place(corner int) [2]float64 {
	wide := g.across + 1
	return [2]float64{
		min(max(float64(corner%wide)-0.5, 0), float64(g.across-1)),
		min(max(float64(corner/wide)-0.5, 0), float64(g.up-1)),
	}
}
