package arrest

import (
	"math"
	"testing"

	"arrestcheck/arrest/connector"
)

// leastByTrying is the least peak, N, of 100 kg on 2.5 m of rope of the modulus
// give, N, and an absorber with the travel, m, over all deployment forces of a
// band in steps of 0.1 N: apart from any search.
func leastByTrying(t *testing.T, give, travel, fall, from, to float64) float64 {
	t.Helper()
	least := math.Inf(1)
	var p connector.Path
	var r connector.Result
	for k := 0; from+float64(k)/10 <= to; k++ {
		if err := p.Set(connector.FromModulus(connector.Rope, give, 2.5), connector.NewAbsorber(connector.Plateau{Force: from + float64(k)/10, Travel: travel})); err != nil {
			t.Fatal(err)
		}
		if err := connector.Run(&p, &connector.Fall{Mass: 100, FreeFall: fall, Gravity: StandardGravity}, &r); err != nil {
			t.Fatal(err)
		}
		least = min(least, r.Peak)
	}
	return least
}

// alongForce goes along the deployment force of an absorber that is never used
// up, so that the peak is that force, from 4000 N to 4800 N; of is given the
// peak. It returns the force that was settled on and how many points were tried.
func alongForce(t *testing.T, of func(float64) float64) (force float64, tried int) {
	t.Helper()
	j := onPath(t, fall100(t), FromLabel, absorber("4000 N .. 4800 N", "2 m"))
	in := &j.Inputs[len(j.Inputs)-2]
	if in.Key != "connector[1].force" {
		t.Fatal(in.Key)
	}
	w := walkPath{s: newSpans(j), at: j.Point, of: func(p *Point) float64 { tried++; return of(p.Model.Run.Peak) }}
	w.along(in)
	return w.at.Figures[0], tried
}

// Eight steps of 100 N are tried first. A least between the outermost two of
// those points is closed in on: to a step over 1.618^24, 1e-5 of it; and
// the best of all points tried is the one that is kept.
func TestLeastAlongAnInput(t *testing.T) {
	for _, least := range []float64{4035, 4410, 4765} {
		nearest := math.Inf(1)
		force, _ := alongForce(t, func(f float64) float64 {
			nearest = min(nearest, math.Abs(f-least))
			return math.Abs(f - least)
		})
		if off := math.Abs(force - least); off > 0.01 || math.Abs(off-nearest) > 1e-9 {
			t.Errorf("least at %g N, found at %g N; %g N off was tried", least, force, nearest)
		}
	}
}

// Where the least is that of an end, and half a step away from it nothing is
// less, the nine points and that one are all that is tried; of equal points the
// first one stays.
func TestEndsAlongAnInput(t *testing.T) {
	for name, c := range map[string]struct {
		of    func(float64) float64
		force float64
		tried int
	}{
		"rising":                {func(f float64) float64 { return f }, 4000, 10},
		"falling":               {func(f float64) float64 { return -f }, 4800, 10},
		"level":                 {func(float64) float64 { return 1 }, 4000, 10},
		"level at the end":      {func(f float64) float64 { return -min(f, 4740) }, 4800, 10},
		"level about a point":   {func(f float64) float64 { return max(math.Abs(f-4400), 50) }, 4400, coarse + 1 + 2 + fine},
		"nowhere a figure":      {func(float64) float64 { return nan }, 4000, -1},
		"a figure at one point": {func(f float64) float64 { return onlyAt(f, 4300) }, 4300, -1},
	} {
		force, tried := alongForce(t, c.of)
		if math.Abs(force-c.force) > 1e-9 || c.tried >= 0 && tried != c.tried {
			t.Errorf("%s: %g N after %d points", name, force, tried)
		}
	}
}

// onlyAt is 1 at one force and NaN at all others.
func onlyAt(f, at float64) float64 {
	if f == at {
		return 1
	}
	return nan
}

// With several bands the least peak is that of the softest rope, the longest
// travel and the shortest fall, at a force between the ends: the search must go
// there from the corner that is best, and not from the worst.
func TestTurningPointAmongSeveralBands(t *testing.T) {
	j := onPath(t, figures{mass: "100 kg", fall: "1.20 m .. 1.80 m"}.job(t), FromLabel,
		testPart{kind: connector.Rope, basis: ByModulus, length: "2.5 m", give: "49.2 kN .. 51.8 kN"}, absorber("2.53 kN .. 4.47 kN", "0.292 m .. 0.338 m"))
	res := Evaluate(j)
	near(t, "least peak", find(t, &res, PeakForce, Modelled).Low, leastByTrying(t, 49200, 0.338, 1.2, 2530, 4470), 1e-4)
}

// Of several travels under a held force the notes keep the one that is used
// most, the first of equal ones; what a part without such a travel keeps for
// good is no share of any.
func TestNotesOfTheTravelUsed(t *testing.T) {
	m := &PathRun{parts: []connector.Part{
		{Kind: connector.Webbing},
		connector.NewAbsorber(connector.Plateau{Force: 4000, Travel: 0.4}),
		connector.NewAbsorber(connector.Plateau{Force: 4000, Travel: 0.8}),
		connector.NewAbsorber(connector.Plateau{Force: 4000, Travel: 1.0}),
	}}
	m.Run.FirstExhausted = -1
	m.Run.Parts = []connector.PartResult{{Permanent: 0.05}, {Permanent: 0.2}, {Permanent: 0.4}, {Permanent: 0.4}}
	var n pathNotes
	n.note(m)
	if n.used != 0.5 || n.usedBy != 1 || n.usedUp != 0.2 || n.usedOf != 0.4 {
		t.Errorf("%+v", n)
	}
}
