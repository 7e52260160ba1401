package arrest

// rests says which inputs an output hangs on.
type rests uint8

const (
	onMass rests = 1 << iota
	onFall
	onDistance
	onTime
	onRise
)

// An output ties a field of Point to the estimate made of it.
type output struct {
	quantity Quantity
	evidence Evidence
	method   string
	bound    Bound
	rests    rests
	of       func(*Point) float64
}

// outputs is the one table of what At gives, in print order: peaks before
// means, what is given before what is assumed.
var outputs = [...]output{
	{PeakForce, Given, "M-06", AtLeast, onMass | onFall | onDistance | onTime, func(p *Point) float64 { return p.Floor }},
	{ForceOverWeight, Given, "M-08", AtLeast, onFall | onDistance | onTime, func(p *Point) float64 { return p.FloorOverWeight }},
	{PeakDeceleration, Given, "M-08", AtLeast, onFall | onDistance | onTime, func(p *Point) float64 { return p.FloorDeceleration }},
	{MeanForceOverDistance, Given, "M-02", Between, onMass | onFall | onDistance, func(p *Point) float64 { return p.MeanOverDistance }},
	{MeanForceOverTime, Given, "M-03", Between, onMass | onFall | onTime, func(p *Point) float64 { return p.MeanOverTime }},
	{ShapeRatio, Given, "M-04", Between, onFall | onDistance | onTime, func(p *Point) float64 { return p.ShapeRatio }},
	{TotalMass, Given, Entered, Between, onMass, func(p *Point) float64 { return p.TotalMass }},
	{FreeFall, Given, "M-01", Between, onFall, func(p *Point) float64 { return p.FreeFall }},
	{FallSpeed, Given, "M-01", Between, onFall, func(p *Point) float64 { return p.Speed }},
	{FallEnergy, Given, "M-01", Between, onMass | onFall, func(p *Point) float64 { return p.Energy }},
	{Momentum, Given, "M-01", Between, onMass | onFall, func(p *Point) float64 { return p.Momentum }},
	{PeakForce, Shape, "M-07", Between, onMass | onFall | onDistance | onTime | onRise, func(p *Point) float64 { return p.Assumed.Peak }},
	{ForceOverWeight, Shape, "M-08", Between, onFall | onDistance | onTime | onRise, func(p *Point) float64 { return p.Assumed.OverWeight }},
	{PeakDeceleration, Shape, "M-08", Between, onFall | onDistance | onTime | onRise, func(p *Point) float64 { return p.Assumed.Deceleration }},
	{OnsetRate, Shape, "M-08", Between, onMass | onFall | onDistance | onTime | onRise, func(p *Point) float64 { return p.Assumed.Onset }},
	{StoppingDistance, Shape, "M-07", Between, onFall | onTime | onRise, func(p *Point) float64 { return p.Assumed.Distance }},
	{StoppingTime, Shape, "M-07", Between, onFall | onDistance | onRise, func(p *Point) float64 { return p.Assumed.Time }},
}

// indexOf returns the place of a quantity and evidence in outputs.
func indexOf(q Quantity, e Evidence) int {
	for i := range outputs {
		if outputs[i].quantity == q && outputs[i].evidence == e {
			return i
		}
	}
	panic("arrest: no output " + string(q))
}
