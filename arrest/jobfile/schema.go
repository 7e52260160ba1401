package jobfile

import (
	"bytes"
	"encoding/json"
	"fmt"
	"slices"
	"strings"

	"github.com/BurntSushi/toml"

	"arrestcheck/arrest"
	"arrestcheck/arrest/quantity"
	"arrestcheck/limits"
)

// Schemas returns the kinds of files that have a schema here, in print order.
func Schemas() []string { return []string{"job", "limits"} }

// Schema returns the JSON Schema (draft 2020-12) of a kind of file, one of
// Schemas, as indented JSON with a line end. Editors complete and check TOML
// with it; it comes from the table of Keys alone, and its bytes are always the
// same.
//
// It refuses no file that Read or ReadLimits takes. The reverse does not hold:
// a schema looks at one text at a time and at which keys stand together. It
// cannot compare figures (a range that runs backwards, a figure that is not
// plausible, two names that are equal), sees no other file, and in most editors
// no difference between a date and a text. Read has the last word.
//
// The error is about the kind.
func Schema(kind string) ([]byte, error) {
	s := schema{defs: keywords{}}
	var root keywords
	switch kind {
	case "job":
		s.groups, root = jobGroups(), keywords{"title": "job file, " + jobFormat}
	case "limits":
		s.groups, root = limitGroups(), keywords{"title": "limit file, " + limitsFormat}
	default:
		return nil, unknownKind("schema", kind, Schemas())
	}
	root["$schema"] = "https://json-schema.org/draft/2020-12/schema"
	s.section(root, s.groups[""], nil)
	if kind == "limits" {
		// The table lets a job do without; the file is nothing else.
		root["required"] = append(root["required"].([]string), "limit")
	}
	root["$defs"] = s.defs
	return marshalled(root), nil
}

func unknownKind(what, kind string, kinds []string) error {
	return fmt.Errorf("no %s %s; there are: %s", what, quote(kind), strings.Join(kinds, ", "))
}

// keywords is one schema, or the part of one that names other schemas.
// Marshalling sorts the names, so that equal schemas have equal bytes.
type keywords map[string]any

func marshalled(root keywords) []byte {
	var b bytes.Buffer
	e := json.NewEncoder(&b)
	e.SetEscapeHTML(false)
	e.SetIndent("", "  ")
	if err := e.Encode(root); err != nil {
		panic("jobfile: schema: " + err.Error()) // maps, lists and texts
	}
	return b.Bytes()
}

// A schema is one file's schema while it is made.
type schema struct {
	groups groups
	defs   keywords
}

// section puts the keys of a section into k. heading is the record of the
// section, nil at the top and in inline tables.
func (s *schema) section(k keywords, g *group, heading *Key) {
	properties, required := keywords{}, []string{}
	for _, key := range g.keys {
		properties[key.Name] = s.described(key)
		if key.Required {
			required = append(required, key.Name)
		}
	}
	k["type"], k["additionalProperties"] = "object", false
	k["properties"], k["required"] = properties, required
	if rules := s.rules(g, heading); len(rules) > 0 {
		k["allOf"] = rules
	}
}

// described returns the schema of a key with what an editor shows beside it.
func (s *schema) described(k *Key) keywords {
	is := s.key(k)
	is["description"] = k.Help
	if k.Example != "" {
		is["examples"] = []any{exampleValue(k)}
	}
	return is
}

// exampleValue returns the example of a key as JSON has it.
func exampleValue(k *Key) any {
	var line struct{ X any }
	if _, err := toml.Decode("x = "+k.Example, &line); err != nil {
		panic("jobfile: example of " + k.Path() + ": " + err.Error())
	}
	return line.X
}

// key returns the schema of the value of a key.
func (s *schema) key(k *Key) keywords {
	switch k.Kind {
	case Section:
		one := keywords{}
		s.section(one, s.groups[k.Name], k)
		if !k.Several {
			return one
		}
		return keywords{"anyOf": []any{one, arrayOf(one, 1, 0)}}
	case Sections:
		one := keywords{}
		s.section(one, s.groups[k.Name], k)
		return arrayOf(one, 1, 0)
	case Files:
		return s.files(k)
	case Quantity:
		return s.figure(k)
	case Velocity:
		return s.velocity(k)
	case Points:
		return s.points()
	case Choice:
		return choiceOf(k)
	case Words:
		list := arrayOf(choiceOf(k), 1, 0)
		list["uniqueItems"] = true
		return list
	case Integer:
		return keywords{"type": "integer", "minimum": k.Possible.Low, "maximum": k.Possible.High}
	case Boolean:
		return keywords{"type": "boolean"}
	}
	return textOf(k)
}

// arrayOf is a list with at least and at most so many of one kind; 0 stands for
// no end.
func arrayOf(one keywords, least, most int) keywords {
	k := keywords{"type": "array", "items": one, "minItems": least}
	if most > 0 {
		k["maxItems"] = most
	}
	return k
}

func choiceOf(k *Key) keywords {
	if len(k.Choices) == 1 {
		return keywords{"const": k.Choices[0]}
	}
	return keywords{"enum": k.Choices}
}

// textOf is text with something in it, in a date a year.
func textOf(k *Key) keywords {
	if k.Dated {
		return keywords{"type": "string", "pattern": yearPattern}
	}
	return keywords{"type": "string", "pattern": `\S`}
}

// files is the list of limit files, each a name or a table.
func (s *schema) files(k *Key) keywords {
	g := s.groups[k.Name]
	one := keywords{}
	s.section(one, g, nil)
	properties := one["properties"].(keywords)
	name := properties["file"].(keywords)
	// A path below the folder of the job: no part is empty, "." or "..".
	const part = `(?:[^/\\.][^/\\]*|\.[^/\\.][^/\\]*|\.\.[^/\\]+)`
	name["pattern"] = `^` + part + `(?:/` + part + `)*$`
	name["not"] = keywords{"pattern": `^.:`}
	properties["sha256"].(keywords)["pattern"] = `^[0-9A-Fa-f]{64}$`
	bare := keywords{"type": "string", "pattern": name["pattern"], "not": name["not"]}
	return keywords{"type": "array", "uniqueItems": true, "items": keywords{"anyOf": []any{bare, one}}}
}

// rules says which keys of a section stand together.
func (s *schema) rules(g *group, heading *Key) []any {
	var rules []any
	if heading != nil && len(heading.AnyOf) > 0 {
		rules = append(rules, keywords{"anyOf": each(heading.AnyOf)})
	}
	var seen [][]string
	for _, k := range g.keys {
		same := func(names []string) bool { return slices.Equal(names, k.Either) }
		if len(k.Either) > 0 && !slices.ContainsFunc(seen, same) {
			seen = append(seen, k.Either)
			rules = append(rules, keywords{"oneOf": either(k)})
		}
		if others := slices.DeleteFunc(slices.Clone(k.With), func(name string) bool { return name == k.Name }); len(others) > 0 {
			rules = append(rules, keywords{"dependentRequired": keywords{k.Name: others}})
		}
		if len(k.Not) > 0 {
			rules = append(rules, keywords{"dependentSchemas": keywords{k.Name: keywords{"properties": none(k.Not)}}})
		}
		rules = append(rules, beside(k)...)
		rules = append(rules, variants(k)...)
	}
	return append(rules, s.bounds(g)...)
}

// each asks for one of the names, for anyOf and oneOf.
func each(names []string) []any {
	list := make([]any, len(names))
	for i, name := range names {
		list[i] = keywords{"required": []string{name}}
	}
	return list
}

// either asks for one of the keys, and for none where another is in their place.
func either(k *Key) []any {
	list := each(k.Either)
	if k.Unless != "" {
		list = append(list, keywords{"required": []string{k.Unless}, "properties": none(k.Either)})
	}
	return list
}

// none forbids the names.
func none(names []string) keywords {
	k := keywords{}
	for _, name := range names {
		k[name] = false
	}
	return k
}

// when applies then where a key holds one of the words.
func when(name string, words []string, then keywords) keywords {
	return keywords{
		"if":   keywords{"properties": keywords{name: keywords{"enum": words}}, "required": []string{name}},
		"then": then,
	}
}

// beside asks for the companion of a key.
func beside(k *Key) []any {
	c := k.Beside
	switch {
	case c.Name == "":
		return nil
	case c.Choice == "":
		return []any{keywords{"dependentRequired": keywords{k.Name: []string{c.Name}}}}
	}
	return []any{
		keywords{"dependentSchemas": keywords{k.Name: keywords{
			"properties": keywords{c.Name: keywords{"const": c.Choice}}, "required": []string{c.Name},
		}}},
		when(c.Name, []string{c.Choice}, keywords{"required": []string{k.Name}}),
	}
}

// variants says what stands beside each word of a choice.
func variants(k *Key) []any {
	var all []string // the keys that some word decides over
	for i := range k.Variants {
		all = append(all, k.Variants[i].names()...)
	}
	var rules []any
	for i := range k.Variants {
		v := &k.Variants[i]
		var exactly []any
		for _, names := range v.Needs {
			exactly = append(exactly, keywords{"oneOf": each(names)})
		}
		then := keywords{"properties": none(slices.DeleteFunc(slices.Clone(all), func(name string) bool {
			return slices.Contains(v.names(), name)
		}))}
		if len(exactly) > 0 {
			then["allOf"] = exactly
		}
		rules = append(rules, when(k.Name, []string{v.Word}, then))
	}
	return rules
}

// names returns every key that can stand beside the word.
func (v *Variant) names() []string { return append(slices.Concat(v.Needs...), v.May...) }

// bounds gives the figures whose dimension the quantity of the row decides
// their units, and keeps the figure of a limit on the side of its quantity.
func (s *schema) bounds(g *group) []any {
	var open []*Key
	for _, k := range g.keys {
		if k.Kind == Quantity && k.Dimension == 0 {
			open = append(open, k)
		}
	}
	if len(open) == 0 {
		return nil
	}
	var rules []any
	for _, r := range rowsOf(g.named["quantity"].Choices) {
		right, wrong := string(r.sense), string(limits.AtLeast)
		if r.sense == limits.AtLeast {
			wrong = string(limits.AtMost)
		}
		figures := none([]string{wrong})
		for _, k := range open {
			if k.Name != wrong {
				measured := *k
				measured.Dimension = r.dimension
				figures[k.Name] = s.figure(&measured)
			}
		}
		rules = append(rules, when("quantity", r.ids, keywords{"properties": figures, "required": []string{right}}))
	}
	return rules
}

// boundRow is the quantities of one dimension that are limited on one side.
type boundRow struct {
	dimension quantity.Dimension
	sense     limits.Sense
	ids       []string
}

// rowsOf sorts quantities by dimension and sense, in the order in which they
// come first.
func rowsOf(ids []string) []boundRow {
	var rows []boundRow
	for _, id := range ids {
		record, _ := arrest.Quantity(id).Record()
		sense, _ := limits.SenseOf(record.ID)
		i := slices.IndexFunc(rows, func(r boundRow) bool { return r.dimension == record.Dimension && r.sense == sense })
		if i < 0 {
			i = len(rows)
			rows = append(rows, boundRow{dimension: record.Dimension, sense: sense})
		}
		rows[i].ids = append(rows[i].ids, id)
	}
	return rows
}
