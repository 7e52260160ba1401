package figure

import (
	"strings"
	"testing"
)

// A drawing by hand: 40 mm by 20 mm in 40 columns and 10 rows, so that a column
// is 1 mm and a row is 2 mm.
func TestCharacters(t *testing.T) {
	s := &Scene{Width: 40, Height: 20, Title: "Title", Statement: "Statement."}
	s.Outline([]Point{{2.5, 1}, {30.5, 1}, {30.5, 17}, {2.5, 17}}, Pen{})
	s.Line(Point{2.5, 9}, Point{30.5, 9}, Pen{})
	s.Line(Point{10.5, 1}, Point{10.5, 17}, Pen{})
	s.Line(Point{2.5, 13}, Point{1.7, 13}, Pen{}) // a tick
	s.Mark(Point{20.5, 5}, Filled)
	s.Text(Text{Text: "peak", Spots: []Spot{{At: Point{20.5, 5}, Anchor: Start}}})
	s.Text(Text{Text: "end", Spots: []Spot{{At: Point{20.5, 5}, Anchor: End}}})
	s.Text(Text{Text: "below", Spots: []Spot{{At: Point{20.5, 5}, Anchor: Middle, Lift: Below}}})
	s.Text(Text{Text: "落下", Spots: []Spot{{At: Point{14.5, 13}, Anchor: Start}}})
	want := `Title

  ┌───────┬───────────────────┐
  │       │                   │
  │       │     end ● peak    │
  │       │       below       │
  ├───────┼───────────────────┤
  │       │                   │
  ┤       │     落下          │
  │       │                   │
  └───────┴───────────────────┘

Statement.
`
	if got := string(s.Characters(Cells{Columns: 40})); got != want {
		t.Errorf("got\n%s\nnot\n%s", got, want)
	}
	ascii := strings.NewReplacer("●", "*", "─", "-", "│", "|", "落下          ", `\u843d\u4e0b  `).Replace(want)
	for _, joint := range "┌┐└┘├┤┬┴┼" {
		ascii = strings.ReplaceAll(ascii, string(joint), "+")
	}
	if got := string(s.Characters(Cells{Columns: 40, ASCII: true})); got != ascii {
		t.Errorf("in ASCII\n%s\nnot\n%s", got, ascii)
	}
}

// Points in a cell look like the stroke that runs through them.
func TestDots(t *testing.T) {
	for _, c := range []struct {
		rows  [4]string
		ascii rune
	}{
		{[4]string{"##", "..", "..", ".."}, '\''},
		{[4]string{"..", "##", "..", ".."}, '-'},
		{[4]string{"..", "..", "##", ".."}, '-'},
		{[4]string{"..", "..", "..", "##"}, '.'},
		{[4]string{"#.", "#.", "#.", "#."}, '|'},
		{[4]string{".#", ".#", "#.", "#."}, '/'},
		{[4]string{"#.", "#.", ".#", ".#"}, '\\'},
		{[4]string{"##", "##", "##", "##"}, '|'},
		{[4]string{"#.", "..", "..", ".."}, '\''},
	} {
		var d dots
		for row, line := range c.rows {
			for column, point := range line {
				if point == '#' {
					d.set(column, row)
				}
			}
		}
		if got := d.ascii(); got != c.ascii {
			t.Errorf("%v looks like %c, not %c", c.rows, got, c.ascii)
		}
	}
	// Unicode, Braille Patterns: dots 1 2 3 4 5 6 7 8 in the order of their bits.
	var d dots
	d.set(0, 0)
	d.set(1, 3)
	if got := d.braille(); got != '\u2881' {
		t.Errorf("dots 1 and 8 are %c", got)
	}
}

// A drawing to scale keeps its proportions, a cell being twice as high as wide,
// also where the rows would allow more or less.
func TestCellsToScale(t *testing.T) {
	s := &Scene{Width: 100, Height: 100, ToScale: true}
	for _, c := range []struct {
		columns, rows         int
		wantColumns, wantRows int
	}{{80, 0, 80, 40}, {80, 20, 40, 20}, {80, 200, 80, 40}, {40, 30, 40, 20}} {
		if g := (Cells{Columns: c.columns, Rows: c.rows}).grid(s); g.columns != c.wantColumns || g.rows != c.wantRows {
			t.Errorf("%d columns, %d rows: %d by %d, not %d by %d", c.columns, c.rows, g.columns, g.rows, c.wantColumns, c.wantRows)
		}
	}
	s.ToScale = false
	if g := (Cells{Columns: 80, Rows: 20}).grid(s); g.columns != 80 || g.rows != 20 {
		t.Errorf("%d by %d", g.columns, g.rows)
	}
}
