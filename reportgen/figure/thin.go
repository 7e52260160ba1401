package figure

import "math"

// invisible is how far a line may be moved without anybody seeing it, mm.
const invisible = 0.01

// thin returns the line through points with as few of them as keep it within
// 0.01 mm of where it was; first and last always stay. A sweep of a million
// points comes down to the few that paper can show.
//
// It splits the line where it is farthest from its chord until it is near
// everywhere (the method of Ramer, and of Douglas and Peucker, 1973).
func thin(points []Point) []Point {
	points = apart(points)
	if len(points) < 3 {
		return points
	}
	keep := make([]bool, len(points))
	keep[0], keep[len(points)-1] = true, true
	pending := [][2]int{{0, len(points) - 1}}
	for len(pending) > 0 {
		part := pending[len(pending)-1]
		pending = pending[:len(pending)-1]
		far, distance := farthestFromChord(points, part[0], part[1])
		if distance > invisible {
			keep[far] = true
			pending = append(pending, [2]int{part[0], far}, [2]int{far, part[1]})
		}
	}
	return kept(points, keep)
}

// apart drops the points that cannot be told from the one kept before; the
// last stays.
func apart(points []Point) []Point {
	var list []Point
	for i, p := range points {
		if i > 0 && i < len(points)-1 {
			last := list[len(list)-1]
			if max(math.Abs(p.X-last.X), math.Abs(p.Y-last.Y)) < invisible {
				continue
			}
		}
		list = append(list, p)
	}
	return list
}

func kept(points []Point, keep []bool) []Point {
	list := points[:0:0]
	for i, p := range points {
		if keep[i] {
			list = append(list, p)
		}
	}
	return list
}

// farthestFromChord returns the point between first and last that is farthest
// from the straight line between them, and its distance.
func farthestFromChord(points []Point, first, last int) (far int, distance float64) {
	for i := first + 1; i < last; i++ {
		if d := toSegment(points[i], points[first], points[last]); d > distance {
			far, distance = i, d
		}
	}
	return far, distance
}

// toSegment returns the distance of p from the line between a and b.
func toSegment(p, a, b Point) float64 {
	dx, dy := b.X-a.X, b.Y-a.Y
	length := float64(dx*dx) + float64(dy*dy)
	t := 0.0
	if length > 0 {
		t = (float64((p.X-a.X)*dx) + float64((p.Y-a.Y)*dy)) / length
		t = min(max(t, 0), 1)
	}
	q := along(a, b, t)
	return math.Sqrt(float64((p.X-q.X)*(p.X-q.X)) + float64((p.Y-q.Y)*(p.Y-q.Y)))
}
