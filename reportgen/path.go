package reportgen

import (
	"math"
	"strconv"
	"strings"

	"arrestcheck/arrest"
	"arrestcheck/arrest/connector"
	"arrestcheck/arrest/quantity"
)

// plan is the connector path of the job, nil where none was entered.
func (b *builder) plan() *arrest.PathPlan { return b.s.File.Job.Point.Path }

// pathSections are the connector path: its parts from anchor to body, and what
// it does at each point that was worked out in time.
func (b *builder) pathSections() []Section {
	if b.plan() == nil {
		return nil
	}
	sections := []Section{{pathHeading, []Block{{Text: pathOrder, Table: b.partTable()}}}}
	runs := b.res().Runs
	for i := range runs {
		sections = append(sections, Section{b.say(runHeading, cornerWords[runs[i].Corner]), b.runBlocks(&runs[i])})
	}
	return sections
}

// partTable lists the parts with their figures as entered.
func (b *builder) partTable() *Table {
	t := &Table{Header: partsHead, Widths: []int{3, 22, 16, 33}, Rules: true}
	for i := range b.plan().Parts {
		p := &b.plan().Parts[i]
		t.Rows = append(t.Rows, Row{Cells: []string{
			strconv.Itoa(i + 1), flat(p.Name), p.Kind.String(), strings.Join(b.partFigures(i+1, p), "\n")}})
	}
	return t
}

// partFigures lists what was entered for a part, counted from 1.
func (b *builder) partFigures(number int, p *arrest.PlannedPart) []string {
	var list []string
	add := func(word string, figure int) {
		if figure != arrest.NoFigure {
			list = append(list, word+" "+b.entered(figure))
		}
	}
	add(lengthWord, p.Length)
	add(basisWords[p.Basis], p.Give)
	add(forceWord(p.Kind), p.Force)
	add(travelWord, p.Travel)
	add(activationWord, p.Activate)
	add(riseWord, p.Rise)
	add(lockingWord, p.Locking)
	for _, pt := range p.Points {
		list = append(list, b.say(pointWords, b.length(pt.Extension), b.force3(pt.Force)))
	}
	if p.Unloading > 0 {
		list = append(list, b.say(unloadingWords, b.d.figure(quantity.Stiffness, p.Unloading, pageDigits, quantity.Nearest)))
	}
	if p.Lifeline {
		list = append(list, lifelineWords)
	}
	if len(list) == 0 {
		list = []string{rigidWords}
	}
	for i := range b.s.File.Job.Ratings {
		if r := &b.s.File.Job.Ratings[i]; r.Part == number {
			list = append(list, b.say(partDocument, r.Document))
		}
	}
	return list
}

func forceWord(k connector.Kind) string {
	if word, ok := forceWords[k]; ok {
		return word
	}
	return heldForceWord
}

// entered returns the input that sets a figure of the path, as written.
func (b *builder) entered(figure int) string {
	for i := range b.res().Inputs {
		in := &b.res().Inputs[i]
		if in.Set == nil || in.Role != arrest.OfPart {
			continue
		}
		var c arrest.Case
		if in.Set(&c, 1); c.Figures[figure] != 0 {
			return flat(in.Band.Text)
		}
	}
	panic("reportgen: no input sets figure " + strconv.Itoa(figure) + " of the path")
}

func (b *builder) length(si float64) string { return b.three(quantity.Length, si) }
func (b *builder) force3(si float64) string { return b.three(quantity.Force, si) }

// three returns a figure with the digits of page 1, or what stands for one that
// a run did not come to.
func (b *builder) three(d quantity.Dimension, si float64) string {
	switch {
	case math.IsNaN(si):
		return notReached
	case math.IsInf(si, 1):
		return noUpperEnd
	case math.Abs(si) < noise:
		si = 0
	}
	return b.d.figure(d, si, pageDigits, quantity.Nearest)
}

// runBlocks are one run: what it came to, the travel part by part, the account
// of momentum and energy.
func (b *builder) runBlocks(r *arrest.ModelRun) []Block {
	blocks := []Block{{Text: b.runCase(&r.Case)}, {Table: b.runTable(&r.Run)}, {Table: b.travelTable(&r.Run)}}
	return append(blocks, b.ledgerBlocks(r)...)
}

// runCase says for which mass and fall the run holds.
func (b *builder) runCase(c *arrest.Case) string {
	mass, fall := b.three(quantity.Mass, c.Mass+c.Tools), b.length(caseFall(c))
	if c.InitialSpeed > 0 {
		return b.say(thrownCase, mass, fall, b.three(quantity.Speed, c.InitialSpeed))
	}
	return b.say(droppedCase, mass, fall)
}

// caseFall returns the free fall of a case, m: as entered, or that of its layout.
func caseFall(c *arrest.Case) float64 {
	if c.Layout == nil {
		return c.FreeFall
	}
	return arrest.LayoutAt(c).Place.FreeFall
}

// runTable is what the run came to.
func (b *builder) runTable(r *connector.Result) *Table {
	t := &Table{Header: []string{whatHead, figureHead}, Widths: []int{36, 42}}
	add := func(what, figure string) { t.Rows = append(t.Rows, Row{Cells: []string{what, figure}}) }
	if r.Exhausted != 0 {
		t.Rows = append(t.Rows, Row{Loud: true, Cells: []string{exhaustedWord, b.say(exhaustedRun,
			strings.Join(b.names(r.Exhausted), ", "), b.three(quantity.Energy, r.EnergyLeft))}})
	}
	add(endsWord, statusWords[r.Status])
	if r.BeyondPoints != 0 {
		add(beyondWord, flat(strings.Join(b.names(r.BeyondPoints), ", ")))
	}
	add(peakWord, b.force3(r.Peak))
	add(peakTimeWord, b.three(quantity.Time, r.PeakTime-r.FirstPull))
	add(restTimeWord, b.three(quantity.Time, r.StoppingTime))
	add(title(arrest.StoppingDistance), b.length(r.StoppingDistance))
	add(title(arrest.DecelerationDistance), b.length(r.DecelerationDistance))
	add(title(arrest.AbsorberTravel), b.length(r.AbsorberTravel))
	add(reboundWord, b.rebound(r))
	return t
}

// rebound says what came after the first rest.
func (b *builder) rebound(r *connector.Result) string {
	switch {
	case math.IsNaN(r.SecondPeak):
		return noSecondPeak
	case math.IsNaN(r.SecondPeakTime):
		return b.force3(r.SecondPeak)
	}
	return b.say(secondPeak, b.force3(r.SecondPeak), b.three(quantity.Time, r.SecondPeakTime-r.FirstPull))
}

// names lists the parts whose bits are set.
func (b *builder) names(set uint64) []string {
	list := []string{}
	for i := range b.plan().Parts {
		if set>>i&1 == 1 {
			list = append(list, b.plan().Parts[i].Name)
		}
	}
	return list
}

// travelTable is the travel part by part.
func (b *builder) travelTable(r *connector.Result) *Table {
	t := &Table{Header: travelHead, Widths: []int{23, 17, 17, 17}}
	for i := range r.Parts {
		p := &r.Parts[i]
		t.Rows = append(t.Rows, Row{Cells: []string{
			flat(b.plan().Parts[i].Name), b.length(p.AtPeak), b.length(p.AtRest), b.length(p.Permanent)}})
	}
	return t
}
