package jobfile

import (
	"fmt"
	"math"
	"strconv"
	"strings"

	"arrestcheck/arrest"
)

// load reads the [moving_load].
func (in *inputs) load(t *table) {
	l := &in.point.Load
	in.add("moving_load.mass", arrest.OfWorker, t.quantity("mass"), func(c *arrest.Case, x float64) { c.Load.Mass = x })
	before := t.velocity("velocity_before")
	after := t.velocity("velocity_after")
	in.velocity(before, func(c *arrest.Case) *[3]float64 { return &c.Load.Before })
	in.velocity(after, func(c *arrest.Case) *[3]float64 { return &c.Load.After })
	in.add("moving_load.distance", arrest.OfStop, t.quantity("distance"), func(c *arrest.Case, x float64) { c.Load.Distance = x })
	in.add("moving_load.time", arrest.OfStop, t.quantity("time"), func(c *arrest.Case, x float64) { c.Load.Time = x })
	in.add("moving_load.driving_force", arrest.OfDrive, t.quantity("driving_force"), func(c *arrest.Case, x float64) { c.Load.Driving = x })
	in.add("moving_load.slope_down", arrest.OfDrive, t.quantity("slope_down"), func(c *arrest.Case, x float64) { c.Load.Up[0] = -math.Sin(x) })
	t.choice("path")
	up := t.choice("up")
	l.Axes = before.axes()
	if !before.given || !after.given {
		return
	}
	t.axes(before, after, up)
	if up != "" {
		l.Up[axisOf(up)] = float64(44 - int(up[0])) // + is 43, - is 45
	}
	t.slowed(before, after)
}

// axisOf returns the number of the axis in "+x", from 0.
func axisOf(up string) int { return strings.IndexByte("xyz", up[1]) }

// A velocity is one key of a moving load as it is written.
type velocity struct {
	spots []spot  // where each figure stands
	list  []entry // components, or speed and direction
	polar bool
	given bool // all of it is read
}

// axes is how many components the velocity has.
func (v *velocity) axes() int { return min(len(v.list), 3) }

// velocity reads one figure, a list of components, or a speed with its direction.
func (t *table) velocity(name string) *velocity {
	v, k, ok := t.take(name)
	if !ok {
		return &velocity{}
	}
	u := &velocity{}
	switch v := v.(type) {
	case []any, []map[string]any:
		u.components(t, k, listOf(v))
	case map[string]any:
		_, hasSpeed := v["speed"]
		_, hasDirection := v["direction"]
		if hasSpeed || hasDirection {
			s := t.page.open(Polar, t.key(name), v)
			u.polar = true
			u.spots = []spot{{s.key("speed"), "speed"}, {s.key("direction"), "direction"}}
			u.list = []entry{s.quantity("speed"), s.quantity("direction")}
			break
		}
		u.one(t.page, spot{t.key(name), name}, k, v)
	default:
		u.one(t.page, spot{t.key(name), name}, k, v)
	}
	u.given = len(u.list) > 0
	for i := range u.list {
		u.given = u.given && u.list[i].given
	}
	return u
}

func (u *velocity) one(pg *page, at spot, k *Key, v any) {
	u.spots = append(u.spots, at)
	u.list = append(u.list, pg.figure(at, k, k.Dimension, v))
}

// components reads a list of one to three figures.
func (u *velocity) components(t *table, k *Key, list []any) {
	if len(list) < 1 || len(list) > 3 {
		t.fault(k.Name, "", "one to three components are asked for, and "+strconv.Itoa(len(list))+" stand in the list", `write: `+k.Name+` = ["3 m/s", "-9 m/s"]`)
		return
	}
	for i, v := range list {
		u.one(t.page, spot{key: element(t.key(k.Name), i)}, k, v)
	}
}

// velocity puts the figures of a velocity on the list of inputs.
func (in *inputs) velocity(v *velocity, of func(*arrest.Case) *[3]float64) {
	if !v.given {
		in.refused = true
		return
	}
	if v.polar {
		cos, sin := bearing(v.list[1].band.Value)
		in.add(v.spots[0].key, arrest.OfFall, v.list[0], func(c *arrest.Case, x float64) { *of(c) = [3]float64{x * cos, x * sin} })
		in.add(v.spots[1].key, arrest.OfFall, v.list[1], nil)
		return
	}
	for i := range v.list {
		in.add(v.spots[i].key, arrest.OfFall, v.list[i], func(c *arrest.Case, x float64) { of(c)[i] = x })
	}
}

// bearing returns the components of the unit vector in a direction. Along an
// axis the other one is 0, although a right angle in radians is not exact.
func bearing(angle float64) (cos, sin float64) {
	const nothing = 1e-15
	snap := func(x float64) float64 {
		if math.Abs(x) < nothing {
			return 0
		}
		return x
	}
	return snap(math.Cos(angle)), snap(math.Sin(angle))
}

// axes records what does not go with the number of components.
func (t *table) axes(before, after *velocity, up string) {
	n := before.axes()
	if m := after.axes(); m != n {
		t.fault("velocity_after", "", fmt.Sprintf("it has %s, and %s has %s", count(m, "component"), t.key("velocity_before"), count(n, "component")),
			"write: both with the same number of components")
	}
	if up != "" && axisOf(up) >= n {
		t.fault("up", up, fmt.Sprintf("the velocities have no component along %s: they have %s", up[1:], count(n, "component")),
			"write: velocities with a component along "+up[1:]+or+"the axis, of those given, that points up or down")
	}
	if n == 1 {
		if !t.has("driving_force") {
			t.missing(t.group.named["driving_force"])
		}
		return
	}
	for _, name := range []string{"distance", "driving_force", "slope_down"} {
		if t.has(name) {
			t.fault(name, "", fmt.Sprintf("it is one along a straight path, and the velocities have %s", count(n, "component")),
				"take out: "+t.key(name)+or+"write the velocities with one component, along the path")
		}
	}
	if !t.has("time") && t.has("distance") {
		t.page.fault(t.path, t.key("time"), "", "the key is missing: with several components the time is asked for", t.group.named["time"].hint())
	}
}

// slowed records velocities between which nothing is stopped or slowed.
func (t *table) slowed(before, after *velocity) {
	if before.axes() != after.axes() {
		return
	}
	b, a := before.list[0].band, after.list[0].band
	switch {
	case before.axes() == 1 && b.Low <= 0:
		t.faultAt(before.spots[0], b.Text, "one component runs along the motion, so it has to be above zero", "write: velocity_before = "+t.group.named["velocity_before"].Example)
	case before.axes() == 1 && a.Low >= b.High:
		t.faultAt(after.spots[0], a.Text, "the load is not slowed: before the stop it moves at "+b.Text, "write: a velocity below that of "+t.key("velocity_before"))
	case before.still():
		t.fault("velocity_before", "", "the load does not move", "write: the velocity at the beginning of the stop")
	case before.same(after):
		t.fault("velocity_after", "", "the velocity is that before the stop: nothing is stopped", "write: the velocity at the end of the stop")
	case t.has("distance") && a.Low < 0 && before.axes() == 1:
		t.faultAt(after.spots[0], a.Text, "the load bounces back, and "+t.key("distance")+" ends where it turns: the two do not go together",
			"take out: "+t.key("distance")+", and write the time"+or+"write velocity_after = \"0 m/s\"")
	}
}

func (t *table) faultAt(at spot, text, reason, hint string) {
	t.page.fault(at.key, at.key, text, reason, hint)
}

// still reports whether the velocity is zero, all of it.
func (v *velocity) still() bool {
	for i := range v.list {
		if b := &v.list[i].band; b.Low != 0 || b.High != 0 {
			return v.polar && i == 1
		}
	}
	return true
}

// same reports whether two velocities are one, written in the same way without
// any width.
func (v *velocity) same(w *velocity) bool {
	if v.polar != w.polar {
		return v.still() && w.still()
	}
	for i := range v.list {
		a, b := &v.list[i].band, &w.list[i].band
		if a.Low != a.High || b.Low != b.High || a.Low != b.Low {
			return false
		}
	}
	return true
}
