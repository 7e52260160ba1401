package limits

import (
	"fmt"
	"math"

	"arrestcheck/arrest"
	"arrestcheck/arrest/quantity"
)

// Assess compares a result with every limit of every set, in the order of the
// sets and of the limits in them.
//
// The findings point into sets, which must stay as they are while the
// Assessment is in use. Assess panics on a limit that no reader of limits can
// make: one whose sense is not that of its quantity (see SenseOf), or that has
// a range where one figure belongs.
func Assess(res *arrest.Result, sets []Set, elsewhere []Elsewhere) Assessment {
	n := 0
	for i := range sets {
		n += len(sets[i].Limits)
	}
	a := Assessment{
		Findings:   make([]Finding, 0, n),
		Groups:     make([]Group, 0, n),
		NotEntered: notEntered(res, sets, elsewhere),
		Elsewhere:  elsewhere,
	}
	var c Comparison
	for i := range sets {
		from := len(a.Findings)
		for j := range sets[i].Limits {
			a.Findings = append(a.Findings, c.Compare(res, &sets[i], &sets[i].Limits[j]))
		}
		a.group(from)
	}
	return a
}

func mustBeWhole(l *Limit) {
	s, bounds := SenseOf(l.Quantity)
	if !bounds || l.Sense != s {
		panic(fmt.Sprintf("limits: limit %q: %s cannot be bounded by %q", l.ID, l.Quantity, l.Sense))
	}
	for _, b := range [...]*quantity.Band{&l.Bound, l.AlsoPrinted, l.TotalMassAtMost, l.FreeFallAtMost} {
		if b != nil && math.IsNaN(b.Value) {
			panic(fmt.Sprintf("limits: limit %q: %q is no single figure", l.ID, b.Text))
		}
	}
}
