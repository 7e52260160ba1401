package arrest

import "arrestcheck/arrest/rig"

// rests says which inputs an output hangs on, and to which kind of job it
// belongs.
type rests uint16

const (
	onMass rests = 1 << iota
	onFall
	onDistance
	onTime
	onRise  // also what else drives the motion
	onParts // the figures of the connector path
	onLayout
	onClearance

	ofFall // the output is one of a fall
	ofLoad // the output is one of a moving load
	ofPath // the output is one of a connector path
	ofLayout
	ofModel // of a layout with a connector path

	places   = 8 // how many of the bits stand for inputs
	onInputs = ofFall - 1
	onStop   = onDistance | onTime
)

// applies reports whether the output is one of the kind of c.
func (o *output) applies(c *Case) bool {
	if c.Load.Mass > 0 {
		return o.rests&ofLoad != 0 && o.axes <= c.Load.Axes
	}
	switch {
	case o.rests&ofPath != 0:
		return c.Path != nil
	case o.rests&ofModel != 0:
		return c.Layout != nil && c.Path != nil
	case o.quantity == RestraintReach:
		return c.Layout != nil && c.Layout.Edge != rig.NoEdge
	case o.rests&ofLayout != 0:
		return c.Layout != nil
	}
	return o.rests&ofFall != 0 && (o.evidence != Shape || c.Pulse != NoPulse)
}

// An output ties a field of Point to the estimate made of it.
type output struct {
	quantity Quantity
	evidence Evidence
	method   string
	bound    Bound
	rests    rests
	of       func(*Point) float64
	axes     int // how many components the motion needs for it
}

// low returns the least of an output at one point, where a point has two ends:
// the speeds of a swing without stretch, and the peak of a swing, which a later
// swing may exceed up to a bound.
func (o *output) low(p *Point) float64 {
	if o.evidence == Modelled && p.Model != nil && p.Model.Swings {
		switch o.quantity {
		case PeakForce, AnchorForce:
			return p.Model.swungPeak(p)
		case ForceOverWeight:
			return p.Model.swungPeak(p) / p.Weight
		}
	}
	if o.evidence == Shape && o.quantity == SwingSpeed && p.Layout != nil && p.Layout.Place.Plane.Offset > 0 {
		return p.Layout.Swing.LowestLow
	}
	return o.of(p)
}

// layoutOf makes an output of a layout; NaN where a point has none.
func layoutOf(of func(*LayoutRun) float64) func(*Point) float64 {
	return func(p *Point) float64 {
		if p.Layout == nil {
			return nan
		}
		return of(p.Layout)
	}
}

// outputs is the one table of what At gives, in print order: peaks before
// means, what is given before what is assumed.
var outputs = [...]output{
	{PeakForce, Given, "M-06", AtLeast, ofFall | onMass | onFall | onDistance | onTime, func(p *Point) float64 { return p.Floor }, 0},
	{ForceOverWeight, Given, "M-08", AtLeast, ofFall | onFall | onDistance | onTime, func(p *Point) float64 { return p.FloorOverWeight }, 0},
	{PeakDeceleration, Given, "M-08", AtLeast, ofFall | onFall | onDistance | onTime, func(p *Point) float64 { return p.FloorDeceleration }, 0},
	{MeanForceOverDistance, Given, "M-02", Between, ofFall | onMass | onFall | onDistance, func(p *Point) float64 { return p.MeanOverDistance }, 0},
	{MeanForceOverTime, Given, "M-03", Between, ofFall | onMass | onFall | onTime, func(p *Point) float64 { return p.MeanOverTime }, 0},
	{ShapeRatio, Given, "M-04", Between, ofFall | onFall | onDistance | onTime, func(p *Point) float64 { return p.ShapeRatio }, 0},
	{TotalMass, Given, Entered, Between, ofFall | ofLoad | onMass, func(p *Point) float64 { return p.TotalMass }, 0},
	{FreeFall, Given, "M-01", Between, ofFall | onFall, func(p *Point) float64 { return p.FreeFall }, 0},
	{FallSpeed, Given, "M-01", Between, ofFall | onFall, func(p *Point) float64 { return p.Speed }, 0},
	{FallEnergy, Given, "M-01", Between, ofFall | onMass | onFall, func(p *Point) float64 { return p.Energy }, 0},
	{Momentum, Given, "M-01", Between, ofFall | onMass | onFall, func(p *Point) float64 { return p.Momentum }, 0},
	{PeakForce, Shape, "M-07", Between, ofFall | onMass | onFall | onDistance | onTime | onRise, func(p *Point) float64 { return p.Assumed.Peak }, 0},
	{ForceOverWeight, Shape, "M-08", Between, ofFall | onFall | onDistance | onTime | onRise, func(p *Point) float64 { return p.Assumed.OverWeight }, 0},
	{PeakDeceleration, Shape, "M-08", Between, ofFall | onFall | onDistance | onTime | onRise, func(p *Point) float64 { return p.Assumed.Deceleration }, 0},
	{OnsetRate, Shape, "M-08", Between, ofFall | onMass | onFall | onDistance | onTime | onRise, func(p *Point) float64 { return p.Assumed.Onset }, 0},
	{StoppingDistance, Shape, "M-07", Between, ofFall | onFall | onTime | onRise, func(p *Point) float64 { return p.Assumed.Distance }, 0},
	{StoppingTime, Shape, "M-07", Between, ofFall | onFall | onDistance | onRise, func(p *Point) float64 { return p.Assumed.Time }, 0},

	{PeakForce, Modelled, "M-15", Between, ofPath | onMass | onFall | onParts, func(p *Point) float64 { return p.Model.peak(p) }, 0},
	{ForceOverWeight, Modelled, "M-08", Between, ofPath | onMass | onFall | onParts, func(p *Point) float64 { return p.Model.peak(p) / p.Weight }, 0},
	{PeakDeceleration, Modelled, "M-08", Between, ofPath | onMass | onFall | onParts, func(p *Point) float64 { return p.Model.stopped(p.Model.Run.Peak)/p.TotalMass - p.Weight/p.TotalMass }, 0},
	{AnchorForce, Modelled, "M-15", Between, ofPath | onMass | onFall | onParts, func(p *Point) float64 { return p.Model.peak(p) }, 0},
	{OnsetRate, Modelled, "M-15", Between, ofPath | onMass | onFall | onParts, func(p *Point) float64 { return p.Model.stopped(p.Model.Run.Onset) }, 0},
	{StoppingDistance, Modelled, "M-15", Between, ofPath | onMass | onFall | onParts, func(p *Point) float64 { return p.Model.stopped(p.Model.Run.StoppingDistance) }, 0},
	{DecelerationDistance, Modelled, "M-15", Between, ofPath | onMass | onFall | onParts, func(p *Point) float64 { return p.Model.stopped(p.Model.Run.DecelerationDistance) }, 0},
	{AbsorberTravel, Modelled, "M-15", Between, ofPath | onMass | onFall | onParts, func(p *Point) float64 { return p.Model.stopped(p.Model.Absorber) }, 0},
	{StoppingTime, Modelled, "M-15", Between, ofPath | onMass | onFall | onParts, func(p *Point) float64 { return p.Model.stopped(p.Model.Run.StoppingTime) }, 0},
	{MeanForceOverDistance, Modelled, "M-15", Between, ofPath | onMass | onFall | onParts, func(p *Point) float64 { return p.Model.stopped(p.Model.Run.MeanOverDistance) }, 0},
	{MeanForceOverTime, Modelled, "M-15", Between, ofPath | onMass | onFall | onParts, func(p *Point) float64 { return p.Model.stopped(p.Model.Run.MeanOverTime) }, 0},
	{ShapeRatio, Modelled, "M-15", Between, ofPath | onMass | onFall | onParts, func(p *Point) float64 { return p.Model.ratio(p) }, 0},
	{FallFactor, Given, "M-10", Between, ofPath | onFall | onParts, func(p *Point) float64 { return p.Model.FallFactor }, 0},

	{OffsetAngle, Given, "M-22", Between, ofLayout | onLayout, layoutOf(func(r *LayoutRun) float64 { return r.Place.OffsetAngle }), 0},
	{SwingAngle, Given, "M-22", Between, ofLayout | onLayout, layoutOf(func(r *LayoutRun) float64 { return r.Place.SwingAngle }), 0},
	{SwingDrop, Given, "M-22", Between, ofLayout | onLayout, layoutOf(func(r *LayoutRun) float64 { return r.Place.SwingDrop }), 0},
	{RestraintReach, Given, "M-23", Between, ofLayout | onLayout, layoutOf(func(r *LayoutRun) float64 { return r.Restraint.Reach }), 0},
	{TotalFallDistance, Given, "M-21", Between, ofLayout | onLayout | onDistance | onClearance, layoutOf(func(r *LayoutRun) float64 { return r.totalFall(&r.Given) }), 0},
	{ClearanceNeeded, Given, "M-21", Between, ofLayout | onLayout | onDistance | onClearance, layoutOf(func(r *LayoutRun) float64 { return r.Given.needed() }), 0},
	{ClearanceLeft, Given, "M-21", Between, ofLayout | onLayout | onDistance | onClearance, layoutOf(func(r *LayoutRun) float64 { return r.Given.left() }), 0},
	{TotalFallDistance, Modelled, "M-21", Between, ofModel | onMass | onFall | onParts | onLayout, layoutOf(func(r *LayoutRun) float64 { return r.modelledFall }), 0},
	{ClearanceNeeded, Modelled, "M-21", Between, ofModel | onMass | onFall | onParts | onLayout | onClearance, layoutOf(func(r *LayoutRun) float64 { return r.Modelled.needed() }), 0},
	{ClearanceLeft, Modelled, "M-21", Between, ofModel | onMass | onFall | onParts | onLayout | onClearance, layoutOf(func(r *LayoutRun) float64 { return r.Modelled.left() }), 0},
	{SwingSpeed, Modelled, "M-24", Between, ofModel | onMass | onFall | onParts | onLayout, layoutOf((*LayoutRun).swungSpeed), 0},
	{SpeedAtObstacle, Modelled, "M-24", Between, ofModel | onMass | onFall | onParts | onLayout, layoutOf((*LayoutRun).swungPass), 0},
	{SwingSpeed, Shape, "M-22", Between, ofLayout | onFall | onLayout, layoutOf((*LayoutRun).swingSpeed), 0},
	{SpeedAtObstacle, Shape, "M-22", AtMost, ofLayout | onFall | onLayout, layoutOf((*LayoutRun).fastestPass), 0},

	{PeakForce, Given, "M-60", AtLeast, ofLoad | onMass | onFall | onDistance | onTime | onRise, func(p *Point) float64 { return p.Floor }, 0},
	{PeakDeceleration, Given, "M-60", AtLeast, ofLoad | onFall | onDistance | onTime, func(p *Point) float64 { return p.Load.Deceleration }, 0},
	{StoppingForce, Given, "M-60", Between, ofLoad | onMass | onFall | onTime | onRise, func(p *Point) float64 { return p.Load.OverTime }, 0},
	{StoppingForce, Given, "M-60", Between, ofLoad | onMass | onFall | onDistance | onRise, func(p *Point) float64 { return p.Load.OverDistance }, 0},
	{MeanDeceleration, Given, "M-60", Between, ofLoad | onFall | onDistance | onTime, func(p *Point) float64 { return p.Load.Deceleration }, 0},
	{ShapeRatio, Given, "M-60", Between, ofLoad | onFall | onDistance | onTime, func(p *Point) float64 { return p.Load.Ratio }, 0},
	{Impulse, Given, "M-60", Between, ofLoad | onMass | onFall, func(p *Point) float64 { return p.Load.Impulse }, 0},
	{EnergyTaken, Given, "M-60", Between, ofLoad | onMass | onFall, func(p *Point) float64 { return p.Load.Energy }, 0},
	{ImpulseX, Given, "M-60", Between, ofLoad | onMass | onFall, func(p *Point) float64 { return p.Load.Change[0] }, 2},
	{ImpulseY, Given, "M-60", Between, ofLoad | onMass | onFall, func(p *Point) float64 { return p.Load.Change[1] }, 2},
	{ImpulseZ, Given, "M-60", Between, ofLoad | onMass | onFall, func(p *Point) float64 { return p.Load.Change[2] }, 3},
	{ImpulseDirection, Given, "M-60", Between, ofLoad | onMass | onFall, func(p *Point) float64 { return bearing(p.Load.Change) }, 2},
	{StoppingForceX, Given, "M-60", Between, ofLoad | onMass | onFall | onTime | onRise, func(p *Point) float64 { return p.Load.Force[0] }, 2},
	{StoppingForceY, Given, "M-60", Between, ofLoad | onMass | onFall | onTime | onRise, func(p *Point) float64 { return p.Load.Force[1] }, 2},
	{StoppingForceZ, Given, "M-60", Between, ofLoad | onMass | onFall | onTime | onRise, func(p *Point) float64 { return p.Load.Force[2] }, 3},
	{StoppingForceDirection, Given, "M-60", Between, ofLoad | onMass | onFall | onTime | onRise, func(p *Point) float64 { return bearing(p.Load.Force) }, 2},
}

// indexOf returns the place of the first output of a quantity and evidence.
func indexOf(q Quantity, e Evidence) int {
	for i := range outputs {
		if outputs[i].quantity == q && outputs[i].evidence == e {
			return i
		}
	}
	panic("arrest: no output " + string(q))
}
