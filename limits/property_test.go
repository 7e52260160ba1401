package limits

import (
	"slices"
	"testing"

	"pgregory.net/rapid"

	"arrestcheck/arrest"
	"arrestcheck/arrest/quantity"
)

// A drawn case is one limit with estimates about it. Figures come from a small
// grid about the limit, so that equal ones and ends of pairs turn up often.
type drawn struct {
	res *arrest.Result
	set Set
}

// assess compares the limit of the case. The sets are made anew, as findings
// point into them.
func (d *drawn) assess() Finding {
	return Assess(d.res, []Set{d.set}, nil).Findings[0]
}

// copy is a case that may be changed without changing d.
func (d *drawn) copy() *drawn {
	res := *d.res
	res.Estimates = slices.Clone(res.Estimates)
	res.Contradictions = slices.Clone(res.Contradictions)
	set := d.set
	set.Limits = slices.Clone(set.Limits)
	return &drawn{&res, set}
}

func (d *drawn) limit() *Limit { return &d.set.Limits[0] }

// value draws a force about 8000 N, the figures of the pair 1800 lbf (8 kN)
// and their neighbours among them.
func value(t *rapid.T) float64 {
	const pounds = 8006.7989074689
	return rapid.SampledFrom([]float64{3000, 6000, down(8000), 8000, up(8000), 8003, down(pounds), pounds, up(pounds), 9000, inf, nan}).Draw(t, "value")
}

func estimate(t *rapid.T, q arrest.Quantity) arrest.Estimate {
	a, b := value(t), value(t)
	var e arrest.Estimate
	switch rapid.IntRange(0, 4).Draw(t, "kind") {
	case 0:
		e = floor(q, min(a, b), max(a, b))
	case 1:
		e = ceiling(q, a)
	case 2:
		e = outside(q, "label A")
	case 3:
		e = shape(q, "spring", a)
	default:
		e = between(q, min(a, b), max(a, b))
	}
	if e.Evidence != arrest.Shape {
		e.Evidence = rapid.SampledFrom([]arrest.Evidence{arrest.Given, arrest.Rated, arrest.Measured}).Draw(t, "evidence")
	}
	if rapid.Bool().Draw(t, "typed") {
		e.Typed, _ = quantity.LookUp("lbf")
	}
	e.Uses = rapid.SliceOfN(rapid.IntRange(0, 3), 0, 2).Draw(t, "uses")
	return e
}

func draw(t *rapid.T) *drawn {
	q := rapid.SampledFrom([]arrest.Quantity{arrest.PeakForce, arrest.AnchorStrengthPerPerson}).Draw(t, "quantity")
	n := rapid.IntRange(0, 4).Draw(t, "estimates")
	var list []arrest.Estimate
	for range n {
		list = append(list, estimate(t, q))
	}
	sense, _ := SenseOf(q)
	l := Limit{ID: "row", Quantity: q, Sense: sense, Authority: "rule", Kind: Person, CheckedOn: "2 May"}
	l.Bound, _ = quantity.Parse(quantity.Force, rapid.SampledFrom([]string{"1800 lbf", "8 kN"}).Draw(t, "limit"))
	if rapid.Bool().Draw(t, "pair") {
		also, _ := quantity.Parse(quantity.Force, "8 kN")
		l.AlsoPrinted = &also
	}
	if rapid.Bool().Draw(t, "condition") {
		most, _ := quantity.Parse(quantity.Mass, "100 kg")
		l.TotalMassAtMost = &most
		list = append(list, between(arrest.TotalMass, 90, rapid.SampledFrom([]float64{95, 105}).Draw(t, "mass")))
	}
	return &drawn{result(list...), Set{Limits: []Limit{l}}}
}

// A change for the worse never makes an outcome better, and leaves whatever is
// exceeded exceeded.
func TestWorseNeverHelps(t *testing.T) {
	changes := map[string]func(*rapid.T, *drawn){
		"a demand moves to the bad side": func(t *rapid.T, d *drawn) {
			if len(d.res.Estimates) == 0 {
				return
			}
			e := &d.res.Estimates[rapid.IntRange(0, len(d.res.Estimates)-1).Draw(t, "which")]
			by := rapid.SampledFrom([]float64{1e-12, 5, 3000}).Draw(t, "by")
			if d.limit().Sense == AtLeast {
				by = -by
			}
			if e.Quantity == d.limit().Quantity {
				e.Low, e.High, e.Reach = e.Low+by, e.High+by, e.Reach+by
			}
		},
		"the bad end moves out": func(t *rapid.T, d *drawn) {
			for i := range d.res.Estimates {
				e := &d.res.Estimates[i]
				switch {
				case e.Quantity != d.limit().Quantity:
				case d.limit().Sense == AtLeast:
					e.Low--
				default:
					e.High++
					e.Reach++
				}
			}
		},
		"a contradiction": func(t *rapid.T, d *drawn) {
			if n := len(d.res.Estimates); n > 1 {
				d.res.Contradictions = append(d.res.Contradictions, arrest.Contradiction{A: 0, B: n - 1})
			}
		},
		"a rating outside": func(t *rapid.T, d *drawn) {
			d.res.Estimates = append(d.res.Estimates, outside(d.limit().Quantity, "label B"))
		},
		"an estimate open on the bad side": func(t *rapid.T, d *drawn) {
			e := floor(d.limit().Quantity, value(t), inf)
			if d.limit().Sense == AtLeast {
				e = ceiling(d.limit().Quantity, value(t))
			}
			d.res.Estimates = append(d.res.Estimates, e)
		},
		"an open input": func(t *rapid.T, d *drawn) {
			for i := range d.res.Estimates {
				e := &d.res.Estimates[i]
				if rapid.Bool().Draw(t, "uses it") {
					e.Uses = append(slices.Clone(e.Uses), 1)
				}
			}
		},
		"a second person":    func(t *rapid.T, d *drawn) { d.res.Persons = 2 },
		"an example job":     func(t *rapid.T, d *drawn) { d.res.Example = true },
		"an example set":     func(t *rapid.T, d *drawn) { d.set.Example = true },
		"an unchecked limit": func(t *rapid.T, d *drawn) { d.limit().CheckedOn = "" },
		"a superseded limit": func(t *rapid.T, d *drawn) { d.limit().SupersededOn = "in May" },
		"a product test":     func(t *rapid.T, d *drawn) { d.limit().Kind = ProductTest },
		"a second figure": func(t *rapid.T, d *drawn) {
			if d.limit().AlsoPrinted == nil {
				also, _ := quantity.Parse(quantity.Force, "8 kN")
				d.limit().AlsoPrinted = &also
			}
		},
	}
	for name, change := range changes {
		t.Run(name, rapid.MakeCheck(func(t *rapid.T) {
			d := draw(t)
			before := d.assess()
			worse := d.copy()
			change(t, worse)
			after := worse.assess()
			// A second figure makes more rows undecided, from both sides.
			if before.Outcome == Exceeded && after.Outcome != Exceeded && name != "a second figure" {
				t.Fatalf("exceeded became %s", after.Outcome)
			}
			if before.Outcome != Within && after.Outcome == Within {
				t.Fatalf("%s %v became within", before.Outcome, ids(&before))
			}
			if before.Outcome == NotCompared && after.Outcome != NotCompared && !before.has(NotComputed) {
				t.Fatalf("not compared %v became %s", ids(&before), after.Outcome)
			}
		}))
	}
}

// A conditional estimate changes nothing but what is shown.
func TestAssumedShapeDecidesNothing(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		d := draw(t)
		before := d.assess()
		more := d.copy()
		more.res.Estimates = append(more.res.Estimates, shape(d.limit().Quantity, "rising ramp", value(t)))
		after := more.assess()
		if before.has(NotComputed) && len(before.Used) == 0 {
			return // there was nothing to show
		}
		if after.Outcome != before.Outcome || !same(after.Demand, before.Demand) || after.Bound != before.Bound {
			t.Fatalf("%s %s %v became %s %s %v", before.Outcome, before.Bound, before.Demand, after.Outcome, after.Bound, after.Demand)
		}
		if after.has(ConditionStraddles) || after.has(AlsoBeyond) {
			return // the figures may have settled it
		}
		if got := after.has(AssumedShape); got != (after.Outcome == Undecided) {
			t.Fatalf("%s names the shape: %v", after.Outcome, got)
		}
	})
}

// The outcome follows from the rules as they are written down, read off the
// estimates one by one.
func TestOutcomeAgainstTheRules(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		d := draw(t)
		f := d.assess()
		if f.Outcome == NotCompared || f.has(ConditionStraddles) {
			return
		}
		if (f.Outcome == Undecided) == (len(f.Reasons) == 0) && !f.has(Contradicted) && !f.has(OutsideRating) {
			t.Fatalf("%s, reasons %v", f.Outcome, ids(&f))
		}
		l := d.limit()
		var someBeyond, someInside, someOpen, someOut bool
		for i := range d.res.Estimates {
			e := &d.res.Estimates[i]
			if e.Quantity != l.Quantity || e.Evidence == arrest.Shape || e.Outside {
				continue
			}
			least, most := l.Bound.Value, l.Bound.Value
			if l.AlsoPrinted != nil && e.Typed != l.Bound.Unit {
				least, most = min(least, l.AlsoPrinted.Value), max(most, l.AlsoPrinted.Value)
			}
			floor, ceiling := e.Bound != arrest.AtMost, e.Bound != arrest.AtLeast // vouches for Low, for High
			if l.Sense == AtMost {
				someBeyond = someBeyond || floor && e.Low > most
				someInside = someInside || ceiling && e.High <= least
				someOpen = someOpen || !ceiling && e.Reach > least
				someOut = someOut || floor && ceiling && e.High > least
			} else {
				someBeyond = someBeyond || ceiling && e.High < least
				someInside = someInside || floor && e.Low >= most
				someOut = someOut || floor && ceiling && e.Low < most
			}
		}
		if (f.Outcome == Exceeded) != someBeyond {
			t.Fatalf("%s, an estimate beyond: %v", f.Outcome, someBeyond)
		}
		if f.Outcome == Within && (!someInside || someOpen || someOut) {
			t.Fatalf("within, an estimate inside: %v, a floor that reaches: %v, a band beyond: %v", someInside, someOpen, someOut)
		}
	})
}

// At least is at most seen in a mirror: every figure negated, floors and
// ceilings exchanged.
func TestMirror(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		d := draw(t)
		const nowhere = -1e9 // the reach of a floor has no mirror image: left out
		for i := range d.res.Estimates {
			d.res.Estimates[i].Reach = nowhere
		}
		m := d.copy()
		l := m.limit()
		l.Quantity, l.Sense = arrest.AnchorStrengthPerPerson, AtLeast
		if d.limit().Sense == AtLeast {
			l.Quantity, l.Sense = arrest.PeakForce, AtMost
		}
		l.Bound.Value = -l.Bound.Value
		if l.AlsoPrinted != nil {
			also := *l.AlsoPrinted
			also.Value = -also.Value
			l.AlsoPrinted = &also
		}
		exchanged := map[arrest.Bound]arrest.Bound{arrest.AtLeast: arrest.AtMost, arrest.AtMost: arrest.AtLeast, arrest.Between: arrest.Between}
		for i := range m.res.Estimates {
			e := &m.res.Estimates[i]
			if e.Quantity == d.limit().Quantity {
				e.Quantity, e.Low, e.High, e.Bound = l.Quantity, -e.High, -e.Low, exchanged[e.Bound]
			}
		}
		a, b := d.assess(), m.assess()
		if a.Outcome != b.Outcome || !slices.Equal(a.Used, b.Used) || !same(a.Demand, -b.Demand) || exchanged[a.Bound] != b.Bound {
			t.Fatalf("%s %v %s %v, in the mirror %s %v %s %v", a.Outcome, a.Used, a.Bound, a.Demand, b.Outcome, b.Used, b.Bound, b.Demand)
		}
	})
}

// The order of the estimates says nothing.
func TestOrderOfEstimates(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		d := draw(t)
		p := d.copy()
		p.res.Estimates = rapid.Permutation(d.res.Estimates).Draw(t, "order")
		a, b := d.assess(), p.assess()
		if a.Outcome != b.Outcome || !same(a.Demand, b.Demand) || a.Bound != b.Bound || !same(a.Ratio, b.Ratio) {
			t.Fatalf("%s %s %v became %s %s %v", a.Outcome, a.Bound, a.Demand, b.Outcome, b.Bound, b.Demand)
		}
	})
}
