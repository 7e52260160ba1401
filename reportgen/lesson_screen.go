package reportgen

import (
	"io"
	"strconv"
	"strings"
)

// The size of a screen of a lesson: that of a projector with large letters.
const (
	screenLines = 40
	screenRoom  = screenLines - 4 // for what is taught; the rest says what it is
)

// Screens lays the sections of a report out as screens of 40 lines, each 80
// columns wide. A section that is longer goes on on the next screen.
func Screens(r Report, o TextOptions) [][]byte {
	var parts [][]string
	for i := range r.Sections {
		p := page{ascii: o.ASCII, paint: newPaint(o.Color)}
		p.section(&r.Sections[i])
		lines := strings.Split(strings.TrimRight(p.out.String(), "\n"), "\n")
		for len(lines) > screenRoom {
			cut := screenRoom
			for cut > screenRoom/2 && lines[cut] != "" {
				cut-- // between two blocks
			}
			parts = append(parts, lines[:cut])
			lines = lines[cut+1:]
		}
		parts = append(parts, lines)
	}
	screens := make([][]byte, len(parts))
	for i, lines := range parts {
		screens[i] = screen(lines, i+1, len(parts), o)
	}
	return screens
}

// screen fills one screen up and says below what it is.
func screen(lines []string, number, of int, o TextOptions) []byte {
	p := page{ascii: o.ASCII, paint: newPaint(o.Color)}
	for _, l := range lines {
		p.line(l)
	}
	for range screenRoom - len(lines) {
		p.line("")
	}
	p.line(p.rule('─', '-', pageWidth))
	p.line(notAPermission)
	p.line(display{}.say(screenOf, strconv.Itoa(number), strconv.Itoa(of)))
	return p.out.Bytes()
}

// WriteScreens writes screens one after the other. The error is that of w.
func WriteScreens(w io.Writer, screens [][]byte) error {
	for i, s := range screens {
		if i > 0 {
			s = append([]byte("\n"), s...)
		}
		if _, err := w.Write(s); err != nil {
			return err
		}
	}
	return nil
}
