package figure

import (
	"fmt"
	"strings"
	"unicode"
)

// clean returns text as it may stand in a figure: one line, blanks of every
// kind as single blanks, nothing that is invisible, turns the direction of
// writing or is no character of XML, and no more than two combining marks in a
// row, for more would leave their line.
func clean(text string) string {
	var b strings.Builder
	blank, marks := false, 0
	for _, r := range text {
		switch {
		case unicode.IsSpace(r), unicode.Is(unicode.Z, r):
			blank = b.Len() > 0
			continue
		case !visible(r):
			continue
		case unicode.Is(unicode.M, r):
			if marks++; marks > 2 || b.Len() == 0 || blank {
				continue
			}
		default:
			marks = 0
		}
		if blank {
			b.WriteByte(' ')
			blank = false
		}
		b.WriteRune(r)
	}
	return b.String()
}

// visible reports whether r has a shape of its own.
func visible(r rune) bool {
	switch {
	case r == unicode.ReplacementChar:
		return true
	case !unicode.IsPrint(r):
		return false
	}
	return !unicode.Is(unicode.Other_Default_Ignorable_Code_Point, r) && !unicode.Is(unicode.Variation_Selector, r)
}

// cleanASCII returns clean(text) in ASCII: what the trade types beyond it is
// spelled out, all else is escaped, \u00e9.
func cleanASCII(text string) string {
	var b strings.Builder
	for _, r := range clean(text) {
		spelled, ours := asciiSpelling[r]
		switch {
		case r <= '~':
			b.WriteRune(r)
		case ours:
			b.WriteString(spelled)
		case r > 0xffff:
			fmt.Fprintf(&b, `\U%08x`, r)
		default:
			fmt.Fprintf(&b, `\u%04x`, r)
		}
	}
	return b.String()
}

var asciiSpelling = map[rune]string{
	'±': "+/-", '²': "2", '³': "3", '·': "*", '×': "x", '÷': "/", '°': " deg",
	'–': "-", '—': "-", '−': "-", '‐': "-", '…': "...",
	'≤': "<=", '≥': ">=", '≈': "~", '½': "1/2", '¼': "1/4", '¾': "3/4",
	'‘': "'", '’': "'", '“': `"`, '”': `"`, '′': "'", '″': `"`,
}
