package arrest

import "math/bits"

// A Repeat works one job out again and again while the figures of its inputs
// are changed: studies ask some hundred times for one row. It keeps its memory,
// which takes longer to get than the figures do.
//
// It is not safe for concurrent use.
type Repeat struct {
	// Job is its own copy. Between two calls the bands of the inputs, their
	// sources and the figures of the point may be changed, and nothing else.
	Job Job

	ev     evaluation
	spans  spans
	corner Case
	laid   *spans // of a layout, worked out by Refused for the next Evaluate

	laidInPart bool
	at         Point
}

// NewRepeat prepares a Repeat of j.
func NewRepeat(j *Job) *Repeat {
	r := &Repeat{Job: *j}
	r.Job.Inputs = append([]Input(nil), j.Inputs...)
	r.spans = *newSpans(&r.Job)
	r.ev = evaluation{job: &r.Job, spans: &r.spans}
	r.ev.sortInputs()
	return r
}

// Refused reports whether no result can be had of these bands, as the function
// Refused does. Evaluate must not be asked then; else it is to be asked of the
// same figures.
func (r *Repeat) Refused() bool {
	if _, position := LayoutFault(&r.Job); position >= 0 {
		return true
	}
	if !bothGiven(&r.Job) {
		return false
	}
	if r.Job.Point.Layout != nil {
		r.laid, r.laidInPart = overCorners(&r.Job)
		_, never := impossibleWithin(&r.Job, r.laid)
		if never {
			r.laid = nil
		}
		return never
	}
	r.restart()
	_, never := beyondReach(&r.ev.lo, &r.ev.hi, &r.at)
	return never
}

// Evaluate works the job out as it stands. Estimates and contradictions are
// those of the function Evaluate, to the last bit; warnings and runs are left
// out. The result holds until the next call.
//
// A connector path and a layout are worked out anew: there the points take the
// time.
func (r *Repeat) Evaluate() *Result {
	if r.Job.Point.Path != nil || r.Job.Point.Layout != nil {
		ev, _ := estimate(&r.Job, r.laid, r.laidInPart)
		r.laid = nil
		r.ev.res = ev.res
		r.ev.res.Warnings = nil
		return &r.ev.res
	}
	ev := &r.ev
	ev.res = Result{
		Inputs: r.Job.Inputs, Persons: r.Job.Persons, Example: r.Job.Example,
		Estimates: ev.res.Estimates[:0], Contradictions: ev.res.Contradictions[:0], Warnings: ev.res.Warnings[:0],
	}
	r.restart()
	At(&r.Job.Point, &ev.written)
	r.overCorners()
	ev.assumedShape()
	ev.estimates()
	ev.res.Warnings = ev.res.Warnings[:0]
	return &ev.res
}

// restart forgets all spans and sees anew which inputs have two ends.
func (r *Repeat) restart() {
	s, lo, hi := &r.spans, &r.ev.lo, &r.ev.hi
	for _, i := range s.live {
		s.of[i].forget()
	}
	*lo, *hi = r.Job.Point, r.Job.Point
	s.free, s.beside = s.free[:0], s.beside[:0]
	for i := range r.Job.Inputs {
		in := &r.Job.Inputs[i]
		if in.Set == nil {
			continue
		}
		in.Set(lo, in.Band.Low)
		in.Set(hi, in.Band.High)
		if in.Band.High > in.Band.Low {
			s.free = append(s.free, in)
		}
	}
	s.base = *lo
}

// overCorners is the function of that name, with one input changed from each
// corner to the next.
func (r *Repeat) overCorners() {
	s := &r.spans
	partImpossible := false
	r.corner = s.base
	for n := uint(0); ; n++ {
		gray := n ^ n>>1
		At(&r.corner, &r.at)
		s.take(&r.at, int(gray), s.live)
		partImpossible = partImpossible || r.at.Impossible
		bit := bits.TrailingZeros(n + 1)
		if bit >= len(s.free) {
			break
		}
		in := s.free[bit]
		end := in.Band.High
		if gray>>bit&1 == 1 {
			end = in.Band.Low
		}
		in.Set(&r.corner, end)
	}
	s.overTurns(&r.Job, partImpossible)
}
