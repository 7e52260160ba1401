package figure

// Labels beside the frame, mm.
const (
	asideLeader = 5.0  // from the frame to a label
	asideMost   = 62.0 // room for labels; a longer one is listed below
)

// levelsAside draws level lines with their labels at the right of the frame, one
// below the other. A dotted line goes on from the end of each to the frame, and
// from there to its label.
func (f *frame) levelsAside(levels []Level) {
	var drawn []*Level
	var wanted, size []float64
	for i := range levels {
		l := &levels[i]
		from, to, some := f.x.between(l.From, l.To)
		if !some || !f.y.holds(l.At) {
			f.outside(l.Label)
			continue
		}
		y := f.y.at(l.At)
		f.scene.Line(Point{from, y}, Point{to, y}, l.Pen)
		if to < f.box.Right {
			f.scene.Line(Point{to, y}, Point{f.box.Right, y}, HelpPen)
		}
		drawn, wanted, size = append(drawn, l), append(wanted, y), append(size, Normal.pitch()*1.05)
	}
	for i, y := range spread(wanted, size, 0, f.box.Bottom) {
		end := Point{f.box.Right + asideLeader, y}
		f.scene.Line(Point{f.box.Right, wanted[i]}, end, HelpPen)
		f.scene.Text(Text{Text: drawn[i].Label, Rank: RankAxis, Spots: []Spot{{At: end, Anchor: Start}}})
	}
}
