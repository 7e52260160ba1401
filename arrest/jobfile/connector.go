package jobfile

import (
	"errors"
	"fmt"
	"strconv"

	"arrestcheck/arrest"
	"arrestcheck/arrest/connector"
	"arrestcheck/arrest/quantity"
)

// partKinds are the words of connector.part.
var partKinds = map[string]connector.Kind{
	aRope: connector.Rope, aWebbing: connector.Webbing, aWireRope: connector.WireRope, anAbsorber: connector.Absorber,
	aRetractable: connector.Retractable, aRopeGrab: connector.RopeGrab, aHarness: connector.Harness, anAnchor: connector.Anchor, aCurve: connector.Curve,
}

// bases are the keys of which one says how much a part gives, with what they
// stand for.
var bases = []struct {
	name  string
	basis arrest.Basis
}{
	{"stiffness", arrest.ByStiffness},
	{"modulus", arrest.ByModulus},
	{"impact_force", arrest.ByImpactForce},
	{"static_stretch", arrest.ByStaticStretch},
}

// A connection is the [[connector]] parts while they are read.
type connection struct {
	plan  arrest.PathPlan
	names []string // of the parts, in order
	list  []*table // the sections, in order
}

// connectors reads the parts of the path, from the anchor to the body.
func (in *inputs) connectors(t *table) {
	before := len(t.page.faults)
	list := t.sections("connector")
	if len(list) == 0 {
		return
	}
	if most := connector.MaxParts; len(list) > most {
		list[most].page.fault(list[most].path, list[most].path, "", fmt.Sprintf("a path has at most %d parts", most), "take out: parts that give way least")
		in.refused = true
		return
	}
	in.path = &connection{list: list}
	in.path.called(list)
	for i, s := range list {
		in.path.plan.Parts = append(in.path.plan.Parts, in.part(s, in.path.names[i]))
	}
	in.point.Path = &in.path.plan
	if !in.refused && len(t.page.faults) == before {
		in.checkPath(list)
	}
}

// called gives every part its name: the one written, or else its kind, numbered
// where several have it.
func (p *connection) called(list []*table) {
	p.names = make([]string, len(list))
	unnamed, number := map[string]int{}, map[string]int{}
	for i, s := range list {
		p.names[i] = s.text("name")
		if word, _ := s.keys["part"].(string); !s.has("name") {
			p.names[i] = word
			unnamed[word]++
		}
	}
	first := map[string]int{}
	for i, s := range list {
		name := p.names[i]
		if !s.has("name") && unnamed[name] > 1 {
			number[name]++
			p.names[i] += " " + strconv.Itoa(number[name])
		}
		if name == "" {
			continue
		}
		if before, known := first[p.names[i]]; known {
			s.page.fault(s.key("name"), s.key("name"), p.names[i], list[before].path+" has this name already", "write: name = "+strconv.Quote(p.names[i]+" 2"))
			continue
		}
		first[p.names[i]] = i
	}
}

// part reads one [[connector]].
func (in *inputs) part(s *table, name string) arrest.PlannedPart {
	const none = arrest.NoFigure
	r := partReader{in: in, t: s, src: arrest.Source(s.choice("source")), note: s.text("note")}
	pp := arrest.PlannedPart{Name: name, Kind: partKinds[s.choice("part")], Lifeline: s.boolean("lifeline"),
		Length: none, Give: none, Force: none, Travel: none, Activate: none, Rise: none, Locking: none}
	pp.Length, _ = r.figure("length")
	for _, b := range bases {
		n, e := r.figure(b.name)
		if n != none {
			pp.Give, pp.Basis = n, b.basis
		}
		if b.basis == arrest.ByImpactForce {
			r.impactForce(e)
		}
	}
	for _, name := range []string{"deployment_force", "braking_force", "slip_force"} {
		n, e := r.figure(name)
		if n != none {
			pp.Force = n
		}
		if name == "deployment_force" {
			r.force = e
		}
	}
	pp.Travel, r.travel = r.figure("travel_at_most")
	pp.Activate, r.activation = r.figure("activation_force")
	pp.Rise, r.rise = r.figure("activation_travel")
	r.activated()
	var e entry
	pp.Locking, e = r.figure("travel_before_locking")
	r.locking(e)
	pp.Points, pp.Unloading = r.curve()
	if len(pp.Points) > 0 {
		pp.Basis = arrest.ByPoints
	}
	return pp
}

// A partReader reads the figures of one part.
type partReader struct {
	in   *inputs
	t    *table
	src  arrest.Source // of all figures that have none of their own
	note string

	force, travel, activation, rise entry
}

// figure puts a figure of the part on the list of inputs. It returns its place
// in Case.Figures, arrest.NoFigure where there is none.
func (r *partReader) figure(name string) (int, entry) {
	e := r.sourced(r.t.quantity(name))
	return r.in.figure(r.t, name, arrest.OfPart, e), e
}

// sourced gives a figure without a source or note of its own that of the part.
// What an Override has put has neither.
func (r *partReader) sourced(e entry) entry {
	if e.set {
		return e
	}
	if e.src == arrest.NoSource {
		e.src = r.src
	}
	if e.note == "" {
		e.note = r.note
	}
	return e
}

// impactForce refuses a rated impact force that no rope could have: a body that
// is only laid into it pulls with twice its weight.
func (r *partReader) impactForce(e entry) {
	test := connector.SingleRope(0)
	least := 2 * test.Mass * test.Gravity
	if !e.given || e.band.Low > least {
		return
	}
	r.in.refused = true
	r.t.fault("impact_force", e.band.Text, fmt.Sprintf("no rope has it: even a mass of %g kg laid into the rope without a fall pulls with twice its weight, %s",
		test.Mass, quantity.Format(least, e.band.Unit, 4, quantity.Nearest)), r.t.group.named["impact_force"].hint())
}

// activated records activation figures that do not fit the deployment force.
func (r *partReader) activated() {
	a, f, rise, travel := &r.activation, &r.force, &r.rise, &r.travel
	if !a.given || !f.given {
		return
	}
	force, activation := r.t.key("deployment_force"), r.t.key("activation_force")
	fault := func(name, text, reason, hint string) {
		r.in.refused = true
		r.t.fault(name, text, reason, hint)
	}
	switch below := a.band.High < f.band.Low; {
	case !below && a.band.Low < f.band.High:
		fault("activation_force", a.band.Text, "somewhere in the bands it is below "+force+" and somewhere it is not, and the two are different devices",
			"write: bands of "+activation+" and "+force+" that do not overlap"+or+"take out "+activation)
	case below && rise.key == nil:
		fault("activation_force", a.band.Text, "it is below "+force+", so the travel is asked for over which the force grows: "+r.t.key("activation_travel"),
			r.t.group.named["activation_travel"].hint()+or+"take out "+activation)
	case !below && rise.key != nil:
		fault("activation_travel", rise.band.Text, "the force grows over it from "+activation+" to "+force+", and "+activation+" is not below",
			"take out: "+r.t.key("activation_travel"))
	case rise.given && travel.given && rise.band.High > travel.band.Low:
		fault("activation_travel", rise.band.Text, "it is a part of "+r.t.key("travel_at_most")+", "+travel.band.Text+", and cannot be longer",
			"write: a travel that is not longer in any part of the bands")
	}
}

// locking refuses a travel before locking that the free fall as entered has no
// room for. A free fall that comes from a layout has it in itself.
func (r *partReader) locking(e entry) {
	if !e.given || e.band.High <= 0 || r.in.sited {
		return
	}
	free := r.in.entered("fall.free_fall")
	if free != nil && e.band.High <= free.Band.High {
		return
	}
	if free == nil && r.in.refused {
		return
	}
	said := "and no free fall is entered"
	if free != nil {
		said = "and that is " + free.Band.Text
	}
	r.in.refused = true
	r.t.fault("travel_before_locking", e.band.Text, "it is a part of fall.free_fall, "+said,
		"write: in fall.free_fall the whole free fall, slide and payout counted")
}

// entered returns the input of a key, nil where none is on the list.
func (in *inputs) entered(key string) *arrest.Input {
	for i := range in.inputs {
		if in.inputs[i].Key == key {
			return &in.inputs[i]
		}
	}
	return nil
}

// checkPath refuses parts that cannot make a path at either end of the bands.
func (in *inputs) checkPath(list []*table) {
	low, high := *in.point, *in.point
	for i := range in.inputs {
		if e := &in.inputs[i]; e.Set != nil {
			e.Set(&low, e.Band.Low)
			e.Set(&high, e.Band.High)
		}
	}
	err := in.path.plan.Check(&low)
	if err == nil {
		err = in.path.plan.Check(&high)
	}
	if err == nil {
		return
	}
	in.refused = true
	var part *arrest.PartError
	if !errors.As(err, &part) {
		list[0].page.fault("connector", "connector", "", "the parts make no path: "+err.Error(), "write: the parts anew, one [[connector]] for each")
		return
	}
	s, key := list[part.Part-1], "part"
	if s.has("points") {
		key = "points"
	}
	s.fault(key, "", "the figures of "+strconv.Quote(part.Name)+" make no part: "+part.Err.Error(), s.group.named[key].hint())
}

// partNamed returns the number, from 1, of the part that a rating belongs to;
// 0 where it names none.
func (in *inputs) partNamed(t *table) int {
	const name = "part"
	word := t.text(name)
	if word == "" {
		return 0
	}
	if in.path == nil {
		t.fault(name, word, "it names a [[connector]], and there is none in the job", "take out: "+t.key(name))
		return 0
	}
	for i, n := range in.path.names {
		if n == word {
			return i + 1
		}
	}
	hint := "write: one of " + listed(in.path.names)
	near, ok := nearest(word, in.path.names)
	if len(in.path.names) == 1 {
		near, ok = in.path.names[0], true
	}
	if ok {
		hint = "write: " + name + " = " + strconv.Quote(near)
	}
	t.fault(name, word, "no [[connector]] has this name", hint)
	return 0
}
