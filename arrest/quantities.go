package arrest

import "arrestcheck/arrest/quantity"

// A Quantity is the id of something a report can state and a limit can bound.
type Quantity string

// The closed list of quantities. The ids are part of the file formats.
const (
	TotalMass               Quantity = "total_mass"
	FreeFall                Quantity = "free_fall"
	FallSpeed               Quantity = "fall_speed"
	FallEnergy              Quantity = "fall_energy"
	Momentum                Quantity = "momentum"
	MeanForceOverDistance   Quantity = "mean_force_over_distance"
	MeanForceOverTime       Quantity = "mean_force_over_time"
	ShapeRatio              Quantity = "shape_ratio"
	PeakForce               Quantity = "peak_force"
	MeanAboveLevel          Quantity = "mean_above_level"
	ForceOverWeight         Quantity = "force_over_weight"
	PeakDeceleration        Quantity = "peak_deceleration"
	OnsetRate               Quantity = "onset_rate"
	StoppingDistance        Quantity = "stopping_distance"
	StoppingTime            Quantity = "stopping_time"
	DecelerationDistance    Quantity = "deceleration_distance"
	FallFactor              Quantity = "fall_factor"
	AbsorberTravel          Quantity = "absorber_travel"
	TotalFallDistance       Quantity = "total_fall_distance"
	ClearanceNeeded         Quantity = "clearance_needed"
	ClearanceLeft           Quantity = "clearance_left"
	OffsetAngle             Quantity = "offset_angle"
	SwingAngle              Quantity = "swing_angle"
	SwingDrop               Quantity = "swing_drop"
	SwingSpeed              Quantity = "swing_speed"
	SpeedAtObstacle         Quantity = "speed_at_obstacle"
	RestraintReach          Quantity = "restraint_reach"
	AnchorForce             Quantity = "anchor_force"
	AnchorStrengthPerPerson Quantity = "anchor_strength_per_person"
	StrengthOverArrestForce Quantity = "strength_over_arrest_force"
	BridleLegForce          Quantity = "bridle_leg_force"
	LegLength               Quantity = "leg_length"
	LineTension             Quantity = "line_tension"
	LineSag                 Quantity = "line_sag"
	Impulse                 Quantity = "impulse"
	ImpliedFreeFall         Quantity = "implied_free_fall"
	StoppingForce           Quantity = "stopping_force"
	MeanDeceleration        Quantity = "mean_deceleration"
	EnergyTaken             Quantity = "energy_taken"
	ImpulseX                Quantity = "impulse_x"
	ImpulseY                Quantity = "impulse_y"
	ImpulseZ                Quantity = "impulse_z"
	ImpulseDirection        Quantity = "impulse_direction"
	StoppingForceX          Quantity = "stopping_force_x"
	StoppingForceY          Quantity = "stopping_force_y"
	StoppingForceZ          Quantity = "stopping_force_z"
	StoppingForceDirection  Quantity = "stopping_force_direction"
)

// QuantityRecord describes one Quantity for every reader of the list: limit
// files, reports, schema and help take titles and dimensions from here.
type QuantityRecord struct {
	ID        Quantity
	Title     string // as printed, in the words of the trade
	Dimension quantity.Dimension
}

var quantityRecords = [...]QuantityRecord{
	{TotalMass, "total mass", quantity.Mass},
	{FreeFall, "free fall", quantity.Length},
	{FallSpeed, "speed when the arrest begins", quantity.Speed},
	{FallEnergy, "energy of the fall", quantity.Energy},
	{Momentum, "momentum when the arrest begins", quantity.Impulse},
	{MeanForceOverDistance, "mean force over the distance", quantity.Force},
	{MeanForceOverTime, "mean force over the time", quantity.Force},
	{ShapeRatio, "shape ratio of the two routes", quantity.Ratio},
	{PeakForce, "peak force on the body", quantity.Force},
	{MeanAboveLevel, "mean force above a level", quantity.Force},
	{ForceOverWeight, "peak force over weight", quantity.Ratio},
	{PeakDeceleration, "peak net deceleration", quantity.Acceleration},
	{OnsetRate, "onset rate", quantity.ForceRate},
	{StoppingDistance, "stopping distance", quantity.Length},
	{StoppingTime, "stopping time", quantity.Time},
	{DecelerationDistance, "deceleration distance", quantity.Length},
	{FallFactor, "fall factor", quantity.Ratio},
	{AbsorberTravel, "absorber travel", quantity.Length},
	{TotalFallDistance, "total fall distance", quantity.Length},
	{ClearanceNeeded, "clearance needed", quantity.Length},
	{ClearanceLeft, "clearance left", quantity.Length},
	{OffsetAngle, "offset angle at work", quantity.Angle},
	{SwingAngle, "swing angle when taut", quantity.Angle},
	{SwingDrop, "drop of the swing", quantity.Length},
	{SwingSpeed, "speed of the swing", quantity.Speed},
	{SpeedAtObstacle, "speed at the obstacle", quantity.Speed},
	{RestraintReach, "reach of the restraint", quantity.Length},
	{AnchorForce, "force on the anchor", quantity.Force},
	{AnchorStrengthPerPerson, "anchor strength per person", quantity.Force},
	{StrengthOverArrestForce, "anchor strength over arrest force", quantity.Ratio},
	{BridleLegForce, "force in a bridle leg", quantity.Force},
	{LegLength, "length of a bridle leg", quantity.Length},
	{LineTension, "tension of the line", quantity.Force},
	{LineSag, "sag of the line", quantity.Length},
	{Impulse, "impulse", quantity.Impulse},
	{ImpliedFreeFall, "free fall implied by a record", quantity.Length},
	{StoppingForce, "mean stopping force", quantity.Force},
	{MeanDeceleration, "mean net deceleration", quantity.Acceleration},
	{EnergyTaken, "energy taken out of the motion", quantity.Energy},
	{ImpulseX, "impulse along x", quantity.Impulse},
	{ImpulseY, "impulse along y", quantity.Impulse},
	{ImpulseZ, "impulse along z", quantity.Impulse},
	{ImpulseDirection, "direction of the impulse from +x towards +y", quantity.Angle},
	{StoppingForceX, "mean stopping force along x", quantity.Force},
	{StoppingForceY, "mean stopping force along y", quantity.Force},
	{StoppingForceZ, "mean stopping force along z", quantity.Force},
	{StoppingForceDirection, "direction of the mean stopping force from +x towards +y", quantity.Angle},
}

// Quantities returns the records of all quantities, in print order.
func Quantities() []QuantityRecord { return quantityRecords[:] }

// Record returns the record of q and whether q is on the list.
func (q Quantity) Record() (QuantityRecord, bool) {
	for _, r := range quantityRecords {
		if r.ID == q {
			return r, true
		}
	}
	return QuantityRecord{}, false
}
