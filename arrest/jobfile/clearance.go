package jobfile

import (
	"strconv"
	"strings"

	"arrestcheck/arrest"
	"arrestcheck/arrest/connector"
	"arrestcheck/arrest/rig"
)

// clearanceItems are the keys of the items of a clearance.
var clearanceItems = []struct {
	name string
	item rig.Item
	held string // the key that lists what the figure holds already
}{
	{"deceleration_distance", rig.ItemDeceleration, "deceleration_includes"},
	{"line_stretch", rig.ItemLineStretch, ""},
	{"harness_stretch", rig.ItemHarness, ""},
	{"anchor_give", rig.ItemAnchor, ""},
	{"margin", rig.ItemMargin, "margin_includes"},
}

// itemNamed returns the item of a key of the clearance.
func itemNamed(name string) rig.Item {
	for _, it := range clearanceItems {
		if it.name == name {
			return it.item
		}
	}
	panic("jobfile: no item " + name)
}

// clearance reads the [clearance].
func (in *inputs) clearance(t *table) {
	s := t.section("clearance")
	if s == nil {
		in.refused = in.refused || t.has("clearance")
		return
	}
	plan := &arrest.ClearancePlan{Datum: rig.BelowFeet}
	datum := s.choice("datum")
	if datum == belowAnchor {
		plan.Datum = rig.BelowAnchor
	}
	in.refused = in.refused || datum == ""
	for _, it := range clearanceItems {
		n := in.figure(s, it.name, arrest.OfClearance, s.quantity(it.name))
		var held rig.Items
		if it.held != "" {
			for _, word := range s.words(it.held) {
				held |= rig.Of(itemNamed(word))
			}
		}
		if n != arrest.NoFigure {
			plan.Items = append(plan.Items, arrest.PlannedItem{Item: it.item, Figure: n, Includes: held})
		}
	}
	if s.has("deceleration_distance") && in.point.Distance > 0 {
		in.refused = true
		s.fault("deceleration_distance", "", "stop.distance says how far the D-ring goes from the first pull to rest: one of the two counts",
			"take out: "+s.key("deceleration_distance")+", or stop.distance")
	}
	if in.layout != nil {
		in.layout.plan.Clearance, in.layout.room = plan, s
	}
}

// counted refuses items that the room needed would count twice.
func (in *inputs) counted(run *arrest.LayoutRun) {
	var twice rig.Items
	for _, room := range []*arrest.Room{&run.Given, &run.Modelled} {
		switch {
		case !room.Known:
		case in.layout.plan.Clearance.Datum == rig.BelowFeet:
			twice |= room.Feet.Twice
		default:
			twice |= room.Anchor.Twice
		}
	}
	for _, it := range clearanceItems {
		if twice.Has(it.item) {
			in.refused = true
			in.twice(it.name, it.item)
		}
	}
}

// twice records an item that is counted twice, at the first key that counts it.
func (in *inputs) twice(name string, item rig.Item) {
	s := in.layout.room
	at, text := "", "" // the key, and what is written there
	var others, out []string
	count := func(key, word, takeOut string) {
		if at == "" {
			at, text = key, word
		} else {
			others = append(others, key)
		}
		out = append(out, takeOut)
	}
	if own := in.entered(s.key(name)); own != nil {
		count(own.Key, own.Band.Text, own.Key)
	}
	for _, it := range in.layout.plan.Clearance.Items {
		if key := s.key(includesOf(it.Item)); it.Includes.Has(item) {
			count(key, name, strconv.Quote(name)+" of "+key)
		}
	}
	if in.point.Distance > 0 && (item == rig.ItemLineStretch || item == rig.ItemAnchor) {
		others = append(others, "stop.distance")
	}
	others = append(others, in.partsHolding(item)...)
	verb := " counts"
	if len(others) > 1 {
		verb = " count"
	}
	s.page.fault(at, at, text, "it would be counted twice: "+enumerate(others, " and ")+verb+" it already", "take out: "+strings.Join(out, or))
}

// includesOf returns the key that lists what the figure of an item holds.
func includesOf(item rig.Item) string {
	for _, it := range clearanceItems {
		if it.item == item {
			return it.held
		}
	}
	return ""
}

// partsHolding names what of the path counts an item, where the deceleration
// distance is left to the path.
func (in *inputs) partsHolding(item rig.Item) []string {
	if in.path == nil || in.layout.room.has("deceleration_distance") {
		return nil
	}
	if item == rig.ItemLineStretch {
		return []string{"the stretch of [[connector]]"}
	}
	var all []string
	for i := range in.path.plan.Parts {
		p := &in.path.plan.Parts[i]
		if item == rig.ItemHarness && p.Kind == connector.Harness || item == rig.ItemAnchor && p.Kind == connector.Anchor {
			all = append(all, in.path.list[i].path+" ("+strconv.Quote(p.Name)+")")
		}
	}
	return all
}
