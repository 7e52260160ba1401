package reportgen

import (
	"strings"

	// The plain name belongs to the figures of JSON.
	drawing "arrestcheck/reportgen/figure"
)

// figureRows is the height of a drawing in characters, so that it can be seen as
// a whole on a terminal of 24 lines.
const figureRows = 20

// figureCells is the room that a text report gives to a figure: a drawing to
// scale has as many rows as its proportions ask for.
func figureCells(s *drawing.Scene, ascii bool) drawing.Cells {
	c := drawing.Cells{Columns: pageWidth, Rows: figureRows, ASCII: ascii}
	if s.ToScale {
		c.Rows = 0
	}
	return c
}

// drawing writes a figure in characters, fenced so that nothing in it is
// markup. The fence is longer than any run of its marks inside.
func (m *markdown) drawing(s *drawing.Scene) {
	text := string(s.Characters(figureCells(s, m.ascii)))
	fence := "```"
	for strings.Contains(text, fence) {
		fence += "`"
	}
	m.part()
	m.line(fence + "text")
	m.out.WriteString(text)
	m.line(fence)
}
