package figure

import (
	"fmt"
	"math"
)

// An Axis is one direction of a plot. Figures along it are in Unit.
type Axis struct {
	Name, Unit string

	// Low and High are its ends. Where they are equal, the axis reaches to the
	// round numbers around all that is drawn, and to zero where that is near.
	Low, High float64
	Log       bool
}

// label returns what stands at the axis: "stopping distance, m".
func (a Axis) label() string {
	if a.Unit == "" {
		return a.Name
	}
	return a.Name + ", " + a.Unit
}

// told returns what the scale of the axis is, in words.
func (a Axis) told(ticks []Tick) string {
	return a.label() + ": " + ticks[0].Label + " .. " + ticks[len(ticks)-1].Label
}

// greatest bounds the figures along an axis. Beyond it no physical amount in a
// sensible unit lies.
const greatest = 1e15

// fitted returns a with its ends set, from values where it has none.
func (a Axis) fitted(values []float64) (Axis, error) {
	if a.Low == a.High {
		low, high, some := a.reach(values)
		if !some {
			return a, fmt.Errorf("figure: nothing to draw along the axis %q", a.label())
		}
		a.Low, a.High = low, high
		a.widen()
	}
	switch {
	case !finite(a.Low) || !finite(a.High) || a.Low >= a.High:
		return a, fmt.Errorf("figure: the axis %q cannot reach from %v to %v", a.label(), a.Low, a.High)
	case a.Log && a.Low <= 0:
		return a, fmt.Errorf("figure: the logarithmic axis %q cannot begin at %v", a.label(), a.Low)
	case max(-a.Low, a.High) > greatest || a.High-a.Low < 1e-9*max(-a.Low, a.High) || max(-a.Low, a.High) < 1/greatest:
		return a, fmt.Errorf("figure: no figures can be written along the axis %q from %v to %v", a.label(), a.Low, a.High)
	}
	return a, nil
}

// reach returns the least and the greatest of the values that the axis can show.
func (a Axis) reach(values []float64) (low, high float64, some bool) {
	for _, v := range values {
		if !finite(v) || math.Abs(v) > greatest || a.Log && v <= 1/greatest {
			continue
		}
		if !some {
			low, high, some = v, v, true
		}
		low, high = min(low, v), max(high, v)
	}
	return low, high, some
}

// widen moves the ends of the axis out to round numbers.
func (a *Axis) widen() {
	if a.Log {
		a.widenLog()
		return
	}
	if a.Low > 0 && a.Low <= a.High/2 {
		a.Low = 0
	}
	if a.High < 0 && a.High >= a.Low/2 {
		a.High = 0
	}
	if spread := a.High - a.Low; spread <= 1e-6*max(math.Abs(a.Low), math.Abs(a.High)) {
		off := max(math.Abs(a.Low)/10, 1/greatest)
		if a.Low == 0 {
			off = 1
		}
		a.Low, a.High = a.Low-off, a.High+off
	}
	s := stepFor(a.Low, a.High, 9)
	a.Low, a.High = s.times(int64(s.count(a.Low, math.Floor))), s.times(int64(s.count(a.High, math.Ceil)))
}

// widenLog moves the ends to 1, 2 or 5 times a power of ten.
func (a *Axis) widenLog() {
	if a.Low == a.High {
		a.Low, a.High = a.Low/2, a.High*2
	}
	low, high := step{1, int(math.Floor(math.Log10(a.Low))) - 1}, step{1, int(math.Floor(math.Log10(a.High))) - 1}
	for low.next().times(1) <= a.Low*(1+1e-9) {
		low = low.next()
	}
	for high.times(1) < a.High*(1-1e-9) {
		high = high.next()
	}
	a.Low, a.High = low.times(1), high.times(1)
}

// A scale places the figures of an axis on paper: its low end at from, its
// high end at to, mm.
type scale struct {
	axis     Axis
	from, to float64
}

// at returns where v is on paper: a figure that has no place there, as 0 on a
// logarithmic axis, is NaN.
func (s scale) at(v float64) float64 {
	low, high := s.axis.Low, s.axis.High
	if s.axis.Log {
		if v <= 0 {
			return math.NaN()
		}
		v, low, high = math.Log10(v), math.Log10(low), math.Log10(high)
	}
	return s.from + float64((v-low)/(high-low)*(s.to-s.from))
}

// holds reports whether v is on the axis. Its ends are.
func (s scale) holds(v float64) bool {
	slack := float64(1e-9 * (s.axis.High - s.axis.Low))
	if s.axis.Log {
		slack = float64(1e-9 * s.axis.Low)
	}
	return v >= s.axis.Low-slack && v <= s.axis.High+slack
}

// ticks returns the marked ticks of the axis, at most most.
func (a Axis) ticks(most int) []Tick {
	if a.Log {
		return LogTicks(a.Low, a.High, most)
	}
	return Ticks(a.Low, a.High, most)
}
