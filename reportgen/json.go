package reportgen

import (
	"fmt"
	"io"
	"math"
	"reflect"
	"strconv"
	"strings"
	"unicode/utf8"

	"arrestcheck/arrest"
	"arrestcheck/arrest/quantity"
	"arrestcheck/limits"
)

// JSONFormat is the first value of every JSON document. It changes only when a
// key is taken away or comes to mean something else.
const JSONFormat = "arrestcheck result 1"

// JSON writes the results of a sheet as one JSON document on one line: SI
// units, 12 significant digits, null for what is absent (the high of a floor,
// the value of a range), keys always in the same order. Characters without a
// shape of their own are escaped, so that the line can go to a terminal; what
// a reader decodes is the user's text untouched. The error is that of w.
func JSON(w io.Writer, s *Sheet) error { return encode(w, newDocument(s)) }

// encode writes one JSON document on one line.
func encode(w io.Writer, document any) error {
	_, err := w.Write(append(appendJSON(make([]byte, 0, 32<<10), reflect.ValueOf(document)), '\n'))
	return err
}

// escapeJSON escapes what is not visible, which stands in strings only.
func escapeJSON(s string) string {
	var b strings.Builder
	b.Grow(len(s))
	from := 0 // what stands before it is written
	for i, r := range s {
		if r >= ' ' && r <= '~' || r == '\n' || r != utf8.RuneError && visible(r) && r != noBreakRune {
			continue
		}
		_, size := utf8.DecodeRuneInString(s[i:])
		b.WriteString(s[from:i])
		from = i + size
		if r > 0xffff {
			r -= 0x10000
			fmt.Fprintf(&b, `\u%04x\u%04x`, 0xd800+r>>10, 0xdc00+r&0x3ff)
			continue
		}
		fmt.Fprintf(&b, `\u%04x`, r)
	}
	b.WriteString(s[from:])
	return b.String()
}

// A figure is an SI number in JSON, null where there is none.
type figure float64

// MarshalJSON writes the 12 significant digits of the number.
func (f figure) MarshalJSON() ([]byte, error) { return f.append(nil), nil }

func (f figure) append(to []byte) []byte {
	x := float64(f)
	if math.IsNaN(x) || math.IsInf(x, 0) {
		return append(to, "null"...)
	}
	return strconv.AppendFloat(to, quantity.Snap(x), 'g', -1, 64)
}

// document is the JSON of one sheet. The order of the fields is the order of
// the keys.
type document struct {
	Format        string         `json:"format"`
	Tool          jsonTool       `json:"tool"`
	Job           jsonJob        `json:"job"`
	LimitSets     []jsonSet      `json:"limit_sets"`
	Inputs        []jsonInput    `json:"inputs"`
	Estimates     []jsonEstimate `json:"estimates"`
	Findings      []jsonFinding  `json:"findings"`
	OutcomeCounts jsonCounts     `json:"outcome_counts"`
	NotEntered    []string       `json:"not_entered"`
	Elsewhere     []jsonPlace    `json:"elsewhere"`
	Working       []jsonWorking  `json:"working"`
	Cautions      []jsonCaution  `json:"cautions"`
	NotChecked    []string       `json:"not_checked"`
	ModelRuns     []jsonRun      `json:"model_runs"`
	Vectors       []jsonVector   `json:"vectors"`
	Overrides     []jsonOverride `json:"overrides"`
	Sensitivity   []jsonRanking  `json:"sensitivity"`
	Layout        *jsonLayout    `json:"layout"`
}

type jsonTool struct {
	Version string `json:"version"`
	Model   string `json:"model"`
}

type jsonJob struct {
	Name       *string `json:"name"`
	Title      *string `json:"title"`
	Site       *string `json:"site"`
	Reference  *string `json:"reference"`
	Revision   *string `json:"revision"`
	Date       *string `json:"date"`
	Purpose    *string `json:"purpose"`
	System     *string `json:"system"`
	Rescue     *string `json:"rescue"`
	PreparedBy *string `json:"prepared_by"`
	CheckedBy  *string `json:"checked_by"`
	ReviewDate *string `json:"review_date"`
	Persons    int     `json:"persons"`
	Example    bool    `json:"example"`
	SHA256     *string `json:"sha256"`
	Subject    string  `json:"subject"`
}

type jsonSet struct {
	Name         *string `json:"name"`
	Title        *string `json:"title"`
	Jurisdiction *string `json:"jurisdiction"`
	EnteredBy    *string `json:"entered_by"`
	EnteredOn    *string `json:"entered_on"`
	CheckedOn    *string `json:"checked_on"`
	Note         *string `json:"note"`
	Example      bool    `json:"example"`
	SHA256       *string `json:"sha256"`
}

type jsonInput struct {
	Key        string  `json:"key"`
	AsWritten  string  `json:"as_written"`
	Unit       string  `json:"unit"`
	Low        figure  `json:"low"`
	Value      figure  `json:"value"`
	High       figure  `json:"high"`
	Source     *string `json:"source"`
	Note       *string `json:"note"`
	Open       bool    `json:"open"`
	OpenReason *string `json:"open_reason"`
}

type jsonEstimate struct {
	Quantity arrest.Quantity `json:"quantity"`
	Method   string          `json:"method"`
	Evidence arrest.Evidence `json:"evidence"`
	Bound    *string         `json:"bound"`
	Unit     string          `json:"unit"`
	Low      figure          `json:"low"`
	Value    figure          `json:"value"`
	High     figure          `json:"high"`
	Reach    figure          `json:"reach"`
	From     *string         `json:"from"`
	Outside  bool            `json:"outside"`
	Uses     []string        `json:"uses"`

	// Of a modelled figure: the user's allowance, what is compared with it, and
	// what keeps the model from being the whole story.
	Allowance    figure `json:"allowance"`
	ComparedLow  figure `json:"compared_low"`
	ComparedHigh figure `json:"compared_high"`
	Exhausted    bool   `json:"exhausted"`
	BeyondModel  bool   `json:"beyond_model"`

	// Of a job with a layout: the position that the figure is of, of several; what
	// of the length the path gives, which alone the allowance is taken on; and what
	// keeps a row from being within.
	Position  *string `json:"position"`
	Travel    figure  `json:"travel"`
	Edge      bool    `json:"edge_contact"`
	Strikes   bool    `json:"strikes"`
	Unreached bool    `json:"place_unknown"`
}

type jsonFinding struct {
	Limit          string          `json:"limit"`
	Set            *string         `json:"set"`
	Group          *string         `json:"group"`
	Quantity       arrest.Quantity `json:"quantity"`
	Sense          limits.Sense    `json:"sense"`
	LimitAsWritten string          `json:"limit_as_written"`
	LimitSI        figure          `json:"limit_value"`
	Authority      *string         `json:"authority"`
	Outcome        limits.Outcome  `json:"outcome"`
	Reason         *string         `json:"reason"`
	Reasons        []jsonReason    `json:"reasons"`
	Bound          *string         `json:"bound"`
	Demand         figure          `json:"demand"`
	Unit           string          `json:"unit"`
	Ratio          figure          `json:"ratio"`
	Used           []int           `json:"used"`
}

type jsonReason struct {
	ID   limits.ReasonID `json:"id"`
	Text string          `json:"text"`
}

type jsonCounts struct {
	Exceeded    int `json:"exceeded"`
	Undecided   int `json:"undecided"`
	NotCompared int `json:"not_compared"`
	Within      int `json:"within"`
}

type jsonPlace struct {
	Quantity arrest.Quantity `json:"quantity"`
	Where    string          `json:"where"`
}

type jsonWorking struct {
	Method  string        `json:"method"`
	Meaning string        `json:"meaning"`
	Corner  arrest.Corner `json:"corner"`
	Formula string        `json:"formula"`
	Terms   []jsonTerm    `json:"terms"`
	Result  jsonTerm      `json:"result"`
}

type jsonTerm struct {
	Symbol string `json:"symbol"`
	Unit   string `json:"unit"`
	Value  figure `json:"value"`
}

type jsonCaution struct {
	ID   string `json:"id"`
	Text string `json:"text"`
}
