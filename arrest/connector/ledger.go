package connector

import (
	"errors"
	"math"
)

// A Ledger is the account of a run: what went in, what came out, and by how
// much the two differ. The differences measure the arithmetic, not the model.
type Ledger struct {
	Impulse float64 // N s, of the force of the path
	Weight  float64 // N s, of the weight: W t
	Motion  float64 // N s, gain of momentum: m (v - v0)
	Carried float64 // N s, momentum at the beginning: m v0

	Before  float64 // J, energy of motion at the beginning
	After   float64 // J, energy of motion at the end
	Fallen  float64 // J, work of the weight: W (x - x0)
	Work    float64 // J, work done on the path, dashpot left out
	Viscous float64 // J, work done on the dashpot
	Stored  float64 // J, what the parts still give back
	Lost    float64 // J, what the parts do not give back
	Turned  float64 // J, work done on and by the path without regard to sign

	MomentumLeft float64 // N s, Weight - Impulse - Motion
	EnergyLeft   float64 // J, Before + Fallen - After - Work - Viscous
	PartsLeft    float64 // J, Work - Stored - Lost
}

// ErrLedger is the error of a run whose ledgers do not close: a fault of the
// program, never of its input.
var ErrLedger = errors.New("connector: internal error: the momentum or energy of a run does not close")

// closes is the greatest difference, relative to what was turned over, with which
// the ledgers of an exact run close. Rounding stays below 1e-12 over the random
// paths of the tests.
const closes = 1e-9

// settle works out the differences and returns ErrLedger if one of them is
// above the tolerance relative to what was turned over. The grain in J is what
// the rounding of the travel alone is worth. After a rigid stop the ledgers close
// up to the moment before the blow.
func (l *Ledger) settle(tolerance, grain float64) error {
	l.MomentumLeft = l.Weight - l.Impulse - l.Motion
	l.EnergyLeft = l.Before + l.Fallen - l.After - l.Work - l.Viscous
	l.PartsLeft = l.Work - l.Stored - l.Lost
	p := tolerance * (math.Abs(l.Weight) + math.Abs(l.Impulse) + math.Abs(l.Motion) + l.Carried)
	e := tolerance*(l.Before+l.After+math.Abs(l.Fallen)+l.Turned) + grain
	if math.Abs(l.MomentumLeft) <= p && math.Abs(l.EnergyLeft) <= e && math.Abs(l.PartsLeft) <= e {
		return nil
	}
	return ErrLedger
}

// grain returns the work in J of the greatest force and the weight over a few
// roundings of the travel.
func (r *Result) grain(weight, slack float64) float64 {
	if math.IsInf(r.Peak, 1) || math.IsInf(r.End.X, 0) {
		return 0
	}
	return 0x1p-48 * (r.Peak + weight) * (math.Abs(r.End.X) + slack)
}
