package jobfile

import (
	"errors"
	"math"
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
}

// quantity returns the figure of a key.
func (t *table) quantity(name string) entry { return t.figure(name, t.group.named[name].Dimension) }

// figure returns the figure of a key whose dimension another key decides.
func (t *table) figure(name string, d quantity.Dimension) entry {
	v, k, ok := t.take(name)
	if !ok {
		return entry{}
	}
	e := entry{key: k}
	switch v := v.(type) {
	case string:
		e.band, e.given = t.parse(k, d, k.Name, v)
	case map[string]any:
		if !k.Sourced {
			t.fault(name, "", "this figure stands as text alone, without a table around it", k.hint())
			return e
		}
		t.sourced(&e, d, v)
	case int64, float64:
		t.bareNumber(k, d, v)
	default:
		t.wrongKind(k, v)
	}
	return e
}

// bareNumber records a figure without quotes and unit.
func (t *table) bareNumber(k *Key, d quantity.Dimension, v any) {
	text, _ := t.written(k.Name, v)
	if x, isFloat := v.(float64); isFloat && (math.IsNaN(x) || math.IsInf(x, 0)) {
		t.fault(k.Name, text, "not a number; a figure that is not known is left out", k.hint())
		return
	}
	var right []string
	for _, unit := range unitsOf(d) {
		right = append(right, k.Name+` = "`+text+" "+unit+`"`)
	}
	t.fault(k.Name, text, "a bare number has no unit", "write: "+strings.Join(right, " or "))
}

// sourced reads { value, source, note }.
func (t *table) sourced(e *entry, d quantity.Dimension, keys map[string]any) {
	in := t.page.open(Entry, t.key(e.key.Name), keys)
	e.src = arrest.Source(in.choice("source"))
	e.note = in.text("note")
	v, k, ok := in.take("value")
	if !ok {
		return
	}
	switch v := v.(type) {
	case string:
		e.band, e.given = in.parse(e.key, d, k.Name, v)
	case int64, float64:
		in.bareNumber(k, d, v)
	default:
		in.wrongKind(k, v)
	}
}

// parse reads a figure by the rules of key k; name is the key it is typed at.
func (t *table) parse(k *Key, d quantity.Dimension, name, text string) (quantity.Band, bool) {
	b, err := quantity.Parse(d, text)
	if err != nil {
		var qe *quantity.Error
		if !errors.As(err, &qe) {
			qe = &quantity.Error{Text: text, Reason: err.Error(), Example: d.Example()}
		}
		// Where the text can be meant in two ways, the example holds both.
		right := strings.ReplaceAll(qe.Example, " or ", `" or `+name+` = "`)
		t.fault(name, qe.Text, qe.Reason, "write: "+name+` = "`+right+`"`)
		return b, false
	}
	if reason := k.refuses(b); reason != "" {
		hint := "write: " + name + " = " + k.Example
		if k.Dimension == 0 {
			hint = "write: " + name + ` = "` + d.Example() + `"`
		}
		t.fault(name, text, reason, hint)
		return b, false
	}
	return b, true
}

// refuses says why a figure cannot stand at the key; empty where it can.
func (k *Key) refuses(b quantity.Band) string {
	u := b.Unit
	switch {
	case k.Spread == NoSpread && b.Tolerance != quantity.Untold:
		return "one figure is asked for, without a range or a ±"
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
