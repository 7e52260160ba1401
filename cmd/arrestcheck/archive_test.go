package main

import (
	"io/fs"
	"os"
	"path/filepath"
	"strings"
	"testing"
)

// archived makes an archive in a folder of its own.
func archived(t *testing.T) string {
	t.Helper()
	bag := filepath.Join(t.TempDir(), "bag")
	if code, _, stderr := try("archive", "../../testdata/jobs/settled.toml", "--into", bag); code != int(exitSame) {
		t.Fatal(code, stderr)
	}
	return bag
}

// One bit of each file of an archive is turned over on the disk, each in turn.
func TestReproduceFindsOneBit(t *testing.T) {
	bag := archived(t)
	n := 0
	err := filepath.WalkDir(bag, func(path string, d fs.DirEntry, err error) error {
		if err != nil || d.IsDir() {
			return err
		}
		n++
		data, err := os.ReadFile(path)
		if err != nil {
			return err
		}
		data[len(data)/2] ^= 1
		writeFile(t, path, string(data))
		code, stdout, _ := try("reproduce", bag)
		if code != int(exitDiffers) && code != int(exitRefused) || !strings.Contains(stdout, filepath.Base(path)) && filepath.Base(path) != "tagmanifest-sha256.txt" {
			t.Errorf("%s: exit code %d\n%s", path, code, stdout)
		}
		data[len(data)/2] ^= 1
		writeFile(t, path, string(data))
		return nil
	})
	if err != nil || n != 10 {
		t.Errorf("%d files, %v", n, err)
	}
	if code, stdout, _ := try("reproduce", bag); code != int(exitSame) {
		t.Errorf("put back: exit code %d\n%s", code, stdout)
	}
}

// A file that is far too large is refused by its size, unread: its terabyte is
// a hole in the disk.
func TestReproduceRefusesHugeFiles(t *testing.T) {
	bag := archived(t)
	for _, name := range []string{"data/job.toml", "data/report.txt", "manifest-sha256.txt", "data/more"} {
		path := filepath.Join(bag, filepath.FromSlash(name))
		before, err := os.ReadFile(path)
		if err != nil {
			writeFile(t, path, "")
		}
		if err := os.Truncate(path, 1<<40); err != nil {
			t.Skip("no file with holes here: ", err)
		}
		code, stdout, _ := try("reproduce", bag)
		if code != int(exitRefused) || !strings.Contains(stdout, "is too large") {
			t.Errorf("%s: exit code %d\n%s", name, code, stdout)
		}
		writeFile(t, path, string(before))
	}
}

// Thousands of files are not read to the last one.
func TestReproduceRefusesManyFiles(t *testing.T) {
	bag := archived(t)
	for i := range 1100 {
		writeFile(t, filepath.Join(bag, "data", "f"+strings.Repeat("x", i%50)+string(rune('a'+i/50))), "")
	}
	code, stdout, _ := try("reproduce", bag)
	if code != int(exitRefused) || !strings.Contains(stdout, "more than 1000 files") {
		t.Errorf("exit code %d\n%s", code, stdout)
	}
}
