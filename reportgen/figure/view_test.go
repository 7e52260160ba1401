package figure

import (
	"math"
	"strings"
	"testing"

	"pgregory.net/rapid"
)

// Scales by hand: 4 m over 100 mm is 1:40; a little more is 1:50.
func TestFit(t *testing.T) {
	box := Box{10, 20, 110, 120}
	for _, c := range []struct {
		wide, high float64
		want       string
	}{
		{4, 1, "1:40"}, {1, 4, "1:40"}, {4.01, 1, "1:50"}, {0.9, 0.1, "1:10"}, {0, 10, "1:100"}, {12.6, 3, "1:150"}, {0.1, 0.1, "1:1"}, {61, 61, "1:750"},
	} {
		v, err := Fit(-1, c.wide-1, 2, 2+c.high, box)
		if err != nil || v.Ratio() != c.want {
			t.Errorf("%v m by %v m: %s, not %s (%v)", c.wide, c.high, v.Ratio(), c.want, err)
		}
	}
}

func TestFitRefused(t *testing.T) {
	for _, c := range [][4]float64{{0, 0, 0, 0}, {1, 0, 0, 1}, {0, math.NaN(), 0, 1}, {0, math.Inf(1), 0, 1}, {0, 1e9, 0, 1}} {
		if _, err := Fit(c[0], c[1], c[2], c[3], Box{0, 0, 100, 100}); err == nil || !strings.HasPrefix(err.Error(), "figure: nothing can be drawn to scale") {
			t.Errorf("%v: %v", c, err)
		}
	}
}

// What is fitted lies in the box, up is up, and lengths are to scale.
func TestFitHolds(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		x := rapid.Float64Range(-100, 100).Draw(t, "x")
		z := rapid.Float64Range(-100, 100).Draw(t, "z")
		wide := rapid.Float64Range(0.01, 300).Draw(t, "wide")
		high := rapid.Float64Range(0.01, 300).Draw(t, "high")
		box := Box{5, 10, 150, 110}
		v, err := Fit(x, x+wide, z, z+high, box)
		if err != nil {
			t.Fatal(err)
		}
		low, top := v.At(x, z), v.At(x+wide, z+high)
		if !(Box{4.999, 9.999, 150.001, 110.001}).Contains(around([]Point{low, top})) || top.Y >= low.Y || top.X <= low.X {
			t.Errorf("corners at %v %v", low, top)
		}
		if got := (top.X - low.X) * v.Denominator / 1000; math.Abs(got-wide) > 1e-9*(wide+math.Abs(x)) {
			t.Errorf("%v m is drawn as %v m", wide, got)
		}
	})
}

// The points of an arc are on the circle, to a micrometre in each direction,
// and its chords leave it by no more than 0.02 mm; it ends where it should.
func TestArc(t *testing.T) {
	centre := Point{50, 60}
	for _, c := range []struct{ radius, from, to float64 }{{40, -90, -53.13}, {40, 0, 360}, {0.5, 0, 90}, {140, 10, -170}, {3, 45, 45}} {
		points := Arc(centre, c.radius, c.from, c.to)
		for i, p := range points {
			if math.Abs(distance(p, centre)-c.radius) > 0.001 {
				t.Errorf("%v is %v mm from the centre", p, distance(p, centre))
			}
			if i > 0 && c.radius-distance(along(points[i-1], p, 0.5), centre) > 0.021 {
				t.Errorf("a chord of the radius %v leaves it by %v mm", c.radius, c.radius-distance(along(points[i-1], p, 0.5), centre))
			}
		}
		sin, cos := math.Sincos(c.to * math.Pi / 180)
		if end := (Point{centre.X + c.radius*cos, centre.Y - c.radius*sin}); distance(points[len(points)-1], end) > 0.001 {
			t.Errorf("%v ends at %v, not %v", c, points[len(points)-1], end)
		}
	}
	if points := Arc(centre, math.NaN(), 0, 90); points != nil {
		t.Errorf("a circle without radius: %v", points)
	}
}

// A bar at 1:50 that may be 40 mm long is 2 m; at 1:30 it is 1 m, 33.3 mm. A
// foot is 0.3048 m: 5 ft at 1:50 are 30.48 mm.
func TestScaleBar(t *testing.T) {
	for _, c := range []struct {
		wide   float64
		unit   string
		metres float64
		figure string
		length float64
	}{
		{5, "m", 1, "2 m", 40}, {3, "m", 1, "1 m", 100. / 3}, {0.1, "m", 1, "0.02 m", 20}, {75, "m", 1, "20 m", 80. / 3},
		{5, "ft", 0.3048, "5 ft", 30.48},
	} {
		v, err := Fit(0, c.wide, 0, 0, Box{0, 0, 100, 100})
		if err != nil {
			t.Fatal(err)
		}
		s := NewScene("", 30)
		s.ScaleBar(Point{10, 15}, v, c.unit, c.metres)
		bar := s.strokes[0].points
		if got := bar[1].X - bar[0].X; math.Abs(got-c.length) > 0.002 {
			t.Errorf("%s: the bar is %v mm, not %v", v.Ratio(), got, c.length)
		}
		if s.texts[1].Text != c.figure || s.texts[2].Text != "scale "+v.Ratio() {
			t.Errorf("%s: %v", v.Ratio(), s.texts)
		}
	}
}

func TestArrow(t *testing.T) {
	s := NewScene("", 50)
	s.Arrow(Point{10, 10}, Point{40, 10}, Pen{})
	if len(s.strokes) != 3 {
		t.Fatalf("%d strokes", len(s.strokes))
	}
	for i, y := range []float64{10.8, 9.2} { // the head is 2.4 mm long, 1.6 mm wide
		if tail := s.strokes[i+1].points[1]; tail != (Point{37.6, y}) {
			t.Errorf("a stroke of the head ends at %v", tail)
		}
	}
}
