package reportgen

import (
	"strings"
	"testing"

	"arrestcheck/limits"
)

// grouped is a sheet whose first two limits are one any_of group, with a third
// row that stands alone. The outcomes are put in by hand.
func grouped(t *testing.T, group limits.Outcome, rows ...limits.Outcome) *Sheet {
	t.Helper()
	s := fixture(t)
	one := s.Assessment.Findings[0]
	s.Assessment.Findings, s.Assessment.Groups = nil, []limits.Group{{AnyOf: "either \"one\"", Authority: "site rule 4", Outcome: group}}
	for i, o := range rows {
		f, l := one, *one.Limit
		l.AnyOf, f.Limit, f.Outcome = "either \"one\"", &l, o
		s.Assessment.Findings = append(s.Assessment.Findings, f)
		s.Assessment.Groups[0].Rows = append(s.Assessment.Groups[0].Rows, i)
	}
	return s
}

// A row that stands worse than its group is named below the counts, and one
// that is exceeded is put in words too.
func TestInsideAGroup(t *testing.T) {
	const in = "Inside the group \"either \"one\"\" "
	for _, c := range []struct {
		group  limits.Outcome
		rows   []limits.Outcome
		inside string
		words  string // of the exceeded row, where another is the worst
	}{
		{limits.Within, []limits.Outcome{limits.Within, limits.Exceeded}, in + "row 1 is exceeded; by its rule one row within is enough.", "exceeded in row 1, "},
		{limits.Within, []limits.Outcome{limits.Within, limits.Exceeded, limits.Exceeded, limits.Undecided}, in + "rows 1 and 2 are exceeded and row 3 is undecided; by its rule one row within is enough.", "exceeded in row 2, "},
		{limits.Within, []limits.Outcome{limits.Undecided, limits.Within}, in + "row 1 is undecided; by its rule one row within is enough.", ""},
		{limits.Undecided, []limits.Outcome{limits.NotCompared, limits.Exceeded}, in + "row 1 is exceeded and row 2 is not compared; by its rule one row within is enough, and none is.", "exceeded in row 1, "},
		{limits.Within, []limits.Outcome{limits.Within, limits.Within}, "", ""},
		{limits.Exceeded, []limits.Outcome{limits.Exceeded, limits.Exceeded}, "", ""},
	} {
		b := newBuilder(grouped(t, c.group, c.rows...), SIUnits)
		list := b.coverage()
		switch {
		case c.inside == "" && list[1].Label == insideLabel:
			t.Errorf("%v: %q", c.rows, list[1].Text)
		case c.inside != "" && (list[1].Label != insideLabel || list[1].Text != c.inside || list[1].Loud != (c.words != "")):
			t.Errorf("%v: %+v, want %q", c.rows, list[1], c.inside)
		}
		worst := b.worst()
		last := worst[len(worst)-1]
		if c.words != "" && (!last.Loud || !strings.HasPrefix(last.Text, c.words)) {
			t.Errorf("%v: worst rows %+v", c.rows, worst)
		}
		if c.words == "" && len(worst) != 1 {
			t.Errorf("%v: worst rows %+v", c.rows, worst)
		}
	}
}

// What stands beside an exceeded row is not called its reason.
func TestReasonOfAnExceededRow(t *testing.T) {
	s := fixture(t)
	f := &s.Assessment.Findings[0]
	b := newBuilder(s, SIUnits)
	if got := b.rowInWords(0); !strings.Contains(got, " Reason: only a floor") {
		t.Error(got)
	}
	f.Outcome = limits.Exceeded
	if got := b.rowInWords(0); strings.Contains(got, "Reason") || !strings.Contains(got, " Beside it stands: only a floor") {
		t.Error(got)
	}
}

// A device that is used up, or may be within the allowance, stands above the
// counts (S-35, S-53). The absorber needs 0.4346 m by the model, and 0.4346 m
// times 1.25 is more than 0.45 m.
func TestUsedUpStandsAboveTheCounts(t *testing.T) {
	for travel, want := range map[string]string{
		"0.40 m": `EXHAUSTED the travel of "tear absorber" is used up before the body is at rest (S-35).`,
		"0.45 m": `NEARLY EXHAUSTED the travel of "tear absorber" may be used up within the allowance (S-53).`,
		"1.75 m": "",
	} {
		s := pathSheet(t, tailRope+tearAbsorber(travel)+quarter+peakLimit)
		out := strings.Join(strings.Fields(asText(t, s, BothUnits, TextOptions{})), " ")
		above, _, _ := strings.Cut(out, " in all: ")
		if want == "" && strings.Contains(above, "EXHAUSTED") || !strings.Contains(above, want) {
			t.Errorf("%s: %s", travel, above)
		}
	}
}
