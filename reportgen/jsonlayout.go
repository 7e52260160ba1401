package reportgen

import (
	"math"

	"arrestcheck/arrest"
	"arrestcheck/arrest/rig"
)

// jsonLayout is the layout of a job, SI. Heights count from the walking surface
// upwards, angles in rad from straight down.
type jsonLayout struct {
	Edge      string         `json:"edge"`
	RatedBy   *string        `json:"edge_rated_by"`
	Worst     *string        `json:"worst_position"` // of the greatest free fall
	Positions []jsonPosition `json:"positions"`
	Clearance *jsonClearance `json:"clearance"`
	Obstacles []jsonObstacle `json:"obstacles"`
	Anchor    *jsonSpot      `json:"anchor"` // at the point of the first position
}

// jsonSpot is a place: along the edge from the anchor, outwards from the edge
// line or, without an edge, from the anchor, and height.
type jsonSpot struct {
	Along  figure `json:"along"`
	Out    figure `json:"out"`
	Height figure `json:"height"`
}

// jsonPosition is one position at one point of the entries.
type jsonPosition struct {
	Name         string        `json:"name"`
	Corner       arrest.Corner `json:"corner"`
	Status       string        `json:"status"`
	Start        jsonSpot      `json:"start"`
	Taut         jsonSpot      `json:"taut"`
	LowestHeight figure        `json:"lowest_height"`
	Distance     figure        `json:"distance"`
	Offset       figure        `json:"offset"`
	Radius       figure        `json:"radius"`
	FreeFall     figure        `json:"free_fall"`
	HeldFreeFall figure        `json:"held_free_fall"`
	Depth        figure        `json:"depth_below_anchor"`
	OffsetAngle  figure        `json:"offset_angle"`
	SwingAngle   figure        `json:"swing_angle"`
	SwingDrop    figure        `json:"swing_drop"`
	OverEdge     bool          `json:"over_edge"`
	EdgeLater    bool          `json:"edge_later"`
	EdgeUnrated  bool          `json:"edge_unrated"`
	InPlane      bool          `json:"in_plane"`
	IntoFace     bool          `json:"into_structure"`
	Restraint    jsonRestraint `json:"restraint"`
	Swing        *jsonSwing    `json:"swing"`       // null where the body does not swing in a plane
	Model        *jsonSwung    `json:"swing_model"` // null without a connector path too
}

type jsonRestraint struct {
	Reach         figure `json:"reach"`
	StandingReach figure `json:"standing_reach"`
	EdgeDistance  figure `json:"edge_distance"`
	Left          figure `json:"left"`
	EdgeNearest   figure `json:"edge_nearest"`
	Crossed       bool   `json:"edge_can_be_crossed"`
}

// jsonSwing holds only if the connector did not stretch.
type jsonSwing struct {
	Speed           figure      `json:"speed_at_first_pull"`
	Tangential      figure      `json:"speed_along_swing"`
	LowestSpeedLow  figure      `json:"lowest_speed_low"`
	LowestSpeedHigh figure      `json:"lowest_speed_high"`
	Height          figure      `json:"straight_fall_high"`
	Time            figure      `json:"time_to_lowest"`
	Obstacles       []jsonTouch `json:"obstacles"`
}

// jsonTouch is the first touch of an obstacle.
type jsonTouch struct {
	Obstacle  string `json:"obstacle"`
	Reached   bool   `json:"reached"`
	Unknown   bool   `json:"unknown"`
	Falling   bool   `json:"before_first_pull"`
	Height    figure `json:"height"`
	SpeedLow  figure `json:"speed_low"`
	SpeedHigh figure `json:"speed_high"`
	Straight  figure `json:"straight_fall_high"`
	HitForce  figure `json:"hit_mean_force_low"` // with a stated stop only
}

// jsonSwung is the swing worked out in time. Times count from the first pull.
type jsonSwung struct {
	End       string      `json:"end"`
	Peak      figure      `json:"peak_force"`
	PeakTime  figure      `json:"peak_time"`
	PeakBound figure      `json:"peak_bound"`
	DropBound figure      `json:"drop_bound"`
	Time      figure      `json:"time_to_lowest"`
	Lowest    figure      `json:"lowest_height"`
	Drop      figure      `json:"drop"`
	Speed     figure      `json:"lowest_speed"`
	Straight  figure      `json:"straight_fall"`
	Extension figure      `json:"extension"`
	Obstacles []jsonTouch `json:"obstacles"`
}

// jsonClearance is the room at the point of the entries that leaves the least.
type jsonClearance struct {
	Position string        `json:"position"`
	Corner   arrest.Corner `json:"corner"`
	Datum    string        `json:"datum"`
	Rooms    []jsonRoom    `json:"rooms"`
}

type jsonRoom struct {
	Evidence arrest.Evidence `json:"evidence"`
	Needed   figure          `json:"needed"` // below the datum; with items missing what the others come to
	Floor    bool            `json:"not_less_than"`
	Shortest figure          `json:"shortest_room"` // below the walking surface; null with items missing
	Travel   figure          `json:"travel"`
	Items    []jsonItem      `json:"items"`
	Feet     jsonSum         `json:"below_feet"`
	Anchor   jsonSum         `json:"below_anchor"`
	Apart    figure          `json:"datums_apart"`
	Left     []jsonLeft      `json:"left"` // nearest first
	Aside    []string        `json:"not_in_the_way"`
}

type jsonItem struct {
	Item     string   `json:"item"`
	Value    figure   `json:"value"`
	Includes []string `json:"includes"`
}

type jsonSum struct {
	Needed  figure   `json:"needed"`
	Present figure   `json:"present"`
	Counted []string `json:"counted"`
	Missing []string `json:"missing"`
	Foreign []string `json:"left_out"`
}

type jsonLeft struct {
	Obstacle string `json:"obstacle"`
	Room     figure `json:"room"` // from the walking surface down to its top
	Left     figure `json:"left"`
}

// jsonObstacle is one obstacle at the point of the first position. Sides that it
// has not are null.
type jsonObstacle struct {
	Name   string   `json:"name"`
	Moving bool     `json:"moving"`
	Level  bool     `json:"level"`
	Top    figure   `json:"top"`
	Bottom figure   `json:"bottom"`
	From   jsonSide `json:"from"`
	To     jsonSide `json:"to"`
}

type jsonSide struct {
	Along figure `json:"along"`
	Out   figure `json:"out"`
}

// edgeIDs and datumIDs are the words of the job file.
var (
	edgeIDs  = map[rig.Edge]string{rig.NoEdge: "none", rig.RoundEdge: "round", rig.SharpEdge: "sharp"}
	datumIDs = map[rig.Datum]string{rig.BelowFeet: "feet", rig.BelowAnchor: "anchor"}
	itemIDs  = [rig.ItemCount]string{
		rig.ItemFreeFall: "free_fall", rig.ItemConnector: "connector", rig.ItemDeceleration: "deceleration_distance",
		rig.ItemLineStretch: "line_stretch", rig.ItemHarness: "harness_stretch", rig.ItemFeet: "d_ring_to_feet",
		rig.ItemAnchor: "anchor_give", rig.ItemSwingDrop: "swing_drop", rig.ItemMargin: "margin",
	}
)

// jsonLayout is the layout of the job; nil where it has none.
func (b *builder) jsonLayout() *jsonLayout {
	l := b.res().Layout
	if l == nil {
		return nil
	}
	j := &jsonLayout{
		Edge: edgeIDs[l.Plan.Edge], RatedBy: text(l.Plan.RatedBy), Obstacles: []jsonObstacle{},
		Positions: each(l.Places, func(p *arrest.LayoutPlace) jsonPosition { return newPosition(l.Plan, b.atObstacles(l.Plan, p)) }),
		Clearance: b.newClearance(l),
	}
	if l.Worst >= 0 {
		j.Worst = text(l.Plan.Positions[l.Worst].Name)
	}
	if len(l.Places) > 0 {
		first := &b.atObstacles(l.Plan, &l.Places[0]).Run.Layout
		spot := newSpot(first.Anchor)
		j.Anchor = &spot
		for i := range l.Plan.Obstacles {
			j.Obstacles = append(j.Obstacles, newObstacle(&l.Plan.Obstacles[i], &first.Obstacles[i]))
		}
	}
	return j
}

func newSpot(s rig.Spot) jsonSpot { return jsonSpot{figure(s.X), figure(s.Y), figure(s.Z)} }

func newObstacle(plan *arrest.PlannedObstacle, o *rig.Obstacle) jsonObstacle {
	none := figure(math.NaN())
	j := jsonObstacle{
		Name: plan.Name, Moving: plan.Moving, Level: o.Kind == rig.Level, Top: figure(o.High.Z), Bottom: none,
		From: jsonSide{none, none}, To: jsonSide{none, none},
	}
	if plan.Height != arrest.NoFigure {
		j.Bottom = figure(o.Low.Z)
	}
	if plan.AlongFrom != arrest.NoFigure {
		j.From, j.To = jsonSide{figure(o.Low.X), figure(o.Low.Y)}, jsonSide{figure(o.High.X), figure(o.High.Y)}
	}
	return j
}

func newPosition(plan *arrest.LayoutPlan, p *arrest.LayoutPlace) jsonPosition {
	r := &p.Run.Place
	j := jsonPosition{
		Name: plan.Positions[p.Index].Name, Corner: p.Corner, Status: r.Status.String(), Start: newSpot(r.Start), Taut: newSpot(r.Taut),
		LowestHeight: figure(r.Lowest), Distance: figure(r.Distance), Offset: figure(r.Offset), Radius: figure(r.Radius),
		FreeFall: figure(r.FreeFall), HeldFreeFall: figure(r.HeldFreeFall), Depth: figure(r.Depth),
		OffsetAngle: figure(r.OffsetAngle), SwingAngle: figure(r.SwingAngle), SwingDrop: settledAt(r.SwingDrop),
		OverEdge: r.OverEdge, EdgeLater: r.EdgeLater, EdgeUnrated: r.Unrated, InPlane: r.Plane.Flat, IntoFace: r.Plane.IntoFace,
		Restraint: newRestraint(plan, p),
	}
	if r.Status == rig.Known && r.Plane.Flat && r.Plane.Offset >= noise {
		j.Swing = newSwing(plan, p)
		if p.Run.Planar.Status != 0 {
			j.Model = newSwung(plan, p)
		}
	}
	return j
}

func newRestraint(plan *arrest.LayoutPlan, p *arrest.LayoutPlace) jsonRestraint {
	r := &p.Farthest
	j := jsonRestraint{Reach: figure(r.Reach), StandingReach: figure(r.StandingReach)}
	j.EdgeDistance, j.Left, j.EdgeNearest = figure(math.NaN()), figure(math.NaN()), figure(math.NaN())
	if plan.Edge != rig.NoEdge {
		j.EdgeDistance, j.Left = figure(r.EdgeDistance[p.Index]), figure(r.Margin[p.Index])
		j.EdgeNearest, j.Crossed = figure(r.Nearest), r.Passed
	}
	return j
}

func newSwing(plan *arrest.LayoutPlan, p *arrest.LayoutPlace) *jsonSwing {
	s := &p.Run.Swing
	j := &jsonSwing{
		Speed: figure(s.Speed), Tangential: figure(s.Tangential), LowestSpeedLow: figure(s.LowestLow), LowestSpeedHigh: figure(s.LowestHigh),
		Height: figure(s.Height), Time: figure(s.Time), Obstacles: []jsonTouch{},
	}
	for i := range plan.Obstacles {
		t := &s.Passes[i]
		j.Obstacles = append(j.Obstacles, jsonTouch{
			Obstacle: plan.Obstacles[i].Name, Reached: t.Reached, Unknown: t.Unknown, Falling: t.Falling, Height: figure(t.Z),
			SpeedLow: figure(t.Low), SpeedHigh: figure(t.High), Straight: figure(t.Height), HitForce: figure(stiffHit(plan, p, i)),
		})
	}
	return j
}

func newSwung(plan *arrest.LayoutPlan, p *arrest.LayoutPlace) *jsonSwung {
	m := &p.Run.Planar
	j := &jsonSwung{
		End: m.Status.String(), Peak: figure(m.Peak), PeakTime: figure(m.PeakTime - m.FirstPull), PeakBound: figure(m.PeakBound),
		DropBound: figure(m.DropBound), Time: figure(m.Lowest.Time - m.FirstPull), Lowest: figure(m.Lowest.Z), Drop: figure(m.Lowest.Drop),
		Speed: figure(m.Lowest.Speed), Straight: figure(m.Lowest.Height), Extension: figure(m.Extension), Obstacles: []jsonTouch{},
	}
	for i := range plan.Obstacles {
		t := &m.Passes[i]
		j.Obstacles = append(j.Obstacles, jsonTouch{
			Obstacle: plan.Obstacles[i].Name, Reached: t.Reached, Unknown: t.Unknown, Falling: t.Reached && t.Time < m.FirstPull,
			Height: figure(t.Z), SpeedLow: figure(t.Speed), SpeedHigh: figure(t.Speed), Straight: figure(t.Height),
			HitForce: figure(swungHit(plan, p, i)),
		})
	}
	return j
}

func (b *builder) newClearance(l *arrest.LayoutResult) *jsonClearance {
	if l.Plan.Clearance == nil || l.Tightest == nil {
		return nil
	}
	j := &jsonClearance{
		Position: l.Plan.Positions[l.Tightest.Index].Name, Corner: b.tightestCorner(), Datum: datumIDs[l.Plan.Clearance.Datum], Rooms: []jsonRoom{},
	}
	for _, c := range b.clearings(l) {
		j.Rooms = append(j.Rooms, newRoom(l.Plan, &c))
	}
	return j
}

func newRoom(plan *arrest.LayoutPlan, c *clearing) jsonRoom {
	room := c.room
	j := jsonRoom{
		Evidence: c.evidence, Needed: figure(room.Needed), Floor: room.Floor, Shortest: figure(math.NaN()), Travel: figure(math.NaN()),
		Feet: newSum(&room.Feet), Anchor: newSum(&room.Anchor), Apart: settledAt(room.Clearance.Apart(c.place.Run.Layout.Anchor.Z)),
		Left: []jsonLeft{}, Aside: []string{},
	}
	if shortest, known := c.shortest(); known {
		j.Shortest = figure(shortest)
	}
	if c.evidence == arrest.Modelled {
		j.Travel = figure(room.Travel)
	}
	for it := range rig.ItemCount {
		if e := &room.Clearance.Entries[it]; e.Present {
			j.Items = append(j.Items, jsonItem{itemIDs[it], figure(e.Value), itemList(e.Includes)})
		}
	}
	for _, left := range room.Lefts.List[:room.Lefts.Count] {
		j.Left = append(j.Left, jsonLeft{plan.Obstacles[left.Obstacle].Name, figure(left.Room), figure(left.Left)})
	}
	for i := range plan.Obstacles {
		if room.Lefts.Aside>>i&1 == 1 {
			j.Aside = append(j.Aside, plan.Obstacles[i].Name)
		}
	}
	return j
}

func newSum(s *rig.Sum) jsonSum {
	return jsonSum{figure(s.Needed), figure(s.Present), itemList(s.Counted), itemList(s.Missing), itemList(s.Foreign)}
}

// itemList are the items of a set in the words of the job file.
func itemList(set rig.Items) []string {
	list := []string{}
	for it := range rig.ItemCount {
		if set.Has(it) {
			list = append(list, itemIDs[it])
		}
	}
	return list
}
