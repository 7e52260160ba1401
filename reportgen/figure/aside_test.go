package figure

import (
	"math"
	"slices"
	"strings"
	"testing"
)

// Three levels that lie on top of each other have their labels one below the
// other at the right of the frame, in the order of the levels, each at the end of
// a dotted line that begins where its level ends.
func TestAside(t *testing.T) {
	p := &Plot{
		X: Axis{Name: "time", Unit: "s", Low: 0, High: 2}, Y: Axis{Name: "force", Unit: "kN"}, Aside: true,
		Curves: []Curve{{X: []float64{0, 1, 2}, Y: []float64{0, 4, 0}}},
		Levels: []Level{
			{At: 2.0, To: 1, Label: "lower", Pen: MeanPen}, {At: 2.2, To: 1, Label: "upper", Pen: MeanPen},
			{At: 2.1, Label: "throughout", Pen: LimitPen}, {At: 3, From: 7, To: 8, Label: "nowhere"},
		},
	}
	s, err := p.Scene()
	if err != nil {
		t.Fatal(err)
	}
	checkBoxes(t, s)
	at := map[string]Box{}
	frame := 0.0 // where the lines to the labels begin
	for _, b := range s.place(paper{}).placed {
		at[b.text] = b.box
	}
	for _, k := range s.strokes {
		if k.pen == LimitPen {
			frame = k.points[len(k.points)-1].X
		}
	}
	upper, middle, lower := at["upper"], at["throughout"], at["lower"]
	if !(upper.Bottom <= middle.Top && middle.Bottom <= lower.Top && upper.Left == lower.Left && upper.Left > frame) {
		t.Errorf("labels at %v %v %v, frame at %v", upper, middle, lower, frame)
	}
	dotted := 0
	for _, k := range s.strokes {
		if k.pen == HelpPen && slices.ContainsFunc(k.points, func(p Point) bool { return math.Abs(p.X-frame) < 0.01 }) {
			dotted++
		}
	}
	if dotted != 5 { // on from the two short ones to the frame, and three to the labels
		t.Errorf("%d dotted lines", dotted)
	}
	if text := strings.Join(s.Notes, ""); text != "nowhere"+outside {
		t.Errorf("notes: %q", text)
	}
}

// A long label does not squeeze the frame away: it is listed below.
func TestAsideLong(t *testing.T) {
	p := &Plot{X: Axis{Name: "x"}, Y: Axis{Name: "y"}, Aside: true,
		Curves: []Curve{{X: []float64{0, 1}, Y: []float64{0, 1}}}, Levels: []Level{{At: 0.5, Label: strings.Repeat("long ", 30)}}}
	s, err := p.Scene()
	if err != nil {
		t.Fatal(err)
	}
	checkBoxes(t, s)
	if listed := s.place(paper{}).listed; len(listed) != 1 || !strings.HasPrefix(listed[0], "(a) long") {
		t.Errorf("listed: %q", listed)
	}
}
