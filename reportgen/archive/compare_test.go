package archive

import (
	"bytes"
	"encoding/json"
	"math"
	"slices"
	"strings"
	"testing"

	"arrestcheck/arrest"
)

func TestCompareTheSame(t *testing.T) {
	r := Of(sheet(t, "settled.toml"))
	c := Compare(&r, &r)
	if page := text(t, c.Report()); !c.Same() || !strings.Contains(page, "Nothing differs") || strings.Contains(page, "S-84") {
		t.Errorf("same %t:\n%s", c.Same(), page)
	}
}

func TestRemarks(t *testing.T) {
	in := func(source arrest.Source, low, high float64, open bool) *Input {
		return &Input{Key: "x", Source: string(source), Low: low, High: high, Open: open}
	}
	for _, c := range []struct {
		name string
		a, b *Input
		want []Remark
	}{
		{"narrower, same source", in("measured", 1, 2, false), in("measured", 1.2, 1.8, false), []Remark{Narrower}},
		{"narrower at one end", in("drawing", 1, 2, false), in("drawing", 1, 1.9, false), []Remark{Narrower}},
		{"narrower, no source", in("", 1, 2, true), in("", 1.4, 1.5, true), []Remark{Narrower}},
		{"narrower, another source", in("label", 1, 2, true), in("measured", 1.2, 1.8, false), []Remark{NowSettled}},
		{"wider", in("measured", 1, 2, false), in("measured", 0.9, 2, false), nil},
		{"narrower, but moved out", in("measured", 1, 2, false), in("measured", 1.9, 2.1, false), nil},
		{"as wide", in("measured", 1, 2, false), in("measured", 1, 2, false), nil},
		{"found inside the plan", in("plan", 1, 2, false), in("measured", 1.2, 1.3, false), []Remark{InsidePlan}},
		{"found just inside the drawing", in("drawing", 1, 2, false), in("measured", 1, 2, false), []Remark{InsidePlan}},
		{"found outside the plan", in("plan", 1, 2, false), in("measured", 2.1, 2.2, false), []Remark{BeyondPlan}},
		{"found below the assumption", in("assumed", 1, 2, true), in("measured", 0.1, 0.2, true), []Remark{BeyondPlan}},
		{"found reaching out of the plan", in("plan", 1, 2, false), in("measured", 1.9, 2.1, false), []Remark{AcrossPlan}},
		{"now open", in("plan", 1, 2, false), in("plan", 1, 2, true), []Remark{NowOpen}},
		{"only in A", in("plan", 1, 2, false), nil, []Remark{OnlyA}},
		{"only in B", nil, in("plan", 1, 2, false), []Remark{OnlyB}},
	} {
		if got := remarks(c.a, c.b); !slices.Equal(got, c.want) {
			t.Errorf("%s: %v, want %v", c.name, got, c.want)
		}
	}
}

// Two revisions: a band that became narrower, a plan that was looked at, a
// limit more, one less.
func TestCompareRevisions(t *testing.T) {
	in := read(t, "settled.toml")
	work := work(t)
	a, err := work(in)
	if err != nil {
		t.Fatal(err)
	}
	in.Job = []byte(strings.NewReplacer(
		`revision = "D"`, `revision = "E"`,
		`"84 kg ± 1 kg"`, `"84 kg ± 0.5 kg"`,
		`{ value = "0 kg .. 6 kg", source = "plan"`, `{ value = "5 kg .. 7 kg", source = "measured"`,
	).Replace(string(in.Job)))
	in.Sets[0].Data = []byte(strings.NewReplacer(`"mill-stop"`, `"mill-stop-2"`, `"6 kN"`, `"1 kN"`).Replace(string(in.Sets[0].Data)))
	b, err := work(in)
	if err != nil {
		t.Fatal(err)
	}
	ra, rb := Of(a), Of(b)
	c := Compare(&ra, &rb)
	if !slices.Equal(c.Narrowed(), []string{"worker.mass"}) {
		t.Errorf("narrowed: %v", c.Narrowed())
	}
	page := strings.Join(strings.Fields(text(t, c.Report())), " ")
	for _, want := range []string{
		"revision D", "revision E", "S-83", "S-84 Narrower under the same source: worker.mass.",
		"84 kg ± 1 kg 84 kg ± 0.5 kg", "as found: reaches", "mill-stop-2", "exceeded:",
	} {
		if !strings.Contains(page, want) {
			t.Errorf("no %q in\n%s", want, page)
		}
	}
	var out bytes.Buffer
	if err := c.JSON(&out); err != nil {
		t.Fatal(err)
	}
	var j jsonComparison
	if err := json.Unmarshal(out.Bytes(), &j); err != nil || j.Same || len(j.Inputs) != 2 || len(j.Rows) < 3 || j.Cautions[0].ID != "S-84" {
		t.Errorf("%v\n%s", err, out.Bytes())
	}
}

// Each end of a band by itself: what became narrower moved up and down. The shares
// are worked out by hand: 9/8 - 1, 1 - 10/11, 3/2 - 1, and 4/5 - 1.
func TestHowFarAFigureMoved(t *testing.T) {
	nan := math.NaN()
	e := func(low, high float64) *Estimate { return &Estimate{Low: low, High: high} }
	for _, c := range []struct {
		name string
		a, b *Estimate
		want string
	}{
		{"narrower", e(0.8, 1.1), e(0.9, 1.0), "low +12.5 %\nhigh -9.09 %"},
		{"only the high end", e(0.8, 1.0), e(0.8, 1.5), "high +50 %"},
		{"only the low end", e(1, 2), e(0.8, 2), "low -20 %"},
		{"a single figure", e(1, 1), e(1.5, 1.5), "+50 %"},
		{"a floor", e(1, nan), e(1.5, nan), "+50 %"},
		{"a ceiling", e(nan, 1), e(nan, 1.5), "+50 %"},
		{"from nothing", e(0, 0), e(1, 1), ""},
		{"only in A", e(1, 1), nil, ""},
		{"a floor became a band", e(1, nan), e(1.5, 2), "+50 %"},
	} {
		if got := (&EstimatePair{A: c.a, B: c.b}).by(); got != c.want {
			t.Errorf("%s: %q, want %q", c.name, got, c.want)
		}
	}
}

// Texts of the document that differ are shown, and a rescue method that was lost
// is named; they make no difference of the figures.
func TestTextsThatDiffer(t *testing.T) {
	side := func(rescue, checked string, persons int) *Results {
		return &Results{Job: Job{Title: "x", Rescue: rescue, CheckedBy: checked, Persons: persons}}
	}
	for _, c := range []struct {
		name string
		a, b *Results
		keys []string
		lost bool
	}{
		{"the same", side("boat", "a", 1), side("boat", "a", 1), nil, false},
		{"lost", side("boat", "a", 1), side("n/a", "a", 1), []string{"document.rescue"}, true},
		{"never there", side("none", "a", 1), side("", "a", 1), []string{"document.rescue"}, false},
		{"another", side("boat", "a", 1), side("lift", "b", 1), []string{"document.rescue", "document.checked_by"}, false},
		{"no person", side("boat", "a", 0), side("", "a", 0), []string{"document.rescue"}, false},
	} {
		compared := Compare(c.a, c.b)
		var keys []string
		for _, p := range compared.Texts {
			keys = append(keys, p.Key)
		}
		page := strings.Join(strings.Fields(text(t, compared.Report())), " ")
		if !slices.Equal(keys, c.keys) || compared.RescueLost() != c.lost || !compared.Same() ||
			strings.Contains(page, "no rescue method, was named") != c.lost {
			t.Errorf("%s: %v, lost %t\n%s", c.name, keys, compared.RescueLost(), page)
		}
	}
}
