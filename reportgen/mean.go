package reportgen

import (
	"slices"
	"strconv"

	"arrestcheck/limits"
)

// meanRows returns the findings that hold a mean against a limit for what feels
// the peak: a person, an anchor or a structure.
func meanRows(s *Sheet) []int {
	var rows []int
	for i := range s.Assessment.Findings {
		l := s.Assessment.Findings[i].Limit
		if isMean(l.Quantity) && (l.Kind == limits.Person || l.Kind == limits.Anchor || l.Kind == limits.Structure) {
			rows = append(rows, i)
		}
	}
	return rows
}

// meansOnRows makes the statement on means loud where such rows are on the
// sheet, and names each.
func (d display) meansOnRows(s *Sheet, all []said) []said {
	rows := meanRows(s)
	if len(rows) == 0 {
		return all
	}
	b := builder{s, d, s.subject()}
	at := slices.IndexFunc(all, func(one said) bool { return one.number == b.sub.about(meansAreNotPeaks).number })
	all[at].weight = loud
	for place, i := range b.rowOrder() {
		if slices.Contains(rows, i) {
			l := s.Assessment.Findings[i].Limit
			all[at].text += d.say(meanOnRow, strconv.Itoa(place+1), b.title(l.Quantity), senseWords[l.Sense]+" "+flat(l.Bound.Text), string(l.Kind))
		}
	}
	return all
}
