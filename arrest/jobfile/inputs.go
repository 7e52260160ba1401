package jobfile

import (
	"fmt"
	"slices"
	"sync"

	"arrestcheck/arrest"
	"arrestcheck/arrest/quantity"
)

// inputs builds the one list of inputs of a job, the point at the figures as
// written, and the notes about figures outside the usual.
type inputs struct {
	point   *arrest.Case
	inputs  []arrest.Input
	notes   []arrest.Warning
	persons float64
	path    *connection // nil where there is no connector
	layout  *siting     // nil where there is no layout, or none that is read
	sited   bool        // a layout is written
	refused bool        // a figure that is written, or that has to be, was not read

	position int             // number of the position that is read, 0 outside of them
	figures  []quantity.Band // of the path and the layout, in the order of Case.Figures
}

func setMass(c *arrest.Case, x float64)         { c.Mass = x }
func setTools(c *arrest.Case, x float64)        { c.Tools = x }
func setFreeFall(c *arrest.Case, x float64)     { c.FreeFall = x }
func setInitialSpeed(c *arrest.Case, x float64) { c.InitialSpeed = x }
func setGravity(c *arrest.Case, x float64)      { c.Gravity = x }
func setDistance(c *arrest.Case, x float64)     { c.Distance = x }
func setTime(c *arrest.Case, x float64)         { c.Time = x }
func setRise(c *arrest.Case, x float64)         { c.Rise = x }

// add puts a figure on the list, unless none is given.
func (in *inputs) add(key string, role arrest.Role, e entry, set func(*arrest.Case, float64)) {
	if !e.given {
		in.refused = in.refused || e.key != nil
		return
	}
	in.inputs = append(in.inputs, arrest.Input{Key: key, Role: role, Band: e.band, Source: e.src, Note: e.note, Overridden: e.set, Position: in.position, Set: set})
	if set != nil {
		set(in.point, middle(e.band))
	}
	in.note(key, e, role)
}

// figure puts a figure of the path or the layout on the list. It returns its
// place in Case.Figures, arrest.NoFigure where there is none.
func (in *inputs) figure(t *table, name string, role arrest.Role, e entry) int {
	if !e.given {
		in.refused = in.refused || e.key != nil
		return arrest.NoFigure
	}
	n, room := in.room(t, name, e.band)
	if !room {
		return arrest.NoFigure
	}
	in.add(t.key(name), role, e, func(c *arrest.Case, x float64) { c.Figures[n] = x })
	return n
}

// room takes the next place in Case.Figures, and records the first figure that
// finds none.
func (in *inputs) room(t *table, name string, b quantity.Band) (n int, room bool) {
	n = len(in.figures)
	in.figures = append(in.figures, b)
	if n == arrest.MaxFigures {
		in.refused = true
		t.fault(name, b.Text, fmt.Sprintf("this is the %dth figure of the path and the layout; %d can be calculated with", n+1, n),
			"take out: figures of parts that give way least, the length beside a stiffness, or obstacles that are farthest off")
	}
	return n, n < arrest.MaxFigures
}

// middle returns the figure as written, the low end where a range has none.
func middle(b quantity.Band) float64 {
	if b.Tolerance == quantity.Range {
		return b.Low
	}
	return b.Value
}

// ofPersons are the sections whose usual figures are those of persons: what is
// usual for a tool of any size nobody can say.
var ofPersons = []string{"fall", "layout", "clearance", "stop", "connector", "rated"}

// note remarks on a figure outside what is usual. Masses are usual by person.
func (in *inputs) note(key string, e entry, role arrest.Role) {
	usual := e.key.Usual
	if in.persons == 0 && slices.Contains(ofPersons, e.key.Section) {
		return
	}
	if role == arrest.OfWorker && in.persons > 1 {
		usual = Span{usual.Low * in.persons, usual.High * in.persons}
	}
	if usual.none() || usual.holds(e.band.Low, e.band.High) {
		return
	}
	d := e.band.Unit.Dimension
	in.notes = append(in.notes, arrest.Warning{ID: arrest.Unusual, Args: []arrest.Arg{
		arrest.Text(key), arrest.Text(e.band.Text),
		arrest.Figure(d, usual.Low, quantity.Nearest), arrest.Figure(d, usual.High, quantity.Nearest),
	}})
}

var standardGravity = sync.OnceValue(func() quantity.Band {
	b, err := quantity.Parse(quantity.Acceleration, "9.80665 m/s2")
	if err != nil || b.Value != arrest.StandardGravity {
		panic("jobfile: standard gravity is not read as itself")
	}
	return b
})

// gravity puts the gravity of the place, or the standard one, before the ratings.
func (in *inputs) gravity(t *table) {
	e := t.quantity("gravity")
	e.note = "stated in the job"
	if e.key == nil {
		e = entry{key: t.group.named["gravity"], band: standardGravity(), src: arrest.FromStandard,
			note: "standard gravity, exact", given: true}
	}
	in.add("gravity", arrest.OfPlace, e, setGravity)
}

// rated reads the n-th [[rated]], counted from 0.
func (in *inputs) rated(j *arrest.Job, t *table, n int) {
	r := arrest.Rating{Document: t.text("document"), Conditions: t.text("conditions"), Note: t.text("note")}
	get := func(name string) *quantity.Band {
		e := t.quantity(name)
		if !e.given {
			return nil
		}
		if !e.set { // else no document says it any more
			e.note = r.Document
		}
		in.add(t.path+"."+name, arrest.OfDocument, e, nil)
		return &e.band
	}
	if b := get("total_mass"); b != nil {
		r.TotalMass = *b
	}
	if b := get("free_fall_at_most"); b != nil {
		r.FreeFallAtMost = *b
	}
	r.PeakForceAtMost = get("peak_force_at_most")
	r.MeanForceAtMost = get("mean_force_at_most")
	r.TravelAtMost = get("travel_at_most")
	r.TravelIsDeceleration = t.choice("travel_is") == travelOfBody
	r.Part = in.partNamed(t)
	j.Ratings = append(j.Ratings, r)
}
