package jobfile_test

import (
	"slices"
	"strings"
	"testing"

	"arrestcheck/arrest"
	"arrestcheck/arrest/jobfile"
	"arrestcheck/arrest/rig"
)

// Items that something else may hold stand beside it where it does not.
func TestItemsCountedOnce(t *testing.T) {
	const stop, absorber = "[stop]\ndistance = \"1.1 m\"\n", "[[connector]]\npart = \"absorber\"\ndeployment_force = \"4 kN\"\ntravel_at_most = \"1 m\"\n"
	const harness, anchor = "[[connector]]\npart = \"harness and body\"\nstiffness = \"100 kN/m\"\n", "[[connector]]\npart = \"anchor\"\nstiffness = \"900 kN/m\"\n"
	const typed = `deceleration_distance = "1.2 m"` + "\n"
	for _, c := range []struct {
		name, around, items string
		twice               []string // keys that are refused
	}{
		{"every item typed", "", typed + "line_stretch = \"0.1 m\"\nharness_stretch = \"0.3 m\"\nanchor_give = \"0 m\"\nmargin = \"1 m\"", nil},
		{"each held by another", "", typed + "deceleration_includes = [\"line_stretch\", \"anchor_give\"]\nmargin = \"1 m\"\nmargin_includes = [\"harness_stretch\"]", nil},
		{"harness beside a stop", stop, "harness_stretch = \"0.3 m\"", nil},
		{"line beside a stop", stop, "line_stretch = \"0 m\"", []string{"clearance.line_stretch"}},
		{"anchor of the margin beside a stop", stop, "margin = \"1 m\"\nmargin_includes = [\"anchor_give\"]", []string{"clearance.margin_includes"}},
		{"all of it beside a path with a typed travel", absorber + harness + anchor, typed + "line_stretch = \"0.1 m\"\nharness_stretch = \"0.3 m\"\nanchor_give = \"0.1 m\"", nil},
		{"harness beside a path without one", absorber + anchor, "harness_stretch = \"0.3 m\"", nil},
		{"harness beside a path with one", absorber + harness, "harness_stretch = \"0.3 m\"", []string{"clearance.harness_stretch"}},
		{"anchor beside a path without one", absorber + harness, "anchor_give = \"0.1 m\"", nil},
		{"anchor beside a path with one", absorber + anchor, "anchor_give = \"0.1 m\"", []string{"clearance.anchor_give"}},
		{"line beside a path", absorber, "line_stretch = \"0.1 m\"", []string{"clearance.line_stretch"}},
		{"travel twice", stop, typed, []string{"clearance.deceleration_distance"}},
		{"in both lists and typed", "", typed + "deceleration_includes = [\"anchor_give\"]\nanchor_give = \"0 m\"\nmargin = \"1 m\"\nmargin_includes = [\"anchor_give\"]", []string{"clearance.anchor_give"}},
	} {
		for _, datum := range []string{"feet", "anchor"} {
			_, err := jobfile.Read("job", []byte(layoutJob(c.around, "[clearance]\ndatum = \""+datum+"\"\n"+c.items+"\n")), nil)
			if len(c.twice) == 0 {
				if err != nil {
					t.Errorf("%s below the %s: %v", c.name, datum, err)
				}
				continue
			}
			if err == nil {
				t.Errorf("%s below the %s is read", c.name, datum)
				continue
			}
			var keys []string
			for _, f := range err.(*jobfile.Faults).List {
				keys = append(keys, f.Key)
			}
			if !slices.Equal(keys, c.twice) {
				t.Errorf("%s below the %s: %v\n%v", c.name, datum, keys, err)
			}
		}
	}
}

// A connector that ends before the edge needs no room, so nothing is counted.
func TestNothingCountedInRestraint(t *testing.T) {
	text := layoutJob("anchor_height = \"0.4 m\"", "edge = \"round\"\nanchor_behind_edge = \"4 m\"", "out = \"-3 m\"", "[clearance]\ndatum = \"feet\"\nmargin = \"1 m\"")
	f, err := jobfile.Read("job", []byte(text), nil)
	if err != nil {
		t.Fatal(err)
	}
	if run := arrest.LayoutAt(&f.Job.Point); run.Place.Status != rig.Restrained || run.Given.Known {
		t.Errorf("%v, %+v", run.Place.Status, run.Given)
	}
}

// The sums of the file that uses every way of writing an item, by hand: below
// the feet the free fall, the travel with its stretch, the anchor, the margin
// with the harness and the drop of the swing.
func TestClearanceFromAFile(t *testing.T) {
	f := goodJob(t, "layout-two-positions.toml")
	f.Job.Point.Position = 0 // right below: no swing
	run := arrest.LayoutAt(&f.Job.Point)
	fall := 1.4 - (2.6 - 2.0)
	near(t, "below the feet", run.Given.Feet.Needed, fall+1.2+0.05+1, 1e-12)
	near(t, "below the anchor", run.Given.Anchor.Needed, 2.0+1.2+0.05+1+1.6, 1e-12)
	near(t, "needed", run.Given.Needed, run.Given.Anchor.Needed, 1e-15)
	f = goodJob(t, "layout-feet.toml")
	run = arrest.LayoutAt(&f.Job.Point)
	near(t, "at the low ends", run.Given.Needed, 3.3+1.4+0+0.3+0+1, 1e-12)
	// The way below the anchor comes to more, and the greater room counts.
	near(t, "below the anchor", run.Given.Anchor.Needed, 1.8+1.4+0+0.3+0+1+1.7, 1e-12)
	near(t, "left", run.Given.Left, 9.4-6.2, 1e-12)
}

func TestWordsOfTheTable(t *testing.T) {
	k := record("clearance.margin_includes")
	if k.Kind != jobfile.Words || !slices.Equal(k.Choices, []string{"line_stretch", "harness_stretch", "anchor_give"}) {
		t.Errorf("%+v", k)
	}
	for _, w := range k.Choices {
		if item := record("clearance." + w); item.Kind != jobfile.Quantity || strings.HasSuffix(item.Name, "_includes") {
			t.Errorf("%s is no item", w)
		}
	}
}
