package jobfile

import (
	"errors"
	"math"
	"slices"
	"strconv"
	"strings"

	"arrestcheck/arrest"
	"arrestcheck/arrest/quantity"
)

// An entry is a figure of a job with where it came from. given is false where
// the key is not written or its figure is refused.
type entry struct {
	key   *Key
	band  quantity.Band
	src   arrest.Source
	note  string
	given bool
	set   bool // by an Override: it has no source, whatever stands around it
}

// A spot is where a figure is typed: its dotted key, and the name left of the
// =, empty in a list.
type spot struct{ key, name string }

// write is the next action that puts figures in the spot.
func (at spot) write(figures ...string) string {
	left, end := at.name+" = ", ""
	if at.name == "" {
		left, end = "", " in its place"
	}
	for i, f := range figures {
		figures[i] = left + strconv.Quote(f)
	}
	return "write: " + strings.Join(figures, " or ") + end
}

// hint is the next action with the example of the key.
func (at spot) hint(k *Key) string {
	if at.name != "" && at.name == k.Name || !strings.HasPrefix(k.Example, `"`) {
		return k.hint()
	}
	return at.write(strings.Trim(k.Example, `"`))
}

// quantity returns the figure of a key.
func (t *table) quantity(name string) entry { return t.figure(name, t.group.named[name].Dimension) }

// figure returns the figure of a key whose dimension another key decides.
func (t *table) figure(name string, d quantity.Dimension) entry {
	v, k, ok := t.take(name)
	if !ok {
		return entry{}
	}
	return t.page.figure(spot{t.key(name), name}, k, d, v)
}

// figure reads a figure, text or a table of value, source and note.
func (pg *page) figure(at spot, k *Key, d quantity.Dimension, v any) entry {
	e := entry{key: k, set: pg.isSet(at.key)}
	switch v := v.(type) {
	case string:
		if k.MustSource && !e.set {
			pg.fault(at.key, at.key, v, "the figure stands with its source: how it is known", k.hint())
			return e
		}
		e.band, e.given = pg.parse(at, k, d, v)
	case map[string]any:
		if !k.Sourced {
			pg.fault(at.key, at.key, "", "this figure stands as text alone, without a table around it", at.hint(k))
			return e
		}
		pg.sourced(&e, at, d, v)
	case int64, float64:
		pg.bareNumber(at, k, d, v)
	default:
		pg.wrongKind(at, k, v)
	}
	return e
}

// bareNumber records a figure without quotes and unit.
func (pg *page) bareNumber(at spot, k *Key, d quantity.Dimension, v any) {
	text, _ := pg.written(at.key, v)
	if x, isFloat := v.(float64); isFloat && (math.IsNaN(x) || math.IsInf(x, 0)) {
		pg.fault(at.key, at.key, text, "not a number; a figure that is not known is left out", at.hint(k))
		return
	}
	var right []string
	for _, unit := range unitsOf(d) {
		right = append(right, text+" "+unit)
	}
	pg.fault(at.key, at.key, text, "a bare number has no unit", at.write(right...))
}

// sourced reads { value, source, note }.
func (pg *page) sourced(e *entry, at spot, d quantity.Dimension, keys map[string]any) {
	in := pg.open(Entry, at.key, keys)
	e.src = arrest.Source(in.choice("source"))
	e.note = in.text("note")
	if e.key.MustSource && !in.has("source") {
		pg.fault(at.key, in.key("source"), "", "the key is missing: how the figure is known", in.group.named["source"].hint())
	}
	const value = "value"
	k, inside := in.group.named[value], spot{in.key(value), value}
	switch v := in.keys[value].(type) {
	case nil:
		if !slices.Contains(in.meant, value) {
			pg.fault(at.key, inside.key, "", "the key is missing: "+k.Help, inside.write(e.key.example(d)))
		}
	case string:
		e.band, e.given = pg.parse(inside, e.key, d, v)
	case int64, float64:
		pg.bareNumber(inside, k, d, v)
	default:
		pg.wrongKind(inside, k, v)
	}
}

// parse reads a figure by the rules of key k.
func (pg *page) parse(at spot, k *Key, d quantity.Dimension, text string) (quantity.Band, bool) {
	b, err := quantity.Parse(d, text)
	if err != nil {
		var qe *quantity.Error
		if !errors.As(err, &qe) {
			qe = &quantity.Error{Text: text, Reason: err.Error(), Example: d.Example()}
		}
		pg.fault(at.key, at.key, qe.Text, qe.Reason, at.right(k, qe))
		return b, false
	}
	if reason := k.refuses(b); reason != "" {
		hint := at.write(k.example(d))
		switch {
		case k.Spread == MustSpread && b.Tolerance == quantity.Untold:
			hint = "write: the range on the label, such as " + k.line() + "; copy it from the document, do not guess"
		case strings.HasPrefix(reason, oneFigure):
			hint = at.write(single(d, b)...)
		}
		pg.fault(at.key, at.key, text, reason, hint)
		return b, false
	}
	return b, true
}

// right is the next action for a figure that is not read. Where the text can be
// meant in two ways, it holds both; a tolerance that nobody has measured is left
// to be measured.
func (at spot) right(k *Key, qe *quantity.Error) string {
	if !qe.Rough || k.Spread == NoSpread || k.Spread == NoWidth || k.Dimension == quantity.Ratio {
		return at.write(strings.Split(qe.Example, " or ")...)
	}
	return "measure: it, and " + at.write(qe.Example+" ± ...") + " with your own measured tolerance in place of the dots" +
		or + at.write(qe.Example) + ", which leaves the input open"
}

// single returns what a figure with a range or a ± can be meant as where one
// figure is asked for, in the unit in which it is typed.
func single(d quantity.Dimension, b quantity.Band) []string {
	middle, _, isRange := strings.Cut(b.Text, "..")
	if !isRange {
		middle, _, _ = strings.Cut(strings.ReplaceAll(b.Text, "+/-", "±"), "±")
		return []string{strings.TrimSpace(middle)}
	}
	low, high := strings.TrimSpace(middle), strings.TrimSpace(b.Text[len(middle)+len(".."):])
	if _, err := quantity.Parse(d, low); err != nil {
		low += " " + b.Unit.Symbol
	}
	return []string{low, high}
}

// oneFigure begins the reason of a figure that is not single.
const oneFigure = "one figure is asked for"

// example is a figure of the key as it is typed, without quotes.
func (k *Key) example(d quantity.Dimension) string {
	if k.Dimension != 0 && strings.HasPrefix(k.Example, `"`) {
		return strings.Trim(k.Example, `"`)
	}
	return d.Example()
}

// refuses says why a figure cannot stand at the key; empty where it can.
func (k *Key) refuses(b quantity.Band) string {
	u := b.Unit
	switch {
	case k.Spread == NoSpread && b.Tolerance != quantity.Untold, k.Spread == NoWidth && b.Low != b.High:
		return oneFigure + ", without a range or a ±"
	case k.Spread == MustSpread && b.Tolerance == quantity.Untold:
		return "a rating without a mass range: a single figure does not say from which mass to which; a range or a ± is asked for"
	case k.Sign == Positive && b.Low <= 0 && b.High <= 0:
		return "it has to be above zero"
	case k.Sign == Positive && b.Low <= 0:
		return "its low end, " + quantity.Format(b.Low, u, 3, quantity.Nearest) + ", has to be above zero"
	case k.Sign == NotNegative && b.High < 0:
		return "it cannot be below zero"
	case k.Sign == NotNegative && b.Low < 0:
		return "its low end, " + quantity.Format(b.Low, u, 3, quantity.Nearest) + ", cannot be below zero"
	case !k.Possible.none() && !k.Possible.holds(b.Low, b.High):
		return "not plausible: it lies outside " + quantity.Format(k.Possible.Low, u, 3, quantity.Nearest) +
			" to " + quantity.Format(k.Possible.High, u, 3, quantity.Nearest)
	}
	return ""
}

// unitsOf returns the first unit of a dimension that is not US customary, and
// the first that is.
func unitsOf(d quantity.Dimension) []string {
	si, customary := "", ""
	for _, u := range quantity.Units() {
		switch {
		case u.Dimension != d:
		case si == "" && u.System != quantity.Customary:
			si = u.Symbol
		case customary == "" && u.System == quantity.Customary:
			customary = u.Symbol
		}
	}
	if customary == "" {
		return []string{si}
	}
	return []string{si, customary}
}
