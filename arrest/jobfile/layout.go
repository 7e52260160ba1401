package jobfile

import (
	"fmt"
	"slices"
	"strconv"

	"arrestcheck/arrest"
	"arrestcheck/arrest/connector"
	"arrestcheck/arrest/quantity"
	"arrestcheck/arrest/rig"
)

// edges are the words of layout.edge.
var edges = map[string]rig.Edge{noEdge: rig.NoEdge, roundEdge: rig.RoundEdge, sharpEdge: rig.SharpEdge}

// A siting is the [layout] while it is read, with its positions and obstacles.
type siting struct {
	plan      arrest.LayoutPlan
	table     *table   // [layout]
	positions []*table // in the order of the plan
	room      *table   // [clearance], nil where there is none
	slack     entry
}

// layouts reads the [layout], the positions and what lies below. Without the
// [layout] the others are read for their faults.
func (in *inputs) layouts(t *table) {
	s := t.section("layout")
	l := &siting{table: s, positions: t.sections("position")}
	obstacles := t.sections("obstacle")
	in.layout = l
	if s != nil {
		in.around(l)
	}
	in.places(l.positions)
	in.below(obstacles)
	if s == nil {
		in.layout = nil
		in.refused = in.refused || in.sited || len(l.positions)+len(obstacles) > 0
		return
	}
	// With a tool or a moving load the layout is refused already.
	in.refused = in.refused || t.has("tool") || t.has("moving_load") || len(l.positions) == 0
	in.point.Layout = &l.plan
}

// around reads the [layout] itself.
func (in *inputs) around(l *siting) {
	s, p := l.table, &l.plan
	figure := func(name string) int { return in.figure(s, name, arrest.OfLayout, s.quantity(name)) }
	p.AnchorHeight = figure("anchor_height")
	word := s.choice("edge")
	p.Edge, p.RatedBy = edges[word], s.text("edge_rated_by")
	p.BehindEdge = figure("anchor_behind_edge")
	p.DRing, p.Feet, p.HalfWidth = figure("d_ring_height"), figure("d_ring_to_feet"), figure("half_width")
	p.Length = figure("connector_length")
	l.slack = s.quantity("slack")
	p.Slack = in.figure(s, "slack", arrest.OfLayout, l.slack)
	p.Locking = figure("travel_before_locking")
	for _, name := range []string{"anchor_height", "edge", "d_ring_height"} {
		in.refused = in.refused || !s.has(name)
	}
	in.refused = in.refused || word == "" || p.Edge != rig.NoEdge && !s.has("anchor_behind_edge")
}

// places reads the positions.
func (in *inputs) places(list []*table) {
	if !in.few(list, rig.MaxPositions, "a layout has at most %d positions", "take out: positions that lie between two others, or write a job of their own for them") {
		return
	}
	names := in.named(list, "position")
	for i, s := range list {
		if !s.has("name") && len(list) > 1 {
			in.refused = true
			s.missing(s.group.named["name"])
		}
		in.position = i + 1
		in.layout.plan.Positions = append(in.layout.plan.Positions, arrest.PlannedPosition{
			Name:  names[i],
			Along: in.figure(s, "along", arrest.OfLayout, s.quantity("along")),
			Out:   in.figure(s, "out", arrest.OfLayout, s.quantity("out")),
		})
		in.refused = in.refused || !s.has("along") || !s.has("out")
	}
	in.position = 0
}

// few refuses more sections than there is room for.
func (in *inputs) few(list []*table, most int, reason, hint string) bool {
	if len(list) <= most {
		return true
	}
	at := list[most]
	at.page.fault(at.path, at.path, "", fmt.Sprintf(reason, most), hint)
	in.refused = true
	return false
}

// named returns the names of sections, "position 2" where one has none, and
// refuses two of one name.
func (in *inputs) named(list []*table, thing string) []string {
	names, first := make([]string, len(list)), map[string]int{}
	for i, s := range list {
		if names[i] = s.text("name"); names[i] == "" {
			names[i] = thing + " " + strconv.Itoa(i+1)
			continue
		}
		if before, known := first[names[i]]; known {
			in.refused = true
			s.fault("name", names[i], list[before].path+" has this name already", "write: name = "+strconv.Quote(names[i]+" 2"))
			continue
		}
		first[names[i]] = i
	}
	return names
}

// below reads the obstacles.
func (in *inputs) below(list []*table) {
	if !in.few(list, rig.MaxObstacles, "a layout has at most %d obstacles", "take out: obstacles that are farthest off, or deeper than another that covers them") {
		return
	}
	names := in.named(list, "obstacle")
	for i, s := range list {
		in.layout.plan.Obstacles = append(in.layout.plan.Obstacles, in.obstacle(s, names[i]))
		in.refused = in.refused || !s.has("name") || !s.has("below")
	}
}

// obstacle reads one [[obstacle]].
func (in *inputs) obstacle(s *table, name string) arrest.PlannedObstacle {
	figure := func(name string) int { return in.figure(s, name, arrest.OfLayout, s.quantity(name)) }
	o := arrest.PlannedObstacle{
		Name: name, Moving: s.boolean("moving"), Below: figure("below"), Height: figure("height"),
		AlongFrom: figure("along_from"), AlongTo: figure("along_to"), OutFrom: figure("out_from"), OutTo: figure("out_to"),
		StopOver: figure("stop_over"),
	}
	sides := 0
	for _, side := range sidesOfObstacle {
		if s.has(side) {
			sides++
		}
	}
	in.refused = in.refused || sides > 0 && sides < len(sidesOfObstacle)
	switch {
	case o.Moving && sides > 0:
		in.refused = true
		s.fault("moving", "true", "what moves can be anywhere in plan and has no sides", "take out: "+s.key("moving")+or+
			"take out "+enumerate(sidesOfObstacle, ", ")+", or write a second [[obstacle]] for where it stands still")
	case s.has("height") && sides == 0 && !o.Moving && len(s.meant) == 0:
		in.refused = true
		s.fault("height", "", "without sides the obstacle is a level, and a level has no underside",
			"take out: "+s.key("height")+or+"write its sides: "+enumerate(sidesOfObstacle, ", "))
	}
	return o
}

// along settles what the layout takes from the parts of the path: length,
// slack, travel before locking.
func (in *inputs) along() {
	if in.layout == nil {
		return
	}
	in.lockingOf()
	in.lengthOf()
}

// lockingOf sets the travel before locking, which a part of the path may state
// in place of the layout.
func (in *inputs) lockingOf() {
	l, s := in.layout, in.layout.table
	part := in.retractable()
	switch {
	case part != nil && s.has("travel_before_locking") && !part.has("travel_before_locking"):
		in.refused = true // the part asks for it
	case part != nil && s.has("travel_before_locking"):
		in.refused = true
		s.fault("travel_before_locking", "", part.key("travel_before_locking")+" says it already", "take out: "+s.key("travel_before_locking"))
	case part != nil && s.has("slack"):
		in.refused = true
		s.fault("slack", l.slack.band.Text, part.path+" is a retractable, whose line has no slack", "take out: "+s.key("slack"))
	case part == nil && !s.has("slack") && !s.has("travel_before_locking"):
		in.refused = true
		s.neither("slack", "travel_before_locking")
	case l.slack.given && l.slack.band.High > 0 && in.path != nil:
		in.slackTwice()
	}
}

// neither records that none of the keys is there of which one has to be.
func (t *table) neither(names ...string) {
	if !slices.ContainsFunc(names, func(name string) bool { return slices.Contains(t.meant, name) }) {
		t.noneOf(names)
	}
}

// retractable returns the part of the path that is one, and takes its travel
// before locking for the layout; nil where no part is. More than one is refused.
func (in *inputs) retractable() *table {
	if in.path == nil {
		return nil
	}
	var part *table
	for i := range in.path.plan.Parts {
		s := in.path.list[i]
		if in.path.plan.Parts[i].Kind != connector.Retractable {
			continue
		}
		if part != nil {
			in.refused = true
			s.fault("part", aRetractable, part.path+" is a retractable too, and a layout has one", "take out: "+part.path+", or "+s.path)
			continue
		}
		part, in.layout.plan.Locking = s, in.path.plan.Parts[i].Locking
		in.refused = in.refused || in.layout.plan.Locking == arrest.NoFigure
	}
	return part
}

// slackTwice refuses slack of the layout beside that of a loading curve which
// begins without force.
func (in *inputs) slackTwice() {
	for i := range in.path.plan.Parts {
		if p := in.path.plan.Parts[i].Points; len(p) > 1 && p[1].Force == 0 {
			in.refused = true
			in.layout.table.fault("slack", in.layout.slack.band.Text, in.path.list[i].key("points")+" begins with slack of its own: it would be counted twice",
				"write: slack = \"0 m\""+or+"take the slack out of "+in.path.list[i].key("points"))
			return
		}
	}
}

// lengthOf sets the length of the connector, which is the sum of the lengths
// of the parts where every part states one and the layout does not.
func (in *inputs) lengthOf() {
	s := in.layout.table
	parts := in.lengths()
	if !s.has("connector_length") {
		if !parts.all {
			in.refused = true
			s.missing(s.group.named["connector_length"])
		} else if len(parts.figures) > 0 && !in.refused {
			in.total(&parts)
		}
		return
	}
	own := in.entered("layout.connector_length")
	if own == nil || len(parts.figures) == 0 || parts.sum.Low <= own.Band.High {
		return
	}
	in.refused = true
	s.fault("connector_length", own.Band.Text, "the parts alone are longer: "+parts.sum.Text,
		"measure: from the anchor to the D-ring, taut, every part between the two counted")
}

// A partLengths is what the parts of the path state of their lengths.
type partLengths struct {
	figures []int // places in Case.Figures
	sum     quantity.Band
	all     bool // every part states one, and there is a part
}

// lengths gathers the lengths of the parts. One that is written and refused
// counts as stated: its own fault is told.
func (in *inputs) lengths() partLengths {
	if in.path == nil {
		return partLengths{}
	}
	p := partLengths{all: true}
	for i := range in.path.plan.Parts {
		s, n := in.path.list[i], in.path.plan.Parts[i].Length
		if n == arrest.NoFigure {
			stated := s.has("length") || slices.Contains(s.meant, "length")
			p.all, in.refused = p.all && stated, in.refused || stated
			continue
		}
		b := in.figures[n]
		if len(p.figures) > 0 {
			b = quantity.Sum(p.sum, b)
		}
		p.figures, p.sum = append(p.figures, n), b
	}
	return p
}

// total makes the length of the connector a figure that follows those of the
// parts.
func (in *inputs) total(parts *partLengths) {
	at, room := in.room(in.layout.table, "connector_length", parts.sum)
	if !room {
		return
	}
	add := func(c *arrest.Case) {
		c.Figures[at] = 0
		for _, n := range parts.figures {
			c.Figures[at] += c.Figures[n]
		}
	}
	for i := range in.path.list {
		one := in.entered(in.path.list[i].key("length"))
		set := one.Set
		one.Set = func(c *arrest.Case, x float64) {
			set(c, x)
			add(c)
		}
	}
	add(in.point)
	in.layout.plan.Length = at
}
