package arrest

import (
	"errors"
	"fmt"

	"arrestcheck/arrest/connector"
)

// MaxFigures is the greatest number of figures that a connector path and a
// layout have together.
const MaxFigures = 48

// NoFigure stands in a PlannedPart where it has no such figure.
const NoFigure = -1

// A Basis says what the stiffness of a part is worked out from.
type Basis uint8

const (
	Rigid           Basis = iota // the part does not stretch
	ByStiffness                  // N/m
	ByModulus                    // length and modulus, N
	ByImpactForce                // length and rated impact force of the EN 892 test, N (M-11)
	ByStaticStretch              // length and stretch under 80 kg alone (ratio)
	ByPoints                     // loading points
)

// A PlannedPart says which figures of a Case make one part of the path. The
// figures are indexes into Case.Figures, or NoFigure.
type PlannedPart struct {
	Name     string // as the user calls it, or its kind
	Kind     connector.Kind
	Basis    Basis
	Length   int // m
	Give     int // stiffness N/m, modulus N, impact force N or static stretch, by Basis
	Force    int // deployment, braking or slip force, N
	Travel   int // at most, m
	Activate int // activation force, N
	Rise     int // travel over which the force rises from activation to deployment, m
	Locking  int // travel before locking, m; part of the free fall as entered

	Points    []connector.Point // of ByPoints, exact
	Unloading float64           // stiffness of the way back of ByPoints, N/m; 0: along the loading curve
	Lifeline  bool
}

// A PathPlan makes a connector path of the figures of a Case. It is never
// changed once a job holds it.
type PathPlan struct {
	Parts []PlannedPart

	// Shorter, when above 0, is the share of every travel under a held force
	// that is counted on: less than 1 where the user's allowance takes the rest.
	Shorter float64
}

// fill makes the parts at one point. The travel before a retractable locks is
// part of the free fall as entered, so that it is no slack here.
func (pl *PathPlan) fill(c *Case, parts []connector.Part) []connector.Part {
	parts = parts[:0]
	for i := range pl.Parts {
		p := pl.Parts[i].at(c)
		if pl.Shorter > 0 {
			p.Plateau.Travel *= pl.Shorter
		}
		parts = append(parts, p)
	}
	return parts
}

// A PartError says why a part of a path cannot be what its figures make of it.
type PartError struct {
	Part int    // from 1
	Name string // of the PlannedPart
	Err  error  // never nil
}

func (e *PartError) Error() string { return fmt.Sprintf("part %d (%s): %v", e.Part, e.Name, e.Err) }

func (e *PartError) Unwrap() error { return e.Err }

// Check reports what keeps the figures of c from making a path: nil where At
// can work the path out, a *PartError where one part cannot be, another error
// where the parts cannot be a path together. It looks at one point; over bands
// it holds for the points between only as far as the reader of the file sees to
// it that no figure changes its meaning there.
func (pl *PathPlan) Check(c *Case) error {
	var path connector.Path
	parts := pl.fill(c, nil)
	for i := range parts {
		if err := path.Set(parts[i]); err != nil {
			if cause := errors.Unwrap(err); cause != nil {
				err = cause
			}
			return &PartError{i + 1, pl.Parts[i].Name, err}
		}
	}
	return path.Set(parts...)
}

func (pp *PlannedPart) at(c *Case) connector.Part {
	figure := func(i int) float64 {
		if i == NoFigure {
			return 0
		}
		return c.Figures[i]
	}
	p := connector.Part{Kind: pp.Kind}
	switch length, give := figure(pp.Length), figure(pp.Give); pp.Basis {
	case ByStiffness:
		p = connector.Elastic(pp.Kind, give)
	case ByModulus:
		p = connector.FromModulus(pp.Kind, give, length)
	case ByImpactForce:
		p = connector.RopeFromRating(connector.SingleRope(give), length)
	case ByStaticStretch:
		p = connector.RopeFromStaticStretch(staticStretchMass*StandardGravity, give, length)
	case ByPoints:
		p = connector.FromPoints(pp.Points, pp.Unloading)
	}
	p.Kind, p.Lifeline = pp.Kind, pp.Lifeline
	if pp.Force != NoFigure {
		p.Plateau = connector.Plateau{Force: figure(pp.Force), Travel: figure(pp.Travel), Activation: figure(pp.Activate), Rise: figure(pp.Rise)}
	}
	return p
}

// staticStretchMass is the mass, kg, under which EN 892 states the static
// stretch of a rope (from memory).
const staticStretchMass = 80

// length returns the length of all parts that state one, m.
func (pl *PathPlan) length(c *Case) float64 {
	sum := 0.0
	for i := range pl.Parts {
		if n := pl.Parts[i].Length; n != NoFigure {
			sum += c.Figures[n]
		}
	}
	return sum
}
