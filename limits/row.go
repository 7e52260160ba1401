package limits

import (
	"math"
	"slices"

	"arrestcheck/arrest"
	"arrestcheck/arrest/quantity"
)

// none stands for "no estimate" where an index is expected.
const none = -1

// A row is one limit with everything the result says about its quantity.
type row struct {
	res       *arrest.Result
	set       *Set
	limit     *Limit
	dimension quantity.Dimension

	facts   []fact // unconditional estimates with figures, in the order of the result
	outside []int  // estimates without a figure, as their conditions do not hold
	assumed []int  // conditional estimates: shown, they decide nothing
	bare    []int  // modelled estimates without an allowance: shown, they may only stand against a row
	clash   []Reason
}

// gather sorts the estimates of the quantity. It keeps the memory of the row
// that was assessed before.
func (r *row) gather(set *Set, l *Limit) {
	r.set, r.limit = set, l
	record, _ := l.Quantity.Record()
	r.dimension = record.Dimension
	r.facts, r.outside, r.assumed, r.bare, r.clash = r.facts[:0], r.outside[:0], r.assumed[:0], r.bare[:0], nil
	for i := range r.res.Estimates {
		e := &r.res.Estimates[i]
		switch {
		case e.Quantity != l.Quantity:
		case e.Conditional():
			r.assumed = append(r.assumed, i)
		case bare(e):
			r.bare = append(r.bare, i)
		case e.Outside:
			r.outside = append(r.outside, i)
		default:
			r.facts = append(r.facts, newFact(l, i, e))
		}
	}
	for _, c := range r.res.Contradictions {
		a, b := &r.res.Estimates[c.A], &r.res.Estimates[c.B]
		if r.decides(a) && r.decides(b) || r.tainted(a) || r.tainted(b) {
			r.clash = addOnce(r.clash, words(Contradicted, string(a.Evidence), string(b.Evidence)))
		}
	}
}

// tainted reports whether a figure of the row comes from the same source as one
// that a contradiction touches, whatever its quantity: the same model, the same
// document, the same entry about the stop. One of the two is wrong, and nobody
// knows which: neither puts any row within.
func (r *row) tainted(by *arrest.Estimate) bool {
	for i := range r.res.Estimates {
		e := &r.res.Estimates[i]
		if e.Quantity != r.limit.Quantity || e.Evidence != by.Evidence {
			continue
		}
		switch e.Evidence {
		case arrest.Modelled:
			return true
		case arrest.Rated:
			if e.From == by.From {
				return true
			}
		case arrest.Given:
			if r.sharesStop(e, by) {
				return true
			}
		}
	}
	return false
}

// sharesStop reports whether two estimates rest on one entry about the stop.
func (r *row) sharesStop(a, b *arrest.Estimate) bool {
	return slices.ContainsFunc(a.Uses, func(i int) bool {
		return r.res.Inputs[i].Role == arrest.OfStop && slices.Contains(b.Uses, i)
	})
}

func (r *row) decides(e *arrest.Estimate) bool {
	return e.Quantity == r.limit.Quantity && !e.Conditional()
}

// finding puts conditions and figures together.
func (r *row) finding() Finding {
	f := Finding{Limit: r.limit, Set: r.set, Demand: math.NaN(), Ratio: math.NaN()}
	if len(r.facts)+len(r.outside)+len(r.assumed)+len(r.bare) == 0 {
		f.Outcome, f.Reasons = NotCompared, []Reason{{ID: NotComputed}}
		return f
	}
	c := r.conditions()
	v := r.weigh(c.uses)
	f.Outcome, f.Reasons, f.Used = v.outcome, v.reasons, r.used(v.governing)
	if v.governing != none {
		g := &r.facts[v.governing]
		demand, bound := g.demand(r.limit.Sense)
		if finite(demand) {
			f.Demand = demand
		}
		f.Bound, f.Ratio = bound, g.ratio()
	}
	if len(r.bare) > 0 && v.outcome == Undecided && (v.governing == none || !finite(r.facts[v.governing].bad)) {
		r.showBare(&f)
	}
	if len(c.reasons) == 0 {
		return f
	}
	if v.outcome == Exceeded {
		c.reasons = append(c.reasons, Reason{ID: AlsoBeyond})
	}
	f.Outcome = Undecided
	f.Reasons = append(c.reasons, v.reasons...)
	if c.fails {
		f.Outcome, f.Reasons = NotCompared, c.reasons
	}
	return f
}

// used lists the estimates of the row: governing first, then the other
// unconditional ones, then those outside their conditions, then assumed ones.
func (r *row) used(governing int) []int {
	list := make([]int, 0, len(r.facts)+len(r.bare)+len(r.outside)+len(r.assumed))
	if governing != none {
		list = append(list, r.facts[governing].index)
	}
	for i := range r.facts {
		if i != governing {
			list = append(list, r.facts[i].index)
		}
	}
	return append(append(append(list, r.bare...), r.outside...), r.assumed...)
}

// bare reports whether an estimate is modelled and comes without the user's
// allowance for the error of the model: it is not compared.
func bare(e *arrest.Estimate) bool {
	return e.Evidence == arrest.Modelled && math.IsNaN(e.Allowance)
}

// showBare prints the figure of the model, which is not compared, in place of a
// demand that no other estimate knows.
func (r *row) showBare(f *Finding) {
	e := &r.res.Estimates[r.bare[0]]
	bad := e.High
	if r.limit.Sense == AtLeast {
		bad = e.Low
	}
	if !finite(bad) {
		return
	}
	f.Demand, f.Bound, f.Ratio = bad, e.Bound, math.NaN()
	at := slices.Index(f.Used, r.bare[0])
	copy(f.Used[1:at+1], f.Used[:at])
	f.Used[0] = r.bare[0]
}
