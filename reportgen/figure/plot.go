package figure

import (
	"math"
	"slices"
)

// A Plot is a figure over two axes. Figures are in the units of the axes. What
// is drawn first lies beneath what is drawn later; regions lie beneath all.
//
// What lies outside the axes is named below the figure: nothing with a label
// vanishes.
type Plot struct {
	Title, Desc, Stamp, Statement string
	Notes                         []string

	X, Y     Axis
	Regions  []Region
	Curves   []Curve
	Levels   []Level
	Uprights []Level
	Points   []Marked

	Height float64 // of the drawing, mm; 0 is 95

	// Aside puts the labels of Levels at the right of the frame, each at the end of
	// a fine line: for levels that stand close together, or in the way of a curve.
	Aside bool
}

// A Curve is a line through points. Where a figure is not finite, or not
// positive on a logarithmic axis, the line is broken.
type Curve struct {
	X, Y  []float64 // of one length
	Label string    // stands at the end of the line
	Pen   Pen
}

// A Level is a straight line at one figure of an axis: level for Levels (a
// limit, a mean), upright for Uprights.
type Level struct {
	At       float64
	From, To float64 // its ends along the other axis; equal: all of it
	Label    string
	Pen      Pen
}

// A Marked point has a label beside it.
type Marked struct {
	X, Y   float64
	Label  string
	Symbol Symbol
}

// A Region is hatched and has its word inside it. Its corners are joined by
// straight lines on paper.
type Region struct {
	X, Y     []float64 // corners, of one length
	Label    string
	Hatching Hatching
	Plain    bool // not hatched: only the word
}

// Scene lays the plot out. The error says which axis cannot be drawn. It panics
// if the figures of a curve or region are not of one length.
func (p *Plot) Scene() (*Scene, error) {
	x, err := p.X.fitted(p.along(true))
	if err != nil {
		return nil, err
	}
	y, err := p.Y.fitted(p.along(false))
	if err != nil {
		return nil, err
	}
	height := p.Height
	if height <= 0 {
		height = 95
	}
	s := NewScene(p.Title, height)
	s.Desc, s.Stamp, s.Statement, s.Notes = p.Desc, p.Stamp, p.Statement, slices.Clone(p.Notes)
	f := newFrame(s, x, y, p.rightMargin())
	if len(p.Regions) > 0 {
		f.close()
	}
	f.regions(p.Regions)
	f.axes()
	if p.Aside {
		f.levelsAside(p.Levels)
	} else {
		for i := range p.Levels {
			f.level(&p.Levels[i])
		}
	}
	for i := range p.Uprights {
		f.upright(&p.Uprights[i])
	}
	for i := range p.Curves {
		f.curve(&p.Curves[i])
	}
	for i := range p.Points {
		f.point(&p.Points[i])
	}
	return s, nil
}

// along returns all figures along one axis.
func (p *Plot) along(x bool) []float64 {
	pick := func(a, b []float64) []float64 {
		if len(a) != len(b) {
			panic("figure: x and y are not of one length")
		}
		if x {
			return a
		}
		return b
	}
	var all []float64
	for _, c := range p.Curves {
		all = append(all, pick(c.X, c.Y)...)
	}
	for _, r := range p.Regions {
		all = append(all, pick(r.X, r.Y)...)
	}
	for _, m := range p.Points {
		if finite(m.X) && finite(m.Y) {
			all = append(all, pick([]float64{m.X}, []float64{m.Y})...)
		}
	}
	across, along := p.Uprights, p.Levels
	if !x {
		across, along = along, across
	}
	for _, l := range across {
		all = append(all, l.At)
		if !x && l.Label != "" {
			all = append(all, l.At*1.06) // room for the label above
		}
	}
	for _, l := range along {
		if l.From != l.To {
			all = append(all, l.From, l.To)
		}
	}
	return all
}

// rightMargin returns the room for the names of curves at their ends.
func (p *Plot) rightMargin() float64 {
	margin := 6.0
	for _, c := range p.Curves {
		if c.Label != "" {
			margin = max(margin, min(RoomFor(c.Label), 45)+2*cellWidth)
		}
	}
	for _, l := range p.Levels {
		if p.Aside {
			margin = max(margin, min(RoomFor(l.Label), asideMost)+asideLeader+2*cellWidth)
		}
	}
	return margin
}

// level draws a level line with its label on it.
func (f *frame) level(l *Level) {
	from, to, some := f.x.between(l.From, l.To)
	y := f.y.at(l.At)
	if !some || !f.y.holds(l.At) {
		f.outside(l.Label)
		return
	}
	f.scene.Line(Point{from, y}, Point{to, y}, l.Pen)
	f.scene.Text(Text{Text: l.Label, Rank: RankLimit, Spots: levelSpots(from, to, y)})
}

// upright draws an upright line with its label beside it.
func (f *frame) upright(l *Level) {
	from, to, some := f.y.between(l.From, l.To)
	x := f.x.at(l.At)
	if !some || !f.x.holds(l.At) {
		f.outside(l.Label)
		return
	}
	f.scene.Line(Point{x, from}, Point{x, to}, l.Pen)
	top, bottom := min(from, to), max(from, to)
	var spots []Spot
	for y := top + 2.5; y < bottom; y += Normal.pitch() {
		spots = append(spots, Spot{At: Point{x, y}, Anchor: Start}, Spot{At: Point{x, y}, Anchor: End})
	}
	if len(spots) == 0 {
		spots = Around(Point{x, top}, 0.5)
	}
	f.scene.Text(Text{Text: l.Label, Rank: RankLimit, Spots: spots})
}

// between returns where a line from one figure to another begins and ends on
// paper: over all of the axis if they are equal. What is outside is cut off.
func (s scale) between(low, high float64) (from, to float64, some bool) {
	if low == high {
		return s.from, s.to, true
	}
	low, high = max(min(low, high), s.axis.Low), min(max(low, high), s.axis.High)
	if !(low <= high) {
		return 0, 0, false
	}
	return s.at(low), s.at(high), true
}

// curve draws a curve with its label at the last end that is in the frame.
func (f *frame) curve(c *Curve) {
	points := make([]Point, len(c.X))
	for i := range c.X {
		points[i] = f.at(c.X[i], c.Y[i])
		if !points[i].finite() {
			points[i] = Point{math.NaN(), math.NaN()}
		}
	}
	var spots []Spot
	for i := range points {
		if alone(points, i) && f.box.Contains(around(points[i:i+1])) {
			f.scene.Mark(points[i], Filled)
			spots = Around(points[i], symbolRadius)
		}
	}
	runs := clipLine(f.box, points)
	for _, run := range runs {
		f.scene.Polyline(run, c.Pen)
		spots = curveSpots(run)
	}
	if len(spots) == 0 {
		f.outside(c.Label)
		return
	}
	f.scene.Text(Text{Text: c.Label, Rank: RankCurve, Spots: spots})
}

// alone reports whether no line leads to or from point i, which is one.
func alone(points []Point, i int) bool {
	return points[i].finite() && (i == 0 || !points[i-1].finite()) && (i == len(points)-1 || !points[i+1].finite())
}

// point marks a point.
func (f *frame) point(m *Marked) {
	if !f.x.holds(m.X) || !f.y.holds(m.Y) {
		f.outside(m.Label)
		return
	}
	f.scene.Named(f.at(m.X, m.Y), m.Symbol, m.Label)
}

// outside lists the label of what is not in the frame.
func (f *frame) outside(label string) {
	if label != "" {
		f.scene.note(label + outside)
	}
}
