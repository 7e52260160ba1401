package reportgen

import (
	"math"
	"slices"
	"strconv"
	"strings"
	"sync"

	"arrestcheck/arrest"
	"arrestcheck/arrest/quantity"
	"arrestcheck/arrest/study"
	"arrestcheck/limits"
	drawing "arrestcheck/reportgen/figure"
)

// rankings says of every row which inputs move it, in the order of the findings;
// nil for a row that nothing moves. ok is false for a job with a connector path
// or a layout: each figure would take a run of the model, or a search for the
// worst of the positions, and the sheet many thousand.
func (b *builder) rankings() (list []*study.Ranking, ok bool) {
	if b.s.takesLonger() {
		return nil, false
	}
	return rank(b.s), true
}

// takesLonger reports whether what to measure first is left to its own command.
func (s *Sheet) takesLonger() bool {
	return s.File.Job.Point.Path != nil || s.hasLayout()
}

// rank ranks the inputs of every row; the rows side by side where each takes
// long, for else to start beside each other takes longer than the work.
func rank(s *Sheet) []*study.Ranking {
	list := make([]*study.Ranking, len(s.Assessment.Findings))
	if !slices.ContainsFunc(s.File.Job.Inputs, unsettledOrWide) {
		return list
	}
	of := func(i int, n *study.Ranker) {
		if r, err := n.Rank(&s.Assessment.Findings[i]); err == nil && moves(r) {
			list[i] = r
		}
	}
	if !s.takesLonger() {
		n := study.NewRanker(&s.File.Job, s.Result)
		for i := range list {
			of(i, n)
		}
		return list
	}
	var all sync.WaitGroup
	for i := range list {
		all.Go(func() { of(i, study.NewRanker(&s.File.Job, s.Result)) })
	}
	all.Wait()
	return list
}

// unsettledOrWide reports whether an input that a study can move is open or has
// a band.
func unsettledOrWide(in arrest.Input) bool {
	return in.Set != nil && (in.Band.Low < in.Band.High || in.Open() != arrest.Settled)
}

// moves reports whether an input of the row has a band or is open.
func moves(r *study.Ranking) bool {
	return slices.ContainsFunc(r.Influences, func(i study.Influence) bool {
		return i.Open != arrest.Settled || i.Spread > 0
	})
}

// sensitivitySections say what to measure first, row by row. There are none
// where nothing has a band and nothing is open.
func (b *builder) sensitivitySections() []Section {
	list, ok := b.rankings()
	switch {
	case !ok && b.anyBand():
		return []Section{{measureHeading, []Block{{Text: b.whyLonger()}}}}
	case !ok:
		return nil
	}
	blocks := b.rankingBlocks(list)
	if len(blocks) == 0 {
		return nil
	}
	return []Section{{measureHeading, append([]Block{{Text: measureIntro}}, blocks...)}}
}

// whyLonger says why what to measure first is not on the sheet.
func (b *builder) whyLonger() string {
	if b.plan() == nil {
		return layoutTakesLonger
	}
	return pathTakesLonger
}

// measuringMethod is the method behind what to measure first.
const measuringMethod = "M-52"

// everyMethod returns the methods of the evaluation and of the studies, in the
// order of their ids.
func everyMethod() []arrest.Method {
	all := append(arrest.Methods(), study.Methods()...)
	slices.SortStableFunc(all, func(a, b arrest.Method) int { return strings.Compare(a.ID, b.ID) })
	return all
}

// anyBand reports whether a row rests on an entry with a band or an open one.
func (b *builder) anyBand() bool {
	return len(b.asd().Findings) > 0 && slices.ContainsFunc(b.res().Inputs, unsettledOrWide)
}

// rankingBlocks are the tables of the rows, in print order.
func (b *builder) rankingBlocks(list []*study.Ranking) []Block {
	var blocks []Block
	for place, i := range b.rowOrder() {
		if list[i] != nil {
			blocks = append(blocks, b.rankingBlock(strconv.Itoa(place+1), list[i]))
		}
	}
	return blocks
}

// rankingBlock is what moves one row.
func (b *builder) rankingBlock(row string, r *study.Ranking) Block {
	l := r.Finding.Limit
	text := b.say(rankedRow, row, b.title(l.Quantity), b.limitTitle(l, false), zoneWords[r.Zone])
	if r.Column != (study.Column{}) {
		text += " " + b.say(rankedBy, b.columnTitle(&r.Column)+endWords[r.End])
	}
	if !settles(r.Zone) {
		text += " " + b.centres(r)
	}
	t := &Table{Header: rankHead, Widths: []int{25, 22, 29}, Rules: true}
	for i := range r.Influences {
		n := &r.Influences[i]
		t.Rows = append(t.Rows, Row{Cells: []string{b.rankedInput(n), b.spreadText(r, n), b.toleranceText(r, n)}})
	}
	return Block{Text: text, Table: t}
}

// settles reports whether the figures settle a row, caps left aside.
func settles(z study.Zone) bool {
	return z == study.Exceeded || z == study.Within || z == study.Capped
}

func (b *builder) centres(r *study.Ranking) string {
	if settles(r.AtCentres) {
		return b.say(centresSettle, thenWords[r.AtCentres])
	}
	return b.say(centresDoNot, zoneWords[r.AtCentres])
}

func (b *builder) rankedInput(n *study.Influence) string {
	text := n.Key + "\n" + inputOf(&b.s.File.Job, n.Key).Band.Text
	if n.Open != arrest.Settled {
		text += "\n" + b.say(openWhy, openWords[string(n.Open)])
	}
	return text
}

// spreadText says between which figures an input moves the demand.
func (b *builder) spreadText(r *study.Ranking, n *study.Influence) string {
	dim := dimensionOf(r.Finding.Limit.Quantity)
	switch {
	case math.IsNaN(n.Spread):
		return noFigure
	case inputOf(&b.s.File.Job, n.Key).Band.Tolerance == quantity.Untold && n.Open != arrest.Settled:
		return noBandWritten
	case n.Spread == 0 || quantity.Close(n.Low, n.High, 1e-12):
		return movesNot
	case math.IsInf(n.High, 1):
		return b.say(openAbove, b.d.figure(dim, n.Low, pageDigits, quantity.Down))
	}
	return b.d.span(dim, quantity.Unit{}, n.Low, n.High, pageDigits) + "\n" + b.say(movesBy, b.d.figure(dim, n.Spread, pageDigits, quantity.Nearest))
}

// toleranceText says how closely an input would have to be measured.
func (b *builder) toleranceText(r *study.Ranking, n *study.Influence) string {
	t := &n.Tolerance
	if t.Help == study.NoHelp {
		return noHelp
	}
	if t.Help == study.Whatever {
		return b.say(anyTolerance, thenWords[t.Then])
	}
	in := inputOf(&b.s.File.Job, n.Key)
	u := in.Band.Unit
	about := b.d.figureAs(u.Dimension, u, t.About, min(mostDigitsOf(t.About, u), workingDigits), quantity.Nearest)
	if !t.Written {
		about = b.say(middleOf, about)
	}
	within := b.d.figureAs(u.Dimension, u, t.By, pageDigits, quantity.Down)
	if settles(r.Zone) && t.Then == r.Zone {
		return b.say(mayBeOff, within, about)
	}
	return b.say(mustMeasure, within, about, thenWords[t.Then])
}

// A Sensitivity is what to measure first, row by row.
type Sensitivity struct {
	Sheet *Sheet
	Limit string // only the rows of this limit; empty: all

	list []*study.Ranking
}

// Rank works it out. It takes some hundred evaluations for each input of each
// row: milliseconds, but over a connector path much longer.
func (v *Sensitivity) Rank() {
	v.list = rank(v.Sheet)
	for i := range v.list {
		if r := v.list[i]; r != nil && v.Limit != "" && r.Finding.Limit.ID != v.Limit {
			v.list[i] = nil
		}
	}
}

// Report makes the report: for each row its table and its drawing.
func (v *Sensitivity) Report(units UnitChoice) (Report, error) {
	b := newBuilder(v.Sheet, units)
	r := Report{Head: b.studyHead(Line{Label: askedLabel, Text: measureAsked}), Warnings: b.studyWarnings(nil, b.told(aloneAsEntered))}
	for place, i := range b.rowOrder() {
		one := v.list[i]
		if one == nil {
			continue
		}
		section := Section{Heading: upperFirst(b.title(one.Finding.Limit.Quantity)) + ", " + b.limitTitle(one.Finding.Limit, false)}
		section.Blocks = append(section.Blocks, b.rankingBlock(strconv.Itoa(place+1), one))
		scene, err := b.bars(one)
		if err != nil {
			return Report{}, err
		}
		if scene != nil {
			section.Blocks = append(section.Blocks, Block{Figure: scene})
		}
		r.Sections = append(r.Sections, section)
	}
	if len(r.Sections) == 0 {
		r.Sections = []Section{{measureHeading, []Block{{Text: nothingMoves}}}}
	}
	return r, nil
}

// Rows lists the rows that something moves, as indexes into the findings.
func (v *Sensitivity) Rows() []int {
	var rows []int
	for i, r := range v.list {
		if r != nil && slices.ContainsFunc(r.Influences, func(n study.Influence) bool { return n.Spread > 0 }) {
			rows = append(rows, i)
		}
	}
	return rows
}

// Figure draws one of Rows.
func (v *Sensitivity) Figure(row int, units UnitChoice) (*drawing.Scene, error) {
	b := newBuilder(v.Sheet, units)
	return b.bars(v.list[row])
}

// bars draws how far each input moves a row; nil where none does.
func (b *builder) bars(r *study.Ranking) (*drawing.Scene, error) {
	l := r.Finding.Limit
	var most []float64
	for i := range r.Influences {
		most = append(most, r.Influences[i].Low, r.Influences[i].High)
	}
	if !slices.ContainsFunc(r.Influences, func(n study.Influence) bool { return n.Spread > 0 }) {
		return nil, nil
	}
	u := b.d.pair(dimensionOf(l.Quantity), quantity.Unit{}, greatestOf(most))[0]
	p := &drawing.Bars{
		Title:     b.say(barsTitle, b.title(l.Quantity), b.limitTitle(l, false), orNothing(b.s.File.Document.Title)),
		Desc:      b.say(barsDesc, r.Influences[0].Key),
		Statement: notAPermission,
		Notes:     []string{aloneNote},
		Axis:      drawing.Axis{Name: b.title(l.Quantity), Unit: unitHead(u)},
	}
	if b.s.isExample() {
		p.Stamp = exampleStamp
	}
	for i := range r.Influences {
		p.Rows = append(p.Rows, b.bar(&r.Influences[i], u))
	}
	if worst := leastFavourable(r); isNumber(worst) {
		p.Uprights = append(p.Uprights, drawing.Level{At: u.From(worst), Label: b.say(asEnteredAt, format(worst, u, pageDigits, quantity.Nearest)), Pen: drawing.HelpPen})
	}
	p.Uprights = append(p.Uprights, drawing.Level{At: u.From(l.Bound.Value), Label: b.say(limitDrawn, l.ID, senseWords[l.Sense], l.Bound.Text), Pen: drawing.LimitPen})
	return p.Scene()
}

// leastFavourable is the demand with everything at its least favourable, at
// which each bar ends.
func leastFavourable(r *study.Ranking) float64 {
	worst := math.NaN()
	for i := range r.Influences {
		n := &r.Influences[i]
		switch at := []float64{n.Low, n.High}; {
		case r.Finding.Limit.Sense == limits.AtLeast && !(at[0] >= worst):
			worst = at[0]
		case r.Finding.Limit.Sense == limits.AtMost && !(at[1] <= worst):
			worst = at[1]
		}
	}
	return worst
}

func (b *builder) bar(n *study.Influence, u quantity.Unit) drawing.Bar {
	name := n.Key
	if n.Open != arrest.Settled {
		name += " (" + openMark + ")"
	}
	bar := drawing.Bar{Name: name, From: u.From(n.Low), To: u.From(n.High)}
	if quantity.Close(n.Low, n.High, 1e-12) {
		bar.ToText = movesNot
		return bar
	}
	bar.FromText = format(n.Low, u, pageDigits, quantity.Nearest)
	bar.ToText = format(n.High, u, pageDigits, quantity.Nearest)
	return bar
}
