package reportgen

import (
	"arrestcheck/arrest"
	"arrestcheck/arrest/quantity"
)

// A wrong sum stands beside the right one. All figures are in N; off is what the
// right one is more, worked out by its own formula.
type wrongBeside struct{ wrong, right, off float64 }

// forgotten is the mean over the distance without the weight: too low by W.
func (t *lesson) forgotten() wrongBeside {
	p := &t.at[t.Label]
	return wrongBeside{p.Energy / t.Stops[t.Label].Distance, p.MeanOverDistance, p.Weight}
}

// readAsPeak is the mean over the time of a rising ramp taken for its peak: too
// low by the same again, for that peak is twice the mean.
func (t *lesson) readAsPeak() wrongBeside {
	p := t.pulse(arrest.RisingRamp, t.Label)
	return wrongBeside{p.mean, p.peak, p.mean}
}

// atFeet is the mean over the distance with the anchor at the feet and the free
// fall taken as if it were at the D-ring: too low by W times the height of the
// D-ring over the distance.
func (t *lesson) atFeet() wrongBeside {
	d := t.Stops[t.Label].Distance
	p := t.stopped(d, t.FreeFall+t.DRing)
	return wrongBeside{t.at[t.Label].MeanOverDistance, p.MeanOverDistance, p.Weight * t.DRing / d}
}

// poundFactor is how many lb*ft/s2 make a lbf: standard gravity in ft/s2.
const poundFactor = 9.80665 / 0.3048

// pounds is the braking part of the mean with lb taken for lbf: too high by the
// factor poundFactor. off is the right one less the wrong one, below zero.
func (t *lesson) pounds() wrongBeside {
	p := &t.at[t.Label]
	brake := p.Energy / t.Stops[t.Label].Distance
	return wrongBeside{brake * poundFactor, brake, brake - float64(brake*poundFactor)}
}

func (t *lesson) weightForgotten() Section {
	w := t.forgotten()
	p := &t.at[t.Label]
	d := si(quantity.Length, t.Stops[t.Label].Distance)
	return t.wrongSection(wrongWeight, wrongWeightWhy,
		"m*v^2/(2*d)", t.say(brakeFigures, si(quantity.Mass, t.Mass), si(quantity.Speed, p.Speed), d), t.big(quantity.Force, w.wrong),
		"W + m*v^2/(2*d)", t.say(meanFigures, si(quantity.Force, p.Weight), si(quantity.Mass, t.Mass), si(quantity.Speed, p.Speed), d), t.big(quantity.Force, w.right),
		t.say(tooLowBy, t.big(quantity.Force, w.off), t.share(w), wrongWeightBy))
}

func (t *lesson) meanForPeak() Section {
	w := t.readAsPeak()
	p := t.pulse(arrest.RisingRamp, t.Label)
	at := &t.at[t.Label]
	mean := t.say(meanTimeFigures, si(quantity.Force, at.Weight), si(quantity.Mass, t.Mass), si(quantity.Speed, at.Speed), si(quantity.Time, p.time))
	return t.wrongSection(wrongPeak, wrongPeakWhy,
		"W + m*v/t", mean, t.big(quantity.Force, w.wrong),
		"2*(W + m*v/t)", "2*("+mean+")", t.big(quantity.Force, w.right),
		t.say(tooLowBy, t.big(quantity.Force, w.off), t.share(w), wrongPeakBy))
}

func (t *lesson) anchorAtFeet() Section {
	w := t.atFeet()
	p := &t.at[t.Label]
	d := si(quantity.Length, t.Stops[t.Label].Distance)
	high := t.stopped(t.Stops[t.Label].Distance, t.FreeFall+t.DRing)
	figures := func(speed float64) string {
		return t.say(meanFigures, si(quantity.Force, p.Weight), si(quantity.Mass, t.Mass), si(quantity.Speed, speed), d)
	}
	s := t.wrongSection(wrongFeet, t.say(wrongFeetWhy, t.big(quantity.Length, t.FreeFall), t.big(quantity.Length, t.DRing), t.big(quantity.Length, t.FreeFall+t.DRing)),
		t.say(freeFallIs, t.big(quantity.Length, t.FreeFall)), figures(p.Speed), t.big(quantity.Force, w.wrong),
		t.say(freeFallIs, t.answer(t.big(quantity.Length, t.FreeFall+t.DRing))), t.answer(figures(high.Speed)), t.big(quantity.Force, w.right),
		t.say(tooLowBy, t.big(quantity.Force, w.off), t.share(w), wrongFeetBy))
	return s
}

func (t *lesson) poundsForForce() Section {
	w := t.pounds()
	p := &t.at[t.Label]
	lb, fps, ft, lbf := mustUnit("lb"), mustUnit("ft/s"), mustUnit("ft"), mustUnit("lbf")
	figures := t.say(brakeFigures, format(t.Mass, lb, lessonDigits, quantity.Nearest), format(p.Speed, fps, lessonDigits, quantity.Nearest), format(t.Stops[t.Label].Distance, ft, lessonDigits, quantity.Nearest))
	pounds := func(x float64) string { return format(x, lbf, lessonDigits, quantity.Nearest) }
	s := t.wrongSection(wrongPounds, wrongPoundsWhy,
		"m*v^2/(2*d)", figures, pounds(w.wrong),
		"m*v^2/(2*d)/32.17", "("+figures+")/("+gravityFactor+")", pounds(w.right),
		t.say(tooHighBy, quantity.Number(poundFactor, quantity.Ratio.SI(), workingDigits, quantity.Nearest)))
	s.Blocks = append(s.Blocks, Block{Text: t.say(withWeight, t.answer(pounds(p.Weight)), t.answer(pounds(p.MeanOverDistance)))})
	return s
}

// share is what is missing, as a share of the right sum.
func (t *lesson) share(w wrongBeside) string {
	return format(w.off/w.right, mustUnit("%"), pageDigits, quantity.Nearest)
}

// wrongSection lays a wrong sum out beside the right one.
func (t *lesson) wrongSection(heading, why, wrong, wrongFigures, wrongResult, right, rightFigures, rightResult, off string) Section {
	blocks := []Block{
		{Text: why},
		{Lines: []Line{
			{Label: wrongLabel, Text: wrong, Loud: true},
			{Text: "= " + wrongFigures},
			{Text: "= " + t.answer(wrongResult)},
		}},
		{Lines: []Line{
			{Label: rightLabel, Text: t.answer(right)},
			{Text: "= " + t.answer(rightFigures)},
			{Text: "= " + t.answer(rightResult)},
		}},
	}
	if t.Answers {
		return Section{heading, append(blocks, Block{Text: off, Loud: true})}
	}
	return Section{heading, append(blocks, Block{Text: askOff}, Block{Text: t.answerText("")})}
}
