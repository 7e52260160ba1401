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
	above := grain(float64(len(b.Uprights))*Normal.pitch()) + 3
	s := NewScene(b.Title, above+float64(float64(len(b.Rows))*barPitch)+2+frameBottom)
	s.Desc, s.Stamp, s.Statement, s.Notes = b.Desc, b.Stamp, b.Statement, slices.Clone(b.Notes)
	f := b.frame(s, axis, above)
	f.barAxis()
	for i := range b.Uprights {
		f.barUpright(&b.Uprights[i], i)
	}
	for i := range b.Rows {
		f.bar(&b.Rows[i], above+float64((float64(i)+0.5)*barPitch))
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
	f := &frame{scene: s}
	left, right := b.sides(axis)
	f.box = Box{left, top, right, s.Height - frameBottom}
	f.x = scale{axis, left, right}
	f.ticks[0] = xTicks(axis, right-left)
	return f
}

// sides returns where the axis begins and ends: as far out as the names and
// the figures at the ends of the bars let it. Each end limits the other, so
// they are found in turns.
func (b *Bars) sides(axis Axis) (left, right float64) {
	const side = 3 * cellWidth
	names := side
	for _, r := range b.Rows {
		names = max(names, min(RoomFor(r.Name), widestRow)+side)
	}
	left, right = names, FullWidth-side
	for range 4 {
		for _, r := range b.Rows {
			low, high := r.ends()
			if p := (scale{axis, 0, 1}).at(axis.kept(low.at)); p < 0.99 {
				left = max(left, (names+RoomFor(low.text)+side-float64(p*right))/(1-p))
			}
			if p := (scale{axis, 0, 1}).at(axis.kept(high.at)); p > 0.01 {
				right = min(right, (FullWidth-RoomFor(high.text)-side-float64(left*(1-p)))/p)
			}
		}
	}
	return min(left, FullWidth*0.6), max(right, FullWidth*0.75)
}

// A barEnd is one end of a bar with its figure.
type barEnd struct {
	at   float64
	text string
}

// ends returns the ends of r, the lower first.
func (r *Bar) ends() (low, high barEnd) {
	low, high = barEnd{r.From, r.FromText}, barEnd{r.To, r.ToText}
	if r.From > r.To {
		low, high = high, low
	}
	return low, high
}

// barAxis draws the axis below the bars.
func (f *frame) barAxis() {
	b := f.box
	f.scene.Line(Point{b.Left, b.Bottom}, Point{b.Right, b.Bottom}, Pen{Weight: Medium})
	for _, t := range f.ticks[0] {
		at := Point{f.x.at(t.Value), b.Bottom}
		f.scene.Line(at, Point{at.X, at.Y + tickLength}, Pen{})
	}
	f.scene.scaled(f.ticks[0], f.x.axis.told(f.ticks[0]), func(t Tick) Spot {
		return Spot{At: Point{f.x.at(t.Value), b.Bottom}, Anchor: Middle, Lift: Below, Gap: figureGap}
	})
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
	x, y := f.x.at(l.At), grain((float64(i)+0.5)*Normal.pitch())
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
	low, high := r.ends()
	if !finite(low.at) || !finite(high.at) || high.at < f.x.axis.Low || low.at > f.x.axis.High {
		f.outside(strings.Join([]string{r.Name, r.FromText, r.ToText}, "; "))
		return
	}
	from, to := f.barTick(low.at, y), f.barTick(high.at, y)
	f.scene.Line(Point{from, y}, Point{to, y}, Pen{Weight: Heavy})
	f.scene.Text(Text{Text: low.text, Rank: RankPoint, Spots: barSpots(from, y, End)})
	f.scene.Text(Text{Text: high.text, Rank: RankPoint, Spots: barSpots(to, y, Start)})
}

// barTick draws the tick at the end of a bar, which has none where the axis
// ends before it, and returns where the end is.
func (f *frame) barTick(v, y float64) float64 {
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
