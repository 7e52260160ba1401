package figure

import (
	"math"
	"strings"
)

// A canvas is a drawing in cells, in four layers. The upper hides the lower,
// except that dots and straight lines in one cell are shown together.
type canvas struct {
	grid
	cells []cell
}

type cell struct {
	hatching     byte    // 0, '/', '\\' or 'X'
	line         arms    // straight lines
	lineDash     [2]Dash // of the horizontal and the vertical one
	dots         dots
	top          string // a mark or a character of a text with its marks
	taken, blank bool   // taken by a text; kept free of hatching beside one
}

// arms are the directions in which straight lines leave the middle of a cell.
type arms uint8

const (
	left arms = 1 << iota
	right
	up
	down
)

func newCanvas(g grid) *canvas {
	return &canvas{grid: g, cells: make([]cell, g.columns*g.rows)}
}

func (c *canvas) at(column, row int) *cell { return &c.cells[row*c.columns+column] }

// hatch marks the cells whose middle is in the region.
func (c *canvas) hatch(h hatch) {
	for row := range c.rows {
		for column := range c.columns {
			middle := Point{float64((float64(column) + 0.5) * c.across), float64((float64(row) + 0.5) * c.down)}
			if inside(h.region, middle) {
				c.at(column, row).hatching = hatchGlyph(h.kind, column, row)
			}
		}
	}
}

// hatchGlyph returns what a hatching shows in a cell: slanted lines of slanted
// strokes.
func hatchGlyph(kind Hatching, column, row int) byte {
	rising, falling := (column+row)%4 == 0, (column+3*row)%4 == 0
	switch {
	case kind == Rising && rising:
		return '/'
	case kind == Falling && falling:
		return '\\'
	case kind == Crossed && rising && falling:
		return 'X'
	case kind == Crossed && rising:
		return '/'
	case kind == Crossed && falling:
		return '\\'
	}
	return 0
}

// stroke draws upright and level lines of line characters, all else of dots.
func (c *canvas) stroke(s stroke) {
	if s.straight() {
		for i := 1; i < len(s.points); i++ {
			c.straight(s.points[i-1], s.points[i], s.pen.Dash)
		}
		return
	}
	done := 0.0
	for i := 1; i < len(s.points); i++ {
		done = c.slanted(s.points[i-1], s.points[i], s.pen.Dash, done)
	}
}

// straight reports whether s has upright and level parts only.
func (s *stroke) straight() bool {
	for i := 1; i < len(s.points); i++ {
		if s.points[i].X != s.points[i-1].X && s.points[i].Y != s.points[i-1].Y {
			return false
		}
	}
	return true
}

// straight draws an upright or level line. One shorter than a cell is a tick:
// an arm of the cell where it begins.
func (c *canvas) straight(a, b Point, dash Dash) {
	columnA, rowA := c.cell(a)
	columnB, rowB := c.cell(b)
	if a.Y == b.Y {
		toward, back := right, left
		if b.X < a.X {
			toward, back = left, right
		}
		if math.Abs(b.X-a.X) < c.across {
			columnB = columnA
		}
		c.run(columnA, columnB, toward, back, func(i int) *cell { return c.at(i, rowA) }, dash)
		return
	}
	toward, back := down, up
	if b.Y < a.Y {
		toward, back = up, down
	}
	if math.Abs(b.Y-a.Y) < c.down {
		rowB = rowA
	}
	c.run(rowA, rowB, toward, back, func(i int) *cell { return c.at(columnA, i) }, dash)
}

// run draws a line through the cells from first to last.
func (c *canvas) run(first, last int, toward, back arms, at func(int) *cell, dash Dash) {
	step := 1
	if last < first {
		step = -1
	}
	for i := first; ; i += step {
		to := at(i)
		if i != last || i == first {
			to.add(toward, dash)
		}
		if i != first {
			to.add(back, dash)
		}
		if i == last {
			return
		}
	}
}

// add gives a cell an arm. Where two lines share one the solid one shows.
func (c *cell) add(arm arms, dash Dash) {
	k, both := 0, left|right
	if arm&both == 0 {
		k, both = 1, up|down
	}
	if c.line&both == 0 || dash == Solid {
		c.lineDash[k] = dash
	}
	c.line |= arm
}

// dashScale is how much longer dashes of dots are than on paper.
const dashScale = 1.8

// slanted draws the line from a to b in dots, done mm of the whole line being
// drawn before, and returns how many are drawn then.
func (c *canvas) slanted(a, b Point, dash Dash, done float64) float64 {
	wide, high := c.across/2, c.down/4
	steps := 1 + int(3*max(math.Abs(b.X-a.X)/wide, math.Abs(b.Y-a.Y)/high))
	length := math.Sqrt(float64((b.X-a.X)*(b.X-a.X)) + float64((b.Y-a.Y)*(b.Y-a.Y)))
	for i := range steps + 1 {
		t := float64(i) / float64(steps)
		if !dash.drawn(done+float64(t*length), dashScale) {
			continue
		}
		p := along(a, b, t)
		x, y := min(max(int(p.X/wide), 0), 2*c.columns-1), min(max(int(p.Y/high), 0), 4*c.rows-1)
		c.at(x/2, y/4).dots.set(x%2, y%4)
	}
	return done + length
}

func (c *canvas) mark(m mark) {
	glyphs := [...]string{Filled: "●", Open: "○", Cross: "×"}
	if c.ascii {
		glyphs = [...]string{Filled: "*", Open: "o", Cross: "x"}
	}
	c.at(c.cell(m.at)).top = glyphs[m.kind]
}

// text writes a text. Beside one that stands over hatching a cell stays free.
func (c *canvas) text(p *placed) {
	column, row, n := c.start(p.Text, p.text, p.spot)
	if p.over {
		c.at(max(column-1, 0), row).blank = true
		c.at(min(column+n, c.columns-1), row).blank = true
	}
	last := column
	for _, r := range p.text {
		width := runeColumns(r)
		if width == 0 {
			c.at(last, row).top += string(r)
			continue
		}
		last = column
		for i := range width {
			*c.at(column+i, row) = cell{taken: true}
		}
		c.at(column, row).top = string(r)
		column += width
	}
}

// lines returns the rows of the canvas without blanks at their ends.
func (c *canvas) lines() []string {
	lines := make([]string, c.rows)
	for row := range c.rows {
		var b strings.Builder
		for column := range c.columns {
			b.WriteString(c.glyph(c.at(column, row), column, row))
		}
		lines[row] = strings.TrimRight(b.String(), " ")
	}
	return lines
}

// glyph returns what a cell shows.
func (c *canvas) glyph(at *cell, column, row int) string {
	switch {
	case at.taken || at.top != "":
		return at.top
	case at.dots != 0 && c.ascii:
		return string(at.dots.ascii())
	case at.dots != 0:
		return string((at.dots | at.line.dots()).braille())
	}
	if g := c.lineGlyph(at, column, row); g != ' ' {
		return string(g)
	}
	if at.hatching != 0 && !at.blank {
		return string(rune(at.hatching))
	}
	return " "
}

// lineGlyph returns what the straight lines of a cell look like.
func (c *canvas) lineGlyph(at *cell, column, row int) rune {
	level, upright := at.line&(left|right), at.line&(up|down)
	switch {
	case level == 0 && upright == 0:
		return ' '
	case upright == 0:
		return cycle(levelGlyphs[at.lineDash[0]], c.ascii, column)
	case level == 0:
		return cycle(uprightGlyphs[at.lineDash[1]], c.ascii, row)
	case c.ascii:
		return '+'
	}
	return joints[at.line]
}

// cycle returns the glyph number i of a pattern that repeats.
func cycle(patterns [2]string, ascii bool, i int) rune {
	pattern := patterns[0]
	if ascii {
		pattern = patterns[1]
	}
	glyphs := []rune(pattern)
	return glyphs[i%len(glyphs)]
}

var (
	levelGlyphs = [...][2]string{
		Solid: {"─", "-"}, Dashes: {"╌", "- "}, Dots: {"┈", ". "}, LongDashes: {"─── ", "--- "}, ChainLine: {"──·", "--."},
	}
	uprightGlyphs = [...][2]string{
		Solid: {"│", "|"}, Dashes: {"╎", "| "}, Dots: {"┊", ". "}, LongDashes: {"││ ", "|| "}, ChainLine: {"│·", "|."},
	}
	joints = [16]rune{
		left | up: '┘', left | down: '┐', right | up: '└', right | down: '┌',
		left | right | up: '┴', left | right | down: '┬', up | down | left: '┤', up | down | right: '├',
		left | right | up | down: '┼',
	}
)
