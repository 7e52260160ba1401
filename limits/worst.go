package limits

import (
	"math"
	"slices"
)

// WorstRow returns the index of the finding to put into words first, or -1
// where no limit was entered.
//
// Groups come in the order exceeded, undecided, not compared, within; a row
// stands for its group if it came to what the group came to, else the worst
// row of the group does. Among rows of one outcome the order is: not compared
// but also beyond the figure; demand not bounded on the bad side, as nobody
// knows how far beyond it is; then the greater excess, which is demand over
// limit for at_most and limit over demand for at_least; then as entered.
func (a *Assessment) WorstRow() int {
	worst, worstGroup := none, none
	for g := range a.Groups {
		i := a.worstOf(&a.Groups[g])
		if worst == none {
			worst, worstGroup = i, g
			continue
		}
		before := rank(a.Groups[g].Outcome) - rank(a.Groups[worstGroup].Outcome)
		if before < 0 || before == 0 && a.Findings[i].worse(&a.Findings[worst]) {
			worst, worstGroup = i, g
		}
	}
	return worst
}

// worstOf returns the row that stands for a group.
func (a *Assessment) worstOf(g *Group) int {
	worst := g.Rows[0]
	for _, i := range g.Rows {
		f, w := &a.Findings[i], &a.Findings[worst]
		stands, stood := f.Outcome == g.Outcome, w.Outcome == g.Outcome
		if stands && !stood || stands == stood && f.worse(w) {
			worst = i
		}
	}
	return worst
}

func rank(o Outcome) int { return slices.Index(Outcomes(), o) }

// worse reports whether f is to be named before o.
func (f *Finding) worse(o *Finding) bool {
	if f.Outcome != o.Outcome {
		return rank(f.Outcome) < rank(o.Outcome)
	}
	if f.has(AlsoBeyond) != o.has(AlsoBeyond) {
		return f.has(AlsoBeyond)
	}
	if f.unbounded() != o.unbounded() {
		return f.unbounded()
	}
	return f.excess() > o.excess()
}

func (f *Finding) has(id ReasonID) bool {
	return slices.ContainsFunc(f.Reasons, func(r Reason) bool { return r.ID == id })
}

// unbounded reports whether the demand has no known end on the bad side.
func (f *Finding) unbounded() bool {
	return math.IsNaN(f.Demand) || f.Bound == f.Limit.Sense.openEnd()
}

// excess is how many times over the limit the demand is; 0 where there is none.
// A limit that is not positive has no such figure: beyond it is infinite.
func (f *Finding) excess() float64 {
	over, under := f.Demand, f.Limit.Bound.Value
	if f.Limit.Sense == AtLeast {
		over, under = under, over
	}
	switch {
	case math.IsNaN(f.Demand):
		return 0
	case over > under && under <= 0:
		return math.Inf(1)
	case under <= 0:
		return 0
	}
	return over / under
}
