package figure

// levelSpots returns spots along a level line: at its right end, its left end,
// then between, each above and below.
func levelSpots(from, to, y float64) []Spot {
	spots := make([]Spot, 0, 30)
	add := func(x float64, a Anchor) {
		for _, lift := range []Lift{Above, Below} {
			spots = append(spots, Spot{At: Point{x, y}, Anchor: a, Lift: lift})
		}
	}
	add(to, End)
	spots = append(spots, Spot{At: Point{to, y}, Anchor: Start})
	add(to+sideGap, Start)
	add(from+sideGap, Start)
	for i := 1; i < 12; i++ {
		add(to-float64(float64(i)/12*(to-from)), Middle)
	}
	return spots
}

// curveSpots returns spots at the end of the last run of a curve, then along it
// from its end to its beginning.
func curveSpots(last []Point) []Spot {
	end := last[len(last)-1]
	spots := []Spot{{At: end, Anchor: Start}, {At: end, Anchor: Start, Lift: Above}, {At: end, Anchor: Start, Lift: Below}}
	for i := 12; i >= 0; i-- {
		at := last[i*(len(last)-1)/12]
		for _, anchor := range []Anchor{Start, End} {
			for _, lift := range []Lift{Above, Below} {
				spots = append(spots, Spot{At: at, Anchor: anchor, Lift: lift, Gap: 0.5})
			}
		}
		spots = append(spots, Spot{At: at, Anchor: Start}, Spot{At: at, Anchor: End})
	}
	return spots
}

// Around returns the eight spots around a point that keep gap, mm, from it.
func Around(at Point, gap float64) []Spot {
	right, left := Point{at.X + gap + 0.4, at.Y}, Point{at.X - gap - 0.4, at.Y}
	return []Spot{
		{At: right, Anchor: Start, Lift: Above},
		{At: right, Anchor: Start, Lift: Below},
		{At: left, Anchor: End, Lift: Above},
		{At: left, Anchor: End, Lift: Below},
		{At: at, Anchor: Start, Gap: gap},
		{At: at, Anchor: End, Gap: gap},
		{At: at, Anchor: Middle, Lift: Above, Gap: gap},
		{At: at, Anchor: Middle, Lift: Below, Gap: gap},
	}
}
