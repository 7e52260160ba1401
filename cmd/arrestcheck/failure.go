package main

import (
	"context"
	"errors"
	"fmt"
	"io/fs"
	"os"
	"slices"
	"strings"

	"github.com/spf13/cobra"
	"github.com/spf13/pflag"

	"arrestcheck/arrest/jobfile"
)

const programName = "arrestcheck"

// A usageError is a command line that is refused.
type usageError struct {
	reason string
	hint   string // the next action; empty where the reason says it
}

func (e *usageError) Error() string { return e.reason }

// A fileError is a file or stream that cannot be read or written.
type fileError struct {
	verb  string // "read", "write"
	name  string
	cause error
}

func (e *fileError) Error() string {
	cause := e.cause
	// The name stands in the sentence already.
	var path *fs.PathError
	var link *os.LinkError
	switch {
	case errors.As(cause, &path):
		cause = path.Err
	case errors.As(cause, &link):
		cause = link.Err
	}
	return fmt.Sprintf("cannot %s %s: %v", e.verb, e.name, cause)
}

func (e *fileError) Unwrap() error { return e.cause }

// An internalError is a mistake in the program itself.
type internalError struct {
	value any
	stack []byte
}

func (e *internalError) Error() string {
	return fmt.Sprintf("internal error: %v; nothing was written\n"+
		"  this is a fault of the program: SAFETY.md says how to report it\n%s", e.value, e.stack)
}

// describe returns what standard error says of a failure, every fault of
// every file with it.
func describe(err error) string {
	if joined, ok := err.(interface{ Unwrap() []error }); ok {
		var b strings.Builder
		for _, e := range joined.Unwrap() {
			b.WriteString(describe(e))
		}
		return b.String()
	}
	var faults *jobfile.Faults
	var usage *usageError
	switch {
	case errors.Is(err, context.Canceled):
		return programName + ": interrupted; no file was written\n"
	case errors.As(err, &faults):
		return strings.TrimRight(faults.Error(), "\n") + "\n"
	case errors.As(err, &usage) && usage.hint != "":
		return programName + ": " + usage.reason + "\n  " + usage.hint + "\n"
	}
	return programName + ": " + err.Error() + "\n"
}

// asUsage turns what the command-line library refused into a usageError;
// errors of the commands themselves pass through.
func asUsage(root *cobra.Command, args []string, err error) error {
	if usage := (*usageError)(nil); errors.As(err, &usage) || !strings.HasPrefix(err.Error(), "unknown command ") {
		return err
	}
	for _, word := range args {
		if !strings.HasPrefix(word, "-") {
			return unknownCommand(root, word)
		}
	}
	return &usageError{reason: err.Error()}
}

func unknownCommand(root *cobra.Command, word string) error {
	hint := "see: " + programName + " help"
	if near := root.SuggestionsFor(word); len(near) > 0 {
		hint = "did you mean: " + programName + " " + near[0]
	}
	return &usageError{fmt.Sprintf("unknown command %q", word), hint}
}

// flagFault words a flag that does not exist, lacks its value or has a wrong
// one.
func flagFault(cmd *cobra.Command, err error) error {
	hint := "see: " + cmd.CommandPath() + " --help"
	var unknown *pflag.NotExistError
	var wrong *pflag.InvalidValueError
	switch {
	case errors.As(err, &wrong):
		return &usageError{fmt.Sprintf("--%s %q: %v", wrong.GetFlag().Name, wrong.GetValue(), wrong.Unwrap()), hint}
	case !errors.As(err, &unknown):
		return &usageError{err.Error(), hint}
	}
	name := unknown.GetSpecifiedName()
	if near := nearestFlag(cmd, name); near != "" {
		hint = "did you mean: --" + near
	} else if slices.ContainsFunc(commands(), func(c command) bool { return c.name == name }) {
		hint = "did you mean: " + programName + " " + name
	}
	dashes := "--"
	if unknown.GetSpecifiedShortnames() != "" {
		dashes = "-"
	}
	return &usageError{fmt.Sprintf("unknown flag %q", dashes+name), hint}
}

// nearestFlag returns the flag most like name.
func nearestFlag(cmd *cobra.Command, name string) string {
	var names []string
	cmd.Flags().VisitAll(func(f *pflag.Flag) { names = append(names, f.Name) })
	return nearest(name, names)
}

// nearest asks the command library for the word most like another: the same
// measure of likeness as for commands.
func nearest(word string, words []string) string {
	probe := &cobra.Command{SuggestionsMinimumDistance: 2}
	for _, w := range words {
		probe.AddCommand(&cobra.Command{Use: w, Run: func(*cobra.Command, []string) {}})
	}
	if near := probe.SuggestionsFor(word); len(near) > 0 {
		return near[0]
	}
	return ""
}

// flatten turns nested joined failures into one list, in order, and the faults
// of files into one: a limit file that two jobs name is told of once.
func flatten(err error) error {
	var all jobfile.Faults
	var others []error
	for _, e := range leaves(err) {
		var faults *jobfile.Faults
		if !errors.As(e, &faults) {
			others = append(others, e)
			continue
		}
		for _, f := range faults.List {
			if !slices.Contains(all.List, f) {
				all.List = append(all.List, f)
			}
		}
	}
	if len(all.List) > 0 {
		others = append([]error{&all}, others...)
	}
	return errors.Join(others...)
}

func leaves(err error) []error {
	joined, ok := err.(interface{ Unwrap() []error })
	if !ok {
		return []error{err}
	}
	var all []error
	for _, e := range joined.Unwrap() {
		all = append(all, leaves(e)...)
	}
	return all
}
