package reportgen

import (
	"strconv"

	"arrestcheck/arrest"
	"arrestcheck/arrest/quantity"
	"arrestcheck/limits"
)

// Build makes the report of one sheet: page 1 in its fixed order (what it is
// and is not, the question, the counts, the worst row, the warnings, the
// limits, peaks before means, open inputs, status, names) and behind it all
// that page 1 rests on.
//
// It panics where a warning or a reason does not have the arguments that its
// sentence needs: a sheet with a hole in a sentence would be worse than none.
func Build(s *Sheet, units UnitChoice) Report {
	b := newBuilder(s, units)
	return Report{
		Head:     b.head(),
		Warnings: lines(b.d.statements(s)),
		Sections: append(b.pageOne(), b.behind()...),
	}
}

// A builder holds what the sections are made from.
type builder struct {
	s   *Sheet
	d   display
	sub subject
}

func newBuilder(s *Sheet, units UnitChoice) builder {
	return builder{s, newDisplay(units, s.Result.Inputs), s.subject()}
}

func (b *builder) res() *arrest.Result     { return b.s.Result }
func (b *builder) asd() *limits.Assessment { return b.s.Assessment }
func (b *builder) say(p phrase, args ...string) string {
	return b.d.say(p, args...)
}

// say fills a phrase whose arguments are all texts.
func (d display) say(p phrase, texts ...string) string {
	args := make([]arrest.Arg, len(texts))
	for i, t := range texts {
		args[i] = arrest.Text(t)
	}
	return p.fill(d, quantity.Unit{}, args)
}

// isExample reports whether anything on the sheet is an example.
func (s *Sheet) isExample() bool {
	example := s.Result.Example
	for i := range s.File.Sets {
		example = example || s.File.Sets[i].Example
	}
	for i := range s.Assessment.Findings {
		set := s.Assessment.Findings[i].Set
		example = example || set != nil && set.Example
	}
	return example
}

// openInputs returns the indexes of the inputs that are open.
func openInputs(inputs []arrest.Input) []int {
	var list []int
	for i := range inputs {
		if inputs[i].Open() != arrest.Settled {
			list = append(list, i)
		}
	}
	return list
}

func (b *builder) pageOne() []Section {
	sections := append(b.comparedSection(true),
		Section{limitsHeading, append(b.banner(), b.limitBlocks()...)},
		Section{peaksHeading, b.estimateBlocks(noPeak, isPeak)},
	)
	if blocks := b.estimateBlocks("", isMean); len(blocks) > 0 {
		sections = append(sections, Section{meansHeading, blocks})
	}
	sections = append(sections, b.vectorSections()...)
	sections = append(sections, Section{motionHeading[b.sub], b.estimateBlocks("", isMotion)})
	if blocks := b.estimateBlocks("", isLayout); len(blocks) > 0 {
		sections = append(sections, Section{layoutHeading, blocks})
	}
	return append(sections,
		Section{openHeading, []Block{b.openBlock()}},
		Section{statusHeading, []Block{{Lines: b.status()}}},
		Section{beforeHeading, []Block{{Text: stopMeasureAgain[b.sub], Loud: true}}},
		Section{namesHeading, b.nameBlocks()},
	)
}

// openBlock says how many inputs are open, and which, with why.
func (b *builder) openBlock() Block {
	open := openInputs(b.res().Inputs)
	if len(open) == 0 {
		return Block{Text: noOpenInputs}
	}
	block := Block{Text: b.say(openSentence, strconv.Itoa(len(open)), strconv.Itoa(len(b.res().Inputs)))}
	block.Table = &Table{Header: openHead, Widths: []int{44, 34}}
	for _, i := range open {
		in := &b.res().Inputs[i]
		block.Table.Rows = append(block.Table.Rows, Row{Cells: []string{flat(in.Key), openWords[string(in.Open())]}})
	}
	return block
}

// nameBlocks are the names in the file and the empty lines to sign on.
func (b *builder) nameBlocks() []Block {
	var named []Line
	doc := &b.s.File.Document
	for _, l := range []Line{{Label: preparedLabel, Text: doc.PreparedBy}, {Label: checkedLabel, Text: doc.CheckedBy}} {
		if l.Text != "" {
			l.Text = quote(l.Text) + " (" + namedInFile + ")"
			named = append(named, l)
		}
	}
	t := &Table{Header: signHead, Widths: []int{22, 22, 12, 18}}
	for _, role := range signRoles {
		t.Rows = append(t.Rows, Row{Cells: []string{role + "\n ", rule(22), rule(12), rule(18)}})
	}
	if len(named) == 0 {
		return append(b.banner(), Block{Table: t})
	}
	return append(b.banner(), Block{Lines: named}, Block{Table: t})
}

// banner is what stands across a sheet of examples, more than once.
func (b *builder) banner() []Block {
	if !b.s.isExample() {
		return nil
	}
	return []Block{{Text: exampleBanner, Loud: true}}
}

func rule(n int) string {
	line := make([]byte, n)
	for i := range line {
		line[i] = '_'
	}
	return string(line)
}
