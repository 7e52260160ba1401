package limits

import (
	"math"
	"testing"

	"arrestcheck/arrest"
	"arrestcheck/arrest/quantity"
)

// The builders of this file make results and limits by hand, so that the rules
// are tested alone, without the mechanics that feed them.

var (
	nan = math.NaN()
	inf = math.Inf(1)
)

func band(t testing.TB, d quantity.Dimension, text string) quantity.Band {
	t.Helper()
	b, err := quantity.Parse(d, text)
	if err != nil {
		t.Fatal(err)
	}
	return b
}

func bandAt(t testing.TB, d quantity.Dimension, text string) *quantity.Band {
	t.Helper()
	b := band(t, d, text)
	return &b
}

func between(q arrest.Quantity, low, high float64) arrest.Estimate {
	return arrest.Estimate{Quantity: q, Evidence: arrest.Given, Bound: arrest.Between, Low: low, Value: nan, High: high, Reach: nan}
}

func floor(q arrest.Quantity, low, reach float64) arrest.Estimate {
	return arrest.Estimate{Quantity: q, Evidence: arrest.Given, Bound: arrest.AtLeast, Low: low, Value: nan, High: nan, Reach: reach}
}

func ceiling(q arrest.Quantity, high float64) arrest.Estimate {
	return arrest.Estimate{Quantity: q, Evidence: arrest.Rated, Bound: arrest.AtMost, Low: nan, Value: nan, High: high, Reach: nan, From: "label of the lanyard"}
}

func outside(q arrest.Quantity, document string) arrest.Estimate {
	e := ceiling(q, nan)
	e.From, e.Outside = document, true
	return e
}

func shape(q arrest.Quantity, name string, value float64) arrest.Estimate {
	e := between(q, value, value)
	e.Evidence, e.From = arrest.Shape, name
	return e
}

func by(ev arrest.Evidence, e arrest.Estimate) arrest.Estimate {
	e.Evidence = ev
	return e
}

func using(e arrest.Estimate, inputs ...int) arrest.Estimate {
	e.Uses = inputs
	return e
}

func result(es ...arrest.Estimate) *arrest.Result {
	return &arrest.Result{Estimates: es, Persons: 1, Inputs: []arrest.Input{
		0: {Key: "worker.mass", Role: arrest.OfWorker, Source: arrest.FromMeasured, Band: quantity.Band{Tolerance: quantity.PlusMinus, Low: 1, High: 1}},
		1: {Key: "worker.tools", Role: arrest.OfWorker, Band: quantity.Band{Low: 1, High: 1}},
		2: {Key: "stop.distance", Role: arrest.OfStop, Source: arrest.FromLabel, Band: quantity.Band{Tolerance: quantity.Range, Low: 1, High: 1}},
		3: {Key: "fall.free_fall", Role: arrest.OfFall, Source: arrest.FromDrawing, Band: quantity.Band{Low: 1, High: 1}},
	}}
}

// limit is a limit to which no cap applies.
func limit(t testing.TB, q arrest.Quantity, text string) Limit {
	t.Helper()
	record, _ := q.Record()
	s, ok := SenseOf(q)
	if !ok {
		t.Fatalf("%s cannot be bounded", q)
	}
	return Limit{ID: "row", Quantity: q, Sense: s, Bound: band(t, record.Dimension, text),
		Authority: "site rule 4", Edition: "second", Kind: Person, CheckedOn: "2 May"}
}

func printed(t testing.TB, q arrest.Quantity, text, also string) Limit {
	t.Helper()
	l := limit(t, q, text)
	l.AlsoPrinted = bandAt(t, l.Bound.Unit.Dimension, also)
	return l
}

// assess compares one limit.
func assess(res *arrest.Result, l Limit) Finding {
	a := Assess(res, []Set{{Limits: []Limit{l}}}, nil)
	return a.Findings[0]
}

func ids(f *Finding) []ReasonID {
	var list []ReasonID
	for _, r := range f.Reasons {
		list = append(list, r.ID)
	}
	return list
}

// up and down are the neighbours of x, one unit in the last place away.
func up(x float64) float64   { return math.Nextafter(x, math.Inf(1)) }
func down(x float64) float64 { return math.Nextafter(x, math.Inf(-1)) }
