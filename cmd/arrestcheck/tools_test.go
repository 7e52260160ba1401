//go:build tools

package main

import (
	"path/filepath"
	"testing"

	"github.com/rogpeppe/go-internal/testscript"
)

// TestWithTools runs the scripts that need programs of others: sha256sum and
// GNU parallel. They are asked for with -tags tools, and then have to be there.
func TestWithTools(t *testing.T) {
	const folder, scripts = "../../testdata/tools", 2
	names, err := filepath.Glob(folder + "/*.txtar")
	if err != nil || len(names) != scripts {
		t.Fatalf("%d scripts, want %d: %v", len(names), scripts, err)
	}
	jobs, err := filepath.Abs("../../testdata")
	if err != nil {
		t.Fatal(err)
	}
	testscript.Run(t, testscript.Params{
		Dir: folder,
		Setup: func(e *testscript.Env) error {
			e.Setenv("TESTDATA", jobs)
			return nil
		},
		Cmds: map[string]func(ts *testscript.TestScript, neg bool, args []string){
			"edit":  edit,
			"exits": exits,
		},
		RequireExplicitExec: true,
		RequireUniqueNames:  true,
	})
}
