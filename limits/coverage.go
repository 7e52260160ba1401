package limits

import (
	"slices"

	"arrestcheck/arrest"
)

// Subjects returns what a job with a fall is expected to be held against, in
// print order.
func Subjects() []Expected {
	return []Expected{
		{"peak", []arrest.Quantity{arrest.PeakForce}},
		{"free_fall", []arrest.Quantity{arrest.FreeFall}},
		{"clearance", []arrest.Quantity{arrest.ClearanceLeft, arrest.ClearanceNeeded}},
		{"anchor", []arrest.Quantity{arrest.AnchorForce, arrest.AnchorStrengthPerPerson, arrest.StrengthOverArrestForce}},
		{"mass", []arrest.Quantity{arrest.TotalMass}},
	}
}

// notEntered returns the subjects that neither a limit nor another document
// covers. What a product was tested to covers nothing: it is no site limit.
func notEntered(res *arrest.Result, sets []Set, elsewhere []Elsewhere) []Expected {
	if ofMovingLoad(res) {
		return nil
	}
	return slices.DeleteFunc(Subjects(), func(e Expected) bool {
		return e.entered(sets) || slices.ContainsFunc(elsewhere, func(w Elsewhere) bool {
			return slices.Contains(e.Quantities, w.Quantity)
		})
	})
}

func (e *Expected) entered(sets []Set) bool {
	for i := range sets {
		for j := range sets[i].Limits {
			l := &sets[i].Limits[j]
			if l.Kind != ProductTest && slices.Contains(e.Quantities, l.Quantity) {
				return true
			}
		}
	}
	return false
}

// ofMovingLoad reports whether nobody falls. Only a moving load has an energy
// taken out of its motion (M-60); a result that is not known to be of one is
// held to be of a fall, and asks for more limits, not fewer.
func ofMovingLoad(res *arrest.Result) bool {
	return slices.ContainsFunc(res.Estimates, func(e arrest.Estimate) bool { return e.Quantity == arrest.EnergyTaken })
}
