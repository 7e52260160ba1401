package arrest

import (
	"math"
	"strings"

	"arrestcheck/arrest/connector"
	"arrestcheck/arrest/quantity"
)

// AllowanceInput returns the input with the user's allowance for the error of
// the model, nil where none was entered.
func (j *Job) AllowanceInput() *Input {
	for i := range j.Inputs {
		if j.Inputs[i].Role == OfModel {
			return &j.Inputs[i]
		}
	}
	return nil
}

// modelled adds to an estimate what belongs to the model as a whole.
func (ev *evaluation) modelled(e *Estimate) {
	n := &ev.spans.path
	e.Exhausted, e.Harder = n.exhausted, nan
	e.Beyond = n.beyond != 0 || n.rigid
	for i := range ev.job.Inputs {
		if ev.job.Inputs[i].Role == OfModel {
			e.Allowance = ev.job.Inputs[i].Band.High
			e.Harder = ev.harder(e)
			e.Uses = append(e.Uses[:len(e.Uses):len(e.Uses)], i)
		}
	}
}

// exhaustedInAllowance reports whether a travel that the model alone does not
// use up may be used up within the user's allowance.
func (ev *evaluation) exhaustedInAllowance() bool {
	n, in := &ev.spans.path, ev.job.AllowanceInput()
	return in != nil && !n.exhausted && n.used*(1+in.Band.High) > 1
}

// harder returns the upper end of a modelled estimate with every travel
// shortened by the allowance, NaN where that changes nothing.
func (ev *evaluation) harder(e *Estimate) float64 {
	if !ev.exhaustedInAllowance() {
		return nan
	}
	if ev.short == nil {
		j := *ev.job
		plan := *j.Point.Path
		plan.Shorter = 1 / (1 + ev.job.AllowanceInput().Band.High)
		j.Point.Path = &plan
		ev.short, _ = overCorners(&j)
	}
	s := &ev.short.of[indexOf(e.Quantity, Modelled)]
	if e.Quantity == ClearanceLeft {
		return s.low.value
	}
	return s.high.value
}

// runs keeps the modelled arrest as written, at the greatest peak and at the
// longest stop: the peak may be the same all over a band, and the room is not.
func (ev *evaluation) runs() {
	if ev.job.Point.Path == nil {
		return
	}
	add := func(corner Corner, c Case) {
		var p Point
		At(&c, &p)
		if p.Model.Failed == nil && !p.Model.NoFall && !p.Model.Swings {
			ev.res.Runs = append(ev.res.Runs, ModelRun{corner, c, p.Model.Run})
		}
	}
	peak := &ev.spans.of[indexOf(PeakForce, Modelled)]
	written := ev.allWritten(ev.restsOn(onMass | onFall | onParts))
	if written {
		c := ev.job.Point
		c.Position = ev.spans.at[indexOf(PeakForce, Modelled)]
		add(AtWritten, c)
	}
	if peak.known() && !(written && peak.low.value == peak.high.value) {
		add(AtHigh, ev.spans.caseAt(peak.high))
	}
	long := &ev.spans.of[indexOf(StoppingDistance, Modelled)]
	if long.known() && long.low.value != long.high.value && ev.spans.caseAt(long.high) != ev.spans.caseAt(peak.high) {
		add(AtLongest, ev.spans.caseAt(long.high))
	}
}

// warnPath says what the model has to say, the loudest first.
func (ev *evaluation) warnPath() {
	plan := ev.job.Point.Path
	if plan == nil {
		return
	}
	n := &ev.spans.path
	if n.exhausted {
		ev.tell(PathExhausted, Text(plan.Parts[n.part].Name),
			Figure(quantity.Energy, n.left, quantity.Nearest), Figure(quantity.Force, n.peak, quantity.Nearest))
	}
	if ev.exhaustedInAllowance() {
		needed := n.usedUp * (1 + ev.job.AllowanceInput().Band.High)
		ev.tell(PathExhaustedInAllowance, Text(plan.Parts[n.usedBy].Name), Figure(quantity.Length, needed, quantity.Up), length(n.usedOf))
	}
	if n.rigid {
		ev.tell(PathRigid)
	}
	if names := plan.beyondNames(n.beyond); len(names) > 0 {
		ev.tell(PathBeyondCurve, Text(strings.Join(names, ", ")))
	}
	ev.warnParts(plan)
	if ev.job.AllowanceInput() == nil {
		ev.tell(NoAllowanceEntered)
	}
	ev.warnRatedParts()
	for i := range ev.res.Runs {
		if l := &ev.res.Runs[i].Run.Ledger; i == 0 && l.Impulse != 0 {
			ev.tell(LedgersClose, ratio(math.Abs(l.MomentumLeft/l.Impulse)), ratio(math.Abs(l.EnergyLeft)/(l.Before+math.Abs(l.Fallen))))
		}
	}
}

// warnParts looks at what stands in the path together.
func (ev *evaluation) warnParts(plan *PathPlan) {
	var absorbers, retractables []string
	absorbs, stretches := false, false
	for i := range plan.Parts {
		pp := &plan.Parts[i]
		switch pp.Kind {
		case connector.Absorber:
			absorbers = append(absorbers, pp.Name)
		case connector.Retractable:
			retractables = append(retractables, pp.Name)
		}
		absorbs = absorbs || pp.Force != NoFigure
		stretches = stretches || pp.Kind == connector.Rope && (pp.Basis == ByImpactForce || pp.Basis == ByModulus)
		if pp.Basis == ByStaticStretch {
			ev.tell(StaticStretchOnly, Text(pp.Name))
		}
	}
	if len(absorbers) > 1 {
		ev.tell(SeveralAbsorbers, Text(strings.Join(absorbers, ", ")))
	}
	if len(absorbers) > 0 && len(retractables) > 0 {
		ev.tell(AbsorberOnRetractable, Text(strings.Join(append(absorbers, retractables...), ", ")))
	}
	if !absorbs && !stretches {
		i := ev.res.estimate(PeakForce, Modelled)
		if i >= 0 && ev.falls() {
			ev.tell(NothingAbsorbs, Figure(quantity.Force, ev.res.Estimates[i].High, quantity.Nearest))
		}
	}
}

// falls reports whether the body falls freely anywhere in the entries.
func (ev *evaluation) falls() bool {
	if ev.job.Point.Layout == nil {
		return ev.hi.FreeFall > 0
	}
	return ev.spans.of[indexOf(FreeFall, Given)].high.value > 0
}

// warnRatedParts compares what documents promise with what the model does.
func (ev *evaluation) warnRatedParts() {
	for i := range ev.res.Estimates {
		r := &ev.res.Estimates[i]
		if r.Evidence != Rated || r.Outside {
			continue
		}
		k := ev.res.estimate(r.Quantity, Modelled)
		if k < 0 || !(ev.res.Estimates[k].High > r.High) {
			continue
		}
		rec, _ := r.Quantity.Record()
		ev.tell(RatedAgainstModel, Text(r.From), Text(rec.Title),
			Figure(rec.Dimension, r.High, quantity.Nearest), Figure(rec.Dimension, ev.res.Estimates[k].High, quantity.Nearest))
	}
}
