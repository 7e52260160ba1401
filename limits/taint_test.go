package limits

import (
	"testing"

	"arrestcheck/arrest"
)

// A contradiction about one quantity discredits its sources for every other:
// the model, the document, the entry about the stop.
func TestContradictionDiscreditsItsSources(t *testing.T) {
	const peak, anchor, travel, mass = arrest.PeakForce, arrest.AnchorForce, arrest.DecelerationDistance, arrest.TotalMass
	stop := func(e arrest.Estimate) arrest.Estimate { return using(e, 2) } // stop.distance of the fixture
	for _, c := range []struct {
		name  string
		es    []arrest.Estimate
		pair  arrest.Contradiction
		limit Limit
		want  Outcome
	}{
		{"model against the floor, anchor row", es(stop(floor(peak, 7000, 7000)), modelled(peak, 4000, 0.25, nil), modelled(anchor, 4000, 0.25, nil)),
			arrest.Contradiction{A: 0, B: 1}, limit(t, anchor, "6 kN"), Undecided},
		{"document against itself, travel row", es(ceiling(peak, 2000), ceiling(travel, 1)),
			arrest.Contradiction{A: 0, B: 0}, limit(t, travel, "1.2 m"), Undecided},
		{"the other document", es(ceiling(peak, 2000), by(arrest.Measured, between(travel, 1, 1))),
			arrest.Contradiction{A: 0, B: 0}, limit(t, travel, "1.2 m"), Within},
		{"mass has nothing to do with it", es(stop(floor(peak, 7000, 7000)), ceiling(peak, 6000), between(mass, 100, 100)),
			arrest.Contradiction{A: 0, B: 1}, limit(t, mass, "140 kg"), Within},
		{"exceeded all the same", es(stop(floor(peak, 7000, 7000)), modelled(peak, 4000, 0.25, nil), modelled(anchor, 9000, 0.25, nil)),
			arrest.Contradiction{A: 0, B: 1}, limit(t, anchor, "6 kN"), Exceeded},
	} {
		res := result(c.es...)
		res.Contradictions = []arrest.Contradiction{c.pair}
		if f := assess(res, c.limit); f.Outcome != c.want {
			t.Errorf("%s: %s %v, want %s", c.name, f.Outcome, ids(&f), c.want)
		}
	}
	// A measured stop that the model contradicts puts no row within either.
	res := result(using(by(arrest.Given, ceiling(travel, 1)), 2), using(between(arrest.StoppingDistance, 1, 1), 2), modelled(arrest.StoppingDistance, 2, 0.1, nil))
	res.Inputs[2].Source, res.Inputs[2].Role = arrest.FromMeasured, arrest.OfStop
	res.Contradictions = []arrest.Contradiction{{A: 1, B: 2}}
	if f := assess(res, limit(t, travel, "1.2 m")); f.Outcome != Undecided || f.Reasons[0].ID != Contradicted {
		t.Errorf("%s %v", f.Outcome, ids(&f))
	}
}

// The document of a part of the path does not hold here: the model made of that
// part puts nothing within.
func TestPartOutsideItsDocument(t *testing.T) {
	label := outside(arrest.PeakForce, "label of the absorber")
	label.Part = 2
	f := assess(result(modelled(arrest.AnchorForce, 4000, 0.25, nil), label), limit(t, arrest.AnchorForce, "6 kN"))
	if f.Outcome != Undecided || f.Reasons[0].ID != OutsideRating {
		t.Errorf("%s %v", f.Outcome, ids(&f))
	}
	label.Part = 0
	if f = assess(result(modelled(arrest.AnchorForce, 4000, 0.25, nil), label), limit(t, arrest.AnchorForce, "6 kN")); f.Outcome != Within {
		t.Errorf("a document of no part: %s %v", f.Outcome, ids(&f))
	}
}
