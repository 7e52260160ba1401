package archive

import (
	"crypto/sha256"
	"encoding/hex"
	"math"
	"strconv"
)

// CanonicalFormat is the value of the key format of the canonical form.
const CanonicalFormat = "arrestcheck results 1"

// Canonical appends the results in the form their digest is made of: JSON as
// in RFC 8785 (keys sorted, no blanks, numbers as ECMAScript writes them), of
// the inputs, estimates, findings, counts and what nobody entered. It holds no
// sentence, no name of a file and no version, so that it changes only with a
// figure or an outcome; and as the figures have 12 significant digits, the last
// bits of two processors or compilers do not show.
func (r *Results) Canonical(to []byte) []byte {
	to = append(to, `{"counts":{"exceeded":`...)
	to = strconv.AppendInt(to, int64(r.Counts.Exceeded), 10)
	to = strconv.AppendInt(append(to, `,"not_compared":`...), int64(r.Counts.NotCompared), 10)
	to = strconv.AppendInt(append(to, `,"undecided":`...), int64(r.Counts.Undecided), 10)
	to = strconv.AppendInt(append(to, `,"within":`...), int64(r.Counts.Within), 10)
	to = append(to, `},"estimates":[`...)
	for i := range r.Estimates {
		to = r.Estimates[i].canonical(comma(to, i))
	}
	to = append(to, `],"findings":[`...)
	for i := range r.Findings {
		to = r.Findings[i].canonical(comma(to, i))
	}
	to = append(to, `],"format":"`+CanonicalFormat+`","inputs":[`...)
	for i := range r.Inputs {
		to = r.Inputs[i].canonical(comma(to, i))
	}
	to = append(to, `],"not_entered":[`...)
	for i, subject := range r.NotEntered {
		to = quote(comma(to, i), subject)
	}
	to = append(to, `],"persons":`...)
	return append(strconv.AppendInt(to, int64(r.Job.Persons), 10), '}')
}

// Digest returns the SHA-256 of the canonical form in hexadecimal digits.
func (r *Results) Digest() string {
	return digest(r.Canonical(make([]byte, 0, 8<<10)))
}

func digest(data []byte) string {
	sum := sha256.Sum256(data)
	return hex.EncodeToString(sum[:])
}

func (e *Estimate) canonical(to []byte) []byte {
	to = float(append(to, `{"allowance":`...), e.Allowance)
	to = quote(append(to, `,"bound":`...), string(e.Bound))
	to = float(append(to, `,"compared_high":`...), e.ComparedHigh)
	to = float(append(to, `,"compared_low":`...), e.ComparedLow)
	to = quote(append(to, `,"evidence":`...), string(e.Evidence))
	to = quote(append(to, `,"from":`...), e.From)
	to = float(append(to, `,"high":`...), e.High)
	to = float(append(to, `,"low":`...), e.Low)
	to = quote(append(to, `,"method":`...), e.Method)
	to = strconv.AppendBool(append(to, `,"outside":`...), e.Outside)
	to = quote(append(to, `,"quantity":`...), string(e.Quantity))
	to = float(append(to, `,"reach":`...), e.Reach)
	to = quote(append(to, `,"unit":`...), e.Unit)
	to = float(append(to, `,"value":`...), e.Value)
	return append(to, '}')
}

func (f *Finding) canonical(to []byte) []byte {
	to = quote(append(to, `{"bound":`...), string(f.Bound))
	to = float(append(to, `,"demand":`...), f.Demand)
	to = quote(append(to, `,"group":`...), f.Group)
	to = quote(append(to, `,"limit":`...), f.Limit)
	to = float(append(to, `,"limit_value":`...), f.LimitSI)
	to = quote(append(to, `,"outcome":`...), string(f.Outcome))
	to = quote(append(to, `,"quantity":`...), string(f.Quantity))
	to = float(append(to, `,"ratio":`...), f.Ratio)
	to = append(to, `,"reasons":[`...)
	for i, id := range f.Reasons {
		to = quote(comma(to, i), id)
	}
	to = quote(append(to, `],"sense":`...), string(f.Sense))
	to = quote(append(to, `,"unit":`...), f.Unit)
	return append(to, '}')
}

func (in *Input) canonical(to []byte) []byte {
	to = float(append(to, `{"high":`...), in.High)
	to = quote(append(to, `,"key":`...), in.Key)
	to = float(append(to, `,"low":`...), in.Low)
	to = strconv.AppendBool(append(to, `,"open":`...), in.Open)
	to = quote(append(to, `,"unit":`...), in.Unit)
	to = float(append(to, `,"value":`...), in.Value)
	return append(to, '}')
}

func comma(to []byte, i int) []byte {
	if i > 0 {
		return append(to, ',')
	}
	return to
}

// figureDigits is how many significant digits figures have.
const figureDigits = 12

// float appends a figure with 12 significant digits as ECMAScript's
// Number::toString writes it, which RFC 8785 asks for: without zeros at its
// end, and without an exponent from 1e-6 up to 1e21. What is absent is null.
//
// No two decimals of so few digits are one float64, so that these are also the
// fewest digits that give the number back.
func float(to []byte, x float64) []byte {
	switch {
	case math.IsNaN(x) || math.IsInf(x, 0):
		return append(to, "null"...)
	case x == 0:
		return append(to, '0') // also -0
	case x < 0:
		to, x = append(to, '-'), -x
	}
	var room [32]byte
	text := strconv.AppendFloat(room[:0], x, 'e', figureDigits-1, 64) // d.ddddddddddde+dd
	e := figureDigits + 1
	exponent, _ := strconv.Atoi(string(text[e+1:]))
	digits := append(text[:1], text[2:e]...)
	for digits[len(digits)-1] == '0' {
		digits = digits[:len(digits)-1]
	}
	return layOut(to, digits, exponent)
}

// layOut appends d.ddd times ten to the exponent.
func layOut(to, digits []byte, exponent int) []byte {
	point := exponent + 1 // how many digits stand before the point
	switch {
	case exponent < -6 || exponent > 20:
		to = append(to, digits[0])
		if len(digits) > 1 {
			to = append(append(to, '.'), digits[1:]...)
		}
		to = append(to, 'e')
		if exponent > 0 {
			to = append(to, '+')
		}
		return strconv.AppendInt(to, int64(exponent), 10)
	case point <= 0:
		to = append(to, "0.00000"[:2-point]...)
		return append(to, digits...)
	case point >= len(digits):
		to = append(to, digits...)
		for range point - len(digits) {
			to = append(to, '0')
		}
		return to
	}
	to = append(append(to, digits[:point]...), '.')
	return append(to, digits[point:]...)
}

// quote appends a string as RFC 8785 asks: only quotation marks, backslashes
// and control characters are escaped.
func quote(to []byte, s string) []byte {
	const hexadecimal = "0123456789abcdef"
	to = append(to, '"')
	for i := range len(s) {
		switch c := s[i]; c {
		case '"', '\\':
			to = append(to, '\\', c)
		case '\b':
			to = append(to, `\b`...)
		case '\t':
			to = append(to, `\t`...)
		case '\n':
			to = append(to, `\n`...)
		case '\f':
			to = append(to, `\f`...)
		case '\r':
			to = append(to, `\r`...)
		default:
			if c < ' ' {
				to = append(to, `\u00`...)
				to = append(to, hexadecimal[c>>4], hexadecimal[c&15])
				continue
			}
			to = append(to, c)
		}
	}
	return append(to, '"')
}
