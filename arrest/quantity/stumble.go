package quantity

import "strings"

// This file says what the parser stumbled over, with the text put right where
// the meaning can be guessed. What a person did, where it is more than one
// wrong character, is recognised in mistake.go and number.go.

// replaced returns the text with text[from:to] replaced by with.
func (p *parser) replaced(from, to int, with string) string {
	return p.text[:from] + with + p.text[to:]
}

// noDigit is the fault of something else where a number should start.
func (p *parser) noDigit() *fault {
	switch {
	case p.at == len(p.text):
		return &fault{reason: "a figure is missing at the end"}
	case pointAt(p.text, p.at):
		return &fault{
			reason: "a decimal point needs a digit before it",
			better: []string{p.replaced(p.at, p.at, "0")},
		}
	}
	start := p.at
	word := p.word()
	if word == "" {
		word = p.text[start:]
	}
	return &fault{reason: "a figure starts with a digit, not with " + quoted(word)}
}

// leftover is the fault of text behind what is complete.
func (p *parser) leftover(what string) *fault {
	done, rest := strings.TrimRight(p.text[:p.at], " "), strings.TrimRight(p.text[p.at:], " ")
	switch {
	case p.digit():
		return &fault{reason: "two figures in a row; only feet and inches are read together"}
	case lastWord(done) == rest:
		return &fault{reason: "the unit is written twice", better: []string{done}}
	case rest[0] == '-':
		return &fault{reason: notDots("-"), better: []string{done + " .. " + rest[1:]}, span: true}
	}
	f := &fault{reason: quoted(rest) + " follows after " + what + ", where it should end"}
	if rest[0] == ',' {
		f.better = []string{done + rest[1:]}
	}
	return f
}

// lastWord returns the letters and other signs at the end of text, from the
// last digit or space on.
func lastWord(text string) string {
	return text[strings.LastIndexAny(text, " 0123456789")+1:]
}

// twoNumbers is the fault of two numbers in a row without a unit between them.
func (p *parser) twoNumbers(start, number, second int) *fault {
	return &fault{reason: "two numbers in a row, " + quoted(p.text[start:number]) + " and " + quoted(p.text[second:p.at])}
}

// bare is the fault of a number without a unit. A ratio may have been meant in
// % or as a plain number.
func (p *parser) bare(f *figure) *fault {
	bare := &fault{reason: "a bare number has no unit; " + p.dimension.written()}
	if p.dimension == Ratio && f.amount.sign() != 0 {
		bare.readings = true
		bare.better = []string{
			p.replaced(f.number, f.number, " %"),
			p.replaced(f.start, f.number, f.amount.times(whole(100)).String()+" %"),
		}
	}
	return bare
}

// bareEnd is the fault of a range whose ends do not both have a unit.
func (p *parser) bareEnd(first, last *figure) *fault {
	switch {
	case first.row == nil && last.row == nil:
		return &fault{reason: "a bare number has no unit; " + p.dimension.written(), span: true}
	case first.row == nil:
		return &fault{
			reason: "the lower end has no unit, and the upper end has two",
			better: []string{p.replaced(first.number, first.number, " "+last.row.unit.Symbol)},
		}
	}
	return &fault{
		reason: "the upper end has no unit",
		better: []string{p.replaced(last.number, last.number, " "+first.row.unit.Symbol)},
	}
}

// bareMiddle is the fault of a tolerance to a figure without a unit.
func (p *parser) bareMiddle(middle, by *figure) *fault {
	if by.row == nil || by.row == percent {
		return p.bare(middle)
	}
	return &fault{
		reason: "the figure before the tolerance has no unit",
		better: []string{p.replaced(middle.number, middle.number, " "+by.row.unit.Symbol)},
	}
}

// bareTolerance is the fault of a tolerance without a unit.
func (p *parser) bareTolerance(middle, by *figure) *fault {
	return &fault{
		reason:   "the tolerance has no unit",
		readings: true,
		better: []string{
			p.replaced(by.number, by.number, " "+middle.row.unit.Symbol),
			p.replaced(by.number, by.number, " %"),
		},
	}
}

// signedTolerance is the fault of a tolerance with a sign.
func (p *parser) signedTolerance(by *figure) *fault {
	return &fault{
		reason: "a tolerance has no sign of its own; it counts both ways",
		better: []string{p.replaced(by.start, by.start+1, "")},
	}
}

// toleranceOfRatio is the fault of a ratio with a tolerance in %.
func (p *parser) toleranceOfRatio(middle, by *figure) *fault {
	share := by.amount.times(percent.factor).times(middle.amount)
	f := &fault{reason: "a tolerance of a ratio can be meant in two ways", readings: true}
	for _, spread := range []exact{by.amount, share} {
		low, high := middle.amount.plus(spread.minus()), middle.amount.plus(spread)
		if middle.amount.sign() < 0 && spread == share {
			low, high = high, low
		}
		f.better = append(f.better, low.String()+" % .. "+high.String()+" %")
	}
	return f
}

// backwards is the fault of a range whose lower end is above its upper end.
func (p *parser) backwards(first, last *figure) *fault {
	low, high := p.text[first.start:first.stop], p.text[last.start:last.stop]
	if first.row == nil {
		low = p.text[first.start:first.number] + " " + last.row.unit.Symbol
	}
	return &fault{
		reason: "the range runs backwards: its lower end, " + low + ", is above its upper end, " + high,
		better: []string{high + " .. " + low},
		span:   true,
	}
}

// fractionOf is the fault of a fraction of another unit than ft or in.
func (p *parser) fractionOf(amount exact, start, number int) *fault {
	return &fault{
		reason: "fractions are read with ft and in only",
		better: []string{p.replaced(start, number, amount.String())},
	}
}

// badFraction is the fault of top/bottom, which began at start, not being a
// fraction below one.
func (p *parser) badFraction(top, bottom exact, start int) *fault {
	switch {
	case top.den != 1 || bottom.den != 1:
		return &fault{reason: "a fraction is a whole number over a whole number"}
	case bottom.num == 0:
		return &fault{reason: "a fraction cannot have 0 below the line"}
	case bottom.num > finest:
		return &fault{reason: "fractions are read down to 1/128; write a decimal"}
	}
	f := &fault{reason: "a fraction stays below one"}
	if before := strings.TrimRight(p.text[:start], " "); before == "" || !isDigit(before[len(before)-1]) {
		f.better = []string{p.replaced(start, p.at, mixedNumber(top.num, bottom.num))}
	}
	return f
}

// mixedNumber returns top/bottom as a whole number and a fraction.
func mixedNumber(top, bottom int64) string {
	text := whole(top / bottom).String()
	if rest := top % bottom; rest != 0 {
		text += " " + whole(rest).String() + "/" + whole(bottom).String()
	}
	return text
}

// badInches is the fault of what follows feet not being inches of a foot.
func (p *parser) badInches(feet, in *figure, start int) *fault {
	switch {
	case in.row == nil:
		return &fault{
			reason: "the number after the feet has no unit",
			better: []string{p.replaced(p.at, p.at, " in")},
		}
	case in.row.unit.Symbol != "in":
		return &fault{reason: "after feet only inches follow, not " + in.row.unit.Symbol}
	case feet.amount.den != 1:
		return &fault{reason: "feet that inches follow are a whole number"}
	}
	f := &fault{reason: "inches after feet stay below 12; " + quoted(p.text[start:p.at]) + " is a foot or more"}
	if in.amount.den == 1 {
		more := feet.amount.plus(whole(in.amount.num / 12))
		f.better = []string{p.replaced(feet.start, p.at, more.String()+" ft "+whole(in.amount.num%12).String()+" in")}
	}
	return f
}
