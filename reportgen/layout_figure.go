package reportgen

import (
	"math"
	"strconv"

	"arrestcheck/arrest"
	"arrestcheck/arrest/quantity"
	"arrestcheck/arrest/rig"
	drawing "arrestcheck/reportgen/figure"
)

// The kinds of figures that a sheet can be drawn as.
const (
	ElevationFigure   = "elevation"    // the layout from the side, to scale
	PlanFigure        = "plan"         // the layout from above, to scale
	ForceTimeFigure   = "force-time"   // the modelled arrest, force over time
	ForceTravelFigure = "force-travel" // the same over the travel
)

// FigureKinds returns the kinds that Figure draws.
func FigureKinds() []string {
	return []string{ElevationFigure, PlanFigure, ForceTimeFigure, ForceTravelFigure}
}

// NoFigure is the error of Figure: Reason says what the job lacks, Hint what to
// do about it.
type NoFigure struct{ Reason, Hint string }

func (e *NoFigure) Error() string { return e.Reason }

// Figure draws a sheet as one of FigureKinds; it panics for any other kind. A job
// that lacks what the figure needs has none: the error is a *NoFigure.
//
// An elevation is of the position that leaves the least room or, where no
// clearance was entered, that of the greatest free fall.
func Figure(kind string, s *Sheet, units UnitChoice) (*drawing.Scene, error) {
	b := newBuilder(s, units)
	switch kind {
	case ElevationFigure:
		return b.elevation()
	case PlanFigure:
		return b.planFigure()
	case ForceTimeFigure:
		return b.pathFigure(overTime)
	case ForceTravelFigure:
		return b.pathFigure(overTravel)
	}
	panic("reportgen: no figure " + strconv.Quote(kind))
}

// Draw adds a figure of the sheet behind the report. The error is that of Figure.
func (r *Report) Draw(kind string, s *Sheet, units UnitChoice) error {
	scene, err := Figure(kind, s, units)
	if err == nil {
		r.Sections = append(r.Sections, Section{drawnHeading, []Block{{Figure: scene}}})
	}
	return err
}

// A drawnFall is the fall from one position of a layout, as figures show it.
type drawnFall struct {
	builder
	plan  *arrest.LayoutPlan
	run   *arrest.LayoutRun
	index int           // of the position
	where string        // at which of the entries, in words
	unit  quantity.Unit // of every length

	room     *arrest.Room // nil where no clearance was entered
	modelled bool         // the room is that with the travel of the connector path

	// travel is how far the D-ring goes on below the lowest point of a swing
	// without stretch, m: NaN where nothing says so, +Inf where nothing stops it.
	travel float64
	path   bool              // it is that of the connector path
	trace  []rig.PlanarState // of the swing in time, from the first pull on
}

// drawn picks the position that a figure shows.
func (b *builder) drawn() (*drawnFall, error) {
	l := b.res().Layout
	if l == nil {
		return nil, &NoFigure{noLayoutDrawn, noLayoutHint}
	}
	at := &l.Places[max(l.Worst, 0)]
	where := drawnAt[at.Corner]
	if l.Tightest != nil {
		at = l.Tightest
		if where = drawnAt[at.Corner]; at.Corner != arrest.AtWritten {
			where = tightestAt
		}
	}
	f := newDrawnFall(b, l.Plan, &at.Run, at.Index, where)
	if f.path = at.Case.Path != nil && f.known(); f.path {
		f.model(&at.Case)
	}
	return f, nil
}

// newDrawnFall takes all but what the model of a connector path adds.
func newDrawnFall(b *builder, plan *arrest.LayoutPlan, run *arrest.LayoutRun, index int, where string) *drawnFall {
	f := &drawnFall{builder: *b, plan: plan, run: run, index: index, where: where, travel: nan64}
	f.unit = b.d.pair(quantity.Length, quantity.Unit{}, 1)[0]
	switch given, modelled := &run.Given, &run.Modelled; {
	case modelled.Known && !(given.Known && given.Counts > modelled.Counts):
		f.room, f.modelled = modelled, true
	case given.Known:
		f.room = given
	}
	if f.room != nil && !f.modelled {
		f.travel = enteredTravel(&f.room.Clearance)
	}
	return f
}

var nan64 = math.NaN()

// enteredTravel is how far the entries let the D-ring go below the first pull, m.
func enteredTravel(c *rig.Clearance) float64 {
	e := &c.Entries[rig.ItemDeceleration]
	if !e.Present {
		return nan64
	}
	way := e.Value
	for _, it := range []rig.Item{rig.ItemLineStretch, rig.ItemAnchor} {
		if c.Entries[it].Present && !e.Includes.Has(it) {
			way += c.Entries[it].Value
		}
	}
	return way
}

// model takes the travel and the swing of the connector path.
func (f *drawnFall) model(c *arrest.Case) {
	if f.room != nil && !f.modelled {
		f.path = false // the entered travel is the one of the chain
		return
	}
	var p arrest.Point
	arrest.At(c, &p)
	if p.Model == nil || p.Model.Failed != nil {
		return
	}
	f.travel = p.Model.Run.StoppingDistance
	if p.Model.Swings {
		f.travel = p.Layout.Planar.Lowest.Drop - f.place().FreeFall - f.place().SwingDrop
		if series, err := arrest.SwingSeries(c); err == nil && isNumber(f.travel) {
			f.trace = series
		}
	}
	if f.room != nil {
		f.travel = f.room.Travel
	}
}

func (f *drawnFall) place() *rig.Place   { return &f.run.Place }
func (f *drawnFall) layout() *rig.Layout { return &f.run.Layout }

// start is where the D-ring is before the fall: at the edge where the worker goes
// over it, at the position where the connector does not let that happen.
func (f *drawnFall) start() rig.Spot {
	if f.place().Status == rig.Restrained {
		at := f.layout().Positions[f.index]
		return rig.Spot{X: at.X, Y: at.Y, Z: f.layout().DRing}
	}
	return f.place().Start
}

// known reports whether a fall follows from the layout.
func (f *drawnFall) known() bool { return f.place().Status == rig.Known }

// position is the name of the position.
func (f *drawnFall) position(i int) string { return flat(f.plan.Positions[i].Name) }

// length writes a length in the unit of the drawing.
func (f *drawnFall) length(si float64) string {
	if math.Abs(si) < noise {
		si = 0
	}
	return format(si, f.unit, pageDigits, quantity.Nearest)
}

// height names something with its height above the surface.
func (f *drawnFall) height(what string, z float64) string {
	text := f.length(z)
	if z >= noise {
		text = "+" + text
	}
	return f.say(atHeight, what, text)
}

// obstacle names an obstacle with the height of its top.
func (f *drawnFall) obstacle(i int) string {
	return f.height(flat(f.plan.Obstacles[i].Name), f.layout().Obstacles[i].High.Z)
}

// scene is an empty drawing to scale with what every figure carries.
func (b *builder) scene(title string, height float64) *drawing.Scene {
	s := drawing.NewScene(title, height)
	s.ToScale, s.Statement = true, notAPermission
	if b.s.isExample() {
		s.Stamp = exampleStamp
	}
	return s
}

// hatchDeep is the depth of the hatching along a surface, mm.
const hatchDeep = 3.2

// scaleBar puts the scale below a drawing.
func (f *drawnFall) scaleBar(s *drawing.Scene, v drawing.View) {
	s.ScaleBar(drawing.Point{X: 4, Y: s.Height - 7}, v, f.unit.Symbol, 1/f.unit.From(1))
}
