package arrest

import "math"

// A Load is one exact point of a moving load that is stopped or slowed (M-60),
// SI units. Components run along axes the user chose; those not given are 0.
// A Case whose Load has a mass is such a point, and its other fields but
// Gravity are not read.
type Load struct {
	Mass     float64    // kg, positive
	Before   [3]float64 // velocity before, m/s
	After    [3]float64 // velocity after, m/s
	Time     float64    // s; 0 where not given
	Distance float64    // along a straight path, m; 0 where not given; one component only
	Driving  float64    // force that goes on pushing along the velocity before, N; one component only
	Up       [3]float64 // unit vector against gravity; all 0 on a level path
	Axes     int        // how many components were given, 1 to 3
}

// A LoadPoint is what M-60 says about one Load, SI. NaN stands for what the
// Load does not hold enough to know.
type LoadPoint struct {
	Change       [3]float64 // of momentum, N*s: the impulse of all forces together
	Impulse      float64    // its magnitude, N*s
	Energy       float64    // taken out of the motion, J
	Force        [3]float64 // mean force of the stop over the time, N
	OverTime     float64    // its magnitude, N
	OverDistance float64    // mean force along the path against the motion, N
	Ratio        float64    // (OverDistance - a)/(OverTime - a), a the push of drive and weight along the path
	Deceleration float64    // mean net deceleration, m/s2: over the time, else over the distance
}

// loadAt works out one moving load (M-60). With the push a along the path, of
// the drive and of the weight,
//
//	J   = m*(v2 - v1)                          by components
//	F_t = m*(v2 - v1)/t - m*g_vec - D          by components, g_vec down
//	F_d = a + m*(v1^2 - v2^2)/(2*d)            straight path only
//	r   = (v1 + v2)*t/(2*d)
func loadAt(c *Case, p *Point) {
	l, q := &c.Load, &p.Load
	*p = Point{TotalMass: l.Mass, Weight: l.Mass * c.Gravity}
	v1, v2 := norm(l.Before), dot(l.After, direction(l.Before))
	along := direction(l.Before)
	for i := range q.Change {
		q.Change[i] = float64(l.Mass * (l.After[i] - l.Before[i]))
	}
	q.Impulse = norm(q.Change)
	p.Speed = v1
	p.Momentum = l.Mass * v1
	p.Energy = l.Mass * float64(v1*v1) / 2
	q.Energy = l.Mass * (float64(v1*v1) - float64(norm(l.After)*norm(l.After))) / 2
	push := l.Driving - float64(p.Weight*dot(l.Up, along))
	q.OverTime, q.OverDistance, q.Ratio, q.Deceleration = nan, nan, nan, nan
	q.Force = [3]float64{nan, nan, nan}
	if l.Distance > 0 {
		q.OverDistance = push + l.Mass*(float64(v1*v1)-float64(v2*v2))/(2*l.Distance)
		q.Deceleration = (float64(v1*v1) - float64(v2*v2)) / (2 * l.Distance)
	}
	if l.Time > 0 {
		for i := range q.Force {
			q.Force[i] = q.Change[i]/l.Time + float64(p.Weight*l.Up[i]) - float64(l.Driving*along[i])
		}
		q.OverTime = norm(q.Force)
		q.Deceleration = q.Impulse / l.Mass / l.Time
	}
	p.Floor = q.floor()
	if l.Time > 0 && l.Distance > 0 {
		q.Ratio = (v1 + v2) * l.Time / (2 * l.Distance)
	}
}

// norm is the length of a vector.
func norm(a [3]float64) float64 { return math.Hypot(math.Hypot(a[0], a[1]), a[2]) }

func dot(a, b [3]float64) float64 {
	return float64(a[0]*b[0]) + float64(a[1]*b[1]) + float64(a[2]*b[2])
}

// direction is the unit vector along a; a zero vector has none and gives zero.
func direction(a [3]float64) [3]float64 {
	n := norm(a)
	if n == 0 {
		return [3]float64{}
	}
	return [3]float64{a[0] / n, a[1] / n, a[2] / n}
}

// floor is the least the peak of the stopping force can be: no peak is below
// either mean.
func (q *LoadPoint) floor() float64 {
	switch {
	case math.IsNaN(q.OverTime):
		return q.OverDistance
	case math.IsNaN(q.OverDistance):
		return q.OverTime
	}
	return max(q.OverTime, q.OverDistance)
}

// bearing is the direction of a vector in the plane, rad from +x towards +y;
// NaN out of the plane and along one axis only.
func bearing(a [3]float64) float64 {
	if a[2] != 0 || a[1] == 0 {
		return nan
	}
	return math.Atan2(a[1], a[0])
}

// throughZero widens the spans by the points at which velocity components go
// through zero: there lie turning points of speeds and energies (M-50).
func throughZero(j *Job, s *spans) {
	var crossing []*Input
	for _, in := range s.free {
		if in.Role == OfFall && in.Band.Low < 0 && in.Band.High > 0 {
			crossing = append(crossing, in)
		}
	}
	var p Point
	for n := range s.corners() {
		for mask := 1; mask < 1<<len(crossing); mask++ {
			c := s.corner(n)
			for i, in := range crossing {
				if mask>>i&1 == 1 {
					in.Set(&c, 0)
				}
			}
			At(&c, &p)
			s.take(&p, s.add(c), s.live)
		}
	}
}

// widenMagnitudes lowers the low ends of magnitudes, whose least may lie where
// a component goes through zero and not at a corner (M-50), to the length of
// the vector of the least components: never above the true least. Directions
// are given up where a component may have either sign.
func widenMagnitudes(s *spans) {
	change, force := componentEnds(s)
	for _, v := range [...]struct {
		ends      [3][2]float64
		magnitude Quantity
		direction Quantity
	}{{change, Impulse, ImpulseDirection}, {force, StoppingForce, StoppingForceDirection}} {
		var least [3]float64
		oneSign := true
		for i, e := range v.ends {
			least[i] = max(e[0], -e[1], 0)
			oneSign = oneSign && (e[0] >= 0 || e[1] <= 0)
		}
		if m := &s.of[indexOf(v.magnitude, Given)]; m.known() {
			m.low.value = min(m.low.value, norm(least))
		}
		if !oneSign {
			s.of[indexOf(v.direction, Given)].forget()
		}
	}
	lowerMeans(s)
}

// componentEnds returns the least and greatest of each component of the impulse
// and of the mean force over all corners, where they lie: each is monotone in
// every input. The force is NaN without a time.
func componentEnds(s *spans) (change, force [3][2]float64) {
	var p Point
	for n := range s.corners() {
		c := s.corner(n)
		At(&c, &p)
		for i := range change {
			if n == 0 {
				change[i] = [2]float64{p.Load.Change[i], p.Load.Change[i]}
				force[i] = [2]float64{p.Load.Force[i], p.Load.Force[i]}
				continue
			}
			change[i][0], change[i][1] = min(change[i][0], p.Load.Change[i]), max(change[i][1], p.Load.Change[i])
			force[i][0], force[i][1] = min(force[i][0], p.Load.Force[i]), max(force[i][1], p.Load.Force[i])
		}
	}
	return change, force
}

// lowerMeans lowers what is made of the magnitudes with them.
func lowerMeans(s *spans) {
	_, hi := ends(s.job)
	if hi.Load.Time <= 0 {
		return
	}
	lower := func(i int, x float64) { s.of[i].low.value = min(s.of[i].low.value, x) }
	over := indexOf(StoppingForce, Given) // over the time; over the distance stands next
	least := s.of[over].low.value
	if d := &s.of[over+1]; d.known() {
		least = max(least, d.low.value)
	}
	for i := range outputs {
		if !outputs[i].applies(&s.job.Point) {
			continue
		}
		switch outputs[i].quantity {
		case PeakForce:
			lower(i, least)
		case PeakDeceleration, MeanDeceleration:
			lower(i, s.of[indexOf(Impulse, Given)].low.value/s.base.Load.Mass/hi.Load.Time)
		}
	}
}
