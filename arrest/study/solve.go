package study

import (
	"math"
	"slices"

	"arrestcheck/arrest"
	"arrestcheck/arrest/connector"
	"arrestcheck/arrest/quantity"
	"arrestcheck/limits"
)

// A Goal is a figure that something is to come to.
type Goal struct {
	Limit  *limits.Limit   // the figure of this limit, the stricter one of a printed pair; or, where nil,
	Target float64         // this figure, SI
	Of     arrest.Quantity // of this quantity; not read where there is a Limit

	// Column is the estimate to follow; the zero Column stands for the one that
	// says most: of what is given, modelled or measured first a figure with
	// both ends, then a ceiling, then a floor; then a rating. An assumed shape
	// is followed only if named.
	Column Column

	// Measure stands in the place of an estimate where it is not nil: monotone
	// in every input.
	Measure func(*arrest.Case, *arrest.Point) float64

	// End is which figure over the bands of the other inputs meets the goal;
	// empty: the least favourable one.
	End End
}

// A Question asks which figure of an input brings something to a goal.
type Question struct {
	Find      string // Input.Key
	Low, High float64
	Goals     []Goal
}

// A Verdict says how many figures of the input meet a goal, and why.
type Verdict string

const (
	One      Verdict = "one"       // one figure meets it
	Several  Verdict = "several"   // several do
	AllUnder Verdict = "all_under" // none: not beyond anywhere in the range
	AllOver  Verdict = "all_over"  // none: beyond all over the range
	Jumped   Verdict = "jumped"    // none: passed in a leap only
	Unknown  Verdict = "unknown"   // none: the figure is nowhere known in the range
)

// A Solution is a figure of the input at which the goal is met.
type Solution struct {
	X        float64           // SI; the last float64 at which the figure is not beyond the goal
	Y        float64           // the figure there, SI; held against a limit, with the allowance
	Residual float64           // (Y - goal)/goal; Y - goal where the goal is 0
	Lower    quantity.Rounding // how X is printed, so that it errs towards the lower demand; Nearest where the quantity has no better side
	Jumps    bool              // the goal is passed in a leap; no solution, but an end of the range that fits
}

// A Span is a part of the range of the input.
type Span struct{ Low, High float64 }

// A Met is what became of one goal.
type Met struct {
	Goal    Goal
	Column  Column
	Bound   arrest.Bound // what the estimate promises: a goal met by a floor clears nothing
	End     End
	Figure  float64 // what was to be met, SI
	Allows  float64 // share by which a limit widens a modelled figure: the user's allowance, else 0
	Printed bool    // Figure is Limit.AlsoPrinted, which is the stricter one

	Verdict   Verdict
	Solutions []Solution // in rising order; leaps among them
	Under     []Span     // where the figure is not beyond the goal

	// Moves is false where the figure is the same all over the range.
	Moves bool
	// Least and Greatest are the figures between which it moves.
	Least, Greatest float64
	// Turns are the places between the ends where it turns.
	Turns []Turn
}

// A Fit is a part of the range where no goal is passed. LowBy and HighBy are
// the goals that end it, as indexes into Answer.Goals: there these limits
// govern. -1 stands for the end of the range, or of what can happen.
type Fit struct {
	Span
	LowBy, HighBy int
}

// An Answer is what Solve found.
type Answer struct {
	Find      string
	Low, High float64
	Known     []Span // where the entries can happen and every goal has a figure
	Goals     []Met
	Fits      []Fit // empty where no figure of the range keeps all goals
}

// solvePoints is at how many points the range of a question is looked at.
const solvePoints = 257

// Solve looks for the figures of one input at which something equals its goal
// (M-53), the other inputs keeping their bands: the figure followed is that of
// their least favourable corner, unless Goal.End says otherwise.
//
// The range is looked at in 256 parts, even in ratio where its ends are more
// than ten times apart, and as fine as needed where the figure turns. Put back,
// a solution gives the goal within 1e-12 of it, and is not beyond it. Two
// solutions within one part, with no point between them, can be missed.
//
// The error is a *Refusal.
func Solve(j *arrest.Job, q Question) (*Answer, error) {
	k, err := find(j, q.Find)
	if err != nil {
		return nil, err
	}
	if len(q.Goals) == 0 {
		return nil, &Refusal{ID: NothingAsked}
	}
	xs, err := scanned(q.Low, q.High)
	if err != nil {
		return nil, err
	}
	for _, x := range []float64{q.Low, q.High} {
		if !possible(&j.Inputs[k], x) {
			return nil, &Refusal{ID: OutOfRange, Key: q.Find, SI: x}
		}
	}
	a := &Answer{Find: q.Find, Low: q.Low, High: q.High, Known: []Span{{q.Low, q.High}}}
	a.Fits = []Fit{{a.Known[0], none, none}}
	for i, g := range q.Goals {
		m, known, err := meet(j, k, xs, g)
		if err != nil {
			return nil, err
		}
		a.Goals = append(a.Goals, m)
		a.Known = overlap(a.Known, known)
		a.narrow(i, m.Under)
	}
	return a, nil
}

// none stands for "no goal" where an index is expected.
const none = -1

func scanned(low, high float64) ([]float64, error) {
	if low > 0 && high > 10*low {
		return Logarithmic(low, high, solvePoints)
	}
	return Linear(low, high, solvePoints)
}

// meet works out one goal and where it has a figure.
func meet(j *arrest.Job, k int, xs []float64, g Goal) (Met, []Span, error) {
	m := Met{Goal: g, End: g.End}
	l, directed := m.level()
	p, err := m.probe(j, k, xs)
	if err != nil {
		return m, nil, err
	}
	ends := make([]arrest.Ends, len(xs))
	for i := range xs {
		p.At(xs[i:i+1], ends[i:i+1])
	}
	m.Bound = p.Bound(0)
	if err := m.choose(l, directed, ends); err != nil {
		return m, nil, err
	}
	if g.Limit != nil {
		m.Allows = m.Column.allowance(j)
		l.widen = m.End.widened(m.Allows)
	}
	c := &curve{xs: xs, ys: make([]float64, len(xs)), levels: []level{l}}
	for i := range ends {
		c.ys[i] = m.End.of(&ends[i])
	}
	one, at := make([]arrest.Ends, 1), make([]float64, 1)
	c.at = func(x float64) float64 {
		at[0] = x
		p.At(at, one)
		return m.End.of(&one[0])
	}
	return m, m.conclude(c, directed), nil
}

// quantity is what the goal is a figure of.
func (m *Met) quantity() arrest.Quantity {
	if m.Goal.Limit != nil {
		return m.Goal.Limit.Quantity
	}
	return m.Goal.Of
}

// level fills in the figure to be met and reports whether the quantity has a
// better side.
func (m *Met) level() (l level, directed bool) {
	sense, directed := limits.SenseOf(m.quantity())
	l = level{figure: m.Goal.Target, atLeast: sense == limits.AtLeast}
	if limit := m.Goal.Limit; limit != nil {
		l.figure = limit.Bound.Value
		if also := limit.AlsoPrinted; also != nil && also.Value != l.figure && !l.beyond(also.Value) {
			l.figure, m.Printed = also.Value, true
		}
	}
	m.Figure = l.figure
	return l, directed
}

// probe prepares the evaluation of the goal's estimate or measure.
func (m *Met) probe(j *arrest.Job, k int, xs []float64) (probe, error) {
	if m.Goal.Measure != nil {
		s, ok := arrest.NewScan(j, []int{k}, []arrest.Sought{{Of: m.Goal.Measure}})
		if !ok {
			return nil, &Refusal{ID: NotComputed, Quantity: m.quantity()}
		}
		return s, nil
	}
	m.Column = m.Goal.Column
	if m.Column == (Column{}) {
		c, err := telling(j, k, xs, m.quantity())
		if err != nil {
			return nil, err
		}
		m.Column = c
	}
	return newProbe(j, []int{k}, []Column{m.Column}), nil
}

// telling returns the estimate of q that says most, where the entries can
// happen.
func telling(j *arrest.Job, k int, xs []float64, q arrest.Quantity) (Column, error) {
	for _, x := range []float64{xs[0], xs[len(xs)/2], xs[len(xs)-1]} {
		res, _, can, err := Check(j, nil, Move{j.Inputs[k].Key, x})
		if err != nil {
			return Column{}, err
		}
		if !can {
			continue
		}
		best := none
		for i := range res.Estimates {
			e := &res.Estimates[i]
			if e.Quantity == q && !e.Conditional() && (best == none || rank(e) < rank(&res.Estimates[best])) {
				best = i
			}
		}
		if best != none {
			return columnOf(&res, best), nil
		}
	}
	return Column{}, &Refusal{ID: NotComputed, Quantity: q}
}

// rank puts the estimates of one quantity in the order in which they tell how
// it moves: a rating stays what it is wherever it holds.
func rank(e *arrest.Estimate) int {
	n := slices.Index([]arrest.Bound{arrest.Between, arrest.AtMost, arrest.AtLeast}, e.Bound)
	if e.Evidence == arrest.Rated {
		n += 3
	}
	return n
}

// choose settles which end is followed.
func (m *Met) choose(l level, directed bool, ends []arrest.Ends) error {
	switch {
	case m.End != "":
	case directed && l.atLeast:
		m.End = TheLow
	case directed && m.Bound == arrest.AtLeast:
		m.End = TheReach
	case directed:
		m.End = TheHigh
	case slices.ContainsFunc(ends, func(e arrest.Ends) bool { return !math.IsNaN(e.Value) }):
		m.End = TheValue
	default:
		return &Refusal{ID: NeedsEnd, Quantity: m.quantity()}
	}
	return nil
}

// of picks a figure.
func (e End) of(ends *arrest.Ends) float64 {
	switch e {
	case TheLow:
		return ends.Low
	case TheHigh:
		return ends.High
	case TheReach:
		return ends.Reach
	}
	return ends.Value
}

// conclude follows the curve and says what became of the goal. It returns where
// the figure is known.
func (m *Met) conclude(c *curve, directed bool) []Span {
	v := c.survey(0, len(c.xs)-1)
	edges := c.edges(v.gaps)
	turns, crossings := c.followFrom(v, edges)
	for _, t := range turns {
		m.Turns = append(m.Turns, Turn{End: m.End, X: t.x, Y: t.y, Greatest: t.greatest})
	}
	for _, x := range crossings {
		m.Solutions = append(m.Solutions, m.solution(x, directed))
	}
	m.reach(c, turns)
	var known []Span
	for _, s := range c.stretches(edges) {
		known = append(known, Span{s.x0, s.x1})
		m.under(&c.levels[0], s, crossings)
	}
	m.Verdict = m.verdict(len(known) > 0)
	return known
}

func (m *Met) solution(c crossing, directed bool) Solution {
	s := Solution{X: c.x, Y: c.y, Residual: c.y - m.Figure, Jumps: !quantity.Close(c.y, m.Figure, closeness)}
	if m.Figure != 0 {
		s.Residual /= m.Figure
	}
	if directed {
		s.Lower = lowerSide(c.up)
	}
	return s
}

// reach notes between which figures the curve moves.
func (m *Met) reach(c *curve, turns []turn) {
	m.Least, m.Greatest = math.NaN(), math.NaN()
	take := func(y float64) {
		if !(m.Least <= y) && !math.IsNaN(y) {
			m.Least = y
		}
		if !(m.Greatest >= y) && !math.IsNaN(y) {
			m.Greatest = y
		}
	}
	for _, y := range c.ys {
		take(y)
	}
	for _, t := range turns {
		take(t.y)
	}
	m.Moves = heading(m.Least, m.Greatest) != 0
}

// under adds the parts of a known stretch in which the goal is not passed.
func (m *Met) under(l *level, s stretch, crossings []crossing) {
	open, from := !l.beyond(s.y0), s.x0
	for _, c := range crossings {
		if c.x < s.x0 || c.x > s.x1 {
			continue
		}
		if open {
			m.Under = append(m.Under, Span{from, c.x})
		}
		open, from = !open, c.x
	}
	if open {
		m.Under = append(m.Under, Span{from, s.x1})
	}
}

func (m *Met) verdict(known bool) Verdict {
	met := 0
	for _, s := range m.Solutions {
		if !s.Jumps {
			met++
		}
	}
	switch {
	case met == 1:
		return One
	case met > 1:
		return Several
	case len(m.Solutions) > 0:
		return Jumped
	case !known:
		return Unknown
	case len(m.Under) > 0:
		return AllUnder
	}
	return AllOver
}

// narrow keeps of the fits what goal i leaves.
func (a *Answer) narrow(i int, under []Span) {
	var fits []Fit
	for _, f := range a.Fits {
		for _, u := range under {
			n := f
			if u.Low > n.Low {
				n.Low, n.LowBy = u.Low, a.by(i, u.Low)
			}
			if u.High < n.High {
				n.High, n.HighBy = u.High, a.by(i, u.High)
			}
			if n.Low <= n.High {
				fits = append(fits, n)
			}
		}
	}
	a.Fits = fits
}

// by is the goal that ends a part at x, none where only what is known ends
// there.
func (a *Answer) by(i int, x float64) int {
	if slices.ContainsFunc(a.Goals[i].Solutions, func(s Solution) bool { return s.X == x }) {
		return i
	}
	return none
}

// overlap returns what two lists of rising spans have in common.
func overlap(a, b []Span) []Span {
	var both []Span
	for _, s := range a {
		for _, t := range b {
			if low, high := max(s.Low, t.Low), min(s.High, t.High); low <= high {
				both = append(both, Span{low, high})
			}
		}
	}
	return both
}

// TravelFound asks, after an event, for the free fall behind the travel an
// absorber was found torn by (M-12): the force it holds is constant and nothing
// else stretched. The first goal gives the least free fall that fits, the second
// the greatest, over the bands of the force, the travel and the job. Other
// stretch takes energy as well, so that the fall may have been greater than
// either.
func TravelFound(force, travel quantity.Band) [2]Goal {
	measure := func(force float64) func(*arrest.Case, *arrest.Point) float64 {
		return func(c *arrest.Case, p *arrest.Point) float64 {
			return connector.AbsorberTravel(p.TotalMass, p.Speed, force, c.Gravity)
		}
	}
	return [2]Goal{
		{Of: arrest.AbsorberTravel, Target: travel.Low, Measure: measure(force.Low), End: TheHigh},
		{Of: arrest.AbsorberTravel, Target: travel.High, Measure: measure(force.High), End: TheLow},
	}
}
