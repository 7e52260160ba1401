package jobfile_test

import (
	"fmt"
	"os"
	"path/filepath"
	"testing"

	"arrestcheck/arrest"
	"arrestcheck/arrest/jobfile"
)

// A Repeat says of every job what Evaluate says, whatever kinds of entries it
// has: %v writes every digit of a float64.
func TestRepeatOfEveryJob(t *testing.T) {
	for _, name := range files(t, jobsFolder, 32) {
		data, err := os.ReadFile(filepath.Join(jobsFolder, name))
		if err != nil {
			t.Fatal(err)
		}
		f, err := jobfile.Read(name, data, os.DirFS(jobsFolder))
		if err != nil {
			t.Fatal(err)
		}
		if _, never := arrest.Impossible(&f.Job); never {
			continue // refused before it is evaluated
		}
		repeat := arrest.NewRepeat(&f.Job)
		res := arrest.Evaluate(&f.Job)
		want := fmt.Sprint(res.Estimates, res.Contradictions)
		for range 2 {
			again := repeat.Evaluate()
			if got := fmt.Sprint(again.Estimates, again.Contradictions); got != want {
				t.Errorf("%s:\n%s\nwant\n%s", name, got, want)
			}
		}
	}
}
