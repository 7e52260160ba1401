package connector

import (
	"errors"
	"math"
)

// A Fall is what a path has to stop.
type Fall struct {
	Mass         float64 // kg
	FreeFall     float64 // m before the slack of the path begins
	InitialSpeed float64 // m/s downwards at the beginning of the free fall
	Gravity      float64 // m/s2

	// Duration in s, counted from the end of the free fall, when the slack of
	// the path begins. Zero: up to the second lowest point. A run ends earlier
	// where the body hangs, at rest under a force within a millionth of its
	// weight.
	Duration float64
}

var (
	errMass     = errors.New("connector: the mass must be above zero and finite")
	errGravity  = errors.New("connector: gravity must be above zero and finite")
	errFall     = errors.New("connector: free fall and initial speed must be zero or more and finite")
	errDuration = errors.New("connector: the duration must be zero or more and finite")
)

func (f *Fall) check() error {
	switch {
	case !(f.Mass > 0) || math.IsInf(f.Mass, 1):
		return errMass
	case !(f.Gravity > 0) || math.IsInf(f.Gravity, 1):
		return errGravity
	case !(f.FreeFall >= 0 && f.InitialSpeed >= 0) || math.IsInf(f.FreeFall+f.InitialSpeed, 1):
		return errFall
	case !(f.Duration >= 0) || math.IsInf(f.Duration, 1):
		return errDuration
	}
	return nil
}

// speed returns the speed in m/s at the end of the free fall.
func (f *Fall) speed() float64 { return FallSpeed(f.InitialSpeed, f.FreeFall, f.Gravity) }
