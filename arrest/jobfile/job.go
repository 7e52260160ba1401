package jobfile

import (
	"fmt"

	"arrestcheck/arrest"
	"arrestcheck/arrest/quantity"
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
	t.bands(j)
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
	if s := t.section("fall"); s != nil {
		in.add("fall.free_fall", arrest.OfFall, s.quantity("free_fall"), setFreeFall)
		in.add("fall.initial_speed", arrest.OfFall, s.quantity("initial_speed"), setInitialSpeed)
		in.refused = in.refused || !s.has("free_fall") && !s.has("initial_speed")
	} else {
		in.refused = true
	}
	if s := t.section("stop"); s != nil {
		in.add("stop.distance", arrest.OfStop, s.quantity("distance"), setDistance)
		in.add("stop.time", arrest.OfStop, s.quantity("time"), setTime)
		j.Point.Pulse = pulseOf(s.choice("shape"))
		in.add("stop.rise_fraction", arrest.OfStop, s.quantity("rise_fraction"), setRise)
	}
	return in
}

// mostBands is how many inputs may have two ends: every combination of their
// ends is worked out, 65,536 of them.
const mostBands = 16

// bands refuses a job with more bands than can be worked out.
func (t *table) bands(j *arrest.Job) {
	n := 0
	for i := range j.Inputs {
		in := &j.Inputs[i]
		if in.Set == nil || in.Band.Low == in.Band.High {
			continue
		}
		if n++; n == mostBands+1 {
			t.page.fault(in.Key, in.Key, in.Band.Text, fmt.Sprintf("this is the %dth figure with a band; every combination of the ends of %d bands is worked out, and of more it is not", n, mostBands),
				"write: one figure in place of a band where the band is narrowest, here or further up")
		}
	}
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
