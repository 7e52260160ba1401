package jobfile

import (
	"fmt"
	"strconv"

	"arrestcheck/arrest"
	"arrestcheck/arrest/quantity"
	"arrestcheck/limits"
)

// limitSet reads a limit file.
func (pg *page) limitSet() limits.Set {
	set := limits.Set{Name: pg.name, SHA256: digest(pg.data)}
	t := pg.begin(limitsFormat, jobFormat)
	if t == nil {
		return set
	}
	set.Title = t.text("title")
	set.Jurisdiction = t.text("jurisdiction")
	set.EnteredBy = t.text("entered_by")
	set.EnteredOn = t.text("entered_on")
	set.CheckedOn = t.text("checked_on")
	set.Note = t.text("note")
	set.Example = t.boolean("example")
	set.Limits = t.limits(set.CheckedOn)
	if !t.has("limit") {
		k := t.group.named["limit"]
		pg.fault("", "[[limit]]", "", "no limit stands in the file", pg.groups.sectionHint(k))
	}
	return set
}

// limits reads the [[limit]] sections of a file. checkedOn stands in where a
// limit has no date of its own.
func (t *table) limits(checkedOn string) []limits.Limit {
	sections := t.sections("limit")
	if len(sections) == 0 {
		return nil
	}
	all := make([]limits.Limit, len(sections))
	for i, s := range sections {
		all[i] = s.limit()
		if all[i].CheckedOn == "" {
			all[i].CheckedOn = checkedOn
		}
	}
	return all
}

// limit reads one [[limit]].
func (t *table) limit() limits.Limit {
	l := limits.Limit{
		ID:              t.text("id"),
		Quantity:        arrest.Quantity(t.limited()),
		Authority:       t.text("authority"),
		Edition:         t.text("edition"),
		Kind:            limits.Kind(t.choice("kind")),
		AppliesWhen:     t.text("applies_when"),
		AnyOf:           t.text("any_of"),
		SupersededOn:    t.text("superseded_on"),
		CheckedOn:       t.text("checked_on"),
		Note:            t.text("note"),
		TotalMassAtMost: t.pointer("total_mass_at_most"),
		FreeFallAtMost:  t.pointer("free_fall_at_most"),
		PersonsAtMost:   t.integer("persons_at_most"),
	}
	if l.ID != "" {
		t.page.ids = append(t.page.ids, id{l.ID, t.key("id")})
	}
	if l.Quantity != "" {
		t.bound(&l)
	}
	return l
}

func (t *table) pointer(name string) *quantity.Band {
	if e := t.quantity(name); e.given {
		return &e.band
	}
	return nil
}

// limited returns the quantity of a limit. Quantities that are computed but
// cannot be limited are refused with that reason.
func (t *table) limited() string {
	const name = "quantity"
	word, _ := t.keys[name].(string)
	if r, known := arrest.Quantity(word).Record(); known {
		if _, can := limits.SenseOf(r.ID); !can {
			k := t.group.named[name]
			t.fault(name, word, r.Title+" is worked out for information; no limit can be set on it",
				"write: one of "+listed(k.Choices))
			return ""
		}
	}
	return t.choice(name)
}

// bound reads the figure of a limit, on the side that its quantity asks for.
func (t *table) bound(l *limits.Limit) {
	r, _ := l.Quantity.Record()
	l.Sense, _ = limits.SenseOf(l.Quantity)
	right, wrong := string(limits.AtMost), string(limits.AtLeast)
	side := "above"
	if l.Sense == limits.AtLeast {
		right, wrong, side = wrong, right, "below"
	}
	line := "write: " + right + " = " + strconv.Quote(r.Dimension.Example())
	if t.has(wrong) {
		text, _ := t.keys[wrong].(string)
		switch {
		case t.has(right):
			line = "take out: " + wrong
		case text != "":
			line = "write: " + right + " = " + strconv.Quote(short(text))
		}
		t.fault(wrong, text, fmt.Sprintf("a limit on %s (%s) is exceeded %s it, so it is written as %s", l.Quantity, r.Title, side, right), line)
	}
	if !t.has(right) && !t.has(wrong) {
		t.page.fault(t.path, t.key(right), "", "the key is missing: a limit on "+string(l.Quantity)+" has it", line)
	}
	main, printed := t.figure(right, r.Dimension), t.figure("also_printed", r.Dimension)
	l.Bound = main.band
	if printed.given {
		l.AlsoPrinted = &printed.band
	}
	if main.given && printed.given {
		t.pair(right, main.band, printed.band)
	}
}

// apart is how far the two printed figures of one limit may lie apart, as a
// part of the larger: rounding to two digits moves a figure by less.
const apart = 0.02

// pair refuses two printed figures that cannot be one limit.
func (t *table) pair(name string, a, b quantity.Band) {
	larger := max(a.Value, b.Value)
	if larger-min(a.Value, b.Value) <= apart*larger {
		return
	}
	t.fault("also_printed", b.Text, fmt.Sprintf("%s is %s, and %s says %q: more than 2 %% apart, so these are two limits",
		b.Text, quantity.Format(b.Value, a.Unit, 5, quantity.Nearest), t.key(name), a.Text),
		"write: both figures as the document prints them, or two [[limit]] sections")
}

// An id is the name of a limit with the key at which it is written.
type id struct{ name, key string }

// twice refuses limits of one name, whatever file they stand in.
func twice(pages []*page) {
	type place struct {
		page *page
		key  string
	}
	n := 0
	for _, pg := range pages {
		n += len(pg.ids)
	}
	if n < 2 {
		return
	}
	first := make(map[string]place, n)
	for _, pg := range pages {
		for _, is := range pg.ids {
			before, known := first[is.name]
			if !known {
				first[is.name] = place{pg, is.key}
				continue
			}
			pg.fault(is.key, is.key, is.name, fmt.Sprintf("%s in %s, line %d, has this name already",
				parent(before.key), shownName(before.page.name), before.page.line(before.key)),
				"write: id = "+strconv.Quote(is.name+"-2"))
		}
	}
}
