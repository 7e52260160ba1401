package reportgen

import (
	"strings"
	"testing"

	"arrestcheck/arrest"
	"arrestcheck/arrest/quantity"
)

func TestSubstituted(t *testing.T) {
	terms := []arrest.Term{
		{Symbol: "F_d", Dimension: quantity.Force, SI: 2630.38182},
		{Symbol: "d", Dimension: quantity.Length, SI: 1.07},
		{Symbol: "r", Dimension: quantity.Ratio, SI: 0.83295026},
	}
	for formula, want := range map[string]string{
		"F_d*d^2/2":      "(2630.4 N)*(1.0700 m)^2/2",
		"sqrt(d) + r":    "sqrt((1.0700 m)) + (0.83295)",
		"pi/2":           "pi/2",
		"dd + d_limit*2": "dd + d_limit*2",
	} {
		if got := breakable(substituted(formula, terms, nil)); got != want {
			t.Errorf("%s: %q, want %q", formula, got, want)
		}
	}
}

// The working of the fixture: 980.665 N + 100 kg (5.94171187 m/s)^2 / 2.14 m is
// 2630.4 N, and 2630.38182 N is 591.33 lbf (NIST SP 811, B.8).
func TestWorkingLines(t *testing.T) {
	b := builder{s: fixture(t)}
	blocks := b.workingBlocks()
	if len(blocks) != 1 {
		t.Fatalf("%d blocks: the wrong sum has a section of its own", len(blocks))
	}
	var got []string
	for _, l := range blocks[0].Lines {
		got = append(got, breakable(l.Text))
	}
	want := []string{
		"mean force over the distance, as written:",
		"F_d = W + m*v^2/(2*d)",
		"F_d = (980.67 N) + (100.00 kg)*(5.9417 m/s)^2/(2*(1.0700 m))",
		"F_d = 2630.4 N = 591.33 lbf",
	}
	if strings.Join(got, "\n") != strings.Join(want, "\n") {
		t.Errorf("got\n%s\nwant\n%s", strings.Join(got, "\n"), strings.Join(want, "\n"))
	}
}

// The sum with body weight forgotten is called wrong, and its error is the
// weight: 980.665 N of 2630.38182 N is 37.3 %.
func TestForgottenWeight(t *testing.T) {
	b := builder{s: fixture(t), d: display{SIUnits, quantity.Metric}}
	var got []string
	for _, l := range b.forgottenBlocks()[0].Lines {
		got = append(got, breakable(l.Text))
	}
	want := []string{
		"WRONG: m*v^2/(2*d) = 1.6497 kN, as written",
		"Right: W + m*v^2/(2*d) = 2.6304 kN",
		"The body weight W is left out: too low by exactly 980.67 N, 37.3 % of the right figure.",
	}
	if strings.Join(got, "\n") != strings.Join(want, "\n") {
		t.Errorf("got\n%s", strings.Join(got, "\n"))
	}
}

// Nobody works with a tool that falls by itself: its mass is m_tool.
func TestWorkingOfATool(t *testing.T) {
	out := asText(t, sheet(t, "tool-tether.toml"), SIUnits, TextOptions{})
	if strings.Contains(out, "m_worker") || strings.Contains(out, "m_tools") || !strings.Contains(out, "m = m_tool\n      m = (3.2000 kg)\n") {
		t.Error("the working of a tool speaks of a worker")
	}
}
