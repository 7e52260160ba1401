package figure

import (
	"math"
	"slices"
	"strings"
	"testing"

	"pgregory.net/rapid"
)

// By hand: two that want the same place stand around it; a third beside them
// is pushed; the ends of the room hold.
func TestSpread(t *testing.T) {
	for _, c := range []struct {
		wanted, size []float64
		low, high    float64
		want         []float64
	}{
		{[]float64{10, 20}, []float64{4, 4}, 0, 100, []float64{10, 20}},
		{[]float64{10, 10}, []float64{4, 4}, 0, 100, []float64{8, 12}},
		{[]float64{10, 10, 15}, []float64{4, 4, 4}, 0, 100, []float64{7.667, 11.667, 15.667}},
		{[]float64{1, 1}, []float64{4, 4}, 0, 100, []float64{2, 6}},
		{[]float64{99, 98}, []float64{4, 4}, 0, 100, []float64{98, 94}},
		{[]float64{5, 5, 5}, []float64{4, 4, 4}, 0, 6, []float64{2, 6, 10}},
		{nil, nil, 0, 10, []float64{}},
	} {
		if got := spread(c.wanted, c.size, c.low, c.high); !slices.Equal(got, c.want) {
			t.Errorf("spread(%v, %v) = %v, not %v", c.wanted, c.size, got, c.want)
		}
	}
}

// None overlap, all are in the room if it is large enough, and no arrangement
// in the same order, of 200 tried at random, moves them less: the sum of squares
// is what the method makes least.
func TestSpreadMovesLeast(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		n := rapid.IntRange(1, 6).Draw(t, "n")
		wanted := make([]float64, n)
		size := make([]float64, n)
		for i := range wanted {
			wanted[i] = rapid.Float64Range(20, 80).Draw(t, "wanted")
			size[i] = rapid.Float64Range(1, 12).Draw(t, "size")
		}
		slices.Sort(wanted)
		got := spread(wanted, size, 0, 100)
		cost := func(at []float64) (sum float64) {
			for i := range at {
				sum += (at[i] - wanted[i]) * (at[i] - wanted[i])
			}
			return sum
		}
		for i := range got {
			if got[i]-size[i]/2 < -0.001 || got[i]+size[i]/2 > 100.001 {
				t.Errorf("%v leaves the room", got)
			}
			if i > 0 && got[i]-got[i-1] < (size[i]+size[i-1])/2-0.002 {
				t.Errorf("%v overlap", got)
			}
		}
		for range 200 {
			other := slices.Clone(got)
			for i := range other {
				other[i] += rapid.Float64Range(-2, 2).Draw(t, "move")
				if i > 0 {
					other[i] = max(other[i], other[i-1]+(size[i]+size[i-1])/2)
				}
			}
			if inRoom(other, size) && cost(other) < cost(got)-0.05 {
				t.Errorf("%v costs %v, %v costs %v", got, cost(got), other, cost(other))
			}
		}
	})
}

func inRoom(at, size []float64) bool {
	last := len(at) - 1
	return at[0] >= size[0]/2 && at[last] <= 100-size[last]/2
}

// Ten dimensions of which half have no length worth drawing all have their
// texts, on either side and in either direction.
func TestChainTexts(t *testing.T) {
	for _, level := range []bool{false, true} {
		for _, far := range []bool{false, true} {
			s := NewScene("chain", 100)
			c := Chain{Level: level, Far: far, At: 50, Datum: 8, Name: "datum"}
			want := []string{"datum", "chain"}
			end := c.Datum
			for i := range 10 {
				end += 0.3 + float64(i%2)*15
				text := string(rune('A' + i))
				c.Parts = append(c.Parts, Dimension{End: end, Text: text, Witness: 20})
				want = append(want, text)
			}
			s.Chain(c)
			checkBoxes(t, s)
			var got []string
			for _, b := range s.Boxes() {
				got = append(got, b.Text)
			}
			slices.Sort(got)
			slices.Sort(want)
			if !slices.Equal(got, want) {
				t.Errorf("level %v, far %v: the texts are %s", level, far, strings.Join(got, ", "))
			}
		}
	}
}

func TestChainWithoutEnd(t *testing.T) {
	defer func() {
		if recover() == nil {
			t.Error("a dimension without an end is drawn")
		}
	}()
	NewScene("", 50).Chain(Chain{Parts: []Dimension{{End: math.NaN()}}})
}

// The name of the datum stands above an upright chain that goes down from it, and
// beside one that has parts on both sides.
func TestChainDatum(t *testing.T) {
	for _, c := range []struct {
		name  string
		ends  []float64
		above bool
	}{{"down", []float64{50, 80}, true}, {"both ways", []float64{50, 20}, false}} {
		s := NewScene("", 100)
		chain := Chain{At: 60, Datum: 30, Name: "datum: here", Low: 30, High: 100}
		for _, end := range c.ends {
			chain.Parts = append(chain.Parts, Dimension{End: end, Text: "1 m"})
		}
		s.Chain(chain)
		for _, p := range s.place(paper{}).placed {
			if p.text != chain.Name {
				continue
			}
			if above := p.box.Bottom < 30 && p.box.Right > 60; above != c.above {
				t.Errorf("%s: the name of the datum is at %v", c.name, p.box)
			}
		}
	}
}
