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
		Block{Lines: b.coverage()},
		Block{Lines: b.worst()},
	)
}

// identity says which question and job the sheet is about.
func (b *builder) identity() []Line {
	doc := &b.s.File.Document
	all := []Line{
		{Label: questionLabel, Text: orNothing(doc.Purpose)},
		{Label: jobLabel, Text: orNothing(doc.Title)},
		{Label: siteLabel, Text: doc.Site},
		{Label: referenceLabel, Text: doc.Reference},
		{Label: revisionLabel, Text: orNothing(doc.Revision)},
		{Label: dateLabel, Text: doc.Date},
		{Label: reviewLabel, Text: doc.ReviewDate},
		{Label: sheetLabel, Text: b.say(sheetOf, strconv.Itoa(b.s.Number), strconv.Itoa(b.s.Of))},
		{Label: datumLabel, Text: holdsFor[b.sub]},
		{Label: systemLabel, Text: orNothing(doc.System)},
		{Label: rescueLabel, Text: b.rescue()},
	}
	kept := all[:0]
	for _, l := range all {
		if l.Text != "" {
			kept = append(kept, l)
		}
	}
	return kept
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
	if b.sub != aPerson {
		return b.s.File.Document.Rescue
	}
	return orNothing(b.s.File.Document.Rescue)
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
	var missing []string
	for _, e := range a.NotEntered {
		missing = append(missing, b.expected(e))
	}
	if len(missing) > 0 {
		list = append(list, Line{Label: missingLabel, Text: strings.Join(missing, ", ")})
	}
	for _, e := range a.Elsewhere {
		list = append(list, Line{Label: elsewhereLabel, Text: b.say(elsewhereLine, b.title(e.Quantity), e.Where)})
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
	place := slices.Index(b.rowOrder(), worst)
	f := &b.asd().Findings[worst]
	demand, limit := b.demandAndLimit(f)
	text := b.say(worstSentence, strconv.Itoa(place+1), outcomeWords[f.Outcome], b.title(f.Limit.Quantity), demand, limit, f.Limit.Authority)
	if len(f.Reasons) > 0 {
		text = b.say(worstReason, text, b.reason(f, &f.Reasons[0]))
	}
	return []Line{{Label: worstLabel, Text: text, Loud: f.Outcome == limits.Exceeded}}
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
	case r.ID == limits.AssumedShape && further:
		p = shapeBeside
	}
	if !ok {
		panic("reportgen: no words for the reason " + string(r.ID))
	}
	return p.fill(b.d, f.Limit.Bound.Unit, r.Args)
}
