package quantity

import "strconv"

// An Error says why a text was not read as a figure.
type Error struct {
	Text    string // what was written, as it was written
	Reason  string // why it is refused
	Example string // the right form, ready to follow the word "write"
}

// Error returns the text, quoted and shortened, and the reason.
func (e *Error) Error() string { return quoted(e.Text) + ": " + e.Reason }

// shown is the greatest number of runes of the user's text in a message.
const shown = 60

// quoted returns text for a message: in quotes, shortened, with every
// character that is not plainly printable escaped.
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
