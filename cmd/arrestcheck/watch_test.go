package main

import (
	"bytes"
	"context"
	"errors"
	"os"
	"path/filepath"
	"strings"
	"testing"
	"time"
)

// A file is looked at once, and again after it is written, replaced, or taken
// away and put back; changes of other files, and several at once, do not count.
func TestFollow(t *testing.T) {
	folder := t.TempDir()
	job, other := filepath.Join(folder, "job.toml"), filepath.Join(folder, "other.toml")
	writeText(t, job, "1")
	ctx, stop := context.WithCancel(context.Background())
	defer stop()
	seen, ended := make(chan string, 10), make(chan error, 1)
	look := func() ([]byte, []string) {
		data, err := os.ReadFile(job)
		if err != nil {
			data = []byte("gone")
		}
		return data, []string{job}
	}
	go func() {
		ended <- follow(ctx, look, func(text []byte) error { seen <- string(text); return nil })
	}()
	next := func(want string) {
		t.Helper()
		select {
		case got := <-seen:
			if got != want {
				t.Errorf("seen %q, want %q", got, want)
			}
		case <-time.After(10 * time.Second):
			t.Fatalf("nothing seen, want %q", want)
		}
	}
	next("1")
	writeText(t, other, "x")
	writeText(t, job, "2")
	writeText(t, job, "3")
	next("3")
	writeText(t, other, "4")
	if err := os.Rename(other, job); err != nil { // as editors save
		t.Fatal(err)
	}
	next("4")
	if err := os.Remove(job); err != nil {
		t.Fatal(err)
	}
	next("gone")
	writeText(t, job, "5")
	next("5")
	time.Sleep(3 * settleTime)
	if len(seen) > 0 {
		t.Errorf("seen once more: %q", <-seen)
	}
	stop()
	if err := <-ended; !errors.Is(err, context.Canceled) || codeOfError(err) != exitInterrupted {
		t.Errorf("%v", err)
	}
}

// A screen shows what has room, says how much more there is, and never writes
// more lines than there are.
func TestScreenShows(t *testing.T) {
	var b bytes.Buffer
	s := screen{out: &b, size: func() (int, int) { return 60, 10 }}
	if err := s.show([]byte("first\nsecond\n")); err != nil {
		t.Fatal(err)
	}
	if got := b.String(); got != home+"first"+clearLine+"\r\nsecond"+clearLine+"\r\n"+clearRest+"seen 1 times; Ctrl-C ends\r\n" {
		t.Errorf("%q", got)
	}
	b.Reset()
	if err := s.show([]byte(strings.Repeat("a line\n", 50))); err != nil {
		t.Fatal(err)
	}
	got := b.String()
	if strings.Count(got, "a line") != 8 || strings.Count(got, "\n") != 9 || !strings.Contains(got, "42 more lines, warnings among them") {
		t.Errorf("%q", got)
	}
}
