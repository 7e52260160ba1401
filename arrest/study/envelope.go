package study

import (
	"context"
	"math"

	"arrestcheck/arrest"
	"arrestcheck/arrest/quantity"
	"arrestcheck/limits"
)

// A Range is an input and the range it is moved over, SI.
type Range struct {
	Key         string
	Low, High   float64
	Logarithmic bool // even ratios in place of even distances
}

func (r *Range) values(n int) ([]float64, error) {
	if r.Logarithmic {
		return Logarithmic(r.Low, r.High, n)
	}
	return Linear(r.Low, r.High, n)
}

// A Layout says what an envelope is to show.
type Layout struct {
	Across, Up Range
	Sets       []limits.Set // must stay as they are
	Steps      int          // parts of each range; 0: DefaultSteps
	Workers    int          // below 1: one
}

const (
	// DefaultSteps is into how many parts an envelope divides each range.
	DefaultSteps = 1024

	// MaxSteps bounds the memory of an envelope to about 35 MB.
	MaxSteps = 4096

	// coarseSteps is into how many parts each range is divided to begin with.
	coarseSteps = 32
)

// An Envelope shows over which figures of two inputs each limit comes to which
// zone, on a grid of points.
type Envelope struct {
	Across, Up  Axis            // Steps + 1 figures each
	Limits      []*limits.Limit // in the order of the sets
	Evaluations int             // single checks made
	Dense       int             // single checks that every point alone would take

	labels []uint16 // by point, Across fastest; index into zones plus 1
	zones  []string // a byte for each limit
	names  map[string]uint16
	trial  func() *trial
	inputs []int
}

// Envelop works out an envelope (M-54). At every point it evaluates, the two
// inputs have the figures of the point and count as settled, measured to ± 0;
// all else is as entered.
//
// 33 lines each way are looked at first, as finely as needed where they change.
// From there every boundary between zones is followed at the full resolution,
// and what it encloses is filled in, so that each point comes to what its own
// check gives. A boundary that meets none of the lines, around an island within
// one of 32 by 32 fields, is missed. j must stay as it is.
//
// The error is a *Refusal, or that of the context.
func Envelop(ctx context.Context, j *arrest.Job, l Layout) (*Envelope, error) {
	e, err := newEnvelope(j, &l)
	if err != nil {
		return nil, err
	}
	o := outline{Envelope: e, ctx: ctx, workers: l.Workers}
	if err := o.trace(); err != nil {
		return nil, err
	}
	e.fill()
	return e, nil
}

func newEnvelope(j *arrest.Job, l *Layout) (*Envelope, error) {
	steps := l.Steps
	if steps == 0 {
		steps = DefaultSteps
	}
	if steps > MaxSteps {
		return nil, &Refusal{ID: TooMany, SI: float64(steps)}
	}
	e := &Envelope{names: map[string]uint16{}}
	for i := range l.Sets {
		for k := range l.Sets[i].Limits {
			e.Limits = append(e.Limits, &l.Sets[i].Limits[k])
		}
	}
	if len(e.Limits) == 0 {
		return nil, &Refusal{ID: NothingAsked}
	}
	across, err := l.Across.values(steps + 1)
	if err != nil {
		return nil, err
	}
	up, err := l.Up.values(steps + 1)
	if err != nil {
		return nil, err
	}
	e.Across, e.Up = Axis{l.Across.Key, across}, Axis{l.Up.Key, up}
	e.Dense = len(across) * len(up)
	e.inputs = make([]int, 2)
	for i, a := range []*Axis{&e.Across, &e.Up} {
		ends := Axis{a.Key, []float64{a.Values[0], a.Values[steps]}}
		k, err := place(j, []Axis{ends})
		if err != nil {
			return nil, err
		}
		e.inputs[i] = k[0]
	}
	if e.inputs[0] == e.inputs[1] {
		return nil, &Refusal{ID: Twice, Key: e.Across.Key}
	}
	e.labels = make([]uint16, e.Dense)
	e.trial = func() *trial { return newTrial(j, l.Sets) }
	return e, nil
}

// check returns the zones of all limits with the inputs at x and y.
func (e *Envelope) check(t *trial, x, y float64) string {
	t.suppose(e.inputs[0], x, x, x)
	t.suppose(e.inputs[1], y, y, y)
	zones := make([]byte, len(e.Limits))
	findings := t.assess()
	for i := range findings {
		zones[i] = byte(ZoneOf(&findings[i]))
	}
	return string(zones)
}

// Zone returns the zone of a limit at a point of the grid.
func (e *Envelope) Zone(limit, across, up int) Zone {
	return Zone(e.zones[e.labels[up*len(e.Across.Values)+across]-1][limit])
}

// A Run is a row of neighbouring points in one zone, From and To included, as
// indexes into the values across.
type Run struct {
	From, To int
	Zone     Zone
}

// Runs returns the zones of a limit along one row of the grid.
func (e *Envelope) Runs(limit, up int) []Run {
	var runs []Run
	for i := range e.Across.Values {
		z := e.Zone(limit, i, up)
		if n := len(runs); n > 0 && runs[n-1].Zone == z {
			runs[n-1].To = i
			continue
		}
		runs = append(runs, Run{i, i, z})
	}
	return runs
}

// An Edge is a place along a row where the zone changes. X is the last float64
// on the side of lower demand, and is printed with Lower.
type Edge struct {
	X           float64
	Below, Over Zone // for smaller and for greater figures
	Lower       quantity.Rounding
}

// Edges works out, to the last float64, where the zone of a limit changes along
// one row of the grid. Each takes about 50 single checks.
func (e *Envelope) Edges(limit, up int) []Edge {
	t := e.trial()
	y := e.Up.Values[up]
	var edges []Edge
	runs := e.Runs(limit, up)
	for i := range runs[:len(runs)-1] {
		below, over := runs[i].Zone, runs[i+1].Zone
		a, b := e.Across.Values[runs[i].To], e.Across.Values[runs[i+1].From]
		stay, lower := below, quantity.Down
		if over.worse() < below.worse() {
			a, b, stay, lower = b, a, over, quantity.Up
		}
		x, _ := change(
			func(x float64) float64 { return float64(e.check(t, x, y)[limit]) },
			func(z float64) bool { return Zone(z) != stay },
			math.NaN(), a, b)
		edges = append(edges, Edge{x, below, over, lower})
	}
	return edges
}

// fill gives the points that were not evaluated the zones of their neighbours:
// between two of them no boundary passes.
func (e *Envelope) fill() {
	n := len(e.Across.Values)
	for i := range e.labels {
		switch {
		case e.labels[i] != 0:
		case i%n > 0:
			e.labels[i] = e.labels[i-1]
		default:
			e.labels[i] = e.labels[i-n]
		}
	}
}
