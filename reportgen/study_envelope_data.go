package reportgen

import (
	"io"

	"arrestcheck/arrest"
	"arrestcheck/arrest/study"
)

// EnvelopeFormat is the first value of the JSON of an envelope.
const EnvelopeFormat = "arrestcheck envelope 1"

type envelopeDocument struct {
	studyDocument
	Across      jsonRange        `json:"across"`
	Up          jsonRange        `json:"up"`
	Evaluations int              `json:"evaluations"`
	Dense       int              `json:"points"`
	Limits      []jsonRegionedBy `json:"limits"`
}

type jsonRange struct {
	Key   string `json:"key"`
	Unit  string `json:"unit"`
	Low   figure `json:"low"`
	High  figure `json:"high"`
	Steps int    `json:"steps"`
	Log   bool   `json:"even_ratios"`
}

type jsonRegionedBy struct {
	Limit      string          `json:"limit"`
	Quantity   arrest.Quantity `json:"quantity"`
	Zones      []string        `json:"zones"`
	Rows       []jsonZoneRow   `json:"rows"`
	Boundaries []jsonBoundary  `json:"boundaries"`
}

type jsonZoneRow struct {
	Up    figure     `json:"up"`
	First string     `json:"first"` // the zone at the low end across
	Edges []jsonEdge `json:"edges"`
}

type jsonEdge struct {
	At    figure `json:"at"`
	Over  string `json:"zone"` // beyond it
	Lower string `json:"lower_demand"`
}

type jsonBoundary struct {
	Closed bool        `json:"closed"`
	Points [][2]figure `json:"points"` // across, up
}

// JSON writes the envelope as one JSON document on one line: SI units, 12
// significant digits. The error is that of to.
func (v *Envelope) JSON(to io.Writer) error {
	e := enveloping{newBuilder(v.Sheet, SIUnits), v}
	doc := envelopeDocument{
		studyDocument: e.studyDocument(EnvelopeFormat, e.warnings()),
		Across:        e.jsonRange(0), Up: e.jsonRange(1),
		Evaluations: v.Found.Evaluations, Dense: v.Found.Dense,
		Limits: []jsonRegionedBy{},
	}
	for i := range v.Found.Limits {
		doc.Limits = append(doc.Limits, e.jsonLimit(i))
	}
	return encode(to, doc)
}

func (e *enveloping) jsonRange(k int) jsonRange {
	a := e.axes()[k]
	last := len(a.Values) - 1
	return jsonRange{a.Key, e.v.Units[k].Dimension.SI().Symbol, figure(a.Values[0]), figure(a.Values[last]), last, e.v.Log[k]}
}

func (e *enveloping) jsonLimit(limit int) jsonRegionedBy {
	axes := e.axes()
	l := e.v.Found.Limits[limit]
	zones := e.zones(limit)
	d := jsonRegionedBy{Limit: l.ID, Quantity: l.Quantity, Zones: each(zones, func(z *study.Zone) string { return z.String() }),
		Rows: []jsonZoneRow{}, Boundaries: []jsonBoundary{}}
	for _, j := range e.rows() {
		d.Rows = append(d.Rows, jsonZoneRow{figure(axes[1].Values[j]), e.v.Found.Zone(limit, 0, j).String(),
			each(e.v.Found.Edges(limit, j), func(x *study.Edge) jsonEdge {
				return jsonEdge{figure(x.X), x.Over.String(), lowerSide(x.Lower)}
			})})
	}
	for _, b := range e.v.Found.Boundaries(limit) {
		d.Boundaries = append(d.Boundaries, jsonBoundary{b.Closed, each(b.Points, func(p *[2]float64) [2]figure {
			return [2]figure{figure(figureAt(axes[0].Values, p[0])), figure(figureAt(axes[1].Values, p[1]))}
		})})
	}
	return d
}

// CSV writes every row of the grid, limit by limit: neighbouring points in one
// zone are one line, with the figures of the first and the last of them, SI. The
// error is that of to.
func (v *Envelope) CSV(to io.Writer) error {
	e := enveloping{newBuilder(v.Sheet, SIUnits), v}
	axes := e.axes()
	c := newCSV(to)
	unit := func(k int) string { return " (" + v.Units[k].Dimension.SI().Symbol + ")" }
	for _, head := range []string{"limit", axes[1].Key + unit(1), axes[0].Key + " from" + unit(0), axes[0].Key + " to" + unit(0), "zone"} {
		c.text(head)
	}
	c.end()
	for i, l := range v.Found.Limits {
		for j, up := range axes[1].Values {
			for _, r := range v.Found.Runs(i, j) {
				c.text(l.ID)
				c.figure(up)
				c.figure(axes[0].Values[r.From])
				c.figure(axes[0].Values[r.To])
				c.text(r.Zone.String())
				c.end()
			}
		}
	}
	return c.out.Flush()
}
