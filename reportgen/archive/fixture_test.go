package archive

import (
	"bytes"
	"os"
	"path/filepath"
	"strings"
	"testing"

	"github.com/google/go-cmp/cmp"
	"github.com/google/go-cmp/cmp/cmpopts"

	"arrestcheck/arrest"
	"arrestcheck/arrest/jobfile"
	"arrestcheck/limits"
	"arrestcheck/reportgen"
)

const (
	jobsFolder = "../../testdata/jobs"
	testTool   = "test"
)

// jobNames lists the jobs of testdata.
func jobNames(t testing.TB) []string {
	t.Helper()
	paths, err := filepath.Glob(filepath.Join(jobsFolder, "*.toml"))
	if err != nil || len(paths) == 0 {
		t.Fatal("no jobs in testdata: ", err)
	}
	for i := range paths {
		paths[i] = filepath.Base(paths[i])
	}
	return paths
}

// read returns the inputs of a job of testdata.
func read(t testing.TB, name string) *Inputs {
	t.Helper()
	data, err := os.ReadFile(filepath.Join(jobsFolder, name))
	if err != nil {
		t.Fatal(err)
	}
	file, err := jobfile.Read(name, data, os.DirFS(jobsFolder))
	if err != nil {
		t.Fatal(err)
	}
	in := &Inputs{Name: name, Job: data}
	for _, set := range file.Sets {
		if set.Name == "" {
			continue
		}
		data, err := os.ReadFile(filepath.Join(jobsFolder, set.Name))
		if err != nil {
			t.Fatal(err)
		}
		in.Sets = append(in.Sets, NamedFile{set.Name, data})
	}
	return in
}

// work makes the sheet of some inputs, as the command does: from a folder on
// the disk that holds nothing else.
func work(t testing.TB) func(*Inputs) (*reportgen.Sheet, error) {
	return func(in *Inputs) (*reportgen.Sheet, error) {
		folder := t.TempDir()
		for _, f := range in.Sets {
			path := filepath.Join(folder, f.Name)
			if err := os.MkdirAll(filepath.Dir(path), 0o777); err != nil {
				t.Fatal(err)
			}
			if err := os.WriteFile(path, f.Data, 0o666); err != nil {
				t.Fatal(err)
			}
		}
		var set []jobfile.Override
		for _, o := range in.Overrides {
			set = append(set, jobfile.Override(o))
		}
		file, err := jobfile.Read(in.Name, in.Job, os.DirFS(folder), set...)
		if err != nil {
			return nil, err
		}
		for _, f := range in.Extra {
			one, err := jobfile.ReadLimits(f.Name, f.Data)
			if err != nil {
				return nil, err
			}
			file.Sets = append(file.Sets, *one)
		}
		res := arrest.Evaluate(&file.Job)
		arrest.ShowWorking(&file.Job, &res)
		a := limits.Assess(&res, file.Sets, file.Elsewhere)
		return &reportgen.Sheet{File: file, Result: &res, Assessment: &a, Tool: testTool, Number: 1, Of: 1}, nil
	}
}

func sheet(t testing.TB, name string) *reportgen.Sheet {
	t.Helper()
	s, err := work(t)(read(t, name))
	if err != nil {
		t.Fatal(err)
	}
	return s
}

// sheetOf works out a job that stands alone.
func sheetOf(t testing.TB, job string) *reportgen.Sheet {
	t.Helper()
	s, err := work(t)(&Inputs{Name: "job.toml", Job: []byte(job)})
	if err != nil {
		t.Fatal(err)
	}
	return s
}

func jsonOf(t testing.TB, s *reportgen.Sheet) []byte {
	t.Helper()
	var b bytes.Buffer
	if err := reportgen.JSON(&b, s); err != nil {
		t.Fatal(err)
	}
	return b.Bytes()
}

// absent lets NaN equal NaN, and an empty list a missing one.
var absent = cmp.Options{cmpopts.EquateNaNs(), cmpopts.EquateEmpty()}

// packed archives a job of testdata.
func packed(t testing.TB, name string) []File {
	t.Helper()
	in := read(t, name)
	s, err := work(t)(in)
	if err != nil {
		t.Fatal(err)
	}
	files, err := Pack(&Contents{Sheet: s, Job: in.Job, Sets: in.Sets, Units: "both"})
	if err != nil {
		t.Fatal(err)
	}
	return files
}

// found is what a reader of the folder of an archive sees.
func found(files []File) []Found {
	list := make([]Found, len(files))
	for i, f := range files {
		list[i] = Found{Path: f.Path, Size: int64(len(f.Data)), Data: f.Data, SHA256: digest(f.Data)}
	}
	return list
}

// change returns the files with one of them changed.
func change(t testing.TB, files []File, path string, to func(string) string) []File {
	t.Helper()
	list := append([]File{}, files...)
	for i := range list {
		if list[i].Path == path {
			after := to(string(list[i].Data))
			if after == string(list[i].Data) {
				t.Fatalf("%s: nothing changed", path)
			}
			list[i].Data = []byte(after)
			return list
		}
	}
	t.Fatalf("no file %s", path)
	return nil
}

// replace is a change of one text.
func replace(old, with string) func(string) string {
	return func(s string) string { return strings.Replace(s, old, with, 1) }
}

// sealed makes both manifests anew, as someone does who does not want a change
// to be seen.
func sealed(files []File) []File {
	var data, tags, rest []File
	for _, f := range files {
		switch {
		case strings.HasPrefix(f.Path, payload):
			data = append(data, f)
		case f.Path != manifestFile && f.Path != tagManifestFile:
			rest = append(rest, f)
		}
	}
	size := int64(0)
	for _, f := range data {
		size += int64(len(f.Data))
	}
	for i, f := range rest {
		if f.Path == infoFile {
			lines := strings.Split(string(f.Data), "\n")
			for j, l := range lines {
				if strings.HasPrefix(l, "Payload-Oxum: ") {
					lines[j] = "Payload-Oxum: " + oxum(size, len(data))
				}
			}
			rest[i].Data = []byte(strings.Join(lines, "\n"))
		}
	}
	tags = append(rest, File{Path: manifestFile, Data: manifest(data)})
	return append(append(data, tags...), File{Path: tagManifestFile, Data: manifest(tags)})
}

// opened opens what has to be an archive.
func opened(t testing.TB, files []File) *Opened {
	t.Helper()
	o, err := Open(found(files))
	if err != nil {
		t.Fatal(err)
	}
	return o
}

func reproduced(t testing.TB, files []File, later ...limits.Set) *Reproduction {
	t.Helper()
	return Reproduce("bag", opened(t, files), testTool, work(t), later)
}

// text lays a report out.
func text(t testing.TB, r reportgen.Report) string {
	t.Helper()
	var b bytes.Buffer
	if err := reportgen.Text(&b, r, reportgen.TextOptions{}); err != nil {
		t.Fatal(err)
	}
	return b.String()
}
