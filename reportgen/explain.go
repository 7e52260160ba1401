package reportgen

import (
	"slices"
	"strconv"
	"strings"

	"arrestcheck/arrest"
	"arrestcheck/limits"
)

// Explain makes the report on one row of a sheet: where it stands, what keeps it
// from being settled and what would settle it, the most important first, which
// figures it rests on, and who decides. ok is false where the sheet has no
// limit of that name.
func Explain(s *Sheet, limit string, units UnitChoice) (r Report, ok bool) {
	i := slices.IndexFunc(s.Assessment.Findings, func(f limits.Finding) bool { return f.Limit.ID == limit })
	if i < 0 {
		return Report{}, false
	}
	b := newBuilder(s, units)
	f := &s.Assessment.Findings[i]
	sections := []Section{{explainHeading, b.wanted(f)}}
	if open := b.openOf(f); len(open) > 0 {
		sections = append(sections, Section{explainOpenHeading, []Block{{Table: b.wantedInputs(open)}}})
	}
	if slices.ContainsFunc(f.Reasons, func(r limits.Reason) bool { return r.ID == limits.NoAllowance }) {
		sections = append(sections, b.comparedSection(true)...)
	}
	if len(f.Used) > 0 {
		sections = append(sections, Section{explainUsedHeading, []Block{{Table: b.usedTable(f)}}})
	}
	sections = append(sections, Section{explainWhoHeading, []Block{{Text: explainLast[b.sub], Loud: true}}})
	return Report{Head: b.explainHead(i), Sections: sections}, true
}

// explainHead says which row it is and where it stands.
func (b *builder) explainHead(finding int) []Block {
	f := &b.asd().Findings[finding]
	demand, limit := b.demandAndLimit(f)
	list := []Line{
		{Label: jobLabel, Text: quote(b.s.File.Document.Title)},
		{Label: explainLimitLabel, Text: b.say(explainLimit, f.Limit.ID, b.title(f.Limit.Quantity), limit, cut(f.Limit.Authority))},
		{Label: explainDemandLabel, Text: demand},
		{Label: explainOutcomeLabel, Text: b.outcome(f), Loud: f.Outcome == limits.Exceeded},
	}
	if f.Limit.AnyOf != "" {
		list = append(list, Line{Label: explainGroupLabel, Text: b.say(alternative, cut(f.Limit.AnyOf), outcomeWords[b.groupOutcomes()[finding]])})
	}
	head := append([]Block{{Text: notAPermission, Loud: true}}, b.banner()...)
	return append(head, Block{Lines: append(list, b.overrides()...)})
}

// wanted lists what would settle the row, the most important first.
func (b *builder) wanted(f *limits.Finding) []Block {
	lead, ok := explainLead[f.Outcome]
	if !ok {
		panic("reportgen: nothing to explain an outcome " + string(f.Outcome))
	}
	reasons := slices.Clone(f.Reasons)
	slices.SortStableFunc(reasons, func(x, y limits.Reason) int { return importance(x.ID) - importance(y.ID) })
	var list []Line
	for i := range reasons {
		r := &reasons[i]
		list = append(list, Line{Label: strconv.Itoa(i + 1), Text: b.say(explainReason, upperFirst(b.reasonOnRow(f, r, i > 0)), b.settling(f, r))})
	}
	switch {
	case len(list) == 0:
		return []Block{{Text: lead}}
	case f.Outcome == limits.Exceeded || f.Outcome == limits.Within:
		return []Block{{Text: lead}, {Text: besideStands, Lines: list}}
	}
	return []Block{{Text: lead}, {Lines: list}}
}

// importance is the place of a reason in the order of what to look at first.
func importance(id limits.ReasonID) int {
	i := slices.Index(byImportance, id)
	if i < 0 {
		panic("reportgen: no importance of the reason " + string(id))
	}
	return i
}

// settling says what would take a reason away.
func (b *builder) settling(f *limits.Finding, r *limits.Reason) string {
	words, ok := settledWhen[r.ID]
	if !ok {
		panic("reportgen: no way out of the reason " + string(r.ID))
	}
	switch r.ID {
	case limits.OnlyFloor, limits.OnlyCeiling, limits.NotComputed, limits.AssumedShape:
		switch {
		case r.ID == limits.NotComputed && len(r.Args) > 0:
			return untestedWanted
		case b.sub == aLoad && isPeak(f.Limit.Quantity):
			return peakOfLoadWanted
		}
		if r.ID == limits.AssumedShape && r.Args[0].Text == arrest.Inextensible {
			words = noStretchWanted
		}
		return b.say(words, upperFirst(b.entryWanted(f.Limit.Quantity)))
	case limits.OpenInput:
		return b.say(words, b.howToSettle(b.input(r.Args[0].Text)))
	case limits.Contradicted, limits.OutsideRating:
		if r.ID == limits.Contradicted && r.Args[0] == r.Args[1] {
			return itselfWanted.fill(b.d, f.Limit.Bound.Unit, r.Args[:1])
		}
		return words.fill(b.d, f.Limit.Bound.Unit, r.Args)
	}
	return words.text
}

// ways are what would give a bound for a quantity on both sides, each empty
// where it does not lead there.
type ways struct{ other, rating, path string }

// entryWanted says which entries would give a bound for the quantity on both
// sides; what is entered already is not asked for again.
func (b *builder) entryWanted(q arrest.Quantity) string {
	w, known := waysTo[q]
	if b.hasLayout() {
		if way, is := b.layoutWay(q); is {
			return way
		}
	}
	if !known {
		return otherWay
	}
	if b.hasEstimate(q, arrest.Rated) {
		w.rating = ""
	}
	if b.plan() != nil {
		w.path = ""
	}
	var list []string
	for _, way := range []string{w.other, w.rating, w.path} {
		if way != "" {
			list = append(list, way)
		}
	}
	if len(list) == 0 {
		return nothingMissing
	}
	return strings.Join(list, orWord)
}

func (b *builder) hasEstimate(q arrest.Quantity, ev arrest.Evidence) bool {
	return slices.ContainsFunc(b.res().Estimates, func(e arrest.Estimate) bool { return e.Quantity == q && e.Evidence == ev })
}

func upperFirst(s string) string {
	if s == "" {
		return s
	}
	return strings.ToUpper(s[:1]) + s[1:]
}

// input returns the input of that key.
func (b *builder) input(key string) *arrest.Input {
	for i := range b.res().Inputs {
		if b.res().Inputs[i].Key == key {
			return &b.res().Inputs[i]
		}
	}
	panic("reportgen: no input " + strconv.Quote(key))
}

// howToSettle says which sources and what tolerance would settle an input.
func (b *builder) howToSettle(in *arrest.Input) string {
	sources := settlingSources(in)
	words := b.say(settleBySource, strings.Join(sources, ", "))
	switch {
	case len(sources) == 0:
		return settleInFile
	case in.Overridden:
		words = b.say(settleInFileFrom, strings.Join(sources, ", "))
	case slices.Contains(sources, string(in.Source)):
		words = b.say(settleKeepSource, string(in.Source))
	}
	with := *in
	with.Overridden, with.Source = false, arrest.Source(sources[0])
	if with.Open() == arrest.OpenNoTolerance {
		words += toleranceToo
	}
	return words
}

// settlingSources lists the sources that settle an input of this role, given a
// tolerance; none where the role asks for no source, as its figure stands in
// the file with what it comes from. A figure set on the command line has no
// source: what settles it is the same figure in the file.
func settlingSources(in *arrest.Input) []string {
	bare := *in
	bare.Overridden, bare.Source = false, arrest.NoSource
	if bare.Open() == arrest.Settled {
		return nil
	}
	var list []string
	for _, source := range arrest.Sources() {
		with := bare
		with.Source = source
		if why := with.Open(); why == arrest.Settled || why == arrest.OpenNoTolerance {
			list = append(list, string(source))
		}
	}
	return list
}

// openOf lists the open inputs that the row names.
func (b *builder) openOf(f *limits.Finding) []*arrest.Input {
	var list []*arrest.Input
	for i := range f.Reasons {
		if r := &f.Reasons[i]; r.ID == limits.OpenInput {
			list = append(list, b.input(r.Args[0].Text))
		}
	}
	return list
}

// wantedInputs lists open inputs with what is missing of each.
func (b *builder) wantedInputs(open []*arrest.Input) *Table {
	t := &Table{Header: explainOpenHead, Widths: []int{26, 18, 32}, Rules: true}
	for _, in := range open {
		t.Rows = append(t.Rows, Row{Cells: []string{flat(in.Key), flat(in.Band.Text) + b.overridden(in), b.state(in) + "\n" + b.howToSettle(in)}})
	}
	return t
}

// usedTable lists the estimates of the row, the one it goes by first.
func (b *builder) usedTable(f *limits.Finding) *Table {
	t := &Table{Header: []string{whatHead, figureHead, fromHead}, Widths: []int{23, 28, 25}}
	for _, i := range f.Used {
		e := &b.res().Estimates[i]
		t.Rows = append(t.Rows, Row{Cells: []string{b.title(e.Quantity), b.estimate(e, pageDigits), b.from(e)}})
	}
	return t
}
