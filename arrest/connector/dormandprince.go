package connector

import "math"

// A stepper is the method of Dormand and Prince of order 5 with an estimate of
// order 4, for x' = v, v' = g - F(x, v)/m with
//
//	F = force of the stretch + force of the dashpot, or 0 where it lags.
//
// Source of the coefficients: J. R. Dormand, P. J. Prince, A family of embedded
// Runge-Kutta formulae, Journal of Computational and Applied Mathematics 6
// (1980) 19-26; of the dense output: L. F. Shampine, Some practical Runge-Kutta
// formulas, Mathematics of Computation 46 (1986) 135-150. Both from memory, held
// by the order conditions in the tests.
type stepper struct {
	law  source
	on   stretch
	free bool // no force on the body
	lost bool // the force of the stretch goes into the dashpot

	g, mass, perMass, c float64

	// The seven stages of the last step: speed, acceleration, force of the path
	// and of the dashpot.
	v, a, path, dash [7]float64
}

const (
	n10 = 1. / 5

	n20, n21 = 3. / 40, 9. / 40

	n30, n31, n32 = 44. / 45, -56. / 15, 32. / 9

	n40, n41, n42, n43 = 19372. / 6561, -25360. / 2187, 64448. / 6561, -212. / 729

	n50, n51, n52, n53, n54 = 9017. / 3168, -355. / 33, 46732. / 5247, 49. / 176, -5103. / 18656

	// The weights of the result of order 5, which is also the last stage.
	n60, n62, n63, n64, n65 = 35. / 384, 500. / 1113, 125. / 192, -2187. / 6784, 11. / 84

	// The weights of the difference of the two orders.
	w0, w2, w3, w4, w5, w6 = 71. / 57600, -71. / 16695, 71. / 1920, -17253. / 339200, 22. / 525, -1. / 40
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

// stage evaluates the equations at stage i.
func (s *stepper) stage(i int, x, v float64) {
	var f, d float64
	switch {
	case s.free && !s.lost:
		s.v[i], s.a[i], s.path[i], s.dash[i] = v, s.g, 0, 0
		return
	case s.on.curve != nil:
		f = s.on.curve(x)
	default:
		f = s.on.f + s.on.k*(x-s.on.x)
	}
	if d = s.c * v; d != d {
		d = s.law.damp(v)
	}
	s.v[i], s.path[i] = v, f
	if s.lost {
		s.a[i], s.dash[i] = s.g, -f
		return
	}
	s.a[i], s.dash[i] = s.g-(f+d)*s.perMass, d
}

// step goes from (x, v), whose stage 0 has been evaluated, over the time h. It
// returns the new state and the difference of the two orders.
func (s *stepper) step(x, v, h float64) (x1, v1, dx, dv float64) {
	p, a := &s.v, &s.a
	s.stage(1, x+h*n10*p[0], v+h*n10*a[0])
	s.stage(2, x+h*(n20*p[0]+n21*p[1]), v+h*(n20*a[0]+n21*a[1]))
	s.stage(3, x+h*(n30*p[0]+n31*p[1]+n32*p[2]), v+h*(n30*a[0]+n31*a[1]+n32*a[2]))
	s.stage(4, x+h*(n40*p[0]+n41*p[1]+n42*p[2]+n43*p[3]), v+h*(n40*a[0]+n41*a[1]+n42*a[2]+n43*a[3]))
	s.stage(5, x+h*(n50*p[0]+n51*p[1]+n52*p[2]+n53*p[3]+n54*p[4]),
		v+h*(n50*a[0]+n51*a[1]+n52*a[2]+n53*a[3]+n54*a[4]))
	x1 = x + h*(n60*p[0]+n62*p[2]+n63*p[3]+n64*p[4]+n65*p[5])
	v1 = v + h*(n60*a[0]+n62*a[2]+n63*a[3]+n64*a[4]+n65*a[5])
	s.stage(6, x1, v1)
	dx = h * (w0*p[0] + w2*p[2] + w3*p[3] + w4*p[4] + w5*p[5] + w6*p[6])
	dv = h * (w0*a[0] + w2*a[2] + w3*a[3] + w4*a[4] + w5*a[5] + w6*a[6])
	return x1, v1, dx, dv
}

// between returns travel and speed within the step of the time h from (x, v),
// as polynomials of the share of the step.
func (s *stepper) between(x, v, h float64) (px, pv quartic) {
	px[0], pv[0] = x, v
	for i := range dense {
		for n, b := range dense[i] {
			px[n+1] += h * b * s.v[i]
			pv[n+1] += h * b * s.a[i]
		}
	}
	return px, pv
}

// sums returns, over the step of the time h, the impulse of the path and the
// dashpot and the work done on each.
func (s *stepper) sums(h float64) (impulse, path, dash float64) {
	p, d, v := &s.path, &s.dash, &s.v
	f := n60*p[0] + n62*p[2] + n63*p[3] + n64*p[4] + n65*p[5]
	f += n60*d[0] + n62*d[2] + n63*d[3] + n64*d[4] + n65*d[5]
	path = n60*p[0]*v[0] + n62*p[2]*v[2] + n63*p[3]*v[3] + n64*p[4]*v[4] + n65*p[5]*v[5]
	dash = n60*d[0]*v[0] + n62*d[2]*v[2] + n63*d[3]*v[3] + n64*d[4]*v[4] + n65*d[5]*v[5]
	if s.free {
		f = 0
	}
	return h * f, h * path, h * dash
}

// fifthRoot returns x^(1/5) for a positive x, to about 1e-3: enough for the
// choice of a step, at a tenth of the price of math.Pow.
func fifthRoot(x float64) float64 {
	const one = 1023 << 52
	y := math.Float64frombits(one + uint64((int64(math.Float64bits(x))-one)/5))
	for range 2 {
		y4 := y * y * y * y
		y = (4*y + x/y4) / 5
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
