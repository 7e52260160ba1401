package reportgen

import (
	"bytes"
	"encoding/json"
	"math"
	"reflect"
	"testing"

	"pgregory.net/rapid"
)

type jsonInner struct {
	Text  string  `json:"text"`
	Maybe *string `json:"maybe"`
}

type jsonOuter struct {
	jsonInner
	Yes     bool        `json:"yes"`
	Count   int         `json:"count"`
	Figure  figure      `json:"figure"`
	Texts   []string    `json:"texts"`
	Inner   []jsonInner `json:"inner"`
	Pointer *jsonInner  `json:"pointer"`
	Pair    [2]int      `json:"pair"`
}

// sameJSON fails unless a value is written as encoding/json writes it, with what
// does not show escaped.
func sameJSON(t interface{ Fatalf(string, ...any) }, v any) {
	var b bytes.Buffer
	e := json.NewEncoder(&b)
	e.SetEscapeHTML(false)
	if err := e.Encode(v); err != nil {
		t.Fatalf("%v", err)
	}
	if got, want := string(appendJSON(nil, reflect.ValueOf(v)))+"\n", escapeJSON(b.String()); got != want {
		t.Fatalf("%s\nwant\n%s", got, want)
	}
}

// Any text, any figure, lists that are empty and lists that are not there.
func TestJSONAsTheLibraryWritesIt(t *testing.T) {
	odd := "\x00\b\f\n\r\t\x1b\x7f\"\\/<>&\u00a0\u00ad\u2028\u2029\u202e\ufffd\xff\xc3\U0001f6a7\U000e0001é±"
	sameJSON(t, jsonOuter{})
	sameJSON(t, jsonOuter{jsonInner: jsonInner{odd, &odd}, Texts: []string{}, Inner: []jsonInner{{odd, nil}, {"", &odd}}, Pointer: &jsonInner{}})
	rapid.Check(t, func(t *rapid.T) {
		text := rapid.String().Draw(t, "text")
		bytes := string(rapid.SliceOf(rapid.Byte()).Draw(t, "bytes"))
		x := rapid.Float64().Draw(t, "x")
		sameJSON(t, jsonOuter{jsonInner: jsonInner{Text: text, Maybe: &bytes}, Count: rapid.Int().Draw(t, "count"), Figure: figure(x), Texts: []string{bytes, text}})
	})
	for _, x := range []float64{0, math.Copysign(0, -1), math.NaN(), math.Inf(1), math.Inf(-1), 1e21, 1e-7, 123456789012345} {
		sameJSON(t, jsonOuter{Figure: figure(x)})
	}
}

// The documents of the jobs themselves.
func TestDocumentsAsTheLibraryWritesThem(t *testing.T) {
	for _, name := range []string{"rated.toml", "path-absorber.toml", "load-swing.toml", "three-workers.toml"} {
		sameJSON(t, newDocument(sheet(t, name)))
	}
}

func TestJSONOfSomethingElsePanics(t *testing.T) {
	for _, v := range []any{struct{ NoKey int }{}, struct {
		F float64 `json:"f"`
	}{}, map[string]int{}} {
		func() {
			defer func() {
				if recover() == nil {
					t.Errorf("%#v is written", v)
				}
			}()
			appendJSON(nil, reflect.ValueOf(v))
		}()
	}
}
