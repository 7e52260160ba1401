package jobfile_test

import (
	"errors"
	"os"
	"path/filepath"
	"slices"
	"strings"
	"testing"
	"testing/fstest"
	"unicode/utf8"

	"arrestcheck/arrest"
	"arrestcheck/arrest/jobfile"
	"arrestcheck/arrest/rig"
)

// seed adds every file of a folder.
func seed(f *testing.F, folder string) {
	for _, name := range files(f, folder, 1) {
		data, err := os.ReadFile(filepath.Join(folder, name))
		if err != nil {
			f.Fatal(err)
		}
		f.Add(data)
	}
}

// refusedWell asserts what holds of every refusal, whatever the bytes were.
func refusedWell(t *testing.T, err error) {
	var faults *jobfile.Faults
	if !errors.As(err, &faults) {
		t.Fatalf("not *Faults: %v", err)
	}
	wellFormed(t, faults)
	text := err.Error()
	if !utf8.ValidString(text) || !strings.HasSuffix(text, "; nothing was calculated") {
		t.Errorf("message %q", text)
	}
	if again := err.Error(); again != text {
		t.Errorf("printed twice, %q and %q", text, again)
	}
}

func FuzzRead(f *testing.F) {
	seed(f, jobsFolder)
	seed(f, invalidFolder)
	rules, err := os.ReadFile(filepath.Join(invalidFolder, "site", "rules.toml"))
	if err != nil {
		f.Fatal(err)
	}
	folder := fstest.MapFS{"site/rules.toml": {Data: rules}, "site-limits.toml": {Data: rules}}
	f.Fuzz(func(t *testing.T, data []byte) {
		file, err := jobfile.Read("job.toml", data, folder)
		if err != nil {
			refusedWell(t, err)
			return
		}
		canBeWorkedOut(t, &file.Job)
	})
}

// canBeWorkedOut asserts what the mechanics ask of a job, at both ends of its
// bands.
func canBeWorkedOut(t *testing.T, j *arrest.Job) {
	low, high, bands := j.Point, j.Point, [rig.MaxPositions + 1]int{}
	for _, in := range j.Inputs {
		if !(in.Band.Low <= in.Band.High) || in.Band.Unit.Symbol == "" {
			t.Errorf("%s: %+v", in.Key, in.Band)
		}
		if in.Set == nil {
			continue
		}
		if in.Band.Low < in.Band.High {
			bands[in.Position]++
		}
		in.Set(&low, in.Band.Low)
		in.Set(&high, in.Band.High)
	}
	if bands[0]+slices.Max(bands[1:]) > 16 {
		t.Errorf("%d bands", bands)
	}
	for _, c := range []arrest.Case{low, j.Point, high} {
		if l := c.Load; !(c.Gravity > 0) || !(c.Mass > 0) != (l.Mass > 0) || !(c.Tools >= 0) || !(c.FreeFall >= 0) ||
			!(c.InitialSpeed >= 0) || !(c.Distance >= 0) || !(c.Time >= 0) || !(c.Rise >= 0 && c.Rise <= 1) ||
			!(l.Driving >= 0) || !(l.Time >= 0) || !(l.Distance >= 0) || l.Distance > 0 && l.Axes != 1 ||
			l.Mass > 0 && (j.Persons != 0 || l.Axes < 1 || l.Axes > 3 || l.Time == 0 && l.Distance == 0 || c.Path != nil || len(j.Ratings) > 0) {
			t.Errorf("read as %+v, %d persons", c, j.Persons)
		}
		var p arrest.Point
		arrest.At(&c, &p)
		if c.Layout != nil && (p.Layout == nil || p.Layout.Place.Status == rig.Incomplete || p.Layout.Place.Status == rig.SlackTwice) {
			t.Errorf("the layout is not known: %+v\n%v", c.Layout, c.Figures)
		}
		if c.Path != nil && p.Model.Failed != nil {
			t.Errorf("the path fails: %v\n%+v\n%v", p.Model.Failed, c.Path.Parts, c.Figures)
		}
	}
	for i, r := range j.Ratings {
		if r.Part != 0 && (j.Point.Path == nil || r.Part > len(j.Point.Path.Parts)) {
			t.Errorf("rating %d of part %d", i+1, r.Part)
		}
	}
}

func FuzzReadLimits(f *testing.F) {
	seed(f, limitsFolder)
	seed(f, filepath.Join(invalidFolder, "limits"))
	seed(f, filepath.Join(jobsFolder, "site"))
	f.Fuzz(func(t *testing.T, data []byte) {
		set, err := jobfile.ReadLimits("limits.toml", data)
		if err != nil {
			refusedWell(t, err)
			return
		}
		for _, l := range set.Limits {
			if l.ID == "" || l.Quantity == "" || l.Sense == "" || l.Authority == "" || l.Edition == "" || l.Kind == "" ||
				!(l.Bound.Low == l.Bound.High && l.Bound.Value >= 0) || l.Bound.Unit.Symbol == "" {
				t.Errorf("read as %+v", l)
			}
		}
	})
}
