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

func runeWidth(r rune) int {
	if r < 0x7f {
		return 1
	}
	return twwidth.WidthWithOptions(string(r), twwidth.Options{})
}

// wrap breaks s into lines of at most columns, between words where it can and
// within a word that is longer than a line. It returns at least one line.
func wrap(s string, columns int) []string {
	var lines []string
	line, used := "", 0
	for _, word := range words(s) {
		w := width(word)
		if line != "" && used+1+w <= columns {
			line, used = line+" "+word, used+1+w
			continue
		}
		if line != "" {
			lines = append(lines, line)
		}
		var full []string
		full, line = split(word, columns)
		lines, used = append(lines, full...), width(line)
	}
	return append(lines, line)
}

// noBreak is a blank that keeps a figure and its unit on one line. It is
// printed as any other.
const (
	noBreak     = "\u00a0"
	noBreakRune = '\u00a0'
)

func words(s string) []string {
	return strings.FieldsFunc(s, func(r rune) bool { return r == ' ' })
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
