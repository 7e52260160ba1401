package main

import (
	"bufio"
	"context"
	"errors"
	"fmt"
	"io"
	"io/fs"
	"os"
	"path/filepath"
	"runtime/debug"
	"strings"

	"arrestcheck/arrest"
	"arrestcheck/arrest/jobfile"
	"arrestcheck/limits"
	"arrestcheck/reportgen"
	"arrestcheck/reportgen/archive"
)

// A candidate is a file that may be a job.
type candidate struct {
	name   string
	found  bool  // in a folder, and a plain file there
	listed bool  // on standard input
	err    error // why it cannot be looked at
}

// A batch is some candidates on their way through a worker, one after the
// other: handing each over by itself would cost as much as a part of the work.
type batch struct {
	candidates []candidate
	rows       []*archive.Row // nil of a limit file in a folder
	fatal      error          // ends the run
	done       chan struct{}
}

// How much is on its way at once. With a bound the memory needed does not grow
// with the number of jobs; it is wide enough that a worker that has to wait for
// its processor does not keep the others waiting.
const (
	batchSize = 16
	window    = 24       // batches per worker
	large     = 64 << 10 // bytes of a job whose row must not keep all of them in memory
)

// inOrder works the jobs out, several at a time, and hands their rows over in
// the order of the jobs.
func (r *registrar) inOrder(ctx context.Context, add func(*archive.Row) error) error {
	ctx, stop := context.WithCancel(ctx)
	defer stop()
	workers := r.flags.workersOf()
	todo := make(chan *batch)
	order := make(chan *batch, window*workers)
	for range workers {
		go func() {
			for b := range todo {
				r.work(b)
				close(b.done)
			}
		}()
	}
	go func() {
		defer close(order)
		defer close(todo)
		r.batches(func(b *batch) bool { return send(ctx, order, b) && send(ctx, todo, b) })
	}()
	for {
		b, more := receive(ctx, order)
		if !more {
			return ctx.Err()
		}
		if receive(ctx, b.done); ctx.Err() != nil {
			return ctx.Err()
		}
		if err := r.hand(b, add); err != nil {
			return err
		}
	}
}

// hand hands the rows of a batch over.
func (r *registrar) hand(b *batch, add func(*archive.Row) error) error {
	for _, row := range b.rows {
		if row == nil {
			r.leftOut++
			continue
		}
		if err := add(row); err != nil {
			return err
		}
	}
	return b.fatal
}

// batches puts the candidates together, until yield wants no more.
func (r *registrar) batches(yield func(*batch) bool) {
	next := &batch{done: make(chan struct{})}
	wanted := true
	r.candidates(func(c candidate) bool {
		next.candidates = append(next.candidates, c)
		if len(next.candidates) == batchSize {
			wanted = yield(next)
			next = &batch{done: make(chan struct{})}
		}
		return wanted
	})
	if wanted && len(next.candidates) > 0 {
		yield(next)
	}
}

// send reports whether the other end took a value before ctx ended.
func send[T any](ctx context.Context, to chan<- T, value T) bool {
	select {
	case to <- value:
		return true
	case <-ctx.Done():
		return false
	}
}

// receive reports whether a value came before the channel or ctx ended.
func receive[T any](ctx context.Context, from <-chan T) (value T, ok bool) {
	select {
	case value, ok = <-from:
		return value, ok
	case <-ctx.Done():
		return value, false
	}
}

// candidates names the files in order, until yield wants no more.
func (r *registrar) candidates(yield func(candidate) bool) {
	for _, name := range r.names {
		if name == "-" {
			if !listed(r.in.stdin, yield) {
				return
			}
			continue
		}
		if info, err := os.Stat(name); err == nil && info.IsDir() {
			if !walked(name, yield) {
				return
			}
			continue
		}
		if !yield(candidate{name: name}) {
			return
		}
	}
}

// longestName is the greatest length of a name on standard input, in bytes.
const longestName = 1 << 16

// listed reads names, one a line.
func listed(stdin io.Reader, yield func(candidate) bool) bool {
	scan := bufio.NewScanner(stdin)
	scan.Buffer(make([]byte, 0, 4096), longestName)
	for scan.Scan() {
		if name := strings.TrimSuffix(scan.Text(), "\r"); name != "" && !yield(candidate{name: name, listed: true}) {
			return false
		}
	}
	if err := scan.Err(); err != nil {
		return yield(candidate{name: "-", err: &fileError{"read", "standard input", err}})
	}
	return true
}

// walked names the .toml files below a folder, in the order of their names.
// What is no plain file is named too: it would be missed.
func walked(folder string, yield func(candidate) bool) bool {
	goOn := true
	if folder[len(folder)-1] != filepath.Separator {
		folder += string(filepath.Separator) // a link to a folder is followed where it is named
	}
	_ = filepath.WalkDir(folder, func(path string, d fs.DirEntry, err error) error {
		c := candidate{name: path, found: true}
		switch {
		case err != nil:
			c.err = cannotRead(path, err)
		case d.IsDir() || !strings.EqualFold(filepath.Ext(path), ".toml"):
			return nil
		case !d.Type().IsRegular():
			c.err = &usageError{reason: "a " + kindOf(d.Type()) + " in the folder; name it to have it read"}
		}
		if goOn = yield(c); !goOn {
			return fs.SkipAll
		}
		if err != nil && d != nil && d.IsDir() {
			return fs.SkipDir
		}
		return nil
	})
	return goOn
}

// work makes the rows of a batch.
func (r *registrar) work(b *batch) {
	defer func() {
		if p := recover(); p != nil {
			b.fatal = &internalError{p, debug.Stack()}
		}
	}()
	for i := range b.candidates {
		row, err := r.row(&b.candidates[i])
		if err != nil {
			b.fatal = err
			return
		}
		b.rows = append(b.rows, row)
	}
}

// row makes the row of one candidate, nil of a limit file in a folder. The
// error ends the run.
func (r *registrar) row(c *candidate) (*archive.Row, error) {
	sheet, data, err := r.sheet(c)
	switch {
	case errors.Is(err, errIsOut):
		return nil, &usageError{r.flags.out().quoted() + " is a file that this run reads", "give another name"}
	case errors.Is(err, errIsLimits):
		return nil, nil
	case err != nil:
		if len(data) >= maxInput {
			data = nil // not all of it
		}
		row := archive.BrokenRow(c.name, data, err, int(codeOfError(err)), toolVersion)
		return &row, nil
	}
	row := archive.RowOf(c.name, sheet, int(codeOfAssessment(sheet.Assessment)))
	if len(data) > large {
		row.Detach()
	}
	return &row, nil
}

var (
	errIsLimits = errors.New("a limit file")
	errIsOut    = errors.New("the file of --out")
)

// sheet reads and works out one candidate. The working line by line, which no
// row shows, is left out.
func (r *registrar) sheet(c *candidate) (*reportgen.Sheet, []byte, error) {
	if c.err != nil {
		return nil, nil, c.err
	}
	in, err := r.readPlain(c)
	if err != nil {
		return nil, in.data, err
	}
	// Folders and lists of what lies in them hold limit files beside the jobs.
	if (c.found || c.listed) && archive.IsLimitFile(in.data) {
		return nil, in.data, errIsLimits
	}
	folder := &lazyFolder{of: &in}
	defer folder.close()
	file, err := jobfile.Read(c.name, in.data, folder)
	if err != nil {
		return nil, in.data, err
	}
	if len(r.sets) > 0 {
		if _, err := addSets(file, r.sets); err != nil {
			return nil, in.data, err
		}
	}
	result := arrest.Evaluate(&file.Job)
	assessment := limits.Assess(&result, file.Sets, file.Elsewhere)
	return &reportgen.Sheet{File: file, Result: &result, Assessment: &assessment, Tool: toolVersion, Number: 1, Of: 1}, in.data, nil
}

// readPlain reads a plain file. Of anything else the opening alone could wait
// for ever; what a folder calls a plain file need not be asked again.
func (r *registrar) readPlain(c *candidate) (input, error) {
	if !c.found {
		info, err := os.Stat(c.name)
		if err != nil {
			return input{}, cannotRead(c.name, err)
		}
		if !info.Mode().IsRegular() {
			return input{}, notPlain(info.Mode())
		}
	}
	file, err := os.Open(c.name)
	if err != nil {
		return input{}, cannotRead(c.name, err)
	}
	defer file.Close()
	info, err := file.Stat()
	switch {
	case err != nil:
		return input{}, cannotRead(c.name, err)
	case !info.Mode().IsRegular():
		return input{}, notPlain(info.Mode())
	case r.forbidden != nil && os.SameFile(info, r.forbidden):
		return input{}, errIsOut
	}
	// One byte more than there should be tells a file that grows.
	data := make([]byte, 0, min(info.Size()+1, maxInput))
	for len(data) < maxInput {
		if len(data) == cap(data) {
			data = append(data, 0)[:len(data)]
		}
		n, err := file.Read(data[len(data):min(cap(data), maxInput)])
		data = data[:len(data)+n]
		if errors.Is(err, io.EOF) {
			break
		}
		if err != nil {
			return input{}, cannotRead(c.name, err)
		}
	}
	return input{c.name, data, info}, nil
}

func cannotRead(name string, err error) error {
	return &fileError{"read", fmt.Sprintf("%q", name), err}
}

func notPlain(mode fs.FileMode) error {
	return &usageError{reason: "a " + kindOf(mode) + ", no plain file"}
}
