package jobfile_test

import (
	"os"
	"path/filepath"
	"strings"
	"testing"

	"arrestcheck/arrest/jobfile"
)

const (
	jobsFolder   = "../../testdata/jobs"
	limitsFolder = "../../testdata/limits"
)

// files returns the names of the TOML files of a folder. Each folder of cases
// is counted, so that none is skipped quietly.
func files(t testing.TB, folder string, atLeast int) []string {
	t.Helper()
	entries, err := os.ReadDir(folder)
	if err != nil {
		t.Fatal(err)
	}
	var names []string
	for _, e := range entries {
		if strings.HasSuffix(e.Name(), ".toml") {
			names = append(names, e.Name())
		}
	}
	if len(names) < atLeast {
		t.Fatalf("%s holds %d files, at least %d expected", folder, len(names), atLeast)
	}
	return names
}

func TestGoodJobsAreRead(t *testing.T) {
	for _, name := range files(t, jobsFolder, 47) {
		data, err := os.ReadFile(filepath.Join(jobsFolder, name))
		if err != nil {
			t.Fatal(err)
		}
		f, err := jobfile.Read(name, data, os.DirFS(jobsFolder))
		if err != nil {
			t.Errorf("%s\n%v", name, err)
			continue
		}
		if w := never.FindString(string(data)); w != "" {
			t.Errorf("%s: the file holds %q", name, w)
		}
		if f.Document.Title == "" || len(f.Job.Inputs) == 0 || f.Job.Point.Mass+f.Job.Point.Load.Mass <= 0 || f.Job.Point.Gravity <= 0 {
			t.Errorf("%s: read as %+v", name, f)
		}
	}
}

func TestGoodLimitsAreRead(t *testing.T) {
	for _, name := range files(t, limitsFolder, 3) {
		data, err := os.ReadFile(filepath.Join(limitsFolder, name))
		if err != nil {
			t.Fatal(err)
		}
		set, err := jobfile.ReadLimits(name, data)
		if err != nil {
			t.Errorf("%s\n%v", name, err)
			continue
		}
		if set.Title == "" || len(set.Limits) == 0 {
			t.Errorf("%s: read as %+v", name, set)
		}
	}
}
