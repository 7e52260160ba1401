package reportgen

import (
	"bytes"
	"errors"
	"regexp"
	"strings"
	"testing"
	"unicode"
)

func asMarkdown(t testing.TB, s *Sheet, o MarkdownOptions) string {
	t.Helper()
	var b bytes.Buffer
	if err := Markdown(&b, Build(s, BothUnits), o); err != nil {
		t.Fatal(err)
	}
	return b.String()
}

// Texts that are markup in some viewer, and the same with nothing of it left.
func TestEscapeMarkdown(t *testing.T) {
	for in, want := range map[string]string{
		"plain text, 1.60 to 1.75 m (5.25 ft)": "plain text, 1.60 to 1.75 m (5.25 ft)",
		"a|b":                                  `a\|b`,
		"*x* _y_ `z` ~s~ $m$":                  "\\*x\\* \\_y\\_ \\`z\\` \\~s\\~ \\$m\\$",
		`back\slash \|`:                        `back\\slash \\\|`,
		"<b>&amp;</b>":                         "&lt;b&gt;&amp;amp;&lt;/b&gt;",
		"[x](y) ![i](j)":                       `\[x\](y) !\[i\](j)`,
		"# head":                               `\# head`,
		"- item":                               `\- item`,
		"+ item":                               `\+ item`,
		"=1+1":                                 `\=1+1`,
		"-2":                                   `\-2`,
		"@user a@b.c":                          `\@user a<!-- -->@b.c`,
		"1. item":                              `1\. item`,
		"12) item":                             `12\) item`,
		"12.":                                  `12\.`,
		"12 m":                                 "12 m",
		"1.5 m":                                "1.5 m",
		"> quote":                              "&gt; quote",
		"http://x.y www.x.y":                   `http\://x.y www\.x.y`,
		"mailto:x Www.x":                       `mailto\:x Www\.x`,
		"limit: 8 kN":                          "limit: 8 kN",
		"a - b # c = d + e! f":                 "a - b # c = d + e! f",
		"":                                     "",
	} {
		if got := escapeMarkdown(in); got != want {
			t.Errorf("%q: %q, want %q", in, got, want)
		}
	}
}

// What a Markdown viewer shows of an escaped text is the text: taking the
// escapes away as the CommonMark specification says (a backslash before
// punctuation, and the three entities) gives it back.
func unescapeMarkdown(s string) string {
	s = regexp.MustCompile(`\\([!-/:-@\[-`+"`"+`{-~])`).ReplaceAllString(s, "$1")
	return strings.NewReplacer(noAddress, "", "&lt;", "<", "&gt;", ">", "&amp;", "&").Replace(s)
}

// Every text of a report is in its Markdown, every warning among them.
func TestMarkdownHoldsEverything(t *testing.T) {
	for _, name := range jobNames(t) {
		s := sheet(t, name)
		out := unescapeMarkdown(strings.ReplaceAll(asMarkdown(t, s, MarkdownOptions{}), "**", ""))
		eachText(Build(s, BothUnits), func(text string) {
			for part := range strings.SplitSeq(text, "\n") {
				if want := strings.Join(strings.Fields(breakable(part)), " "); !strings.Contains(out, want) {
					t.Errorf("%s: no %q", name, want)
				}
			}
		})
	}
}

var (
	unescapedPipe = regexp.MustCompile(`(^|[^\\])\|`)
	htmlTag       = regexp.MustCompile(`<[^>]*>`)
)

// Whatever a user types, tables keep their columns, no line begins with markup
// that is not ours, and no tag but our own line break is left.
func TestMarkdownHostileText(t *testing.T) {
	for name, s := range hostile {
		for _, ascii := range []bool{false, true} {
			out := asMarkdown(t, defile(t, s), MarkdownOptions{ASCII: ascii}) + "\n" + asMarkdown(t, defilePath(t, s), MarkdownOptions{ASCII: ascii})
			columns := 0
			for line := range strings.Lines(out) {
				line = strings.TrimSuffix(line, "\n")
				for _, r := range line {
					if !unicode.IsPrint(r) || ascii && r > '~' {
						t.Fatalf("%s: %U", name, r)
					}
				}
				for _, tag := range htmlTag.FindAllString(line, -1) {
					if tag != "<br>" && tag != noAddress {
						t.Errorf("%s: tag %q", name, tag)
					}
				}
				if !strings.HasPrefix(line, "|") {
					columns = 0
				} else if n := len(unescapedPipe.FindAllString(line, -1)); columns != 0 && n != columns {
					t.Errorf("%s: %d columns, not %d: %.100q", name, n, columns, line)
				} else {
					columns = n
				}
				if line != "" && !strings.HasPrefix(line, "|") && !regexp.MustCompile(`^(- |\* |## |---$|\*\*|[A-Z\\])`).MatchString(line) {
					t.Errorf("%s: line begins %.40q", name, line)
				}
			}
			if regexp.MustCompile(`[^\\]\]\(`).MatchString(out) || strings.Contains(out, "://") && !strings.Contains(out, `\://`) {
				t.Errorf("%s: a link is left", name)
			}
		}
	}
}

// No user text can pretend to be a heading or a warning of the program.
func TestMarkdownUserTextBreaksNoLine(t *testing.T) {
	out := asMarkdown(t, defile(t, hostile["looks like"]), MarkdownOptions{})
	if n := strings.Count(out, "\n## "+warningHeading+"\n"); n != 1 {
		t.Errorf("%d headings of the warnings", n)
	}
}

// Loud blocks, the loud statements and loud rows are bold; lines of a cell stay
// lines; a line without a label goes on with the item above.
func TestMarkdownForm(t *testing.T) {
	var b bytes.Buffer
	r := Report{
		Head:     []Block{{Text: "First.", Loud: true}},
		Warnings: []Line{{Label: "!! S-35", Text: "EXHAUSTED", Loud: true, Loudest: true}, {Label: "   S-01", Text: "who"}},
		Sections: []Section{
			{Heading: "Table", Blocks: []Block{{Table: &Table{Header: []string{"a", ""}, Rows: []Row{{Cells: []string{"1\n2", "x|y"}}, {Cells: []string{"3", ""}, Loud: true}}}}}},
			{Heading: "Part"},
			{Heading: "List", Blocks: []Block{{Text: "p"}, {Lines: []Line{{Label: "-", Text: "one"}, {Label: "M-02", Text: "F"}, {Text: "= 2"}}}}},
		},
	}
	if err := Markdown(&b, r, MarkdownOptions{}); err != nil {
		t.Fatal(err)
	}
	want := `**First.**

## WARNING: read first

* **!! S-35: EXHAUSTED**
* **S-01:** who

## Table

| a |  |
| --- | --- |
| 1<br>2 | x\|y |
| **3** |  |

---

## Part

## List

p

- one
- **M-02:** F<br>\= 2
`
	if b.String() != want {
		t.Errorf("got\n%s", b.String())
	}
}

func TestMarkdownWriteError(t *testing.T) {
	if err := Markdown(fullDisk{}, Build(fixture(t), SIUnits), MarkdownOptions{}); !errors.Is(err, errFull) {
		t.Error(err)
	}
}
