package reportgen

import (
	"slices"

	"arrestcheck/arrest"
	"arrestcheck/arrest/quantity"
)

// boundOf returns the bound of the estimate whose end a contradiction names by
// the title of its quantity, its evidence and the figure.
func boundOf(res *arrest.Result, quantityTitle, evidence, end arrest.Arg) arrest.Arg {
	for i := range res.Estimates {
		e := &res.Estimates[i]
		if title(e.Quantity) == quantityTitle.Text && string(e.Evidence) == evidence.Text && (e.Low == end.SI || e.High == end.SI) {
			return arrest.Text(string(e.Bound))
		}
	}
	return arrest.Text(string(arrest.Between))
}

// derived reports whether a warning says of the severity, which is the force
// over weight or mass, what another says of the force itself: the force is told
// once, and the figures that follow from it are left out.
func derived(w arrest.Warning, all []arrest.Warning) bool {
	dimension := contradicted(w)
	if dimension != quantity.Ratio && dimension != quantity.Acceleration {
		return false
	}
	return slices.ContainsFunc(all, func(o arrest.Warning) bool {
		return o.ID == w.ID && contradicted(o) == quantity.Force && sameParties(o, w)
	})
}

// contradicted returns the dimension of the figures that a warning sets against
// each other, 0 for a warning of another kind.
func contradicted(w arrest.Warning) quantity.Dimension {
	switch w.ID {
	case arrest.EstimatesDisjoint, arrest.RatedAgainstModel:
		return w.Args[2].Dimension
	case arrest.CeilingBelowFloor:
		return w.Args[1].Dimension
	}
	return 0
}

// sameParties reports whether two contradictions are between the same documents
// or kinds of evidence.
func sameParties(a, b arrest.Warning) bool {
	if a.ID == arrest.EstimatesDisjoint {
		return a.Args[1] == b.Args[1] && a.Args[3] == b.Args[3]
	}
	return a.Args[0] == b.Args[0]
}
