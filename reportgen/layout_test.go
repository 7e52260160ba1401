package reportgen

import (
	"slices"
	"strings"
	"testing"

	"arrestcheck/arrest"
	"arrestcheck/arrest/quantity"
)

// What a layout says is put in words with its figures.
func TestStatementsOfTheLayout(t *testing.T) {
	text := arrest.Text
	length := func(x float64) arrest.Arg { return arrest.Figure(quantity.Length, x, quantity.Nearest) }
	speed := func(x float64) arrest.Arg { return arrest.Figure(quantity.Speed, x, quantity.Nearest) }
	force := func(x float64) arrest.Arg { return arrest.Figure(quantity.Force, x, quantity.Down) }
	given := text(string(arrest.Given))
	for _, c := range []struct {
		number string
		id     arrest.WarningID
		args   []arrest.Arg
		holds  string
	}{
		{"S-56", arrest.LayoutRestrained, []arrest.Arg{text("north end")}, "before the edge, over all of the entries; no fall"},
		{"S-56", arrest.LayoutRestrainedInPart, []arrest.Arg{text("north end")}, "before the edge, over part of the entries only; for the rest"},
		{"S-87", arrest.LayoutGoneOver, []arrest.Arg{text("north end"), length(2), length(1.8)}, "only while the body is upright. Bent or kneeling, its point of attachment gets 2.00 m (6.56 ft) from the anchor in plan, and the edge is 1.80 m (5.91 ft) away"},
		{"S-86", arrest.LayoutShort, []arrest.Arg{text("north end"), text("truck"), length(1.3)}, `down to "truck" falls short of the room needed, margin counted in, by up to 1.30 m (4.27 ft)`},
		{"S-57", arrest.LayoutEdge, []arrest.Arg{text("north end"), text("edge sheet 3")}, `rated for it by "edge sheet 3"`},
		{"S-58", arrest.LayoutEdgeUnrated, []arrest.Arg{text("north end")}, "no part is rated for"},
		{"S-59", arrest.LayoutAnchorLow, []arrest.Arg{length(3.3), length(1.8)}, "goes up to 3.30 m (10.8 ft), more than the length of the connector, 1.80 m (5.91 ft)"},
		{"S-60", arrest.LayoutOutOfPlane, []arrest.Arg{text("north end")}, "in no plane"},
		{"S-61", arrest.LayoutIntoFace, []arrest.Arg{text("north end")}, "towards the structure"},
		{"S-62", arrest.LayoutStrikes, []arrest.Arg{text("north end"), text("beam"), speed(2), speed(4)}, `comes to "beam" after the first pull, with 2.00 to 4.00 m/s (6.56 to 13.1 ft/s)`},
		{"S-62", arrest.LayoutStrikes, []arrest.Arg{text("north end"), text("beam"), speed(nan), speed(4)}, `with up to 4.00 m/s (13.1 ft/s), no lower end`},
		{"S-63", arrest.LayoutStrikesFalling, []arrest.Arg{text("north end"), text("beam"), speed(4)}, `comes to "beam" before the first pull, with up to 4.00 m/s`},
		{"S-64", arrest.LayoutStrikeForce, []arrest.Arg{text("beam"), length(0.05), force(16000)}, "over 0.0500 m (0.164 ft), as entered, the mean force of the blow is not less than 16.0 kN"},
		{"S-65", arrest.LayoutNothingBelow, nil, "not known: no obstacle"},
		{"S-65", arrest.LayoutNoClearance, nil, "not known: no clearance"},
		{"S-66", arrest.LayoutItemsMissing, []arrest.Arg{given, text("line stretch, margin"), length(3.1)}, "by the entries for fall and stop: line stretch, margin. What is missing is not zero: the room needed is not less than 3.10 m"},
		{"S-67", arrest.LayoutDatumsApart, []arrest.Arg{given, length(-0.25)}, "0.250 m (0.820 ft) lie between"},
		{"S-68", arrest.LayoutFeetStanding, nil, "without D-ring to feet"},
		{"S-68", arrest.LayoutWidthUnknown, nil, "without half width"},
		{"S-69", arrest.LayoutLaterSwing, []arrest.Arg{force(4100), force(4300)}, "comes to a peak of 4.10 kN (921 lbf), and no swing on this path, this one or a later one, goes above 4.30 kN"},
		{"S-79", arrest.LayoutInextensible, nil, "if the connector did not stretch"},
	} {
		s := fixture(t)
		s.Result.Warnings = []arrest.Warning{{ID: c.id, Args: c.args}}
		list := display{}.statements(s)
		i := slices.IndexFunc(list, func(one said) bool { return one.number == c.number })
		if i < 0 {
			t.Errorf("%s is not printed", c.number)
			continue
		}
		if text := breakable(list[i].text); !strings.Contains(text, c.holds) {
			t.Errorf("%s does not hold %q: %s", c.number, c.holds, text)
		}
	}
}

// A sheet with a layout says so (S-54), in the place of what says that none was
// looked at.
func TestStatementOnTheLayoutEntered(t *testing.T) {
	for persons, in := range map[int]string{0: "S-50", 1: "S-09"} {
		s := fixture(t)
		s.Result.Persons = persons
		s.File.Job.Point.Layout = &arrest.LayoutPlan{}
		var numbers []string
		for _, one := range (display{}).statements(s) {
			numbers = append(numbers, one.number)
		}
		if !slices.Contains(numbers, "S-54") || slices.Contains(numbers, in) || slices.Contains(numbers, "S-10") != (persons > 0) {
			t.Errorf("%d persons: %q", persons, numbers)
		}
	}
}

// What is said of several positions is said once, and names them.
func TestOneStatementForSeveralPositions(t *testing.T) {
	at := func(id arrest.WarningID, args ...string) arrest.Warning {
		w := arrest.Warning{ID: id}
		for _, a := range args {
			w.Args = append(w.Args, arrest.Text(a))
		}
		return w
	}
	s := fixture(t)
	s.Result.Warnings = []arrest.Warning{
		at(arrest.LayoutEdge, "north", "sheet 3"), at(arrest.LayoutIntoFace, "north"), at(arrest.LayoutEdge, "south", "sheet 3"),
		at(arrest.LayoutEdge, "west", "sheet 4"),
	}
	var got []string
	for _, one := range (display{}).statements(s) {
		if one.number == "S-57" || one.number == "S-61" {
			got = append(got, one.number+" "+one.text[:22])
		}
	}
	want := []string{`S-57 At "north", "south" th`, `S-61 From "north" the swing`, `S-57 At "west" the connecto`}
	if !slices.Equal(got, want) || s.Result.Warnings[0].Args[0].Text != "north" {
		t.Errorf("got %q", got)
	}
}
