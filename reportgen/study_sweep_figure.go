package reportgen

import (
	"slices"
	"strings"

	"arrestcheck/arrest"
	"arrestcheck/arrest/quantity"
	"arrestcheck/arrest/study"
	drawing "arrestcheck/reportgen/figure"
)

// mostCurves bounds how many rows of a first axis are drawn.
const mostCurves = 6

// Figures draws the sweep: one figure for each kind of figure (forces, lengths)
// that moves. The error says that there is nothing to draw.
func (w *Sweep) Figures(units UnitChoice) ([]*drawing.Scene, error) {
	s := sweeping{builder: newBuilder(w.Sheet, units), w: w}
	s.places()
	var scenes []*drawing.Scene
	var done []quantity.Dimension
	for i := range w.Swept.Series {
		dim := dimensionOf(w.Swept.Series[i].Quantity)
		if slices.Contains(done, dim) {
			continue
		}
		done = append(done, dim)
		if columns := s.drawn(dim); len(columns) > 0 {
			scene, err := s.plot(dim, columns).Scene()
			if err != nil {
				return nil, err
			}
			scenes = append(scenes, scene)
		}
	}
	return scenes, nil
}

func dimensionOf(q arrest.Quantity) quantity.Dimension {
	rec, _ := q.Record()
	return rec.Dimension
}

// drawn lists the columns of a kind that move, if there is more than one point.
func (s *sweeping) drawn(dim quantity.Dimension) []int {
	var list []int
	for i := range s.w.Smooth.Series {
		c := &s.w.Smooth.Series[i]
		if dimensionOf(c.Quantity) == dim && c.Bound != "" && !constant(c) {
			list = append(list, i)
		}
	}
	switch {
	case len(s.last().Values) < 2:
		return nil
	case len(s.w.Smooth.Axes) == 2 && len(list) > 1:
		return list[:1] // a family of curves is enough for one drawing
	}
	return list
}

// plot draws some columns over the last axis.
func (s *sweeping) plot(dim quantity.Dimension, columns []int) *drawing.Plot {
	x := s.d.pair(s.lastUnit().Dimension, s.lastUnit(), greatestOf(s.last().Values))[0]
	var most []float64
	for _, i := range columns {
		c := &s.w.Smooth.Series[i]
		most = append(most, greatestOf(c.Low, c.High, c.Reach))
	}
	y := s.d.pair(dim, quantity.Unit{}, greatestOf(most))[0]
	keys := s.last().Key
	if len(s.w.Swept.Axes) == 2 {
		keys = s.say(bothKeys, s.w.Swept.Axes[0].Key, keys)
	}
	title := s.columnTitle(&s.w.Smooth.Series[columns[0]].Column)
	name := title
	if len(columns) > 1 {
		name = dim.String()
		title = upperFirst(name)
	}
	p := &drawing.Plot{
		Title:     s.say(sweepTitle, upperFirst(title), keys, orNothing(s.w.Sheet.File.Document.Title)),
		Statement: notAPermission,
		X:         drawing.Axis{Name: s.last().Key, Unit: unitHead(x), Low: x.From(s.last().Values[0]), High: x.From(s.last().Values[len(s.last().Values)-1]), Log: s.w.Log},
		Y:         drawing.Axis{Name: name, Unit: unitHead(y)},
		Desc:      s.sweepDesc(columns),
	}
	if s.s.isExample() {
		p.Stamp = exampleStamp
	}
	for n, i := range columns {
		s.curves(p, n, i, x, y, len(columns) > 1)
	}
	s.levels(p, columns, y)
	s.points(p, columns, x, y)
	p.Notes = append(p.Notes, s.figureNotes(columns)...)
	return p
}

// sweepPens tell columns apart without colour.
var sweepPens = []drawing.Pen{
	drawing.CurvePen, {Weight: drawing.Medium, Dash: drawing.Dashes}, drawing.MeanPen, {Weight: drawing.Medium},
}

// curves adds the curves of a column: one for each row of a first axis that is
// drawn, two where its ends differ.
func (s *sweeping) curves(p *drawing.Plot, nth, column int, x, y quantity.Unit, several bool) {
	c := &s.w.Smooth.Series[column]
	axes := s.w.Smooth.Axes
	n := len(axes[len(axes)-1].Values)
	pen := sweepPens[nth%len(sweepPens)]
	for _, row := range s.drawnRows() {
		label := ""
		if several || len(axes) == 1 {
			label = s.curveLabel(c)
		}
		if len(axes) == 2 {
			label = strings.Trim(label+", "+axes[0].Key+" "+format(axes[0].Values[row], s.w.Units[0], axisDigits(axes[0].Values, s.w.Units[0], true), quantity.Nearest), ", ")
		}
		low, high := c.Low, c.High
		if c.Bound == arrest.AtLeast {
			high = c.Reach
		}
		cut := func(list []float64) []float64 { return list[row*n : (row+1)*n] }
		switch {
		case low == nil:
			p.Curves = append(p.Curves, curveOf(axes, cut(high), x, y, label, pen))
		case high == nil || slices.Equal(cut(low), cut(high)):
			p.Curves = append(p.Curves, curveOf(axes, cut(low), x, y, label, pen))
		default:
			fine := pen
			fine.Weight = drawing.Thin
			p.Curves = append(p.Curves, curveOf(axes, cut(high), x, y, label, pen), curveOf(axes, cut(low), x, y, "", fine))
		}
	}
}

// drawnRows are the rows of a first axis that are drawn, both ends among them.
func (s *sweeping) drawnRows() []int {
	axes := s.w.Smooth.Axes
	if len(axes) == 1 {
		return []int{0}
	}
	n := len(axes[0].Values)
	k := min(n, mostCurves)
	var rows []int
	for i := range k {
		row := 0
		if k > 1 {
			row = (i*(n-1) + (k-1)/2) / (k - 1)
		}
		rows = append(rows, row)
	}
	return slices.Compact(rows)
}

// curveLabel is short: it stands at the end of a line.
func (s *sweeping) curveLabel(c *study.Series) string {
	text := s.shortTitle(c.Quantity)
	switch c.Evidence {
	case arrest.Shape:
		text += ", " + c.From
	case arrest.Rated:
		text += ", " + c.From
	case arrest.Modelled:
		text += ", " + modelRemark
	}
	switch c.Bound {
	case arrest.AtLeast:
		return s.say(floorDrawn, text)
	case arrest.AtMost:
		return s.say(ceilingTitle, text)
	}
	return text
}

func (b *builder) shortTitle(q arrest.Quantity) string {
	if text, ok := shortTitles[q]; ok {
		return text
	}
	return b.title(q)
}

func curveOf(axes []study.Axis, ys []float64, x, y quantity.Unit, label string, pen drawing.Pen) drawing.Curve {
	c := drawing.Curve{Label: label, Pen: pen}
	for i, v := range axes[len(axes)-1].Values {
		c.X, c.Y = append(c.X, x.From(v)), append(c.Y, y.From(ys[i]))
	}
	return c
}

// levels adds the limits on what is drawn.
func (s *sweeping) levels(p *drawing.Plot, columns []int, y quantity.Unit) {
	for k := range s.w.Sheet.File.Sets {
		set := &s.w.Sheet.File.Sets[k]
		for n := range set.Limits {
			l := &set.Limits[n]
			if slices.ContainsFunc(columns, func(i int) bool { return s.w.Smooth.Series[i].Quantity == l.Quantity }) {
				label := s.say(limitDrawn, l.ID, senseWords[l.Sense], l.Bound.Text)
				if len(columns) > 1 {
					label = s.say(limitOn, label, s.shortTitle(l.Quantity))
				}
				p.Levels = append(p.Levels, drawing.Level{At: y.From(l.Bound.Value), Label: label, Pen: drawing.LimitPen})
			}
		}
	}
}

// mostNamed is how many marks are drawn with their figures beside them; of more
// only the letters are, and the figures stand below; of more than mostLettered
// not even these are.
const (
	mostNamed    = 3
	mostLettered = 8
)

// points adds the marks, and the point of the job or where its band lies.
func (s *sweeping) points(p *drawing.Plot, columns []int, x, y quantity.Unit) {
	var named []string
	from := len(p.Points)
	for i := range s.marks {
		m := &s.marks[i]
		if slices.Contains(columns, m.column) && slices.Contains(s.drawnRows(), m.row) {
			named = append(named, m.letter+": "+format(m.x, x, workingDigits, m.lower()))
			p.Points = append(p.Points, drawing.Marked{X: x.From(m.x), Y: y.From(m.y), Label: m.letter, Symbol: drawing.Open})
		}
	}
	switch {
	case len(named) <= mostNamed:
		for i, text := range named {
			p.Points[from+i].Label = text
		}
	case len(named) <= mostLettered:
		p.Notes = append(p.Notes, strings.Join(named, ", "))
	default:
		for i := range named {
			p.Points[from+i].Label = ""
		}
	}
	in := inputOf(&s.w.Sheet.File.Job, s.last().Key)
	if in.HasValue() && in.Band.Low == in.Band.High {
		s.jobPoint(p, in.Band.Value, columns, x, y)
		return
	}
	for _, end := range []float64{in.Band.Low, in.Band.High} {
		p.Uprights = append(p.Uprights, drawing.Level{At: x.From(end), Label: s.say(jobEnd, format(end, x, pageDigits, quantity.Nearest)), Pen: drawing.HelpPen})
	}
}

// jobPoint marks where the job as entered stands on the first of the columns
// that it has a figure of.
func (s *sweeping) jobPoint(p *drawing.Plot, at float64, columns []int, x, y quantity.Unit) {
	for _, i := range columns {
		e := s.estimateOf(&s.w.Smooth.Series[i].Column)
		if e == nil {
			continue
		}
		figure := either(e.Value, either(e.Low, e.High))
		p.Points = append(p.Points, drawing.Marked{X: x.From(at), Y: y.From(figure), Symbol: drawing.Filled,
			Label: s.say(jobPoint, format(at, x, pageDigits, quantity.Nearest), format(figure, y, pageDigits, demandRounding(e.Bound)))})
		return
	}
}

// estimateOf returns what the job as entered says of a column.
func (s *sweeping) estimateOf(c *study.Column) *arrest.Estimate {
	nth := 0
	for i := range s.res().Estimates {
		e := &s.res().Estimates[i]
		if e.Quantity == c.Quantity && e.Evidence == c.Evidence && e.From == c.From {
			if nth == c.Nth && !e.Outside {
				return e
			}
			nth++
		}
	}
	return nil
}

// figureNotes are what must stand below a figure of these columns.
func (s *sweeping) figureNotes(columns []int) []string {
	var notes []string
	var floor, mean, shape bool
	for _, i := range columns {
		c := &s.w.Smooth.Series[i]
		floor = floor || c.Bound == arrest.AtLeast
		mean = mean || isMean(c.Quantity)
		shape = shape || c.Evidence == arrest.Shape
	}
	if slices.ContainsFunc(columns, func(i int) bool { return s.allowance(&s.w.Smooth.Series[i]) > 0 }) {
		notes = append(notes, bareNote)
	}
	if s.banded(columns) {
		notes = append(notes, twoLines)
	}
	if mean {
		notes = append(notes, meanNote[s.sub])
	}
	if floor {
		notes = append(notes, floorNote)
	}
	if shape {
		notes = append(notes, shapeNote)
	}
	if len(s.w.Smooth.Axes) == 2 && len(s.w.Smooth.Series) > 1 {
		notes = append(notes, s.say(firstDrawn, s.columnTitle(&s.w.Smooth.Series[columns[0]].Column)))
	}
	if len(s.w.Smooth.Axes) == 2 && len(s.drawnRows()) < len(s.w.Smooth.Axes[0].Values) {
		notes = append(notes, s.say(someRows, s.w.Smooth.Axes[0].Key))
	}
	return notes
}

// banded reports whether a column has two ends anywhere.
func (s *sweeping) banded(columns []int) bool {
	for _, i := range columns {
		for point := range s.w.Smooth.Len() {
			if low, high, _ := seriesEnds(&s.w.Smooth.Series[i], point); low < high {
				return true
			}
		}
	}
	return false
}

// sweepDesc says what the figure shows to those who do not see it: where each
// column begins and ends.
func (s *sweeping) sweepDesc(columns []int) string {
	var parts []string
	for _, i := range columns {
		c := &s.w.Swept.Series[i]
		dim := dimensionOf(c.Quantity)
		n := s.w.Swept.Len()
		text := func(point int) string {
			low, high, round := seriesEnds(c, point)
			return s.d.figure(dim, either(low, high), pageDigits, round)
		}
		parts = append(parts, s.say(fromTo, s.columnHead(c), text(0), text(n-1)))
	}
	return strings.Join(parts, " ")
}
