package jobfile

import (
	"strconv"
	"strings"
)

// begin decodes a file and looks at its format line. It returns the top of the
// file, or nil where nothing more can be said of it: what is no TOML, another
// kind of file, another version.
func (pg *page) begin(want, other string) *table {
	top := pg.decode()
	if top == nil {
		return nil
	}
	if word, ok := top["format"].(string); ok && word != want && pg.foreign(word, want, other) {
		return nil
	}
	t := pg.open("", "", top)
	t.choice("format")
	return t
}

// foreign reports, and records, that a format line names the other kind of
// file or another version.
func (pg *page) foreign(word, want, other string) bool {
	fault := func(reason, hint string) { pg.fault("format", "format", word, reason, hint) }
	switch {
	case word == other && other == limitsFormat:
		fault("this is a limit file; a job file is asked for",
			`write: the name of this file in the job, limits = ["site-limits.toml"], and check the job`)
	case word == other:
		fault("this is a job file; a limit file is asked for", "name: a limit file here, one that begins with format = "+strconv.Quote(want))
	case version(word) != "":
		fault("version "+version(word)+" of the form is not known; this program reads version 1",
			`write: the file in the form of version 1, format = "`+want+`"; or use the program that made it`)
	default:
		return false
	}
	return true
}

// version returns the number at the end of a format line of either kind; empty
// where it is no such line.
func version(word string) string {
	for _, format := range []string{jobFormat, limitsFormat} {
		stem := strings.TrimSuffix(format, "1")
		if number, ok := strings.CutPrefix(word, stem); ok && number != "" && strings.Trim(number, "0123456789") == "" {
			return number
		}
	}
	return ""
}
