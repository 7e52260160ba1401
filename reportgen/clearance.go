package reportgen

import (
	"math"
	"strings"

	"arrestcheck/arrest"
	"arrestcheck/arrest/quantity"
	"arrestcheck/arrest/rig"
)

// A clearing is one room of the tightest place, with its evidence.
type clearing struct {
	evidence arrest.Evidence
	room     *arrest.Room
	plan     *arrest.ClearancePlan
	place    *arrest.LayoutPlace
}

// clearings are the rooms that were worked out.
func (b *builder) clearings(l *arrest.LayoutResult) []clearing {
	var list []clearing
	if l.Tightest == nil || l.Plan.Clearance == nil {
		return nil
	}
	place := b.nearest(l.Plan, l.Tightest)
	place.Corner = b.tightestCorner()
	for _, c := range [...]clearing{{evidence: arrest.Given, room: &place.Run.Given}, {evidence: arrest.Modelled, room: &place.Run.Modelled}} {
		if c.room.Known {
			c.plan, c.place = l.Plan.Clearance, place
			list = append(list, c)
		}
	}
	return list
}

// nearest returns a position with every obstacle as near below as the entries
// allow: the point that is worst for one of them may have another at its
// farthest.
func (b *builder) nearest(plan *arrest.LayoutPlan, p *arrest.LayoutPlace) *arrest.LayoutPlace {
	near := *p
	for i := range plan.Obstacles {
		in := b.setter(plan.Obstacles[i].Below)
		in.Set(&near.Case, in.Band.Low)
	}
	near.Run = *arrest.LayoutAt(&near.Case)
	return &near
}

// tightestCorner says at which of the entries the least room is left: where
// nothing has a band there is only one point.
func (b *builder) tightestCorner() arrest.Corner {
	for i := range b.res().Inputs {
		if in := &b.res().Inputs[i]; in.Set != nil && in.Band.Low < in.Band.High {
			return arrest.AtHigh
		}
	}
	return arrest.AtWritten
}

// clearanceSections are each room item by item, its sums from both datums, and
// what it leaves to each obstacle.
func (b *builder) clearanceSections(l *arrest.LayoutResult) []Section {
	var sections []Section
	for _, c := range b.clearings(l) {
		place := Block{Text: b.say(tightestPlace, cut(l.Plan.Positions[c.place.Index].Name), tightestCorners[c.place.Corner])}
		blocks := []Block{place, {Table: b.itemTable(&c)}, {Text: foreignText}, {Lines: b.sums(&c)}}
		sections = append(sections, Section{b.say(clearanceHeading, evidenceWords[string(c.evidence)]), append(blocks, b.leftBlocks(l, &c)...)})
	}
	return sections
}

// itemTable lists every item: its figure, where it comes from, and how either
// sum takes it.
func (b *builder) itemTable(c *clearing) *Table {
	t := &Table{Header: []string{itemsHead1, figureHead, itemsHead2, belowFeet, belowAnchor}, Widths: []int{15, 16, 21, 9, 9}}
	for it := range rig.ItemCount {
		e := &c.room.Clearance.Entries[it]
		feet, anchor := itemState(c.room, &c.room.Feet, it), itemState(c.room, &c.room.Anchor, it)
		figure := notEntered
		if e.Present {
			figure = b.known(quantity.Length, e.Value)
		}
		t.Rows = append(t.Rows, Row{
			Loud:  feet == isMissing || anchor == isMissing,
			Cells: []string{arrest.ItemWord(it), figure, b.itemFrom(c, it), feet, anchor},
		})
	}
	return t
}

// itemState says how a sum takes an item.
func itemState(room *arrest.Room, s *rig.Sum, it rig.Item) string {
	switch {
	case s.Twice.Has(it):
		return isTwice
	case s.Counted.Has(it):
		return isCounted
	case s.Missing.Has(it):
		return isMissing
	case s.Foreign.Has(it):
		return isForeign
	case len(holders(room, it)) > 0:
		return isIncluded
	}
	return notOfIt
}

// holders names the items that hold another in themselves.
func holders(room *arrest.Room, of rig.Item) []string {
	var list []string
	for it := range rig.ItemCount {
		if e := &room.Clearance.Entries[it]; e.Present && it != of && e.Includes.Has(of) {
			list = append(list, arrest.ItemWord(it))
		}
	}
	return list
}

// itemFrom says where the figure of an item comes from, and what else it holds.
func (b *builder) itemFrom(c *clearing, it rig.Item) string {
	e := &c.room.Clearance.Entries[it]
	if !e.Present {
		if in := holders(c.room, it); len(in) > 0 {
			return b.say(includedIn, listed(in))
		}
		return ""
	}
	from := b.itemSource(c, it)
	if e.Includes != 0 {
		from += "\n" + b.say(itemsIncluded, arrest.ItemNames(e.Includes))
	}
	return from
}

func (b *builder) itemSource(c *clearing, it rig.Item) string {
	switch it {
	case rig.ItemFreeFall, rig.ItemConnector:
		return fromLayout
	case rig.ItemSwingDrop:
		return fromSwing
	case rig.ItemFeet:
		return b.sourceOf(b.s.File.Job.Point.Layout.Feet)
	}
	if it == rig.ItemDeceleration && c.evidence == arrest.Modelled {
		return modelRemark + ", " + b.travelMethod(c)
	}
	for i := range c.plan.Items {
		if p := &c.plan.Items[i]; p.Item == it {
			return b.sourceOf(p.Figure)
		}
	}
	return b.keyed(stopDistanceKey)
}

const stopDistanceKey = "stop.distance"

// travelMethod returns the method that the travel of the path was worked out by.
func (b *builder) travelMethod(c *clearing) string {
	if c.place.Run.Planar.Status != 0 {
		return "M-24"
	}
	return "M-15"
}

// sourceOf returns whether the input that sets a figure is settled, and by what.
func (b *builder) sourceOf(figure int) string {
	return b.state(b.setter(figure))
}

// setter returns the input that sets a figure of the path or the layout.
func (b *builder) setter(figure int) *arrest.Input {
	for i := range b.res().Inputs {
		in := &b.res().Inputs[i]
		if in.Set == nil {
			continue
		}
		var c arrest.Case
		if in.Set(&c, 1); c.Figures[figure] != 0 {
			return in
		}
	}
	panic("reportgen: no input for a figure")
}

// keyed names an input by its key, with its state.
func (b *builder) keyed(key string) string {
	for i := range b.res().Inputs {
		if in := &b.res().Inputs[i]; in.Key == key {
			return key + ", " + b.state(in)
		}
	}
	return key
}

// sums are the sums from both datums, how far they are apart, and the shortest
// room.
func (b *builder) sums(c *clearing) []Line {
	feet, anchor := b.sum(&c.room.Feet), b.sum(&c.room.Anchor)
	if c.plan.Datum == rig.BelowAnchor {
		anchor = b.say(ofTheDatum, anchor)
	} else {
		feet = b.say(ofTheDatum, feet)
	}
	list := []Line{
		{Label: belowFeet, Text: feet, Loud: c.room.Feet.Missing|c.room.Feet.Twice != 0},
		{Label: belowAnchor, Text: anchor, Loud: c.room.Anchor.Missing|c.room.Anchor.Twice != 0},
	}
	if apart := c.room.Clearance.Apart(c.place.Run.Layout.Anchor.Z); !math.IsNaN(apart) {
		list = append(list, Line{Label: differWord, Text: b.apart(apart)})
	}
	return append(list, Line{Label: shortestWord, Text: b.shortest(c)})
}

// apart says how far the two sums are apart.
func (b *builder) apart(x float64) string {
	if math.Abs(x) < noise {
		return datumsAgree
	}
	return b.say(sumsDiffer, b.d.figure(quantity.Length, math.Abs(x), pageDigits, quantity.Nearest))
}

// sum puts a sum in words: what is missing is never zero.
func (b *builder) sum(s *rig.Sum) string {
	switch {
	case s.Twice != 0:
		return b.say(sumTwice, arrest.ItemNames(s.Twice))
	case s.Missing != 0:
		return b.say(sumFloor, b.room(s.Present, quantity.Down), arrest.ItemNames(s.Missing))
	}
	return b.say(sumNeeded, b.room(s.Needed, quantity.Up))
}

// room returns a length that is rounded so that it never flatters.
func (b *builder) room(si float64, r quantity.Rounding) string {
	switch {
	case math.IsNaN(si):
		return notKnown
	case math.IsInf(si, 1):
		return noUpperEnd
	}
	return b.d.figure(quantity.Length, si, pageDigits, r)
}

// datumHeight is how far the datum lies above the walking surface, m.
func (c *clearing) datumHeight() float64 {
	if c.plan.Datum == rig.BelowAnchor {
		return c.anchorHeight()
	}
	return 0
}

func (c *clearing) anchorHeight() float64 { return c.place.Run.Layout.Anchor.Z }

// shortest returns the room, in m below the walking surface, that the greater of
// the two sums asks for; without known, that the fall needs no less than.
func (c *clearing) shortest() (room float64, known bool) {
	feet, anchor := &c.room.Feet, &c.room.Anchor
	if feet.Twice|anchor.Twice != 0 {
		return math.NaN(), false
	}
	return max(feet.Present, anchor.Present-c.anchorHeight()), feet.Missing == 0 || anchor.Missing == 0
}

// shortest says which room would do, from both datums.
func (b *builder) shortest(c *clearing) string {
	room, known := c.shortest()
	from := func(si float64, r quantity.Rounding) []string {
		return []string{b.room(si, r), b.room(si+c.anchorHeight(), r)}
	}
	if !known {
		return b.say(shortestFloor, from(room, quantity.Down)...)
	}
	text := b.say(shortestRoom, from(room, quantity.Up)...)
	if in := b.s.File.Job.AllowanceInput(); in != nil && c.evidence == arrest.Modelled {
		wider := room + float64(in.Band.High*c.room.Travel)
		text += "; " + b.say(shortestWider, append([]string{percent(in.Band.High)}, from(wider, quantity.Up)...)...)
	}
	return text
}

// leftBlocks hold what is left to each obstacle, nearest first.
func (b *builder) leftBlocks(l *arrest.LayoutResult, c *clearing) []Block {
	lefts := &c.room.Lefts
	switch {
	case len(l.Plan.Obstacles) == 0:
		return []Block{{Text: noObstacle}}
	case lefts.Count == 0:
		return []Block{{Text: nothingInTheWay}}
	}
	t := &Table{Header: leftHead, Widths: []int{20, 17, 19, 18}}
	for _, left := range lefts.List[:lefts.Count] {
		t.Rows = append(t.Rows, b.leftRow(l, c, &left))
	}
	blocks := []Block{{Table: t}}
	if aside := asideNames(l.Plan, lefts.Aside); len(aside) > 0 {
		blocks = append(blocks, Block{Lines: []Line{{Label: asideWord, Text: strings.Join(aside, ", ")}}})
	}
	return blocks
}

// leftRow is one obstacle, measured from the datum of the job.
func (b *builder) leftRow(l *arrest.LayoutResult, c *clearing, left *rig.Left) Row {
	o := &l.Plan.Obstacles[left.Obstacle]
	name := quote(o.Name)
	if o.Moving {
		name = b.say(movesToo, name)
	}
	needed, rest := b.room(c.room.Counts+c.datumHeight(), quantity.Up), b.leftText(left.Left)
	if c.room.Floor {
		needed = boundWords[arrest.AtLeast] + " " + b.room(c.room.Counts+c.datumHeight(), quantity.Down)
		rest = boundWords[arrest.AtMost] + " " + b.room(left.Left, quantity.Up)
	}
	return Row{Loud: !(left.Left > 0), Cells: []string{name, b.room(left.Room+c.datumHeight(), quantity.Down), needed, rest}}
}

// leftText is what is left, rounded down; of a fall that nothing stops nothing.
func (b *builder) leftText(x float64) string {
	if math.IsInf(x, -1) {
		return nothingLeft
	}
	return b.room(x, quantity.Down)
}

// asideNames names the obstacles whose bits are set.
func asideNames(plan *arrest.LayoutPlan, set uint16) []string {
	var list []string
	for i := range plan.Obstacles {
		if set>>i&1 == 1 {
			list = append(list, quote(plan.Obstacles[i].Name))
		}
	}
	return list
}

// sumOfDatum is the sum that limits are held against.
func (c *clearing) sumOfDatum() *rig.Sum {
	if c.plan.Datum == rig.BelowAnchor {
		return &c.room.Anchor
	}
	return &c.room.Feet
}
