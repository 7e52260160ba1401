package main

import (
	"encoding/json"
	"errors"
	"fmt"
	"io"
	"math"
	"regexp"
	"strconv"
	"strings"
	"testing"

	"github.com/rogpeppe/go-internal/testscript"
)

// jsonvalue FILE PATH EXPECTED [RELTOL]: the value at PATH must be EXPECTED.
//
// FILE may be stdout. PATH is a chain of names; after a list stands in
// brackets its index, count for its length, or what tells its one wanted member
// from the others: estimates[quantity=peak_force,evidence=given].low. The
// documents of a stream of several are counted from 0: [1].job.name. With
// RELTOL both are numbers and the value may differ by RELTOL times EXPECTED;
// without, the value as JSON, or as a bare text, must be EXPECTED.
func jsonvalue(ts *testscript.TestScript, neg bool, args []string) {
	if neg || len(args) < 3 || len(args) > 4 {
		ts.Fatalf("usage: jsonvalue FILE PATH EXPECTED [RELTOL]")
	}
	doc, err := decode(ts.ReadFile(args[0]))
	ts.Check(err)
	got, err := valueAt(doc, args[1])
	ts.Check(err)
	tolerance := ""
	if len(args) == 4 {
		tolerance = args[3]
	}
	ts.Check(compare(got, args[2], tolerance))
}

// decode returns the one document of text, or the list of its documents.
func decode(text string) (any, error) {
	var docs []any
	d := json.NewDecoder(strings.NewReader(text))
	for {
		var doc any
		err := d.Decode(&doc)
		if errors.Is(err, io.EOF) {
			break
		}
		if err != nil {
			return nil, err
		}
		docs = append(docs, doc)
	}
	if len(docs) == 1 {
		return docs[0], nil
	}
	return docs, nil
}

var pathStep = regexp.MustCompile(`^\.?(?:([a-z_0-9]+)|\[([^\]]*)\])`)

func valueAt(v any, path string) (any, error) {
	for rest := path; rest != ""; {
		step := pathStep.FindStringSubmatch(rest)
		if step == nil {
			return nil, fmt.Errorf("%s: cannot read the path from %q on", path, rest)
		}
		rest = rest[len(step[0]):]
		var err error
		if step[1] != "" {
			v, err = member(v, step[1])
		} else {
			v, err = element(v, step[2])
		}
		if err != nil {
			return nil, fmt.Errorf("%s: %w", path, err)
		}
	}
	return v, nil
}

func member(v any, name string) (any, error) {
	m, ok := v.(map[string]any)
	if !ok {
		return nil, fmt.Errorf("%q asked of what is no object", name)
	}
	value, ok := m[name]
	if !ok {
		return nil, fmt.Errorf("no member %q", name)
	}
	return value, nil
}

func element(v any, selector string) (any, error) {
	list, ok := v.([]any)
	if !ok {
		return nil, fmt.Errorf("[%s] asked of what is no list", selector)
	}
	if selector == "count" {
		return float64(len(list)), nil
	}
	if i, err := strconv.Atoi(selector); err == nil {
		if i >= len(list) {
			return nil, fmt.Errorf("no element %d in a list of %d", i, len(list))
		}
		return list[i], nil
	}
	var found []any
	for _, e := range list {
		if selected(e, selector) {
			found = append(found, e)
		}
	}
	if len(found) != 1 {
		return nil, fmt.Errorf("[%s] fits %d of %d elements", selector, len(found), len(list))
	}
	return found[0], nil
}

func selected(e any, selector string) bool {
	for _, condition := range strings.Split(selector, ",") {
		name, want, _ := strings.Cut(condition, "=")
		got, err := member(e, name)
		if err != nil || compare(got, want, "") != nil {
			return false
		}
	}
	return true
}

func compare(got any, want, tolerance string) error {
	if tolerance == "" {
		text, err := json.Marshal(got)
		if err != nil {
			return err
		}
		if s, ok := got.(string); ok && s == want || string(text) == want {
			return nil
		}
		return fmt.Errorf("got %s, want %s", text, want)
	}
	x, ok := got.(float64)
	if !ok {
		return fmt.Errorf("got %v, want the number %s", got, want)
	}
	w, err := strconv.ParseFloat(want, 64)
	if err != nil {
		return err
	}
	relative, err := strconv.ParseFloat(tolerance, 64)
	if err != nil {
		return err
	}
	if !(math.Abs(x-w) <= relative*math.Abs(w)) {
		return fmt.Errorf("got %.12g, want %s within %s of it", x, want, tolerance)
	}
	return nil
}

// A comparison that cannot fail would let every script pass.
func TestJSONValueFails(t *testing.T) {
	doc, err := decode(`{"a":[{"q":"x","low":2.5},{"q":"y","low":null}],"n":{"z":0}}`)
	if err != nil {
		t.Fatal(err)
	}
	for _, c := range []struct {
		path, want, tolerance string
		ok                    bool
	}{
		{"a[q=x].low", "2.5", "", true},
		{"a[q=x].low", "2.51", "0.01", true},
		{"a[q=x].low", "2.6", "0.01", false},
		{"a[q=x].low", "2.6", "", false},
		{"a[q=y].low", "null", "", true},
		{"a[q=y].low", "0", "1", false},
		{"a[q=z].low", "2.5", "", false},
		{"a[1].q", "y", "", true},
		{"a[2].q", "y", "", false},
		{"a[count]", "2", "", true},
		{"n.z", "0", "", true},
		{"n.missing", "null", "", false},
		{"n z", "0", "", false},
	} {
		got, err := valueAt(doc, c.path)
		if err == nil {
			err = compare(got, c.want, c.tolerance)
		}
		if (err == nil) != c.ok {
			t.Errorf("%s against %s %s: %v", c.path, c.want, c.tolerance, err)
		}
	}
}
