package figure

import (
	"slices"
	"strings"
)

// Bars is a figure of spans, one below the other, each with its name at its
// left and its figures at its ends: how far an outcome moves with each of the
// things that it depends on. The first is at the top.
type Bars struct {
	Title, Desc, Stamp, Statement string
	Notes                         []string

	Axis     Axis
	Rows     []Bar
	Uprights []Level // lines over all rows: a limit, the value as entered; From and To are not used
}

// A Bar is one span, its ends in either order: the outcome at the low and at
// the high end of an input. The texts are the figures as they shall be printed.
// A bar with an end that is not finite is named below the figure.
type Bar struct {
	Name             string
	From, To         float64
	FromText, ToText string
}

const (
	barPitch  = 8.5
	barTick   = 1.5  // half a tick at the end of a bar
	widestRow = 70.0 // of the names at the left, mm
)

// Scene lays the bars out. The error says that their axis cannot be drawn.
func (b *Bars) Scene() (*Scene, error) {
	axis, err := b.Axis.fitted(b.values())
	if err != nil {
		return nil, err
	}
	above := float64(len(b.Uprights))*Normal.pitch() + 3
	s := NewScene(b.Title, above+float64(len(b.Rows))*barPitch+2+frameBottom)
	s.Desc, s.Stamp, s.Statement, s.Notes = b.Desc, b.Stamp, b.Statement, slices.Clone(b.Notes)
	f := b.frame(s, axis, above)
	f.barAxis()
	for i := range b.Uprights {
		f.barUpright(&b.Uprights[i], i)
	}
	for i := range b.Rows {
		f.bar(&b.Rows[i], above+(float64(i)+0.5)*barPitch)
	}
	return s, nil
}

func (b *Bars) values() []float64 {
	var all []float64
	for _, r := range b.Rows {
		all = append(all, r.From, r.To)
	}
	for _, l := range b.Uprights {
		all = append(all, l.At)
	}
	return all
}

// frame leaves room for the names at the left and for the figures at both ends.
func (b *Bars) frame(s *Scene, axis Axis, top float64) *frame {
	name, low, high := 0.0, 0.0, 0.0
	for _, r := range b.Rows {
		name = max(name, min(RoomFor(r.Name), widestRow))
		lowText, highText := r.FromText, r.ToText
		if r.From > r.To {
			lowText, highText = highText, lowText
		}
		low, high = max(low, RoomFor(lowText)), max(high, RoomFor(highText))
	}
	side := 3 * cellWidth
	f := &frame{scene: s}
	f.box = Box{min(name+low+side+2*cellWidth, s.Width/2), top, s.Width - min(high+side, s.Width/4), s.Height - frameBottom}
	f.x = scale{axis, f.box.Left, f.box.Right}
	f.ticks[0] = xTicks(axis, f.box.Right-f.box.Left)
	return f
}

// barAxis draws the axis below the bars.
func (f *frame) barAxis() {
	b := f.box
	f.scene.Line(Point{b.Left, b.Bottom}, Point{b.Right, b.Bottom}, Pen{Weight: Medium})
	for _, t := range f.ticks[0] {
		at := Point{f.x.at(t.Value), b.Bottom}
		f.scene.Line(at, Point{at.X, at.Y + tickLength}, Pen{})
		f.scene.Text(Text{Text: t.Label, Rank: RankScale, Spots: []Spot{{At: at, Anchor: Middle, Lift: Below, Gap: figureGap}}})
	}
	spot := Spot{At: Point{b.Right, b.Bottom}, Anchor: End, Lift: Below, Gap: figureGap, Lines: 1}
	far := spot
	far.At.X = f.scene.Width
	f.scene.Text(Text{Text: f.x.axis.label(), Rank: RankAxis, Spots: []Spot{spot, far}})
}

// barUpright draws an upright line; the labels stand above the bars, one a line.
func (f *frame) barUpright(l *Level, i int) {
	if !f.x.holds(l.At) {
		f.outside(l.Label)
		return
	}
	x, y := f.x.at(l.At), (float64(i)+0.5)*Normal.pitch()
	f.scene.Line(Point{x, y - Normal.pitch()/2}, Point{x, f.box.Bottom}, l.Pen)
	f.scene.Text(Text{Text: l.Label, Rank: RankLimit, Spots: []Spot{
		{At: Point{x, y}, Anchor: Start}, {At: Point{x, y}, Anchor: End},
	}})
}

// bar draws one span.
func (f *frame) bar(r *Bar, y float64) {
	f.scene.Text(Text{Text: r.Name, Rank: RankAxis, Spots: []Spot{
		{At: Point{-sideGap, y}, Anchor: Start}, {At: Point{0, y}, Anchor: Start, Lift: Above},
	}})
	low, high := min(r.From, r.To), max(r.From, r.To)
	if !finite(low) || !finite(high) || high < f.x.axis.Low || low > f.x.axis.High {
		f.outside(strings.Join([]string{r.Name, r.FromText, r.ToText}, "; "))
		return
	}
	lowText, highText := r.FromText, r.ToText
	if r.From > r.To {
		lowText, highText = highText, lowText
	}
	from, to := f.barEnd(low, y), f.barEnd(high, y)
	f.scene.Line(Point{from, y}, Point{to, y}, Pen{Weight: Heavy})
	f.scene.Text(Text{Text: lowText, Rank: RankPoint, Spots: barSpots(from, y, End)})
	f.scene.Text(Text{Text: highText, Rank: RankPoint, Spots: barSpots(to, y, Start)})
}

// barEnd draws the end of a bar, which is open where the axis ends before it,
// and returns where it is.
func (f *frame) barEnd(v, y float64) float64 {
	x := f.x.at(f.x.axis.kept(v))
	if f.x.holds(v) {
		f.scene.Line(Point{x, y}, Point{x, y - barTick}, Pen{})
		f.scene.Line(Point{x, y}, Point{x, y + barTick}, Pen{})
	}
	return x
}

// barSpots returns spots for the figure of an end: beside it, then over and
// under the bar.
func barSpots(x, y float64, side Anchor) []Spot {
	over := Start + End - side // away from the end, over the bar
	return []Spot{
		{At: Point{x, y}, Anchor: side},
		{At: Point{x, y}, Anchor: over, Lift: Above, Gap: 1.8},
		{At: Point{x, y}, Anchor: over, Lift: Below, Gap: 1.8},
		{At: Point{x, y}, Anchor: side, Lift: Above, Gap: 1.8},
		{At: Point{x, y}, Anchor: side, Lift: Below, Gap: 1.8},
	}
}
