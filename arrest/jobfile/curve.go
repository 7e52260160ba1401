package jobfile

import (
	"fmt"
	"strings"

	"arrestcheck/arrest"
	"arrestcheck/arrest/connector"
	"arrestcheck/arrest/quantity"
)

// mostPoints is how many loading points one part may have.
const mostPoints = 100

// curve reads loading points and the way back. They are exact, so that no input
// changes them; they stand on the list for their source.
func (r *partReader) curve() (points []connector.Point, unloading float64) {
	stays := func(*arrest.Case, float64) {}
	e := r.sourced(r.t.quantity("unloading"))
	r.in.add(r.t.key("unloading"), arrest.OfPart, e, stays)
	v, k, ok := r.t.take("points")
	if !ok {
		return nil, e.band.Value
	}
	points, last, text := r.points(k, v)
	if points == nil {
		r.in.refused = true
		return nil, e.band.Value
	}
	last.Text, last.Tolerance = text, quantity.PlusMinus // exact by its form
	r.wayBack(points, e)
	r.in.add(r.t.key("points"), arrest.OfPart, r.sourced(entry{key: k, band: last, given: true}), stays)
	return points, e.band.Value
}

// points reads the list of pairs. It returns the points, the last force, and
// all of it in words; nil after a fault.
func (r *partReader) points(k *Key, v any) (points []connector.Point, last quantity.Band, text string) {
	list, isList := v.([]any)
	switch {
	case !isList:
		r.t.wrongKind(k, v)
		return nil, last, ""
	case len(list) > mostPoints:
		r.t.fault(k.Name, "", fmt.Sprintf("a loading curve has at most %d points, and %d stand in the list", mostPoints, len(list)), "write: the points at which the curve bends")
		return nil, last, ""
	}
	var words []string
	good := true
	for i, v := range list {
		at := element(r.t.key(k.Name), i)
		pair, isPair := v.([]any)
		if !isPair || len(pair) != 2 {
			r.t.page.fault(at, at, "", "a point is a pair of extension and force", `write: ["60 mm", "4 kN"] in its place`)
			good = false
			continue
		}
		x, okX := r.coordinate(at+"[1]", quantity.Length, pair[0])
		f, okF := r.coordinate(at+"[2]", quantity.Force, pair[1])
		points = append(points, connector.Point{Extension: x.Value, Force: f.Value})
		words, last = append(words, x.Text+" "+f.Text), f
		good = good && okX && okF
	}
	if good && len(points) == 0 {
		r.t.fault(k.Name, "", "no point stands in the list", k.hint())
	}
	if !good || len(points) == 0 {
		return nil, last, ""
	}
	if points[0].Force > 0 {
		at := element(r.t.key(k.Name), 0)
		r.t.page.fault(at, at, words[0], "the first point has no force: a curve begins where the part begins to pull", `write: ["0 mm", "0 kN"] in its place, or before it`)
		return nil, last, ""
	}
	return points, last, strings.Join(words, ", ")
}

// wayBack refuses a way back below the steepest stretch of the curve: the part
// would give back more than it took.
func (r *partReader) wayBack(points []connector.Point, unloading entry) {
	steepest := 0.0
	for i := 1; i < len(points); i++ {
		a, b := points[i-1], points[i]
		steepest = max(steepest, (b.Force-a.Force)/(b.Extension-a.Extension))
	}
	if unloading.given && unloading.band.Value < steepest {
		r.in.refused = true
		r.t.fault("unloading", unloading.band.Text, "it is below the steepest stretch of the curve, "+
			quantity.Format(steepest, unloading.band.Unit, 4, quantity.Up)+": the part would give back more than it took", r.t.group.named["unloading"].hint())
	}
}

// coordinates are the rules of the two figures of a loading point.
var coordinates = map[quantity.Dimension]*Key{
	quantity.Length: {Dimension: quantity.Length, Spread: NoSpread, Sign: NotNegative, Possible: Span{0, 50}, Example: `"60 mm"`},
	quantity.Force:  {Dimension: quantity.Force, Spread: NoSpread, Sign: NotNegative, Possible: Span{0, 200e3}, Example: `"4 kN"`},
}

// coordinate reads one figure of a loading point.
func (r *partReader) coordinate(key string, d quantity.Dimension, v any) (quantity.Band, bool) {
	k := *coordinates[d]
	k.Kind = Quantity
	e := r.t.page.figure(spot{key: key}, &k, d, v)
	return e.band, e.given
}
