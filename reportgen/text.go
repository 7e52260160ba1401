package reportgen

import (
	"bytes"
	"io"
	"strings"

	"github.com/olekukonko/tablewriter/renderer"
)

// TextOptions say what the place can show that a text report goes to.
type TextOptions struct {
	ASCII bool // nothing but bytes below 128: our own marks are replaced, those of the user escaped
	Color bool // emphasis by colour; the words say the same without
}

// Text writes a report as plain text, no line wider than 80 characters.
// Control characters and marks that turn the direction of writing are escaped
// wherever they come from. The error is that of w.
func Text(w io.Writer, r Report, o TextOptions) error {
	p := page{ascii: o.ASCII, paint: newPaint(o.Color)}
	for i := range r.Head {
		if b := &r.Head[i]; !b.empty() {
			p.gap()
			p.block(b)
		}
	}
	p.warnings(r.Warnings)
	for i := range r.Sections {
		p.section(&r.Sections[i])
	}
	_, err := w.Write(p.out.Bytes())
	return err
}

// A page is a text report being written.
type page struct {
	out   bytes.Buffer
	ascii bool
	paint paint

	tables *renderer.Blueprint // nil before the first table
	tabled bytes.Buffer        // what it has written
}

// gap leaves a blank line, except at the very top.
func (p *page) gap() {
	if p.out.Len() > 0 {
		p.out.WriteByte('\n')
	}
}

func (p *page) line(s string) {
	p.out.WriteString(strings.TrimRight(strings.ReplaceAll(s, noBreak, " "), " "))
	p.out.WriteByte('\n')
}

func (p *page) printable(s string) string { return printable(s, p.ascii) }

// warnings writes "WARNING: read first" between two rules.
func (p *page) warnings(list []Line) {
	if len(list) == 0 {
		return
	}
	p.gap()
	p.line(p.rule('━', '=', pageWidth))
	p.line(p.paint.alarm(warningHeading))
	p.line(p.rule('━', '=', pageWidth))
	p.lines(list)
	p.line(p.rule('━', '=', pageWidth))
}

func (p *page) rule(fine, ascii rune, n int) string {
	if p.ascii {
		fine = ascii
	}
	return strings.Repeat(string(fine), n)
}

func (p *page) section(s *Section) {
	p.gap()
	if s.Heading != "" {
		for _, l := range wrap(p.printable(s.Heading), pageWidth) {
			p.line(p.paint.strong(l))
		}
		p.line(p.rule('─', '-', min(width(s.Heading), pageWidth)))
	}
	for i := range s.Blocks {
		if i > 0 {
			p.gap()
		}
		p.block(&s.Blocks[i])
	}
}

func (p *page) block(b *Block) {
	if b.Text != "" {
		for _, l := range wrap(p.printable(b.Text), pageWidth) {
			if b.Loud {
				l = p.paint.strong(l)
			}
			p.line(l)
		}
	}
	p.lines(b.Lines)
	if b.Table != nil {
		p.table(b.Table)
	}
	if b.Figure != nil {
		p.out.Write(b.Figure.Characters(figureCells(b.Figure, p.ascii)))
	}
}

// widestLabel is the width beyond which a label stands on a line of its own.
const widestLabel = 18

// lines writes labelled lines, the texts one under the other.
func (p *page) lines(list []Line) {
	column := 0
	for i := range list {
		w := width(p.printable(list[i].Label))
		if w > widestLabel {
			w = 2 // on a line of its own, the text below it
		}
		column = max(column, w)
	}
	indent := ""
	if column > 0 {
		indent = strings.Repeat(" ", column+2)
	}
	for i := range list {
		p.labelled(&list[i], indent)
	}
}

func (p *page) labelled(l *Line, indent string) {
	label := p.printable(l.Label)
	text := wrap(p.printable(l.Text), pageWidth-len(indent))
	lead := indent
	switch {
	case width(label) > widestLabel:
		for _, part := range wrap(label, pageWidth) {
			p.line(p.emphasis(part, l.Loud))
		}
	case label != "":
		lead = p.emphasis(label, l.Loud) + indent[width(label):]
	}
	for _, t := range text {
		p.line(lead + p.emphasis(t, l.Loudest))
		lead = indent
	}
}

func (p *page) emphasis(s string, loud bool) string {
	if loud {
		return p.paint.alarm(s)
	}
	return s
}
