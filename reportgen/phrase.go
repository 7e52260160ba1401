package reportgen

import (
	"math"
	"strconv"
	"strings"

	"arrestcheck/arrest"
	"arrestcheck/arrest/quantity"
)

// A phrase is a sentence with places for arguments, by name:
//
//	{free fall}        the argument of that name
//	{low .. high}      what lies between two figures, or the one they both are
//
// args names the arguments in the order in which they come.
type phrase struct {
	args []string
	text string
}

// fill puts the arguments in. Figures get as many digits as it takes to tell
// different ones apart, typed being the unit of the row for figures of its
// dimension. It panics if the number of arguments is not the phrase's own or
// the text names one that is not there.
func (p phrase) fill(d display, typed quantity.Unit, args []arrest.Arg) string {
	return p.fillTo(d, typed, args, pageDigits)
}

// fillTo is fill with at least so many digits.
func (p phrase) fillTo(d display, typed quantity.Unit, args []arrest.Arg, least int) string {
	if len(args) != len(p.args) {
		panic("reportgen: " + strconv.Itoa(len(args)) + " arguments for: " + p.text)
	}
	digits := max(d.tellingDigits(typed, args), least)
	var b strings.Builder
	for rest := p.text; ; {
		before, after, found := strings.Cut(rest, "{")
		b.WriteString(before)
		if !found {
			return b.String()
		}
		name, after, _ := strings.Cut(after, "}")
		b.WriteString(d.place(p, name, typed, args, digits))
		rest = after
	}
}

// place returns what stands in the place called name.
func (d display) place(p phrase, name string, typed quantity.Unit, args []arrest.Arg, digits int) string {
	if low, high, found := strings.Cut(name, " .. "); found {
		a, b := args[p.index(low)], args[p.index(high)]
		switch {
		case a.Dimension != 0 && b == openEnd:
			return d.span(a.Dimension, rowUnit(typed, a.Dimension), a.SI, math.Inf(1), digits)
		case b.Dimension != 0 && a == openEnd:
			return d.say(openBelow, d.argument(high, b, typed, digits))
		case a.Dimension == 0 || b.Dimension == 0:
			return d.argument(low, a, typed, digits) + " to " + d.argument(high, b, typed, digits)
		}
		return d.spanRounded(a.Dimension, rowUnit(typed, a.Dimension), a.SI, b.SI, digits, a.Rounding, b.Rounding)
	}
	return d.argument(name, args[p.index(name)], typed, digits)
}

// openEnd is the argument that stands where nothing bounds a figure.
var openEnd = arrest.Text("open")

func (p phrase) index(name string) int {
	for i, arg := range p.args {
		if arg == name {
			return i
		}
	}
	panic("reportgen: no argument " + strconv.Quote(name) + " for: " + p.text)
}

// argument returns an argument in words: that of an id where the name says so.
func (d display) argument(name string, a arrest.Arg, typed quantity.Unit, digits int) string {
	if a.Dimension == 0 {
		if words, ok := idArguments[name][a.Text]; ok {
			return words
		}
		return flat(a.Text)
	}
	if math.IsInf(a.SI, 1) {
		return endlessFigure
	}
	return d.figureAs(a.Dimension, rowUnit(typed, a.Dimension), a.SI, digits, a.Rounding)
}

// flat returns a text of the user on one line: a line break in it must not make
// a line of its own in a table.
func flat(s string) string { return strings.ReplaceAll(s, "\n", " ") }

// rowUnit returns typed if it is of the dimension, else no unit.
func rowUnit(typed quantity.Unit, dim quantity.Dimension) quantity.Unit {
	if typed.Dimension == dim {
		return typed
	}
	return quantity.Unit{}
}

// tellingDigits returns the digits that keep different figures of one
// dimension from printing alike.
func (d display) tellingDigits(typed quantity.Unit, args []arrest.Arg) int {
	digits := pageDigits
	for i, a := range args {
		for _, b := range args[:i] {
			if a.Dimension == 0 || a.Dimension != b.Dimension || math.IsNaN(a.SI) || math.IsNaN(b.SI) || quantity.Snap(a.SI) == quantity.Snap(b.SI) {
				continue
			}
			u := d.pair(a.Dimension, rowUnit(typed, a.Dimension), a.SI)[0]
			for digits < mostDigits && quantity.Number(a.SI, u, digits, a.Rounding) == quantity.Number(b.SI, u, digits, b.Rounding) {
				digits++
			}
		}
	}
	return digits
}
