package main

import (
	"context"
	"errors"
	"fmt"
	"io"
	"io/fs"
	"os"
	"path/filepath"
	"runtime"

	"github.com/spf13/cobra"

	"arrestcheck/reportgen"
	"arrestcheck/reportgen/archive"
)

const archiveLong = `Makes an archive of a job: a new folder that holds the job and its limit files,
the report as text, Markdown and JSON, the versions of the program and of its
mechanics, and a digest of everything. It is a bag as in RFC 8493; in its folder
"sha256sum -c tagmanifest-sha256.txt manifest-sha256.txt" holds every file
against its digest, and "reproduce" works the job out again.

The folder appears whole or not at all, and never in place of one that is there.
It holds no date: the same files give the same archive. An archive is not
signed: keep the digest that is printed somewhere else.
`

const intoFlag = "into"

type archiveFlags struct {
	units        choice
	limits, sets []string
	folder       string
	withProgram  bool
}

func newArchive(o *outcome, in surroundings) *cobra.Command {
	var flags archiveFlags
	cmd := &cobra.Command{
		Use:   "archive FILE --into FOLDER [flags]",
		Short: "keep a job with all that it takes to work it out again",
		Long:  archiveLong,
		Example: `  arrestcheck archive job.toml --into archive/RT-0417-B
  arrestcheck archive job.toml --limits site.toml --into archive/RT-0417-B
  cd archive/RT-0417-B && sha256sum -c manifest-sha256.txt`,
		DisableFlagsInUseLine: true,
		Args:                  exactly(1, "a job file, or - for standard input"),
		RunE: func(cmd *cobra.Command, names []string) error {
			if !cmd.Flags().Changed(intoFlag) || flags.folder == "" {
				return &usageError{"archive: missing: --into FOLDER", "see: " + cmd.CommandPath() + " --help"}
			}
			return flags.archive(names[0], o, in)
		},
	}
	cmd.Flags().StringVar(&flags.folder, intoFlag, "", "the new `FOLDER`")
	cmd.Flags().StringArrayVar(&flags.limits, "limits", nil, "a limit `FILE` besides those of the job; repeatable")
	cmd.Flags().StringArrayVar(&flags.sets, setFlag, nil, "put `KEY=VALUE` into the job; repeatable")
	flags.units = oneOf("both", "si", "us")
	flags.units.flag(cmd, "units", "units of the report")
	cmd.Flags().BoolVar(&flags.withProgram, "with-program", false, "put this program into the archive too")
	return cmd
}

// archive works the job out and leaves the rest to be done at the end.
func (f *archiveFlags) archive(name string, o *outcome, in surroundings) error {
	set, err := overrides(f.sets)
	if err != nil {
		return err
	}
	inputs, _, err := gather(name, f.limits, set, in)
	if err := errors.Join(err, mustBeNew(f.folder)); err != nil {
		return flatten(err)
	}
	sheet, remarks, err := workOut(inputs)
	if err != nil {
		return err
	}
	contents := &archive.Contents{Sheet: sheet, Job: inputs.Job, Sets: inputs.Sets, Extra: inputs.Extra, Units: f.units.word}
	if f.withProgram {
		if contents.Program, err = thisProgram(); err != nil {
			return err
		}
	}
	files, err := archive.Pack(contents)
	if err != nil {
		return &usageError{reason: err.Error()}
	}
	o.remarks = append(remarks, fmt.Sprintf("check ends with exit code %d for this job", codeOfAssessment(sheet.Assessment)))
	o.last = func(ctx context.Context, _ *outcome, stdout io.Writer) error {
		return writeFolder(ctx, f.folder, files, func() error { return f.told(stdout, files, sheet) })
	}
	return nil
}

// told prints what was archived.
func (f *archiveFlags) told(stdout io.Writer, files []archive.File, sheet *reportgen.Sheet) error {
	err := reportgen.Text(stdout, archive.Packed(f.folder, files, sheet), reportgen.TextOptions{})
	if err != nil {
		return &fileError{"write", "standard output", err}
	}
	return nil
}

// mustBeNew refuses a folder that is there, whatever it is.
func mustBeNew(folder string) error {
	quoted := fmt.Sprintf("--%s %q", intoFlag, folder)
	switch _, err := os.Lstat(folder); {
	case err == nil:
		return &usageError{quoted + " exists", "name a folder that is not there yet; nothing is ever archived over something else"}
	case !errors.Is(err, fs.ErrNotExist):
		return &fileError{"write", fmt.Sprintf("%q", folder), err}
	}
	return nil
}

// thisProgram reads the file of the program that runs.
func thisProgram() (*archive.ProgramFile, error) {
	path, err := os.Executable()
	if err != nil {
		return nil, &fileError{"find", "the file of this program", err}
	}
	data, err := os.ReadFile(path)
	if err != nil {
		return nil, &fileError{"read", fmt.Sprintf("%q", path), err}
	}
	return &archive.ProgramFile{Data: data, System: runtime.GOOS, Processor: runtime.GOARCH}, nil
}

// writeFolder writes files into a new folder whole or not at all: it fills a
// folder beside it, brings it to the disk, calls told, and gives it its name.
func writeFolder(ctx context.Context, folder string, files []archive.File, told func() error) error {
	temp, err := folderBeside(folder)
	if err == nil {
		err = fillFolder(ctx, temp, files)
	}
	if err == nil {
		err = told()
	}
	if err == nil {
		err = ctx.Err()
	}
	if err == nil {
		err = mustBeNew(folder)
	}
	if err == nil {
		err = os.Rename(temp, folder)
	}
	if err == nil {
		// What is renamed is there; that the name is on the disk too is all that
		// can still fail, and takes nothing back.
		return syncFolder(filepath.Dir(folder))
	}
	if temp != "" {
		os.RemoveAll(temp)
	}
	var usage *usageError
	var named *fileError
	if errors.Is(err, context.Canceled) || errors.As(err, &usage) || errors.As(err, &named) {
		return err
	}
	return &fileError{"write", fmt.Sprintf("%q", folder), err}
}

// folderBeside makes a new folder beside path.
func folderBeside(path string) (string, error) {
	path = filepath.Clean(path)
	err := fs.ErrExist
	for n := 0; n < 100 && errors.Is(err, fs.ErrExist); n++ {
		name := filepath.Join(filepath.Dir(path), fmt.Sprintf(".%s.%d-%d.part", filepath.Base(path), os.Getpid(), n))
		if err = os.Mkdir(name, 0o777); err == nil {
			return name, nil
		}
	}
	return "", err
}

// fillFolder writes the files below folder and brings them to the disk.
func fillFolder(ctx context.Context, folder string, files []archive.File) error {
	made := map[string]bool{folder: true}
	for _, f := range files {
		if err := ctx.Err(); err != nil {
			return err
		}
		path := filepath.Join(folder, filepath.FromSlash(f.Path))
		if err := os.MkdirAll(filepath.Dir(path), 0o777); err != nil {
			return err
		}
		for dir := filepath.Dir(path); !made[dir]; dir = filepath.Dir(dir) {
			made[dir] = true
		}
		mode := fs.FileMode(0o666)
		if f.Executable {
			mode = 0o777
		}
		if err := writeNew(path, f.Data, mode); err != nil {
			return err
		}
	}
	for dir := range made {
		if err := syncFolder(dir); err != nil {
			return err
		}
	}
	return nil
}

// writeNew writes a file that is not there yet and brings it to the disk.
func writeNew(path string, data []byte, mode fs.FileMode) error {
	f, err := os.OpenFile(path, os.O_WRONLY|os.O_CREATE|os.O_EXCL, mode)
	if err != nil {
		return err
	}
	_, err = f.Write(data)
	if err == nil {
		err = f.Sync()
	}
	return errors.Join(err, f.Close())
}

// syncFolder brings the names in a folder to the disk. Windows knows no such
// thing.
func syncFolder(path string) error {
	if runtime.GOOS == "windows" {
		return nil
	}
	dir, err := os.Open(path)
	if err != nil {
		return err
	}
	return errors.Join(dir.Sync(), dir.Close())
}
