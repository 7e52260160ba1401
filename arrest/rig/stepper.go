package rig

import "math"

// Places in the state of a taut swing.
const (
	stretch  = iota // extension of the path, m
	outwards        // its rate: the speed along the connector, m/s
	angle           // from straight down, rad
	turning         // r^2 times its rate: angular momentum over mass, m2/s
)

// A state is a taut swing at one moment.
type state [4]float64

// A stepper is the method of Dormand and Prince of order 5 with an estimate of
// order 4, for a mass on a connector that pulls with the force T towards the
// pivot: with r = R + x and the angle a from straight down,
//
//	x' = v,  v' = j^2/r^3 + g cos a - T/m,  a' = j/r^2,  j' = -g r sin a
//
// T = force of the segment + c v; zero where the dashpot holds the path back; and
// what keeps r as it is where the connector is held.
//
// Source of the coefficients: J. R. Dormand, P. J. Prince, A family of embedded
// Runge-Kutta formulae, Journal of Computational and Applied Mathematics 6
// (1980) 19-26; of the dense output: L. F. Shampine, Some practical Runge-Kutta
// formulas, Mathematics of Computation 46 (1986) 135-150. Both from memory, held
// by the order conditions in the tests.
type stepper struct {
	g, mass, c, radius float64

	on   segment
	free bool // no force on the body
	held bool // the connector keeps its length

	// The seven stages of the last step; from is the angle of the first.
	from     float64
	rate     [7]state
	pull     [7]float64 // force on the body, N
	sin, cos [7]float64
}

// The weights of the stages: a for the next stage, b for the new state, e for
// the difference of the two orders.
const (
	a10                     = 1. / 5
	a20, a21                = 3. / 40, 9. / 40
	a30, a31, a32           = 44. / 45, -56. / 15, 32. / 9
	a40, a41, a42, a43      = 19372. / 6561, -25360. / 2187, 64448. / 6561, -212. / 729
	a50, a51, a52, a53, a54 = 9017. / 3168, -355. / 33, 46732. / 5247, 49. / 176, -5103. / 18656
	b0, b2, b3, b4, b5      = 35. / 384, 500. / 1113, 125. / 192, -2187. / 6784, 11. / 84
	e0, e2, e3, e4, e5, e6  = 71. / 57600, -71. / 16695, 71. / 1920, -17253. / 339200, 22. / 525, -1. / 40
)

// dense[i] are the coefficients of q to q^4 of stage i in the dense output.
var dense = [7][4]float64{
	{1, -8048581381. / 2820520608, 8663915743. / 2820520608, -12715105075. / 11282082432},
	{},
	{0, 131558114200. / 32700410799, -68118460800. / 10900136933, 87487479700. / 32700410799},
	{0, -1754552775. / 470086768, 14199869525. / 1410260304, -10690763975. / 1880347072},
	{0, 127303824393. / 49829197408, -318862633887. / 49829197408, 701980252875. / 199316789632},
	{0, -282668133. / 205662961, 2019193451. / 616988883, -1453857185. / 822651844},
	{0, 40617522. / 29380423, -110615467. / 29380423, 69997945. / 29380423},
}

// start evaluates the equations at y, the first stage of a step.
func (s *stepper) start(y *state) {
	s.from = y[angle]
	s.sin[0], s.cos[0] = math.Sincos(y[angle])
	s.evaluate(0, y)
}

// next makes the last stage, at y, the first one of the next step.
func (s *stepper) next(y *state) {
	s.from = y[angle]
	s.rate[0], s.pull[0], s.sin[0], s.cos[0] = s.rate[6], s.pull[6], s.sin[6], s.cos[6]
}

// stage evaluates the equations at stage i, near the first one.
func (s *stepper) stage(i int, y *state) {
	if d := y[angle] - s.from; math.Abs(d) < 0.25 {
		sin, cos := sincos(d)
		s.sin[i] = float64(s.sin[0]*cos) + float64(s.cos[0]*sin)
		s.cos[i] = float64(s.cos[0]*cos) - float64(s.sin[0]*sin)
	} else {
		s.sin[i], s.cos[i] = math.Sincos(y[angle])
	}
	s.evaluate(i, y)
}

// sincos returns sine and cosine of |d| < 1/4 by their series, to 3e-16: a third
// of the price of math.Sincos.
func sincos(d float64) (sin, cos float64) {
	q := d * d
	sin = 1./5040 - float64(q*(1./362880-float64(q*(1./39916800))))
	sin = d - float64(d*q)*(1./6-float64(q*(1./120-float64(q*sin))))
	cos = 1./40320 - float64(q*(1./3628800-float64(q*(1./479001600))))
	cos = 1 - float64(q*(1./2-float64(q*(1./24-float64(q*(1./720-float64(q*cos)))))))
	return sin, cos
}

func (s *stepper) evaluate(i int, y *state) {
	r := s.radius + y[stretch]
	in := 1 / r
	across := float64(y[turning] * in)
	spin := float64(across * in)
	lift := float64(across*spin) + float64(s.g*s.cos[i])
	k := &s.rate[i]
	k[angle], k[turning] = spin, -s.g*r*s.sin[i]
	switch {
	case s.held:
		k[stretch], k[outwards], s.pull[i] = 0, 0, s.mass*lift
	case s.free:
		k[stretch], k[outwards], s.pull[i] = y[outwards], lift, 0
	default:
		f := s.force(y)
		k[stretch], k[outwards], s.pull[i] = y[outwards], lift-f/s.mass, f
	}
}

// force returns the force of segment and dashpot in N.
func (s *stepper) force(y *state) float64 {
	return s.on.at(y[stretch]) + float64(s.c*y[outwards])
}

// step goes from y, where it has started, over the time h. It returns
// the new state, whose stage is the last one, and the difference of the orders.
func (s *stepper) step(y *state, h float64) (y1, off state) {
	k := &s.rate
	for n := range y1 {
		y1[n] = y[n] + float64(h*a10*k[0][n])
	}
	s.stage(1, &y1)
	for n := range y1 {
		y1[n] = y[n] + float64(h*(float64(a20*k[0][n])+float64(a21*k[1][n])))
	}
	s.stage(2, &y1)
	for n := range y1 {
		y1[n] = y[n] + float64(h*(float64(a30*k[0][n])+float64(a31*k[1][n])+float64(a32*k[2][n])))
	}
	s.stage(3, &y1)
	for n := range y1 {
		y1[n] = y[n] + float64(h*(float64(a40*k[0][n])+float64(a41*k[1][n])+float64(a42*k[2][n])+float64(a43*k[3][n])))
	}
	s.stage(4, &y1)
	for n := range y1 {
		y1[n] = y[n] + float64(h*(float64(a50*k[0][n])+float64(a51*k[1][n])+float64(a52*k[2][n])+float64(a53*k[3][n])+float64(a54*k[4][n])))
	}
	s.stage(5, &y1)
	for n := range y1 {
		y1[n] = y[n] + float64(h*(float64(b0*k[0][n])+float64(b2*k[2][n])+float64(b3*k[3][n])+float64(b4*k[4][n])+float64(b5*k[5][n])))
	}
	s.stage(6, &y1)
	for n := range off {
		off[n] = h * (float64(e0*k[0][n]) + float64(e2*k[2][n]) + float64(e3*k[3][n]) + float64(e4*k[4][n]) + float64(e5*k[5][n]) + float64(e6*k[6][n]))
	}
	return y1, off
}

// path returns one figure of the state within the step of the time h from y, as
// a polynomial of the share of the step.
func (s *stepper) path(n int, y *state, h float64) (p quartic) {
	for i := range dense {
		k := s.rate[i][n]
		for j, b := range dense[i] {
			p[j+1] += float64(b * k)
		}
	}
	for j := range p {
		p[j] *= h
	}
	p[0] = y[n]
	return p
}

// sums returns, over the step of the time h, the impulse of the force to the side
// and upwards and the work of the dashpot.
func (s *stepper) sums(h float64) (side, up, dash float64) {
	for i, w := range [...]float64{b0, 0, b2, b3, b4, b5} {
		side += float64(w * s.pull[i] * s.sin[i])
		up += float64(w * s.pull[i] * s.cos[i])
		dash += float64(w * s.rate[i][stretch] * s.rate[i][stretch])
	}
	return h * side, h * up, s.c * h * dash
}

// fifthRoot returns x^(1/5) for a positive x, to about 1e-3: enough for the
// choice of a step, at a tenth of the price of math.Pow.
func fifthRoot(x float64) float64 {
	const one = 1023 << 52
	y := math.Float64frombits(one + uint64((int64(math.Float64bits(x))-one)/5))
	for range 2 {
		y4 := y * y * y * y
		y = (float64(4*y) + x/y4) / 5
	}
	return y
}

// resize returns the factor by which to change a step whose error is err times
// the tolerance.
func resize(err float64) float64 {
	if err < 1e-5 {
		return 5
	}
	return min(5, max(0.2, 0.9/fifthRoot(err)))
}
