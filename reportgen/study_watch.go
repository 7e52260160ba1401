package reportgen

import (
	"strconv"

	"arrestcheck/limits"
)

// Watched is the report of a sheet in the order in which it is looked at while
// its job is being written: what it is not, the counts, the worst row, the limits,
// and then the warnings. It is for a terminal that shows as much of it as has room;
// Build is the sheet.
func Watched(s *Sheet, units UnitChoice) Report {
	b := newBuilder(s, units)
	return Report{
		Head: append(append([]Block{{Text: notAPermission, Loud: true}}, b.banner()...),
			Block{Lines: append(append(b.coverage(), b.worst()...), b.overrides()...)}),
		Sections: []Section{
			{limitsHeading, b.rowsInShort()},
			{warningHeading, []Block{{Lines: lines(b.d.statements(s))}}},
			{peaksHeading, b.estimateBlocks(noPeak, isPeak)},
			{meansHeading, b.estimateBlocks(noneShort, isMean)},
			{openHeading, []Block{b.openBlock()}},
		},
	}
}

// rowsInShort are the rows of limits, the worst first, each as a sentence.
func (b *builder) rowsInShort() []Block {
	if len(b.asd().Findings) == 0 {
		return []Block{{Text: noLimits}}
	}
	var list []Line
	for place, i := range b.rowOrder() {
		f := &b.asd().Findings[i]
		demand, limit := b.demandAndLimit(f)
		list = append(list, Line{Label: strconv.Itoa(place + 1), Loud: f.Outcome == limits.Exceeded,
			Text: b.say(rowInShort, outcomeWords[f.Outcome], b.title(f.Limit.Quantity), demand, f.Limit.ID, limit)})
	}
	return []Block{{Lines: list}}
}
