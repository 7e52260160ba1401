package reportgen

import (
	"bytes"
	"math"
	"regexp"
	"strings"
	"testing"

	"arrestcheck/arrest"
	"arrestcheck/arrest/quantity"
)

func projector(answers bool) *Lesson {
	return &Lesson{Mass: 100, FreeFall: 1.8, Gravity: arrest.StandardGravity, DRing: 1.5, Label: 1, Answers: answers, System: quantity.Metric,
		Stops: []LessonStop{{"short", 0.1}, {"label", 1}, {"long", 2}}}
}

// Each wrong sum is wrong by exactly the error that is stated beside it, worked
// out here from its own formula: W = 980.665 N, h = 1.8 m, d = 1 m.
func TestWrongSumsAreWrongByTheStatedError(t *testing.T) {
	l := newLesson(projector(true), BothUnits)
	const w, h, d, ring = 980.665, 1.8, 1.0, 1.5
	v := math.Sqrt(2 * 9.80665 * h)
	c := 2.0 / 3
	took := 2 * d / (c*v + math.Sqrt(c*c*v*v+4*(c-0.5)*9.80665*d)) // M-07, the rising ramp
	for _, s := range []struct {
		name              string
		got               wrongBeside
		wrong, right, off float64
	}{
		{"weight forgotten", l.forgotten(), w * h / d, w * (1 + h/d), w},
		{"mean read as peak", l.readAsPeak(), w + 100*v/took, 2 * (w + 100*v/took), w + 100*v/took},
		{"anchor at the feet", l.atFeet(), w * (1 + h/d), w * (1 + (h+ring)/d), w * ring / d},
		{"lb for lbf", l.pounds(), w * h / d * 9.80665 / 0.3048, w * h / d, w*h/d - w*h/d*9.80665/0.3048},
	} {
		for _, f := range [][2]float64{{s.got.wrong, s.wrong}, {s.got.right, s.right}, {s.got.off, s.off}, {s.got.right - s.got.wrong, s.got.off}} {
			if !quantity.Close(f[0], f[1], 1e-13) {
				t.Errorf("%s: %v, want %v", s.name, f[0], f[1])
			}
		}
	}
	// The same in US customary units from the start: 220.462 lb, ft/s, ft.
	lb, fps, ft := 100/0.45359237, v/0.3048, d/0.3048
	if got := lb * fps * fps / (2 * ft); !quantity.Close(got*4.4482216152605, l.pounds().wrong, 1e-13) {
		t.Errorf("lb*ft/s2 read as lbf: %v lbf, and the lesson has %v N", got, l.pounds().wrong)
	}
}

// screensOf lays a lesson out.
func screensOf(t testing.TB, l *Lesson, o TextOptions) [][]byte {
	t.Helper()
	r, err := l.Report(BothUnits)
	if err != nil {
		t.Fatal(err)
	}
	return Screens(r, o)
}

// A screen has at most 40 lines of 80 columns, says what it is, and its figures
// are those of the fall.
func TestLessonFitsAProjector(t *testing.T) {
	long := projector(true)
	long.Job, long.Example, long.InitialSpeed, long.Gravity = strings.Repeat("a long title ", 30), true, 2, 9.8
	long.Stops = []LessonStop{{"short", 0.1}, {"in the job", 0.95}, {"stop 3", 1.3}, {"long", 2}}
	for _, l := range []*Lesson{projector(true), projector(false), long} {
		for _, o := range []TextOptions{{}, {ASCII: true}} {
			for i, s := range screensOf(t, l, o) {
				lines := strings.Split(strings.TrimSuffix(string(s), "\n"), "\n")
				if len(lines) >= screenLines {
					t.Errorf("screen %d has %d lines", i+1, len(lines))
				}
				if !bytes.Contains(s, []byte(notAPermission)) {
					t.Errorf("screen %d does not say what it is not", i+1)
				}
				for _, line := range lines {
					if width(line) > pageWidth {
						t.Errorf("screen %d: %s", i+1, line)
					}
					if word := forbidden.FindString(line); word != "" {
						t.Errorf("screen %d: %q in %s", i+1, word, line)
					}
				}
			}
		}
	}
	first := string(screensOf(t, projector(true), TextOptions{})[0])
	mustHold(t, first, "S-76 This is a lesson.", "moving mass 100.0 kg (220.5 lb)", "free fall 1.800 m (5.906 ft)")
	var all strings.Builder
	for _, s := range screensOf(t, projector(true), TextOptions{}) {
		all.Write(s)
	}
	mustHold(t, all.String(), "= 18.63 kN (4189 lbf)", "= 2.746 kN (617.3 lbf)", "10.0 times the mean force",
		"Too low by 980.7 N (220.5 lbf), 35.7 % of the right sum: the body weight.",
		"Too low by 1.471 kN (330.7 lbf), 34.9 % of the right sum",
		"Too high by the factor 32.174: standard gravity in ft/s2.")
}

// Without answers no result is given away on its own screen.
func TestLessonQuestionsHaveBlanks(t *testing.T) {
	with, without := screensOf(t, projector(true), TextOptions{}), screensOf(t, projector(false), TextOptions{})
	if len(without) != len(with)-1 {
		t.Errorf("%d screens with answers, %d without: all but the drawing", len(with), len(without))
	}
	results := regexp.MustCompile(`18\.6|2\.746|2\.75 kN|1\.86|7\.1[12]|5\.38|3\.33|21\.4 km/h|8\.403|617\.3|396\.8|4\.217|1\.471|35\.7 %`)
	n := 0
	for i, s := range without {
		n += bytes.Count(s, []byte(emptyPlace))
		// What one screen asks for the next ones may use.
		if found := results.Find(s); found != nil {
			t.Errorf("screen %d gives %s away", i+1, found)
		}
	}
	if n < 40 {
		t.Errorf("only %d blanks", n)
	}
	for i, s := range with {
		if bytes.Contains(s, []byte(emptyPlace)) {
			t.Errorf("screen %d of the answers has a blank", i+1)
		}
	}
}

// The peaks of the shapes are those of the mechanics over the same distance.
func TestLessonPeaks(t *testing.T) {
	l := newLesson(projector(true), BothUnits)
	for i, s := range l.Stops {
		for _, shape := range lessonPulses {
			var p arrest.Point
			arrest.At(&arrest.Case{Mass: 100, FreeFall: 1.8, Gravity: arrest.StandardGravity, Distance: s.Distance, Pulse: shape}, &p)
			if got := l.pulse(shape, i); got.peak != p.Assumed.Peak || got.time != p.Assumed.Time {
				t.Errorf("%s over %v m: %v N in %v s, want %v and %v", shape, s.Distance, got.peak, got.time, p.Assumed.Peak, p.Assumed.Time)
			}
		}
	}
}

// A drawn pulse ends with the mean that its shape has, and at rest.
func TestLessonPulsesDrawn(t *testing.T) {
	l := newLesson(projector(true), BothUnits)
	for _, shape := range lessonPulses {
		p := l.pulse(shape, l.Label)
		const parts = 20000
		sum := 0.0
		for n := range parts {
			sum += p.force((float64(n)+0.5)/parts, l.at[l.Label].Weight)
		}
		if mean := sum / parts; !quantity.Close(mean, p.mean, 1e-6) {
			t.Errorf("%s: the drawn mean is %v, want %v", shape, mean, p.mean)
		}
	}
}
