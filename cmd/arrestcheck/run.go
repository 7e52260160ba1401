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
	result  []byte       // for standard output, or for the file of out
	remarks []string     // for standard error, without the program's name
	out     *destination // nil: standard output
}

// run is the program: arguments in, exit code out. It writes results to
// stdout and remarks to stderr, and leaves no file behind when it fails.
func run(args []string, stdin io.Reader, stdout, stderr io.Writer, env ...string) int {
	// A reader that closes the pipe must end in exit code 4, not in a signal.
	signal.Ignore(syscall.SIGPIPE)
	ctx, stop := signal.NotifyContext(context.Background(), os.Interrupt, syscall.SIGTERM)
	defer stop()

	in := surroundings{stdin: stdin, stdout: stdout, env: env}
	o, err := await(ctx, func() (outcome, error) { return execute(args, in) })
	if err == nil {
		err = deliver(ctx, o, stdout)
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
	stdout io.Writer // looked at, never written to, by the commands
	env    []string
}

// execute parses the command line and runs the command it names.
func execute(args []string, in surroundings) (outcome, error) {
	var o outcome
	var printed bytes.Buffer
	root := newRoot(&o, in)
	root.SetArgs(append([]string{}, args...))
	root.SetIn(in.stdin)
	root.SetOut(&printed)
	root.SetErr(io.Discard)
	if err := root.Execute(); err != nil {
		return outcome{}, asUsage(root, args, err)
	}
	if o.result == nil {
		o.result = printed.Bytes()
	}
	return o, nil
}

// deliver writes the result to where it belongs.
func deliver(ctx context.Context, o outcome, stdout io.Writer) error {
	if o.out != nil {
		return o.out.write(ctx, o.result)
	}
	_, err := await(ctx, func() (int, error) { return stdout.Write(o.result) })
	if err != nil && ctx.Err() == nil {
		return &fileError{"write", "standard output", err}
	}
	return err
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
