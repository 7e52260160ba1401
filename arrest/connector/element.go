package connector

import "math"

// An element is half a part: what stretches, or what travels under a held
// force. All elements of a path carry the same force and their extensions add.
type element struct {
	part   int
	points []Point // corners of the loading curve, the first at no extension
	small  [3]Point

	last      float64 // compliance beyond the last corner in m/N; 0: rigid
	measured  float64 // extension of the last loading point in m; +Inf: none was given
	starts    float64 // force that starts it, above the first corner only with an activation peak
	give      float64 // compliance of unloading in m/N of what does not return along its curve
	reversing bool    // returns along its loading curve
	plateau   bool
}

// stretch sets the element from the stretch of a part and reports whether the
// part has any.
func (el *element) stretch(i int, p *Part) bool {
	*el = element{part: i, reversing: p.Unloading == 0, give: compliance(p.Unloading), measured: math.Inf(1)}
	switch {
	case p.Points != nil:
		el.curve(p.Points)
	case p.Stiffness > 0:
		el.small[0] = Point{}
		el.points = el.small[:1]
		el.last = 1 / p.Stiffness
	default:
		return false
	}
	el.starts = el.points[0].Force
	return true
}

// curve takes the corners of a loading curve: without its leading slack, and
// without the last point, beyond which the last stretch goes on. A shift of the
// extensions needs a list of its own, which is the only allocation of a path
// that has grown.
func (el *element) curve(points []Point) {
	slack := leadingSlack(points)
	n := len(points)
	a, b := points[n-2], points[n-1]
	el.last = (b.Extension - a.Extension) / (b.Force - a.Force)
	el.measured = b.Extension - slack
	if slack == 0 {
		el.points = points[:n-1]
		return
	}
	for len(points) > 1 && points[1].Force == 0 {
		points = points[1:]
	}
	shifted := make([]Point, len(points)-1)
	for i := range shifted {
		shifted[i] = Point{points[i].Extension - slack, points[i].Force}
	}
	el.points = shifted
}

// hold sets the element from the plateau of a part and reports whether the part
// has one.
func (el *element) hold(i int, p *Part) bool {
	q := p.Plateau
	if q.Force == 0 {
		return false
	}
	*el = element{part: i, plateau: true, measured: math.Inf(1)}
	el.starts = q.Force
	if q.Activation != 0 {
		el.starts = q.Activation
	}
	corners := el.small[:0]
	if q.Rise > 0 {
		corners = append(corners, Point{0, q.Activation}, Point{q.Rise, q.Force})
	} else {
		corners = append(corners, Point{0, q.Force})
	}
	if q.Travel > q.Rise {
		corners = append(corners, Point{q.Travel, q.Force})
	}
	el.points = corners
	return true
}

// compliance returns 1/k, and 0 for the k of 0 that stands for "none given".
func compliance(k float64) float64 {
	if k == 0 {
		return 0
	}
	return 1 / k
}

// slope returns the compliance of the loading curve in m/N between the corner i
// and the next one, and the force of the next one.
func (el *element) slope(i int) (c, next float64) {
	if i == len(el.points)-1 {
		return el.last, math.Inf(1)
	}
	a, b := el.points[i], el.points[i+1]
	return (b.Extension - a.Extension) / (b.Force - a.Force), b.Force
}

// corner returns the last corner whose force is not above f.
func (el *element) corner(f float64) int {
	i := 0
	for i+1 < len(el.points) && el.points[i+1].Force <= f {
		i++
	}
	return i
}

// at returns the extension in m of an element that returns along its curve.
func (el *element) at(f float64) float64 {
	i := el.corner(f)
	c, _ := el.slope(i)
	return el.points[i].Extension + float64(c*(f-el.points[i].Force))
}

// recoverable returns the energy in J that the element gives back from the
// force f.
func (el *element) recoverable(f float64) float64 {
	if !el.reversing {
		return el.give * f * f / 2
	}
	energy, from := 0.0, 0.0
	for i := range el.points {
		c, next := el.slope(i)
		to := min(next, f)
		if to > from {
			energy += float64(c*(to-from)) * (to + from) / 2
			from = to
		}
	}
	return energy
}

// released returns the extension in m that the element gives back while the
// force goes down from one value to another.
func (el *element) released(from, to float64) float64 {
	if el.reversing {
		return el.at(from) - el.at(to)
	}
	return el.give * (from - to)
}
