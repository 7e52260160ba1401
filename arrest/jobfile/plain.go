package jobfile

import (
	"strconv"
	"strings"
	"unicode/utf8"
)

// shown is the greatest number of runes of a user's text in a message.
const shown = 80

// quote returns a user's text for a message: shortened, in quotes, and every
// character that does not print plainly written as an escape. A text that holds
// quotes itself, a line of a file, stands between backquotes where it can.
func quote(text string) string {
	text = short(text)
	if strings.Contains(text, `"`) && strconv.CanBackquote(text) && plain(text) == text {
		return "`" + text + "`"
	}
	return strconv.Quote(text)
}

// short cuts a text that would fill the message.
func short(text string) string {
	n := 0
	for i := range text {
		if n == shown {
			return text[:i] + "..."
		}
		n++
	}
	return text
}

// plain escapes in a whole message what does not print plainly: control
// characters, marks that turn the direction of writing, bytes that are no text.
func plain(s string) string {
	if !strings.ContainsFunc(s, unprintable) {
		return s
	}
	var b strings.Builder
	for len(s) > 0 {
		r, size := utf8.DecodeRuneInString(s)
		if unprintable(r) {
			escaped := strconv.Quote(s[:size])
			b.WriteString(escaped[1 : len(escaped)-1])
		} else {
			b.WriteRune(r)
		}
		s = s[size:]
	}
	return b.String()
}

func unprintable(r rune) bool { return r == utf8.RuneError || !strconv.IsPrint(r) }

// part returns one part of a dotted key, in quotes where TOML would ask for them.
func part(name string) string {
	if name == "" || strings.ContainsFunc(name, quoted) {
		return strconv.Quote(short(name))
	}
	return short(name)
}

func quoted(r rune) bool {
	return r != '_' && r != '-' && (r < '0' || r > '9') && (r < 'a' || r > 'z') && (r < 'A' || r > 'Z')
}

// join puts a part at the end of a dotted key.
func join(path, name string) string {
	if path == "" {
		return part(name)
	}
	return path + "." + part(name)
}

// element returns the key of the n-th element, counted from 0, of a list.
func element(path string, n int) string { return path + "[" + strconv.Itoa(n+1) + "]" }
