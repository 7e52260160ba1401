package main

import (
	"strconv"
	"testing"

	"github.com/BurntSushi/toml"

	"arrestcheck/arrest"
)

// The history of the versions ends with the present ones, names each once, and
// says why each was made.
func TestHistory(t *testing.T) {
	type version struct{ Version, Reason string }
	var history struct{ Mechanics, Program []version }
	meta, err := toml.DecodeFile("../../testdata/history.toml", &history)
	if err != nil || len(meta.Undecoded()) > 0 {
		t.Fatal(err, meta.Undecoded())
	}
	for i, v := range history.Mechanics {
		if v.Version != strconv.Itoa(i+1) {
			t.Errorf("mechanics %q stands at place %d", v.Version, i+1)
		}
	}
	for name, c := range map[string]struct {
		list []version
		is   string
	}{"mechanics": {history.Mechanics, arrest.ModelVersion}, "program": {history.Program, toolVersion}} {
		if n := len(c.list); n == 0 || c.list[n-1].Version != c.is {
			t.Errorf("%s: the history does not end with %q", name, c.is)
		}
		seen := map[string]bool{}
		for _, v := range c.list {
			if seen[v.Version] || v.Reason == "" {
				t.Errorf("%s %q: twice, or without a reason", name, v.Version)
			}
			seen[v.Version] = true
		}
	}
}
