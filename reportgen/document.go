package reportgen

import (
	"math"
	"strings"

	"arrestcheck/arrest"
	"arrestcheck/limits"
)

// newDocument gathers the JSON of a sheet. Lists that are empty are empty
// lists, never null.
func newDocument(s *Sheet) document {
	b := newBuilder(s, SIUnits)
	n := s.Assessment.Counts()
	return document{
		Format:        JSONFormat,
		Tool:          jsonTool{s.Tool, arrest.ModelVersion},
		Job:           b.jsonJob(),
		LimitSets:     each(s.File.Sets, newSet),
		Inputs:        each(s.Result.Inputs, newInput),
		Estimates:     each(s.Result.Estimates, b.jsonEstimate),
		Findings:      each(s.Assessment.Findings, b.jsonFinding),
		OutcomeCounts: jsonCounts{n[limits.Exceeded], n[limits.Undecided], n[limits.NotCompared], n[limits.Within]},
		NotEntered:    each(s.Assessment.NotEntered, func(e *limits.Expected) string { return e.Subject }),
		Elsewhere:     each(s.Assessment.Elsewhere, func(e *limits.Elsewhere) jsonPlace { return jsonPlace{e.Quantity, e.Where} }),
		Working:       each(s.Result.Working, newWorking),
		Cautions: each(b.d.statements(s), func(one *said) jsonCaution {
			return jsonCaution{one.number, breakable(one.text)}
		}),
		NotChecked:  b.notLookedAt(),
		Layout:      b.jsonLayout(),
		ModelRuns:   each(s.Result.Runs, b.jsonRun),
		Vectors:     b.jsonVectors(),
		Overrides:   each(s.File.Overrides, newOverride),
		Sensitivity: b.jsonSensitivity(),
	}
}

func newSet(set *limits.Set) jsonSet {
	return jsonSet{
		text(set.Name), text(set.Title), text(set.Jurisdiction), text(set.EnteredBy), text(set.EnteredOn),
		text(set.CheckedOn), text(set.Note), set.Example, text(set.SHA256),
	}
}

// each makes a list of another, never nil.
func each[T, U any](list []T, of func(*T) U) []U {
	made := make([]U, len(list))
	for i := range list {
		made[i] = of(&list[i])
	}
	return made
}

// text is null in JSON where nothing was entered.
func text[S ~string](s S) *string {
	if s == "" {
		return nil
	}
	t := string(s)
	return &t
}

// breakable puts plain blanks back into a sentence.
func breakable(s string) string { return strings.ReplaceAll(s, noBreak, " ") }

func (b *builder) jsonJob() jsonJob {
	d := &b.s.File.Document
	return jsonJob{
		Name: text(b.s.File.Name), Title: text(d.Title), Site: text(d.Site), Reference: text(d.Reference),
		Revision: text(d.Revision), Date: text(d.Date), Purpose: text(d.Purpose), System: text(d.System),
		Rescue: text(d.Rescue), PreparedBy: text(d.PreparedBy), CheckedBy: text(d.CheckedBy), ReviewDate: text(d.ReviewDate),
		Persons: b.res().Persons, Example: b.s.isExample(), SHA256: text(b.s.File.SHA256),
		Subject: subjectIDs[b.sub],
	}
}

func newInput(in *arrest.Input) jsonInput {
	return jsonInput{
		Key: in.Key, AsWritten: in.Band.Text, Unit: in.Band.Unit.Dimension.SI().Symbol,
		Low: figure(in.Band.Low), Value: figure(in.Band.Value), High: figure(in.Band.High),
		Source: text(in.Source), Note: text(in.Note),
		Open: in.Open() != arrest.Settled, OpenReason: text(in.Open()),
	}
}

func (b *builder) jsonEstimate(e *arrest.Estimate) jsonEstimate {
	j := jsonEstimate{
		Quantity: e.Quantity, Method: e.Method, Evidence: e.Evidence, Bound: text(e.Bound), Unit: siSymbol(e.Quantity),
		Low: figure(e.Low), Value: figure(e.Value), High: figure(e.High), Reach: figure(e.Reach),
		From: text(e.From), Outside: e.Outside,
		Uses:      each(e.Uses, func(i *int) string { return b.res().Inputs[*i].Key }),
		Allowance: figure(math.NaN()), ComparedLow: figure(math.NaN()), ComparedHigh: figure(math.NaN()),
		Exhausted: e.Exhausted, BeyondModel: e.Beyond,
		Position: text(e.Place), Travel: figure(math.NaN()), Edge: e.Edge, Strikes: e.Strikes, Unreached: e.Unreached,
	}
	if e.Travel > 0 {
		j.Travel = figure(e.Travel)
	}
	if widened(e) {
		low, high := e.Ends()
		j.Allowance, j.ComparedLow, j.ComparedHigh = figure(e.Allowance), figure(low), figure(high)
	}
	return j
}

func siSymbol(q arrest.Quantity) string {
	rec, _ := q.Record()
	return rec.Dimension.SI().Symbol
}

func (b *builder) jsonFinding(f *limits.Finding) jsonFinding {
	reasons := each(f.Reasons, func(r *limits.Reason) jsonReason { return jsonReason{r.ID, breakable(b.reason(f, r))} })
	j := jsonFinding{
		Limit: f.Limit.ID, Set: text(f.Set.Name), Group: text(f.Limit.AnyOf), Quantity: f.Limit.Quantity, Sense: f.Limit.Sense,
		LimitAsWritten: f.Limit.Bound.Text, LimitSI: figure(f.Limit.Bound.Value), Authority: text(f.Limit.Authority),
		Outcome: f.Outcome, Reasons: reasons, Bound: text(f.Bound), Demand: figure(f.Demand), Unit: siSymbol(f.Limit.Quantity),
		Ratio: figure(f.Ratio), Used: each(f.Used, func(i *int) int { return *i }),
	}
	if len(reasons) > 0 {
		j.Reason = text(reasons[0].ID)
	}
	return j
}

func newWorking(w *arrest.WorkingLine) jsonWorking {
	return jsonWorking{w.Method, w.Meaning, w.Corner, w.Formula, each(w.Terms, newTerm), newTerm(&w.Result)}
}

func newTerm(t *arrest.Term) jsonTerm {
	return jsonTerm{t.Symbol, t.Dimension.SI().Symbol, figure(t.SI)}
}
