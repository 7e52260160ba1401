package reportgen

import (
	"strconv"

	"arrestcheck/arrest"
	"arrestcheck/arrest/quantity"
)

// A said is a statement with its figures in place.
type said struct {
	number, text string
	loud         bool
}

// statements returns the cautions of a sheet in print order: what is loud and
// about this job, what else is about this job, and the standing ones.
func (d display) statements(s *Sheet) []said {
	var loud, plain []said
	add := func(st statement, args ...arrest.Arg) {
		one := said{st.number, st.fill(d, quantity.Unit{}, args), st.loud}
		if st.loud {
			loud = append(loud, one)
			return
		}
		plain = append(plain, one)
	}
	d.aboutJob(s, add)
	for _, st := range [...]statement{whoDecides, limitsAreTheUsers, notLookedAt} {
		add(st)
	}
	if s.Result.Persons > 0 {
		add(hanging)
		add(thisLayoutOnly)
		add(anchorAndLine)
	}
	return append(loud, plain...)
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
	for _, w := range res.Warnings {
		if w.ID == arrest.ExampleValues || w.ID == arrest.MeansAreNotPeaks {
			continue
		}
		tell(w.ID, w.Args...)
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

// lines makes the lines of "WARNING: read first". Loud ones carry a mark, so
// that they stand out without colour too.
func lines(all []said) []Line {
	list := make([]Line, len(all))
	for i, s := range all {
		list[i] = Line{Label: "  " + s.number, Text: s.text, Loud: s.loud}
		if s.loud {
			list[i].Label = "! " + s.number
		}
	}
	return list
}
