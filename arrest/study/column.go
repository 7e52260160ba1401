package study

import (
	"encoding/binary"
	"math"
	"slices"

	"arrestcheck/arrest"
)

// A Column names one estimate that a study follows.
type Column struct {
	Quantity arrest.Quantity
	Evidence arrest.Evidence
	From     string // the document or the assumed shape
	Nth      int    // which of several that are alike in all this, from 0
}

// Columns returns the estimates that j gives of the quantities, in the order of
// the result; of all quantities where none is named. Those whose conditions do
// not hold (arrest.Estimate.Outside) are among them: they may hold elsewhere.
// A job that cannot happen as entered gives none.
func Columns(j *arrest.Job, quantities ...arrest.Quantity) []Column {
	if arrest.Refused(j) {
		return nil
	}
	res := arrest.Evaluate(j)
	return columnsOf(&res, quantities)
}

func columnsOf(res *arrest.Result, quantities []arrest.Quantity) []Column {
	var list []Column
	for i := range res.Estimates {
		c := columnOf(res, i)
		if len(quantities) == 0 || slices.Contains(quantities, c.Quantity) {
			list = append(list, c)
		}
	}
	return list
}

// columnOf names the i-th estimate of a result.
func columnOf(res *arrest.Result, i int) Column {
	e := &res.Estimates[i]
	c := Column{Quantity: e.Quantity, Evidence: e.Evidence, From: e.From}
	for k := range i {
		if c.names(&res.Estimates[k]) {
			c.Nth++
		}
	}
	return c
}

// names reports whether the estimate is one of those the column may mean.
func (c *Column) names(e *arrest.Estimate) bool {
	return e.Quantity == c.Quantity && e.Evidence == c.Evidence && (e.From == c.From || c.From == "")
}

// in returns the estimate of a result that the column means, nil where there
// is none.
func (c *Column) in(res *arrest.Result) *arrest.Estimate {
	n := c.Nth
	for i := range res.Estimates {
		if e := &res.Estimates[i]; c.names(e) {
			if n == 0 {
				return e
			}
			n--
		}
	}
	return nil
}

// A probe gives the figures of some columns of a job at chosen figures of some
// inputs. Each has one user at a time.
type probe interface {
	// At writes the figures at x into to and reports whether the entries can
	// happen there; they are NaN where they cannot.
	At(x []float64, to []arrest.Ends) bool
	// Bound is the bound of a column, empty where it is never known.
	Bound(column int) arrest.Bound
	// Exact reports whether low, value and high are one figure everywhere.
	Exact() bool
}

// newProbe takes the quick way where there is one. Both give the same figures
// to the last bit.
func newProbe(j *arrest.Job, moved []int, columns []Column) probe {
	sought := make([]arrest.Sought, len(columns))
	quick := true
	for i, c := range columns {
		sought[i] = arrest.Sought{Quantity: c.Quantity, Evidence: c.Evidence}
		quick = quick && c.Nth == 0
	}
	if s, ok := arrest.NewScan(j, moved, sought); ok && quick {
		return s
	}
	return newChecks(j, moved, columns)
}

// checks is the probe that makes a single check at every point.
type checks struct {
	repeat  *arrest.Repeat
	moved   []int
	columns []Column
	bounds  []arrest.Bound
}

func newChecks(j *arrest.Job, moved []int, columns []Column) *checks {
	return &checks{repeat: arrest.NewRepeat(j), moved: moved, columns: columns, bounds: make([]arrest.Bound, len(columns))}
}

var absent = arrest.Ends{Low: math.NaN(), Value: math.NaN(), High: math.NaN(), Reach: math.NaN()}

func (c *checks) At(x []float64, to []arrest.Ends) bool {
	for i := range to {
		to[i] = absent
	}
	job := &c.repeat.Job
	for i, k := range c.moved {
		in := &job.Inputs[k]
		in.Band = arrest.Single(in, x[i])
		in.Set(&job.Point, x[i])
	}
	if c.repeat.Refused() {
		return false
	}
	res := c.repeat.Evaluate()
	for i := range c.columns {
		if e := c.columns[i].in(res); e != nil {
			to[i] = arrest.Ends{Low: e.Low, Value: e.Value, High: e.High, Reach: e.Reach}
			c.bounds[i] = e.Bound
		}
	}
	return true
}

func (c *checks) Bound(column int) arrest.Bound { return c.bounds[column] }
func (c *checks) Exact() bool                   { return false }

// remember returns a probe that works no point out twice, where a point is a
// whole check; the lines of a sweep look at the same points between two of its
// own.
func remember(p probe) probe {
	if _, dear := p.(*checks); !dear {
		return p
	}
	return &memory{probe: p, seen: map[string]recalled{}}
}

// memorySize bounds how many points are kept.
const memorySize = 4096

type memory struct {
	probe
	seen map[string]recalled
	key  []byte
}

type recalled struct {
	ends []arrest.Ends
	can  bool
}

func (m *memory) At(x []float64, to []arrest.Ends) bool {
	m.key = m.key[:0]
	for _, v := range x {
		m.key = binary.LittleEndian.AppendUint64(m.key, math.Float64bits(v))
	}
	if r, known := m.seen[string(m.key)]; known {
		copy(to, r.ends)
		return r.can
	}
	can := m.probe.At(x, to)
	if len(m.seen) == memorySize {
		clear(m.seen)
	}
	m.seen[string(m.key)] = recalled{slices.Clone(to), can}
	return can
}

// allowance is the share by which a limit widens what the column says: the
// user's own for the error of the model, 0 for all other evidence and where
// none was entered.
func (c *Column) allowance(j *arrest.Job) float64 {
	if c.Evidence != arrest.Modelled {
		return 0
	}
	in := j.AllowanceInput()
	if in == nil {
		return 0
	}
	return in.Band.High
}

// widened is the allowance with the sign it has at an end.
func (e End) widened(allowance float64) float64 {
	switch e {
	case TheLow:
		return -allowance
	case TheHigh:
		return allowance
	}
	return 0
}
