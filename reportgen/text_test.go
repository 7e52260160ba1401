package reportgen

import (
	"errors"
	"regexp"
	"strings"
	"testing"
	"unicode"

	"github.com/olekukonko/tablewriter/pkg/twwidth"

	"arrestcheck/limits"
)

// hostile texts stand in every place a user can type in.
var hostile = map[string]string{
	"no blanks":     strings.Repeat("x", 10000),
	"blanks":        strings.Repeat("a ", 5000),
	"wide":          strings.Repeat("安", 3000),
	"emoji":         strings.Repeat("👩🏽‍🚒🇨🇦❤️", 300),
	"marks":         strings.Repeat("a\u0301\u0302\u0303", 1000),
	"right-to-left": "\u202egnp.exe\u202c " + strings.Repeat("אבג ", 100) + "\u2067\u200f",
	"escapes":       "\x1b[31mred\x1b[0m \x1b]8;;http://x\x1b\\link \u009b31m \a\b\v\f\x7f\x00",
	"markup":        "<b>|`*_[x](y)&amp;</b> %s %d {key} {{.}} \\ \t",
	"addresses":     "@here http://x.y www.x.y a@b.c mailto:a@b.c =1+1 1. - # > +",
	"lines":         "one\ntwo\r\nthree\u2028four\u0085five",
	"looks like":    "\nWARNING: read first\n1  exceeded",
}

// defile puts s into every place a user can type in.
func defile(t *testing.T, s string) *Sheet {
	t.Helper()
	sh := fixture(t)
	d := &sh.File.Document
	d.Title, d.Site, d.Reference, d.Revision, d.Date, d.Purpose = s, s, s, s, s, s
	d.System, d.Rescue, d.PreparedBy, d.CheckedBy = s, s, s, s
	sh.File.Name, sh.File.SHA256, sh.Tool = s, s, s
	set := &sh.File.Sets[0]
	set.Name, set.Title, set.Jurisdiction, set.EnteredBy, set.EnteredOn, set.CheckedOn, set.Note = s, s, s, s, s, s, s
	set.Limits[0].Note = s
	l := sh.Assessment.Findings[0].Limit
	l.ID, l.Authority, l.Edition, l.AppliesWhen, l.AnyOf, l.SupersededOn, l.CheckedOn, l.Note = s, s, s, s, s, s, s, s
	l.Bound.Text = s
	also := l.Bound
	l.AlsoPrinted, l.TotalMassAtMost = &also, &also
	sh.Assessment.Findings[0].Set = set
	sh.Assessment.Elsewhere[0].Where = s
	for i := range sh.Result.Inputs {
		in := &sh.Result.Inputs[i]
		in.Key, in.Note, in.Band.Text = s, s, s
	}
	for i := range sh.Result.Estimates {
		sh.Result.Estimates[i].From = s
	}
	return sh
}

// defilePath puts s into every place of a job with a connector path, and of an
// override, that the fixture has not.
func defilePath(t *testing.T, s string) *Sheet {
	t.Helper()
	sh := workedWith(t, "job.toml", []byte(pieces{rest: tailRope + tearAbsorber("0.40 m") + peakLimit}.toml()), "worker.mass", "101 kg")
	plan := sh.File.Job.Point.Path
	for i := range plan.Parts {
		plan.Parts[i].Name = s
	}
	o := &sh.File.Overrides[0]
	o.Value, o.Former = s, s
	for i := range sh.Result.Inputs {
		sh.Result.Inputs[i].Band.Text = s
	}
	return sh
}

func TestHostileText(t *testing.T) {
	for name, s := range hostile {
		for _, ascii := range []bool{false, true} {
			for _, sh := range []*Sheet{defile(t, s), defilePath(t, s)} {
				checkLines(t, name, asText(t, sh, BothUnits, TextOptions{ASCII: ascii}), ascii)
			}
		}
	}
}

// No user text can pretend to be a line of the program: line breaks in it do
// not reach the left edge as lines of their own.
func TestUserTextBreaksNoLine(t *testing.T) {
	for _, sh := range []*Sheet{defile(t, hostile["looks like"]), defilePath(t, hostile["looks like"])} {
		out := asText(t, sh, BothUnits, TextOptions{})
		if n := strings.Count(out, "\n"+warningHeading+"\n"); n != 1 {
			t.Errorf("%d headings of the warnings", n)
		}
	}
}

func TestJobsFitThePage(t *testing.T) {
	for _, name := range jobNames(t) {
		for _, units := range []UnitChoice{BothUnits, SIUnits, USUnits} {
			for _, ascii := range []bool{false, true} {
				checkLines(t, name, asText(t, sheet(t, name), units, TextOptions{ASCII: ascii}), ascii)
			}
		}
	}
}

// checkLines looks at width, characters and trailing blanks of every line.
func checkLines(t *testing.T, name, out string, ascii bool) {
	t.Helper()
	for line := range strings.Lines(out) {
		line = strings.TrimSuffix(line, "\n")
		if w := twwidth.WidthWithOptions(line, twwidth.Options{}); w > pageWidth {
			t.Errorf("%s: %d columns: %q", name, w, line)
		}
		if strings.HasSuffix(line, " ") {
			t.Errorf("%s: trailing blank: %q", name, line)
		}
		for _, r := range line {
			if !unicode.IsPrint(r) || ascii && r > '~' {
				t.Fatalf("%s, ascii %t: %U in %q", name, ascii, r, line)
			}
		}
	}
}

var colourCode = regexp.MustCompile("\x1b\\[([0-9;]*)m")

// Colour is red or bold, never green, and taken away it leaves the text as it
// is without.
func TestColour(t *testing.T) {
	s := fixture(t)
	s.Assessment.Findings[0].Outcome = limits.Exceeded
	s.Assessment.Groups[0].Outcome = limits.Exceeded
	for _, ascii := range []bool{false, true} {
		plain := asText(t, s, BothUnits, TextOptions{ASCII: ascii})
		coloured := asText(t, s, BothUnits, TextOptions{ASCII: ascii, Color: true})
		seen := make(map[string]bool)
		for _, m := range colourCode.FindAllStringSubmatch(coloured, -1) {
			for code := range strings.SplitSeq(m[1], ";") {
				seen[code] = true
				switch code {
				case "0", "1", "22", "31":
				default:
					t.Errorf("colour code %s", code)
				}
			}
		}
		if !seen["31"] {
			t.Error("no red on a sheet with an exceeded row")
		}
		if got := trimLines(colourCode.ReplaceAllString(coloured, "")); got != plain {
			t.Errorf("without its colours the text differs:\n%s", got)
		}
	}
}

// trimLines takes trailing blanks off: inside colours they cannot be cut.
func trimLines(s string) string {
	lines := strings.Split(s, "\n")
	for i := range lines {
		lines[i] = strings.TrimRight(lines[i], " ")
	}
	return strings.Join(lines, "\n")
}

// The environment has no say: neither in width nor in colour.
func TestTextIgnoresTheEnvironment(t *testing.T) {
	before := asText(t, fixture(t), BothUnits, TextOptions{Color: true})
	for _, v := range []string{"NO_COLOR", "TERM", "COLUMNS", "LC_ALL", "RUNEWIDTH_EASTASIAN", "COLORTERM"} {
		t.Setenv(v, "1")
	}
	if after := asText(t, fixture(t), BothUnits, TextOptions{Color: true}); after != before {
		t.Error("the text follows the environment")
	}
}

type fullDisk struct{}

func (fullDisk) Write([]byte) (int, error) { return 0, errFull }

var errFull = errors.New("disk full")

func TestWriteErrors(t *testing.T) {
	if err := Text(fullDisk{}, Build(fixture(t), SIUnits), TextOptions{}); !errors.Is(err, errFull) {
		t.Errorf("Text: %v", err)
	}
	if err := JSON(fullDisk{}, fixture(t)); !errors.Is(err, errFull) {
		t.Errorf("JSON: %v", err)
	}
}
