package main

import (
	"bytes"
	"os"

	"github.com/rogpeppe/go-internal/testscript"
)

// edit FILE OLD NEW: the first OLD in the file becomes NEW, as by hand. It must
// be there.
func edit(ts *testscript.TestScript, neg bool, args []string) {
	if neg || len(args) != 3 {
		ts.Fatalf("usage: edit FILE OLD NEW")
	}
	path := ts.MkAbs(args[0])
	data, err := os.ReadFile(path)
	ts.Check(err)
	before := []byte(args[1])
	if !bytes.Contains(data, before) {
		ts.Fatalf("%s holds no %q", args[0], args[1])
	}
	ts.Check(os.WriteFile(path, bytes.Replace(data, before, []byte(args[2]), 1), 0o666))
}
