package study

import (
	"context"
	"math"
	"slices"
	"sync"

	"arrestcheck/arrest"
	"arrestcheck/arrest/quantity"
	"arrestcheck/limits"
)

// A Plan says what a sweep is to do.
type Plan struct {
	Axes    []Axis       // one or two
	Columns []Column     // see Columns
	Sets    []limits.Set // crossings of these limits are looked for; must stay as they are
	Workers int          // below 1: one
}

// A Series is one column over all points of a sweep, SI, in the order of the
// points. A slice is nil where the bound leaves that figure out, and NaN stands
// where nothing is known. Slices of one Series may share their memory.
type Series struct {
	Column
	Bound            arrest.Bound // empty where no point gives the estimate
	Low, Value, High []float64
	Reach            []float64 // upper end of a floor over all that the entries allow
}

// An End names one of the figures of a Series.
type End string

const (
	TheValue End = "value" // the one figure of a job without bands
	TheLow   End = "low"
	TheHigh  End = "high"
	TheReach End = "reach"
)

// A Turn is a point between the ends of the last axis at which a figure is
// greatest or least (M-54): more of the input is better up to there, and worse
// beyond, or the other way.
type Turn struct {
	Column   int // index into Swept.Series
	End      End
	Row      int     // index into the values of the first of two axes; else 0
	X, Y     float64 // SI; X is good to about 1e-8 of it where the figure is smooth
	Greatest bool
}

// A Crossing is a point of the last axis at which a figure passes a limit.
type Crossing struct {
	Set     *limits.Set
	Limit   *limits.Limit
	Printed bool // the limit as also printed (Limit.AlsoPrinted), not as typed
	Column  int  // index into Swept.Series
	End     End
	Row     int // as in Turn

	// X is the last float64 at which the figure is not beyond the limit, and Y
	// the figure there, a modelled one with the user's allowance: the limit
	// itself, to the rounding of the evaluation, unless Jumps.
	X, Y float64

	// Lower is the side of lower demand: Down where the figure is not beyond the
	// limit below X, Up where it is not above X. X is printed with it.
	Lower quantity.Rounding

	// Jumps is true where the figure passes the limit in one leap.
	Jumps bool
}

// A Swept is a job evaluated at every combination of the figures of its axes.
type Swept struct {
	Job        *arrest.Job
	Axes       []Axis
	Series     []Series
	Impossible []bool // points at which a check refuses the job (arrest.Refused); nil where there are none
	Turns      []Turn
	Crossings  []Crossing // by column, end, row and place

	inputs []int
	sets   []limits.Set
}

// Sweep evaluates j at every combination of the figures of the axes, the last
// axis running fastest (M-54). Every figure is that of a single check of the
// job with those inputs replaced, to the last bit.
//
// Turns and crossings are looked for along the last axis. Their points are
// worked out with the same evaluation, not read off between two points; both
// ends of a band are followed. j and the sets must stay as they are.
//
// The error is a *Refusal, or that of the context.
func Sweep(ctx context.Context, j *arrest.Job, p Plan) (*Swept, error) {
	inputs, err := place(j, p.Axes)
	if err != nil {
		return nil, err
	}
	if len(p.Columns) == 0 {
		return nil, &Refusal{ID: NothingAsked}
	}
	s := &Swept{Job: j, Axes: p.Axes, inputs: inputs, sets: p.Sets}
	for _, c := range p.Columns {
		s.Series = append(s.Series, Series{Column: c})
	}
	if err := s.fill(ctx, p.Workers); err != nil {
		return nil, err
	}
	if err := s.analyse(ctx, p.Workers); err != nil {
		return nil, err
	}
	return s, nil
}

// Len returns how many points there are.
func (s *Swept) Len() int {
	n := 1
	for _, a := range s.Axes {
		n *= len(a.Values)
	}
	return n
}

// At returns the figures of the axes at a point, as moves.
func (s *Swept) At(point int) []Move {
	moves := make([]Move, len(s.Axes))
	for k := len(s.Axes) - 1; k >= 0; k-- {
		a := &s.Axes[k]
		moves[k] = Move{a.Key, a.Values[point%len(a.Values)]}
		point /= len(a.Values)
	}
	return moves
}

// Working returns the single check of a point with its working. It reports
// false where the point is impossible.
func (s *Swept) Working(point int) (arrest.Result, bool, error) {
	if point < 0 || point >= s.Len() {
		return arrest.Result{}, false, &Refusal{ID: NoSuchRow, SI: float64(point)}
	}
	return Working(s.Job, s.At(point)...)
}

// fill evaluates all points.
func (s *Swept) fill(ctx context.Context, workers int) error {
	n := s.Len()
	s.Impossible = make([]bool, n)
	exact := s.probe().Exact()
	for i := range s.Series {
		c := &s.Series[i]
		c.Value = make([]float64, n)
		c.Low, c.High, c.Reach = c.Value, c.Value, c.Value
		if !exact {
			c.Low, c.High, c.Reach = make([]float64, n), make([]float64, n), make([]float64, n)
		}
	}
	var note sync.Mutex
	tell := progress(ctx)
	err := blocks(ctx, n, pointsAtOnce(s.probe()), workers, func() func(int, int, int) {
		p := s.probe()
		to, x := make([]arrest.Ends, len(s.Series)), make([]float64, len(s.Axes))
		return func(_, from, until int) {
			for i := from; i < until; i++ {
				s.point(x, i)
				s.Impossible[i] = !p.At(x, to)
				s.store(i, to, exact)
			}
			tell(until - from)
			note.Lock()
			defer note.Unlock()
			for k := range s.Series {
				if b := p.Bound(k); b != "" {
					s.Series[k].Bound = b
				}
			}
		}
	})
	if !slices.Contains(s.Impossible, true) {
		s.Impossible = nil
	}
	for i := range s.Series {
		s.Series[i].shorten()
	}
	return err
}

func (s *Swept) probe() probe {
	columns := make([]Column, len(s.Series))
	for i := range columns {
		columns[i] = s.Series[i].Column
	}
	return newProbe(s.Job, s.inputs, columns)
}

// point writes the figures of the axes at a point.
func (s *Swept) point(x []float64, point int) {
	if len(x) == 1 {
		x[0] = s.Axes[0].Values[point]
		return
	}
	n := len(s.Axes[1].Values)
	x[0], x[1] = s.Axes[0].Values[point/n], s.Axes[1].Values[point%n]
}

func (s *Swept) store(i int, to []arrest.Ends, exact bool) {
	for k := range s.Series {
		c, e := &s.Series[k], &to[k]
		c.Value[i] = e.Value
		if !exact {
			c.Low[i], c.High[i], c.Reach[i] = e.Low, e.High, e.Reach
		}
	}
}

// shorten drops what the bound leaves out and a value that is nowhere known.
func (c *Series) shorten() {
	switch c.Bound {
	case "":
		c.Low, c.Value, c.High, c.Reach = nil, nil, nil, nil
	case arrest.AtLeast:
		c.High = nil
	case arrest.AtMost:
		c.Low, c.Value, c.Reach = nil, nil, nil
	default:
		c.Reach = nil
	}
	if !slices.ContainsFunc(c.Value, func(x float64) bool { return x == x }) {
		c.Value = nil
	}
}

// A line is one end of one series that is followed.
type line struct {
	column int
	end    End
	ys     []float64
	holds  []held
}

// lines returns the ends to follow: both where they differ, also by an
// allowance, else the one figure.
func (s *Swept) lines() []line {
	var list []line
	for i := range s.Series {
		c := &s.Series[i]
		far, end := c.High, TheHigh
		if c.Bound == arrest.AtLeast {
			far, end = c.Reach, TheReach
		}
		allowance := c.allowance(s.Job)
		add := func(end End, ys []float64) {
			if ys != nil {
				list = append(list, line{i, end, ys, against(s.sets, c.Quantity, end.widened(allowance))})
			}
		}
		if allowance == 0 && c.Low != nil && far != nil && (&c.Low[0] == &far[0] || slices.EqualFunc(c.Low, far, alike)) {
			add(TheValue, far)
			continue
		}
		add(TheLow, c.Low)
		add(end, far)
	}
	return list
}

// alike reports whether two ends are one figure but for rounding.
func alike(low, high float64) bool {
	return low == high || high-low <= noise*math.Abs(high) || low != low && high != high
}

// of picks the figure of a line from the ends of its column.
func (l *line) of(e *arrest.Ends) float64 {
	switch l.end {
	case TheLow:
		return e.Low
	case TheHigh:
		return e.High
	case TheReach:
		return e.Reach
	}
	if math.IsNaN(e.High) {
		return e.Reach
	}
	return e.High
}

// A held is one figure of a limit that a column is held against.
type held struct {
	set     *limits.Set
	limit   *limits.Limit
	printed bool
	level   level
}

// against returns the figures of all limits on a quantity, for a curve widened
// by a share.
func against(sets []limits.Set, q arrest.Quantity, widen float64) []held {
	var list []held
	for i := range sets {
		for k := range sets[i].Limits {
			l := &sets[i].Limits[k]
			if l.Quantity != q {
				continue
			}
			low := l.Sense == limits.AtLeast
			list = append(list, held{&sets[i], l, false, level{l.Bound.Value, low, widen}})
			if l.AlsoPrinted != nil {
				list = append(list, held{&sets[i], l, true, level{l.AlsoPrinted.Value, low, widen}})
			}
		}
	}
	return list
}

// analyse looks for turns and crossings in every row of every line.
func (s *Swept) analyse(ctx context.Context, workers int) error {
	lines := s.lines()
	rows := s.Len() / len(s.Axes[len(s.Axes)-1].Values)
	inner := 1
	if rows*len(lines) == 1 {
		inner = workers
	}
	turns, crossings := make([][]turn, rows*len(lines)), make([][]crossing, rows*len(lines))
	err := blocks(ctx, len(turns), 1, workers, func() func(int, int, int) {
		p := remember(s.probe())
		return func(task, _, _ int) {
			c := s.curve(p, &lines[task%len(lines)], task/len(lines))
			if v, err := c.surveyAll(ctx, inner); err == nil {
				turns[task], crossings[task] = c.follow(v)
			}
		}
	})
	if err != nil {
		return err
	}
	for i := range lines {
		for row := range rows {
			s.add(&lines[i], row, turns[row*len(lines)+i], crossings[row*len(lines)+i])
		}
	}
	return nil
}

// curve is one row of a line.
func (s *Swept) curve(p probe, l *line, row int) *curve {
	last := &s.Axes[len(s.Axes)-1]
	n := len(last.Values)
	x, to := make([]float64, len(s.Axes)), make([]arrest.Ends, len(s.Series))
	if len(x) == 2 {
		x[0] = s.Axes[0].Values[row]
	}
	c := &curve{xs: last.Values, ys: l.ys[row*n : (row+1)*n], at: func(at float64) float64 {
		x[len(x)-1] = at
		p.At(x, to)
		return l.of(&to[l.column])
	}}
	for _, h := range l.holds {
		c.levels = append(c.levels, h.level)
	}
	return c
}

func (s *Swept) add(l *line, row int, turns []turn, crossings []crossing) {
	for _, t := range turns {
		s.Turns = append(s.Turns, Turn{l.column, l.end, row, t.x, t.y, t.greatest})
	}
	for _, c := range crossings {
		h := &l.holds[c.level]
		s.Crossings = append(s.Crossings, Crossing{
			Set: h.set, Limit: h.limit, Printed: h.printed, Column: l.column, End: l.end, Row: row,
			X: c.x, Y: c.y, Lower: lowerSide(c.up), Jumps: !quantity.Close(c.y, h.level.figure, closeness),
		})
	}
}

// closeness is how near, relative, the figure at a crossing or a solution lies
// to what it meets.
const closeness = 1e-12

// lowerSide says how to print a place whose lower demand lies above or below.
func lowerSide(above bool) quantity.Rounding {
	if above {
		return quantity.Up
	}
	return quantity.Down
}
