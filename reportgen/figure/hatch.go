package figure

import (
	"math"
	"slices"
)

// Hatching is a pattern of parallel lines over a region.
type Hatching uint8

const (
	Rising  Hatching = iota // lines that rise to the right
	Falling                 // lines that fall to the right, closer than Rising
	Crossed                 // both
)

// directions returns the directions of the lines and their distance, mm.
func (h Hatching) directions() (list []direction, spacing float64) {
	half := math.Sqrt2 / 2
	rising, falling := direction{half, -half}, direction{half, half}
	switch h {
	case Rising:
		return []direction{rising}, 3.2
	case Falling:
		return []direction{falling}, 2.2
	}
	return []direction{rising, falling}, 3.2
}

type direction struct{ x, y float64 }

// hatchLines returns the lines of a hatching over the polygon region, as far as
// they lie in area. The polygon is closed by its first corner and may be
// hollow: what is within by the rule of odd crossings is hatched. The lines of
// all hatchings of a scene lie on one grid, so that regions that touch look
// like one.
func hatchLines(area Box, region []Point, h Hatching) [][2]Point {
	var lines [][2]Point
	directions, spacing := h.directions()
	for _, d := range directions {
		lines = append(lines, hatchOne(area, region, d, spacing)...)
	}
	return lines
}

// hatchOne returns the lines of one direction d. A point p lies at the height
// n.p across the lines and at d.p along them, n the normal of d.
func hatchOne(area Box, region []Point, d direction, spacing float64) [][2]Point {
	corners := []Point{{area.Left, area.Top}, {area.Right, area.Top}, {area.Left, area.Bottom}, {area.Right, area.Bottom}}
	low, high := heights(region, d)
	least, most := heights(corners, d)
	first, last := math.Ceil(max(low, least)/spacing), math.Floor(min(high, most)/spacing)
	var lines [][2]Point
	for i := first; i <= last; i++ {
		at := float64(i * spacing)
		cuts := crossings(region, d, at)
		for k := 0; k+1 < len(cuts); k += 2 {
			if a, b, some := clip(area, place(d, cuts[k], at), place(d, cuts[k+1], at)); some {
				lines = append(lines, [2]Point{a, b})
			}
		}
	}
	return lines
}

// heights returns the least and the greatest height of points across lines of
// direction d.
func heights(points []Point, d direction) (low, high float64) {
	low, high = math.Inf(1), math.Inf(-1)
	for _, p := range points {
		across := dot(p, direction{-d.y, d.x})
		low, high = min(low, across), max(high, across)
	}
	return low, high
}

// crossings returns where the line at height at cuts the edges of region,
// measured along it, in order. A corner on the line counts as above it.
func crossings(region []Point, d direction, at float64) []float64 {
	n := direction{-d.y, d.x}
	var cuts []float64
	for i, p := range region {
		q := region[(i+1)%len(region)]
		hp, hq := dot(p, n)-at, dot(q, n)-at
		if (hp < 0) == (hq < 0) {
			continue
		}
		cuts = append(cuts, dot(along(p, q, hp/(hp-hq)), d))
	}
	slices.Sort(cuts)
	return cuts
}

func dot(p Point, d direction) float64 { return float64(p.X*d.x) + float64(p.Y*d.y) }

// place returns the point at distance s along direction d and height at across it.
func place(d direction, s, at float64) Point {
	return Point{float64(s*d.x) - float64(at*d.y), float64(s*d.y) + float64(at*d.x)}
}

// inside reports whether p is within region by the rule of odd crossings.
func inside(region []Point, p Point) bool {
	within := false
	for i, a := range region {
		b := region[(i+1)%len(region)]
		if (a.Y > p.Y) == (b.Y > p.Y) {
			continue
		}
		if p.X < along(a, b, (p.Y-a.Y)/(b.Y-a.Y)).X {
			within = !within
		}
	}
	return within
}

// toEdge returns the distance of p from the nearest edge of region.
func toEdge(region []Point, p Point) float64 {
	least := math.Inf(1)
	for i, a := range region {
		least = min(least, toSegment(p, a, region[(i+1)%len(region)]))
	}
	return least
}

// touches reports whether region has a point within box.
func touches(region []Point, box Box) bool {
	for i, a := range region {
		if crosses(box, a, region[(i+1)%len(region)]) {
			return true
		}
	}
	return inside(region, Point{box.Left, box.Top})
}
