package reportgen

import (
	"math"

	"arrestcheck/arrest/quantity"
	"arrestcheck/arrest/study"
	drawing "arrestcheck/reportgen/figure"
)

// plot draws the regions of a limit.
func (e *enveloping) plot(limit int) *drawing.Plot {
	l := e.v.Found.Limits[limit]
	axes := e.axes()
	var units [2]quantity.Unit
	var drawn [2]drawing.Axis
	for k, a := range axes {
		units[k] = e.d.pair(e.v.Units[k].Dimension, e.v.Units[k], greatestOf(a.Values))[0]
		drawn[k] = drawing.Axis{Name: a.Key, Unit: unitHead(units[k]), Log: e.v.Log[k],
			Low: units[k].From(a.Values[0]), High: units[k].From(a.Values[len(a.Values)-1])}
	}
	p := &drawing.Plot{
		Title:     e.say(envelopeTitle, upperFirst(e.title(l.Quantity)), e.limitTitle(l, false), orNothing(e.v.Sheet.File.Document.Title)),
		Statement: notAPermission,
		X:         drawn[0], Y: drawn[1],
		Notes: []string{e.say(asIfMeasured, axes[0].Key, axes[1].Key)},
	}
	if e.s.isExample() {
		p.Stamp = exampleStamp
	}
	if isMean(l.Quantity) {
		p.Notes = append(p.Notes, meanNote[e.sub])
	}
	at := func(points [][2]float64) (x, y []float64) {
		for _, q := range points {
			x = append(x, units[0].From(figureAt(axes[0].Values, q[0])))
			y = append(y, units[1].From(figureAt(axes[1].Values, q[1])))
		}
		return x, y
	}
	g := gridOf(e.v.Found, limit)
	parts := g.parts()
	for _, part := range parts {
		x, y := at(part.ring)
		r := regionOf(part.zone, x, y)
		if worthAWord(part, parts, len(g.zones)) {
			r.Label = zoneWords[part.zone]
		}
		p.Regions = append(p.Regions, r)
	}
	for _, b := range e.v.Found.Boundaries(limit) {
		x, y := at(b.Points)
		p.Curves = append(p.Curves, drawing.Curve{X: x, Y: y, Pen: drawing.Pen{Weight: drawing.Medium}})
	}
	e.jobPlace(p, units)
	p.Desc = e.envelopeDesc(limit)
	return p
}

// worthAWord reports whether a part has its word in it: the largest of its zone,
// and any that is not small.
func worthAWord(part gridPart, parts []gridPart, all int) bool {
	const small = 0.05 // of the whole
	for _, other := range parts {
		if other.zone == part.zone && other.points > part.points {
			return float64(part.points) >= small*float64(all)
		}
	}
	return true
}

// regionOf hatches a part by its zone.
func regionOf(zone study.Zone, x, y []float64) drawing.Region {
	r := drawing.Region{X: x, Y: y}
	switch zone {
	case study.Exceeded:
		r.Hatching = drawing.Crossed
	case study.Undecided:
		r.Hatching = drawing.Rising
	case study.Capped:
		r.Hatching = drawing.Falling
	default:
		r.Plain = true
	}
	return r
}

// figureAt returns the figure at a place counted in steps.
func figureAt(values []float64, at float64) float64 {
	at = min(max(at, 0), float64(len(values)-1))
	i := min(int(math.Floor(at)), len(values)-2)
	f := at - float64(i)
	return values[i] + float64(f*(values[i+1]-values[i]))
}

// jobPlace marks the job: a point, or the box of its bands.
func (e *enveloping) jobPlace(p *drawing.Plot, units [2]quantity.Unit) {
	axes := e.axes()
	a, b := &inputOf(&e.v.Sheet.File.Job, axes[0].Key).Band, &inputOf(&e.v.Sheet.File.Job, axes[1].Key).Band
	u, v := units[0], units[1]
	if a.Low == a.High && b.Low == b.High {
		p.Points = append(p.Points, drawing.Marked{X: u.From(a.Low), Y: v.From(b.Low), Label: thisJob, Symbol: drawing.Filled})
		return
	}
	p.Curves = append(p.Curves, drawing.Curve{
		X:   []float64{u.From(a.Low), u.From(a.High), u.From(a.High), u.From(a.Low), u.From(a.Low)},
		Y:   []float64{v.From(b.Low), v.From(b.Low), v.From(b.High), v.From(b.High), v.From(b.Low)},
		Pen: drawing.Pen{Weight: drawing.Medium, Dash: drawing.Dashes}, Label: thisJob,
	})
}

// envelopeDesc says which zones there are, for those who do not see the drawing.
func (e *enveloping) envelopeDesc(limit int) string {
	text := ""
	for i, z := range e.zones(limit) {
		if i > 0 {
			text += ", "
		}
		text += zoneWords[z]
	}
	return e.say(regionsAre, text)
}
