package reportgen

import (
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
		arrest.StoppingForce, arrest.StoppingForceX, arrest.StoppingForceY, arrest.StoppingForceZ:
		return true
	}
	return false
}

func isMotion(q arrest.Quantity) bool { return !isPeak(q) && !isMean(q) }

// estimateBlocks are a table of the estimates of some quantities, or the
// paragraph none where there are no such estimates.
func (b *builder) estimateBlocks(none string, of func(arrest.Quantity) bool) []Block {
	t := &Table{Header: []string{whatHead, figureHead, fromHead}, Widths: []int{23, 28, 25}}
	for i := range b.res().Estimates {
		e := &b.res().Estimates[i]
		if of(e.Quantity) {
			t.Rows = append(t.Rows, Row{Cells: []string{title(e.Quantity), b.estimate(e, pageDigits), b.from(e)}})
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
// floors rounded down, ceilings up.
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
	return b.d.span(rec.Dimension, e.Typed, e.Low, e.High, digits)
}

// from says what an estimate rests on.
func (b *builder) from(e *arrest.Estimate) string {
	switch e.Evidence {
	case arrest.Shape:
		return b.say(shapeRemark, e.From) + ", " + e.Method
	case arrest.Rated:
		return b.say(ratedRemark, e.From) + ", " + e.Method
	case arrest.Modelled:
		return modelRemark + ", " + e.Method
	case arrest.Measured:
		return recordRemark + ", " + e.Method
	}
	switch {
	case e.Method == arrest.Entered:
		return enteredRemark
	case isMean(e.Quantity):
		return entriesRemark + ", " + e.Method + ": " + floorRemark
	}
	return entriesRemark + ", " + e.Method
}
