package archive

import (
	"bytes"
	"fmt"
	"slices"
	"strconv"
	"strings"

	"arrestcheck/arrest"
	"arrestcheck/reportgen"
)

// A File is one file of an archive.
type File struct {
	Path       string // below the folder of the archive, with slashes
	Data       []byte
	Executable bool
}

// A NamedFile is a file with the name its reader knows it by.
type NamedFile struct {
	Name string
	Data []byte
}

// Contents are what an archive is made of.
type Contents struct {
	Sheet   *reportgen.Sheet // worked out from Job, Sets and Extra
	Job     []byte
	Sets    []NamedFile // the limit files that the job names, as it names them
	Extra   []NamedFile // those added on the command line
	Units   string      // "both", "si", "us"
	Program *ProgramFile
}

// A ProgramFile is the program that worked the sheet out.
type ProgramFile struct {
	Data              []byte
	System, Processor string
}

// Names of files below data/.
const (
	jobFile     = payload + "job.toml"
	extraFolder = payload + "extra-limits/"
	programFile = payload + "program/arrestcheck"
	textFile    = payload + "report.txt"
	mdFile      = payload + "report.md"
	jsonFile    = payload + "result.json"
)

// Pack returns the files of an archive: a bag as in RFC 8493. Below data/ lie
// the job and its limit files, so that the job can be checked there, and the
// report as text, Markdown and JSON. The last file is the manifest over all
// others but the payload; its digest stands for the archive as a whole.
//
// The error tells a limit file whose name cannot stand in an archive. Pack
// panics if Units is none of its words.
func Pack(c *Contents) ([]File, error) {
	record := c.record()
	files := []File{{Path: jobFile, Data: c.Job}}
	named := make(map[string]bool, len(c.Sets))
	for i, f := range c.Sets {
		if err := fitName(f.Name); err != nil {
			return nil, err
		}
		if named[fold(f.Name)] {
			return nil, fmt.Errorf("the limit file %q differs from another one in capital letters only; give it another name", f.Name)
		}
		named[fold(f.Name)] = true
		files = append(files, File{Path: record.Sets[i].File, Data: f.Data})
	}
	for i, f := range c.Extra {
		files = append(files, File{Path: record.Extra[i].File, Data: f.Data})
	}
	if c.Program != nil {
		files = append(files, File{programFile, c.Program.Data, true})
	}
	files = append(files, render(c.Sheet, unitChoices[c.Units])...)
	slices.SortFunc(files, func(a, b File) int { return strings.Compare(a.Path, b.Path) })

	tags := []File{
		{Path: recordFile, Data: record.encode()},
		{Path: infoFile, Data: info(c.Sheet, files)},
		{Path: declarationFile, Data: []byte(declaration)},
		{Path: manifestFile, Data: manifest(files)},
	}
	return append(append(files, tags...), File{Path: tagManifestFile, Data: manifest(tags)}), nil
}

// fitName refuses a name that the job gives a limit file and that cannot stand
// in an archive, or stands for something else there.
func fitName(name string) error {
	if why := unfit(payload + name); why != "" {
		return fmt.Errorf("the limit file %q: %s; give it another name", name, why)
	}
	path := fold(payload + name)
	for _, taken := range []string{jobFile, textFile, mdFile, jsonFile} {
		if path == taken {
			return fmt.Errorf("the limit file %q has the name of a file of the archive; give it another name", name)
		}
	}
	for _, taken := range []string{extraFolder, programFile[:strings.LastIndexByte(programFile, '/')+1]} {
		if strings.HasPrefix(path, taken) || path+"/" == taken {
			return fmt.Errorf("the limit file %q lies in a folder of the archive; put it into another one", name)
		}
	}
	return nil
}

func (c *Contents) record() *Record {
	if _, known := unitChoices[c.Units]; !known {
		panic("archive: no such units: " + c.Units)
	}
	results := Of(c.Sheet)
	r := &Record{
		Format:  RecordFormat,
		Tool:    Versions{c.Sheet.Tool, arrest.ModelVersion},
		Job:     RecordedFile{c.Sheet.File.Name, jobFile, digest(c.Job)},
		Sets:    []RecordedFile{},
		Extra:   []RecordedFile{},
		Options: Options{c.Units, []RecordedOverride{}},
		Results: results.Digest(),
	}
	for _, f := range c.Sets {
		r.Sets = append(r.Sets, RecordedFile{f.Name, payload + f.Name, digest(f.Data)})
	}
	for i, f := range c.Extra {
		r.Extra = append(r.Extra, RecordedFile{f.Name, extraFolder + strconv.Itoa(i+1) + ".toml", digest(f.Data)})
	}
	for _, o := range results.Overrides {
		r.Options.Overrides = append(r.Options.Overrides, RecordedOverride(o))
	}
	if c.Program != nil {
		r.Program = &Program{programFile, digest(c.Program.Data), c.Program.System, c.Program.Processor}
	}
	return r
}

// render writes the report of an archive in each of its forms.
func render(s *reportgen.Sheet, units reportgen.UnitChoice) []File {
	var text, md, data bytes.Buffer
	report := reportgen.Build(s, units)
	must(reportgen.Text(&text, report, reportgen.TextOptions{}))
	must(reportgen.Markdown(&md, report, reportgen.MarkdownOptions{}))
	must(reportgen.JSON(&data, s))
	return []File{
		{Path: textFile, Data: text.Bytes()},
		{Path: mdFile, Data: md.Bytes()},
		{Path: jsonFile, Data: data.Bytes()},
	}
}

// must panics: a buffer never fails.
func must(err error) {
	if err != nil {
		panic("archive: " + err.Error())
	}
}

// info is bag-info.txt. It holds no date: the same files give the same archive.
func info(s *reportgen.Sheet, files []File) []byte {
	var b strings.Builder
	label := func(name, text string) {
		if text = strings.Join(strings.Fields(reportgen.Printable(text)), " "); text != "" {
			b.WriteString(name + ": " + text + "\n")
		}
	}
	size := int64(0)
	for _, f := range files {
		size += int64(len(f.Data))
	}
	label("External-Identifier", s.File.Document.Reference)
	label("External-Description", s.File.Document.Title)
	label("Bag-Software-Agent", "arrestcheck "+s.Tool)
	label("Payload-Oxum", oxum(size, len(files)))
	return []byte(b.String())
}
