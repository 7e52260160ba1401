package jobfile

import (
	"cmp"
	"fmt"
	"slices"
	"strings"
)

// A Fault is one thing wrong with a file.
type Fault struct {
	File   string // as the user gave it
	Line   int    // 0 where not known
	Key    string // "worker.mass", "rated[1].total_mass"; empty for the file as a whole
	Text   string // the offending text as written, unquoted; empty where there is none
	Reason string
	Hint   string // the next action with a right example, "write: mass = ..."; may have several lines

	// Unreadable is true where the file itself could not be read (no right to,
	// broken disk), so that nothing can be said about what is written in it.
	Unreadable bool
}

// Faults is every fault of a run: the job's first, then those of each limit
// file in the order in which the job names them, each in line order.
type Faults struct{ List []Fault }

// mostPrinted is how many faults a message holds. Nobody corrects more at a time.
const mostPrinted = 200

// Error prints the faults, each with its next action below it, and how many
// there are. Of more than 200 it prints the first 200; List holds them all.
// What a user typed is quoted; none of its control characters get through.
func (f *Faults) Error() string {
	var b strings.Builder
	files := map[string]bool{}
	for i := range f.List {
		if i < mostPrinted {
			f.List[i].print(&b)
		}
		files[f.List[i].File] = true
	}
	if more := len(f.List) - mostPrinted; more > 0 {
		fmt.Fprintf(&b, "and %s more, not printed\n", count(more, "fault"))
	}
	b.WriteString(count(len(f.List), "fault"))
	if len(files) > 1 {
		b.WriteString(" in " + count(len(files), "file"))
	}
	b.WriteString("; nothing was calculated")
	return b.String()
}

// Unreadable reports whether a file of the run could not be read at all.
func (f *Faults) Unreadable() bool {
	return slices.ContainsFunc(f.List, func(f Fault) bool { return f.Unreadable })
}

func (f *Fault) print(b *strings.Builder) {
	b.WriteString(plain(shownName(f.File)))
	if f.Line > 0 {
		fmt.Fprintf(b, ":%d", f.Line)
	}
	if f.Key != "" {
		b.WriteString(": " + plain(f.Key))
	}
	if f.Text != "" {
		b.WriteString(": " + quote(f.Text))
	}
	b.WriteString(": " + plain(f.Reason) + "\n")
	for line := range strings.Lines(f.Hint) {
		b.WriteString("    " + plain(strings.TrimSuffix(line, "\n")) + "\n")
	}
}

// shownName is the name of a file in a message.
func shownName(name string) string {
	if name == "-" {
		return "standard input"
	}
	return name
}

func count(n int, thing string) string {
	if n != 1 {
		thing += "s"
	}
	return fmt.Sprintf("%d %s", n, thing)
}

// byLine orders the faults of one file; those of one line stay as they were found.
func byLine(a, b Fault) int { return cmp.Compare(a.Line, b.Line) }
