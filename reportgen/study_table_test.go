package reportgen

import (
	"slices"
	"strings"
	"testing"

	"arrestcheck/arrest/quantity"
)

// Groups stand side by side as long as the page has room, and each table has the
// fixed columns.
func TestPack(t *testing.T) {
	wide := func(n int) strip { return strip{header: "x", cells: []string{strings.Repeat("9", n)}} }
	fixed := []strip{wide(6)}
	groups := [][]strip{{wide(20), wide(20)}, {wide(20)}, {wide(30), wide(30)}, {wide(6)}}
	var got [][]int
	for _, table := range pack(fixed, groups) {
		got = append(got, table.Widths)
		total := -betweenTwo
		for _, w := range table.Widths {
			total += w + betweenTwo
		}
		if total > pageWidth {
			t.Errorf("%v takes %d columns", table.Widths, total)
		}
	}
	want := [][]int{{6, 20, 20, 20}, {6, 30, 30, 6}}
	if len(got) != 2 || !slices.Equal(got[0], want[0]) || !slices.Equal(got[1], want[1]) {
		t.Errorf("%v, want %v", got, want)
	}
}

func TestAligned(t *testing.T) {
	got := aligned([]string{"18.6", "9.80", "120", "-1", "none", ""})
	want := []string{"  18.6", "   9.80", " 120", "  -1", "none", ""}
	for i := range want {
		want[i] = strings.ReplaceAll(want[i], " ", noBreak)
	}
	want[0], want[1], want[2], want[3] = noBreak+"18.6", noBreak+noBreak+"9.80", "120", noBreak+"-1"
	if !slices.Equal(got, want) {
		t.Errorf("%q, want %q", got, want)
	}
}

// Figures of an axis are told apart, and given as they are where six digits can.
func TestAxisDigits(t *testing.T) {
	m, ft := quantity.Length.SI(), mustUnit("ft")
	for _, c := range []struct {
		values []float64
		unit   quantity.Unit
		exact  bool
		want   int
	}{
		{[]float64{0.1, 0.2, 1}, m, true, 3},
		{[]float64{0.1, 0.1234, 1}, m, true, 4},
		{[]float64{1, 1.00001}, m, false, 6},
		{[]float64{0.1, 0.2}, ft, false, 3},
		{[]float64{1.0 / 3, 2.0 / 3}, m, true, 6},
	} {
		if got := axisDigits(c.values, c.unit, c.exact); got != c.want {
			t.Errorf("%v in %s: %d digits, want %d", c.values, c.unit.Symbol, got, c.want)
		}
	}
}
