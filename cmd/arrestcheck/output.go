package main

import (
	"context"
	"errors"
	"fmt"
	"io/fs"
	"os"
	"path/filepath"
)

// A destination is the file a result goes to.
type destination struct {
	path  string
	force bool // an existing file may be replaced
}

// check refuses what must not be written over: an input, even when it is
// reached by another name, anything but a regular file, and an existing file
// without force.
func (d *destination) check(inputs []fs.FileInfo) error {
	quoted := fmt.Sprintf("--out %q", d.path)
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
			"name a file; without --out the report goes to standard output"}
	case !d.force:
		return &usageError{quoted + " exists", "give another name, or --force to replace it"}
	}
	return nil
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

// write puts data at the destination whole or not at all: it fills a new file
// beside it and renames that. A rename over a file that appeared since check
// is refused like one that was there before.
func (d *destination) write(ctx context.Context, data []byte) error {
	temp, err := d.fill(data)
	if err == nil {
		if err = ctx.Err(); err == nil {
			err = d.check(nil)
		}
		if err == nil {
			err = os.Rename(temp, d.path)
		}
	}
	if err == nil {
		return nil
	}
	if temp != "" {
		os.Remove(temp)
	}
	var usage *usageError
	var told *fileError
	if errors.Is(err, context.Canceled) || errors.As(err, &usage) || errors.As(err, &told) {
		return err
	}
	return &fileError{"write", fmt.Sprintf("%q", d.path), err}
}

// fill writes data to a new file beside the destination and brings it to the
// disk. The name is returned as soon as the file exists, also with an error.
func (d *destination) fill(data []byte) (temp string, err error) {
	mode := fs.FileMode(0o666) // less what the user masks
	if old, err := os.Lstat(d.path); err == nil {
		mode = old.Mode().Perm()
	}
	f, err := createBeside(d.path, mode)
	if err != nil {
		return "", err
	}
	if _, err = f.Write(data); err == nil {
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
