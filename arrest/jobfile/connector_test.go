package jobfile_test

import (
	"fmt"
	"math"
	"strings"
	"testing"

	"github.com/google/go-cmp/cmp"

	"arrestcheck/arrest"
	"arrestcheck/arrest/connector"
	"arrestcheck/arrest/jobfile"
	"arrestcheck/limits"
)

// outcome is what the one limit of a job comes to.
func outcome(f *jobfile.File) limits.Outcome {
	r := arrest.Evaluate(&f.Job)
	return limits.Assess(&r, f.Sets, f.Elsewhere).Findings[0].Outcome
}

// The figures were given with the methods, worked out apart from this program:
// the first is m v^2/2/(F_a - W), the second W + sqrt(W^2 + 2 W M f).
func TestPathsFromFiles(t *testing.T) {
	job := func(name string) *jobfile.File { return goodJob(t, name+".toml") }
	f := job("path-absorber")
	near(t, "absorber travel", estimate(t, &f.Job, arrest.AbsorberTravel, arrest.Modelled).Value, 0.584631053, 1e-9)
	f = job("path-rope")
	near(t, "peak", estimate(t, &f.Job, arrest.PeakForce, arrest.Modelled).Value, 6702.13770, 1e-9)
	near(t, "time", estimate(t, &f.Job, arrest.StoppingTime, arrest.Modelled).Value, 0.183733356, 2e-9)
	f = job("path-rope-absorber-45")
	e := estimate(t, &f.Job, arrest.AbsorberTravel, arrest.Modelled)
	near(t, "travel", e.Value, 0.4346, 1e-4)
	if e.Exhausted || e.Allowance != 0.25 {
		t.Errorf("0.45 m: %+v", e)
	}
	if is := outcome(f); is != limits.Within {
		t.Errorf("0.45 m with an allowance, all settled: %v", is)
	}
	for _, name := range []string{"path-rope-absorber-40", "path-no-allowance"} {
		f = job(name)
		e = estimate(t, &f.Job, arrest.PeakForce, arrest.Modelled)
		near(t, "peak", e.Value, 4296.7, 2e-5)
		if is := outcome(f); !e.Exhausted || is != limits.Undecided {
			t.Errorf("%s: exhausted %v, %v", name, e.Exhausted, is)
		}
		if none := math.IsNaN(e.Allowance); none != (name == "path-no-allowance") {
			t.Errorf("%s: allowance %g", name, e.Allowance)
		}
	}
}

// Every part of the file with the figures typed once more.
func TestPlanOfEveryPart(t *testing.T) {
	j := goodJob(t, "path-every-part.toml").Job
	const none = arrest.NoFigure
	part := func(name string, kind connector.Kind, basis arrest.Basis, places ...int) arrest.PlannedPart {
		return arrest.PlannedPart{Name: name, Kind: kind, Basis: basis,
			Length: places[0], Give: places[1], Force: places[2], Travel: places[3], Activate: places[4], Rise: places[5], Locking: places[6]}
	}
	want := []arrest.PlannedPart{
		part("deck post", connector.Anchor, arrest.ByStiffness, none, 0, none, none, none, none, none),
		part("drop line", connector.WireRope, arrest.ByModulus, 1, 2, none, none, none, none, none),
		part("rope grab", connector.RopeGrab, arrest.Rigid, none, none, 3, 4, none, none, none),
		part("retractable", connector.Retractable, arrest.Rigid, none, none, 5, 6, none, none, 7),
		part("webbing", connector.Webbing, arrest.ByStiffness, 8, 9, none, none, none, none, none),
		part("first pack", connector.Absorber, arrest.Rigid, none, none, 10, 11, 12, 13, none),
		part("second pack", connector.Absorber, arrest.Rigid, none, none, 14, 15, 16, none, none),
		part("rope", connector.Rope, arrest.ByImpactForce, 17, 18, none, none, none, none, none),
		part("loop of the harness", connector.Curve, arrest.ByPoints, none, none, none, none, none, none, none),
		part("harness and body", connector.Harness, arrest.ByStiffness, none, 19, none, none, none, none, none),
	}
	want[1].Lifeline = true
	want[8].Points = []connector.Point{{Extension: 0, Force: 0}, {Extension: 0.02, Force: 1500}, {Extension: 0.06, Force: 6000}}
	want[8].Unloading = 150e3
	if diff := cmp.Diff(want, j.Point.Path.Parts); diff != "" {
		t.Error(diff)
	}
	figures := [arrest.MaxFigures]float64{900e3, 12, 1600e3, 3500, 0.3, 4200, 0.8, 0.4, 1.8, 60e3, 4000, 1.07, 2000, 0.08, 4500, 0.5, 5500, 0.6, 8600, 100e3}
	for i, x := range figures {
		near(t, fmt.Sprintf("figure %d", i), j.Point.Figures[i], x, 1e-15)
	}
	if a, b := j.Ratings[0].Part, j.Ratings[1].Part; a != 6 || b != 4 {
		t.Errorf("documents of parts %d and %d", a, b)
	}
}

// A figure has the source of its part unless it has one of its own; a curve
// stands on the list for its source, and nothing that is set changes it.
func TestSourcesOfParts(t *testing.T) {
	j := goodJob(t, "path-every-part.toml").Job
	got := map[string]string{}
	for _, in := range j.Inputs {
		if !strings.HasPrefix(in.Key, "connector") {
			continue
		}
		if in.Role != arrest.OfPart || in.Set == nil {
			t.Errorf("%+v", in)
		}
		got[in.Key] = string(in.Source) + ": " + in.Note
	}
	for key, want := range map[string]string{
		"connector[1].stiffness":             "standard: invented table 4",
		"connector[2].modulus":               "label: ",
		"connector[4].braking_force":         "label: invented plate of the block",
		"connector[4].travel_before_locking": "label: locking test of the device's sheet",
		"connector[5].length":                ": ",
		"connector[9].points":                "measured: ",
		"connector[9].unloading":             "measured: ",
	} {
		if got[key] != want {
			t.Errorf("%s: %q, want %q", key, got[key], want)
		}
	}
	if len(got) != 22 { // 20 figures, a curve and its way back
		t.Errorf("%d figures of parts", len(got))
	}
	for _, in := range j.Inputs {
		if in.Key != "connector[9].points" {
			continue
		}
		c := j.Point
		in.Set(&c, 1)
		if in.Open() != arrest.Settled || in.Band.Text != "0 mm 0 kN, 20 mm 1.5 kN, 60 mm 6 kN" || cmp.Diff(c, j.Point) != "" {
			t.Errorf("%+v", in)
		}
	}
}

const pathTop = minimalJob + "\n"

func parts(text string) string {
	var b strings.Builder
	for line := range strings.SplitSeq(text, "; ") {
		b.WriteString("[[connector]]\n" + strings.ReplaceAll(line, ", ", "\n") + "\n")
	}
	return b.String()
}

// Parts without a name of their own are called by their kind, numbered where
// several are.
func TestNamesOfParts(t *testing.T) {
	f, err := jobfile.Read("job", []byte(pathTop+parts(`part = "rope", stiffness = "9 kN/m"; part = "anchor", stiffness = "900 kN/m"; part = "rope", name = "tail", stiffness = "9 kN/m"; part = "rope", stiffness = "9 kN/m"`)), nil)
	if err != nil {
		t.Fatal(err)
	}
	var names []string
	for _, p := range f.Job.Point.Path.Parts {
		names = append(names, p.Name)
	}
	if diff := cmp.Diff([]string{"rope 1", "anchor", "tail", "rope 2"}, names); diff != "" {
		t.Error(diff)
	}
}

// Just within the bounds is read, just beyond refused.
func TestBoundsOfPaths(t *testing.T) {
	repeat := func(part string, n int) string { return strings.TrimSuffix(strings.Repeat(part+"; ", n), "; ") }
	absorber := func(force, activation, rise, travel string) string {
		s := `part = "absorber", deployment_force = "` + force + `", travel_at_most = "` + travel + `", activation_force = "` + activation + `"`
		if rise != "" {
			s += `, activation_travel = "` + rise + `"`
		}
		return s
	}
	curve := func(n int) string {
		var points []string
		for i := range n {
			points = append(points, fmt.Sprintf(`["%d mm","%d N"]`, i, 10*i))
		}
		return `part = "curve", points = [` + strings.Join(points, ",") + `]`
	}
	for _, c := range []struct {
		name, parts string
		read        bool
	}{
		{"48 figures", repeat(`part = "rope", length = "2 m", modulus = "22 kN"`, 24), true},
		{"49 figures", repeat(`part = "rope", length = "2 m", modulus = "22 kN"`, 24) + `; part = "anchor", stiffness = "900 kN/m"`, false},
		{"16 bands", repeat(`part = "anchor", stiffness = "900 kN/m ± 1 %"`, 16), true},
		{"17 bands", repeat(`part = "anchor", stiffness = "900 kN/m ± 1 %"`, 17), false},
		{"bands without width are none", repeat(`part = "anchor", stiffness = "900 kN/m ± 0"`, 17), true},
		{"100 points", curve(100), true},
		{"101 points", curve(101), false},
		{"impact force above twice the weight", `part = "rope", length = "2 m", impact_force = "1570 N"`, true}, // 2*80*9.80665 = 1569.064 N
		{"impact force below twice the weight", `part = "rope", length = "2 m", impact_force = "1569 N"`, false},
		{"activation at the deployment force", absorber("4 kN", "4 kN", "", "1 m"), true},
		{"activation above", absorber("4 kN .. 5 kN", "5 kN .. 6 kN", "", "1 m"), true},
		{"activation below", absorber("4 kN .. 5 kN", "3 kN .. 3.9 kN", "0.1 m", "1 m"), true},
		{"activation below, bands that touch", absorber("4 kN .. 5 kN", "3 kN .. 4 kN", "0.1 m", "1 m"), false},
		{"rise as long as the travel", absorber("4 kN", "3 kN", "1 m", "1 m .. 1.2 m"), true},
		{"rise longer than the least travel", absorber("4 kN", "3 kN", "1.1 m", "1 m .. 1.2 m"), false},
		{"locking as long as the free fall", `part = "retractable", travel_before_locking = "1.5 m", braking_force = "4 kN", travel_at_most = "1 m"`, true},
		{"locking longer than the free fall", `part = "retractable", travel_before_locking = "1.4 m .. 1.51 m", braking_force = "4 kN", travel_at_most = "1 m"`, false},
		{"way back along the steepest stretch", `part = "curve", points = [["0 mm","0 kN"],["50 mm","4 kN"]], unloading = "80 kN/m"`, true},
		{"way back below it", `part = "curve", points = [["0 mm","0 kN"],["50 mm","4 kN"]], unloading = "79.9 kN/m"`, false},
		{"64 parts", repeat(`part = "curve", points = [["0 mm","0 kN"],["50 mm","4 kN"]]`, 64), true},
	} {
		_, err := jobfile.Read("job", []byte(pathTop+parts(c.parts)), nil)
		if (err == nil) != c.read {
			t.Errorf("%s: %v", c.name, err)
		}
	}
}
