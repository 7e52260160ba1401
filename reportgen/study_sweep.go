package reportgen

import (
	"cmp"
	"math"
	"slices"
	"strconv"
	"strings"

	"arrestcheck/arrest"
	"arrestcheck/arrest/quantity"
	"arrestcheck/arrest/study"
	"arrestcheck/limits"
)

// A Sweep is a swept job with what its report needs beside it.
type Sweep struct {
	Sheet   *Sheet          // the job as entered
	Swept   *study.Swept    // the points of the table
	Smooth  *study.Swept    // the same with more figures of the last axis, for the drawing
	Units   []quantity.Unit // of the axes, as typed
	Log     bool            // the last axis is drawn in even ratios
	Working int             // the row whose working is printed, from 1; 0: none
}

// Report makes the report of a sweep: where figures equal limits, the points
// one by one, the drawing, and the working of a row.
func (w *Sweep) Report(units UnitChoice) (Report, error) {
	b := newBuilder(w.Sheet, units)
	at := sweeping{builder: b, w: w}
	at.places()
	sections := []Section{{placesHeading, at.placeBlocks()}, {pointsHeading, at.pointBlocks()}}
	scenes, err := w.Figures(units)
	if err != nil {
		return Report{}, err
	}
	if len(scenes) > 0 {
		drawn := Section{Heading: drawnHeading}
		for _, s := range scenes {
			drawn.Blocks = append(drawn.Blocks, Block{Figure: s})
		}
		sections = append(sections, drawn)
	}
	if w.Working > 0 {
		sections = append(sections, Section{rowWorking + strconv.Itoa(w.Working), b.workingWith(w.Swept.At(w.Working - 1)...)})
	}
	return Report{Head: b.studyHead(at.moved()...), Warnings: at.warnings(), Sections: sections}, nil
}

// A sweeping is the report of a sweep being made.
type sweeping struct {
	builder
	w     *Sweep
	marks []swept
}

// A swept mark is a crossing or a turn, in the order of the points.
type swept struct {
	letter   string
	row      int
	x, y     float64
	column   int
	crossing *study.Crossing
	turn     *study.Turn
}

// moved says what was moved over which figures.
func (s *sweeping) moved() []Line {
	var list []Line
	for i := range s.w.Swept.Axes {
		a := &s.w.Swept.Axes[i]
		u := s.w.Units[i]
		digits := axisDigits(a.Values, u, true)
		text := s.say(movedOver, a.Key, format(a.Values[0], u, digits, quantity.Nearest),
			format(a.Values[len(a.Values)-1], u, digits, quantity.Nearest), strconv.Itoa(len(a.Values)))
		if len(a.Values) <= 3 {
			var figures []string
			for _, v := range a.Values {
				figures = append(figures, format(v, u, digits, quantity.Nearest))
			}
			text = s.say(movedList, a.Key, strings.Join(figures, ", "))
		}
		list = append(list, Line{Label: movedLabel, Text: s.say(insteadOf, text, inputOf(&s.w.Sheet.File.Job, a.Key).Band.Text)})
	}
	return list
}

// warnings are the statements that the columns call for.
func (s *sweeping) warnings() []Line {
	own := []said{s.told(betweenPoints)}
	if len(s.w.Swept.Crossings) > 0 {
		own = append(own, s.told(figuresOnly))
	}
	if slices.ContainsFunc(s.w.Swept.Crossings, func(c study.Crossing) bool { return s.floor(c.Column) && c.Limit.Sense == limits.AtMost }) {
		own = append(own, s.told(floorClearsNothing))
	}
	var shown []arrest.Estimate
	for i := range s.w.Swept.Series {
		c := &s.w.Swept.Series[i]
		shown = append(shown, arrest.Estimate{Quantity: c.Quantity, Evidence: c.Evidence, Bound: c.Bound})
	}
	return s.studyWarnings(shown, own...)
}

func (s *sweeping) floor(column int) bool { return s.w.Swept.Series[column].Bound == arrest.AtLeast }

// places gathers crossings and turns and gives them letters.
func (s *sweeping) places() {
	sw := s.w.Swept
	for i := range sw.Crossings {
		c := &sw.Crossings[i]
		s.marks = append(s.marks, swept{row: c.Row, x: c.X, y: s.bare(c), column: c.Column, crossing: c})
	}
	for i := range sw.Turns {
		t := &sw.Turns[i]
		s.marks = append(s.marks, swept{row: t.Row, x: t.X, y: t.Y, column: t.Column, turn: t})
	}
	slices.SortStableFunc(s.marks, func(a, b swept) int {
		return cmp.Or(cmp.Compare(a.row, b.row), cmp.Compare(a.x, b.x))
	})
	for i := range s.marks {
		s.marks[i].letter = letterOf(i)
	}
}

// bare is the figure of a column at a crossing, without the allowance with which
// it is compared.
func (s *sweeping) bare(c *study.Crossing) float64 {
	wide := s.allowance(&s.w.Swept.Series[c.Column])
	if c.End == study.TheLow {
		wide = -wide
	}
	return c.Y / (1 + wide)
}

// letterOf returns a, b, ... z, aa, ab, ...
func letterOf(i int) string {
	if i < 26 {
		return string(rune('a' + i))
	}
	return letterOf(i/26-1) + letterOf(i%26)
}

func (s *sweeping) last() *study.Axis { return &s.w.Swept.Axes[len(s.w.Swept.Axes)-1] }
func (s *sweeping) lastUnit() quantity.Unit {
	return s.w.Units[len(s.w.Units)-1]
}

// place is where a mark lies, in words.
func (s *sweeping) place(m *swept) string {
	here := s.say(placeOne, s.last().Key, s.d.figureAs(s.lastUnit().Dimension, s.lastUnit(), m.x, workingDigits, m.lower()))
	if len(s.w.Swept.Axes) == 1 {
		return here
	}
	a, u := &s.w.Swept.Axes[0], s.w.Units[0]
	first := s.say(placeOne, a.Key, s.d.figureAs(u.Dimension, u, a.Values[m.row], axisDigits(a.Values, u, true), quantity.Nearest))
	return s.say(placeWith, first, here)
}

// lower is how the place of a mark is rounded.
func (m *swept) lower() quantity.Rounding {
	if m.crossing != nil {
		return m.crossing.Lower
	}
	return quantity.Nearest
}

// placeBlocks say what is at each mark, and how the limits without one stand.
func (s *sweeping) placeBlocks() []Block {
	var list []Line
	for i := range s.marks {
		m := &s.marks[i]
		text := ""
		if m.crossing != nil {
			text = s.crossing(m)
		} else {
			text = s.turn(m)
		}
		list = append(list, Line{Label: m.letter, Text: text})
	}
	blocks := []Block{{Lines: list}}
	if len(list) == 0 {
		blocks = []Block{{Text: noPlace}}
	}
	if rest := s.uncrossed(); len(rest) > 0 {
		blocks = append(blocks, Block{Lines: bullets(rest)})
	}
	return blocks
}

func (s *sweeping) what(column int, end study.End) string {
	return s.columnTitle(&s.w.Swept.Series[column].Column) + endWords[end]
}

// crossing puts a crossing in words, with what a check says there.
func (s *sweeping) crossing(m *swept) string {
	c := m.crossing
	what, limit, side := s.what(c.Column, c.End), s.limitTitle(c.Limit, c.Printed), sideSmaller
	if wide := s.allowance(&s.w.Swept.Series[c.Column]); wide > 0 {
		what = s.say(withShare, what, percent(wide))
	}
	if c.Lower == quantity.Up {
		side = sideGreater
	}
	text := s.say(crossedAt, s.place(m), what, limit, side)
	if c.Jumps {
		text = s.say(leapAt, s.place(m), what, limit, side, s.figureOf(c.Column, c.Y))
	}
	if s.w.Swept.Series[c.Column].Evidence == arrest.Shape {
		return text + " " + onlyIfShape
	}
	u := s.lastUnit()
	moves := s.w.Swept.At(c.Row * len(s.last().Values))
	moves[len(moves)-1].To = asPrinted(m.x, u, workingDigits, c.Lower)
	check := s.checkWith(moves...)
	return text + " " + s.say(checkSays, format(m.x, u, workingDigits, c.Lower), check.outcomeOf(c.Limit))
}

// turn puts a turn in words.
func (s *sweeping) turn(m *swept) string {
	kind := turnLeast
	if m.turn.Greatest {
		kind = turnGreatest
	}
	return s.say(turnsAt, s.place(m), s.what(m.column, m.turn.End), kind, s.figureOf(m.column, m.y))
}

func (s *sweeping) figureOf(column int, si float64) string {
	rec, _ := s.w.Swept.Series[column].Quantity.Record()
	return s.d.figure(rec.Dimension, si, workingDigits, quantity.Nearest)
}

// uncrossed says how the columns stand to the limits that none of their ends
// passes.
func (s *sweeping) uncrossed() []string {
	var list []string
	sw := s.w.Swept
	for i := range sw.Series {
		c := &sw.Series[i]
		if c.Evidence == arrest.Shape || c.Bound == "" {
			continue
		}
		for k := range s.w.Sheet.File.Sets {
			set := &s.w.Sheet.File.Sets[k]
			for n := range set.Limits {
				l := &set.Limits[n]
				crossed := slices.ContainsFunc(sw.Crossings, func(x study.Crossing) bool { return x.Column == i && x.Limit == l })
				if l.Quantity == c.Quantity && !crossed {
					list = append(list, s.say(s.standing(c, l), s.columnTitle(&c.Column), s.limitTitle(l, false)))
				}
			}
		}
	}
	return list
}

// standing says on which side of a limit all points of a column lie.
func (s *sweeping) standing(c *study.Series, l *limits.Limit) phrase {
	best, worst := c.Low, c.High
	if c.Bound == arrest.AtLeast {
		worst = c.Reach
	}
	if l.Sense == limits.AtLeast {
		best, worst = worst, best
	}
	switch wide := s.allowance(c); {
	case best != nil && all(best, func(y float64) bool { return beyond(l, y, -wide) }):
		return alwaysBeyond
	case c.Bound == arrest.AtLeast && l.Sense == limits.AtMost && all(worst, func(y float64) bool { return !beyond(l, y, 0) }):
		return neverFloor
	case worst != nil && all(worst, func(y float64) bool { return !beyond(l, y, wide) }):
		return neverBeyond
	}
	return alwaysSplit
}

// allowance is the share by which a limit widens the figures of a column.
func (s *sweeping) allowance(c *study.Series) float64 {
	if in := s.w.Sheet.File.Job.AllowanceInput(); in != nil && c.Evidence == arrest.Modelled {
		return in.Band.High
	}
	return 0
}

// beyond reports whether a figure, moved by a share towards the wrong side, is
// beyond the stricter figure of a limit.
func beyond(l *limits.Limit, y, share float64) bool {
	strict := l.Bound.Value
	if also := l.AlsoPrinted; also != nil && (also.Value < strict) == (l.Sense == limits.AtMost) {
		strict = also.Value
	}
	if l.Sense == limits.AtLeast {
		return y-float64(share*y) < strict
	}
	return y+float64(share*y) > strict
}

// all reports whether every figure that is known fits, and one is known.
func all(list []float64, fits func(float64) bool) bool {
	some := false
	for _, y := range list {
		if math.IsNaN(y) {
			continue
		}
		if !fits(y) {
			return false
		}
		some = true
	}
	return some
}
