package figure

import (
	"cmp"
	"slices"
)

// regions hatches regions and writes their words into them.
func (f *frame) regions(list []Region) {
	for i := range list {
		r := &list[i]
		corners := make([]Point, len(r.X))
		for k := range r.X {
			corners[k] = f.at(f.x.axis.kept(r.X[k]), f.y.axis.kept(r.Y[k]))
		}
		if len(corners) < 3 || !finitePoints(corners) {
			f.outside(r.Label)
			continue
		}
		if !r.Plain {
			f.scene.Hatch(corners, r.Hatching)
		}
		f.scene.Text(Text{Text: r.Label, Rank: RankRegion, Inside: corners, Spots: regionSpots(corners)})
	}
}

// kept returns v moved to the nearest end if it is beyond the axis.
func (a Axis) kept(v float64) float64 { return min(max(v, a.Low), a.High) }

func finitePoints(points []Point) bool {
	for _, p := range points {
		if !p.finite() {
			return false
		}
	}
	return true
}

// regionSpots returns places inside a region, the farthest from its edge first.
// They lie on a grid of 24 by 24 over its extent.
func regionSpots(corners []Point) []Spot {
	const n = 24
	type inner struct {
		at   Point
		edge float64
	}
	b := around(corners)
	var list []inner
	for i := range n * n {
		at := Point{
			b.Left + float64((float64(i%n)+0.5)/n*(b.Right-b.Left)),
			b.Top + float64((float64(i/n)+0.5)/n*(b.Bottom-b.Top)),
		}.grain()
		if inside(corners, at) {
			list = append(list, inner{at, grain(toEdge(corners, at))})
		}
	}
	slices.SortStableFunc(list, func(a, b inner) int { return cmp.Compare(b.edge, a.edge) })
	spots := make([]Spot, 0, len(list)+1)
	for _, in := range list {
		spots = append(spots, Spot{At: in.at, Anchor: Middle})
	}
	if len(spots) == 0 { // too thin for the grid: its key may stand at a corner
		spots = Around(corners[0], 0)
	}
	return spots
}
