package figure

import (
	"fmt"
	"math"
	"strconv"
)

// A View places things of the real world in a scene, at one scale in both
// directions: x to the right, z upwards, in metres.
type View struct {
	Denominator float64 // of the scale: 50 is 1:50 on paper
	origin      Point   // where x = 0, z = 0 is
}

// denominators are those of the scales in use, in turn with every power of ten.
var denominators = [...]float64{1, 1.25, 1.5, 2, 2.5, 3, 4, 5, 6, 7.5}

// Fit returns the view with the largest round scale, 1:50 and the like, at which
// what reaches from lowX to highX and from lowZ to highZ, m, has room in box,
// centred in it. The error says that there is nothing of a size to draw.
func Fit(lowX, highX, lowZ, highZ float64, box Box) (View, error) {
	wide, high := highX-lowX, highZ-lowZ
	if !finite(wide) || !finite(high) || wide < 0 || high < 0 || max(wide, high) == 0 || max(wide, high) > 1e6 {
		return View{}, fmt.Errorf("figure: nothing can be drawn to scale from %v to %v m across and %v to %v m up", lowX, highX, lowZ, highZ)
	}
	least := max(wide/(box.Right-box.Left), high/(box.Bottom-box.Top)) * 1000
	v := View{Denominator: scaleFor(least)}
	v.origin = Point{
		(box.Left+box.Right)/2 - v.Length((lowX+highX)/2),
		(box.Top+box.Bottom)/2 + v.Length((lowZ+highZ)/2),
	}
	return v, nil
}

// scaleFor returns the least denominator in the list that is not below least.
func scaleFor(least float64) float64 {
	for power := math.Floor(math.Log10(least)); ; power++ {
		for _, d := range denominators {
			if got := d * math.Pow(10, power); got >= least*(1-1e-9) {
				return got
			}
		}
	}
}

// Length returns what a length of metres is on paper, mm.
func (v View) Length(m float64) float64 { return m * 1000 / v.Denominator }

// At returns where a point of the world is in the scene.
func (v View) At(x, z float64) Point {
	return Point{v.origin.X + v.Length(x), v.origin.Y - v.Length(z)}
}

// Ratio returns the scale in words, "1:50".
func (v View) Ratio() string {
	return "1:" + strconv.FormatFloat(grain(v.Denominator), 'f', -1, 64)
}

// Arc returns a line along the circle around centre, from one angle to another
// in degrees, measured from the right upwards. It keeps within 0.02 mm of the
// circle.
func Arc(centre Point, radius, from, to float64) []Point {
	turn := (to - from) * math.Pi / 180
	if !centre.finite() || !finite(radius) || !finite(turn) || radius <= 0 {
		return nil
	}
	most := 2 * math.Sqrt(2*0.02/max(radius, 0.02)) // 2 acos(1 - e/r), nearly
	n := int(math.Ceil(min(math.Abs(turn)/most, 4000))) + 1
	points := make([]Point, 0, n+1)
	for i := range n + 1 {
		sin, cos := math.Sincos(from*math.Pi/180 + float64(turn*float64(i)/float64(n)))
		points = append(points, Point{centre.X + float64(radius*cos), centre.Y - float64(radius*sin)}.grain())
	}
	return points
}

// Arrow adds a line from a to b with a head of two strokes at b.
func (s *Scene) Arrow(a, b Point, pen Pen) {
	s.Line(a, b, pen)
	length := math.Sqrt(float64((b.X-a.X)*(b.X-a.X)) + float64((b.Y-a.Y)*(b.Y-a.Y)))
	if !(length > 0) || !finite(length) {
		return
	}
	const long, half = 2.4, 0.8
	ux, uy := (b.X-a.X)/length, (b.Y-a.Y)/length
	for _, side := range []float64{half, -half} {
		tail := Point{b.X - float64(long*ux) - float64(side*uy), b.Y - float64(long*uy) + float64(side*ux)}
		s.Line(b, tail, Pen{Weight: pen.Weight})
	}
}

// ScaleBar adds a bar of a round length, at most 40 mm, with its figures in a
// unit of so many metres, and the scale; its left end is at a point.
func (s *Scene) ScaleBar(at Point, v View, unit string, metres float64) {
	const longest = 40
	st := step{1, int(math.Floor(math.Log10(longest*v.Denominator/1000/metres))) - 1}
	for v.Length(st.next().times(1)*metres) <= longest {
		st = st.next()
	}
	end := Point{at.X + v.Length(st.times(1)*metres), at.Y}
	mid := Point{(at.X + end.X) / 2, at.Y}
	s.Line(at, end, Pen{Weight: Medium})
	for _, p := range []Point{at, mid, end} {
		s.Line(p, Point{p.X, p.Y - tickLength}, Pen{})
	}
	below := func(text string, p Point) {
		s.Text(Text{Text: text, Rank: RankAxis, Spots: []Spot{{At: p, Anchor: Middle, Lift: Below}}})
	}
	below("0", at)
	below(st.tick(1).Label+" "+unit, end)
	s.Text(Text{Text: "scale " + v.Ratio(), Rank: RankAxis, Spots: []Spot{{At: end, Anchor: Start, Gap: 4}, {At: mid, Anchor: Middle, Lift: Above, Gap: 2}}})
}
