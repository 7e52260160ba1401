package reportgen

import (
	"math"

	"arrestcheck/arrest"
	"arrestcheck/arrest/quantity"
	"arrestcheck/arrest/rig"
)

// swingSections are the swing from each position that has one.
func (b *builder) swingSections(l *arrest.LayoutResult) []Section {
	var sections []Section
	for i := range l.Places {
		p := b.atObstacles(l.Plan, &l.Places[i])
		place := &p.Run.Place
		if place.Status != rig.Known || place.Plane.Flat && place.Plane.Offset < noise {
			continue
		}
		heading := b.say(swingHeading, cut(l.Plan.Positions[p.Index].Name), placeCorners[p.Corner])
		if !place.Plane.Flat {
			sections = append(sections, Section{heading, []Block{{Text: outOfPlane, Loud: true}}})
			continue
		}
		sections = append(sections, Section{heading, []Block{{Text: swingText, Table: b.swingTable(l.Plan, p)}}})
	}
	return sections
}

// atObstacles returns a position with the obstacles as they count for the swing:
// as written, or as near below as the entries allow.
func (b *builder) atObstacles(plan *arrest.LayoutPlan, p *arrest.LayoutPlace) *arrest.LayoutPlace {
	if p.Corner == arrest.AtWritten {
		return p
	}
	return b.nearest(plan, p)
}

// A swinging is the table of one swing being made: a row with what holds
// without stretch, and with a connector path what its model comes to.
type swinging struct {
	*builder
	t        *Table
	modelled bool
}

func (w *swinging) add(loud bool, what, stiff, modelled string) {
	cells := []string{what, stiff}
	if w.modelled {
		cells = append(cells, modelled)
	}
	w.t.Rows = append(w.t.Rows, Row{Loud: loud, Cells: cells})
}

// swingTable is what a swing comes to at its lowest point and at each obstacle.
func (b *builder) swingTable(plan *arrest.LayoutPlan, p *arrest.LayoutPlace) *Table {
	w := swinging{b, &Table{Header: swingHead[:2], Widths: []int{40, 38}}, p.Run.Planar.Status != 0}
	if w.modelled {
		w.t.Header, w.t.Widths = swingHead, []int{32, 22, 22}
	}
	w.lowest(p)
	if w.modelled {
		w.arrest(&p.Run.Planar)
	}
	for i := range plan.Obstacles {
		w.obstacle(plan, p, i)
	}
	if w.modelled {
		w.ledger(&p.Run.Planar.Ledger)
	}
	return w.t
}

// lowest is the swing down to its lowest point.
func (w *swinging) lowest(p *arrest.LayoutPlace) {
	s, m, g := &p.Run.Swing, &p.Run.Planar, p.Case.Gravity
	fall := func(v float64) float64 { return rig.StraightFall(v, g) }
	w.add(false, speedAtPull, w.speed(s.Speed), notOfThisModel)
	w.add(false, speedSideways, w.speed(s.Tangential), notOfThisModel)
	w.add(false, speedAtLowest, w.between(quantity.Speed, s.LowestLow, s.LowestHigh), w.speed(m.Lowest.Speed))
	w.add(false, straightFall, w.between(quantity.Length, fall(s.LowestLow), s.Height), w.length(m.Lowest.Height))
	w.add(false, timeToLowest, atMostWord+" "+w.ceiling(quantity.Time, s.Time), w.three(quantity.Time, m.Lowest.Time-m.FirstPull))
	w.add(false, dropToLowest, w.known(quantity.Length, p.Run.Place.FreeFall+p.Run.Place.SwingDrop), w.length(m.Lowest.Drop))
}

// arrest is what the model alone tells.
func (w *swinging) arrest(m *rig.Planar) {
	w.add(m.Status == rig.Endless || m.Status == rig.Rigid, endsWord, notOfThisModel, plannedStatus[m.Status])
	w.add(false, swungPeak, notOfThisModel, w.force3(m.Peak))
	w.add(false, laterPeak, notOfThisModel, w.ceiling(quantity.Force, m.PeakBound))
	w.add(false, laterDrop, notOfThisModel, w.ceiling(quantity.Length, m.DropBound))
}

// obstacle is the first touch of one obstacle.
func (w *swinging) obstacle(plan *arrest.LayoutPlan, p *arrest.LayoutPlace, i int) {
	o, s, m := &plan.Obstacles[i], &p.Run.Swing.Passes[i], &p.Run.Planar.Passes[i]
	if !w.modelled {
		m = new(rig.Passage)
	}
	w.add(s.Reached || m.Reached, w.say(speedAt, quote(o.Name)), w.passText(s), w.passageText(m))
	if !s.Reached && !m.Reached {
		return
	}
	low := rig.StraightFall(s.Low, p.Case.Gravity)
	w.add(false, straightFall, w.between(quantity.Length, low, s.Height), w.length(m.Height))
	if o.StopOver == arrest.NoFigure {
		return
	}
	w.add(true, w.say(hitOver, w.length(p.Case.Figures[o.StopOver])), w.floor(stiffHit(plan, p, i)), w.floor(swungHit(plan, p, i)))
}

// stiffHit is the least mean force of a body that hits an obstacle and is
// stopped over the distance stated for it, as if the connector did not stretch,
// N; NaN where none is stated or the body does not come to it with the least
// speed.
func stiffHit(plan *arrest.LayoutPlan, p *arrest.LayoutPlace, i int) float64 {
	s := &p.Run.Swing.Passes[i]
	return hit(&plan.Obstacles[i], &p.Case, s.Low, downShare(s))
}

// swungHit is that of the swing worked out in time.
func swungHit(plan *arrest.LayoutPlan, p *arrest.LayoutPlace, i int) float64 {
	m := &p.Run.Planar.Passes[i]
	if p.Run.Planar.Status == 0 {
		return math.NaN()
	}
	return hit(&plan.Obstacles[i], &p.Case, m.Speed, m.Down)
}

func hit(o *arrest.PlannedObstacle, c *arrest.Case, speed, down float64) float64 {
	if o.StopOver == arrest.NoFigure {
		return math.NaN()
	}
	body := rig.Body{Mass: c.Mass + c.Tools, Gravity: c.Gravity}
	return rig.HitForce(&body, speed, c.Figures[o.StopOver], down)
}

// downShare is the share of the motion downwards at the touch of an obstacle by
// an arc.
func downShare(s *rig.Pass) float64 {
	if s.Falling {
		return 1
	}
	return math.Sin(s.Angle)
}

func (w *swinging) passText(s *rig.Pass) string {
	switch {
	case s.Unknown:
		return notKnown
	case !s.Reached:
		return notThere
	case s.Falling:
		return w.say(speedAtBefore, w.speed(s.High))
	}
	return w.between(quantity.Speed, s.Low, s.High)
}

func (w *swinging) passageText(m *rig.Passage) string {
	switch {
	case m.Unknown:
		return notKnown
	case !m.Reached:
		return notThere
	}
	return w.speed(m.Speed)
}

// ledger is what the accounts of the run leave over.
func (w *swinging) ledger(l *rig.Ledger) {
	momentum, energy := w.ledgerUnit(quantity.Impulse), w.ledgerUnit(quantity.Energy)
	w.add(false, leftSideways, notOfThisModel, leftText(l.SideLeft, momentum))
	w.add(false, leftDown, notOfThisModel, leftText(l.DownLeft, momentum))
	w.add(false, leftEnergy, notOfThisModel, leftText(l.EnergyLeft, energy))
}

func (w *swinging) speed(si float64) string { return w.three(quantity.Speed, si) }

// floor returns a force that is not less than what is printed.
func (w *swinging) floor(si float64) string {
	if math.IsNaN(si) {
		return notReached
	}
	return w.d.figure(quantity.Force, si, pageDigits, quantity.Down)
}

// ceiling returns a figure that is not more than what is printed.
func (w *swinging) ceiling(d quantity.Dimension, si float64) string {
	if math.IsNaN(si) || math.IsInf(si, 1) {
		return w.known(d, si)
	}
	return w.d.figure(d, si, pageDigits, quantity.Up)
}

// between returns what lies between two figures; the upper one where only with
// more than the lower one the body comes there.
func (w *swinging) between(d quantity.Dimension, low, high float64) string {
	switch {
	case math.IsNaN(high):
		return notKnown
	case math.IsNaN(low):
		return w.say(openBelow, w.ceiling(d, high))
	}
	return w.d.span(d, quantity.Unit{}, low, high, pageDigits)
}
