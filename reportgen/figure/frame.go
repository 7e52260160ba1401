package figure

// cellWidth is the width of a column in 80 columns, mm: what must have room in
// characters too is measured with it.
const cellWidth = FullWidth / 80

// RoomFor returns the width that a text of normal size needs on paper and in 80
// columns, mm.
func RoomFor(text string) float64 {
	text = clean(text)
	width, _ := textWidth(text, Normal.em())
	return max(width, float64(float64(columns(text))*cellWidth))
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
	}
	s.scaled(f.ticks[0], f.x.axis.told(f.ticks[0]), func(t Tick) Spot {
		return Spot{At: Point{f.x.at(t.Value), b.Bottom}, Anchor: Middle, Lift: Below, Gap: figureGap}
	})
	for _, t := range f.ticks[1] {
		at := Point{b.Left, f.y.at(t.Value)}
		s.Line(at, Point{at.X - tickLength, at.Y}, Pen{})
	}
	s.scaled(f.ticks[1], f.y.axis.told(f.ticks[1]), func(t Tick) Spot {
		return Spot{At: Point{b.Left, f.y.at(t.Value)}, Anchor: End, Gap: tickLength - 0.5}
	})
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
