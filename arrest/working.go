package arrest

import (
	"math"

	"arrestcheck/arrest/connector"
	"arrestcheck/arrest/quantity"
	"arrestcheck/arrest/rig"
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
	{Symbol{"z_A", "height of the anchor above the surface", quantity.Length}, placed(func(r *LayoutRun) float64 { return r.Layout.Anchor.Z })},
	{Symbol{"y_A", "the anchor outwards of the edge", quantity.Length}, placed(func(r *LayoutRun) float64 { return r.Layout.Anchor.Y })},
	{Symbol{"z_D", "height of the D-ring above the surface at the start", quantity.Length}, placed(func(r *LayoutRun) float64 { return r.Place.Start.Z })},
	{Symbol{"x_D", "the D-ring along the edge from the anchor", quantity.Length}, placed(func(r *LayoutRun) float64 { return r.Place.Start.X })},
	{Symbol{"y_D", "the D-ring outwards of the edge", quantity.Length}, placed(func(r *LayoutRun) float64 { return r.Place.Start.Y })},
	{Symbol{"L_c", "length of the connector", quantity.Length}, placed(func(r *LayoutRun) float64 { return r.Layout.Length })},
	{Symbol{"l_slack", "slack", quantity.Length}, placed(func(r *LayoutRun) float64 { return r.Layout.Slack })},
	{Symbol{"l_lock", "travel before locking", quantity.Length}, placed(func(r *LayoutRun) float64 { return r.Layout.Locking })},
	{Symbol{"s", "offset in plan at the start", quantity.Length}, placed(func(r *LayoutRun) float64 { return r.Place.Offset })},
	{Symbol{"A_D", "from the anchor to the D-ring at the start", quantity.Length}, placed(func(r *LayoutRun) float64 { return r.Place.Distance })},
	{Symbol{"R", "way along the connector at the first pull", quantity.Length}, placed(func(r *LayoutRun) float64 { return r.Place.Radius })},
	{Symbol{"b", "from the anchor to the edge", quantity.Length}, placed(func(r *LayoutRun) float64 { return math.Hypot(r.Layout.Anchor.Y, r.Layout.Anchor.Z) })},
	{Symbol{"d_edge", "what hangs over the edge at the first pull", quantity.Length}, placed(overhang)},
	{Symbol{"z_taut", "height of the D-ring at the first pull", quantity.Length}, placed(func(r *LayoutRun) float64 { return r.Place.Taut.Z })},
	{Symbol{"alpha", "offset angle at work", quantity.Angle}, placed(func(r *LayoutRun) float64 { return r.Place.OffsetAngle })},
	{Symbol{"s_swing", "offset from the pivot of the swing", quantity.Length}, placed(func(r *LayoutRun) float64 { return r.Place.Plane.Offset })},
	{Symbol{"R_swing", "radius of the swing at the first pull", quantity.Length}, placed(func(r *LayoutRun) float64 { return r.Place.Plane.Radius })},
	{Symbol{"beta", "swing angle when taut", quantity.Angle}, placed(func(r *LayoutRun) float64 { return r.Place.SwingAngle })},
	{Symbol{"H", "drop of the swing", quantity.Length}, placed(func(r *LayoutRun) float64 { return r.Place.SwingDrop })},
	{Symbol{"v_least", "speed at the lowest point without stretch, all of it along the connector lost", quantity.Speed}, placed(func(r *LayoutRun) float64 { return r.Swing.LowestLow })},
	{Symbol{"v_most", "speed at the lowest point without stretch, nothing lost", quantity.Speed}, placed(func(r *LayoutRun) float64 { return r.Swing.LowestHigh })},
	{Symbol{"dz_reach", "height to be bridged by the restraint", quantity.Length}, placed(func(r *LayoutRun) float64 { return max(0, max(r.Layout.Anchor.Z-r.Layout.DRing, -r.Layout.Anchor.Z)) })},
	{Symbol{"L_all", "connector and slack together", quantity.Length}, placed(func(r *LayoutRun) float64 { return r.Layout.Length + r.Layout.Slack })},
	{Symbol{"reach", "reach of the restraint in plan", quantity.Length}, placed(func(r *LayoutRun) float64 { return r.Restraint.Reach })},
	{Symbol{"x_dec", "deceleration distance as entered", quantity.Length}, placed(func(r *LayoutRun) float64 { return r.Given.Clearance.Entries[rig.ItemDeceleration].Value })},
	{Symbol{"h_total", "total fall distance", quantity.Length}, placed(func(r *LayoutRun) float64 { return r.totalFall(&r.Given) })},
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
	{Symbol{"J_x", "impulse of all forces along x", quantity.Impulse}, func(c *Case, p *Point) float64 { return p.Load.Change[0] }},
	{Symbol{"J_y", "impulse of all forces along y", quantity.Impulse}, func(c *Case, p *Point) float64 { return p.Load.Change[1] }},
	{Symbol{"J_z", "impulse of all forces along z", quantity.Impulse}, func(c *Case, p *Point) float64 { return p.Load.Change[2] }},
	{Symbol{"J", "impulse of all forces", quantity.Impulse}, func(c *Case, p *Point) float64 { return p.Load.Impulse }},
	{Symbol{"J_angle", "direction of the impulse from +x towards +y", quantity.Angle}, func(c *Case, p *Point) float64 { return bearing(p.Load.Change) }},
	{Symbol{"v1_x", "velocity before, along x", quantity.Speed}, func(c *Case, p *Point) float64 { return c.Load.Before[0] }},
	{Symbol{"v1_y", "velocity before, along y", quantity.Speed}, func(c *Case, p *Point) float64 { return c.Load.Before[1] }},
	{Symbol{"v1_z", "velocity before, along z", quantity.Speed}, func(c *Case, p *Point) float64 { return c.Load.Before[2] }},
	{Symbol{"v2_x", "velocity after, along x", quantity.Speed}, func(c *Case, p *Point) float64 { return c.Load.After[0] }},
	{Symbol{"v2_y", "velocity after, along y", quantity.Speed}, func(c *Case, p *Point) float64 { return c.Load.After[1] }},
	{Symbol{"v2_z", "velocity after, along z", quantity.Speed}, func(c *Case, p *Point) float64 { return c.Load.After[2] }},
	{Symbol{"v1", "speed before", quantity.Speed}, func(c *Case, p *Point) float64 { return norm(c.Load.Before) }},
	{Symbol{"v2", "speed after, along the velocity before", quantity.Speed}, func(c *Case, p *Point) float64 { return dot(c.Load.After, direction(c.Load.Before)) }},
	{Symbol{"v2_any", "speed after", quantity.Speed}, func(c *Case, p *Point) float64 { return norm(c.Load.After) }},
	{Symbol{"E_taken", "energy taken out of the motion", quantity.Energy}, func(c *Case, p *Point) float64 { return p.Load.Energy }},
	{Symbol{"D", "driving force along the velocity before", quantity.Force}, func(c *Case, p *Point) float64 { return c.Load.Driving }},
	{Symbol{"D_x", "driving force along x", quantity.Force}, func(c *Case, p *Point) float64 { return c.Load.Driving * direction(c.Load.Before)[0] }},
	{Symbol{"W_x", "weight, along x", quantity.Force}, func(c *Case, p *Point) float64 { return -p.Weight * c.Load.Up[0] }},
	{Symbol{"W_y", "weight, along y", quantity.Force}, func(c *Case, p *Point) float64 { return -p.Weight * c.Load.Up[1] }},
	{Symbol{"W_z", "weight, along z", quantity.Force}, func(c *Case, p *Point) float64 { return -p.Weight * c.Load.Up[2] }},
	{Symbol{"W_path", "weight along the velocity before", quantity.Force}, func(c *Case, p *Point) float64 { return -p.Weight * dot(c.Load.Up, direction(c.Load.Before)) }},
	{Symbol{"d_load", "distance along the path", quantity.Length}, func(c *Case, p *Point) float64 { return c.Load.Distance }},
	{Symbol{"t_load", "time of the stop", quantity.Time}, func(c *Case, p *Point) float64 { return c.Load.Time }},
	{Symbol{"F_x", "mean stopping force along x", quantity.Force}, func(c *Case, p *Point) float64 { return p.Load.Force[0] }},
	{Symbol{"F_y", "mean stopping force along y", quantity.Force}, func(c *Case, p *Point) float64 { return p.Load.Force[1] }},
	{Symbol{"F_z", "mean stopping force along z", quantity.Force}, func(c *Case, p *Point) float64 { return p.Load.Force[2] }},
	{Symbol{"F_stop_t", "mean stopping force over the time", quantity.Force}, func(c *Case, p *Point) float64 { return p.Load.OverTime }},
	{Symbol{"F_stop_d", "mean stopping force over the distance", quantity.Force}, func(c *Case, p *Point) float64 { return p.Load.OverDistance }},
	{Symbol{"F_angle", "direction of the mean stopping force from +x towards +y", quantity.Angle}, func(c *Case, p *Point) float64 { return bearing(p.Load.Force) }},
	{Symbol{"a_mean", "mean net deceleration", quantity.Acceleration}, func(c *Case, p *Point) float64 { return p.Load.Deceleration }},
	{Symbol{"r_load", "ratio of the two routes", quantity.Ratio}, func(c *Case, p *Point) float64 { return p.Load.Ratio }},
	{Symbol{"L", "length of all parts that state one", quantity.Length}, func(c *Case, p *Point) float64 { return c.Path.length(c) }},
	{Symbol{"f", "fall factor", quantity.Ratio}, func(c *Case, p *Point) float64 { return p.Model.FallFactor }},
	{Symbol{"k_path", "stiffness of the part", quantity.Stiffness}, func(c *Case, p *Point) float64 { return p.Model.parts[0].Stiffness }},
	{Symbol{"F_elastic", "peak by the closed form of one elastic part", quantity.Force}, func(c *Case, p *Point) float64 {
		return connector.ElasticPeak(p.TotalMass, p.Speed, p.Model.parts[0].Stiffness, c.Gravity)
	}},
	{Symbol{"F_a", "deployment force of the absorber", quantity.Force}, func(c *Case, p *Point) float64 { return p.Model.parts[0].Plateau.Force }},
	{Symbol{"x_a", "travel of the absorber alone by the closed form", quantity.Length}, func(c *Case, p *Point) float64 {
		return connector.AbsorberTravel(p.TotalMass, p.Speed, p.Model.parts[0].Plateau.Force, c.Gravity)
	}},
	{Symbol{"U", "rated impact force of the rope", quantity.Force}, func(c *Case, p *Point) float64 { return ratedRope(c) }},
	{Symbol{"W_0", "weight of the test mass", quantity.Force}, func(c *Case, p *Point) float64 { r := connector.SingleRope(1); return r.Mass * r.Gravity }},
	{Symbol{"f_0", "fall factor of the test", quantity.Ratio}, func(c *Case, p *Point) float64 { return connector.SingleRope(1).FallFactor }},
	{Symbol{"M_rope", "modulus of the rope", quantity.Force}, func(c *Case, p *Point) float64 { return connector.Modulus(connector.SingleRope(ratedRope(c))) }},
	{Symbol{"t_shape", "stopping time of the assumed shape", quantity.Time}, func(c *Case, p *Point) float64 { return shapeTime(c, p) }},
	{Symbol{"d_shape", "stopping distance of the assumed shape", quantity.Length}, func(c *Case, p *Point) float64 { return p.Assumed.Distance }},
	{Symbol{"F_shape", "peak if the stop had the assumed shape", quantity.Force}, func(c *Case, p *Point) float64 { return p.Assumed.Peak }},
}

// placed finds a symbol of the layout.
func placed(of func(*LayoutRun) float64) func(*Case, *Point) float64 {
	return func(c *Case, p *Point) float64 { return of(p.Layout) }
}

// overhang is d of the place over an edge (M-20).
func overhang(r *LayoutRun) float64 { return math.Hypot(r.Place.Taut.Y, r.Place.Taut.Z) }

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
	part     rests // only for the output that rests on this
}

// of reports whether the output is the one, or one of those, it leads to.
func (ps *passage) of(o *output) bool {
	return o.quantity == ps.quantity && o.evidence == ps.evidence && o.rests&ps.part == ps.part
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

func laid(c *Case, p *Point) bool       { return c.Layout != nil }
func overAnEdge(c *Case, p *Point) bool { return laid(c, p) && p.Layout.Place.OverEdge }
func hungFree(c *Case, p *Point) bool   { return laid(c, p) && !p.Layout.Place.OverEdge }
func flat(c *Case, p *Point) bool       { return p.Layout.Place.Plane.Flat }
func ofLine(c *Case, p *Point) bool     { return laid(c, p) && !p.Layout.Layout.Retractable }
func ofRetract(c *Case, p *Point) bool  { return laid(c, p) && p.Layout.Layout.Retractable }

func falling(c *Case, p *Point) bool           { return c.Load.Mass <= 0 }
func moving(c *Case, p *Point) bool            { return c.Load.Mass > 0 }
func straight(c *Case, p *Point) bool          { return c.Load.Axes == 1 }
func plane(c *Case, p *Point) bool             { return c.Load.Axes == 2 }
func space(c *Case, p *Point) bool             { return c.Load.Axes == 3 }
func loadTime(c *Case, p *Point) bool          { return c.Load.Time > 0 }
func loadDistance(c *Case, p *Point) bool      { return c.Load.Distance > 0 }
func loadDistanceAlone(c *Case, p *Point) bool { return c.Load.Distance > 0 && c.Load.Time <= 0 }

func shaped(as Pulse) func(*Case, *Point) bool {
	return func(c *Case, p *Point) bool { return c.Pulse == as }
}

func withRatedRope(c *Case, p *Point) bool { return ratedRope(c) > 0 }

// ratedRope is the impact force of the first rope that is known by it; 0 where
// none is.
func ratedRope(c *Case) float64 {
	for i := range c.Path.Parts {
		if pp := &c.Path.Parts[i]; pp.Basis == ByImpactForce {
			return c.Figures[pp.Give]
		}
	}
	return 0
}

func oneElastic(c *Case, p *Point) bool {
	return len(p.Model.parts) == 1 && p.Model.parts[0].Stiffness > 0 && p.Model.parts[0].Plateau.Force == 0
}

func oneAbsorber(c *Case, p *Point) bool {
	return len(p.Model.parts) == 1 && p.Model.parts[0].Stiffness == 0 && p.Model.parts[0].Plateau.Force > p.Weight
}

func not(a func(*Case, *Point) bool) func(*Case, *Point) bool {
	return func(c *Case, p *Point) bool { return !a(c, p) }
}

func and(a, b func(*Case, *Point) bool) func(*Case, *Point) bool {
	return func(c *Case, p *Point) bool { return a(c, p) && b(c, p) }
}

// passages is the working, in the order in which a person would do it.
var passages = [...]passage{
	{TotalMass, Given, []line{
		{"M-01", "m = m_worker + m_tools", falling},
		{"M-01", "W = m*g", nil},
	}, 0},
	{FreeFall, Given, []line{
		{"M-20", "s = sqrt(x_D^2 + (y_D - y_A)^2)", laid},
		{"M-20", "A_D = sqrt(s^2 + (z_A - z_D)^2)", ofRetract},
		{"M-20", "R = L_c + l_slack", ofLine},
		{"M-20", "R = min(A_D + l_lock, L_c)", ofRetract},
		{"M-20", "z_taut = z_A - sqrt(R^2 - s^2)", hungFree},
		{"M-20", "b = sqrt(y_A^2 + z_A^2)", overAnEdge},
		{"M-20", "d_edge = sqrt(R^2 - x_D^2) - b", overAnEdge},
		{"M-20", "z_taut = -sqrt(d_edge^2 - y_D^2)", overAnEdge},
		{"M-20", "h = z_D - z_taut", laid},
	}, 0},
	{OffsetAngle, Given, []line{{"M-22", "alpha = atan2(s, z_A - z_D)", nil}}, 0},
	{SwingAngle, Given, []line{{"M-22", "beta = asin(s_swing/R_swing)", nil}}, 0},
	{SwingDrop, Given, []line{{"M-22", "H = R_swing*(1 - cos(beta))", flat}}, 0},
	{SwingSpeed, Shape, []line{
		{"M-22", "v_least = sqrt((u^2 + 2*g*h)*sin(beta)^2 + 2*g*H)", nil},
		{"M-22", "v_most = sqrt(u^2 + 2*g*(h + H))", nil},
	}, 0},
	{RestraintReach, Given, []line{
		{"M-23", "L_all = L_c + l_slack", nil},
		{"M-23", "reach = sqrt(L_all^2 - dz_reach^2)", nil},
	}, 0},
	{TotalFallDistance, Given, []line{{"M-21", "h_total = h + x_dec", nil}}, 0},
	{FreeFall, Given, []line{{"M-01", "h_equal = h + u^2/(2*g)", withSpeed}}, 0},
	{FallSpeed, Given, []line{{"M-01", "v = sqrt(u^2 + 2*g*h)", nil}}, 0},
	{FallEnergy, Given, []line{{"M-01", "E = m*v^2/2", nil}}, 0},
	{Momentum, Given, []line{{"M-01", "p = m*v", falling}}, 0},
	{MeanForceOverDistance, Given, []line{
		{"M-02", "F_d = W + m*v^2/(2*d)", nil},
		{"M-02", "F_d_wrong = m*v^2/(2*d)", nil},
	}, 0},
	{MeanForceOverTime, Given, []line{
		{"M-03", "F_t = W + m*v/t", nil},
		{"M-03", "F_t_wrong = m*v/t", nil},
	}, 0},
	{ShapeRatio, Given, []line{{"M-04", "r = v*t/(2*d)", both}}, 0},
	{PeakForce, Given, []line{
		{"M-05", "d_limit = v*t + g*t^2/2", both},
		{"M-06", "tau = (2*d - v*t)/(v + g*t)", shortStop},
		{"M-06", "a = (v + g*tau)/(t - tau)", shortStop},
		{"M-06", "a = v^2/(2*d)", overDistance},
		{"M-06", "a = v/t", onlyTime},
		{"M-06", "F_floor = m*(g + a)", falling},
	}, 0},
	{ForceOverWeight, Given, []line{
		{"M-06", "tau = (2*d - v*t)/(v + g*t)", shortStop},
		{"M-06", "a = (v + g*tau)/(t - tau)", shortStop},
		{"M-06", "a = v^2/(2*d)", overDistance},
		{"M-06", "a = v/t", onlyTime},
		{"M-08", "n = 1 + a/g", falling},
	}, 0},
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
	}, 0},
	{ForceOverWeight, Shape, []line{{"M-08", "n_shape = F_shape/W", nil}}, 0},
	{OnsetRate, Shape, []line{{"M-08", "R_shape = F_shape/t_rise", nil}}, 0},

	{FallFactor, Given, []line{{"M-10", "f = h_equal/L", nil}}, 0},
	{PeakForce, Modelled, []line{
		{"M-11", "M_rope = U*(U - 2*W_0)/(2*W_0*f_0)", withRatedRope},
		{"M-10", "F_elastic = W + sqrt(W^2 + k_path*m*v^2)", oneElastic},
		{"M-12", "x_a = m*v^2/2/(F_a - W)", oneAbsorber},
	}, 0},

	{ImpulseX, Given, []line{{"M-60", "J_x = m*(v2_x - v1_x)", nil}}, 0},
	{ImpulseY, Given, []line{{"M-60", "J_y = m*(v2_y - v1_y)", nil}}, 0},
	{ImpulseZ, Given, []line{{"M-60", "J_z = m*(v2_z - v1_z)", nil}}, 0},
	{Impulse, Given, []line{
		{"M-60", "J = m*abs(v2_x - v1_x)", straight},
		{"M-60", "J = sqrt(J_x^2 + J_y^2)", plane},
		{"M-60", "J = sqrt(J_x^2 + J_y^2 + J_z^2)", space},
	}, 0},
	{ImpulseDirection, Given, []line{{"M-60", "J_angle = atan2(J_y, J_x)", nil}}, 0},
	{EnergyTaken, Given, []line{{"M-60", "E_taken = m*(v1^2 - v2_any^2)/2", nil}}, 0},
	{StoppingForceX, Given, []line{{"M-60", "F_x = J_x/t_load - W_x", nil}}, 0},
	{StoppingForceY, Given, []line{{"M-60", "F_y = J_y/t_load - W_y", nil}}, 0},
	{StoppingForceZ, Given, []line{{"M-60", "F_z = J_z/t_load - W_z", nil}}, 0},
	{StoppingForceDirection, Given, []line{{"M-60", "F_angle = atan2(F_y, F_x)", nil}}, 0},
	{StoppingForce, Given, []line{
		{"M-60", "F_stop_t = abs(m*(v2_x - v1_x)/t_load - W_x - D_x)", and(straight, loadTime)},
		{"M-60", "F_stop_t = sqrt(F_x^2 + F_y^2)", and(plane, loadTime)},
		{"M-60", "F_stop_t = sqrt(F_x^2 + F_y^2 + F_z^2)", and(space, loadTime)},
	}, onTime},
	{StoppingForce, Given, []line{{"M-60", "F_stop_d = W_path + D + m*(v1^2 - v2^2)/(2*d_load)", loadDistance}}, onDistance},
	{PeakForce, Given, []line{
		{"M-60", "F_floor = F_stop_t", and(loadTime, not(loadDistance))},
		{"M-60", "F_floor = F_stop_d", loadDistanceAlone},
		{"M-60", "F_floor = max(F_stop_d, F_stop_t)", and(loadTime, loadDistance)},
	}, ofLoad},
	{MeanDeceleration, Given, []line{
		{"M-60", "a_mean = J/(m*t_load)", loadTime},
		{"M-60", "a_mean = (v1^2 - v2^2)/(2*d_load)", loadDistanceAlone},
	}, 0},
	{ShapeRatio, Given, []line{{"M-60", "r_load = (v1 + v2)*t_load/(2*d_load)", moving}}, 0},
}

// working writes the working at the figures as written, where they have
// middles, and at both ends of each span.
func (ev *evaluation) working() {
	for i := range passages {
		for _, k := range ev.spans.live {
			if passages[i].of(&outputs[k]) && ev.spans.of[k].known() {
				ev.passage(&passages[i], &outputs[k], &ev.spans.of[k])
			}
		}
	}
}

// passage writes one passage. An end that lies between the corners, where a
// component goes through zero, has no lines of its own.
func (ev *evaluation) passage(ps *passage, o *output, s *span) {
	written := ev.allWritten(ev.restsOn(o.rests)) && !ev.written.Impossible && !math.IsNaN(o.of(&ev.written))
	if written {
		c := ev.job.Point
		c.Position = ev.spans.at[indexOf(o.quantity, o.evidence)]
		ev.lines(ps, o, AtWritten, c)
	}
	if written && s.low.value == s.high.value {
		return
	}
	ev.lines(ps, o, AtLow, ev.spans.caseAt(s.low))
	if !math.IsInf(s.high.value, 1) {
		ev.lines(ps, o, AtHigh, ev.spans.caseAt(s.high))
	}
}

func (ev *evaluation) lines(ps *passage, o *output, corner Corner, at Case) {
	c, p := &at, new(Point)
	At(c, p)
	if p.Layout != nil {
		c.FreeFall = p.Layout.Place.FreeFall // as the formulas read it
	}
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
	if o.bound == AtLeast && w.Result.Symbol != "tau" && w.Result.Symbol != "d_limit" {
		w.Rounding = quantity.Down
	}
	return w
}

// identifiers lists the letters of a formula, each once, in order: the first
// is the result. Functions and pi are no letters of a job.
func identifiers(formula string) []string {
	var names []string
	seen := func(n string) bool {
		for _, have := range names {
			if have == n {
				return true
			}
		}
		return n == "sqrt" || n == "abs" || n == "atan2" || n == "asin" || n == "sin" || n == "cos" || n == "max" || n == "min" || n == "pi"
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
