package quantity

import (
	"bytes"
	"math"
	"strconv"
)

// Rounding says which way a printed figure may err.
type Rounding uint8

const (
	Nearest Rounding = iota // two-sided values; a tie goes away from zero
	Down                    // towards minus infinity: floors, "not less than"
	Up                      // towards plus infinity: ceilings, "not more than"
)

// snapDigits is the number of significant digits that a figure keeps before
// anything else is done to it in print. Beyond them processors differ.
const snapDigits = 12

// Format returns an SI figure in unit u, "8.01 kN".
//
// The figure is snapped to 12 significant digits in u, then rounded in decimal
// to the given number of significant digits (below 1 counts as 1, above 12 as
// 12). Down never prints more than the snapped figure, Up never less. The
// notation is decimal without exponent or thousands separator; zeros that are
// significant stay ("8.00 kN"); zero is "0 kN", never "-0". The unit "1" of a
// ratio is left out.
//
// NaN is "not known", +Inf "no upper end", -Inf "no lower end", all without a
// unit. Format panics for a Unit that is not in the table.
func Format(si float64, u Unit, digits int, r Rounding) string {
	var room [64]byte
	text := appendNumber(room[:0], u.From(si), digits, r)
	if isFinite(si) && u.Symbol != "1" {
		text = append(text, ' ')
		text = append(text, u.Symbol...)
	}
	return string(text)
}

// Number returns what Format does without the unit, for columns whose head
// names it.
func Number(si float64, u Unit, digits int, r Rounding) string {
	var room [48]byte
	return string(appendNumber(room[:0], u.From(si), digits, r))
}

// Snap returns x rounded to 12 significant digits, the first step of every
// printed figure, so that the last bits of two processors print alike. The
// result is the float64 nearest to those digits; it is never -0. NaN and
// infinities stay what they are.
func Snap(x float64) float64 {
	if !isFinite(x) {
		return x
	}
	var room [decimalRoom]byte
	text := strconv.AppendFloat(room[:0], x, 'e', snapDigits-1, 64)
	snapped, _ := strconv.ParseFloat(string(text), 64)
	return snapped + 0
}

// isFinite reports whether x is neither NaN nor infinite.
func isFinite(x float64) bool { return !math.IsNaN(x) && !math.IsInf(x, 0) }

// appendNumber appends x, already in its unit, snapped and rounded.
func appendNumber(to []byte, x float64, digits int, r Rounding) []byte {
	switch {
	case math.IsNaN(x):
		return append(to, "not known"...)
	case math.IsInf(x, 1):
		return append(to, "no upper end"...)
	case math.IsInf(x, -1):
		return append(to, "no lower end"...)
	case x == 0:
		return append(to, '0')
	}
	var room [decimalRoom]byte
	d := decimalOf(room[:0], x, snapDigits-1)
	d.round(min(max(digits, 1), snapDigits), r)
	return d.append(to)
}

// A decimal is a number other than zero by its digits:
// 0.d1 d2 d3 ... x 10^point, d1 not zero.
type decimal struct {
	negative bool
	digits   []byte
	point    int
}

// decimalRoom is enough for the digits of any float64 with their exponent.
const decimalRoom = 32

// decimalOf returns x to the given number of digits after the first, correctly
// rounded; -1 takes the fewest digits that name x. The digits are in room.
func decimalOf(room []byte, x float64, after int) decimal {
	text := strconv.AppendFloat(room, math.Abs(x), 'e', after, 64)
	e := bytes.IndexByte(text, 'e')
	point := exponentIn(text[e+1:]) + 1
	if e > 1 { // "1.25e+01": close the gap of the decimal point
		copy(text[1:], text[2:e])
		e--
	}
	return decimal{negative: x < 0, digits: text[:e], point: point}
}

// exponentIn reads a sign and digits.
func exponentIn(text []byte) int {
	n := 0
	for _, c := range text[1:] {
		n = n*10 + int(c-'0')
	}
	if text[0] == '-' {
		return -n
	}
	return n
}

// round shortens d to its first keep digits.
func (d *decimal) round(keep int, r Rounding) {
	if keep >= len(d.digits) {
		return
	}
	rest := d.digits[keep:]
	d.digits = d.digits[:keep]
	if d.awayFromZero(rest, r) {
		d.increment()
	}
}

// awayFromZero reports whether cutting rest off d must raise its magnitude.
func (d *decimal) awayFromZero(rest []byte, r Rounding) bool {
	if r == Nearest {
		return rest[0] >= '5'
	}
	if d.negative != (r == Down) {
		return false
	}
	for _, digit := range rest {
		if digit != '0' {
			return true
		}
	}
	return false
}

// increment adds one to the last digit of d, keeping the number of digits.
func (d *decimal) increment() {
	for i := len(d.digits) - 1; i >= 0; i-- {
		if d.digits[i] < '9' {
			d.digits[i]++
			return
		}
		d.digits[i] = '0'
	}
	d.digits[0] = '1'
	d.point++
}

// append appends d in decimal notation.
func (d *decimal) append(to []byte) []byte {
	if d.negative {
		to = append(to, '-')
	}
	if d.point <= 0 {
		to = append(to, "0."...)
		to = appendZeros(to, -d.point)
		return append(to, d.digits...)
	}
	if d.point >= len(d.digits) {
		to = append(to, d.digits...)
		return appendZeros(to, d.point-len(d.digits))
	}
	to = append(to, d.digits[:d.point]...)
	to = append(to, '.')
	return append(to, d.digits[d.point:]...)
}

// appendZeros appends n zeros.
func appendZeros(to []byte, n int) []byte {
	for range n {
		to = append(to, '0')
	}
	return to
}
