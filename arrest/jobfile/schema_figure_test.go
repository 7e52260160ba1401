package jobfile_test

import (
	"slices"
	"strings"
	"testing"

	"pgregory.net/rapid"

	"arrestcheck/arrest/jobfile"
	"arrestcheck/arrest/quantity"
)

// figurePlaces are keys of the several dimensions, spreads and signs, each with
// what to put its figure into.
var figurePlaces = []struct {
	key       string
	dimension quantity.Dimension
	from, to  string // from minimalJob; %% is the figure
}{
	{"worker.mass", quantity.Mass, `mass = "92 kg"`, `mass = "%%"`},
	{"worker.tools in a table", quantity.Mass, `tools = "4 kg"`, `tools = { value = "%%", source = "plan" }`},
	{"fall.free_fall", quantity.Length, `free_fall = "1.5 m"`, `free_fall = "%%"`},
	{"fall.initial_speed", quantity.Speed, `free_fall = "1.5 m"`, `initial_speed = "%%"`},
	{"stop.time", quantity.Time, "[fall]", "[stop]\ntime = \"%%\"\n[fall]"},
	{"stop.rise_fraction", quantity.Ratio, "[fall]", "[stop]\ntime = \"1 s\"\nshape = \"rise then plateau\"\nrise_fraction = \"%%\"\n[fall]"},
	{"rated.total_mass", quantity.Mass, "[fall]", "[[rated]]\ndocument = \"d\"\nfree_fall_at_most = \"2 m\"\npeak_force_at_most = \"6 kN\"\ntotal_mass = \"%%\"\n[fall]"},
	{"limit.at_most of a force", quantity.Force, "[fall]", inlineLimit("peak_force", "at_most")},
	{"limit.at_least of a length", quantity.Length, "[fall]", inlineLimit("clearance_left", "at_least")},
	{"limit.at_most of an angle", quantity.Angle, "[fall]", inlineLimit("swing_angle", "at_most")},
	{"limit.at_most of an energy", quantity.Energy, "[fall]", inlineLimit("fall_energy", "at_most")},
	{"limit.at_most of a force rate", quantity.ForceRate, "[fall]", inlineLimit("onset_rate", "at_most")},
	{"limit.at_most of an acceleration", quantity.Acceleration, "[fall]", inlineLimit("peak_deceleration", "at_most")},
}

func inlineLimit(id, side string) string {
	return "[[limit]]\nid = \"a\"\nquantity = \"" + id + "\"\nauthority = \"a\"\nedition = \"a\"\nkind = \"motion\"\n" + side + " = \"%%\"\n[fall]"
}

// typed draws a text in the forms of figures, right or nearly so.
func typed(t *rapid.T, d quantity.Dimension) string {
	var units []string
	for _, u := range quantity.Units() {
		if u.Dimension == d {
			units = append(units, u.Symbol)
		}
	}
	draw := func(what string, of ...string) string { return rapid.SampledFrom(of).Draw(t, what) }
	space := func() string { return draw("space", "", " ", " ", "  ") }
	number := func() string {
		if draw("wrong", "", "", "", "", "wrong") == "" {
			return draw("number", "1", "2", "0.5", "1.75", "0", "0.0", "007", "50", "90")
		}
		return draw("number", "1/2", "3 1/4", "5.", ".5", "1,5", "1e3", "10 000")
	}
	figure := func() string {
		sign := draw("sign", "", "", "", "", "", "", "", "", "+", "-", "- ")
		text := sign + number() + space() + draw("unit", slices.Concat(units, units, units, []string{"", "%", "kip", "xx"})...)
		if d == quantity.Length && draw("inches", "", "", "", "in") == "in" {
			text += " " + number() + space() + "in"
		}
		return text
	}
	text := space() + figure() + space()
	if link := draw("link", "", "", "", "..", "±", "+/-", "-", "to"); link != "" {
		text += link + space() + figure() + space()
	}
	return text
}

// What the reader takes as a figure the schema takes too, at every key. At each
// key a figure or a range that both must take is tried first, so that the test
// does not hang on what chance draws.
func TestPatternsAreNoStricter(t *testing.T) {
	s := compiled(t, "job")
	both := func(text, from, to string) (refusal, fault error) {
		job := strings.Replace(minimalJob, from, strings.Replace(to, "%%", text, 1), 1)
		_, refusal = jobfile.Read("job", []byte(job), nil)
		_, fault = held(s, []byte(job))
		return refusal, fault
	}
	for _, p := range figurePlaces {
		one := p.dimension.Example()
		refusal, fault := both(one, p.from, p.to)
		if refusal != nil {
			refusal, fault = both(one+" .. "+one, p.from, p.to)
		}
		if refusal != nil || fault != nil {
			t.Errorf("%s: neither %q nor a range of it is taken: %v, %v", p.key, one, refusal, fault)
		}
	}
	rapid.Check(t, func(t *rapid.T) {
		for _, p := range figurePlaces {
			text := typed(t, p.dimension)
			refusal, fault := both(text, p.from, p.to)
			switch {
			case refusal == nil && fault != nil:
				t.Fatalf("%s: the reader takes %q, the schema does not: %v", p.key, text, fault)
			case refusal != nil && fault == nil && !comparing(refusal):
				t.Fatalf("%s: the schema takes %q: %v", p.key, text, refusal)
			}
		}
	})
}

// comparing reports whether a refusal rests on how large a figure is.
func comparing(err error) bool {
	for _, part := range []string{"runs backwards", "low end", "not plausible", "a fraction stays below one", "inches after feet stay below 12",
		"feet that inches follow", "above zero", "cannot be below zero", "impossible together", "the upper end has no unit"} {
		if strings.Contains(err.Error(), part) {
			return true
		}
	}
	return false
}

// Forms in which people write a figure, each with whether it is one of a mass.
func TestPatternsByHand(t *testing.T) {
	s := compiled(t, "job")
	for text, is := range map[string]bool{
		"92 kg": true, "92kg": true, " 203 lb ": true, "92 kg ± 1 kg": true, "92 kg +/- 5 %": true, "92 kg ± 0": true,
		"86 kg .. 104 kg": true, "86 .. 104 kg": true, "86..104kg": true, "0.5 t": true, "+92 kg": true,
		"": false, "92": false, "kg": false, "92 KG": false, "92 lbf": false, "92 kilos": false, "92,5 kg": false, "1 000 kg": false,
		"92. kg": false, ".5 t": false, "9e1 kg": false, "-92 kg": false, "0 kg": false, "0 kg .. 5 kg": false, "92 kg ± kg": false,
		"92 kg ± 1": false, "92 kg ± -1 kg": false, "86 kg - 104 kg": false, "86 kg .. 104": false, "92 kg 5": false, "92 1/2 kg": false,
		"92\tkg": false, "92 kg\n": false,
	} {
		job := strings.Replace(minimalJob, `mass = "92 kg"`, "mass = '''"+text+"'''", 1)
		if _, err := held(s, []byte(job)); (err == nil) != is {
			t.Errorf("%q: %v", text, err)
		}
		if _, err := jobfile.Read("job", []byte(job), nil); (err == nil) != is {
			t.Errorf("%q: the reader says %v", text, err)
		}
	}
}
