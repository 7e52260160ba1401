package figure

import "slices"

// A measure is how a writer measures texts.
type measure interface {
	clean(text string) string
	// box returns the place that text takes up at a spot of t, mm.
	box(t *Text, text string, at Spot) Box
	// near returns box with the room around it that lines keep free.
	near(box Box) Box
	// apart is what keeps two texts in a line apart, mm.
	apart() float64
}

// A placed text has found its spot.
type placed struct {
	*Text
	text string // cleaned, or a key
	spot Spot
	box  Box
	over bool // something drawn lies beneath it
}

// A placing is where the texts of a scene stand by one measure, and the lines
// to list below for those that found no room.
type placing struct {
	placed []placed
	listed []string
}

// level is what a text may stand over.
type level uint8

const (
	onHatching level = iota // or on thin dotted lines, or on nothing
	onThinLines
	onAnyLine // keys only
)

type placer struct {
	measure measure
	scene   *Scene
	bounds  []Box // of the strokes
	placing
	keys int
}

// place finds a spot for every text of s: for the lower ranks first, at the
// first spot that is clear of lines, else at the first over thin lines. No two
// texts overlap or run into each other, none covers a mark or leaves the
// drawing.
func (s *Scene) place(m measure) placing {
	p := placer{measure: m, scene: s, bounds: make([]Box, len(s.strokes))}
	for i := range s.strokes {
		p.bounds[i] = around(s.strokes[i].points)
	}
	order := make([]*Text, len(s.texts))
	for i := range s.texts {
		order[i] = &s.texts[i]
	}
	slices.SortStableFunc(order, func(a, b *Text) int { return int(a.Rank) - int(b.Rank) })
	for _, t := range order {
		p.text(t)
	}
	p.scales()
	return p.placing
}

// text places one text, or a key in its place.
func (p *placer) text(t *Text) {
	text := p.measure.clean(t.Text)
	if text == "" || p.upTo(onThinLines, t, text) || t.scale > 0 {
		return
	}
	key := "(" + letters(p.keys) + ")"
	if p.upTo(onAnyLine, t, key) {
		p.keys++
		p.listed = append(p.listed, key+" "+text)
		return
	}
	p.listed = append(p.listed, text+noRoom)
}

// scales lists the scales of which fewer than two figures have room. Any two
// say what the others are, so that the rest may be left out.
func (p *placer) scales() {
	count := make([]int, len(p.scene.scales)+1)
	for i := range p.placed {
		count[p.placed[i].scale]++
	}
	for i, told := range p.scene.scales {
		if count[i+1] < 2 {
			p.listed = append(p.listed, p.measure.clean(told)+noRoom)
		}
	}
}

// What stands behind a text that is listed because it is nowhere in the drawing.
const (
	noRoom  = " (no room in the drawing)"
	outside = " (outside the drawing)"
)

// letters returns a, b, ... z, aa, ab, ...
func letters(i int) string {
	if i < 26 {
		return string(rune('a' + i))
	}
	return letters(i/26-1) + letters(i%26)
}

// upTo tries the spots of t at every level up to most.
func (p *placer) upTo(most level, t *Text, text string) bool {
	boxes := make([]Box, len(t.Spots))
	free := make([]bool, len(t.Spots))
	for i, spot := range t.Spots {
		boxes[i] = p.measure.box(t, text, spot)
		free[i] = p.free(boxes[i]) && (t.Inside == nil || within(t.Inside, boxes[i]))
	}
	for l := onHatching; l <= most; l++ {
		for i, spot := range t.Spots {
			if !free[i] {
				continue
			}
			if under := p.beneath(boxes[i]); under <= l {
				p.placed = append(p.placed, placed{t, text, spot, boxes[i], p.drawnOver(boxes[i])})
				return true
			}
		}
	}
	return false
}

// free reports whether box lies in the drawing, off all texts and marks.
func (p *placer) free(box Box) bool {
	if !p.scene.area().Contains(box) {
		return false
	}
	gap := p.measure.apart()
	wider := Box{box.Left - gap, box.Top, box.Right + gap, box.Bottom}
	for i := range p.placed {
		if p.placed[i].box.Overlaps(wider) {
			return false
		}
	}
	for _, m := range p.scene.marks {
		if m.box().Overlaps(box) {
			return false
		}
	}
	return true
}

// beneath returns the least level at which a text may stand at box.
func (p *placer) beneath(box Box) level {
	near := p.measure.near(box)
	least := onHatching
	for i := range p.scene.strokes {
		s := &p.scene.strokes[i]
		if !p.bounds[i].meets(near) || !s.meets(near) {
			continue
		}
		switch {
		case s.pen.Weight > Thin:
			return onAnyLine
		case s.pen.Dash != Dots:
			least = onThinLines
		}
	}
	return least
}

// meets reports whether b and c share a point.
func (b Box) meets(c Box) bool {
	return b.Left <= c.Right && c.Left <= b.Right && b.Top <= c.Bottom && c.Top <= b.Bottom
}

// meets reports whether s has a point in box.
func (s *stroke) meets(box Box) bool {
	for i := 1; i < len(s.points); i++ {
		if crosses(box, s.points[i-1], s.points[i]) {
			return true
		}
	}
	return false
}

// drawnOver reports whether anything is drawn in box.
func (p *placer) drawnOver(box Box) bool {
	for i := range p.scene.strokes {
		if p.bounds[i].meets(box) && p.scene.strokes[i].meets(box) {
			return true
		}
	}
	for i := range p.scene.hatches {
		if touches(p.scene.hatches[i].region, box) {
			return true
		}
	}
	return false
}

// within reports whether box lies inside region altogether.
func within(region []Point, box Box) bool {
	if !inside(region, Point{box.Left, box.Top}) {
		return false
	}
	for i, a := range region {
		if crosses(box, a, region[(i+1)%len(region)]) {
			return false
		}
	}
	return true
}
