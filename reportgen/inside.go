package reportgen

import (
	"slices"
	"strconv"
	"strings"

	"arrestcheck/limits"
)

// insideLines name what the counts do not show: rows of an any_of group that
// stand worse than the group itself. By the rule of such a group one row within
// is enough, and still nobody may overlook that another one is exceeded.
func (b *builder) insideLines() []Line {
	var list []Line
	for _, g := range b.asd().Groups {
		if text := b.inside(&g); text != "" {
			list = append(list, Line{Label: insideLabel, Text: text, Loud: b.anyExceeded(g.Rows)})
		}
	}
	return list
}

// inside says which rows of a group came to something worse than the group, or
// nothing where none did.
func (b *builder) inside(g *limits.Group) string {
	var parts []string
	for _, o := range limits.Outcomes() {
		if o == g.Outcome || o == limits.Within {
			continue
		}
		switch rows := b.rowsOf(g.Rows, o); len(rows) {
		case 0:
		case 1:
			parts = append(parts, b.say(insideRow, rows[0], outcomeWords[o]))
		default:
			parts = append(parts, b.say(insideRows, listed(rows), outcomeWords[o]))
		}
	}
	switch {
	case len(parts) == 0:
		return ""
	case g.Outcome == limits.Within:
		return b.say(insideWithin, cut(g.AnyOf), listed(parts))
	}
	return b.say(insideOpen, cut(g.AnyOf), listed(parts))
}

// rowsOf returns the printed numbers of those findings that came to o.
func (b *builder) rowsOf(findings []int, o limits.Outcome) []string {
	var rows []string
	for place, i := range b.rowOrder() {
		if b.asd().Findings[i].Outcome == o && slices.Contains(findings, i) {
			rows = append(rows, strconv.Itoa(place+1))
		}
	}
	return rows
}

func (b *builder) anyExceeded(findings []int) bool {
	return slices.ContainsFunc(findings, func(i int) bool { return b.asd().Findings[i].Outcome == limits.Exceeded })
}

// hidden returns the findings that are exceeded inside a group that is not.
func (b *builder) hidden() []int {
	var list []int
	of := b.groupOutcomes()
	for i := range b.asd().Findings {
		if b.asd().Findings[i].Outcome == limits.Exceeded && of[i] != limits.Exceeded {
			list = append(list, i)
		}
	}
	return list
}

// listed joins words: "1", "1 and 2", "1, 2 and 3".
func listed(words []string) string {
	n := len(words)
	if n < 2 {
		return strings.Join(words, "")
	}
	return strings.Join(words[:n-1], ", ") + " and " + words[n-1]
}
