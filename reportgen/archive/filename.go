package archive

import (
	"fmt"
	"strings"
	"unicode/utf8"

	"arrestcheck/reportgen"
)

// jsonName returns the name of a file for JSON, which holds any text but no byte
// that is no UTF-8.
func jsonName(name string) string {
	if utf8.ValidString(name) {
		return name
	}
	return fileName(name)
}

// fileName returns the name of a file as a register shows it: on one line, and
// for two files that are not the same, two names. In other texts a line break is
// a blank and a byte that is no UTF-8 a replacement mark; here each is escaped.
func fileName(name string) string {
	plain := true
	for i := 0; i < len(name) && plain; i++ {
		plain = name[i] >= ' ' && name[i] < utf8.RuneSelf
	}
	if plain {
		return name
	}
	var b strings.Builder
	for i := 0; i < len(name); {
		r, size := utf8.DecodeRuneInString(name[i:])
		one := name[i : i+size]
		switch {
		case r == utf8.RuneError && size == 1:
			fmt.Fprintf(&b, `\x%02x`, name[i])
		case r < ' ' || one != reportgen.Printable(one) && reportgen.Printable(one) == " ":
			fmt.Fprintf(&b, `\u%04x`, r)
		default:
			b.WriteString(one)
		}
		i += size
	}
	return b.String()
}
