package archive

import (
	"fmt"
	"slices"
	"strings"
	"testing"

	"arrestcheck/arrest"
	"arrestcheck/arrest/jobfile"
	"arrestcheck/limits"
)

func TestReproduceTheSame(t *testing.T) {
	for _, name := range jobNames(t) {
		r := reproduced(t, packed(t, name))
		if !r.Same() || len(r.Causes()) > 0 {
			t.Errorf("%s: %+v", name, r.Differences)
		}
		// S-80 and S-81 stand on every reproduction.
		page := text(t, r.Report())
		for _, want := range []string{"Re-calculated to the same digits", "S-80", "S-81", r.Digest} {
			if !strings.Contains(page, want) {
				t.Errorf("%s: no %q in\n%s", name, want, page)
			}
		}
	}
}

// One thing is changed, as by hand; hidden means that digests are adjusted so
// that the change does not show in them.
func TestReproduceFinds(t *testing.T) {
	files := packed(t, "settled.toml")
	all := func(old, with string) func(string) string {
		return func(s string) string { return strings.ReplaceAll(s, old, with) }
	}
	is := digest(fileNamed(files, jobFile).Data)
	for name, c := range map[string]struct {
		path   string
		to     func(string) string
		hidden bool
		want   []string // on the page
		causes []Cause
	}{
		"one digit of the job": {jobFile, replace("84 kg", "85 kg"), false,
			[]string{"S-85", "data/job.toml", "worker.mass", "84 kg ± 1 kg", "85 kg ± 1 kg", "+1.2 %"}, []Cause{InputsTouched}},
		"one digit of a limit": {"data/site/mill-rules.toml", replace(`"6 kN"`, `"5 kN"`), false,
			[]string{"S-85", "data/site/mill-rules.toml", "mill-peak", "undecided"}, []Cause{InputsTouched}},
		"one digit of the report": {textFile, replace("91.0 kg", "81.0 kg"), false,
			[]string{"S-85", "data/report.txt: lines that differ: 1", "81.0 kg"}, []Cause{ReportTouched}},
		"one digit of the Markdown": {mdFile, replace("91.0 kg", "81.0 kg"), false,
			[]string{"S-85", "data/report.md: lines that differ: 1"}, []Cause{ReportTouched}},
		"one digit of a result": {jsonFile, replace(`"high":91`, `"high":81`), false,
			[]string{"S-85", "data/result.json", "81 kg"}, []Cause{ReportTouched}},
		"the report, hidden": {textFile, replace("91.0 kg", "81.0 kg"), true,
			[]string{"data/report.txt: lines that differ: 1", "and its digest with it"}, []Cause{ReportEdited}},
		"a caution taken out of the report, hidden": {textFile, replace("An arrested person is left hanging", "An arrested person waits"), true,
			[]string{"data/report.txt", "waits"}, []Cause{ReportEdited}},
		"the Markdown, hidden": {mdFile, replace("91.0 kg", "81.0 kg"), true,
			[]string{"data/report.md: lines that differ: 1"}, []Cause{ReportEdited}},
		"a result, hidden": {jsonFile, replace(`"high":91`, `"high":81`), true,
			[]string{"total_mass", "81 kg", "91 kg"}, []Cause{ReportEdited}},
		"an outcome, hidden": {jsonFile, replace(`"outcome":"within"`, `"outcome":"undecided"`), true,
			[]string{"outcome", "within"}, []Cause{ReportEdited}},
		"the working in the result file, hidden": {jsonFile, replace(`"formula":"W = m*g"`, `"formula":"W = m/g"`), true,
			[]string{"data/result.json: lines that differ: 1", "W = m/g"}, []Cause{ReportEdited}},
		"a result file that is none": {jsonFile, all("arrestcheck result 1", "arrestcheck result 9"), true,
			[]string{"cannot be read"}, []Cause{ReportEdited}},
		"the digest of the results": {recordFile, func(s string) string {
			i := strings.Index(s, `results_sha256": "`) + len(`results_sha256": "`)
			return s[:i] + strings.Repeat("0", 64) + s[i+64:]
		}, true, []string{"Differs: 1 values"}, []Cause{NoCause}},
		"the digest of the job in the record": {recordFile, all(is, strings.Repeat("0", 64)), true,
			[]string{"S-85", "data/job.toml"}, []Cause{InputsTouched}},
		"the size of the payload": {infoFile, replace("Payload-Oxum: ", "Payload-Oxum: 1"), false,
			[]string{"S-85", "bag-info.txt"}, []Cause{RecordTouched}},
		"a job that is refused": {jobFile, replace("84 kg", "84 stone"), false,
			[]string{"Not worked out again", "worker.mass", "stone"}, []Cause{InputsTouched}},
	} {
		changed := change(t, files, c.path, c.to)
		if c.hidden {
			changed = sealed(changed)
		}
		r := reproduced(t, changed)
		page := text(t, r.Report())
		if r.Same() || !slices.Equal(r.Causes(), c.causes) {
			t.Errorf("%s: same %t, causes %v, want %v", name, r.Same(), r.Causes(), c.causes)
		}
		for _, want := range c.want {
			if !strings.Contains(strings.Join(strings.Fields(page), " "), want) {
				t.Errorf("%s: no %q in\n%s", name, want, page)
			}
		}
	}
}

func fileNamed(files []File, path string) *File {
	return &files[slices.IndexFunc(files, func(f File) bool { return f.Path == path })]
}

// An archive of another version is read, and a difference that can come from
// the version is told as such.
func TestReproduceUnderOtherVersions(t *testing.T) {
	files := packed(t, "settled.toml")
	o := opened(t, files)
	o.Record.Tool = Versions{"0.0.9", "0"}
	r := Reproduce("bag", o, testTool, work(t), nil)
	if want := []Cause{ModelDiffers, ToolDiffers}; r.Same() || !r.SameFigures() || !slices.Equal(r.Causes(), want) {
		t.Errorf("same %t, figures %t, causes %v", r.Same(), r.SameFigures(), r.Causes())
	}
	page := text(t, r.Report())
	for _, want := range []string{"0.0.9 then, " + testTool + " now", "0 then, " + arrest.ModelVersion + " now", "The figures came to the same digits"} {
		if !strings.Contains(page, want) {
			t.Errorf("no %q in\n%s", want, page)
		}
	}
}

// set makes a limit set of one limit in each of some quantities.
func set(t *testing.T, rows ...[3]string) limits.Set {
	t.Helper()
	data := "format = \"arrestcheck limits 1\"\ntitle = \"Later rules\"\nchecked_on = \"5 May 2025\"\n"
	for _, r := range rows {
		data += fmt.Sprintf("[[limit]]\nid = %q\nquantity = %q\nat_most = %q\nauthority = \"later rule\"\nedition = \"first\"\nkind = \"person\"\n", r[0], r[1], r[2])
	}
	s, err := jobfile.ReadLimits("later.toml", []byte(data))
	if err != nil {
		t.Fatal(err)
	}
	return *s
}

func TestReproduceUnderLaterLimits(t *testing.T) {
	files := packed(t, "settled.toml")
	stricter := reproduced(t, files, set(t, [3]string{"mill-free-fall", "free_fall", "1.0 m"}, [3]string{"new-mass", "total_mass", "110 kg"}, [3]string{"speed", "fall_speed", "9 m/s"}))
	if stricter.Same() || !stricter.SameFigures() || stricter.Again.Was.Within != 4 {
		t.Errorf("%+v", stricter.Again)
	}
	var rows []string
	for _, row := range stricter.Again.Rows {
		rows = append(rows, cellOf(row.Was)+" | "+cellOf(row.Is))
	}
	// 1.1 m to 1.3 m of free fall against 1 m; 83 kg to 91 kg against 110 kg;
	// nobody entered a later limit on the peak or the stop.
	want := []string{"mill-peak within | -", "mill-free-fall within | mill-free-fall exceeded", "mill-stop within | -", "mill-mass within | new-mass within", "- | speed within"}
	if !slices.Equal(rows, want) {
		t.Errorf("%q, want %q", rows, want)
	}
	page := text(t, stricter.Report())
	for _, want := range []string{"S-82", "4 of 5 rows", "Later rules (later.toml)", "Limits that nobody entered"} {
		if !strings.Contains(page, want) {
			t.Errorf("no %q in\n%s", want, page)
		}
	}

	alike := reproduced(t, files, set(t, [3]string{"a", "peak_force", "6.1 kN"}, [3]string{"b", "free_fall", "1.5 m"}, [3]string{"c", "deceleration_distance", "1 m"}, [3]string{"d", "total_mass", "110 kg"}))
	if !alike.Same() || alike.Again.Differs() {
		t.Errorf("%+v", alike.Again)
	}
}

func cellOf(f *Finding) string {
	if f == nil {
		return "-"
	}
	return f.Limit + " " + string(f.Outcome)
}

// Limits added and entries set on the command line are part of the archive.
func TestReproduceWithOptions(t *testing.T) {
	in := read(t, "settled.toml")
	in.Extra = []NamedFile{{"../elsewhere/rules of ours.toml", []byte("format = \"arrestcheck limits 1\"\ntitle = \"Ours\"\n[[limit]]\nid = \"ours\"\nquantity = \"total_mass\"\nat_most = \"100 kg\"\nauthority = \"our rule\"\nedition = \"first\"\nkind = \"person\"\n")}}
	in.Overrides = []Override{{"worker.tools", "0 kg .. 30 kg"}}
	s, err := work(t)(in)
	if err != nil {
		t.Fatal(err)
	}
	files, err := Pack(&Contents{Sheet: s, Job: in.Job, Sets: in.Sets, Extra: in.Extra, Units: "us", Program: &ProgramFile{[]byte("program"), "linux", "amd64"}})
	if err != nil {
		t.Fatal(err)
	}
	r := reproduced(t, files)
	if !r.Same() || len(r.Is.Findings) != 5 || r.Record.Options.Overrides[0].Key != "worker.tools" || r.Record.Extra[0].File != "data/extra-limits/1.toml" {
		t.Errorf("%+v", r.Record)
	}
	if touched := opened(t, change(t, files, programFile, replace("program", "progrbm"))).Touched; len(touched) != 1 || touched[0].Path != programFile {
		t.Errorf("another program: %v", touched)
	}
}
