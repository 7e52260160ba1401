package reportgen

import (
	"math"
	"strconv"

	"arrestcheck/arrest"
	"arrestcheck/arrest/quantity"
	"arrestcheck/limits"
)

// limitBlocks are the table of limits and what else is to say of its rows.
func (b *builder) limitBlocks() []Block {
	if len(b.asd().Findings) == 0 {
		return []Block{{Text: noLimits}}
	}
	t := &Table{Header: []string{rowHead, demandHead, limitHead, outcomeHead}, Widths: []int{3, 24, 26, 21}, Rules: true}
	var more []Line
	for place, i := range b.rowOrder() {
		f := &b.asd().Findings[i]
		demand, limit := b.demandAndLimit(f)
		row := strconv.Itoa(place + 1)
		t.Rows = append(t.Rows, Row{
			Cells: []string{row, b.title(f.Limit.Quantity) + ":\n" + demand + b.share(f), limit + "\n" + quote(f.Limit.Authority), b.outcome(f)},
			Loud:  f.Outcome == limits.Exceeded,
		})
		for _, text := range b.further(i) {
			more = append(more, Line{Label: row, Text: text})
			row = ""
		}
	}
	blocks := []Block{{Table: t}}
	if len(more) > 0 {
		blocks = append(blocks, Block{Text: moreOnRows, Lines: more})
	}
	return blocks
}

// further lists what the table of limits has no room for: all reasons but the
// one in the table, and the group the row belongs to.
func (b *builder) further(finding int) []string {
	f := &b.asd().Findings[finding]
	var list []string
	rest, further := f.Reasons, false
	if len(rest) > 0 && f.Outcome != limits.Exceeded && f.Outcome != limits.Within {
		rest, further = rest[1:], true
	}
	for i := range rest {
		list = append(list, b.reasonOnRow(f, &rest[i], further || i > 0))
	}
	if f.Limit.AnyOf != "" {
		list = append(list, b.say(alternative, cut(f.Limit.AnyOf), outcomeWords[b.groupOutcomes()[finding]]))
	}
	return list
}

// demandAndLimit returns the demand of a row, and its limit as typed, each in
// both units and with the digits that tell them apart.
func (b *builder) demandAndLimit(f *limits.Finding) (demand, limit string) {
	typed := f.Limit.Bound
	rec, _ := f.Limit.Quantity.Record()
	units := b.d.pair(rec.Dimension, typed.Unit, typed.High)
	round := demandRounding(f.Bound)
	digits := make(map[quantity.Unit]int, len(units))
	limit = senseWords[f.Limit.Sense] + " " + flat(typed.Text)
	for _, u := range units {
		least := pageDigits
		if u != typed.Unit {
			least = otherDigits
		}
		digits[u] = digitsBeside(f.Demand, typed.High, u, round, least)
		if u != typed.Unit {
			limit += " (" + format(typed.High, u, digits[u], quantity.Nearest) + ")"
		}
	}
	if f.Limit.AlsoPrinted != nil {
		limit += ", " + b.say(alsoPrintedNote, f.Limit.AlsoPrinted.Text)
	}
	if !isNumber(f.Demand) {
		return b.noDemand(f), limit
	}
	low, high := b.ends(f)
	demand = join(units, f.Demand, func(u quantity.Unit) string {
		last := format(high, u, digits[u], round)
		if first := format(low, u, digits[u], round); first != last {
			return between(low, u, digits[u], round, last)
		}
		return last
	})
	if words := boundWords[f.Bound]; words != "" {
		demand = words + " " + demand
	}
	return demand + b.byModel(f), limit
}

// otherDigits are those of a row at least in a unit that the limit was not typed
// in: with three of them 8 kN would read as 1800 lbf.
const otherDigits = 4

// noDemand says why a row has no figure of demand.
func (b *builder) noDemand(f *limits.Finding) string {
	for _, i := range f.Used {
		if e := &b.res().Estimates[i]; e.Evidence == arrest.Modelled && math.IsInf(e.High, 1) {
			return endlessModel
		}
	}
	return noFigure
}

// byModel says whether a demand comes from the model, and with which
// allowance.
func (b *builder) byModel(f *limits.Finding) string {
	if f.Bound == "" || len(f.Used) == 0 {
		return ""
	}
	switch e := &b.res().Estimates[f.Used[0]]; {
	case e.Evidence != arrest.Modelled:
		return ""
	case widened(e) && e.Travel > 0:
		return ", " + b.say(travelAllowanceNote, percent(e.Allowance))
	case widened(e):
		return ", " + b.say(allowanceNote, percent(e.Allowance))
	}
	return ", " + bareRemark
}

// share returns a line with the demand as a share of the limit, or nothing
// where the demand is a floor or has no such share. It never flatters, and is
// 100 % only for a demand of exactly the limit.
func (b *builder) share(f *limits.Finding) string {
	if !isNumber(f.Ratio) {
		return ""
	}
	percent, round := mustUnit("%"), quantity.Up
	if f.Limit.Sense == limits.AtLeast {
		round = quantity.Down
	}
	digits := digitsBeside(f.Ratio, 1, percent, round, pageDigits)
	return "\n" + b.say(shareOfLimit, format(f.Ratio, percent, digits, round))
}

// ends returns what the governing estimate of a row lies between; twice the
// demand where that is one figure or one end.
func (b *builder) ends(f *limits.Finding) (low, high float64) {
	if f.Bound == arrest.Between && len(f.Used) > 0 {
		if low, high := b.res().Estimates[f.Used[0]].Ends(); isNumber(low) && isNumber(high) {
			return low, high
		}
	}
	return f.Demand, f.Demand
}

// demandRounding returns which way the demand of a row is rounded: floors
// down, ceilings up.
func demandRounding(bound arrest.Bound) quantity.Rounding {
	switch bound {
	case arrest.AtLeast:
		return quantity.Down
	case arrest.AtMost:
		return quantity.Up
	}
	return quantity.Nearest
}

func isNumber(x float64) bool { return x-x == 0 }
