package quantity

import "strconv"

// A Dimension says what kind of thing a figure measures. The zero Dimension
// belongs to no figure.
type Dimension uint8

// The dimensions that a job or a limit can name.
const (
	Mass Dimension = iota + 1
	Length
	Time
	Force
	Speed
	Acceleration
	Angle
	Energy
	Impulse // also momentum
	Stiffness
	ForceRate // onset rate, force per time
	Ratio
)

// dimensions holds what is said about each Dimension: its name, a figure and a
// range written right, and the symbol of its SI unit.
var dimensions = [Ratio + 1]struct{ name, example, span, si string }{
	Mass:         {"mass", "100 kg", "86 kg .. 104 kg", "kg"},
	Length:       {"length", "1.8 m", "1.6 m .. 1.8 m", "m"},
	Time:         {"time", "0.35 s", "0.30 s .. 0.38 s", "s"},
	Force:        {"force", "6 kN", "4 kN .. 6 kN", "N"},
	Speed:        {"speed", "5 m/s", "5 m/s .. 6 m/s", "m/s"},
	Acceleration: {"acceleration", "9.8 m/s2", "9.78 m/s2 .. 9.83 m/s2", "m/s2"},
	Angle:        {"angle", "30 deg", "20 deg .. 30 deg", "rad"},
	Energy:       {"energy", "1.5 kJ", "1.2 kJ .. 1.5 kJ", "J"},
	Impulse:      {"impulse", "500 N*s", "480 N*s .. 520 N*s", "N*s"},
	Stiffness:    {"stiffness", "20 kN/m", "18 kN/m .. 22 kN/m", "N/m"},
	ForceRate:    {"force rate", "100 kN/s", "80 kN/s .. 120 kN/s", "N/s"},
	Ratio:        {"ratio", "25 %", "20 % .. 25 %", "1"},
}

// known reports whether d is one of the dimensions above.
func (d Dimension) known() bool { return d >= Mass && d <= Ratio }

// String returns the name of d in plain words, such as "mass" or "force rate".
func (d Dimension) String() string {
	if !d.known() {
		return "Dimension(" + strconv.Itoa(int(d)) + ")"
	}
	return dimensions[d].name
}

// Example returns a figure of dimension d as Parse reads it, such as "100 kg".
// It is "" for a Dimension that is none of the constants.
func (d Dimension) Example() string {
	if !d.known() {
		return ""
	}
	return dimensions[d].example
}

// SI returns the coherent SI unit of d, the one in which a Band holds its
// figures: kg, m, s, N, m/s, m/s2, rad, J, N*s, N/m, N/s.
//
// The unit of a Ratio has the symbol "1". It appears in data only: Format
// leaves it out ("1.05"), and Parse reads a ratio in % alone. SI panics on a
// Dimension that is none of the constants.
func (d Dimension) SI() Unit {
	if !d.known() {
		panic("quantity: SI of " + d.String())
	}
	return find(d, dimensions[d].si).unit
}

// indefinite returns the name of d with its article, "a mass".
func (d Dimension) indefinite() string {
	switch name := d.String(); name[0] {
	case 'a', 'e', 'i':
		return "an " + name
	default:
		return "a " + name
	}
}

// written says how a figure of d is written, "a mass is written in kg, g, t or
// lb".
func (d Dimension) written() string {
	text := d.indefinite() + " is written in "
	for i := range table[d] {
		r := &table[d][i]
		switch {
		case !r.typed():
			continue
		case i > 0 && i == len(table[d])-1:
			text += " or "
		case i > 0:
			text += ", "
		}
		text += r.unit.Symbol
	}
	return text
}
