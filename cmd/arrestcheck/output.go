package main

import (
	"context"
	"errors"
	"fmt"
	"io"
	"io/fs"
	"os"
	"path/filepath"
	"strings"
)

// A destination is a file that the command line names to be written.
type destination struct {
	flag  string // that names it
	path  string
	force bool // an existing file may be replaced
}

// quoted is the destination as the command line has it.
func (d *destination) quoted() string { return fmt.Sprintf("--%s %q", d.flag, d.path) }

// check refuses what must not be written over: an input, even when it is
// reached by another name, anything but a regular file, and an existing file
// without force.
func (d *destination) check(inputs []fs.FileInfo) error {
	if folder := archiveAround(d.path); folder != "" {
		return &usageError{fmt.Sprintf("%s lies in the archive %q", d.quoted(), folder), "an archive is never changed: name a file outside it"}
	}
	quoted := d.quoted()
	if info, err := os.Stat(d.path); err == nil {
		for _, in := range inputs {
			if in != nil && os.SameFile(info, in) {
				return &usageError{quoted + " is a file that this run reads", "give another name"}
			}
		}
	}
	info, err := os.Lstat(d.path)
	switch {
	case errors.Is(err, fs.ErrNotExist):
		return nil
	case err != nil:
		return &fileError{"write", fmt.Sprintf("%q", d.path), err}
	case !info.Mode().IsRegular():
		return &usageError{quoted + " is not a regular file but a " + kindOf(info.Mode()),
			d.elsewhere("name a file")}
	case !d.force:
		return &usageError{quoted + " exists", "give another name, or --force to replace it"}
	}
	return nil
}

// archiveAround returns the folder of the archive that path would be written
// into, empty where there is none. A folder that holds bagit.txt is one.
func archiveAround(path string) string {
	full, err := filepath.Abs(path)
	if err != nil {
		return ""
	}
	folder := filepath.Dir(full)
	if real, err := filepath.EvalSymlinks(folder); err == nil {
		folder = real
	}
	for {
		if info, err := os.Stat(filepath.Join(folder, "bagit.txt")); err == nil && info.Mode().IsRegular() {
			return folder
		}
		up := filepath.Dir(folder)
		if up == folder {
			return ""
		}
		folder = up
	}
}

func kindOf(m fs.FileMode) string {
	switch {
	case m.IsDir():
		return "folder"
	case m&fs.ModeSymlink != 0:
		return "link"
	}
	return "device, pipe or socket"
}

// elsewhere adds to what can be done where a result goes without the flag.
func (d *destination) elsewhere(action string) string {
	if d.flag == outFlag {
		action += "; without --out the result goes to standard output"
	}
	return action
}

// same reports whether two destinations are one file. Neither may exist yet,
// so that their folders and names are compared; names that differ in case only
// are one file on some systems.
func (d *destination) same(other *destination) bool {
	if !strings.EqualFold(filepath.Base(d.path), filepath.Base(other.path)) {
		return false
	}
	a, errA := os.Stat(filepath.Dir(d.path))
	b, errB := os.Stat(filepath.Dir(other.path))
	return errA == nil && errB == nil && os.SameFile(a, b)
}

// A pending file is a destination with what is to stand in it.
type pending struct {
	destination
	data []byte
	temp string // the filled file beside it, empty until there is one
}

// prepare fills a new file beside each destination, so that only the renames
// are left to do. Where one cannot be filled none is left.
func prepare(files []pending) error {
	for i := range files {
		f := &files[i]
		var err error
		if f.temp, err = f.fill(f.data); err != nil {
			abandon(files)
			return &fileError{"write", fmt.Sprintf("%q", f.path), err}
		}
	}
	return nil
}

// abandon removes what prepare has made.
func abandon(files []pending) {
	for i := range files {
		if files[i].temp != "" {
			os.Remove(files[i].temp)
		}
	}
}

// place puts the prepared files where they belong. All are looked at before
// the first is renamed: a file that appeared since check is refused like one
// that was there before.
func place(ctx context.Context, files []pending) error {
	err := ctx.Err()
	for i := 0; i < len(files) && err == nil; i++ {
		err = files[i].check(nil)
	}
	for i := 0; i < len(files) && err == nil; i++ {
		if err = os.Rename(files[i].temp, files[i].path); err == nil {
			files[i].temp = ""
		} else {
			err = &fileError{"write", fmt.Sprintf("%q", files[i].path), err}
		}
	}
	abandon(files)
	return err
}

// fill writes data to a new file beside the destination and brings it to the
// disk. The name is returned as soon as the file exists, also with an error.
func (d *destination) fill(data []byte) (temp string, err error) {
	return d.fillBy(func(w io.Writer) error {
		_, err := w.Write(data)
		return err
	})
}

// fillBy is fill for what is not in memory as a whole.
func (d *destination) fillBy(write func(io.Writer) error) (temp string, err error) {
	mode := fs.FileMode(0o666) // less what the user masks
	if old, err := os.Lstat(d.path); err == nil {
		mode = old.Mode().Perm()
	}
	f, err := createBeside(d.path, mode)
	if err != nil {
		return "", err
	}
	if err = write(f); err == nil {
		err = f.Sync()
	}
	return f.Name(), errors.Join(err, f.Close())
}

// createBeside creates a new file in the folder of path. The process id alone
// does not make its name new: in a container every run may have the same.
func createBeside(path string, mode fs.FileMode) (*os.File, error) {
	var f *os.File
	err := fs.ErrExist
	for n := 0; n < 100 && errors.Is(err, fs.ErrExist); n++ {
		name := fmt.Sprintf(".%s.%d-%d.part", filepath.Base(path), os.Getpid(), n)
		f, err = os.OpenFile(filepath.Join(filepath.Dir(path), name), os.O_WRONLY|os.O_CREATE|os.O_EXCL, mode)
	}
	return f, err
}
