package arrest

import (
	"math"
	"math/bits"
	"slices"

	"arrestcheck/arrest/quantity"
)

// Ends are the figures of one estimate at one point of a Scan, SI; NaN stands
// for what is absent, as in Estimate.
type Ends struct{ Low, Value, High, Reach float64 }

// A Sought names what a Scan works out: the estimate of a quantity by an
// evidence, or, where Of is not nil, a function of the case and of what At
// says about it but for the run of a connector path. Of must be monotone in
// every input, so that its ends lie at corners; its NaN counts as not known.
type Sought struct {
	Quantity Quantity
	Evidence Evidence
	Of       func(*Case, *Point) float64
}

// A Scan works out chosen estimates of one job again and again while some of
// its inputs are moved to single figures and the others keep their bands. Its
// figures are those of Evaluate, to the last bit, on the job with the bands of
// these inputs replaced (see Single).
//
// A Scan works on its own copy of the job and allocates nothing once it is
// made, but where distance and time are both given over bands of which a part
// cannot happen, or where the total mass is sought and a mass is moved. It is
// not safe for concurrent use.
type Scan struct {
	job   Job
	moved []int    // indexes into job.Inputs
	free  []*Input // not moved, and wider than one figure
	tasks []task

	both      bool // distance and time are both given
	exact     bool // one point says it all
	wantFloor bool
	wantMass  bool

	lo, hi, written, corner Case
	at, middle              Point
}

// A task is one thing sought.
type task struct {
	output  func(*Point) float64
	measure func(*Case, *Point) float64 // in the place of output where not nil
	bound   Bound
	stopped bool // hangs on distance or time
	floor   bool // has a turning point of its own (M-06)
	mass    bool // the sum of the masses as written
	middle  bool // every input it rests on has a middle figure
	number  int  // index into outputs, or -1
}

func (t *task) of(c *Case, p *Point) float64 {
	if t.measure != nil {
		return t.measure(c, p)
	}
	return t.output(p)
}

// NewScan prepares a Scan of j in which the inputs with the indexes moved are
// replaced; each must be one that At uses (Input.Set is not nil). It reports
// false if something sought asks for more than corners, as a connector path
// over bands does, or is no output of a fall: then Evaluate is the way.
func NewScan(j *Job, moved []int, sought []Sought) (*Scan, bool) {
	if j.Moving() || j.Point.Layout != nil {
		return nil, false
	}
	s := &Scan{job: *j, moved: slices.Clone(moved)}
	s.job.Inputs = slices.Clone(j.Inputs)
	s.both = j.Point.Distance > 0 && j.Point.Time > 0
	for i := range s.job.Inputs {
		in := &s.job.Inputs[i]
		if in.Set != nil && in.Band.High > in.Band.Low && !slices.Contains(moved, i) {
			s.free = append(s.free, in)
		}
	}
	if !slices.ContainsFunc(sought, func(w Sought) bool { return w.Of == nil }) {
		s.job.Point.Path = nil
	}
	if s.job.Point.Path != nil && len(s.free) > 0 {
		return nil, false
	}
	for _, want := range sought {
		t, ok := s.task(want)
		if !ok {
			return nil, false
		}
		s.wantFloor = s.wantFloor || t.floor
		s.wantMass = s.wantMass || t.mass
		s.tasks = append(s.tasks, t)
	}
	s.lo, s.hi = ends(&s.job)
	s.written = s.job.Point
	s.exact = !s.both && s.Exact()
	return s, true
}

// task looks one sought thing up.
func (s *Scan) task(want Sought) (task, bool) {
	if want.Of != nil {
		return task{measure: want.Of, bound: Between, middle: s.middles(onInputs), number: -1}, true
	}
	for i := range outputs {
		o := &outputs[i]
		if o.quantity != want.Quantity || o.evidence != want.Evidence || !o.applies(&s.job.Point) {
			continue
		}
		if o.evidence == Shape && s.both {
			return task{}, false
		}
		return task{
			output:  o.of,
			bound:   o.bound,
			stopped: o.rests&onStop != 0,
			floor:   o.bound == AtLeast && s.both,
			mass:    o.quantity == TotalMass,
			middle:  s.middles(o.rests),
			number:  i,
		}, true
	}
	return task{}, false
}

// middles reports whether every input behind r has, or is moved to, a figure.
func (s *Scan) middles(r rests) bool {
	for i := range s.job.Inputs {
		in := &s.job.Inputs[i]
		if in.Set == nil && in.Role != OfWorker || in.Role == OfPlace || r>>in.place()&1 == 0 {
			continue
		}
		if !in.HasValue() && !slices.Contains(s.moved, i) {
			return false
		}
	}
	return true
}

// Bound returns the bound of the i-th thing sought.
func (s *Scan) Bound(i int) Bound { return s.tasks[i].bound }

// Exact reports whether low, value and high are one figure, to the last bit,
// wherever the inputs are moved: the others have no bands, and no floor between
// the corners is sought.
func (s *Scan) Exact() bool { return len(s.free) == 0 && !s.wantFloor && s.middles(onInputs) }

// At moves the inputs to x, SI, one figure each in the order given to NewScan,
// and writes what was sought into to. It reports false, and writes NaN, where
// nothing the entries allow can happen (see Impossible).
func (s *Scan) At(x []float64, to []Ends) bool {
	for i, k := range s.moved {
		set := s.job.Inputs[k].Set
		set(&s.written, x[i])
		if s.both || len(s.free) > 0 {
			set(&s.lo, x[i])
			set(&s.hi, x[i])
		}
	}
	if s.exact {
		s.atOne(x, to)
		return true
	}
	for i := range s.tasks {
		to[i] = Ends{nan, nan, nan, nan}
	}
	if s.impossible() {
		return false
	}
	At(&s.written, &s.middle)
	switch {
	case len(s.free) > 0:
		if s.overFree(to) {
			s.overAll(x, to)
		}
	default:
		s.take(to, &s.written, &s.middle)
		if s.middle.Impossible {
			s.overAll(x, to)
		}
	}
	if s.wantFloor {
		s.lowerFloors(to)
	}
	s.finish(x, to)
	return true
}

// atOne is At for a job of single figures of which distance and time are not
// both given: one point says it all.
func (s *Scan) atOne(x []float64, to []Ends) {
	At(&s.written, &s.middle)
	for i := range s.tasks {
		t, e := &s.tasks[i], &to[i]
		y := t.of(&s.written, &s.middle)
		*e = Ends{y, y, y, nan}
		if t.bound == AtLeast {
			e.High, e.Reach = nan, y
		}
	}
	if s.wantMass {
		s.sumMasses(x, to)
	}
}

// impossible is Impossible for the scanned job.
func (s *Scan) impossible() bool {
	if !s.both {
		return false
	}
	At(&s.hi, &s.at)
	return s.lo.Distance >= reachable(s.at.Speed, s.hi.Gravity, s.hi.Time)
}

// overFree takes all corners, one input changed from each to the next. It
// reports whether one of them cannot happen.
func (s *Scan) overFree(to []Ends) (partImpossible bool) {
	s.corner = s.lo
	last := 1<<len(s.free) - 1
	for n := 0; ; n++ {
		At(&s.corner, &s.at)
		partImpossible = partImpossible || s.at.Impossible
		s.take(to, &s.corner, &s.at)
		if n == last {
			return partImpossible
		}
		in := s.free[bits.TrailingZeros(uint(n+1))]
		end := in.Band.High
		if gray := uint(n) ^ uint(n)>>1; gray>>bits.TrailingZeros(uint(n+1))&1 == 1 {
			end = in.Band.Low
		}
		in.Set(&s.corner, end)
	}
}

// take widens the ends by one point.
func (s *Scan) take(to []Ends, c *Case, p *Point) {
	for i := range s.tasks {
		t := &s.tasks[i]
		if p.Impossible && t.stopped {
			continue
		}
		to[i].take(t.of(c, p))
	}
}

func (e *Ends) take(x float64) {
	if math.IsNaN(x) {
		return
	}
	if !(e.Low <= x) {
		e.Low = x
	}
	if !(e.High >= x) {
		e.High = x
	}
}

// overAll works the spans out as Evaluate does, with the edge of what can
// happen among the points.
func (s *Scan) overAll(x []float64, to []Ends) {
	for i, k := range s.moved {
		b := &s.job.Inputs[k].Band
		b.Low, b.Value, b.High = x[i], x[i], x[i]
	}
	all, _ := overCorners(&s.job)
	for i := range s.tasks {
		if o := s.tasks[i].number; o >= 0 {
			to[i].Low, to[i].High = all.of[o].low.value, all.of[o].high.value
		}
	}
}

// lowerFloors lowers the floors to their least over the box (see lowerFloor).
func (s *Scan) lowerFloors(to []Ends) {
	At(&s.lo, &s.at)
	m, slow := s.at.TotalMass, s.at.Speed
	At(&s.hi, &s.at)
	c := &s.corner
	*c = atSpeed(s.lo, m, min(max(2*s.lo.Distance/s.hi.Time, slow), s.at.Speed))
	c.Time = s.hi.Time
	c.Distance = min(max(c.InitialSpeed*c.Time/2, s.lo.Distance), s.hi.Distance)
	At(c, &s.at)
	if s.at.Impossible {
		return
	}
	for i := range s.tasks {
		if t := &s.tasks[i]; t.floor && !math.IsNaN(to[i].Low) {
			to[i].take(t.of(c, &s.at))
		}
	}
}

// finish adds the middles and puts the ends where the bound has them.
func (s *Scan) finish(x []float64, to []Ends) {
	for i := range s.tasks {
		t, e := &s.tasks[i], &to[i]
		if math.IsNaN(e.Low) {
			continue
		}
		if t.middle && !(t.stopped && s.middle.Impossible) {
			e.Value = t.of(&s.written, &s.middle)
		}
		if t.bound == AtLeast {
			e.Reach, e.High = e.High, nan
		}
	}
	if s.wantMass {
		s.sumMasses(x, to)
	}
}

// sumMasses puts the sum of the masses as written in the place of the sum of
// their float64 figures.
func (s *Scan) sumMasses(x []float64, to []Ends) {
	for i, k := range s.moved {
		if in := &s.job.Inputs[k]; in.Role == OfWorker {
			in.Band = Single(in, x[i])
		}
	}
	b := s.job.TotalMass()
	for i := range s.tasks {
		if s.tasks[i].mass {
			to[i] = Ends{b.Low, b.Value, b.High, nan}
		}
	}
}

// Single returns the band that stands for the input moved to one figure, SI.
func Single(in *Input, x float64) quantity.Band {
	return quantity.Of(in.Band.Unit.Dimension, x)
}
