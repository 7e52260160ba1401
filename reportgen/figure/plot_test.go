package figure

import (
	"math"
	"regexp"
	"slices"
	"strings"
	"testing"

	"pgregory.net/rapid"
)

func scene(t *testing.T, p Plot) *Scene {
	t.Helper()
	s, err := p.Scene()
	if err != nil {
		t.Fatal(err)
	}
	return s
}

// texts returns the texts of the figure on paper.
func texts(s *Scene) []string {
	var list []string
	for _, b := range s.Boxes() {
		list = append(list, b.Text)
	}
	return list
}

var ten = Axis{Name: "x", Low: 0, High: 10}

// What lies outside the axes is named, and so is what has no finite place.
func TestOutside(t *testing.T) {
	inf, nan := math.Inf(1), math.NaN()
	s := scene(t, Plot{
		X: ten, Y: ten,
		Curves:   []Curve{{X: []float64{0, 10}, Y: []float64{20, 30}, Label: "curve"}, {X: []float64{nan}, Y: []float64{1}, Label: "no curve"}},
		Levels:   []Level{{At: 11, Label: "level"}, {At: 3, From: 12, To: 14, Label: "short level"}, {At: inf, Label: "open level"}},
		Uprights: []Level{{At: -1, Label: "upright"}, {At: nan, Label: "no upright"}},
		Points:   []Marked{{X: 5, Y: 10.1, Label: "point"}, {X: nan, Y: 3, Label: "no point"}},
		Regions:  []Region{{X: []float64{1, 2}, Y: []float64{1, 2}, Label: "line"}, {X: []float64{1, 2, 3}, Y: []float64{1, 2, nan}, Label: "no region"}},
	})
	got := texts(s)
	for _, want := range []string{"curve", "no curve", "level", "short level", "open level", "upright", "no upright", "point", "no point", "line", "no region"} {
		if !slices.Contains(got, want+" (outside the drawing)") {
			t.Errorf("%q is not listed: %q", want, got)
		}
	}
	if len(s.marks) != 0 || len(s.hatches) != 0 {
		t.Errorf("drawn all the same: %v %v", s.marks, s.hatches)
	}
}

// A point without neighbours is marked; a gap stays a gap.
func TestCurveWithGaps(t *testing.T) {
	nan := math.NaN()
	s := scene(t, Plot{X: ten, Y: ten, Curves: []Curve{{
		X: []float64{1, 2, 3, 4, 5, 6}, Y: []float64{1, 2, nan, 5, nan, 6}, Label: "curve", Pen: CurvePen,
	}}})
	if len(s.marks) != 2 {
		t.Errorf("marks: %v", s.marks)
	}
	var curve []stroke
	for _, k := range s.strokes {
		if k.pen == CurvePen {
			curve = append(curve, k)
		}
	}
	if len(curve) != 1 || len(curve[0].points) != 2 {
		t.Errorf("the curve is %v", curve)
	}
}

// On logarithmic axes 1 to 100, the line y = x runs from corner to corner, and
// a figure of nought breaks it.
func TestLogPlot(t *testing.T) {
	axis := Axis{Name: "x", Low: 1, High: 100, Log: true}
	s := scene(t, Plot{X: axis, Y: axis, Curves: []Curve{{X: []float64{0, 1, 7, 100}, Y: []float64{0, 1, 7, 100}, Label: "line", Pen: CurvePen}}})
	last := s.strokes[len(s.strokes)-1].points
	x, y := s.strokes[0].points, s.strokes[1].points // the axes
	if len(last) != 2 || last[0] != x[0] || last[1] != (Point{x[1].X, y[1].Y}) {
		t.Errorf("the line runs through %v, the axes through %v and %v", last, x, y)
	}
}

func TestPlotLengths(t *testing.T) {
	defer func() {
		if recover() == nil {
			t.Error("a curve with more x than y is drawn")
		}
	}()
	(&Plot{Curves: []Curve{{X: []float64{1, 2}, Y: []float64{1}}}}).Scene()
}

// A word for a region stands inside it; if the region is too small, its key
// does or the word is listed.
func TestRegionWords(t *testing.T) {
	region := func(size float64, label string) Region {
		return Region{X: []float64{1, 1 + size, 1 + size, 1}, Y: []float64{1, 1, 1 + size, 1 + size}, Label: label}
	}
	for size, want := range map[float64]string{5: "exceeded", 0.8: "(a) exceeded", 0.05: "exceeded (no room in the drawing)"} {
		s := scene(t, Plot{X: ten, Y: ten, Regions: []Region{region(size, "exceeded")}})
		if got := texts(s); !slices.Contains(got, want) {
			t.Errorf("size %v: %q is not in %q", size, want, got)
		}
	}
}

// Ends of bars may come in either order; an open end is listed with its figures.
func TestBars(t *testing.T) {
	b := Bars{Axis: ten, Rows: []Bar{
		{"down", 8, 2, "low", "high"}, {"open", 3, math.Inf(1), "three", "no upper end"}, {"beyond", 4, 40, "four", "forty"},
	}}
	s, err := b.Scene()
	if err != nil {
		t.Fatal(err)
	}
	checkBoxes(t, s)
	place := make(map[string]Box)
	for _, b := range s.Boxes() {
		place[b.Text] = b.Box
	}
	if place["high"].Right >= place["low"].Left {
		t.Errorf("the figure of 2 stands right of that of 8: %v", place)
	}
	for _, want := range []string{"open; three; no upper end (outside the drawing)", "four", "forty"} {
		if _, some := place[want]; !some {
			t.Errorf("%q is missing: %v", want, place)
		}
	}
}

var isKey = regexp.MustCompile(`^\([a-z]+\)$`)

// No text stands over a mark, and none but a key over a curve, an axis or a
// limit. The lines are walked in steps of 0.1 mm.
func TestTextsKeepOff(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		s, _ := anyScene(t)
		placed := s.place(paper{}).placed
		for j := range placed {
			for _, m := range s.marks {
				if r := symbolRadius; placed[j].box.Overlaps(Box{m.at.X - r, m.at.Y - r, m.at.X + r, m.at.Y + r}) {
					t.Errorf("%q stands over the mark at %v", placed[j].text, m.at)
				}
			}
		}
		for _, k := range s.strokes {
			if k.pen.Weight == Thin {
				continue
			}
			for i := 1; i < len(k.points); i++ {
				n := int(distance(k.points[i-1], k.points[i])/0.1) + 1
				for step := range n + 1 {
					at := along(k.points[i-1], k.points[i], float64(step)/float64(n))
					for j := range placed {
						if !isKey.MatchString(placed[j].text) && placed[j].box.Contains(Box{at.X, at.Y, at.X, at.Y}) {
							t.Fatalf("%q stands over a line at %v", placed[j].text, at)
						}
					}
				}
			}
		}
	})
}

// At any width that a terminal has, each axis keeps two figures or is told in
// words.
func TestScalesInCharacters(t *testing.T) {
	for _, s := range samples(t) {
		for n := leastColumns; n <= 160; n += 10 {
			g := Cells{Columns: n}.grid(s.scene)
			got := s.scene.place(g)
			count := make([]int, len(s.scene.scales)+1)
			for i := range got.placed {
				count[got.placed[i].scale]++
			}
			for i, told := range s.scene.scales {
				listed := slices.ContainsFunc(got.listed, func(line string) bool { return strings.HasPrefix(line, told) })
				if listed == (count[i+1] >= 2) {
					t.Errorf("%s, %d columns: %d figures, %q listed: %v", s.name, n, count[i+1], told, listed)
				}
				if n >= 80 && count[i+1] < 3 {
					t.Errorf("%s, %d columns: only %d figures of %q", s.name, n, count[i+1], told)
				}
			}
		}
	}
}
