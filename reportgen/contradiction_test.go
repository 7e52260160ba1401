package reportgen

import (
	"strings"
	"testing"

	"arrestcheck/arrest"
	"arrestcheck/arrest/quantity"
	"arrestcheck/limits"
)

// A contradiction of the force is told once; the severity that follows from the
// force is told where it stands alone, or is between others.
func TestDerivedContradictions(t *testing.T) {
	warning := func(title string, d quantity.Dimension, b arrest.Evidence) arrest.Warning {
		f := arrest.Figure(d, 1, quantity.Nearest)
		return arrest.Warning{ID: arrest.EstimatesDisjoint, Args: []arrest.Arg{arrest.Text(title), arrest.Text(string(arrest.Given)), f, arrest.Text(string(b)), f}}
	}
	force := warning("peak", quantity.Force, arrest.Rated)
	ratio := warning("ratio", quantity.Ratio, arrest.Rated)
	other := warning("net", quantity.Acceleration, arrest.Modelled)
	all := []arrest.Warning{force, ratio, other}
	if derived(force, all) || !derived(ratio, all) || derived(other, all) || derived(ratio, []arrest.Warning{ratio, other}) {
		t.Errorf("force %t, ratio %t, other %t, alone %t", derived(force, all), derived(ratio, all), derived(other, all), derived(ratio, []arrest.Warning{ratio, other}))
	}
	for name, rest := range map[string]string{
		"S-25": overDistance + strings.Replace(lanyard, "6 kN", "2 kN", 1),
		"S-26": "[stop]\ndistance = { value = \"0.5 m .. 1.5 m\", source = \"measured\" }\n" + strings.Replace(lanyard, "6 kN", "3 kN", 1),
	} {
		n := 0
		for _, l := range Build(worked(t, "job.toml", []byte(pieces{rest: rest}.toml())), BothUnits).Warnings {
			if strings.HasSuffix(l.Label, name) {
				n++
			}
		}
		if n != 1 {
			t.Errorf("%s is told %d times", name, n)
		}
	}
}

// A rating that contradicts itself is not told as two ratings.
func TestContradictsItself(t *testing.T) {
	s := worked(t, "job.toml", []byte(pieces{rest: lanyard + "travel_at_most = \"0.1 m\"\ntravel_is = \"deceleration distance\"\n" + peakLimit}.toml()))
	b := newBuilder(s, SIUnits)
	f := &s.Assessment.Findings[0]
	if got := b.reason(f, &f.Reasons[0]); f.Reasons[0].ID != limits.Contradicted || got != "the figures by the rating contradict each other in this job" {
		t.Errorf("%s: %q", f.Reasons[0].ID, got)
	}
	if out := explained(t, s, "peak"); !strings.Contains(out, "which of the figures by the rating is wrong for this job") {
		t.Error(out)
	}
}
