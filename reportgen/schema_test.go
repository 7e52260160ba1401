package reportgen

import (
	"bytes"
	"encoding/json"
	"os"
	"path/filepath"
	"strings"
	"testing"

	"github.com/santhosh-tekuri/jsonschema/v6"
)

// resultCompiled returns the schema as an independent validator reads it, which
// holds it against the draft first.
func resultCompiled(t *testing.T) *jsonschema.Schema {
	t.Helper()
	if !bytes.Equal(JSONSchema(), JSONSchema()) {
		t.Error("two bytes of the schema differ")
	}
	document, err := jsonschema.UnmarshalJSON(bytes.NewReader(JSONSchema()))
	if err != nil {
		t.Fatal(err)
	}
	c := jsonschema.NewCompiler()
	if err := c.AddResource("result.json", document); err != nil {
		t.Fatal(err)
	}
	s, err := c.Compile("result.json")
	if err != nil {
		t.Fatal(err)
	}
	return s
}

// Every golden and the results of every job hold the schema.
func TestResultsHoldTheSchema(t *testing.T) {
	s, n := resultCompiled(t), 0
	valid := func(name, document string) {
		t.Helper()
		n++
		v, err := jsonschema.UnmarshalJSON(strings.NewReader(document))
		if err != nil {
			t.Fatal(err)
		}
		if err := s.Validate(v); err != nil {
			t.Errorf("%s: %v", name, err)
		}
	}
	goldens, err := filepath.Glob(filepath.Join(goldenFolder, "*.json"))
	if err != nil {
		t.Fatal(err)
	}
	for _, path := range goldens {
		data, err := os.ReadFile(path)
		if err != nil {
			t.Fatal(err)
		}
		valid(path, string(data))
	}
	jobs, err := filepath.Glob(filepath.Join(jobsFolder, "*.toml"))
	if err != nil {
		t.Fatal(err)
	}
	for _, path := range jobs {
		name := filepath.Base(path)
		valid(name, asJSON(t, sheet(t, name)))
	}
	if len(goldens) < 2 || n < 17 {
		t.Errorf("%d goldens of %d documents", len(goldens), n)
	}
}

// Take away any key, or put any value of another kind in its place, and the
// schema refuses the document.
func TestSchemaHoldsEveryKey(t *testing.T) {
	s, n := resultCompiled(t), 0
	var root any
	if err := json.Unmarshal([]byte(asJSON(t, sheet(t, "metric-settled.toml"))), &root); err != nil {
		t.Fatal(err)
	}
	var walk func(at string, v any)
	walk = func(at string, v any) {
		switch v := v.(type) {
		case map[string]any:
			for key, in := range v {
				n++
				delete(v, key)
				if s.Validate(root) == nil {
					t.Errorf("%s.%s can be missing", at, key)
				}
				v[key] = []any{map[string]any{}}
				if s.Validate(root) == nil {
					t.Errorf("%s.%s can be anything", at, key)
				}
				v[key] = in
				walk(at+"."+key, in)
			}
		case []any:
			for _, in := range v[:min(len(v), 2)] {
				walk(at+"[]", in)
			}
		}
	}
	walk("", root)
	if n < 100 {
		t.Errorf("%d keys, at least 100 expected", n)
	}
	finding := root.(map[string]any)["findings"].([]any)[0].(map[string]any)
	finding["outcome"] = "fulfilled"
	if s.Validate(root) == nil {
		t.Error("an outcome that is none of the closed set")
	}
}
