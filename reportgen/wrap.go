package reportgen

import (
	"strings"

	"github.com/olekukonko/tablewriter/pkg/twwidth"
)

// pageWidth is the width of a page in characters.
const pageWidth = 80

// width returns the columns that s takes on a terminal. It counts rune by rune
// and so never less than a terminal does that joins runes.
func width(s string) int {
	if plain(s) {
		return len(s)
	}
	n := 0
	for _, r := range s {
		n += runeWidth(r)
	}
	return n
}

// runeWidth asks the library for what is beyond Latin-1, whose letters and
// signs are all one wide but for the hyphen that is not seen.
func runeWidth(r rune) int {
	if r < 0x7f || noBreakRune <= r && r <= 0xff && r != softHyphen {
		return 1
	}
	return twwidth.WidthWithOptions(string(r), twwidth.Options{})
}

const softHyphen = '\u00ad'

// wrap breaks s into lines of at most columns, between words where it can and
// within a word that is longer than a line. It returns at least one line.
func wrap(s string, columns int) []string {
	var lines []string
	var room [160]byte
	line, used := room[:0], 0
	for word := range strings.FieldsFuncSeq(s, isBlank) {
		w := width(word)
		if len(line) > 0 && used+1+w <= columns {
			line, used = append(append(line, ' '), word...), used+1+w
			continue
		}
		if len(line) > 0 {
			lines = append(lines, string(line))
		}
		if w > columns {
			var full []string
			full, word = split(word, columns)
			lines, w = append(lines, full...), width(word)
		}
		line, used = append(line[:0], word...), w
	}
	return append(lines, string(line))
}

// noBreak is a blank that keeps a figure and its unit on one line. It is
// printed as any other.
const (
	noBreak     = "\u00a0"
	noBreakRune = '\u00a0'
)

func isBlank(r rune) bool { return r == ' ' }

func words(s string) []string {
	return strings.FieldsFunc(s, isBlank)
}

// split cuts a word that is longer than a line into full lines of at most
// columns, after a joint of a name or path where there is one, and the rest.
func split(word string, columns int) (full []string, rest string) {
	from, used, joint := 0, 0, 0
	for i, r := range word {
		w := runeWidth(r)
		for used+w > columns && used > 0 { // twice where a joint leaves a wide letter no room
			cut := i
			if joint > from {
				cut = joint
			}
			full = append(full, word[from:cut])
			from, used = cut, width(word[cut:i])
		}
		used += w
		if strings.ContainsRune(joints, r) {
			joint = i + 1
		}
	}
	return full, word[from:]
}

// joints are where keys, paths and the like may be broken after.
const joints = "._/-"
