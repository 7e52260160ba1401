package reportgen

import (
	"bytes"
	"encoding/json"
	"math"
	"slices"
	"strings"
	"testing"
	"unicode"

	"arrestcheck/arrest"
	"arrestcheck/arrest/quantity"

	"github.com/google/go-cmp/cmp"
)

func asJSON(t testing.TB, s *Sheet) string {
	t.Helper()
	var b bytes.Buffer
	if err := JSON(&b, s); err != nil {
		t.Fatal(err)
	}
	return b.String()
}

// The keys of every object, in their order. Taking one away or changing its
// place is a new format.
func TestJSONKeys(t *testing.T) {
	keys := map[string]string{
		"":               "format tool job limit_sets inputs estimates findings outcome_counts not_entered elsewhere working cautions not_checked model_runs vectors overrides sensitivity layout",
		"tool":           "version model",
		"job":            "name title site reference revision date purpose system rescue prepared_by checked_by review_date persons example sha256 subject",
		"limit_sets":     "name title jurisdiction entered_by entered_on checked_on note example sha256",
		"inputs":         "key as_written unit low value high source note open open_reason",
		"estimates":      "quantity method evidence bound unit low value high reach from outside uses allowance compared_low compared_high exhausted beyond_model position travel edge_contact strikes place_unknown",
		"findings":       "limit set group quantity sense limit_as_written limit_value authority outcome reason reasons bound demand unit ratio used",
		"reasons":        "id text",
		"outcome_counts": "exceeded undecided not_compared within",
		"elsewhere":      "quantity where",
		"working":        "method meaning corner formula terms result",
		"terms":          "symbol unit value",
		"result":         "symbol unit value",
		"cautions":       "id text",
	}
	got := make(map[string]string)
	d := json.NewDecoder(strings.NewReader(asJSON(t, fixture(t))))
	collectKeys(t, d, "", got)
	if diff := cmp.Diff(keys, got); diff != "" {
		t.Error(diff)
	}
}

// collectKeys reads one value and notes the keys of its objects under the key
// that leads to them.
func collectKeys(t *testing.T, d *json.Decoder, under string, got map[string]string) {
	t.Helper()
	token, err := d.Token()
	if err != nil {
		t.Fatal(err)
	}
	open, ok := token.(json.Delim)
	if !ok {
		return
	}
	var keys []string
	for d.More() {
		key := under
		if open == '{' {
			token, err := d.Token()
			if err != nil {
				t.Fatal(err)
			}
			key = token.(string)
			keys = append(keys, key)
		}
		collectKeys(t, d, key, got)
	}
	if _, err := d.Token(); err != nil {
		t.Fatal(err)
	}
	if open == '{' {
		got[under] = strings.Join(keys, " ")
	}
}

// What is absent is null: the high of a floor, the value of a range, a text
// that nobody entered, the ratio of a floor. Lists are never null.
func TestJSONAbsent(t *testing.T) {
	s := fixture(t)
	s.Result.Inputs[0].Band.Value = nan
	s.Assessment.NotEntered, s.Result.Warnings = nil, nil
	out := asJSON(t, s)
	for _, want := range []string{
		`"low":3419.97623,"value":3419.97623,"high":null,"reach":3500,"from":null`,
		`"low":99,"value":null,"high":101,"source":"measured"`,
		`"demand":3419.97623,"unit":"N","ratio":null`,
		`"open":true,"open_reason":"source does not settle it"`,
		`"open":false,"open_reason":null`,
		`"not_entered":[]`,
		`"site":null`,
	} {
		if !strings.Contains(out, want) {
			t.Errorf("no %s in %s", want, out)
		}
	}
	if strings.Contains(out, "[null") || strings.Count(out, "\n") != 1 || !strings.HasSuffix(out, "}\n") {
		t.Errorf("not one line: %s", out)
	}
}

// Numbers have at most 12 significant digits; infinity is no number of JSON.
func TestFigureJSON(t *testing.T) {
	for x, want := range map[float64]string{
		2630.381822429907: "2630.38182243",
		0.1 + 0.2:         "0.3",
		1e21:              "1e+21",
		math.Inf(1):       "null",
		0:                 "0",
		-1.0 / 3:          "-0.333333333333",
	} {
		got, err := json.Marshal(figure(x))
		if err != nil || string(got) != want {
			t.Errorf("%g: %s, %v, want %s", x, got, err, want)
		}
	}
	if got, _ := json.Marshal(figure(math.Copysign(0, -1))); string(got) != "0" {
		t.Errorf("-0 is %s", got)
	}
}

// User text comes back untouched, and nothing that a terminal could act on is
// in the line.
func TestJSONHostileText(t *testing.T) {
	for name, s := range hostile {
		out := asJSON(t, defile(t, s))
		for _, r := range strings.TrimSuffix(out, "\n") {
			if !unicode.IsPrint(r) {
				t.Fatalf("%s: %U", name, r)
			}
		}
		var back struct {
			Job    struct{ Title, Rescue string }
			Inputs []struct {
				AsWritten string `json:"as_written"`
			}
		}
		if err := json.Unmarshal([]byte(out), &back); err != nil {
			t.Fatalf("%s: %v", name, err)
		}
		if back.Job.Title != s || back.Job.Rescue != s || back.Inputs[0].AsWritten != s {
			t.Errorf("%s: text was changed", name)
		}
	}
	if out := asJSON(t, defile(t, "a<b&c>")); !strings.Contains(out, `"title":"a<b&c>"`) {
		t.Error("HTML is escaped")
	}
}

// JSON and text hold the same cautions.
func TestJSONCautions(t *testing.T) {
	s := fixture(t)
	var doc struct{ Cautions []jsonCaution }
	if err := json.Unmarshal([]byte(asJSON(t, s)), &doc); err != nil {
		t.Fatal(err)
	}
	var inText, inJSON []string
	for _, l := range Build(s, SIUnits).Warnings {
		inText = append(inText, strings.TrimLeft(l.Label, "! ")+" "+breakable(l.Text))
	}
	for _, c := range doc.Cautions {
		inJSON = append(inJSON, c.ID+" "+c.Text)
	}
	if diff := cmp.Diff(inText, inJSON); diff != "" || !slices.ContainsFunc(inJSON, func(s string) bool { return strings.HasPrefix(s, "S-01 ") }) {
		t.Error(diff)
	}
}

// nineDigits is the relative tolerance for figures noted with nine digits.
const nineDigits = 5e-9

// The figures that the main job must show: 100 kg, 1.8 m, 1.07 m, 0.30 s,
// worked out by hand from the formulas of M-01 to M-06.
func TestMainJobJSON(t *testing.T) {
	want := map[arrest.Quantity]float64{
		arrest.FallSpeed:             5.94171187,
		arrest.MeanForceOverDistance: 2630.38182,
		arrest.MeanForceOverTime:     2961.23563,
		arrest.ShapeRatio:            0.83295026,
		arrest.PeakForce:             3419.97623,
	}
	var doc struct {
		Estimates []struct {
			Quantity arrest.Quantity
			Evidence arrest.Evidence
			Low      float64
		}
	}
	s := worked(t, "job.toml", []byte(pieces{rest: stopIn("0.30 s ± 0 s")}.toml()))
	if err := json.Unmarshal([]byte(asJSON(t, s)), &doc); err != nil {
		t.Fatal(err)
	}
	for _, e := range doc.Estimates {
		if x, ok := want[e.Quantity]; ok && !quantity.Close(e.Low, x, nineDigits) {
			t.Errorf("%s is %v, want %v", e.Quantity, e.Low, x)
		}
		delete(want, e.Quantity)
	}
	if len(want) > 0 {
		t.Errorf("missing: %v", want)
	}
}
