package archive

import (
	"encoding/json"
	"errors"
	"maps"
	"os"
	"slices"
	"strings"
	"testing"

	"github.com/google/go-cmp/cmp"
)

// What is read from the JSON of a sheet is what is taken from the sheet: two
// routes to the same results, for every job there is.
func TestResultsOfASheetAndOfItsJSON(t *testing.T) {
	for _, name := range jobNames(t) {
		s := sheet(t, name)
		want, err := ReadResults(jsonOf(t, s))
		if err != nil {
			t.Fatal(name, err)
		}
		got := Of(s)
		if diff := cmp.Diff(want, got, absent); diff != "" {
			t.Errorf("%s (- JSON, + sheet):\n%s", name, diff)
		}
		if want.Digest() != got.Digest() {
			t.Errorf("%s: two digests", name)
		}
		if len(Differences(&want, &got)) > 0 || !Compare(&want, &got).Same() {
			t.Errorf("%s: differs from itself", name)
		}
	}
}

// old is a result as the first version of the program wrote it, cut down to one
// of each. Later versions added keys; these stay readable without them.
const old = `{"format":"arrestcheck result 1","tool":{"version":"0.1.0","model":"1"},` +
	`"job":{"name":"job.toml","title":"Lamp change","site":null,"reference":"RT-0417","revision":"B","date":null,"purpose":null,"system":null,` +
	`"rescue":null,"prepared_by":"planner","checked_by":null,"persons":1,"example":false,"sha256":"ab"},"limit_sets":[],` +
	`"inputs":[{"key":"worker.mass","as_written":"100 kg ± 0 kg","unit":"kg","low":100,"value":100,"high":100,"source":"measured","note":null,"open":false,"open_reason":null}],` +
	`"estimates":[{"quantity":"peak_force","method":"M-06","evidence":"given","bound":"at least","unit":"N","low":3419.97622956,"value":3419.97622956,"high":null,"reach":3419.97622956,"from":null,"outside":false,"uses":["worker.mass"]}],` +
	`"findings":[{"limit":"peak-8","set":null,"group":null,"quantity":"peak_force","sense":"at_most","limit_as_written":"8 kN","limit_value":8000,"authority":"rule 4","outcome":"undecided","reason":"only_floor","reasons":[{"id":"only_floor","text":"x"}],"bound":"at least","demand":3419.97622956,"unit":"N","ratio":null,"used":[0]}],` +
	`"outcome_counts":{"exceeded":0,"undecided":1,"not_compared":0,"within":0},"not_entered":["mass"],"elsewhere":[],"working":[],"cautions":[],"not_checked":[]}`

func TestOldResultsStayReadable(t *testing.T) {
	r, err := ReadResults([]byte(old))
	if err != nil {
		t.Fatal(err)
	}
	nan := orNaN(nil)
	want := Results{
		Tool: "0.1.0", Model: "1",
		Job:    Job{Name: "job.toml", Title: "Lamp change", Reference: "RT-0417", Revision: "B", PreparedBy: "planner", Persons: 1, SHA256: "ab"},
		Inputs: []Input{{"worker.mass", "100 kg ± 0 kg", "kg", "measured", 100, 100, 100, false}},
		Estimates: []Estimate{{Quantity: "peak_force", Evidence: "given", Method: "M-06", Unit: "N", Bound: "at least",
			Low: 3419.97622956, Value: 3419.97622956, High: nan, Reach: 3419.97622956, Allowance: nan, ComparedLow: nan, ComparedHigh: nan}},
		Findings: []Finding{{Limit: "peak-8", LimitAsWritten: "8 kN", Authority: "rule 4", Unit: "N", Quantity: "peak_force", Sense: "at_most",
			LimitSI: 8000, Outcome: "undecided", Reasons: []string{"only_floor"}, Bound: "at least", Demand: 3419.97622956, Ratio: nan}},
		Counts: Counts{Undecided: 1}, NotEntered: []string{"mass"},
	}
	if diff := cmp.Diff(want, r, absent); diff != "" {
		t.Error(diff)
	}
}

func TestNoResults(t *testing.T) {
	for name, data := range map[string]string{
		"empty":             "",
		"no JSON":           "a",
		"a list":            "[]",
		"no format":         "{}",
		"another version":   strings.Replace(old, "result 1", "result 2", 1),
		"a job":             strings.Replace(old, "arrestcheck result 1", "arrestcheck job 1", 1),
		"two documents":     old + old,
		"a text for a mass": strings.Replace(old, `"low":100`, `"low":"100"`, 1),
		"cut short":         old[:len(old)-1],
	} {
		if _, err := ReadResults([]byte(data)); !errors.Is(err, ErrFormat) {
			t.Errorf("%s: %v", name, err)
		}
	}
}

// A file that calls itself a result and holds none would be compared with
// another such without a difference.
func TestHalfResults(t *testing.T) {
	whole := map[string]any{}
	if err := json.Unmarshal([]byte(old), &whole); err != nil {
		t.Fatal(err)
	}
	for _, key := range []string{"tool", "job", "inputs", "estimates", "findings", "outcome_counts"} {
		for _, value := range []any{nil, map[string]any{}} {
			if _, isList := whole[key].([]any); isList && value != nil {
				value = []any{}
			}
			half := maps.Clone(whole)
			half[key] = value
			data, err := json.Marshal(half)
			if err != nil {
				t.Fatal(err)
			}
			_, err = ReadResults(data)
			// Lists of what came out may be empty, and so may counts: of a job without limits.
			if may := value != nil && slices.Contains([]string{"estimates", "findings", "outcome_counts"}, key); may != (err == nil) {
				t.Errorf("%s %v: %v", key, value, err)
			}
			if err != nil && (!errors.Is(err, ErrNotWhole) || !strings.Contains(err.Error(), key)) {
				t.Errorf("%s %v: %v", key, value, err)
			}
		}
	}
	if _, err := ReadResults([]byte(`{"format":"arrestcheck result 1"}`)); !errors.Is(err, ErrNotWhole) {
		t.Errorf("nothing but the format: %v", err)
	}
}

func FuzzReadResults(f *testing.F) {
	f.Add([]byte(old))
	golden, err := os.ReadFile("../../testdata/golden/two-persons.json")
	if err != nil {
		f.Fatal(err)
	}
	f.Add(golden)
	f.Fuzz(func(t *testing.T, data []byte) {
		r, err := ReadResults(data)
		if err != nil {
			return
		}
		r.Digest()
		text(t, Compare(&r, &r).Report())
		if d := Differences(&r, &r); len(d) > 0 {
			t.Errorf("differs from itself: %v", d)
		}
	})
}
