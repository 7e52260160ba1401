package jobfile

import (
	"bytes"
	"fmt"
	"slices"
	"unicode/utf8"

	"github.com/BurntSushi/toml"
)

// largest is the greatest size of a file, in bytes. A job is about a thousand
// bytes; whatever is a thousand times that was not typed.
const largest = 1 << 20

// byteOrderMark may stand before the first line of a UTF-8 file; some editors
// write it. It is no part of the text.
const byteOrderMark = "\xef\xbb\xbf"

// A page is one file while it is read.
type page struct {
	name   string
	data   []byte
	groups groups
	faults []Fault // Line is filled in by finish
	at     []string
	marks  marks               // nil until asked for
	ids    []id                // names of the limits in it
	sets   map[string]Override // what overrides have put, by dotted key
}

// fault records a fault. at is the key whose line is shown, key the key named.
func (pg *page) fault(at, key, text, reason, hint string) {
	f := Fault{File: pg.name, Key: key, Text: text, Reason: reason, Hint: hint}
	if o, name, is := pg.setBy(key); is {
		f.blame(o, name)
		at = ""
	}
	pg.faults = append(pg.faults, f)
	pg.at = append(pg.at, at)
}

// whole records a fault of the file as a whole, at a line that may be 0.
func (pg *page) whole(line int, text, reason, hint string) {
	pg.faults = append(pg.faults, Fault{File: pg.name, Line: line, Text: text, Reason: reason, Hint: hint})
	pg.at = append(pg.at, "")
}

// finish returns the faults with their lines, in line order.
func (pg *page) finish() []Fault {
	for i := range pg.faults {
		if f := &pg.faults[i]; f.Line == 0 && pg.at[i] != "" {
			f.Line = pg.line(pg.at[i])
		}
	}
	slices.SortStableFunc(pg.faults, byLine)
	return pg.faults
}

// line returns the line on which a key, or else the nearest thing around it,
// is written; 0 when none is.
func (pg *page) line(key string) int {
	if pg.marks == nil {
		pg.marks = scan(pg.data)
	}
	return pg.marks.line(key)
}

// decode returns the file as TOML reads it. It returns nil after a fault that
// leaves nothing to look at.
func (pg *page) decode() (top map[string]any) {
	if !pg.readable() {
		return nil
	}
	defer func() {
		// The decoder calls panic where it finds a mistake of its own.
		if r := recover(); r != nil {
			pg.whole(0, "", "the file is not read as TOML: "+firstLine(fmt.Sprint(r)), tomlHint)
			top = nil
		}
	}()
	var tree any
	if _, err := toml.NewDecoder(bytes.NewReader(pg.data)).Decode(&tree); err != nil {
		pg.syntax(err)
		return nil
	}
	top, _ = tree.(map[string]any)
	return top
}

// readable records what keeps the bytes from being read as TOML at all.
func (pg *page) readable() bool {
	switch i := invalid(pg.data); {
	case len(pg.data) > largest:
		pg.whole(0, "", fmt.Sprintf("the file is larger than %d bytes", largest),
			"write: one job, or the limits of one document, in a file of its own")
	case bytes.HasPrefix(pg.data, []byte("\xff\xfe")), bytes.HasPrefix(pg.data, []byte("\xfe\xff")):
		pg.whole(1, "", "the file is UTF-16, not UTF-8", "save: the file again as UTF-8")
	case i >= 0:
		line := 1 + bytes.Count(pg.data[:i], []byte("\n"))
		pg.whole(line, "", fmt.Sprintf("byte %d of the file, 0x%02x, is not UTF-8", i+1, pg.data[i]),
			"save: the file again as UTF-8")
	case len(bytes.TrimSpace(bytes.TrimPrefix(pg.data, []byte(byteOrderMark)))) == 0:
		pg.whole(0, "", "the file is empty", pg.groups[""].named["format"].hint())
	case crowded(pg.data):
		pg.whole(0, "", "the file is nested too deeply to be a job or a limit set",
			"write: sections, keys and one inline table for a figure, as in "+exampleLine)
	case overfull(pg.data):
		pg.whole(0, "", fmt.Sprintf("the file has more than %d sections or %d keys", mostSections, mostKeys),
			"write: one job, or the limits of one document, in a file of its own")
	default:
		return true
	}
	return false
}

// No job and no limit set of one document comes near these: beyond them nobody
// reads the report, and the faults of a spoiled file would fill hours.
const (
	mostSections = 400
	mostKeys     = 6000
)

// overfull reports whether a file has more sections or keys than anybody can
// read, by the lines that begin with a bracket and by the equal signs.
func overfull(data []byte) bool {
	if bytes.Count(data, []byte("=")) > mostKeys {
		return true
	}
	if bytes.Count(data, []byte("[")) <= mostSections {
		return false
	}
	sections := 0
	for line := range bytes.Lines(data) {
		if bytes.HasPrefix(bytes.TrimLeft(line, " \t"), []byte("[")) {
			sections++
		}
	}
	return sections > mostSections
}

// invalid returns the place of the first byte that is not UTF-8, or -1.
func invalid(data []byte) int {
	if utf8.Valid(data) {
		return -1
	}
	at := 0
	for at < len(data) {
		r, size := utf8.DecodeRune(data[at:])
		if r == utf8.RuneError && size <= 1 {
			break
		}
		at += size
	}
	return at
}

// crowded reports whether a file is so deeply nested, or has keys of so many
// parts, that decoding it would take forever. Files of a usual size never do.
func crowded(data []byte) bool {
	const usual, deepest = 16 << 10, 1000
	if len(data) <= usual {
		return false
	}
	depth, dots := 0, 0
	for _, c := range data {
		switch c {
		case '[', '{':
			depth++
		case ']', '}':
			depth--
		case '.':
			dots++
		case '\n':
			dots = 0
		}
		if depth > deepest || dots > deepest {
			return true
		}
	}
	return false
}
