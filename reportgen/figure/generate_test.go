package figure

import (
	"math"

	"pgregory.net/rapid"
)

// hostile are texts that want to leave their place.
var hostile = []string{
	"", " ", "limit", "peak <script>alert(1)</script> & \"more\" ]]>", "two\nlines\r\nand\ttabs",
	"\x1b[31mred\x1b[0m \x07\x00", "right \u202e to left \u2066 isolate", "zero\u200bwidth\ufeff joiner\u200d",
	"e\u0301\u0301\u0301\u0301\u0301 tall", "\u0301\u0301 marks first", "落下距離 1.8 m", "👷🏽 on a roof", "\xff\xfe broken \xc3",
	"a line that is far too long to stand anywhere in a figure of this width, whatever is done to make room for it, at least 6 kN",
	"onewordthatisfartoolongtostandinafigureofthiswidthandhasnoblankwhereitcouldbebrokenatallinanyway",
	"± 5 %, ≤ 8 kN, 30°", "--", "+6 kN", "(a)", "שלום", "\ufffe\uffff noncharacters",
}

func anyText(t *rapid.T, name string) string {
	return rapid.OneOf(
		rapid.SampledFrom(hostile),
		rapid.StringMatching(`[a-z]{2,9}( [a-z0-9.]{1,8}){0,5}`),
		rapid.String(),
	).Draw(t, name)
}

// anyValue is mostly from 0 to 10, sometimes far off or no number.
func anyValue(t *rapid.T, name string) float64 {
	return rapid.OneOf(
		rapid.Float64Range(0, 10), rapid.Float64Range(0, 10), rapid.Float64Range(-3, 30),
		rapid.SampledFrom([]float64{0, 5, math.Inf(1), math.Inf(-1), math.NaN(), 1e300, -1e9, 1e-12}),
	).Draw(t, name)
}

func anyValues(t *rapid.T, n int, name string) []float64 {
	list := make([]float64, n)
	for i := range list {
		list[i] = anyValue(t, name)
	}
	return list
}

func anyPen(t *rapid.T) Pen {
	return Pen{Weight(rapid.IntRange(0, 2).Draw(t, "weight")), Dash(rapid.IntRange(0, 4).Draw(t, "dash"))}
}

func anyAxis(t *rapid.T, name string) Axis {
	a := Axis{Name: anyText(t, name), Unit: rapid.SampledFrom([]string{"", "m", "kN", "°"}).Draw(t, "unit"), Log: rapid.Bool().Draw(t, "log")}
	if rapid.Bool().Draw(t, "fixed") {
		a.Low = rapid.Float64Range(0.01, 3).Draw(t, "low")
		a.High = a.Low * rapid.Float64Range(1.001, 1000).Draw(t, "factor")
	}
	return a
}

func anyLevel(t *rapid.T, name string) Level {
	l := Level{At: anyValue(t, name), Label: anyText(t, name), Pen: anyPen(t)}
	if rapid.Bool().Draw(t, "part") {
		l.From, l.To = anyValue(t, "from"), anyValue(t, "to")
	}
	return l
}

// anyPlot also returns the labels, none of which may vanish.
func anyPlot(t *rapid.T) (*Plot, []string) {
	p := &Plot{
		Title: anyText(t, "title"), Desc: anyText(t, "desc"), Stamp: anyText(t, "stamp"), Statement: anyText(t, "statement"),
		Notes: []string{anyText(t, "note")}, X: anyAxis(t, "x"), Y: anyAxis(t, "y"), Aside: rapid.Bool().Draw(t, "aside"),
	}
	labels := []string{p.Title, p.Stamp, p.Statement, p.Notes[0], p.X.label(), p.Y.label()}
	for range rapid.IntRange(0, 4).Draw(t, "curves") {
		n := rapid.IntRange(0, 30).Draw(t, "points of a curve")
		p.Curves = append(p.Curves, Curve{anyValues(t, n, "x"), anyValues(t, n, "y"), anyText(t, "curve"), anyPen(t)})
		labels = append(labels, p.Curves[len(p.Curves)-1].Label)
	}
	for range rapid.IntRange(0, 4).Draw(t, "levels") {
		p.Levels = append(p.Levels, anyLevel(t, "level"))
		labels = append(labels, p.Levels[len(p.Levels)-1].Label)
	}
	for range rapid.IntRange(0, 3).Draw(t, "uprights") {
		p.Uprights = append(p.Uprights, anyLevel(t, "upright"))
		labels = append(labels, p.Uprights[len(p.Uprights)-1].Label)
	}
	for range rapid.IntRange(0, 8).Draw(t, "points") {
		p.Points = append(p.Points, Marked{anyValue(t, "x"), anyValue(t, "y"), anyText(t, "point"), Symbol(rapid.IntRange(0, 2).Draw(t, "symbol"))})
		labels = append(labels, p.Points[len(p.Points)-1].Label)
	}
	for range rapid.IntRange(0, 3).Draw(t, "regions") {
		n := rapid.IntRange(0, 6).Draw(t, "corners")
		p.Regions = append(p.Regions, Region{anyValues(t, n, "x"), anyValues(t, n, "y"), anyText(t, "region"), Hatching(rapid.IntRange(0, 2).Draw(t, "hatching")), rapid.Bool().Draw(t, "plain")})
		labels = append(labels, p.Regions[len(p.Regions)-1].Label)
	}
	return p, labels
}

func anyBars(t *rapid.T) (*Bars, []string) {
	b := &Bars{Title: anyText(t, "title"), Statement: anyText(t, "statement"), Axis: anyAxis(t, "axis")}
	labels := []string{b.Title, b.Statement, b.Axis.label()}
	for range rapid.IntRange(0, 8).Draw(t, "rows") {
		r := Bar{anyText(t, "name"), anyValue(t, "low"), anyValue(t, "high"), anyText(t, "low text"), anyText(t, "high text")}
		b.Rows = append(b.Rows, r)
		labels = append(labels, r.Name, r.FromText, r.ToText)
	}
	for range rapid.IntRange(0, 3).Draw(t, "uprights") {
		b.Uprights = append(b.Uprights, anyLevel(t, "upright"))
		labels = append(labels, b.Uprights[len(b.Uprights)-1].Label)
	}
	return b, labels
}

// anyDrawing is a drawing to scale with two chains of dimensions and some points.
func anyDrawing(t *rapid.T) (*Scene, []string) {
	s := NewScene(anyText(t, "title"), rapid.Float64Range(30, 180).Draw(t, "height"))
	s.ToScale = true
	labels := []string{s.Title}
	for _, level := range []bool{false, true} {
		c := Chain{
			Level: level, At: rapid.Float64Range(10, 150).Draw(t, "at"), Datum: rapid.Float64Range(0, 100).Draw(t, "datum"),
			Name: anyText(t, "datum"), Far: rapid.Bool().Draw(t, "far"),
		}
		labels = append(labels, c.Name)
		end := c.Datum
		for range rapid.IntRange(0, 9).Draw(t, "parts") {
			end += rapid.Float64Range(-2, 30).Draw(t, "length")
			c.Parts = append(c.Parts, Dimension{end, anyText(t, "dimension"), rapid.SampledFrom([]float64{0, 20, 90}).Draw(t, "witness")})
			labels = append(labels, c.Parts[len(c.Parts)-1].Text)
		}
		s.Chain(c)
	}
	for range rapid.IntRange(0, 5).Draw(t, "points") {
		at := Point{anyValue(t, "x") * 15, anyValue(t, "y") * 12}
		s.Mark(at, Open)
		s.Arrow(at, Point{anyValue(t, "x") * 15, anyValue(t, "y") * 12}, anyPen(t))
		if at.finite() {
			text := anyText(t, "point")
			s.Text(Text{Text: text, Rank: RankPoint, Turned: rapid.Bool().Draw(t, "turned"), Spots: Around(at, symbolRadius)})
			labels = append(labels, text)
		}
	}
	return s, labels
}

// anyScene is a figure of any kind and its labels.
func anyScene(t *rapid.T) (*Scene, []string) {
	var s *Scene
	var labels []string
	var err error
	switch rapid.IntRange(0, 3).Draw(t, "kind") {
	case 0:
		var b *Bars
		b, labels = anyBars(t)
		s, err = b.Scene()
	case 1:
		s, labels = anyDrawing(t)
	default:
		var p *Plot
		p, labels = anyPlot(t)
		s, err = p.Scene()
	}
	if err != nil {
		t.Skip(err)
	}
	return s, labels
}
