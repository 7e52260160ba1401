package jobfile_test

import (
	"fmt"
	"math"
	"math/rand/v2"
	"strings"
	"testing"

	"arrestcheck/arrest"
	"arrestcheck/arrest/jobfile"
	"arrestcheck/arrest/rig"
)

// reached says how a layout is read: "read", "part" where it is refused for a
// part of its bands, or why it is refused for all of them.
func reached(t *testing.T, text string) string {
	t.Helper()
	_, err := jobfile.Read("job", []byte(text), nil)
	switch {
	case err == nil:
		return "read"
	case strings.Contains(err.Error(), "for a part of the bands"):
		return "part"
	case strings.Contains(err.Error(), "out of reach"):
		return "reach"
	case strings.Contains(err.Error(), "inside the structure"):
		return "structure"
	}
	t.Fatalf("%v\n%s", err, text)
	return ""
}

// A layout is read where all of its entries can be, and refused else.
func TestReach(t *testing.T) {
	const round = "edge = \"round\"\nanchor_behind_edge = \"%s\""
	for _, c := range []struct {
		want  string
		lines []string
	}{
		{"read", []string{`connector_length = "1.5 m"`, `along = "0 m"`}}, // just taut
		{"reach", []string{`connector_length = "1.4999 m"`, `along = "0 m"`}},
		{"read", []string{`connector_length = "1.4999 m"`, `slack = "0.0001 m"`, `along = "0 m"`}},
		{"part", []string{`connector_length = "1.4 m .. 1.5 m"`, `along = "0 m"`}},
		{"part", []string{`connector_length = "0.1 m"`, `anchor_height = "1 m .. 2 m"`, `along = "-0.05 m .. 1 m"`}},
		{"reach", []string{`connector_length = "0.1 m"`, `anchor_height = "1 m .. 2 m"`, `along = "-1 m .. -0.101 m"`}},
		{"reach", []string{`along = "0 m"`, `out = "-1.4 m .. -1.35 m"`}},
		{"part", []string{`along = "0 m"`, `out = "-1.4 m .. -1.3 m"`}}, // sqrt(1.5^2 + 1.3^2) = 1.985
		// Behind the edge the worker counts as at the edge, and may be restrained.
		{"read", []string{fmt.Sprintf(round, "1.3 m"), `along = "0 m"`, `out = "-1 m"`}},
		{"read", []string{fmt.Sprintf(round, "1.4 m"), `along = "0 m"`, `out = "-1 m"`}},
		{"part", []string{fmt.Sprintf(round, "1.4 m"), `along = "0 m"`, `out = "-1 m .. 1 m"`}},
		{"reach", []string{fmt.Sprintf(round, "1.4 m"), `along = "0 m"`, `out = "0 m"`}},
		// An anchor beyond the edge is nearer to who is outside.
		{"read", []string{fmt.Sprintf(round, "-2 m"), `along = "0 m"`, `out = "1 m .. 3 m"`}},
		{"reach", []string{fmt.Sprintf(round, "-2 m"), `along = "0 m"`, `out = "0 m"`}},
		{"reach", []string{fmt.Sprintf(round, "-2 m"), `along = "0 m"`, `out = "3.4 m .. 4 m"`}},
		// Below the surface the anchor has to be beyond the edge.
		{"structure", []string{fmt.Sprintf(round, "0.2 m"), `anchor_height = "-0.2 m .. -0.1 m"`, `along = "0 m"`}},
		{"part", []string{fmt.Sprintf(round, "0.2 m"), `anchor_height = "-0.2 m .. 0 m"`, `along = "0 m"`}},
		{"part", []string{fmt.Sprintf(round, "-0.2 m .. 0.2 m"), `anchor_height = "-0.2 m"`, `along = "0 m"`}},
		{"read", []string{fmt.Sprintf(round, "0 m"), `anchor_height = "-0.2 m"`, `along = "0 m"`}},
	} {
		if is := reached(t, layoutJob(c.lines...)); is != c.want {
			t.Errorf("%s, want %s: %q", is, c.want, c.lines)
		}
	}
}

// A layout drawn at random is refused as the distances axis by axis ask for,
// and only if not one of many points between its bands can be.
func TestReachAgainstPointsAtRandom(t *testing.T) {
	r := rand.New(rand.NewPCG(5, 20))
	count := map[string]int{}
	for range 300 {
		d := drawLayout(r)
		is := reached(t, d.text())
		count[is]++
		if want := d.wanted(); is != want && (is != "part" || want != "read") {
			t.Errorf("%s, want %s\n%s", is, want, d.text())
		}
		stands := 0
		for range 500 {
			if s := d.point(r).At(0).Status; s != rig.OutOfReach && s != rig.InStructure {
				stands++
			}
		}
		if is == "read" && stands < 500 || is != "read" && is != "part" && stands > 0 {
			t.Fatalf("%s, and %d of 500 points of it can be\n%s", is, stands, d.text())
		}
	}
	if count["read"] < 20 || count["part"] < 50 || count["reach"] < 50 || count["structure"] < 5 {
		t.Errorf("too few of a kind: %v", count)
	}
}

// A drawn is a layout at random: anchor, behind, D-ring, length, along, out.
type drawn struct {
	edge      bool
	low, high [6]float64
}

func drawLayout(r *rand.Rand) drawn {
	d := drawn{edge: r.IntN(2) == 0}
	from, to := [6]float64{-1.5, -2, 1, 0.4, -2, -2}, [6]float64{4, 2, 2, 2.5, 2, 2}
	for i := range from {
		a := from[i] + (to[i]-from[i])*r.Float64()
		b := min(to[i], a+r.Float64())
		// As they are typed, to the millimetre.
		d.low[i], d.high[i] = math.Round(a*1000)/1000, math.Round(b*1000)/1000
	}
	return d
}

func (d *drawn) text() string {
	band := func(i int) string { return fmt.Sprintf("%.3f m .. %.3f m", d.low[i], d.high[i]) }
	lines := []string{"anchor_height = \"" + band(0) + "\"", "d_ring_height = \"" + band(2) + "\"", "connector_length = \"" + band(3) + "\"",
		"along = \"" + band(4) + "\"", "out = \"" + band(5) + "\""}
	if d.edge {
		lines = append(lines, "edge = \"sharp\"\nanchor_behind_edge = \""+band(1)+"\"")
	}
	return layoutJob(lines...)
}

// point is a point between the bands, often at an end of some.
func (d *drawn) point(r *rand.Rand) *rig.Layout {
	x := d.low
	for i := range x {
		switch r.IntN(3) {
		case 0:
			x[i] = d.high[i]
		case 1:
			x[i] += (d.high[i] - d.low[i]) * r.Float64()
		}
	}
	l := &rig.Layout{Anchor: rig.Spot{Z: x[0]}, DRing: x[2], Feet: x[2], Length: x[3], PositionCount: 1}
	if d.edge {
		l.Edge, l.Anchor.Y = rig.SharpEdge, -x[1]
	}
	l.Positions[0] = rig.Position{X: x[4], Y: x[5]}
	return l
}

// gap is the least distance of two intervals.
func gap(lowA, highA, lowB, highB float64) float64 {
	return max(0, max(lowA-highB, lowB-highA))
}

// least is the least distance from anchor to D-ring, axis by axis.
func (d *drawn) least() float64 {
	z := gap(d.low[0], d.high[0], d.low[2], d.high[2])
	x := gap(d.low[4], d.high[4], 0, 0)
	y := gap(d.low[5], d.high[5], 0, 0)
	if d.edge {
		y = gap(max(0, d.low[5]), max(0, d.high[5]), -d.high[1], -d.low[1])
	}
	return math.Sqrt(x*x + y*y + z*z)
}

// wanted is how the layout has to be read. Whoever may stand behind an edge can
// be held back there.
func (d *drawn) wanted() string {
	switch {
	case d.edge && d.high[0] < 0 && d.low[1] > 0:
		return "structure"
	case d.least() > d.high[3] && !(d.edge && d.low[5] < 0):
		return "reach"
	}
	return "read"
}

// What the bands come to where a swing is worked out on a connector path.
func TestBandsOfASwing(t *testing.T) {
	const path = "[[connector]]\npart = \"absorber\"\ndeployment_force = \"4 kN ± 0.5 kN\"\ntravel_at_most = \"1 m ± 0.1 m\"\n"
	wide := []string{`mass = "90 kg ± 1 kg"`, `tools = "4 kg ± 1 kg"`, `anchor_height = "3.0 m ± 0.01 m"`, `d_ring_height = "1.5 m ± 0.01 m"`,
		`connector_length = "2.0 m ± 0.01 m"`, `slack = "0.1 m ± 0.01 m"`}
	levels := func(n int) string {
		text := ""
		for i := range n {
			text += fmt.Sprintf("[[obstacle]]\nname = \"beam %d\"\nbelow = \"6 m ± 0.1 m\"\n", i+1)
		}
		return text
	}
	for _, c := range []struct {
		name  string
		lines []string
		read  bool
	}{
		{"12 with a swing", []string{path, levels(4)}, true},
		{"13 with a swing", []string{path, levels(5)}, false},
		{"13 without", []string{path, levels(5), `along = "0 m"`}, true},
		{"16 without", []string{path, levels(8), `along = "0 m"`}, true},
		{"16 with a swing and no path", []string{levels(8), `along = "1.2 m ± 0.1 m"`, `out = "0 m ± 0.1 m"`}, true},
	} {
		_, err := jobfile.Read("job", []byte(layoutJob(append(c.lines, wide...)...)), nil)
		if (err == nil) != c.read {
			t.Errorf("%s: %v", c.name, err)
		}
		if !c.read && !strings.Contains(err.Error(), "13th figure with a band; of a swing on a connector path every combination of the ends of 12") {
			t.Errorf("%s: %v", c.name, err)
		}
	}
}

// Of several positions the one with the most bands counts.
func TestBandsOfPositions(t *testing.T) {
	text := layoutJob(`along = "0.3 m ± 0.1 m"`, `anchor_height = "3.0 m ± 0.01 m"`)
	text = strings.Replace(text, "[[position]]\n", "[[position]]\nname = \"a\"\n", 1)
	for i := range 7 {
		text += fmt.Sprintf("[[position]]\nname = \"b %d\"\nalong = \"0.1 m ± 0.1 m\"\nout = \"0.1 m ± 0.1 m\"\n", i)
	}
	f, err := jobfile.Read("job", []byte(text), nil)
	if err != nil {
		t.Fatal(err)
	}
	bands := 0
	for _, in := range f.Job.Inputs {
		if in.Band.Low < in.Band.High {
			bands++
		}
	}
	if run := arrest.LayoutAt(&f.Job.Point); bands != 16 || run.Layout.PositionCount != 8 {
		t.Errorf("%d bands at %d positions", bands, run.Layout.PositionCount)
	}
}
