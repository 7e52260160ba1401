package figure

import (
	"math"
	"testing"
)

const statement = "Arithmetic check. Not a permission to work, not a design, not a certificate."

// A sample is a figure as the program draws it. They are looked at by people
// and by the tests.
type sample struct {
	name  string
	scene *Scene
}

// samples returns one figure of each kind.
func samples(t testing.TB) []sample {
	t.Helper()
	must := func(s *Scene, err error) *Scene {
		t.Helper()
		if err != nil {
			t.Fatal(err)
		}
		return s
	}
	return []sample{
		{"sweep", must(sweepPlot(false).Scene())},
		{"sweep-log", must(sweepPlot(true).Scene())},
		{"force-time", must(forcePlot().Scene())},
		{"envelope", must(envelopePlot().Scene())},
		{"sensitivity", must(sensitivityBars().Scene())},
		{"elevation", elevation(t)},
	}
}

const weight = 100 * 9.80665 // N: 100 kg under standard gravity

// sweepPlot shows the mean force over the distance W (1 + h/d) for 100 kg and
// 1.8 m of free fall, and where it crosses two limits.
func sweepPlot(log bool) *Plot {
	var x, y []float64
	for i := range 191 {
		d := 0.1 + 0.01*float64(i)
		x, y = append(x, d), append(y, weight*(1+1.8/d)/1000)
	}
	return &Plot{
		Title:     "Mean force over the distance, by stopping distance: 100 kg, free fall 1.8 m",
		Desc:      "The mean force falls from 18.6 kN at 0.1 m to 1.86 kN at 2 m.",
		Stamp:     "EXAMPLE VALUES",
		Statement: statement,
		Notes:     []string{"A mean over the distance is a floor, not what the body feels."},
		X:         Axis{Name: "stopping distance", Unit: "m", Log: log},
		Y:         Axis{Name: "mean force over the distance", Unit: "kN", Log: log},
		Curves:    []Curve{{X: x, Y: y, Label: "at least", Pen: CurvePen}},
		Levels: []Level{
			{At: 6, Label: "limit mean-a: at most 6 kN", Pen: LimitPen},
			{At: 4, Label: "limit mean-b: at most 4 kN", Pen: LimitPen},
		},
		Points: []Marked{
			{X: 0.351679, Y: 6, Label: "0.3516 m", Symbol: Open},
			{X: 0.584614, Y: 4, Label: "0.5846 m", Symbol: Open},
			{X: 1.07, Y: weight * (1 + 1.8/1.07) / 1000, Label: "this job: 1.07 m, 2.63 kN", Symbol: Filled},
		},
	}
}

// forcePlot shows a force that rises, falls and comes to hang.
func forcePlot() *Plot {
	var x, y []float64
	for i := range 401 {
		t := 0.9 * float64(i) / 400
		f := 0.98
		if t < 0.36 {
			f = 5.6 * math.Sin(math.Pi*t/0.36) * (1 + 0.3*math.Sin(18*t))
		} else {
			f += -1.1 * math.Exp(-5*(t-0.36)) * math.Cos(14*(t-0.36))
		}
		x, y = append(x, t), append(y, max(f, 0))
	}
	return &Plot{
		Title:     "Force on the body in the modelled arrest",
		Desc:      "The force rises to a peak, falls to nothing on the rebound, and ends at the weight of the worker.",
		Statement: statement,
		X:         Axis{Name: "time from the first pull", Unit: "s"},
		Y:         Axis{Name: "force on the body", Unit: "kN"},
		Curves:    []Curve{{X: x, Y: y, Label: "as modelled", Pen: CurvePen}},
		Levels: []Level{
			{At: 8, Label: "limit peak-on-body: at most 8 kN (as modelled, without allowance)", Pen: LimitPen},
			{At: 2.63, From: 0, To: 0.36, Label: "mean over the distance 2.63 kN", Pen: MeanPen},
			{At: 2.96, From: 0, To: 0.36, Label: "mean over the time 2.96 kN", Pen: Pen{Medium, Dashes}},
		},
		Uprights: []Level{{At: 0.36, Label: "first rest, 0.36 s", Pen: HelpPen}},
		Points:   []Marked{{X: 0.1364, Y: 5.6 * math.Sin(math.Pi*0.1364/0.36) * (1 + 0.3*math.Sin(18*0.1364)), Label: "peak as modelled 6.19 kN", Symbol: Open}},
	}
}

// envelopePlot shows where free fall and stopping distance keep a mean of 4 kN
// for 90 to 110 kg.
func envelopePlot() *Plot {
	edge := func(mass float64) (x, y []float64) {
		w := mass * 9.80665 / 1000
		for i := range 61 {
			d := 0.02 * float64(i)
			x, y = append(x, d), append(y, d*(4/w-1))
		}
		return x, y
	}
	lightX, lightY := edge(90)
	heavyX, heavyY := edge(110)
	p := &Plot{
		Title:     "Where a mean of 4 kN over the distance is exceeded: 90 kg to 110 kg",
		Desc:      "Two edges part the regions within, undecided and exceeded.",
		Statement: statement,
		X:         Axis{Name: "stopping distance", Unit: "m", Low: 0, High: 1.2},
		Y:         Axis{Name: "free fall", Unit: "m", Low: 0, High: 4},
		Curves: []Curve{
			{X: lightX, Y: lightY, Label: "90 kg", Pen: CurvePen},
			{X: heavyX, Y: heavyY, Label: "110 kg", Pen: CurvePen},
		},
		Points: []Marked{{X: 1.07, Y: 1.8, Label: "this job", Symbol: Filled}, {X: 0.62, Y: 1.8, Label: "with 0.62 m", Symbol: Cross}},
	}
	back := func(x []float64) []float64 {
		r := make([]float64, len(x))
		for i := range x {
			r[i] = x[len(x)-1-i]
		}
		return r
	}
	join := func(a ...[]float64) (all []float64) {
		for _, b := range a {
			all = append(all, b...)
		}
		return all
	}
	p.Regions = []Region{
		{X: join(lightX, []float64{1.2, 0}), Y: join(lightY, []float64{4, 4}), Label: "exceeded", Hatching: Crossed},
		{X: join(lightX, back(heavyX)), Y: join(lightY, back(heavyY)), Label: "undecided", Hatching: Rising},
		{X: join(heavyX, []float64{1.2}), Y: join(heavyY, []float64{0}), Label: "within as entered", Plain: true},
	}
	return p
}

func sensitivityBars() *Bars {
	return &Bars{
		Title:     "What moves mean_force_over_distance, from the low to the high end of each entry alone",
		Desc:      "The stopping distance moves the outcome most.",
		Statement: statement,
		Axis:      Axis{Name: "mean force over the distance", Unit: "kN"},
		Rows: []Bar{
			{"stop.distance (open)", 3.188, 2.549, "0.80 m: 3.19", "1.10 m: 2.55"},
			{"worker.mass", 2.472, 2.788, "94 kg: 2.47", "106 kg: 2.79"},
			{"fall.free_fall", 2.585, 2.675, "1.75 m: 2.59", "1.85 m: 2.68"},
			{"worker.tools", 2.63, 2.63, "", "no change"},
		},
		Uprights: []Level{
			{At: 2.63, Label: "as entered 2.63 kN", Pen: HelpPen},
			{At: 3.0, Label: "limit: at most 3 kN", Pen: LimitPen},
		},
	}
}

// elevation draws an anchor 3 m above a surface, a D-ring at 1.5 m, a connector
// of 2 m at an offset of 1.2 m: taut after 0.1 m, then down and inwards, to hang
// 0.87 m below the lowest point of the taut swing.
func elevation(t testing.TB) *Scene {
	t.Helper()
	const offset, length, start, floor = 1.2, 2.0, 1.5, -3.0
	taut := 3 - math.Sqrt(length*length-offset*offset)
	low := 3 - length
	rest := low - 0.87
	dims := []string{"free fall 0.10 m", "swing drop 0.40 m", "absorber and stretch 0.87 m", "harness stretch 0.30 m", "D-ring to feet 1.50 m", "margin 0.05 m", "left 1.28 m"}
	room := 0.0
	for _, d := range dims {
		room = max(room, RoomFor(d))
	}
	s := NewScene("Elevation: position 1, from the side", 120)
	s.ToScale = true
	s.Desc = "Anchor, D-ring at the start, when the connector is taut, and at rest; the floor below with a chain of dimensions."
	s.Statement = statement
	chain := s.Width - room - 10
	v, err := Fit(-2.2, 2, floor-0.1, 3.1, Box{2, 9, chain - 6, 110})
	if err != nil {
		t.Fatal(err)
	}
	ground := func(from, to, z float64) {
		s.Line(v.At(from, z), v.At(to, z), Pen{Weight: Medium})
		s.Hatch([]Point{v.At(from, z), v.At(to, z), v.At(to, z-0.12), v.At(from, z-0.12)}, Rising)
	}
	ground(-2.2, -0.5, 0)
	ground(-2.2, 2, floor)
	s.Line(v.At(-0.5, 0), v.At(-0.5, -0.5), Pen{Weight: Medium})
	s.Outline([]Point{v.At(0.9, floor), v.At(1.9, floor), v.At(1.9, floor+0.8), v.At(0.9, floor+0.8)}, Pen{Weight: Medium})
	anchor := v.At(0, 3)
	s.Named(anchor, Cross, "anchor")
	s.Named(v.At(offset, start), Open, "D-ring at the start")
	s.Named(v.At(offset, taut), Open, "taut")
	s.Named(v.At(0, rest), Filled, "at rest")
	s.Line(anchor, v.At(offset, start), Pen{Dash: Dashes})
	s.Line(anchor, v.At(offset, taut), Pen{Weight: Medium})
	s.Line(anchor, v.At(0, rest), Pen{Dash: ChainLine})
	s.Polyline(Arc(anchor, v.Length(length), -90, -53.13), Pen{Weight: Thin, Dash: Dots})
	s.Text(Text{Text: "crate", Rank: RankNote, Spots: []Spot{{At: v.At(1.4, floor+0.4), Anchor: Middle}}})
	s.Text(Text{Text: "walking surface", Rank: RankNote, Spots: []Spot{
		{At: v.At(-2.2, 0), Anchor: Start, Lift: Above}, {At: v.At(-2.2, -0.12), Anchor: Start, Lift: Below}, {At: v.At(-0.5, -0.12), Anchor: End, Lift: Below},
	}})
	s.Text(Text{Text: "lower level", Rank: RankNote, Spots: []Spot{{At: v.At(-2.2, floor), Anchor: Start, Lift: Above}}})
	ends := []float64{taut, low, rest, rest - 0.3, rest - 1.8, rest - 1.85, floor}
	c := Chain{At: chain, Datum: v.At(0, start).Y, Name: "datum: D-ring at the start"}
	for i, end := range ends {
		c.Parts = append(c.Parts, Dimension{End: v.At(0, end).Y, Text: dims[i]})
	}
	c.Parts[0].Witness = v.At(offset, 0).X
	c.Parts[2].Witness = v.At(0, 0).X
	s.Chain(c)
	s.Chain(Chain{
		Level: true, At: anchor.Y - 3.5, Datum: anchor.X, Far: true,
		Parts: []Dimension{{v.At(offset, 0).X, "offset 1.20 m", v.At(offset, start).Y}},
	})
	s.ScaleBar(Point{8, 114}, v, "m", 1)
	return s
}
