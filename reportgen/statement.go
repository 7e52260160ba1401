package reportgen

import (
	"slices"
	"strconv"
	"strings"

	"arrestcheck/arrest"
	"arrestcheck/arrest/quantity"
)

// A said is a statement with its figures in place.
type said struct {
	number, text string
	weight       weight
}

// statements returns the cautions of a sheet in print order: the loudest, what
// else is loud and about this job, what else is about this job, and the
// standing ones.
func (d display) statements(s *Sheet) []said {
	var all []said
	sub := s.subject()
	add := func(st statement, args ...arrest.Arg) {
		st = sub.about(st)
		all = append(all, said{st.number, st.fill(d, quantity.Unit{}, args), st.weight})
	}
	d.aboutJob(s, add)
	for _, st := range slices.Concat([]statement{whoDecides, limitsAreTheUsers, notLookedAt}, layoutOnly[sub]) {
		add(st)
	}
	slices.SortStableFunc(all, func(a, b said) int { return int(b.weight) - int(a.weight) })
	return all
}

// aboutJob adds the statements that this job calls for.
func (d display) aboutJob(s *Sheet, add func(statement, ...arrest.Arg)) {
	res := s.Result
	tell := func(id arrest.WarningID, args ...arrest.Arg) {
		st, ok := ofWarnings[id]
		if !ok {
			panic("reportgen: no statement for the warning " + string(id))
		}
		add(st, args...)
	}
	if s.isExample() {
		tell(arrest.ExampleValues)
	}
	if changed := s.File.Overrides; len(changed) > 0 {
		keys := make([]string, len(changed))
		for i := range changed {
			keys[i] = changed[i].Key
		}
		add(setOutside, arrest.Text(strings.Join(keys, ", ")))
	}
	for _, w := range res.Warnings {
		if w.ID == arrest.ExampleValues || w.ID == arrest.MeansAreNotPeaks {
			continue
		}
		tell(w.ID, d.arguments(s, w)...)
	}
	has := survey(res.Estimates)
	if has.outside {
		add(outsideData)
	}
	if open := openInputs(res.Inputs); len(open) > 0 {
		add(measureFirst, arrest.Text(strconv.Itoa(len(open))), arrest.Text(strconv.Itoa(len(res.Inputs))))
	}
	if res.Persons > 0 && s.File.Document.Rescue == "" {
		add(noRescueEntered)
	}
	if has.floor {
		add(floorsNotPeaks)
	}
	if has.mean {
		tell(arrest.MeansAreNotPeaks)
	}
	if has.promised {
		add(notThisStop)
	}
}

// arguments returns those of a warning, with what the report adds to them.
func (d display) arguments(s *Sheet, w arrest.Warning) []arrest.Arg {
	switch w.ID {
	case arrest.LedgersClose:
		return []arrest.Arg{shareLeft(w.Args[0]), shareLeft(w.Args[1])}
	case arrest.NoAllowanceEntered:
		return publishedArguments()
	}
	return w.Args
}

// A content says what kinds of estimates a result holds.
type content struct{ floor, mean, promised, outside bool }

func survey(estimates []arrest.Estimate) content {
	var has content
	for i := range estimates {
		e := &estimates[i]
		has.floor = has.floor || e.Quantity == arrest.PeakForce && e.Bound == arrest.AtLeast
		has.mean = has.mean || isMean(e.Quantity)
		has.promised = has.promised || e.Evidence != arrest.Given
		has.outside = has.outside || e.Outside
	}
	return has
}

// marks stand before the number of a statement, so that what is loud stands out
// without colour too.
var marks = [...]string{quiet: "", loud: "! ", loudest: "!! "}

// lines makes the lines of "WARNING: read first", the numbers one below the
// other.
func lines(all []said) []Line {
	widest := len(marks[loud])
	for _, s := range all {
		widest = max(widest, len(marks[s.weight]))
	}
	list := make([]Line, len(all))
	for i, s := range all {
		mark := marks[s.weight]
		mark += strings.Repeat(" ", widest-len(mark))
		list[i] = Line{Label: mark + s.number, Text: s.text, Loud: s.weight > quiet, Loudest: s.weight == loudest}
	}
	return list
}
