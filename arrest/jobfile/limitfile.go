package jobfile

import (
	"errors"
	"io"
	"io/fs"
	"path"
	"slices"
	"strconv"
	"strings"

	"arrestcheck/limits"
)

// A limitFile is one element of the list limits of a job.
type limitFile struct {
	name string
	pin  string // digest the file has to have, in small letters; empty where none is asked for
	key  string // "limits[2].file"
	pins string // "limits[2].sha256"
}

// files reads the list of limit files of a job.
func (t *table) files() []limitFile {
	v, k, ok := t.take("limits")
	if !ok {
		return nil
	}
	list, isList := v.([]any)
	if tables, are := v.([]map[string]any); are {
		for _, keys := range tables {
			list = append(list, keys)
		}
		isList = true
	}
	if !isList {
		t.wrongKind(k, v)
		return nil
	}
	var all []limitFile
	named := make(map[string]string, len(list)) // file to the key that names it
	for i, v := range list {
		f, given := t.file(element("limits", i), v)
		if !given {
			continue
		}
		if before, twice := named[f.name]; twice {
			t.page.fault(f.key, f.key, f.name, "the file is named already, at "+before, "take out: one of the two")
			continue
		}
		named[f.name] = f.key
		all = append(all, f)
	}
	return all
}

// file reads one element of the list.
func (t *table) file(key string, v any) (f limitFile, given bool) {
	k := t.group.named["limits"]
	switch v := v.(type) {
	case string:
		f = limitFile{name: v, key: key}
	case map[string]any:
		in := t.page.open("limits", key, v)
		f = limitFile{name: in.text("file"), key: key + ".file", pin: in.pin(), pins: key + ".sha256"}
		if f.name == "" {
			return f, false
		}
	default:
		t.page.fault(key, key, "", "a file name in double quotes is asked for", k.hint())
		return f, false
	}
	if reason, hint := outside(f.name); reason != "" {
		t.page.fault(f.key, f.key, f.name, reason, hint)
		return f, false
	}
	return f, true
}

// pin returns the digest that a limit file has to have.
func (t *table) pin() string {
	const name = "sha256"
	text := t.text(name)
	if text == "" {
		return ""
	}
	low := strings.ToLower(text)
	if len(low) != 64 || strings.Trim(low, "0123456789abcdef") != "" {
		t.fault(name, text, "a digest is 64 hexadecimal digits", "write: what `sha256sum FILE` prints before the name, "+t.group.named[name].line())
		return ""
	}
	return low
}

const (
	copyHint = `copy: the file into the folder of the job, and write: limits = ["site-limits.toml"]`
	diskHint = "look: at the rights to the file and at the disk, and run again"
)

// outside says why a name is not one of a file in the folder of the job, and
// what to do; empty where it is.
func outside(name string) (reason, hint string) {
	slashed := path.Clean(strings.ReplaceAll(name, `\`, "/"))
	short := "write: limits = [" + strconv.Quote(slashed) + "]"
	switch {
	case strings.TrimSpace(name) == "":
		return "no file is named", copyHint
	case strings.HasPrefix(name, "/"), strings.HasPrefix(name, `\`), len(name) > 1 && name[1] == ':':
		return "this is an absolute path; a limit file lies in the folder of the job", copyHint
	case slices.Contains(strings.Split(strings.ReplaceAll(name, `\`, "/"), "/"), ".."):
		return "a path with .. can lead out of the folder of the job", copyHint
	case strings.ContainsFunc(name, unprintable):
		return "a character that does not show stands in the name", copyHint
	case strings.Contains(name, `\`):
		return "folders are joined with /", short
	case !fs.ValidPath(name):
		return "the path is longer than it has to be, so one file could be named twice", short
	}
	return "", ""
}

// read reads a limit file that a job names. What keeps it from being read is a
// fault of the job; the page that is returned holds the faults inside it, and
// is nil where there is nothing to look at.
func (f *limitFile) read(job *page, folder fs.FS) (limits.Set, *page) {
	data, refusal, unreadable := fetch(folder, f.name)
	if refusal != "" {
		hint := copyHint
		if unreadable {
			hint = diskHint
		}
		job.fault(f.key, f.key, f.name, refusal, hint)
		job.faults[len(job.faults)-1].Unreadable = unreadable
		return limits.Set{}, nil
	}
	if is := digest(data); f.pin != "" && is != f.pin {
		job.fault(f.pins, f.pins, f.pin, "the digest of "+f.name+" is another one, "+is,
			"look: what was changed in the file, and whether it is right\nwrite: sha256 = \""+is+`" only after that`)
	}
	pg := &page{name: f.name, data: data, groups: limitGroups()}
	return pg.limitSet(), pg
}

// fetch reads a file of the folder. refusal says why it is not read, and
// unreadable whether that is the fault of the machine and not of the job.
func fetch(folder fs.FS, name string) (data []byte, refusal string, unreadable bool) {
	if folder == nil {
		return nil, "no folder is given in which limit files could lie", false
	}
	info, err := fs.Stat(folder, name)
	if err != nil {
		refusal, unreadable = cause(err)
		return nil, refusal, unreadable
	}
	// Only after this the file is opened: opening a pipe would wait for ever.
	switch {
	case info.IsDir():
		return nil, "this is a folder, not a file", false
	case !info.Mode().IsRegular():
		return nil, "this is not a plain file", false
	}
	file, err := folder.Open(name)
	if err != nil {
		refusal, unreadable = cause(err)
		return nil, refusal, unreadable
	}
	defer file.Close()
	// One byte more than is read tells a file that is too large.
	data, err = io.ReadAll(io.LimitReader(file, largest+1))
	if err != nil {
		refusal, unreadable = cause(err)
		return nil, refusal, unreadable
	}
	return data, "", false
}

// cause turns an error of the file system into a reason.
func cause(err error) (refusal string, unreadable bool) {
	// What the system says, without the path: that is shown as typed.
	said := err.Error()
	var pe *fs.PathError
	if errors.As(err, &pe) {
		said = pe.Err.Error()
	}
	switch {
	case errors.Is(err, fs.ErrNotExist):
		return "no such file in the folder of the job", false
	case strings.Contains(said, "escapes"):
		// os.Root has no exported error for this.
		return "a link leads out of the folder of the job", false
	}
	return "the file cannot be read: " + said, true
}
