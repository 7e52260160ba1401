package jobfile_test

import (
	"fmt"
	"math"
	"math/rand/v2"
	"strings"
	"testing"

	"arrestcheck/arrest/jobfile"
	"arrestcheck/arrest/quantity"
)

// Whatever figures the table lets through, the path can be worked out: no run
// fails on what a file says.
func TestPathsOfAllPossibleFigures(t *testing.T) {
	r := rand.New(rand.NewPCG(31, 32))
	read := 0
	for range 3000 {
		text := minimalJob
		text = strings.Replace(text, `"92 kg"`, anyFigure(r, "worker.mass"), 1)
		text = strings.Replace(text, `"1.5 m"`, anyFigure(r, "fall.free_fall"), 1)
		for range 1 + r.IntN(5) {
			text += anyPart(r)
		}
		f, err := jobfile.Read("job", []byte(text), nil)
		if err != nil {
			refusedWell(t, err) // the figures may contradict each other
			continue
		}
		read++
		canBeWorkedOut(t, &f.Job)
		if t.Failed() {
			t.Fatal(text)
		}
	}
	if read < 1500 {
		t.Errorf("only %d of 3000 jobs are read", read)
	}
}

// anyPart writes a part of any kind with any figures.
func anyPart(r *rand.Rand) string {
	variants := record("connector.part").Variants
	v := variants[r.IntN(len(variants))]
	if v.Word == "curve" {
		x, f := r.Float64(), 1e4*r.Float64()
		return fmt.Sprintf("[[connector]]\npart = \"curve\"\npoints = [[\"0 m\", \"0 N\"], [\"%.4f m\", \"%.2f N\"], [\"%.4f m\", \"%.2f N\"]]\n", x+0.001, f, 2*x+0.1, 2*f+1)
	}
	text := "[[connector]]\npart = \"" + v.Word + "\"\n"
	length := false
	for _, need := range v.Needs {
		name := need[r.IntN(len(need))]
		text += name + " = " + anyFigure(r, "connector."+name) + "\n"
		length = length || record("connector."+name).Beside.Name == "length"
	}
	if length {
		text += "length = " + anyFigure(r, "connector.length") + "\n"
	}
	if v.Word == "absorber" && r.IntN(3) == 0 {
		text += "activation_force = " + anyFigure(r, "connector.activation_force") + "\n"
		if r.IntN(2) == 0 {
			text += "activation_travel = " + anyFigure(r, "connector.activation_travel") + "\n"
		}
	}
	return text
}

// anyFigure writes a figure from anywhere within what the table holds possible,
// the small as often as the large.
func anyFigure(r *rand.Rand, path string) string {
	k := record(path)
	low, high := max(k.Possible.Low, 1e-4*k.Possible.High), k.Possible.High
	x := low * math.Pow(high/low, r.Float64())
	switch r.IntN(8) {
	case 0:
		x = k.Possible.Low
	case 1:
		x = high
	}
	if x == 0 && k.Sign == jobfile.Positive {
		x = low
	}
	text := quantity.Of(k.Dimension, x).Text
	if k.Dimension == quantity.Ratio {
		text = fmt.Sprintf("%.6f %%", 100*x)
	}
	return `"` + text + `"`
}
