package limits

import (
	"slices"

	"arrestcheck/arrest"
)

// A verdict is what the figures of a row come to, its conditions left aside.
type verdict struct {
	outcome   Outcome
	reasons   []Reason
	governing int // index into row.facts, or none
}

// weigh compares the figures. testedWith are the inputs of the conditions that
// were tested: an open one among them caps the row like one of its own.
//
// The order is the rule: anything exceeded wins; within needs a figure on the
// bad side that is inside, nothing that speaks against it, and no cap; all else
// is undecided, with every reason.
func (r *row) weigh(testedWith []int) verdict {
	if g := r.exceeding(); g != none {
		return verdict{Exceeded, r.clash, g}
	}
	g, open := r.settling(testedWith)
	if g == none {
		return verdict{Undecided, r.unsettled(testedWith), r.leading()}
	}
	reasons := slices.Concat(r.against(), r.caps(open))
	if r.bareAgainst() {
		reasons = append(reasons, r.bareReasons()...)
	}
	if len(reasons) == 0 {
		return verdict{Within, r.outsideReasons(), g}
	}
	for _, reason := range r.outsideReasons() {
		reasons = addOnce(reasons, reason)
	}
	return verdict{Undecided, slices.Concat(reasons, r.assumedReasons()), g}
}

// exceeding returns the estimate that shows the limit exceeded and prints the
// least favourable figure; at equal figures one that is bounded, then one held
// against the stricter limit.
func (r *row) exceeding() int {
	s, best := r.limit.Sense, none
	for i := range r.facts {
		f := &r.facts[i]
		if s.beyond(f.good, f.lax) && (best == none || r.shows(f, &r.facts[best])) {
			best = i
		}
	}
	return best
}

// shows reports whether f is to be named before o where both are beyond.
func (r *row) shows(f, o *fact) bool {
	s := r.limit.Sense
	a, _ := f.demand(s)
	b, _ := o.demand(s)
	switch {
	case a != b:
		return s.beyond(a, b)
	case finite(f.bad) != finite(o.bad):
		return finite(f.bad)
	}
	return s.beyond(o.strict, f.strict)
}

// settling returns the estimate that would put the row within, and the open
// inputs that it rests on. Of several the one resting on the fewest open
// inputs governs; of equal ones the one with the least favourable figure; of
// equal figures the one with both ends known.
func (r *row) settling(testedWith []int) (governing int, open []int) {
	governing = none
	if !r.bandsInside(strictly) {
		return none, nil
	}
	for i := range r.facts {
		if !r.settles(i, strictly) {
			continue
		}
		n := r.openInputs(r.groupUses(i), testedWith)
		if governing == none || len(n) < len(open) || len(n) == len(open) && r.facts[i].outranks(&r.facts[governing], r.limit.Sense) {
			governing, open = i, n
		}
	}
	return governing, open
}

// A printed pair is read twice: strictly, and laxly to see whether the pair is
// what keeps the row from being settled.
func strictly(f *fact) float64 { return f.strict }
func laxly(f *fact) float64    { return f.lax }

// anySettles reports whether some estimate would put the row within.
func (r *row) anySettles(limit func(*fact) float64) bool {
	if !r.bandsInside(limit) {
		return false
	}
	for i := range r.facts {
		if r.settles(i, limit) {
			return true
		}
	}
	return false
}

// bandsInside reports whether every estimate that is bounded on both sides has
// its bad end inside. One of them beyond stands against any promise.
func (r *row) bandsInside(limit func(*fact) float64) bool {
	for i := range r.facts {
		f := &r.facts[i]
		if f.est.Bound == arrest.Between && !r.limit.Sense.inside(f.bad, limit(f)) {
			return false
		}
	}
	return true
}

// settles reports whether the group of fact i is inside. A group is the
// estimates of one evidence and one bound, and all of them must be: of two
// ratings the larger governs. An evidence with an estimate outside its
// conditions settles nothing.
func (r *row) settles(i int, limit func(*fact) float64) bool {
	f := &r.facts[i]
	for _, j := range r.outside {
		if r.res.Estimates[j].Evidence == f.est.Evidence {
			return false
		}
	}
	for j := range r.facts {
		o := &r.facts[j]
		if sameGroup(f, o) && !r.limit.Sense.inside(o.bad, limit(o)) {
			return false
		}
	}
	return true
}

func sameGroup(a, b *fact) bool {
	return a.est.Evidence == b.est.Evidence && a.est.Bound == b.est.Bound
}

// groupUses returns the inputs of every estimate in the group of fact i: the
// larger of two ratings governs only while the smaller one holds as well.
func (r *row) groupUses(i int) []int {
	var uses []int
	for j := range r.facts {
		if sameGroup(&r.facts[i], &r.facts[j]) {
			uses = append(uses, r.facts[j].est.Uses...)
		}
	}
	return uses
}

// leading returns the estimate to print for a row that no estimate settles:
// bands before figures that bound the bad side before figures that do not, and
// among equals the least favourable.
func (r *row) leading() int {
	s, best := r.limit.Sense, none
	for i := range r.facts {
		f := &r.facts[i]
		if best == none || f.side(s) < r.facts[best].side(s) ||
			f.side(s) == r.facts[best].side(s) && f.outranks(&r.facts[best], s) {
			best = i
		}
	}
	return best
}
