package limits

import (
	"math"

	"arrestcheck/arrest"
	"arrestcheck/arrest/quantity"
)

// A fact is one unconditional estimate as one limit sees it. Turning ends into
// "good" and "bad" ones here lets all else be written once for both senses.
type fact struct {
	index int // into Result.Estimates
	est   *arrest.Estimate

	good, bad   float64 // most and least favourable end; infinitely good and bad where unknown
	strict, lax float64 // the limit: two figures where it is printed as a pair, else the same twice
}

// newFact turns the ends of an estimate and picks the figures to compare with.
func newFact(l *Limit, index int, e *arrest.Estimate) fact {
	low, high := ends(e)
	f := fact{index: index, est: e, good: low, bad: high, strict: l.Bound.Value, lax: l.Bound.Value}
	if l.Sense == AtLeast {
		f.good, f.bad = high, low
	}
	if math.IsNaN(f.good) {
		f.good = -l.Sense.worst()
	}
	if !finite(f.bad) {
		f.bad = l.Sense.worst()
	}
	if l.AlsoPrinted != nil && !typedAlike(e, l) {
		f.strict, f.lax = l.Sense.order(l.Bound.Value, l.AlsoPrinted.Value)
	}
	return f
}

// ends returns the figures that the bound of an estimate vouches for, NaN for
// an end that it leaves open; a modelled estimate is widened by its allowance.
func ends(e *arrest.Estimate) (low, high float64) {
	low, high = e.Ends()
	switch e.Bound {
	case arrest.AtLeast:
		return low, math.NaN()
	case arrest.AtMost:
		return math.NaN(), high
	}
	return low, high
}

// A side says which ends of an estimate are known, in the order in which they
// tell most.
type side uint8

const (
	bothEnds side = iota
	badEnd        // the bad end alone: may put a row within, cannot show it exceeded
	goodEnd       // the good end alone: may show a row exceeded, cannot put it within
)

func (f *fact) side(s Sense) side {
	switch f.est.Bound {
	case arrest.Between:
		return bothEnds
	case s.openEnd():
		return goodEnd
	}
	return badEnd
}

// typedAlike reports whether the estimate is a figure typed in the unit of the
// limit: it is then compared in that unit alone, and the limit as printed in
// another unit says nothing.
func typedAlike(e *arrest.Estimate, l *Limit) bool {
	return e.Typed != quantity.Unit{} && e.Typed == l.Bound.Unit
}

// demand returns the figure to print: the least favourable end, or, where that
// side is open, the favourable one with the bound that says so.
func (f *fact) demand(s Sense) (float64, arrest.Bound) {
	if finite(f.bad) {
		return f.bad, f.est.Bound
	}
	return f.good, s.openEnd()
}

// outranks reports whether f is to be named before o: the one with the less
// favourable bad end, then good end, then the one held against the stricter
// limit, then the one known on both sides. As an open bad end is infinitely
// bad, it comes before any known one, and among open ones the good end decides.
func (f *fact) outranks(o *fact, s Sense) bool {
	switch {
	case f.bad != o.bad:
		return s.beyond(f.bad, o.bad)
	case f.good != o.good:
		return s.beyond(f.good, o.good)
	case f.strict != o.strict:
		return s.beyond(o.strict, f.strict)
	}
	return f.side(s) < o.side(s)
}

// ratio is demand over the stricter figure of the limit. It is NaN where the
// wrong side is open (a ratio of a floor would flatter) and for a limit of 0.
func (f *fact) ratio() float64 {
	if !finite(f.bad) || f.strict == 0 {
		return math.NaN()
	}
	return f.bad / f.strict
}

func finite(x float64) bool { return !math.IsNaN(x) && !math.IsInf(x, 0) }
