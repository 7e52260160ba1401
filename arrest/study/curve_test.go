package study

import (
	"context"
	"math"
	"math/rand/v2"
	"slices"
	"testing"
)

// draw samples a function.
func draw(f func(float64) float64, xs []float64, levels ...level) *curve {
	c := &curve{xs: xs, ys: make([]float64, len(xs)), at: f, levels: levels}
	for i, x := range xs {
		c.ys[i] = f(x)
	}
	return c
}

func (c *curve) all(t *testing.T) ([]turn, []crossing) {
	t.Helper()
	s, err := c.surveyAll(context.Background(), 1)
	if err != nil {
		t.Fatal(err)
	}
	return c.follow(s)
}

// sin x turns at pi/2, 3 pi/2, ... and passes 1/2 at pi/6, 5 pi/6, ...
func TestSineTurnsAndCrosses(t *testing.T) {
	for _, n := range []int{12, 40, 1000, 3*blockSize + 1} {
		turns, crossings := draw(math.Sin, linear(t, 0.1, 10, n), level{figure: 0.5}).all(t)
		if len(turns) != 3 || len(crossings) != 4 {
			t.Fatalf("%d points: %d turns, %d crossings", n, len(turns), len(crossings))
		}
		for i, tn := range turns {
			near(t, "turn", tn.x, math.Pi/2+math.Pi*float64(i), 1e-7)
			if tn.greatest != (i%2 == 0) {
				t.Errorf("%+v", tn)
			}
		}
		for i, want := range []float64{math.Pi / 6, 5 * math.Pi / 6, 13 * math.Pi / 6, 17 * math.Pi / 6} {
			near(t, "crossing", crossings[i].x, want, 1e-15)
			if crossings[i].up != (i%2 == 1) {
				t.Errorf("%+v", crossings[i])
			}
		}
	}
}

// Two crossings within one interval, beside a turn: what a look at the ends
// alone misses. Also where the turn is in the first or the last interval.
func TestCrossingsBesideATurn(t *testing.T) {
	for _, at := range []float64{0.55, 0.05, 0.93, 0.5} {
		valley := func(x float64) float64 { return (x - at) * (x - at) }
		turns, crossings := draw(valley, linear(t, 0, 1, 11), level{figure: 1e-4}).all(t)
		if len(turns) != 1 || len(crossings) != 2 {
			t.Fatalf("turn at %v: %d turns, %d crossings", at, len(turns), len(crossings))
		}
		near(t, "left", crossings[0].x, at-0.01, 1e-13)
		near(t, "right", crossings[1].x, at+0.01, 1e-13)
	}
}

// A curve that ends between two points: its last part is followed to where it
// is no longer known.
func TestCurveWithGaps(t *testing.T) {
	f := func(x float64) float64 {
		if x < 0.31 || x > 0.87 {
			return math.NaN()
		}
		return 1/(0.8701-x) + 0.002/(x-0.3099)
	}
	c := draw(f, linear(t, 0, 1, 11), level{figure: 30})
	turns, crossings := c.all(t)
	if len(turns) != 1 || turns[0].greatest || len(crossings) != 1 {
		t.Fatalf("%+v %+v", turns, crossings)
	}
	if y := f(crossings[0].x); y > 30 || f(math.Nextafter(crossings[0].x, 1)) <= 30 {
		t.Errorf("%+v", crossings[0])
	}
	s := c.stretches(c.edges(c.survey(0, 10).gaps))
	if len(s) != 1 || s[0].x0 != 0.31 || s[0].x1 != 0.87 {
		t.Errorf("%+v", s)
	}
}

// What rounding moves does not turn.
func TestNoiseIsNoTurn(t *testing.T) {
	r := rand.New(rand.NewPCG(61, 62))
	flat := func(x float64) float64 { return 5 * (1 + 4e-16*r.NormFloat64()) }
	if turns, _ := draw(flat, linear(t, 0, 1, 5000)).all(t); len(turns) != 0 {
		t.Errorf("%d turns", len(turns))
	}
}

// The survey in blocks is the survey in one go, also across level and unknown
// stretches.
func TestSurveyInBlocks(t *testing.T) {
	r := rand.New(rand.NewPCG(63, 64))
	for range 200 {
		n := 3 + r.IntN(60)
		c := &curve{levels: []level{{figure: 2}}}
		for i := range n {
			c.xs = append(c.xs, float64(i))
			y := float64(r.IntN(4))
			if r.IntN(8) == 0 {
				y = math.NaN()
			}
			c.ys = append(c.ys, y)
		}
		whole := c.survey(0, n-1)
		var joined survey
		for from := 0; from < n-1; from += 4 {
			joined.join(c.survey(from, min(from+4, n-1)))
		}
		if !slices.Equal(whole.turns, joined.turns) || !slices.Equal(whole.gaps, joined.gaps) || !slices.Equal(whole.passes, joined.passes) {
			t.Fatalf("%v\n%+v\n%+v", c.ys, whole, joined)
		}
	}
}

func TestLevelsFromBelow(t *testing.T) {
	_, crossings := draw(func(x float64) float64 { return x }, linear(t, 0, 1, 4), level{figure: 0.3, atLeast: true}).all(t)
	if len(crossings) != 1 || crossings[0].x != 0.3 || !crossings[0].up {
		t.Errorf("%+v", crossings)
	}
}
