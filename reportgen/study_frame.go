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

// studyHead is what stands above a study: what it is not, of which job, and
// what was asked.
func (b *builder) studyHead(asked ...Line) []Block {
	list := []Line{
		{Label: jobLabel, Text: orNothing(b.s.File.Document.Title)},
		{Label: jobFileLabel, Text: b.s.File.Name},
		{Label: digestLabel, Text: b.s.File.SHA256},
	}
	list = append(append(list, asked...), b.overrides()...)
	return append(append([]Block{{Text: notAPermission, Loud: true}}, b.banner()...), Block{Lines: list})
}

// studyWarnings are the statements of a study: its own, and those that the
// figures it shows call for.
func (b *builder) studyWarnings(shown []arrest.Estimate, own ...said) []Line {
	all := append([]said{b.told(studyOnly)}, own...)
	if b.s.isExample() {
		all = append(all, b.told(ofWarnings[arrest.ExampleValues]))
	}
	if changed := b.s.File.Overrides; len(changed) > 0 {
		keys := make([]string, len(changed))
		for i := range changed {
			keys[i] = changed[i].Key
		}
		all = append(all, b.told(setOutside, arrest.Text(strings.Join(keys, ", "))))
	}
	has := survey(shown)
	if has.floor {
		all = append(all, b.told(floorsNotPeaks))
	}
	if has.mean {
		all = append(all, b.told(meansAreNotPeaks))
	}
	if has.promised {
		all = append(all, b.told(notThisStop))
	}
	all = append(all, b.told(whoDecides))
	slices.SortStableFunc(all, func(a, b said) int { return int(b.weight) - int(a.weight) })
	return lines(all)
}

// told fills a statement in the words of this subject.
func (b *builder) told(st statement, args ...arrest.Arg) said {
	st = b.sub.about(st)
	return said{st.number, st.fill(b.d, quantity.Unit{}, args), st.weight}
}

// columnTitle names what a column of a study shows, without its bound.
func (b *builder) columnTitle(c *study.Column) string {
	text := b.title(c.Quantity)
	switch c.Evidence {
	case arrest.Shape:
		text += ", " + b.d.assumed(c.From)
	case arrest.Rated:
		text += ", " + b.say(byDocument, c.From)
	case arrest.Modelled:
		text += ", " + modelRemark
	case arrest.Measured:
		text += ", " + recordRemark
	}
	if c.Nth > 0 {
		text += " (" + strconv.Itoa(c.Nth+1) + ")"
	}
	return text
}

// limitTitle names a limit with its figure as typed, or as also printed.
func (b *builder) limitTitle(l *limits.Limit, printed bool) string {
	figure := l.Bound.Text
	if printed {
		figure = l.AlsoPrinted.Text
	}
	return b.say(limitNamed, l.ID, senseWords[l.Sense], figure)
}

// inputOf returns the input with a key; a study has looked it up before.
func inputOf(j *arrest.Job, key string) *arrest.Input {
	for i := range j.Inputs {
		if j.Inputs[i].Key == key {
			return &j.Inputs[i]
		}
	}
	panic("reportgen: no input " + strconv.Quote(key))
}

// asPrinted returns the figure that a person would type from its print.
func asPrinted(si float64, u quantity.Unit, digits int, r quantity.Rounding) float64 {
	if u.Symbol == "1" {
		u, _ = quantity.LookUp("%")
	}
	b, err := quantity.Parse(u.Dimension, quantity.Format(si, u, digits, r))
	if err != nil {
		return si // beyond what a file can hold
	}
	return b.Value
}

// A checked is what a check of the job with some figures typed in comes to.
type checked struct {
	builder
	can bool // the entries can happen
}

// checkWith makes that check.
func (b *builder) checkWith(moves ...study.Move) checked {
	res, a, can, err := study.Check(&b.s.File.Job, b.s.File.Sets, moves...)
	if err != nil {
		panic("reportgen: " + err.Error()) // the study has typed the same in
	}
	if !can {
		return checked{}
	}
	s := *b.s
	s.Result, s.Assessment = &res, &a
	return checked{builder{&s, b.d, b.sub}, true}
}

// row returns what a limit comes to.
func (c *checked) row(l *limits.Limit) *limits.Finding {
	for i := range c.s.Assessment.Findings {
		if f := &c.s.Assessment.Findings[i]; f.Limit == l {
			return f
		}
	}
	return nil
}

// outcomeOf says what the check comes to in the row of a limit.
func (c *checked) outcomeOf(l *limits.Limit) string {
	if !c.can {
		return cannotHappen
	}
	return c.outcome(c.row(l))
}

// workingWith is the working of the job with some figures typed in.
func (b *builder) workingWith(moves ...study.Move) []Block {
	res, can, err := study.Working(&b.s.File.Job, moves...)
	if err != nil {
		panic("reportgen: " + err.Error())
	}
	if !can {
		return []Block{{Text: cannotHappen}}
	}
	s := *b.s
	s.Result = &res
	at := builder{&s, b.d, b.sub}
	return at.workingBlocks()
}

// greatestOf returns the greatest magnitude of finite figures, 0 where there
// are none.
func greatestOf(lists ...[]float64) float64 {
	most := 0.0
	for _, list := range lists {
		for _, x := range list {
			if isNumber(x) {
				most = max(most, math.Abs(x))
			}
		}
	}
	return most
}

// cautionsOf are warnings as data.
func cautionsOf(warnings []Line) []jsonCaution {
	return each(warnings, func(l *Line) jsonCaution {
		return jsonCaution{strings.TrimLeft(l.Label, "! "), breakable(l.Text)}
	})
}

// textArgs makes arguments of texts.
func textArgs(list ...string) []arrest.Arg {
	args := make([]arrest.Arg, len(list))
	for i, t := range list {
		args[i] = arrest.Text(t)
	}
	return args
}
