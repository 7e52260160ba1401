package reportgen

import (
	"strings"

	"arrestcheck/arrest"
	"arrestcheck/arrest/quantity"
)

// isPeak reports whether the quantity is one of those printed as peaks.
func isPeak(q arrest.Quantity) bool {
	switch q {
	case arrest.PeakForce, arrest.ForceOverWeight, arrest.PeakDeceleration, arrest.OnsetRate:
		return true
	}
	return false
}

// isMean reports whether the quantity is one of those printed as means.
func isMean(q arrest.Quantity) bool {
	switch q {
	case arrest.MeanForceOverDistance, arrest.MeanForceOverTime, arrest.MeanAboveLevel, arrest.MeanDeceleration,
		arrest.StoppingForce:
		return true
	}
	return false
}

func isMotion(q arrest.Quantity) bool {
	return !isPeak(q) && !isMean(q) && !isOfVector(q) && !isLayout(q)
}

// estimateBlocks are a table of the estimates of some quantities, or the
// paragraph none where there are no such estimates.
func (b *builder) estimateBlocks(none string, of func(arrest.Quantity) bool) []Block {
	t := &Table{Header: []string{whatHead, figureHead, fromHead}, Widths: []int{23, 28, 25}}
	for i := range b.res().Estimates {
		e := &b.res().Estimates[i]
		if of(e.Quantity) {
			t.Rows = append(t.Rows, Row{Cells: []string{b.title(e.Quantity), b.estimate(e, pageDigits), b.from(e)}})
		}
	}
	switch {
	case len(t.Rows) > 0:
		return []Block{{Table: t}}
	case none != "":
		return []Block{{Text: none}}
	}
	return nil
}

// estimate returns the figure of an estimate with the word for its bound:
// floors rounded down, ceilings up. A modelled figure stands as it is and with
// the user's allowance.
func (b *builder) estimate(e *arrest.Estimate, digits int) string {
	rec, _ := e.Quantity.Record()
	switch {
	case e.Outside:
		return outsideRemark
	case e.Bound == arrest.AtLeast:
		return boundWords[e.Bound] + " " + b.d.figureAs(rec.Dimension, e.Typed, e.Low, digits, quantity.Down)
	case e.Bound == arrest.AtMost:
		return boundWords[e.Bound] + " " + b.d.figureAs(rec.Dimension, e.Typed, e.High, digits, quantity.Up)
	}
	bare := b.d.span(rec.Dimension, e.Typed, e.Low, e.High, digits)
	if !widened(e) {
		return bare
	}
	low, high := e.Ends()
	wider := withAllowance
	if e.Travel > 0 {
		wider = travelAllowance
	}
	return b.say(wider, bare, percent(e.Allowance), b.d.span(rec.Dimension, e.Typed, low, high, digits))
}

// widened reports whether the user's allowance is added to the estimate before
// it is compared.
func widened(e *arrest.Estimate) bool {
	return e.Evidence == arrest.Modelled && isNumber(e.Allowance)
}

// percent returns a share in per cent with the digits of page 1, without zeros
// that nobody wrote.
func percent(share float64) string {
	text := quantity.Number(share, mustUnit("%"), pageDigits, quantity.Nearest)
	if strings.Contains(text, ".") {
		text = strings.TrimRight(strings.TrimRight(text, "0"), ".")
	}
	return text + noBreak + "%"
}

// from says what an estimate rests on, and of which of several positions it is.
func (b *builder) from(e *arrest.Estimate) string {
	text := b.restsOn(e)
	if e.Place != "" {
		text += ", " + b.say(fromPlace, cut(e.Place))
	}
	return text
}

// assumed says under which assumption of a user, or of the program, a figure
// holds.
func (d display) assumed(from string) string {
	if from == arrest.Inextensible {
		return noStretchRemark
	}
	return d.say(shapeRemark, from)
}

func (b *builder) restsOn(e *arrest.Estimate) string {
	switch e.Evidence {
	case arrest.Shape:
		return b.d.assumed(e.From) + ", " + e.Method
	case arrest.Rated:
		return b.say(ratedRemark, cut(e.From)) + ", " + e.Method
	case arrest.Modelled:
		return b.fromModel(e)
	case arrest.Measured:
		return recordRemark + ", " + e.Method
	}
	switch {
	case e.Method == arrest.Entered:
		return enteredRemark
	case isMean(e.Quantity):
		return entriesRemark + b.route(e) + ", " + e.Method + ": " + floorRemark[b.sub]
	}
	return entriesRemark + ", " + e.Method
}

// fromModel adds what the model as a whole has to say of itself.
func (b *builder) fromModel(e *arrest.Estimate) string {
	text := modelRemark + ", " + e.Method
	if isMean(e.Quantity) {
		text += ": " + floorRemark[b.sub]
	}
	if e.Exhausted {
		text += ", " + exhaustedRemark
	}
	if e.Beyond {
		text += ", " + beyondRemark
	}
	return text
}
