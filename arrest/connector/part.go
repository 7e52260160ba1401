package connector

import (
	"errors"
	"fmt"
	"math"
)

// A Kind says what a part is. The mechanics depend on the figures of a part,
// not on its kind; the kind decides what is reported as absorber travel.
type Kind uint8

// The kinds of part, from anchor to body in no particular order.
const (
	Rope Kind = iota + 1
	Webbing
	WireRope
	Absorber
	Retractable
	RopeGrab
	Harness
	Anchor
	Curve
	Slack
	Dashpot
)

var kindNames = [...]string{
	Rope: "rope", Webbing: "webbing", WireRope: "wire rope", Absorber: "absorber",
	Retractable: "retractable", RopeGrab: "rope grab", Harness: "harness and body",
	Anchor: "anchor", Curve: "loading curve", Slack: "slack", Dashpot: "dashpot",
}

// String returns the plain name of the kind.
func (k Kind) String() string {
	if int(k) < len(kindNames) && kindNames[k] != "" {
		return kindNames[k]
	}
	return fmt.Sprintf("kind %d", uint8(k))
}

// A Caution names what a reader has to be told about a part.
type Caution uint8

// StaticStretch says that the stiffness was taken from a static stretch alone.
// A rope answers a fall about twice as stiffly as it answers a hung weight, so
// that such a peak errs low and such a travel errs high.
const StaticStretch Caution = 1

// A Part is one part of the path at one point: plain figures in SI units. The
// zero value of a field means that the part has no such property.
type Part struct {
	Kind Kind

	// Slack is the travel in m during which the part carries nothing: loose
	// rope, the travel of a retractable before it locks.
	Slack float64

	// Stiffness in N/m; zero means that the part does not stretch, unless
	// Points are given.
	Stiffness float64

	// Points are loading points that take the place of Stiffness. Beyond the
	// last one the last stretch is continued, and Result.BeyondPoints says so.
	Points []Point

	// Unloading is the stiffness in N/m along which stretch is given back.
	// Zero: along the loading curve, nothing stays. +Inf: all of it stays.
	Unloading float64

	// Plateau is the travel under a held force, in series with the stretch.
	Plateau Plateau

	// Viscous is the coefficient in N s/m of a dashpot beside the whole path.
	// The coefficients of all parts add.
	Viscous float64

	// Lifeline marks a part whose stretch is no part of the deceleration
	// distance.
	Lifeline bool

	Caution Caution
}

// A Plateau is travel under a held force: tearing webbing, a brake, a rope grab
// that slips. The travel stays. Once it is used up the plateau is rigid and
// only what else stretches in the path still gives way: it is exhausted.
type Plateau struct {
	// Force in N under which it travels. Zero: there is no plateau.
	Force float64

	// Travel at most, in m; +Inf only where nothing ends it.
	Travel float64

	// Activation is the force in N that starts the travel; zero means Force.
	// Above Force it is a short peak, after which the rest of the path shrinks
	// back to Force in no time. Below Force the force rises in a straight line
	// from Activation to Force over Rise.
	Activation float64

	// Rise is the travel in m over which the force grows from Activation to
	// Force. It is required, and only allowed, where Activation is below Force.
	Rise float64
}

// Elastic returns a part of the stiffness k in N/m that gives back all of its
// stretch.
func Elastic(kind Kind, k float64) Part { return Part{Kind: kind, Stiffness: k} }

// FromModulus returns a part of the length L in m and the modulus M in N, force
// per unit strain, of the kind given:
//
//	k = M/L
func FromModulus(kind Kind, modulus, length float64) Part {
	return Part{Kind: kind, Stiffness: modulus / length}
}

// RopeFromRating returns a rope of the length given, in m, whose modulus
// follows from its rated impact force; see Modulus.
func RopeFromRating(r Rating, length float64) Part {
	return FromModulus(Rope, Modulus(r), length)
}

// RopeFromStaticStretch returns a rope of the length given, in m, from the
// strain under a hung load in N alone. The part carries the StaticStretch
// caution: with half the modulus the peak errs low by up to 29 per cent, and the
// travel errs high.
func RopeFromStaticStretch(load, strain, length float64) Part {
	p := FromModulus(Rope, load/strain, length)
	p.Caution = StaticStretch
	return p
}

// NewAbsorber returns an absorber, rigid but for its travel.
func NewAbsorber(p Plateau) Part { return Part{Kind: Absorber, Plateau: p} }

// NewRetractable returns a retractable that pays out over locking, in m, and
// then brakes.
func NewRetractable(locking float64, brake Plateau) Part {
	return Part{Kind: Retractable, Slack: locking, Plateau: brake}
}

// NewRopeGrab returns a rope grab that slips.
func NewRopeGrab(slip Plateau) Part { return Part{Kind: RopeGrab, Plateau: slip} }

// FromPoints returns a part with loading points and an unloading stiffness in
// N/m, zero where it returns along its loading curve.
func FromPoints(points []Point, unloading float64) Part {
	return Part{Kind: Curve, Points: points, Unloading: unloading}
}

// Loose returns slack of the length given, in m.
func Loose(length float64) Part { return Part{Kind: Slack, Slack: length} }

// NewDashpot returns a dashpot beside the whole path, in N s/m.
func NewDashpot(c float64) Part { return Part{Kind: Dashpot, Viscous: c} }

var (
	errNegative      = errors.New("a figure is negative or not a number")
	errEndless       = errors.New("a figure is infinite that must not be")
	errTwoCurves     = errors.New("either a stiffness or loading points, not both")
	errNoForce       = errors.New("a plateau needs a force above zero")
	errNoTravel      = errors.New("a plateau needs a travel above zero")
	errRiseNeeded    = errors.New("an activation force below the force of the plateau needs the travel over which the force rises")
	errRiseUnwanted  = errors.New("a rise is only for an activation force below the force of the plateau")
	errRiseLong      = errors.New("the rise is longer than the travel")
	errPointsNoForce = errors.New("an unloading stiffness belongs to a stiffness or to loading points")
)

// check returns what is wrong with the part, or nil.
func (p *Part) check() error {
	q := &p.Plateau
	if !(p.Slack >= 0 && p.Stiffness >= 0 && p.Unloading >= 0 && p.Viscous >= 0 &&
		q.Force >= 0 && q.Travel >= 0 && q.Activation >= 0 && q.Rise >= 0) {
		return errNegative
	}
	if most := p.Slack + p.Stiffness + p.Viscous + q.Force + q.Activation + q.Rise; math.IsInf(most, 1) {
		return errEndless
	}
	if err := q.check(); err != nil {
		return err
	}
	switch {
	case p.Points != nil && p.Stiffness != 0:
		return errTwoCurves
	case p.Points != nil:
		return checkCurve(p.Points, p.Unloading)
	case p.Unloading != 0 && p.Stiffness == 0:
		return errPointsNoForce
	case p.Unloading != 0 && p.Unloading < p.Stiffness:
		return errUnloadShallow
	}
	return nil
}

func (p *Plateau) check() error {
	switch {
	case p.Force == 0 && p.Travel == 0 && p.Activation == 0 && p.Rise == 0:
		return nil
	case p.Force == 0:
		return errNoForce
	case p.Travel == 0:
		return errNoTravel
	case p.Activation != 0 && p.Activation < p.Force && p.Rise == 0:
		return errRiseNeeded
	case p.Rise > 0 && !(p.Activation != 0 && p.Activation < p.Force):
		return errRiseUnwanted
	case p.Rise > p.Travel:
		return errRiseLong
	}
	return nil
}
