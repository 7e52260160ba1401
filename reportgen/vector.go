package reportgen

import (
	"slices"
	"strconv"

	"arrestcheck/arrest"
)

// A vector is a quantity with its components and its direction, as estimates
// (M-60).
type vector struct {
	magnitude, direction arrest.Quantity
	components           [3]arrest.Quantity
}

var vectors = [...]vector{
	{arrest.Impulse, arrest.ImpulseDirection, [3]arrest.Quantity{arrest.ImpulseX, arrest.ImpulseY, arrest.ImpulseZ}},
	{arrest.StoppingForce, arrest.StoppingForceDirection, [3]arrest.Quantity{arrest.StoppingForceX, arrest.StoppingForceY, arrest.StoppingForceZ}},
}

// isOfVector reports whether the quantity is a component or a direction.
func isOfVector(q arrest.Quantity) bool {
	for i := range vectors {
		if q == vectors[i].direction || slices.Contains(vectors[i].components[:], q) {
			return true
		}
	}
	return false
}

// find returns the first estimate of a quantity, nil where there is none.
func (b *builder) find(q arrest.Quantity) *arrest.Estimate {
	for i := range b.res().Estimates {
		if e := &b.res().Estimates[i]; e.Quantity == q {
			return e
		}
	}
	return nil
}

// overTime and overDistance report whether an estimate of the mean stopping
// force is the one by this route.
func (b *builder) overTime(e *arrest.Estimate) bool     { return b.rests(e, loadTime) }
func (b *builder) overDistance(e *arrest.Estimate) bool { return b.rests(e, loadDistance) }

func loadTime(c *arrest.Case) float64     { return c.Load.Time }
func loadDistance(c *arrest.Case) float64 { return c.Load.Distance }

// rests reports whether an input that sets the field of a Case is among those
// of the estimate.
func (b *builder) rests(e *arrest.Estimate, field func(*arrest.Case) float64) bool {
	for _, i := range e.Uses {
		if set := b.res().Inputs[i].Set; set != nil {
			var c arrest.Case
			set(&c, 1)
			if field(&c) != 0 {
				return true
			}
		}
	}
	return false
}

// route names the route of a mean stopping force, which has two.
func (b *builder) route(e *arrest.Estimate) string {
	switch {
	case e.Quantity != arrest.StoppingForce:
		return ""
	case b.overTime(e):
		return timeRoute
	case b.overDistance(e):
		return distanceRoute
	}
	return ""
}

// vectorSections are the table of vectors and what the two routes come to; none
// for a fall.
func (b *builder) vectorSections() []Section {
	if b.sub != aLoad {
		return nil
	}
	var sections []Section
	if b.find(arrest.ImpulseX) != nil {
		sections = append(sections, Section{vectorHeading, []Block{{Table: b.vectorTable()}}})
	}
	return append(sections, Section{routesHeading, []Block{{Lines: b.routes()}}})
}

// vectorTable has a column for each vector and a row for each component, the
// magnitude and the direction.
func (b *builder) vectorTable() *Table {
	t := &Table{Header: vectorHead, Widths: []int{20, 28, 28}}
	row := func(name string, of func(v *vector) string) {
		r := Row{Cells: []string{name}}
		for i := range vectors {
			r.Cells = append(r.Cells, of(&vectors[i]))
		}
		t.Rows = append(t.Rows, r)
	}
	for axis, name := range axisNames {
		if b.find(vectors[0].components[axis]) != nil {
			row(name, func(v *vector) string { return b.component(v, v.components[axis], notFromEntries) })
		}
	}
	row(magnitudeName, func(v *vector) string { return b.component(v, v.magnitude, notFromEntries) })
	none := anyDirection
	if b.find(vectors[0].components[2]) != nil {
		none = inSpace
	}
	row(directionName, func(v *vector) string { return b.component(v, v.direction, none) })
	return t
}

// component returns one entry of the table of vectors: none says what stands
// where there is no estimate although the vector is known.
func (b *builder) component(v *vector, q arrest.Quantity, none string) string {
	known := b.find(v.components[0])
	e := b.find(q)
	if q == arrest.StoppingForce && e != nil && !b.overTime(e) {
		e = nil // over the distance: no vector
	}
	switch {
	case known == nil:
		return notFromEntries
	case e == nil:
		return none
	}
	return b.estimate(e, pageDigits)
}

// routes says what the mean stopping force is by each route, and their ratio.
func (b *builder) routes() []Line {
	time, distance := notFromEntries, notFromEntries
	if axes := b.s.File.Job.Point.Load.Axes; axes > 1 {
		distance = b.say(straightOnly, strconv.Itoa(axes))
	}
	for i := range b.res().Estimates {
		e := &b.res().Estimates[i]
		switch {
		case e.Quantity != arrest.StoppingForce:
		case b.overTime(e):
			time = b.estimate(e, pageDigits)
		case b.overDistance(e):
			distance = b.estimate(e, pageDigits)
		}
	}
	ratio := oneRouteOnly
	if e := b.find(arrest.ShapeRatio); e != nil {
		ratio = b.estimate(e, pageDigits)
	}
	return []Line{{Label: timeRouteName, Text: time}, {Label: distanceRouteName, Text: distance}, {Label: ratioName, Text: ratio}}
}
