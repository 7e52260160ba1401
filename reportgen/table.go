package reportgen

import (
	"strings"

	"github.com/olekukonko/ll"
	"github.com/olekukonko/tablewriter/pkg/twwidth"
	"github.com/olekukonko/tablewriter/renderer"
	"github.com/olekukonko/tablewriter/tw"
)

// table writes a table. Cells are wrapped here, to the widths of the table: the
// table writer would break words, and count more than 80. Of that writer only
// the renderer of lines is used: what it does to gather rows would take longer
// than the rest of the report.
func (p *page) table(t *Table) {
	p.tabled.Reset()
	if p.tables == nil {
		twwidth.SetEastAsian(false)
		p.tables = renderer.NewBlueprint(p.rendition())
		p.tables.Logger(ll.New("tables").Suspend()) // else it words what it would log, and throws it away
		p.must(p.tables.Start(&p.tabled))
	}
	head := p.cells(t.Header, t.Widths, p.paint.strong)
	rows := make([][][]string, len(t.Rows))
	for i := range t.Rows {
		paint := plainText
		if t.Rows[i].Loud {
			paint = p.paint.alarm
		}
		rows[i] = p.cells(t.Rows[i].Cells, t.Widths, paint)
	}
	widths := tw.NewMapper[int, int]()
	widen(widths, head)
	for _, row := range rows {
		widen(widths, row)
	}
	p.tableRow(head, widths)
	for i, row := range rows {
		if i == 0 || t.Rules {
			p.tables.Line(tw.Formatting{Row: tw.RowContext{Widths: widths}})
		}
		p.tableRow(row, widths)
	}
	for l := range strings.Lines(p.tabled.String()) {
		p.line(strings.TrimSuffix(l, "\n"))
	}
}

// betweenColumns stands after each column but the last.
const betweenColumns = "  "

// widen makes room for a row in the columns that it has cells in.
func widen(widths tw.Mapper[int, int], cells [][]string) {
	for i, lines := range cells {
		widest := 1
		for _, l := range lines {
			w := twwidth.Width(l)
			if i < len(cells)-1 {
				w += len(betweenColumns)
			}
			widest = max(widest, w)
		}
		widths.Set(i, max(widths.Get(i), widest))
	}
}

// tableRow writes the lines of one row that hold anything.
func (p *page) tableRow(cells [][]string, widths tw.Mapper[int, int]) {
	most := 0
	for _, lines := range cells {
		most = max(most, len(lines))
	}
	current := make(map[int]tw.CellContext, len(cells))
	for n := range most {
		empty := true
		for i, lines := range cells {
			text := ""
			if n < len(lines) {
				text = lines[n]
			}
			empty = empty && text == ""
			cell := tw.CellContext{Data: text, Align: tw.AlignLeft}
			if i < len(cells)-1 {
				cell.Padding.Right = betweenColumns
			}
			current[i] = cell
		}
		if empty {
			continue
		}
		p.tables.Row(nil, tw.Formatting{Row: tw.RowContext{Position: tw.Row, Widths: widths, Current: current}})
	}
}

func plainText(s string) string { return s }

// rendition has no frame and a rule where a line is asked for.
func (p *page) rendition() tw.Rendition {
	rule := p.rule('─', '-', 1)
	return tw.Rendition{
		Borders:  tw.BorderNone,
		Symbols:  tw.NewSymbolCustom("rules").WithRow(rule).WithCenter(rule).WithColumn(""),
		Settings: tw.Settings{Separators: tw.Separators{BetweenColumns: tw.Off}},
	}
}

// cells wraps each cell to its column and paints every line of it.
func (p *page) cells(cells []string, widths []int, paint func(string) string) [][]string {
	list := make([][]string, len(cells))
	for i, cell := range cells {
		for part := range strings.SplitSeq(cell, "\n") {
			for _, l := range wrap(p.printable(part), widths[i]) {
				list[i] = append(list[i], paint(strings.ReplaceAll(l, noBreak, " ")))
			}
		}
	}
	return list
}

// must panics: a buffer never fails.
func (p *page) must(err error) {
	if err != nil {
		panic("reportgen: table: " + err.Error())
	}
}
