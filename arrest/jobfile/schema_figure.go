package jobfile

import (
	"regexp"
	"strings"

	"arrestcheck/arrest/quantity"
)

// figure is a figure of a key: text with a unit, or a table of value, source
// and note where the table of keys lets it be one.
func (s *schema) figure(k *Key) keywords {
	if k.Dimension == 0 {
		return keywords{"type": "string"} // bounds says more
	}
	text := s.text(k)
	switch {
	case k.MustSource:
		return s.sourced(k, true)
	case k.Sourced:
		return keywords{"anyOf": []any{text, s.sourced(k, false)}}
	}
	return text
}

// longestFigure is how long a text is that quantity.Parse looks at, in bytes.
const longestFigure = 120

// text refers to the texts of a figure, which are kept once among the
// definitions for all keys that ask for the same.
func (s *schema) text(k *Key) keywords {
	name := defName(k)
	if _, known := s.defs[name]; !known {
		is := keywords{"type": "string", "maxLength": longestFigure, "pattern": pattern(k.Dimension, k.Spread, k.Sign),
			"description": k.Dimension.String() + signWords[k.Sign] + ", " + spreadWords[k.Spread] + ", in " + strings.Join(symbols(k.Dimension), ", ")}
		if k.Sign == Positive {
			is["not"] = keywords{"pattern": zeroPattern(k.Dimension)}
		}
		s.defs[name] = is
	}
	return keywords{"$ref": "#/$defs/" + name}
}

var spreadWords = map[Spread]string{
	AnySpread:  "one figure, ± or a range",
	NoSpread:   "one figure",
	NoWidth:    "one figure, also with ± 0",
	MustSpread: "± or a range",
}

var signWords = map[Sign]string{Positive: " above zero", AnySign: " of either sign"}

// defName returns the name of a definition, "mass-above-zero".
func defName(k *Key) string {
	name := strings.ReplaceAll(k.Dimension.String(), " ", "-")
	name += map[Spread]string{NoSpread: "-one", NoWidth: "-sharp", MustSpread: "-spread"}[k.Spread]
	return name + map[Sign]string{Positive: "-above-zero", AnySign: "-signed"}[k.Sign]
}

// sourced refers to the table in which such a figure stands with its source.
func (s *schema) sourced(k *Key, source bool) keywords {
	name := defName(k) + "-entry"
	if source {
		name = defName(k) + "-sourced"
	}
	if _, known := s.defs[name]; !known {
		is := keywords{}
		s.section(is, s.groups[Entry], nil)
		value := is["properties"].(keywords)["value"].(keywords)
		for word, says := range s.text(k) {
			value[word] = says
		}
		for _, word := range []string{"type", "pattern", "examples"} {
			delete(value, word) // the definition has its own
		}
		if source {
			is["required"] = append(is["required"].([]string), "source")
		}
		s.defs[name] = is
	}
	return keywords{"$ref": "#/$defs/" + name}
}

// velocity is one figure, the list of its components, or a speed with its
// direction.
func (s *schema) velocity(k *Key) keywords {
	one, polar := s.figure(k), keywords{}
	s.section(polar, s.groups[Polar], nil)
	return keywords{"anyOf": []any{one, arrayOf(one, 1, 3), polar}}
}

// points is a list of pairs of texts, extension and force.
func (s *schema) points() keywords {
	pair := []any{s.text(coordinates[quantity.Length]), s.text(coordinates[quantity.Force])}
	return arrayOf(keywords{"type": "array", "minItems": len(pair), "prefixItems": pair, "items": false}, 2, mostPoints)
}

// symbols returns the units in which a figure of d is typed.
func symbols(d quantity.Dimension) []string {
	var all []string
	for _, u := range quantity.Units() {
		if u.Dimension == d {
			all = append(all, u.Symbol)
		}
	}
	return all
}

// unit matches the units of d.
func unit(d quantity.Dimension) string {
	all := symbols(d)
	for i := range all {
		all[i] = regexp.QuoteMeta(all[i])
	}
	return "(?:" + strings.Join(all, "|") + ")"
}

// What the patterns are made of. They keep to what regular expressions of all
// editors have in common: no look-ahead, no classes by name.
const (
	number   = `[0-9]+(?:\.[0-9]+)?`
	zero     = `0+(?:\.0+)?`
	fraction = `(?:[0-9]+ +)?[0-9]+/[0-9]+` // of feet and inches only
)

// body matches a figure of d without a sign, as quantity.Parse reads it.
func body(d quantity.Dimension) string {
	plain := number + ` *` + unit(d)
	if d == quantity.Length {
		return `(?:` + plain + `|` + fraction + ` *(?:ft|in)|[0-9]+ *ft +(?:` + number + `|` + fraction + `) *in)`
	}
	return plain
}

// pattern matches the texts of a figure. It is made of the units, and follows
// the forms that quantity.Parse documents.
func pattern(d quantity.Dimension, spread Spread, sign Sign) string {
	signed := func(text, none string) string {
		if sign == AnySign {
			return `[-+]? *` + text
		}
		return `(?:\+? *` + text + `|- *` + none + `)` // nothing is below zero in minus zero
	}
	figure := signed(body(d), zero+` *`+unit(d))
	bare := signed(`(?:`+number+`|`+fraction+`)`, zero)
	off := `(?:` + body(d) + `|` + number + ` *%|` + zero + `)`
	if spread == NoWidth || d == quantity.Ratio {
		off = zero + `(?: *(?:` + unit(d) + `|%))?`
	}
	within, between := figure+` *(?:±|\+/-) *`+off, `(?:`+figure+`|`+bare+`) *\.\. *`+figure
	switch spread {
	case NoSpread:
		return `^ *` + figure + ` *$`
	case MustSpread:
		return `^ *(?:` + within + `|` + between + `) *$`
	}
	return `^ *(?:` + figure + `|` + within + `|` + between + `) *$`
}

// zeroPattern matches the texts whose first figure is zero.
func zeroPattern(d quantity.Dimension) string {
	return `^ *[-+]? *` + zero + ` *` + unit(d) + `? *(?:$|\.\.|±|\+/-)`
}
