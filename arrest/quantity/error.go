package quantity

import (
	"strconv"
	"strings"
)

// An Error says why a text was not read as a figure.
type Error struct {
	// Text is what was written, as it was written: it may hold anything, so
	// print Error() rather than Text.
	Text string
	// Reason says why it is refused. What it quotes of the text is escaped.
	Reason string
	// Example is the right form, ready to follow the word "write" or "for
	// example": a text that Parse reads, or two joined by " or " where what
	// was written can be meant in two ways. It is what was written, put right,
	// where that can be guessed, else a figure of the dimension.
	Example string
	// Rough is true where the text says that the figure is rough, and not how
	// rough. Example is then the figure alone: its tolerance is for the user to
	// measure, and none is made up.
	Rough bool
}

// Error returns the text, quoted and shortened, and the reason.
func (e *Error) Error() string { return quoted(e.Text) + ": " + e.Reason }

// shown is the greatest number of characters of the user's text that a message
// repeats in one place.
const shown = 60

// quoted returns text as every message of this package shows it: in quotes,
// shortened, and with what is not plainly printable escaped.
func quoted(text string) string {
	count := 0
	for i := range text {
		if count == shown {
			return strconv.QuoteToGraphic(text[:i]) + "..."
		}
		count++
	}
	return strconv.QuoteToGraphic(text)
}

// A fault is what is wrong with a text, while it is being looked into.
type fault struct {
	reason string
	// better holds the text with this fault put right, one for each meaning
	// it can have. There may be other faults left in them.
	better []string
	// span asks for a range where an example of the dimension is shown.
	span bool
	// rough says that a tolerance is missing that nobody else can know.
	rough bool
	// readings asks for the examples behind the reason.
	readings bool
}

// explain turns the fault that read stumbled over into an Error. A common
// mistake is named in preference: where read stops at an unknown unit "to", a
// person sees a range.
func explain(d Dimension, text string, f *fault) *Error {
	f = recognised(d, text, f)
	e := &Error{Text: text, Reason: f.reason, Example: f.example(d, 0), Rough: f.rough}
	if f.readings && strings.Contains(e.Example, either) {
		e.Reason += ": " + e.Example
	}
	return e
}

// either joins two right forms.
const either = " or "

// recognised returns the first common mistake found in text, or f.
func recognised(d Dimension, text string, f *fault) *fault {
	for _, look := range [...]func(Dimension, string) *fault{
		oversized, empty, unprintable, dashedRange, notNumber, otherPlusMinus, approximate, oneSided,
		typographic, comma, grouped, exponent, footMarks, strayPoint,
		brackets, splitUnit, unitWithStop,
	} {
		if g := look(d, text); g != nil {
			return g
		}
	}
	return f
}

// chain is the greatest number of faults in one text that are put right one
// after the other.
const chain = 5

// example returns the better texts that can be read, after further repair if
// need be, or else an example of the dimension.
func (f *fault) example(d Dimension, depth int) string {
	var right []string
	for _, text := range f.better {
		if text = repaired(d, text, depth); text != "" && (len(right) == 0 || text != right[0]) {
			right = append(right, text)
		}
	}
	switch {
	case len(right) > 0:
		return strings.Join(right, either)
	case depth > 0:
		return ""
	case f.span:
		return dimensions[d].span
	}
	return d.Example()
}

// repaired returns text if it can be read, else what its own fault suggests,
// else "".
func repaired(d Dimension, text string, depth int) string {
	_, f := read(d, text)
	if f == nil {
		return text
	}
	if depth == chain {
		return ""
	}
	return recognised(d, text, f).example(d, depth+1)
}
