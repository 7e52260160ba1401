package reportgen

import (
	"math"
	"slices"
	"strconv"
	"strings"

	"arrestcheck/arrest"
	"arrestcheck/arrest/rig"
	drawing "arrestcheck/reportgen/figure"
)

// A planView is a layout from above: along the edge to the right, outwards down.
type planView struct {
	*drawnFall
	places []arrest.LayoutPlace
	reach  reach // u is along, z is inwards

	scene *drawing.Scene
	view  drawing.View
	box   drawing.Box
	notes []string
}

// The sheet of a plan, mm.
const (
	planMost  = 95.0
	planLeast = 45.0
	abovePlan = 4.0
	belowPlan = 26.0 // room for the dimensions and the scale
	planSide  = 34.0 // room for the dimensions across
)

// planFigure draws the layout from above.
func (b *builder) planFigure() (*drawing.Scene, error) {
	f, err := b.drawn()
	if err != nil {
		return nil, err
	}
	return f.planOf(b.res().Layout.Places)
}

func (f *drawnFall) planOf(places []arrest.LayoutPlace) (*drawing.Scene, error) {
	v := &planView{drawnFall: f, places: places}
	v.reaches()
	if err := v.sheet(); err != nil {
		return nil, err
	}
	v.edge()
	v.obstacles()
	v.falls()
	v.held()
	v.dimensions()
	v.scaleBar(v.scene, v.view)
	v.scene.Notes = v.notes
	return v.scene, nil
}

func (v *planView) at(x, y float64) drawing.Point { return v.view.At(x, -y) }

func (v *planView) sheet() error {
	r := &v.reach
	wide := drawing.Box{Left: sideLeast, Right: drawing.FullWidth - planSide, Top: abovePlan, Bottom: abovePlan + planMost}
	first, err := drawing.Fit(r.left, r.right, r.bottom, r.top, wide)
	if err != nil {
		return &NoFigure{nothingOfASize, nothingSizeHint}
	}
	wide.Bottom = wide.Top + max(first.Length(r.top-r.bottom), planLeast)
	if v.view, err = drawing.Fit(r.left, r.right, r.bottom, r.top, wide); err != nil {
		return &NoFigure{nothingOfASize, nothingSizeHint}
	}
	v.box = wide
	v.scene = v.builder.scene(v.say(planTitle, v.where, orNothing(v.s.File.Document.Title)), wide.Bottom+belowPlan)
	v.scene.Desc = v.say(planDesc, strconv.Itoa(len(v.places)))
	return nil
}

// from returns where the fall from a position begins, in plan; for one behind the
// edge that is at the edge.
func (v *planView) from(i int) (x, y float64) {
	p := &v.places[i].Run.Place
	if p.Status == rig.Restrained {
		return v.stands(i)
	}
	return p.Start.X, p.Start.Y
}

// stands returns the position itself.
func (v *planView) stands(i int) (x, y float64) {
	p := v.places[i].Run.Layout.Positions[v.places[i].Index]
	return p.X, p.Y
}

// away is how far a position is from the anchor in plan, m.
func (v *planView) away(i int) float64 {
	x, y := v.stands(i)
	return math.Hypot(x-v.layout().Anchor.X, y-v.layout().Anchor.Y)
}

func (v *planView) reaches() {
	l := v.layout()
	r := reach{left: math.Inf(1), right: math.Inf(-1), bottom: math.Inf(1), top: math.Inf(-1)}
	r.take(l.Anchor.X, -l.Anchor.Y)
	if l.Edge != rig.NoEdge {
		r.take(l.Anchor.X, 0)
	}
	for i := range v.places {
		x, y := v.from(i)
		r.take(x, -y)
		x, y = v.stands(i)
		r.take(x, -y)
		if reach := v.run.Restraint.Reach; v.places[i].Run.Place.Status == rig.Restrained && isNumber(reach) {
			r.take(l.Anchor.X-reach, -l.Anchor.Y-reach)
			r.take(l.Anchor.X+reach, -l.Anchor.Y)
		}
		if x, y, ok := v.swungTo(i); ok {
			r.take(x, -y)
		}
	}
	size := max(r.right-r.left, r.top-r.bottom, 1)
	left, right, bottom, top := r.left-wider*size, r.right+wider*size, r.bottom-wider*size, r.top+wider*size
	for i := range l.ObstacleCount {
		o := &l.Obstacles[i]
		if o.Kind == rig.Level || o.Moving || o.High.X < left || o.Low.X > right || -o.Low.Y < bottom || -o.High.Y > top {
			continue
		}
		r.take(max(o.Low.X, left), min(-o.Low.Y, top))
		r.take(min(o.High.X, right), max(-o.High.Y, bottom))
	}
	margin := max(0.12*max(r.right-r.left, r.top-r.bottom), 0.5)
	v.reach = reach{r.left - margin, r.right + margin, r.bottom - margin, r.top + margin}
}

// swungTo returns how far the swing from a position would go in plan, as far on
// the other side of what it swings about, or to the structure.
func (v *planView) swungTo(i int) (x, y float64, ok bool) {
	p := &v.places[i].Run.Place
	if p.Status != rig.Known || !p.Plane.Flat || !(p.Plane.Offset > 0) {
		return 0, 0, false
	}
	c := planeOf(v.layout(), p, p.Start)
	arc := c.arc(p)
	end := arc[len(arc)-1].u
	end -= c.pivot
	return p.Plane.X + float64(end*c.dx), p.Plane.Y + float64(end*c.dy), len(arc) > 1
}

// edge draws the edge with the structure behind it.
func (v *planView) edge() {
	if v.layout().Edge == rig.NoEdge {
		return
	}
	b, y := v.box, v.at(0, 0).Y
	s := v.scene
	s.Line(drawing.Point{X: b.Left, Y: y}, drawing.Point{X: b.Right, Y: y}, drawing.Pen{Weight: drawing.Medium})
	s.Hatch([]drawing.Point{{X: b.Left, Y: y}, {X: b.Right, Y: y}, {X: b.Right, Y: y - hatchDeep}, {X: b.Left, Y: y - hatchDeep}}, drawing.Rising)
	spots := func(y float64, lift drawing.Lift) []drawing.Spot {
		var list []drawing.Spot
		for i := range 5 {
			off := float64(i) / 8 * (b.Right - b.Left)
			list = append(list, drawing.Spot{At: drawing.Point{X: b.Left + off, Y: y}, Anchor: drawing.Start, Lift: lift, Gap: 0.3},
				drawing.Spot{At: drawing.Point{X: b.Right - off, Y: y}, Anchor: drawing.End, Lift: lift, Gap: 0.3})
		}
		return list
	}
	s.Text(drawing.Text{Text: surfaceWords[v.sub], Rank: drawing.RankNote, Spots: spots(y-hatchDeep, drawing.Above)})
	s.Text(drawing.Text{Text: edgeKinds[v.layout().Edge], Rank: drawing.RankNote, Spots: spots(y, drawing.Below)})
}

// obstacles draws those with sides and lists the others.
func (v *planView) obstacles() {
	var anywhere, levels, away []string
	for i := range v.layout().ObstacleCount {
		switch o := &v.layout().Obstacles[i]; {
		case o.Moving:
			anywhere = append(anywhere, v.obstacle(i))
		case o.Kind == rig.Level:
			levels = append(levels, v.obstacle(i))
		default:
			a, b := v.at(o.Low.X, o.Low.Y), v.at(o.High.X, o.High.Y)
			if !outlined(v.scene, drawing.Box{Left: a.X, Right: b.X, Top: a.Y, Bottom: b.Y}, v.box, drawing.Pen{Weight: drawing.Medium}, v.obstacle(i)) {
				away = append(away, v.obstacle(i))
			}
		}
	}
	v.notes = append(v.notes, heightsNote)
	v.list(levelsNote, levels)
	v.list(anywhereNote, anywhere)
	v.list(awayNote, away)
	if len(v.plan.Obstacles) == 0 {
		v.notes = append(v.notes, noBelowNote)
	}
}

// list adds a note on some things, if there are any.
func (v *planView) list(p phrase, names []string) {
	if len(names) > 0 {
		v.notes = append(v.notes, v.say(p, strings.Join(names, ", ")))
	}
}

// falls draws the anchor, the positions, the connector and the way of every
// swing.
func (v *planView) falls() {
	l, s := v.layout(), v.scene
	anchor := v.at(l.Anchor.X, l.Anchor.Y)
	s.Named(anchor, drawing.Cross, v.height(anchorWord, l.Anchor.Z))
	var flat, stay []string
	arrows := false
	for i := range v.places {
		p := &v.places[i].Run.Place
		start, stand := v.at(v.from(i)), v.at(v.stands(i))
		name := v.position(v.places[i].Index)
		if stand != start {
			s.Line(stand, start, drawing.HelpPen)
			s.Mark(start, drawing.Filled)
		}
		s.Mark(stand, drawing.Open)
		s.Text(drawing.Text{Text: v.say(fromAnchor, name, v.length(v.away(i))), Rank: drawing.RankPoint, Spots: outward(stand, v.at(0, 0).Y < stand.Y+1)})
		switch x, y, ok := v.swungTo(i); {
		case ok:
			arrows = true
			s.Arrow(start, v.at(x, y), drawing.CurvePen)
			if p.OverEdge {
				s.Line(anchor, start, drawing.Pen{Dash: drawing.Dashes})
			}
			continue
		case p.Status != rig.Known:
			stay = append(stay, name)
		case !p.Plane.Flat:
			flat = append(flat, name)
		}
		s.Line(anchor, start, drawing.Pen{Dash: drawing.Dashes})
	}
	if arrows {
		v.notes = append(v.notes, arrowNote)
	}
	v.list(noPlaneNote, flat)
	v.list(stayNote, stay)
}

// held draws how far the connector reaches, where it keeps a position from the
// edge.
func (v *planView) held() {
	reach := v.run.Restraint.Reach
	if !isNumber(reach) || !slices.ContainsFunc(v.places, func(p arrest.LayoutPlace) bool { return p.Run.Place.Status == rig.Restrained }) {
		return
	}
	anchor := v.at(v.layout().Anchor.X, v.layout().Anchor.Y)
	var runs [][]drawing.Point
	open := false
	for _, p := range drawing.Arc(anchor, v.view.Length(reach), 0, 360) {
		if in := p.X >= v.box.Left && p.X <= v.box.Right && p.Y >= v.box.Top && p.Y <= v.box.Bottom; !in {
			open = false
			continue
		}
		if !open {
			runs, open = append(runs, nil), true
		}
		runs[len(runs)-1] = append(runs[len(runs)-1], p)
	}
	var spots []drawing.Spot
	for _, run := range runs {
		v.scene.Polyline(run, drawing.LimitPen)
		for i := range 9 {
			spots = append(spots, drawing.Around(run[i*(len(run)-1)/8], 0.5)...)
		}
	}
	if len(spots) > 0 {
		v.scene.Text(drawing.Text{Text: v.say(reachLabel, v.length(reach)), Rank: drawing.RankNote, Spots: spots})
	}
}

// outward are the spots around a point, those away from the structure first.
func outward(at drawing.Point, down bool) []drawing.Spot {
	first, last := drawing.Above, drawing.Below
	if down {
		first, last = last, first
	}
	spots := drawing.Around(at, 1)
	for _, s := range spots[:4] {
		s.Lines = 1
		spots = append(spots, s)
	}
	rank := func(s drawing.Spot) int {
		return slices.Index([]drawing.Lift{first, drawing.OnLine, last}, s.Lift)
	}
	slices.SortStableFunc(spots, func(a, b drawing.Spot) int { return rank(a) - rank(b) })
	return spots
}

// dimensions are the distances along the edge below the drawing, and those
// across it at its right.
func (v *planView) dimensions() {
	l := v.layout()
	points := []drawing.Point{v.at(l.Anchor.X, l.Anchor.Y)}
	along, across := []float64{l.Anchor.X}, []float64{l.Anchor.Y}
	if l.Edge != rig.NoEdge {
		across = append(across, 0)
	}
	for i := range v.places {
		x, y := v.stands(i)
		along, across, points = append(along, x), append(across, y), append(points, v.at(x, y))
	}
	b := &v.box
	level := drawing.Chain{Level: true, At: b.Bottom + 5, High: v.scene.Width}
	v.chain(level, along, func(x float64) float64 { return v.at(x, 0).X }, points)
	upright := drawing.Chain{At: b.Right + 6, Low: 1, High: b.Bottom + 4}
	v.chain(upright, across, func(y float64) float64 { return v.at(0, y).Y }, points)
}

// chain draws a chain over stops and leads the nearest point at each stop to it.
func (v *planView) chain(c drawing.Chain, list []float64, place func(float64) float64, points []drawing.Point) {
	stops := stopsOf(list)
	if len(stops) < 2 {
		return
	}
	c.Datum = place(stops[0])
	for i, x := range stops[1:] {
		c.Parts = append(c.Parts, drawing.Dimension{End: place(x), Text: v.length(x - stops[i])})
	}
	v.scene.Chain(c)
	for _, x := range stops {
		var from drawing.Point
		found := false
		for _, p := range points {
			at, far := p.Y, p.X
			if c.Level {
				at, far = p.X, p.Y
			}
			if math.Abs(at-place(x)) < 0.01 && (!found || far > from.Y && c.Level || far > from.X && !c.Level) {
				from, found = p, true
			}
		}
		switch {
		case found && c.Level:
			v.scene.Line(from, drawing.Point{X: from.X, Y: c.At}, drawing.HelpPen)
		case found:
			v.scene.Line(from, drawing.Point{X: c.At, Y: from.Y}, drawing.HelpPen)
		}
	}
}

// stopsOf returns figures in order, each once.
func stopsOf(list []float64) []float64 {
	slices.Sort(list)
	return slices.CompactFunc(list, func(a, b float64) bool { return math.Abs(b-a) < noise })
}
