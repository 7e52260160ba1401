package quantity

import (
	"math/big"
	"strings"
)

// A parser goes once through a text, from left to right.
type parser struct {
	dimension Dimension
	text      string
	at        int // the next byte
}

// space goes past spaces.
func (p *parser) space() {
	for p.at < len(p.text) && p.text[p.at] == ' ' {
		p.at++
	}
}

// take goes past spaces and mark, if mark follows.
func (p *parser) take(mark string) bool {
	p.space()
	if !strings.HasPrefix(p.text[p.at:], mark) {
		return false
	}
	p.at += len(mark)
	return true
}

// digit reports whether a digit follows.
func (p *parser) digit() bool { return p.at < len(p.text) && isDigit(p.text[p.at]) }

// end reports what is left over behind what.
func (p *parser) end(what string) *fault {
	p.space()
	if p.at == len(p.text) {
		return nil
	}
	return p.leftover(what)
}

// decimal reads digits, with a decimal point between digits if there is one.
func (p *parser) decimal() (exact, *fault) {
	start, digits, behind := p.at, int64(0), 0
	for ; p.at < len(p.text); p.at++ {
		c := p.text[p.at]
		switch {
		case isDigit(c):
			digits = digits*10 + int64(c-'0') // overflows where it is not used
			continue
		case behind == 0 && pointAt(p.text, p.at) && p.at > start:
			behind = p.at + 1
			continue
		}
		break
	}
	switch length := p.at - start; {
	case length == 0:
		return exact{}, p.noDigit()
	case length >= len(powers):
		wide, _ := new(big.Rat).SetString(p.text[start:p.at])
		return exact{wide: wide}, nil
	case behind == 0:
		return whole(digits), nil
	}
	return exact{num: digits, den: powers[p.at-behind]}, nil
}

// powers holds the powers of ten that fit.
var powers = [19]int64{1, 1e1, 1e2, 1e3, 1e4, 1e5, 1e6, 1e7, 1e8, 1e9,
	1e10, 1e11, 1e12, 1e13, 1e14, 1e15, 1e16, 1e17, 1e18}

// pointAt reports whether text holds a decimal point at i: a full stop before
// a digit.
func pointAt(text string, i int) bool {
	return text[i] == '.' && i+1 < len(text) && isDigit(text[i+1])
}

// word reads what can be the symbol of a unit, rightly or wrongly spelled:
// everything up to a space, a comma or semicolon, "+" or "±", or a full stop
// that no letter follows; nothing if a digit or "-" comes first.
func (p *parser) word() string {
	p.space()
	start := p.at
	for p.at < len(p.text) {
		c := p.text[p.at]
		if strings.IndexByte(" ,;+", c) >= 0 || c == "±"[0] || (isDigit(c) || c == '-') && p.at == start {
			break
		}
		if c == '.' && (p.at+1 == len(p.text) || !isLetter(p.text[p.at+1])) {
			break
		}
		p.at++
	}
	return p.text[start:p.at]
}

// isDigit reports whether c is 0 to 9.
func isDigit(c byte) bool { return '0' <= c && c <= '9' }

// isLetter reports whether c is a to z, in capitals or not.
func isLetter(c byte) bool { return 'a' <= c|0x20 && c|0x20 <= 'z' }
