package arrest

import (
	"errors"

	"arrestcheck/arrest/rig"
)

// ErrNoSwing is the error of SwingSeries for a case without a connector path or
// from which the body does not swing in a plane.
var ErrNoSwing = errors.New("arrest: no swing: the body falls straight down, in no plane or not at all")

// SwingSeries returns the modelled swing at one point as moments, from the start
// of the fall (M-24). Times count from there, heights from the walking surface.
// Where the force jumps, two moments have the same time.
func SwingSeries(c *Case) ([]rig.PlanarState, error) {
	var p Point
	At(c, &p)
	switch {
	case p.Model == nil || p.Layout == nil || !p.Model.Swings || !p.Layout.Place.Plane.Flat:
		return nil, ErrNoSwing
	case p.Model.Failed != nil:
		return nil, p.Model.Failed
	}
	r := p.Layout
	body := rig.Body{Mass: p.TotalMass, InitialSpeed: c.InitialSpeed, Gravity: c.Gravity}
	return r.Layout.TracePlanar(&r.Place, &r.tether, &body, planarTolerance, &r.Planar, nil)
}
