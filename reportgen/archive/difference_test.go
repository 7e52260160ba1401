package archive

import (
	"fmt"
	"math"
	"reflect"
	"testing"

	"github.com/google/go-cmp/cmp"
)

// Every value of the results is changed in turn: each is told, and the digest
// moves with each but those that are no results (units of input texts, sources,
// names).
func TestEveryValueIsHeldAgainst(t *testing.T) {
	base := Of(sheet(t, "path-every-part.toml"))
	notInTheDigest := map[string]bool{"Inputs.AsWritten": true, "Inputs.Source": true,
		"Findings.LimitAsWritten": true, "Findings.Authority": true}
	notCompared := map[string]bool{"Inputs.Unit": true, "Estimates.Unit": true, "Findings.Unit": true, "Findings.Sense": true}
	n := 0
	for _, part := range []string{"Inputs", "Estimates", "Findings", "Counts"} {
		leaves(reflect.ValueOf(&base).Elem().FieldByName(part), part, func(name string, v reflect.Value) {
			n++
			was := clone(base)
			undo := disturb(t, v)
			is := clone(base)
			undo()
			if moves := was.Digest() != is.Digest(); moves == notInTheDigest[name] {
				t.Errorf("%s: digest moves %t", name, moves)
			}
			if found := len(Differences(&was, &is)); (found == 0) != notCompared[name] {
				t.Errorf("%s: %d differences", name, found)
			}
		})
	}
	if n < 100 {
		t.Errorf("only %d values seen", n)
	}
	less := clone(base)
	less.NotEntered = append(less.NotEntered, "clearance")
	if d := Differences(&base, &less); len(d) != 1 || d[0].Part != OfLeftOut || base.Digest() == less.Digest() {
		t.Errorf("not entered: %v", d)
	}
}

// clone copies results so that a later change does not show in them.
func clone(r Results) Results {
	r.Inputs = append([]Input{}, r.Inputs...)
	r.Estimates = append([]Estimate{}, r.Estimates...)
	r.Findings = append([]Finding{}, r.Findings...)
	for i := range r.Findings {
		r.Findings[i].Reasons = append([]string{}, r.Findings[i].Reasons...)
	}
	r.NotEntered = append([]string{}, r.NotEntered...)
	return r
}

// leaves visits every text, number and truth value below v.
func leaves(v reflect.Value, name string, visit func(string, reflect.Value)) {
	switch v.Kind() {
	case reflect.Slice:
		for i := range v.Len() {
			leaves(v.Index(i), name, visit)
		}
	case reflect.Struct:
		for i := range v.NumField() {
			leaves(v.Field(i), name+"."+v.Type().Field(i).Name, visit)
		}
	default:
		visit(name, v)
	}
}

// disturb changes a value and returns what puts it back.
func disturb(t *testing.T, v reflect.Value) (undo func()) {
	t.Helper()
	old := reflect.ValueOf(v.Interface())
	switch v.Kind() {
	case reflect.Float64:
		if x := v.Float(); math.IsNaN(x) || x == 0 {
			v.SetFloat(1)
		} else {
			v.SetFloat(x * (1 + 1e-11)) // one or more in the twelfth digit
		}
	case reflect.String:
		v.SetString(v.String() + "x")
	case reflect.Bool:
		v.SetBool(!v.Bool())
	case reflect.Int:
		v.SetInt(v.Int() + 1)
	default:
		t.Fatalf("a value of kind %s", v.Kind())
	}
	return func() { v.Set(old) }
}

func TestDifferencesInWords(t *testing.T) {
	nan := math.NaN()
	was := Results{
		Inputs:    []Input{{"worker.mass", "100 kg", "kg", "", 100, 100, 100, true}},
		Estimates: []Estimate{{Quantity: "peak_force", Evidence: "given", Method: "M-06", Unit: "N", Low: 2000, Value: nan, High: nan, Reach: nan, Allowance: nan, ComparedLow: nan, ComparedHigh: nan}},
	}
	is := Results{
		Inputs:    []Input{{"worker.mass", "101 kg", "kg", "measured", 101, 101, 101, true}, {"stop.time", "0.3 s", "s", "", 0.3, 0.3, 0.3, true}},
		Estimates: []Estimate{{Quantity: "peak_force", Evidence: "given", Method: "M-06", Unit: "N", Low: 1999, Value: nan, High: 2500, Reach: nan, Allowance: nan, ComparedLow: nan, ComparedHigh: nan}},
	}
	var got []string
	for _, d := range Differences(&was, &is) {
		got = append(got, fmt.Sprintf("%s|%s|%s|%s|%s|%s", d.Part, d.What, d.Field, d.Was, d.Is, d.by()))
	}
	want := []string{
		"input|worker.mass|as written|100 kg|101 kg|",
		"input|worker.mass|low|100 kg|101 kg|+1, +1 %",
		"input|worker.mass|value|100 kg|101 kg|+1, +1 %",
		"input|worker.mass|high|100 kg|101 kg|+1, +1 %",
		"input|worker.mass|source||measured|",
		"input|stop.time|||0.3 s|",
		"estimate|peak_force (given, M-06)|low|2000 N|1999 N|-1, -0.05 %",
		"estimate|peak_force (given, M-06)|high||2500 N|",
	}
	if diff := cmp.Diff(want, got); diff != "" {
		t.Error(diff)
	}
}
