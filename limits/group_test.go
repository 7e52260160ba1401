package limits

import (
	"slices"
	"testing"

	"arrestcheck/arrest"
)

// rows builds one limit for each letter on a result that makes it come to that
// outcome: X exceeded, U undecided, N not compared, W within.
func rows(t *testing.T, letters string) (*arrest.Result, []Limit) {
	t.Helper()
	text := map[rune]string{'X': "2 kN", 'U': "4 kN", 'W': "6 kN", 'N': "6 kN"}
	var list []Limit
	for _, c := range letters {
		q := arrest.PeakForce
		if c == 'N' {
			q = arrest.AnchorForce
		}
		l := limit(t, q, text[c])
		l.AnyOf = "either"
		list = append(list, l)
	}
	return result(between(arrest.PeakForce, 3000, 5000)), list
}

func TestGroupOutcome(t *testing.T) {
	cases := map[string]Outcome{
		"X": Exceeded, "U": Undecided, "N": NotCompared, "W": Within,
		"XX": Exceeded, "XU": Undecided, "XN": Undecided, "XW": Within,
		"UU": Undecided, "UN": Undecided, "UW": Within,
		"NN": NotCompared, "NW": Within, "WW": Within,
		"XXX": Exceeded, "XXN": Undecided, "NXX": Undecided, "XXW": Within, "UNX": Undecided, "NNU": Undecided, "NUW": Within,
	}
	for letters, want := range cases {
		for range letters { // in every rotation: the order of the rows says nothing
			letters = letters[1:] + letters[:1]
			res, list := rows(t, letters)
			a := Assess(res, []Set{{Limits: list}}, nil)
			if len(a.Groups) != 1 || a.Groups[0].Outcome != want || len(a.Groups[0].Rows) != len(letters) {
				t.Errorf("%s: %+v, want one group, %s", letters, a.Groups, want)
				continue
			}
			if n := a.Counts(); n[want] != 1 || len(n) != 1 {
				t.Errorf("%s counts as %v", letters, n)
			}
			if a.Exceeded() != (want == Exceeded) {
				t.Errorf("%s: Exceeded() = %v", letters, a.Exceeded())
			}
		}
	}
}

// Rows form a group within one set, one authority and one any_of only.
func TestWhatFormsAGroup(t *testing.T) {
	res, list := rows(t, "XWXWXWXW")
	list[2].AnyOf, list[3].AnyOf = "", ""                      // single rows
	list[4].AnyOf, list[5].AnyOf = "other", "other"            // another group
	list[6].Authority, list[7].Authority = "rule 4", "rule  4" // spelled differently: two rules
	_, more := rows(t, "XX")                                   // another set: no file softens another
	a := Assess(res, []Set{{Limits: list}, {Limits: more}}, nil)

	want := []struct {
		rows    []int
		outcome Outcome
	}{
		{[]int{0, 1}, Within},
		{[]int{2}, Exceeded},
		{[]int{3}, Within},
		{[]int{4, 5}, Within},
		{[]int{6}, Exceeded},
		{[]int{7}, Within},
		{[]int{8, 9}, Exceeded},
	}
	if len(a.Groups) != len(want) {
		t.Fatalf("%d groups, want %d: %+v", len(a.Groups), len(want), a.Groups)
	}
	for i, w := range want {
		g := a.Groups[i]
		if !slices.Equal(g.Rows, w.rows) || g.Outcome != w.outcome || g.Authority != a.Findings[w.rows[0]].Limit.Authority {
			t.Errorf("group %d: %+v, want %v %s", i, g, w.rows, w.outcome)
		}
	}
	n := a.Counts()
	if n[Exceeded] != 3 || n[Within] != 4 || n[Undecided]+n[NotCompared] != 0 {
		t.Errorf("counts %v", n)
	}
}

// Settled is the ground of the one exit code that could be taken for a good
// word: nothing may be missing.
func TestSettled(t *testing.T) {
	everywhere := []Elsewhere{
		{Quantity: arrest.PeakForce}, {Quantity: arrest.FreeFall}, {Quantity: arrest.ClearanceLeft},
		{Quantity: arrest.AnchorForce}, {Quantity: arrest.TotalMass},
	}
	cases := []struct {
		name      string
		letters   string
		elsewhere []Elsewhere
		want      bool
	}{
		{"all within, all covered", "WW", everywhere, true},
		{"a subject left out", "WW", everywhere[:4], false},
		{"one undecided", "WU", everywhere, false},
		{"one not compared", "NW", everywhere, false},
		{"one exceeded", "XW", everywhere, false},
		{"no limit at all", "", everywhere, false},
		{"nothing at all", "", nil, false},
	}
	for _, c := range cases {
		res, list := rows(t, c.letters)
		for i := range list {
			list[i].AnyOf = ""
		}
		a := Assess(res, []Set{{Limits: list}}, c.elsewhere)
		if a.Settled() != c.want {
			t.Errorf("%s: Settled() = %v", c.name, a.Settled())
		}
	}
}
