package reportgen

import "strings"

// EscapeJSON escapes in a JSON document what does not show by itself, as JSON
// does it, so that the document can go to a terminal. A reader decodes the same
// texts as before.
func EscapeJSON(document string) string {
	if plain(strings.TrimSuffix(document, "\n")) { // most are
		return document
	}
	return escapeJSON(document)
}

// Printable returns a text of a user's as it may reach a terminal or a plain
// file: control characters and the like are escaped, line breaks are blanks.
func Printable(text string) string { return breakable(printable(text, false)) }

// PrintableASCII is Printable with nothing but bytes below 128.
func PrintableASCII(text string) string { return breakable(printable(text, true)) }
