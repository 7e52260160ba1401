package figure

import (
	"bytes"
	"encoding/xml"
	"errors"
	"io"
	"regexp"
	"strings"
	"testing"
	"unicode"

	"pgregory.net/rapid"
)

// An element of an SVG with its text.
type element struct {
	name, text string
	attributes map[string]string
}

// parse reads an SVG strictly and returns its elements in order.
func parse(t rapid.TB, svg []byte) []element {
	t.Helper()
	d := xml.NewDecoder(bytes.NewReader(svg))
	var list []element
	var open []int
	for {
		token, err := d.Token()
		if errors.Is(err, io.EOF) {
			return list
		}
		if err != nil {
			t.Fatalf("%v in\n%s", err, svg)
		}
		switch token := token.(type) {
		case xml.StartElement:
			e := element{name: token.Name.Local, attributes: make(map[string]string)}
			for _, a := range token.Attr {
				e.attributes[a.Name.Local] = a.Value
			}
			open = append(open, len(list))
			list = append(list, e)
		case xml.EndElement:
			open = open[:len(open)-1]
		case xml.CharData:
			if len(open) > 0 {
				list[open[len(open)-1]].text += string(token)
			}
		case xml.ProcInst, xml.Directive, xml.Comment:
			t.Errorf("the SVG has %v", token)
		}
	}
}

// allowed are the elements of a figure: no script, style, link or picture.
var allowed = map[string]bool{"svg": true, "title": true, "desc": true, "g": true, "path": true, "rect": true, "circle": true, "text": true}

// Whatever is drawn, the SVG is well-formed, has only the elements and colours
// of a figure, and its texts are what was given, cleaned.
func TestSVGWellFormed(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		s, _ := anyScene(t)
		s.Desc = anyText(t, "desc")
		elements := parse(t, s.SVG("fig-1"))
		for _, e := range elements {
			if !allowed[e.name] {
				t.Errorf("the SVG has an element %s", e.name)
			}
			for _, name := range []string{"fill", "stroke"} {
				if v := e.attributes[name]; v != "" && v != "none" && v != "black" && v != "white" {
					t.Errorf("%s is %s", name, v)
				}
			}
			for _, r := range e.text {
				if unicode.IsControl(r) && r != '\n' || unicode.Is(unicode.Bidi_Control, r) {
					t.Errorf("the text %q has %U", e.text, r)
				}
			}
		}
		if elements[1].name != "title" || elements[1].text != clean(s.Title) || elements[2].name != "desc" || elements[2].text != clean(s.Desc) {
			t.Errorf("title and desc are %v %v", elements[1], elements[2])
		}
	})
}

var number = regexp.MustCompile(`-?[0-9]+(\.[0-9]+)?(e[-+]?[0-9]+)?`)

// Coordinates are whole numbers, none is minus nought or far outside the page;
// ids begin with the prefix.
func TestSVGNumbersAndIDs(t *testing.T) {
	for _, s := range samples(t) {
		ids := make(map[string]bool)
		for _, e := range parse(t, s.scene.SVG("p7")) {
			for name, value := range e.attributes {
				if name == "id" {
					if ids[value] || !strings.HasPrefix(value, "p7-") {
						t.Errorf("%s: id %q", s.name, value)
					}
					ids[value] = true
					continue
				}
				if name == "xmlns" || name == "aria-labelledby" || name == "style" {
					continue
				}
				for _, n := range number.FindAllString(value, -1) {
					if n == "-0" || strings.ContainsAny(n, ".e") || len(n) > 6 {
						t.Errorf("%s: %s=%q", s.name, name, value)
					}
				}
			}
		}
		if !ids["p7-title"] || !ids["p7-desc"] {
			t.Errorf("%s: ids %v", s.name, ids)
		}
	}
}

func TestSVGPrefix(t *testing.T) {
	for _, prefix := range []string{"", "1a", "-a", "a b", "a\"", "ä", "a.b"} {
		func() {
			defer func() {
				if recover() == nil {
					t.Errorf("the prefix %q is taken", prefix)
				}
			}()
			NewScene("", 10).SVG(prefix)
		}()
	}
	NewScene("", 10).SVG("Force-time-2")
}

func TestNumber(t *testing.T) {
	for x, want := range map[float64]string{
		0: "0", 1: "100", -0.001: "0", 0.005: "1", 0.0044: "0", 0.0045: "1", 12.345: "1235", -12.3456: "-1235",
		0.1 + 0.2: "30", 1.005: "101", 2.675: "268", 1e9: "100000000",
	} {
		var w svgWriter
		if w.number(x); w.out.String() != want {
			t.Errorf("%v is written %s, not %s", x, w.out.String(), want)
		}
	}
}

func TestClean(t *testing.T) {
	for _, c := range []struct{ text, want, ascii string }{
		{"  6 kN  ", "6 kN", "6 kN"},
		{"two\nlines\tand\u00a0more\u2028", "two lines and more", "two lines and more"},
		{"a\x00\x1b[31m\x7fb\u0085", "a[31mb", "a[31mb"},
		{"\u202eright\u2066", "right", "right"},
		{"\u200bzero\ufeff\u200d", "zero", "zero"},
		{"\xff", "\ufffd", `\ufffd`},
		{"\ufffe\uffff", "", ""},
		{"e\u0301\u0301\u0301\u0301", "e\u0301\u0301", `e\u0301\u0301`},
		{"\u0301x", "x", "x"},
		{"± 5 % ≤ 30°, é 落", "± 5 % ≤ 30°, é 落", `+/- 5 % <= 30 deg, \u00e9 \u843d`},
		{"👷", "👷", `\U0001f477`},
	} {
		if got := clean(c.text); got != c.want {
			t.Errorf("clean(%q) = %q, not %q", c.text, got, c.want)
		}
		if got := cleanASCII(c.text); got != c.ascii {
			t.Errorf("cleanASCII(%q) = %q, not %q", c.text, got, c.ascii)
		}
		if again := clean(clean(c.text)); again != clean(c.text) {
			t.Errorf("cleaning %q twice gives %q", c.text, again)
		}
	}
}
