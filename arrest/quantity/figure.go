package quantity

// A figure is one amount of one unit as written, "6 kN"; feet and inches
// together are an amount of feet.
type figure struct {
	amount exact
	row    *row // nil if no unit is written
	signed bool
	mixed  bool // feet and inches

	start, number, stop int // text[start:number] is its number, [start:stop] all of it
}

// si returns f in SI units.
func (f *figure) si() exact { return f.amount.times(f.row.factor) }

// figure reads a figure. In a tolerance its unit may be %.
func (p *parser) figure(tolerance bool) (figure, *fault) {
	p.space()
	start := p.at
	negative := p.take("-")
	signed := negative || p.take("+")
	f, fault := p.unsigned(tolerance)
	if fault == nil && f.row != nil && f.row.unit.Symbol == "ft" {
		fault = p.inches(&f)
	}
	if fault != nil {
		return figure{}, fault
	}
	f.start, f.stop, f.signed = start, p.at, signed
	if negative {
		f.amount = f.amount.minus()
	}
	return f, nil
}

// unsigned reads an amount and its unit.
func (p *parser) unsigned(tolerance bool) (figure, *fault) {
	p.space()
	start := p.at
	amount, fraction, fault := p.amount()
	if fault != nil {
		return figure{}, fault
	}
	number := p.at
	r, fault := p.unit(amount, start, tolerance)
	if fault != nil {
		return figure{}, fault
	}
	if fraction && r != nil && r.unit.Symbol != "in" && r.unit.Symbol != "ft" {
		return figure{}, p.fractionOf(amount, start, number)
	}
	return figure{amount: amount, row: r, start: start, number: number}, nil
}

// unit reads the unit of the amount that began at start; it returns nil if
// none is written.
func (p *parser) unit(amount exact, start int, tolerance bool) (*row, *fault) {
	before := p.at
	symbol := p.word()
	if symbol == "" {
		p.at = before
		return nil, nil
	}
	if r := find(p.dimension, symbol); r != nil && r.typed() {
		return r, nil
	}
	if tolerance && symbol == "%" {
		return percent, nil
	}
	return nil, p.badUnit(symbol, amount, start)
}

// percent is the row of the unit in which a tolerance may be written for a
// figure of any dimension.
var percent = find(Ratio, "%")

// amount reads a decimal, a fraction, or a whole number and a fraction.
func (p *parser) amount() (amount exact, fraction bool, fault *fault) {
	start := p.at
	amount, fault = p.decimal()
	if fault != nil {
		return exact{}, false, fault
	}
	if p.stroke() {
		amount, fault = p.fraction(amount, start)
		return amount, true, fault
	}
	if amount.den != 1 {
		return amount, false, nil
	}
	number := p.at
	if p.space(); !p.digit() {
		p.at = number
		return amount, false, nil
	}
	second := p.at
	top, _ := p.decimal() // there is a digit
	if !p.stroke() {
		return exact{}, false, p.twoNumbers(start, number, second)
	}
	part, fault := p.fraction(top, second)
	if fault != nil {
		return exact{}, false, fault
	}
	return amount.plus(part), true, nil
}

// stroke reports whether the stroke of a fraction follows.
func (p *parser) stroke() bool { return p.at < len(p.text) && p.text[p.at] == '/' }

// finest is the greatest denominator of a fraction. Tapes are divided to 1/64;
// more than twice that is a slip of the finger.
const finest = 128

// fraction reads the stroke and the denominator under top, which began at
// start.
func (p *parser) fraction(top exact, start int) (exact, *fault) {
	p.at++
	bottom, fault := p.decimal()
	if fault != nil {
		return exact{}, fault
	}
	if top.den != 1 || bottom.den != 1 || bottom.num > finest || top.num >= bottom.num {
		return exact{}, p.badFraction(top, bottom, start)
	}
	return exact{num: top.num, den: bottom.num}, nil
}

// inches reads the inches behind the feet f, if there are any, and adds them.
func (p *parser) inches(f *figure) *fault {
	before := p.at
	if p.space(); !p.digit() {
		p.at = before
		return nil
	}
	start := p.at
	in, fault := p.unsigned(false)
	if fault != nil {
		return fault
	}
	if in.row == nil || in.row.unit.Symbol != "in" || f.amount.den != 1 || in.amount.float() >= 12 {
		return p.badInches(f, &in, start)
	}
	f.amount = f.amount.plus(in.amount.times(exact{num: 1, den: 12}))
	f.mixed = true
	return nil
}
