package reportgen

import (
	"math"
	"slices"
	"strconv"

	"arrestcheck/arrest"
	"arrestcheck/arrest/quantity"
	"arrestcheck/arrest/study"
)

// pointBlocks are the tables of the points, with the marks between them, and
// the columns that are the same at every point.
func (s *sweeping) pointBlocks() []Block {
	order := s.order()
	var groups [][]strip
	var same []Line
	for i := range s.w.Swept.Series {
		c := &s.w.Swept.Series[i]
		if constant(c) && s.w.Swept.Impossible == nil {
			same = append(same, Line{Label: "-", Text: s.columnHead(c) + ": " + s.constantText(c)})
			continue
		}
		groups = append(groups, s.columnStrips(i, order))
	}
	var blocks []Block
	for _, t := range pack(s.axisStrips(order), groups) {
		blocks = append(blocks, Block{Table: t})
	}
	for _, note := range s.notes() {
		blocks = append(blocks, Block{Text: note})
	}
	if len(same) > 0 {
		blocks = append(blocks, Block{Text: constantHeading + ":", Lines: same})
	}
	return blocks
}

// A line of the table is a point, or a mark between two points.
type sweepLine struct {
	point int
	mark  *swept
}

// order puts the marks between the points.
func (s *sweeping) order() []sweepLine {
	last := s.last().Values
	var list []sweepLine
	next := 0
	for point := range s.w.Swept.Len() {
		row, i := point/len(last), point%len(last)
		list = append(list, sweepLine{point: point})
		for next < len(s.marks) && s.marks[next].row == row && (i == len(last)-1 || s.marks[next].x < last[i+1]) {
			list = append(list, sweepLine{point, &s.marks[next]})
			next++
		}
	}
	return list
}

// axisStrips are the number of the row and the figures of the axes.
func (s *sweeping) axisStrips(order []sweepLine) []strip {
	rows := strip{header: rowLabel}
	for _, l := range order {
		text := ""
		if l.mark != nil {
			text = l.mark.letter
		} else {
			text = strconv.Itoa(l.point + 1)
		}
		rows.cells = append(rows.cells, text)
	}
	strips := []strip{rows}
	for k := range s.w.Swept.Axes {
		a := &s.w.Swept.Axes[k]
		for n, u := range s.d.pair(s.w.Units[k].Dimension, s.w.Units[k], greatestOf(a.Values)) {
			head := u.Symbol
			if n == 0 {
				head = a.Key + "\n" + head
			}
			digits := axisDigits(a.Values, u, n == 0)
			one := strip{header: head}
			for _, l := range order {
				move := s.w.Swept.At(l.point)[k]
				text := quantity.Number(move.To, u, digits, quantity.Nearest)
				if l.mark != nil && k == len(s.w.Swept.Axes)-1 {
					text = quantity.Number(l.mark.x, u, workingDigits, l.mark.lower())
				}
				one.cells = append(one.cells, text)
			}
			one.cells = aligned(one.cells)
			strips = append(strips, one)
		}
	}
	return strips
}

// columnStrips are the figures of a column, in one unit or two.
func (s *sweeping) columnStrips(i int, order []sweepLine) []strip {
	c := &s.w.Swept.Series[i]
	rec, _ := c.Quantity.Record()
	var strips []strip
	for n, u := range s.d.pair(rec.Dimension, quantity.Unit{}, greatestOf(c.Low, c.High, c.Reach)) {
		head := unitHead(u)
		if n == 0 {
			head = s.columnHead(c) + "\n" + head
		}
		one := strip{header: head}
		for _, l := range order {
			text := ""
			switch {
			case l.mark == nil:
				text = s.cell(c, l.point, u)
			case l.mark.column == i:
				text = quantity.Number(l.mark.y, u, pageDigits, quantity.Nearest)
			}
			one.cells = append(one.cells, text)
		}
		one.cells = aligned(one.cells)
		strips = append(strips, one)
	}
	return strips
}

// unitHead is the unit at the head of a column; a ratio has none.
func unitHead(u quantity.Unit) string {
	if u.Symbol == "1" {
		return ""
	}
	return u.Symbol
}

// columnHead names a column with the word for its bound.
func (s *sweeping) columnHead(c *study.Series) string {
	what := s.columnTitle(&c.Column)
	switch c.Bound {
	case arrest.AtLeast:
		return s.say(floorTitle, what)
	case arrest.AtMost:
		return s.say(ceilingTitle, what)
	}
	return what
}

// cell is the figure of a column at a point: one, or the least and the greatest
// over the other entries.
func (s *sweeping) cell(c *study.Series, point int, u quantity.Unit) string {
	low, high, round := seriesEnds(c, point)
	switch {
	case s.w.Swept.Impossible != nil && s.w.Swept.Impossible[point]:
		return cannotShort
	case math.IsNaN(low) && math.IsNaN(high):
		return noneShort
	case math.IsNaN(low), math.IsNaN(high):
		return quantity.Number(either(low, high), u, pageDigits, round)
	}
	first, last := quantity.Number(low, u, pageDigits, round), quantity.Number(high, u, pageDigits, quantity.Nearest)
	if same := quantity.Number(high, u, pageDigits, round); first == same {
		return first
	}
	return first + noBreak + "to" + noBreak + last
}

func either(a, b float64) float64 {
	if math.IsNaN(a) {
		return b
	}
	return a
}

// constantText is the one figure of a column.
func (s *sweeping) constantText(c *study.Series) string {
	rec, _ := c.Quantity.Record()
	low, high, round := seriesEnds(c, 0)
	switch {
	case math.IsNaN(low) && math.IsNaN(high):
		return noFigure
	case math.IsNaN(low) || math.IsNaN(high) || low == high:
		return s.d.figure(rec.Dimension, either(low, high), pageDigits, round)
	}
	return s.d.span(rec.Dimension, quantity.Unit{}, low, high, pageDigits)
}

// notes explain what stands in the cells.
func (s *sweeping) notes() []string {
	var notes []string
	add := func(text string, is func(c *study.Series, point int) bool) {
		for i := range s.w.Swept.Series {
			c := &s.w.Swept.Series[i]
			for point := range s.w.Swept.Len() {
				if is(c, point) {
					notes = append(notes, text)
					return
				}
			}
		}
	}
	if slices.ContainsFunc(s.w.Swept.Series, func(c study.Series) bool { return s.allowance(&c) > 0 }) {
		notes = append(notes, bareNote)
	}
	impossible := func(point int) bool { return s.w.Swept.Impossible != nil && s.w.Swept.Impossible[point] }
	add(bandNote, func(c *study.Series, point int) bool {
		low, high, _ := seriesEnds(c, point)
		return low < high
	})
	add(noneNote, func(c *study.Series, point int) bool {
		low, high, _ := seriesEnds(c, point)
		return math.IsNaN(low) && math.IsNaN(high) && !impossible(point)
	})
	add(cannotNote, func(_ *study.Series, point int) bool { return impossible(point) })
	return notes
}

// constant reports whether a column is the same at every point.
func constant(c *study.Series) bool {
	for _, list := range [][]float64{c.Low, c.High, c.Reach} {
		if len(list) > 0 && slices.ContainsFunc(list, func(y float64) bool { return y != list[0] && !(math.IsNaN(y) && math.IsNaN(list[0])) }) {
			return false
		}
	}
	return true
}

// seriesEnds returns the least and the greatest figure of a column at a point,
// NaN for what its bound leaves open, and which way the figure is rounded.
func seriesEnds(c *study.Series, point int) (low, high float64, round quantity.Rounding) {
	at := func(list []float64) float64 {
		if list == nil {
			return math.NaN()
		}
		return list[point]
	}
	switch c.Bound {
	case arrest.AtLeast:
		return at(c.Low), at(c.Reach), quantity.Down
	case arrest.AtMost:
		return math.NaN(), at(c.High), quantity.Up
	}
	return at(c.Low), at(c.High), quantity.Nearest
}
