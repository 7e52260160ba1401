package quantity

import "math/big"

// Of returns si, a figure in SI units of dimension d, as a Band without
// spread: a number that the program worked out, not one that a person wrote.
// Its Text is the shortest decimal that names si, with the SI unit; a ratio is
// written in %, its one unit that can be typed. Parse reads that Text back to
// the same figures, and Sum adds it as that decimal.
//
// NaN and infinities are kept, with the Text that Format gives them. Of panics
// if d is none of the constants.
func Of(d Dimension, si float64) Band {
	unit, shift := d.SI(), 0
	if d == Ratio {
		unit, shift = find(Ratio, "%").unit, 2
	}
	b := Band{Low: si, Value: si, High: si, Unit: unit}
	if !isFinite(si) {
		b.Text = Number(si, unit, 1, Nearest)
		return b
	}
	b.Text, b.low = shortest(si, shift), shortestExact(si)
	b.Text += " " + unit.Symbol
	b.value, b.high = b.low, b.low
	return b
}

// shortest returns the shortest decimal that names x, times 10^shift.
func shortest(x float64, shift int) string {
	if x == 0 {
		return "0"
	}
	var room [decimalRoom]byte
	d := decimalOf(room[:0], x, -1)
	d.point += shift
	return string(d.append(nil))
}

// shortestExact returns the number that shortest(x, 0) writes.
func shortestExact(x float64) exact {
	if x == 0 {
		return whole(0)
	}
	var room [decimalRoom]byte
	d := decimalOf(room[:0], x, -1)
	places := len(d.digits) - d.point
	if places < 0 || places >= len(powers) {
		r, _ := new(big.Rat).SetString(shortest(x, 0))
		return exact{wide: r}
	}
	num := int64(0) // the fewest digits that name a float64 are at most 17
	for _, digit := range d.digits {
		num = 10*num + int64(digit-'0')
	}
	if d.negative {
		num = -num
	}
	return exact{num: num, den: powers[places]}
}
