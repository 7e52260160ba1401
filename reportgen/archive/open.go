package archive

import (
	"fmt"
	"slices"
	"strings"
)

// Bounds of what is looked at. An archive of this program is far below them.
const (
	MaxFiles   = 1000      // files in an archive
	maxInput   = 1 << 20   // bytes of a job or limit file, as for a job that is checked
	maxReport  = 64 << 20  // bytes of a report or tag file
	maxProgram = 512 << 20 // bytes of the program
)

// MaxSize returns how many bytes a file of an archive may have. A larger one
// need not be read: Open refuses it by its size.
func MaxSize(path string) int64 {
	switch {
	case path == programFile:
		return maxProgram
	case slices.Contains([]string{textFile, mdFile, jsonFile, manifestFile, tagManifestFile, recordFile, infoFile}, path):
		return maxReport
	}
	return maxInput
}

// IsProgram reports whether a path is that of the program file: Open needs its
// digest, not its bytes.
func IsProgram(path string) bool { return path == programFile }

// A Found is one file that lies in the folder of an archive.
type Found struct {
	Path   string // below the folder of the archive, with slashes
	Size   int64
	Data   []byte // not of the program, nor of a file larger than MaxSize
	SHA256 string // of the bytes; empty of a file larger than MaxSize
	Kind   string // "link", "pipe or device" where it is no plain file; else empty
}

// A Refusal says why a folder is no archive that can be worked out again.
type Refusal struct{ Reasons []string }

func (r *Refusal) Error() string { return "archive: " + strings.Join(r.Reasons, "; ") }

// A Touched file is not the one that was archived.
type Touched struct{ Path, Was, Is string } // digests

// An Opened archive is one whose files are all there and no others.
type Opened struct {
	Record  Record
	Touched []Touched // in the order of the paths
	Digest  string    // of the manifest that stands for the archive as a whole
	files   map[string]*Found
}

// Open looks at the files in the folder of an archive. It refuses, with a
// *Refusal, whatever is not just what Pack makes: a file that is missing,
// that no manifest names, that is no plain file, or too large; a manifest that
// can be read in two ways; paths that lead out. A file with other bytes than it
// had is no reason to refuse: it is told as touched.
func Open(found []Found) (*Opened, error) {
	o := &opening{files: make(map[string]*Found, len(found)), Opened: &Opened{}}
	o.list(found)
	if !o.refused() {
		o.declaration()
		o.manifests()
	}
	if !o.refused() {
		o.readRecord()
	}
	if o.refused() {
		return nil, &Refusal{o.reasons}
	}
	o.Opened.files = o.files
	slices.SortFunc(o.Touched, func(a, b Touched) int { return strings.Compare(a.Path, b.Path) })
	return o.Opened, nil
}

// An opening is an archive being looked at.
type opening struct {
	*Opened
	files   map[string]*Found
	reasons []string
}

func (o *opening) refuse(format string, args ...any) {
	o.reasons = append(o.reasons, fmt.Sprintf(format, args...))
}

func (o *opening) refused() bool { return len(o.reasons) > 0 }

// list takes stock of the folder.
func (o *opening) list(found []Found) {
	if len(found) > MaxFiles {
		o.refuse("more than %d files", MaxFiles)
		return
	}
	for i := range found {
		f := &found[i]
		switch {
		case f.Kind != "":
			o.refuse("%q is a %s, no plain file", f.Path, f.Kind)
		case f.Size > MaxSize(f.Path):
			o.refuse("%q is too large: %d bytes", f.Path, f.Size)
		case strings.HasPrefix(f.Path, payload) && strings.HasSuffix(f.Path, "/"+declarationFile):
			o.refuse("%q: an archive lies in the archive", f.Path)
		}
		o.files[f.Path] = f
	}
}

// declaration looks at bagit.txt, which always has the same bytes.
func (o *opening) declaration() {
	switch f := o.files[declarationFile]; {
	case f == nil:
		o.refuse("%s is missing: the folder is no bag", declarationFile)
	case string(f.Data) != declaration:
		o.refuse("%s is not that of a bag of version 1.0", declarationFile)
	}
}

// manifests holds the files against both manifests.
func (o *opening) manifests() {
	named := map[string]bool{tagManifestFile: true}
	o.manifest(manifestFile, named)
	o.manifest(tagManifestFile, named)
	if o.refused() {
		return
	}
	for _, path := range sortedPaths(o.files) {
		if !named[path] {
			o.refuse("%q is named in no manifest", path)
		}
	}
	for _, path := range []string{recordFile, infoFile, declarationFile, manifestFile} {
		if !named[path] {
			o.refuse("%s names no %s", tagManifestFile, path)
		}
	}
	o.Digest = o.files[tagManifestFile].SHA256
	o.size()
}

// manifest holds the files that one manifest names against it.
func (o *opening) manifest(name string, named map[string]bool) {
	file := o.files[name]
	if file == nil {
		o.refuse("%s is missing", name)
		return
	}
	entries, err := parseManifest(name, file.Data)
	if err != nil {
		o.refuse("%v", err)
		return
	}
	for _, e := range entries {
		f := o.files[e.path]
		switch {
		case strings.HasPrefix(e.path, payload) != (name == manifestFile):
			o.refuse("%s names %q, which does not belong there", name, e.path)
		case e.path == tagManifestFile:
			o.refuse("%s names itself", name)
		case f == nil:
			o.refuse("%q is missing", e.path)
		case f.SHA256 != e.digest:
			o.touched(e.path, e.digest, f.SHA256)
		}
		named[e.path] = true
	}
}

func (o *opening) touched(path, was, is string) {
	if !slices.ContainsFunc(o.Touched, func(t Touched) bool { return t.Path == path }) {
		o.Touched = append(o.Touched, Touched{path, was, is})
	}
}

// size holds the payload against the sizes that bag-info.txt states. Where a
// payload file is touched already, another size says nothing more.
func (o *opening) size() {
	if slices.ContainsFunc(o.Touched, func(t Touched) bool { return strings.HasPrefix(t.Path, payload) }) {
		return
	}
	bytes, files := int64(0), 0
	for path, f := range o.files {
		if strings.HasPrefix(path, payload) {
			bytes, files = bytes+f.Size, files+1
		}
	}
	const label = "Payload-Oxum: "
	is := label + oxum(bytes, files)
	was := "no " + label
	for line := range strings.Lines(string(o.files[infoFile].Data)) {
		if strings.HasPrefix(line, label) {
			was = strings.TrimSuffix(line, "\n")
		}
	}
	if was != is {
		o.touched(infoFile, was, is)
	}
}

// readRecord reads the tag file and holds the payload against it.
func (o *opening) readRecord() {
	record, err := decodeRecord(o.files[recordFile].Data)
	if err != nil {
		o.refuse("%v", err)
		return
	}
	o.Record = *record
	if record.Job.File != jobFile {
		o.refuse("%s: the job is not %s", recordFile, jobFile)
	}
	known := map[string]bool{textFile: true, mdFile: true, jsonFile: true}
	for _, f := range record.files() {
		switch is := o.files[f.File]; {
		case !strings.HasPrefix(f.File, payload) || is == nil || known[f.File]:
			o.refuse("%s names %q, which is not there or is something else", recordFile, f.File)
		case is.SHA256 != f.SHA256:
			o.touched(f.File, f.SHA256, is.SHA256)
		}
		known[f.File] = true
	}
	for _, path := range sortedPaths(o.files) {
		if strings.HasPrefix(path, payload) && !known[path] {
			o.refuse("%q is no part of an archive of this program", path)
		}
	}
	for _, path := range []string{textFile, mdFile, jsonFile} {
		if o.files[path] == nil {
			o.refuse("%q is missing", path)
		}
	}
}

func sortedPaths(files map[string]*Found) []string {
	paths := make([]string, 0, len(files))
	for path := range files {
		paths = append(paths, path)
	}
	slices.Sort(paths)
	return paths
}

// Inputs are what a job is worked out from.
type Inputs struct {
	Name      string // of the job
	Job       []byte
	Sets      []NamedFile // the limit files that the job names, as it names them
	Extra     []NamedFile // those added on the command line
	Overrides []Override
}

// Inputs returns what the archived job is worked out from.
func (o *Opened) Inputs() *Inputs {
	in := &Inputs{Name: o.Record.Job.Name, Job: o.files[jobFile].Data}
	for _, f := range o.Record.Sets {
		in.Sets = append(in.Sets, NamedFile{strings.TrimPrefix(f.File, payload), o.files[f.File].Data})
	}
	for _, f := range o.Record.Extra {
		in.Extra = append(in.Extra, NamedFile{f.Name, o.files[f.File].Data})
	}
	for _, p := range o.Record.Options.Overrides {
		in.Overrides = append(in.Overrides, Override(p))
	}
	return in
}

// Results reads the archived result file.
func (o *Opened) Results() (Results, error) { return ReadResults(o.files[jsonFile].Data) }
