package archive

import (
	"math"

	"arrestcheck/arrest"
	"arrestcheck/arrest/quantity"
	"arrestcheck/limits"
	"arrestcheck/reportgen"
)

// Of returns the results of a sheet that was worked out: just what ReadResults
// reads from the JSON of that sheet.
func Of(s *reportgen.Sheet) Results {
	r := unsnapped(s)
	for i := range r.Inputs {
		snapAll(&r.Inputs[i].Low, &r.Inputs[i].Value, &r.Inputs[i].High)
	}
	for i := range r.Estimates {
		e := &r.Estimates[i]
		snapAll(&e.Low, &e.Value, &e.High, &e.Reach, &e.Allowance, &e.ComparedLow, &e.ComparedHigh)
	}
	for i := range r.Findings {
		r.Findings[i].snap()
	}
	return r
}

// snapAll rounds figures to the digits of JSON, in which an infinity is absent.
func snapAll(figures ...*float64) {
	for _, x := range figures {
		if math.IsInf(*x, 0) {
			*x = math.NaN()
		}
		*x = quantity.Snap(*x)
	}
}

func (f *Finding) snap() { snapAll(&f.LimitSI, &f.Demand, &f.Ratio) }

// unsnapped returns the results with their figures as they were worked out.
// Their canonical form is that of the results.
func unsnapped(s *reportgen.Sheet) Results {
	d := &s.File.Document
	r := Results{
		Tool: s.Tool, Model: arrest.ModelVersion,
		Job: Job{
			Name: s.File.Name, Title: d.Title, Site: d.Site, Reference: d.Reference, Revision: d.Revision, Date: d.Date,
			PreparedBy: d.PreparedBy, CheckedBy: d.CheckedBy, ReviewDate: d.ReviewDate, Rescue: d.Rescue,
			SHA256: s.File.SHA256, Persons: s.Result.Persons, Example: isExample(s),
		},
		Inputs:    make([]Input, len(s.Result.Inputs)),
		Estimates: make([]Estimate, len(s.Result.Estimates)),
		Findings:  make([]Finding, len(s.Assessment.Findings)),
		Counts:    countsOf(s.Assessment.Groups),
	}
	for i := range s.File.Sets {
		r.Sets = append(r.Sets, Set{s.File.Sets[i].Name, s.File.Sets[i].Title, s.File.Sets[i].SHA256})
	}
	for i := range r.Inputs {
		r.Inputs[i] = inputOf(&s.Result.Inputs[i])
	}
	for i := range r.Estimates {
		r.Estimates[i] = estimateOf(&s.Result.Estimates[i])
	}
	for i := range r.Findings {
		r.Findings[i] = findingOf(&s.Assessment.Findings[i])
	}
	for _, e := range s.Assessment.NotEntered {
		r.NotEntered = append(r.NotEntered, e.Subject)
	}
	for _, o := range s.File.Overrides {
		r.Overrides = append(r.Overrides, Override{o.Key, o.Value})
	}
	return r
}

func countsOf(groups []limits.Group) (c Counts) {
	for i := range groups {
		switch groups[i].Outcome {
		case limits.Exceeded:
			c.Exceeded++
		case limits.Undecided:
			c.Undecided++
		case limits.NotCompared:
			c.NotCompared++
		case limits.Within:
			c.Within++
		}
	}
	return c
}

func isExample(s *reportgen.Sheet) bool {
	example := s.Result.Example
	for i := range s.File.Sets {
		example = example || s.File.Sets[i].Example
	}
	return example
}

func inputOf(in *arrest.Input) Input {
	return Input{
		in.Key, in.Band.Text, in.Band.Unit.Dimension.SI().Symbol, string(in.Source),
		in.Band.Low, in.Band.Value, in.Band.High, in.Open() != arrest.Settled,
	}
}

func estimateOf(e *arrest.Estimate) Estimate {
	made := Estimate{
		Quantity: e.Quantity, Evidence: e.Evidence, Method: e.Method, From: e.From, Unit: unitOf(e.Quantity), Bound: e.Bound,
		Low: e.Low, Value: e.Value, High: e.High, Reach: e.Reach, Outside: e.Outside,
		Allowance: math.NaN(), ComparedLow: math.NaN(), ComparedHigh: math.NaN(),
	}
	if e.Evidence == arrest.Modelled && !math.IsNaN(e.Allowance) {
		low, high := e.Ends()
		made.Allowance, made.ComparedLow, made.ComparedHigh = e.Allowance, low, high
	}
	return made
}

func findingOf(f *limits.Finding) Finding {
	made := Finding{
		Limit: f.Limit.ID, Group: f.Limit.AnyOf, LimitAsWritten: f.Limit.Bound.Text, Authority: f.Limit.Authority,
		Unit: unitOf(f.Limit.Quantity), Quantity: f.Limit.Quantity, Sense: f.Limit.Sense, LimitSI: f.Limit.Bound.Value,
		Outcome: f.Outcome, Bound: f.Bound, Demand: f.Demand, Ratio: f.Ratio,
	}
	if len(f.Reasons) > 0 {
		made.Reasons = make([]string, len(f.Reasons))
		for i := range f.Reasons {
			made.Reasons[i] = string(f.Reasons[i].ID)
		}
	}
	return made
}

func unitOf(q arrest.Quantity) string {
	record, _ := q.Record()
	return record.Dimension.SI().Symbol
}
