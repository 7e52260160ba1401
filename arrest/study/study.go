// Package study asks one job many questions: how a result moves with one or
// two inputs, where it meets a limit, over which figures a limit is kept, and
// which input is worth measuring.
//
// The usual calls are Sweep, Solve, Envelop and Rank. Each evaluates the same pure
// function as a single check, and every figure it gives is that of a single
// check of the job with the inputs in question replaced, to the last bit; Check
// and Working repeat any point as such a check.
//
// Where a job is to be checked once, package arrest is the way. A study holds no
// sentence and no limit: it gives figures, ids and the limits of the caller.
//
// The package is pure but for the goroutines it works on: any number of workers
// gives the same result to the last bit. A context ends a study early; what has
// been worked out by then is thrown away.
//
// What is not promised: a study looks at points and follows what it sees
// between them. Something narrower than the distance of two points, with the
// same on either side, can be missed; each function says how close they lie.
package study

import (
	"slices"
	"strings"

	"arrestcheck/arrest"
	"arrestcheck/limits"
)

// A Move puts one exact figure, SI, in the place of an input.
type Move struct {
	Key string // Input.Key
	To  float64
}

// A RefusalID names why a study is refused.
type RefusalID string

const (
	UnknownKey   RefusalID = "unknown_key"   // the job has no such input; Have lists those that can be moved
	NotMoved     RefusalID = "not_moved"     // an input that no formula reads, as a figure of a document
	Twice        RefusalID = "twice"         // one input is asked for twice
	OutOfRange   RefusalID = "out_of_range"  // SI: a figure the input cannot have
	EmptyRange   RefusalID = "empty_range"   // SI: low end of a range that is not below its high end
	NotRising    RefusalID = "not_rising"    // SI: a figure of an axis that is not above the one before it
	TooFewPoints RefusalID = "too_few"       // SI: how many points were asked for
	TooMany      RefusalID = "too_many"      // SI: how many points were asked for
	TooClose     RefusalID = "too_close"     // SI: how many points were asked for; 12 digits cannot tell them apart
	NoAxes       RefusalID = "no_axes"       // SI: how many inputs are to be moved; one or two can be
	NothingAsked RefusalID = "nothing_asked" // no quantity, limit or target was named
	NotComputed  RefusalID = "not_computed"  // the job gives no estimate of Quantity
	NeedsEnd     RefusalID = "needs_end"     // Quantity has neither a middle figure here nor a better side: say which end is to meet the target
	NoSuchRow    RefusalID = "no_such_row"   // SI: the index asked for
	NoBand       RefusalID = "no_band"       // nothing leads the row: no figure to rank inputs by
	NoMotion     RefusalID = "no_motion"     // the entries cannot happen at all
)

// A Refusal is an error in what was asked of a study.
type Refusal struct {
	ID       RefusalID
	Key      string
	Quantity arrest.Quantity
	SI       float64
	Have     []string
}

// Error names the refusal; the sentence for a reader is the caller's.
func (r *Refusal) Error() string {
	text := "study: " + strings.ReplaceAll(string(r.ID), "_", " ")
	if r.Key != "" {
		text += ": " + r.Key
	}
	if r.Quantity != "" {
		text += ": " + string(r.Quantity)
	}
	if len(r.Have) > 0 {
		text += "; known: " + strings.Join(r.Have, ", ")
	}
	return text
}

// Movable returns the keys of the inputs that a study can move, in the order
// of the job.
func Movable(j *arrest.Job) []string {
	var keys []string
	for i := range j.Inputs {
		if j.Inputs[i].Set != nil {
			keys = append(keys, j.Inputs[i].Key)
		}
	}
	return keys
}

// find returns the index of an input that can be moved.
func find(j *arrest.Job, key string) (int, error) {
	for i := range j.Inputs {
		if j.Inputs[i].Key != key {
			continue
		}
		if j.Inputs[i].Set == nil {
			return 0, &Refusal{ID: NotMoved, Key: key, Have: Movable(j)}
		}
		return i, nil
	}
	return 0, &Refusal{ID: UnknownKey, Key: key, Have: Movable(j)}
}

// Substitute returns j with single figures in the place of some inputs, as a
// user would type them, without a tolerance. Source and note stay those of the
// input; what the reader of the file noted about the figure it replaces goes.
// j stays as it is. The error is a *Refusal.
func Substitute(j *arrest.Job, moves ...Move) (arrest.Job, error) {
	to := *j
	to.Inputs, to.Notes = slices.Clone(j.Inputs), slices.Clone(j.Notes)
	for i, m := range moves {
		k, err := find(j, m.Key)
		if err != nil {
			return arrest.Job{}, err
		}
		in := &to.Inputs[k]
		if !possible(in, m.To) {
			return arrest.Job{}, &Refusal{ID: OutOfRange, Key: m.Key, SI: m.To}
		}
		for _, other := range moves[:i] {
			if other.Key == m.Key {
				return arrest.Job{}, &Refusal{ID: Twice, Key: m.Key}
			}
		}
		in.Band = arrest.Single(in, m.To)
		in.Set(&to.Point, m.To)
		to.Notes = slices.DeleteFunc(to.Notes, func(w arrest.Warning) bool {
			return w.ID == arrest.Unusual && len(w.Args) > 0 && w.Args[0].Text == m.Key
		})
	}
	return to, nil
}

// Check evaluates j with some inputs replaced and compares it with the sets:
// what a single check of that job gives. It reports false where nothing the
// entries allow can happen (arrest.Refused); there is no result then.
func Check(j *arrest.Job, sets []limits.Set, moves ...Move) (res arrest.Result, a limits.Assessment, can bool, err error) {
	to, err := Substitute(j, moves...)
	if err != nil {
		return res, a, false, err
	}
	if arrest.Refused(&to) {
		return res, a, false, nil
	}
	res = arrest.Evaluate(&to)
	return res, limits.Assess(&res, sets, nil), true, nil
}

// Working is Check without limits, with the working line by line.
func Working(j *arrest.Job, moves ...Move) (res arrest.Result, can bool, err error) {
	to, err := Substitute(j, moves...)
	if err != nil {
		return res, false, err
	}
	if arrest.Refused(&to) {
		return res, false, nil
	}
	res = arrest.Evaluate(&to)
	arrest.ShowWorking(&to, &res)
	return res, true, nil
}
