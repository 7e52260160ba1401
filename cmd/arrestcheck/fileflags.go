package main

import (
	"errors"
	"fmt"
	"io/fs"
	"slices"
	"strings"

	"github.com/spf13/cobra"
	"github.com/spf13/pflag"
)

const outFlag = "out"

// fileFlags are the flags of a command that writes files: one that names each,
// --out first, and --force.
type fileFlags struct {
	flags *pflag.FlagSet
	named []string       // the flags that name a file
	lists []string       // the flags that name several
	more  []*destination // what these name, known once they are parsed
	force bool
}

func (f *fileFlags) add(cmd *cobra.Command) {
	f.flags = cmd.Flags()
	f.file(outFlag, "write to this new `FILE`")
	f.flags.BoolVar(&f.force, "force", false, "let --"+outFlag+" replace a file")
}

// file adds a flag that names a file to write.
func (f *fileFlags) file(name, usage string) {
	f.flags.String(name, "", usage)
	f.named = append(f.named, name)
	f.usage()
}

// repeated tells of a flag that names several files to write.
func (f *fileFlags) repeated(name string) {
	f.lists = append(f.lists, name)
	f.usage()
}

// usage lists the flags in the help of --force.
func (f *fileFlags) usage() {
	if force := f.flags.Lookup("force"); force != nil {
		force.Usage = "let " + f.list(", ") + " replace a file"
	}
}

// list is the flags that name a file.
func (f *fileFlags) list(joint string) string {
	return "--" + strings.Join(slices.Concat(f.named, f.lists), joint+"--")
}

// destination returns the file that the flag names, nil where it is not given.
func (f *fileFlags) destination(name string) *destination {
	if !f.flags.Changed(name) {
		return nil
	}
	return &destination{name, f.flags.Lookup(name).Value.String(), f.force}
}

// out is where the result goes, nil for standard output.
func (f *fileFlags) out() *destination { return f.destination(outFlag) }

// destinations returns the files of all flags that are given.
func (f *fileFlags) destinations() []*destination {
	var all []*destination
	for _, name := range f.named {
		if d := f.destination(name); d != nil {
			all = append(all, d)
		}
	}
	return append(all, f.more...)
}

// conflict refuses flags that contradict each other.
func (f *fileFlags) conflict() error {
	all := f.destinations()
	for i, d := range all {
		if d.path == "" || d.path == "-" {
			return &usageError{d.quoted() + " names no file", d.elsewhere("name a file")}
		}
		for _, before := range all[:i] {
			if before.same(d) {
				return &usageError{fmt.Sprintf("%s and %s are one file", before.quoted(), d.quoted()), "give each its own name"}
			}
		}
	}
	if f.force && len(all) == 0 {
		return &usageError{"--force without " + f.list(" or "), "--force lets " + f.list(", ") + " replace an existing file"}
	}
	return nil
}

// check looks at every file to write, so that none is written where one must
// not be. inputs are the files that the run reads.
func (f *fileFlags) check(inputs []fs.FileInfo) error {
	var faults []error
	for _, d := range f.destinations() {
		faults = append(faults, d.check(inputs))
	}
	return errors.Join(faults...)
}
