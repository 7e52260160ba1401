package connector

import (
	"bufio"
	"encoding/csv"
	"fmt"
	"io"
	"math"
	"os"
	"slices"
	"sort"
	"strconv"
	"strings"
	"testing"
)

// Validation: the methods against measurements. It is kept apart from the other
// tests, which ask whether the mathematics is right.

const validation = "../../testdata/validation/"

// readData returns the rows of a data file by column; its head is a comment.
func readData(t testing.TB, name string) []map[string]string {
	t.Helper()
	data, err := os.ReadFile(validation + name)
	if err != nil {
		t.Fatal(err)
	}
	r := csv.NewReader(strings.NewReader(string(data)))
	r.Comment = '#'
	head, err := r.Read()
	if err != nil {
		t.Fatal(err)
	}
	var rows []map[string]string
	for {
		fields, err := r.Read()
		if err == io.EOF {
			return rows
		}
		if err != nil {
			t.Fatal(err)
		}
		row := map[string]string{}
		for i, f := range fields {
			row[head[i]] = f
		}
		rows = append(rows, row)
	}
}

func number(t testing.TB, text string) float64 {
	t.Helper()
	x, err := strconv.ParseFloat(text, 64)
	if err != nil {
		t.Fatal(err)
	}
	return x
}

// A drop is one measured drop test.
type drop struct {
	weight, factor, peak, modulus float64 // modulus NaN for a fall factor of zero
}

// A lanyard is one kind of lanyard with its drops.
type lanyard struct {
	Comparison
	drops  []drop
	errors []float64
	words  []string
}

// lanyards reads the drop tests and compares each with the others of its kind.
func lanyards(t testing.TB) []*lanyard {
	byKind := map[string]*lanyard{}
	var all []*lanyard
	for _, row := range readData(t, "drop-tests.csv") {
		kind, tears := row["lanyard_type"]+", "+row["material"], row["tear_webbing_absorber"] == "yes"
		if tears {
			kind += ", stitching tears"
		}
		l := byKind[kind]
		if l == nil {
			l = &lanyard{Comparison: Comparison{Kind: kind, Tears: tears}}
			byKind[kind], all = l, append(all, l)
		}
		d := drop{weight: number(t, row["mass_kg"]) * StandardGravity, factor: number(t, row["fall_factor"]),
			peak: number(t, row["measured_peak_N"]), modulus: math.NaN()}
		if d.factor > 0 {
			d.modulus = Modulus(Rating{ImpactForce: d.peak, Mass: d.weight / StandardGravity, FallFactor: d.factor, Gravity: StandardGravity})
			if own := number(t, row["own_implied_modulus_kN"]); math.Abs(d.modulus/1000-own) > 0.06 {
				t.Errorf("%s, test %s: modulus %.2f kN, the file says %.1f", kind, row["test_no"], d.modulus/1000, own)
			}
		}
		l.drops = append(l.drops, d)
	}
	for _, l := range all {
		l.compare()
	}
	sort.SliceStable(all, func(i, j int) bool { return all[i].errors[0] < all[j].errors[0] })
	return all
}

// compare predicts every drop from the others.
func (l *lanyard) compare() {
	l.Tests = len(l.drops)
	for i, d := range l.drops {
		var others []float64
		for j, o := range l.drops {
			if i != j && !math.IsNaN(o.modulus) {
				others = append(others, o.modulus)
			}
		}
		l.errors = append(l.errors, (ElasticPeakFromRest(d.weight, median(others), d.factor)-d.peak)/d.peak)
	}
	slices.Sort(l.errors)
	l.Low, l.High = l.errors[0], l.errors[len(l.errors)-1]
	l.trend()
}

// trend says what the modulus does with the fall factor. Repeated pairs differ
// by about 5 per cent; twice that is called stiffening.
func (l *lanyard) trend() {
	low, high := math.Inf(1), math.Inf(-1)
	for _, d := range l.drops {
		if !math.IsNaN(d.modulus) {
			low, high = min(low, d.factor), max(high, d.factor)
		}
	}
	mean := func(factor float64) float64 {
		sum, n := 0.0, 0.0
		for _, d := range l.drops {
			if d.factor == factor {
				sum, n = sum+d.modulus, n+1
			}
		}
		return sum / n
	}
	if low < high {
		l.words = append(l.words, fmt.Sprintf("implied modulus %.1f kN at fall factor %g, %.1f kN at %g", mean(low)/1e3, low, mean(high)/1e3, high))
	}
	l.Stiffens = !l.Tears && mean(high) > 1.1*mean(low)
	switch {
	case l.Tears:
		l.words = append(l.words, "not linear elastic")
	case l.Stiffens:
		l.words = append(l.words, "stiffens")
	}
}

func median(xs []float64) float64 {
	slices.Sort(xs)
	if n := len(xs); n%2 == 0 {
		return (xs[n/2-1] + xs[n/2]) / 2
	}
	return xs[len(xs)/2]
}

// ropeRatios returns stretch by M-11 over catalogue elongation, in order.
func ropeRatios(t testing.TB) []float64 {
	var ratios []float64
	for _, row := range readData(t, "ropes-en892.csv") {
		force := number(t, row["impact_force_kN"]) * 1000
		ratios = append(ratios, force/Modulus(SingleRope(force))/(number(t, row["dyn_elong_pct"])/100))
	}
	slices.Sort(ratios)
	return ratios
}

// ropeComparison returns the distribution of the ratios.
func ropeComparison(r []float64) RopeComparison {
	n := len(r)
	return RopeComparison{Ropes: n, Least: r[0], TwentiethBelow: r[n/20], QuarterBelow: r[n/4], Middle: r[n/2],
		QuarterAbove: r[n-1-n/4], TwentiethAbove: r[n-1-n/20], Most: r[n-1]}
}

// publishedTable writes the table of published.txt.
func publishedTable(all []*lanyard, c RopeComparison) string {
	var b strings.Builder
	b.WriteString(`Drop tests of lanyards, rigid mass, against M-10

The modulus of a test is the median of the implied moduli of the other tests of
its kind. Error: predicted less measured peak, over the measured one, in per
cent; furthest below the measurement first. Minus: the model is too low.

`)
	n := 0
	for _, l := range all {
		fmt.Fprintf(&b, "%s\n  n %d; error", l.Kind, l.Tests)
		for _, e := range l.errors {
			fmt.Fprintf(&b, " %+.1f", 100*e)
		}
		for _, w := range l.words {
			b.WriteString("\n  " + w)
		}
		b.WriteString("\n")
		n += l.Tests
	}
	fmt.Fprintf(&b, `tests: %d

Dynamic ropes, M-11 against the catalogue

Stretch at the rated impact force by the modulus of M-11 (80 kg, fall factor
1.77), over the dynamic elongation of the catalogue.

`, n)
	for _, line := range []struct {
		name string
		at   float64
	}{
		{"least", c.Least}, {"1 in 20 below", c.TwentiethBelow}, {"1 in 4 below", c.QuarterBelow}, {"middle", c.Middle},
		{"1 in 4 above", c.QuarterAbove}, {"1 in 20 above", c.TwentiethAbove}, {"greatest", c.Most},
	} {
		fmt.Fprintf(&b, "  %-14s %.3f\n", line.name, line.at)
	}
	fmt.Fprintf(&b, "ropes: %d\n", c.Ropes)
	return b.String()
}

// TestPublished works the comparison out and holds it against the table, which
// testdata/peer/published.py wrote.
func TestPublished(t *testing.T) {
	got := publishedTable(lanyards(t), ropeComparison(ropeRatios(t)))
	t.Log("\n" + got)
	want, err := os.ReadFile(validation + "published.txt")
	if err != nil {
		t.Fatal(err)
	}
	g, w := bufio.NewScanner(strings.NewReader(got)), bufio.NewScanner(strings.NewReader(string(want)))
	for line := 1; ; line++ {
		more, also := g.Scan(), w.Scan()
		if g.Text() != w.Text() || more != also {
			t.Fatalf("published.txt, line %d:\n got %q\nwant %q", line, g.Text(), w.Text())
		}
		if !more {
			return
		}
	}
}

// TestPublishedForm holds the exported figures against the data.
func TestPublishedForm(t *testing.T) {
	all := lanyards(t)
	if len(all) != len(Published) {
		t.Fatalf("%d kinds of lanyard, %d are exported", len(all), len(Published))
	}
	near := func(a, b float64) bool { return math.Abs(a-b) <= 0.0005 }
	n := 0
	for i, l := range all {
		p, c := Published[i], l.Comparison
		n += p.Tests
		if !near(p.Low, c.Low) || !near(p.High, c.High) {
			t.Errorf("%s: exported %v to %v, data %v to %v", c.Kind, p.Low, p.High, c.Low, c.High)
		}
		p.Low, p.High, c.Low, c.High = 0, 0, 0, 0
		if p != c {
			t.Errorf("exported %+v, data %+v", p, c)
		}
	}
	if n != 29 {
		t.Errorf("%d tests are exported, the file has 29", n)
	}
	c, p := ropeComparison(ropeRatios(t)), PublishedRopes
	for _, pair := range [][2]float64{{c.Least, p.Least}, {c.TwentiethBelow, p.TwentiethBelow}, {c.QuarterBelow, p.QuarterBelow},
		{c.Middle, p.Middle}, {c.QuarterAbove, p.QuarterAbove}, {c.TwentiethAbove, p.TwentiethAbove}, {c.Most, p.Most}, {float64(c.Ropes), float64(p.Ropes)}} {
		if !near(pair[0], pair[1]) {
			t.Errorf("exported ratio %v, data %v", pair[1], pair[0])
		}
	}
}
