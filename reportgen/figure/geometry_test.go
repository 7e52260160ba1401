package figure

import (
	"math"
	"slices"
	"testing"

	"pgregory.net/rapid"
)

var unit = Box{0, 0, 10, 10}

// The expected ends are found by drawing on squared paper.
func TestClip(t *testing.T) {
	for _, c := range []struct {
		a, b, from, to Point
		some           bool
	}{
		{Point{2, 3}, Point{8, 9}, Point{2, 3}, Point{8, 9}, true},         // inside
		{Point{-5, 5}, Point{15, 5}, Point{0, 5}, Point{10, 5}, true},      // across
		{Point{15, 5}, Point{-5, 5}, Point{10, 5}, Point{0, 5}, true},      // and back
		{Point{-4, -2}, Point{16, 8}, Point{0, 0}, Point{10, 5}, true},     // slanted
		{Point{5, 5}, Point{5, 25}, Point{5, 5}, Point{5, 10}, true},       // out
		{Point{-1, 0}, Point{11, 0}, Point{0, 0}, Point{10, 0}, true},      // along an edge
		{Point{-2, 2}, Point{2, -2}, Point{0, 0}, Point{0, 0}, true},       // through a corner
		{Point{-3, 2}, Point{2, -3}, Point{}, Point{}, false},              // past a corner
		{Point{11, 0}, Point{11, 10}, Point{}, Point{}, false},             // beside
		{Point{4, 4}, Point{4, 4}, Point{4, 4}, Point{4, 4}, true},         // a point
		{Point{-1e6, 5}, Point{1e6, 5}, Point{0, 5}, Point{10, 5}, true},   // from afar
		{Point{5, -1e6}, Point{5.001, -0.5e6}, Point{}, Point{}, false},    // far outside
		{Point{0, 12}, Point{12, 0}, Point{2, 10}, Point{10, 2}, true},     // cuts a corner off
		{Point{10, 10}, Point{20, 20}, Point{10, 10}, Point{10, 10}, true}, // leaves at a corner
		{Point{10.0001, 10}, Point{20, 10}, Point{}, Point{}, false},       // begins outside
		{Point{-10, 10}, Point{0, 10}, Point{0, 10}, Point{0, 10}, true},   // ends at a corner
	} {
		from, to, some := clip(unit, c.a, c.b)
		if some != c.some || some && (distance(from, c.from) > 1e-9 || distance(to, c.to) > 1e-9) {
			t.Errorf("clip(%v, %v) = %v %v %v, not %v %v %v", c.a, c.b, from, to, some, c.from, c.to, c.some)
		}
	}
}

func distance(a, b Point) float64 { return math.Hypot(a.X-b.X, a.Y-b.Y) }

func anyPoint(t *rapid.T, name string) Point {
	return Point{rapid.Float64Range(-15, 25).Draw(t, name), rapid.Float64Range(-15, 25).Draw(t, name)}
}

// What is kept lies in the box and on the line; what is left out lies outside.
// The line is walked in small steps, an independent route.
func TestClipByWalking(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		a, b := anyPoint(t, "a"), anyPoint(t, "b")
		from, to, some := clip(unit, a, b)
		if some && !(unit.Contains(around([]Point{from, to})) && toSegment(from, a, b) < 1e-9 && toSegment(to, a, b) < 1e-9) {
			t.Errorf("clip(%v, %v) = %v %v", a, b, from, to)
		}
		for i := range 101 {
			p := along(a, b, float64(i)/100)
			in := p.X > 1e-6 && p.X < 10-1e-6 && p.Y > 1e-6 && p.Y < 10-1e-6
			if in && (!some || toSegment(p, from, to) > 1e-9) {
				t.Errorf("%v is in the box, and not on %v %v %v", p, from, to, some)
			}
		}
	})
}

func TestClipLine(t *testing.T) {
	nan := Point{math.NaN(), 1}
	runs := clipLine(unit, []Point{{1, 1}, {5, 5}, {15, 5}, {15, 7}, {5, 7}, nan, {2, 2}, {3, 2}, nan, {4, 4}})
	want := [][]Point{{{1, 1}, {5, 5}, {10, 5}}, {{10, 7}, {5, 7}}, {{2, 2}, {3, 2}}}
	if !slices.EqualFunc(runs, want, slices.Equal[[]Point]) {
		t.Errorf("runs: %v, not %v", runs, want)
	}
}

// The thinned line has the ends of the given one and no point of that is more
// than 0.01 mm off.
func TestThin(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		points := make([]Point, rapid.IntRange(2, 60).Draw(t, "n"))
		for i := range points {
			points[i] = Point{float64(i) * 0.03, rapid.Float64Range(0, 0.1).Draw(t, "y")}
		}
		got := thin(points)
		if got[0] != points[0] || got[len(got)-1] != points[len(points)-1] {
			t.Fatalf("the ends are %v %v", got[0], got[len(got)-1])
		}
		for _, p := range points {
			near := math.Inf(1)
			for i := 1; i < len(got); i++ {
				near = min(near, toSegment(p, got[i-1], got[i]))
			}
			if near > 2*invisible {
				t.Errorf("%v is %v mm off", p, near)
			}
		}
	})
}

func TestThinStraight(t *testing.T) {
	var points []Point
	for i := range 1000 {
		points = append(points, Point{float64(i) / 10, float64(i) / 20})
	}
	if got := thin(points); len(got) != 2 {
		t.Errorf("a straight line keeps %d points", len(got))
	}
}

// The length of all hatch lines times their distance is the hatched area: the
// area of an L of 60 mm by 40 mm less 30 mm by 20 mm is 1800 mm2; of a bow tie
// of two triangles of 40 mm by 20 mm 800 mm2. The lines are so far apart that
// 4 % are lost or won at the edges.
func TestHatchArea(t *testing.T) {
	page := Box{0, 0, 200, 200}
	for _, c := range []struct {
		name   string
		region []Point
		area   float64
	}{
		{"rectangle", []Point{{10, 10}, {90, 10}, {90, 70}, {10, 70}}, 4800},
		{"L", []Point{{10, 10}, {70, 10}, {70, 30}, {40, 30}, {40, 50}, {10, 50}}, 1800},
		{"bow tie", []Point{{10, 10}, {50, 50}, {10, 50}, {50, 10}}, 800},
		{"beyond the drawing", []Point{{150, 150}, {450, 150}, {450, 450}, {150, 450}}, 2500},
		{"far beyond", []Point{{-1e6, -1e6}, {1e6, -1e6}, {1e6, 1e6}, {-1e6, 1e6}}, 40000},
	} {
		for _, h := range []Hatching{Rising, Falling} {
			_, spacing := h.directions()
			sum := 0.0
			for _, line := range hatchLines(page, c.region, h) {
				sum += spacing * distance(line[0], line[1])
			}
			if math.Abs(sum-c.area) > 0.04*c.area {
				t.Errorf("%s, hatching %d: %.0f mm2, not %.0f", c.name, h, sum, c.area)
			}
		}
		if n, m := len(hatchLines(page, c.region, Crossed)), len(hatchLines(page, c.region, Rising)); n <= m {
			t.Errorf("%s: crossed has %d lines, rising %d", c.name, n, m)
		}
	}
}

// Every point of a hatch line is within the region, whatever its corners.
func TestHatchStaysInside(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		region := make([]Point, rapid.IntRange(3, 9).Draw(t, "corners"))
		for i := range region {
			region[i] = Point{rapid.Float64Range(0, 100).Draw(t, "x"), rapid.Float64Range(0, 100).Draw(t, "y")}.grain()
		}
		for _, line := range hatchLines(Box{0, 0, 100, 100}, region, Crossed) {
			for i := 1; i < 10; i++ {
				if p := along(line[0], line[1], float64(i)/10); !inside(region, p) && toEdge(region, p) > 1e-6 {
					t.Errorf("%v of the line %v is outside %v", p, line, region)
				}
			}
		}
	})
}

// A pattern has as much ink as its strokes are long.
func TestDash(t *testing.T) {
	for d := Solid; d <= ChainLine; d++ {
		ink, whole := 0.0, 0.0
		for i, length := range d.pattern() {
			whole += length
			if i%2 == 0 {
				ink += length
			}
		}
		if d == Solid {
			ink, whole = 1, 1
		}
		const n = 10000
		drawn := 0
		for i := range n {
			if d.drawn(float64(i)/n*whole*6, 2) {
				drawn++
			}
		}
		if got := float64(drawn) / n; math.Abs(got-ink/whole) > 0.01 {
			t.Errorf("pattern %d: %.3f is drawn, not %.3f", d, got, ink/whole)
		}
	}
}

func TestBoxes(t *testing.T) {
	b := Box{0, 0, 10, 5}
	for _, c := range []struct {
		other              Box
		overlaps, contains bool
	}{
		{Box{10, 0, 20, 5}, false, false},
		{Box{9.9, 4.9, 20, 8}, true, false},
		{Box{2, 1, 3, 2}, true, true},
		{Box{0, 0, 10, 5}, true, true},
		{Box{0, 5, 10, 9}, false, false},
		{Box{-1, -1, 11, 6}, true, false},
	} {
		if b.Overlaps(c.other) != c.overlaps || c.other.Overlaps(b) != c.overlaps || b.Contains(c.other) != c.contains {
			t.Errorf("%v: overlaps %v, contains %v", c.other, b.Overlaps(c.other), b.Contains(c.other))
		}
	}
}
