package reportgen

import (
	"bytes"
	"context"
	"encoding/json"
	"math"
	"strings"
	"testing"

	"arrestcheck/arrest"
	"arrestcheck/arrest/quantity"
	"arrestcheck/arrest/study"
)

// enveloped maps a job over stopping distance and free fall.
func enveloped(t testing.TB, s *Sheet, steps int) *Envelope {
	t.Helper()
	found, err := study.Envelop(context.Background(), &s.File.Job, study.Layout{
		Across: study.Range{Key: "stop.distance", Low: 0.2, High: 2}, Up: study.Range{Key: "fall.free_fall", Low: 0, High: 4},
		Sets: s.File.Sets, Steps: steps,
	})
	if err != nil {
		t.Fatal(err)
	}
	return &Envelope{Sheet: s, Found: found, Units: [2]quantity.Unit{quantity.Length.SI(), quantity.Length.SI()}}
}

// A mean of 4 kN is exceeded below d = h/(4000/980.665 - 1): for h = 2 m below
// 0.649591 m.
func TestEnvelopeInWords(t *testing.T) {
	s := overOneMetre(t, atMostRule("mean-4", arrest.MeanForceOverDistance, "4 kN")+atMostRule("mass", arrest.TotalMass, "140 kg"))
	v := enveloped(t, s, 256)
	text := written(t, v.Report)
	mustHold(t, text, "S-73 The regions say what would come out if stop.distance and fall.free_fall were measured so",
		"2.00 6.56 exceeded up to 0.650 m (2.14 ft); within as entered beyond",
		"Total mass, limit mass (at most 140 kg): within as entered.",
		"Moved stop.distance from 0.200 m to 2.00 m; in the job: 1 m ± 0 m")
	if strings.Contains(text, "S-77") {
		t.Error("S-77 without alternatives")
	}
	var b bytes.Buffer
	if err := v.JSON(&b); err != nil {
		t.Fatal(err)
	}
	var doc struct {
		Limits []struct {
			Limit string
			Zones []string
			Rows  []struct {
				Up    float64
				First string
				Edges []struct {
					At    float64
					Zone  string
					Lower string `json:"lower_demand"`
				}
			}
		}
	}
	if err := json.Unmarshal(b.Bytes(), &doc); err != nil {
		t.Fatal(err)
	}
	mid := doc.Limits[0].Rows[4]
	if mid.Up != 2 || mid.First != "exceeded" || len(mid.Edges) != 1 || !quantity.Close(mid.Edges[0].At, 2/(4000/980.665-1), 1e-11) || mid.Edges[0].Lower != "above" {
		t.Errorf("%+v", mid)
	}
}

// Limits that are ways to fulfil one rule are said to be looked at one by one.
func TestEnvelopeOfAlternatives(t *testing.T) {
	either := strings.Replace(atMostRule("mean-4", arrest.MeanForceOverDistance, "4 kN"), "kind =", "any_of = \"either\"\nkind =", 1)
	text := written(t, enveloped(t, overOneMetre(t, either), 64).Report)
	mustHold(t, text, "S-77 Each limit is looked at by itself, also where limits are ways to fulfil one rule, of which one counts: mean-4.")
}

// CSV has every row of the grid, from its first figure to its last.
func TestEnvelopeCSV(t *testing.T) {
	v := enveloped(t, overOneMetre(t, atMostRule("mean-4", arrest.MeanForceOverDistance, "4 kN")), 64)
	var b bytes.Buffer
	if err := v.CSV(&b); err != nil {
		t.Fatal(err)
	}
	lines := strings.Split(strings.TrimSuffix(b.String(), "\n"), "\n")
	rows := map[string]bool{}
	for _, l := range lines[1:] {
		rows[strings.Split(l, ",")[1]] = true
	}
	if lines[0] != "limit,fall.free_fall (m),stop.distance from (m),stop.distance to (m),zone" || len(rows) != 65 {
		t.Errorf("%d rows below %q", len(rows), lines[0])
	}
}

// The parts cover the grid, each point is within the ring of its own part, and
// the ring has the area of its points.
func TestGridParts(t *testing.T) {
	pictures := []string{
		"aaa\naaa",
		"aab\nabb\nbbb",
		"aaaaa\nabbba\nabaab\nabbba\naaaaa", // a hole, and an island open to the side
		"aaaaa\nabbba\nabaca\nabbba\naaaaa",
		"ab\nba",
		"aba\nbab\naba",
	}
	for _, picture := range pictures {
		g := gridFrom(picture)
		points := 0
		for _, p := range g.parts() {
			points += p.points
			if area := areaOf(&g, p.ring); math.Abs(area-float64(p.points)) > 1e-9 {
				t.Errorf("%q: a part of %d points has the area %v", picture, p.points, area)
			}
		}
		if points != len(g.zones) {
			t.Errorf("%q: %d of %d points", picture, points, len(g.zones))
		}
	}
}

func gridFrom(picture string) grid {
	rows := strings.Split(picture, "\n")
	g := grid{across: len(rows[0]), up: len(rows)}
	for _, r := range rows {
		for _, c := range r {
			g.zones = append(g.zones, study.Zone(c-'a'))
		}
	}
	return g
}

// areaOf is the area within a ring, the squares at the edge of the grid whole:
// the ring is cut there to the middles of the outermost points.
func areaOf(g *grid, ring [][2]float64) float64 {
	whole := func(p [2]float64) (x, y float64) {
		x, y = p[0], p[1]
		if x == 0 {
			x = -0.5
		}
		if y == 0 {
			y = -0.5
		}
		if x == float64(g.across-1) {
			x += 0.5
		}
		if y == float64(g.up-1) {
			y += 0.5
		}
		return x, y
	}
	sum := 0.0
	for i, p := range ring {
		x0, y0 := whole(p)
		x1, y1 := whole(ring[(i+1)%len(ring)])
		sum += x0*y1 - x1*y0
	}
	return sum / 2
}
