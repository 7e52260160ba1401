package figure

import (
	"bytes"
	"flag"
	"os"
	"path/filepath"
	"testing"
)

var update = flag.Bool("update", false, "write the golden files anew")

// Goldens prove sameness, not rightness: the same bytes on every machine.
func TestGolden(t *testing.T) {
	want := map[string]bool{}
	for _, s := range samples(t) {
		switch s.name {
		case "sweep", "elevation":
			golden(t, s.name+".svg", s.scene.SVG(s.name))
			want[s.name+".svg"] = true
		case "force-time":
			golden(t, s.name+".txt", s.scene.Characters(Cells{Columns: 80}))
			want[s.name+".txt"] = true
		case "envelope":
			golden(t, s.name+".ascii.txt", s.scene.Characters(Cells{Columns: 80, ASCII: true}))
			want[s.name+".ascii.txt"] = true
		}
	}
	files, err := filepath.Glob("testdata/*.*")
	if err != nil {
		t.Fatal(err)
	}
	if len(files) != len(want) {
		t.Errorf("testdata has %v, the test reads %v", files, want)
	}
}

func golden(t *testing.T, name string, got []byte) {
	t.Helper()
	path := filepath.Join("testdata", name)
	if *update {
		if err := os.WriteFile(path, got, 0o644); err != nil {
			t.Fatal(err)
		}
	}
	want, err := os.ReadFile(path)
	if err != nil {
		t.Fatal(err)
	}
	if !bytes.Equal(got, want) {
		t.Errorf("%s is now\n%s", path, got)
	}
}
