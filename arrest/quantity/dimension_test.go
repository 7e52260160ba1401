package quantity

import (
	"strings"
	"testing"
)

func TestDimensions(t *testing.T) {
	seen := map[string]bool{}
	for d := Mass; d <= Ratio; d++ {
		name := d.String()
		if name == "" || seen[name] {
			t.Errorf("dimension %d is called %q", d, name)
		}
		seen[name] = true
		for _, text := range []string{d.Example(), dimensions[d].span} {
			b, err := Parse(d, text)
			if err != nil || b.Low > b.High || b.High == 0 {
				t.Errorf("Parse(%v, %q) = %+v, %v", d, text, b, err)
			}
		}
		if b, _ := Parse(d, dimensions[d].span); b.Tolerance != Range {
			t.Errorf("%q is no range", dimensions[d].span)
		}
		if si := d.SI(); si.Dimension != d || si.Factor() != "1" || si.From(7) != 7 {
			t.Errorf("SI unit of %v: %+v, factor %s", d, si, si.Factor())
		}
	}
}

func TestDimensionOutOfRange(t *testing.T) {
	for _, d := range []Dimension{0, Ratio + 1, 255} {
		if d.Example() != "" {
			t.Errorf("%v has the example %q", d, d.Example())
		}
		panics(t, d.String(), func() { d.SI() })
		panics(t, d.String(), func() { Parse(d, "100 kg") })
		panics(t, d.String(), func() { Of(d, 1) })
	}
	if got := Dimension(200).String(); got != "Dimension(200)" {
		t.Errorf("Dimension(200) is called %q", got)
	}
}

func TestWritten(t *testing.T) {
	for d, want := range map[Dimension]string{
		Mass:         "a mass is written in kg, g, t or lb",
		Length:       "a length is written in m, cm, mm, ft or in",
		Acceleration: "an acceleration is written in m/s2 or ft/s2",
		Impulse:      "an impulse is written in N*s, kN*s or lbf*s",
		Ratio:        "a ratio is written in %",
	} {
		if got := d.written(); got != want {
			t.Errorf("%q, want %q", got, want)
		}
	}
}

// panics checks that f panics with a message that names this package and holds
// all of about.
func panics(t *testing.T, about string, f func()) {
	t.Helper()
	defer func() {
		t.Helper()
		text, _ := recover().(string)
		if !strings.HasPrefix(text, "quantity: ") || !strings.Contains(text, about) {
			t.Errorf("panic %q, want one about %s", text, about)
		}
	}()
	f()
}
