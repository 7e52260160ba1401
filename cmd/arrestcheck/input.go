package main

import (
	"errors"
	"fmt"
	"io"
	"io/fs"
	"os"
	"path/filepath"
	"syscall"
)

// maxInput is one byte more than an input may have: the reader of the file
// refuses it there, with its own words.
const maxInput = 1<<20 + 1

// An input is one file, or standard input, read as far as it may be.
type input struct {
	name string // as the user gave it; "-" for standard input
	data []byte
	info fs.FileInfo // nil for standard input
}

// readInput reads the file name, or stdin for "-".
func readInput(name string, stdin io.Reader) (input, error) {
	if name == "-" {
		data, err := io.ReadAll(io.LimitReader(stdin, maxInput))
		if err != nil {
			return input{}, &fileError{"read", "standard input", err}
		}
		return input{name: name, data: data}, nil
	}
	in, err := readFile(name)
	if err != nil {
		return input{}, &fileError{"read", fmt.Sprintf("%q", name), err}
	}
	return in, nil
}

// openInput opens a file to read. Of a pipe with a name the opening alone would
// wait, without a word, until somebody writes to it: here one that nobody writes
// to is empty.
func openInput(name string) (*os.File, error) {
	return os.OpenFile(name, os.O_RDONLY|syscall.O_NONBLOCK, 0)
}

var errNobodyWrites = errors.New("it is a pipe, and nobody writes to it")

func readFile(name string) (input, error) {
	f, err := openInput(name)
	if err != nil {
		return input{}, err
	}
	defer f.Close()
	info, err := f.Stat()
	if err != nil {
		return input{}, err
	}
	data, err := io.ReadAll(io.LimitReader(f, maxInput))
	if err == nil && len(data) == 0 && info.Mode()&fs.ModeNamedPipe != 0 {
		err = errNobodyWrites
	}
	return input{name, data, info}, err
}

// folder returns the folder a job's own limit files must lie in: that of the
// job, the working folder for standard input. Nothing outside it can be
// opened through the root, not by ".." and not by a link.
func (in *input) folder() (*os.Root, error) {
	dir := "."
	if in.name != "-" {
		dir = filepath.Dir(in.name)
	}
	root, err := os.OpenRoot(dir)
	if err != nil {
		return nil, &fileError{"open the folder", fmt.Sprintf("%q", dir), err}
	}
	return root, nil
}
