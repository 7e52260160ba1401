package archive

import (
	"math"
	"strconv"
	"strings"

	"arrestcheck/limits"
)

// A Part says what of the results differs.
type Part string

const (
	OfInput    Part = "input"
	OfEstimate Part = "estimate"
	OfRow      Part = "row"
	OfCounts   Part = "counts"
	OfLeftOut  Part = "not entered"
)

// A Difference is one value that is not the same in two results.
type Difference struct {
	Part    Part
	What    string  // "worker.mass", "peak_force (given, M-06)", the id of a limit
	Field   string  // "low", "outcome"; empty where the whole thing is there on one side only
	Was, Is string  // as text, figures with their unit; empty where there is none
	By      float64 // Is - Was of a figure in SI, NaN of all else
	Share   float64 // By over the size of Was, NaN where there is no such share
}

// Differences returns every value of the results that is not the same in is as
// in was: inputs, estimates and rows in the order of was, those that only is
// has after them, then the counts and what nobody entered.
func Differences(was, is *Results) []Difference {
	var d differences
	for _, p := range match(was.Inputs, is.Inputs, func(in *Input) string { return in.Key }) {
		d.of(OfInput, p.key)
		d.input(p.was, p.is)
	}
	for _, p := range match(was.Estimates, is.Estimates, (*Estimate).key) {
		d.of(OfEstimate, p.key)
		d.estimate(p.was, p.is)
	}
	for _, p := range match(was.Findings, is.Findings, func(f *Finding) string { return f.Limit }) {
		d.of(OfRow, p.key)
		d.finding(p.was, p.is)
	}
	d.of(OfCounts, "")
	for i, o := range limits.Outcomes() {
		d.text(string(o), strconv.Itoa(was.Counts.list()[i]), strconv.Itoa(is.Counts.list()[i]))
	}
	d.of(OfLeftOut, "")
	d.text("", strings.Join(was.NotEntered, ", "), strings.Join(is.NotEntered, ", "))
	return d.list
}

// list is the counts in the order of limits.Outcomes.
func (c Counts) list() [4]int { return [...]int{c.Exceeded, c.Undecided, c.NotCompared, c.Within} }

// key tells the estimates of one result apart.
func (e *Estimate) key() string {
	k := string(e.Quantity) + " (" + string(e.Evidence) + ", " + e.Method
	if e.From != "" {
		k += ", " + e.From
	}
	return k + ")"
}

// A pair is what stands under one key on both sides, nil where it does not.
type pair[T any] struct {
	key     string
	was, is *T
}

// match pairs two lists by key, in the order of was, then of what only is has.
// Of several under one key the first goes with the first.
func match[T any](was, is []T, key func(*T) string) []pair[T] {
	pairs := make([]pair[T], 0, len(was))
	taken := make([]bool, len(is))
	for i := range was {
		p := pair[T]{key: key(&was[i]), was: &was[i]}
		for j := range is {
			if !taken[j] && key(&is[j]) == p.key {
				taken[j], p.is = true, &is[j]
				break
			}
		}
		pairs = append(pairs, p)
	}
	for j := range is {
		if !taken[j] {
			pairs = append(pairs, pair[T]{key: key(&is[j]), is: &is[j]})
		}
	}
	return pairs
}

// differences is a list being made.
type differences struct {
	list []Difference
	part Part
	what string
}

func (d *differences) of(part Part, what string) { d.part, d.what = part, what }

// text records two texts that differ.
func (d *differences) text(field, was, is string) {
	if was != is {
		d.list = append(d.list, Difference{d.part, d.what, field, was, is, math.NaN(), math.NaN()})
	}
}

// figure records two figures that differ.
func (d *differences) figure(field, unit string, was, is float64) {
	if was == is || math.IsNaN(was) && math.IsNaN(is) {
		return
	}
	by, share := is-was, math.NaN()
	if was != 0 {
		share = by / math.Abs(was)
	}
	d.list = append(d.list, Difference{d.part, d.what, field, figureText(was, unit), figureText(is, unit), by, share})
}

// figureText is a figure with all its digits and its unit, empty where it is
// absent.
func figureText(x float64, unit string) string {
	if math.IsNaN(x) {
		return ""
	}
	text := strconv.FormatFloat(x, 'g', -1, 64)
	if unit != "" && unit != "1" {
		text += " " + unit
	}
	return text
}

func (d *differences) input(was, is *Input) {
	switch {
	case was == nil:
		d.text("", "", is.AsWritten)
		return
	case is == nil:
		d.text("", was.AsWritten, "")
		return
	}
	d.text("as written", was.AsWritten, is.AsWritten)
	d.figure("low", was.Unit, was.Low, is.Low)
	d.figure("value", was.Unit, was.Value, is.Value)
	d.figure("high", was.Unit, was.High, is.High)
	d.text("source", was.Source, is.Source)
	d.text("open", strconv.FormatBool(was.Open), strconv.FormatBool(is.Open))
}

func (d *differences) estimate(was, is *Estimate) {
	switch {
	case was == nil:
		d.text("", "", is.text())
		return
	case is == nil:
		d.text("", was.text(), "")
		return
	}
	d.text("bound", string(was.Bound), string(is.Bound))
	d.figure("low", was.Unit, was.Low, is.Low)
	d.figure("value", was.Unit, was.Value, is.Value)
	d.figure("high", was.Unit, was.High, is.High)
	d.figure("reach", was.Unit, was.Reach, is.Reach)
	d.figure("allowance", "", was.Allowance, is.Allowance)
	d.figure("compared low", was.Unit, was.ComparedLow, is.ComparedLow)
	d.figure("compared high", was.Unit, was.ComparedHigh, is.ComparedHigh)
	d.text("outside", strconv.FormatBool(was.Outside), strconv.FormatBool(is.Outside))
}

// text is an estimate in one line.
func (e *Estimate) text() string {
	switch low, high := figureText(e.Low, ""), figureText(e.High, e.Unit); {
	case low == "" && high == "":
		return "no figure"
	case low == "" || low == figureText(e.High, ""):
		return high
	case high == "":
		return figureText(e.Low, e.Unit) + " and more"
	default:
		return low + " to " + high
	}
}

func (d *differences) finding(was, is *Finding) {
	switch {
	case was == nil:
		d.text("", "", string(is.Outcome))
		return
	case is == nil:
		d.text("", string(was.Outcome), "")
		return
	}
	d.text("limit as written", was.LimitAsWritten, is.LimitAsWritten)
	d.figure("limit", was.Unit, was.LimitSI, is.LimitSI)
	d.text("outcome", string(was.Outcome), string(is.Outcome))
	d.text("reasons", strings.Join(was.Reasons, ", "), strings.Join(is.Reasons, ", "))
	d.text("bound", string(was.Bound), string(is.Bound))
	d.figure("demand", was.Unit, was.Demand, is.Demand)
	d.figure("ratio", "", was.Ratio, is.Ratio)
	d.text("quantity", string(was.Quantity), string(is.Quantity))
	d.text("group", was.Group, is.Group)
	d.text("authority", was.Authority, is.Authority)
}

// by is how far a figure moved, "+0.12 N, +0.0035 %"; empty of all else.
func (d *Difference) by() string {
	if math.IsNaN(d.By) {
		return ""
	}
	text := signed(d.By)
	if !math.IsNaN(d.Share) {
		text += ", " + signed(100*d.Share) + " %"
	}
	return text
}

// signed is a figure with its sign and three digits.
func signed(x float64) string {
	text := strconv.FormatFloat(x, 'g', 3, 64)
	if x > 0 {
		text = "+" + text
	}
	return text
}
