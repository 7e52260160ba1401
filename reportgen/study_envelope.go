package reportgen

import (
	"slices"
	"strconv"
	"strings"

	"arrestcheck/arrest/quantity"
	"arrestcheck/arrest/study"
	drawing "arrestcheck/reportgen/figure"
)

// An Envelope is an envelope with what its report needs beside it.
type Envelope struct {
	Sheet *Sheet // the job as entered
	Found *study.Envelope
	Units [2]quantity.Unit // across and up, as typed
	Log   [2]bool          // drawn in even ratios
}

// tableRows is over how many figures of the second input the table goes.
const tableRows = 9

// Report makes the report of an envelope: each limit that comes to more than one
// zone with its table and drawing, and the others in words.
func (v *Envelope) Report(units UnitChoice) (Report, error) {
	e := enveloping{newBuilder(v.Sheet, units), v}
	sections := []Section{{zonesHeading, []Block{{Lines: bullets(e.zonesFound())}}}}
	var still []string
	for i, l := range v.Found.Limits {
		zones := e.zones(i)
		if len(zones) == 1 {
			still = append(still, e.say(oneZone, upperFirst(e.title(l.Quantity)), e.limitTitle(l, false), zoneWords[zones[0]]))
			continue
		}
		scene, err := e.plot(i).Scene()
		if err != nil {
			return Report{}, err
		}
		sections = append(sections, Section{upperFirst(e.title(l.Quantity)) + ", " + e.limitTitle(l, false), []Block{{Table: e.table(i)}, {Figure: scene}}})
	}
	if len(still) > 0 {
		sections = append(sections, Section{stillHeading, []Block{{Lines: bullets(still)}}})
	}
	sections = append(sections, Section{effortHeading, []Block{{Text: e.say(effort, strconv.Itoa(v.Found.Evaluations), strconv.Itoa(v.Found.Dense))}}})
	return Report{Head: e.studyHead(e.moved()...), Warnings: e.warnings(), Sections: sections}, nil
}

// Changing lists the limits that come to more than one zone, as indexes into
// Found.Limits.
func (v *Envelope) Changing() []int {
	e := enveloping{newBuilder(v.Sheet, BothUnits), v}
	var list []int
	for i := range v.Found.Limits {
		if len(e.zones(i)) > 1 {
			list = append(list, i)
		}
	}
	return list
}

// Figure draws the regions of one limit. The error says that there is nothing to
// draw.
func (v *Envelope) Figure(limit int, units UnitChoice) (*drawing.Scene, error) {
	e := enveloping{newBuilder(v.Sheet, units), v}
	return e.plot(limit).Scene()
}

// An enveloping is the report of an envelope being made.
type enveloping struct {
	builder
	v *Envelope
}

func (e *enveloping) axes() [2]*study.Axis { return [2]*study.Axis{&e.v.Found.Across, &e.v.Found.Up} }

func (e *enveloping) moved() []Line {
	var list []Line
	for k, a := range e.axes() {
		u := e.v.Units[k]
		text := e.say(overRange, a.Key, format(a.Values[0], u, pageDigits, quantity.Nearest), format(a.Values[len(a.Values)-1], u, pageDigits, quantity.Nearest))
		list = append(list, Line{Label: movedLabel, Text: e.say(insteadOf, text, inputOf(&e.v.Sheet.File.Job, a.Key).Band.Text)})
	}
	return list
}

func (e *enveloping) warnings() []Line {
	axes := e.axes()
	own := []said{e.told(countedAsMeasured, textArgs(axes[0].Key, axes[1].Key)...), e.told(betweenPoints)}
	var grouped []string
	for _, l := range e.v.Found.Limits {
		if l.AnyOf != "" {
			grouped = append(grouped, l.ID)
		}
	}
	if len(grouped) > 0 {
		own = append(own, e.told(eachByItself, textArgs(strings.Join(grouped, ", "))...))
	}
	return e.studyWarnings(e.res().Estimates, own...)
}

// zones lists what a limit comes to anywhere, in print order.
func (e *enveloping) zones(limit int) []study.Zone {
	var seen [study.Within + 1]bool
	for j := range e.v.Found.Up.Values {
		for _, r := range e.v.Found.Runs(limit, j) {
			seen[r.Zone] = true
		}
	}
	var list []study.Zone
	for _, z := range zoneOrder {
		if seen[z] {
			list = append(list, z)
		}
	}
	return list
}

// zoneOrder is the print order of zones.
var zoneOrder = []study.Zone{study.Exceeded, study.Undecided, study.Capped, study.NotCompared, study.Impossible, study.Within}

// zonesFound explains the words of the zones that occur.
func (e *enveloping) zonesFound() []string {
	var list []string
	for _, z := range zoneOrder {
		for i := range e.v.Found.Limits {
			if slices.Contains(e.zones(i), z) {
				list = append(list, zoneWords[z]+": "+zoneMeaning[z])
				break
			}
		}
	}
	return list
}

// table says, for some figures of the second input, over which figures of the
// first one the limit comes to what.
func (e *enveloping) table(limit int) *Table {
	axes := e.axes()
	var fixed []strip
	rows := e.rows()
	for n, u := range e.d.pair(e.v.Units[1].Dimension, e.v.Units[1], greatestOf(axes[1].Values)) {
		one := strip{header: u.Symbol}
		if n == 0 {
			one.header = axes[1].Key + "\n" + one.header
		}
		var values []float64
		for _, j := range rows {
			values = append(values, axes[1].Values[j])
		}
		digits := axisDigits(values, u, n == 0)
		for _, v := range values {
			one.cells = append(one.cells, quantity.Number(v, u, min(digits, workingDigits), quantity.Nearest))
		}
		one.cells = aligned(one.cells)
		fixed = append(fixed, one)
	}
	t := tableOf(fixed)
	t.Header = append(t.Header, strings.Repeat("\n", strings.Count(t.Header[0], "\n"))+axes[0].Key)
	room := pageWidth
	for _, w := range t.Widths {
		room -= w + betweenTwo
	}
	t.Widths = append(t.Widths, room)
	for n, j := range rows {
		t.Rows[n].Cells = append(t.Rows[n].Cells, e.runsText(limit, j))
	}
	return t
}

// rows are the rows of the grid that the table shows, the greatest first, as in
// the drawing.
func (e *enveloping) rows() []int {
	last := len(e.v.Found.Up.Values) - 1
	var rows []int
	for k := range tableRows {
		rows = append(rows, last-(k*last)/(tableRows-1))
	}
	return rows
}

// runsText puts one row of the grid in words.
func (e *enveloping) runsText(limit, up int) string {
	edges := e.v.Found.Edges(limit, up)
	if len(edges) == 0 {
		return e.say(throughout, zoneWords[e.v.Found.Zone(limit, 0, up)])
	}
	at := func(x study.Edge) string {
		return e.d.figureAs(e.v.Units[0].Dimension, e.v.Units[0], x.X, pageDigits, x.Lower)
	}
	parts := []string{e.say(upToHere, zoneWords[edges[0].Below], at(edges[0]))}
	for i := range edges[1:] {
		parts = append(parts, e.say(fromHere, zoneWords[edges[i+1].Below], at(edges[i]), at(edges[i+1])))
	}
	last := edges[len(edges)-1]
	return strings.Join(append(parts, e.say(beyondHere, zoneWords[last.Over], at(last))), "; ")
}
