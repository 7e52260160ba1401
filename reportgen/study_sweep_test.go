package reportgen

import (
	"bytes"
	"context"
	"encoding/json"
	"fmt"
	"math"
	"os"
	"path/filepath"
	"regexp"
	"strconv"
	"strings"
	"testing"

	"arrestcheck/arrest"
	"arrestcheck/arrest/quantity"
	"arrestcheck/arrest/study"
)

// atMostRule is a limit as a job file has it, checked.
func atMostRule(id string, q arrest.Quantity, bound string) string {
	return fmt.Sprintf("[[limit]]\nid = %q\nquantity = %q\nat_most = %q\nauthority = \"house rule\"\nedition = \"first\"\nkind = \"person\"\nchecked_on = \"5 May 2025\"\n", id, q, bound)
}

// stopOver is a settled stop over a distance.
func stopOver(distance string) string {
	return "[stop]\ndistance = { value = \"" + distance + "\", source = \"measured\" }\n"
}

// swept sweeps a job over one input, in even steps.
func sweptOver(t testing.TB, s *Sheet, key, unit string, low, high float64, n int, quantities ...arrest.Quantity) *Sweep {
	t.Helper()
	values, err := study.Linear(low, high, n)
	if err != nil {
		t.Fatal(err)
	}
	return sweptAlong(t, s, []study.Axis{{Key: key, Values: values}}, []string{unit}, quantities...)
}

func sweptAlong(t testing.TB, s *Sheet, axes []study.Axis, units []string, quantities ...arrest.Quantity) *Sweep {
	t.Helper()
	swept, err := study.Sweep(context.Background(), &s.File.Job, study.Plan{Axes: axes, Columns: study.Columns(&s.File.Job, quantities...), Sets: s.File.Sets})
	if err != nil {
		t.Fatal(err)
	}
	w := &Sweep{Sheet: s, Swept: swept, Smooth: swept}
	for _, u := range units {
		w.Units = append(w.Units, mustUnit(u))
	}
	return w
}

// written lays a report out, its blanks plain.
func written(t testing.TB, report func(UnitChoice) (Report, error)) string {
	t.Helper()
	r, err := report(BothUnits)
	if err != nil {
		t.Fatal(err)
	}
	var b bytes.Buffer
	if err := Text(&b, r, TextOptions{}); err != nil {
		t.Fatal(err)
	}
	for line := range strings.Lines(b.String()) {
		if n := width(strings.TrimRight(line, "\n")); n > pageWidth {
			t.Errorf("a line of %d: %s", n, line)
		}
		if word := forbidden.FindString(line); word != "" {
			t.Errorf("%q in: %s", word, line)
		}
	}
	return b.String()
}

// oneLine joins the lines of a text, so that a sentence can be found in it.
func oneLine(text string) string { return strings.Join(strings.Fields(text), " ") }

func mustHold(t *testing.T, text string, wanted ...string) {
	t.Helper()
	for _, w := range wanted {
		if !strings.Contains(oneLine(text), w) {
			t.Errorf("nowhere: %q", w)
		}
	}
}

// W*(1 + h/d) for 100 kg and 1.8 m: 18632.635 N at 0.1 m, 2745.862 N at 1 m, and
// 6 kN at d = 1.8 m/(6000/980.665 - 1) = 0.351679 m.
func TestSweepFigures(t *testing.T) {
	s := worked(t, "job.toml", []byte(pieces{rest: stopOver("1 m ± 0 m") + atMostRule("mean-6", arrest.MeanForceOverDistance, "6 kN")}.toml()))
	w := sweptOver(t, s, "stop.distance", "m", 0.1, 1, 10, arrest.MeanForceOverDistance)
	var b bytes.Buffer
	if err := w.JSON(&b); err != nil {
		t.Fatal(err)
	}
	var doc struct {
		Format string
		Series []struct{ Value []float64 }
		Cross  []struct {
			Limit, Lower string
			At, Figure   float64
			Outcome      string
		} `json:"crossings"`
	}
	if err := json.Unmarshal(b.Bytes(), &doc); err != nil {
		t.Fatal(err)
	}
	if doc.Format != SweepFormat || doc.Series[0].Value[0] != 18632.635 || doc.Series[0].Value[9] != 2745.862 {
		t.Errorf("%+v", doc)
	}
	if len(doc.Cross) != 1 || !quantity.Close(doc.Cross[0].At, 1.8/(6000/980.665-1), 1e-11) || doc.Cross[0].Figure != 6000 || doc.Cross[0].Outcome != "undecided" {
		t.Errorf("%+v", doc.Cross)
	}
	text := written(t, w.Report)
	mustHold(t, text,
		"a stop.distance 0.35168 m (1.1539 ft): mean force over the distance equals the limit mean-6 (at most 6 kN). For greater figures it is not beyond.",
		"With 0.35168 m typed in, a check says: undecided: open input stop.distance: no tolerance is written.",
		"S-70", "S-71", "S-74", "S-32")
	for _, absent := range []string{"S-72", "S-05"} {
		if strings.Contains(text, absent) {
			t.Errorf("%s is printed, and no floor is shown", absent)
		}
	}
	rows := regexp.MustCompile(`(?m)^(\w+) +(\S+) +(\S+) +(\S+) +(\S+)$`).FindAllStringSubmatch(text[strings.Index(text, "Point by point"):], -1)
	var got []string
	for _, r := range rows[:12] {
		got = append(got, strings.Join(r[1:], " "))
	}
	want := []string{"row m ft kN lbf", "1 0.100 0.328 18.6 4190", "2 0.200 0.656 9.81 2200", "3 0.300 0.984 6.86 1540", "a 0.35168 1.1539 6.00 1350", "4 0.400 1.31 5.39 1210"}
	if fmt.Sprint(got[:6]) != fmt.Sprint(want) {
		t.Errorf("rows\n%q, want\n%q", got[:6], want)
	}
}

// Every cell of the table is the figure of a single check, printed.
func TestSweepCellsAreSingleChecks(t *testing.T) {
	s := worked(t, "bands.toml", mustRead(t, "bands.toml"))
	w := sweptOver(t, s, "stop.time", "s", 0.2, 0.5, 7)
	at := sweeping{builder: newBuilder(s, BothUnits), w: w}
	for i := range w.Swept.Series {
		c := &w.Swept.Series[i]
		u := dimensionOf(c.Quantity).SI()
		for point := range w.Swept.Len() {
			res, _, can, err := study.Check(&s.File.Job, nil, w.Swept.At(point)...)
			if err != nil || !can {
				t.Fatal(err, can)
			}
			e := estimateIn(&res, &c.Column)
			low, high, round := e.Low, e.High, quantity.Nearest
			switch e.Bound {
			case arrest.AtLeast:
				high, round = e.Reach, quantity.Down
			case arrest.AtMost:
				low, round = e.High, quantity.Up
			}
			cell := breakable(at.cell(c, point, u))
			first, last, _ := strings.Cut(cell, " to ")
			if want := quantity.Number(low, u, 3, round); first != want {
				t.Errorf("%s at %d: %q, want %q first", c.Quantity, point, cell, want)
			}
			if want := quantity.Number(high, u, 3, quantity.Nearest); last != "" && last != want {
				t.Errorf("%s at %d: %q, want %q last", c.Quantity, point, cell, want)
			}
		}
	}
}

func estimateIn(res *arrest.Result, c *study.Column) *arrest.Estimate {
	for i := range res.Estimates {
		if e := &res.Estimates[i]; e.Quantity == c.Quantity && e.Evidence == c.Evidence && e.From == c.From {
			return e
		}
	}
	return &arrest.Estimate{}
}

// The floor over 0.3 s is least where d = v*t/2 = 0.8912568 m; the mean over the
// time is the same everywhere. A floor that equals a limit clears nothing.
func TestSweepTurnsAndFloors(t *testing.T) {
	s := worked(t, "job.toml", []byte(pieces{rest: stopIn("0.30 s ± 0 s") + atMostRule("peak-3.4", arrest.PeakForce, "3.4 kN") + atMostRule("peak-20", arrest.PeakForce, "20 kN")}.toml()))
	text := written(t, sweptOver(t, s, "stop.distance", "m", 0.2, 1.6, 8, arrest.PeakForce, arrest.MeanForceOverTime).Report)
	d := format(math.Sqrt(2*9.80665*1.8)*0.3/2, quantity.Length.SI(), 5, quantity.Nearest)
	mustHold(t, text,
		"stop.distance "+breakable(d)+" (2.9241 ft): peak force on the body is least between the ends",
		"peak force on the body: the floor does not reach the limit peak-20 (at most 20 kN) at any point, which clears nothing.",
		"- mean force over the time: 2.96 kN (666 lbf)", "S-72", "S-05")
}

// Where nothing can happen a point says so, and a figure that is nowhere known
// is a dash.
func TestSweepOfTheImpossible(t *testing.T) {
	s := worked(t, "job.toml", []byte(pieces{rest: stopIn("0.30 s ± 0 s")}.toml()))
	w := sweptOver(t, s, "stop.distance", "m", 1, 3, 3, arrest.MeanForceOverDistance)
	mustHold(t, written(t, w.Report), "2 2.00 6.56 1.86 419", "3 3.00 9.84 cannot be cannot be", cannotNote)
	var b bytes.Buffer
	if err := w.CSV(&b); err != nil {
		t.Fatal(err)
	}
	if want := "3,3,,no\n"; !strings.HasSuffix(b.String(), want) {
		t.Errorf("%q, want %q at its end", b.String(), want)
	}
}

// With two inputs each row names both, and both stand in the words of a mark.
func TestSweepOverTwo(t *testing.T) {
	s := worked(t, "job.toml", []byte(pieces{rest: stopOver("1 m ± 0 m") + atMostRule("mean-6", arrest.MeanForceOverDistance, "6 kN")}.toml()))
	falls := []float64{1, 1.8}
	distances, _ := study.Linear(0.1, 1, 4)
	w := sweptAlong(t, s, []study.Axis{{Key: "fall.free_fall", Values: falls}, {Key: "stop.distance", Values: distances}}, []string{"m", "m"}, arrest.MeanForceOverDistance)
	mustHold(t, written(t, w.Report), "fall.free_fall 1.00 m (3.28 ft), stop.distance 0.19538 m", "fall.free_fall 1.80 m (5.91 ft), stop.distance 0.35168 m",
		"5 1.80 5.91 0.100 0.328 18.6 4190", "Moved fall.free_fall: 1.00 m, 1.80 m; in the job: 1.8 m ± 0 m")
}

// The working of a row is that of the job with its figures typed in.
func TestSweepWorking(t *testing.T) {
	s := worked(t, "job.toml", []byte(pieces{rest: stopOver("1 m ± 0 m")}.toml()))
	w := sweptOver(t, s, "stop.distance", "m", 0.1, 1, 10, arrest.MeanForceOverDistance)
	w.Working = 1
	mustHold(t, written(t, w.Report), "Working of row 1", "F_d = (980.67 N) + (100.00 kg)*(5.9417 m/s)^2/(2*(0.10000 m)) F_d = 18633 N = 4188.8 lbf")
}

// Cells of CSV cannot be taken for formulas, and figures keep 12 digits.
func TestCSVCells(t *testing.T) {
	var b bytes.Buffer
	c := newCSV(&b)
	for _, s := range []string{"=1+1", "+1", "-1", "@x", "\t=1", "\rx", " =1", "plain", `say "so", twice`, "a\nb", "", "é"} {
		c.text(s)
	}
	c.end()
	for _, x := range []float64{1.0 / 3, -2, math.Copysign(0, -1), math.Inf(1), nan, 1e-7, 123456789012345} {
		c.figure(x)
	}
	c.end()
	if err := c.out.Flush(); err != nil {
		t.Fatal(err)
	}
	want := `'=1+1,'+1,'-1,'@x,' =1,' x,' =1,plain,"say ""so"", twice",a b,,é` + "\n" + "0.333333333333,-2,0,,,1e-07,1.23456789012e+14\n"
	if b.String() != want {
		t.Errorf("%q, want\n%q", b.String(), want)
	}
}

// The header names each column with its unit, and a row has a cell for each.
func TestSweepCSV(t *testing.T) {
	s := worked(t, "bands.toml", mustRead(t, "bands.toml"))
	w := sweptOver(t, s, "stop.time", "s", 0.2, 0.5, 5)
	var b bytes.Buffer
	if err := w.CSV(&b); err != nil {
		t.Fatal(err)
	}
	lines := strings.Split(strings.TrimSuffix(b.String(), "\n"), "\n")
	if len(lines) != 6 || !strings.HasPrefix(lines[0], "point,stop.time (s),peak_force given low (N),peak_force given reach (N),") {
		t.Fatalf("%d lines, the first %q", len(lines), lines[0])
	}
	for i, l := range lines {
		if n := strings.Count(l, ","); n != strings.Count(lines[0], ",") {
			t.Errorf("line %d has %d cells, the first %d", i, n+1, strings.Count(lines[0], ",")+1)
		}
	}
	if first := strings.Split(lines[1], ","); first[2] != strconv.FormatFloat(w.Swept.Series[0].Low[0], 'g', 12, 64) {
		t.Errorf("%s is not the figure of the sweep", first[2])
	}
}

// The drawing has the limits on what it shows, the marks and the point of the
// job.
func TestSweepFigure(t *testing.T) {
	s := worked(t, "job.toml", []byte(pieces{rest: stopOver("1.07 m ± 0 m") + atMostRule("mean-6", arrest.MeanForceOverDistance, "6 kN") + atMostRule("fall-2", arrest.FreeFall, "2 m")}.toml()))
	scenes, err := sweptOver(t, s, "stop.distance", "m", 0.1, 2, 20, arrest.MeanForceOverDistance, arrest.FreeFall).Figures(BothUnits)
	if err != nil || len(scenes) != 1 {
		t.Fatal(len(scenes), err)
	}
	var texts []string
	for _, l := range scenes[0].Boxes() {
		texts = append(texts, breakable(l.Text))
	}
	all := strings.Join(texts, "\n")
	for _, want := range []string{"mean-6: at most 6 kN", "a: 0.35168 m", "this job: 1.07 m, 2.63 kN", notAPermission, meanNote[aPerson]} {
		if !strings.Contains(all, want) {
			t.Errorf("the drawing lacks %q:\n%s", want, all)
		}
	}
	if strings.Contains(all, "fall-2") {
		t.Error("a limit on what does not move is drawn")
	}
}

func mustRead(t testing.TB, name string) []byte {
	t.Helper()
	data, err := os.ReadFile(filepath.Join(jobsFolder, name))
	if err != nil {
		t.Fatal(err)
	}
	return data
}

// A modelled figure is compared with the allowance of 25 %: where it equals 8 kN
// the column and the drawing have 6.4 kN.
func TestSweepWithAnAllowance(t *testing.T) {
	s := sheet(t, "path-rope-absorber-45.toml")
	w := sweptOver(t, s, "fall.free_fall", "m", 1, 4, 7, arrest.PeakForce)
	mustHold(t, written(t, w.Report), "peak force on the body, by the model (at its greatest over the entries), with the allowance of 25 % equals the limit peak-on-body",
		"a 2.9947 9.8254 6.40 1440", bareNote)
	scenes, err := w.Figures(BothUnits)
	if err != nil || len(scenes) != 1 {
		t.Fatal(len(scenes), err)
	}
	at := sweeping{builder: newBuilder(s, BothUnits), w: w}
	at.places()
	if got := at.marks[0].y; !quantity.Close(got, 6400, 1e-9) {
		t.Errorf("the mark is drawn at %v N", got)
	}
}
