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
	for i := range p.Levels {
		f.level(&p.Levels[i])
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

// cellWidth is the width of a column in 80 columns, mm: what must have room in
// characters too is measured with it.
const cellWidth = FullWidth / 80

// RoomFor returns the width that a text of normal size needs on paper and in 80
// columns, mm.
func RoomFor(text string) float64 {
	text = clean(text)
	width, _ := textWidth(text, Normal.em())
	return max(width, float64(columns(text))*cellWidth)
}

// rightMargin returns the room for the names of curves at their ends.
func (p *Plot) rightMargin() float64 {
	margin := 6.0
	for _, c := range p.Curves {
		if c.Label != "" {
			margin = max(margin, min(RoomFor(c.Label), 45)+2*cellWidth)
		}
	}
	return margin
}

// A frame is the part of a scene within the axes.
type frame struct {
	scene *Scene
	box   Box
	x, y  scale
	ticks [2][]Tick
}

const (
	tickLength  = 1.5
	figureGap   = 2.0  // between an axis and the figures below it
	frameTop    = 8.0  // room for the name of the y axis
	frameBottom = 13.0 // for figures and name of the x axis
)

func newFrame(s *Scene, x, y Axis, right float64) *frame {
	f := &frame{scene: s}
	high := s.Height - frameTop - frameBottom
	f.ticks[1] = y.ticks(max(2, int(high/9)))
	leftMargin := 0.0
	for _, t := range f.ticks[1] {
		leftMargin = max(leftMargin, RoomFor(t.Label))
	}
	f.box = Box{leftMargin + 2*cellWidth + 0.5, frameTop, s.Width - right, s.Height - frameBottom}
	f.ticks[0] = xTicks(x, f.box.Right-f.box.Left)
	f.x = scale{x, f.box.Left, f.box.Right}
	f.y = scale{y, f.box.Bottom, f.box.Top}
	return f
}

// xTicks returns as many ticks as have room for their figures side by side.
func xTicks(x Axis, width float64) []Tick {
	for most := 10; ; most-- {
		ticks := x.ticks(most)
		if most == 2 || tickRoom(scale{x, 0, width}, ticks) {
			return ticks
		}
	}
}

// tickRoom reports whether the figures of ticks keep three columns apart.
func tickRoom(s scale, ticks []Tick) bool {
	for i := 1; i < len(ticks); i++ {
		need := (RoomFor(ticks[i-1].Label)+RoomFor(ticks[i].Label))/2 + 3*cellWidth
		if s.at(ticks[i].Value)-s.at(ticks[i-1].Value) < need {
			return false
		}
	}
	return true
}

func (f *frame) at(x, y float64) Point { return Point{f.x.at(x), f.y.at(y)} }

// axes draws the two axes with ticks, figures and names.
func (f *frame) axes() {
	s, b := f.scene, f.box
	s.Line(Point{b.Left, b.Bottom}, Point{b.Right, b.Bottom}, Pen{Weight: Medium})
	s.Line(Point{b.Left, b.Bottom}, Point{b.Left, b.Top}, Pen{Weight: Medium})
	for _, t := range f.ticks[0] {
		at := Point{f.x.at(t.Value), b.Bottom}
		s.Line(at, Point{at.X, at.Y + tickLength}, Pen{})
		s.Text(Text{Text: t.Label, Rank: RankScale, Spots: []Spot{{At: at, Anchor: Middle, Lift: Below, Gap: figureGap}}})
	}
	for _, t := range f.ticks[1] {
		at := Point{b.Left, f.y.at(t.Value)}
		s.Line(at, Point{at.X - tickLength, at.Y}, Pen{})
		s.Text(Text{Text: t.Label, Rank: RankScale, Spots: []Spot{{At: at, Anchor: End, Gap: tickLength - 0.5}}})
	}
	f.fine()
	f.names()
}

// close draws the two sides of the frame that have no axis.
func (f *frame) close() {
	corner := Point{f.box.Right, f.box.Top}
	f.scene.Line(Point{f.box.Left, f.box.Top}, corner, Pen{})
	f.scene.Line(corner, Point{f.box.Right, f.box.Bottom}, Pen{})
}

// fine draws the small ticks of logarithmic axes.
func (f *frame) fine() {
	const length = tickLength / 2
	if a := f.x.axis; a.Log {
		for _, t := range fineTicks(a.Low, a.High, 40) {
			x := f.x.at(t.Value)
			f.scene.Line(Point{x, f.box.Bottom}, Point{x, f.box.Bottom + length}, Pen{})
		}
	}
	if a := f.y.axis; a.Log {
		for _, t := range fineTicks(a.Low, a.High, 40) {
			y := f.y.at(t.Value)
			f.scene.Line(Point{f.box.Left, y}, Point{f.box.Left - length, y}, Pen{})
		}
	}
}

// names writes the name of the x axis below its end, that of the y axis above
// its own.
func (f *frame) names() {
	b := f.box
	f.scene.Text(Text{Text: f.x.axis.label(), Rank: RankAxis, Spots: []Spot{
		{At: Point{b.Right, b.Bottom}, Anchor: End, Lift: Below, Gap: figureGap, Lines: 1},
		{At: Point{(b.Left + b.Right) / 2, b.Bottom}, Anchor: Middle, Lift: Below, Gap: figureGap, Lines: 1},
		{At: Point{f.scene.Width, b.Bottom}, Anchor: End, Lift: Below, Gap: figureGap, Lines: 1},
	}})
	f.scene.Text(Text{Text: f.y.axis.label(), Rank: RankAxis, Spots: []Spot{
		{At: Point{0, b.Top}, Anchor: Start, Lift: Above, Gap: 2},
	}})
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

// levelSpots returns spots along a level line: at its right end, its left end,
// then between, each above and below.
func levelSpots(from, to, y float64) []Spot {
	spots := make([]Spot, 0, 30)
	add := func(x float64, a Anchor) {
		for _, lift := range []Lift{Above, Below} {
			spots = append(spots, Spot{At: Point{x, y}, Anchor: a, Lift: lift})
		}
	}
	add(to, End)
	spots = append(spots, Spot{At: Point{to, y}, Anchor: Start})
	add(to+sideGap, Start)
	add(from+sideGap, Start)
	for i := 1; i < 12; i++ {
		add(to-float64(float64(i)/12*(to-from)), Middle)
	}
	return spots
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
		spots = around8(Point{x, top}, 0.5)
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
			spots = around8(points[i], symbolRadius)
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

// curveSpots returns spots at the end of the last run of a curve, then along it
// from its end to its beginning.
func curveSpots(last []Point) []Spot {
	end := last[len(last)-1]
	spots := []Spot{{At: end, Anchor: Start}, {At: end, Anchor: Start, Lift: Above}, {At: end, Anchor: Start, Lift: Below}}
	for i := 12; i >= 0; i-- {
		at := last[i*(len(last)-1)/12]
		for _, anchor := range []Anchor{Start, End} {
			for _, lift := range []Lift{Above, Below} {
				spots = append(spots, Spot{At: at, Anchor: anchor, Lift: lift, Gap: 0.5})
			}
		}
		spots = append(spots, Spot{At: at, Anchor: Start}, Spot{At: at, Anchor: End})
	}
	return spots
}

// point marks a point.
func (f *frame) point(m *Marked) {
	if !f.x.holds(m.X) || !f.y.holds(m.Y) {
		f.outside(m.Label)
		return
	}
	at := f.at(m.X, m.Y)
	f.scene.Mark(at, m.Symbol)
	f.scene.Text(Text{Text: m.Label, Rank: RankPoint, Spots: around8(at, symbolRadius)})
}

// around8 returns the eight spots around a point that keep gap from it.
func around8(at Point, gap float64) []Spot {
	right, left := Point{at.X + gap, at.Y}, Point{at.X - gap, at.Y}
	return []Spot{
		{At: right, Anchor: Start, Lift: Above},
		{At: right, Anchor: Start, Lift: Below},
		{At: left, Anchor: End, Lift: Above},
		{At: left, Anchor: End, Lift: Below},
		{At: at, Anchor: Start, Gap: gap},
		{At: at, Anchor: End, Gap: gap},
		{At: at, Anchor: Middle, Lift: Above, Gap: gap},
		{At: at, Anchor: Middle, Lift: Below, Gap: gap},
	}
}

// outside lists the label of what is not in the frame.
func (f *frame) outside(label string) {
	if label != "" {
		f.scene.note(label + outside)
	}
}
