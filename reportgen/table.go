package reportgen

import (
	"reflect"
	"strings"

	"github.com/olekukonko/tablewriter"
	"github.com/olekukonko/tablewriter/pkg/twcache"
	"github.com/olekukonko/tablewriter/renderer"
	"github.com/olekukonko/tablewriter/tw"
)

// table writes a table. Cells are wrapped here, to the widths of the table:
// the table writer would break words, and count more than 80.
func (p *page) table(t *Table) {
	table := p.tableWriter(t)
	table.Header(p.cells(t.Header, t.Widths, p.paint.strong))
	for i := range t.Rows {
		paint := plainText
		if t.Rows[i].Loud {
			paint = p.paint.alarm
		}
		p.must(table.Append(p.cells(t.Rows[i].Cells, t.Widths, paint)))
	}
	p.must(table.Render())
	for l := range strings.Lines(p.tabled.String()) {
		p.line(strings.TrimSuffix(l, "\n"))
	}
}

// tableWriter returns the writer of the tables of the page, empty and set for t.
// It is made once, and its cache of how types are printed, of which only texts
// are, is kept small: both would take longer than the tables.
func (p *page) tableWriter(t *Table) *tablewriter.Table {
	p.tabled.Reset()
	if p.tables == nil {
		p.tables = tablewriter.NewTable(&p.tabled,
			tablewriter.WithStringerCacheCustom(twcache.NewLRU[reflect.Type, reflect.Value](1)),
			tablewriter.WithEastAsian(tw.Off),
			tablewriter.WithHeaderAutoFormat(tw.Off),
			tablewriter.WithTrimSpace(tw.Off),
			tablewriter.WithHeaderAutoWrap(tw.WrapNone),
			tablewriter.WithRowAutoWrap(tw.WrapNone),
			tablewriter.WithHeaderAlignment(tw.AlignLeft),
			tablewriter.WithRowAlignment(tw.AlignLeft),
		)
	}
	p.tables.Reset()
	return p.tables.Options(
		tablewriter.WithHeaderPaddingPerColumn(betweenColumns(len(t.Header))),
		tablewriter.WithRowPaddingPerColumn(betweenColumns(len(t.Header))),
		tablewriter.WithRenderer(renderer.NewBlueprint(p.rendition(t.Rules))),
	)
}

// betweenColumns leaves two blanks after each of n columns but the last.
func betweenColumns(n int) []tw.Padding {
	padding := make([]tw.Padding, n)
	for i := range padding {
		padding[i] = tw.Padding{Right: "  ", Overwrite: true}
	}
	padding[n-1] = tw.Padding{Overwrite: true}
	return padding
}

func plainText(s string) string { return s }

// rendition has no frame, a rule under the head and one between rows.
func (p *page) rendition(rules bool) tw.Rendition {
	rule := p.rule('─', '-', 1)
	between := tw.Off
	if rules {
		between = tw.On
	}
	return tw.Rendition{
		Borders: tw.BorderNone,
		Symbols: tw.NewSymbolCustom("rules").WithRow(rule).WithCenter(rule).WithColumn(""),
		Settings: tw.Settings{
			Separators: tw.Separators{ShowHeader: tw.On, ShowFooter: tw.Off, BetweenRows: between, BetweenColumns: tw.Off},
			Lines:      tw.Lines{ShowTop: tw.Off, ShowBottom: tw.Off, ShowHeaderLine: tw.On, ShowFooterLine: tw.Off},
		},
	}
}

// cells wraps each cell to its column and paints every line of it.
func (p *page) cells(cells []string, widths []int, paint func(string) string) []string {
	list := make([]string, len(cells))
	for i, cell := range cells {
		var lines []string
		for _, part := range strings.Split(cell, "\n") {
			for _, l := range wrap(p.printable(part), widths[i]) {
				lines = append(lines, paint(strings.ReplaceAll(l, noBreak, " ")))
			}
		}
		list[i] = strings.Join(lines, "\n")
	}
	return list
}

// must panics: a buffer never fails, and the cells match the header.
func (p *page) must(err error) {
	if err != nil {
		panic("reportgen: table: " + err.Error())
	}
}
