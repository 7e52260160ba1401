package study

import (
	"math"
	"slices"
)

// A Boundary is a line between zones of one limit, as points across and up
// counted in steps: 1.5 lies half way between the values 1 and 2 of an axis.
type Boundary struct {
	Points [][2]float64
	Closed bool // the last point is the first
}

// Boundaries returns the lines between the zones of a limit, for figures, with
// as few points as keep them within two steps of where the zones change. Edges
// gives exact places.
func (e *Envelope) Boundaries(limit int) []Boundary {
	b := borders{Envelope: e, limit: limit, next: map[int][]int{}, ends: map[int]bool{}}
	b.collect()
	var list []Boundary
	for _, path := range b.paths() {
		points := make([][2]float64, len(path))
		for i, node := range path {
			points[i] = b.place(node)
		}
		list = append(list, Boundary{thinned(points, thinning), path[0] == path[len(path)-1]})
	}
	return list
}

// thinning is how far, in steps, a line may pass from the middles of the edges
// it stands for: more than the half step of the staircase they form.
const thinning = 1

// borders joins the middles of the edges between zones within each cell. A
// node is a point on the grid of half steps, by its number there.
type borders struct {
	*Envelope
	limit int
	nodes []int         // in the order found
	next  map[int][]int // neighbours of each node, as long as they are not walked
	ends  map[int]bool  // nodes at which lines end or branch
}

func (b *borders) place(node int) [2]float64 {
	width := 2*len(b.Across.Values) - 1
	return [2]float64{float64(node%width) / 2, float64(node/width) / 2}
}

// collect joins the borders of every cell that has some: two with each other,
// more with the middle of the cell.
func (b *borders) collect() {
	n, m := len(b.Across.Values), len(b.Up.Values)
	width := 2*n - 1
	for j := range m - 1 {
		for i := range n - 1 {
			z := [4]Zone{b.Zone(b.limit, i, j), b.Zone(b.limit, i+1, j), b.Zone(b.limit, i+1, j+1), b.Zone(b.limit, i, j+1)}
			middle := (2*j+1)*width + 2*i + 1
			var ends []int
			for side, node := range [4]int{middle - width, middle + 1, middle + width, middle - 1} {
				if z[side] != z[(side+1)%4] {
					ends = append(ends, node)
				}
			}
			if len(ends) == 2 {
				b.join(ends[0], ends[1])
				continue
			}
			for _, node := range ends {
				b.join(node, middle)
			}
		}
	}
}

func (b *borders) join(p, q int) {
	for _, n := range [2]int{p, q} {
		if len(b.next[n]) == 0 {
			b.nodes = append(b.nodes, n)
		}
	}
	b.next[p] = append(b.next[p], q)
	b.next[q] = append(b.next[q], p)
}

// paths takes the joints apart into lines: first those that end somewhere or
// branch, then closed ones.
func (b *borders) paths() [][]int {
	for _, n := range b.nodes {
		b.ends[n] = len(b.next[n]) != 2
	}
	var paths [][]int
	for _, closed := range []bool{false, true} {
		for _, n := range b.nodes {
			for b.ends[n] != closed && len(b.next[n]) > 0 {
				paths = append(paths, b.walk(n))
			}
		}
	}
	return paths
}

// walk follows a line from n to where it ends or branches, or back to n, and
// takes it away.
func (b *borders) walk(n int) []int {
	path := []int{n}
	for {
		to := b.next[n][0]
		b.part(n, to)
		path = append(path, to)
		if b.ends[to] || len(b.next[to]) == 0 {
			return path
		}
		n = to
	}
}

func (b *borders) part(p, q int) {
	b.next[p] = without(b.next[p], q)
	b.next[q] = without(b.next[q], p)
}

func without(list []int, x int) []int {
	i := slices.Index(list, x)
	return slices.Delete(list, i, i+1)
}

// thinned drops points of a line that lie within a distance of what is left
// (Douglas and Peucker, 1973).
func thinned(points [][2]float64, within float64) [][2]float64 {
	far, at := 0.0, 0
	a, b := points[0], points[len(points)-1]
	for i := 1; i < len(points)-1; i++ {
		if d := distance(points[i], a, b); d > far {
			far, at = d, i
		}
	}
	if far <= within {
		return [][2]float64{a, b}
	}
	left := thinned(points[:at+1], within)
	return append(left[:len(left)-1], thinned(points[at:], within)...)
}

// distance is that of p from the piece from a to b.
func distance(p, a, b [2]float64) float64 {
	dx, dy := b[0]-a[0], b[1]-a[1]
	t := 0.0
	if s := dx*dx + dy*dy; s > 0 {
		t = min(max(((p[0]-a[0])*dx+(p[1]-a[1])*dy)/s, 0), 1)
	}
	return math.Hypot(p[0]-(a[0]+t*dx), p[1]-(a[1]+t*dy))
}
