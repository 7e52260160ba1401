package reportgen

import (
	"math"

	"arrestcheck/arrest"
	"arrestcheck/arrest/rig"
	drawing "arrestcheck/reportgen/figure"
)

// A chain is a row of dimensions below a datum, in the world.
type chain struct {
	datum float64 // height where it begins, m
	name  string
	parts []dimension
	notes []string
	to    int // the obstacle that it ends at; -1: none
}

// A dimension is one part of a chain.
type dimension struct {
	end  float64 // height, m
	text string
	near bool // the drawing marks this height: a line leads there
}

// end is the height at which the chain ends, m.
func (c *chain) end() float64 {
	if len(c.parts) == 0 {
		return c.datum
	}
	return c.parts[len(c.parts)-1].end
}

// add puts a part of a length, m, at the end. One of no length is left out where
// the layout gives it; an entered zero is a figure.
func (c *chain) add(f *drawnFall, word string, length float64, near bool) {
	c.parts = append(c.parts, dimension{c.end() - length, f.say(lengthOf, word, f.length(length)), near})
}

// itemOrder is the order of the items in a chain.
var itemOrder = [...]rig.Item{
	rig.ItemFreeFall, rig.ItemConnector, rig.ItemSwingDrop, rig.ItemDeceleration, rig.ItemLineStretch,
	rig.ItemHarness, rig.ItemAnchor, rig.ItemFeet, rig.ItemMargin,
}

// dimensions are those of the clearance, and without one those of the D-ring.
func (f *drawnFall) dimensions() chain {
	switch {
	case !f.known():
		return chain{to: -1}
	case f.room == nil:
		return f.wayDown(noRoomNote)
	case !isNumber(f.room.Needed):
		return f.wayDown(neverRestNote)
	}
	c := chain{name: feetDatum[f.sub], to: -1}
	sum := &f.room.Feet
	if f.plan.Clearance.Datum == rig.BelowAnchor {
		c.name, c.datum, sum = anchorDatum, f.layout().Anchor.Z, &f.room.Anchor
	}
	for _, it := range itemOrder {
		length := f.room.Clearance.Entries[it].Value
		if !sum.Counted.Has(it) || length == 0 && (it == rig.ItemFreeFall || it == rig.ItemSwingDrop) {
			continue
		}
		near := f.plan.Clearance.Datum == rig.BelowAnchor && (it == rig.ItemConnector || it == rig.ItemDeceleration)
		c.add(f, f.itemWord(it), length, near)
	}
	if more := c.end() + f.room.Counts; !f.room.Floor && more > noise {
		c.add(f, otherDatumPart, more, false)
	}
	f.left(&c)
	if f.room.Floor {
		c.notes = append(c.notes, f.say(missingNote, arrest.ItemNames(sum.Missing)))
	}
	return c
}

// itemWord names an item; the travel of the model is called that.
func (f *drawnFall) itemWord(it rig.Item) string {
	switch {
	case it == rig.ItemDeceleration && f.modelled:
		return modelPart
	case it == rig.ItemFeet:
		return feetWords[f.sub]
	}
	if word, own := drawnItems[it]; own {
		return word
	}
	return arrest.ItemWord(it)
}

// left adds what is left to the nearest obstacle.
func (f *drawnFall) left(c *chain) {
	if f.room.Lefts.Count == 0 {
		return
	}
	l := &f.room.Lefts.List[0]
	if !isNumber(l.Left) {
		return
	}
	c.to = l.Obstacle
	name, length := flat(f.plan.Obstacles[l.Obstacle].Name), f.length(math.Abs(l.Left))
	short, long := leftRoom, leftTo
	switch {
	case l.Left < -noise:
		short, long = roomShort, roomShort
	case f.room.Floor:
		short, long = leftAtMost, leftAtMostTo
	}
	text := f.say(short, length)
	if len(long.args) > 1 {
		if named := f.say(long, length, name); drawing.RoomFor(named) <= chainMost {
			text = named
		}
	}
	c.parts = append(c.parts, dimension{-l.Room, text, true})
}

// wayDown is the chain of the D-ring from its start.
func (f *drawnFall) wayDown(note string) chain {
	p := f.place()
	c := chain{datum: p.Start.Z, name: bodyDatum[f.sub], to: -1, notes: []string{note}}
	if p.FreeFall > 0 {
		c.add(f, freeFallPart, p.FreeFall, true)
	}
	if p.SwingDrop > 0 {
		c.add(f, swingDropPart, p.SwingDrop, true)
	}
	if isNumber(f.travel) {
		word := arrest.ItemWord(rig.ItemDeceleration)
		if f.path {
			word = modelPart
		}
		c.add(f, word, f.travel, true)
	}
	if math.IsInf(f.travel, 1) && note == noRoomNote {
		c.notes = append(c.notes, neverRestNote)
	}
	return c
}

// upright draws the chain beside the elevation.
func (e *elevation) upright() {
	if len(e.chain.parts) == 0 {
		return
	}
	x := e.box.Right + chainGap
	if e.cut.side < 0 {
		x = e.box.Left - chainGap
	}
	c := drawing.Chain{At: x, Datum: e.at(0, e.chain.datum).Y, Name: e.chain.name, Far: e.cut.side < 0, Low: e.at(0, e.chain.datum).Y, High: e.scene.Height - belowElevation + 4}
	for i, p := range e.chain.parts {
		d := drawing.Dimension{End: e.at(0, p.end).Y, Text: p.text}
		if p.near {
			d.Witness = e.witness(i)
		}
		if floor := e.box.Bottom; d.End > floor {
			d.End, d.Witness, d.Text = floor, 0, e.say(goesOn, p.text)
		}
		c.Parts = append(c.Parts, d)
	}
	if l := len(c.Parts) - 1; e.chain.to >= 0 && l > 0 && c.Parts[l].End < c.Parts[l-1].End {
		e.short(&c, l)
	}
	e.scene.Chain(c)
}

// short takes the last part of a chain, which goes upwards, out and puts it on a
// line of its own before the others.
func (e *elevation) short(c *drawing.Chain, last int) {
	own := *c
	own.Name, own.Far = "", !c.Far
	own.At -= e.cut.side * 4
	own.Datum, own.Parts = c.Parts[last-1].End, c.Parts[last:]
	c.Parts = c.Parts[:last:last]
	e.scene.Chain(own)
}

// witness is where the line to the end of a part of the chain begins, mm.
func (e *elevation) witness(i int) float64 {
	if e.chain.to >= 0 && i == len(e.chain.parts)-1 {
		return e.obstacleSide(e.chain.to)
	}
	p, z := e.place(), e.chain.parts[i].end
	switch u, lowest, ok := e.rest(); {
	case ok && math.Abs(z-lowest) < noise:
		return e.at(u, lowest).X
	case math.Abs(z-p.Taut.Z) < noise:
		return e.spot(p.Taut).X
	}
	if e.cut.inside(e.cut.pivot, p.Lowest) {
		return e.at(e.cut.edge, 0).X
	}
	return e.at(e.cut.pivot, p.Lowest).X
}
