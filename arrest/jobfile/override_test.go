package jobfile_test

import (
	"math"
	"os"
	"path/filepath"
	"slices"
	"strings"
	"testing"

	"github.com/google/go-cmp/cmp"

	"arrestcheck/arrest"
	"arrestcheck/arrest/jobfile"
	"arrestcheck/arrest/quantity"
)

// with reads a file of testdata/jobs with overrides, "key=value" each.
func with(t *testing.T, name string, sets ...string) (*jobfile.File, error) {
	t.Helper()
	data, err := os.ReadFile(filepath.Join(jobsFolder, name))
	if err != nil {
		t.Fatal(err)
	}
	var overrides []jobfile.Override
	for _, s := range sets {
		key, value, _ := strings.Cut(s, "=")
		overrides = append(overrides, jobfile.Override{Key: key, Value: value})
	}
	return jobfile.Read(name, data, os.DirFS(jobsFolder), overrides...)
}

func inputOf(j *arrest.Job, key string) *arrest.Input {
	for i := range j.Inputs {
		if j.Inputs[i].Key == key {
			return &j.Inputs[i]
		}
	}
	return &arrest.Input{}
}

// An overridden figure has lost its source and its note, wherever those stood,
// and is open; the file says what it was.
func TestOverrides(t *testing.T) {
	for _, c := range []struct{ file, set, former, key, text string }{
		{"metric-settled.toml", "worker.mass=95 kg ± 2 kg", "100 kg ± 0 kg", "worker.mass", "95 kg ± 2 kg"},
		{"metric-basic.toml", "worker.tools=3 kg", "0 kg", "worker.tools", "3 kg"},
		{"metric-basic.toml", "fall.initial_speed=1 m/s", "", "fall.initial_speed", "1 m/s"},
		{"nothing-about-the-stop.toml", "stop.distance=0.9 m", "", "stop.distance", "0.9 m"},
		{"example-values.toml", "rated[2].total_mass=59 kg .. 120 kg", "100 kg ± 40 kg", "rated[2].total_mass", "59 kg .. 120 kg"},
		{"three-workers.toml", "worker[2].mass=120 kg", "104 kg ± 1 kg", "worker[2].mass", "120 kg"},
		{"one-worker-as-a-list.toml", "worker.mass=150 kg", "180 kg", "worker.mass", "150 kg"},
		{"one-worker-as-a-list.toml", "worker[1].mass=150 kg", "180 kg", "worker.mass", "150 kg"},
		{"path-rope-absorber-45.toml", "connector[2].travel_at_most=0.40 m", "0.45 m ± 0", "connector[2].travel_at_most", "0.40 m"},
		{"path-rope-absorber-45.toml", "model.allowance=10 %", "25 %", "model.allowance", "10 %"},
		{"load-landing.toml", "moving_load.velocity_before[2]=-8 m/s", "-9 m/s", "moving_load.velocity_before[2]", "-8 m/s"},
		{"load-space.toml", "moving_load.velocity_before[2]=-1 m/s", "-0.5 m/s ± 0.1 m/s", "moving_load.velocity_before[2]", "-1 m/s"},
		{"load-swing.toml", "moving_load.velocity_before.speed=2 m/s", "1.5 m/s ± 0.2 m/s", "moving_load.velocity_before.speed", "2 m/s"},
		{"load-swing.toml", "moving_load.velocity_after.direction=80 deg", "90 deg", "moving_load.velocity_after.direction", "80 deg"},
		{"load-trolley.toml", "moving_load.velocity_before=1.3 m/s", "1.1 m/s", "moving_load.velocity_before", "1.3 m/s"},
		{"layout-two-positions.toml", "position[2].along=1.1 m", "1.3 m ± 0.1 m", "position[2].along", "1.1 m"},
		{"layout-two-positions.toml", "obstacle[3].below=4.2 m", "3.9 m", "obstacle[3].below", "4.2 m"},
		{"layout-two-positions.toml", "clearance.margin=0.8 m", "1 m", "clearance.margin", "0.8 m"},
		{"layout-overhead.toml", "layout.d_ring_to_feet=1.7 m", "", "layout.d_ring_to_feet", "1.7 m"},
		{"tool-tether.toml", "tool.mass=4 kg", "3.2 kg ± 0.1 kg", "tool.mass", "4 kg"},
	} {
		f, err := with(t, c.file, c.set)
		if err != nil {
			t.Errorf("%s: %v", c.set, err)
			continue
		}
		key, value, _ := strings.Cut(c.set, "=")
		want := []jobfile.Change{{Override: jobfile.Override{Key: key, Value: value}, Former: c.former}}
		if diff := cmp.Diff(want, f.Overrides); diff != "" {
			t.Errorf("%s: %s", c.set, diff)
		}
		in := inputOf(&f.Job, c.key)
		if in.Band.Text != c.text || in.Source != arrest.NoSource || in.Open() != arrest.OpenNoSource {
			t.Errorf("%s: %+v", c.set, in)
		}
		before, err := with(t, c.file)
		if err != nil || before.SHA256 != f.SHA256 || before.Overrides != nil {
			t.Errorf("%s: %v", c.set, err)
		}
		if diff := cmp.Diff(inputKeys(&before.Job), inputKeys(&f.Job)); c.former != "" && diff != "" {
			t.Errorf("%s: the other inputs: %s", c.set, diff)
		}
	}
}

// Words, numbers and the rest of the table.
func TestOverridesOfOtherKinds(t *testing.T) {
	f, err := with(t, "two-persons.toml", "worker.persons=3", "stop.shape=constant", "gravity=9.80 m/s2", "document.reference=FT-6")
	if err != nil {
		t.Fatal(err)
	}
	if f.Job.Persons != 3 || f.Job.Point.Pulse != arrest.Constant || f.Job.Point.Gravity != 9.80 || f.Document.Reference != "FT-6" {
		t.Errorf("%+v", f)
	}
	var former []string
	for _, c := range f.Overrides {
		former = append(former, c.Former)
	}
	if want := []string{"2", "early peak", "9.81 m/s2", "FT-5"}; !slices.Equal(former, want) {
		t.Errorf("former %q, want %q", former, want)
	}
	if f, err = with(t, "path-every-part.toml", "connector[2].lifeline=false", "connector[1].name=mast"); err != nil || f.Job.Point.Path.Parts[1].Lifeline || f.Job.Point.Path.Parts[0].Name != "mast" {
		t.Errorf("%v", err)
	}
	if f.Overrides[0].Former != "true" {
		t.Errorf("former %q", f.Overrides[0].Former)
	}
}

// The whole of what is said of overrides that are refused.
func TestRefusedOverrides(t *testing.T) {
	for _, c := range []struct{ file, set, want string }{
		{"metric-basic.toml", "worker.mass=95", `--set worker.mass=95: "95": a bare number has no unit; a mass is written in kg, g, t or lb
    write: --set 'worker.mass=100 kg'
`},
		{"metric-basic.toml", "worker.mass=1,8 kg", `--set worker.mass=1,8 kg: "1,8 kg": a comma is not read, since it can separate thousands or be a decimal sign: 1.8 kg or 18 kg
    write: --set 'worker.mass=1.8 kg' or --set 'worker.mass=18 kg'
`},
		{"metric-basic.toml", "worker.mass=9 kg", `--set worker.mass=9 kg: "9 kg": not plausible: it lies outside 10.0 kg to 1000 kg
    write: --set 'worker.mass=92 kg ± 1 kg'
`},
		{"metric-basic.toml", "worker.masss=95 kg", `--set worker.masss=95 kg: no such key
    write: --set 'worker.mass=...'   (if that is what was meant)
`},
		{"metric-basic.toml", "wroker.mass=95 kg", `--set wroker.mass=95 kg: no such key
    write: --set 'worker.mass=...'   (if that is what was meant)
`},
		{"metric-basic.toml", "mass=95 kg", `--set mass=95 kg: no such key at the top of the file
    write: --set 'worker.mass=...'
`},
		{"metric-basic.toml", "fall.distance=0.8 m", `--set fall.distance=0.8 m: no such key in fall; it belongs in another section
    write: --set 'stop.distance=...'
`},
		{"metric-basic.toml", "fall.free_fall=about 6 ft", `--set fall.free_fall=about 6 ft: "about 6 ft": "about" does not say how far off the figure may be; measure it, and write it with your own measured tolerance, or as a range
    measure: it, and write: --set 'fall.free_fall=6 ft ± ...' with your own measured tolerance in place of the dots
       or: write: --set 'fall.free_fall=6 ft', which leaves the input open
`},
		{"metric-basic.toml", "worker.colour=red", `--set worker.colour=red: no such key
    write: one of name, mass, tools, persons
`},
		{"metric-basic.toml", "worker=95 kg", `--set worker=95 kg: this is a section; a key in it is asked for
    write: --set 'worker.name=...'
`},
		{"metric-basic.toml", "worker..mass=95 kg", `--set worker..mass=95 kg: a key is names joined with points, each with or without its number in square brackets
    write: --set 'worker.mass=95 kg ± 2 kg'
`},
		{"metric-basic.toml", "worker[0].mass=95 kg", `--set worker[0].mass=95 kg: a key is names joined with points, each with or without its number in square brackets
    write: --set 'worker.mass=95 kg ± 2 kg'
`},
		{"metric-basic.toml", "worker.mass=", `--set worker.mass=: nothing stands after the =
    write: --set 'worker.mass=95 kg ± 2 kg'
`},
		{"metric-basic.toml", "=95 kg", `--set =95 kg: a key is names joined with points, each with or without its number in square brackets
    write: --set 'worker.mass=95 kg ± 2 kg'
`},
		{"metric-basic.toml", "worker.mass.value=95 kg", `--set worker.mass.value=95 kg: nothing more stands behind worker.mass
    write: --set 'worker.mass=...'
`},
		{"metric-basic.toml", "worker[2].mass=95 kg", `--set worker[2].mass=95 kg: [worker] stands once, without a number
    write: --set 'worker...'
`},
		{"three-workers.toml", "worker.mass=95 kg", `--set worker.mass=95 kg: which [[worker]] is meant, of 3 sections?
    write: --set 'worker[1]...'
`},
		{"three-workers.toml", "worker[4].mass=95 kg", `--set worker[4].mass=95 kg: there is no [[worker]] of this number in the file
    write: the section in the file
`},
		{"three-workers.toml", "rated[1].total_mass=95 kg", `--set rated[1].total_mass=95 kg: there is no [[rated]] of this number in the file
    write: the section in the file
`},
		{"load-landing.toml", "moving_load.velocity_before[3]=1 m/s", `--set moving_load.velocity_before[3]=1 m/s: moving_load.velocity_before has no element of this number in the file
    write: the components in the file
`},
		{"load-landing.toml", "moving_load.velocity_before.speed=1 m/s", `--set moving_load.velocity_before.speed=1 m/s: moving_load.velocity_before is not written in this way in the file
    write: --set 'moving_load.velocity_before=...', or the velocity in the file
`},
		{"load-landing.toml", "moving_load.velocity_before[2]=-8", `--set moving_load.velocity_before[2]=-8: "-8": a bare number has no unit; a speed is written in m/s, km/h, ft/s or mph
    write: "5 m/s" in its place
`},
		{"two-persons.toml", "worker.persons=two", `--set worker.persons=two: "two": this is text; a whole number without quotes is asked for
    write: --set 'worker.persons=2'
`},
		{"two-persons.toml", "stop.shape=early", `--set stop.shape=early: "early": no such word here
    write: one of "constant", "rising ramp", "spring-like rise", "rise then plateau", "early peak"
`},
		{"example-values.toml", "example=false", `--set example=false: example is written in the file only
    write: it in the file
`},
		{"example-values.toml", "format=x", `--set format=x: format is written in the file only
    write: it in the file
`},
		{"example-values.toml", "limit[1].at_most=9 kN", `--set limit[1].at_most=9 kN: [[limit]] is written in the file only
    write: it in the file
`},
		{"example-values.toml", "limits=x.toml", `--set limits=x.toml: limits is written in the file only
    write: it in the file
`},
		{"example-values.toml", "rated[1].document=label", `--set rated[1].document=label: rated[1].document is written in the file only
    write: it in the file
`},
		{"layout-edge-unrated.toml", "layout.edge_rated_by=manual", `--set layout.edge_rated_by=manual: layout.edge_rated_by is written in the file only
    write: it in the file
`},
		{"layout-edge-unrated.toml", "layout.edge=none", `--set layout.edge=none: layout.edge is written in the file only
    write: it in the file
`},
		{"layout-two-positions.toml", "obstacle[3].moving=false", `--set obstacle[3].moving=false: obstacle[3].moving is written in the file only
    write: it in the file
`},
		{"layout-two-positions.toml", "clearance.margin_includes=anchor_give", `--set clearance.margin_includes=anchor_give: clearance.margin_includes is written in the file only
    write: it in the file
`},
		{"layout-two-positions.toml", "clearance.harness_stretch=0.3 m", `--set clearance.harness_stretch=0.3 m: "0.3 m": it would be counted twice: clearance.margin_includes counts it already
    take out: clearance.harness_stretch
       or: "harness_stretch" of clearance.margin_includes
`},
		{"path-rope.toml", "connector[1].source=measured", `--set connector[1].source=measured: connector[1].source is written in the file only
    write: it in the file
`},
		{"path-every-part.toml", "connector[9].points=0 mm 0 kN", `--set connector[9].points=0 mm 0 kN: connector[9].points is written in the file only
    write: it in the file
`},
	} {
		_, err := with(t, c.file, c.set)
		if err == nil {
			t.Errorf("%s is taken", c.set)
			continue
		}
		if got, want := err.Error(), c.file+": "+c.want+"1 fault; nothing was calculated"; got != want {
			t.Errorf("%s:\n%s\nwant\n%s", c.set, got, want)
		}
	}
}

func TestOverrideTwice(t *testing.T) {
	_, err := with(t, "one-worker-as-a-list.toml", "worker.mass=95 kg", "worker[1].mass=96 kg")
	if err == nil || !strings.Contains(err.Error(), "--set worker[1].mass=96 kg: the key is set twice\n") {
		t.Error(err)
	}
}

// What an override makes impossible is refused as if it stood in the file.
func TestOverrideThatContradicts(t *testing.T) {
	_, err := with(t, "metric-basic.toml", "stop.time=0.15 s")
	if err == nil || !strings.Contains(err.Error(), "stop.distance and stop.time: impossible together") {
		t.Error(err)
	}
	_, err = with(t, "path-every-part.toml", "connector[4].travel_before_locking=2 m")
	if err == nil || !strings.Contains(err.Error(), "--set connector[4].travel_before_locking=2 m: \"2 m\": it is a part of fall.free_fall, and that is 1.7 m .. 1.8 m\n") {
		t.Error(err)
	}
}

// A connector that an override makes too short is refused at the position.
func TestOverrideOutOfReach(t *testing.T) {
	_, err := with(t, "layout-overhead.toml", "layout.connector_length=1.9 m")
	// sqrt(1.2^2 + 1.5^2) = 1.92094, below 2.0
	if err == nil || !strings.Contains(err.Error(), `position[1]: out of reach: from the anchor to the D-ring at "lamp 14" it is 1.9209 m, and the connector reaches 1.9000 m`) {
		t.Error(err)
	}
	if _, err = with(t, "layout-overhead.toml", "layout.connector_length=1.93 m"); err != nil {
		t.Error(err)
	}
}

// An override of a rating's figure keeps it from clearing anything: no document
// says it any more.
func TestOverriddenRatingIsOpen(t *testing.T) {
	f, err := with(t, "rated.toml", "rated[1].peak_force_at_most=5 kN")
	if err != nil {
		t.Fatal(err)
	}
	if is := outcome(f); is != "undecided" {
		t.Errorf("the limit is %v", is)
	}
	if f, err = with(t, "rated.toml"); err != nil || outcome(f) != "within" {
		t.Errorf("as the document says: %v, %v", outcome(f), err)
	}
}

// Fuzzing finds no override that gets by without a fault or a change.
func FuzzOverride(f *testing.F) {
	for _, s := range []string{"worker.mass=95 kg", "worker[1].mass=95 kg", "stop.shape=constant", "moving_load.velocity_before[1]=3 m/s", "connector[1].length=2 m", "gravity=9.80 m/s2", "a[b].c=", "worker.persons=2", "position[1].along=1 m", "layout.slack=0 m", "clearance.margin=1 m"} {
		f.Add(s)
	}
	jobs := map[string][]byte{}
	for _, name := range []string{"metric-basic.toml", "path-every-part.toml", "load-space.toml", "load-swing.toml", "three-workers.toml", "layout-two-positions.toml"} {
		data, err := os.ReadFile(filepath.Join(jobsFolder, name))
		if err != nil {
			f.Fatal(err)
		}
		jobs[name] = data
	}
	f.Fuzz(func(t *testing.T, set string) {
		key, value, _ := strings.Cut(set, "=")
		for name, data := range jobs {
			file, err := jobfile.Read(name, data, nil, jobfile.Override{Key: key, Value: value})
			if err != nil {
				refusedWell(t, err)
				continue
			}
			if len(file.Overrides) != 1 {
				t.Errorf("%q: %v", set, file.Overrides)
			}
			for _, in := range file.Job.Inputs {
				if in.Key == key && in.Role != arrest.OfPlace && in.Open() == arrest.Settled {
					t.Errorf("%q is settled", set)
				}
				if math.IsNaN(in.Band.Low) || in.Band.Tolerance == quantity.Range != math.IsNaN(in.Band.Value) {
					t.Errorf("%q: %+v", set, in)
				}
			}
		}
	})
}
