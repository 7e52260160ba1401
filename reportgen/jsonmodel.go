package reportgen

import (
	"math"

	"arrestcheck/arrest"
	"arrestcheck/arrest/connector"
	"arrestcheck/arrest/jobfile"
)

// jsonRun is the arrest worked out in time at one point, SI. Times count from
// the first pull.
type jsonRun struct {
	Corner               arrest.Corner `json:"corner"`
	TotalMass            figure        `json:"total_mass"`
	FreeFall             figure        `json:"free_fall"`
	InitialSpeed         figure        `json:"initial_speed"`
	End                  string        `json:"end"`
	PeakForce            figure        `json:"peak_force"`
	PeakTime             figure        `json:"peak_time"`
	AnchorForce          figure        `json:"anchor_force"`
	StoppingTime         figure        `json:"stopping_time"`
	StoppingDistance     figure        `json:"stopping_distance"`
	DecelerationDistance figure        `json:"deceleration_distance"`
	AbsorberTravel       figure        `json:"absorber_travel"`
	OnsetRate            figure        `json:"onset_rate"`
	SecondPeak           figure        `json:"second_peak"`
	SecondPeakTime       figure        `json:"second_peak_time"`
	Exhausted            []string      `json:"exhausted"`
	EnergyLeft           figure        `json:"energy_left"`
	BeyondPoints         []string      `json:"beyond_points"`
	Parts                []jsonPart    `json:"parts"`
	Ledger               jsonLedger    `json:"ledger"`
}

type jsonPart struct {
	Name         string `json:"name"`
	Kind         string `json:"kind"`
	TravelAtPeak figure `json:"travel_at_peak"`
	TravelAtRest figure `json:"travel_at_rest"`
	Permanent    figure `json:"permanent"`
	EnergyStored figure `json:"energy_stored"`
	EnergyLost   figure `json:"energy_lost"`
}

// jsonLedger holds what the accounts are made of, and what they leave over: 0
// where that is no more than rounding.
type jsonLedger struct {
	WeightImpulse  figure `json:"weight_impulse"`
	PathImpulse    figure `json:"path_impulse"`
	MomentumGained figure `json:"momentum_gained"`
	MomentumLeft   figure `json:"momentum_left"`
	EnergyBefore   figure `json:"energy_before"`
	WorkOfWeight   figure `json:"work_of_weight"`
	EnergyAfter    figure `json:"energy_after"`
	WorkOnParts    figure `json:"work_on_parts"`
	WorkOnDashpots figure `json:"work_on_dashpots"`
	EnergyLeft     figure `json:"energy_left"`
	EnergyStored   figure `json:"energy_stored"`
	EnergyLost     figure `json:"energy_lost"`
	PartsLeft      figure `json:"parts_left"`
}

// jsonVector is a vector by its components, its magnitude and its direction,
// null where one does not follow from the entries.
type jsonVector struct {
	Quantity  arrest.Quantity `json:"quantity"`
	Unit      string          `json:"unit"`
	X         *jsonSpan       `json:"x"`
	Y         *jsonSpan       `json:"y"`
	Z         *jsonSpan       `json:"z"`
	Magnitude *jsonSpan       `json:"magnitude"`
	Direction *jsonSpan       `json:"direction"` // rad, from +x towards +y
}

type jsonSpan struct {
	Low   figure `json:"low"`
	Value figure `json:"value"`
	High  figure `json:"high"`
}

// jsonOverride is an entry that was set on the command line.
type jsonOverride struct {
	Key    string  `json:"key"`
	Value  string  `json:"value"`
	Former *string `json:"former"`
}

// settledAt is a figure of a run, 0 where it is no more than rounding.
func settledAt(x float64) figure {
	if math.Abs(x) < noise {
		return 0
	}
	return figure(x)
}

func (b *builder) jsonRun(r *arrest.ModelRun) jsonRun {
	run, c := &r.Run, &r.Case
	j := jsonRun{
		Corner: r.Corner, TotalMass: figure(c.Mass + c.Tools), FreeFall: figure(caseFall(c)), InitialSpeed: figure(c.InitialSpeed),
		End: run.Status.String(), PeakForce: figure(run.Peak), PeakTime: figure(run.PeakTime - run.FirstPull),
		AnchorForce: figure(run.AnchorForce), StoppingTime: figure(run.StoppingTime),
		StoppingDistance: figure(run.StoppingDistance), DecelerationDistance: figure(run.DecelerationDistance),
		AbsorberTravel: figure(run.AbsorberTravel), OnsetRate: figure(run.Onset),
		SecondPeak: figure(run.SecondPeak), SecondPeakTime: figure(run.SecondPeakTime - run.FirstPull),
		Exhausted: b.names(run.Exhausted), EnergyLeft: figure(run.EnergyLeft), BeyondPoints: b.names(run.BeyondPoints),
		Parts: make([]jsonPart, len(run.Parts)), Ledger: newLedger(&run.Ledger),
	}
	for i := range run.Parts {
		p, plan := &run.Parts[i], &b.plan().Parts[i]
		j.Parts[i] = jsonPart{
			plan.Name, plan.Kind.String(), settledAt(p.AtPeak), settledAt(p.AtRest), settledAt(p.Permanent),
			settledAt(p.Stored), settledAt(p.Lost),
		}
	}
	return j
}

func newLedger(l *connector.Ledger) jsonLedger {
	return jsonLedger{
		figure(l.Weight), figure(l.Impulse), figure(l.Motion), settledAt(l.MomentumLeft),
		figure(l.Before), figure(l.Fallen), settledAt(l.After), figure(l.Work), figure(l.Viscous), settledAt(l.EnergyLeft),
		settledAt(l.Stored), settledAt(l.Lost), settledAt(l.PartsLeft),
	}
}

// jsonVectors are the vectors of a moving load with more than one component.
func (b *builder) jsonVectors() []jsonVector {
	list := []jsonVector{}
	for i := range vectors {
		v := &vectors[i]
		if b.find(v.components[0]) == nil {
			continue
		}
		j := jsonVector{Quantity: v.magnitude, Unit: siSymbol(v.magnitude), Direction: b.jsonSpan(v.direction)}
		for axis, to := range [...]**jsonSpan{&j.X, &j.Y, &j.Z} {
			*to = b.jsonSpan(v.components[axis])
		}
		j.Magnitude = b.jsonSpan(v.magnitude)
		list = append(list, j)
	}
	return list
}

func (b *builder) jsonSpan(q arrest.Quantity) *jsonSpan {
	e := b.find(q)
	if e == nil {
		return nil
	}
	return &jsonSpan{figure(e.Low), figure(e.Value), figure(e.High)}
}

func newOverride(o *jobfile.Change) jsonOverride {
	return jsonOverride{o.Key, o.Value, text(o.Former)}
}
