package quantity

import (
	"math/big"
	"strings"
)

// longest is the greatest length of a text, in bytes, that Parse looks at.
const longest = 120

// Parse reads a figure of dimension d as a person writes it.
//
//	100 kg          one figure, its spread untold
//	6 ft 4 1/2 in   feet and inches; fractions with ft and in only
//	-9 m/s          a sign (whether one makes sense is for the caller)
//	100 kg ± 5 kg   also +/-, also 5 %, of the figure before it, also a bare 0
//	6 ft ± 1 in     any unit of the dimension
//	86 kg .. 104 kg a range; also 86 .. 104 kg
//
// Numbers are digits 0 to 9 with at most one decimal point between digits.
// There are no exponents, no thousands separators, no bare numbers; units are
// spelled exactly as Units lists them. Spaces between the parts are free.
//
// Each figure is the decimal as written times the exact factor of its unit,
// rounded once to the nearest float64. A failed Parse returns the zero Band
// and an *Error. Parse panics if d is none of the constants.
func Parse(d Dimension, text string) (Band, error) {
	if !d.known() {
		panic("quantity: Parse of " + d.String())
	}
	b, fault := read(d, text)
	if fault != nil {
		return Band{}, explain(d, text, fault)
	}
	return b, nil
}

// read reads text, or says where it stopped.
func read(d Dimension, text string) (Band, *Error) {
	if len(text) > longest {
		return Band{}, &Error{Reason: "too long for a figure"}
	}
	p := parser{dimension: d, text: text}
	b, fault := p.band()
	b.Text = text
	return b, fault
}

// A parser goes once through a text.
type parser struct {
	dimension Dimension
	text      string
	at        int
}

// A figure is an amount of one unit; row is nil if no unit was written.
type figure struct {
	amount exact
	row    *row
	mixed  bool // feet and inches, the amount in feet
}

// si returns f in SI units.
func (f figure) si() exact { return f.amount.times(f.row.factor) }

// band reads the whole text.
func (p *parser) band() (Band, *Error) {
	first, fault := p.figure(false)
	if fault != nil {
		return Band{}, fault
	}
	switch {
	case p.take(".."):
		return p.rangeFrom(first)
	case p.take("±"), p.take("+/-"):
		return p.spreadAround(first)
	}
	if fault := p.end(); fault != nil {
		return Band{}, fault
	}
	if first.row == nil {
		return Band{}, p.bare()
	}
	si := first.si()
	b := newBand(si, si, si)
	b.Unit = first.row.unit
	return b, nil
}

// rangeFrom reads what follows "..".
func (p *parser) rangeFrom(first figure) (Band, *Error) {
	last, fault := p.figure(false)
	if fault != nil {
		return Band{}, fault
	}
	if fault := p.end(); fault != nil {
		return Band{}, fault
	}
	if first.row == nil && !last.mixed {
		first.row = last.row
	}
	if first.row == nil || last.row == nil {
		return Band{}, p.bare()
	}
	b := newBand(first.si(), exact{}, last.si())
	if b.Low > b.High {
		return Band{}, &Error{Reason: "the range runs backwards"}
	}
	b.Tolerance, b.Unit = Range, first.row.unit
	return b, nil
}

// spreadAround reads what follows "±".
func (p *parser) spreadAround(middle figure) (Band, *Error) {
	spread, fault := p.figure(true)
	if fault != nil {
		return Band{}, fault
	}
	if fault := p.end(); fault != nil {
		return Band{}, fault
	}
	if middle.row == nil || spread.row == nil && spread.amount.sign() != 0 {
		return Band{}, p.bare()
	}
	if spread.amount.sign() < 0 {
		return Band{}, &Error{Reason: "negative tolerance"}
	}
	low, high := middle.spread(spread)
	b := newBand(low, middle.si(), high)
	b.Tolerance, b.Unit = PlusMinus, middle.row.unit
	return b, nil
}

// spread returns the two ends of f by the tolerance t, in SI units. Where it
// can it adds in the unit as written, whose numbers are small.
func (f figure) spread(t figure) (low, high exact) {
	switch {
	case t.row == nil: // ± 0
		return f.si(), f.si()
	case t.row.unit.Dimension == Ratio && f.row.unit.Dimension != Ratio:
		t.amount = t.amount.times(exact{num: 1, den: 100}).times(f.amount)
		if t.amount.sign() < 0 {
			t.amount = t.amount.minus()
		}
	case t.row != f.row:
		si, by := f.si(), t.si()
		return si.plus(by.minus()), si.plus(by)
	}
	low, high = f.amount.plus(t.amount.minus()), f.amount.plus(t.amount)
	return low.times(f.row.factor), high.times(f.row.factor)
}

// figure reads a signed amount with its unit. In a tolerance the unit may be %.
func (p *parser) figure(tolerance bool) (figure, *Error) {
	negative := p.take("-")
	if !negative {
		p.take("+")
	}
	f, fault := p.amountOf(tolerance)
	if fault == nil && f.row != nil && f.row.unit.Symbol == "ft" {
		fault = p.inches(&f)
	}
	if negative {
		f.amount = f.amount.minus()
	}
	return f, fault
}

// amountOf reads an amount with its unit.
func (p *parser) amountOf(tolerance bool) (figure, *Error) {
	amount, fraction, fault := p.amount()
	if fault != nil {
		return figure{}, fault
	}
	r, fault := p.unit(tolerance)
	if fraction && fault == nil && r != nil && r.unit.Symbol != "in" && r.unit.Symbol != "ft" {
		fault = &Error{Reason: "a fraction is read with ft and in only"}
	}
	return figure{amount: amount, row: r}, fault
}

// inches reads the inches after the feet f, if there are any.
func (p *parser) inches(f *figure) *Error {
	p.space()
	if p.at == len(p.text) || !isDigit(p.text[p.at]) {
		return nil
	}
	in, fault := p.amountOf(false)
	if fault != nil {
		return fault
	}
	if in.row == nil || in.row.unit.Symbol != "in" || f.amount.den != 1 || in.amount.float() >= 12 {
		return &Error{Reason: "feet and inches"}
	}
	f.amount = f.amount.plus(in.amount.times(exact{num: 1, den: 12}))
	f.mixed = true
	return nil
}

// amount reads a decimal, a fraction, or a whole number and a fraction.
func (p *parser) amount() (amount exact, fraction bool, fault *Error) {
	p.space()
	amount, fault = p.decimal()
	if fault != nil || amount.den != 1 {
		return amount, false, fault
	}
	if p.take("/") {
		amount, fault = p.under(amount)
		return amount, true, fault
	}
	p.space()
	if p.at == len(p.text) || !isDigit(p.text[p.at]) {
		return amount, false, nil
	}
	top, fault := p.decimal()
	if fault == nil && (top.den != 1 || !p.take("/")) {
		fault = &Error{Reason: "two numbers in a row"}
	}
	if fault != nil {
		return exact{}, false, fault
	}
	part, fault := p.under(top)
	return amount.plus(part), true, fault
}

// under reads the denominator of a fraction.
func (p *parser) under(top exact) (exact, *Error) {
	bottom, fault := p.decimal()
	if fault != nil {
		return exact{}, fault
	}
	if bottom.den != 1 || top.num >= bottom.num || bottom.num > 128 {
		return exact{}, &Error{Reason: "not a fraction below one"}
	}
	return exact{num: top.num, den: bottom.num}, nil
}

// powers holds the powers of ten that fit.
var powers = [19]int64{1, 1e1, 1e2, 1e3, 1e4, 1e5, 1e6, 1e7, 1e8, 1e9, 1e10, 1e11, 1e12, 1e13, 1e14, 1e15, 1e16, 1e17, 1e18}

// decimal reads digits, and a decimal point between digits.
func (p *parser) decimal() (exact, *Error) {
	start, digits := p.at, int64(0)
	point, end := 0, p.at
	for end < len(p.text) {
		c := p.text[end]
		if isDigit(c) {
			digits = digits*10 + int64(c-'0')
		} else if c == '.' && point == 0 && end > start && end+1 < len(p.text) && isDigit(p.text[end+1]) {
			point = end + 1
		} else {
			break
		}
		end++
	}
	p.at = end
	if end == start {
		return exact{}, &Error{Reason: "no digit"}
	}
	if end-start > 18 {
		wide, _ := new(big.Rat).SetString(p.text[start:end])
		return exact{wide: wide}, nil
	}
	if point == 0 {
		return whole(digits), nil
	}
	return exact{num: digits, den: powers[end-point]}, nil
}

// unit reads a unit; it returns nil if none is written.
func (p *parser) unit(tolerance bool) (*row, *Error) {
	symbol := p.word()
	if symbol == "" {
		return nil, nil
	}
	if r := find(p.dimension, symbol); r != nil {
		return r, nil
	}
	if tolerance && symbol == "%" {
		return find(Ratio, "%"), nil
	}
	return nil, &Error{Reason: "unknown unit"}
}

// word reads the characters that can belong to a unit.
func (p *parser) word() string {
	p.space()
	start := p.at
	for p.at < len(p.text) {
		c := p.text[p.at]
		if c == ' ' || c == '.' || c == '+' || c == "±"[0] || isDigit(c) && p.at == start {
			break
		}
		p.at++
	}
	return p.text[start:p.at]
}

// end reports what is left over.
func (p *parser) end() *Error {
	p.space()
	if p.at < len(p.text) {
		return &Error{Reason: "more follows"}
	}
	return nil
}

// bare reports a number without a unit.
func (p *parser) bare() *Error { return &Error{Reason: "a bare number has no unit"} }

// take goes past spaces and mark, if mark follows.
func (p *parser) take(mark string) bool {
	p.space()
	if !strings.HasPrefix(p.text[p.at:], mark) {
		return false
	}
	p.at += len(mark)
	return true
}

// space goes past spaces.
func (p *parser) space() {
	for p.at < len(p.text) && p.text[p.at] == ' ' {
		p.at++
	}
}

// isDigit reports whether c is 0 to 9.
func isDigit(c byte) bool { return '0' <= c && c <= '9' }
