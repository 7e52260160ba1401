package limits

import (
	"math"

	"arrestcheck/arrest"
)

// senses decides every quantity once. An empty sense means that the quantity
// describes something and bounds nothing: a limit on it is refused.
//
// At most is the rule: more of it hurts, reaches further or loads harder. At
// least stands for what must remain. Where more is better in one way and worse
// in another, the side that the written rules bound is taken, and the other
// side has a quantity of its own: a longer stop is gentler, but rules bound
// its length, and the force bounds its shortness.
var senses = map[arrest.Quantity]Sense{
	arrest.TotalMass:               AtMost,
	arrest.FreeFall:                AtMost,
	arrest.FallSpeed:               AtMost,
	arrest.FallEnergy:              AtMost,
	arrest.Momentum:                "", // on the way to the mean force; the speed and the energy are what rules bound
	arrest.MeanForceOverDistance:   AtMost,
	arrest.MeanForceOverTime:       AtMost,
	arrest.ShapeRatio:              "", // says how the two routes fit each other; no side of 1 is the better one
	arrest.PeakForce:               AtMost,
	arrest.MeanAboveLevel:          AtMost,
	arrest.ForceOverWeight:         AtMost,
	arrest.PeakDeceleration:        AtMost,
	arrest.OnsetRate:               AtMost,
	arrest.StoppingDistance:        AtMost, // "arrested within": the space it takes
	arrest.StoppingTime:            "",     // longer is gentler and takes more space: the force and the distance say so
	arrest.DecelerationDistance:    AtMost,
	arrest.FallFactor:              AtMost,
	arrest.AbsorberTravel:          AtMost, // what the absorber has to give
	arrest.TotalFallDistance:       AtMost,
	arrest.ClearanceNeeded:         AtMost,
	arrest.ClearanceLeft:           AtLeast,
	arrest.OffsetAngle:             AtMost,
	arrest.SwingAngle:              AtMost,
	arrest.SwingDrop:               AtMost,
	arrest.SwingSpeed:              AtMost,
	arrest.SpeedAtObstacle:         AtMost,
	arrest.RestraintReach:          AtMost,
	arrest.AnchorForce:             AtMost,
	arrest.AnchorStrengthPerPerson: AtLeast,
	arrest.StrengthOverArrestForce: AtLeast,
	arrest.BridleLegForce:          AtMost,
	arrest.LegLength:               "", // a length of the layout, neither good nor bad
	arrest.LineTension:             AtMost,
	arrest.LineSag:                 AtMost, // the space it takes; too little of it shows in the tension
	arrest.Impulse:                 "",     // holds the weight times the time: grows with a gentle, long stop
	arrest.ImpliedFreeFall:         "",     // a check on a record, not on the work
	arrest.StoppingForce:           AtMost,
	arrest.MeanDeceleration:        AtMost,
	arrest.EnergyTaken:             AtMost, // what the stop has to take up
	arrest.ImpulseX:                "",     // parts of a vector, of either sign: bound its magnitude
	arrest.ImpulseY:                "",
	arrest.ImpulseZ:                "",
	arrest.ImpulseDirection:        "",
	arrest.StoppingForceX:          "",
	arrest.StoppingForceY:          "",
	arrest.StoppingForceZ:          "",
	arrest.StoppingForceDirection:  "",
}

// SenseOf returns the sense in which a quantity can be bounded, and whether it
// can be bounded at all. Unknown ids cannot.
func SenseOf(q arrest.Quantity) (Sense, bool) {
	s := senses[q]
	return s, s != ""
}

// beyond reports whether x lies on the wrong side of limit. Equal is not
// beyond: both figures are the exact decimal times the exact factor, rounded
// once, so that equal entries are equal here. NaN is neither beyond nor inside.
func (s Sense) beyond(x, limit float64) bool {
	if s == AtLeast {
		return x < limit
	}
	return x > limit
}

// inside reports whether x lies on the limit or on the right side of it. No
// infinity does: it is no figure that anybody entered or computed.
func (s Sense) inside(x, limit float64) bool {
	return finite(x) && (x == limit || s.beyond(limit, x))
}

// order returns the stricter and the laxer of two limits.
func (s Sense) order(a, b float64) (strict, lax float64) {
	if s.beyond(a, b) {
		return b, a
	}
	return a, b
}

// worst is the end of an estimate that is open on the bad side.
func (s Sense) worst() float64 {
	if s == AtLeast {
		return math.Inf(-1)
	}
	return math.Inf(1)
}

// openEnd is the bound of an estimate that leaves the wrong side open: it can
// show that a limit is exceeded and nothing else.
func (s Sense) openEnd() arrest.Bound {
	if s == AtLeast {
		return arrest.AtMost
	}
	return arrest.AtLeast
}
