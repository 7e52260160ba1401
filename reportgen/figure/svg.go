package figure

import (
	"bytes"
	"encoding/xml"
	"math"
	"strconv"
)

// SVG returns the whole figure as one svg element, fit for a file of its own
// and for a page of HTML. All ids in it begin with prefix and a hyphen, so that
// several figures may share a page; SVG panics if prefix is not a letter
// followed by letters, digits and hyphens.
//
// Texts are text elements, title and desc are set. It is black on white, as
// large as on paper (Size), and smaller where a page is narrower.
func (s *Scene) SVG(prefix string) []byte {
	if !isName(prefix) {
		panic("figure: no prefix of ids: " + strconv.Quote(prefix))
	}
	w := svgWriter{prefix: prefix}
	h := s.sheet()
	w.open(s, &h)
	w.shift(h.origin)
	w.drawing(s)
	w.texts(&h)
	w.raw("</g>\n")
	w.frame(&h)
	w.raw("</svg>\n")
	return w.out.Bytes()
}

// isName reports whether prefix is a letter and then letters, digits and hyphens.
func isName(prefix string) bool {
	for i, r := range prefix {
		letter := r >= 'a' && r <= 'z' || r >= 'A' && r <= 'Z'
		if !letter && (i == 0 || r != '-' && (r < '0' || r > '9')) {
			return false
		}
	}
	return prefix != ""
}

type svgWriter struct {
	out    bytes.Buffer
	prefix string
}

func (w *svgWriter) raw(text string) { w.out.WriteString(text) }

// number writes x mm as a whole number of hundredths of a millimetre, the unit
// of the SVG: with larger units browsers would round the sizes of fonts. It is
// rounded by way of the micrometre, so that the last bits of a processor decide
// no tie.
func (w *svgWriter) number(x float64) {
	hundredths := math.Round(math.Round(reached(x)*1000) / 10)
	w.out.Write(strconv.AppendInt(w.out.AvailableBuffer(), int64(hundredths), 10))
}

// millimetres writes a length that is not in units of the SVG.
func (w *svgWriter) millimetres(x float64) {
	w.raw(strconv.FormatFloat(grain(x), 'f', -1, 64) + "mm")
}

// attribute writes one with a number.
func (w *svgWriter) attribute(name string, x float64) {
	w.raw(" " + name + `="`)
	w.number(x)
	w.raw(`"`)
}

func (w *svgWriter) escaped(text string) {
	if err := xml.EscapeText(&w.out, []byte(text)); err != nil {
		panic(err) // a buffer has no error
	}
}

// element writes a title or desc; an empty one too, for the label points there.
func (w *svgWriter) element(name, text string) {
	w.raw("<" + name + ` id="` + w.prefix + "-" + name + `">`)
	w.escaped(clean(text))
	w.raw("</" + name + ">\n")
}

func (w *svgWriter) open(s *Scene, h *sheet) {
	w.raw(`<svg xmlns="http://www.w3.org/2000/svg" width="`)
	w.millimetres(h.width)
	w.raw(`" height="`)
	w.millimetres(h.height)
	w.raw(`" viewBox="0 0 `)
	w.number(h.width)
	w.raw(" ")
	w.number(h.height)
	w.raw(`" style="max-width:100%;height:auto" role="img" aria-labelledby="` + w.prefix + "-title " + w.prefix + `-desc"`)
	w.raw(` font-family="'Liberation Sans', Arial, Helvetica, sans-serif" text-rendering="geometricPrecision">` + "\n")
	w.element("title", s.Title)
	w.element("desc", s.Desc)
	w.raw("<rect")
	w.attribute("width", h.width)
	w.attribute("height", h.height)
	w.raw(` fill="white"/>` + "\n")
}

func (w *svgWriter) shift(to Point) {
	w.raw(`<g transform="translate(`)
	w.number(to.X)
	w.raw(" ")
	w.number(to.Y)
	w.raw(`)">` + "\n")
}

// drawing writes all that is not text.
func (w *svgWriter) drawing(s *Scene) {
	if len(s.hatches) > 0 {
		w.raw(`<g fill="none" stroke="black" stroke-width="12">` + "\n")
		for _, h := range s.hatches {
			w.hatch(s.area(), h)
		}
		w.raw("</g>\n")
	}
	w.raw(`<g fill="none" stroke="black" stroke-linejoin="round">` + "\n")
	for _, k := range s.strokes {
		w.stroke(k)
	}
	w.raw("</g>\n")
	for _, m := range s.marks {
		w.mark(m)
	}
}

func (w *svgWriter) hatch(area Box, h hatch) {
	w.raw(`<path d="`)
	for _, line := range hatchLines(area, h.region, h.kind) {
		w.path(line[:])
	}
	w.raw(`"/>` + "\n")
}

// path writes the commands of a line through points.
func (w *svgWriter) path(points []Point) {
	for i, p := range points {
		w.raw([...]string{"M", "L"}[min(i, 1)])
		w.number(p.X)
		w.raw(" ")
		w.number(p.Y)
	}
}

func (w *svgWriter) stroke(s stroke) {
	w.raw(`<path d="`)
	w.path(s.points)
	w.raw(`"`)
	w.attribute("stroke-width", s.pen.Weight.width())
	if pattern := s.pen.Dash.pattern(); pattern != nil {
		w.raw(` stroke-dasharray="`)
		for i, length := range pattern {
			if i > 0 {
				w.raw(" ")
			}
			w.number(length)
		}
		w.raw(`"`)
	}
	w.raw("/>\n")
}

func (w *svgWriter) mark(m mark) {
	if m.kind == Cross {
		const r = symbolRadius
		w.raw(`<path d="`)
		w.path([]Point{{m.at.X - r, m.at.Y - r}, {m.at.X + r, m.at.Y + r}})
		w.path([]Point{{m.at.X - r, m.at.Y + r}, {m.at.X + r, m.at.Y - r}})
		w.raw(`" stroke="black" stroke-width="35"/>` + "\n")
		return
	}
	w.raw("<circle")
	w.attribute("cx", m.at.X)
	w.attribute("cy", m.at.Y)
	w.attribute("r", symbolRadius-0.15)
	fill := "black"
	if m.kind == Open {
		fill = "white"
	}
	w.raw(` fill="` + fill + `" stroke="black" stroke-width="30"/>` + "\n")
}

// texts writes the texts of the drawing. What lies beneath a text is covered.
func (w *svgWriter) texts(h *sheet) {
	for i := range h.placed {
		if p := &h.placed[i]; p.over {
			w.cover(p)
		}
	}
	for i := range h.placed {
		p := &h.placed[i]
		anchor := [...]string{"start", "middle", "end"}[p.spot.Anchor]
		w.text(p.text, p.baseline(), p.Size, anchor, p.Turned)
	}
}

// cover writes a white ground a little smaller than the box of a text, for the
// box has room above capitals and below letters without tails.
func (w *svgWriter) cover(p *placed) {
	b := Box{p.box.Left - 0.3, p.box.Top + 0.3, p.box.Right + 0.3, p.box.Bottom - 0.2}
	if p.Turned {
		b = Box{p.box.Left + 0.3, p.box.Top - 0.3, p.box.Right - 0.2, p.box.Bottom + 0.3}
	}
	w.raw("<rect")
	w.attribute("x", b.Left)
	w.attribute("y", b.Top)
	w.attribute("width", b.Right-b.Left)
	w.attribute("height", b.Bottom-b.Top)
	w.raw(` fill="white"/>` + "\n")
}

// text writes one text. Where all its widths are known its length is fixed, so
// that it keeps to its box with another font too.
func (w *svgWriter) text(text string, at Point, size Size, anchor string, turned bool) {
	w.raw("<text")
	w.attribute("x", at.X)
	w.attribute("y", at.Y)
	w.attribute("font-size", size.em())
	if anchor != "start" {
		w.raw(` text-anchor="` + anchor + `"`)
	}
	if width, exact := textWidth(text, size.em()); exact && width > 0 {
		w.attribute("textLength", width)
		w.raw(` lengthAdjust="spacingAndGlyphs"`)
	}
	if turned {
		w.raw(` transform="rotate(-90 `)
		w.number(at.X)
		w.raw(" ")
		w.number(at.Y)
		w.raw(`)"`)
	}
	w.raw(">")
	w.escaped(text)
	w.raw("</text>\n")
}

// frame writes what stands above and below the drawing.
func (w *svgWriter) frame(h *sheet) {
	if h.stamp != (Box{}) {
		w.raw("<rect")
		w.attribute("x", h.stamp.Left)
		w.attribute("y", h.stamp.Top)
		w.attribute("width", h.stamp.Right-h.stamp.Left)
		w.attribute("height", h.stamp.Bottom-h.stamp.Top)
		w.raw(` fill="none" stroke="black" stroke-width="50"/>` + "\n")
	}
	if h.rule > 0 {
		w.raw(`<path d="`)
		w.path([]Point{{margin, h.rule}, {h.width - margin, h.rule}})
		w.raw(`" stroke="black" stroke-width="18"/>` + "\n")
	}
	for _, l := range h.lines {
		anchor := "start"
		if l.mid {
			anchor = "middle"
		}
		w.text(l.text, l.at, l.size, anchor, false)
	}
}
