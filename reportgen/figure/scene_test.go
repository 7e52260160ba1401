package figure

import (
	"bytes"
	"strings"
	"testing"

	"pgregory.net/rapid"
)

// checkBoxes fails if two texts of the SVG overlap or one leaves the figure.
func checkBoxes(t rapid.TB, s *Scene) {
	t.Helper()
	width, height := s.Size()
	page := Box{0, 0, width, height}
	boxes := s.Boxes()
	for i, b := range boxes {
		if !page.Contains(b.Box) {
			t.Errorf("%q leaves the figure: %v", b.Text, b.Box)
		}
		for _, c := range boxes[:i] {
			if b.Box.Overlaps(c.Box) {
				t.Errorf("%q and %q overlap: %v %v", b.Text, c.Text, b.Box, c.Box)
			}
		}
	}
}

// squeezed returns text without blanks.
func squeezed(text string) string { return strings.Join(strings.Fields(text), "") }

// checkTold fails if a label is nowhere in the texts of a figure.
func checkTold(t rapid.TB, texts string, labels []string, clean func(string) string) {
	t.Helper()
	for _, label := range labels {
		if !strings.Contains(texts, squeezed(clean(label))) {
			t.Errorf("the label %q is neither in the figure nor below it:\n%s", label, texts)
		}
	}
}

func TestSamplesOnPaper(t *testing.T) {
	for _, s := range samples(t) {
		checkBoxes(t, s.scene)
		if width, height := s.scene.Size(); width != PageWidth || height > MaxHeight {
			t.Errorf("%s is %v mm by %v mm, which does not print on a sheet", s.name, width, height)
		}
	}
}

// Whatever is drawn: no two texts overlap, none leaves the figure and none
// vanishes.
func TestTextsOnPaper(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		s, labels := anyScene(t)
		checkBoxes(t, s)
		var texts strings.Builder
		for _, b := range s.Boxes() {
			texts.WriteString(squeezed(b.Text))
		}
		checkTold(t, texts.String(), labels, clean)
	})
}

// The same in characters: no line is wider than asked for, no two texts share
// a cell and none vanishes.
func TestTextsInCharacters(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		s, labels := anyScene(t)
		c := Cells{Columns: rapid.IntRange(0, 140).Draw(t, "columns"), Rows: rapid.IntRange(0, 50).Draw(t, "rows"), ASCII: rapid.Bool().Draw(t, "ascii")}
		g := c.grid(s)
		out := string(s.Characters(c))
		for line := range strings.Lines(out) {
			if columns(strings.TrimSuffix(line, "\n")) > max(c.Columns, leastColumns) {
				t.Errorf("a line is wider than %d: %q", c.Columns, line)
			}
		}
		for _, r := range out {
			if r != '\n' && (r < ' ' || r == 0x7f || c.ASCII && r > '~') {
				t.Errorf("the figure has the character %U", r)
			}
		}
		placed := s.place(g).placed
		for i := range placed {
			for k := range i {
				if placed[i].box.Overlaps(placed[k].box) {
					t.Errorf("%q and %q share a cell", placed[i].text, placed[k].text)
				}
			}
		}
		checkTold(t, squeezed(out), labels, g.clean)
	})
}

func TestSameSceneSameBytes(t *testing.T) {
	first, second := samples(t), samples(t)
	for i := range first {
		if !bytes.Equal(first[i].scene.SVG("a"), second[i].scene.SVG("a")) {
			t.Errorf("%s: two SVGs differ", first[i].name)
		}
		c := Cells{Columns: 80}
		if !bytes.Equal(first[i].scene.Characters(c), second[i].scene.Characters(c)) {
			t.Errorf("%s: two texts differ", first[i].name)
		}
	}
}

// A million points come down to what paper can show.
func TestManyPoints(t *testing.T) {
	const n = 1_000_000
	x, y := make([]float64, n), make([]float64, n)
	for i := range x {
		x[i] = 0.1 + 1.9*float64(i)/(n-1)
		y[i] = weight * (1 + 1.8/x[i])
	}
	p := Plot{X: Axis{Name: "d", Unit: "m"}, Y: Axis{Name: "F", Unit: "N"}, Curves: []Curve{{X: x, Y: y, Label: "mean"}}}
	s, err := p.Scene()
	if err != nil {
		t.Fatal(err)
	}
	if size := len(s.SVG("a")); size > 10_000 {
		t.Errorf("the SVG has %d bytes", size)
	}
	checkBoxes(t, s)
}

func TestTextWithoutSpot(t *testing.T) {
	defer func() {
		if recover() == nil {
			t.Error("a text without a spot is taken")
		}
	}()
	NewScene("", 10).Text(Text{Text: "nowhere"})
}

// A text that has no room stands below the figure with its key, and with the
// reason where the key has none either.
func TestKeys(t *testing.T) {
	s := NewScene("", 20)
	long := strings.Repeat("far too long ", 20)
	spot := func(x float64) []Spot { return []Spot{{At: Point{x, 10}, Anchor: Middle}} }
	s.Text(Text{Text: long + "one", Rank: RankNote, Spots: spot(40)})
	s.Text(Text{Text: long + "two", Rank: RankNote, Spots: spot(80)})
	s.Text(Text{Text: "three", Rank: RankNote, Spots: spot(80)})
	s.Text(Text{Text: "0.5", Rank: RankScale, Spots: spot(163.5), scale: 1})
	s.Text(Text{Text: "0.0", Rank: RankScale, Spots: spot(120), scale: 1})
	s.scales = []string{"time, s: 0.0 .. 0.5"}
	got := s.place(paper{})
	want := []string{"(a) " + clean(long+"one"), "(b) " + clean(long+"two"), "three (no room in the drawing)", "time, s: 0.0 .. 0.5 (no room in the drawing)"}
	if strings.Join(got.listed, "|") != strings.Join(want, "|") {
		t.Errorf("listed: %q, not %q", got.listed, want)
	}
	if len(got.placed) != 3 || got.placed[0].text != "0.0" || got.placed[1].text != "(a)" || got.placed[2].text != "(b)" {
		t.Errorf("placed: %v", got.placed)
	}
}

func TestLetters(t *testing.T) {
	for i, want := range map[int]string{0: "a", 25: "z", 26: "aa", 27: "ab", 26 + 26*26: "aaa"} {
		if got := letters(i); got != want {
			t.Errorf("letters(%d) = %q, not %q", i, got, want)
		}
	}
}
