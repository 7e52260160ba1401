package main

import (
	"bytes"
	"crypto/sha256"
	"encoding/hex"
	"errors"
	"fmt"
	"hash"
	"io"
	"io/fs"
	"os"
	"path"
	"syscall"

	"github.com/spf13/cobra"

	"arrestcheck/limits"
	"arrestcheck/reportgen"
	"arrestcheck/reportgen/archive"
)

const reproduceLong = `Works archived jobs out again. Every file is held against its digest, the job
is worked out anew, and every figure, outcome and report is held against what
was archived. What differs is named, by how much, and why it can.

--limits holds the archived entries against other limits, and puts what they
come to beside the archived outcomes.

The same digits do not make figures right, and an archive is not signed.
`

func newReproduce(o *outcome, in surroundings) *cobra.Command {
	var flags reportFlags
	var limitFiles []string
	cmd := &cobra.Command{
		Use:   "reproduce FOLDER... [flags]",
		Short: "work archived jobs out again and tell what differs",
		Long:  reproduceLong,
		Example: `  arrestcheck reproduce archive/RT-0417-B
  arrestcheck reproduce --limits site-2031.toml archive/RT-0417-B`,
		DisableFlagsInUseLine: true,
		Args:                  atLeastOne("the folder of an archive"),
		RunE: func(_ *cobra.Command, names []string) error {
			if err := flags.conflict(); err != nil {
				return err
			}
			later, used, err := readLimitFiles(limitFiles)
			if err := errors.Join(err, flags.check(used)); err != nil {
				return flatten(err)
			}
			data, err := reproduceAll(names, later, &flags, o, in)
			o.deliver(flags.out(), data)
			return err
		},
	}
	flags.addLayout(cmd)
	cmd.Flags().StringArrayVar(&limitFiles, "limits", nil, "a limit `FILE` to hold the archived entries against; repeatable")
	return cmd
}

// reproduceAll works archives out again, one after the other; one that cannot be
// read does not end the run. Of several the report ends with how many came to what.
func reproduceAll(names []string, later []limits.Set, flags *reportFlags, o *outcome, in surroundings) ([]byte, error) {
	var b bytes.Buffer
	var tally archive.Tally
	for _, name := range names {
		code, err := reproduce(&b, name, later, flags, in)
		if err != nil {
			return nil, err
		}
		switch code {
		case exitSame:
			tally.Same++
		case exitDiffers:
			tally.Differ++
		default:
			tally.Refused++
		}
		o.code = worst(o.code, code)
	}
	var err error
	if len(names) > 1 && flags.format.word != "json" {
		err = flags.write(&b, tally.Report(), in)
	}
	return b.Bytes(), err
}

// reproduce works one archive out again and writes what came of it.
func reproduce(b *bytes.Buffer, name string, later []limits.Set, flags *reportFlags, in surroundings) (exitCode, error) {
	opened, err := openArchive(name)
	if err != nil {
		code := exitFile
		if refusal := (*archive.Refusal)(nil); errors.As(err, &refusal) {
			code = exitRefused
		}
		if flags.format.word == "json" {
			return code, archive.RefusedJSON(b, name, err)
		}
		return code, flags.write(b, archive.RefusedReport(name, err), in)
	}
	r := archive.Reproduce(name, opened, toolVersion, func(in *archive.Inputs) (*reportgen.Sheet, error) {
		sheet, _, err := workOut(in)
		return sheet, err
	}, later)
	if flags.format.word == "json" {
		return codeOfSame(r.Same()), r.JSON(b)
	}
	return codeOfSame(r.Same()), flags.write(b, r.Report(), in)
}

// atLeastOne refuses a command line without arguments.
func atLeastOne(what string) cobra.PositionalArgs {
	return func(cmd *cobra.Command, args []string) error {
		if len(args) == 0 {
			return &usageError{cmd.Name() + ": missing: " + what, "see: " + cmd.CommandPath() + " --help"}
		}
		return nil
	}
}

// openArchive reads the folder of an archive. Nothing outside it can be opened,
// not by ".." and not by a link, and nothing is read that is too large.
func openArchive(name string) (*archive.Opened, error) {
	info, err := os.Stat(name)
	if err == nil && !info.IsDir() {
		err = syscall.ENOTDIR // of a pipe the opening alone would wait
	}
	var root *os.Root
	if err == nil {
		root, err = os.OpenRoot(name)
	}
	if err != nil {
		return nil, &fileError{"open the folder", fmt.Sprintf("%q", name), err}
	}
	defer root.Close()
	var found []archive.Found
	err = fs.WalkDir(root.FS(), ".", func(path string, d fs.DirEntry, err error) error {
		switch {
		case err != nil:
			return err
		case d.IsDir():
			return nil
		case len(found) > archive.MaxFiles:
			return fs.SkipAll
		}
		one, err := find(root, path, d)
		found = append(found, one)
		return err
	})
	if err != nil {
		return nil, &fileError{"read", fmt.Sprintf("%q", name), err}
	}
	return archive.Open(found)
}

// find reads one file of an archive as far as it is asked for.
func find(root *os.Root, name string, d fs.DirEntry) (archive.Found, error) {
	f := archive.Found{Path: path.Clean(name)}
	if !d.Type().IsRegular() {
		f.Kind = kindOf(d.Type())
		return f, nil
	}
	file, err := root.Open(name)
	if err != nil {
		return f, err
	}
	defer file.Close()
	info, err := file.Stat()
	if err != nil {
		return f, err
	}
	if f.Size = info.Size(); f.Size > archive.MaxSize(f.Path) {
		return f, nil
	}
	f.Data, f.SHA256, err = digested(file, archive.MaxSize(f.Path), !archive.IsProgram(f.Path))
	return f, err
}

// digested reads at most so many bytes and returns them, where they are to be
// kept, and their digest.
func digested(r io.Reader, most int64, keep bool) ([]byte, string, error) {
	var sum hash.Hash = sha256.New()
	var data bytes.Buffer
	to := io.Writer(sum)
	if keep {
		to = io.MultiWriter(sum, &data)
	}
	_, err := io.Copy(to, io.LimitReader(r, most))
	return data.Bytes(), hex.EncodeToString(sum.Sum(nil)), err
}
