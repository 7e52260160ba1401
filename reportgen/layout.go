package reportgen

import (
	"math"
	"slices"
	"strings"

	"arrestcheck/arrest"
	"arrestcheck/arrest/quantity"
	"arrestcheck/arrest/rig"
)

// layoutOnly returns the statements on the positions and paths that the figures
// hold for. Where a layout was entered one of them stands in the place of what
// says that none was looked at.
func (s *Sheet) layoutOnly() []statement {
	sub := s.subject()
	if !s.hasLayout() {
		return layoutOnly[sub]
	}
	if sub == aPerson {
		return []statement{hanging, layoutEntered, anchorAndLine}
	}
	return []statement{layoutEntered}
}

func (s *Sheet) hasLayout() bool { return s.File.Job.Point.Layout != nil }

// layoutArguments puts the arguments of a warning about the layout as its
// statement takes them: a difference without sign, no speed where the least is
// not known.
func layoutArguments(w arrest.Warning) []arrest.Arg {
	args := slices.Clone(w.Args)
	for i := range args {
		switch a := &args[i]; {
		case a.Dimension == quantity.Length && w.ID == arrest.LayoutDatumsApart:
			a.SI = math.Abs(a.SI)
		case a.Dimension == quantity.Speed && math.IsNaN(a.SI):
			*a = openEnd
		}
	}
	return args
}

// saidOfPositions are the warnings that say the same of every position they name
// first.
var saidOfPositions = []arrest.WarningID{
	arrest.LayoutRestrained, arrest.LayoutRestrainedInPart, arrest.LayoutEdge, arrest.LayoutEdgeUnrated,
	arrest.LayoutOutOfPlane, arrest.LayoutIntoFace,
}

// joined makes one warning of those that say the same of several positions.
func joined(warnings []arrest.Warning) []arrest.Warning {
	var list []arrest.Warning
	for _, w := range warnings {
		at := slices.IndexFunc(list, func(o arrest.Warning) bool {
			return o.ID == w.ID && slices.Contains(saidOfPositions, w.ID) && slices.Equal(o.Args[1:], w.Args[1:])
		})
		if at < 0 {
			list = append(list, w)
			continue
		}
		args := slices.Clone(list[at].Args)
		args[0] = arrest.Text(cut(args[0].Text) + `", "` + cut(w.Args[0].Text))
		list[at].Args = args
	}
	return list
}

// isLayout reports whether the quantity is one of those printed with the layout.
func isLayout(q arrest.Quantity) bool {
	switch q {
	case arrest.OffsetAngle, arrest.SwingAngle, arrest.SwingDrop, arrest.SwingSpeed, arrest.SpeedAtObstacle,
		arrest.RestraintReach, arrest.TotalFallDistance, arrest.ClearanceNeeded, arrest.ClearanceLeft:
		return true
	}
	return false
}

// layoutSections are the layout position by position, the clearance item by item
// and the swing.
func (b *builder) layoutSections() []Section {
	l := b.res().Layout
	if l == nil {
		return nil
	}
	sections := []Section{{positionsHeading, b.placeBlocks(l)}}
	if l.Plan.Edge != rig.NoEdge {
		sections = append(sections, Section{restraintHeading, b.restraintBlocks(l)})
	}
	return append(append(sections, b.clearanceSections(l)...), b.swingSections(l)...)
}

// placeBlocks are what follows from each position, and which of them is the
// worst for what.
func (b *builder) placeBlocks(l *arrest.LayoutResult) []Block {
	blocks := []Block{{Text: placesText}}
	if worst := b.worstPlaces(); len(worst) > 0 {
		blocks = append(blocks, Block{Text: worstPlacesText, Lines: worst})
	}
	for places := range slices.Chunk(l.Places, placesInTable) {
		blocks = append(blocks, Block{Table: b.placeTable(l, places)})
	}
	return blocks
}

// worstPlaces names the positions that the figures of a layout with several of
// them are of.
func (b *builder) worstPlaces() []Line {
	var list []Line
	for i := range b.res().Estimates {
		e := &b.res().Estimates[i]
		// The reach of the connector is the same from every position.
		if e.Place == "" || e.Quantity == arrest.RestraintReach || e.Quantity != arrest.FreeFall && !isLayout(e.Quantity) {
			continue
		}
		words, place := b.title(e.Quantity), quote(e.Place)
		if e.Evidence == arrest.Modelled {
			words += " " + modelRemark
		}
		at := slices.IndexFunc(list, func(l Line) bool { return strings.HasPrefix(l.Text, place+": ") })
		switch {
		case at < 0:
			list = append(list, Line{Label: "-", Text: place + ": " + words})
		case !strings.HasSuffix(list[at].Text, words):
			list[at].Text += ", " + words
		}
	}
	return list
}

// How positions stand side by side: how many at most, and how wide.
const (
	placesInTable = 3
	placeLabels   = 23
	widestPlace   = 30
	columnGap     = 2
)

// placeTable sets positions side by side: a row for each thing that follows.
func (b *builder) placeTable(l *arrest.LayoutResult, places []arrest.LayoutPlace) *Table {
	t := &Table{Header: []string{whatHead}, Widths: []int{placeLabels}}
	wide := (pageWidth-placeLabels)/len(places) - columnGap
	for i := range places {
		p := &places[i]
		t.Header = append(t.Header, quote(l.Plan.Positions[p.Index].Name)+", "+placeCorners[p.Corner])
		t.Widths = append(t.Widths, min(wide, widestPlace))
	}
	for _, r := range b.placeRows(l) {
		row := Row{Cells: []string{r.what}}
		for i := range places {
			row.Cells = append(row.Cells, r.of(&places[i].Run))
		}
		t.Rows = append(t.Rows, row)
	}
	return t
}

// A placeRow is one thing that follows from a position.
type placeRow struct {
	what string
	of   func(*arrest.LayoutRun) string
}

func (b *builder) placeRows(l *arrest.LayoutResult) []placeRow {
	length := func(what string, of func(*rig.Place) float64) placeRow {
		return placeRow{what, func(r *arrest.LayoutRun) string { return b.ofPlace(&r.Place, quantity.Length, of(&r.Place)) }}
	}
	angle := func(q arrest.Quantity, of func(*rig.Place) float64) placeRow {
		return placeRow{title(q), func(r *arrest.LayoutRun) string { return b.ofPlace(&r.Place, quantity.Angle, of(&r.Place)) }}
	}
	rows := []placeRow{
		{followsWord, func(r *arrest.LayoutRun) string { return placeStatus[r.Place.Status] }},
		length(offsetInPlan, func(p *rig.Place) float64 { return p.Offset }),
		length(title(arrest.FreeFall), func(p *rig.Place) float64 { return p.FreeFall }),
	}
	if heldOtherwise(l) {
		rows = append(rows, length(heldFallWord, func(p *rig.Place) float64 { return p.HeldFreeFall }))
	}
	rows = append(rows,
		angle(arrest.OffsetAngle, func(p *rig.Place) float64 { return p.OffsetAngle }),
		angle(arrest.SwingAngle, func(p *rig.Place) float64 { return p.SwingAngle }),
		length(title(arrest.SwingDrop), func(p *rig.Place) float64 { return p.SwingDrop }),
		length(tautHeight, func(p *rig.Place) float64 { return p.Taut.Z }),
		length(lowestWord, func(p *rig.Place) float64 { return p.Lowest }))
	if l.Plan.Edge != rig.NoEdge {
		rows = append(rows, placeRow{edgeWord, edgeText})
	}
	return append(rows, placeRow{swingWord, planeText})
}

// heldOtherwise reports whether a connector that is held on the edge gives
// another free fall than one that slides along it.
func heldOtherwise(l *arrest.LayoutResult) bool {
	return slices.ContainsFunc(l.Places, func(p arrest.LayoutPlace) bool {
		return p.Run.Place.Status == rig.Known && !(math.Abs(p.Run.Place.FreeFall-p.Run.Place.HeldFreeFall) < noise)
	})
}

// edgeText says whether the connector comes to the edge.
func edgeText(r *arrest.LayoutRun) string {
	switch {
	case r.Place.Status == rig.Restrained:
		return edgeNever
	case r.Place.Status != rig.Known:
		return notKnown
	case r.Place.OverEdge:
		return edgeAtPull
	case r.Place.EdgeLater:
		return edgeLater
	}
	return edgeNever
}

// planeText says where the swing goes.
func planeText(r *arrest.LayoutRun) string {
	switch p := &r.Place; {
	case p.Status == rig.Restrained:
		return noFall
	case p.Status != rig.Known:
		return notKnown
	case !p.Plane.Flat:
		return noPlane
	case p.Plane.Offset < noise:
		return noSwing
	case p.Plane.IntoFace:
		return intoFace
	}
	return uprightPlane
}

// ofPlace returns a figure of a position, or why it has none.
func (b *builder) ofPlace(p *rig.Place, d quantity.Dimension, si float64) string {
	if math.IsNaN(si) && p.Status == rig.Restrained {
		return noFall
	}
	return b.known(d, si)
}

// known returns a figure with the digits of page 1, or that it is not known.
func (b *builder) known(d quantity.Dimension, si float64) string {
	if math.IsNaN(si) {
		return notKnown
	}
	return b.three(d, si)
}

// restraintBlocks hold the reach of the connector against the edge from every
// position.
func (b *builder) restraintBlocks(l *arrest.LayoutResult) []Block {
	t := &Table{Header: restraintHead, Widths: []int{24, 17, 17, 16}}
	for i := range l.Places {
		p := &l.Places[i]
		r := &p.Farthest
		left, gone := b.marginText(r.Margin[p.Index])
		t.Rows = append(t.Rows, Row{Loud: gone, Cells: []string{
			quote(l.Plan.Positions[p.Index].Name), b.known(quantity.Length, r.Reach), b.known(quantity.Length, r.EdgeDistance[p.Index]), left,
		}})
	}
	return []Block{{Text: restraintText}, {Table: t}, {Text: b.restraintSays(l)}}
}

// marginText says what is left of the way to the edge.
func (b *builder) marginText(margin float64) (text string, gone bool) {
	switch {
	case math.IsNaN(margin):
		return notKnown, true
	case margin > 0:
		return b.d.figure(quantity.Length, margin, pageDigits, quantity.Down), false
	}
	return edgeCrossed, true
}

// restraintSays says whether the edge can be gone over anywhere.
func (b *builder) restraintSays(l *arrest.LayoutResult) string {
	for i := range l.Places {
		if r := &l.Places[i].Farthest; r.Passed {
			return b.say(restraintOver, b.known(quantity.Length, r.Nearest))
		}
	}
	return restraintHolds
}

func (b *builder) hasLayout() bool { return b.s.hasLayout() }

// datum says what the figures of the sheet are measured from.
func (b *builder) datum() string {
	if b.hasLayout() {
		return holdsForLayout[b.sub]
	}
	return holdsFor[b.sub]
}

// pathAssumption is what the model of the path takes for given.
func (b *builder) pathAssumption() string {
	if b.hasLayout() {
		return pathOfLayout
	}
	return pathAssumption
}

// standing are the assumptions of every sheet of this kind; with a layout those
// about it stand in the places of those that it takes away.
func (b *builder) standing() []string {
	list := standingAssumptions[b.sub]
	if !b.hasLayout() {
		return list
	}
	list = slices.Clone(list)
	for i, text := range list {
		if other, is := layoutAssumptions[text]; is {
			list[i] = other
		}
	}
	return append(list, moreAssumptions...)
}

// notLookedAt is what no sheet of this kind looks at; with a layout what is left
// of it.
func (b *builder) notLookedAt() []string {
	list := notChecked[b.sub]
	if !b.hasLayout() {
		return list
	}
	list = slices.Clone(list)
	for i, text := range list {
		if other, is := layoutNotChecked[text]; is {
			list[i] = other
		}
	}
	return list
}

// layoutWay says what would bound a quantity where there is a layout; ok is false
// where that has nothing of its own to say.
func (b *builder) layoutWay(q arrest.Quantity) (way string, ok bool) {
	l := b.res().Layout
	switch q {
	case arrest.ClearanceNeeded, arrest.ClearanceLeft:
	case arrest.SwingSpeed, arrest.SpeedAtObstacle:
		if b.plan() == nil {
			return swungWay, true
		}
		return "", false
	default:
		return "", false
	}
	switch {
	case l == nil || l.Plan.Clearance == nil:
		return itemsWay, true
	case len(l.Plan.Obstacles) == 0 && q == arrest.ClearanceLeft:
		return obstacleWay, true
	}
	var missing rig.Items
	for _, c := range b.clearings(l) {
		missing |= c.sumOfDatum().Missing
	}
	if missing == 0 {
		return "", false
	}
	return b.say(missingWay, arrest.ItemNames(missing)), true
}
