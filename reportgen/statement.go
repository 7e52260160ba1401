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
// else is loud and about this job, rescue and who decides, what else is about
// this job, the standing ones, and last what is about the arithmetic.
func (d display) statements(s *Sheet) []said {
	var all []said
	sub := s.subject()
	add := func(st statement, typed quantity.Unit, args ...arrest.Arg) {
		st = sub.about(st)
		all = append(all, said{st.number, st.fill(d, typed, shortened(st.phrase, args)), st.weight})
	}
	d.aboutJob(s, add)
	for _, st := range slices.Concat([]statement{whoDecides, limitsAreTheUsers, notLookedAt}, s.layoutOnly()) {
		add(st, quantity.Unit{})
	}
	all = d.meansOnRows(s, all)
	slices.SortStableFunc(all, func(a, b said) int {
		if a.weight != b.weight {
			return int(b.weight) - int(a.weight)
		}
		return a.place() - b.place()
	})
	return all
}

// place orders the quiet statements: rescue first, then who decides; what is
// about the arithmetic alone stands last.
func (s *said) place() int {
	if s.weight > quiet {
		return 0
	}
	last := ofWarnings[arrest.LedgersClose].number
	switch s.number {
	case hanging.number:
		return -2
	case whoDecides.number, withoutPersons[whoDecides.number].number:
		return -1
	case last:
		return 1
	}
	return 0
}

// shortened cuts the user's names of documents and parts to what page 1 shows.
func shortened(p phrase, args []arrest.Arg) []arrest.Arg {
	args = slices.Clone(args)
	for i := range args {
		if slices.Contains(namedByUser, p.args[i]) {
			args[i] = arrest.Text(cut(args[i].Text))
		}
	}
	return args
}

// namedByUser are the arguments of statements that a user has typed freely.
var namedByUser = []string{"document", "part", "parts", "position", "obstacle"}

// aboutJob adds the statements that this job calls for.
func (d display) aboutJob(s *Sheet, add func(statement, quantity.Unit, ...arrest.Arg)) {
	res := s.Result
	tell := func(id arrest.WarningID, typed quantity.Unit, args ...arrest.Arg) {
		st, ok := ofWarnings[id]
		if !ok {
			panic("reportgen: no statement for the warning " + string(id))
		}
		add(st, typed, args...)
	}
	var noUnit quantity.Unit
	if s.isExample() {
		tell(arrest.ExampleValues, noUnit)
	}
	if changed := s.File.Overrides; len(changed) > 0 {
		keys := make([]string, len(changed))
		for i := range changed {
			keys[i] = changed[i].Key
		}
		add(setOutside, noUnit, arrest.Text(strings.Join(keys, ", ")))
	}
	for _, w := range joined(res.Warnings) {
		if w.ID != arrest.ExampleValues && w.ID != arrest.MeansAreNotPeaks && !derived(w, res.Warnings) {
			tell(w.ID, typedUnit(res, w), d.arguments(s, w)...)
		}
	}
	has := survey(res.Estimates)
	if has.outside {
		add(outsideData, noUnit)
	}
	if open := openInputs(res.Inputs); len(open) > 0 {
		add(measureFirst, noUnit, arrest.Text(strconv.Itoa(len(open))), arrest.Text(strconv.Itoa(len(res.Inputs))))
	}
	if res.Persons > 0 && !IsRescue(s.File.Document.Rescue) {
		add(noRescueEntered, noUnit)
	}
	if has.floor {
		add(floorsNotPeaks, noUnit)
	}
	if has.mean || len(meanRows(s)) > 0 {
		tell(arrest.MeansAreNotPeaks, noUnit)
	}
	if has.promised {
		add(notThisStop, noUnit)
	}
}

// arguments returns those of a warning, with what the report adds to them.
func (d display) arguments(s *Sheet, w arrest.Warning) []arrest.Arg {
	switch w.ID {
	case arrest.LedgersClose:
		return []arrest.Arg{shareLeft(w.Args[0]), shareLeft(w.Args[1])}
	case arrest.NoAllowanceEntered:
		return publishedArguments()
	case arrest.LayoutRestrained, arrest.LayoutRestrainedInPart, arrest.LayoutNothingBelow, arrest.LayoutNoClearance,
		arrest.LayoutFeetStanding, arrest.LayoutWidthUnknown:
		return append(slices.Clone(w.Args), arrest.Text(string(w.ID)))
	case arrest.LayoutStrikes, arrest.LayoutDatumsApart:
		return layoutArguments(w)
	case arrest.EstimatesDisjoint:
		return append(slices.Clone(w.Args), boundOf(s.Result, w.Args[0], w.Args[1], w.Args[2]), boundOf(s.Result, w.Args[0], w.Args[3], w.Args[4]))
	}
	return w.Args
}

// typedUnit returns the unit in which the figures of a warning are best read:
// for what is unusual, that of the entry.
func typedUnit(res *arrest.Result, w arrest.Warning) quantity.Unit {
	if w.ID == arrest.Unusual {
		for i := range res.Inputs {
			if res.Inputs[i].Key == w.Args[0].Text {
				return res.Inputs[i].Band.Unit
			}
		}
	}
	return quantity.Unit{}
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
