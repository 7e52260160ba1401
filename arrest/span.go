package arrest

import "math"

// An extreme is the least or greatest value of one output, and where it lies:
// the number of a corner, or, below 0, of a point beside the corners.
type extreme struct {
	value float64
	where int
}

// A span is what one output comes to over everything the entries allow.
// NaN until something is known.
type span struct{ low, high extreme }

func (s *span) known() bool { return !math.IsNaN(s.low.value) }

func (s *span) forget() { s.low.value, s.high.value = nan, nan }

// take widens the span by one point's value; NaN widens nothing.
func (s *span) take(x float64, where int) {
	if math.IsNaN(x) {
		return
	}
	if !(x >= s.low.value) {
		s.low = extreme{x, where}
	}
	if !(x <= s.high.value) {
		s.high = extreme{x, where}
	}
}

// spans holds the span of every output, in the order of the table outputs.
type spans struct {
	of     []span
	live   []int // the outputs that apply to the job
	job    *Job
	free   []*Input // the inputs with two ends, in the order of the corners' bits
	base   Case     // every input at its low end
	beside []Case   // points beside the corners
	path   pathNotes

	axes    []axis        // of a layout: the corners are those of the fall
	layouts []layoutNotes // of a layout, for each position
	parts   []*spans      // of several positions: their own, of which these are the worst
	at      map[int]int   // the position that an output of several is worst at, by its number
}

func newSpans(j *Job) *spans {
	s := &spans{job: j, of: make([]span, len(outputs)), live: make([]int, 0, len(outputs)), base: j.Point}
	if l := j.Point.Layout; l != nil {
		s.at = map[int]int{}
	}
	for i := range s.of {
		s.of[i].forget()
		if outputs[i].applies(&j.Point) {
			s.live = append(s.live, i)
		}
	}
	for i := range j.Inputs {
		in := &j.Inputs[i]
		if in.Set == nil {
			continue
		}
		in.Set(&s.base, in.Band.Low)
		if in.Band.High > in.Band.Low && (in.Position == 0 || in.Position == j.Point.Position+1) {
			s.free = append(s.free, in)
		}
	}
	return s
}

// corner returns the case of one corner of the bands (M-50): where bit i of
// its number is set, the ith free input is at its high end.
func (s *spans) corner(number int) Case {
	if s.axes != nil {
		return cornerOf(&s.base, s.axes, number)
	}
	c := s.base
	for i, in := range s.free {
		if number>>i&1 == 1 {
			in.Set(&c, in.Band.High)
		}
	}
	return c
}

// corners is how many there are.
func (s *spans) corners() int {
	if s.axes != nil {
		return 1 << len(s.axes)
	}
	return 1 << len(s.free)
}

// all yields the corners of all positions.
func (s *spans) all(yield func(Case) bool) {
	for _, part := range s.parts {
		part.all(yield)
	}
	if len(s.parts) > 0 {
		return
	}
	for n := range s.corners() {
		if !yield(s.corner(n)) {
			return
		}
	}
}

// caseAt returns the case that an extreme was found at.
func (s *spans) caseAt(e extreme) Case {
	if e.where < 0 {
		return s.beside[-1-e.where]
	}
	return s.corner(e.where)
}

// add notes a point beside the corners and returns where it lies.
func (s *spans) add(c Case) int {
	s.beside = append(s.beside, c)
	return -len(s.beside)
}

// take widens the spans of the given outputs by one point. What hangs on
// distance or time is left out where the two cannot go together (M-05).
func (s *spans) take(p *Point, where int, list []int) {
	for _, i := range list {
		if p.Impossible && outputs[i].rests&onStop != 0 {
			continue
		}
		s.of[i].take(outputs[i].of(p), where)
		if p.Layout != nil {
			s.of[i].take(outputs[i].low(p), where)
		}
	}
}

// takeBeside widens the spans of all outputs by a point beside the corners and
// keeps it only where it widens one.
func (s *spans) takeBeside(p *Point, c *Case) {
	s.note(c, p)
	for _, i := range s.live {
		low, high := outputs[i].low(p), outputs[i].of(p)
		if low < s.of[i].low.value || high > s.of[i].high.value || !s.of[i].known() && !math.IsNaN(high) {
			s.take(p, s.add(*c), s.live)
			return
		}
	}
}

// note takes one point into the notes.
func (s *spans) note(c *Case, p *Point) {
	if c.Path != nil {
		s.path.note(p.Model)
	}
	if c.Layout != nil {
		if s.layouts == nil {
			s.layouts = make([]layoutNotes, 1)
		}
		s.layouts[0].note(c, p)
	}
}

// overCorners fills the spans from all corners of the bands and from the points
// beside them at which an output may have an end; of a layout position by
// position.
func overCorners(j *Job) (s *spans, partImpossible bool) {
	if j.Point.Layout != nil {
		return overLayout(j)
	}
	return overBox(j)
}

// overBox fills the spans from all corners and, where some of them cannot
// happen, from the edge of what can.
func overBox(j *Job) (s *spans, partImpossible bool) {
	s = newSpans(j)
	if j.Point.Layout != nil {
		partImpossible = overSite(j, s)
	} else {
		partImpossible = s.overAll()
	}
	if j.Point.Path != nil && j.Point.Layout == nil {
		searchPath(s)
	}
	s.overTurns(j, partImpossible)
	return s, partImpossible
}

// overTurns widens the spans by the points beside the corners at which a closed
// form has an end, and by the edge of what can happen.
func (s *spans) overTurns(j *Job, partImpossible bool) {
	if partImpossible {
		overEdge(j, s)
	}
	if j.Moving() {
		throughZero(j, s)
		widenMagnitudes(s)
	} else if bothGiven(j) && s.of[indexOf(PeakForce, Given)].known() {
		lowerFloor(j, s)
	}
}

// overAll fills the spans from all corners.
func (s *spans) overAll() (partImpossible bool) {
	var p Point
	for n := range s.corners() {
		c := s.corner(n)
		At(&c, &p)
		s.take(&p, n, s.live)
		s.note(&c, &p)
		partImpossible = partImpossible || p.Impossible
	}
	return partImpossible
}

// overEdge widens the spans by the points where an edge of the box of speed,
// distance and time meets the surface d = v*t + g*t^2/2, beyond which nothing
// can happen. Every extreme of the means and their ratio over the possible
// part lies at a corner or at such a point; the floor has no upper end there.
func overEdge(j *Job, s *spans) {
	lo, hi := ends(j)
	g := lo.Gravity
	var a, b Point
	At(&lo, &a)
	At(&hi, &b)
	masses := [...]float64{a.TotalMass, b.TotalMass}
	speeds := [...]float64{a.Speed, b.Speed}
	if j.Point.Layout != nil {
		speeds = s.speeds()
	}
	lengths := [...]float64{lo.Distance, hi.Distance}
	times := [...]float64{lo.Time, hi.Time}
	for i := range speeds {
		for k := range times {
			v, d, t := speeds[i], lengths[i], times[k]
			edgePoint(s, &lo, masses, v, reachable(v, g, times[k]), t, inside(lengths, reachable(v, g, t)))
			for n := range speeds {
				w := speeds[n]
				tt := 2 * d / (w + math.Sqrt(float64(w*w)+float64(2*g*d)))
				edgePoint(s, &lo, masses, w, d, tt, inside(times, tt))
			}
			vv := (d - float64(g*t*t)/2) / t
			edgePoint(s, &lo, masses, vv, d, t, inside(speeds, vv))
		}
	}
}

// inside reports whether x lies between the ends, or is one of them: the edge
// may go exactly through a corner.
func inside(ends [2]float64, x float64) bool { return ends[0] <= x && x <= ends[1] }

// edgePoint widens the spans that hang on the stop by one point of the edge,
// for the lightest and the heaviest mass. The floor has no upper end there.
func edgePoint(s *spans, base *Case, masses [2]float64, v, d, t float64, within bool) {
	if !within {
		return
	}
	var p Point
	for _, m := range masses {
		c := atSpeed(*base, m, v)
		c.Distance, c.Time = d, t
		At(&c, &p)
		p.Impossible = false
		p.Floor, p.FloorOverWeight, p.FloorDeceleration = math.Inf(1), math.Inf(1), math.Inf(1)
		where := s.add(c)
		for _, i := range s.live {
			if outputs[i].rests&onStop != 0 {
				s.of[i].take(outputs[i].of(&p), where)
			}
		}
	}
}

// atSpeed returns c with the mass m in all and the speed v when the arrest
// begins, exactly: the square root of a square is exact.
func atSpeed(c Case, m, v float64) Case {
	c.Mass, c.Tools, c.FreeFall, c.InitialSpeed, c.Layout = m, 0, 0, v, nil
	return c
}

// speeds returns the least and the greatest speed when the arrest begins.
func (s *spans) speeds() [2]float64 {
	v := &s.of[indexOf(FallSpeed, Given)]
	return [...]float64{v.low.value, v.high.value}
}

// ends returns the case with every input at its low end and the one with every
// input at its high end.
func ends(j *Job) (lo, hi Case) {
	lo, hi = j.Point, j.Point
	for i := range j.Inputs {
		if in := &j.Inputs[i]; in.Set != nil {
			in.Set(&lo, in.Band.Low)
			in.Set(&hi, in.Band.High)
		}
	}
	return lo, hi
}

// lowerFloor lowers the floor of the peak to its least over the whole box. The
// floor is not monotone in distance, time and speed; its least is at
//
//	m = m1, t = t2, v = clamp(2*d1/t2, v1, v2), d = clamp(v*t2/2, d1, d2)
//
// M-06. Only needed where both distance and time are given: else corners do.
func lowerFloor(j *Job, s *spans) {
	lo, hi := ends(j)
	var a, b Point
	At(&lo, &a)
	At(&hi, &b)
	slow, fast := a.Speed, b.Speed
	if j.Point.Layout != nil {
		speeds := s.speeds()
		slow, fast = speeds[0], speeds[1]
	}
	v := min(max(2*lo.Distance/hi.Time, slow), fast)
	c := atSpeed(lo, a.TotalMass, v)
	c.Time = hi.Time
	c.Distance = min(max(v*hi.Time/2, lo.Distance), hi.Distance)
	var p Point
	At(&c, &p)
	if p.Impossible {
		return
	}
	where := s.add(c)
	for _, q := range [...]Quantity{PeakForce, ForceOverWeight, PeakDeceleration} {
		i := indexOf(q, Given)
		s.of[i].take(outputs[i].of(&p), where)
	}
}
