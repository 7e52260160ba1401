package limits

// group gathers the findings of one set, which start at index from, into what
// is counted once.
//
// Rows form a group when one set gives them the same any_of and the same
// authority, to the letter. The authority is the title and the clause of a
// rule: an "or" reaches no further than the rule it stands in, and no file
// softens the rows of another. Rows whose authority is spelled differently
// stand alone, which is the stricter reading.
func (a *Assessment) group(from int) {
	type rule struct{ anyOf, authority string }
	var known map[rule]int
	first := len(a.Groups)
	for i := from; i < len(a.Findings); i++ {
		l := a.Findings[i].Limit
		k := rule{l.AnyOf, l.Authority}
		g, found := known[k]
		if !found {
			g = len(a.Groups)
			a.Groups = append(a.Groups, Group{AnyOf: l.AnyOf, Authority: l.Authority})
		}
		if !found && l.AnyOf != "" {
			if known == nil {
				known = make(map[rule]int)
			}
			known[k] = g
		}
		a.Groups[g].Rows = append(a.Groups[g].Rows, i)
	}
	for g := first; g < len(a.Groups); g++ {
		a.Groups[g].Outcome = a.together(a.Groups[g].Rows)
	}
}

// together is the outcome of rows of which one within is enough: within if any
// is; exceeded or not compared only if all are; else undecided.
func (a *Assessment) together(rows []int) Outcome {
	first := a.Findings[rows[0]].Outcome
	alike := true
	for _, i := range rows {
		o := a.Findings[i].Outcome
		if o == Within {
			return Within
		}
		alike = alike && o == first
	}
	if alike {
		return first
	}
	return Undecided
}

// Exceeded reports whether something is exceeded.
func (a *Assessment) Exceeded() bool {
	for _, g := range a.Groups {
		if g.Outcome == Exceeded {
			return true
		}
	}
	return false
}

// Settled reports whether there is a limit, every group is within as entered,
// and no expected subject was left out. It permits nothing: it says that the
// entries leave no question open that somebody entered.
func (a *Assessment) Settled() bool {
	for _, g := range a.Groups {
		if g.Outcome != Within {
			return false
		}
	}
	return len(a.Groups) > 0 && len(a.NotEntered) == 0
}
