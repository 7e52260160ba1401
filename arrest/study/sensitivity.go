package study

import (
	"cmp"
	"math"
	"slices"

	"arrestcheck/arrest"
	"arrestcheck/arrest/quantity"
	"arrestcheck/limits"
)

// Help says whether a closer measurement of one input settles a row.
type Help string

const (
	Enough   Help = "enough"   // measured to within By, it does
	Whatever Help = "whatever" // the row is settled for any tolerance of this input, up to the figure itself
	NoHelp   Help = "no_help"  // no tolerance of this input alone does
)

// A Tolerance is how closely an input must be measured for the figures of a row
// to be settled, all else as entered. Where the row is settled already it is how
// far the input may be off for it to stay so.
type Tolerance struct {
	Help    Help
	About   float64 // the figure it is measured about, SI: as written, else the middle of the range
	Written bool    // About was written
	By      float64 // the widest ± that settles the row, SI; printed rounded down. NaN unless Enough
	Then    Zone    // what the row comes to then; at About ± 0 where nothing helps
}

// An Influence is how one input moves one row.
type Influence struct {
	Input int // index into Job.Inputs
	Key   string
	Open  arrest.OpenReason

	// Low and High are the least and the greatest demand when this input alone
	// runs over its band and the others are least favourable; Spread is their
	// difference, +Inf where the demand is open at one end of the band. NaN
	// where no estimate leads the row.
	Low, High, Spread float64

	Tolerance Tolerance
}

// A Ranking is the inputs of one row in the order in which to look at them.
type Ranking struct {
	Finding limits.Finding
	Zone    Zone
	Column  Column // the estimate that leads the row; zero where none does
	End     End    // its figure: the least favourable one that is known

	// Influences holds open inputs before settled ones, and in each of the two
	// the greater spread first; then as in the job.
	Influences []Influence

	// AtCentres is what the row comes to if every input is measured to ± 0 at
	// the figure it is measured about: where it is not settled either, no
	// measuring settles it.
	AtCentres Zone
}

// Rank says which inputs move a row, the row-th finding of limits.Assess on j
// and the sets, and how closely each would have to be measured (M-52).
//
// A tolerance is found by halving, to within 1e-9 of it, on the same evaluation
// and comparison. Caps are left aside: an open input elsewhere, or a limit
// nobody checked, keeps the row undecided whatever is measured.
//
// The error is a *Refusal.
func Rank(j *arrest.Job, sets []limits.Set, row int) (*Ranking, error) {
	if arrest.Refused(j) {
		return nil, &Refusal{ID: NoMotion}
	}
	res := arrest.Evaluate(j)
	a := limits.Assess(&res, sets, nil)
	if row < 0 || row >= len(a.Findings) {
		return nil, &Refusal{ID: NoSuchRow, SI: float64(row)}
	}
	return NewRanker(j, &res).Rank(&a.Findings[row])
}

// A Ranker is Rank for row after row of one job that is worked out already. It
// is not safe for concurrent use.
type Ranker struct {
	job   *arrest.Job
	res   *arrest.Result
	trial *trial
}

// NewRanker prepares to rank the rows of a job; res is what arrest.Evaluate
// makes of it. Both must stay as they are.
func NewRanker(j *arrest.Job, res *arrest.Result) *Ranker {
	return &Ranker{job: j, res: res, trial: newTrial(j, nil)}
}

// Rank says what the function Rank does of one finding of limits.Assess on the
// result. The error is a *Refusal.
func (n *Ranker) Rank(f *limits.Finding) (*Ranking, error) {
	if len(f.Used) == 0 {
		return nil, &Refusal{ID: NoBand, Quantity: f.Limit.Quantity}
	}
	r := &Ranking{Finding: *f, Zone: ZoneOf(f)}
	if f.Bound != "" {
		r.lead(n.res)
	}
	j, m := n.job, measuring{job: n.job, trial: n.trial, finding: f}
	for _, k := range inputsOf(n.res, f) {
		i := Influence{Input: k, Key: j.Inputs[k].Key, Open: j.Inputs[k].Open(), Low: math.NaN(), High: math.NaN(), Spread: math.NaN()}
		if r.Column != (Column{}) {
			i.Low, i.High = m.spread(r, n.res, k)
			i.Spread = i.High - i.Low
		}
		i.Tolerance = m.tolerance(k)
		r.Influences = append(r.Influences, i)
	}
	slices.SortStableFunc(r.Influences, before)
	r.AtCentres = m.atCentres(r.Influences)
	return r, nil
}

// before puts open inputs first, then the greater spread.
func before(a, b Influence) int {
	if (a.Open == arrest.Settled) != (b.Open == arrest.Settled) {
		if b.Open == arrest.Settled {
			return -1
		}
		return 1
	}
	if math.IsNaN(a.Spread) {
		return 0
	}
	return cmp.Compare(b.Spread, a.Spread)
}

// lead notes which figure leads the row.
func (r *Ranking) lead(res *arrest.Result) {
	r.Column = columnOf(res, r.Finding.Used[0])
	switch bound := res.Estimates[r.Finding.Used[0]].Bound; {
	case bound == arrest.AtLeast && r.Finding.Limit.Sense == limits.AtMost:
		r.End = TheReach
	case bound == arrest.AtMost || bound == arrest.Between && r.Finding.Limit.Sense == limits.AtMost:
		r.End = TheHigh
	default:
		r.End = TheLow
	}
}

// inputsOf lists the inputs that can move a row: those behind its estimates,
// assumed ones left aside, and behind its conditions.
func inputsOf(res *arrest.Result, f *limits.Finding) []int {
	var list []int
	for _, i := range f.Used {
		if e := &res.Estimates[i]; !e.Conditional() {
			list = append(list, e.Uses...)
		}
	}
	for i := range res.Inputs {
		role := res.Inputs[i].Role
		if role == arrest.OfWorker && f.Limit.TotalMassAtMost != nil || role == arrest.OfFall && f.Limit.FreeFallAtMost != nil {
			list = append(list, i)
		}
	}
	slices.Sort(list)
	return slices.DeleteFunc(slices.Compact(list), func(k int) bool {
		return res.Inputs[k].Set == nil || res.Inputs[k].Role == arrest.OfPlace
	})
}

// unmoved reports whether an estimate that governs a row is the same wherever
// an input lies within its band: what a document promises while its conditions
// hold over the whole of the entries, and what is entered.
func unmoved(e *arrest.Estimate, k int) bool {
	return e.Evidence == arrest.Rated && e.Method == "M-09" || e.Method == arrest.Entered && !slices.Contains(e.Uses, k)
}

// spread returns the least and the greatest demand of a row over the band of
// one input.
func (m *measuring) spread(r *Ranking, res *arrest.Result, k int) (least, greatest float64) {
	const parts = 16
	j, b := m.job, &m.job.Inputs[k].Band
	x, to := make([]float64, 1), make([]arrest.Ends, 1)
	l := level{widen: r.End.widened(r.Column.allowance(j))}
	if e := &res.Estimates[r.Finding.Used[0]]; unmoved(e, k) {
		y := l.compared(r.End.of(&arrest.Ends{Low: e.Low, Value: e.Value, High: e.High, Reach: e.Reach}))
		return y, y
	}
	p := newProbe(j, []int{k}, []Column{r.Column})
	c := curve{at: func(at float64) float64 {
		x[0] = at
		p.At(x, to)
		return l.compared(r.End.of(&to[0]))
	}}
	for n := range parts + 1 {
		at := b.Low + (b.High-b.Low)*(float64(n)/parts)
		if n == parts {
			at = b.High
		}
		if n > 0 && at <= c.xs[len(c.xs)-1] {
			break // a band of one figure
		}
		c.xs, c.ys = append(c.xs, at), append(c.ys, c.at(at))
	}
	turns, _ := c.follow(c.survey(0, len(c.xs)-1))
	least, greatest = math.Inf(1), math.Inf(-1)
	take := func(y float64) {
		if !math.IsNaN(y) {
			least, greatest = min(least, y), max(greatest, y)
		}
	}
	for _, y := range c.ys {
		take(y)
	}
	for _, t := range turns {
		take(t.y)
	}
	if least > greatest {
		return math.NaN(), math.NaN()
	}
	return least, greatest
}

// measuring tries tolerances of one input after the other.
type measuring struct {
	job     *arrest.Job
	trial   *trial
	finding *limits.Finding
}

func (m *measuring) zone() Zone { return m.trial.zone(m.finding.Set, m.finding.Limit) }

// centre is the figure an input is measured about.
func centre(in *arrest.Input) (x float64, written bool) {
	if in.HasValue() {
		return in.Band.Value, true
	}
	return in.Band.Low + (in.Band.High-in.Band.Low)/2, false
}

// try returns the zone of the row with input k measured to x ± by. A lower end
// that the input cannot have ends at 0 or, where 0 stands for "not given",
// makes the row unsettled.
func (m *measuring) try(k int, x, by float64) Zone {
	in := &m.job.Inputs[k]
	low := x - by
	if !possible(in, low) {
		if !possible(in, 0) {
			return Undecided
		}
		low = 0
	}
	m.trial.suppose(k, low, x, x+by)
	return m.zone()
}

// restore gives input k back what was entered.
func (m *measuring) restore(k int) {
	m.trial.job.Inputs[k] = m.job.Inputs[k]
	m.trial.job.Point = m.job.Point
}

// tolerance finds the widest tolerance of input k that settles the row.
func (m *measuring) tolerance(k int) Tolerance {
	const (
		finest = 1e-9 // of the figure: closer than that nobody measures
		widest = 1e3
	)
	defer m.restore(k)
	in := &m.job.Inputs[k]
	x, written := centre(in)
	t := Tolerance{Help: NoHelp, About: x, Written: written, By: math.NaN()}
	scale := max(math.Abs(x), in.Band.High-in.Band.Low)
	if scale == 0 {
		scale = 1
	}
	near, far := finest*scale, scale
	if t.Then = m.try(k, x, 0); !t.Then.decided() || !m.try(k, x, near).decided() {
		return t
	}
	for m.try(k, x, far).decided() {
		if near, far = far, 2*far; far > widest*scale {
			t.Help, t.Then = Whatever, m.try(k, x, near)
			return t
		}
	}
	for far-near > finest*near {
		if mid := near + (far-near)/2; m.try(k, x, mid).decided() {
			near = mid
		} else {
			far = mid
		}
	}
	t.Help, t.By, t.Then = Enough, near, m.try(k, x, near)
	if m.settlesAnyway(k, x, near) {
		t.Help, t.By = Whatever, math.NaN()
	}
	return t
}

// settlesAnyway reports whether what ends the tolerances is not the row but
// that the input cannot reach 0.
func (m *measuring) settlesAnyway(k int, x, by float64) bool {
	in := &m.job.Inputs[k]
	return !possible(in, 0) && quantity.Close(by, x, 1e-8)
}

// atCentres is the row with all of the inputs at their centres.
func (m *measuring) atCentres(list []Influence) Zone {
	for _, i := range list {
		m.trial.suppose(i.Input, i.Tolerance.About, i.Tolerance.About, i.Tolerance.About)
		defer m.restore(i.Input)
	}
	return m.zone()
}
