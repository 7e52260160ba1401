package quantity

// longest is the greatest length of a text, in bytes, that Parse looks at.
const longest = 120

// Parse reads a figure of dimension d as a person writes it.
//
//	100 kg            one figure, its spread untold
//	6 ft 4 1/2 in     feet and inches; fractions with ft and in only
//	-9 m/s            a sign; whether it makes sense is for the caller to say
//	100 kg ± 5 kg     also +/-, and any unit of the dimension: 6 ft ± 1 in
//	100 kg ± 5 %      of the figure before it, without its sign
//	100 kg ± 0        the one tolerance that needs no unit
//	86 kg .. 104 kg   a range, lower end first
//	86 .. 104 kg      the unit of the upper end counts for both
//
// Numbers are digits 0 to 9 with at most one decimal point, between digits.
// There are no exponents, no thousands separators and no bare numbers; units
// are spelled exactly as Units lists them. Spaces between the parts are free
// and may be missing. A tolerance in % of a ratio is refused, since nobody can
// tell 25 % ± 5 % from 25 ± 1.25 %.
//
// Each of Low, Value and High is the exact decimal as written times the exact
// factor of its unit, with the tolerance added exactly, rounded once to the
// nearest float64. Text is kept as written. What fits into the 120 bytes that
// Parse reads is far from overflow and underflow: Low, Value and High are
// finite, and 0 only where the exact figure is.
//
// If the text cannot be read, Parse returns the zero Band and an *Error.
// Parse panics if d is none of the constants.
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

// read reads text, or says what it stumbled over first.
func read(d Dimension, text string) (Band, *fault) {
	if len(text) > longest {
		return Band{}, tooLong(text)
	}
	p := parser{dimension: d, text: text}
	first, fault := p.figure(false)
	if fault != nil {
		return Band{}, fault
	}
	switch {
	case p.take(".."):
		return p.upTo(&first)
	case p.take("±") || p.take("+/-"):
		return p.within(&first)
	}
	if fault := p.end("the figure"); fault != nil {
		return Band{}, fault
	}
	if first.row == nil {
		return Band{}, p.bare(&first)
	}
	return p.band(Untold, first.row, first.si()), nil
}

// upTo reads the upper end of a range.
func (p *parser) upTo(first *figure) (Band, *fault) {
	last, fault := p.figure(false)
	if fault != nil {
		return Band{}, fault
	}
	if fault := p.end("the range"); fault != nil {
		return Band{}, fault
	}
	if last.row == nil || first.row == nil && last.mixed {
		return Band{}, p.bareEnd(first, &last)
	}
	lower := *first
	if lower.row == nil {
		lower.row = last.row
	}
	b := p.band(Range, lower.row, lower.si(), exact{}, last.si())
	if b.Low > b.High {
		return Band{}, p.backwards(first, &last)
	}
	return b, nil
}

// within reads the tolerance of middle.
func (p *parser) within(middle *figure) (Band, *fault) {
	by, fault := p.figure(true)
	if fault != nil {
		return Band{}, fault
	}
	if fault := p.end("the tolerance"); fault != nil {
		return Band{}, fault
	}
	none := by.amount.sign() == 0
	switch {
	case middle.row == nil:
		return Band{}, p.bareMiddle(middle, &by)
	case by.signed:
		return Band{}, p.signedTolerance(&by)
	case by.row == nil && !none:
		return Band{}, p.bareTolerance(middle, &by)
	case p.dimension == Ratio && !none:
		return Band{}, p.toleranceOfRatio(middle, &by)
	}
	low, high := middle.spread(&by)
	return p.band(PlusMinus, middle.row, low, middle.si(), high), nil
}

// band makes the Band of one figure, or of low, value and high, in SI units.
func (p *parser) band(t Tolerance, r *row, figures ...exact) Band {
	b := Band{Tolerance: t, Unit: r.unit, Text: p.text}
	b.low, b.value, b.high = figures[0], figures[0], figures[0]
	b.Low = b.low.rounded()
	b.Value, b.High = b.Low, b.Low
	if len(figures) == 3 {
		b.value, b.high = figures[1], figures[2]
		b.Value, b.High = b.value.rounded(), b.high.rounded()
	}
	return b
}

// spread returns f less and more the tolerance by, in SI units. Where both are
// in one unit it adds before it converts, since the numbers are smaller then.
func (f *figure) spread(by *figure) (low, high exact) {
	amount := by.amount
	switch by.row {
	case nil: // ± 0
		return f.si(), f.si()
	case f.row:
	case percent:
		amount = amount.times(percent.factor).times(f.amount)
		if amount.sign() < 0 {
			amount = amount.minus()
		}
	default:
		si, amount := f.si(), by.si()
		return si.plus(amount.minus()), si.plus(amount)
	}
	low, high = f.amount.plus(amount.minus()), f.amount.plus(amount)
	return low.times(f.row.factor), high.times(f.row.factor)
}
