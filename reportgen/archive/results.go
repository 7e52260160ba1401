package archive

import (
	"bytes"
	"encoding/json"
	"errors"
	"fmt"
	"io"
	"math"
	"strings"

	"arrestcheck/arrest"
	"arrestcheck/limits"
	"arrestcheck/reportgen"
)

// Results are what came out of a job: figures in SI units with 12 significant
// digits, NaN for what is absent.
type Results struct {
	Tool, Model string // versions of the program and of its mechanics
	Job         Job
	Sets        []Set
	Inputs      []Input
	Estimates   []Estimate
	Findings    []Finding
	Counts      Counts
	NotEntered  []string // subjects that nobody entered a limit for
	Overrides   []Override
}

// A Job says which job the results are of, as typed.
type Job struct {
	Name, Title, Site, Reference, Revision, Date string
	PreparedBy, CheckedBy, ReviewDate, Rescue    string
	SHA256                                       string
	Persons                                      int
	Example                                      bool
}

// A Set is a limit set that was compared with.
type Set struct{ Name, Title, SHA256 string }

// An Input is one figure of the job.
type Input struct {
	Key, AsWritten, Unit, Source string
	Low, Value, High             float64
	Open                         bool
}

// An Estimate is one figure that came out.
type Estimate struct {
	Quantity                  arrest.Quantity
	Evidence                  arrest.Evidence
	Method, From, Unit        string
	Bound                     arrest.Bound
	Low, Value, High          float64
	Reach                     float64
	Outside                   bool
	Allowance                 float64
	ComparedLow, ComparedHigh float64
}

// A Finding is one limit compared.
type Finding struct {
	Limit, Group, LimitAsWritten, Authority, Unit string
	Quantity                                      arrest.Quantity
	Sense                                         limits.Sense
	LimitSI                                       float64
	Outcome                                       limits.Outcome
	Reasons                                       []string // ids, the main one first
	Bound                                         arrest.Bound
	Demand, Ratio                                 float64
}

// Counts is how many limits came to each outcome, a group counted once.
type Counts struct{ Exceeded, Undecided, NotCompared, Within int }

// An Override is an entry that was set on the command line.
type Override struct{ Key, Value string }

// ErrFormat is the error of a file that is no result file of a known format.
var ErrFormat = errors.New("no result file of a format that is known here")

// ErrNotWhole is the error of a file that calls itself a result file and does not
// hold what every result has.
var ErrNotWhole = errors.New("no whole result file")

// readers holds the formats that are known, so that old results stay readable
// when the form changes.
var readers = map[string]func([]byte) (Results, error){
	reportgen.JSONFormat: readResults1,
}

// ReadResults reads a result file, one JSON document. The error wraps ErrFormat
// where it is none, or its format line names none that is known, and ErrNotWhole
// where something is missing that every result has.
func ReadResults(data []byte) (Results, error) {
	var head struct {
		Format string `json:"format"`
	}
	if len(bytes.TrimSpace(data)) == 0 {
		return Results{}, fmt.Errorf("%w: the file is empty", ErrFormat)
	}
	if err := json.NewDecoder(bytes.NewReader(data)).Decode(&head); err != nil {
		return Results{}, fmt.Errorf("%w: %v", ErrFormat, err)
	}
	read, known := readers[head.Format]
	if !known {
		return Results{}, fmt.Errorf("%w: %.40q", ErrFormat, head.Format)
	}
	return read(data)
}

// number is a figure in JSON, NaN where it is null.
type number float64

func (n *number) UnmarshalJSON(data []byte) error {
	*n = number(math.NaN())
	if string(data) == "null" {
		return nil
	}
	return json.Unmarshal(data, (*float64)(n))
}

// document1 is the part of "arrestcheck result 1" that is read. Keys that are
// missing, as in results of earlier versions of the program, are absent.
type document1 struct {
	Tool struct{ Version, Model string }
	Job  struct {
		Name, Title, Site, Reference, Revision, Date, Rescue, SHA256 string
		PreparedBy                                                   string `json:"prepared_by"`
		CheckedBy                                                    string `json:"checked_by"`
		ReviewDate                                                   string `json:"review_date"`
		Persons                                                      int
		Example                                                      bool
	}
	LimitSets []Set `json:"limit_sets"`
	Inputs    []struct {
		Key, Unit, Source string
		AsWritten         string `json:"as_written"`
		Low, Value, High  number
		Open              bool
	}
	Estimates []struct {
		Quantity                arrest.Quantity
		Evidence                arrest.Evidence
		Method, From, Unit      string
		Bound                   arrest.Bound
		Low, Value, High, Reach number
		Outside                 bool
		Allowance               *number
		ComparedLow             *number `json:"compared_low"`
		ComparedHigh            *number `json:"compared_high"`
	}
	Findings []struct {
		Limit, Group, Authority, Unit string
		LimitAsWritten                string `json:"limit_as_written"`
		Quantity                      arrest.Quantity
		Sense                         limits.Sense
		LimitSI                       number `json:"limit_value"`
		Outcome                       limits.Outcome
		Reasons                       []struct{ ID string }
		Bound                         arrest.Bound
		Demand, Ratio                 number
	}
	OutcomeCounts *struct {
		Exceeded, Undecided, Within int
		NotCompared                 int `json:"not_compared"`
	} `json:"outcome_counts"`
	NotEntered []string `json:"not_entered"`
	Overrides  []Override
}

func readResults1(data []byte) (Results, error) {
	var d document1
	decoder := json.NewDecoder(bytes.NewReader(data))
	if err := decoder.Decode(&d); err != nil {
		return Results{}, fmt.Errorf("%w: %v", ErrFormat, err)
	}
	if _, err := decoder.Token(); !errors.Is(err, io.EOF) {
		return Results{}, fmt.Errorf("%w: more than one result", ErrFormat)
	}
	if missing := d.missing(); len(missing) > 0 {
		return Results{}, fmt.Errorf("%w: missing: %s", ErrNotWhole, strings.Join(missing, ", "))
	}
	return d.results(), nil
}

// missing names what every result has and this one lacks. Lists may be empty
// but for the inputs: there is no job without a figure.
func (d *document1) missing() []string {
	var list []string
	for _, c := range []struct {
		key  string
		lack bool
	}{
		{"tool.version", d.Tool.Version == ""}, {"tool.model", d.Tool.Model == ""}, {"job.sha256", d.Job.SHA256 == ""},
		{"inputs", len(d.Inputs) == 0}, {"estimates", d.Estimates == nil}, {"findings", d.Findings == nil},
		{"outcome_counts", d.OutcomeCounts == nil},
	} {
		if c.lack {
			list = append(list, c.key)
		}
	}
	return list
}

func (d *document1) results() Results {
	r := Results{
		Tool: d.Tool.Version, Model: d.Tool.Model, Sets: d.LimitSets, NotEntered: d.NotEntered, Overrides: d.Overrides,
		Job: Job{
			Name: d.Job.Name, Title: d.Job.Title, Site: d.Job.Site, Reference: d.Job.Reference, Revision: d.Job.Revision,
			Date: d.Job.Date, Rescue: d.Job.Rescue, PreparedBy: d.Job.PreparedBy, CheckedBy: d.Job.CheckedBy,
			ReviewDate: d.Job.ReviewDate, SHA256: d.Job.SHA256, Persons: d.Job.Persons, Example: d.Job.Example,
		},
		Counts: Counts{d.OutcomeCounts.Exceeded, d.OutcomeCounts.Undecided, d.OutcomeCounts.NotCompared, d.OutcomeCounts.Within},
	}
	for i := range d.Inputs {
		in := &d.Inputs[i]
		r.Inputs = append(r.Inputs, Input{in.Key, in.AsWritten, in.Unit, in.Source,
			float64(in.Low), float64(in.Value), float64(in.High), in.Open})
	}
	for i := range d.Estimates {
		e := &d.Estimates[i]
		r.Estimates = append(r.Estimates, Estimate{
			Quantity: e.Quantity, Evidence: e.Evidence, Method: e.Method, From: e.From, Unit: e.Unit, Bound: e.Bound,
			Low: float64(e.Low), Value: float64(e.Value), High: float64(e.High), Reach: float64(e.Reach), Outside: e.Outside,
			Allowance: orNaN(e.Allowance), ComparedLow: orNaN(e.ComparedLow), ComparedHigh: orNaN(e.ComparedHigh),
		})
	}
	for i := range d.Findings {
		f := &d.Findings[i]
		made := Finding{
			Limit: f.Limit, Group: f.Group, LimitAsWritten: f.LimitAsWritten, Authority: f.Authority, Unit: f.Unit,
			Quantity: f.Quantity, Sense: f.Sense, LimitSI: float64(f.LimitSI), Outcome: f.Outcome, Bound: f.Bound,
			Demand: float64(f.Demand), Ratio: float64(f.Ratio),
		}
		for _, reason := range f.Reasons {
			made.Reasons = append(made.Reasons, reason.ID)
		}
		r.Findings = append(r.Findings, made)
	}
	return r
}

// orNaN is a figure that earlier results do not have.
func orNaN(n *number) float64 {
	if n == nil {
		return math.NaN()
	}
	return float64(*n)
}
