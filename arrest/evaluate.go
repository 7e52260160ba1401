package arrest

import (
	"math"
	"slices"

	"arrestcheck/arrest/quantity"
)

// An evaluation gathers a Result.
type evaluation struct {
	job     *Job
	lo, hi  Case // every input at its low and at its high end
	res     Result
	spans   *spans
	short   *spans        // of the path with its travels shortened by the allowance, when asked for
	written Point         // at the figures as written, where they have middles
	uses    [places][]int // inputs by place

	madeOfParts bool               // the length of the layout is that of the parts
	resting     [1 << places][]int // inputs by set of places, made when first asked for
}

// Evaluate works a job out over its bands: every estimate with its ends, the
// contradictions between them, and the warnings. The working is left to
// ShowWorking. The job must be one that Impossible does not refuse. Equal jobs
// give equal results, to the last bit, on every machine.
func Evaluate(j *Job) Result {
	ev, partImpossible := estimate(j, nil, false)
	ev.runs()
	ev.layout()
	ev.warn(partImpossible)
	res := ev.res
	res.worked = ev
	return res
}

// estimate works out the estimates of a job and the contradictions between them,
// within spans where they are known already.
func estimate(j *Job, known *spans, inPart bool) (ev *evaluation, partImpossible bool) {
	ev, partImpossible = begin(j, known, inPart)
	ev.res.Estimates = make([]Estimate, 0, len(outputs)+4*(1+len(j.Ratings)))
	ev.estimates()
	return ev, partImpossible
}

// estimates makes estimates of the spans, the entries and the ratings, and
// compares them with each other.
func (ev *evaluation) estimates() {
	ev.closedForms()
	ev.entered()
	for i := range ev.job.Ratings {
		ev.rating(i)
	}
	ev.contradictions()
}

// ShowWorking adds to r, the result of j, the working line by line.
func ShowWorking(j *Job, r *Result) {
	ev := r.worked
	if ev == nil || ev.job != j {
		ev, _ = begin(j, nil, false)
	}
	ev.res.Working = nil
	ev.working()
	r.Working = ev.res.Working
}

// begin does what results and working share: the spans of all outputs.
func begin(j *Job, known *spans, inPart bool) (ev *evaluation, partImpossible bool) {
	ev = &evaluation{job: j, res: Result{Inputs: j.Inputs, Persons: j.Persons, Example: j.Example}}
	ev.lo, ev.hi = ends(j)
	ev.sortInputs()
	if l := j.Point.Layout; l != nil {
		ev.madeOfParts = j.madeOfParts(l.Length) || j.madeOfParts(l.Locking)
	}
	At(&j.Point, &ev.written)
	if ev.spans, partImpossible = known, inPart; known == nil {
		ev.spans, partImpossible = overCorners(j)
	}
	ev.assumedShape()
	return ev, partImpossible
}

// sortInputs notes which inputs each bit of rests stands for.
func (ev *evaluation) sortInputs() {
	for i := range ev.job.Inputs {
		in := &ev.job.Inputs[i]
		if in.Set == nil && in.Role != OfWorker || in.Role == OfPlace {
			continue
		}
		ev.uses[in.place()] = append(ev.uses[in.place()], i)
	}
}

// place returns the number of the bit of rests that the input stands behind.
func (in *Input) place() int {
	switch in.Role {
	case OfWorker:
		return 0
	case OfFall:
		return 1
	case OfPart:
		return 5
	case OfLayout:
		return 6
	case OfClearance:
		return 7
	}
	switch in.Key {
	case "stop.distance", "moving_load.distance":
		return 2
	case "stop.time", "moving_load.time":
		return 3
	}
	return 4
}

// restsOn lists the inputs behind a set of bits.
func (ev *evaluation) restsOn(r rests) []int {
	r &= onInputs
	if r&onFall != 0 && ev.job.Point.Layout != nil {
		r |= onLayout
	}
	if r&onLayout != 0 && ev.madeOfParts {
		r |= onParts
	}
	if ev.resting[r] == nil {
		list := make([]int, 0, len(ev.job.Inputs))
		for bit := range ev.uses {
			if r>>bit&1 == 1 {
				list = append(list, ev.uses[bit]...)
			}
		}
		ev.resting[r] = slices.Clip(list)
	}
	return ev.resting[r]
}

// allWritten reports whether every one of the inputs has a middle figure.
func (ev *evaluation) allWritten(uses []int) bool {
	for _, i := range uses {
		if !ev.job.Inputs[i].HasValue() {
			return false
		}
	}
	return true
}

// closedForms turns the spans into estimates.
func (ev *evaluation) closedForms() {
	for _, i := range ev.spans.live {
		o, s := &outputs[i], &ev.spans.of[i]
		if !s.known() {
			continue
		}
		e := Estimate{
			Quantity: o.quantity, Evidence: o.evidence, Method: o.method, Bound: o.bound,
			Low: s.low.value, Value: nan, High: s.high.value, Reach: nan,
			Uses: ev.restsOn(o.rests),
		}
		stopped := o.rests&onStop != 0
		if ev.allWritten(e.Uses) && !(stopped && ev.written.Impossible) {
			e.Value = ev.value(i)
		}
		e.Allowance, e.Harder = nan, nan
		if o.evidence == Modelled {
			ev.modelled(&e)
		}
		if o.evidence == Shape {
			e.From = ev.job.Point.Pulse.String()
		}
		if ev.job.Point.Layout != nil && !ev.laidOut(i, &e) {
			continue
		}
		if e.Bound == AtLeast {
			e.Reach, e.High = e.High, nan
		}
		ev.asTyped(&e)
		ev.res.Estimates = append(ev.res.Estimates, e)
	}
}

// asTyped restores the digits as written of what is entered and not
// calculated: the sum of the masses, and a free fall from rest.
func (ev *evaluation) asTyped(e *Estimate) {
	var b quantity.Band
	switch {
	case e.Evidence != Given:
		return
	case e.Quantity == TotalMass:
		b = ev.job.TotalMass()
	case e.Quantity == FreeFall && ev.job.Point.Layout == nil && len(e.Uses) == 1 && ev.job.Inputs[e.Uses[0]].Key == "fall.free_fall":
		b = ev.job.Inputs[e.Uses[0]].Band
		e.Method = Entered
	default:
		return
	}
	e.Low, e.Value, e.High, e.Typed = b.Low, b.Value, b.High, b.Unit
}

// TotalMass returns the sum of the masses as written, exact and rounded once;
// of several workers the lightest to the heaviest.
func (j *Job) TotalMass() quantity.Band {
	var sum quantity.Band
	first := true
	for i := range j.Inputs {
		in := &j.Inputs[i]
		if in.Role != OfWorker {
			continue
		}
		if in.Derived {
			return in.Band
		}
		if first {
			sum, first = in.Band, false
			continue
		}
		sum = quantity.Sum(sum, in.Band)
	}
	return sum
}

// entered adds the estimates that are figures of [stop] as they stand. The
// deceleration distance, which leaves out the stretch of a lifeline, is at
// most the stopping distance.
func (ev *evaluation) entered() {
	for _, i := range ev.uses[2] {
		b := &ev.job.Inputs[i].Band
		ev.add(StoppingDistance, Between, b, i)
		if !ev.job.Moving() {
			ev.add(DecelerationDistance, AtMost, b, i)
		}
	}
	for _, i := range ev.uses[3] {
		ev.add(StoppingTime, Between, &ev.job.Inputs[i].Band, i)
	}
	if ev.job.Point.Layout == nil {
		return
	}
	for i := range ev.job.Inputs {
		switch in := &ev.job.Inputs[i]; in.Key {
		case "fall.free_fall":
			ev.add(FreeFall, Between, &in.Band, i) // beside that of the layout
		case DecelerationItem:
			ev.add(DecelerationDistance, Between, &in.Band, i)
		}
	}
}

func (ev *evaluation) add(q Quantity, bound Bound, b *quantity.Band, input int) {
	e := Estimate{
		Quantity: q, Evidence: Given, Method: Entered, Bound: bound,
		Low: b.Low, Value: b.Value, High: b.High, Reach: nan, Allowance: nan, Harder: nan,
		Typed: b.Unit, Uses: []int{input},
	}
	if bound == AtMost {
		e.Low, e.Value = nan, nan
	}
	ev.res.Estimates = append(ev.res.Estimates, e)
}

// estimate returns the index of the first estimate of a quantity by an
// evidence, or -1.
func (r *Result) estimate(q Quantity, e Evidence) int {
	for i := range r.Estimates {
		if r.Estimates[i].Quantity == q && r.Estimates[i].Evidence == e {
			return i
		}
	}
	return -1
}

// contradictions compares all pairs of unconditional estimates of a quantity.
func (ev *evaluation) contradictions() {
	es := ev.res.Estimates
	for a := range es {
		for b := a + 1; b < len(es); b++ {
			if es[a].Quantity != es[b].Quantity || sameEntry(&es[a], &es[b]) || es[a].silent() || es[b].silent() {
				continue
			}
			whole := apart(&es[a], &es[b])
			part := es[a].Reach > ceiling(&es[b]) || es[b].Reach > ceiling(&es[a])
			if whole || part {
				ev.res.Contradictions = append(ev.res.Contradictions, Contradiction{a, b, !whole})
			}
		}
	}
}

// sameEntry reports whether both are of the entries themselves, which are one
// account of the stop; but a free fall as typed and one of the layout are two.
func sameEntry(a, b *Estimate) bool {
	return a.Evidence == Given && b.Evidence == Given && a.Quantity != FreeFall
}

// silent reports whether the estimate has no say in a contradiction.
func (e *Estimate) silent() bool { return e.Conditional() || e.Outside }

// apart reports whether nothing lies in both estimates, a modelled one widened
// by its allowance. NaN ends are open.
func apart(a, b *Estimate) bool {
	lowA, _ := a.Ends()
	lowB, _ := b.Ends()
	return lowA > ceiling(b) || lowB > ceiling(a)
}

// ceiling is the upper end of an estimate, +Inf for a floor.
func ceiling(e *Estimate) float64 {
	if _, high := e.Ends(); !math.IsNaN(high) {
		return high
	}
	return math.Inf(1)
}
