package reportgen

import (
	"bytes"
	"encoding/xml"
	"errors"
	"fmt"
	"io"
	"math"
	"os"
	"path/filepath"
	"regexp"
	"slices"
	"strconv"
	"strings"
	"testing"

	"pgregory.net/rapid"

	"arrestcheck/arrest"
	"arrestcheck/arrest/jobfile"
	"arrestcheck/arrest/quantity"
	"arrestcheck/arrest/rig"
	"arrestcheck/limits"
	drawing "arrestcheck/reportgen/figure"
)

// A siteJob is a job with a layout as a user would type it, all figures exact.
type siteJob struct {
	edge                 string
	anchor, behind       float64
	length, slack, ring  float64
	positions, obstacles []string
	rest                 string // whatever else
}

func exact(x float64, unit string) string {
	return fmt.Sprintf(`{ value = "%s %s ± 0 %s", source = "measured" }`, strconv.FormatFloat(x, 'f', 3, 64), unit, unit)
}

func metres(x float64) string { return exact(x, "m") }

func (j *siteJob) toml() string {
	var b strings.Builder
	fmt.Fprintf(&b, "format = \"arrestcheck job 1\"\n[document]\ntitle = \"Ridge work\"\n[worker]\nmass = %s\ntools = %s\n[layout]\nanchor_height = %s\nedge = %q\n",
		exact(95, "kg"), exact(5, "kg"), metres(j.anchor), j.edge)
	if j.edge != "none" {
		fmt.Fprintf(&b, "anchor_behind_edge = %s\n", metres(j.behind))
	}
	fmt.Fprintf(&b, "d_ring_height = %s\nd_ring_to_feet = %s\nhalf_width = %s\nconnector_length = %s\nslack = %s\n", metres(j.ring), metres(1.6), metres(0.3), metres(j.length), metres(j.slack))
	return b.String() + strings.Join(j.positions, "") + strings.Join(j.obstacles, "") + j.rest
}

func position(name string, along, out float64) string {
	return fmt.Sprintf("[[position]]\nname = %q\nalong = %s\nout = %s\n", name, metres(along), metres(out))
}

func levelBelow(name string, below float64) string {
	return fmt.Sprintf("[[obstacle]]\nname = %q\nbelow = %s\n", name, metres(below))
}

func boxBelow(name string, below, high, alongFrom, alongTo, outFrom, outTo float64) string {
	return levelBelow(name, below) + fmt.Sprintf("height = %s\nalong_from = %s\nalong_to = %s\nout_from = %s\nout_to = %s\n", metres(high), metres(alongFrom), metres(alongTo), metres(outFrom), metres(outTo))
}

const roomFromFeet = `[clearance]
datum = "feet"
deceleration_distance = { value = "0.8 m ± 0 m", source = "measured" }
line_stretch = { value = "0 m", source = "measured" }
harness_stretch = { value = "0.3 m ± 0 m", source = "label" }
anchor_give = { value = "0 m", source = "plan" }
margin = { value = "0.6 m ± 0 m", source = "plan" }
`

const ropeAndAbsorber = `[[connector]]
part = "rope"
modulus = { value = "30 kN ± 0 kN", source = "measured" }
length = { value = "0.5 m ± 0 m", source = "measured" }
[[connector]]
part = "absorber"
deployment_force = "4 kN"
travel_at_most = "1.75 m"
`

// tried works a job out; a job that the reader refuses has no sheet.
func tried(t rapid.TB, j *siteJob) *Sheet {
	t.Helper()
	file, err := jobfile.Read("job.toml", []byte(j.toml()), os.DirFS(jobsFolder))
	var faults *jobfile.Faults
	switch {
	case errors.As(err, &faults):
		return nil
	case err != nil:
		t.Fatal(err)
	}
	res := arrest.Evaluate(&file.Job)
	a := limits.Assess(&res, file.Sets, file.Elsewhere)
	return &Sheet{File: file, Result: &res, Assessment: &a, Tool: "test", Number: 1, Of: 1}
}

func mustTry(t testing.TB, j *siteJob) *Sheet {
	t.Helper()
	s := tried(t, j)
	if s == nil {
		t.Fatal("the job is refused:\n" + j.toml())
	}
	return s
}

func mustDraw(t rapid.TB, kind string, s *Sheet) *drawing.Scene {
	t.Helper()
	scene, err := Figure(kind, s, BothUnits)
	if err != nil {
		t.Fatal(kind, ": ", err)
	}
	return scene
}

// anySite draws a layout with one to three positions, of which some lie behind
// the edge, and up to four obstacles, near by or far off.
func anySite(t *rapid.T) *siteJob {
	within := func(name string, low, high float64) float64 {
		return math.Round(rapid.Float64Range(low, high).Draw(t, name)*100) / 100
	}
	j := &siteJob{
		edge:   rapid.SampledFrom([]string{"none", "round", "sharp"}).Draw(t, "edge"),
		anchor: within("anchor", 0, 5), behind: within("behind", 0, 3), ring: within("ring", 1, 1.7),
		length: within("length", 1, 6), slack: rapid.SampledFrom([]float64{0, 0, 0.2}).Draw(t, "slack"),
	}
	for i := range rapid.IntRange(1, 3).Draw(t, "positions") {
		along, out := within("along", -2, 2), 0.0
		if rapid.Bool().Draw(t, "outside") {
			out = within("out", -1, 1)
		}
		if rapid.Bool().Draw(t, "in front") {
			along = 0
		}
		j.positions = append(j.positions, position("place "+strconv.Itoa(i+1), along, out))
	}
	for i := range rapid.IntRange(0, 4).Draw(t, "obstacles") {
		name := rapid.SampledFrom([]string{"yard", "a beam with a rather long name of its own", "落下 level"}).Draw(t, "name") + " " + strconv.Itoa(i)
		switch below := within("below", -1, 12); rapid.IntRange(0, 2).Draw(t, "kind") {
		case 0:
			j.obstacles = append(j.obstacles, levelBelow(name, below))
		case 1:
			j.obstacles = append(j.obstacles, levelBelow(name, below)+"moving = true\nheight = "+metres(1)+"\n")
		default:
			a, b := within("from", -9, 9), within("out from", -4, 4)
			j.obstacles = append(j.obstacles, boxBelow(name, below, within("high", 0.1, 3), a, a+within("wide", 0.1, 8), b, b+within("deep", 0.1, 4)))
		}
	}
	if rapid.Bool().Draw(t, "clearance") {
		j.rest = strings.Replace(roomFromFeet, "feet", rapid.SampledFrom([]string{"feet", "anchor"}).Draw(t, "datum"), 1)
		if rapid.Bool().Draw(t, "without a margin") {
			j.rest = j.rest[:strings.Index(j.rest, "margin")]
		}
	}
	if rapid.IntRange(0, 4).Draw(t, "path") == 0 {
		j.rest += ropeAndAbsorber
	}
	return j
}

// checkFigure fails if two texts overlap, one leaves the figure, a name is
// nowhere, the figure does not print on a sheet or its SVG is not well formed.
func checkFigure(t rapid.TB, s *drawing.Scene, names ...string) {
	t.Helper()
	width, height := s.Size()
	if width != drawing.PageWidth || height > drawing.MaxHeight {
		t.Errorf("%q is %v mm by %v mm", s.Title, width, height)
	}
	page := drawing.Box{Right: width, Bottom: height}
	var all strings.Builder
	boxes := s.Boxes()
	for i, b := range boxes {
		all.WriteString(strings.Join(strings.Fields(b.Text), ""))
		if !page.Contains(b.Box) {
			t.Errorf("%q leaves the figure: %v", b.Text, b.Box)
		}
		for _, c := range boxes[:i] {
			if b.Box.Overlaps(c.Box) {
				t.Errorf("%q and %q overlap", b.Text, c.Text)
			}
		}
	}
	for _, name := range append(names, notAPermission) {
		if !strings.Contains(all.String(), strings.Join(strings.Fields(name), "")) {
			t.Errorf("%q is nowhere in %q", name, s.Title)
		}
	}
	for d := xml.NewDecoder(bytes.NewReader(s.SVG("f"))); ; {
		if _, err := d.Token(); err == io.EOF {
			return
		} else if err != nil {
			t.Fatal(err)
		}
	}
}

// Over random layouts no two texts of a figure overlap, nothing leaves it, and
// no obstacle and no position vanishes without a word.
func TestLayoutFiguresOfAnySite(t *testing.T) {
	drawn := map[string]int{}
	rapid.Check(t, func(t *rapid.T) {
		s := tried(t, anySite(t))
		if s == nil {
			drawn["refused"]++
			return
		}
		plan := s.Result.Layout.Plan
		var obstacles, positions []string
		for i := range plan.Obstacles {
			obstacles = append(obstacles, plan.Obstacles[i].Name)
		}
		for i := range plan.Positions {
			positions = append(positions, plan.Positions[i].Name)
		}
		e := mustDraw(t, ElevationFigure, s)
		if drawn["keyed"] += len(regexp.MustCompile(`(?m)^\([a-z]\) |no room`).FindAllString(textOf(e), -1)); s.File.Job.Point.Path != nil {
			drawn["with a path"]++
		}
		checkFigure(t, e, obstacles...)
		checkFigure(t, mustDraw(t, PlanFigure, s), append(obstacles, positions...)...)
		drawn["drawn"]++
	})
	if t.Log(drawn); drawn["drawn"] < 20 {
		t.Errorf("few layouts were drawn: %v", drawn)
	}
}

// svgInk holds what the SVG of a drawing shows but texts and hatching, in mm of
// the drawing.
type svgInk struct {
	lines [][2]drawing.Point
	marks []drawing.Point
}

var (
	svgPath   = regexp.MustCompile(`<path d="([ML0-9 -]+)" stroke-width="(\d+)"`)
	svgVertex = regexp.MustCompile(`([ML])(-?\d+) (-?\d+)`)
	svgCircle = regexp.MustCompile(`<circle cx="(-?\d+)" cy="(-?\d+)"`)
	svgCross  = regexp.MustCompile(`<path d="M(-?\d+) (-?\d+)L(-?\d+) (-?\d+)M[^"]*" stroke="black" stroke-width="35"`)
)

// ink reads the strokes and marks of an SVG above a height of its drawing, below
// which the scale stands.
func ink(t rapid.TB, s *drawing.Scene, above float64) svgInk {
	t.Helper()
	svg := string(s.SVG("f"))
	mm := func(text string) float64 {
		x, err := strconv.Atoi(text)
		if err != nil {
			t.Fatal(err)
		}
		return float64(x) / 100
	}
	var in svgInk
	_, strokes, _ := strings.Cut(svg, `stroke-linejoin="round"`)
	strokes, _, _ = strings.Cut(strokes, "</g>")
	for _, path := range svgPath.FindAllStringSubmatch(strokes, -1) {
		var last drawing.Point
		for _, v := range svgVertex.FindAllStringSubmatch(path[1], -1) {
			p := drawing.Point{X: mm(v[2]), Y: mm(v[3])}
			if v[1] == "L" && max(last.Y, p.Y) <= above {
				in.lines = append(in.lines, [2]drawing.Point{last, p})
			}
			last = p
		}
	}
	for _, c := range svgCircle.FindAllStringSubmatch(svg, -1) {
		in.marks = append(in.marks, drawing.Point{X: mm(c[1]), Y: mm(c[2])})
	}
	for _, c := range svgCross.FindAllStringSubmatch(svg, -1) {
		in.marks = append(in.marks, drawing.Point{X: (mm(c[1]) + mm(c[3])) / 2, Y: (mm(c[2]) + mm(c[4])) / 2})
	}
	return in
}

// covers reports whether a line of in is within 0.05 mm of p.
func (in *svgInk) covers(p drawing.Point) bool {
	return slices.ContainsFunc(in.lines, func(l [2]drawing.Point) bool {
		dx, dy := l[1].X-l[0].X, l[1].Y-l[0].Y
		t := 0.0
		if square := dx*dx + dy*dy; square > 0 {
			t = min(max(((p.X-l[0].X)*dx+(p.Y-l[0].Y)*dy)/square, 0), 1)
		}
		return math.Hypot(p.X-l[0].X-t*dx, p.Y-l[0].Y-t*dy) < 0.05
	})
}

// A layout seen in a mirror gives the elevation in a mirror: every line and
// every mark, and of the plan every mark.
func TestMirroredLayouts(t *testing.T) {
	compared := 0
	rapid.Check(t, func(t *rapid.T) {
		along := func(name string) float64 {
			return math.Round(rapid.Float64Range(0.05, 2).Draw(t, name)*100) / 100
		}
		x, from, wide := along("along"), along("from"), along("wide")
		j := &siteJob{
			edge: rapid.SampledFrom([]string{"none", "round"}).Draw(t, "edge"), anchor: along("anchor") + 1, behind: along("behind"),
			ring: 1.5, length: along("length") + 1.5, rest: roomFromFeet,
		}
		side := func(sign float64) *Sheet {
			m := *j
			m.positions = []string{position("here", sign*x, 0)}
			m.obstacles = []string{levelBelow("yard", 7), boxBelow("bin", 5.5, 1, sign*from, sign*(from+wide), -0.5, 0.5)}
			return tried(t, &m)
		}
		right, left := side(1), side(-1)
		if (right == nil) != (left == nil) {
			t.Fatal("one of the two is refused")
		}
		if right == nil {
			return
		}
		compared++
		a, b := mustDraw(t, ElevationFigure, right), mustDraw(t, ElevationFigure, left)
		above := a.Height - belowElevation + 5
		mirror(t, ink(t, a, above), ink(t, b, above), drawing.FullWidth)
		mirror(t, ink(t, b, above), ink(t, a, above), drawing.FullWidth)
		p, q := ink(t, mustDraw(t, PlanFigure, right), 0), ink(t, mustDraw(t, PlanFigure, left), 0)
		mirror(t, p, q, sideLeast+drawing.FullWidth-planSide)
	})
	if compared < 20 {
		t.Errorf("only %d pairs were drawn", compared)
	}
}

// mirror fails if what a shows is not in b, seen in a mirror on a sheet of the
// given width.
func mirror(t rapid.TB, a, b svgInk, width float64) {
	t.Helper()
	if len(a.marks) < 2 || len(a.marks) != len(b.marks) {
		t.Fatalf("%d and %d marks", len(a.marks), len(b.marks))
	}
	for _, m := range a.marks {
		if !slices.ContainsFunc(b.marks, func(n drawing.Point) bool { return math.Hypot(width-m.X-n.X, m.Y-n.Y) < 0.05 }) {
			t.Errorf("the mark %v is not in the mirror: %v", m, b.marks)
		}
	}
	for _, l := range a.lines {
		for i := range 5 {
			share := float64(i) / 4
			p := drawing.Point{X: width - l[0].X - share*(l[1].X-l[0].X), Y: l[0].Y + share*(l[1].Y-l[0].Y)}
			if !b.covers(p) {
				t.Errorf("the line %v is not in the mirror at %v", l, p)
				break
			}
		}
	}
}

// An anchor 3 m up, a D-ring at 1.5 m and 1.2 m to the side, a connector of 2 m:
// the D-ring is 1.920937 m from the anchor, pulls first 0.1 m lower at a distance
// of 2 m (a right triangle of 1.2, 1.6 and 2), and hangs 0.4 m below that.
func TestElevationIsToScale(t *testing.T) {
	s := mustTry(t, &siteJob{edge: "none", anchor: 3, ring: 1.5, length: 2, positions: []string{position("bay", 1.2, 0)}, obstacles: []string{levelBelow("floor", 3.5)}, rest: roomFromFeet})
	scene := mustDraw(t, ElevationFigure, s)
	scale := regexp.MustCompile(`scale 1:(\d+)`).FindStringSubmatch(textOf(scene))
	one, err := strconv.Atoi(scale[1])
	if err != nil {
		t.Fatal(err)
	}
	marks := ink(t, scene, 0).marks
	if len(marks) != 4 {
		t.Fatalf("marks: %v", marks)
	}
	start, taut, rest, anchor := marks[0], marks[1], marks[2], marks[3] // circles first
	for _, c := range []struct {
		what string
		a, b drawing.Point
		want float64 // m
	}{
		{"anchor to start", anchor, start, 1.920937}, {"anchor to first pull", anchor, taut, 2},
		{"free fall", start, taut, 0.1}, {"anchor to rest", anchor, rest, 2.8},
	} {
		if got := math.Hypot(c.a.X-c.b.X, c.a.Y-c.b.Y) * float64(one) / 1000; math.Abs(got-c.want) > 0.0105*float64(one)/1000 {
			t.Errorf("%s: %.4f m at 1:%d, want %.4f", c.what, got, one, c.want)
		}
	}
	mustHold(t, textOf(scene), "anchor (+3.00 m)", "D-ring at the start (+1.50 m)", "first pull (+1.40 m)", "at rest (+0.200 m)", "floor (-3.50 m)",
		"datum: feet at the start", "free fall 0.100 m", "swing drop 0.400 m", "deceleration distance 0.800 m", "harness stretch 0.300 m", "margin 0.600 m",
		"by the other datum more 0.100 m", "left 1.20 m to floor", "offset 1.20 m", "Offset angle 38.7 deg at the start, swing angle 36.9 deg at the first pull.")
}

// textOf returns all texts of a figure, one a line.
func textOf(s *drawing.Scene) string {
	var b strings.Builder
	for _, l := range s.Boxes() {
		b.WriteString(strings.ReplaceAll(l.Text, noBreak, " ") + "\n")
	}
	return b.String()
}

// From the anchor 1 m behind the edge a connector of 2 m lets the D-ring, 1.5 m up
// over the edge, fall 2.5 m, 1 m below the edge. From the datum of the anchor,
// at the height of the surface, the room needed is 1 + 0.8 + 0.3 + 1.6 + 0.6 =
// 4.3 m, which is 0.3 m more than there is.
func TestElevationOverAnEdge(t *testing.T) {
	s := mustTry(t, &siteJob{edge: "sharp", anchor: 0, behind: 1, ring: 1.5, length: 2, positions: []string{position("eaves", 0, 0)},
		obstacles: []string{levelBelow("street", 4)}, rest: strings.Replace(roomFromFeet, "feet", "anchor", 1)})
	text := textOf(mustDraw(t, ElevationFigure, s))
	mustHold(t, text, "behind the edge 1.00 m", "sharp edge", "first pull (-1.00 m)", "at rest (-1.80 m)", "datum: anchor", "connector, taut 1.00 m", "D-ring to feet 1.60 m", "0.300 m short")
	if strings.Contains(text, "left") {
		t.Error("room is left in:\n" + text)
	}
}

// Where an item is missing, what is left is an upper end and says so.
func TestElevationWithoutAnItem(t *testing.T) {
	j := &siteJob{edge: "none", anchor: 3, ring: 1.5, length: 2, positions: []string{position("bay", 0, 0)}, obstacles: []string{levelBelow("floor", 9)}}
	j.rest = roomFromFeet[:strings.Index(roomFromFeet, "harness")] + `margin = { value = "0.6 m ± 0 m", source = "plan" }`
	text := textOf(mustDraw(t, ElevationFigure, mustTry(t, j)))
	// 0.5 m of free fall, 0.8 m to stop and 0.6 m leave 7.1 m of 9 m.
	mustHold(t, text, "left at most 7.10 m to floor", "harness stretch, give of the anchor", "at rest, or lower")
}

// Feet stay feet: in a job typed in feet no length is in metres, and the scale
// is not.
func TestElevationInFeet(t *testing.T) {
	j := &siteJob{edge: "none", anchor: 3, ring: 1.5, length: 2, positions: []string{position("bay", 1.2, 0)}, obstacles: []string{levelBelow("floor", 3.5)}, rest: roomFromFeet}
	typed := regexp.MustCompile(`"([-0-9.]+) m( ± 0 m)?"`).ReplaceAllString(j.toml(), `"$1 ft ± 0 ft"`)
	s := worked(t, "job.toml", []byte(typed))
	text := textOf(mustDraw(t, ElevationFigure, s)) + textOf(mustDraw(t, PlanFigure, s))
	mustHold(t, text, "free fall 0.100 ft", "offset 1.20 ft", "2 ft")
	if regexp.MustCompile(`\d m\b`).MatchString(text) {
		t.Error("metres in:\n" + text)
	}
}

// Over the edge and to the side of a place outside of it the swing is in no
// plane: neither figure shows one.
func TestFiguresOutOfThePlane(t *testing.T) {
	s := mustTry(t, &siteJob{edge: "round", anchor: 0, behind: 1, ring: 1.5, length: 3, positions: []string{position("corner", 1, 0.5)}})
	e, p := mustDraw(t, ElevationFigure, s), mustDraw(t, PlanFigure, s)
	if !slices.Contains(e.Notes, notFlatNote) || slices.Contains(e.Notes, noStretchNote) {
		t.Errorf("notes: %q", e.Notes)
	}
	mustHold(t, textOf(p), "Swing in no plane, and without an arrow: corner.")
	if slices.Contains(p.Notes, arrowNote) {
		t.Error("an arrow is told of")
	}
}

// Behind the edge on a connector that ends before it nobody falls: the figures
// show how far it reaches. Anchor and D-ring at one height: the reach is the
// length.
func TestFiguresOfRestraint(t *testing.T) {
	s := mustTry(t, &siteJob{edge: "round", anchor: 1, behind: 4, ring: 1.5, length: 2, positions: []string{position("ridge", 0.5, -3)}})
	e, p := mustDraw(t, ElevationFigure, s), mustDraw(t, PlanFigure, s)
	mustHold(t, textOf(e), restrainNote, "D-ring at the position (+1.50 m)")
	mustHold(t, textOf(p), "reach of the connector 2.00 m", "ridge: 1.12 m from the anchor", "No fall follows from the layout: ridge.")
	if strings.Contains(textOf(e), tautWord) {
		t.Error("a first pull is drawn")
	}
}

// The arc of a swing ends where the structure is.
func TestArcEndsAtTheStructure(t *testing.T) {
	l := rig.Layout{Anchor: rig.Spot{Y: -1}, Edge: rig.RoundEdge, DRing: 1.5, Length: 3, PositionCount: 1}
	l.Positions[0] = rig.Position{Y: 0.8}
	p := l.At(0)
	c := planeOf(&l, &p, p.Start)
	arc := c.arc(&p)
	// The edge is 1 m from the anchor; about it swings what is left of 3 m: 2 m.
	for _, at := range arc {
		if got := math.Hypot(at.u-1, at.z); !quantity.Close(got, 2, 1e-9) || at.u < 1-1e-9 {
			t.Fatalf("%+v is %v m from the edge", at, got)
		}
	}
	if first, last := arc[0], arc[len(arc)-1]; math.Abs(first.u-1.8) > 1e-9 || last.u > 1.05 {
		t.Errorf("from %+v to %+v", first, last)
	}
}

const figureFolder = "testdata/figures"

// Figures of jobs in testdata/jobs. They prove sameness, not rightness.
func TestGoldenFigures(t *testing.T) {
	expected := map[string]bool{}
	for _, g := range []struct{ file, job, kind string }{
		{"elevation-swing.svg", "layout-path.toml", ElevationFigure},
		{"elevation-edge.svg", "layout-retractable-at-feet.toml", ElevationFigure},
		{"plan-two-positions.svg", "layout-two-positions.toml", PlanFigure},
		{"force-time-swing.svg", "layout-path.toml", ForceTimeFigure},
		{"force-travel-straight.svg", "path-rope-absorber-45.toml", ForceTravelFigure},
	} {
		expected[g.file] = true
		golden(t, filepath.Join(figureFolder, g.file), string(mustDraw(t, g.kind, sheet(t, g.job)).SVG("figure")))
	}
	found, err := filepath.Glob(filepath.Join(figureFolder, "*"))
	if err != nil {
		t.Fatal(err)
	}
	for _, path := range found {
		if !expected[filepath.Base(path)] {
			t.Errorf("%s belongs to no test", path)
		}
	}
}

// Every figure that a job of testdata has keeps its texts apart, says nothing
// forbidden, and is the same each time; every other is refused with a reason and
// something to do.
func TestFiguresOfJobs(t *testing.T) {
	drawn := map[string]int{}
	for _, name := range jobNames(t) {
		s := sheet(t, name)
		for _, kind := range FigureKinds() {
			scene, err := Figure(kind, s, BothUnits)
			var none *NoFigure
			switch {
			case errors.As(err, &none):
				if none.Reason == "" || none.Hint == "" || none.Error() != none.Reason {
					t.Errorf("%s, %s: %+v", name, kind, none)
				}
				continue
			case err != nil:
				t.Fatal(name, kind, err)
			}
			drawn[kind]++
			checkFigure(t, scene, flat(s.File.Document.Title))
			if scene.Title == "" || scene.Desc == "" || (scene.Stamp != "") != s.isExample() {
				t.Errorf("%s, %s: title %q, stamp %q, desc %q", name, kind, scene.Title, scene.Stamp, scene.Desc)
			}
			svg := scene.SVG("f")
			if again := mustDraw(t, kind, s); !bytes.Equal(svg, again.SVG("f")) {
				t.Errorf("%s, %s: two figures differ", name, kind)
			}
			if word := forbidden.Find(svg); word != nil {
				t.Errorf("%s, %s: %q", name, kind, word)
			}
		}
	}
	t.Log(drawn)
	for _, kind := range FigureKinds() {
		if drawn[kind] == 0 {
			t.Errorf("no job has the figure %s", kind)
		}
	}
}
