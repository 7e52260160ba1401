package archive

import (
	"bytes"
	"regexp"
	"sync"
)

// limitFormatLine is made when it is first wanted, not whenever the program
// starts.
var limitFormatLine = sync.OnceValue(func() *regexp.Regexp {
	return regexp.MustCompile(`^\s*"?format"?\s*=\s*["']arrestcheck limits `)
})

// IsLimitFile reports whether a file calls itself a limit file, in a line above
// its first section. Such files lie beside jobs and are none.
func IsLimitFile(data []byte) bool {
	for line := range bytes.Lines(bytes.TrimPrefix(data, []byte(byteOrderMark))) {
		bare := bytes.TrimLeft(line, " \t")
		if len(bare) > 0 && bare[0] == '[' {
			return false
		}
		// The pattern is slow, and most files are jobs.
		if bytes.Contains(bare, []byte("arrestcheck limits ")) && limitFormatLine().Match(bare) {
			return true
		}
	}
	return false
}
