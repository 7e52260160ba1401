package quantity

import (
	"strconv"
	"strings"
	"unicode"
	"unicode/utf8"
)

// The functions of this file and of number.go recognise what people commonly
// write where Parse reads something else. Each looks at a whole text that Parse
// has refused, and returns nil if its mistake is not in it.

// oversized finds a text longer than Parse reads.
func oversized(_ Dimension, text string) *fault {
	if len(text) <= longest {
		return nil
	}
	return tooLong(text)
}

// tooLong is the fault of a text longer than Parse reads.
func tooLong(text string) *fault {
	return &fault{reason: strconv.Itoa(len(text)) + " bytes are too long for a figure; " +
		strconv.Itoa(longest) + " are read"}
}

// empty finds nothing.
func empty(_ Dimension, text string) *fault {
	if strings.TrimSpace(text) != "" {
		return nil
	}
	return &fault{reason: "nothing is written"}
}

// unprintable finds what a reader of the text cannot see.
func unprintable(_ Dimension, text string) *fault {
	if !utf8.ValidString(text) {
		return &fault{
			reason: "the text is not valid UTF-8; it may have been saved in another encoding",
			better: []string{tidy(strings.ToValidUTF8(text, ""))},
		}
	}
	hidden := strings.IndexFunc(text, invisible)
	if hidden < 0 {
		return nil
	}
	r, _ := utf8.DecodeRuneInString(text[hidden:])
	return &fault{
		reason: "the text holds " + codePoint(r) + ", a character that does not show",
		better: []string{tidy(strings.Map(visible, text))},
	}
}

// visible returns ' ' for a space of any kind, -1 for what does not show, and
// any other r as it is.
func visible(r rune) rune {
	switch {
	case unicode.IsSpace(r):
		return ' '
	case invisible(r):
		return -1
	}
	return r
}

// tidy returns text with single spaces, and none at its ends.
func tidy(text string) string { return strings.Join(strings.Fields(text), " ") }

// invisible reports whether r is a control or format character.
func invisible(r rune) bool { return !unicode.IsGraphic(r) }

// codePoint returns r as U+00B5.
func codePoint(r rune) string {
	hex := strings.ToUpper(strconv.FormatInt(int64(r), 16))
	return "U+" + strings.Repeat("0", max(0, 4-len(hex))) + hex
}

// typographic finds a character outside ASCII other than ±.
func typographic(_ Dimension, text string) *fault {
	at := strings.IndexFunc(text, func(r rune) bool { return r >= utf8.RuneSelf && r != '±' })
	if at < 0 {
		return nil
	}
	r, _ := utf8.DecodeRuneInString(text[at:])
	name := quoted(string(r)) + " (" + codePoint(r) + ")"
	plain, ok := plainly(r)
	switch {
	case unicode.IsDigit(r):
		name += " is not one of the digits 0 to 9"
	case ok && strings.TrimSpace(plain) == "":
		name = "the special space " + codePoint(r) + " is not read, only the ordinary one"
	case ok:
		name += " is not read; it is written " + quoted(strings.TrimSpace(plain))
	default:
		return &fault{reason: name + " is no part of a figure or of a unit"}
	}
	return &fault{reason: name, better: []string{tidy(asPlain(text))}}
}

// asPlain returns text with every typographic character plainly written.
func asPlain(text string) string {
	var plain strings.Builder
	for _, r := range text {
		if p, ok := plainly(r); ok {
			plain.WriteString(p)
		} else {
			plain.WriteRune(r)
		}
	}
	return plain.String()
}

// plainly returns how a typographic character is written in ASCII.
func plainly(r rune) (string, bool) {
	switch {
	case r < utf8.RuneSelf || r == '±':
		return "", false
	case unicode.Is(unicode.Zs, r):
		return " ", true
	case '！' <= r && r <= '～': // full-width forms of ! to ~
		return string(r - '！' + '!'), true
	}
	for _, g := range glyphs {
		if strings.ContainsRune(g.like, r) {
			return g.plain, true
		}
	}
	return "", false
}

// glyphs lists typographic characters by what they are written as.
var glyphs = [...]struct{ like, plain string }{
	{"−–—‐‑‒―﹣", "-"},
	{"·⋅×∙•∗", "*"},
	{"⁄∕÷", "/"},
	{"²", "2"},
	{"°º˚", " deg"},
	{"′’‘ʹ", "'"},
	{"″”“ʺ", `"`},
	{"…", ".."},
	{"∓", "±"},
	{"≈≅∼≃", "~"},
	{"≤⩽≦", "<"},
	{"≥⩾≧", ">"},
	{"½", " 1/2"}, {"¼", " 1/4"}, {"¾", " 3/4"},
	{"⅛", " 1/8"}, {"⅜", " 3/8"}, {"⅝", " 5/8"}, {"⅞", " 7/8"},
}

// dashedRange finds a range written with something else than "..".
func dashedRange(d Dimension, text string) *fault {
	if rest, ok := after(text, "between "); ok {
		return rangeWith(d, rest, " and ")
	}
	if rest, ok := after(text, "from "); ok {
		text = rest
	}
	for _, mark := range [...]string{"-", "–", "—", "−", "...", "…", "~", " to ", " through ", " until "} {
		if f := rangeWith(d, text, mark); f != nil {
			return f
		}
	}
	return nil
}

// rangeWith finds two ends with mark between them. Feet and inches, or a whole
// number and its fraction, with a dash between them are one figure.
func rangeWith(d Dimension, text, mark string) *fault {
	for at := range text {
		low := strings.TrimRight(text[:at], " ")
		if !startsWith(text[at:], mark) || !endsFigure(low) {
			continue
		}
		high := strings.TrimLeft(text[at+len(mark):], " ")
		joined := low + " " + high
		if _, f := read(d, joined); f == nil && len(mark) == 1 {
			return &fault{reason: "the parts of one figure stand apart by a space, not by " + quoted(mark), better: []string{joined}}
		}
		span := low + " .. " + high
		if _, f := read(d, span); f == nil || f.span {
			return &fault{
				reason: notDots(mark),
				better: []string{span},
				span:   true,
			}
		}
	}
	return nil
}

// notDots says that a range was written with mark.
func notDots(mark string) string {
	return `a range is written with "..", not with ` + quoted(strings.TrimSpace(mark))
}

// endsFigure reports whether text ends like a figure does.
func endsFigure(text string) bool {
	if text == "" {
		return false
	}
	last := text[len(text)-1]
	return isDigit(last) || isLetter(last) || last == '%'
}

// otherPlusMinus finds a tolerance written with something else than "±" or
// "+/-".
func otherPlusMinus(_ Dimension, text string) *fault {
	for _, mark := range [...]string{"+-", "-+", "+ -", "-/+", "+ /-", "+/ -", "+ / -", `+\-`, "∓", "+/−", "+−",
		"plus or minus", "plus/minus", "plus-minus", "plus minus"} {
		for at := range text {
			if startsWith(text[at:], mark) {
				return &fault{
					reason: quoted(text[at:at+len(mark)]) + " is written ± or +/-",
					better: []string{text[:at] + "±" + text[at+len(mark):]},
				}
			}
		}
	}
	return nil
}

// approximate finds a figure that is said to be rough.
func approximate(_ Dimension, text string) *fault {
	for _, word := range [...]string{"~", "≈", "about ", "approximately ", "approx. ", "approx ", "around ", "roughly ",
		"circa ", "ca. ", "ca ", "some "} {
		if rest, ok := after(text, word); ok {
			return &fault{
				reason: quoted(strings.TrimSpace(word)) + " does not say how far off the figure may be; measure it, and write it with your own measured tolerance, or as a range",
				better: []string{rest},
				rough:  strings.ContainsFunc(rest, func(r rune) bool { return r < utf8.RuneSelf && isDigit(byte(r)) }),
			}
		}
	}
	return nil
}

// oneSided finds a figure that is said to be a lower or an upper end.
func oneSided(_ Dimension, text string) *fault {
	for _, word := range [...]string{"<=", "<", "≤", "at most ", "up to ", "max. ", "max ", "maximum ", "less than ",
		"no more than ", "not more than ", "below ", "under "} {
		if rest, ok := after(text, word); ok {
			return &fault{
				reason: quoted(strings.TrimSpace(word)) + " leaves the lower end open; write both ends",
				better: []string{"0 .. " + rest},
				span:   true,
			}
		}
	}
	for _, word := range [...]string{">=", ">", "≥", "at least ", "min. ", "min ", "minimum ", "more than ",
		"no less than ", "not less than ", "above ", "over "} {
		if _, ok := after(text, word); ok {
			return &fault{
				reason: quoted(strings.TrimSpace(word)) + " leaves the upper end open; write both ends",
				span:   true,
			}
		}
	}
	return nil
}

// brackets finds brackets of any kind.
func brackets(_ Dimension, text string) *fault {
	const all = "()[]{}"
	at := strings.IndexAny(text, all)
	if at < 0 {
		return nil
	}
	return &fault{
		reason: "brackets such as " + quoted(text[at:at+1]) + " are not read",
		better: []string{strings.Map(func(r rune) rune {
			if strings.ContainsRune(all, r) {
				return -1
			}
			return r
		}, text)},
	}
}

// footMarks finds feet and inches written with ' and ".
func footMarks(d Dimension, text string) *fault {
	if d != Length || !strings.ContainsAny(text, `'"`) {
		return nil
	}
	spelled := strings.NewReplacer("''", " in ", "'-", " ft ", "' -", " ft ", "'", " ft ", `"`, " in ").Replace(text)
	return &fault{
		reason: `feet and inches are written ft and in, not ' and "`,
		better: []string{tidy(spelled)},
	}
}

// splitUnit finds a unit of several parts with spaces between them.
func splitUnit(d Dimension, text string) *fault {
	for _, split := range [...][2]string{
		{" per cent", " %"}, {" / ", "/"}, {" /", "/"}, {"/ ", "/"}, {" per ", "/"}, {" * ", "*"},
		{"ft lbs", "ft*lbf"}, {"ft lbf", "ft*lbf"}, {"ft lb", "ft*lbf"}, {"foot pounds", "ft*lbf"},
		{"N s", "N*s"}, {"lbf s", "lbf*s"}, {"kN m", "kJ"}, {"N m", "J"}, {"kg m/s", "N*s"},
	} {
		whole := strings.ReplaceAll(text, split[0], split[1])
		if _, f := read(d, whole); f != nil || whole == text {
			continue
		}
		f := &fault{reason: "a unit is written without spaces", better: []string{whole}}
		if strings.ReplaceAll(split[0], " ", "") != split[1] {
			f.reason = quoted(strings.TrimSpace(split[0])) + " is written " + strings.TrimSpace(split[1])
		}
		return f
	}
	return nil
}

// unitWithStop finds the full stop of an abbreviation.
func unitWithStop(_ Dimension, text string) *fault {
	for at := 1; at < len(text); at++ {
		if text[at] == '.' && isLetter(text[at-1]) && (at+1 == len(text) || text[at+1] == ' ') {
			return &fault{
				reason: "a unit has no full stop",
				better: []string{text[:at] + text[at+1:]},
			}
		}
	}
	return nil
}

// after returns what stands after word, if text begins with it.
func after(text, word string) (string, bool) {
	text = strings.TrimLeft(text, " ")
	if !startsWith(text, word) {
		return "", false
	}
	return strings.TrimSpace(text[len(word):]), true
}

// startsWith reports whether text begins with word, capitals or not.
func startsWith(text, word string) bool {
	return len(text) >= len(word) && strings.EqualFold(text[:len(word)], word)
}
