package study

import (
	"slices"

	"arrestcheck/arrest"
	"arrestcheck/arrest/quantity"
	"arrestcheck/limits"
)

// A Zone is what a limit comes to at one point of an envelope: an outcome, or
// that there is none, as the entries cannot happen.
type Zone uint8

const (
	Impossible  Zone = iota // a job with these figures is refused (arrest.Refused)
	NotCompared             // limits.NotCompared
	Exceeded                // limits.Exceeded
	Undecided               // limits.Undecided, by the figures
	Capped                  // limits.Undecided: the figures are within, but a cap applies (an open input, a limit nobody checked ...)
	Within                  // limits.Within
)

// Zones returns the closed set, worst last but for the first two, which say
// nothing.
func Zones() []Zone { return []Zone{Impossible, NotCompared, Within, Capped, Undecided, Exceeded} }

var zoneNames = [...]string{"impossible", "not_compared", "exceeded", "undecided", "capped", "within"}

// String returns the id of the zone.
func (z Zone) String() string { return zoneNames[z] }

// worse orders zones by demand, for the side from which a boundary is given.
func (z Zone) worse() int { return slices.Index(Zones(), z) }

// caps are the reasons that keep a row from being within whatever its figures
// are; speaking are those that speak against figures
// which would be within.
var (
	caps = []limits.ReasonID{
		limits.OpenInput, limits.SeveralPersons, limits.ExampleValues,
		limits.NotChecked, limits.Superseded, limits.IsProductTest,
	}
	speaking = []limits.ReasonID{limits.DeviceExhausted, limits.BeyondModel, limits.NoAllowance}
)

// ZoneOf returns the zone of a finding. An undecided row names its main reason
// first: if that is a cap, and the model of the path says nothing against it,
// the figures alone would be within.
func ZoneOf(f *limits.Finding) Zone {
	switch f.Outcome {
	case limits.Exceeded:
		return Exceeded
	case limits.Within:
		return Within
	case limits.NotCompared:
		return NotCompared
	}
	if len(f.Reasons) == 0 || !slices.Contains(caps, f.Reasons[0].ID) {
		return Undecided
	}
	if slices.ContainsFunc(f.Reasons, func(r limits.Reason) bool { return slices.Contains(speaking, r.ID) }) {
		return Undecided
	}
	return Capped
}

// decided reports whether the figures of a row settle it, caps left aside.
func (z Zone) decided() bool { return z == Exceeded || z == Within || z == Capped }

// A trial is a job whose inputs are tried at figures that nobody entered,
// counted as settled: "if it were measured so".
type trial struct {
	repeat     *arrest.Repeat
	job        *arrest.Job // that of repeat
	sets       []limits.Set
	comparison limits.Comparison
	findings   []limits.Finding
}

func newTrial(j *arrest.Job, sets []limits.Set) *trial {
	t := &trial{repeat: arrest.NewRepeat(j), sets: sets}
	t.job = &t.repeat.Job
	return t
}

// suppose gives an input a band about x, typed in the unit of the entry: a
// printed pair of limits is read by that unit.
func (t *trial) suppose(k int, low, x, high float64) {
	in := &t.job.Inputs[k]
	unit := in.Band.Unit
	in.Band = arrest.Single(in, x)
	in.Band.Unit = unit
	in.Band.Low, in.Band.High, in.Band.Tolerance = low, high, quantity.PlusMinus
	in.Source = arrest.FromMeasured
	in.Set(&t.job.Point, x)
}

// assess compares the job as it stands with every limit; nil where it cannot
// happen. The findings hold until the next call.
func (t *trial) assess() []limits.Finding {
	if t.repeat.Refused() {
		return nil
	}
	res := t.repeat.Evaluate()
	t.findings = t.findings[:0]
	for i := range t.sets {
		for k := range t.sets[i].Limits {
			t.findings = append(t.findings, t.comparison.Compare(res, &t.sets[i], &t.sets[i].Limits[k]))
		}
	}
	return t.findings
}

// zone is what one limit of a set comes to for the job as it stands.
func (t *trial) zone(set *limits.Set, l *limits.Limit) Zone {
	if t.repeat.Refused() {
		return Impossible
	}
	f := t.comparison.Compare(t.repeat.Evaluate(), set, l)
	return ZoneOf(&f)
}
