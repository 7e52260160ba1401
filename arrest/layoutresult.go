package arrest

import (
	"math"
	"strings"

	"arrestcheck/arrest/quantity"
	"arrestcheck/arrest/rig"
)

// value returns the output i at the figures as written; of several positions
// that of the worst.
func (ev *evaluation) value(i int) float64 {
	o := &outputs[i]
	of := func(p *Point) float64 {
		x := o.low(p)
		if o.evidence == Shape && x != o.of(p) {
			return nan // two ends, even at one point
		}
		return x
	}
	x := of(&ev.written)
	l := ev.job.Point.Layout
	if l == nil || len(l.Positions) < 2 {
		return x
	}
	var p Point
	for k := 1; k < len(l.Positions); k++ {
		c := ev.job.Point
		c.Position = k
		At(&c, &p)
		y := of(&p)
		if o.quantity == ClearanceLeft && y < x || o.quantity != ClearanceLeft && y > x || math.IsNaN(x) {
			x = y
		}
	}
	return x
}

// laidOut adds to an estimate what belongs to the layout: which position it is
// of, what keeps it from clearing anything, and the bound of a sum that lacks
// an item. It reports whether anything is left to say.
func (ev *evaluation) laidOut(i int, e *Estimate) bool {
	o, l := &outputs[i], ev.job.Point.Layout
	if o.rests&(onFall|onLayout) == 0 {
		return true
	}
	if len(l.Positions) > 1 {
		e.Place = l.Positions[ev.spans.at[i]].Name
	}
	ev.doubt(e)
	floor := false
	for k := range ev.spans.layouts {
		n := &ev.spans.layouts[k]
		floor = floor || e.Evidence == Given && n.givenFloor || e.Evidence == Modelled && n.modelFloor
		if e.Evidence == Modelled && (e.Quantity == ClearanceNeeded || e.Quantity == ClearanceLeft || e.Quantity == TotalFallDistance) {
			if n.travel > e.Travel { // NaN where no run told it
				e.Travel = n.travel
			}
		}
	}
	if e.Quantity == FreeFall {
		e.Method = "M-20"
	}
	if o.rests&ofLayout != 0 && e.Evidence == Shape {
		e.From = Inextensible
	}
	open := ev.restrainedInPart() && e.Quantity != RestraintReach && e.Quantity != OffsetAngle
	if e.Quantity == ClearanceLeft && floor && (open || ev.leftOpen(e.Evidence)) {
		return false // an item is missing below, and nothing bounds it above
	}
	swung := e.Quantity == TotalFallDistance && e.Evidence == Given && ev.swingsToo()
	switch {
	case open:
		if e.open(); floor && e.Quantity == ClearanceNeeded || swung {
			e.Bound = AtLeast
		}
	case e.Evidence == Modelled && ev.anySwing() && e.Method == "M-15":
		e.Method = "M-24"
	case o.rests&ofLayout != 0 && e.Evidence == Shape:
		ev.unstretched(e)
	case e.Quantity == SwingSpeed && ev.straightToo():
		e.Low = 0
	case e.Quantity == SpeedAtObstacle && ev.missed():
		e.Low = 0
	case floor && e.Quantity == ClearanceNeeded:
		e.Bound = AtLeast
	case swung:
		e.Bound = AtLeast
		if ev.straightToo() {
			e.Low = min(e.Low, ev.spans.of[indexOf(FreeFall, Given)].low.value)
		}
	case e.Quantity == ClearanceLeft && ev.leftOpen(e.Evidence):
		e.Bound, e.High, e.Value = AtLeast, nan, nan
	case floor && e.Quantity == ClearanceLeft:
		e.Bound, e.Low, e.Value = AtMost, nan, nan
	}
	return true
}

// straightToo reports whether from some position the body swings for a part of
// the entries and stops straight down for another.
func (ev *evaluation) straightToo() bool {
	for k := range ev.spans.layouts {
		if n := &ev.spans.layouts[k]; 0 < n.straight && n.straight < n.known {
			return true
		}
	}
	return false
}

// swingsToo reports whether the body swings from some position, for some of the
// entries: the way down to rest is then not known there without a path.
func (ev *evaluation) swingsToo() bool {
	for k := range ev.spans.layouts {
		if n := &ev.spans.layouts[k]; n.straight < n.known {
			return true
		}
	}
	return false
}

// open opens the good end of an estimate: for a part of the entries the body does
// not fall at all.
func (e *Estimate) open() {
	if e.Quantity == ClearanceLeft {
		e.Bound, e.High, e.Value = AtLeast, nan, nan
		return
	}
	e.Low = 0
}

// restrainedInPart reports whether a position is restrained for a part of the
// entries only.
func (ev *evaluation) restrainedInPart() bool {
	for k := range ev.spans.layouts {
		if n := &ev.spans.layouts[k]; 0 < n.restrained && n.restrained < n.tried {
			return true
		}
	}
	return false
}

// fastestMissed bounds the speed at the point where a swing without stretch just
// comes to an obstacle: where it misses all of them for a part of the entries
// only, and where the side of a box may be anywhere on its way.
func (ev *evaluation) fastestMissed() float64 {
	most := 0.0
	for k := range ev.spans.layouts {
		if n := &ev.spans.layouts[k]; 0 < n.touched && (n.touched < n.tried || n.tried > 1 && ev.job.Point.Layout.boxed()) {
			most = max(most, n.fastest)
		}
	}
	return most
}

// unstretched puts the ends of a speed right that holds if the connector does
// not stretch.
func (ev *evaluation) unstretched(e *Estimate) {
	switch {
	case e.Bound == AtMost:
		e.Low, e.Value = nan, nan
		e.High = max(e.High, ev.fastestMissed())
	case ev.straightToo():
		e.Low = 0
		for k := range ev.spans.layouts {
			e.High = greater(e.High, ev.spans.layouts[k].fastest)
		}
	case e.Low < e.High && math.IsNaN(e.Value):
		e.Low = min(e.Low, ev.leastSwing())
	}
}

// leastSwing bounds the least speed of the fastest swing without stretch from
// below. It is not monotone in the offset: each of its terms at its least is a
// bound, position by position.
func (ev *evaluation) leastSwing() float64 {
	parts, most := ev.spans.parts, 0.0
	if len(parts) == 0 {
		parts = []*spans{ev.spans}
	}
	for _, part := range parts {
		least := func(q Quantity) float64 { return part.of[indexOf(q, Given)].low.value }
		sin := math.Sin(least(SwingAngle))
		v2 := float64(ev.lo.InitialSpeed*ev.lo.InitialSpeed) + float64(2*ev.lo.Gravity*least(FreeFall))
		most = greater(most, math.Sqrt(float64(v2*sin*sin)+float64(2*ev.lo.Gravity*least(SwingDrop))))
	}
	return most
}

// leftOpen reports whether what is left is that to a box which is in the way
// for a part of the entries at most.
func (ev *evaluation) leftOpen(e Evidence) bool {
	k := 0
	if e == Modelled {
		k = 1
	}
	for i := range ev.spans.layouts {
		if ev.spans.layouts[i].open[k] {
			return true
		}
	}
	return false
}

// missed reports whether the swing misses every obstacle for a part of the
// entries.
func (ev *evaluation) missed() bool {
	for k := range ev.spans.layouts {
		if n := &ev.spans.layouts[k]; n.passed < n.tried {
			return true
		}
	}
	return false
}

// doubt marks an estimate with what the layout comes to that no figure of it
// can clear.
func (ev *evaluation) doubt(e *Estimate) {
	for k := range ev.spans.layouts {
		n := &ev.spans.layouts[k]
		e.Edge = e.Edge || n.edge > 0
		e.Strikes = e.Strikes || n.struck()
		e.Unreached = e.Unreached || 0 < n.restrained && n.restrained < n.tried || n.unflat > 0 || ev.goneOver(n)
	}
}

// anySwing reports whether the body swings from any position.
func (ev *evaluation) anySwing() bool {
	s := &ev.spans.of[indexOf(SwingSpeed, Modelled)]
	return s.known()
}

// layout gathers the positions for the report.
func (ev *evaluation) layout() {
	plan := ev.job.Point.Layout
	if plan == nil {
		return
	}
	res := &LayoutResult{Plan: plan, Worst: -1}
	written := ev.allWritten(ev.restsOn(onMass | onFall | onDistance | onParts | onLayout | onClearance))
	most := nan
	for k := range plan.Positions {
		at := ev.spans
		if len(at.parts) > 0 {
			at = at.parts[k]
		}
		place := LayoutPlace{Index: k, Corner: AtWritten, Case: ev.job.Point}
		fall := &at.of[indexOf(FreeFall, Given)]
		if !written {
			place.Corner, place.Case = AtHigh, at.base
			if fall.known() {
				place.Case = at.caseAt(fall.high)
			} else {
				place.Corner, place.Case = AtReach, ev.farthestFrom(k)
			}
		}
		place.Case.Position = k
		place.Run = *LayoutAt(&place.Case)
		place.Farthest = ev.farthest(k)
		res.Places = append(res.Places, place)
		if fall.known() && !(fall.high.value <= most) {
			res.Worst, most = k, fall.high.value
		}
	}
	res.Tightest = ev.tightest()
	ev.res.Layout = res
}

// farthest returns the reach against the edge at the point where it goes farthest
// from the position k.
func (ev *evaluation) farthest(k int) rig.Restraint {
	c := ev.farthestFrom(k)
	c.Path = nil
	return LayoutAt(&c).Restraint
}

// farthestFrom returns the point of the bands where the connector is longest, the
// anchor nearest to the edge and at the height of a D-ring that is carried, and
// the position k straight before the anchor, as far as the bands go.
func (ev *evaluation) farthestFrom(k int) Case {
	plan, c := ev.job.Point.Layout, ev.lo
	c.Position = k
	nearest := func(figure int, x float64) {
		c.Figures[figure] = max(ev.lo.Figures[figure], min(x, ev.hi.Figures[figure]))
	}
	for _, figure := range [...]int{plan.Length, plan.Slack, plan.DRing} {
		if figure != NoFigure {
			c.Figures[figure] = ev.hi.Figures[figure]
		}
	}
	nearest(plan.AnchorHeight, 0)
	nearest(plan.Positions[k].Along, 0)
	return c
}

// goneOver reports whether from a position at which the connector holds the
// upright body back, over all of the entries, the edge can be gone over all the
// same somewhere in them: with the D-ring lower, bent or kneeling.
func (ev *evaluation) goneOver(n *layoutNotes) bool {
	return n.restrained == n.tried && ev.farthest(n.position).Margin[n.position] <= 0
}

// tightest returns the point that leaves the least room, or needs the most.
func (ev *evaluation) tightest() *LayoutPlace {
	for _, e := range [...]Evidence{Modelled, Given} {
		left, needed := &ev.spans.of[indexOf(ClearanceLeft, e)], &ev.spans.of[indexOf(ClearanceNeeded, e)]
		var c Case
		switch {
		case left.known():
			c = ev.spans.caseAt(left.low)
		case needed.known():
			c = ev.spans.caseAt(needed.high)
		default:
			continue
		}
		p := &LayoutPlace{Index: c.Position, Corner: AtHigh, Case: c, Run: *LayoutAt(&c)}
		if left.known() && left.low.value == left.high.value && needed.low.value == needed.high.value {
			p.Corner = AtWritten
		}
		return p
	}
	return nil
}

// warnLayout says what the layout has to say, the loudest first.
func (ev *evaluation) warnLayout() {
	plan := ev.job.Point.Layout
	if plan == nil {
		return
	}
	for k := range ev.spans.layouts {
		ev.warnStrikes(plan, &ev.spans.layouts[k])
	}
	for k := range ev.spans.layouts {
		ev.warnPosition(plan, &ev.spans.layouts[k])
	}
	ev.warnAnchorLow(plan)
	ev.warnRoom(plan)
	ev.warnSwing()
}

// warnStrikes says what the body comes to from one position.
func (ev *evaluation) warnStrikes(plan *LayoutPlan, n *layoutNotes) {
	name := Text(plan.Positions[n.position].Name)
	speed := func(x float64) Arg { return Figure(quantity.Speed, x, quantity.Nearest) }
	for i := range n.strikes {
		s, o := &n.strikes[i], &plan.Obstacles[i]
		switch {
		case math.IsNaN(s.high):
			continue
		case s.falling:
			ev.tell(LayoutStrikesFalling, name, Text(o.Name), speed(s.high))
		default:
			ev.tell(LayoutStrikes, name, Text(o.Name), speed(s.low), speed(s.high))
		}
		if !math.IsNaN(s.force) {
			over := ev.figureBand(o.StopOver)
			ev.tell(LayoutStrikeForce, Text(o.Name), length(over.High), Figure(quantity.Force, s.force, quantity.Down))
		}
	}
	for i, left := range n.left {
		if left < 0 {
			ev.tell(LayoutShort, name, Text(plan.Obstacles[i].Name), Figure(quantity.Length, -left, quantity.Up))
		}
	}
}

// figureBand returns the band of the input that writes a figure.
func (ev *evaluation) figureBand(figure int) quantity.Band {
	for i := range ev.job.Inputs {
		in := &ev.job.Inputs[i]
		if in.Set == nil {
			continue
		}
		var c Case
		in.Set(&c, 1)
		if c.Figures[figure] == 1 {
			return in.Band
		}
	}
	return quantity.Of(quantity.Length, nan)
}

// warnPosition says what is not known or not modelled of one position.
func (ev *evaluation) warnPosition(plan *LayoutPlan, n *layoutNotes) {
	name := Text(plan.Positions[n.position].Name)
	switch {
	case ev.goneOver(n):
		r := ev.farthest(n.position)
		ev.tell(LayoutGoneOver, name, length(r.Reach), length(r.EdgeDistance[n.position]))
	case n.restrained == n.tried:
		ev.tell(LayoutRestrained, name)
	case n.restrained > 0:
		ev.tell(LayoutRestrainedInPart, name)
	}
	switch {
	case n.unrated > 0:
		ev.tell(LayoutEdgeUnrated, name)
	case n.edge > 0:
		ev.tell(LayoutEdge, name, Text(plan.RatedBy))
	}
	if n.face > 0 {
		ev.tell(LayoutIntoFace, name)
	}
	if n.unflat > 0 {
		ev.tell(LayoutOutOfPlane, name)
	}
}

// warnAnchorLow says that the anchor is below the D-ring: the fall is longer
// than the connector.
func (ev *evaluation) warnAnchorLow(plan *LayoutPlan) {
	if ev.lo.Figures[plan.AnchorHeight] < ev.hi.Figures[plan.DRing] {
		fall := ev.spans.of[indexOf(FreeFall, Given)].high.value
		if l := ev.lo.Figures[plan.Length]; fall > l {
			ev.tell(LayoutAnchorLow, length(fall), length(l))
		}
	}
}

// itemWords are the items of a clearance as warnings name them.
var itemWords = [rig.ItemCount]string{
	rig.ItemFreeFall: "free fall", rig.ItemConnector: "connector", rig.ItemDeceleration: "deceleration distance",
	rig.ItemLineStretch: "line stretch", rig.ItemHarness: "harness stretch", rig.ItemFeet: "D-ring to feet",
	rig.ItemAnchor: "give of the anchor", rig.ItemSwingDrop: "drop of the swing", rig.ItemMargin: "margin",
}

// ItemWord returns the plain name of an item of a clearance.
func ItemWord(it rig.Item) string { return itemWords[it] }

// ItemNames lists the items of a set by their plain names.
func ItemNames(set rig.Items) string {
	var names []string
	for it := range rig.ItemCount {
		if set.Has(it) {
			names = append(names, itemWords[it])
		}
	}
	return strings.Join(names, ", ")
}

// warnRoom says what a clearance lacks.
func (ev *evaluation) warnRoom(plan *LayoutPlan) {
	if plan.Clearance == nil {
		ev.tell(LayoutNoClearance)
	} else {
		ev.warnSums(plan)
	}
	if len(plan.Obstacles) == 0 {
		ev.tell(LayoutNothingBelow)
	}
	if plan.boxed() && plan.HalfWidth == NoFigure {
		ev.tell(LayoutWidthUnknown)
	}
	if len(plan.Obstacles) > 0 && plan.Feet == NoFigure {
		ev.tell(LayoutFeetStanding)
	}
}

// warnSums looks at the room with either travel at the tightest point.
func (ev *evaluation) warnSums(plan *LayoutPlan) {
	t := ev.tightest()
	if t == nil {
		return
	}
	for _, x := range [...]struct {
		evidence Evidence
		room     *Room
	}{{Given, &t.Run.Given}, {Modelled, &t.Run.Modelled}} {
		if !x.room.Known {
			continue
		}
		sum := &x.room.Feet
		if plan.Clearance.Datum == rig.BelowAnchor {
			sum = &x.room.Anchor
		}
		if sum.Missing != 0 {
			ev.tell(LayoutItemsMissing, Text(string(x.evidence)), Text(ItemNames(sum.Missing)), Figure(quantity.Length, sum.Present, quantity.Down))
		}
		if apart := ev.datumsApart(plan); math.Abs(apart) > datumSlack && !math.IsNaN(x.room.Clearance.Apart(t.Run.Layout.Anchor.Z)) {
			ev.tell(LayoutDatumsApart, Text(string(x.evidence)), Figure(quantity.Length, math.Abs(apart), quantity.Down))
		}
	}
}

// datumsApart is the least, m, by which the room below the anchor and that
// below the feet come out otherwise anywhere in the entries: what lies between
// the D-ring to the feet, hanging, and the height of the D-ring, standing (see
// rig.Clearance.Apart).
func (ev *evaluation) datumsApart(plan *LayoutPlan) float64 {
	if plan.Feet == NoFigure {
		return 0
	}
	lo, hi := &ev.lo.Figures, &ev.hi.Figures
	if longer := lo[plan.Feet] - hi[plan.DRing]; longer > 0 {
		return longer
	}
	return min(0, hi[plan.Feet]-lo[plan.DRing])
}

// datumSlack is how far, m, the sums from both datums may differ before it is
// told: a tape is read to about that.
const datumSlack = 0.005

// warnSwing says what the speeds and the peak of a swing leave open.
func (ev *evaluation) warnSwing() {
	peak, later := nan, nan
	for k := range ev.spans.layouts {
		n := &ev.spans.layouts[k]
		if n.peak > peak || math.IsNaN(peak) {
			peak, later = n.peak, n.later
		}
	}
	if later > peak {
		ev.tell(LayoutLaterSwing, Figure(quantity.Force, peak, quantity.Nearest), Figure(quantity.Force, later, quantity.Up))
	}
	if ev.spans.of[indexOf(SwingSpeed, Shape)].known() {
		ev.tell(LayoutInextensible)
	}
}
