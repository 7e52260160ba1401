package figure

import "math"

// A Pen says how a line is drawn. The zero Pen is thin and solid.
type Pen struct {
	Weight Weight
	Dash   Dash
}

// The pens of all figures, so that one kind of line looks the same in each.
var (
	CurvePen = Pen{Heavy, Solid}       // a curve
	LimitPen = Pen{Medium, LongDashes} // a limit
	MeanPen  = Pen{Medium, ChainLine}  // a mean, and other figures worked out
	HelpPen  = Pen{Thin, Dots}         // a line that leads the eye
)

// Weight is the width of a line.
type Weight uint8

const (
	Thin   Weight = iota // help lines, ticks, dimensions; a text may stand over them
	Medium               // axes, limits, edges of things
	Heavy                // what the figure is about
)

// width returns the width of a line, mm.
func (w Weight) width() float64 { return [...]float64{0.18, 0.3, 0.55}[w] }

// Dash is a pattern of a line. Curves and lines that must be told apart without
// colour differ in it.
type Dash uint8

const (
	Solid Dash = iota
	Dashes
	Dots
	LongDashes
	ChainLine // long dash, dot
)

// pattern returns the lengths of strokes and gaps in turn, mm; nil is solid.
func (d Dash) pattern() []float64 { return dashPatterns[d] }

var dashPatterns = [...][]float64{
	Solid:      nil,
	Dashes:     {2.2, 1.4},
	Dots:       {0.4, 1.2},
	LongDashes: {5.5, 1.6},
	ChainLine:  {4.5, 1.3, 0.5, 1.3},
}

// drawn reports whether the pattern has ink at distance along the line, both
// enlarged by the factor large.
func (d Dash) drawn(distance, large float64) bool {
	pattern := d.pattern()
	if pattern == nil {
		return true
	}
	var whole float64
	for _, length := range pattern {
		whole += length
	}
	rest := math.Mod(distance/large, whole)
	for i, length := range pattern {
		if rest -= length; rest < 0 {
			return i%2 == 0
		}
	}
	return false
}
