package jobfile

import (
	"strconv"
	"strings"
)

// marks says where the keys of a file stand: dotted key, "rated[2].note", to
// line and text as written.
type marks map[string]mark

type mark struct {
	line int
	text string // what is written right of the =, for figures and words without quotes
}

// line returns the line of a key, or else of the nearest thing around it.
func (m marks) line(key string) int {
	for key != "" {
		if found, ok := m[key]; ok {
			return found.line
		}
		key = parent(key)
	}
	return 0
}

// parent takes the last part, or the last index, off a dotted key.
func parent(key string) string {
	if strings.HasSuffix(key, "]") {
		return key[:strings.LastIndexByte(key, '[')]
	}
	if strings.HasSuffix(key, `"`) {
		// A part in quotes may hold points and quotes of its own.
		if i := strings.LastIndex(key, `."`); i >= 0 {
			return key[:i]
		}
		return ""
	}
	return key[:max(strings.LastIndexByte(key, '.'), 0)]
}

// scan finds the keys of a file. The decoder gives names without lines, so
// this goes through the file once more; only a faulty file pays for it. It
// takes for granted that the file has been decoded, and on anything else
// finds fewer keys or wrong lines, but always ends.
func scan(data []byte) marks {
	s := scanner{data: strings.TrimPrefix(string(data), byteOrderMark), line: 1, found: marks{}, lists: map[string]int{}}
	for s.blank(); s.at < len(s.data); s.blank() {
		before := s.at
		if s.peek() == '[' {
			s.header()
		} else {
			s.pair(s.section)
		}
		if s.at == before {
			s.at++
		}
	}
	return s.found
}

type scanner struct {
	data    string
	at      int
	line    int
	section string // dotted key of the section that is open
	found   marks
	lists   map[string]int // how many [[name]] have been opened
	depth   int
}

// put records a key unless it is known already.
func (s *scanner) put(key string, line int, text string) {
	if _, known := s.found[key]; !known && key != "" {
		s.found[key] = mark{line, text}
	}
}

func (s *scanner) peek() byte {
	if s.at < len(s.data) {
		return s.data[s.at]
	}
	return 0
}

func (s *scanner) has(prefix string) bool { return strings.HasPrefix(s.data[s.at:], prefix) }

// blank goes past spaces, line ends and comments.
func (s *scanner) blank() {
	for s.at < len(s.data) {
		switch s.data[s.at] {
		case '\n':
			s.line++
			s.at++
		case ' ', '\t', '\r', ',':
			s.at++
		case '#':
			s.rest()
		default:
			return
		}
	}
}

// rest goes to the end of the line.
func (s *scanner) rest() {
	if i := strings.IndexByte(s.data[s.at:], '\n'); i >= 0 {
		s.at += i
	} else {
		s.at = len(s.data)
	}
}

// header reads [a.b] or [[a.b]].
func (s *scanner) header() {
	line, list := s.line, s.has("[[")
	s.at++
	if list {
		s.at++
	}
	path := ""
	parts := s.key("]")
	for i, name := range parts {
		path = join(path, name)
		if i == len(parts)-1 && list {
			s.put(path, line, "")
			s.lists[path]++
		}
		if n := s.lists[path]; n > 0 {
			path = element(path, n-1)
		}
		s.put(path, line, "")
	}
	s.section = path
	s.rest()
}

// pair reads key = value, in a section or an inline table at path.
func (s *scanner) pair(path string) {
	line := s.line
	for _, name := range s.key("=") {
		path = join(path, name)
		s.put(path, line, "")
	}
	if s.peek() == '=' {
		s.at++
	}
	text := s.value(path)
	if found, ok := s.found[path]; ok && found.line == line {
		found.text = text
		s.found[path] = found
	}
}

// key reads the parts of a dotted key up to an end mark or the end of the line.
func (s *scanner) key(end string) (parts []string) {
	for s.at < len(s.data) {
		c := s.data[s.at]
		switch {
		case strings.IndexByte(end+"\n,}", c) >= 0:
			return parts
		case c == '"' || c == '\'':
			parts = append(parts, decoded(s.text()))
		case c == ' ' || c == '\t' || c == '.':
			s.at++
		default:
			start := s.at
			for s.at < len(s.data) && strings.IndexByte(" \t.\n=]\"',}", s.data[s.at]) < 0 {
				s.at++
			}
			if s.at == start {
				s.at++
			}
			parts = append(parts, s.data[start:s.at])
		}
	}
	return parts
}

// decoded resolves the escapes of a quoted key, which Go writes as TOML does.
func decoded(raw string) string {
	if name, err := strconv.Unquote(`"` + raw + `"`); err == nil && strings.Contains(raw, `\`) {
		return name
	}
	return raw
}

// value goes past one value and records the keys inside it. It returns the
// text of a value that is neither list nor table.
func (s *scanner) value(path string) string {
	for s.peek() == ' ' || s.peek() == '\t' {
		s.at++
	}
	switch s.peek() {
	case '"', '\'':
		return s.text()
	case '[', '{':
		s.inside(path)
		return ""
	}
	start := s.at
	for s.at < len(s.data) && strings.IndexByte(",]}#\n\r", s.data[s.at]) < 0 {
		s.at++
	}
	return strings.TrimSpace(s.data[start:s.at])
}

// deepest is how far lists and tables inside each other are followed.
const deepest = 100

// inside goes through a list or an inline table.
func (s *scanner) inside(path string) {
	list := s.peek() == '['
	s.at++
	s.depth++
	defer func() { s.depth-- }()
	if s.depth > deepest {
		s.at = len(s.data)
	}
	for n := 0; ; n++ {
		s.blank()
		switch c := s.peek(); {
		case c == 0:
			return
		case c == ']' || c == '}':
			s.at++
			return
		}
		before := s.at
		if list {
			line, key := s.line, element(path, n)
			s.put(key, line, "")
			if text := s.value(key); s.found[key].line == line {
				s.found[key] = mark{line, text}
			}
		} else {
			s.pair(path)
		}
		if s.at == before {
			s.at++
		}
	}
}

// text reads a string of any of the four kinds and returns what stands between
// its quotes, escapes as written.
func (s *scanner) text() string {
	mark := s.data[s.at : s.at+1]
	escapes := mark == `"`
	if long := strings.Repeat(mark, 3); s.has(long) {
		mark = long
	}
	s.at += len(mark)
	start := s.at
	for s.at < len(s.data) && !s.has(mark) {
		switch c := s.data[s.at]; {
		case c == '\\' && escapes && s.at+1 < len(s.data) && s.data[s.at+1] != '\n':
			s.at++
		case c == '\n' && len(mark) == 1:
			return s.data[start:s.at] // a string without an end
		case c == '\n':
			s.line++
		}
		s.at++
	}
	end := min(s.at, len(s.data))
	s.at = min(s.at+len(mark), len(s.data))
	for len(mark) == 3 && s.peek() == mark[0] {
		s.at++ // up to two more quotes belong to the text
	}
	return s.data[start:end]
}
