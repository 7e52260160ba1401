package quantity

import (
	"math/big"
	"strconv"
	"strings"
)

// comma finds a comma between digits, which separates thousands for some and
// decimals for others.
func comma(_ Dimension, text string) *fault {
	if !betweenDigits(text, ',') {
		return nil
	}
	thousands, decimal := commaReadings(text)
	f := &fault{reason: "a comma is not read, since it can separate thousands or be a decimal sign", readings: true}
	f.better = []string{thousands, decimal}
	if !groupsOfThree(text, ",") {
		f.better = []string{decimal, thousands}
	}
	return f
}

// betweenDigits reports whether text has mark between two digits.
func betweenDigits(text string, mark byte) bool {
	for i := 1; i+1 < len(text); i++ {
		if text[i] == mark && isDigit(text[i-1]) && isDigit(text[i+1]) {
			return true
		}
	}
	return false
}

// commaReadings returns text with its commas left out, and with its commas as
// decimal points. A number with points before its comma has only the second
// reading; one with two commas, or with a point after its comma, only the
// first, since what it would otherwise give cannot be read.
func commaReadings(text string) (thousands, decimal string) {
	for rest := text; rest != ""; {
		number := numberAt(rest)
		if number == "" {
			thousands, decimal = thousands+rest[:1], decimal+rest[:1]
			rest = rest[1:]
			continue
		}
		rest = rest[len(number):]
		pointed := number
		if at := strings.IndexByte(number, ','); at >= 0 {
			if strings.Contains(number[:at], ".") {
				number = strings.ReplaceAll(number[:at], ".", "") + number[at:]
				pointed = strings.Replace(number, ",", ".", 1)
				number = pointed
			} else {
				pointed = withoutLastZeros(strings.ReplaceAll(number, ",", "."))
			}
		}
		thousands += strings.ReplaceAll(number, ",", "")
		decimal += pointed
	}
	return thousands, decimal
}

// numberAt returns the digits, points and commas that text begins with, from
// digit to digit.
func numberAt(text string) string {
	end := 0
	for end < len(text) && (isDigit(text[end]) ||
		end > 0 && (text[end] == ',' || text[end] == '.') && isDigit(text[end-1]) && end+1 < len(text) && isDigit(text[end+1])) {
		end++
	}
	return text[:end]
}

// withoutLastZeros returns a decimal without the zeros at its end.
func withoutLastZeros(decimal string) string {
	return strings.TrimSuffix(strings.TrimRight(decimal, "0"), ".")
}

// grouped finds thousands separated by something else than a comma.
func grouped(_ Dimension, text string) *fault {
	for _, mark := range [...]string{" ", "'", "_"} {
		if groupsOfThree(text, mark) {
			return &fault{
				reason: "a number is written without separators; " + quoted(mark) + " stands between its digits",
				better: []string{ungrouped(text, mark)},
			}
		}
	}
	if betweenDigits(text, '_') {
		return &fault{reason: `a number is written without "_"`, better: []string{strings.ReplaceAll(text, "_", "")}}
	}
	return nil
}

// groupsOfThree reports whether text has mark between digits as a separator of
// thousands.
func groupsOfThree(text, mark string) bool { return ungrouped(text, mark) != text }

// ungrouped returns text without mark where it separates thousands: before
// three digits, not four, and after up to three.
func ungrouped(text, mark string) string {
	var out strings.Builder
	for i := 0; i < len(text); i++ {
		if startsWith(text[i:], mark) && thousandsAt(text, i, i+len(mark)) {
			i += len(mark) - 1
			continue
		}
		out.WriteByte(text[i])
	}
	return out.String()
}

// thousandsAt reports whether up to three digits end at before, and exactly
// three begin at behind that are no part of a fraction.
func thousandsAt(text string, before, behind int) bool {
	left, right := before, behind
	for left > 0 && isDigit(text[left-1]) {
		left--
	}
	for right < len(text) && isDigit(text[right]) {
		right++
	}
	return left < before && before-left <= 3 && right-behind == 3 &&
		(right == len(text) || text[right] != '/')
}

// notNumber finds a word for what is no number.
func notNumber(_ Dimension, text string) *fault {
	for word := range strings.FieldsFuncSeq(text, func(r rune) bool { return strings.ContainsRune(" .+-±", r) }) {
		switch strings.ToLower(word) {
		case "nan", "inf", "infinity", "infinite", "∞", "unknown", "none", "n/a":
			return &fault{reason: quoted(word) + " is not a number; an entry that is not known is left out"}
		}
	}
	return nil
}

// farthest is the greatest power of ten that is written out for the user.
const farthest = 12

// exponent finds a number with a power of ten.
func exponent(_ Dimension, text string) *fault {
	for at := 1; at < len(text); at++ {
		if text[at]|0x20 != 'e' || !isDigit(text[at-1]) {
			continue
		}
		end := at + 1
		if end < len(text) && (text[end] == '-' || text[end] == '+') {
			end++
		}
		digits := end
		for end < len(text) && isDigit(text[end]) {
			end++
		}
		if end == digits || end < len(text) && isLetter(text[end]) {
			continue
		}
		start := at
		for start > 0 && (isDigit(text[start-1]) || text[start-1] == '.') {
			start--
		}
		return powerOfTen(text, start, at, end)
	}
	return nil
}

// powerOfTen is the fault of text[start:end] having an exponent, whose e is
// at e.
func powerOfTen(text string, start, e, end int) *fault {
	power, err := strconv.Atoi(text[e+1 : end])
	switch {
	case err != nil || power > farthest:
		return &fault{reason: quoted(text[start:end]) + " is too large for anything this program works with, and exponents are not read"}
	case power < -farthest:
		return &fault{reason: quoted(text[start:end]) + " is next to zero, and exponents are not read"}
	}
	f := &fault{reason: "exponents are not read; write all digits"}
	if r, ok := new(big.Rat).SetString(text[start:end]); ok {
		f.better = []string{text[:start] + exact{wide: r}.String() + text[end:]}
	}
	return f
}

// strayPoint finds a decimal point too many or without a digit after it.
func strayPoint(_ Dimension, text string) *fault {
	points := 0
	for i := 1; i < len(text); i++ {
		switch {
		case text[i] != '.' || !isDigit(text[i-1]):
			if !isDigit(text[i]) {
				points = 0
			}
			continue
		case pointAt(text, i):
			points++
		case i+1 == len(text) || text[i+1] != '.':
			return &fault{
				reason: "a decimal point needs a digit after it",
				better: []string{text[:i] + text[i+1:]},
			}
		}
		if points == 2 {
			f := &fault{reason: "a number has one decimal point at most, and nothing between thousands"}
			if groupsOfThree(text, ".") {
				f.better = []string{ungrouped(text, ".")}
			}
			return f
		}
	}
	return nil
}
