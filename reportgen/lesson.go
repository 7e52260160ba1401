package reportgen

import (
	"math"
	"slices"
	"strconv"
	"strings"

	"arrestcheck/arrest"
	"arrestcheck/arrest/quantity"
)

// A Lesson is one fall, stopped in several ways, with the sums that go wrong
// most often beside the right ones. Figures are in SI units.
type Lesson struct {
	Mass, FreeFall, InitialSpeed, Gravity float64

	Stops []LessonStop // from the shortest; two to four
	Label int          // the stop whose shapes and wrong sums are shown, an index
	DRing float64      // height of the D-ring above the feet

	Answers bool   // else results are blanks to be filled in
	Job     string // title of the job it was taken from; empty: of none
	Example bool   // that job is an example
	System  quantity.System
}

// A LessonStop is one way to stop.
type LessonStop struct {
	Name     string
	Distance float64
}

// A lesson is being made.
type lesson struct {
	*Lesson
	d  display
	at []arrest.Point // at each stop
}

func newLesson(l *Lesson, units UnitChoice) *lesson {
	t := &lesson{Lesson: l, d: display{units: units, system: l.System}}
	for _, s := range l.Stops {
		t.at = append(t.at, t.stopped(s.Distance, l.FreeFall))
	}
	return t
}

// stopped is what the mechanics say of the fall over one distance.
func (t *lesson) stopped(distance, fall float64) arrest.Point {
	var p arrest.Point
	arrest.At(&arrest.Case{Mass: t.Mass, FreeFall: fall, InitialSpeed: t.InitialSpeed, Gravity: t.Gravity, Distance: distance}, &p)
	return p
}

// Report makes the lesson: a section is a screen.
func (l *Lesson) Report(units UnitChoice) (Report, error) {
	t := newLesson(l, units)
	shapes, err := t.shapesSection()
	if err != nil {
		return Report{}, err
	}
	sections := []Section{t.opening(), t.speedSection(), t.meanSection(), t.sideBySide()}
	sections = append(sections, shapes...)
	sections = append(sections, t.everyPeak(), t.weightForgotten(), t.meanForPeak(), t.anchorAtFeet(), t.poundsForForce(), t.closing())
	for i := range sections {
		sections[i].Heading = strconv.Itoa(i+1) + " " + sections[i].Heading
	}
	return Report{Sections: sections}, nil
}

// emptyPlace stands in the place of a result that is to be worked out.
const emptyPlace = "__________"

// answer is a result, or the place for one.
func (t *lesson) answer(text string) string {
	if t.Answers {
		return text
	}
	return emptyPlace
}

func (t *lesson) say(p phrase, args ...string) string { return t.d.say(p, args...) }

// big is a figure as it stands on a screen, in all units.
func (t *lesson) big(dim quantity.Dimension, si float64) string {
	return t.d.figure(dim, si, lessonDigits, quantity.Nearest)
}

// lessonDigits are those of the figures of a lesson, all of them.
const lessonDigits = 4

// si is a figure in its SI unit, as it is put into a formula.
func si(dim quantity.Dimension, x float64) string {
	return format(x, dim.SI(), lessonDigits, quantity.Nearest)
}

// opening is the first screen.
func (t *lesson) opening() Section {
	blocks := []Block{{Text: notAPermission, Loud: true}}
	if t.Example {
		blocks = append(blocks, Block{Text: exampleBanner, Loud: true})
	}
	fall := []Line{
		{Label: lessonMass, Text: t.big(quantity.Mass, t.Mass)},
		{Label: lessonFall, Text: t.big(quantity.Length, t.FreeFall)},
	}
	if t.InitialSpeed > 0 {
		fall = append(fall, Line{Label: lessonSpeed, Text: t.big(quantity.Speed, t.InitialSpeed)})
	}
	if t.Gravity != arrest.StandardGravity {
		fall = append(fall, Line{Label: lessonGravity, Text: t.big(quantity.Acceleration, t.Gravity)})
	}
	var stops []Line
	for _, s := range t.Stops {
		stops = append(stops, Line{Label: s.Name, Text: t.big(quantity.Length, s.Distance)})
	}
	from := lessonOwn
	if t.Job != "" {
		from = t.say(lessonFrom, t.Job)
	}
	return Section{lessonTitle, append(blocks,
		Block{Text: lessonOnly.number + "  " + lessonOnly.text, Loud: true},
		Block{Text: from, Lines: fall},
		Block{Text: lessonStops, Lines: stops},
		Block{Text: lessonAsk[t.Answers]},
		Block{Text: lessonNever, Loud: true},
	)}
}

// speedSection is how fast the body comes to the stop.
func (t *lesson) speedSection() Section {
	p := t.at[0]
	steps := []Line{
		t.step("W", "W = m*g", t.say(twoFactors, si(quantity.Mass, t.Mass), si(quantity.Acceleration, t.Gravity)), quantity.Force, p.Weight),
		t.step("v", t.speedFormula(), t.speedFigures(), quantity.Speed, p.Speed),
		t.step("E", "E = m*v^2/2", t.say(energyFigures, si(quantity.Mass, t.Mass), t.answer(si(quantity.Speed, p.Speed))), quantity.Energy, p.Energy),
	}
	kmh, mph := mustUnit("km/h"), mustUnit("mph")
	fast := t.say(asFast, t.answer(format(p.Speed, kmh, pageDigits, quantity.Nearest)+" ("+format(p.Speed, mph, pageDigits, quantity.Nearest)+")"))
	return Section{lessonHowFast, append(t.steps(steps), Block{Text: fast},
		Block{Text: askTwice, Lines: []Line{{Label: "v", Text: t.answer(t.big(quantity.Speed, t.deeper().Speed))}, {Label: "E", Text: t.answer(t.big(quantity.Energy, t.deeper().Energy))}}},
		Block{Text: lessonEnergy})}
}

// deeper is the fall from twice as high.
func (t *lesson) deeper() arrest.Point { return t.stopped(t.Stops[0].Distance, 2*t.FreeFall) }

func (t *lesson) speedFormula() string {
	if t.InitialSpeed > 0 {
		return speedFromSpeed
	}
	return speedFromRest
}

func (t *lesson) speedFigures() string {
	text := t.say(fallFigures, si(quantity.Acceleration, t.Gravity), si(quantity.Length, t.FreeFall))
	if t.InitialSpeed > 0 {
		text = "(" + si(quantity.Speed, t.InitialSpeed) + ")^2 + " + text
	}
	return "sqrt(" + text + ")"
}

// A step is a formula, the figures put in, and the result.
func (t *lesson) step(symbol, formula, figures string, dim quantity.Dimension, result float64) Line {
	return Line{Label: symbol, Text: formula + "\n" + figures + "\n" + t.answer(t.big(dim, result))}
}

// steps sets steps one below the other, each line of a step on its own.
func (t *lesson) steps(list []Line) []Block {
	var blocks []Block
	for _, s := range list {
		parts := strings.Split(s.Text, "\n")
		b := Block{Lines: []Line{{Text: parts[0]}}}
		for _, p := range parts[1:] {
			b.Lines = append(b.Lines, Line{Text: s.Label + " = " + p})
		}
		blocks = append(blocks, b)
	}
	return blocks
}

// meanSection works the mean force over each distance out.
func (t *lesson) meanSection() Section {
	blocks := []Block{{Text: lessonMeanWhy}, {Lines: []Line{{Text: meanFormula}}}}
	for i, s := range t.Stops {
		p := &t.at[i]
		blocks = append(blocks, Block{Lines: []Line{
			{Label: s.Name, Text: t.say(meanFigures, si(quantity.Force, p.Weight), si(quantity.Mass, t.Mass), si(quantity.Speed, p.Speed), si(quantity.Length, s.Distance))},
			{Text: "= " + si(quantity.Force, p.Weight) + " + " + t.answer(si(quantity.Force, p.MeanOverDistance-p.Weight))},
			{Text: "= " + t.answer(t.big(quantity.Force, p.MeanOverDistance))},
		}})
	}
	return Section{lessonMean, append(blocks, Block{Text: lessonMeanShort})}
}

// barLength is that of the longest bar, in characters.
const barLength = 44

// sideBySide shows the stops in one table and as bars.
func (t *lesson) sideBySide() Section {
	names, distance := strip{header: stopHead}, strip{header: distanceHead}
	force, times := strip{header: meanHead}, strip{header: timesHead}
	brake, took := strip{header: brakeHead}, strip{header: tookHead}
	var bars []Line
	most := 0.0
	for i := range t.Stops {
		most = max(most, t.at[i].MeanOverDistance)
	}
	for i, s := range t.Stops {
		p := &t.at[i]
		over := p.MeanOverDistance / p.Weight
		names.cells = append(names.cells, s.Name)
		distance.cells = append(distance.cells, format(s.Distance, quantity.Length.SI(), pageDigits, quantity.Nearest))
		force.cells = append(force.cells, t.answer(t.d.figure(quantity.Force, p.MeanOverDistance, pageDigits, quantity.Nearest)))
		times.cells = append(times.cells, t.answer(t.ratio(over)))
		brake.cells = append(brake.cells, t.answer(t.ratio(over-1)))
		took.cells = append(took.cells, t.answer(format(2*s.Distance/p.Speed, quantity.Time.SI(), pageDigits, quantity.Nearest)))
		bar := strings.Repeat("#", max(int(math.Round(barLength*p.MeanOverDistance/most)), 1))
		if !t.Answers {
			bar = emptyPlace
		}
		bars = append(bars, Line{Label: s.Name, Text: bar + " " + t.answer(format(p.MeanOverDistance, mustUnit("kN"), pageDigits, quantity.Nearest))})
	}
	first, last := &t.at[0], &t.at[len(t.at)-1]
	much := t.say(howMuch, t.Stops[0].Name, t.answer(t.ratio(first.MeanOverDistance/last.MeanOverDistance)), t.Stops[len(t.Stops)-1].Name)
	return Section{lessonBeside, []Block{
		{Table: tableOf([]strip{names, distance, force, times, brake, took})},
		{Text: barsOf, Lines: bars},
		{Text: much, Loud: true},
		{Text: lessonFloor},
	}}
}

func (t *lesson) ratio(x float64) string {
	return quantity.Number(x, quantity.Ratio.SI(), pageDigits, quantity.Nearest)
}

// lessonPulses are the shapes of the lesson.
var lessonPulses = []arrest.Pulse{arrest.Constant, arrest.RisingRamp, arrest.SpringLike, arrest.EarlyPeak}

// A pulse is a stop of one shape over one distance.
type pulse struct {
	shape      arrest.Pulse
	time, peak float64
	mean       float64 // over the time
}

func (t *lesson) pulse(shape arrest.Pulse, stop int) pulse {
	p := &t.at[stop]
	took := shape.TimeOf(p.Speed, t.Stops[stop].Distance, t.Gravity, 0)
	return pulse{shape, took, shape.PeakOf(p.TotalMass, p.Speed, took, t.Gravity, 0), p.Weight + float64(p.TotalMass*(p.Speed/took))}
}

// everyPeak is the table of all stops and shapes.
func (t *lesson) everyPeak() Section {
	strips := []strip{{header: stopHead}}
	for range lessonPulses {
		strips = append(strips, strip{})
	}
	for i, s := range t.Stops {
		strips[0].cells = append(strips[0].cells, s.Name+"\n"+format(s.Distance, quantity.Length.SI(), pageDigits, quantity.Nearest))
		for k, shape := range lessonPulses {
			strips[k+1].header = t.say(ifPulse, shape.String())
			strips[k+1].cells = append(strips[k+1].cells, t.answer(t.d.figure(quantity.Force, t.pulse(shape, i).peak, pageDigits, quantity.Nearest)))
		}
	}
	table := tableOf(strips)
	table.Widths = []int{10, 15, 15, 15, 15}
	table.Rules = true
	return Section{lessonPeaks, []Block{{Text: lessonPeaksWhy}, {Table: table}, {Text: askWhich}, {Text: t.answerText(whichAnswer)}}}
}

func (t *lesson) answerText(s string) string {
	if t.Answers {
		return s
	}
	return strings.Repeat(emptyPlace+" ", 6)
}

// closing is the last screen.
func (t *lesson) closing() Section {
	return Section{lessonEnd, []Block{
		{Lines: bullets(slices.Clone(lessonRemember))},
		{Lines: []Line{{Label: hanging.number, Text: hanging.text}, {Label: notThisStop.number, Text: notThisStop.text}, {Label: whoDecides.number, Text: whoDecides.text}}},
	}}
}
