package connector

import (
	"errors"
	"math"
)

// A Point is one loading point: the force at an extension.
type Point struct {
	Extension float64 // m
	Force     float64 // N
}

// errCurve values say what is wrong with a list of loading points.
var (
	errFewPoints     = errors.New("a loading curve needs at least two points")
	errPointNumber   = errors.New("a loading point is negative or not a number")
	errPointOrder    = errors.New("the extensions of a loading curve must rise from point to point")
	errPointFalls    = errors.New("the force of a loading curve must not fall from point to point")
	errPointFlat     = errors.New("a loading curve with a flat stretch needs an unloading stiffness")
	errPointHeld     = errors.New("a loading curve with a force at no extension gives nothing back: its unloading stiffness must be infinite")
	errPointForce    = errors.New("a loading curve needs a point with a force above zero")
	errUnloadShallow = errors.New("the unloading stiffness must not be below the steepest stretch of the loading curve")
	errPointStart    = errors.New("the first loading point needs either no extension or no force")
	errLastFlat      = errors.New("a loading curve must rise in its last stretch, which is continued beyond the last point")
)

// checkCurve tests loading points and the unloading stiffness that goes with
// them; an unloading stiffness of zero means that the part returns along its
// loading curve.
func checkCurve(points []Point, unloading float64) error {
	if len(points) < 2 {
		return errFewPoints
	}
	if points[0].Extension > 0 && points[0].Force > 0 {
		return errPointStart
	}
	if points[0].Force > 0 && !math.IsInf(unloading, 1) {
		return errPointHeld
	}
	steepest, flat := 0.0, false
	for i, p := range points {
		if !(p.Extension >= 0 && p.Force >= 0) || math.IsInf(p.Extension, 0) || math.IsInf(p.Force, 0) {
			return errPointNumber
		}
		if i == 0 {
			continue
		}
		last := points[i-1]
		if !(p.Extension > last.Extension) {
			return errPointOrder
		}
		if p.Force < last.Force {
			return errPointFalls
		}
		flat = flat || p.Force == last.Force && p.Force > 0
		steepest = max(steepest, (p.Force-last.Force)/(p.Extension-last.Extension))
	}
	n := len(points)
	switch {
	case points[n-1].Force == 0:
		return errPointForce
	case points[n-1].Force == points[n-2].Force:
		return errLastFlat
	case flat && unloading == 0:
		return errPointFlat
	case unloading != 0 && unloading < steepest:
		return errUnloadShallow
	}
	return nil
}

// leadingSlack returns the extension up to which the curve carries nothing.
func leadingSlack(points []Point) float64 {
	slack := points[0].Extension
	for i := 0; i < len(points) && points[i].Force == 0; i++ {
		slack = points[i].Extension
	}
	return slack
}
