package reportgen

import (
	"bufio"
	"io"
	"strconv"
	"strings"
)

// A csv writes rows of cells. Texts come printable, quoted where they must be,
// and guarded: a spreadsheet takes none of them for a formula. Figures have 12
// significant digits, and a cell is empty where there is none.
type csv struct {
	out  *bufio.Writer
	room [32]byte
	rest bool // the row has a cell already
}

func newCSV(w io.Writer) *csv { return &csv{out: bufio.NewWriterSize(w, 1<<16)} }

// text writes a cell of words.
func (c *csv) text(s string) {
	c.part()
	s = breakable(printable(GuardCell(s), false))
	if strings.ContainsAny(s, `",`) {
		s = `"` + strings.ReplaceAll(s, `"`, `""`) + `"`
	}
	c.out.WriteString(s)
}

// figure writes a cell with a figure.
func (c *csv) figure(x float64) {
	c.part()
	if isNumber(x) {
		c.out.Write(strconv.AppendFloat(c.room[:0], x+0, 'g', mostDigits, 64)) // + 0: no cell reads -0
	}
}

func (c *csv) part() {
	if c.rest {
		c.out.WriteByte(',')
	}
	c.rest = true
}

func (c *csv) end() {
	c.out.WriteByte('\n')
	c.rest = false
}
