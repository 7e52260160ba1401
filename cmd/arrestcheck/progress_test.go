package main

import (
	"bytes"
	"context"
	"strings"
	"testing"
	"time"
)

// A line of progress is no wider than what is written over it.
func TestProgressLine(t *testing.T) {
	said := strings.TrimSuffix(describe(context.Canceled), "\n")
	for _, p := range []*progress{{what: "sweep", all: 10_000_000}, {what: "envelope"}, {what: strings.Repeat("x", 80)}} {
		p.done.Store(9_999_999)
		if line := p.line(time.Hour); len(line) != progressWidth || len(line) > len(said) {
			t.Errorf("%q has %d characters, the word of an interruption %d", line, len(line), len(said))
		}
	}
	p := &progress{what: "sweep", all: 400}
	for done, want := range map[int64]string{24: "sweep: 3 s, 24 of 400 points", 400: "sweep: 3 s, looking between the points"} {
		p.done.Store(done)
		if line := strings.TrimSpace(p.line(3 * time.Second)); line != want {
			t.Errorf("%q, want %q", line, want)
		}
	}
}

// Into a pipe nothing is told.
func TestNoProgressIntoAPipe(t *testing.T) {
	var b bytes.Buffer
	ctx, stop := showProgress(context.Background(), surroundings{stderr: &b}, "sweep", 3)
	time.Sleep(2 * progressAfter)
	stop()
	if b.Len() > 0 || ctx != context.Background() {
		t.Errorf("%q", b.String())
	}
}
