package reportgen

import (
	"math"
	"slices"
	"strconv"
	"strings"

	"arrestcheck/arrest"
	"arrestcheck/arrest/quantity"
	"arrestcheck/arrest/study"
	"arrestcheck/limits"
)

// A Solve is an answer with what its report needs beside it.
type Solve struct {
	Sheet  *Sheet // the job as entered
	Answer *study.Answer
	Unit   quantity.Unit // of the input that was looked for, as typed
	Ranged bool          // the range was asked for
	Found  *FoundTravel  // what was found after an event, where that was asked
}

// A FoundTravel is what was found on an absorber after an event.
type FoundTravel struct{ Travel, Force quantity.Band }

// Report makes the report of an answer: the figure on the side of lower demand,
// what a check says with it, and the working.
func (v *Solve) Report(units UnitChoice) (Report, error) {
	s := solving{newBuilder(v.Sheet, units), v}
	sections := []Section{{answerHeading, s.answer()}}
	if checks := s.checks(); len(checks) > 0 {
		sections = append(sections, Section{typedInHeading, checks})
	}
	return Report{
		Head:     s.studyHead(s.asked()...),
		Warnings: s.warnings(),
		Sections: append(sections, Section{solveWorkingHeading, s.working()}),
	}, nil
}

// A solving is the report of an answer being made.
type solving struct {
	builder
	v *Solve
}

// asked says what was asked and over which range it was looked for.
func (s *solving) asked() []Line {
	a := s.v.Answer
	var list []Line
	if f := s.v.Found; f != nil {
		list = append(list, Line{Label: askedLabel, Text: travelAsked}, Line{Text: s.say(foundTravel, f.Travel.Text, f.Force.Text)})
	} else {
		for i := range a.Goals {
			list = append(list, Line{Label: askedLabel, Text: s.question(&a.Goals[i])})
		}
	}
	why := usualRange
	if s.v.Ranged {
		why = ownRange
	}
	low, high := s.short(a.Low, pageDigits, quantity.Nearest), s.short(a.High, pageDigits, quantity.Nearest)
	return append(list, Line{Label: rangeLabel, Text: s.say(rangeText, low, high, why)})
}

func (s *solving) question(m *study.Met) string {
	if m.Goal.Limit != nil {
		return s.say(askedLimit, s.v.Answer.Find, s.what(m), s.limitTitle(m.Goal.Limit, m.Printed))
	}
	return s.say(askedFor, s.v.Answer.Find, s.what(m), s.goalFigure(m))
}

// what is the figure that a goal is about.
func (s *solving) what(m *study.Met) string {
	if m.Column == (study.Column{}) {
		return s.title(quantityOf(m))
	}
	return s.columnTitle(&m.Column)
}

func quantityOf(m *study.Met) arrest.Quantity {
	if m.Goal.Limit != nil {
		return m.Goal.Limit.Quantity
	}
	return m.Goal.Of
}

// goal is what was to be reached, in words.
func (s *solving) goal(m *study.Met) string {
	switch {
	case m.Goal.Limit == nil:
		return s.goalFigure(m)
	case m.Printed:
		return s.say(thePair, s.limitTitle(m.Goal.Limit, true))
	}
	return "the " + s.limitTitle(m.Goal.Limit, false)
}

func (s *solving) goalFigure(m *study.Met) string { return s.amount(m, m.Figure) }

func (s *solving) amount(m *study.Met, si float64) string {
	return s.d.figure(dimensionOf(quantityOf(m)), si, pageDigits, quantity.Nearest)
}

// short is a figure of the input in the unit it was typed in.
func (s *solving) short(x float64, digits int, r quantity.Rounding) string {
	return format(x, s.v.Unit, digits, r)
}

// full is a figure of the input in all units of the report.
func (s *solving) full(x float64, digits int, r quantity.Rounding) string {
	return s.d.figureAs(s.v.Unit.Dimension, s.v.Unit, x, digits, r)
}

func (s *solving) warnings() []Line {
	own := []said{s.told(figuresOnly), s.told(betweenPoints)}
	if s.v.Found != nil {
		own = []said{s.told(afterEvent)}
	}
	var shown []arrest.Estimate
	for i := range s.v.Answer.Goals {
		m := &s.v.Answer.Goals[i]
		shown = append(shown, arrest.Estimate{Quantity: quantityOf(m), Evidence: or(m.Column.Evidence, arrest.Given), Bound: m.Bound})
	}
	if slices.ContainsFunc(s.v.Answer.Goals, s.clearsNothing) {
		own = append(own, s.told(floorClearsNothing))
	}
	return s.studyWarnings(shown, own...)
}

func or[T comparable](a, b T) T {
	if a == *new(T) {
		return b
	}
	return a
}

// clearsNothing reports whether a floor was followed to a figure above which
// it would be worse.
func (s *solving) clearsNothing(m study.Met) bool {
	sense, _ := limits.SenseOf(quantityOf(&m))
	return m.Bound == arrest.AtLeast && sense == limits.AtMost
}

// answer says what was found for each goal, and which limits govern.
func (s *solving) answer() []Block {
	a := s.v.Answer
	if s.v.Found != nil {
		return s.fallFound()
	}
	var blocks []Block
	for i := range a.Goals {
		blocks = append(blocks, s.goalBlock(&a.Goals[i]))
	}
	if len(a.Goals) > 1 {
		blocks = append(blocks, s.fits()...)
	}
	if len(a.Known) > 0 && (len(a.Known) > 1 || a.Known[0] != (study.Span{Low: a.Low, High: a.High})) {
		blocks = append(blocks, Block{Text: s.say(knownIn, s.spans(a.Known))})
	}
	return blocks
}

// goalBlock says what became of one goal.
func (s *solving) goalBlock(m *study.Met) Block {
	b := Block{Text: s.verdict(m), Loud: true}
	if len(s.v.Answer.Goals) > 1 {
		b.Text = upperFirst(s.what(m)) + ", " + s.goal(m) + ". " + b.Text
	}
	if len(m.Solutions) > 1 {
		for _, x := range m.Solutions {
			b.Lines = append(b.Lines, Line{Label: "-", Text: s.solution(m, x, s.digits(m, x))})
		}
	}
	if s.clearsNothing(*m) {
		b.Lines = append(b.Lines, Line{Label: "-", Text: s.say(floorFollows, s.what(m))})
	}
	for _, t := range m.Turns {
		kind := turnLeast
		if t.Greatest {
			kind = turnGreatest
		}
		b.Lines = append(b.Lines, Line{Label: "-", Text: s.say(turnIn, s.v.Answer.Find, s.full(t.X, pageDigits, quantity.Nearest), s.what(m), kind, s.amount(m, t.Y))})
	}
	return b
}

// verdict is the answer in one sentence.
func (s *solving) verdict(m *study.Met) string {
	what, goal := s.what(m), s.goal(m)
	least, greatest := s.amount(m, m.Least), s.amount(m, m.Greatest)
	switch m.Verdict {
	case study.One:
		if len(m.Solutions) == 1 {
			x := m.Solutions[0]
			return s.solution(m, x, s.digits(m, x)) + "."
		}
		return s.say(severalIn, "1")
	case study.Several:
		return s.say(severalIn, strconv.Itoa(len(m.Solutions)))
	case study.Jumped:
		return s.say(onlyJumped, goal)
	case study.Unknown:
		return s.say(neverKnown, what)
	}
	_, directed := limits.SenseOf(quantityOf(m))
	switch {
	case !m.Moves:
		return s.say(notMoved, what, s.v.Answer.Find, least)
	case !directed:
		return s.say(neverThere, what, goal, least, greatest)
	case m.Verdict == study.AllUnder:
		return s.say(allUnder, what, goal, least, greatest)
	}
	return s.say(allOver, what, goal, least, greatest)
}

// solution is one figure of the input in words.
func (s *solving) solution(m *study.Met, x study.Solution, digits int) string {
	key, figure := s.v.Answer.Find, s.full(x.X, digits, x.Lower)
	side := sideSmaller
	if x.Lower == quantity.Up {
		side = sideGreater
	}
	switch {
	case x.Jumps:
		return s.say(leapAnswer, key, figure, side)
	case x.Lower == quantity.Nearest:
		return s.say(plainAnswer, key, figure)
	}
	return s.say(oneAnswer, key, figure, side)
}

// digits returns how many digits of a solution are printed so that the printed
// figure is still one that is not beyond: three, unless what is not beyond is
// narrower than that.
func (s *solving) digits(m *study.Met, x study.Solution) int {
	digits := pageDigits
	for digits < mostDigits && x.Lower != quantity.Nearest && !contains(m.Under, asPrinted(x.X, s.v.Unit, digits, x.Lower)) {
		digits++
	}
	return digits
}

func contains(spans []study.Span, x float64) bool {
	return slices.ContainsFunc(spans, func(s study.Span) bool { return s.Low <= x && x <= s.High })
}

// fits say where all goals are kept, and which limits end that.
func (s *solving) fits() []Block {
	a := s.v.Answer
	if len(a.Fits) == 0 {
		return []Block{{Text: noFits, Loud: true}}
	}
	var blocks []Block
	for _, f := range a.Fits {
		low, high := s.full(f.Low, pageDigits, quantity.Up), s.full(f.High, pageDigits, quantity.Down)
		blocks = append(blocks, Block{
			Text: s.say(fitsFrom, a.Find, low, high), Loud: true,
			Lines: []Line{
				{Label: governsLabel, Text: s.say(governsLow, s.by(f.LowBy), low)},
				{Text: s.say(governsHigh, s.by(f.HighBy), high)},
			},
		})
	}
	return blocks
}

// by names the goal that ends a part.
func (s *solving) by(goal int) string {
	if goal < 0 {
		return endOfRange
	}
	return s.goal(&s.v.Answer.Goals[goal])
}

func (s *solving) spans(list []study.Span) string {
	var parts []string
	for _, p := range list {
		parts = append(parts, s.d.span(s.v.Unit.Dimension, s.v.Unit, p.Low, p.High, pageDigits))
	}
	return strings.Join(parts, "; ")
}

// fallFound says which free falls lie behind a travel: printed outwards.
func (s *solving) fallFound() []Block {
	low, high := s.v.Answer.Goals[0], s.v.Answer.Goals[1]
	if low.Verdict != study.One || high.Verdict != study.One {
		return []Block{s.goalBlock(&low), s.goalBlock(&high)}
	}
	a, b := low.Solutions[0].X, high.Solutions[0].X
	return []Block{{Text: upperFirst(s.say(foundFall, s.outwards(a, b, pageDigits))) + ".", Loud: true}}
}

// outwards is a span whose ends are not rounded inwards.
func (s *solving) outwards(low, high float64, digits int) string {
	return join(s.d.pair(s.v.Unit.Dimension, s.v.Unit, high), high, func(u quantity.Unit) string {
		last := format(high, u, digits, quantity.Up)
		if format(low, u, digits, quantity.Down) == last {
			return last
		}
		return between(low, u, digits, quantity.Down, last)
	})
}

// checks say what a check comes to with each solution typed in.
func (s *solving) checks() []Block {
	var blocks []Block
	for _, x := range s.typed() {
		b := Block{Text: s.say(workedAt, s.v.Answer.Find, format(x, s.v.Unit, mostDigitsOf(x, s.v.Unit), quantity.Nearest))}
		check := s.checkWith(study.Move{Key: s.v.Answer.Find, To: x})
		switch {
		case !check.can:
			b.Text += " " + cannotHappen
		case len(check.s.Assessment.Findings) == 0:
			b.Lines = []Line{{Label: "-", Text: noLimitsHere}}
		default:
			for i := range check.s.Assessment.Findings {
				f := &check.s.Assessment.Findings[i]
				b.Lines = append(b.Lines, Line{Label: "-", Loud: f.Outcome == limits.Exceeded,
					Text: check.say(rowSays, check.title(f.Limit.Quantity), check.limitTitle(f.Limit, false), check.outcome(f))})
			}
		}
		blocks = append(blocks, b)
	}
	return blocks
}

// mostDigitsOf returns how many digits it takes to print a figure to its twelfth
// one.
func mostDigitsOf(x float64, u quantity.Unit) int {
	for digits := pageDigits; digits < mostDigits; digits++ {
		if quantity.Snap(asPrinted(x, u, digits, quantity.Nearest)) == quantity.Snap(x) {
			return digits
		}
	}
	return mostDigits
}

// mostTyped bounds how many solutions are checked.
const mostTyped = 6

// typed are the solutions as printed, each once, and the ends of what keeps all
// goals.
func (s *solving) typed() []float64 {
	var list []float64
	add := func(x float64) {
		if !slices.Contains(list, x) && len(list) < mostTyped {
			list = append(list, x)
		}
	}
	a := s.v.Answer
	if len(a.Goals) > 1 && s.v.Found == nil {
		for _, f := range a.Fits {
			if f.LowBy >= 0 {
				add(asPrinted(f.Low, s.v.Unit, pageDigits, quantity.Up))
			}
			if f.HighBy >= 0 {
				add(asPrinted(f.High, s.v.Unit, pageDigits, quantity.Down))
			}
		}
		return list
	}
	for i := range a.Goals {
		m := &a.Goals[i]
		for _, x := range m.Solutions {
			add(asPrinted(x.X, s.v.Unit, s.digits(m, x), x.Lower))
		}
	}
	return list
}

// working is the way to each solution: what was followed, the figure with five
// digits, and the working of the job with it.
func (s *solving) working() []Block {
	var blocks []Block
	for i := range s.v.Answer.Goals {
		m := &s.v.Answer.Goals[i]
		b := Block{Text: upperFirst(s.say(followed, s.followedWhat(m), endWords[m.End]))}
		for _, x := range m.Solutions {
			b.Lines = append(b.Lines, Line{Label: "M-53", Text: s.say(solvedAt, s.v.Answer.Find, s.full(x.X, s.workedDigits(m, x), x.Lower), residualText(x.Residual))})
		}
		blocks = append(blocks, b)
	}
	for _, x := range s.worked() {
		figure := s.short(x, mostDigitsOf(x, s.v.Unit), quantity.Nearest)
		blocks = append(blocks, Block{Text: s.say(workedAt, s.v.Answer.Find, figure)})
		blocks = append(blocks, s.workingWith(study.Move{Key: s.v.Answer.Find, To: x})...)
	}
	return blocks
}

// mostWorked bounds how many solutions are worked out line by line.
const mostWorked = 3

// worked are the solutions with the digits of the working, each once.
func (s *solving) worked() []float64 {
	var list []float64
	for i := range s.v.Answer.Goals {
		m := &s.v.Answer.Goals[i]
		for _, x := range m.Solutions {
			if at := asPrinted(x.X, s.v.Unit, s.workedDigits(m, x), x.Lower); !slices.Contains(list, at) && len(list) < mostWorked {
				list = append(list, at)
			}
		}
	}
	return list
}

func residualText(share float64) string {
	return shareLeft(arrest.Figure(quantity.Ratio, math.Abs(share), quantity.Nearest)).Text
}

// workedDigits are those of the working, more where page 1 has more.
func (s *solving) workedDigits(m *study.Met, x study.Solution) int {
	return max(workingDigits, s.digits(m, x))
}

func (s *solving) followedWhat(m *study.Met) string {
	if m.Allows > 0 {
		return s.say(withShare, s.what(m), percent(m.Allows))
	}
	return s.what(m)
}
