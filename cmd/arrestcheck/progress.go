package main

import (
	"context"
	"fmt"
	"os"
	"strings"
	"sync/atomic"
	"time"

	"github.com/mattn/go-isatty"

	"arrestcheck/arrest/study"
)

const (
	progressAfter = 400 * time.Millisecond // a run shorter than this shows nothing
	progressEvery = 200 * time.Millisecond
	progressWidth = 45 // not wider than what is said of an interruption, which is written over it
)

// A progress tells on a terminal how far a long run is. It has no say in the
// result, and writes nothing into a pipe or file.
type progress struct {
	what    string
	unit    string // of what is counted; empty: points
	all     int    // points; 0: not known
	done    atomic.Int64
	stopped chan struct{}
	ended   chan struct{}
	written bool
}

// showProgress begins to tell, and returns a context under which studies count.
// stop ends it and takes away what it has written.
func showProgress(ctx context.Context, in surroundings, what string, all int) (_ context.Context, stop func()) {
	p, stop := onTerminal(ctx, in, &progress{what: what, all: all})
	if p == nil {
		return ctx, stop
	}
	return study.WithProgress(ctx, func(points int) { p.done.Add(int64(points)) }), stop
}

// showCount begins to tell of a run that counts by itself, by calling count.
func showCount(ctx context.Context, in surroundings, what, unit string) (count, stop func()) {
	p, stop := onTerminal(ctx, in, &progress{what: what, unit: unit})
	if p == nil {
		return func() {}, stop
	}
	return func() { p.done.Add(1) }, stop
}

// onTerminal begins to tell; where there is no terminal it returns nil and a stop that
// does nothing.
func onTerminal(ctx context.Context, in surroundings, p *progress) (_ *progress, stop func()) {
	terminal, ok := in.stderr.(*os.File)
	if !ok || !isatty.IsTerminal(terminal.Fd()) {
		return nil, func() {}
	}
	p.stopped, p.ended = make(chan struct{}), make(chan struct{})
	go p.run(ctx, terminal)
	return p, func() {
		close(p.stopped)
		<-p.ended
	}
}

// run writes a line now and then. The line ends where it begins, so that
// whatever is written next stands over it.
func (p *progress) run(ctx context.Context, terminal *os.File) {
	defer close(p.ended)
	begun := time.Now()
	tick := time.NewTimer(progressAfter)
	defer tick.Stop()
	for {
		select {
		case <-ctx.Done():
			return
		case <-p.stopped:
			if p.written {
				fmt.Fprint(terminal, strings.Repeat(" ", progressWidth)+"\r")
			}
			return
		case <-tick.C:
			fmt.Fprint(terminal, p.line(time.Since(begun))+"\r")
			p.written = true
			tick.Reset(progressEvery)
		}
	}
}

// line is what is shown after some time.
func (p *progress) line(after time.Duration) string {
	text := fmt.Sprintf("%s: %d s", p.what, int(after.Seconds()))
	switch done := p.done.Load(); {
	case p.all > 0 && int(done) >= p.all:
		text += ", looking between the points"
	case p.all > 0:
		text += fmt.Sprintf(", %d of %d points", done, p.all)
	case p.unit != "":
		text += fmt.Sprintf(", %d %s", done, p.unit)
	case done > 0:
		text += fmt.Sprintf(", %d points", done)
	}
	return fmt.Sprintf("%-*.*s", progressWidth, progressWidth, text)
}
