package jobfile_test

import (
	"fmt"
	"math"
	"slices"
	"strings"
	"testing"

	"github.com/google/go-cmp/cmp"

	"arrestcheck/arrest"
	"arrestcheck/arrest/jobfile"
	"arrestcheck/arrest/rig"
	"arrestcheck/limits"
)

// placeOf is what the layout of a file comes to at its first position.
func placeOf(f *jobfile.File) rig.Place { return arrest.LayoutAt(&f.Job.Point).Place }

const inDegrees = 180 / math.Pi

// The figures beside the names are worked out by hand.
func TestLayoutsFromFiles(t *testing.T) {
	p := placeOf(goodJob(t, "layout-overhead.toml"))
	near(t, "free fall, sides 1.2, 1.6 and 2.0", p.FreeFall, 1.6-1.5, 1e-12)
	near(t, "swing, sine 0.6", p.SwingAngle*inDegrees, 36.869897645844, 1e-12)
	near(t, "offset, tangent 1.2/1.5", p.OffsetAngle*inDegrees, 38.65980825409, 1e-12)
	near(t, "drop to the length of 2.0", p.SwingDrop, 2.0-1.6, 1e-12)
	p = placeOf(goodJob(t, "layout-feet.toml"))
	near(t, "free fall, D-ring and connector", p.FreeFall, 1.5+1.8, 1e-12)
	p = placeOf(goodJob(t, "layout-edge.toml"))
	near(t, "free fall, D-ring and what is over the edge", p.FreeFall, 1.5+2.0-1.0, 1e-12)
	p = placeOf(goodJob(t, "layout-angle.toml"))
	near(t, "offset, tangent 1.0/1.5", p.OffsetAngle*inDegrees, 33.690067525980, 1e-12)
	p = placeOf(goodJob(t, "layout-long-system.toml"))
	near(t, "free fall of 5 ft and 50 ft less 20 ft", p.FreeFall, 35*0.3048, 1e-12)
	p = placeOf(goodJob(t, "layout-retractable-at-feet.toml"))
	near(t, "radius, 2.5 taut and 0.5 paid out", p.Radius, 3.0, 1e-12)
	near(t, "free fall, D-ring and 3.0 less 2.0", p.FreeFall, 2.5, 1e-12)
	if p = placeOf(goodJob(t, "layout-restraint.toml")); p.Status != rig.Restrained || !math.IsNaN(p.FreeFall) {
		t.Errorf("%v, free fall %g", p.Status, p.FreeFall)
	}
}

// A layout in feet and inches is the one in metres.
func TestLayoutInFeet(t *testing.T) {
	const ft = 0.3048 // exact
	f := goodJob(t, "layout-feet-pounds.toml")
	run := arrest.LayoutAt(&f.Job.Point)
	// The D-ring as written is the low end of 4 ft 9 in .. 5 ft.
	near(t, "free fall", run.Place.FreeFall, (4.75-(7.5-math.Sqrt(36-6.25)))*ft, 1e-12)
	near(t, "obstacle", -run.Layout.Obstacles[0].High.Z, (17+3.5/12)*ft, 1e-12)
}

// outcomes are those of all limits of a job.
func outcomes(f *jobfile.File) []string {
	r := arrest.Evaluate(&f.Job)
	var all []string
	for _, row := range limits.Assess(&r, f.Sets, f.Elsewhere).Findings {
		all = append(all, string(row.Outcome))
	}
	return all
}

// The rows of limits that these layouts cannot fulfil: an angle of more than 30
// degrees, 50 ft of line over 17 ft of drop, a line that runs over an edge.
func TestNoneOfTheseIsWithin(t *testing.T) {
	for name, want := range map[string][]string{
		"layout-angle.toml":               {"exceeded"},
		"layout-angle-little-height.toml": {"exceeded"},
		"layout-long-system.toml":         {"exceeded", "exceeded"},
		"layout-retractable-at-feet.toml": {"exceeded", "undecided"},
	} {
		f := goodJob(t, name)
		if got := outcomes(f); !slices.Equal(got, want) {
			t.Errorf("%s: %v, want %v", name, got, want)
		}
	}
}

// Every figure of a file with three obstacles, typed once more.
func TestPlanOfALayout(t *testing.T) {
	const none = arrest.NoFigure
	f := goodJob(t, "layout-two-positions.toml")
	want := arrest.LayoutPlan{
		AnchorHeight: 0, BehindEdge: none, DRing: 1, Feet: 2, HalfWidth: 3, Length: 4, Slack: 5, Locking: none,
		Positions: []arrest.PlannedPosition{{Name: "under the anchor", Along: 6, Out: 7}, {Name: "end of the walkway", Along: 8, Out: 9}},
		Obstacles: []arrest.PlannedObstacle{
			{Name: "floor of the bay", Below: 10, Height: none, AlongFrom: none, AlongTo: none, OutFrom: none, OutTo: none, StopOver: none},
			{Name: "switch cabinet", Below: 11, Height: none, AlongFrom: 12, AlongTo: 13, OutFrom: 14, OutTo: 15, StopOver: 16},
			{Name: "rail car on the track", Moving: true, Below: 17, Height: none, AlongFrom: none, AlongTo: none, OutFrom: none, OutTo: none, StopOver: none},
		},
		Clearance: &arrest.ClearancePlan{Datum: rig.BelowAnchor, Items: []arrest.PlannedItem{
			{Item: rig.ItemDeceleration, Figure: 18, Includes: rig.Of(rig.ItemLineStretch)},
			{Item: rig.ItemAnchor, Figure: 19},
			{Item: rig.ItemMargin, Figure: 20, Includes: rig.Of(rig.ItemHarness)},
		}},
	}
	if diff := cmp.Diff(&want, f.Job.Point.Layout); diff != "" {
		t.Error(diff)
	}
	figures := [arrest.MaxFigures]float64{2.6, 1.4, 1.6, 0.4, 2, 0, 0, 0, 1.3, 0.2, 7.2, 5.1, -2, -1.2, -0.5, 0.6, 0.02, 3.9, 1.2, 0.05, 1}
	for i, x := range figures {
		near(t, fmt.Sprintf("figure %d", i), f.Job.Point.Figures[i], x, 1e-15)
	}
	for _, in := range f.Job.Inputs {
		section, _, _ := strings.Cut(in.Key, ".")
		role, position := in.Role, 0
		switch section {
		case "layout", "obstacle[1]", "obstacle[2]", "obstacle[3]":
			role = arrest.OfLayout
		case "position[1]":
			role, position = arrest.OfLayout, 1
		case "position[2]":
			role, position = arrest.OfLayout, 2
		case "clearance":
			role = arrest.OfClearance
		}
		if in.Role != role || in.Position != position {
			t.Errorf("%s: role %d, position %d", in.Key, in.Role, in.Position)
		}
	}
}

func TestEdgesFromFiles(t *testing.T) {
	p := goodJob(t, "layout-edge.toml").Job.Point.Layout
	if p.Edge != rig.RoundEdge || !strings.HasPrefix(p.RatedBy, "manual of the lanyard") || p.BehindEdge != 1 {
		t.Errorf("%+v", p)
	}
	p = goodJob(t, "layout-edge-unrated.toml").Job.Point.Layout
	if p.Edge != rig.SharpEdge || p.RatedBy != "" {
		t.Errorf("%+v", p)
	}
}

// A typed free fall is not calculated with beside a layout.
func TestTypedFreeFallStandsBeside(t *testing.T) {
	f := goodJob(t, "layout-retractable-part.toml")
	in := inputOf(&f.Job, "fall.free_fall")
	if in.Set != nil || in.Role != arrest.OfFall || f.Job.Point.FreeFall != 0 {
		t.Errorf("%+v, free fall %g", in, f.Job.Point.FreeFall)
	}
	l := f.Job.Point.Layout
	if l.Locking != f.Job.Point.Path.Parts[0].Locking || l.Slack != arrest.NoFigure || l.Locking == arrest.NoFigure {
		t.Errorf("locking %d of the layout, %d of the part", l.Locking, f.Job.Point.Path.Parts[0].Locking)
	}
	near(t, "free fall, right below", placeOf(f).FreeFall, 0.5, 1e-12)
	if f, err := with(t, "layout-retractable-part.toml", "fall.initial_speed=1 m/s"); err != nil || f.Job.Point.InitialSpeed != 1 {
		t.Error(err)
	}
}

// The connector is as long as its parts, at every point of the bands.
func TestLengthOfTheParts(t *testing.T) {
	f := goodJob(t, "layout-path-lengths.toml")
	in, n := inputOf(&f.Job, "connector[1].length"), f.Job.Point.Layout.Length
	for _, c := range []struct{ rope, all float64 }{{1.2, 1.7}, {1.3, 1.8}, {1.25, 1.75}} {
		point := f.Job.Point
		in.Set(&point, c.rope)
		near(t, "length", point.Figures[n], c.all, 1e-15)
		inputOf(&f.Job, "connector[2].length").Set(&point, 0.9)
		near(t, "length with a longer strap", point.Figures[n], c.rope+0.9, 1e-15)
	}
	near(t, "as written, the low end of the rope", f.Job.Point.Figures[n], 1.7, 1e-15)
	for i := range f.Job.Inputs {
		if f.Job.Inputs[i].Key == "layout.connector_length" {
			t.Error("a length that nobody typed stands among the inputs")
		}
	}
	// A length of the whole, written, counts in place of the sum.
	f, err := with(t, "layout-path-lengths.toml", "layout.connector_length=2 m")
	if err != nil {
		t.Fatal(err)
	}
	near(t, "as typed", f.Job.Point.Figures[f.Job.Point.Layout.Length], 2, 0)
}

// layoutJob is a job of a layout, with lines in place of others and lines more.
func layoutJob(lines ...string) string {
	layout := "[layout]\nanchor_height = \"3.0 m\"\nedge = \"none\"\nd_ring_height = \"1.5 m\"\nconnector_length = \"2.0 m\"\nslack = \"0 m\"\n"
	position := "[[position]]\nalong = \"1.2 m\"\nout = \"0 m\"\n"
	text := strings.Replace(minimalJob, "[fall]\nfree_fall = \"1.5 m\"\n", "", 1) + layout + position
	for _, line := range lines {
		name, _, is := strings.Cut(line, " = ")
		if old := strings.Index(text, "\n"+name+" = "); is && !strings.Contains(name, "\n") && old >= 0 {
			end := old + 1 + strings.Index(text[old+1:], "\n")
			text = text[:old+1] + line + text[end:]
			continue
		}
		text += line + "\n"
	}
	return text
}

func TestNamesOfPositions(t *testing.T) {
	f, err := jobfile.Read("job", []byte(layoutJob()), nil)
	if err != nil {
		t.Fatal(err)
	}
	if name := f.Job.Point.Layout.Positions[0].Name; name != "position 1" {
		t.Errorf("%q", name)
	}
}

// What stays within the limits is read.
func TestBoundsOfLayouts(t *testing.T) {
	several := func(n int, one string) string {
		var b strings.Builder
		for i := range n {
			fmt.Fprintf(&b, one, i+1)
		}
		return b.String()
	}
	const level = "[[obstacle]]\nname = \"beam %d\"\nbelow = \"6 m\"\n"
	const place = "[[position]]\nname = \"bay %d\"\nalong = \"0.1 m ± 0.1 m\"\nout = \"0.1 m ± 0.1 m\"\n"
	const box = "[[obstacle]]\nname = \"crate %d\"\nbelow = \"6 m\"\nalong_from = \"-1 m\"\nalong_to = \"1 m\"\nout_from = \"0 m\"\nout_to = \"2 m\"\n"
	alone := layoutJob()
	alone = alone[:strings.Index(alone, "[[position]]")]
	rope := "[[connector]]\npart = \"rope\"\nlength = \"%d m\"\nmodulus = \"22.5 kN\"\n"
	for _, c := range []struct {
		name, text string
		read       bool
	}{
		{"8 positions", alone + several(8, place), true},
		{"9 positions", alone + several(9, place), false},
		{"8 obstacles", layoutJob(several(8, level)), true},
		{"9 obstacles", layoutJob(several(9, level)), false},
		{"48 figures: 6 of layout and place, 8 boxes, a height and a stop", layoutJob(several(8, box) + "height = \"1 m\"\nstop_over = \"50 mm\"\n"), true},
		{"49 figures", layoutJob("half_width = \"0.4 m\"", several(8, box)+"height = \"1 m\"\nstop_over = \"50 mm\"\n"), false},
		{"parts as long as the whole", layoutJob(several(1, rope), strings.Replace(several(1, rope), "1 m", "1.0 m", 1)), true},
		{"parts longer than the whole", layoutJob(several(2, rope)), false},
		{"parts longer than the whole in a part of the bands", layoutJob("connector_length = \"2.0 m .. 3.0 m\"", several(2, rope)), true},
		{"slack of a curve and none of the layout", layoutJob("[[connector]]\npart = \"curve\"\npoints = [[\"0 mm\", \"0 kN\"], [\"50 mm\", \"0 kN\"], [\"90 mm\", \"4 kN\"]]"), true},
		{"slack of the layout and none of a curve", layoutJob("slack = \"0.1 m\"", "[[connector]]\npart = \"curve\"\npoints = [[\"0 mm\", \"0 kN\"], [\"90 mm\", \"4 kN\"]]"), true},
	} {
		_, err := jobfile.Read("job", []byte(c.text), nil)
		if (err == nil) != c.read {
			t.Errorf("%s: %v", c.name, err)
		}
	}
}

// Figures outside what is common practice are remarked on.
func TestNotesOfLayouts(t *testing.T) {
	clearance := "[clearance]\ndatum = \"feet\"\nharness_stretch = \"%s\"\nmargin = \"%s\"\n"
	for _, c := range []struct {
		text string
		keys []string
	}{
		{layoutJob(fmt.Sprintf(clearance, "0.3 m", "0.6 m .. 1 m")), nil},
		{layoutJob(`d_ring_height = "1.1 m .. 1.7 m"`, `anchor_height = "2.5 m"`), nil},
		{layoutJob(`d_ring_height = "1.8 m"`), []string{"layout.d_ring_height"}},
		{layoutJob(`d_ring_height = "1.0 m"`, `anchor_height = "2.5 m"`), []string{"layout.d_ring_height"}},
		{layoutJob(fmt.Sprintf(clearance, "0 m", "0.5 m")), []string{"clearance.harness_stretch", "clearance.margin"}},
		{layoutJob(`out = "0 m ± 11 m"`, `connector_length = "14 m"`), []string{"position[1].out"}},
	} {
		f, err := jobfile.Read("job", []byte(c.text), nil)
		if err != nil {
			t.Error(err)
			continue
		}
		var keys []string
		for _, n := range f.Job.Notes {
			keys = append(keys, n.Args[0].Text)
		}
		if !slices.Equal(keys, c.keys) {
			t.Errorf("%v, want %v", keys, c.keys)
		}
	}
}

// What a tape measure gives is settled by a drawing, the items of a clearance
// by a label, but for the travel to rest by no plan.
func TestSettledLayout(t *testing.T) {
	for _, c := range []struct {
		key, source string
		open        arrest.OpenReason
	}{
		{"layout.anchor_height", "drawing", arrest.Settled},
		{"layout.anchor_height", "label", arrest.OpenSource},
		{"clearance.margin", "plan", arrest.Settled},
		{"clearance.margin", "assumed", arrest.OpenSource},
		{"clearance.deceleration_distance", "plan", arrest.OpenSource},
		{"clearance.deceleration_distance", "label", arrest.Settled},
	} {
		_, name, _ := strings.Cut(c.key, ".")
		line := fmt.Sprintf("%s = { value = \"1.6 m ± 0.1 m\", source = %q }", name, c.source)
		text := layoutJob(line)
		if strings.HasPrefix(c.key, "clearance") {
			text = layoutJob("[clearance]\ndatum = \"feet\"\n" + line)
		}
		f, err := jobfile.Read("job", []byte(text), nil)
		if err != nil {
			t.Error(err)
			continue
		}
		if is := inputOf(&f.Job, c.key).Open(); is != c.open {
			t.Errorf("%s by %s: %q", c.key, c.source, is)
		}
	}
}
