package arrest

import (
	"fmt"
	"testing"
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
