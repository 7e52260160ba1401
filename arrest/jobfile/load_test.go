package jobfile_test

import (
	"math"
	"slices"
	"testing"

	"github.com/google/go-cmp/cmp"

	"arrestcheck/arrest"
	"arrestcheck/arrest/jobfile"
	"arrestcheck/arrest/quantity"
)

// estimate works a job out and returns one of its figures.
func estimate(t *testing.T, j *arrest.Job, q arrest.Quantity, e arrest.Evidence) arrest.Estimate {
	t.Helper()
	r := arrest.Evaluate(j)
	for i := range r.Estimates {
		if r.Estimates[i].Quantity == q && r.Estimates[i].Evidence == e {
			return r.Estimates[i]
		}
	}
	t.Fatalf("no %s estimate of %s", e, q)
	return arrest.Estimate{}
}

func near(t *testing.T, what string, got, want, relative float64) {
	t.Helper()
	if !quantity.Close(got, want, relative) {
		t.Errorf("%s %.12g, want %.12g", what, got, want)
	}
}

// 616.644143733 N*s in the direction 108.434948823 deg: rows imp-2d-mag and
// imp-2d-dir of testdata/reference/worked.toml; 2722.5 N: row we-bumper.
func TestMovingLoadsFromFiles(t *testing.T) {
	j := goodJob(t, "load-landing.toml").Job
	near(t, "impulse", estimate(t, &j, arrest.Impulse, arrest.Given).Value, 616.644143733, 1e-11)
	near(t, "direction", estimate(t, &j, arrest.ImpulseDirection, arrest.Given).Value*180/math.Pi, 108.434948823, 1e-11)
	if j.Persons != 0 || !j.Moving() {
		t.Errorf("%d persons, moving %v", j.Persons, j.Moving())
	}
	j = goodJob(t, "load-trolley.toml").Job
	near(t, "force", estimate(t, &j, arrest.StoppingForce, arrest.Given).Value, 2722.5, 1e-14)
}

func TestInputsOfMovingLoads(t *testing.T) {
	type input struct {
		Key  string
		Role arrest.Role
		Set  bool
	}
	for name, want := range map[string][]input{
		"load-slope.toml": {
			{"moving_load.mass", arrest.OfWorker, true}, {"moving_load.velocity_before", arrest.OfFall, true}, {"moving_load.velocity_after", arrest.OfFall, true},
			{"moving_load.distance", arrest.OfStop, true}, {"moving_load.time", arrest.OfStop, true},
			{"moving_load.driving_force", arrest.OfDrive, true}, {"moving_load.slope_down", arrest.OfDrive, true}, {"gravity", arrest.OfPlace, true},
		},
		"load-landing.toml": {
			{"moving_load.mass", arrest.OfWorker, true},
			{"moving_load.velocity_before[1]", arrest.OfFall, true}, {"moving_load.velocity_before[2]", arrest.OfFall, true},
			{"moving_load.velocity_after[1]", arrest.OfFall, true}, {"moving_load.velocity_after[2]", arrest.OfFall, true},
			{"moving_load.time", arrest.OfStop, true}, {"gravity", arrest.OfPlace, true},
		},
		"load-swing.toml": {
			{"moving_load.mass", arrest.OfWorker, true},
			{"moving_load.velocity_before.speed", arrest.OfFall, true}, {"moving_load.velocity_before.direction", arrest.OfFall, false},
			{"moving_load.velocity_after.speed", arrest.OfFall, true}, {"moving_load.velocity_after.direction", arrest.OfFall, false},
			{"moving_load.time", arrest.OfStop, true}, {"gravity", arrest.OfPlace, true},
		},
	} {
		var got []input
		for _, in := range goodJob(t, name).Job.Inputs {
			got = append(got, input{in.Key, in.Role, in.Set != nil})
		}
		if diff := cmp.Diff(want, got); diff != "" {
			t.Errorf("%s: %s", name, diff)
		}
	}
	// A source in a list belongs to its component alone.
	in := goodJob(t, "load-space.toml").Job.Inputs
	if in[1].Source != arrest.NoSource || in[2].Source != arrest.FromMeasured || in[3].Band.Tolerance != quantity.Range {
		t.Errorf("%+v", in[1:4])
	}
}

// 1.5 m/s at 30 degrees: cos 30 = sqrt(3)/2, sin 30 = 1/2; along y nothing is
// left of x, although a right angle in radians is no exact number.
func TestSpeedWithADirection(t *testing.T) {
	j := goodJob(t, "load-swing.toml").Job
	l := j.Point.Load
	near(t, "x before", l.Before[0], 1.5*math.Sqrt(3)/2, 1e-15)
	near(t, "y before", l.Before[1], 0.75, 1e-15)
	if l.After != [3]float64{0, 0.8, 0} || l.Axes != 2 || l.Up != [3]float64{} {
		t.Errorf("%+v", l)
	}
	speed := j.Inputs[1]
	c := j.Point
	speed.Set(&c, 3)
	near(t, "x at 3 m/s", c.Load.Before[0], 3*math.Sqrt(3)/2, 1e-15)
	near(t, "y at 3 m/s", c.Load.Before[1], 1.5, 1e-15)
}

// A slope of 4 degrees downhill pushes with m g sin 4: the weight's part along
// the motion is then above zero.
func TestSlope(t *testing.T) {
	j := goodJob(t, "load-slope.toml").Job
	near(t, "up along the path", j.Point.Load.Up[0], -math.Sin(4*math.Pi/180), 1e-15)
	k := slices.IndexFunc(j.Inputs, func(in arrest.Input) bool { return in.Key == "moving_load.slope_down" })
	c := j.Point
	j.Inputs[k].Set(&c, -math.Pi/2)
	if c.Load.Up != [3]float64{1, 0, 0} {
		t.Errorf("straight up: %v", c.Load.Up)
	}
	// Downhill the buffer has more to hold than on the level: m g sin 4 more.
	level := goodJob(t, "load-slope.toml").Job.Point
	level.Load.Up = [3]float64{}
	var a, b arrest.Point
	arrest.At(&j.Point, &a)
	arrest.At(&level, &b)
	near(t, "weight along the path", a.Load.OverDistance-b.Load.OverDistance, 2400*9.80665*math.Sin(4*math.Pi/180), 1e-12)
}

// Every axis is read as itself.
func TestUp(t *testing.T) {
	for up, want := range map[string][3]float64{
		"+x": {1}, "-x": {-1}, "+y": {0, 1}, "-y": {0, -1}, "+z": {0, 0, 1}, "-z": {0, 0, -1},
	} {
		f, err := jobfile.Read("job", []byte("format = \"arrestcheck job 1\"\n[document]\ntitle = \"a\"\n[moving_load]\nmass = \"2 kg\"\nvelocity_before = [\"1 m/s\", \"2 m/s\", \"3 m/s\"]\n"+
			"velocity_after = [\"0 m/s\", \"0 m/s\", \"0 m/s\"]\ntime = \"1 s\"\nup = \""+up+"\"\n"), nil)
		if err != nil {
			t.Fatal(err)
		}
		if f.Job.Point.Load.Up != want {
			t.Errorf("%s: %v", up, f.Job.Point.Load.Up)
		}
	}
}
