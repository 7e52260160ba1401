package reportgen

import (
	"bytes"
	"encoding/json"
	"strings"
	"testing"

	"arrestcheck/arrest"
	"arrestcheck/arrest/quantity"
)

// Over 0.80 to 1.10 m, the mass and the fall exact, a mean of at most 3 kN is
// settled by d within h/(3000/980.665 - 1) = 0.874125 m on the low side: about
// the middle, 0.95 m, by ± 0.0758 m (rounded down). The mean itself goes from
// 980.665*(1 + 1.8/1.10) = 2585.39 N to 980.665*(1 + 1.8/0.80) = 3187.16 N.
func TestWhatToMeasureFirst(t *testing.T) {
	p := pieces{rest: stopOver("0.80 m .. 1.10 m") + atMostRule("mean-3", arrest.MeanForceOverDistance, "3 kN")}
	s := worked(t, "job.toml", []byte(p.toml()))
	text := asText(t, s, BothUnits, TextOptions{})
	_, behind, _ := strings.Cut(text, "\n"+measureHeading+"\n")
	mustHold(t, behind, "Row 1, mean force over the distance, limit mean-3 (at most 3 kN): undecided as entered.",
		"With every input measured to ± 0 at its middle figure the row would be within as entered.",
		"2.59 to 3.19 kN", "by 602 N (135 lbf)", "± 0.0758 m (0.248 ft) about", "0.950 m (3.12 ft), the", "then within as entered")
	var b bytes.Buffer
	if err := JSON(&b, s); err != nil {
		t.Fatal(err)
	}
	var doc struct {
		Sensitivity []struct {
			Limit, Zone string
			AtCentres   string `json:"at_centres"`
			Inputs      []struct {
				Key       string
				Low, High float64
				Tolerance struct {
					Help string
					By   float64
				}
			}
		}
	}
	if err := json.Unmarshal(b.Bytes(), &doc); err != nil {
		t.Fatal(err)
	}
	first := doc.Sensitivity[0].Inputs[0]
	if first.Key != "stop.distance" || first.Tolerance.Help != "enough" || !quantity.Close(first.Tolerance.By, 0.95-1.8/(3000/980.665-1), 1e-6) ||
		!quantity.Close(first.Low, 980.665*(1+1.8/1.10), 1e-11) || !quantity.Close(first.High, 980.665*(1+1.8/0.80), 1e-11) {
		t.Errorf("%+v", first)
	}
}

// Open inputs come first, whatever they move.
func TestOpenInputsAreMeasuredFirst(t *testing.T) {
	p := pieces{worker: "mass = \"100 kg\"\ntools = { value = \"0 kg\", source = \"plan\" }", rest: stopOver("0.80 m .. 1.10 m") + atMostRule("mean-3", arrest.MeanForceOverDistance, "3 kN")}
	s := &Sensitivity{Sheet: worked(t, "job.toml", []byte(p.toml()))}
	s.Rank()
	text := written(t, s.Report)
	mass, distance := strings.Index(text, "\nworker.mass"), strings.Index(text, "\nstop.distance")
	if mass < 0 || distance < mass {
		t.Errorf("worker.mass at %d, stop.distance at %d", mass, distance)
	}
	mustHold(t, text, "S-75", "nobody knows: no", "worker.mass (open)")
	var b bytes.Buffer
	if err := s.CSV(&b); err != nil {
		t.Fatal(err)
	}
	if want := "mean-3,mean_force_over_distance,undecided,worker.mass,yes,"; !strings.Contains(b.String(), want) {
		t.Errorf("%s\nlacks %s", b.String(), want)
	}
}

// A settled job without bands has nothing to measure; one with a connector path
// is told where to ask.
func TestWhereNothingIsMeasuredFirst(t *testing.T) {
	p := pieces{rest: stopOver("1 m ± 0 m") + atMostRule("mean-3", arrest.MeanForceOverDistance, "3 kN")}
	if text := asText(t, worked(t, "job.toml", []byte(p.toml())), BothUnits, TextOptions{}); strings.Contains(text, measureHeading) {
		t.Error("a settled job without bands has a list of what to measure")
	}
	text := asText(t, sheet(t, "path-absorber.toml"), BothUnits, TextOptions{})
	mustHold(t, text, measureHeading, pathTakesLonger)
}

// Each bar is drawn with its figures, and the limit as a line.
func TestSensitivityBars(t *testing.T) {
	p := pieces{rest: stopOver("0.80 m .. 1.10 m") + atMostRule("mean-3", arrest.MeanForceOverDistance, "3 kN")}
	s := &Sensitivity{Sheet: worked(t, "job.toml", []byte(p.toml()))}
	s.Rank()
	scene, err := s.Figure(s.Rows()[0], BothUnits)
	if err != nil {
		t.Fatal(err)
	}
	var all strings.Builder
	for _, l := range scene.Boxes() {
		all.WriteString(breakable(l.Text) + "\n")
	}
	for _, want := range []string{"2.59 kN", "3.19 kN", "stop.distance", "mean-3: at most 3 kN", movesNot, notAPermission} {
		if !strings.Contains(all.String(), want) {
			t.Errorf("the drawing lacks %q:\n%s", want, all.String())
		}
	}
}
