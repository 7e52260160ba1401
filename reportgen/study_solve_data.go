package reportgen

import (
	"io"
	"math"

	"arrestcheck/arrest"
	"arrestcheck/arrest/study"
	"arrestcheck/limits"
)

// SolveFormat is the first value of the JSON of an answer.
const SolveFormat = "arrestcheck solve 1"

type solveDocument struct {
	studyDocument
	Find  jsonFind      `json:"find"`
	Found *jsonFound    `json:"found"` // after an event; null else
	Known []jsonStretch `json:"known"`
	Goals []jsonGoal    `json:"goals"`
	Fits  []jsonFit     `json:"fits"`
	Check []jsonChecked `json:"checks"`
}

type jsonFind struct {
	Key  string `json:"key"`
	Unit string `json:"unit"`
	Low  figure `json:"low"`
	High figure `json:"high"`
}

type jsonFound struct {
	Travel string `json:"travel"`
	Force  string `json:"force"`
}

type jsonStretch struct {
	Low  figure `json:"low"`
	High figure `json:"high"`
}

type jsonFit struct {
	Low    figure  `json:"low"`
	High   figure  `json:"high"`
	LowBy  *string `json:"low_by"` // the limit that governs; null at the end of the range
	HighBy *string `json:"high_by"`
}

type jsonGoal struct {
	Limit     *string         `json:"limit"`
	Printed   bool            `json:"also_printed"`
	Quantity  arrest.Quantity `json:"quantity"`
	Evidence  *string         `json:"evidence"`
	From      *string         `json:"from"`
	Bound     *string         `json:"bound"`
	End       study.End       `json:"end"`
	Figure    figure          `json:"figure"`
	Unit      string          `json:"unit"`
	Allowance figure          `json:"allowance"`
	Verdict   study.Verdict   `json:"verdict"`
	Moves     bool            `json:"moves"`
	Least     figure          `json:"least"`
	Greatest  figure          `json:"greatest"`
	Solutions []jsonSolution  `json:"solutions"`
	Under     []jsonStretch   `json:"not_beyond"`
	Turns     []jsonSolveTurn `json:"turns"`
}

type jsonSolution struct {
	At       figure `json:"at"`
	Unit     string `json:"unit"`
	Printed  string `json:"printed"`
	Lower    string `json:"lower_demand"`
	Figure   figure `json:"figure"`
	Residual figure `json:"residual"`
	Jumps    bool   `json:"jumps"`
}

type jsonSolveTurn struct {
	At     figure `json:"at"`
	Figure figure `json:"figure"`
	Kind   string `json:"kind"`
}

// jsonChecked is what a check says with a figure typed in.
type jsonChecked struct {
	Key  string         `json:"key"`
	At   figure         `json:"at"`
	Can  bool           `json:"can_happen"`
	Rows []jsonRowCheck `json:"findings"`
}

type jsonRowCheck struct {
	Limit   string  `json:"limit"`
	Outcome *string `json:"outcome"`
	Reason  *string `json:"reason"`
}

// JSON writes the answer as one JSON document on one line: SI units, 12
// significant digits, null for what is absent. The error is that of to.
func (v *Solve) JSON(to io.Writer) error {
	s := solving{newBuilder(v.Sheet, SIUnits), v}
	a := v.Answer
	doc := solveDocument{
		studyDocument: s.studyDocument(SolveFormat, s.warnings()),
		Find:          jsonFind{a.Find, s.unit(), figure(a.Low), figure(a.High)},
		Known:         each(a.Known, jsonStretchOf),
		Goals:         each(a.Goals, s.jsonGoal),
		Fits: each(a.Fits, func(f *study.Fit) jsonFit {
			return jsonFit{figure(f.Low), figure(f.High), s.jsonBy(f.LowBy), s.jsonBy(f.HighBy)}
		}),
		Check: []jsonChecked{},
	}
	if v.Found != nil {
		doc.Found = &jsonFound{v.Found.Travel.Text, v.Found.Force.Text}
	}
	for _, x := range s.typed() {
		doc.Check = append(doc.Check, s.jsonChecked(x))
	}
	return encode(to, doc)
}

func (s *solving) unit() string { return s.v.Unit.Dimension.SI().Symbol }

func jsonStretchOf(p *study.Span) jsonStretch { return jsonStretch{figure(p.Low), figure(p.High)} }

func (s *solving) jsonBy(goal int) *string {
	if goal < 0 || s.v.Answer.Goals[goal].Goal.Limit == nil {
		return nil
	}
	return text(s.v.Answer.Goals[goal].Goal.Limit.ID)
}

func (s *solving) jsonGoal(m *study.Met) jsonGoal {
	q := quantityOf(m)
	g := jsonGoal{
		Printed: m.Printed, Quantity: q, Evidence: text(m.Column.Evidence), From: text(m.Column.From), Bound: text(m.Bound),
		End: m.End, Figure: figure(m.Figure), Unit: dimensionOf(q).SI().Symbol, Allowance: figure(m.Allows),
		Verdict: m.Verdict, Moves: m.Moves, Least: figure(m.Least), Greatest: figure(m.Greatest),
		Under: each(m.Under, jsonStretchOf),
		Solutions: each(m.Solutions, func(x *study.Solution) jsonSolution {
			printed := breakable(s.short(x.X, s.digits(m, *x), x.Lower))
			return jsonSolution{figure(x.X), s.unit(), printed, lowerSide(x.Lower), figure(x.Y), figure(x.Residual), x.Jumps}
		}),
		Turns: each(m.Turns, func(t *study.Turn) jsonSolveTurn {
			kind := turnLeast
			if t.Greatest {
				kind = turnGreatest
			}
			return jsonSolveTurn{figure(t.X), figure(t.Y), kind}
		}),
	}
	if m.Goal.Limit != nil {
		g.Limit = text(m.Goal.Limit.ID)
	}
	return g
}

func (s *solving) jsonChecked(x float64) jsonChecked {
	check := s.checkWith(study.Move{Key: s.v.Answer.Find, To: x})
	c := jsonChecked{Key: s.v.Answer.Find, At: figure(x), Can: check.can, Rows: []jsonRowCheck{}}
	if check.can {
		c.Rows = each(check.s.Assessment.Findings, func(f *limits.Finding) jsonRowCheck {
			outcome, reason := check.jsonOutcome(f.Limit)
			return jsonRowCheck{f.Limit.ID, outcome, reason}
		})
	}
	return c
}

// CSV writes the solutions, one a row, in SI units with 12 significant digits.
// The error is that of to.
func (v *Solve) CSV(to io.Writer) error {
	s := solving{newBuilder(v.Sheet, SIUnits), v}
	c := newCSV(to)
	for _, head := range []string{"goal", "quantity", "goal figure (SI)", "verdict", v.Answer.Find + " (" + s.unit() + ")", "lower demand", "leap"} {
		c.text(head)
	}
	c.end()
	for i := range v.Answer.Goals {
		m := &v.Answer.Goals[i]
		name := ""
		if m.Goal.Limit != nil {
			name = m.Goal.Limit.ID
		}
		row := func(at float64, lower string, leap string) {
			c.text(name)
			c.text(string(quantityOf(m)))
			c.figure(m.Figure)
			c.text(string(m.Verdict))
			c.figure(at)
			c.text(lower)
			c.text(leap)
			c.end()
		}
		for _, x := range m.Solutions {
			row(x.X, lowerSide(x.Lower), yesOrNo(x.Jumps))
		}
		if len(m.Solutions) == 0 {
			row(math.NaN(), "", "")
		}
	}
	return c.out.Flush()
}
