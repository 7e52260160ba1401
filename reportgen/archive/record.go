package archive

import (
	"bytes"
	"encoding/json"
	"fmt"

	"arrestcheck/reportgen"
)

// RecordFormat is the value of the key format of the tag file of an archive.
const RecordFormat = "arrestcheck archive 1"

const recordFile = "arrestcheck-archive.json"

// A Record is the tag file of an archive: what it takes to work the job out
// again, and the digests to hold the outcome against.
type Record struct {
	Format  string         `json:"format"`
	Tool    Versions       `json:"tool"`
	Job     RecordedFile   `json:"job"`
	Sets    []RecordedFile `json:"limit_sets"`   // that the job names
	Extra   []RecordedFile `json:"extra_limits"` // that were added on the command line
	Options Options        `json:"options"`
	Results string         `json:"results_sha256"` // of the canonical form
	Program *Program       `json:"program"`
}

// Versions are those of the program and of its mechanics.
type Versions struct {
	Version string `json:"version"`
	Model   string `json:"model"`
}

// A RecordedFile is an input with the name it had and where it is now.
type RecordedFile struct {
	Name   string `json:"name"`
	File   string `json:"file"`
	SHA256 string `json:"sha256"`
}

// Options are those of the command line that show in the report.
type Options struct {
	Units     string             `json:"units"` // "both", "si", "us"
	Overrides []RecordedOverride `json:"overrides"`
}

// A RecordedOverride is one --set.
type RecordedOverride struct {
	Key   string `json:"key"`
	Value string `json:"value"`
}

// A Program says which program file lies in the archive.
type Program struct {
	File      string `json:"file"`
	SHA256    string `json:"sha256"`
	System    string `json:"system"`    // as the Go toolchain names it: "linux"
	Processor string `json:"processor"` // "amd64"
}

// encode writes the record, laid out to be read.
func (r *Record) encode() []byte {
	var b bytes.Buffer
	e := json.NewEncoder(&b)
	e.SetEscapeHTML(false)
	e.SetIndent("", "  ")
	if err := e.Encode(r); err != nil {
		panic("archive: record: " + err.Error()) // a struct of texts
	}
	return []byte(reportgen.EscapeJSON(b.String()))
}

// decodeRecord reads a record.
func decodeRecord(data []byte) (*Record, error) {
	r := &Record{}
	if err := json.Unmarshal(data, r); err != nil {
		return nil, fmt.Errorf("%s: %v", recordFile, err)
	}
	if r.Format != RecordFormat {
		return nil, fmt.Errorf("%s: the format %.40q is not known; this program reads %q", recordFile, r.Format, RecordFormat)
	}
	if _, known := unitChoices[r.Options.Units]; !known {
		return nil, fmt.Errorf("%s: the units %.40q are not known", recordFile, r.Options.Units)
	}
	return r, nil
}

// unitChoices are the words of --units.
var unitChoices = map[string]reportgen.UnitChoice{
	"both": reportgen.BothUnits, "si": reportgen.SIUnits, "us": reportgen.USUnits,
}

// files returns every file that the record names.
func (r *Record) files() []RecordedFile {
	all := append([]RecordedFile{r.Job}, r.Sets...)
	all = append(all, r.Extra...)
	if r.Program != nil {
		all = append(all, RecordedFile{File: r.Program.File, SHA256: r.Program.SHA256})
	}
	return all
}
