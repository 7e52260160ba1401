package reportgen

import (
	"strings"
	"unicode"
	"unicode/utf8"
)

// longestOnPageOne is how many characters of a text of the user page 1 shows.
const longestOnPageOne = 200

// quote returns a text of the user as page 1 shows it: in quotation marks that
// none of its own can close, so that nobody takes it for the program's words,
// and cut where it is long. The whole of it stands behind page 1.
func quote(s string) string {
	if s == "" {
		return ""
	}
	return `"` + strings.ReplaceAll(cut(s), `"`, "'") + `"`
}

// cut returns a text of the user on one line, no longer than page 1 shows it.
func cut(s string) string {
	s = flat(s)
	if utf8.RuneCountInString(s) <= longestOnPageOne {
		return s
	}
	return string([]rune(s)[:longestOnPageOne]) + "..."
}

// longTexts are the texts that page 1 cuts, whole.
func (b *builder) longTexts() []Section {
	var list []Line
	add := func(label, text string) {
		if flat(text) != cut(text) {
			list = append(list, Line{Label: label, Text: text})
		}
	}
	for _, l := range b.userTexts() {
		add(l.Label, l.Text)
	}
	for _, e := range b.asd().Elsewhere {
		add(elsewhereLabel, e.Where)
	}
	add(preparedLabel, b.s.File.Document.PreparedBy)
	add(checkedLabel, b.s.File.Document.CheckedBy)
	if len(list) == 0 {
		return nil
	}
	return []Section{{longTextsHeading, []Block{{Lines: list}}}}
}

// IsRescue reports whether a text names a rescue method: that nobody has one,
// or not yet, does not.
func IsRescue(text string) bool {
	if !strings.ContainsFunc(text, unicode.IsLetter) {
		return false
	}
	words := strings.Join(strings.Fields(strings.ToLower(text)), " ")
	for _, none := range noRescueWords {
		if strings.Trim(words, " .!?-") == none {
			return false
		}
	}
	return true
}
