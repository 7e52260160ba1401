package jobfile_test

import (
	"math"
	"strings"
	"testing"

	"github.com/google/go-cmp/cmp"

	"arrestcheck/arrest"
	"arrestcheck/arrest/jobfile"
	"arrestcheck/arrest/quantity"
)

// The lightest is the apprentice, 60 - 1 kg with 0 kg; the heaviest the plumber,
// 104 + 1 kg with 12 kg.
func TestSeveralWorkers(t *testing.T) {
	j := goodJob(t, "three-workers.toml").Job
	want := []string{
		"worker[1].mass", "worker[1].tools", "worker[2].mass", "worker[2].tools", "worker[3].mass", "worker[3].tools",
		"workers.total_mass", "fall.free_fall", "stop.distance", "gravity",
	}
	if diff := cmp.Diff(want, inputKeys(&j)); diff != "" {
		t.Fatal(diff)
	}
	for _, in := range j.Inputs[:6] {
		if in.Set != nil || in.Role != arrest.OfWorker || in.Derived {
			t.Errorf("%+v", in)
		}
	}
	if n := j.Inputs[0].Note; n != "roofer: scale at the gate" {
		t.Errorf("note %q", n)
	}
	if n := j.Inputs[5].Note; n != "apprentice" {
		t.Errorf("note %q", n)
	}
	all := j.Inputs[6]
	if !all.Derived || all.Role != arrest.OfWorker || all.Band.Low != 59 || all.Band.High != 117 || !math.IsNaN(all.Band.Value) ||
		all.Band.Tolerance != quantity.Range || all.Band.Unit.Symbol != "kg" || all.Band.Text != "lightest to heaviest of 3 workers" {
		t.Errorf("%+v", all)
	}
	if all.Source != arrest.FromPlan || all.Open() != arrest.Settled { // masses measured, tools by plan
		t.Errorf("source %q, open %q", all.Source, all.Open())
	}
	if j.Persons != 1 || j.Point.Mass != 59 || j.Point.Tools != 0 || j.TotalMass().High != 117 {
		t.Errorf("%+v, %d persons", j.Point, j.Persons)
	}
	c := arrest.Case{Tools: 7}
	all.Set(&c, 90)
	if c.Mass != 90 || c.Tools != 0 {
		t.Errorf("set to %+v", c)
	}
}

func TestOneWorkerAsAList(t *testing.T) {
	j := goodJob(t, "one-worker-as-a-list.toml").Job
	if diff := cmp.Diff([]string{"worker.mass", "worker.tools", "fall.free_fall", "gravity"}, inputKeys(&j)); diff != "" {
		t.Error(diff)
	}
	if j.Persons != 2 || j.Point.Mass != 180 || j.Inputs[0].Note != "rescuer with casualty" || j.Inputs[1].Note != "rescuer with casualty: kit and litter" {
		t.Errorf("%+v", j)
	}
}

// What nobody knows of one worker nobody knows of all.
func TestSourceOfSeveralWorkers(t *testing.T) {
	for _, c := range []struct {
		first, second string
		want          arrest.Source
		unit          string
	}{
		{`{ value = "80 kg", source = "measured" }`, `{ value = "90 kg", source = "measured" }`, arrest.FromMeasured, "kg"},
		{`{ value = "80 kg", source = "plan" }`, `{ value = "90 kg", source = "measured" }`, arrest.FromPlan, "kg"},
		{`{ value = "80 kg", source = "measured" }`, `"90 kg"`, arrest.NoSource, "kg"},
		{`{ value = "80 kg", source = "assumed" }`, `{ value = "90 kg", source = "assumed" }`, arrest.NoSource, "kg"},
		{`{ value = "160 lb", source = "measured" }`, `{ value = "200 lb", source = "measured" }`, arrest.FromMeasured, "lb"},
		{`{ value = "160 lb", source = "measured" }`, `{ value = "90 kg", source = "measured" }`, arrest.FromMeasured, "kg"},
	} {
		worker := func(mass string) string {
			tools := strings.NewReplacer("80 kg", "1 kg", "90 kg", "2 kg", "160 lb", "1 lb", "200 lb", "2 lb").Replace(mass)
			return "[[worker]]\nmass = " + mass + "\ntools = " + tools + "\n"
		}
		text := "format = \"arrestcheck job 1\"\n[document]\ntitle = \"a\"\n" + worker(c.first) + worker(c.second) + "[fall]\nfree_fall = \"1 m\"\n"
		f, err := jobfile.Read("job", []byte(text), nil)
		if err != nil {
			t.Fatal(err)
		}
		if all := f.Job.Inputs[4]; all.Source != c.want || all.Band.Unit.Symbol != c.unit {
			t.Errorf("%s, %s: %q in %s", c.first, c.second, all.Source, all.Band.Unit.Symbol)
		}
	}
}

func TestToolIsNoPerson(t *testing.T) {
	j := goodJob(t, "tool-tether.toml").Job
	if j.Persons != 0 || j.Inputs[0].Key != "tool.mass" || j.Inputs[0].Role != arrest.OfWorker {
		t.Errorf("%d persons, %+v", j.Persons, j.Inputs[0])
	}
}
