package jobfile_test

import (
	"errors"
	"os"
	"path/filepath"
	"strings"
	"testing"
	"testing/fstest"
	"unicode/utf8"

	"arrestcheck/arrest/jobfile"
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
		if c := file.Job.Point; !(c.Mass > 0) || !(c.Tools >= 0) || !(c.Gravity > 0) || !(c.FreeFall >= 0) ||
			!(c.InitialSpeed >= 0) || !(c.Distance >= 0) || !(c.Time >= 0) || !(c.Rise >= 0 && c.Rise <= 1) || file.Job.Persons < 1 {
			t.Errorf("read as %+v", file.Job)
		}
		for _, in := range file.Job.Inputs {
			if !(in.Band.Low <= in.Band.High) {
				t.Errorf("%s: %+v", in.Key, in.Band)
			}
		}
	})
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
