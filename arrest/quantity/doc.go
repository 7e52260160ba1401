// Package quantity reads, adds and prints figures with units: "92 kg ± 1 kg"
// becomes three float64 in kg, and a float64 in N becomes "8.01 kN".
//
// The usual calls:
//
//	mass, err := quantity.Parse(quantity.Mass, "203 lb ± 2 lb")
//	total := quantity.Sum(mass, tools)
//	text := quantity.Format(total.High, total.Unit, 3, quantity.Up)
//
// Units exist at the edges only. Everything between reading and printing is a
// plain float64 in coherent SI units, rounded once from the exact decimal times
// the exact factor, so that equal figures in two spellings compare as equal:
// "310 lb", and "300 lb" plus "10 lb", are one float64.
//
// What was written wrongly is an *Error with the reason and the right form;
// calls that only a programmer can get wrong (a Dimension or a Unit that does
// not exist) panic.
//
// The package does not convert between kinds (no weight from a mass), keeps no
// significant digits of what was written, and does not ask whether a figure
// makes sense; that is for the packages that know what it stands for.
package quantity
