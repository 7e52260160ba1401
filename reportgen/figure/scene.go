package figure

// A Scene is what a figure is made of, in millimetres on paper. Width and
// Height are those of the drawing; the title above it and what is listed below
// come in addition. Lines are cut where they leave the drawing.
//
// The texts are as given: writers clean and escape them.
type Scene struct {
	Width, Height float64 // mm

	Stamp     string   // stands across the top where the values are not real
	Title     string   // above the drawing
	Desc      string   // what the figure shows, in words, for those who do not see it
	Notes     []string // below the drawing
	Statement string   // what the figure is not; the last line

	// ToScale keeps the proportions of the drawing in characters.
	ToScale bool

	strokes []stroke
	hatches []hatch
	marks   []mark
	texts   []Text
	scales  []string // what stands below if fewer than two figures of one have room
}

// PageWidth is the width of a whole figure, mm: with the margins that browsers
// leave it fits a sheet of A4 and of Letter.
const PageWidth = 170.0

// margin is left free around a whole figure, mm.
const margin = 3.0

// FullWidth is the width of a drawing that fills PageWidth, mm.
const FullWidth = PageWidth - 2*margin

// MaxHeight is the greatest height of a whole figure that prints on one sheet
// of A4 or Letter, mm.
const MaxHeight = 235.0

// NewScene returns an empty scene of FullWidth and the given height, mm.
func NewScene(title string, height float64) *Scene {
	return &Scene{Title: title, Width: FullWidth, Height: height}
}

type stroke struct {
	points []Point
	pen    Pen
}

type hatch struct {
	region []Point
	kind   Hatching
}

type mark struct {
	at   Point
	kind Symbol
}

// Symbol is the shape of a mark.
type Symbol uint8

const (
	Filled Symbol = iota // a small disc
	Open                 // a small circle
	Cross                // a diagonal cross
)

// symbolRadius is the size of a mark, mm.
const symbolRadius = 0.9

// box returns the place that m takes up.
func (m mark) box() Box {
	const r = symbolRadius
	return Box{m.at.X - r, m.at.Y - r, m.at.X + r, m.at.Y + r}
}

// area returns the box of the drawing.
func (s *Scene) area() Box { return Box{0, 0, s.Width, s.Height} }

// Line adds a straight line.
func (s *Scene) Line(a, b Point, pen Pen) { s.Polyline([]Point{a, b}, pen) }

// Polyline adds a line through points. A point that is not finite breaks it.
// Points too close to be seen apart are joined.
func (s *Scene) Polyline(points []Point, pen Pen) {
	for _, run := range clipLine(s.area(), points) {
		for i := range run {
			run[i] = run[i].grain()
		}
		s.strokes = append(s.strokes, stroke{thin(run), pen})
	}
}

// Outline adds a closed line through points.
func (s *Scene) Outline(points []Point, pen Pen) {
	if len(points) > 0 {
		s.Polyline(append(points[:len(points):len(points)], points[0]), pen)
	}
}

// Hatch covers the polygon region with parallel lines. It draws no edge.
func (s *Scene) Hatch(region []Point, kind Hatching) {
	corners := make([]Point, len(region))
	for i, p := range region {
		if !p.finite() {
			return
		}
		corners[i] = p.grain()
	}
	if len(corners) >= 3 {
		s.hatches = append(s.hatches, hatch{corners, kind})
	}
}

// Mark adds a mark at a point; outside the drawing it is left out.
func (s *Scene) Mark(at Point, kind Symbol) {
	if at.finite() && s.area().Contains(Box{at.X, at.Y, at.X, at.Y}) {
		s.marks = append(s.marks, mark{at.grain(), kind})
	}
}

// Named adds a mark with its name beside it.
func (s *Scene) Named(at Point, kind Symbol, name string) {
	s.Mark(at, kind)
	s.Text(Text{Text: name, Rank: RankPoint, Spots: Around(at, symbolRadius)})
}

// Text adds a text. It panics if t has no spot.
func (s *Scene) Text(t Text) {
	if len(t.Spots) == 0 {
		panic("figure: a text without a spot")
	}
	spots := make([]Spot, 0, len(t.Spots))
	for _, spot := range t.Spots {
		if spot.At.finite() {
			spot.At = spot.At.grain()
			spots = append(spots, spot)
		}
	}
	t.Spots = spots
	s.texts = append(s.texts, t)
}

// scaled adds the figures of a scale, each at its spot. told says what the
// scale is, for the case that not two of them have room.
func (s *Scene) scaled(ticks []Tick, told string, spot func(Tick) Spot) {
	s.scales = append(s.scales, told)
	for _, t := range ticks {
		s.Text(Text{Text: t.Label, Rank: RankScale, Spots: []Spot{spot(t)}, scale: len(s.scales)})
	}
}

// note adds a line below the drawing.
func (s *Scene) note(text string) { s.Notes = append(s.Notes, text) }
