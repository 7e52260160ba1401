package reportgen

import (
	"slices"
	"strings"
	"testing"

	"arrestcheck/arrest"
	"arrestcheck/arrest/quantity"
)

// A job in pieces, so that a test can put other pieces in. With no piece
// changed everything is settled, and only standing statements are printed.
type pieces struct{ top, document, worker, fall, rest string }

func (p pieces) toml() string {
	or := func(s, standard string) string {
		if s == "" {
			return standard
		}
		return s
	}
	return "format = \"arrestcheck job 1\"\n" + p.top +
		"\n[document]\n" + or(p.document, `title = "Lamp change"
rescue = "ladder team"`) +
		"\n[worker]\n" + or(p.worker, `mass = { value = "100 kg ± 0 kg", source = "measured" }
tools = { value = "0 kg", source = "plan" }`) +
		"\n[fall]\n" + or(p.fall, `free_fall = { value = "1.8 m ± 0 m", source = "drawing" }`) +
		"\n" + p.rest
}

const (
	overDistance = "[stop]\ndistance = { value = \"1.07 m ± 0 m\", source = \"measured\" }\n"
	lanyard      = "[[rated]]\ndocument = \"label\"\ntotal_mass = \"59 kg .. 140 kg\"\nfree_fall_at_most = \"1.8 m\"\npeak_force_at_most = \"6 kN\"\n"
)

// With 100 kg and 1.8 m the speed is 5.94 m/s, and the ratio of the routes
// v*t/(2*d) at 1.07 m is t/0.360 s.
func stopIn(t string) string {
	return overDistance + "time = { value = \"" + t + "\", source = \"measured\" }\n"
}

// standing are the statements of every sheet.
var standing = []string{"S-01", "S-02", "S-03", "S-04", "S-09", "S-10"}

// Each statement is printed for the job that calls for it.
func TestWhenStatementsArePrinted(t *testing.T) {
	for _, c := range []struct {
		number string
		job    pieces
		holds  string // figures or names that must stand in it
	}{
		{"S-05", pieces{rest: overDistance}, ""},
		{"S-06", pieces{rest: lanyard}, ""},
		{"S-07", pieces{rest: "[stop]\ndistance = \"1.07 m\"\n"}, "1 of 5"},
		{"S-08", pieces{fall: `free_fall = { value = "2 m ± 0 m", source = "drawing" }`, rest: lanyard}, ""},
		{"S-11", pieces{}, ""},
		{"S-12", pieces{rest: stopIn("0.15 s .. 0.35 s")}, "1.07 m"},
		{"S-13", pieces{rest: stopIn("0.3602 s ± 0 s")}, "1.00"},
		{"S-14", pieces{rest: stopIn("0.1801 s ± 0 s")}, "0.500"},
		{"S-15", pieces{rest: stopIn("0.30 s ± 0 s")}, "0.833"},
		{"S-16", pieces{rest: stopIn("0.45 s ± 0 s")}, "1.25"},
		{"S-17", pieces{rest: stopIn("0.30 s .. 0.45 s")}, "0.833 to 1.25"},
		{"S-18", pieces{rest: stopIn("0.20 s ± 0 s")}, "kN"},
		{"S-19", pieces{rest: stopIn("0.30 s ± 0 s") + "shape = \"rising ramp\"\n"}, "rising ramp"},
		{"S-20", pieces{rest: overDistance + "shape = \"rising ramp\"\n"}, "rising ramp"},
		{"S-21", pieces{worker: "mass = { value = \"152 kg ± 0 kg\", source = \"measured\" }\ntools = { value = \"0 kg\", source = \"plan\" }", rest: lanyard}, "152 kg (335 lb), leaves the range of the rating of \"label\", 59.0 to 140 kg"},
		{"S-22", pieces{fall: `free_fall = { value = "2 m ± 0 m", source = "drawing" }`, rest: lanyard}, "2.00 m (6.56 ft)"},
		{"S-23", pieces{fall: `initial_speed = { value = "6 m/s ± 0 m/s", source = "measured" }`, rest: overDistance}, "6.00 m/s"},
		{"S-24", pieces{rest: lanyard + "travel_at_most = \"0.1 m\"\ntravel_is = \"deceleration distance\"\n"}, "label"},
		{"S-25", pieces{rest: overDistance + strings.Replace(lanyard, "6 kN", "2 kN", 1)}, "peak force on the body is not less than 2.63 kN (591 lbf) by the entries for fall and stop, and at most 2.00 kN"},
		{"S-26", pieces{rest: "[stop]\ndistance = { value = \"0.5 m .. 1.5 m\", source = \"measured\" }\n" + strings.Replace(lanyard, "6 kN", "3 kN", 1)}, "3.00 kN"},
		{"S-27", pieces{worker: "mass = { value = \"210 kg ± 0 kg\", source = \"measured\" }\ntools = { value = \"0 kg\", source = \"plan\" }", rest: overDistance}, "210 kg"},
		{"S-28", pieces{worker: "mass = { value = \"100 kg ± 0 kg\", source = \"measured\" }\ntools = { value = \"0 kg\", source = \"plan\" }\npersons = 2", rest: overDistance}, "2 persons"},
		{"S-29", pieces{top: "gravity = \"9.80 m/s2\"", rest: overDistance}, "9.80 m/s2"},
		{"S-30", pieces{fall: `free_fall = { value = "8 m ± 0 m", source = "drawing" }`, rest: overDistance}, "8.00 m"},
		{"S-31", pieces{top: "example = true", rest: overDistance}, ""},
		{"S-32", pieces{rest: overDistance}, ""},
		{"S-33", pieces{fall: `free_fall = { value = "1.7 m .. 1.8 m", source = "drawing" }`, rest: overDistance}, "fall.free_fall"},
		{"S-34", pieces{document: `title = "Lamp change"`, rest: overDistance}, ""},
	} {
		printed := numbered(t, c.job)
		text, ok := printed[c.number]
		if !ok {
			t.Errorf("%s is not printed", c.number)
		}
		if !strings.Contains(text, c.holds) {
			t.Errorf("%s does not hold %q: %s", c.number, c.holds, text)
		}
		for _, number := range standing {
			if _, ok := printed[number]; !ok {
				t.Errorf("%s is missing beside %s", number, c.number)
			}
		}
	}
}

// What the model of the connector says is put in words with its figures.
func TestStatementsOfTheModel(t *testing.T) {
	force := arrest.Figure(quantity.Force, 6000, quantity.Nearest)
	part := arrest.Text("the rope")
	for _, c := range []struct {
		number string
		id     arrest.WarningID
		args   []arrest.Arg
		holds  string
	}{
		{"S-35", arrest.PathExhausted, []arrest.Arg{part, arrest.Figure(quantity.Energy, 420, quantity.Nearest), force}, "then left, 420 J (310 ft*lbf), goes into the stiff parts, and in the model the force rises to 6.00 kN"},
		{"S-53", arrest.PathExhaustedInAllowance, []arrest.Arg{part, arrest.Figure(quantity.Length, 1.0701, quantity.Up), arrest.Figure(quantity.Length, 1.07, quantity.Nearest)}, "of \"the rope\", but within your allowance for its error it may: then 1.08 m (3.52 ft) is needed, and there are at most 1.07 m"},
		{"S-36", arrest.PathRigid, nil, "rigid"},
		{"S-37", arrest.PathBeyondCurve, []arrest.Arg{part}, "for \"the rope\"."},
		{"S-38", arrest.StaticStretchOnly, []arrest.Arg{part}, "of \"the rope\""},
		{"S-39", arrest.SeveralAbsorbers, []arrest.Arg{part}, "(\"the rope\")"},
		{"S-40", arrest.AbsorberOnRetractable, []arrest.Arg{part}, "(\"the rope\")"},
		{"S-41", arrest.NothingAbsorbs, []arrest.Arg{force}, "6.00 kN"},
		{"S-42", arrest.NoAllowanceEntered, nil, "gave peaks -32.4 % to +26.7 % off"},
		{"S-43", arrest.RatedAgainstModel, []arrest.Arg{part, arrest.Text("peak"), force, arrest.Figure(quantity.Force, 6001, quantity.Nearest)}, "at most 6.000 kN (1349 lbf) by the document, up to 6.001 kN"},
		{"S-44", arrest.LedgersClose, []arrest.Arg{arrest.Figure(quantity.Ratio, 1e-9, quantity.Nearest), arrest.Figure(quantity.Ratio, 0, quantity.Nearest)}, "a share of less than 1e-9 of the momentum and of less than 1e-12 of the energy"},
	} {
		s := fixture(t)
		s.Result.Warnings = []arrest.Warning{{ID: c.id, Args: c.args}}
		i := slices.IndexFunc(display{}.statements(s), func(one said) bool { return one.number == c.number })
		if i < 0 {
			t.Errorf("%s is not printed", c.number)
			continue
		}
		if text := breakable(display{}.statements(s)[i].text); !strings.Contains(text, c.holds) {
			t.Errorf("%s does not hold %q: %s", c.number, c.holds, text)
		}
	}
}

// A settled job over a measured distance calls for the floor and the means,
// and nothing else beside the standing ones.
func TestQuietJob(t *testing.T) {
	want := map[string]bool{"S-05": true, "S-32": true}
	for _, number := range standing {
		want[number] = true
	}
	for number, text := range numbered(t, pieces{rest: overDistance}) {
		if !want[number] {
			t.Errorf("%s is printed: %s", number, text)
		}
	}
}

// numbered returns the printed statements of a job by number.
func numbered(t *testing.T, p pieces) map[string]string {
	t.Helper()
	list := make(map[string]string)
	for _, l := range Build(worked(t, "job.toml", []byte(p.toml())), BothUnits).Warnings {
		list[strings.TrimLeft(l.Label, "! ")] += strings.ReplaceAll(l.Text, noBreak, " ")
	}
	return list
}

// Loud statements are marked and stand before all others.
func TestLoudStatementsFirst(t *testing.T) {
	for _, name := range jobNames(t) {
		quiet := false
		for _, l := range Build(sheet(t, name), BothUnits).Warnings {
			if l.Loud != strings.Contains(l.Label, "!") {
				t.Errorf("%s: %q, loud %t", name, l.Label, l.Loud)
			}
			if l.Loud && quiet {
				t.Errorf("%s: %s after one that is not loud", name, l.Label)
			}
			quiet = quiet || !l.Loud
		}
	}
}

// Of what is not marked, rescue comes first, then who decides; what is about
// the arithmetic alone comes last.
func TestOrderOfQuietStatements(t *testing.T) {
	s := pathSheet(t, strings.Replace(tailRope, "± 0 m", "± 0.1 m", 1)+tearAbsorber("1.75 m")+quarter)
	var quietOnes []string
	for _, one := range (display{}).statements(s) {
		if one.weight == quiet {
			quietOnes = append(quietOnes, one.number)
		}
	}
	n := len(quietOnes)
	if n < 5 || quietOnes[0] != "S-04" || quietOnes[1] != "S-01" || quietOnes[n-1] != "S-44" {
		t.Errorf("order: %q", quietOnes)
	}
}

// A figure that was typed in per cent is called unusual in per cent.
func TestUnusualInTheUnitTyped(t *testing.T) {
	rope := strings.Replace(tailRope, `modulus = { value = "22.5 kN ± 0 kN"`, `static_stretch = { value = "20 % ± 0"`, 1)
	list := display{}.statements(pathSheet(t, rope+tearAbsorber("1.75 m")))
	i := slices.IndexFunc(list, func(one said) bool { return one.number == "S-27" })
	if i < 0 || !strings.Contains(breakable(list[i].text), `"20 % ± 0", which is unusual: 1.00 to 12.0 % is`) {
		t.Errorf("got %+v", list)
	}
}
