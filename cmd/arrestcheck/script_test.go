package main

import (
	"errors"
	"maps"
	"os"
	"os/exec"
	"path/filepath"
	"strconv"
	"strings"
	"testing"

	"github.com/rogpeppe/go-internal/testscript"
)

const scriptFolder = "../../testdata/script"

// scriptsOf counts the scripts by the first word of their names, so that none
// is lost unseen.
var scriptsOf = map[string]int{
	"archive":     1,
	"check":       8,
	"compare":     1,
	"completion":  1,
	"demo":        3,
	"drawing":     2,
	"envelope":    1,
	"fault":       2,
	"figure":      8,
	"file":        2,
	"help":        2,
	"internal":    1,
	"interrupt":   1,
	"layout":      1,
	"lesson":      1,
	"limits":      2,
	"methods":     2,
	"new":         2,
	"out":         5,
	"register":    3,
	"reproduce":   2,
	"schema":      1,
	"sensitivity": 1,
	"series":      3,
	"solve":       2,
	"stdin":       1,
	"stream":      1,
	"sweep":       5,
	"units":       1,
	"usage":       1,
	"version":     1,
	"watch":       1,
}

func TestMain(m *testing.M) {
	testscript.Main(m, map[string]func(){
		"arrestcheck":            main,
		"arrestcheck-full-disk":  mainOnFullDisk,
		"arrestcheck-in-a-panic": mainInAPanic,
	})
}

func TestScripts(t *testing.T) {
	jobs, err := filepath.Abs("../../testdata")
	if err != nil {
		t.Fatal(err)
	}
	testscript.Run(t, testscript.Params{
		Dir: scriptFolder,
		Setup: func(e *testscript.Env) error {
			e.Setenv("TESTDATA", jobs)
			return nil
		},
		Cmds: map[string]func(ts *testscript.TestScript, neg bool, args []string){
			"edit":      edit,
			"exits":     exits,
			"jsonvalue": jsonvalue,
			"onlyfiles": onlyfiles,
		},
		RequireExplicitExec: true,
		RequireUniqueNames:  true,
	})
}

func TestScriptsAreCounted(t *testing.T) {
	names, err := filepath.Glob(scriptFolder + "/*")
	if err != nil {
		t.Fatal(err)
	}
	found := map[string]int{}
	for _, name := range names {
		category, _, _ := strings.Cut(filepath.Base(name), "_")
		if !strings.HasSuffix(name, ".txtar") {
			t.Errorf("%s is not a script: nothing would run it", name)
		}
		found[category]++
	}
	if !maps.Equal(found, scriptsOf) {
		t.Errorf("scripts by category:\n  found  %v\n  wanted %v", found, scriptsOf)
	}
}

// exits CODE COMMAND...: the command must end with just this exit code.
func exits(ts *testscript.TestScript, neg bool, args []string) {
	if neg || len(args) < 2 {
		ts.Fatalf("usage: exits CODE COMMAND...")
	}
	want, err := strconv.Atoi(args[0])
	ts.Check(err)
	got := 0
	if err := ts.Exec(args[1], args[2:]...); err != nil {
		var exit *exec.ExitError
		if !errors.As(err, &exit) {
			ts.Fatalf("%v", err)
		}
		got = exit.ExitCode()
	}
	if got != want {
		ts.Fatalf("exit code %d, want %d", got, want)
	}
}

// onlyfiles FOLDER NAME...: the folder holds these files and no other, hidden
// ones counted.
func onlyfiles(ts *testscript.TestScript, neg bool, args []string) {
	if neg || len(args) < 1 {
		ts.Fatalf("usage: onlyfiles FOLDER NAME...")
	}
	entries, err := os.ReadDir(ts.MkAbs(args[0]))
	ts.Check(err)
	var found []string
	for _, e := range entries {
		found = append(found, e.Name())
	}
	if want := args[1:]; strings.Join(found, " ") != strings.Join(want, " ") {
		ts.Fatalf("%s holds %q, want %q", args[0], found, want)
	}
}

// mainInAPanic is the program with a mistake of a programmer's in it.
func mainInAPanic() {
	os.Exit(run([]string{"check", "-"}, panicReader{}, os.Stdout, os.Stderr))
}

type panicReader struct{}

func (panicReader) Read([]byte) (int, error) { panic("a mistake") }
