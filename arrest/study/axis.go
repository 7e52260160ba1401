package study

import (
	"math"
	"slices"
	"strings"

	"arrestcheck/arrest"
	"arrestcheck/arrest/quantity"
)

// MaxPoints is the greatest number of points of a sweep.
const MaxPoints = 10_000_000

// An Axis is one input and the figures it is moved to, SI, strictly rising.
type Axis struct {
	Key    string
	Values []float64
}

// Linear returns n figures from low to high at even distances, low < high and
// n >= 2. Both ends are exact; the figures between are rounded to the 12th
// digit of the greater end, so that a third of 0.9 is the 0.3 that a person
// would type. The error is a *Refusal.
func Linear(low, high float64, n int) ([]float64, error) {
	if err := grid(low, high, n); err != nil {
		return nil, err
	}
	scale := snapScale(math.Max(math.Abs(low), math.Abs(high)))
	values := make([]float64, n)
	for i := range values {
		values[i] = snap(low+(high-low)*(float64(i)/float64(n-1)), scale)
	}
	return fasten(values, low, high)
}

// Logarithmic returns n figures from low to high at even ratios, 0 < low <
// high and n >= 2, each but the ends rounded to 12 digits. The error is a
// *Refusal.
func Logarithmic(low, high float64, n int) ([]float64, error) {
	if err := grid(low, high, n); err != nil {
		return nil, err
	}
	if low <= 0 {
		return nil, &Refusal{ID: OutOfRange, SI: low}
	}
	values := make([]float64, n)
	step := math.Log(high/low) / float64(n-1)
	for i := range values {
		x := low * math.Exp(step*float64(i))
		values[i] = snap(x, snapScale(x))
	}
	return fasten(values, low, high)
}

func grid(low, high float64, n int) error {
	switch {
	case !(low < high) || math.IsInf(low, 0) || math.IsInf(high, 0):
		return &Refusal{ID: EmptyRange, SI: low}
	case n < 2:
		return &Refusal{ID: TooFewPoints, SI: float64(n)}
	case n > MaxPoints:
		return &Refusal{ID: TooMany, SI: float64(n)}
	}
	return nil
}

// fasten puts the exact ends in and sees to it that every figure is a new one.
func fasten(values []float64, low, high float64) ([]float64, error) {
	values[0], values[len(values)-1] = low, high
	for i := range values[1:] {
		if values[i+1] <= values[i] {
			return nil, &Refusal{ID: TooClose, SI: float64(len(values))}
		}
	}
	return values, nil
}

// snapDigits is how many significant digits a figure of a grid keeps.
const snapDigits = 12

// snapScale returns the power of ten by which x has 12 digits before the point,
// or 0 where no such power is an exact float64.
func snapScale(x float64) float64 {
	if x == 0 {
		return 0
	}
	shift := snapDigits - 1 - int(math.Floor(math.Log10(math.Abs(x))))
	if shift < 0 || shift > 22 {
		return 0
	}
	return math.Pow10(shift)
}

// snap rounds x to a whole multiple of 1/scale: whole number over exact power
// of ten is the float64 nearest to the decimal.
func snap(x, scale float64) float64 {
	if scale == 0 {
		return quantity.Snap(x)
	}
	return math.Round(x*scale) / scale
}

// Of a layout, what can lie on either side of zero and what may be zero; the
// rest, as the length of the connector, is above.
var (
	signedInLayout = []string{"anchor_height", "anchor_behind_edge", "along", "out", "below", "along_from", "along_to", "out_from", "out_to"}
	zeroInLayout   = []string{"slack", "travel_before_locking"}
)

// possible reports whether an input can have the figure x at all. Distance and
// time of a stop, masses and gravity are above zero, as 0 stands for "not
// given"; tools, free fall and speed may be 0.
func possible(in *arrest.Input, x float64) bool {
	if math.IsNaN(x) || math.IsInf(x, 0) {
		return false
	}
	if in.Role == arrest.OfLayout {
		name := in.Key[strings.LastIndexByte(in.Key, '.')+1:]
		return x > 0 || slices.Contains(signedInLayout, name) || x == 0 && slices.Contains(zeroInLayout, name)
	}
	positive := in.Role == arrest.OfPlace
	switch in.Band.Unit.Dimension {
	case quantity.Mass:
		positive = !strings.HasSuffix(in.Key, ".tools")
	case quantity.Length, quantity.Time:
		positive = in.Role == arrest.OfStop
	case quantity.Speed:
		if in.Key != "fall.initial_speed" {
			return true // a component of a velocity
		}
	case quantity.Ratio:
		return 0 <= x && x <= 1
	case quantity.Angle, quantity.Force:
		return true
	}
	return x > 0 || x == 0 && !positive
}

// place looks the axes up and tests their figures.
func place(j *arrest.Job, axes []Axis) ([]int, error) {
	if len(axes) == 0 || len(axes) > 2 {
		return nil, &Refusal{ID: NoAxes, SI: float64(len(axes))}
	}
	points := 1
	var inputs []int
	for _, a := range axes {
		k, err := find(j, a.Key)
		if err != nil {
			return nil, err
		}
		if len(a.Values) == 0 {
			return nil, &Refusal{ID: TooFewPoints, Key: a.Key}
		}
		for n, x := range a.Values[1:] {
			if !(x > a.Values[n]) {
				return nil, &Refusal{ID: NotRising, Key: a.Key, SI: x}
			}
		}
		for _, x := range []float64{a.Values[0], a.Values[len(a.Values)-1]} {
			if !possible(&j.Inputs[k], x) { // and so all between them
				return nil, &Refusal{ID: OutOfRange, Key: a.Key, SI: x}
			}
		}
		if len(inputs) == 1 && inputs[0] == k {
			return nil, &Refusal{ID: Twice, Key: a.Key}
		}
		inputs = append(inputs, k)
		if points *= len(a.Values); points > MaxPoints {
			return nil, &Refusal{ID: TooMany, SI: float64(points)}
		}
	}
	return inputs, nil
}
