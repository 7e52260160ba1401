package figure

import (
	"math"
	"strings"
)

// Cells say what a place can show that a figure is written to in characters.
type Cells struct {
	Columns int // width in characters; less than 30 counts as 30

	// Rows is the height of the drawing; what stands above and below it comes
	// in addition. 0 keeps the proportions, a cell being twice as high as wide.
	Rows int

	// ASCII writes nothing but bytes below 128: user text beyond it is spelled
	// out or escaped. Otherwise lines are made of box drawing and Braille dots.
	ASCII bool
}

const (
	leastColumns = 30
	leastRows    = 8
	mostCells    = 1000 // in either direction
)

// Characters returns the figure as lines of characters, each ended by a line
// feed, none wider than the columns of c. It has no control characters.
func (s *Scene) Characters(c Cells) []byte {
	g := c.grid(s)
	var lines []string
	lines = append(lines, g.head(s)...)
	placing := s.place(g)
	lines = append(lines, g.drawing(s, &placing)...)
	lines = append(lines, g.foot(s, placing.listed)...)
	return []byte(strings.Join(lines, "\n") + "\n")
}

// A grid is the raster of cells that a drawing is written in. It measures
// texts in whole cells.
type grid struct {
	columns, rows int
	across, down  float64 // size of a cell, mm
	ascii         bool
	full          int // width of the lines above and below
}

func (c Cells) grid(s *Scene) grid {
	full := min(max(c.Columns, leastColumns), mostCells)
	g := grid{columns: full, rows: c.Rows, ascii: c.ASCII, full: full}
	g.across = s.Width / float64(full)
	if c.Rows <= 0 {
		g.rows = int(math.Ceil(s.Height / (2 * g.across)))
	}
	g.rows = min(max(g.rows, leastRows), mostCells)
	g.down = s.Height / float64(g.rows)
	if s.ToScale && c.Rows > 0 { // the smaller scale of the two directions
		wider := max(g.across, g.down/2)
		g.columns = min(full, int(math.Ceil(s.Width/wider)))
		g.across = s.Width / float64(g.columns)
		g.rows = min(g.rows, int(math.Ceil(s.Height/(2*wider))))
		g.down = s.Height / float64(g.rows)
	}
	return g
}

func (g grid) clean(text string) string {
	if g.ascii {
		return cleanASCII(text)
	}
	return clean(text)
}

func (g grid) apart() float64 { return g.across }

// near is a little smaller than b: a line on the edge of a cell is in the next.
func (g grid) near(b Box) Box {
	const s = 0.001
	return Box{b.Left + s, b.Top + s, b.Right - s, b.Bottom - s}
}

// cell returns the cell that p lies in; the far edges belong to the last.
func (g grid) cell(p Point) (column, row int) {
	return min(int(p.X/g.across), g.columns-1), min(int(p.Y/g.down), g.rows-1)
}

func (g grid) box(t *Text, text string, at Spot) Box {
	column, row, n := g.start(t, text, at)
	return Box{
		float64(float64(column) * g.across), float64(float64(row) * g.down),
		float64(float64(column+n) * g.across), float64(float64(row+1) * g.down),
	}
}

// start returns where text begins at a spot, and its length in columns. A
// turned text is not turned in characters: it is centred where it would stand.
func (g grid) start(t *Text, text string, at Spot) (column, row, n int) {
	n = columns(text)
	column, row = g.cell(Point{max(at.At.X, 0), max(at.At.Y, 0)})
	if t.Turned {
		return column - n/2, row, n
	}
	beside := 0
	switch at.Lift {
	case OnLine:
		beside = 2
	case Above:
		row -= 1 + at.Lines
	case Below:
		row += 1 + at.Lines
	}
	switch at.Anchor {
	case Start:
		column += beside
	case Middle:
		column -= (n - 1) / 2
	case End:
		column -= beside + n - 1
	}
	return column, row, n
}

// head returns the lines above the drawing.
func (g grid) head(s *Scene) []string {
	var lines []string
	if stamp := g.clean(s.Stamp); stamp != "" {
		rule := strings.Repeat("=", g.full)
		lines = append(lines, rule)
		for _, line := range g.wrap(stamp) {
			lines = append(lines, strings.Repeat(" ", (g.full-columns(line))/2)+line)
		}
		lines = append(lines, rule)
	}
	if title := g.clean(s.Title); title != "" {
		lines = append(lines, g.wrap(title)...)
		lines = append(lines, "")
	}
	return lines
}

// foot returns the lines below the drawing.
func (g grid) foot(s *Scene, listed []string) []string {
	lines := []string{""}
	for _, list := range [][]string{listed, s.Notes, {s.Statement}} {
		for _, text := range list {
			lines = append(lines, g.wrap(g.clean(text))...)
		}
	}
	if len(lines) == 1 {
		return nil
	}
	return lines
}

func (g grid) wrap(text string) []string {
	return wrap(text, func(s string) bool { return columns(s) <= g.full })
}

// drawing returns the rows of the drawing without empty ones above and below.
func (g grid) drawing(s *Scene, texts *placing) []string {
	c := newCanvas(g)
	for _, h := range s.hatches {
		c.hatch(h)
	}
	for _, k := range s.strokes {
		c.stroke(k)
	}
	for _, m := range s.marks {
		c.mark(m)
	}
	for i := range texts.placed {
		c.text(&texts.placed[i])
	}
	lines := c.lines()
	for len(lines) > 0 && lines[0] == "" {
		lines = lines[1:]
	}
	for len(lines) > 0 && lines[len(lines)-1] == "" {
		lines = lines[:len(lines)-1]
	}
	return lines
}
