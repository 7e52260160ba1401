package arrest

import (
	"math"

	"arrestcheck/arrest/quantity"
)

// A symbol is one letter of the formulas below and where its figure is found.
type symbol struct {
	Symbol
	of func(*Case, *Point) float64
}

// symbols is the one list of letters.
var symbols = [...]symbol{
	{Symbol{"m_worker", "mass of the worker", quantity.Mass}, func(c *Case, p *Point) float64 { return c.Mass }},
	{Symbol{"m_tools", "mass of clothing and tools", quantity.Mass}, func(c *Case, p *Point) float64 { return c.Tools }},
	{Symbol{"m", "total moving mass", quantity.Mass}, func(c *Case, p *Point) float64 { return p.TotalMass }},
	{Symbol{"g", "gravity", quantity.Acceleration}, func(c *Case, p *Point) float64 { return c.Gravity }},
	{Symbol{"W", "weight", quantity.Force}, func(c *Case, p *Point) float64 { return p.Weight }},
	{Symbol{"u", "initial speed downward", quantity.Speed}, func(c *Case, p *Point) float64 { return c.InitialSpeed }},
	{Symbol{"h", "free fall", quantity.Length}, func(c *Case, p *Point) float64 { return c.FreeFall }},
	{Symbol{"h_equal", "free fall from rest that gives the same speed", quantity.Length}, func(c *Case, p *Point) float64 { return p.FreeFall }},
	{Symbol{"v", "speed when the arrest begins", quantity.Speed}, func(c *Case, p *Point) float64 { return p.Speed }},
	{Symbol{"E", "energy of the fall", quantity.Energy}, func(c *Case, p *Point) float64 { return p.Energy }},
	{Symbol{"p", "momentum when the arrest begins", quantity.Impulse}, func(c *Case, p *Point) float64 { return p.Momentum }},
	{Symbol{"d", "stopping distance", quantity.Length}, func(c *Case, p *Point) float64 { return c.Distance }},
	{Symbol{"t", "stopping time", quantity.Time}, func(c *Case, p *Point) float64 { return c.Time }},
	{Symbol{"F_d", "mean force over the distance", quantity.Force}, func(c *Case, p *Point) float64 { return p.MeanOverDistance }},
	{Symbol{"F_t", "mean force over the time", quantity.Force}, func(c *Case, p *Point) float64 { return p.MeanOverTime }},
	{Symbol{"F_d_wrong", "the sum with the body weight forgotten: too low by W", quantity.Force}, func(c *Case, p *Point) float64 { return p.MeanOverDistance - p.Weight }},
	{Symbol{"F_t_wrong", "the sum with the body weight forgotten: too low by W", quantity.Force}, func(c *Case, p *Point) float64 { return p.MeanOverTime - p.Weight }},
	{Symbol{"r", "ratio of the two routes", quantity.Ratio}, func(c *Case, p *Point) float64 { return p.ShapeRatio }},
	{Symbol{"d_limit", "distance that cannot be reached in this time", quantity.Length}, func(c *Case, p *Point) float64 { return reachable(p.Speed, c.Gravity, c.Time) }},
	{Symbol{"tau", "time of falling on before the braking that asks for least", quantity.Time}, func(c *Case, p *Point) float64 { return fallOn(c, p) }},
	{Symbol{"a", "least peak of the net deceleration", quantity.Acceleration}, func(c *Case, p *Point) float64 { return p.FloorDeceleration }},
	{Symbol{"F_floor", "the peak is not less than this", quantity.Force}, func(c *Case, p *Point) float64 { return p.Floor }},
	{Symbol{"n", "peak force over weight, not less than this", quantity.Ratio}, func(c *Case, p *Point) float64 { return p.FloorOverWeight }},
	{Symbol{"k", "peak over mean of the assumed shape", quantity.Ratio}, func(c *Case, p *Point) float64 { k, _ := c.Pulse.factors(c.Rise); return k }},
	{Symbol{"c", "distance factor of the assumed shape", quantity.Ratio}, func(c *Case, p *Point) float64 { _, f := c.Pulse.factors(c.Rise); return f }},
	{Symbol{"q", "rise fraction of the assumed shape", quantity.Ratio}, func(c *Case, p *Point) float64 { return c.Rise }},
	{Symbol{"t_rise", "time of the rise", quantity.Time}, func(c *Case, p *Point) float64 { return c.Pulse.riseTime(shapeTime(c, p), c.Rise) }},
	{Symbol{"R_shape", "mean rate of the rise if the stop had the assumed shape", quantity.ForceRate}, func(c *Case, p *Point) float64 { return p.Assumed.Onset }},
	{Symbol{"n_shape", "peak force over weight if the stop had the assumed shape", quantity.Ratio}, func(c *Case, p *Point) float64 { return p.Assumed.OverWeight }},
	{Symbol{"t_shape", "stopping time of the assumed shape", quantity.Time}, func(c *Case, p *Point) float64 { return shapeTime(c, p) }},
	{Symbol{"d_shape", "stopping distance of the assumed shape", quantity.Length}, func(c *Case, p *Point) float64 { return p.Assumed.Distance }},
	{Symbol{"F_shape", "peak if the stop had the assumed shape", quantity.Force}, func(c *Case, p *Point) float64 { return p.Assumed.Peak }},
}

// fallOn is tau of M-06.
func fallOn(c *Case, p *Point) float64 {
	return (2*c.Distance - float64(p.Speed*c.Time)) / (p.Speed + float64(c.Gravity*c.Time))
}

func shapeTime(c *Case, p *Point) float64 {
	if c.Time > 0 {
		return c.Time
	}
	return p.Assumed.Time
}

// A passage is a run of formulas that leads to one output, printed at the ends
// of that output's span.
type passage struct {
	quantity Quantity
	evidence Evidence
	lines    []line
}

// A line is one formula; when says for which cases it is the one used, nil
// for all.
type line struct {
	method, text string
	when         func(*Case, *Point) bool
}

func onlyDistance(c *Case, p *Point) bool { return c.Distance > 0 && c.Time <= 0 }
func onlyTime(c *Case, p *Point) bool     { return c.Distance <= 0 && c.Time > 0 }
func both(c *Case, p *Point) bool         { return c.Distance > 0 && c.Time > 0 }
func longStop(c *Case, p *Point) bool     { return both(c, p) && p.Speed*c.Time >= 2*c.Distance }
func shortStop(c *Case, p *Point) bool    { return both(c, p) && p.Speed*c.Time < 2*c.Distance }
func spring(c *Case, p *Point) bool       { return c.Pulse != EarlyPeak }
func early(c *Case, p *Point) bool        { return c.Pulse == EarlyPeak }
func withSpeed(c *Case, p *Point) bool    { return c.InitialSpeed > 0 }
func overDistance(c *Case, p *Point) bool { return onlyDistance(c, p) || longStop(c, p) }

func shaped(as Pulse) func(*Case, *Point) bool {
	return func(c *Case, p *Point) bool { return c.Pulse == as }
}

func and(a, b func(*Case, *Point) bool) func(*Case, *Point) bool {
	return func(c *Case, p *Point) bool { return a(c, p) && b(c, p) }
}

// passages is the working, in the order in which a person would do it.
var passages = [...]passage{
	{TotalMass, Given, []line{
		{"M-01", "m = m_worker + m_tools", nil},
		{"M-01", "W = m*g", nil},
	}},
	{FreeFall, Given, []line{{"M-01", "h_equal = h + u^2/(2*g)", withSpeed}}},
	{FallSpeed, Given, []line{{"M-01", "v = sqrt(u^2 + 2*g*h)", nil}}},
	{FallEnergy, Given, []line{{"M-01", "E = m*v^2/2", nil}}},
	{Momentum, Given, []line{{"M-01", "p = m*v", nil}}},
	{MeanForceOverDistance, Given, []line{
		{"M-02", "F_d = W + m*v^2/(2*d)", nil},
		{"M-02", "F_d_wrong = m*v^2/(2*d)", nil},
	}},
	{MeanForceOverTime, Given, []line{
		{"M-03", "F_t = W + m*v/t", nil},
		{"M-03", "F_t_wrong = m*v/t", nil},
	}},
	{ShapeRatio, Given, []line{{"M-04", "r = v*t/(2*d)", nil}}},
	{PeakForce, Given, []line{
		{"M-05", "d_limit = v*t + g*t^2/2", both},
		{"M-06", "tau = (2*d - v*t)/(v + g*t)", shortStop},
		{"M-06", "a = (v + g*tau)/(t - tau)", shortStop},
		{"M-06", "a = v^2/(2*d)", overDistance},
		{"M-06", "a = v/t", onlyTime},
		{"M-06", "F_floor = m*(g + a)", nil},
	}},
	{ForceOverWeight, Given, []line{{"M-08", "n = F_floor/W", nil}}},
	{PeakForce, Shape, []line{
		{"M-07", "k = 1", shaped(Constant)},
		{"M-07", "c = 1/2", shaped(Constant)},
		{"M-07", "k = 2", shaped(RisingRamp)},
		{"M-07", "c = 2/3", shaped(RisingRamp)},
		{"M-07", "k = pi/2", shaped(SpringLike)},
		{"M-07", "c = 2/pi", shaped(SpringLike)},
		{"M-07", "k = 1/(1 - q/2)", shaped(RisePlateau)},
		{"M-07", "c = 1 - k*(q/2 - q^2/3 + (1 - q)^2/2)", shaped(RisePlateau)},
		{"M-07", "d_shape = c*v*t + (c - 1/2)*g*t^2", and(onlyTime, spring)},
		{"M-07", "d_shape = v*t/3", and(onlyTime, early)},
		{"M-07", "t_shape = 2*d/(c*v + sqrt(c^2*v^2 + 4*(c - 1/2)*g*d))", and(onlyDistance, spring)},
		{"M-07", "t_shape = 3*d/v", and(onlyDistance, early)},
		{"M-07", "F_shape = k*(W + m*v/t_shape)", spring},
		{"M-07", "F_shape = W + 2*m*v/t_shape", early},
	}},
	{ForceOverWeight, Shape, []line{{"M-08", "n_shape = F_shape/W", nil}}},
	{OnsetRate, Shape, []line{{"M-08", "R_shape = F_shape/t_rise", nil}}},
}

// working writes the working at the figures as written, where they have
// middles, and at both ends of each span.
func (ev *evaluation) working() {
	for i := range passages {
		ps := &passages[i]
		k := indexOf(ps.quantity, ps.evidence)
		s := &ev.spans[k]
		if !s.known() {
			continue
		}
		o := &outputs[k]
		written := ev.allWritten(ev.restsOn(o.rests)) && !ev.written.Impossible && !math.IsNaN(o.of(&ev.written))
		if written {
			ev.lines(ps, o, AtWritten, ev.job.Point)
		}
		if written && s.low.value == s.high.value {
			continue
		}
		ev.lines(ps, o, AtLow, s.low.at)
		if !math.IsInf(s.high.value, 1) {
			ev.lines(ps, o, AtHigh, s.high.at)
		}
	}
}

func (ev *evaluation) lines(ps *passage, o *output, corner Corner, at Case) {
	c, p := &at, new(Point)
	At(c, p)
	for i := range ps.lines {
		l := &ps.lines[i]
		if l.when != nil && !l.when(c, p) {
			continue
		}
		ev.res.Working = append(ev.res.Working, l.fill(o, corner, c, p))
	}
}

// fill puts the figures of one point into the formula.
func (l *line) fill(o *output, corner Corner, c *Case, p *Point) WorkingLine {
	names := identifiers(l.text)
	w := WorkingLine{Method: l.method, Formula: l.text, Corner: corner}
	for i, name := range names {
		s := findSymbol(name)
		t := Term{s.Name, s.Dimension, s.of(c, p)}
		if i == 0 {
			w.Result, w.Meaning = t, s.Meaning
			continue
		}
		w.Terms = append(w.Terms, t)
	}
	if o.bound == AtLeast {
		w.Rounding = quantity.Down
	}
	return w
}

// identifiers lists the letters of a formula, each once, in order: the first
// is the result. sqrt and pi are no letters of a job.
func identifiers(formula string) []string {
	var names []string
	seen := func(n string) bool {
		for _, have := range names {
			if have == n {
				return true
			}
		}
		return n == "sqrt" || n == "pi"
	}
	for i := 0; i < len(formula); {
		j := i
		for j < len(formula) && letter(formula[j]) {
			j++
		}
		if j == i {
			i++
			continue
		}
		if n := formula[i:j]; !seen(n) && !digit(n[0]) {
			names = append(names, n)
		}
		i = j
	}
	return names
}

func letter(b byte) bool {
	return b == '_' || digit(b) || 'a' <= b && b <= 'z' || 'A' <= b && b <= 'Z'
}

func digit(b byte) bool { return '0' <= b && b <= '9' }

func findSymbol(name string) *symbol {
	for i := range symbols {
		if symbols[i].Name == name {
			return &symbols[i]
		}
	}
	panic("arrest: no symbol " + name)
}
