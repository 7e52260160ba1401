package reportgen

import (
	"errors"
	"math"
	"regexp"
	"strings"
	"testing"

	"arrestcheck/arrest"
	"arrestcheck/arrest/quantity"
)

// An absorber alone holds 4 kN from the first pull to rest: both means are the
// peak, the time is m v/(4000 N - W) = 0.196789 s and the travel m v^2/2/(4000 N
// - W) = 0.584631 m for 100 kg and 1.8 m.
func TestForceFiguresOfAnAbsorber(t *testing.T) {
	s := sheet(t, "path-absorber.toml")
	means := []string{"peak by the model 4.00 kN", "mean over the distance 4.00 kN", "mean over the time 4.00 kN", meanNote[aPerson], bareNote, "force on the body, kN"}
	mustHold(t, textOf(mustDraw(t, ForceTimeFigure, s)), append(means, "first rest, 0.197 s", "time from the first pull, s")...)
	mustHold(t, textOf(mustDraw(t, ForceTravelFigure, s)), append(means, "first rest, 0.585 m", "travel from the first pull, m")...)
}

// The limits on the peak force are drawn and named, no other is.
func TestForceFigureHasThePeakLimits(t *testing.T) {
	rules := atMostRule("peak-a", arrest.PeakForce, "6 kN") + atMostRule("mean-b", arrest.MeanForceOverDistance, "3 kN")
	s := worked(t, "job.toml", append(mustRead(t, "path-absorber.toml"), rules...))
	scene := mustDraw(t, ForceTimeFigure, s)
	text := textOf(scene)
	mustHold(t, text, "peak-a: at most 6 kN")
	if strings.Contains(text, "mean-b") || !strings.Contains(scene.Desc, "peak-a: at most 6 kN") {
		t.Errorf("desc %q\n%s", scene.Desc, text)
	}
}

// Under a curve of the force over the time lies the impulse, over the travel the
// work: the means over the first stop, once more from the points of the curve.
func TestArrestCurveHoldsItsMeans(t *testing.T) {
	for _, name := range []string{"path-rope-absorber-45.toml", "path-rope.toml", "path-every-part.toml"} {
		b := newBuilder(sheet(t, name), BothUnits)
		_, at := b.arrestCase()
		c, err := curveOfCase(at)
		if err != nil {
			t.Fatal(name, err)
		}
		impulse, work := 0.0, 0.0
		for i := 1; i < len(c.time) && c.time[i] <= c.restTime*(1+1e-12); i++ {
			mean := (c.force[i] + c.force[i-1]) / 2
			impulse += mean * (c.time[i] - c.time[i-1])
			work += mean * (c.travel[i] - c.travel[i-1])
		}
		// The points keep within 0.1 % of the peak.
		if !quantity.Close(impulse/c.restTime, c.meanTime, 2e-3) || !quantity.Close(work/c.restTravel, c.meanDistance, 2e-3) {
			t.Errorf("%s: %v and %v N, the run has %v and %v", name, impulse/c.restTime, work/c.restTravel, c.meanTime, c.meanDistance)
		}
		if !quantity.Close(c.force[c.peakAt], c.peak, 2e-3) {
			t.Errorf("%s: the curve goes to %v of %v N", name, c.force[c.peakAt], c.peak)
		}
	}
}

// In a swing the curve begins with the first pull, at no stretch and no force,
// and what the connector pulls upwards over the time is what the body was carrying
// downwards and its weight: the vertical account of momentum, from the points.
func TestSwungCurve(t *testing.T) {
	b := newBuilder(sheet(t, "layout-path.toml"), BothUnits)
	_, at := b.arrestCase()
	c, err := curveOfCase(at)
	if err != nil {
		t.Fatal(err)
	}
	if !c.swing || c.time[0] != 0 || math.Abs(c.travel[0]) > 1e-9 || c.force[0] > 1e-6 {
		t.Errorf("begins at %v s, %v m, %v N", c.time[0], c.travel[0], c.force[0])
	}
	if !quantity.Close(c.force[c.peakAt], c.peak, 5e-3) {
		t.Errorf("the curve goes to %v of %v N", c.force[c.peakAt], c.peak)
	}
	states, err := arrest.SwingSeries(at)
	if err != nil {
		t.Fatal(err)
	}
	l := arrest.LayoutAt(at)
	pulled := 0.0
	for i := 1; i < len(states); i++ {
		up := func(k int) float64 {
			h := l.Place.Plane.Pivot - states[k].Z
			return states[k].F * h / math.Hypot(states[k].U, h)
		}
		pulled += (up(i) + up(i-1)) / 2 * (states[i].Time - states[i-1].Time)
	}
	first, last := states[0], states[len(states)-1]
	mass := at.Mass + at.Tools
	want := mass*at.Gravity*(last.Time-first.Time) + mass*(last.VZ-first.VZ)
	if !quantity.Close(pulled, want, 2e-3) {
		t.Errorf("pulled upwards by %v N s, want %v", pulled, want)
	}
	text := textOf(mustDraw(t, ForceTravelFigure, b.s))
	mustHold(t, text, "stretch of the connector, m", heldFlatNote)
	if strings.Contains(text, "mean over") {
		t.Error("a mean of a swing is drawn")
	}
}

// In pounds and feet nothing is metric but the limit, which stands as it was typed.
func TestForceFigureInPounds(t *testing.T) {
	s := sheet(t, "path-absorber.toml")
	scene, err := Figure(ForceTravelFigure, s, USUnits)
	if err != nil {
		t.Fatal(err)
	}
	// 4 kN are 899.24 lbf, 0.584631 m are 1.9181 ft.
	mustHold(t, textOf(scene), "force on the body, lbf", "travel from the first pull, ft", "peak by the model 899 lbf", "first rest, 1.92 ft")
	text := strings.Replace(textOf(scene), "peak-on-body: at most 8 kN", "", 1)
	if regexp.MustCompile(`\d (kN|m)\b`).MatchString(text) {
		t.Error("metric figures in:\n" + text)
	}
}

// What has no figure says why.
func TestNoFigure(t *testing.T) {
	rigid := []byte(strings.Replace(string(mustRead(t, "path-absorber.toml")), "1.75 m", "0.2 m", 1))
	flat := mustTry(t, &siteJob{edge: "round", anchor: 0, behind: 1, ring: 1.5, length: 3, positions: []string{position("corner", 1, 0.5)}, rest: ropeAndAbsorber})
	for _, c := range []struct {
		sheet        *Sheet
		kind, reason string
	}{
		{sheet(t, "metric-basic.toml"), ElevationFigure, noLayoutDrawn},
		{sheet(t, "metric-basic.toml"), PlanFigure, noLayoutDrawn},
		{sheet(t, "metric-basic.toml"), ForceTimeFigure, noPathDrawn},
		{sheet(t, "load-trolley.toml"), ForceTravelFigure, noPathDrawn},
		{worked(t, "rigid.toml", rigid), ForceTimeFigure, noRestDrawn},
		{flat, ForceTravelFigure, noFallDrawn},
	} {
		scene, err := Figure(c.kind, c.sheet, BothUnits)
		var none *NoFigure
		if scene != nil || !errors.As(err, &none) || none.Reason != c.reason {
			t.Errorf("%s, %s: %v", c.sheet.File.Name, c.kind, err)
		}
	}
	defer func() {
		if recover() == nil {
			t.Error("a figure of no kind is drawn")
		}
	}()
	_, _ = Figure("portrait", flat, BothUnits)
}

// A drawn figure stands behind the report, in characters or fenced.
func TestDrawBehindTheReport(t *testing.T) {
	s := sheet(t, "path-absorber.toml")
	r := Build(s, BothUnits)
	n := len(r.Sections)
	if err := r.Draw(PlanFigure, s, BothUnits); err == nil || len(r.Sections) != n {
		t.Errorf("a plan without a layout: %v, %d sections", err, len(r.Sections))
	}
	if err := r.Draw(ForceTimeFigure, s, BothUnits); err != nil || len(r.Sections) != n+1 {
		t.Fatal(err, len(r.Sections))
	}
	if blocks := r.Sections[n].Blocks; r.Sections[n].Heading != drawnHeading || len(blocks) != 1 || blocks[0].Figure == nil {
		t.Errorf("%+v", r.Sections[n])
	}
}
