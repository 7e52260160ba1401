package figure

// dots are the points set in a cell, two across and four down, as Unicode
// numbers those of a Braille pattern.
type dots uint8

// bits holds the bit of each point, by row and column.
var bits = [4][2]dots{{0x01, 0x08}, {0x02, 0x10}, {0x04, 0x20}, {0x40, 0x80}}

func (d *dots) set(column, row int) { *d |= bits[row][column] }

func (d dots) has(column, row int) bool { return d&bits[row][column] != 0 }

func (d dots) braille() rune { return 0x2800 + rune(d) }

// dots returns points that look like the straight lines a.
func (a arms) dots() dots {
	var d dots
	if a&left != 0 {
		d.set(0, 2)
	}
	if a&right != 0 {
		d.set(1, 2)
	}
	if a&up != 0 {
		d.set(0, 0)
		d.set(0, 1)
	}
	if a&down != 0 {
		d.set(0, 2)
		d.set(0, 3)
	}
	return d
}

// ascii returns the character that looks most like d, which is not empty.
func (d dots) ascii() rune {
	top, bottom := 3, 0
	var sum, count [2]int
	for row := range 4 {
		for column := range 2 {
			if d.has(column, row) {
				top, bottom = min(top, row), max(bottom, row)
				sum[column] += row
				count[column]++
			}
		}
	}
	if bottom-top >= 2 {
		return steep(sum, count)
	}
	return [...]rune{'\'', '\'', '-', '-', '-', '.', '.'}[top+bottom]
}

// steep returns the stroke for points over three rows or four.
func steep(sum, count [2]int) rune {
	if count[0] == 0 || count[1] == 0 {
		return '|'
	}
	switch slope := sum[0]*count[1] - sum[1]*count[0]; {
	case slope > count[0]*count[1]/2:
		return '/'
	case slope < -count[0]*count[1]/2:
		return '\\'
	}
	return '|'
}
