package reportgen

import (
	"strings"

	"arrestcheck/arrest/quantity"
)

// A strip is a column of a table that is still to find its place.
type strip struct {
	header string
	cells  []string
}

const (
	leastStrip = 6  // characters
	mostHead   = 15 // a head is wrapped to this, whatever its words
	tallHead   = 4  // lines; a taller head makes its column wider
	betweenTwo = 2
)

// width is how wide the strip stands.
func (s *strip) width() int {
	n := leastStrip
	for word := range strings.FieldsSeq(s.header) {
		n = max(n, min(width(word), mostHead))
	}
	for _, c := range s.cells {
		n = max(n, width(c))
	}
	for n < mostHead && len(headLines(s, n)) > tallHead {
		n++
	}
	return n
}

// pack sets groups of strips side by side behind fixed ones, in as many tables
// as it takes to keep the page. A group is not parted.
func pack(fixed []strip, groups [][]strip) []*Table {
	var tables []*Table
	row := fixed
	for _, g := range groups {
		if len(row) > len(fixed) && across(row)+betweenTwo+across(g) > pageWidth {
			tables = append(tables, tableOf(row))
			row = fixed
		}
		row = append(row[:len(row):len(row)], g...)
	}
	return append(tables, tableOf(row))
}

func across(strips []strip) int {
	n := -betweenTwo
	for i := range strips {
		n += strips[i].width() + betweenTwo
	}
	return n
}

// tableOf turns strips into a table; their heads stand on the rule below them.
func tableOf(strips []strip) *Table {
	t := &Table{}
	tall := 0
	for i := range strips {
		t.Widths = append(t.Widths, strips[i].width())
		tall = max(tall, len(headLines(&strips[i], t.Widths[i])))
	}
	for i := range strips {
		lines := headLines(&strips[i], t.Widths[i])
		t.Header = append(t.Header, strings.Repeat("\n", tall-len(lines))+strings.Join(lines, "\n"))
	}
	for n := range strips[0].cells {
		cells := make([]string, len(strips))
		for i := range strips {
			cells[i] = strips[i].cells[n]
		}
		t.Rows = append(t.Rows, Row{Cells: cells})
	}
	return t
}

// headLines wraps a head to a width.
func headLines(s *strip, columns int) []string {
	var lines []string
	for part := range strings.SplitSeq(s.header, "\n") {
		lines = append(lines, wrap(part, columns)...)
	}
	return lines
}

// aligned puts blanks before figures so that their points stand one below the
// other.
func aligned(cells []string) []string {
	most := 0
	for _, c := range cells {
		most = max(most, beforePoint(c))
	}
	list := make([]string, len(cells))
	for i, c := range cells {
		list[i] = c
		if n := beforePoint(c); n > 0 {
			list[i] = strings.Repeat(noBreak, most-n) + c
		}
	}
	return list
}

// beforePoint returns how many characters of a figure stand before its point;
// 0 for what is no figure.
func beforePoint(s string) int {
	n := 0
	for n < len(s) && (s[n] == '-' && n == 0 || '0' <= s[n] && s[n] <= '9') {
		n++
	}
	return n
}

// axisDigits returns how many digits tell the figures of an axis apart and,
// where exact is asked for, give each as it is if six can.
func axisDigits(values []float64, u quantity.Unit, exact bool) int {
	digits := pageDigits
	for digits < mostDigits && !apart(values, u, digits, exact && digits < exactDigits) {
		digits++
	}
	return digits
}

const exactDigits = 6

func apart(values []float64, u quantity.Unit, digits int, exact bool) bool {
	last := ""
	for _, v := range values {
		text := quantity.Number(v, u, digits, quantity.Nearest)
		if text == last || exact && number(text) != number(quantity.Number(v, u, exactDigits, quantity.Nearest)) {
			return false
		}
		last = text
	}
	return true
}
