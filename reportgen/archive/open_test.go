package archive

import (
	"bytes"
	"errors"
	"fmt"
	"slices"
	"strings"
	"testing"
)

// The form of RFC 8493: the two lines of 2.1.1, manifests of 2.1.3 and 2.2.1
// with a digest and a path a line, the payload below data/ and every payload
// file in the manifest, Payload-Oxum as octets, point, streams (2.2.2).
func TestPackMakesABag(t *testing.T) {
	files := packed(t, "settled.toml")
	by := make(map[string]string)
	size, payloads := 0, 0
	for _, f := range files {
		by[f.Path] = string(f.Data)
		if strings.HasPrefix(f.Path, "data/") {
			size, payloads = size+len(f.Data), payloads+1
		}
	}
	if got := by["bagit.txt"]; got != "BagIt-Version: 1.0\nTag-File-Character-Encoding: UTF-8\n" {
		t.Errorf("bagit.txt: %q", got)
	}
	if want := fmt.Sprintf("\nPayload-Oxum: %d.%d\n", size, payloads); !strings.Contains(by["bag-info.txt"], want) {
		t.Errorf("bag-info.txt: %q", by["bag-info.txt"])
	}
	for _, path := range []string{"data/job.toml", "data/site/mill-rules.toml", "data/report.txt", "data/report.md", "data/result.json"} {
		if line := digest([]byte(by[path])) + "  " + path + "\n"; !strings.Contains(by["manifest-sha256.txt"], line) {
			t.Errorf("the manifest lacks %q", line)
		}
	}
	for _, path := range []string{"bagit.txt", "bag-info.txt", "manifest-sha256.txt", "arrestcheck-archive.json"} {
		if line := digest([]byte(by[path])) + "  " + path + "\n"; !strings.Contains(by["tagmanifest-sha256.txt"], line) {
			t.Errorf("the tag manifest lacks %q", line)
		}
	}
	if n := strings.Count(by["manifest-sha256.txt"], "\n"); n != payloads {
		t.Errorf("%d lines for %d payload files", n, payloads)
	}
	if last := files[len(files)-1].Path; last != "tagmanifest-sha256.txt" {
		t.Errorf("the last file is %s", last)
	}
}

func TestPackIsTheSameTwice(t *testing.T) {
	for _, name := range jobNames(t) {
		a, b := packed(t, name), packed(t, name)
		for i := range a {
			if a[i].Path != b[i].Path || !bytes.Equal(a[i].Data, b[i].Data) {
				t.Errorf("%s: %s differs", name, a[i].Path)
			}
		}
		if o := opened(t, a); len(o.Touched) > 0 || o.Digest != digest(a[len(a)-1].Data) {
			t.Errorf("%s: touched %v", name, o.Touched)
		}
	}
}

// Names of limit files that cannot stand in an archive, or stand for something
// else there.
func TestPackRefusesNames(t *testing.T) {
	s := sheet(t, "rated.toml")
	for name, why := range map[string]string{
		"100 %.toml":            "sha256sum does not find the file",
		"a:b.toml":              "some systems do not have",
		"a?.toml":               "some systems do not have",
		"../a.toml":             "no path below",
		"/a.toml":               "no path below",
		"a\u202e.toml":          "does not show",
		"a\n.toml":              "does not show",
		"a./b":                  "ends with a point",
		" a.toml":               "between blanks",
		"job.toml":              "a file of the archive",
		"Report.TXT":            "a file of the archive",
		"result.json":           "a file of the archive",
		"extra-limits/1.toml":   "a folder of the archive",
		"EXTRA-limits":          "a folder of the archive",
		"program/site.toml":     "a folder of the archive",
		"program":               "a folder of the archive",
		"report.md":             "a file of the archive",
		"extra-limits/x/y.toml": "a folder of the archive",
	} {
		_, err := Pack(&Contents{Sheet: s, Sets: []NamedFile{{name, nil}}, Units: "si"})
		if err == nil || !strings.Contains(err.Error(), why) {
			t.Errorf("%q: %v, want %q", name, err, why)
		}
	}
	_, err := Pack(&Contents{Sheet: s, Sets: []NamedFile{{"Site.toml", nil}, {"site.toml", nil}}, Units: "si"})
	if err == nil || !strings.Contains(err.Error(), "capital letters") {
		t.Errorf("two names that some systems do not tell apart: %v", err)
	}
}

// Every way in which a folder is not what Pack makes is refused, by a reason
// that names it.
func TestOpenRefuses(t *testing.T) {
	files := packed(t, "settled.toml")
	without := func(path string) func([]Found) []Found {
		return func(list []Found) []Found {
			return slices.DeleteFunc(list, func(f Found) bool { return f.Path == path })
		}
	}
	with := func(f Found) func([]Found) []Found {
		return func(list []Found) []Found { return append(list, f) }
	}
	edit := func(path string, to func(string) string) func([]Found) []Found {
		return func([]Found) []Found { return found(change(t, files, path, to)) }
	}
	plain := func(path string) Found { return Found{Path: path, Data: []byte{}, SHA256: digest(nil)} }
	manifestWith := func(line string) func([]Found) []Found {
		return edit(manifestFile, func(s string) string { return s + line + "\n" })
	}
	zero := strings.Repeat("0", 64)
	for name, c := range map[string]struct {
		to  func([]Found) []Found
		why string
	}{
		"an empty folder":         {func([]Found) []Found { return nil }, "bagit.txt is missing"},
		"no bagit.txt":            {without(declarationFile), "bagit.txt is missing"},
		"another version":         {edit(declarationFile, replace("1.0", "0.97")), "not that of a bag of version 1.0"},
		"no manifest":             {without(manifestFile), "manifest-sha256.txt is missing"},
		"no tag manifest":         {without(tagManifestFile), "tagmanifest-sha256.txt is missing"},
		"no record":               {without(recordFile), `"arrestcheck-archive.json" is missing`},
		"no bag-info":             {without(infoFile), `"bag-info.txt" is missing`},
		"no job":                  {without(jobFile), `"data/job.toml" is missing`},
		"no limit file":           {without("data/site/mill-rules.toml"), `"data/site/mill-rules.toml" is missing`},
		"no report":               {without(textFile), `"data/report.txt" is missing`},
		"another payload file":    {with(plain("data/more.toml")), `"data/more.toml" is named in no manifest`},
		"another tag file":        {with(plain("fetch.txt")), `"fetch.txt" is named in no manifest`},
		"a hidden file":           {with(plain("data/.x.part")), `"data/.x.part" is named in no manifest`},
		"a link":                  {with(Found{Path: "data/report.txt", Kind: "link"}), `"data/report.txt" is a link`},
		"a pipe":                  {with(Found{Path: "data/pipe", Kind: "device, pipe or socket"}), `"data/pipe" is a device, pipe or socket`},
		"a bag in the bag":        {with(plain("data/old/bagit.txt")), "an archive lies in the archive"},
		"a huge job":              {with(Found{Path: jobFile, Size: 1<<20 + 1}), "too large"},
		"a huge report":           {with(Found{Path: textFile, Size: 1 << 40}), "too large"},
		"very many files":         {func(l []Found) []Found { return slices.Repeat(l, 200) }, "more than 1000 files"},
		"an entry twice":          {manifestWith(zero + "  data/job.toml"), `"data/job.toml" is named twice`},
		"an entry twice in CAPS":  {manifestWith(zero + "  data/JOB.toml"), `"data/JOB.toml" is named twice`},
		"an entry without a file": {manifestWith(zero + "  data/gone.toml"), `"data/gone.toml" is missing`},
		"an entry that leads out": {manifestWith(zero + "  data/../../etc/passwd"), "no path below the folder"},
		"an absolute entry":       {manifestWith(zero + "  /etc/passwd"), "no path below the folder"},
		"an entry with ./":        {manifestWith(zero + "  ./data/job.toml"), "no path below the folder"},
		"an entry with \\":        {manifestWith(zero + `  data\job.toml`), "some systems do not have"},
		"an entry with %0A":       {manifestWith(zero + "  data/a%0Ab"), "a % in a name"},
		"a tag in the manifest":   {manifestWith(zero + "  bagit.txt"), "does not belong there"},
		"an entry of nothing":     {manifestWith(""), "no digest with two blanks"},
		"a short digest":          {manifestWith("00  data/x"), "no digest with two blanks"},
		"a digest in capitals":    {manifestWith(strings.Repeat("A", 64) + "  data/x"), "no digest with two blanks"},
		"one blank":               {manifestWith(zero + " data/x"), "no digest with two blanks"},
		"a binary mark":           {manifestWith(zero + " *data/x"), "no digest with two blanks"},
		"lines of Windows":        {edit(manifestFile, func(s string) string { return strings.ReplaceAll(s, "\n", "\r\n") }), "does not show"},
		"a manifest cut short":    {edit(manifestFile, func(s string) string { return s[:len(s)-1] }), "does not end with a line"},
		"an empty manifest":       {edit(manifestFile, func(string) string { return "" }), "does not end with a line"},
		"itself in the tags":      {edit(tagManifestFile, func(s string) string { return s + zero + "  tagmanifest-sha256.txt\n" }), "names itself"},
		"payload in the tags":     {edit(tagManifestFile, func(s string) string { return s + zero + "  data/job.toml\n" }), "does not belong there"},
		"no line for the record": {edit(tagManifestFile, func(s string) string {
			lines := strings.SplitAfter(s, "\n")
			return strings.Join(slices.DeleteFunc(lines, func(l string) bool { return strings.HasSuffix(l, recordFile+"\n") }), "")
		}), "arrestcheck-archive.json\" is named in no manifest"},
		"another form of record":  {edit(recordFile, replace(RecordFormat, "arrestcheck archive 2")), `"arrestcheck archive 2" is not known`},
		"a record that is none":   {edit(recordFile, replace("{", "[")), "arrestcheck-archive.json"},
		"a record of other units": {edit(recordFile, replace(`"both"`, `"stone"`)), `units "stone" are not known`},
		"a record of another job": {edit(recordFile, replace("data/job.toml", "data/site/mill-rules.toml")), "the job is not data/job.toml"},
		"a record that leads out": {edit(recordFile, replace("data/site/mill-rules.toml", "../mill-rules.toml")), "not there or is something else"},
		"a report as limit file":  {edit(recordFile, replace("data/site/mill-rules.toml", "data/report.txt")), "not there or is something else"},
	} {
		_, err := Open(c.to(found(files)))
		var refusal *Refusal
		if !errors.As(err, &refusal) || !strings.Contains(err.Error(), c.why) {
			t.Errorf("%s: %v, want %q", name, err, c.why)
		}
	}
}

// A payload file that manifests name and the record does not is no part of an
// archive of this program.
func TestOpenRefusesWhatTheRecordDoesNotName(t *testing.T) {
	files := append(packed(t, "rated.toml"), File{Path: "data/more.toml", Data: []byte("x")})
	if _, err := Open(found(sealed(files))); err == nil || !strings.Contains(err.Error(), `"data/more.toml" is no part`) {
		t.Error(err)
	}
}

// One bit of each byte of each file is turned over, each in turn: every one is
// refused or told as touched. Of files beyond 4 KB every 37th byte is.
func TestOneBit(t *testing.T) {
	files := packed(t, "settled.toml")
	refused, touched := 0, 0
	for i := range files {
		step := 1
		if len(files[i].Data) > 4<<10 {
			step = 37
		}
		for at := 0; at < len(files[i].Data); at += step {
			list := slices.Clone(files)
			list[i].Data = bytes.Clone(files[i].Data)
			list[i].Data[at] ^= 1 << (at % 8)
			o, err := Open(found(list))
			switch {
			case err != nil:
				refused++
			case slices.ContainsFunc(o.Touched, func(f Touched) bool { return f.Path == files[i].Path }):
				touched++
			case files[i].Path == tagManifestFile && len(o.Touched) == 1:
				touched++ // the file whose digest stands in the line
			default:
				t.Fatalf("%s, byte %d: not found", files[i].Path, at)
			}
		}
	}
	if refused < 100 || touched < 100 {
		t.Errorf("%d refused, %d touched", refused, touched)
	}
}

func FuzzOpen(f *testing.F) {
	files := packed(f, "settled.toml")
	by := make(map[string]string)
	for _, one := range files {
		by[one.Path] = string(one.Data)
	}
	f.Add(by[manifestFile], by[tagManifestFile], by[recordFile], by[infoFile])
	f.Fuzz(func(t *testing.T, data, tags, record, info string) {
		list := slices.Clone(files)
		for i := range list {
			switch list[i].Path {
			case manifestFile:
				list[i].Data = []byte(data)
			case tagManifestFile:
				list[i].Data = []byte(tags)
			case recordFile:
				list[i].Data = []byte(record)
			case infoFile:
				list[i].Data = []byte(info)
			}
		}
		o, err := Open(found(list))
		if err == nil && len(o.Touched) == 0 && (data != by[manifestFile] || tags != by[tagManifestFile]) {
			// The bytes of the tag files may be others only where the manifest over
			// them says so, which is then another archive.
			if o.Digest == digest([]byte(by[tagManifestFile])) {
				t.Error("other bytes under the same digest")
			}
		}
	})
}
