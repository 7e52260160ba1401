package figure

// clip returns the part of the line from a to b that lies in box, its ends in
// the same order, and whether there is any. An edge of the box belongs to it.
//
// The line is a + t (b - a); each edge narrows the range of t.
func clip(box Box, a, b Point) (Point, Point, bool) {
	dx, dy := b.X-a.X, b.Y-a.Y
	t := span{0, 1}
	if !t.narrow(-dx, a.X-box.Left) || !t.narrow(dx, box.Right-a.X) ||
		!t.narrow(-dy, a.Y-box.Top) || !t.narrow(dy, box.Bottom-a.Y) {
		return Point{}, Point{}, false
	}
	start, end := a, b
	if t.from > 0 {
		start = box.held(along(a, b, t.from))
	}
	if t.to < 1 {
		end = box.held(along(a, b, t.to))
	}
	return start, end, true
}

// A span is a range of t.
type span struct{ from, to float64 }

// narrow keeps of s where speed t <= room, and reports whether anything is left.
func (s *span) narrow(speed, room float64) bool {
	switch {
	case speed > 0:
		s.to = min(s.to, room/speed)
	case speed < 0:
		s.from = max(s.from, room/speed)
	default:
		return room >= 0
	}
	return s.from <= s.to
}

// along returns the point at fraction t of the way from a to b.
func along(a, b Point, t float64) Point {
	return Point{a.X + float64(t*(b.X-a.X)), a.Y + float64(t*(b.Y-a.Y))}
}

// clipLine returns the runs of a line through points that lie in box. A point
// that is not finite breaks the line.
func clipLine(box Box, points []Point) [][]Point {
	var runs [][]Point
	open := false // the last run ends where the next piece begins
	for i := 1; i < len(points); i++ {
		if !points[i-1].finite() || !points[i].finite() {
			open = false
			continue
		}
		next := points[i].reached()
		a, b, some := clip(box, points[i-1].reached(), next)
		if !some {
			open = false
			continue
		}
		if !open {
			runs = append(runs, []Point{a})
		}
		last := &runs[len(runs)-1]
		*last = append(*last, b)
		open = b == next
	}
	return runs
}

// crosses reports whether the line from a to b has a point within box.
func crosses(box Box, a, b Point) bool {
	_, _, some := clip(box, a, b)
	return some
}
