package jobfile

import (
	"errors"
	"fmt"
	"regexp"
	"strconv"
	"strings"
	"sync"

	"github.com/BurntSushi/toml"
)

const (
	exampleLine = `mass = { value = "92 kg ± 1 kg", source = "measured" }`
	tomlHint    = `write: text and figures in double quotes, one key a line, as in ` + exampleLine
)

// syntax records what the decoder could not read. It stops at the first fault.
func (pg *page) syntax(err error) {
	var pe toml.ParseError
	if !errors.As(err, &pe) {
		pg.whole(0, "", "not read as TOML: "+firstLine(err.Error()), tomlHint)
		return
	}
	line, text := pg.lineAt(pe.Position.Start)
	reason, hint := pg.syntaxWords(pe.Message, text)
	pg.whole(line, text, reason, hint)
}

// lineAt returns the line that holds a byte of the file, and what is written
// on it. The decoder's own line is one too far where a heading is not closed.
func (pg *page) lineAt(start int) (line int, text string) {
	data := strings.TrimPrefix(string(pg.data), byteOrderMark)
	start = min(max(start, 0), len(data))
	line = 1 + strings.Count(data[:start], "\n")
	text = data[1+strings.LastIndexByte(data[:start], '\n'):]
	return line, strings.TrimSpace(firstLine(text))
}

// syntaxWords turns the decoder's message about a line into a reason and a
// next action.
func (pg *page) syntaxWords(message, line string) (reason, hint string) {
	name, right, isPair := strings.Cut(line, "=")
	name, right = strings.TrimSpace(name), strings.TrimSpace(right)
	says := func(part string) bool { return strings.Contains(message, part) }
	switch {
	case says("already"):
		return "this is written twice", "write: each key and each [section] once; " + pg.groups.repeated() + " may stand several times"
	case says("control characters"), says("NULL"):
		return "the line holds a control character, which does not show", "take out: the character, or type the line anew"
	case says("invalid escape"):
		return `in double quotes a \ begins an escape`, `write: \\ for one \, or the text in single quotes`
	case says("cannot contain newlines"):
		return "a quote is opened and not closed on the line", `write: ` + name + ` = "..." with both quotes`
	case isPair && footMarks().MatchString(right):
		return `feet and inches are written ft and in, not ' and "`, "write: " + name + " = " + strconv.Quote(spelledFeet(right))
	case isPair && right == "":
		return "nothing stands after the =", pg.example(name, "...") + ", or take the line out"
	case isPair && !strings.ContainsAny(right[:1], `"'[{`):
		right, _, _ = strings.Cut(right, " #")
		return "text, and figures with their unit, stand in double quotes", pg.example(name, strings.Trim(right, `"' `))
	case strings.HasPrefix(line, "["):
		return "the heading of a section is not read: " + firstLine(message), "write: one of " + pg.groups.headings()
	case !isPair:
		return "a key is followed by = and its value: " + firstLine(message), tomlHint
	}
	return "not read as TOML: " + firstLine(message), tomlHint
}

// footMarks finds feet and inches as they are written by hand: 5'6", 6', 5'-6".
var footMarks = sync.OnceValue(func() *regexp.Regexp {
	return regexp.MustCompile(`^["']?\s*([0-9]+)\s*'\s*-?\s*(?:([0-9]+(?:\.[0-9]+)?)\s*(?:"|'')?)?["']*\s*(?:#.*)?$`)
})

// spelledFeet spells a figure that footMarks finds.
func spelledFeet(right string) string {
	m := footMarks().FindStringSubmatch(right)
	if m[2] == "" {
		return m[1] + " ft"
	}
	return m[1] + " ft " + m[2] + " in"
}

// example returns a line put right: with the example of the key where that
// stands without quotes, else with the text in quotes.
func (pg *page) example(name, text string) string {
	if in := pg.groups.find(name); len(in) > 0 {
		if k := pg.groups[in[0]].named[name]; k.Kind == Integer || k.Kind == Boolean || k.Kind == Files || text == "..." {
			return k.hint()
		}
	}
	return fmt.Sprintf(`write: %s = "%s"`, name, text)
}

// headings lists the sections of a file.
func (all groups) headings() string {
	var list []string
	for _, k := range all[""].keys {
		if k.Kind == Section || k.Kind == Sections {
			list = append(list, k.line())
		}
	}
	return strings.Join(list, ", ")
}

// repeated lists the sections that may stand several times.
func (all groups) repeated() string {
	var list []string
	for _, k := range all[""].keys {
		if k.Several || k.Kind == Sections {
			list = append(list, "[["+k.Name+"]]")
		}
	}
	return strings.Join(list, ", ")
}

func firstLine(s string) string {
	s, _, _ = strings.Cut(s, "\n")
	return s
}
