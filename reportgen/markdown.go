package reportgen

import (
	"bytes"
	"io"
	"strings"
)

// MarkdownOptions say what the place can hold that a Markdown report goes to.
type MarkdownOptions struct {
	ASCII bool // nothing but bytes below 128, as for Text
}

// Markdown writes a report as GitHub flavoured Markdown: headings, lists,
// tables with every line of every cell, what is loud in bold. Nothing in a text
// is taken for markup, wherever it comes from; control characters and marks
// that turn the direction of writing are escaped. The error is that of w.
func Markdown(w io.Writer, r Report, o MarkdownOptions) error {
	m := markdown{ascii: o.ASCII}
	for i := range r.Head {
		m.block(&r.Head[i])
	}
	if len(r.Warnings) > 0 {
		m.heading(warningHeading)
		m.lines(r.Warnings)
	}
	for i := range r.Sections {
		s := &r.Sections[i]
		if len(s.Blocks) == 0 {
			m.part()
			m.line("---")
		}
		m.heading(s.Heading)
		for j := range s.Blocks {
			m.block(&s.Blocks[j])
		}
	}
	_, err := w.Write(m.out.Bytes())
	return err
}

// A markdown is a Markdown report being written.
type markdown struct {
	out   bytes.Buffer
	ascii bool
	star  bool // the bullet of the next list: another one than that of the last
}

// part begins a part that stands apart from what is above it.
func (m *markdown) part() {
	if m.out.Len() > 0 {
		m.out.WriteByte('\n')
	}
}

func (m *markdown) line(s string) {
	m.out.WriteString(s)
	m.out.WriteByte('\n')
}

func (m *markdown) heading(s string) {
	if s != "" {
		m.part()
		m.line("## " + m.text(s))
	}
}

func (m *markdown) block(b *Block) {
	if b.Text != "" {
		m.part()
		m.line(bold(m.text(b.Text), b.Loud))
	}
	m.lines(b.Lines)
	if b.Table != nil {
		m.table(b.Table)
	}
	if b.Figure != nil {
		m.drawing(b.Figure)
	}
}

// lines writes labelled lines as a list; a line without a label goes on with
// the item above it.
func (m *markdown) lines(list []Line) {
	if len(list) == 0 {
		return
	}
	m.part()
	bullet := "- "
	if m.star = !m.star; m.star {
		bullet = "* "
	}
	for i := range list {
		l := &list[i]
		text := m.text(l.Text)
		switch label := strings.TrimSpace(l.Label); {
		case label == "-":
			m.out.WriteString(bullet + text)
		case label == "" && i > 0:
			m.out.WriteString("<br>" + text)
		case label == "":
			m.out.WriteString(bullet + text)
		case l.Loud:
			m.out.WriteString(bullet + bold(m.text(label)+": "+text, true))
		default:
			m.out.WriteString(bullet + bold(m.text(label)+":", true) + " " + text)
		}
		if i == len(list)-1 || list[i+1].Label != "" {
			m.out.WriteByte('\n')
		}
	}
}

func (m *markdown) table(t *Table) {
	m.part()
	m.row(t.Header, false)
	m.line(strings.Repeat("| --- ", len(t.Header)) + "|")
	for i := range t.Rows {
		m.row(t.Rows[i].Cells, t.Rows[i].Loud)
	}
}

func (m *markdown) row(cells []string, loud bool) {
	for _, cell := range cells {
		var lines []string
		for l := range strings.SplitSeq(cell, "\n") {
			if strings.TrimSpace(l) != "" {
				lines = append(lines, bold(m.text(l), loud))
			}
		}
		m.out.WriteString("| " + strings.Join(lines, "<br>") + " ")
	}
	m.line("|")
}

func bold(s string, loud bool) string {
	if s = strings.TrimSpace(s); s == "" || !loud {
		return s
	}
	return "**" + s + "**"
}

// text returns a text in which nothing is markup.
func (m *markdown) text(s string) string {
	return escapeMarkdown(strings.Join(words(breakable(printable(s, m.ascii))), " "))
}

// escapeMarkdown escapes what could be read as markup: the characters that
// are it anywhere, those that are only at the beginning of a line (of a list,
// a heading, a quotation, a formula), and what turns addresses into links.
func escapeMarkdown(s string) string {
	var b strings.Builder
	leading := leadingMark(s)
	for i := range len(s) {
		c := s[i]
		switch {
		case c == '<':
			b.WriteString("&lt;")
			continue
		case c == '>':
			b.WriteString("&gt;")
			continue
		case c == '&':
			b.WriteString("&amp;")
			continue
		case c == '@' && i > 0 && s[i-1] != ' ':
			b.WriteString(noAddress) // a viewer sees an address through an escape
		case i == leading, strings.IndexByte("\\`*_[]|~$@", c) >= 0, linkMark(s, i):
			b.WriteByte('\\')
		}
		b.WriteByte(c)
	}
	return b.String()
}

// noAddress parts what would be read as the address of a mailbox. Nothing of it
// is shown.
const noAddress = "<!-- -->"

// leadingMark returns where a text begins with a character that would make a
// list, a heading, a rule or a formula of it; -1 where it does not.
func leadingMark(s string) int {
	digits := 0
	for digits < len(s) && '0' <= s[digits] && s[digits] <= '9' {
		digits++
	}
	switch {
	case s == "":
	case digits == 0 && strings.IndexByte("-+=#", s[0]) >= 0:
		return 0
	case digits > 0 && digits < len(s) && strings.IndexByte(".)", s[digits]) >= 0 && (digits+1 == len(s) || s[digits+1] == ' '):
		return digits
	}
	return -1
}

// linkMark reports whether the byte at i is what an address is known by.
func linkMark(s string, i int) bool {
	switch s[i] {
	case ':':
		return i > 0 && i+1 < len(s) && s[i+1] != ' '
	case '.':
		return i >= 3 && strings.EqualFold(s[i-3:i], "www")
	}
	return false
}
