package arrest

import (
	"fmt"
	"testing"

	"arrestcheck/arrest/quantity"
)

// Each document gives its own ceiling, however many there are.
func TestManyRatings(t *testing.T) {
	f := figures{mass: "100 kg", fall: "1.8 m"}
	for n := range 60 {
		r := label(t)
		r.Document = fmt.Sprintf("document %d", n+1)
		f.ratings = append(f.ratings, r)
	}
	res := Evaluate(f.job(t))
	n := 0
	for i := range res.Estimates {
		if e := &res.Estimates[i]; e.Quantity == PeakForce && e.Evidence == Rated {
			n++
			if e.High != 6000 || e.From != fmt.Sprintf("document %d", n) {
				t.Errorf("%d: %g by %q", n, e.High, e.From)
			}
		}
	}
	if n != len(f.ratings) {
		t.Errorf("%d ceilings of %d documents", n, len(f.ratings))
	}
}

// A document may promise just what a constant force over its travel comes to,
// and no less: with g = 10 m/s2, 100 kg, 1 m of fall and 0.5 m of travel that is
// 1000 N + 2000 N (M-02), in exact figures. Of a band of masses only the
// heaviest is then beyond the promise.
func TestEdgeOfARatingByItsTravel(t *testing.T) {
	travel := parse(t, quantity.Length, "0.5 m")
	for _, c := range []struct {
		mass, promise string
		told, part    bool
	}{
		{"100 kg", "3 kN", false, false},
		{"100 kg", "2.999 kN", true, false},
		{"100 kg .. 110 kg", "3 kN", true, true},
		{"100 kg .. 110 kg", "2.999 kN", true, false},
	} {
		r, peak := label(t), parse(t, quantity.Force, c.promise)
		r.PeakForceAtMost, r.TravelAtMost = &peak, &travel
		res := Evaluate(figures{mass: c.mass, fall: "1 m", gravity: "10 m/s2", ratings: []Rating{r}}.job(t))
		if hasWarning(&res, RatingContradicted) != c.told || len(res.Contradictions) > 0 != c.told || c.told && res.Contradictions[0].Part != c.part {
			t.Errorf("%s, %s: %v", c.mass, c.promise, res.Contradictions)
		}
	}
}
