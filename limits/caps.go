package limits

import (
	"slices"
	"strconv"

	"arrestcheck/arrest"
)

// caps gives what keeps any row from being within whatever its figures say, in
// a fixed order: open inputs, what the model of the path came to, several persons, example values, a limit nobody
// checked, a superseded limit, a figure of a product test. Caps never soften a
// row that is exceeded.
func (r *row) caps(open []int) []Reason {
	var reasons []Reason
	for _, i := range open {
		in := &r.res.Inputs[i]
		reasons = append(reasons, words(OpenInput, in.Key, string(in.Open())))
	}
	reasons = append(reasons, r.modelCaps()...)
	if r.res.Persons > 1 {
		reasons = append(reasons, words(SeveralPersons, strconv.Itoa(r.res.Persons)))
	}
	if r.res.Example || r.set.Example {
		reasons = append(reasons, Reason{ID: ExampleValues})
	}
	if r.limit.CheckedOn == "" && r.set.CheckedOn == "" {
		reasons = append(reasons, Reason{ID: NotChecked})
	}
	if r.limit.SupersededOn != "" {
		reasons = append(reasons, words(Superseded, r.limit.SupersededOn))
	}
	if r.limit.Kind == ProductTest {
		reasons = append(reasons, Reason{ID: IsProductTest})
	}
	return reasons
}

// openInputs returns the open ones of both lists, each once, in the order of
// the inputs.
func (r *row) openInputs(uses, testedWith []int) []int {
	var open []int
	for _, list := range [...][]int{uses, testedWith} {
		for _, i := range list {
			if r.res.Inputs[i].Open() != arrest.Settled && !slices.Contains(open, i) {
				open = append(open, i)
			}
		}
	}
	slices.Sort(open)
	return open
}

// modelCaps looks at every estimate of the quantity, whether it governs or
// not: a device that is used up keeps no promise either, nor does any over an
// edge.
func (r *row) modelCaps() []Reason {
	exhausted, beyond, edge, strikes, unreached := false, false, false, false, false
	for i := range r.res.Estimates {
		e := &r.res.Estimates[i]
		if r.decides(e) {
			exhausted, beyond = exhausted || e.Exhausted, beyond || e.Beyond
			edge, strikes, unreached = edge || e.Edge, strikes || e.Strikes, unreached || e.Unreached
		}
	}
	var reasons []Reason
	if exhausted {
		reasons = append(reasons, Reason{ID: DeviceExhausted})
	}
	if beyond {
		reasons = append(reasons, Reason{ID: BeyondModel})
	}
	if strikes {
		reasons = append(reasons, Reason{ID: BodyStrikes})
	}
	if edge {
		reasons = append(reasons, Reason{ID: EdgeContact})
	}
	if unreached {
		reasons = append(reasons, Reason{ID: PlaceUnknown})
	}
	return reasons
}

// bareReasons says that a modelled figure without an allowance is not compared.
func (r *row) bareReasons() []Reason {
	if len(r.bare) == 0 {
		return nil
	}
	return []Reason{{ID: NoAllowance}}
}

// bareAgainst reports whether a modelled figure without an allowance stands
// beyond the limit: then no other estimate puts the row within.
func (r *row) bareAgainst() bool {
	for _, i := range r.bare {
		f := newFact(r.limit, i, &r.res.Estimates[i])
		if !r.limit.Sense.inside(f.bad, f.strict) {
			return true
		}
	}
	return false
}
