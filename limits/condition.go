package limits

import (
	"math"
	"strconv"

	"arrestcheck/arrest"
	"arrestcheck/arrest/quantity"
)

// A tested is what the conditions of a limit came to.
type tested struct {
	reasons []Reason // of the conditions that do not hold throughout; empty where all do
	fails   bool     // one does not hold for anything the entries allow, or cannot be tested
	uses    []int    // inputs the test rests on
}

// conditions tests what can be tested of the conditions of the limit. Words
// under which a limit applies are printed, not tested.
func (r *row) conditions() tested {
	var t tested
	l := r.limit
	if l.TotalMassAtMost != nil {
		r.test(&t, "total_mass_at_most", arrest.TotalMass, l.TotalMassAtMost)
	}
	if l.FreeFallAtMost != nil {
		r.test(&t, "free_fall_at_most", arrest.FreeFall, l.FreeFallAtMost)
	}
	if l.PersonsAtMost > 0 && r.res.Persons > l.PersonsAtMost {
		t.fails = true
		t.reasons = append(t.reasons, words(ConditionUnfulfilled,
			"persons_at_most", strconv.Itoa(r.res.Persons), strconv.Itoa(l.PersonsAtMost)))
	}
	return t
}

// test holds every unconditional estimate of q against a condition, which must
// hold for all of them. The free fall of a result already counts an initial
// speed, as the fall that gives the same speed.
func (r *row) test(t *tested, key string, q arrest.Quantity, most *quantity.Band) {
	least, greatest, found, holds := math.NaN(), math.NaN(), false, true
	for i := range r.res.Estimates {
		e := &r.res.Estimates[i]
		if e.Quantity != q || e.Conditional() || e.Outside {
			continue
		}
		found = true
		t.uses = append(t.uses, e.Uses...)
		low, high := ends(e)
		if !(high <= most.Value) {
			holds = false
		}
		if low > most.Value {
			t.fails = true
			t.reasons = append(t.reasons, conditionReason(ConditionUnfulfilled, key, q, most, low))
			return
		}
		if math.IsNaN(least) || low < least {
			least = low
		}
		if math.IsNaN(greatest) || high > greatest {
			greatest = high
		}
	}
	switch {
	case !found:
		t.fails = true
		t.reasons = append(t.reasons, words(NotComputed, key))
	case !holds:
		t.reasons = append(t.reasons, conditionReason(ConditionStraddles, key, q, most, least, greatest))
	}
}

// conditionReason names a condition, the figures it was tested with, and the
// condition as typed.
func conditionReason(id ReasonID, key string, q arrest.Quantity, most *quantity.Band, demand ...float64) Reason {
	record, _ := q.Record()
	args := []arrest.Arg{arrest.Text(key)}
	for _, x := range demand {
		args = append(args, figure(record.Dimension, x, quantity.Nearest))
	}
	return Reason{id, append(args, arrest.Text(most.Text))}
}
