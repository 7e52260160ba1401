package reportgen

import (
	"strconv"

	"arrestcheck/arrest"
	"arrestcheck/arrest/quantity"
	"arrestcheck/limits"
)

// behind is what page 1 rests on.
func (b *builder) behind() []Section {
	sections := append([]Section{{Heading: behindHeading}}, b.longTexts()...)
	sections = append(sections, Section{inputsHeading, []Block{{Table: b.inputTable()}}})
	sections = append(append(sections, b.layoutSections()...), b.pathSections()...)
	sections = append(sections, b.comparedSection(false)...)
	if len(b.asd().Findings) > 0 {
		sections = append(sections, Section{limitTextsHeading, b.limitTexts()})
	}
	sections = append(sections,
		Section{registerHeading, []Block{{Lines: b.register()}}},
		Section{workingHeading, b.workingBlocks()},
	)
	if wrong := b.forgottenBlocks(); len(wrong) > 0 {
		sections = append(sections, Section{forgottenHeading[b.sub], wrong})
	}
	sections = append(sections, b.sensitivitySections()...)
	return append(sections,
		Section{notCheckedHeading, []Block{{Lines: bullets(b.notLookedAt())}}},
		Section{referencesHeading, []Block{{Lines: b.references()}}},
		Section{filesHeading, []Block{{Lines: b.files()}}},
	)
}

func bullets(texts []string) []Line {
	list := make([]Line, len(texts))
	for i, t := range texts {
		list[i] = Line{Label: "-", Text: t}
	}
	return list
}

// inputTable lists every input as written, in SI, with its source.
func (b *builder) inputTable() *Table {
	t := &Table{Header: inputsHead, Widths: []int{27, 16, 13, 18}, Rules: true}
	for i := range b.res().Inputs {
		in := &b.res().Inputs[i]
		state := b.state(in)
		if in.Note != "" {
			state += "\n" + b.say(quoted, in.Note)
		}
		t.Rows = append(t.Rows, Row{Cells: []string{flat(in.Key), flat(in.Band.Text) + b.overridden(in), siText(&in.Band), state}})
	}
	return t
}

// overridden says of an input that was set on the command line what the file
// has in its place.
func (b *builder) overridden(in *arrest.Input) string {
	for i := range b.s.File.Overrides {
		switch o := &b.s.File.Overrides[i]; {
		case o.Key != in.Key:
		case o.Former == "":
			return "\n" + b.say(setByHand)
		default:
			return "\n" + b.say(setByHandFor, o.Former)
		}
	}
	return ""
}

// state says whether an input is settled, by what, and if not why.
func (b *builder) state(in *arrest.Input) string {
	source := string(in.Source)
	if in.Role == arrest.OfDocument {
		source = documentSource
	}
	switch why := in.Open(); {
	case why == arrest.Settled:
		return b.say(settledBy, source)
	case source == "":
		return b.say(openWhy, string(why))
	default:
		return b.say(openFrom, source, string(why))
	}
}

// siText returns the figures of a band in SI: the one it is, its ends, or all
// three.
func siText(band *quantity.Band) string {
	u := mustUnit(band.Unit.Symbol).Dimension.SI()
	low := format(band.Low, u, workingDigits, quantity.Nearest)
	high := format(band.High, u, workingDigits, quantity.Nearest)
	switch {
	case band.Low == band.High:
		return low
	case isNumber(band.Value):
		return low + "\n" + format(band.Value, u, workingDigits, quantity.Nearest) + "\n" + high
	}
	return low + "\n" + high
}

// limitTexts give each limit in full, row by row.
func (b *builder) limitTexts() []Block {
	var blocks []Block
	for place, i := range b.rowOrder() {
		l, set := b.asd().Findings[i].Limit, b.asd().Findings[i].Set
		list := []Line{
			{Label: strconv.Itoa(place + 1), Text: l.ID + ": " + b.title(l.Quantity) + " " + senseWords[l.Sense] + " " + l.Bound.Text},
			{Text: l.Authority},
		}
		for _, pair := range limitWords(l, set) {
			if pair[1] != "" {
				list = append(list, Line{Text: pair[0] + ": " + pair[1]})
			}
		}
		blocks = append(blocks, Block{Lines: list})
	}
	return blocks
}

// limitWords lists what was entered with a limit, label and text; empty texts
// are left out by the caller.
func limitWords(l *limits.Limit, set *limits.Set) [][2]string {
	return [][2]string{
		{editionWord, l.Edition},
		{kindWord, string(l.Kind)},
		{appliesWord, l.AppliesWhen},
		{conditionWord, conditionText("total_mass_at_most", l.TotalMassAtMost)},
		{conditionWord, conditionText("free_fall_at_most", l.FreeFallAtMost)},
		{conditionWord, personsText(l.PersonsAtMost)},
		{groupWord, l.AnyOf},
		{checkWord, checkedText(l, set)},
		{supersededWord, l.SupersededOn},
		{setWord, setTitle(set)},
		{noteWord, l.Note},
	}
}

func conditionText(key string, band *quantity.Band) string {
	if band == nil {
		return ""
	}
	return conditionWords[key] + " " + band.Text
}

func personsText(n int) string {
	if n == 0 {
		return ""
	}
	return conditionWords["persons_at_most"] + " " + strconv.Itoa(n)
}

func checkedText(l *limits.Limit, set *limits.Set) string {
	switch {
	case l.CheckedOn != "":
		return l.CheckedOn
	case set != nil && set.CheckedOn != "":
		return set.CheckedOn
	}
	return notCheckedWord
}

func setTitle(set *limits.Set) string {
	switch {
	case set == nil || set.Name == "" && set.Title == "":
		return inlineSet
	case set.Title == "":
		return set.Name
	}
	return set.Title
}

// register lists every assumption the sheet rests on.
func (b *builder) register() []Line {
	var texts []string
	inputs := b.res().Inputs
	for _, i := range openInputs(inputs) {
		in := &inputs[i]
		texts = append(texts, b.say(openAssumption, in.Key, in.Band.Text, string(in.Open())))
	}
	if shape := b.assumedShape(); shape != "" {
		texts = append(texts, b.say(shapeAssumption, shape))
	}
	for i := range b.s.File.Job.Ratings {
		r := &b.s.File.Job.Ratings[i]
		texts = append(texts, b.say(ratedAssumption, r.Document))
		if r.Conditions != "" {
			texts = append(texts, b.say(wordsCondition, r.Document, r.Conditions))
		}
	}
	if b.plan() != nil {
		texts = append(texts, b.pathAssumption())
	}
	if in := b.s.File.Job.AllowanceInput(); in != nil {
		texts = append(texts, b.say(allowanceAssumption, in.Band.Text))
	}
	for i := range b.asd().Findings {
		if l := b.asd().Findings[i].Limit; l.AppliesWhen != "" {
			texts = append(texts, b.say(wordsOfLimit, l.ID, l.AppliesWhen))
		}
	}
	var list []Line
	for i, t := range append(texts, b.standing()...) {
		list = append(list, Line{Label: "A" + strconv.Itoa(i+1), Text: t + " " + needsConfirmation})
	}
	return list
}

// assumedShape returns the shape that figures of the sheet were made from.
func (b *builder) assumedShape() string {
	for i := range b.res().Estimates {
		if e := &b.res().Estimates[i]; e.Evidence == arrest.Shape && e.From != arrest.Inextensible {
			return e.From
		}
	}
	return ""
}

// references lists the methods that were used and where they come from.
func (b *builder) references() []Line {
	used := make(map[string]bool)
	for i := range b.res().Estimates {
		used[b.res().Estimates[i].Method] = true
	}
	for i := range b.res().Working {
		used[b.res().Working[i].Method] = true
	}
	used[measuringMethod] = !b.s.takesLonger() && b.anyBand()
	var list []Line
	for _, m := range everyMethod() {
		if used[m.ID] {
			list = append(list, Line{Label: m.ID, Text: m.Title + ". " + sourceWord + ": " + m.Source + "."})
		}
	}
	return list
}

// files names what was read, by content, and what read it.
func (b *builder) files() []Line {
	list := []Line{
		{Label: jobFileLabel, Text: b.s.File.Name},
		{Label: digestLabel, Text: b.s.File.SHA256},
	}
	for i := range b.s.File.Sets {
		set := &b.s.File.Sets[i]
		if set.SHA256 == "" {
			continue
		}
		text := set.Name
		for _, pair := range [][2]string{{"", set.Title}, {jurisdictionWord + " ", set.Jurisdiction}, {enteredByWord + " ", set.EnteredBy}, {"", set.EnteredOn}, {"", set.Note}} {
			if pair[1] != "" {
				text += ", " + pair[0] + pair[1]
			}
		}
		list = append(list, Line{Label: setFileLabel, Text: text}, Line{Label: digestLabel, Text: set.SHA256})
	}
	return append(list, Line{Label: toolLabel, Text: b.s.Tool}, Line{Label: modelLabel, Text: arrest.ModelVersion})
}
