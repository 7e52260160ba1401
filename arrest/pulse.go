package arrest

import "math"

// A Pulse is a shape of the force over time that a user may assume for the
// stop, from the first pull to rest.
type Pulse uint8

// The shapes of M-07. A force that ends below the weight is not a stop, so
// shapes that fall to zero are not on the list.
const (
	NoPulse     Pulse = iota
	Constant          // the same force all the way
	RisingRamp        // from nothing evenly up to the peak
	SpringLike        // a quarter sine, as a spring pulled from rest
	RisePlateau       // an even rise over Case.Rise of the time, then level
	EarlyPeak         // at once the peak, then evenly down to the weight
)

// A PulseRecord gives the word for a shape that files and reports use.
type PulseRecord struct {
	Pulse Pulse
	Name  string
}

var pulseRecords = [...]PulseRecord{
	{Constant, "constant"},
	{RisingRamp, "rising ramp"},
	{SpringLike, "spring-like rise"},
	{RisePlateau, "rise then plateau"},
	{EarlyPeak, "early peak"},
}

// Pulses returns the shapes a user may assume, in print order.
func Pulses() []PulseRecord { return pulseRecords[:] }

// String returns the word for the shape; empty for NoPulse.
func (p Pulse) String() string {
	for _, r := range pulseRecords {
		if r.Pulse == p {
			return r.Name
		}
	}
	return ""
}

// factors returns k = peak/mean and c, the mean of s weighted with the force,
// of every shape but EarlyPeak:
//
//	d = c*v*t + (c - 1/2)*g*t^2
//
// rise is the rise fraction of RisePlateau, from 0 (constant) to 1 (ramp).
func (p Pulse) factors(rise float64) (k, c float64) {
	switch p {
	case RisingRamp:
		return 2, 2.0 / 3
	case SpringLike:
		return math.Pi / 2, 2 / math.Pi
	case RisePlateau:
		k = 1 / (1 - rise/2)
		level := 1 - rise
		return k, 1 - float64(k*(rise/2-float64(rise*rise)/3+float64(level*level)/2))
	}
	return 1, 0.5
}

// DistanceOf returns the stopping distance, m, of a stop of this shape that
// begins at the speed v, m/s, and takes the time t, s, under the gravity g,
// m/s2. rise is the rise fraction of RisePlateau.
//
//	d = c*v*t + (c - 1/2)*g*t^2     EarlyPeak: d = v*t/3
func (p Pulse) DistanceOf(v, t, g, rise float64) float64 {
	if p == EarlyPeak {
		return v * t / 3
	}
	_, c := p.factors(rise)
	return float64(c*v*t) + float64((c-0.5)*g*t*t)
}

// TimeOf is the inverse of DistanceOf: the positive root of the quadratic,
// written so that nothing cancels. The time is +Inf for v = 0 where the shape
// has no gravity term.
//
//	t = 2*d/(c*v + sqrt(c^2*v^2 + 4*(c - 1/2)*g*d))     EarlyPeak: t = 3*d/v
func (p Pulse) TimeOf(v, d, g, rise float64) float64 {
	if p == EarlyPeak {
		return 3 * d / v
	}
	_, c := p.factors(rise)
	cv := c * v
	return 2 * d / (cv + math.Sqrt(float64(cv*cv)+float64(4*(c-0.5)*g*d)))
}

// PeakOf returns the peak force, N, of a stop of this shape: mass m, kg, from
// the speed v, m/s, to rest in the time t, s.
//
//	F_peak = k*(W + m*v/t)     EarlyPeak: F_peak = W + 2*m*v/t
func (p Pulse) PeakOf(m, v, t, g, rise float64) float64 {
	mean := float64(m * (v / t))
	if p == EarlyPeak {
		return float64(m*g) + float64(2*mean)
	}
	k, _ := p.factors(rise)
	return k * (float64(m*g) + mean)
}

// riseTime returns the time from the first pull to the peak, s, for a stop
// that takes t; NaN where the peak comes at once.
func (p Pulse) riseTime(t, rise float64) float64 {
	switch p {
	case RisingRamp, SpringLike:
		return t
	case RisePlateau:
		if rise > 0 {
			return rise * t
		}
	}
	return math.NaN()
}
