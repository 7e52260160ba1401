package figure

import (
	"strings"
	"unicode"
)

// The SVG asks for a font with the widths of Liberation Sans, which are those
// of the sans-serif fonts that most machines have. Its ascent and descent are
// 0.905 and 0.212 of its height, its capitals 0.729 high.
const (
	ascent  = 0.905
	descent = 0.212
	middle  = 0.36 // half the height of a capital: from a baseline up to the middle of its line
)

// latin holds the widths of U+0020 to U+007E and of U+00A0 to U+00FF in
// thousandths of the height of the font, from the font's own table hmtx.
var latin = [...]int16{
	278, 278, 355, 556, 556, 889, 667, 191, 333, 333, 389, 584, 278, 333, 278, 278,
	556, 556, 556, 556, 556, 556, 556, 556, 556, 556, 278, 278, 584, 584, 584, 556,
	1015, 667, 667, 722, 722, 667, 611, 778, 722, 278, 500, 667, 556, 833, 722, 778,
	667, 778, 722, 667, 611, 722, 667, 944, 667, 667, 611, 278, 278, 278, 469, 556,
	333, 556, 556, 500, 556, 556, 278, 556, 556, 222, 222, 500, 222, 833, 556, 556,
	556, 556, 333, 500, 278, 556, 500, 722, 500, 500, 500, 334, 260, 334, 584, 0,

	278, 333, 556, 556, 556, 556, 260, 556, 333, 737, 370, 556, 584, 333, 737, 552,
	400, 549, 333, 333, 333, 576, 537, 278, 333, 333, 365, 556, 834, 834, 834, 611,
	667, 667, 667, 667, 667, 667, 1000, 722, 667, 667, 667, 667, 278, 278, 278, 278,
	722, 722, 778, 778, 778, 778, 778, 584, 778, 722, 722, 722, 722, 667, 667, 611,
	556, 556, 556, 556, 556, 556, 889, 500, 556, 556, 556, 556, 278, 278, 278, 278,
	556, 556, 556, 556, 556, 556, 556, 549, 611, 556, 556, 556, 556, 500, 556, 500,
}

// others holds the widths of the signs beyond that a report uses.
var others = map[rune]int16{
	'–': 556, '—': 1000, '−': 584, '…': 1000, '‘': 222, '’': 222, '“': 333, '”': 333,
	'′': 188, '″': 354, '≤': 549, '≥': 549, '≈': 549, '√': 549, '∞': 713,
	'Δ': 668, 'α': 578, 'β': 575, 'φ': 648, 'μ': 576, 'σ': 617, 'τ': 395,
	'→': 1000, '←': 1000, '↑': 500, '↓': 500,
}

// runeWidth returns the width of r in thousandths of the height of the font,
// and whether it is that of the font. Beyond the tables it is the widest of
// the class of r, so that a text takes up less room than it is given.
func runeWidth(r rune) (width int, exact bool) {
	switch {
	case r >= 0x20 && r < 0x7f:
		return int(latin[r-0x20]), true
	case r >= 0xa0 && r <= 0xff:
		return int(latin[r-0xa0+96]), true
	}
	if w, ok := others[r]; ok {
		return int(w), true
	}
	switch {
	case unicode.Is(unicode.M, r):
		return 0, false
	case wide(r):
		return 1050, false
	case unicode.Is(unicode.Latin, r), unicode.Is(unicode.Greek, r):
		if unicode.IsLower(r) {
			return 950, false
		}
		return 1010, false
	}
	return 1060, false
}

// textWidth returns the width of text in a font of the given height, in the
// unit of the height, and whether every character of it is in the tables.
func textWidth(text string, em float64) (width float64, exact bool) {
	sum, exact := 0, true
	for _, r := range text {
		w, known := runeWidth(r)
		sum, exact = sum+w, exact && known
	}
	return grain(float64(sum) / 1000 * em), exact
}

// wide reports whether r takes two columns in a terminal: the ideographs and
// syllables of East Asia, their full-width forms and pictures.
func wide(r rune) bool {
	switch {
	case r < 0x1100:
		return false
	case r <= 0x115f, r >= 0x2e80 && r <= 0xa4cf, r >= 0xa960 && r <= 0xa97c, r >= 0xac00 && r <= 0xd7a3,
		r >= 0xf900 && r <= 0xfaff, r >= 0xfe30 && r <= 0xfe6f, r >= 0xff00 && r <= 0xff60, r >= 0xffe0 && r <= 0xffe6,
		r >= 0x1f000 && r <= 0x1faff, r >= 0x20000 && r <= 0x3fffd:
		return true
	}
	return false
}

// columns returns the number of columns that text takes in a terminal.
func columns(text string) int {
	n := 0
	for _, r := range text {
		n += runeColumns(r)
	}
	return n
}

func runeColumns(r rune) int {
	switch {
	case unicode.Is(unicode.M, r):
		return 0
	case wide(r):
		return 2
	}
	return 1
}

// wrap breaks text into lines that fit, at blanks, and within a word only
// where it alone does not fit.
func wrap(text string, fits func(string) bool) []string {
	var lines []string
	line := ""
	for _, word := range strings.Fields(text) {
		longer := strings.TrimSpace(line + " " + word)
		if fits(longer) {
			line = longer
			continue
		}
		if line != "" {
			lines = append(lines, line)
		}
		for line = word; !fits(line); {
			head := headThatFits(line, fits)
			lines = append(lines, head)
			line = line[len(head):]
		}
	}
	if line != "" {
		lines = append(lines, line)
	}
	return lines
}

// headThatFits returns the longest part of word from its start that fits, at
// least one character with its marks.
func headThatFits(word string, fits func(string) bool) string {
	end := 0
	for i, r := range word {
		if i > 0 && !unicode.Is(unicode.M, r) {
			if end > 0 && !fits(word[:i]) {
				return word[:end]
			}
			end = i
		}
	}
	if end == 0 {
		return word
	}
	return word[:end]
}
