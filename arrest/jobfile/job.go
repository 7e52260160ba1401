package jobfile

import (
	"fmt"

	"arrestcheck/arrest"
	"arrestcheck/arrest/quantity"
	"arrestcheck/arrest/rig"
	"arrestcheck/limits"
)

// job reads everything of a job file but its limits.
func (t *table) job(f *File) {
	j := &f.Job
	j.Example = t.boolean("example")
	if s := t.section("document"); s != nil {
		f.Document = s.document()
	}
	t.together()
	e := t.entries(j)
	e.connectors(t)
	e.along()
	e.clearance(t)
	if s := t.section("model"); s != nil {
		e.add("model.allowance", arrest.OfModel, s.quantity("allowance"), nil)
	}
	e.gravity(t)
	for i, s := range t.sections("rated") {
		e.rated(j, s, i)
	}
	for _, s := range t.sections("elsewhere") {
		f.Elsewhere = append(f.Elsewhere, limits.Elsewhere{
			Quantity: arrest.Quantity(s.choice("quantity")), Where: s.text("where")})
	}
	j.Inputs, j.Notes = e.inputs, e.notes
	t.bands(j, e)
	if !e.refused {
		e.stands()
	}
	if !e.refused {
		e.standsEverywhere(j)
	}
	if !e.refused {
		t.impossible(j)
	}
}

func (t *table) document() Document {
	return Document{
		Title: t.text("title"), Site: t.text("site"), Reference: t.text("reference"),
		Revision: t.text("revision"), Date: t.text("date"), Purpose: t.text("purpose"),
		System: t.text("system"), Rescue: t.text("rescue"),
		PreparedBy: t.text("prepared_by"), CheckedBy: t.text("checked_by"),
		ReviewDate: t.text("review_date"),
	}
}

// entries reads what is stopped, how it moves, and how it stops.
func (t *table) entries(j *arrest.Job) *inputs {
	in := &inputs{point: &j.Point, inputs: make([]arrest.Input, 0, 8)}
	if s := t.section("moving_load"); s != nil {
		in.load(s)
	}
	if s := t.section("tool"); s != nil {
		in.add("tool.mass", arrest.OfWorker, s.quantity("mass"), setMass)
	}
	if list := t.sections("worker"); len(list) > 0 {
		in.workers(j, list)
	}
	in.sited = t.has("layout")
	in.fall(t)
	in.layouts(t)
	if s := t.section("stop"); s != nil {
		in.add("stop.distance", arrest.OfStop, s.quantity("distance"), setDistance)
		in.add("stop.time", arrest.OfStop, s.quantity("time"), setTime)
		j.Point.Pulse = pulseOf(s.choice("shape"))
		in.add("stop.rise_fraction", arrest.OfStop, s.quantity("rise_fraction"), setRise)
	}
	return in
}

// fall reads the motion before the first pull. Beside a layout a free fall is
// only compared with that of the layout.
func (in *inputs) fall(t *table) {
	s := t.section("fall")
	if s == nil {
		in.refused = in.refused || !in.sited || t.has("fall")
		return
	}
	set := setFreeFall
	if in.sited {
		set = nil
	}
	in.add("fall.free_fall", arrest.OfFall, s.quantity("free_fall"), set)
	in.add("fall.initial_speed", arrest.OfFall, s.quantity("initial_speed"), setInitialSpeed)
	in.refused = in.refused || !s.has("free_fall") && !s.has("initial_speed")
}

// mostBands is how many inputs may have two ends: every combination of their
// ends is worked out, 65,536 of them. A swing on a connector path takes far
// longer than a straight fall, so there it is mostSwinging, 4,096.
const (
	mostBands    = 16
	mostSwinging = 12
)

// bands refuses a job with more bands than can be worked out. Positions are
// worked out one after the other, so that the one with the most counts.
func (t *table) bands(j *arrest.Job, e *inputs) {
	most, why := mostBands, ""
	in := wide(j, most)
	if swinging := wide(j, mostSwinging); in == nil && swinging != nil && !e.refused && e.swings() {
		in, most, why = swinging, mostSwinging, "of a swing on a connector path "
	}
	if in == nil {
		return
	}
	e.refused = true
	t.page.fault(in.Key, in.Key, in.Band.Text, fmt.Sprintf("this is the %dth figure with a band; %severy combination of the ends of %d bands is worked out, and of more it is not", most+1, why, most),
		"write: one figure, with ± 0 where it is settled, in place of a band where the band is narrowest, here or further up")
}

// wide returns the input whose band is the first beyond so many, nil where the
// job has no more.
func wide(j *arrest.Job, most int) *arrest.Input {
	shared, own, worst := 0, [rig.MaxPositions + 1]int{}, 0
	for i := range j.Inputs {
		in := &j.Inputs[i]
		switch {
		case in.Set == nil || in.Band.Low == in.Band.High:
			continue
		case in.Position == 0:
			shared++
		default:
			own[in.Position]++
			worst = max(worst, own[in.Position])
		}
		if shared+worst > most {
			return in
		}
	}
	return nil
}

func pulseOf(word string) arrest.Pulse {
	for _, p := range arrest.Pulses() {
		if p.Name == word {
			return p.Pulse
		}
	}
	return arrest.NoPulse
}

// impossible refuses a distance and a time that no stop can have together.
func (t *table) impossible(j *arrest.Job) {
	reach, impossible := arrest.Impossible(j)
	if !impossible {
		return
	}
	unit := quantity.Length.SI()
	for i := range j.Inputs {
		if in := &j.Inputs[i]; in.Key == "stop.distance" {
			unit = in.Band.Unit
		}
	}
	most := quantity.Format(reach, unit, 5, quantity.Nearest)
	t.page.fault("stop.distance", "stop.distance and stop.time", "", fmt.Sprintf(
		"impossible together: in so short a time the body covers less than the distance, even without any pull; d < v t + g t^2/2 = %s", most),
		"measure: both again; one of the two figures, or the free fall, is not of this stop")
}
