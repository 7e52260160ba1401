package limits

import (
	"testing"

	"arrestcheck/arrest"
	"arrestcheck/arrest/quantity"
)

// The rows of each case stand in the order in which they are to be named: the
// worst row is the first whichever way they are entered, and without it the
// second, and so on.
func TestWorstRow(t *testing.T) {
	type entry struct {
		name     string
		quantity arrest.Quantity
		text     string
	}
	// Every quantity of this job has one estimate of its own.
	res := result(
		floor(arrest.PeakForce, 3420, 3500),
		between(arrest.FreeFall, 3.5, 3.6),
		between(arrest.TotalMass, 100, 100),
		between(arrest.ClearanceLeft, -0.3, -0.2),
		between(arrest.AnchorStrengthPerPerson, 5000, 6000),
		ceiling(arrest.DecelerationDistance, 1.2),
		between(arrest.MeanForceOverTime, 2000, 3000),
		outside(arrest.AbsorberTravel, "label A"),
		between(arrest.SwingAngle, 0, 0),
		floor(arrest.AnchorForce, 6000, inf),
	)
	order := []entry{
		{"exceeded, open above, 3.42 times", arrest.PeakForce, "1 kN"},
		{"exceeded, open above, 1.006 times", arrest.PeakForce, "3.4 kN"},
		{"exceeded, beyond nothing", arrest.ClearanceLeft, "0 m"},
		{"exceeded, 2 times", arrest.FreeFall, "1.8 m"},
		{"exceeded, strength short 1.6 times", arrest.AnchorStrengthPerPerson, "8 kN"},
		{"exceeded, 1.25 times", arrest.TotalMass, "80 kg"},
		{"undecided, open above, 0.75 times", arrest.AnchorForce, "8 kN"},
		{"undecided, open above, 0.43 times", arrest.PeakForce, "8 kN"},
		{"undecided, no figure", arrest.AbsorberTravel, "1.2 m"},
		{"undecided, 1.2 times", arrest.MeanForceOverTime, "2.5 kN"},
		{"undecided, 1.12 times", arrest.DecelerationDistance, "1.07 m"},
		{"not compared", arrest.OffsetAngle, "30 deg"},
		{"within, 1 time", arrest.TotalMass, "100 kg"},
		{"within, 0.9 times", arrest.FreeFall, "4 m"},
		{"within, nothing against nothing", arrest.SwingAngle, "0 deg"},
	}
	for first := range order {
		var forth, back []Limit
		for _, e := range order[first:] {
			l := limit(t, e.quantity, e.text)
			l.ID = e.name
			forth = append(forth, l)
			back = append([]Limit{l}, back...)
		}
		for _, list := range [][]Limit{forth, back} {
			a := Assess(res, []Set{{Limits: list}}, nil)
			if got := a.Findings[a.WorstRow()].Limit.ID; got != order[first].name {
				t.Errorf("worst row %q, want %q", got, order[first].name)
			}
		}
	}
}

func TestWorstRowOfNone(t *testing.T) {
	a := Assess(result(), nil, nil)
	if got := a.WorstRow(); got != -1 {
		t.Errorf("worst row %d of no rows", got)
	}
}

// Of equal rows the first as entered.
func TestWorstRowOfEqualOnes(t *testing.T) {
	l := limit(t, arrest.PeakForce, "8 kN")
	a := Assess(result(between(arrest.PeakForce, 9000, 9000)), []Set{{Limits: []Limit{l, l}}}, nil)
	if got := a.WorstRow(); got != 0 {
		t.Errorf("worst row %d of two equal ones", got)
	}
}

// Not compared but beyond the figure comes before merely not compared.
func TestWorstRowAlsoBeyond(t *testing.T) {
	heavy := limit(t, arrest.PeakForce, "10 kN")
	heavy.TotalMassAtMost = bandAt(t, quantity.Mass, "80 kg")
	beyond := limit(t, arrest.FreeFall, "1.7 m")
	beyond.TotalMassAtMost = heavy.TotalMassAtMost
	res := result(floor(arrest.PeakForce, 9000, inf), between(arrest.FreeFall, 1.8, 1.8), between(arrest.TotalMass, 100, 100))
	a := Assess(res, []Set{{Limits: []Limit{heavy, beyond}}}, nil)
	if got := a.WorstRow(); got != 1 {
		t.Errorf("worst row %d: %v", got, a.Findings)
	}
}

// A row stands for its group: an exceeded row of a group that another row put
// within is not the worst of the job, and a group speaks through a row that
// came to what the group came to.
func TestWorstRowOfGroups(t *testing.T) {
	cases := []struct {
		groups []string
		want   int
	}{
		{[]string{"XW", "U"}, 2},
		{[]string{"XW", "W"}, 1},
		{[]string{"XU", "N"}, 1},
		{[]string{"NX", "N"}, 1}, // undecided together, and no row of it is
		{[]string{"W", "NX", "X"}, 3},
		{[]string{"W", "XX"}, 1},
	}
	for _, c := range cases {
		var all []Limit
		var res *arrest.Result
		for n, letters := range c.groups {
			r, list := rows(t, letters)
			for i := range list {
				list[i].AnyOf = string(rune('a' + n))
			}
			res, all = r, append(all, list...)
		}
		a := Assess(res, []Set{{Limits: all}}, nil)
		if got := a.WorstRow(); got != c.want {
			t.Errorf("%v: worst row %d, want %d", c.groups, got, c.want)
		}
	}
}
