package archive

import (
	"math"
	"slices"
	"strings"

	"arrestcheck/arrest"
	"arrestcheck/arrest/quantity"
	"arrestcheck/reportgen"
)

// A Comparison sets the results of two jobs, or of two revisions of one, side
// by side: A first, B beside it.
type Comparison struct {
	A, B      *Results
	Inputs    []InputPair    // that differ
	Estimates []EstimatePair // that differ
	Rows      []RowPair      // that differ in limit, outcome or demand
	Texts     []TextPair     // of the document that differ
}

// A Remark is what can be said of an input that differs.
type Remark string

const (
	Narrower   Remark = "narrower"    // B lies inside A, narrower, and the source is the same
	InsidePlan Remark = "inside_plan" // planned in A, measured in B: found inside what was planned
	BeyondPlan Remark = "beyond_plan" // found outside what was planned
	AcrossPlan Remark = "across_plan" // reaches beyond what was planned
	NowOpen    Remark = "now_open"
	NowSettled Remark = "now_settled"
	OnlyA      Remark = "only_a"
	OnlyB      Remark = "only_b"
)

// An InputPair is an input that differs; nil where it is in one of the two only.
type InputPair struct {
	Key     string
	A, B    *Input
	Remarks []Remark
}

// An EstimatePair is a figure that differs.
type EstimatePair struct {
	Key  string
	A, B *Estimate
}

// A RowPair is a limit that differs, or that came to something else.
type RowPair struct {
	Limit string
	A, B  *Finding
}

// A TextPair is a text of the document that differs, empty where nothing is
// entered.
type TextPair struct {
	Key  string
	A, B string
}

// Compare sets two results side by side.
func Compare(a, b *Results) *Comparison {
	c := &Comparison{A: a, B: b}
	for _, p := range match(a.Inputs, b.Inputs, func(in *Input) string { return in.Key }) {
		if p.was == nil || p.is == nil || !sameInput(p.was, p.is) {
			c.Inputs = append(c.Inputs, InputPair{p.key, p.was, p.is, remarks(p.was, p.is)})
		}
	}
	for _, p := range match(a.Estimates, b.Estimates, (*Estimate).key) {
		if p.was == nil || p.is == nil || !sameEstimate(p.was, p.is) {
			c.Estimates = append(c.Estimates, EstimatePair{p.key, p.was, p.is})
		}
	}
	for _, p := range match(a.Findings, b.Findings, func(f *Finding) string { return f.Limit }) {
		if p.was == nil || p.is == nil || !sameFinding(p.was, p.is) {
			c.Rows = append(c.Rows, RowPair{p.key, p.was, p.is})
		}
	}
	c.Texts = textPairs(&a.Job, &b.Job)
	return c
}

// textPairs returns the texts that differ, but for those that stand at the head of
// a comparison: title, reference and revision.
func textPairs(a, b *Job) []TextPair {
	var pairs []TextPair
	for _, p := range []TextPair{
		{"document.site", a.Site, b.Site}, {"document.date", a.Date, b.Date}, {"document.rescue", a.Rescue, b.Rescue},
		{"document.prepared_by", a.PreparedBy, b.PreparedBy}, {"document.checked_by", a.CheckedBy, b.CheckedBy},
		{"document.review_date", a.ReviewDate, b.ReviewDate},
	} {
		if p.A != p.B {
			pairs = append(pairs, p)
		}
	}
	return pairs
}

// RescueLost reports whether A names a rescue method and B, which asks for one,
// does not.
func (c *Comparison) RescueLost() bool {
	return reportgen.IsRescue(c.A.Job.Rescue) && rescueOf(c.B.Job.Rescue, c.B.Job.Persons) == RescueNotNamed
}

// Same reports whether no input, figure, row and nothing of what nobody entered
// differs. Texts of the document do not count.
func (c *Comparison) Same() bool {
	return len(c.Inputs)+len(c.Estimates)+len(c.Rows) == 0 && slices.Equal(c.A.NotEntered, c.B.NotEntered)
}

// Narrowed returns the keys of the inputs that became narrower under the same
// source.
func (c *Comparison) Narrowed() []string {
	var keys []string
	for _, p := range c.Inputs {
		if slices.Contains(p.Remarks, Narrower) {
			keys = append(keys, p.Key)
		}
	}
	return keys
}

func sameInput(a, b *Input) bool {
	return a.AsWritten == b.AsWritten && a.Source == b.Source && a.Open == b.Open && same(a.Low, b.Low) && same(a.High, b.High)
}

func sameEstimate(a, b *Estimate) bool {
	return a.Bound == b.Bound && a.Outside == b.Outside && same(a.Low, b.Low) && same(a.Value, b.Value) && same(a.High, b.High) &&
		same(a.ComparedLow, b.ComparedLow) && same(a.ComparedHigh, b.ComparedHigh)
}

func sameFinding(a, b *Finding) bool {
	return a.Quantity == b.Quantity && a.Outcome == b.Outcome && same(a.LimitSI, b.LimitSI) && a.Bound == b.Bound &&
		same(a.Demand, b.Demand) && a.Authority == b.Authority && slices.Equal(a.Reasons, b.Reasons)
}

// same reports whether two figures are one, or both absent.
func same(a, b float64) bool { return a == b || math.IsNaN(a) && math.IsNaN(b) }

// remarks says what can be said of an input that differs.
func remarks(a, b *Input) []Remark {
	switch {
	case b == nil:
		return []Remark{OnlyA}
	case a == nil:
		return []Remark{OnlyB}
	}
	var list []Remark
	inside := b.Low >= a.Low && b.High <= a.High
	switch {
	case planned(a) && b.Source == string(arrest.FromMeasured):
		switch {
		case inside:
			list = append(list, InsidePlan)
		case b.Low > a.High || b.High < a.Low:
			list = append(list, BeyondPlan)
		default:
			list = append(list, AcrossPlan)
		}
	case inside && b.High-b.Low < a.High-a.Low && a.Source == b.Source:
		list = append(list, Narrower)
	}
	if a.Open != b.Open {
		if b.Open {
			return append(list, NowOpen)
		}
		return append(list, NowSettled)
	}
	return list
}

// planned reports whether nobody has looked at what there is.
func planned(in *Input) bool {
	return slices.Contains([]arrest.Source{arrest.FromPlan, arrest.FromDrawing, arrest.FromAssumed}, arrest.Source(in.Source))
}

// unit is the unit that an estimate is shown in: that of the SI, but degrees, in
// which everybody reads an angle.
func (e *Estimate) unit() quantity.Unit {
	record, _ := e.Quantity.Record()
	if record.Dimension == quantity.Angle {
		degrees, _ := quantity.LookUp("deg")
		return degrees
	}
	return record.Dimension.SI()
}

// title is what is shown of an estimate: its quantity and where it is from.
func (e *Estimate) title(persons int) string {
	rest := []string{string(e.Evidence), e.Method}
	if e.From != "" {
		rest = append(rest, e.From)
	}
	return reportgen.QuantityTitle(e.Quantity, persons) + "\n" + strings.Join(rest, ", ")
}
