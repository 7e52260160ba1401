package reportgen

import (
	"math"
	"slices"
	"strconv"

	"arrestcheck/arrest"
	"arrestcheck/arrest/connector"
	"arrestcheck/arrest/quantity"
)

// publishedInAll are the number of drops and of types of the comparison with
// published drops, and the least and the greatest error, as texts.
func publishedInAll() []string {
	tests, low, high := 0, math.Inf(1), math.Inf(-1)
	for i := range connector.Published {
		c := &connector.Published[i]
		tests, low, high = tests+c.Tests, min(low, c.Low), max(high, c.High)
	}
	return []string{strconv.Itoa(tests), strconv.Itoa(len(connector.Published)), signed(low), signed(high)}
}

func publishedArguments() []arrest.Arg {
	var args []arrest.Arg
	for _, t := range publishedInAll() {
		args = append(args, arrest.Text(t))
	}
	return args
}

// modelled reports whether a figure of the sheet comes from the model.
func (b *builder) modelled() bool {
	return slices.ContainsFunc(b.res().Estimates, func(e arrest.Estimate) bool { return e.Evidence == arrest.Modelled })
}

// comparedSection is the comparison type by type: on page 1 beside the request
// for an allowance, behind it where there is one, nowhere without a modelled
// figure.
func (b *builder) comparedSection(pageOne bool) []Section {
	if !b.modelled() || pageOne != (b.s.File.Job.AllowanceInput() == nil) {
		return nil
	}
	t := &Table{Header: comparedHead, Widths: []int{35, 5, 18, 16}}
	for i := range connector.Published {
		c := &connector.Published[i]
		kind := c.Kind
		if c.Stiffens {
			kind += ", " + stiffensWords
		}
		t.Rows = append(t.Rows, Row{Cells: []string{
			kind, strconv.Itoa(c.Tests), b.say(signedRange, signed(c.Low), signed(c.High)), coveredBy(c.Low)}})
	}
	blocks := []Block{{Text: comparedText}, {Table: t}}
	if b.plan() != nil && slices.ContainsFunc(b.plan().Parts, func(p arrest.PlannedPart) bool { return p.Basis == arrest.ByImpactForce }) {
		r := &connector.PublishedRopes
		blocks = append(blocks, Block{Text: b.say(comparedRopes, strconv.Itoa(r.Ropes), times(r.Least), times(r.Most), times(r.Middle))})
	}
	return []Section{{comparedHeading, blocks}}
}

// coveredBy returns the allowance, as a share of a modelled figure, that takes
// it up to the measured one where the error of the model was low, a share of
// the measured figure; rounded up.
func coveredBy(low float64) string {
	if low >= 0 {
		return percent(0)
	}
	return format(-low/(1+low), mustUnit("%"), pageDigits, quantity.Up)
}

func times(x float64) string { return quantity.Number(x, mustUnit("1"), pageDigits, quantity.Nearest) }

// status says apart what verification and validation have shown.
func (b *builder) status() []Line {
	list := []Line{{Label: verificationLabel, Text: verification}, {Label: validationLabel, Text: validation[b.sub]}}
	if b.modelled() {
		list = append(list, Line{Text: b.say(validationModel, publishedInAll()...)})
	}
	return list
}

// signed returns a share in per cent with its sign.
func signed(share float64) string {
	if share > 0 {
		return "+" + percent(share)
	}
	return percent(share)
}
