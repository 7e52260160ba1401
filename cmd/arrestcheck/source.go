package main

import (
	"fmt"
	"io/fs"
	"os"

	"arrestcheck/arrest/jobfile"
	"arrestcheck/limits"
	"arrestcheck/reportgen"
	"arrestcheck/reportgen/archive"
)

// lazyFolder is the folder of a job, opened when the first limit file is asked
// for: most jobs of a register name none.
type lazyFolder struct {
	of   *input
	root *os.Root
}

func (f *lazyFolder) open() error {
	if f.root != nil {
		return nil
	}
	root, err := f.of.folder()
	f.root = root
	return err
}

func (f *lazyFolder) Open(name string) (fs.File, error) {
	if err := f.open(); err != nil {
		return nil, err
	}
	return f.root.FS().Open(name)
}

func (f *lazyFolder) Stat(name string) (fs.FileInfo, error) {
	if err := f.open(); err != nil {
		return nil, err
	}
	return fs.Stat(f.root.FS(), name)
}

func (f *lazyFolder) close() {
	if f.root != nil {
		f.root.Close()
	}
}

// gather reads everything that a job is worked out from: the job, the limit
// files it names and those of the command line. Every fault of every file is
// told.
func gather(name string, limitFiles []string, set []jobfile.Override, in surroundings) (*archive.Inputs, []fs.FileInfo, error) {
	job, err := readInput(name, in.stdin)
	if err != nil {
		return nil, nil, err
	}
	inputs := []fs.FileInfo{job.info}
	folder := &lazyFolder{of: &job}
	defer folder.close()
	file, err := jobfile.Read(name, job.data, folder, set...)
	if err != nil {
		return nil, inputs, err
	}
	all := &archive.Inputs{Name: name, Job: job.data}
	for _, o := range set {
		all.Overrides = append(all.Overrides, archive.Override{Key: o.Key, Value: o.Value})
	}
	for i := range file.Sets {
		name := file.Sets[i].Name
		if name == "" {
			continue
		}
		data, err := fs.ReadFile(folder, name)
		if err != nil {
			return nil, inputs, &fileError{"read", fmt.Sprintf("%q", name), err}
		}
		if info, err := folder.Stat(name); err == nil {
			inputs = append(inputs, info)
		}
		all.Sets = append(all.Sets, archive.NamedFile{Name: name, Data: data})
	}
	for _, name := range limitFiles {
		file, err := readFile(name)
		if err != nil {
			return nil, inputs, &fileError{"read", fmt.Sprintf("%q", name), err}
		}
		inputs = append(inputs, file.info)
		all.Extra = append(all.Extra, archive.NamedFile{Name: name, Data: file.data})
	}
	return all, inputs, nil
}

// workOut makes the sheet of a job whose files are all in memory.
func workOut(in *archive.Inputs) (*reportgen.Sheet, []string, error) {
	folder := make(memory, len(in.Sets))
	for _, f := range in.Sets {
		folder[f.Name] = f.Data
	}
	var set []jobfile.Override
	for _, o := range in.Overrides {
		set = append(set, jobfile.Override{Key: o.Key, Value: o.Value})
	}
	file, err := jobfile.Read(in.Name, in.Job, folder, set...)
	if err != nil {
		return nil, nil, err
	}
	var extra []limits.Set
	for _, f := range in.Extra {
		one, err := jobfile.ReadLimits(f.Name, f.Data)
		if err != nil {
			return nil, nil, err
		}
		extra = append(extra, *one)
	}
	remarks, err := addSets(file, extra)
	if err != nil {
		return nil, nil, err
	}
	sheet := &reportgen.Sheet{File: file, Tool: toolVersion, Number: 1, Of: 1}
	assess(sheet)
	return sheet, remarks, nil
}
