package limits

import (
	"slices"

	"arrestcheck/arrest"
	"arrestcheck/arrest/quantity"
)

// words makes a reason whose arguments are all text.
func words(id ReasonID, args ...string) Reason {
	reason := Reason{ID: id, Args: make([]arrest.Arg, len(args))}
	for i, a := range args {
		reason.Args[i] = arrest.Text(a)
	}
	return reason
}

// addOnce adds a reason that does not stand in the list yet.
func addOnce(list []Reason, reason Reason) []Reason {
	same := func(o Reason) bool { return o.ID == reason.ID && slices.Equal(o.Args, reason.Args) }
	if slices.ContainsFunc(list, same) {
		return list
	}
	return append(list, reason)
}

// figure makes an argument of an SI figure, and "open" of a side on which
// nothing bounds it.
func figure(d quantity.Dimension, si float64, rounding quantity.Rounding) arrest.Arg {
	if !finite(si) {
		return arrest.Text("open")
	}
	return arrest.Figure(d, si, rounding)
}

// outsideReasons names each document whose conditions do not hold.
func (r *row) outsideReasons() []Reason {
	var list []Reason
	for _, i := range r.outside {
		list = append(list, words(OutsideRating, r.res.Estimates[i].From))
	}
	return list
}

// assumedReasons names each assumed shape once.
func (r *row) assumedReasons() []Reason {
	var list []Reason
	for n, i := range r.assumed {
		from := r.res.Estimates[i].From
		said := slices.ContainsFunc(r.assumed[:n], func(j int) bool { return r.res.Estimates[j].From == from })
		if !said {
			list = append(list, words(AssumedShape, from))
		}
	}
	return list
}

// pairReason is called only where the limit has a pair: its two figures alone
// make the strict and the lax one differ.
func (r *row) pairReason() Reason {
	return words(PairDiffers, r.limit.Bound.Text, r.limit.AlsoPrinted.Text)
}

// against gives what speaks against a row being within although an estimate
// would settle it.
func (r *row) against() []Reason {
	s, reasons := r.limit.Sense, slices.Concat(r.clash, r.partsOutside())
	if r.goodEndInPair() {
		reasons = append(reasons, r.pairReason())
	}
	for i := range r.facts {
		f := &r.facts[i]
		if s == AtMost && f.side(s) == goodEnd && !s.inside(f.est.Reach, f.strict) {
			reach := figure(r.dimension, f.est.Reach, quantity.Up)
			reasons = append(reasons, Reason{FloorReaches, []arrest.Arg{reach}})
		}
	}
	return reasons
}

// unsettled gives the reasons of a row that no estimate would put within: what
// is wrong with the evidence first, then which figures are missing, then caps.
func (r *row) unsettled(testedWith []int) []Reason {
	reasons := slices.Concat(r.clash, r.outsideReasons())
	if r.pairDecides() {
		reasons = append(reasons, r.pairReason())
	}
	lead := r.leading()
	if lead == none {
		return slices.Concat(reasons, r.bareReasons(), r.assumedReasons(), r.caps(r.openInputs(nil, testedWith)))
	}
	f := &r.facts[lead]
	caps := r.caps(r.openInputs(f.est.Uses, testedWith))
	if f.side(r.limit.Sense) == goodEnd {
		// An assumed figure looks like the missing one: first say why it is not.
		return slices.Concat(reasons, r.bareReasons(), r.assumedReasons(), r.position(f), caps)
	}
	return slices.Concat(reasons, r.bareReasons(), r.position(f), caps, r.assumedReasons())
}

// position says where the leading estimate lies about the laxer limit.
func (r *row) position(lead *fact) []Reason {
	s := r.limit.Sense
	switch {
	case lead.side(s) == goodEnd:
		return []Reason{r.oneSided(lead, lead.good)}
	case s.inside(lead.bad, lead.lax):
		return nil
	case lead.side(s) == bothEnds:
		return []Reason{r.straddles(lead.good, lead.bad, quantity.Nearest, quantity.Nearest)}
	}
	if good := r.worstGoodEnd(); good != none {
		return []Reason{r.straddles(r.facts[good].good, lead.bad, quantity.Down, quantity.Up)}
	}
	return []Reason{r.oneSided(lead, lead.bad)}
}

// oneSided names a floor or a ceiling that stands alone.
func (r *row) oneSided(f *fact, si float64) Reason {
	if f.est.Bound == arrest.AtLeast {
		return Reason{OnlyFloor, []arrest.Arg{figure(r.dimension, si, quantity.Down)}}
	}
	return Reason{OnlyCeiling, []arrest.Arg{figure(r.dimension, si, quantity.Up)}}
}

// straddles names the least and the greatest figure about a limit; two ends of
// one band round to nearest, a floor and a ceiling away from each other.
func (r *row) straddles(good, bad float64, least, greatest quantity.Rounding) Reason {
	if r.limit.Sense == AtLeast {
		good, bad = bad, good
	}
	return Reason{Straddles, []arrest.Arg{
		figure(r.dimension, good, least), figure(r.dimension, bad, greatest),
	}}
}

// worstGoodEnd returns the estimate with the bad side open that tells most.
func (r *row) worstGoodEnd() int {
	s, best := r.limit.Sense, none
	for i := range r.facts {
		f := &r.facts[i]
		if f.side(s) == goodEnd && (best == none || s.beyond(f.good, r.facts[best].good)) {
			best = i
		}
	}
	return best
}

// goodEndInPair reports whether even a good end lies between the two figures
// of a printed pair: the stricter one alone would show the limit exceeded.
func (r *row) goodEndInPair() bool {
	return slices.ContainsFunc(r.facts, func(f fact) bool { return r.limit.Sense.beyond(f.good, f.strict) })
}

// pairDecides reports whether one figure of a printed pair alone would settle
// the row, one way or the other.
func (r *row) pairDecides() bool {
	if r.limit.AlsoPrinted == nil {
		return false
	}
	return r.goodEndInPair() || r.anySettles(laxly)
}

// partsOutside names the documents of parts of the path whose conditions do not
// hold, where the row rests on the model of that path: what the model was made
// of is then not known to be so.
func (r *row) partsOutside() []Reason {
	if !slices.ContainsFunc(r.facts, func(f fact) bool { return f.est.Evidence == arrest.Modelled }) {
		return nil
	}
	var list []Reason
	for i := range r.res.Estimates {
		if e := &r.res.Estimates[i]; e.Outside && e.Part > 0 {
			list = addOnce(list, words(OutsideRating, e.From))
		}
	}
	return list
}
