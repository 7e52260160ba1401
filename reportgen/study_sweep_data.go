package reportgen

import (
	"io"

	"arrestcheck/arrest"
	"arrestcheck/arrest/quantity"
	"arrestcheck/arrest/study"
	"arrestcheck/limits"
)

// SweepFormat is the first value of the JSON of a sweep.
const SweepFormat = "arrestcheck sweep 1"

// CSV writes the points of the sweep, one a row, in SI units with 12
// significant digits; the first row names the columns with their units. A cell
// is empty where there is no figure. The error is that of w.
func (w *Sweep) CSV(to io.Writer) error {
	c := newCSV(to)
	c.text(pointColumn)
	for i, a := range w.Swept.Axes {
		c.text(a.Key + " (" + w.Units[i].Dimension.SI().Symbol + ")")
	}
	columns := w.dataColumns()
	for i := range columns {
		c.text(columns[i].head)
	}
	c.text(possibleColumn)
	c.end()
	for point := range w.Swept.Len() {
		c.figure(float64(point + 1))
		for _, m := range w.Swept.At(point) {
			c.figure(m.To)
		}
		for i := range columns {
			c.figure(columns[i].figures[point])
		}
		c.text(yesOrNo(w.Swept.Impossible == nil || !w.Swept.Impossible[point]))
		c.end()
	}
	return c.out.Flush()
}

const (
	pointColumn    = "point"
	possibleColumn = "can happen"
)

func yesOrNo(yes bool) string {
	if yes {
		return "yes"
	}
	return "no"
}

// A dataColumn is one list of figures of a column.
type dataColumn struct {
	head    string
	figures []float64
}

// dataColumns are the lists that are there, a list that is the same as the one
// before it counted once.
func (w *Sweep) dataColumns() []dataColumn {
	var list []dataColumn
	for i := range w.Swept.Series {
		c := &w.Swept.Series[i]
		name := string(c.Quantity) + " " + string(c.Evidence)
		if c.From != "" {
			name += " " + c.From
		}
		unit := dimensionOf(c.Quantity).SI().Symbol
		exact := c.Low != nil && c.High != nil && &c.Low[0] == &c.High[0]
		for _, end := range []struct {
			name    string
			figures []float64
		}{{"low", c.Low}, {"value", c.Value}, {"high", c.High}, {"reach", c.Reach}} {
			if end.figures != nil && (!exact || end.name == "value") {
				list = append(list, dataColumn{name + " " + end.name + " (" + unit + ")", end.figures})
			}
		}
	}
	return list
}

// JSON writes the sweep as one JSON document on one line: SI units, 12
// significant digits, null for what is absent. The error is that of to.
func (w *Sweep) JSON(to io.Writer) error {
	b := newBuilder(w.Sheet, SIUnits)
	s := sweeping{builder: b, w: w}
	s.places()
	doc := sweepDocument{
		studyDocument: b.studyDocument(SweepFormat, s.warnings()),
		Series:        each(w.Swept.Series, jsonSeriesOf),
		Crossings:     each(w.Swept.Crossings, s.jsonCrossing),
		Turns:         each(w.Swept.Turns, s.jsonTurn),
		Impossible:    []int{},
		Working:       []jsonWorking{},
	}
	for i, a := range w.Swept.Axes {
		doc.Vary = append(doc.Vary, jsonAxis{a.Key, w.Units[i].Dimension.SI().Symbol, figures(a.Values)})
	}
	for i, is := range w.Swept.Impossible {
		if is {
			doc.Impossible = append(doc.Impossible, i)
		}
	}
	if w.Working > 0 {
		if res, can, err := w.Swept.Working(w.Working - 1); err == nil && can {
			doc.Working = each(res.Working, newWorking)
		}
	}
	return encode(to, doc)
}

// studyDocument is what the JSON of every study begins with.
type studyDocument struct {
	Format    string         `json:"format"`
	Tool      jsonTool       `json:"tool"`
	Job       jsonJob        `json:"job"`
	Overrides []jsonOverride `json:"overrides"`
	LimitSets []jsonSet      `json:"limit_sets"`
	Cautions  []jsonCaution  `json:"cautions"`
}

func (b *builder) studyDocument(format string, warnings []Line) studyDocument {
	return studyDocument{
		format, jsonTool{b.s.Tool, arrest.ModelVersion}, b.jsonJob(), each(b.s.File.Overrides, newOverride),
		each(b.s.File.Sets, newSet), cautionsOf(warnings),
	}
}

type sweepDocument struct {
	studyDocument
	Vary       []jsonAxis     `json:"vary"`
	Series     []jsonSeries   `json:"series"`
	Impossible []int          `json:"impossible"`
	Crossings  []jsonCrossing `json:"crossings"`
	Turns      []jsonTurn     `json:"turns"`
	Working    []jsonWorking  `json:"working"`
}

type jsonAxis struct {
	Key    string   `json:"key"`
	Unit   string   `json:"unit"`
	Values []figure `json:"values"`
}

type jsonSeries struct {
	Quantity arrest.Quantity `json:"quantity"`
	Evidence arrest.Evidence `json:"evidence"`
	From     *string         `json:"from"`
	Bound    *string         `json:"bound"`
	Unit     string          `json:"unit"`
	Low      []figure        `json:"low"`
	Value    []figure        `json:"value"`
	High     []figure        `json:"high"`
	Reach    []figure        `json:"reach"`
}

func figures(list []float64) []figure {
	if list == nil {
		return nil
	}
	return each(list, func(x *float64) figure { return figure(*x) })
}

func jsonSeriesOf(c *study.Series) jsonSeries {
	return jsonSeries{
		c.Quantity, c.Evidence, text(c.From), text(c.Bound), dimensionOf(c.Quantity).SI().Symbol,
		figures(c.Low), figures(c.Value), figures(c.High), figures(c.Reach),
	}
}

type jsonCrossing struct {
	Limit    string          `json:"limit"`
	Set      *string         `json:"set"`
	Printed  bool            `json:"also_printed"` // the limit as also printed, not as typed
	Series   int             `json:"series"`
	Quantity arrest.Quantity `json:"quantity"`
	End      study.End       `json:"end"`
	Row      int             `json:"row"`
	Key      string          `json:"key"`
	At       figure          `json:"at"`
	Unit     string          `json:"unit"`
	Lower    string          `json:"lower_demand"` // above or below at
	Figure   figure          `json:"figure"`
	Jumps    bool            `json:"jumps"`
	Outcome  *string         `json:"outcome"` // of the row, with this figure typed in; null where it cannot happen
	Reason   *string         `json:"reason"`
}

func (s *sweeping) jsonCrossing(c *study.Crossing) jsonCrossing {
	moves := s.w.Swept.At(c.Row * len(s.last().Values))
	moves[len(moves)-1].To = c.X
	check := s.checkWith(moves...)
	outcome, reason := check.jsonOutcome(c.Limit)
	return jsonCrossing{
		Limit: c.Limit.ID, Set: text(c.Set.Name), Printed: c.Printed, Series: c.Column, Quantity: c.Limit.Quantity, End: c.End,
		Row: c.Row, Key: s.last().Key, At: figure(c.X), Unit: s.lastUnit().Dimension.SI().Symbol, Lower: lowerSide(c.Lower),
		Figure: figure(c.Y), Jumps: c.Jumps, Outcome: outcome, Reason: reason,
	}
}

// jsonOutcome is what a check comes to in the row of a limit.
func (c *checked) jsonOutcome(l *limits.Limit) (outcome, reason *string) {
	if !c.can {
		return nil, nil
	}
	f := c.row(l)
	if len(f.Reasons) > 0 {
		why := breakable(c.reason(f, &f.Reasons[0]))
		reason = &why
	}
	return text(f.Outcome), reason
}

// lowerSide says where the demand is lower, beside a place that is printed in
// this way.
func lowerSide(r quantity.Rounding) string {
	switch r {
	case quantity.Up:
		return "above"
	case quantity.Down:
		return "below"
	}
	return "neither"
}

type jsonTurn struct {
	Series   int             `json:"series"`
	Quantity arrest.Quantity `json:"quantity"`
	End      study.End       `json:"end"`
	Row      int             `json:"row"`
	Key      string          `json:"key"`
	At       figure          `json:"at"`
	Unit     string          `json:"unit"`
	Figure   figure          `json:"figure"`
	Kind     string          `json:"kind"`
}

func (s *sweeping) jsonTurn(t *study.Turn) jsonTurn {
	kind := turnLeast
	if t.Greatest {
		kind = turnGreatest
	}
	return jsonTurn{t.Column, s.w.Swept.Series[t.Column].Quantity, t.End, t.Row, s.last().Key, figure(t.X),
		s.lastUnit().Dimension.SI().Symbol, figure(t.Y), kind}
}
