package reportgen

import (
	"encoding/json"
	"math"
	"slices"
	"strings"
	"testing"

	"arrestcheck/arrest"
	"arrestcheck/arrest/quantity"
	"arrestcheck/arrest/rig"
	"arrestcheck/limits"
)

// A layout in pieces. Lengths are settled, and bare ones are in m.
type laid struct{ layout, positions, obstacles, clearance, rest string }

func (l laid) sheet(t *testing.T) *Sheet {
	t.Helper()
	job := "format = \"arrestcheck job 1\"\n[document]\ntitle = \"Lamp change\"\nrescue = \"ladder team\"\n[worker]\n" +
		"mass = { value = \"100 kg ± 0 kg\", source = \"measured\" }\ntools = { value = \"0 kg\", source = \"plan\" }\n" +
		"[layout]\n" + settledLengths(l.layout) + settledLengths(l.positions) + settledLengths(l.obstacles) + settledLengths(l.clearance) + l.rest
	return worked(t, "job.toml", []byte(job))
}

// settledLengths writes lines "key = 1.5" with unit, tolerance and source, and
// leaves all others as they are.
func settledLengths(lines string) string {
	var b strings.Builder
	for line := range strings.Lines(lines) {
		if key, value, found := strings.Cut(strings.TrimSpace(line), " = "); found && isNumber(number(value)) {
			line = key + " = { value = \"" + value + " m ± 0 m\", source = \"measured\" }\n"
		}
		b.WriteString(line)
	}
	return b.String()
}

const (
	overhead = "anchor_height = 3.0\nedge = \"none\"\nd_ring_height = 1.5\nd_ring_to_feet = 1.5\nhalf_width = 0.3\nconnector_length = 2.0\nslack = 0\n"
	beside   = "[[position]]\nname = \"lamp\"\nalong = 1.2\nout = 0\n"
	below    = "[[position]]\nname = \"lamp\"\nalong = 0\nout = 0\n"
	floor    = "[[obstacle]]\nname = \"floor\"\nbelow = 6\n"
	everyone = "[clearance]\ndatum = \"feet\"\ndeceleration_distance = 1.1\nline_stretch = 0.2\nharness_stretch = 0.3\nanchor_give = 0\nmargin = 1\n"
)

// layoutJSON is what the tests below read of the JSON of a layout.
type layoutJSON struct {
	Estimates []struct {
		Quantity arrest.Quantity
		Position *string
		Low      *float64
		High     *float64
	}
	Layout *struct {
		Edge      string
		Worst     *string `json:"worst_position"`
		Positions []struct {
			Name, Status string
			FreeFall     *float64 `json:"free_fall"`
			Held         *float64 `json:"held_free_fall"`
			SwingAngle   *float64 `json:"swing_angle"`
			OffsetAngle  *float64 `json:"offset_angle"`
			SwingDrop    *float64 `json:"swing_drop"`
			Swing        *struct {
				Low       *float64 `json:"lowest_speed_low"`
				High      *float64 `json:"lowest_speed_high"`
				Obstacles []struct {
					Obstacle string
					Reached  bool
					Low      *float64 `json:"speed_low"`
					Hit      *float64 `json:"hit_mean_force_low"`
				}
			}
			Model *struct {
				Peak *float64 `json:"peak_force"`
			} `json:"swing_model"`
			Restraint struct {
				Reach, Left *float64
				Crossed     bool `json:"edge_can_be_crossed"`
			}
		}
		Clearance *struct {
			Position, Datum string
			Rooms           []struct {
				Evidence arrest.Evidence
				Needed   *float64
				Floor    bool        `json:"not_less_than"`
				Shortest *float64    `json:"shortest_room"`
				Feet     jsonSumRead `json:"below_feet"`
				Anchor   jsonSumRead `json:"below_anchor"`
				Apart    *float64    `json:"datums_apart"`
				Left     []struct {
					Obstacle   string
					Room, Left *float64
				}
			}
		}
		Obstacles []struct {
			Name   string
			Top    *float64
			Bottom *float64
		}
	}
}

type jsonSumRead struct {
	Needed, Present           *float64
	Counted, Missing, Foreign []string
}

func readLayout(t *testing.T, s *Sheet) (doc layoutJSON) {
	t.Helper()
	if err := json.Unmarshal([]byte(asJSON(t, s)), &doc); err != nil {
		t.Fatal(err)
	}
	if doc.Layout == nil {
		t.Fatal("no layout")
	}
	return doc
}

// holds reports whether the figure is there and as wanted.
func holds(x *float64, want float64) bool { return x != nil && quantity.Close(*x, want, 1e-9) }

// What the mechanics promise of three layouts: an anchor 3.0 m above the surface
// with the D-ring at 1.5 m, 1.2 m aside, and a connector of 2.0 m, which makes
// right triangles of 1.2, 1.6 and 2.0; an anchor at the feet, 1.5 + 1.8; and one
// on the surface, 1.0 m behind an edge, 1.5 + 2.0 - 1.0.
func TestLayoutJSON(t *testing.T) {
	const degree = math.Pi / 180
	p := readLayout(t, laid{overhead, beside, "", "", ""}.sheet(t)).Layout.Positions[0]
	if !holds(p.FreeFall, 0.1) || !holds(p.SwingDrop, 0.4) || !holds(p.SwingAngle, math.Asin(0.6)) || !holds(p.OffsetAngle, math.Atan(0.8)) {
		t.Errorf("overhead: %+v", p)
	}
	if math.Abs(*p.SwingAngle/degree-36.870) > 5e-4 || math.Abs(*p.OffsetAngle/degree-38.660) > 5e-4 || p.Name != "lamp" || p.Status != "known" {
		t.Errorf("overhead: %v and %v rad", *p.SwingAngle, *p.OffsetAngle)
	}
	feet := strings.NewReplacer("= 3.0", "= 0", "length = 2.0", "length = 1.8").Replace(overhead)
	p = readLayout(t, laid{feet, below, "", "", ""}.sheet(t)).Layout.Positions[0]
	if !holds(p.FreeFall, 3.3) || p.Swing != nil || p.Model != nil {
		t.Errorf("at the feet: %+v", p)
	}
	doc := readLayout(t, laid{overEdge, below, "", "", ""}.sheet(t))
	if p = doc.Layout.Positions[0]; !holds(p.FreeFall, 2.5) || !holds(p.Held, 2.5) || doc.Layout.Edge != "sharp" || !holds(p.Restraint.Left, -1) || !p.Restraint.Crossed {
		t.Errorf("over the edge: %+v", doc.Layout)
	}
}

const overEdge = "anchor_height = 0\nedge = \"sharp\"\nanchor_behind_edge = 1.0\nd_ring_height = 1.5\nconnector_length = 2.0\nslack = 0\n"

// A connector that slides along the edge gives the longer fall: 0.5 m along the
// edge it is taut at sqrt(2^2 - 0.5^2) - 1 below it, held where it went over at
// 2 - sqrt(0.5^2 + 1).
func TestHeldOnTheEdge(t *testing.T) {
	s := laid{overEdge, strings.Replace(below, "along = 0", "along = 0.5", 1), "", "", ""}.sheet(t)
	p := readLayout(t, s).Layout.Positions[0]
	if !holds(p.FreeFall, 1.5+math.Sqrt(3.75)-1) || !holds(p.Held, 1.5+2-math.Sqrt(1.25)) {
		t.Errorf("free fall %v, held %v", *p.FreeFall, *p.Held)
	}
	text := unwrapped(Build(s, SIUnits))
	mustHold(t, text, "free fall 2.44 m", "free fall, were the connector held on the edge 2.38 m", "runs over it at the first pull",
		"none: it can be gone over there", "1.00 m away: it is a fall that has to be arrested")
	if strings.Contains(unwrapped(Build(laid{overEdge, below, "", "", ""}.sheet(t), SIUnits)), heldFallWord[:20]) {
		t.Error("the free fall of a held connector is printed where it is the same")
	}
}

// unwrapped is a report as one text: the cells of a row side by side.
func unwrapped(r Report) string {
	var b strings.Builder
	eachText(r, func(s string) { b.WriteString(s + " ") })
	return strings.Join(strings.Fields(strings.ReplaceAll(b.String(), noBreak, " ")), " ")
}

// A clearance with every item: straight below an anchor 3.0 m up the connector of
// 2.0 m lets the D-ring at 1.5 m fall 0.5 m. Below the feet 0.5 + 1.1 + 0.2 + 0.3
// + 0 + 1 = 3.1 m are needed, below the anchor 2.0 + 1.5 in place of 0.5: 6.1 m,
// which is the same room. To a floor 6 m down 2.9 m are left.
func TestClearance(t *testing.T) {
	s := laid{overhead, below, floor, everyone, ""}.sheet(t)
	c := readLayout(t, s).Layout.Clearance
	r := c.Rooms[0]
	if len(c.Rooms) != 1 || r.Evidence != arrest.Given || c.Position != "lamp" || c.Datum != "feet" || r.Floor {
		t.Errorf("%+v", c)
	}
	if !holds(r.Needed, 3.1) || !holds(r.Shortest, 3.1) || !holds(r.Feet.Needed, 3.1) || !holds(r.Anchor.Needed, 6.1) || *r.Apart != 0 {
		t.Errorf("%+v", r)
	}
	if len(r.Left) != 1 || !holds(r.Left[0].Left, 2.9) || !holds(r.Left[0].Room, 6) {
		t.Errorf("%+v", r.Left)
	}
	mustHold(t, unwrapped(Build(s, SIUnits)),
		"Clearance by the entries for fall and stop, item by item", `From "lamp", as written.`,
		"connector 2.00 m the layout, M-20 left out counted", "D-ring to feet 1.50 m settled (measured) left out counted",
		"free fall 0.500 m the layout, M-20 counted left out",
		"below the feet 3.10 m needed; limits on what is needed are held against this one", "below the anchor 6.10 m needed", "between the two none",
		"3.10 m below the walking surface, which is 6.10 m below the anchor, would do by the greater of the two sums",
		`"floor" 6.00 m 3.10 m 2.90 m`)
	anchored := laid{overhead, below, floor, strings.Replace(everyone, `"feet"`, `"anchor"`, 1), ""}.sheet(t)
	mustHold(t, unwrapped(Build(anchored, SIUnits)), "below the anchor 6.10 m needed; limits on what", `"floor" 9.00 m 6.10 m 2.90 m`)
}

// Each obstacle is held against the room at its own nearest, wherever the others
// are: 1.2 - 3.3 m to what moves, 6 - 3.3 m to the floor. For where the sums from
// the two datums differ, as the D-ring to the feet is 0.2 m longer than the D-ring
// was high, the greater room counts: 3.1 + 0.2 m.
func TestNearestObstacles(t *testing.T) {
	truck := "[[obstacle]]\nname = \"truck\"\nmoving = true\nbelow = { value = \"1.2 m .. 5 m\", source = \"plan\" }\n"
	deeper := strings.Replace(floor, "= 6", "= { value = \"6 m .. 7 m\", source = \"plan\" }", 1)
	s := laid{strings.Replace(overhead, "d_ring_to_feet = 1.5", "d_ring_to_feet = 1.7", 1), below, deeper + truck, everyone, ""}.sheet(t)
	r := readLayout(t, s).Layout.Clearance.Rooms[0]
	if len(r.Left) != 2 || r.Left[0].Obstacle != "truck" || !holds(r.Left[0].Left, -2.1) || !holds(r.Left[1].Left, 2.7) || !holds(r.Left[1].Room, 6) {
		t.Errorf("left: %+v", r.Left)
	}
	if !holds(r.Needed, 3.1) || !holds(r.Shortest, 3.3) || !holds(r.Apart, 0.2) {
		t.Errorf("needed %v, shortest %v, apart %v", *r.Needed, *r.Shortest, *r.Apart)
	}
	mustHold(t, unwrapped(Build(s, SIUnits)), `From "lamp", at the point of the entries that leaves the least room`, `"truck", which moves 1.20 m 3.30 m -2.10 m`,
		"between the two 0.200 m", "3.30 m below the walking surface, which is 6.30 m below the anchor, would do by the greater of the two sums")
}

// A missing item is missing and never zero; an included one is counted once.
func TestClearanceWithGaps(t *testing.T) {
	s := laid{overhead, below, floor, strings.Replace(everyone, "margin = 1\n", "", 1), roomLimit}.sheet(t)
	r := readLayout(t, s).Layout.Clearance.Rooms[0]
	if !r.Floor || !holds(r.Needed, 2.1) || r.Shortest != nil || r.Feet.Needed != nil || !slices.Equal(r.Feet.Missing, []string{"margin"}) {
		t.Errorf("%+v", r)
	}
	mustHold(t, unwrapped(Build(s, SIUnits)), "margin not entered MISSING MISSING",
		"below the feet not less than 2.10 m: margin missing", "not known; not less than 2.10 m below the walking surface",
		`"floor" 6.00 m not less than 2.10 m at most 3.90 m`, "clearance needed not less than 2.10 m", "clearance left at most 3.90 m")
	if f := s.Assessment.Findings[0]; f.Outcome != limits.Undecided {
		t.Errorf("with an item missing: %s", f.Outcome)
	}
	e, ok := Explain(s, "room", SIUnits)
	if !ok || !strings.Contains(unwrapped(e), "Enter what is missing of the clearance (margin), or in which item it is included") {
		t.Errorf("what would settle it: %s", unwrapped(e))
	}
	included := strings.Replace(everyone, "harness_stretch = 0.3\n", "margin_includes = [\"harness_stretch\"]\n", 1)
	mustHold(t, unwrapped(Build(laid{overhead, below, floor, included, ""}.sheet(t), SIUnits)),
		"harness stretch not entered in margin included included", "margin 1.00 m settled (measured) includes harness stretch counted counted",
		"below the feet 2.80 m needed")
}

const roomLimit = "[[limit]]\nid = \"room\"\nquantity = \"clearance_left\"\nat_least = \"0.5 m\"\nauthority = \"site rule 4\"\nedition = \"second\"\nkind = \"person\"\nchecked_on = \"5 May 2025\"\n"

// Without stretch the speed at the lowest point lies between sqrt(v^2 sin^2 a + 2
// g H) and sqrt(2 g (h + H)): v^2 = 2 g 0.1, sin a = 0.6, H = 0.4. A limit on it
// is decided by neither.
func TestSwingWithoutStretch(t *testing.T) {
	const g = 9.80665
	limit := strings.NewReplacer("clearance_left", "swing_speed", "at_least = \"0.5 m\"", "at_most = \"4 m/s\"").Replace(roomLimit)
	beam := "[[obstacle]]\nname = \"beam\"\nbelow = 0\nheight = 0.2\nalong_from = -0.4\nalong_to = 0.2\nout_from = -1\nout_to = 1\nstop_over = 0.05\n"
	s := laid{overhead, beside, beam, "", limit}.sheet(t)
	swing := readLayout(t, s).Layout.Positions[0].Swing
	low, high := math.Sqrt(2*g*0.1*0.36+2*g*0.4), math.Sqrt(2*g*0.5)
	if !holds(swing.Low, low) || !holds(swing.High, high) {
		t.Errorf("%v to %v, want %v to %v", *swing.Low, *swing.High, low, high)
	}
	// The body comes to the beam's side, half a width before it: the D-ring is 0.5 m
	// from the pivot, sqrt(2^2 - 0.5^2) below it.
	z := 3 - math.Sqrt(3.75)
	drop := 1.4 - z // from taut, 3 - 1.6
	at := math.Sqrt(2*g*0.1*0.36 + 2*g*drop)
	hit := 100*at*at/(2*0.05) + 100*g*0.25
	if o := swing.Obstacles[0]; !o.Reached || !holds(o.Low, at) || !holds(o.Hit, hit) {
		t.Errorf("%+v, want %v and %v", o, at, hit)
	}
	text := unwrapped(Build(s, SIUnits))
	mustHold(t, text, "speed at the lowest point 2.92 to 3.13 m/s", "speed of the swing 2.92 to 3.13 m/s if the connector did not stretch, M-22",
		"undecided: figures that hold only if the connector did not stretch decide no limit", "mean force of the blow, stopped over 0.0500 m, not less than",
		`the body comes to "beam" after the first pull`)
	if strings.Contains(text, "if the stop were a pulse") || strings.Contains(text, "assumed shape (connector") {
		t.Error("a connector without stretch is called a shape")
	}
	e, _ := Explain(s, "room", SIUnits)
	mustHold(t, unwrapped(e), "What holds only without stretch settles no row. Enter the connector path")
}

// With a connector path the swing is worked out in time and stands beside what
// holds without stretch; the allowance is taken on the travel.
func TestSwingInTime(t *testing.T) {
	s := sheet(t, "layout-path.toml")
	p := readLayout(t, s).Layout.Positions[0]
	if p.Model == nil || p.Swing == nil || !(*p.Model.Peak > 0) {
		t.Fatalf("%+v", p)
	}
	mustHold(t, unwrapped(Build(s, SIUnits)), "by the model of the path", "no swing, this or a later one, has a peak above",
		"with the allowance of 25 % on the travel of the path", "Clearance by the model, item by item")
}

// The worst of several positions is named for each figure. Straight below the
// anchor the fall is the longest, 1.2 m aside the swing.
func TestWorstPosition(t *testing.T) {
	two := below + strings.Replace(beside, "lamp", "far lamp", 1)
	s := laid{overhead, two, floor, everyone, ""}.sheet(t)
	doc := readLayout(t, s)
	if *doc.Layout.Worst != "lamp" {
		t.Errorf("worst: %s", *doc.Layout.Worst)
	}
	for _, e := range doc.Estimates {
		want := map[arrest.Quantity]string{arrest.FreeFall: "lamp", arrest.SwingAngle: "far lamp", arrest.OffsetAngle: "far lamp", arrest.SwingDrop: "far lamp"}[e.Quantity]
		if want != "" && (e.Position == nil || *e.Position != want) {
			t.Errorf("%s: %v, want %s", e.Quantity, e.Position, want)
		}
	}
	text := unwrapped(Build(s, SIUnits))
	mustHold(t, text, `- "lamp": free fall`, `- "far lamp": offset angle at work, swing angle when taut, drop of the swing`, `M-20, from "lamp"`, `M-22, from "far lamp"`)
}

// Restraint: with the anchor on the surface 3 m behind the edge, 2 m of connector
// end 1 m before it.
func TestRestraint(t *testing.T) {
	held := strings.Replace(overEdge, "= 1.0", "= 3.0", 1)
	s := laid{held, strings.Replace(below, "out = 0", "out = -2", 1), "", "", ""}.sheet(t)
	p := readLayout(t, s).Layout.Positions[0]
	if !holds(p.Restraint.Reach, 2) || !holds(p.Restraint.Left, 1) || p.Restraint.Crossed || p.FreeFall != nil {
		t.Errorf("%+v", p)
	}
	mustHold(t, unwrapped(Build(s, SIUnits)), `"lamp" 2.00 m 3.00 m 1.00 m`, restraintHolds, "free fall no fall", "held back before the edge")
}

// A sheet with a layout says what it looked at and what not; the lists of sheets
// without stand in the words that are exchanged.
func TestListsOfALayout(t *testing.T) {
	for _, c := range []struct {
		exchanged map[string]string
		in        lists
	}{{layoutAssumptions, standingAssumptions}, {layoutNotChecked, notChecked}} {
		for text := range c.exchanged {
			if !slices.ContainsFunc(c.in[:], func(list []string) bool { return slices.Contains(list, text) }) {
				t.Errorf("no list holds %q", text)
			}
		}
	}
	text := unwrapped(Build(laid{overhead, below, floor, everyone, ""}.sheet(t), SIUnits))
	mustHold(t, text, "Heights count from the walking surface", "was not entered as an obstacle", "swings from there in an upright plane")
	if strings.Contains(text, standingAssumptions[aPerson][1]) {
		t.Error("it still says that the body does not swing")
	}
}

// Closed sets of the layout have words.
func TestLayoutWords(t *testing.T) {
	for s := rig.Known; s <= rig.InStructure; s++ {
		if placeStatus[s] == "" {
			t.Errorf("no words for the status %s", s)
		}
	}
	for s := rig.Swung; s <= rig.Uncounted; s++ {
		if plannedStatus[s] == "" {
			t.Errorf("no words for the end %s", s)
		}
	}
	for it := range rig.ItemCount {
		if itemIDs[it] == "" || arrest.ItemWord(it) == "" {
			t.Errorf("no words for item %d", it)
		}
	}
}
