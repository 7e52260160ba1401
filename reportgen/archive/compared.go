package archive

import (
	"io"
	"math"
	"strings"

	"arrestcheck/reportgen"
)

// Report returns a comparison as a report.
func (c *Comparison) Report() reportgen.Report {
	report := reportgen.Report{
		Head:     []reportgen.Block{{Text: reportgen.NotAPermission, Loud: true}, {Lines: c.identity()}},
		Warnings: warnings(c.cautions()),
	}
	if c.Same() {
		report.Head = append(report.Head, reportgen.Block{Text: words.NothingDiffers.Say()})
	}
	add := func(heading string, t *reportgen.Table) {
		if len(t.Rows) > 0 {
			report.Sections = append(report.Sections, reportgen.Section{Heading: heading, Blocks: []reportgen.Block{{Table: t}}})
		}
	}
	add(reportgen.RowsDifferHeading, c.rowTable())
	add(reportgen.InputsDifferHeading, c.inputTable())
	add(reportgen.EstimatesDifferHeading, c.estimateTable())
	add(reportgen.DocumentDiffersHeading, c.textTable())
	return report
}

// identity says what A and B are, and what each came to.
func (c *Comparison) identity() []reportgen.Line {
	var lines []reportgen.Line
	for _, side := range []struct {
		label string
		of    *Results
	}{{reportgen.SideALabel, c.A}, {reportgen.SideBLabel, c.B}} {
		lines = append(lines,
			reportgen.Line{Label: side.label, Text: side.of.Job.line()},
			reportgen.Line{Text: side.of.Job.Name},
			reportgen.Line{Text: side.of.Counts.text()})
		if len(side.of.NotEntered) > 0 {
			lines = append(lines, reportgen.Line{Text: words.LeftOut.Say(leftOut(side.of.NotEntered, side.of.Job.Persons))})
		}
		if side.of.Job.Example {
			lines = append(lines, reportgen.Line{Text: words.ExampleLine.Say()})
		}
		lines = append(lines,
			reportgen.Line{Text: reportgen.ProgramLabel + " " + side.of.Tool + ", " + reportgen.MechanicsLabel + " " + side.of.Model},
			reportgen.Line{Text: side.of.Job.SHA256})
	}
	return lines
}

func (c *Comparison) cautions() []caution {
	var list []caution
	if keys := c.Narrowed(); len(keys) > 0 {
		list = append(list, caution{words.NarrowerBand, []string{strings.Join(keys, ", ")}})
	}
	return append(list, caution{words.RowsAreNotSheets, nil})
}

func (c *Comparison) table(last string, widths ...int) *reportgen.Table {
	t := &reportgen.Table{Header: []string{reportgen.WhatHead, reportgen.SideALabel, reportgen.SideBLabel}, Widths: widths, Rules: true}
	if last != "" {
		t.Header = append(t.Header, last)
	}
	return t
}

func (c *Comparison) rowTable() *reportgen.Table {
	t := c.table("", 18, 29, 29)
	for _, p := range c.Rows {
		f := p.A
		if f == nil {
			f = p.B
		}
		t.Rows = append(t.Rows, reportgen.Row{
			Cells: []string{titleOf(f, c.A.Job.Persons) + "\n" + p.Limit, p.A.cell(), p.B.cell()},
			Loud:  p.A == nil || p.B == nil || p.A.Outcome != p.B.Outcome,
		})
	}
	return t
}

func (c *Comparison) inputTable() *reportgen.Table {
	t := c.table(reportgen.SaysHead, 20, 18, 18, 18)
	for _, p := range c.Inputs {
		texts := make([]string, len(p.Remarks))
		for i, remark := range p.Remarks {
			texts[i] = remarkWords[remark].Say()
		}
		t.Rows = append(t.Rows, reportgen.Row{Cells: []string{p.Key, p.A.cell(), p.B.cell(), strings.Join(texts, "\n")}})
	}
	return t
}

var remarkWords = map[Remark]reportgen.Sentence{
	Narrower: words.Narrower, InsidePlan: words.InsidePlan, BeyondPlan: words.BeyondPlan, AcrossPlan: words.AcrossPlan,
	NowOpen: words.NowOpen, NowSettled: words.NowSettled, OnlyA: words.OnlyA, OnlyB: words.OnlyB,
}

// cell is an input as written, with its source.
func (in *Input) cell() string {
	if in == nil {
		return reportgen.NothingThere
	}
	if in.Source == "" {
		return in.AsWritten
	}
	return in.AsWritten + "\n" + in.Source
}

func (c *Comparison) estimateTable() *reportgen.Table {
	t := c.table(reportgen.ByHead, 22, 20, 20, 12)
	for _, p := range c.Estimates {
		e := p.A
		if e == nil {
			e = p.B
		}
		t.Rows = append(t.Rows, reportgen.Row{Cells: []string{e.title(c.A.Job.Persons), p.A.cell(), p.B.cell(), p.by()}})
	}
	return t
}

// cell is the figure of an estimate in SI, "-" where there is none.
func (e *Estimate) cell() string {
	if e == nil {
		return reportgen.NothingThere
	}
	return reportgen.FigureText(e.Bound, e.Low, e.High, e.unit())
}

// by is how far a figure moved, as a share, each end of a band by itself: one
// that became narrower moved up and down.
func (p *EstimatePair) by() string {
	if p.A == nil || p.B == nil {
		return ""
	}
	low, high := share(p.A.Low, p.B.Low), share(p.A.High, p.B.High)
	switch {
	case p.A.Low == p.A.High && p.B.Low == p.B.High, !known(p.A.High, p.B.High):
		return low
	case !known(p.A.Low, p.B.Low):
		return high
	case low == "" || high == "":
		return strings.TrimSpace(lowEnd(low) + highEnd(high))
	}
	return lowEnd(low) + "\n" + highEnd(high)
}

func lowEnd(by string) string  { return end(words.LowBy, by) }
func highEnd(by string) string { return end(words.HighBy, by) }

func end(which reportgen.Sentence, by string) string {
	if by == "" {
		return ""
	}
	return which.Say(by)
}

// share is by how much of a figure another differs from it, empty where it does
// not, or there is no such share.
func share(a, b float64) string {
	if !known(a, b) || a == 0 || a == b {
		return ""
	}
	return signed(100*(b-a)/math.Abs(a)) + " %"
}

func known(a, b float64) bool { return !math.IsNaN(a) && !math.IsNaN(b) }

func (c *Comparison) textTable() *reportgen.Table {
	t := c.table(reportgen.SaysHead, 20, 18, 18, 18)
	for _, p := range c.Texts {
		remark := ""
		if p.Key == "document.rescue" && c.RescueLost() {
			remark = words.RescueLost.Say()
		}
		t.Rows = append(t.Rows, reportgen.Row{Cells: []string{p.Key, orNothing(p.A), orNothing(p.B), remark}, Loud: remark != ""})
	}
	return t
}

// ComparisonFormat is the value of the key format of a comparison in JSON.
const ComparisonFormat = "arrestcheck comparison 1"

type jsonComparison struct {
	Format    string             `json:"format"`
	Same      bool               `json:"same"`
	A         jsonSide           `json:"a"`
	B         jsonSide           `json:"b"`
	Inputs    []jsonInputPair    `json:"inputs"`
	Estimates []jsonEstimatePair `json:"estimates"`
	Rows      []jsonRowPair      `json:"findings"`
	Texts     []jsonTextPair     `json:"texts"`
	Cautions  []jsonCaution      `json:"cautions"`
}

type jsonSide struct {
	Name       string     `json:"name"`
	Title      string     `json:"title"`
	Reference  string     `json:"reference"`
	Revision   string     `json:"revision"`
	Example    bool       `json:"example"`
	SHA256     string     `json:"sha256"`
	Results    string     `json:"results_sha256"`
	Tool       Versions   `json:"tool"`
	Counts     jsonCounts `json:"outcome_counts"`
	NotEntered []string   `json:"not_entered"`
}

type jsonInputPair struct {
	Key     string     `json:"key"`
	A       *jsonInput `json:"a"`
	B       *jsonInput `json:"b"`
	Remarks []Remark   `json:"remarks"`
}

type jsonInput struct {
	AsWritten string   `json:"as_written"`
	Source    string   `json:"source"`
	Unit      string   `json:"unit"`
	Low       *float64 `json:"low"`
	Value     *float64 `json:"value"`
	High      *float64 `json:"high"`
	Open      bool     `json:"open"`
}

type jsonEstimatePair struct {
	Key string        `json:"key"`
	A   *jsonEstimate `json:"a"`
	B   *jsonEstimate `json:"b"`
}

type jsonEstimate struct {
	Bound string   `json:"bound"`
	Unit  string   `json:"unit"`
	Low   *float64 `json:"low"`
	Value *float64 `json:"value"`
	High  *float64 `json:"high"`
}

type jsonTextPair struct {
	Key string `json:"key"`
	A   string `json:"a"`
	B   string `json:"b"`
}

type jsonRowPair struct {
	Limit string       `json:"limit"`
	A     *jsonFinding `json:"a"`
	B     *jsonFinding `json:"b"`
}

// JSON writes a comparison as one JSON document on one line. The error is that
// of w.
func (c *Comparison) JSON(w io.Writer) error {
	j := jsonComparison{
		Format: ComparisonFormat, Same: c.Same(), A: c.A.side(), B: c.B.side(),
		Inputs: []jsonInputPair{}, Estimates: []jsonEstimatePair{}, Rows: []jsonRowPair{}, Texts: []jsonTextPair{}, Cautions: cautionsJSON(c.cautions()),
	}
	for _, p := range c.Inputs {
		j.Inputs = append(j.Inputs, jsonInputPair{p.Key, p.A.json(), p.B.json(), append([]Remark{}, p.Remarks...)})
	}
	for _, p := range c.Estimates {
		j.Estimates = append(j.Estimates, jsonEstimatePair{p.Key, p.A.json(), p.B.json()})
	}
	for _, p := range c.Rows {
		j.Rows = append(j.Rows, jsonRowPair{p.Limit, p.A.json(), p.B.json()})
	}
	for _, p := range c.Texts {
		j.Texts = append(j.Texts, jsonTextPair(p))
	}
	return writeJSON(w, &j)
}

func (r *Results) side() jsonSide {
	return jsonSide{
		r.Job.Name, r.Job.Title, r.Job.Reference, r.Job.Revision, r.Job.Example, r.Job.SHA256, r.Digest(),
		Versions{r.Tool, r.Model}, jsonCounts(r.Counts), append([]string{}, r.NotEntered...),
	}
}

func (in *Input) json() *jsonInput {
	if in == nil {
		return nil
	}
	return &jsonInput{in.AsWritten, in.Source, in.Unit, orNull(in.Low), orNull(in.Value), orNull(in.High), in.Open}
}

func (e *Estimate) json() *jsonEstimate {
	if e == nil {
		return nil
	}
	return &jsonEstimate{string(e.Bound), e.Unit, orNull(e.Low), orNull(e.Value), orNull(e.High)}
}
