// Package jobfile turns the files a user writes into jobs and limit sets. It
// is the only package that knows TOML.
//
// Read reads a job with the limit files it names, ReadLimits one limit file.
// Both refuse rather than guess, and tell every fault of every file at once.
// What may stand in the files is in one table, Keys, from which strictness,
// hints and checks follow.
//
// Nothing here opens a path: bytes and a file system come from the caller.
package jobfile

import (
	"crypto/sha256"
	"encoding/hex"
	"io/fs"

	"arrestcheck/arrest"
	"arrestcheck/limits"
)

// Document is the text of the [document] section, as typed.
type Document struct {
	Title, Site, Reference, Revision, Date, Purpose, System, Rescue, PreparedBy, CheckedBy, ReviewDate string
}

// A File is one job file, read.
type File struct {
	Name      string // as the user gave it; "-" for standard input
	SHA256    string // of the bytes read
	Document  Document
	Job       arrest.Job
	Sets      []limits.Set // limit files in the order named, then the inline limits
	Elsewhere []limits.Elsewhere
	Overrides []Change // in the order given; Job is the file with these in it
}

// Read reads a job and the limit files it names, which must lie in folder.
// folder may be nil for a job that names none. Overrides are put into the file
// before it is looked at: an overridden figure has lost its source and its note,
// and so is open. SHA256 stays that of the bytes.
//
// The error is a *Faults with every fault of every file; Faults.Unreadable
// tells a limit file that could not be read from one that is refused.
func Read(name string, data []byte, folder fs.FS, overrides ...Override) (*File, error) {
	pg := &page{name: name, data: data, groups: jobGroups()}
	f := &File{Name: name, SHA256: digest(data)}
	pages := []*page{pg}
	if top := pg.begin(jobFormat, limitsFormat); top != nil {
		f.Overrides = pg.override(top.keys, overrides)
		top.job(f)
		for _, file := range top.files() {
			set, within := file.read(pg, folder)
			if within != nil {
				pages = append(pages, within)
				f.Sets = append(f.Sets, set)
			}
		}
		if inline := top.limits(""); len(inline) > 0 {
			f.Sets = append(f.Sets, limits.Set{Limits: inline})
		}
		twice(pages)
	}
	if err := collect(pages); err != nil {
		return nil, err
	}
	return f, nil
}

// ReadLimits reads a limit file. The error is a *Faults.
func ReadLimits(name string, data []byte) (*limits.Set, error) {
	pg := &page{name: name, data: data, groups: limitGroups()}
	set := pg.limitSet()
	pages := []*page{pg}
	twice(pages)
	if err := collect(pages); err != nil {
		return nil, err
	}
	return &set, nil
}

// collect returns the faults of all pages as an error, nil when there are none.
func collect(pages []*page) error {
	n := 0
	for _, pg := range pages {
		n += len(pg.faults)
	}
	if n == 0 {
		return nil
	}
	all := make([]Fault, 0, n)
	for _, pg := range pages {
		all = append(all, pg.finish()...)
	}
	return &Faults{List: all}
}

func digest(data []byte) string {
	sum := sha256.Sum256(data)
	return hex.EncodeToString(sum[:])
}
