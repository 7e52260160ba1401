package main

import (
	"bytes"
	"errors"
	"io/fs"
	"math/rand/v2"
	"os"
	"os/exec"
	"path/filepath"
	"regexp"
	"slices"
	"strings"
	"testing"
	"time"
)

// A victim is a run that is killed on its way, and what must hold after it.
type victim struct {
	name  string
	args  func(to string) []string
	old   string                             // what stands at to before the run; empty: nothing
	whole func(t *testing.T, to string) bool // whether to is what the run makes
	usual time.Duration                      // how long the run takes
}

// TestKilled kills runs at random moments, without a warning that they could
// catch. Whatever the moment, what is there is what was there or all of what was
// to come, and nothing lies beside it but parts that are named as such.
func TestKilled(t *testing.T) {
	if testing.Short() {
		t.Skip("about 10 s")
	}
	const kills, most = 200, 50 * time.Second
	self, err := os.Executable()
	if err != nil {
		t.Fatal(err)
	}
	victims := killable(t, self)
	random := rand.New(rand.NewPCG(200, 3))
	begun, killed, left := time.Now(), 0, 0
	done := 0
	for ; done < kills && time.Since(begun) < most; done++ {
		v := &victims[done%len(victims)]
		folder := t.TempDir()
		to := filepath.Join(folder, "kept")
		if v.old != "" {
			writeFile(t, to, v.old)
		}
		cmd := program(self, v.args(to)...)
		if err := cmd.Start(); err != nil {
			t.Fatal(err)
		}
		time.Sleep(time.Duration((0.2 + 0.9*random.Float64()) * float64(v.usual)))
		cmd.Process.Kill()
		if err := cmd.Wait(); err != nil {
			killed++
		}
		left += afterwards(t, v, folder, to)
	}
	t.Logf("%d runs, %d killed, %d parts left", done, killed, left)
	if done < kills/4 || killed < done/4 {
		t.Errorf("%d runs, %d killed: too few to tell anything", done, killed)
	}
}

// killable returns the three commands that write, each with a run of its own
// that was left to end.
func killable(t *testing.T, self string) []victim {
	t.Helper()
	const old = "an older file\n"
	job := filepath.Join("..", "..", "testdata", "jobs", "settled.toml")
	jobs := filepath.Join("..", "..", "testdata", "jobs")
	same := func(want string) func(*testing.T, string) bool {
		return func(t *testing.T, to string) bool { return readAll(t, to) == want }
	}
	list := []victim{
		{name: "archive", args: func(to string) []string { return []string{"archive", job, "--into", to} }},
		{name: "register", old: old, args: func(to string) []string {
			return []string{"register", "--format", "csv", jobs, "--out", to, "--force"}
		}},
		{name: "check", old: old, args: func(to string) []string { return []string{"check", job, "--out", to, "--force"} }},
	}
	for i := range list {
		v := &list[i]
		to := filepath.Join(t.TempDir(), "kept")
		if v.old != "" {
			writeFile(t, to, v.old)
		}
		begun := time.Now()
		if err := program(self, v.args(to)...).Run(); exitOf(err) == int(exitFile) {
			t.Fatal(v.name, err)
		}
		v.usual = time.Since(begun)
		if v.old != "" {
			v.whole = same(readAll(t, to))
			continue
		}
		v.whole = func(t *testing.T, to string) bool {
			opened, err := openArchive(to)
			return err == nil && len(opened.Touched) == 0
		}
		if !v.whole(t, to) {
			t.Fatalf("%s: not whole when left to end", v.name)
		}
	}
	return list
}

// program is a run of the program in a process of its own.
func program(self string, args ...string) *exec.Cmd {
	return &exec.Cmd{Path: self, Args: append([]string{programName}, args...)}
}

func exitOf(err error) int {
	var exit *exec.ExitError
	if errors.As(err, &exit) {
		return exit.ExitCode()
	}
	return 0
}

var part = regexp.MustCompile(`^\.kept\.\d+-\d+\.part$`)

// afterwards looks at what a killed run left, and counts the parts.
func afterwards(t *testing.T, v *victim, folder, to string) (parts int) {
	t.Helper()
	entries, err := os.ReadDir(folder)
	if err != nil {
		t.Fatal(err)
	}
	for _, e := range entries {
		switch {
		case part.MatchString(e.Name()):
			parts++
		case e.Name() != filepath.Base(to):
			t.Errorf("%s: %q lies there", v.name, e.Name())
		}
	}
	_, err = os.Lstat(to)
	switch {
	case errors.Is(err, fs.ErrNotExist) && v.old == "":
	case err != nil:
		t.Errorf("%s: %v", v.name, err)
	case v.old != "" && readAll(t, to) == v.old:
	case !v.whole(t, to):
		t.Errorf("%s: half of it is there", v.name)
	}
	return parts
}

func writeFile(t testing.TB, path, data string) {
	t.Helper()
	if err := os.WriteFile(path, []byte(data), 0o666); err != nil {
		t.Fatal(err)
	}
}

func readAll(t testing.TB, path string) string {
	t.Helper()
	data, err := os.ReadFile(path)
	if err != nil {
		t.Fatal(err)
	}
	return string(data)
}

// An archive that cannot be filled to its end leaves nothing, and neither does
// one that is interrupted.
func TestParts(t *testing.T) {
	folder := t.TempDir()
	_, stdout, stderr := try("archive", "../../testdata/jobs/settled.toml", "--into", filepath.Join(folder, "kept"))
	if stdout == "" || !strings.Contains(stderr, "exit code") {
		t.Errorf("%q, %q", stdout, stderr)
	}
	entries, err := os.ReadDir(folder)
	if err != nil || len(entries) != 1 {
		t.Errorf("%v, %v", entries, err)
	}
	if i := slices.IndexFunc(entries, func(e fs.DirEntry) bool { return part.MatchString(e.Name()) }); i >= 0 {
		t.Errorf("%s is left", entries[i].Name())
	}
	var out bytes.Buffer
	if code := run([]string{"archive", "../../testdata/jobs/settled.toml", "--into", filepath.Join(folder, "second")},
		strings.NewReader(""), brokenWriter{}, &out); code != int(exitFile) {
		t.Errorf("exit code %d where nothing can be printed: %s", code, out.String())
	}
	if entries, err := os.ReadDir(folder); err != nil || len(entries) != 1 {
		t.Errorf("%v, %v", entries, err)
	}
}

type brokenWriter struct{}

func (brokenWriter) Write([]byte) (int, error) { return 0, errors.New("nobody reads") }
