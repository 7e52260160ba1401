package jobfile_test

import (
	"errors"
	"flag"
	"os"
	"path/filepath"
	"strings"
	"testing"

	"arrestcheck/arrest/jobfile"
)

var update = flag.Bool("update", false, "write the expected files anew from what the program says")

const invalidFolder = "../../testdata/invalid"

// TestInvalidJobs holds every file of testdata/invalid against its whole
// message. After a change of wording run
//
//	go test ./arrest/jobfile -update
//
// and read the differences.
func TestInvalidJobs(t *testing.T) {
	for _, name := range files(t, invalidFolder, 290) {
		t.Run(name, func(t *testing.T) {
			data, err := os.ReadFile(filepath.Join(invalidFolder, name))
			if err != nil {
				t.Fatal(err)
			}
			f, err := jobfile.Read(name, data, os.DirFS(invalidFolder))
			if f != nil {
				t.Error("a refused job is returned")
			}
			want(t, filepath.Join(invalidFolder, name), err)
		})
	}
}

func TestInvalidLimits(t *testing.T) {
	folder := filepath.Join(invalidFolder, "limits")
	for _, name := range files(t, folder, 8) {
		t.Run(name, func(t *testing.T) {
			data, err := os.ReadFile(filepath.Join(folder, name))
			if err != nil {
				t.Fatal(err)
			}
			set, err := jobfile.ReadLimits(name, data)
			if set != nil {
				t.Error("a refused limit file is returned")
			}
			want(t, filepath.Join(folder, name), err)
		})
	}
}

// want compares the whole message of err with the expected one.
func want(t *testing.T, path string, err error) {
	t.Helper()
	var faults *jobfile.Faults
	if !errors.As(err, &faults) {
		t.Fatalf("no *Faults: %v", err)
	}
	wellFormed(t, faults)
	expected := strings.TrimSuffix(path, ".toml") + ".want"
	got := faults.Error() + "\n"
	if w := never.FindString(got); w != "" {
		t.Errorf("the message holds %q", w)
	}
	if *update {
		if err := os.WriteFile(expected, []byte(got), 0o644); err != nil {
			t.Fatal(err)
		}
		return
	}
	text, err := os.ReadFile(expected)
	if err != nil {
		t.Fatal(err)
	}
	if got != string(text) {
		t.Errorf("message\n%s\nexpected\n%s", got, text)
	}
}

// wellFormed asserts what every message has: the file or the key, a reason, a
// next action, and no control character.
func wellFormed(t *testing.T, faults *jobfile.Faults) {
	t.Helper()
	if len(faults.List) == 0 {
		t.Error("an error without a fault")
	}
	for _, f := range faults.List {
		if f.File == "" || f.Reason == "" || f.Hint == "" || f.Line < 0 {
			t.Errorf("%#v lacks something", f)
		}
	}
	for line := range strings.Lines(faults.Error()) {
		if strings.ContainsFunc(strings.TrimSuffix(line, "\n"), func(r rune) bool { return r < ' ' || r == 0x7f || r == 0x202e }) {
			t.Errorf("%q holds a control character", line)
		}
	}
}
