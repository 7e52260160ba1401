package reportgen

import (
	"bytes"
	"encoding/json"
	"reflect"
	"strings"

	"arrestcheck/arrest"
	"arrestcheck/limits"
)

// JSONSchema returns the JSON Schema (draft 2020-12) of one document that JSON
// writes, as indented JSON with a line end. It is made from the structs that
// JSON marshals, so that the two cannot differ, and its bytes are always the
// same.
//
// Every key is always there; what is absent is null. Later versions of the
// program may add keys and quantities to the format, so the schema lets other
// keys through.
func JSONSchema() []byte {
	s := resultSchema{defs: keywords{}}
	root := s.object(reflect.TypeFor[document]())
	root["$schema"] = "https://json-schema.org/draft/2020-12/schema"
	root["title"] = JSONFormat
	root["description"] = "The results of one sheet. Numbers are in SI units with at most 12 significant digits; null stands for what is absent. " +
		"Several files give one document a line. Other versions of the program may add keys."
	root["properties"].(keywords)["format"] = keywords{"const": JSONFormat}
	root["$defs"] = s.defs
	var b bytes.Buffer
	e := json.NewEncoder(&b)
	e.SetEscapeHTML(false)
	e.SetIndent("", "  ")
	if err := e.Encode(root); err != nil {
		panic("reportgen: schema: " + err.Error()) // maps, lists and texts
	}
	return b.Bytes()
}

// keywords is one schema. Marshalling sorts the names, so that equal schemas
// have equal bytes.
type keywords map[string]any

// A resultSchema collects the definitions of the structs it comes across.
type resultSchema struct{ defs keywords }

// closedSets are the types of text that hold one word of a closed set.
var closedSets = map[reflect.Type][]string{
	reflect.TypeFor[limits.Outcome]():  wordsOf(limits.Outcomes()...),
	reflect.TypeFor[limits.Sense]():    wordsOf(limits.AtMost, limits.AtLeast),
	reflect.TypeFor[arrest.Evidence](): wordsOf(arrest.Given, arrest.Shape, arrest.Rated, arrest.Modelled, arrest.Measured),
	reflect.TypeFor[arrest.Corner]():   wordsOf(arrest.AtWritten, arrest.AtLow, arrest.AtHigh, arrest.AtLongest, arrest.AtReach),
}

func wordsOf[T ~string](list ...T) []string {
	all := make([]string, len(list))
	for i, w := range list {
		all[i] = string(w)
	}
	return all
}

// of returns the schema of a type that stands in a document. It panics for one
// of which the marshalling is not known here.
func (s *resultSchema) of(t reflect.Type) keywords {
	if t == reflect.TypeFor[figure]() {
		return keywords{"type": []string{"number", "null"}}
	}
	if closed, is := closedSets[t]; is {
		return keywords{"enum": closed}
	}
	switch t.Kind() {
	case reflect.String:
		return keywords{"type": "string"}
	case reflect.Bool:
		return keywords{"type": "boolean"}
	case reflect.Int:
		return keywords{"type": "integer"}
	case reflect.Slice:
		return keywords{"type": "array", "items": s.of(t.Elem())}
	case reflect.Pointer:
		return keywords{"anyOf": []any{s.of(t.Elem()), keywords{"type": "null"}}}
	case reflect.Struct:
		return s.defined(t)
	}
	panic("reportgen: schema: no " + t.String() + " stands in a document")
}

// defined refers to the definition of a struct, which is made when it is first
// asked for.
func (s *resultSchema) defined(t reflect.Type) keywords {
	name := strings.ToLower(strings.TrimPrefix(t.Name(), "json"))
	if _, known := s.defs[name]; !known {
		s.defs[name] = nil // against a struct that holds itself
		s.defs[name] = s.object(t)
	}
	return keywords{"$ref": "#/$defs/" + name}
}

// object returns the schema of a struct: each field by its key.
func (s *resultSchema) object(t reflect.Type) keywords {
	properties, required := keywords{}, []string{}
	for i := range t.NumField() {
		f := t.Field(i)
		key := f.Tag.Get("json")
		if key == "" || strings.Contains(key, ",") {
			panic("reportgen: schema: " + t.String() + "." + f.Name + " has no plain key")
		}
		properties[key] = s.of(f.Type)
		required = append(required, key)
	}
	return keywords{"type": "object", "properties": properties, "required": required}
}
