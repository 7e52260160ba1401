package reportgen

import (
	"strings"

	"arrestcheck/arrest"
	"arrestcheck/arrest/quantity"
	"arrestcheck/limits"
)

// DemandText returns the demand of a row beside its limit, both SI, as a sheet
// prints it: "not less than 3.41 kN". A floor is rounded down, a ceiling up,
// with the digits that tell the demand from the limit. The blank before the
// unit is one that does not break. What is no number is "no figure".
func DemandText(bound arrest.Bound, demand, limit float64, u quantity.Unit) string {
	if !isNumber(demand) {
		return noFigure
	}
	round := demandRounding(bound)
	return strings.TrimSpace(boundWords[bound] + " " + format(demand, u, digitsBeside(demand, limit, u, round, pageDigits), round))
}

// FigureText returns what lies between two SI figures in one unit, with
// digits that tell the ends apart; absent ends, NaN, are left out.
func FigureText(bound arrest.Bound, low, high float64, u quantity.Unit) string {
	switch {
	case isNumber(low) && isNumber(high):
		return display{units: SIUnits}.span(u.Dimension, u, low, high, workingDigits)
	case isNumber(low):
		return boundWords[arrest.AtLeast] + " " + format(low, u, workingDigits, quantity.Down)
	case isNumber(high):
		return boundWords[arrest.AtMost] + " " + format(high, u, workingDigits, quantity.Up)
	}
	return noFigure
}

// OutcomeWords returns an outcome as it is printed.
func OutcomeWords(o limits.Outcome) string { return outcomeWords[o] }

// SenseWords returns the side of a limit as it is printed.
func SenseWords(s limits.Sense) string { return senseWords[s] }

// QuantityTitle returns what a quantity is called in a job with that many
// persons: where there are none, no word speaks of one.
func QuantityTitle(q arrest.Quantity, persons int) string {
	if words, ok := titlesWithoutPersons[q]; ok && persons == 0 {
		return words
	}
	return title(q)
}

// SubjectWords returns what a subject that a limit is expected for is called in
// a job with that many persons.
func SubjectWords(subject string, persons int) string {
	for _, e := range limits.Subjects() {
		if words, ok := titlesWithoutPersons[e.Quantities[0]]; ok && e.Subject == subject && persons == 0 {
			return words
		}
	}
	return expectedWord(subject)
}
