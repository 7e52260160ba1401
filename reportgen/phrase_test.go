package reportgen

import (
	"strings"
	"testing"

	"arrestcheck/arrest"
	"arrestcheck/arrest/quantity"
)

func TestFill(t *testing.T) {
	p := phrase{[]string{"key", "low", "high"}, "{key} is {low .. high}, {key}."}
	kilograms := func(x float64) arrest.Arg { return arrest.Figure(quantity.Mass, x, quantity.Nearest) }
	for _, c := range []struct {
		name      string
		low, high float64
		want      string
	}{
		{"a span", 59, 140, "m is 59.0 to 140 kg, m."},
		{"one figure", 59, 59, "m is 59.0 kg, m."},
		{"digits that tell them apart", 59, 59.001, "m is 59.000 to 59.001 kg, m."},
		{"digits beyond print", 59, 59.0000000000001, "m is 59.0 kg, m."},
	} {
		got := p.fill(display{SIUnits, quantity.Metric}, quantity.Unit{}, []arrest.Arg{arrest.Text("m"), kilograms(c.low), kilograms(c.high)})
		if breakable(got) != c.want {
			t.Errorf("%s: %q, want %q", c.name, breakable(got), c.want)
		}
	}
}

// Text that a user typed is put in once and never read as a place.
func TestFillLeavesArgumentsAlone(t *testing.T) {
	p := phrase{[]string{"a", "b"}, "{a}, {b}"}
	if got := (display{}).say(p, "{b}", "{"); got != "{b}, {" {
		t.Errorf("got %q", got)
	}
}

// An id is put in words where the argument is one, and only there: a document
// may be called like an id.
func TestIDArguments(t *testing.T) {
	p := phrase{[]string{"document", "why"}, "{document}: {why}"}
	if got := (display{}).say(p, "no source", "no source"); got != "no source: no source is given" {
		t.Errorf("got %q", got)
	}
}

func TestFillPanics(t *testing.T) {
	for name, f := range map[string]func(){
		"too few":  func() { (display{}).say(phrase{[]string{"a"}, "{a}"}) },
		"too many": func() { (display{}).say(phrase{nil, "a"}, "b") },
		"unknown":  func() { (display{}).say(phrase{[]string{"a"}, "{b}"}, "b") },
	} {
		func() {
			defer func() {
				if s, _ := recover().(string); !strings.HasPrefix(s, "reportgen: ") {
					t.Errorf("%s: recovered %q", name, s)
				}
			}()
			f()
		}()
	}
}
