package archive

import (
	"encoding/json"
	"io"
	"math"
	"strings"

	"arrestcheck/arrest"
	"arrestcheck/limits"
	"arrestcheck/reportgen"
)

// ReproductionFormat is the value of the key format of a reproduction in JSON.
const ReproductionFormat = "arrestcheck reproduction 1"

type jsonReproduction struct {
	Format      string           `json:"format"`
	Archive     string           `json:"archive"`
	Same        bool             `json:"same"`
	SameFigures bool             `json:"same_figures"`
	Digest      *string          `json:"digest"`
	Archived    *Versions        `json:"archived_by"`
	Now         *Versions        `json:"now_by"`
	WasDigest   *string          `json:"archived_results_sha256"`
	IsDigest    *string          `json:"results_sha256"`
	Touched     []jsonTouched    `json:"touched"`
	Differences []jsonDifference `json:"differences"`
	Texts       []jsonText       `json:"reports"`
	Causes      []Cause          `json:"causes"`
	Refused     []string         `json:"refused"`
	Again       *jsonAgain       `json:"later_limits"`
	Cautions    []jsonCaution    `json:"cautions"`
}

type jsonTouched struct {
	File string `json:"file"`
	Was  string `json:"archived"`
	Is   string `json:"now"`
}

type jsonDifference struct {
	Part  Part     `json:"part"`
	What  string   `json:"what"`
	Field string   `json:"field"`
	Was   string   `json:"archived"`
	Is    string   `json:"now"`
	By    *float64 `json:"by"`
	Share *float64 `json:"share"`
}

type jsonText struct {
	File  string `json:"file"`
	Line  int    `json:"line"`
	Lines int    `json:"lines"`
	Was   string `json:"archived"`
	Is    string `json:"now"`
}

type jsonAgain struct {
	Rows []jsonAgainRow `json:"rows"`
	Was  jsonCounts     `json:"archived_counts"`
	Is   jsonCounts     `json:"counts"`
	Left []string       `json:"not_entered"`
}

type jsonAgainRow struct {
	Quantity arrest.Quantity `json:"quantity"`
	Was      *jsonFinding    `json:"archived"`
	Is       *jsonFinding    `json:"later"`
}

type jsonFinding struct {
	Limit          string         `json:"limit"`
	LimitAsWritten string         `json:"limit_as_written"`
	LimitSI        *float64       `json:"limit_value"`
	Authority      string         `json:"authority"`
	Outcome        limits.Outcome `json:"outcome"`
	Reasons        []string       `json:"reasons"`
	Bound          arrest.Bound   `json:"bound"`
	Demand         *float64       `json:"demand"`
	Unit           string         `json:"unit"`
}

type jsonCounts struct {
	Exceeded    int `json:"exceeded"`
	Undecided   int `json:"undecided"`
	NotCompared int `json:"not_compared"`
	Within      int `json:"within"`
}

type jsonCaution struct {
	ID   string `json:"id"`
	Text string `json:"text"`
}

// JSON writes a reproduction as one JSON document on one line. The error is
// that of w.
func (r *Reproduction) JSON(w io.Writer) error {
	j := jsonReproduction{
		Format: ReproductionFormat, Archive: r.Archive, Same: r.Same(), SameFigures: r.SameFigures(), Digest: &r.Digest,
		Archived: &r.Record.Tool, Now: &Versions{r.Tool, r.Model}, WasDigest: &r.WasDigest,
		Touched: []jsonTouched{}, Differences: []jsonDifference{}, Texts: []jsonText{}, Causes: []Cause{}, Refused: []string{},
		Cautions: cautionsJSON(r.cautions()),
	}
	if r.Is != nil {
		is := r.Is.Digest()
		j.IsDigest = &is
	}
	for _, t := range r.Touched {
		j.Touched = append(j.Touched, jsonTouched{t.Path, t.Was, t.Is})
	}
	for _, d := range r.Differences {
		j.Differences = append(j.Differences, jsonDifference{d.Part, d.What, d.Field, d.Was, d.Is, orNull(d.By), orNull(d.Share)})
	}
	for _, t := range r.Texts {
		j.Texts = append(j.Texts, jsonText{t.Path, t.Line, t.Lines, t.Was, t.Is})
	}
	j.Causes = append(j.Causes, r.Causes()...)
	if r.Refused != nil {
		j.Refused = append(j.Refused, faultTexts(r.Refused)...)
	}
	j.Again = r.Again.json()
	return writeJSON(w, &j)
}

// RefusedJSON writes, in the form of a reproduction, that a folder is no
// archive. The error is that of w.
func RefusedJSON(w io.Writer, name string, err error) error {
	return writeJSON(w, &jsonReproduction{
		Format: ReproductionFormat, Archive: name,
		Touched: []jsonTouched{}, Differences: []jsonDifference{}, Texts: []jsonText{}, Causes: []Cause{},
		Refused: faultTexts(err), Cautions: []jsonCaution{},
	})
}

func (a *Reassessment) json() *jsonAgain {
	if a == nil {
		return nil
	}
	j := &jsonAgain{Rows: []jsonAgainRow{}, Was: jsonCounts(a.Was), Is: jsonCounts(a.Is), Left: append([]string{}, a.Left...)}
	for _, row := range a.Rows {
		f := row.Was
		if f == nil {
			f = row.Is
		}
		j.Rows = append(j.Rows, jsonAgainRow{f.Quantity, row.Was.json(), row.Is.json()})
	}
	return j
}

func (f *Finding) json() *jsonFinding {
	if f == nil {
		return nil
	}
	return &jsonFinding{
		f.Limit, f.LimitAsWritten, orNull(f.LimitSI), f.Authority, f.Outcome, append([]string{}, f.Reasons...), f.Bound, orNull(f.Demand), f.Unit,
	}
}

// orNull is a figure in JSON, null where there is none.
func orNull(x float64) *float64 {
	if math.IsNaN(x) || math.IsInf(x, 0) {
		return nil
	}
	return &x
}

func cautionsJSON(list []caution) []jsonCaution {
	made := make([]jsonCaution, len(list))
	for i, c := range list {
		made[i] = jsonCaution{c.sentence.ID(), c.sentence.Say(c.texts...)}
	}
	return made
}

// writeJSON writes one document on one line, nothing in it that does not show.
func writeJSON(w io.Writer, document any) error {
	var b strings.Builder
	e := json.NewEncoder(&b)
	e.SetEscapeHTML(false)
	if err := e.Encode(document); err != nil {
		panic("archive: json: " + err.Error()) // structs of texts and numbers
	}
	_, err := io.WriteString(w, reportgen.EscapeJSON(b.String()))
	return err
}
