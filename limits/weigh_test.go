package limits

import (
	"math"
	"slices"
	"testing"

	"arrestcheck/arrest"
	"arrestcheck/arrest/quantity"
)

// One force, written exactly in three units: a pound-force is 4.4482216152605 N
// and a kilogram-force 9.80665 N, both exact (NIST SP 811, 2008, appendix B.8),
// so that 1 lbf is 0.45359237 kgf.
var sameForce = []string{"1800 lbf", "8.0067989074689 kN", "816.466266 kgf"}

// Columns of the outcome table: where the open end of an estimate lies.
var places = []struct {
	name string
	at   func(limit float64) float64
}{
	{"well below", func(l float64) float64 { return l / 2 }},
	{"one step below", down},
	{"equal", func(l float64) float64 { return l }},
	{"one step above", up},
	{"well above", func(l float64) float64 { return 2 * l }},
}

// The outcome table. A row gives the bound and, for a band, the place of its
// low end; its letters stand for the places of the other end, in the order of
// places, a dot for a band that would be reversed: X exceeded, U undecided,
// W within.
var outcomeTable = []struct {
	sense    Sense
	bound    arrest.Bound
	low      int
	outcomes string
}{
	{AtMost, arrest.AtLeast, 0, "UUUXX"},
	{AtMost, arrest.AtMost, 0, "WWWUU"},
	{AtMost, arrest.Between, 0, "WWWUU"},
	{AtMost, arrest.Between, 1, ".WWUU"},
	{AtMost, arrest.Between, 2, "..WUU"},
	{AtMost, arrest.Between, 3, "...XX"},
	{AtMost, arrest.Between, 4, "....X"},
	{AtLeast, arrest.AtLeast, 0, "UUWWW"},
	{AtLeast, arrest.AtMost, 0, "XXUUU"},
	{AtLeast, arrest.Between, 0, "XXUUU"},
	{AtLeast, arrest.Between, 1, ".XUUU"},
	{AtLeast, arrest.Between, 2, "..WWW"},
	{AtLeast, arrest.Between, 3, "...WW"},
	{AtLeast, arrest.Between, 4, "....W"},
}

func TestOutcomeTable(t *testing.T) {
	letters := map[byte]Outcome{'X': Exceeded, 'U': Undecided, 'W': Within}
	cases := 0
	for _, unit := range sameForce {
		for _, row := range outcomeTable {
			q := arrest.PeakForce
			if row.sense == AtLeast {
				q = arrest.AnchorStrengthPerPerson
			}
			l := limit(t, q, unit)
			for p, place := range places {
				want, ok := letters[row.outcomes[p]]
				if !ok {
					continue
				}
				cases++
				x := place.at(l.Bound.Value)
				var e arrest.Estimate
				switch row.bound {
				case arrest.AtLeast:
					e = floor(q, x, x)
				case arrest.AtMost:
					e = ceiling(q, x)
				case arrest.Between:
					e = between(q, places[row.low].at(l.Bound.Value), x)
				}
				f := assess(result(e), l)
				if f.Outcome != want {
					t.Errorf("%s %s: %s, %s from %s: %s, want %s", row.sense, unit, row.bound, place.name, places[row.low].name, f.Outcome, want)
				}
				if len(f.Reasons) == 0 != (want != Undecided) {
					t.Errorf("%s %s: %s, %s: reasons %v", row.sense, unit, row.bound, place.name, ids(&f))
				}
			}
		}
	}
	// 10 one-sided and 15 two-sided cases for each sense, in each unit.
	if want := (10 + 15) * 2 * len(sameForce); cases != want {
		t.Errorf("%d cases, want %d", cases, want)
	}
}

// A demand typed in one unit equals a limit typed in another to the last bit,
// and so is not beyond it.
func TestEqualInEveryUnit(t *testing.T) {
	cases := 0
	for _, typed := range sameForce {
		for _, demand := range sameForce {
			for _, q := range []arrest.Quantity{arrest.PeakForce, arrest.AnchorStrengthPerPerson} {
				cases++
				d := band(t, quantity.Force, demand)
				f := assess(result(between(q, d.Low, d.High)), limit(t, q, typed))
				if f.Outcome != Within || f.Ratio != 1 {
					t.Errorf("%s %s against %s: %s, ratio %v", q, demand, typed, f.Outcome, f.Ratio)
				}
			}
		}
	}
	if cases != 18 {
		t.Errorf("%d cases, want 18", cases)
	}
}

// The pair of the rule is 1800 lbf (8 kN): 8 kN is 8000 N, 1800 lbf is
// 8006.7989074689 N, and 8003 N lies between the two.
func TestPrintedPair(t *testing.T) {
	const peak, strength = arrest.PeakForce, arrest.AnchorStrengthPerPerson
	lbf, kN := unit(t, "lbf"), unit(t, "kN")
	pounds := 8006.7989074689
	typed := func(u quantity.Unit, e arrest.Estimate) arrest.Estimate { e.Typed = u; return e }
	cases := []struct {
		name     string
		limit    Limit
		estimate arrest.Estimate
		want     Outcome
		pair     bool // the pair is named
		ratio    float64
	}{
		{"at the lesser", printed(t, peak, "1800 lbf", "8 kN"), between(peak, 7000, 8000), Within, false, 1},
		{"just over the lesser", printed(t, peak, "1800 lbf", "8 kN"), between(peak, 7000, up(8000)), Undecided, true, up(8000) / 8000},
		{"band between", printed(t, peak, "1800 lbf", "8 kN"), between(peak, 8003, 8003), Undecided, true, 8003. / 8000},
		{"at the greater", printed(t, peak, "1800 lbf", "8 kN"), between(peak, 8003, pounds), Undecided, true, pounds / 8000},
		{"over the greater", printed(t, peak, "1800 lbf", "8 kN"), between(peak, up(pounds), 8010), Exceeded, false, 8010. / 8000},
		{"from the pair upwards", printed(t, peak, "1800 lbf", "8 kN"), between(peak, 8003, 9000), Undecided, true, 9000. / 8000},
		{"across the pair", printed(t, peak, "1800 lbf", "8 kN"), between(peak, 7000, 9000), Undecided, false, 9000. / 8000},
		{"floor between", printed(t, peak, "1800 lbf", "8 kN"), floor(peak, 8003, 8003), Undecided, true, nan},
		{"floor below", printed(t, peak, "1800 lbf", "8 kN"), floor(peak, 7999, 7999), Undecided, false, nan},
		{"ceiling between", printed(t, peak, "1800 lbf", "8 kN"), ceiling(peak, 8003), Undecided, true, 8003. / 8000},
		{"ceiling over", printed(t, peak, "1800 lbf", "8 kN"), ceiling(peak, 9000), Undecided, false, 9000. / 8000},
		{"pair the other way round", printed(t, peak, "8 kN", "1800 lbf"), between(peak, 8003, 8003), Undecided, true, 8003. / 8000},

		{"typed alike", printed(t, peak, "1800 lbf", "8 kN"), typed(lbf, ceiling(peak, pounds)), Within, false, 1},
		{"typed alike, just over", printed(t, peak, "1800 lbf", "8 kN"), typed(lbf, between(peak, up(pounds), up(pounds))), Exceeded, false, up(pounds) / pounds},
		{"typed alike in the lesser", printed(t, peak, "8 kN", "1800 lbf"), typed(kN, between(peak, 8003, 8003)), Exceeded, false, 8003. / 8000},
		{"typed in the other", printed(t, peak, "1800 lbf", "8 kN"), typed(kN, ceiling(peak, 8003)), Undecided, true, 8003. / 8000},
		{"typed in the other, at it", printed(t, peak, "1800 lbf", "8 kN"), typed(kN, ceiling(peak, 8000)), Within, false, 1},
		{"calculated, limit of no unit", noUnit(printed(t, peak, "1800 lbf", "8 kN")), ceiling(peak, 8003), Undecided, true, 8003. / 8000},

		{"at least: at the greater", printed(t, strength, "1800 lbf", "8 kN"), between(strength, pounds, 9000), Within, false, 1},
		{"at least: between", printed(t, strength, "1800 lbf", "8 kN"), between(strength, 8003, 9000), Undecided, true, 8003. / pounds},
		{"at least: at the lesser", printed(t, strength, "1800 lbf", "8 kN"), between(strength, 7000, 8000), Undecided, true, 7000. / pounds},
		{"at least: under the lesser", printed(t, strength, "1800 lbf", "8 kN"), between(strength, 7000, down(8000)), Exceeded, false, 7000. / pounds},
		{"at least: typed alike", printed(t, strength, "8 kN", "1800 lbf"), typed(kN, between(strength, 8000, 9000)), Within, false, 1},
	}
	for _, c := range cases {
		f := assess(result(c.estimate), c.limit)
		if f.Outcome != c.want || slices.Contains(ids(&f), PairDiffers) != c.pair {
			t.Errorf("%s: %s %v, want %s, pair named: %v", c.name, f.Outcome, ids(&f), c.want, c.pair)
		}
		if f.Ratio != c.ratio && !(math.IsNaN(f.Ratio) && math.IsNaN(c.ratio)) {
			t.Errorf("%s: ratio %v, want %v", c.name, f.Ratio, c.ratio)
		}
	}
}

// Two ratings, one typed in the unit of the limit and so within it, the other
// smaller and between the pair: the promise of both is needed, and one is not
// settled.
func TestPairBesideTypedAlike(t *testing.T) {
	larger, smaller := ceiling(arrest.PeakForce, 8006), ceiling(arrest.PeakForce, 8003)
	larger.Typed = unit(t, "lbf")
	f := assess(result(larger, smaller), printed(t, arrest.PeakForce, "1800 lbf", "8 kN"))
	if f.Outcome != Undecided || !slices.Equal(ids(&f), rs(PairDiffers)) {
		t.Errorf("%s %v", f.Outcome, ids(&f))
	}
}

// Of equal figures the one held against the stricter figure of a pair is
// named, in whatever order they stand: its ratio is the greater.
func TestEqualFiguresAboutAPair(t *testing.T) {
	const pounds = 8006.7989074689
	l := printed(t, arrest.PeakForce, "1800 lbf", "8 kN")
	for _, high := range []float64{pounds, 9000} {
		for _, low := range []float64{3000, high} {
			typed := between(arrest.PeakForce, low, high)
			typed.Typed = unit(t, "lbf")
			plain := by(arrest.Measured, between(arrest.PeakForce, low, high))
			for _, es := range [][]arrest.Estimate{{typed, plain}, {plain, typed}} {
				f := assess(result(es...), l)
				if f.Demand != high || f.Ratio != high/8000 {
					t.Errorf("%v..%v: demand %v, ratio %v", low, high, f.Demand, f.Ratio)
				}
			}
		}
	}
}

func unit(t *testing.T, symbol string) quantity.Unit {
	u, ok := quantity.LookUp(symbol)
	if !ok {
		t.Fatalf("no unit %s", symbol)
	}
	return u
}

func noUnit(l Limit) Limit {
	l.Bound.Unit = quantity.Unit{}
	return l
}

// Several estimates of one quantity, at_most 8 kN unless the quantity asks for
// at least 8 kN. Used gives the order in which they are shown.
func TestSeveralEstimates(t *testing.T) {
	const peak, strength = arrest.PeakForce, arrest.AnchorStrengthPerPerson
	cases := []struct {
		name      string
		estimates []arrest.Estimate
		want      Outcome
		reasons   []ReasonID
		used      []int
		bound     arrest.Bound
		demand    float64
	}{
		{"the larger of two ratings governs", es(ceiling(peak, 5000), ceiling(peak, 7000)), Within, nil, []int{1, 0}, arrest.AtMost, 7000},
		{"the larger of two ratings is beyond", es(ceiling(peak, 5000), ceiling(peak, 9000)), Undecided, rs(OnlyCeiling), []int{1, 0}, arrest.AtMost, 9000},
		{"of two equal ratings the first", es(ceiling(peak, 5000), ceiling(peak, 5000)), Within, nil, []int{0, 1}, arrest.AtMost, 5000},
		{"one evidence is enough", es(ceiling(peak, 9000), by(arrest.Measured, ceiling(peak, 7000))), Within, nil, []int{1, 0}, arrest.AtMost, 7000},
		{"every band must be inside", es(between(peak, 3000, 5000), by(arrest.Modelled, between(peak, 3000, 9000))), Undecided, rs(Straddles), []int{1, 0}, arrest.Between, 9000},
		{"a band beyond stands against a rating", es(between(peak, 3000, 9000), ceiling(peak, 6000)), Undecided, rs(Straddles), []int{0, 1}, arrest.Between, 9000},
		{"a ceiling beyond says nothing against a band", es(ceiling(peak, 9000), between(peak, 3000, 5000)), Within, nil, []int{1, 0}, arrest.Between, 5000},
		{"the least favourable governs", es(between(peak, 3000, 5000), ceiling(peak, 6000)), Within, nil, []int{1, 0}, arrest.AtMost, 6000},
		{"at equal figures the band", es(ceiling(peak, 6000), between(peak, 3000, 6000)), Within, nil, []int{1, 0}, arrest.Between, 6000},
		{"a band without a high end", es(between(peak, 3000, inf), ceiling(peak, 6000)), Undecided, rs(Straddles), []int{0, 1}, arrest.AtLeast, 3000},
		{"a band of no figures", es(between(peak, nan, nan), ceiling(peak, 6000)), Undecided, rs(Straddles), []int{0, 1}, arrest.AtLeast, nan},

		{"a ceiling that is no figure", es(ceiling(peak, -inf)), Undecided, rs(OnlyCeiling), []int{0}, arrest.AtLeast, nan},

		{"a floor beyond wins", es(ceiling(peak, 6000), floor(peak, 8001, 9000)), Exceeded, nil, []int{1, 0}, arrest.AtLeast, 8001},
		{"the greatest figure beyond governs", es(between(peak, 8100, 8500), floor(peak, 8200, 9000)), Exceeded, nil, []int{0, 1}, arrest.Between, 8500},
		{"the greatest floor beyond governs", es(between(peak, 8100, 8500), floor(peak, 8600, 9000)), Exceeded, nil, []int{1, 0}, arrest.AtLeast, 8600},
		{"at equal figures the bounded one", es(floor(peak, 8500, 9000), between(peak, 8100, 8500)), Exceeded, nil, []int{1, 0}, arrest.Between, 8500},
		{"one beyond without a high end", es(between(peak, 8100, inf)), Exceeded, nil, []int{0}, arrest.AtLeast, 8100},

		{"a floor alone", es(floor(peak, 3000, 4000)), Undecided, rs(OnlyFloor), []int{0}, arrest.AtLeast, 3000},
		{"the greater of two floors", es(floor(peak, 3000, 4000), floor(peak, 3500, 4000)), Undecided, rs(OnlyFloor), []int{1, 0}, arrest.AtLeast, 3500},
		{"a floor and a ceiling beyond", es(floor(peak, 3000, 4000), ceiling(peak, 9000), floor(peak, 3500, 4000)), Undecided, rs(Straddles), []int{1, 0, 2}, arrest.AtMost, 9000},
		{"a floor below a ceiling inside", es(floor(peak, 3000, 8000), ceiling(peak, 6000)), Within, nil, []int{1, 0}, arrest.AtMost, 6000},
		{"a floor that reaches beyond", es(floor(peak, 3000, up(8000)), ceiling(peak, 6000)), Undecided, rs(FloorReaches), []int{1, 0}, arrest.AtMost, 6000},
		{"a floor open above", es(floor(peak, 3000, inf), ceiling(peak, 6000)), Undecided, rs(FloorReaches), []int{1, 0}, arrest.AtMost, 6000},
		{"a floor of unknown reach", es(floor(peak, 3000, nan), between(peak, 3000, 6000)), Undecided, rs(FloorReaches), []int{1, 0}, arrest.Between, 6000},

		{"a rating outside its conditions", es(outside(peak, "label A")), Undecided, rs(OutsideRating), []int{0}, "", nan},
		{"with a floor", es(outside(peak, "label A"), floor(peak, 3000, 4000)), Undecided, rs(OutsideRating, OnlyFloor), []int{1, 0}, arrest.AtLeast, 3000},
		{"one of two ratings outside", es(ceiling(peak, 6000), outside(peak, "label A")), Undecided, rs(OutsideRating), []int{0, 1}, arrest.AtMost, 6000},
		{"settled without need of the rating", es(outside(peak, "label A"), between(peak, 3000, 6000)), Within, rs(OutsideRating), []int{1, 0}, arrest.Between, 6000},
		{"exceeded all the same", es(outside(peak, "label A"), floor(peak, 9000, inf)), Exceeded, nil, []int{1, 0}, arrest.AtLeast, 9000},

		{"an assumed shape alone", es(shape(peak, "rising ramp", 6805)), Undecided, rs(AssumedShape), []int{0}, "", nan},
		{"an assumed shape beyond", es(shape(peak, "rising ramp", 9000)), Undecided, rs(AssumedShape), []int{0}, "", nan},
		{"with a floor", es(shape(peak, "rising ramp", 6805), floor(peak, 3400, 3500)), Undecided, rs(AssumedShape, OnlyFloor), []int{1, 0}, arrest.AtLeast, 3400},
		{"with a band that straddles", es(shape(peak, "rising ramp", 6805), between(peak, 3400, 9000)), Undecided, rs(Straddles, AssumedShape), []int{1, 0}, arrest.Between, 9000},
		{"beside a rating", es(shape(peak, "rising ramp", 9000), ceiling(peak, 6000)), Within, nil, []int{1, 0}, arrest.AtMost, 6000},
		{"said once", es(shape(peak, "rising ramp", 6805), shape(peak, "rising ramp", 7000), shape(peak, "spring", 5000)), Undecided, rs(AssumedShape, AssumedShape), []int{0, 1, 2}, "", nan},
		{"order of all kinds", es(shape(peak, "spring", 5000), outside(peak, "label A"), floor(peak, 3000, 3500), by(arrest.Modelled, between(peak, 5000, 6000))), Within, rs(OutsideRating), []int{3, 2, 1, 0}, arrest.Between, 6000},

		{"another quantity", es(between(arrest.MeanForceOverTime, 9000, 9000)), NotCompared, rs(NotComputed), nil, "", nan},
		{"nothing at all", nil, NotCompared, rs(NotComputed), nil, "", nan},

		{"at least: the lesser of two ratings governs", es(rated(floor(strength, 9000, nan)), rated(floor(strength, 8500, nan))), Within, nil, []int{1, 0}, arrest.AtLeast, 8500},
		{"at least: a ceiling alone", es(ceiling(strength, 9000)), Undecided, rs(OnlyCeiling), []int{0}, arrest.AtMost, 9000},
		{"at least: a floor short of it", es(floor(strength, 7000, inf)), Undecided, rs(OnlyFloor), []int{0}, arrest.AtLeast, 7000},
		{"at least: both", es(floor(strength, 7000, inf), ceiling(strength, 9000)), Undecided, rs(Straddles), []int{0, 1}, arrest.AtLeast, 7000},
		{"at least: a floor above it", es(floor(strength, 8500, inf), ceiling(strength, 9000)), Within, nil, []int{0, 1}, arrest.AtLeast, 8500},
		{"at least: a ceiling under it wins", es(floor(strength, 8500, inf), ceiling(strength, 7000)), Exceeded, nil, []int{1, 0}, arrest.AtMost, 7000},
	}
	for _, c := range cases {
		l := limit(t, peak, "8 kN")
		if len(c.estimates) > 0 && c.estimates[0].Quantity == strength {
			l = limit(t, strength, "8 kN")
		}
		f := assess(result(c.estimates...), l)
		if f.Outcome != c.want || !slices.Equal(ids(&f), c.reasons) {
			t.Errorf("%s: %s %v, want %s %v", c.name, f.Outcome, ids(&f), c.want, c.reasons)
		}
		if !slices.Equal(f.Used, c.used) || f.Bound != c.bound || !same(f.Demand, c.demand) {
			t.Errorf("%s: used %v, %s %v, want %v, %s %v", c.name, f.Used, f.Bound, f.Demand, c.used, c.bound, c.demand)
		}
		bad := arrest.AtMost
		if l.Sense == AtLeast {
			bad = arrest.AtLeast
		}
		want := nan
		if f.Bound == arrest.Between || f.Bound == bad {
			want = f.Demand / 8000
		}
		if !same(f.Ratio, want) {
			t.Errorf("%s: ratio %v, want %v", c.name, f.Ratio, want)
		}
	}
}

func es(list ...arrest.Estimate) []arrest.Estimate { return list }
func rs(list ...ReasonID) []ReasonID               { return list }

func rated(e arrest.Estimate) arrest.Estimate { return by(arrest.Rated, e) }

func same(a, b float64) bool { return a == b || math.IsNaN(a) && math.IsNaN(b) }

func TestContradiction(t *testing.T) {
	const peak = arrest.PeakForce
	mass := between(arrest.TotalMass, 100, 100)
	cases := []struct {
		name      string
		estimates []arrest.Estimate
		clash     []arrest.Contradiction
		want      Outcome
		reasons   []ReasonID
	}{
		{"two bands apart", es(between(peak, 3000, 4000), by(arrest.Modelled, between(peak, 5000, 6000))), []arrest.Contradiction{{A: 0, B: 1}}, Undecided, rs(Contradicted)},
		{"in part", es(between(peak, 3000, 4000), by(arrest.Modelled, between(peak, 4000, 6000))), []arrest.Contradiction{{A: 0, B: 1, Part: true}}, Undecided, rs(Contradicted)},
		{"beside a third that would do", es(floor(peak, 6500, 7000), ceiling(peak, 6000), by(arrest.Measured, between(peak, 5000, 6000))), []arrest.Contradiction{{A: 0, B: 1}}, Undecided, rs(Contradicted)},
		{"exceeded all the same", es(between(peak, 3000, 4000), by(arrest.Modelled, between(peak, 9000, 9500))), []arrest.Contradiction{{A: 0, B: 1}}, Exceeded, rs(Contradicted)},
		{"with a floor alone", es(floor(peak, 3000, 4000), floor(peak, 5000, 6000)), []arrest.Contradiction{{A: 0, B: 1}}, Undecided, rs(Contradicted, OnlyFloor)},
		{"of a rating with its own travel", es(ceiling(peak, 6000)), []arrest.Contradiction{{A: 0, B: 0}}, Undecided, rs(Contradicted)},
		{"of another quantity", es(between(peak, 3000, 4000), mass, by(arrest.Measured, mass)), []arrest.Contradiction{{A: 1, B: 2}}, Within, nil},
		{"with an assumed shape", es(between(peak, 3000, 4000), shape(peak, "spring", 5000)), []arrest.Contradiction{{A: 0, B: 1}}, Within, nil},
	}
	for _, c := range cases {
		res := result(c.estimates...)
		res.Contradictions = c.clash
		f := assess(res, limit(t, peak, "8 kN"))
		if f.Outcome != c.want || !slices.Equal(ids(&f), c.reasons) {
			t.Errorf("%s: %s %v, want %s %v", c.name, f.Outcome, ids(&f), c.want, c.reasons)
		}
	}
}

// A limit of zero is an ordinary limit, without a ratio.
func TestZeroLimit(t *testing.T) {
	for _, c := range []struct {
		low  float64
		want Outcome
	}{{-0.1, Exceeded}, {0, Within}, {0.1, Within}} {
		f := assess(result(between(arrest.ClearanceLeft, c.low, c.low)), limit(t, arrest.ClearanceLeft, "0 m"))
		if f.Outcome != c.want || !math.IsNaN(f.Ratio) {
			t.Errorf("%v m left of 0 m: %s, ratio %v", c.low, f.Outcome, f.Ratio)
		}
	}
}
