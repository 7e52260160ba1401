package jobfile

import (
	"strings"
	"testing"
)

// The lines on the right were counted by hand.
func TestScanFindsLines(t *testing.T) {
	text := strings.Join([]string{
		/* 1 */ `format = "arrestcheck job 1" # [not] a = "section"`,
		/* 2 */ `worker.tools = '0 kg' `,
		/* 3 */ `limits = [ # two`,
		/* 4 */ `  "a.toml",`,
		/* 5 */ `  { file = "b.toml", sha256 = "]" },`,
		/* 6 */ `]`,
		/* 7 */ `[document]`,
		/* 8 */ `title = """`,
		/* 9 */ `[worker]`,
		/* 10 */ `mass = \""" "quoted""""`,
		/* 11 */ `site = '''`,
		/* 12 */ `x = 1'''`,
		/* 13 */ `"odd.key" = 1.50`,
		/* 14 */ `"es\u0063" = true`,
		/* 15 */ `[[ rated ]]`,
		/* 16 */ `document = "first"`,
		/* 17 */ ``,
		/* 18 */ `[[rated]]`,
		/* 19 */ `document = "second"`,
		/* 20 */ `[rated.inner]`,
		/* 21 */ `mass = { value = "92 kg", source = "measured" }`,
		/* 22 */ `date = 2025-06-04T10:00:00Z`,
		/* 23 */ `list = [[1, 2], [3]]`,
	}, "\r\n")
	m := scan([]byte(text))
	for key, want := range map[string]mark{
		"format":                     {1, "arrestcheck job 1"},
		"worker":                     {2, ""},
		"worker.tools":               {2, "0 kg"},
		"limits":                     {3, ""},
		"limits[1]":                  {4, "a.toml"},
		"limits[2]":                  {5, ""},
		"limits[2].file":             {5, "b.toml"},
		"limits[2].sha256":           {5, "]"},
		"document":                   {7, ""},
		"document.site":              {11, "\r\nx = 1"},
		`document."odd.key"`:         {13, "1.50"},
		"document.esc":               {14, "true"},
		"rated":                      {15, ""},
		"rated[1]":                   {15, ""},
		"rated[1].document":          {16, "first"},
		"rated[2]":                   {18, ""},
		"rated[2].document":          {19, "second"},
		"rated[2].inner":             {20, ""},
		"rated[2].inner.mass":        {21, ""},
		"rated[2].inner.mass.value":  {21, "92 kg"},
		"rated[2].inner.mass.source": {21, "measured"},
		"rated[2].inner.date":        {22, "2025-06-04T10:00:00Z"},
		"rated[2].inner.list[2]":     {23, ""},
	} {
		if got := m[key]; got != want {
			t.Errorf("%s: %+v, want %+v", key, got, want)
		}
	}
	if got := m["document.title"].line; got != 8 {
		t.Errorf("document.title on line %d, want 8", got)
	}
	if _, there := m["worker.mass"]; there {
		t.Error("worker.mass was found inside a text")
	}
}

func TestLineOfWhatIsNotWritten(t *testing.T) {
	m := scan([]byte("a = 1\n[worker]\n[[rated]]\n\"b.c\" = 2\n"))
	for key, want := range map[string]int{
		"worker.mass":          2, // that of the section
		"worker.mass.value":    2,
		"rated[1].document":    3,
		"rated[4].document":    3,
		`rated[1]."b.c".value`: 4,
		`rated[1]."no such"`:   3,
		"fall":                 0,
		"fall.free_fall":       0,
		`"no such"`:            0,
	} {
		if got := m.line(key); got != want {
			t.Errorf("%s: line %d, want %d", key, got, want)
		}
	}
}

func TestScanEndsOnAnything(t *testing.T) {
	for _, text := range []string{
		"[", "[[", "[[a", "a", "a=", "a={", "a={b", "a=[", `a="`, `a="""`, `a="\`, "=", "]", "}", ",", "a=]", "a={]}", `"`, `"\`,
		"a=" + strings.Repeat("[", 100000), "a=" + strings.Repeat("{a=", 100000), "[" + strings.Repeat("[", 1000),
	} {
		scan([]byte(text)) // must return
	}
}
