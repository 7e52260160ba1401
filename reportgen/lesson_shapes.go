package reportgen

import (
	"math"

	"arrestcheck/arrest"
	"arrestcheck/arrest/quantity"
	drawing "arrestcheck/reportgen/figure"
)

// shapesSection is one stop in several shapes: a table, and with answers a
// drawing on a screen of its own.
func (t *lesson) shapesSection() ([]Section, error) {
	var pulses []pulse
	name, peakOver := strip{header: shapeHead}, strip{header: overHead}
	took, mean, peak := strip{header: shapeTimeHead}, strip{header: meanTimeHead}, strip{header: peakHead}
	for _, shape := range lessonPulses {
		p := t.pulse(shape, t.Label)
		pulses = append(pulses, p)
		name.cells = append(name.cells, shape.String())
		peakOver.cells = append(peakOver.cells, t.answer(t.ratio(p.peak/p.mean)))
		took.cells = append(took.cells, t.answer(format(p.time, quantity.Time.SI(), pageDigits, quantity.Nearest)))
		mean.cells = append(mean.cells, t.answer(t.d.figure(quantity.Force, p.mean, pageDigits, quantity.Nearest)))
		peak.cells = append(peak.cells, t.answer(t.d.figure(quantity.Force, p.peak, pageDigits, quantity.Nearest)))
	}
	s := t.Stops[t.Label]
	same := t.say(sameMean, s.Name, t.big(quantity.Length, s.Distance), t.answer(t.big(quantity.Force, t.at[t.Label].MeanOverDistance)))
	sections := []Section{{lessonShapes, []Block{
		{Text: same},
		{Table: tableOf([]strip{name, peakOver, took, mean, peak})},
		{Lines: bullets(shapesMean)},
		{Text: shapeNote},
	}}}
	if !t.Answers {
		sections[0].Blocks = append(sections[0].Blocks, Block{Text: askSketch})
		return sections, nil
	}
	scene, err := t.pulsePlot(pulses).Scene()
	return append(sections, Section{lessonDrawn, []Block{{Figure: scene}}}), err
}

// pulsePlot draws the force over the time of some shapes.
func (t *lesson) pulsePlot(pulses []pulse) *drawing.Plot {
	kN := mustUnit("kN")
	p := &drawing.Plot{
		Title:     t.say(pulsesTitle, si(quantity.Length, t.Stops[t.Label].Distance)),
		Desc:      shapeNote,
		Statement: notAPermission,
		Notes:     []string{shapeNote},
		X:         drawing.Axis{Name: timeAxis, Unit: "s"},
		Y:         drawing.Axis{Name: forceAxis, Unit: kN.Symbol},
		Levels:    []drawing.Level{{At: kN.From(t.at[t.Label].Weight), Label: weightLevel, Pen: drawing.HelpPen}},
	}
	if t.Example {
		p.Stamp = exampleStamp
	}
	for i, one := range pulses {
		c := drawing.Curve{Label: one.shape.String(), Pen: sweepPens[i%len(sweepPens)]}
		const parts = 120
		for n := range parts + 1 {
			s := float64(n) / parts
			c.X, c.Y = append(c.X, s*one.time), append(c.Y, kN.From(one.force(s, t.at[t.Label].Weight)))
		}
		c.X, c.Y = append(append([]float64{0}, c.X...), one.time), append(append([]float64{0}, c.Y...), kN.From(t.at[t.Label].Weight))
		p.Curves = append(p.Curves, c)
	}
	return p
}

// force is that of the pulse when the share s of its time is over.
func (p *pulse) force(s, weight float64) float64 {
	switch p.shape {
	case arrest.RisingRamp:
		return p.peak * s
	case arrest.SpringLike:
		return p.peak * math.Sin(math.Pi/2*s)
	case arrest.EarlyPeak:
		return p.peak + float64(s*(weight-p.peak))
	}
	return p.peak
}
