package archive

import (
	"bytes"
	"encoding/json"
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
