package reportgen

import (
	"fmt"
	"strings"
	"unicode"
)

// printable returns s as it may reach a terminal or a plain file. It is the
// one place where user text is made fit for print:
//
//	line breaks, tabs, other blanks    one blank each (one that does not break
//	                                   stays until lines are broken)
//	control characters, escapes, marks that turn the direction of writing,
//	anything without a shape of its own    escaped, \u001b
//	more than two combining marks in a row    the rest escaped
//	with ascii: ± ² – and the like    +/- 2 -, all else above 126 escaped
func printable(s string, ascii bool) string {
	if plain(s) {
		return s
	}
	var b strings.Builder
	marks := 0
	for _, r := range s {
		marks = countMarks(marks, r)
		switch spelled, ours := asciiSpelling[r]; {
		case blank(r):
			b.WriteByte(' ')
		case !visible(r) || marks > 2:
			escape(&b, r)
		case ascii && ours:
			b.WriteString(spelled)
		case ascii && r > '~' && r != noBreakRune:
			escape(&b, r)
		default:
			b.WriteRune(r)
		}
	}
	return b.String()
}

// plain reports whether s is printable ASCII throughout.
func plain(s string) bool {
	for i := range len(s) {
		if s[i] < ' ' || s[i] > '~' {
			return false
		}
	}
	return true
}

func countMarks(marks int, r rune) int {
	if unicode.Is(unicode.M, r) {
		return marks + 1
	}
	return 0
}

func blank(r rune) bool {
	switch r {
	case '\n', '\r', '\t', '\u2028', '\u2029':
		return true
	case noBreakRune: // kept until lines are broken
		return false
	}
	return unicode.Is(unicode.Zs, r)
}

// visible reports whether r has a shape of its own. Besides what Unicode calls
// printable, the default ignorables among the letters and marks are left out.
func visible(r rune) bool {
	switch {
	case r == unicode.ReplacementChar, r == noBreakRune:
		return true
	case !unicode.IsPrint(r):
		return false
	case unicode.Is(unicode.Other_Default_Ignorable_Code_Point, r), unicode.Is(unicode.Variation_Selector, r):
		return false
	}
	return true
}

func escape(b *strings.Builder, r rune) {
	if r > 0xffff {
		fmt.Fprintf(b, `\U%08x`, r)
		return
	}
	fmt.Fprintf(b, `\u%04x`, r)
}

// asciiSpelling is how the characters that the trade types beyond ASCII are
// spelled in ASCII.
var asciiSpelling = map[rune]string{
	'±': "+/-", '²': "2", '³': "3", '·': "*", '×': "x", '÷': "/", '°': " deg",
	'–': "-", '—': "-", '−': "-", '‐': "-", '…': "...",
	'≤': "<=", '≥': ">=", '≈': "~", '½': "1/2", '¼': "1/4", '¾': "3/4",
	'‘': "'", '’': "'", '“': `"`, '”': `"`, '′': "'", '″': `"`,
}
