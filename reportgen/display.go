package reportgen

import (
	"math"
	"strconv"
	"strings"

	"arrestcheck/arrest"
	"arrestcheck/arrest/quantity"
)

// Significant digits: on page 1, in the working behind it, and at most.
const (
	pageDigits    = 3
	workingDigits = 5
	mostDigits    = 12
)

// shownIn holds the units that figures are shown in where nothing else says
// so, a smaller one for figures below a whole one of the first.
var shownIn = map[quantity.Dimension]struct{ metric, small, customary string }{
	quantity.Mass:         {"kg", "kg", "lb"},
	quantity.Length:       {"m", "m", "ft"},
	quantity.Time:         {"s", "s", "s"},
	quantity.Force:        {"kN", "N", "lbf"},
	quantity.Speed:        {"m/s", "m/s", "ft/s"},
	quantity.Acceleration: {"m/s2", "m/s2", "ft/s2"},
	quantity.Angle:        {"deg", "deg", "deg"},
	quantity.Energy:       {"kJ", "J", "ft*lbf"},
	quantity.Impulse:      {"N*s", "N*s", "lbf*s"},
	quantity.Stiffness:    {"kN/m", "N/m", "lbf/ft"},
	quantity.ForceRate:    {"kN/s", "N/s", "lbf/s"},
	quantity.Ratio:        {"1", "1", "1"},
}

// display is how figures are shown on one sheet.
type display struct {
	units  UnitChoice
	system quantity.System // shown first where a figure has no typed unit of its own
}

// newDisplay puts the system first in which most inputs were typed.
func newDisplay(units UnitChoice, inputs []arrest.Input) display {
	customary := 0
	for i := range inputs {
		switch inputs[i].Band.Unit.System {
		case quantity.Customary:
			customary++
		case quantity.Metric:
			customary--
		}
	}
	d := display{units, quantity.Metric}
	if customary > 0 {
		d.system = quantity.Customary
	}
	return d
}

// unit returns the unit of a system for figures of about the size si.
func unit(dim quantity.Dimension, system quantity.System, si float64) quantity.Unit {
	shown, ok := shownIn[dim]
	if !ok {
		panic("reportgen: no unit to show a " + dim.String() + " in")
	}
	symbol := shown.metric
	if system == quantity.Customary {
		symbol = shown.customary
	}
	u := mustUnit(symbol)
	if symbol == shown.metric && math.Abs(u.From(si)) < 1 {
		u = mustUnit(shown.small)
	}
	return u
}

func mustUnit(symbol string) quantity.Unit {
	u, ok := quantity.LookUp(symbol)
	if !ok {
		panic("reportgen: no unit " + strconv.Quote(symbol))
	}
	return u
}

// pair returns the units a figure is shown in: the one it was typed in first,
// if that is of the chosen system, then that of the other system. size is an
// SI figure of the order shown.
func (d display) pair(dim quantity.Dimension, typed quantity.Unit, size float64) []quantity.Unit {
	metric := unit(dim, quantity.Metric, size)
	customary := unit(dim, quantity.Customary, size)
	first := d.system
	switch typed.System {
	case quantity.Metric:
		metric, first = typed, quantity.Metric
	case quantity.Customary:
		customary, first = typed, quantity.Customary
	default:
		if typed.Symbol != "" {
			return []quantity.Unit{typed}
		}
	}
	switch {
	case metric == customary, d.units == SIUnits:
		return []quantity.Unit{metric}
	case d.units == USUnits:
		return []quantity.Unit{customary}
	case first == quantity.Customary:
		return []quantity.Unit{customary, metric}
	}
	return []quantity.Unit{metric, customary}
}

// figure returns an SI figure, "3.42 kN (768 lbf)".
func (d display) figure(dim quantity.Dimension, si float64, digits int, r quantity.Rounding) string {
	return d.figureAs(dim, quantity.Unit{}, si, digits, r)
}

func (d display) figureAs(dim quantity.Dimension, typed quantity.Unit, si float64, digits int, r quantity.Rounding) string {
	return join(d.pair(dim, typed, si), si, func(u quantity.Unit) string {
		return format(si, u, digits, r)
	})
}

// format returns a figure whose unit stays on the line of its number.
func format(si float64, u quantity.Unit, digits int, r quantity.Rounding) string {
	return strings.ReplaceAll(quantity.Format(si, u, digits, r), " ", noBreak)
}

// span returns what lies between two SI figures, "3.42 to 3.61 kN (768 to 811
// lbf)"; one figure where both print alike; what is known where the upper end
// is open.
func (d display) span(dim quantity.Dimension, typed quantity.Unit, low, high float64, digits int) string {
	return d.spanRounded(dim, typed, low, high, digits, quantity.Nearest, quantity.Nearest)
}

// spanRounded is span for ends that are rounded each their own way: a floor
// down, a ceiling up.
func (d display) spanRounded(dim quantity.Dimension, typed quantity.Unit, low, high float64, digits int, least, greatest quantity.Rounding) string {
	switch {
	case math.IsInf(low, 1):
		return noUpperEnd
	case math.IsInf(high, 1):
		return d.say(openAbove, d.figureAs(dim, typed, low, digits, quantity.Down))
	}
	return join(d.pair(dim, typed, high), low+high, func(u quantity.Unit) string {
		last := format(high, u, digits, greatest)
		if format(low, u, digits, least) == last {
			return last
		}
		return between(low, u, digits, least, last)
	})
}

// between returns what lies between a figure and a last one, all on one line.
func between(low float64, u quantity.Unit, digits int, r quantity.Rounding, last string) string {
	return quantity.Number(low, u, digits, r) + noBreak + "to" + noBreak + last
}

// join puts the figure of a first unit and, in brackets, of a second one
// together. A figure that is no number has no units and stands once.
func join(units []quantity.Unit, si float64, text func(quantity.Unit) string) string {
	s := text(units[0])
	if len(units) > 1 && !math.IsNaN(si) && !math.IsInf(si, 0) && si != 0 {
		s += " (" + text(units[1]) + ")"
	}
	return s
}

// digitsBeside returns how many digits it takes, both in u, to see on which
// side of a limit a demand lies, and at least so many. A demand of exactly
// the limit reads as the limit.
func digitsBeside(demand, limit float64, u quantity.Unit, r quantity.Rounding, least int) int {
	want := side(quantity.Snap(u.From(demand)), quantity.Snap(u.From(limit)))
	for digits := least; digits < mostDigits; digits++ {
		d, l := quantity.Number(demand, u, digits, r), quantity.Number(limit, u, digits, quantity.Nearest)
		if side(number(d), number(l)) == want {
			return digits
		}
	}
	return mostDigits
}

func side(a, b float64) int {
	switch {
	case a < b:
		return -1
	case a > b:
		return 1
	}
	return 0
}

func number(s string) float64 {
	x, err := strconv.ParseFloat(s, 64)
	if err != nil {
		return math.NaN()
	}
	return x
}
