package reportgen

import (
	"slices"
	"strconv"
	"strings"

	"arrestcheck/arrest"
	"arrestcheck/limits"
)

// head is what stands above the warnings.
func (b *builder) head() []Block {
	return append(append([]Block{{Text: notAPermission, Loud: true}}, b.banner()...),
		Block{Lines: append(b.identity(), b.overrides()...)},
		Block{Lines: b.usedUp()},
		Block{Lines: b.coverage()},
		Block{Lines: b.worst()},
	)
}

// identity says which question and job the sheet is about.
func (b *builder) identity() []Line {
	var list []Line
	for _, l := range b.userTexts() {
		if l.Label == systemLabel {
			list = append(list,
				Line{Label: sheetLabel, Text: b.say(sheetOf, strconv.Itoa(b.s.Number), strconv.Itoa(b.s.Of))},
				Line{Label: datumLabel, Text: b.datum()})
		}
		if l.Text = b.onPageOne(l); l.Text != "" {
			list = append(list, l)
		}
	}
	return list
}

// onPageOne returns a text of the document as page 1 shows it, empty where the
// line is left out.
func (b *builder) onPageOne(l Line) string {
	switch {
	case l.Label == rescueLabel:
		return b.rescue()
	case l.Text == "" && slices.Contains(alwaysShown, l.Label):
		return nothingEntered
	}
	return quote(l.Text)
}

// userTexts are what the document of the job says of itself, as typed, in the
// order of page 1.
func (b *builder) userTexts() []Line {
	doc := &b.s.File.Document
	return []Line{
		{Label: questionLabel, Text: doc.Purpose},
		{Label: jobLabel, Text: doc.Title},
		{Label: siteLabel, Text: doc.Site},
		{Label: referenceLabel, Text: doc.Reference},
		{Label: revisionLabel, Text: doc.Revision},
		{Label: dateLabel, Text: doc.Date},
		{Label: reviewLabel, Text: doc.ReviewDate},
		{Label: systemLabel, Text: doc.System},
		{Label: rescueLabel, Text: doc.Rescue},
	}
}

// alwaysShown are the labels that stand on page 1 with nothing beside them too.
var alwaysShown = []string{questionLabel, jobLabel, revisionLabel, systemLabel}

// usedUp says above everything else that a device is used up, or may be within
// the user's allowance.
func (b *builder) usedUp() []Line {
	var list []Line
	for _, w := range b.res().Warnings {
		switch w.ID {
		case arrest.PathExhausted:
			list = append(list, Line{Label: usedUpLabel, Text: b.say(usedUpHead, cut(w.Args[0].Text)), Loud: true, Loudest: true})
		case arrest.PathExhaustedInAllowance:
			list = append(list, Line{Label: nearlyLabel, Text: b.say(usedUpInAllowanceHead, cut(w.Args[0].Text)), Loud: true, Loudest: true})
		}
	}
	return list
}

// overrides are the entries that were set on the command line: the job file
// alone does not give this sheet.
func (b *builder) overrides() []Line {
	var list []Line
	for i := range b.s.File.Overrides {
		o := &b.s.File.Overrides[i]
		text := b.say(setInPlace, o.Key, o.Value, o.Former)
		if o.Former == "" {
			text = b.say(setAnew, o.Key, o.Value)
		}
		list = append(list, Line{Label: setLabel, Text: text, Loud: true})
	}
	return list
}

// rescue is what is entered about it; where no person is part of the job, only
// what somebody did enter.
func (b *builder) rescue() string {
	text := b.s.File.Document.Rescue
	switch {
	case text == "" && b.sub == aPerson:
		return nothingEntered
	case text != "" && b.sub == aPerson && !IsRescue(text):
		return b.say(noRescueText, cut(text))
	}
	return quote(text)
}

func orNothing(s string) string {
	if s == "" {
		return nothingEntered
	}
	return s
}

// coverage counts the outcomes and names what nobody entered, or entered
// elsewhere.
func (b *builder) coverage() []Line {
	a := b.asd()
	text := noLimits
	if len(a.Findings) > 0 {
		n := a.Counts()
		text = b.say(countSentence, strconv.Itoa(len(a.Groups)), strconv.Itoa(n[limits.Exceeded]),
			strconv.Itoa(n[limits.Undecided]), strconv.Itoa(n[limits.NotCompared]), strconv.Itoa(n[limits.Within]))
	}
	list := []Line{{Label: limitsLabel, Text: text, Loud: a.Counts()[limits.Exceeded] > 0}}
	list = append(list, b.insideLines()...)
	var missing []string
	for _, e := range a.NotEntered {
		missing = append(missing, b.expected(e))
	}
	if len(missing) > 0 {
		list = append(list, Line{Label: missingLabel, Text: strings.Join(missing, ", ")})
	}
	for _, e := range a.Elsewhere {
		list = append(list, Line{Label: elsewhereLabel, Text: b.say(elsewhereLine, b.title(e.Quantity), cut(e.Where))})
	}
	return list
}

// expected names a subject that limits are expected for.
func (b *builder) expected(e limits.Expected) string {
	if len(e.Quantities) > 0 && b.sub != aPerson {
		if words, ok := titlesWithoutPersons[e.Quantities[0]]; ok {
			return words
		}
	}
	return expectedWord(e.Subject)
}

func expectedWord(subject string) string {
	if words, ok := expectedWords[subject]; ok {
		return words
	}
	return subject
}

// title returns what a quantity is called on a sheet about this subject.
func (b *builder) title(q arrest.Quantity) string {
	if words, ok := titlesWithoutPersons[q]; ok && b.sub != aPerson {
		return words
	}
	return title(q)
}

func title(q arrest.Quantity) string {
	r, ok := q.Record()
	if !ok {
		return string(q)
	}
	return r.Title
}

// worst puts the worst row in words.
func (b *builder) worst() []Line {
	worst := b.asd().WorstRow()
	if worst < 0 {
		return nil
	}
	f := &b.asd().Findings[worst]
	list := []Line{{Label: worstLabel, Text: b.rowInWords(worst), Loud: f.Outcome == limits.Exceeded}}
	for _, i := range b.hidden() {
		if i != worst {
			list = append(list, Line{Label: insideLabel, Text: b.rowInWords(i), Loud: true})
		}
	}
	return list
}

// rowInWords puts a row with its main reason into a sentence. Reasons beside a
// row that is exceeded or within are not why it is so.
func (b *builder) rowInWords(finding int) string {
	f := &b.asd().Findings[finding]
	demand, limit := b.demandAndLimit(f)
	place := slices.Index(b.rowOrder(), finding)
	text := b.say(worstSentence, strconv.Itoa(place+1), outcomeWords[f.Outcome], b.title(f.Limit.Quantity), demand, limit, cut(f.Limit.Authority))
	switch {
	case len(f.Reasons) == 0:
		return text
	case f.Outcome == limits.Exceeded || f.Outcome == limits.Within:
		return b.say(worstBeside, text, b.reason(f, &f.Reasons[0]))
	}
	return b.say(worstReason, text, b.reason(f, &f.Reasons[0]))
}

// groupOutcomes returns the outcome that each finding counts with.
func (b *builder) groupOutcomes() []limits.Outcome {
	list := make([]limits.Outcome, len(b.asd().Findings))
	for i := range list {
		list[i] = b.asd().Findings[i].Outcome
	}
	for _, g := range b.asd().Groups {
		for _, i := range g.Rows {
			list[i] = g.Outcome
		}
	}
	return list
}

// rowOrder returns the findings in print order: exceeded, undecided, not
// compared, within, each as entered.
func (b *builder) rowOrder() []int {
	var order []int
	for _, o := range limits.Outcomes() {
		for i := range b.asd().Findings {
			if b.asd().Findings[i].Outcome == o {
				order = append(order, i)
			}
		}
	}
	return order
}

// outcome returns the outcome of a row with its main reason, as printed.
func (b *builder) outcome(f *limits.Finding) string {
	words := outcomeWords[f.Outcome]
	if len(f.Reasons) == 0 || f.Outcome == limits.Exceeded || f.Outcome == limits.Within {
		return words
	}
	return words + ": " + b.reason(f, &f.Reasons[0])
}

// reason puts a reason in words, its figures in the unit of the row.
func (b *builder) reason(f *limits.Finding, r *limits.Reason) string {
	return b.reasonOnRow(f, r, false)
}

// reasonOnRow is reason with the words for one that stands after others where
// those differ.
func (b *builder) reasonOnRow(f *limits.Finding, r *limits.Reason, further bool) string {
	p, ok := reasons[r.ID]
	if other, is := reasonsAtLeast[r.ID]; is && f.Limit.Sense == limits.AtLeast {
		p = other
	}
	switch {
	case r.ID == limits.NotComputed && len(r.Args) > 0:
		p = untestedCondition
	case r.ID == limits.AssumedShape && r.Args[0].Text == arrest.Inextensible && further:
		return b.say(noStretchBeside)
	case r.ID == limits.AssumedShape && r.Args[0].Text == arrest.Inextensible:
		return b.say(noStretchReason)
	case r.ID == limits.AssumedShape && further:
		p = shapeBeside
	case r.ID == limits.Contradicted && r.Args[0] == r.Args[1]:
		return contradictsItself.fill(b.d, f.Limit.Bound.Unit, r.Args[:1])
	}
	if !ok {
		panic("reportgen: no words for the reason " + string(r.ID))
	}
	least := pageDigits
	if r.ID == limits.ConditionUnfulfilled || r.ID == limits.ConditionStraddles {
		least = workingDigits // the condition is printed as typed: the figure must not read like it
	}
	return p.fillTo(b.d, f.Limit.Bound.Unit, r.Args, least)
}
