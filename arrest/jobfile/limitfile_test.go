package jobfile_test

import (
	"crypto/sha256"
	"errors"
	"fmt"
	"io/fs"
	"os"
	"path/filepath"
	"strings"
	"testing"
	"testing/fstest"

	"arrestcheck/arrest/jobfile"
)

const oneLimit = `format = "arrestcheck limits 1"
title = "House rules"
checked_on = "3 June 2025"
[[limit]]
id = "peak-on-body"
quantity = "peak_force"
at_most = "8 kN"
authority = "house rule 2"
edition = "2025"
kind = "person"
`

// naming returns a job that names limit files.
func naming(list string) []byte { return []byte("limits = [" + list + "]\n" + minimalJob) }

func write(t *testing.T, path, text string) {
	t.Helper()
	if err := os.MkdirAll(filepath.Dir(path), 0o755); err != nil {
		t.Fatal(err)
	}
	if err := os.WriteFile(path, []byte(text), 0o644); err != nil {
		t.Fatal(err)
	}
}

// The folder is opened as the command opens it: so that no link leads out.
func TestLimitFilesOfAFolder(t *testing.T) {
	outside := t.TempDir()
	write(t, filepath.Join(outside, "rules.toml"), oneLimit)
	folder := t.TempDir()
	write(t, filepath.Join(folder, "rules.toml"), oneLimit)
	write(t, filepath.Join(folder, "below", "rules.toml"), oneLimit)
	write(t, filepath.Join(folder, "large.toml"), oneLimit+"#"+strings.Repeat("x", 1<<20))
	for link, target := range map[string]string{
		"link-out.toml":    filepath.Join(outside, "rules.toml"),
		"link-in.toml":     "rules.toml",
		"link-folder":      outside,
		"link-device.toml": "/dev/zero",
		"link-loop.toml":   "link-loop.toml",
	} {
		if err := os.Symlink(target, filepath.Join(folder, link)); err != nil {
			t.Skipf("no links here: %v", err)
		}
	}
	root, err := os.OpenRoot(folder)
	if err != nil {
		t.Fatal(err)
	}
	defer root.Close()
	for _, c := range []struct {
		name, reason string // no reason: read
		unreadable   bool
	}{
		{"rules.toml", "", false},
		{"below/rules.toml", "", false},
		{"link-in.toml", "", false},
		{"link-out.toml", "a link leads out of the folder", false},
		{"link-folder/rules.toml", "a link leads out of the folder", false},
		{"link-device.toml", "a link leads out of the folder", false},
		{"link-loop.toml", "cannot be read", true},
		{"absent.toml", "no such file", false},
		{"below/absent.toml", "no such file", false},
		{"below", "a folder, not a file", false},
		{"large.toml", "larger than 1048576 bytes", false},
	} {
		f, err := jobfile.Read("job.toml", naming(`"`+c.name+`"`), root.FS())
		if c.reason == "" {
			if err != nil {
				t.Errorf("%s: %v", c.name, err)
			} else if s := f.Sets[0]; s.Name != c.name || s.SHA256 != fmt.Sprintf("%x", sha256.Sum256([]byte(oneLimit))) {
				t.Errorf("%s: read as %+v", c.name, s)
			}
			continue
		}
		var faults *jobfile.Faults
		if !errors.As(err, &faults) || len(faults.List) != 1 || !strings.Contains(faults.List[0].Reason, c.reason) || faults.Unreadable() != c.unreadable {
			t.Errorf("%s: %v", c.name, err)
		}
	}
}

// brokenFS fails in the way of a machine, at opening or at reading.
type brokenFS struct {
	fstest.MapFS
	open, read error
}

func (b brokenFS) Open(name string) (fs.File, error) {
	f, err := b.MapFS.Open(name)
	if b.open != nil {
		return nil, &fs.PathError{Op: "open", Path: name, Err: b.open}
	}
	return brokenFile{f, b.read}, err
}

func (b brokenFS) Stat(name string) (fs.FileInfo, error) { return b.MapFS.Stat(name) }

type brokenFile struct {
	fs.File
	err error
}

func (b brokenFile) Read([]byte) (int, error) { return 0, b.err }

func TestUnreadableLimitFiles(t *testing.T) {
	good := fstest.MapFS{"rules.toml": {Data: []byte(oneLimit)}}
	for name, folder := range map[string]fs.FS{
		"input/output error": brokenFS{MapFS: good, read: errors.New("input/output error")},
		"permission":         brokenFS{MapFS: good, open: fs.ErrPermission},
	} {
		// A fault of the job beside it does not hide that a file is unreadable.
		job := strings.Replace(string(naming(`"rules.toml"`)), `"92 kg"`, "92", 1)
		_, err := jobfile.Read("job.toml", []byte(job), folder)
		var faults *jobfile.Faults
		if !errors.As(err, &faults) || len(faults.List) != 2 || !faults.Unreadable() || !strings.Contains(err.Error(), name) {
			t.Errorf("%s: %v", name, err)
		}
	}
}

func TestNotAPlainFile(t *testing.T) {
	pipe := fstest.MapFS{"rules.toml": {Mode: fs.ModeNamedPipe, Data: []byte(oneLimit)}}
	_, err := jobfile.Read("job.toml", naming(`"rules.toml"`), pipe)
	if err == nil || !strings.Contains(err.Error(), "not a plain file") {
		t.Error(err)
	}
}

func TestNoFolder(t *testing.T) {
	_, err := jobfile.Read("-", naming(`"rules.toml"`), nil)
	if err == nil || !strings.Contains(err.Error(), "standard input:1: limits[1]: \"rules.toml\": no folder is given") {
		t.Error(err)
	}
}

func TestPins(t *testing.T) {
	folder := fstest.MapFS{"rules.toml": {Data: []byte(oneLimit)}}
	right := fmt.Sprintf("%x", sha256.Sum256([]byte(oneLimit)))
	for _, pin := range []string{right, strings.ToUpper(right)} {
		if _, err := jobfile.Read("job.toml", naming(`{ file = "rules.toml", sha256 = "`+pin+`" }`), folder); err != nil {
			t.Errorf("%s: %v", pin, err)
		}
	}
	last := "0"
	if strings.HasSuffix(right, last) {
		last = "1"
	}
	for _, pin := range []string{right[:63] + last, right[:63] + "g", right[:63], right + "0"} {
		if _, err := jobfile.Read("job.toml", naming(`{ file = "rules.toml", sha256 = "`+pin+`" }`), folder); err == nil {
			t.Errorf("%s is taken for the digest", pin)
		}
	}
}
