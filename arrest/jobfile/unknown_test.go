package jobfile

import "testing"

// The distances were counted by hand; the first pair is the usual example of
// the edit distance, 3.
func TestSlips(t *testing.T) {
	for _, c := range []struct {
		a, b string
		want int
	}{
		{"kitten", "sitting", 3},
		{"mass", "mass", 0},
		{"mas", "mass", 1},
		{"masss", "mass", 1},
		{"mess", "mass", 1},
		{"masks", "mass", 1},
		{"amss", "mass", 1}, // neighbours swapped
		{"", "mass", 4},
		{"tool", "mass", 4},
		{"free_fal", "free_fall", 1},
	} {
		if got := slips(c.a, c.b, 9); got != c.want {
			t.Errorf("slips(%q, %q) = %d, want %d", c.a, c.b, got, c.want)
		}
		if got := slips(c.b, c.a, 9); got != c.want {
			t.Errorf("slips(%q, %q) = %d, want %d", c.b, c.a, got, c.want)
		}
	}
}

func TestNearest(t *testing.T) {
	names := []string{"mass", "tools", "persons", "id", "where"}
	for s, want := range map[string]string{
		"MASS": "mass", "mas": "mass", "tolls": "tools", "person": "persons", "ie": "id",
		"colour": "", "note": "", "x": "", "were": "where", "wear": "",
	} {
		if got, _ := nearest(s, names); got != want {
			t.Errorf("nearest(%q) = %q, want %q", s, got, want)
		}
	}
}
