package main

import (
	"bytes"
	"context"
	"fmt"
	"io"
	"os"
	"os/signal"
	"runtime/debug"
	"syscall"
)

// An outcome is what a command came to when nothing failed. Everything is
// computed before the first byte is delivered.
type outcome struct {
	code    exitCode
	result  []byte    // for standard output
	files   []pending // for the files that the command line names
	remarks []string  // for standard error, without the program's name

	// last does what is left once all else is computed and nothing failed: what
	// is written row by row, or is more than a file. nil where there is nothing.
	last func(ctx context.Context, o *outcome, stdout io.Writer) error
}

// deliver hands a result over: to the file of to, or to standard output where
// to is nil.
func (o *outcome) deliver(to *destination, data []byte) {
	if to == nil {
		o.result = data
		return
	}
	o.files = append(o.files, pending{destination: *to, data: data})
}

// run is the program: arguments in, exit code out. It writes results to
// stdout and remarks to stderr, and leaves no file behind when it fails.
func run(args []string, stdin io.Reader, stdout, stderr io.Writer, env ...string) int {
	// A reader that closes the pipe must end in exit code 4, not in a signal.
	signal.Ignore(syscall.SIGPIPE)
	ctx, stop := signal.NotifyContext(context.Background(), os.Interrupt, syscall.SIGTERM)
	defer stop()

	in := surroundings{stdin: stdin, stdout: stdout, stderr: stderr, env: env}
	o, err := await(ctx, func() (outcome, error) { return execute(ctx, args, in) })
	if err == nil {
		err = deliver(ctx, &o, stdout)
	}
	if err != nil {
		fmt.Fprint(stderr, describe(err))
		return int(codeOfError(err))
	}
	for _, r := range o.remarks {
		fmt.Fprintln(stderr, programName+":", r)
	}
	return int(o.code)
}

// surroundings is what a command may know of the outside.
type surroundings struct {
	stdin  io.Reader
	stdout io.Writer // looked at, never written to, by the commands but watch
	stderr io.Writer // of a terminal, how far a long run is; nothing else by the commands
	env    []string
}

// execute parses the command line and runs the command it names.
func execute(ctx context.Context, args []string, in surroundings) (outcome, error) {
	var o outcome
	var printed bytes.Buffer
	root := newRoot(args, &o, in)
	root.SetArgs(append([]string{}, args...))
	root.SetIn(in.stdin)
	root.SetOut(&printed)
	root.SetErr(io.Discard)
	if err := root.ExecuteContext(ctx); err != nil {
		return outcome{}, asUsage(root, args, err)
	}
	if printed.Len() > 0 {
		o.result = printed.Bytes()
	}
	return o, nil
}

// deliver writes the results to where they belong. What can fail comes first:
// the files are filled, then standard output is written, then the files get
// their names.
func deliver(ctx context.Context, o *outcome, stdout io.Writer) error {
	if o.last != nil {
		return o.last(ctx, o, stdout)
	}
	if err := prepare(o.files); err != nil {
		return err
	}
	if len(o.result) > 0 {
		_, err := await(ctx, func() (int, error) { return stdout.Write(o.result) })
		if err != nil {
			abandon(o.files)
			if ctx.Err() == nil {
				err = &fileError{"write", "standard output", err}
			}
			return err
		}
	}
	return place(ctx, o.files)
}

// await runs work and gives up waiting for it when ctx ends: a read from a
// terminal or a pipe cannot be called back. The panic of a programmer's
// mistake becomes an error, so that it ends in exit code 4 like every other
// internal failure.
func await[T any](ctx context.Context, work func() (T, error)) (T, error) {
	type result struct {
		value T
		err   error
	}
	done := make(chan result, 1)
	go func() {
		defer func() {
			if p := recover(); p != nil {
				done <- result{err: &internalError{p, debug.Stack()}}
			}
		}()
		value, err := work()
		done <- result{value, err}
	}()
	select {
	case r := <-done:
		return r.value, r.err
	case <-ctx.Done():
		var none T
		return none, ctx.Err()
	}
}
