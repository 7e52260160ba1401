package reportgen

import (
	"errors"
	"math"
	"slices"
	"strings"

	"arrestcheck/arrest"
	"arrestcheck/arrest/quantity"
	"arrestcheck/arrest/rig"
	drawing "arrestcheck/reportgen/figure"
)

// over says what a figure of the modelled arrest has along its level axis.
type over uint8

const (
	overTime over = iota
	overTravel
)

// An arrestCurve is the modelled arrest as figures show it, SI. Times and travel
// count from the first pull.
type arrestCurve struct {
	time, travel, force []float64
	peak                float64 // of the run; the moments come close to it
	peakAt              int     // the moment that comes closest
	swing               bool

	restTime, restTravel   float64 // the first rest; of a swing the time of its lowest point, and NaN
	meanTime, meanDistance float64 // NaN of a swing
}

// pathFigure draws the force of the modelled arrest.
func (b *builder) pathFigure(o over) (*drawing.Scene, error) {
	if b.s.File.Job.Point.Path == nil {
		return nil, &NoFigure{noPathDrawn, noPathHint}
	}
	at, c := b.arrestCase()
	if c == nil {
		return nil, &NoFigure{noFallDrawn, noFallHint}
	}
	curve, err := curveOfCase(c)
	if err != nil {
		return nil, err
	}
	return b.arrestPlot(curve, o, at).Scene()
}

// arrestCase returns the point that is drawn, and in words which it is: as
// written or, where some entries are ranges, at the greatest peak; of a layout at
// the position of the greatest peak. It is nil where there is none.
func (b *builder) arrestCase() (at string, c *arrest.Case) {
	if l := b.res().Layout; l != nil {
		return b.hardestPlace(l)
	}
	for i := range b.res().Runs {
		switch r := &b.res().Runs[i]; r.Corner {
		case arrest.AtWritten:
			return drawnAt[r.Corner], &r.Case
		case arrest.AtHigh:
			at, c = peakAt, &r.Case
		}
	}
	return at, c
}

// hardestPlace returns the point of the layout with the greatest peak.
func (b *builder) hardestPlace(l *arrest.LayoutResult) (at string, c *arrest.Case) {
	most := math.Inf(-1)
	for i := range l.Places {
		place := &l.Places[i]
		var p arrest.Point
		arrest.At(&place.Case, &p)
		if p.Model == nil || p.Model.Failed != nil || p.Model.NoFall {
			continue
		}
		peak := p.Model.Run.Peak
		if p.Model.Swings {
			peak = p.Layout.Planar.Peak
		}
		if math.IsInf(most, -1) || peak > most {
			most, c = peak, &place.Case
			at = b.say(placeAndCorner, flat(l.Plan.Positions[place.Index].Name), drawnAt[place.Corner])
		}
	}
	return at, c
}

// curveOfCase works the arrest at one point out.
func curveOfCase(at *arrest.Case) (*arrestCurve, error) {
	states, err := arrest.Series(at)
	switch {
	case errors.Is(err, arrest.ErrNoStraightStop):
		return swungCurve(at)
	case err != nil:
		return nil, err
	}
	var p arrest.Point
	arrest.At(at, &p)
	r := &p.Model.Run
	if math.IsInf(r.Peak, 0) || !isNumber(r.StoppingTime) {
		return nil, &NoFigure{noRestDrawn, noRestHint}
	}
	c := &arrestCurve{peak: r.Peak, restTime: r.StoppingTime, restTravel: r.StoppingDistance, meanTime: r.MeanOverTime, meanDistance: r.MeanOverDistance}
	for _, m := range states {
		if m.Time >= r.FirstPull {
			c.add(m.Time-r.FirstPull, m.X, m.F)
		}
	}
	return c.found()
}

// swungCurve is the arrest in the plane of a swing.
func swungCurve(at *arrest.Case) (*arrestCurve, error) {
	states, err := arrest.SwingSeries(at)
	switch {
	case errors.Is(err, arrest.ErrNoSwing):
		return nil, &NoFigure{noFallDrawn, noFallHint}
	case err != nil:
		return nil, err
	}
	l := arrest.LayoutAt(at)
	if !isNumber(l.Planar.Peak) || !l.Planar.Lowest.Reached {
		return nil, &NoFigure{noRestDrawn, noRestHint}
	}
	return swungStates(states, &l.Planar, &l.Place).found()
}

// swungStates takes the moments of a swing from its first pull on.
func swungStates(states []rig.PlanarState, r *rig.Planar, p *rig.Place) *arrestCurve {
	c := &arrestCurve{swing: true, peak: r.Peak, restTime: r.Lowest.Time - r.FirstPull, restTravel: nan64, meanTime: nan64, meanDistance: nan64}
	for _, m := range states {
		if m.Time >= r.FirstPull*(1-1e-12) {
			c.add(m.Time-r.FirstPull, math.Hypot(m.U, p.Plane.Pivot-m.Z)-p.Plane.Radius, m.F)
		}
	}
	return c
}

func (c *arrestCurve) add(time, travel, force float64) {
	c.time, c.travel, c.force = append(c.time, max(0, time)), append(c.travel, travel), append(c.force, max(0, force))
}

// found looks for the peak.
func (c *arrestCurve) found() (*arrestCurve, error) {
	if len(c.force) == 0 {
		return nil, &NoFigure{noRestDrawn, noRestHint}
	}
	for i, f := range c.force {
		if f > c.force[c.peakAt] {
			c.peakAt = i
		}
	}
	return c, nil
}

// arrestPlot lays the figure out.
func (b *builder) arrestPlot(c *arrestCurve, o over, at string) *drawing.Plot {
	peak := c.peak
	y := b.d.pair(quantity.Force, quantity.Unit{}, peak)[0]
	x, along, name := b.d.pair(quantity.Time, quantity.Unit{}, 1)[0], c.time, pullTimeAxis
	title, desc := timeTitle, timeDesc
	if o == overTravel {
		x, along, name = b.d.pair(quantity.Length, quantity.Unit{}, 1)[0], c.travel, pullTravelAxis
		title, desc = travelTitle, travelDesc
		if c.swing {
			name = stretchAxis
		}
	}
	p := &drawing.Plot{
		Title:     b.say(title, at, orNothing(b.s.File.Document.Title)),
		Statement: notAPermission,
		X:         drawing.Axis{Name: name, Unit: unitHead(x)},
		Y:         drawing.Axis{Name: arrestForceAxis[b.sub], Unit: unitHead(y)},
		Notes:     b.arrestNotes(c),
		Aside:     true,
	}
	if b.s.isExample() {
		p.Stamp = exampleStamp
	}
	curve := drawing.Curve{Pen: drawing.CurvePen}
	for i := range along {
		curve.X, curve.Y = append(curve.X, x.From(along[i])), append(curve.Y, y.From(c.force[i]))
	}
	p.Curves = []drawing.Curve{curve}
	force := func(f float64) string { return format(f, y, pageDigits, quantity.Nearest) }
	p.Points = []drawing.Marked{{X: x.From(along[c.peakAt]), Y: y.From(peak), Symbol: drawing.Open}}
	p.Levels = []drawing.Level{{At: y.From(peak), From: x.From(along[c.peakAt]), To: math.Nextafter(x.From(along[c.peakAt]), math.Inf(1)), Label: b.say(peakPoint, force(peak)), Pen: drawing.HelpPen}}
	limits := b.peakLimits(p, y)
	b.means(p, c, o, x, y)
	b.restLine(p, c, o, x)
	p.Desc = b.say(desc, force(peak), limits)
	return p
}

// peakLimits draws the user's limits on the peak force and lists them.
func (b *builder) peakLimits(p *drawing.Plot, y quantity.Unit) string {
	var drawn []string
	for i := range b.s.File.Sets {
		for k := range b.s.File.Sets[i].Limits {
			l := &b.s.File.Sets[i].Limits[k]
			if l.Quantity != arrest.PeakForce {
				continue
			}
			label := b.say(limitDrawn, flat(l.ID), senseWords[l.Sense], flat(l.Bound.Text))
			drawn = append(drawn, label)
			p.Levels = append(p.Levels, drawing.Level{At: y.From(l.Bound.Value), Label: label, Pen: drawing.LimitPen})
		}
	}
	if len(drawn) == 0 {
		return noneDrawn
	}
	return strings.Join(drawn, "; ")
}

// means draws both means over what they are a mean of.
func (b *builder) means(p *drawing.Plot, c *arrestCurve, o over, x, y quantity.Unit) {
	if c.swing {
		return
	}
	end := x.From(c.restTime)
	if o == overTravel {
		end = x.From(c.restTravel)
	}
	add := func(mean float64, label phrase, pen drawing.Pen) {
		p.Levels = append(p.Levels, drawing.Level{At: y.From(mean), To: end, Label: b.say(label, format(mean, y, pageDigits, quantity.Nearest)), Pen: pen})
	}
	add(c.meanDistance, meanDistance, drawing.MeanPen)
	add(c.meanTime, meanTime, drawing.Pen{Weight: drawing.Medium, Dash: drawing.Dashes})
}

// restLine marks the first rest, or the lowest point of a swing.
func (b *builder) restLine(p *drawing.Plot, c *arrestCurve, o over, x quantity.Unit) {
	at, label := c.restTime, firstRestTime
	switch {
	case c.swing && o == overTravel:
		return
	case c.swing:
		label = lowestTime
	case o == overTravel:
		at, label = c.restTravel, firstRestAt
	}
	if isNumber(at) {
		p.Uprights = []drawing.Level{{At: x.From(at), Label: b.say(label, format(at, x, pageDigits, quantity.Nearest)), Pen: drawing.HelpPen}}
	}
}

// arrestNotes are what stands below the figure.
func (b *builder) arrestNotes(c *arrestCurve) []string {
	notes := []string{bareNote}
	if c.swing {
		return append(notes, heldFlatNote)
	}
	return slices.Clip(append(notes, meanNote[b.sub]))
}
