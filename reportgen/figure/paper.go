package figure

import "math"

// paper measures texts as the SVG shows them.
type paper struct{}

func (paper) clean(text string) string { return clean(text) }
func (paper) apart() float64           { return 1.5 }

// near leaves more room at the sides: above and below letters a box has room itself.
func (paper) near(b Box) Box { return Box{b.Left - 0.8, b.Top - 0.2, b.Right + 0.8, b.Bottom + 0.2} }

const (
	sideGap = 1.0 // mm between a point and a text beside it
	liftGap = 0.3 // mm between a point and the box of a text above or below it
)

func (paper) box(t *Text, text string, at Spot) Box {
	em := t.Size.em()
	width, _ := textWidth(text, em)
	x, y := at.offset(t.Size)
	switch at.Anchor {
	case Middle:
		x -= width / 2
	case End:
		x -= width
	}
	local := Box{x, y - float64(ascent*em), x + width, y + float64(descent*em)}
	if t.Turned { // what is right goes up, what is below goes right
		local = Box{local.Top, -local.Right, local.Bottom, -local.Left}
	}
	b := local.moved(at.At.X, at.At.Y)
	return Box{grain(b.Left), grain(b.Top), grain(b.Right), grain(b.Bottom)}
}

// offset returns where the anchor on the baseline stands to the point of the
// spot, mm to the right and downwards as the text is read.
func (at Spot) offset(size Size) (x, y float64) {
	em := size.em()
	lines := float64(float64(at.Lines) * size.pitch())
	switch at.Lift {
	case Above:
		return 0, -(at.Gap + liftGap + float64(descent*em) + lines)
	case Below:
		return 0, at.Gap + liftGap + float64(ascent*em) + lines
	}
	side := sideGap + at.Gap
	switch at.Anchor {
	case Middle:
		side = 0
	case End:
		side = -side
	}
	return side, float64(middle * em)
}

// baseline returns the point of the drawing where the anchor of p stands.
func (p *placed) baseline() Point {
	x, y := p.spot.offset(p.Size)
	if p.Turned {
		x, y = y, -x
	}
	return Point{p.spot.At.X + x, p.spot.At.Y + y}
}

// A sheet is a whole figure on paper: the drawing with what stands above and
// below it, all measured from the upper left corner of the figure.
type sheet struct {
	placing
	origin        Point // of the drawing
	width, height float64
	stamp         Box // frame of the stamp; empty if there is none
	rule          float64
	lines         []sheetLine
}

// A sheetLine is a line of text above or below the drawing.
type sheetLine struct {
	text string
	at   Point // left end or middle of the baseline
	size Size
	mid  bool
	box  Box
}

// sheet lays s out on paper.
func (s *Scene) sheet() sheet {
	h := sheet{placing: s.place(paper{}), width: grain(s.Width + 2*margin)}
	y := h.head(s, margin)
	h.origin = Point{margin, y}
	y = h.foot(s, grain(y+s.Height))
	h.height = math.Ceil(y + margin)
	return h
}

// head sets stamp and title from y downwards and returns where they end.
func (h *sheet) head(s *Scene, y float64) float64 {
	if stamp := clean(s.Stamp); stamp != "" {
		top := y
		y = h.paragraph(stamp, Large, true, y+1) + 1
		h.stamp = Box{margin, top, h.width - margin, y}
		y += 2
	}
	if title := clean(s.Title); title != "" {
		y = h.paragraph(title, Large, false, y) + 1.5
	}
	return y
}

// foot sets what stands below the drawing from y downwards.
func (h *sheet) foot(s *Scene, y float64) float64 {
	y++
	for _, list := range [][]string{h.listed, s.Notes} {
		for _, text := range list {
			y = h.paragraph(clean(text), Small, false, y)
		}
	}
	if statement := clean(s.Statement); statement != "" {
		h.rule = grain(y + 1)
		y = h.paragraph(statement, Small, false, y+2)
	}
	return y
}

// paragraph sets text from y downwards over the width of the figure.
func (h *sheet) paragraph(text string, size Size, mid bool, y float64) float64 {
	em := size.em()
	room := h.width - 2*margin
	for _, line := range wrap(text, func(s string) bool { w, _ := textWidth(s, em); return w <= room }) {
		width, _ := textWidth(line, em)
		left, x := margin, margin
		if mid {
			x = h.width / 2
			left = x - width/2
		}
		h.lines = append(h.lines, sheetLine{
			text: line, size: size, mid: mid,
			at:  Point{x, grain(y + float64(ascent*em))},
			box: Box{grain(left), grain(y), grain(left + width), grain(y + float64((ascent+descent)*em))},
		})
		y = grain(y + size.pitch())
	}
	return y
}

// A Labelled box is the place of a text in the SVG, mm from the upper left
// corner of the whole figure.
type Labelled struct {
	Text string
	Box  Box
}

// Boxes returns the places of all texts of the SVG. No two overlap, and all
// lie within the figure.
func (s *Scene) Boxes() []Labelled {
	h := s.sheet()
	var list []Labelled
	for _, l := range h.lines {
		list = append(list, Labelled{l.text, l.box})
	}
	for i := range h.placed {
		p := &h.placed[i]
		list = append(list, Labelled{p.text, p.box.moved(h.origin.X, h.origin.Y)})
	}
	return list
}

// Size returns width and height of the whole figure, mm.
func (s *Scene) Size() (width, height float64) {
	h := s.sheet()
	return h.width, h.height
}
