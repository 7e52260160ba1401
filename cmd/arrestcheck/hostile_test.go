package main

import (
	"os"
	"path/filepath"
	"strings"
	"testing"
	"unicode"
)

// hostileNames are names of files that shells, terminals and spreadsheets could
// take for more. A system that cannot have one of them goes without.
var hostileNames = []string{
	"=1+1.toml", "@x.toml", "+x.toml", "-rf.toml", "--format.toml", "$(touch here).toml", "`touch here`.toml", "a;touch here;.toml",
	"a\nb.toml", "\x1b[2J\x1b]0;x\x07.toml", "\u202etoml.txt.toml", "a b.toml", "a|b.toml", "'.toml", "\".toml", "%s%n.toml", "&&.toml", ">here.toml",
	strings.Repeat("n", 200) + ".toml",
}

func TestHostileNames(t *testing.T) {
	folder := t.TempDir()
	t.Chdir(folder)
	if err := os.Mkdir("jobs", 0o777); err != nil {
		t.Fatal(err)
	}
	made := 0
	for _, name := range hostileNames {
		if os.WriteFile(filepath.Join("jobs", name), []byte(oneOfMany(made)), 0o666) == nil {
			made++
		}
	}
	if made < len(hostileNames)/2 {
		t.Fatalf("only %d names can be had here", made)
	}
	calls := [][]string{{"register", "jobs"}, {"register", "--format", "csv", "jobs"}, {"register", "--format", "jsonl", "jobs"}, {"register", "jobs/nothing\x1b[2J.toml"}}
	entries, err := os.ReadDir("jobs")
	if err != nil {
		t.Fatal(err)
	}
	for i, e := range entries {
		path, bag := filepath.Join("jobs", e.Name()), filepath.Join("bags", string(rune('a'+i))+"\x1b[2J=")
		calls = append(calls, []string{"archive", path, "--into", bag}, []string{"reproduce", bag}, []string{"compare", bag, path}, []string{"compare", path, path})
	}
	if err := os.Mkdir("bags", 0o777); err != nil {
		t.Fatal(err)
	}
	for _, args := range calls {
		code, stdout, stderr := try(args...)
		if wanted := args[0] != "register" && code == 0 || args[0] == "register"; !wanted {
			t.Errorf("%q: exit code %d: %s", args, code, stderr)
		}
		for _, r := range stdout + stderr {
			if r != '\n' && !unicode.IsPrint(r) {
				t.Errorf("%q prints %U", args, r)
				break
			}
		}
	}
	if entries, err := os.ReadDir("."); err != nil || len(entries) != 2 {
		t.Errorf("beside the jobs lies more: %v, %v", entries, err)
	}
}
