package arrest

import (
	"math"
	"strings"
	"testing"

	"github.com/expr-lang/expr"
)

// Every explicit formula text is worked out by a general-purpose expression
// library from the very figures printed with it, and must give the result that
// the code gave.
func TestFormulaTexts(t *testing.T) {
	used := map[string]int{}
	jobs := loadJobs(t)
	for name, f := range workingJobs() {
		jobs[name] = f.job(t)
	}
	for name, j := range pathJobs(t) {
		jobs[name] = j
	}
	for name, j := range layoutJobs(t) {
		jobs[name] = j
	}
	for name, j := range jobs {
		res := Evaluate(j)
		ShowWorking(j, &res)
		if len(res.Working) == 0 {
			t.Errorf("%s: no working", name)
		}
		for _, w := range res.Working {
			used[w.Formula]++
			got := evaluateText(t, w)
			if math.Abs(got-w.Result.SI) > 1e-9*math.Abs(w.Result.SI) {
				t.Errorf("%s: %s = %.12g by the text, %.12g by the code, %v", name, w.Formula, got, w.Result.SI, w.Terms)
			}
		}
	}
	for _, m := range Methods() {
		for _, f := range m.Formulas {
			if used[f] == 0 {
				t.Errorf("%s: the formula %q is never worked out", m.ID, f)
			}
		}
	}
}

func evaluateText(t *testing.T, w WorkingLine) float64 {
	t.Helper()
	_, right, ok := strings.Cut(w.Formula, " = ")
	if !ok {
		t.Fatalf("%q has no result", w.Formula)
	}
	env := map[string]any{"pi": math.Pi, "sqrt": math.Sqrt, "atan2": math.Atan2, "abs": math.Abs, "asin": math.Asin, "sin": math.Sin, "cos": math.Cos}
	for _, term := range w.Terms {
		env[term.Symbol] = term.SI
	}
	// In the library a quotient of whole numbers is a float already.
	out, err := expr.Eval(right, env)
	if err != nil {
		t.Fatalf("%q: %v", w.Formula, err)
	}
	switch x := out.(type) {
	case float64:
		return x
	case int:
		return float64(x)
	}
	t.Fatalf("%q gives a %T", w.Formula, out)
	return 0
}

// workingJobs use every line of the working between them.
func workingJobs() map[string]figures {
	base := figures{mass: "92 kg ± 1 kg", tools: "0 kg .. 10 kg", fall: "1.6 m .. 1.8 m"}
	with := func(change func(*figures)) figures { f := base; change(&f); return f }
	jobs := map[string]figures{
		"distance": with(func(f *figures) { f.distance = "0.95 m .. 1.10 m" }),
		"time":     with(func(f *figures) { f.time = "0.34 s ± 10 %" }),
		"both":     with(func(f *figures) { f.distance, f.time = "0.95 m .. 1.10 m", "0.34 s ± 10 %" }),
		"short":    {mass: "100 kg", fall: "1.8 m", distance: "1.07 m", time: "0.30 s"},
		"long":     {mass: "100 kg", fall: "1.8 m", distance: "1.07 m", time: "0.60 s"},
		"speed":    with(func(f *figures) { f.speed, f.distance = "1 m/s", "1 m" }),
		"gravity":  with(func(f *figures) { f.gravity, f.distance = "9.80 m/s2", "1 m" }),
	}
	for _, p := range Pulses() {
		f := figures{mass: "100 kg", fall: "1.8 m", distance: "1.07 m ± 2 %", pulse: p.Pulse}
		if p.Pulse == RisePlateau {
			f.rise = "25 %"
		}
		jobs["shape by distance "+p.Name] = f
		f.distance, f.time = "", "0.3 s"
		jobs["shape by time "+p.Name] = f
	}
	return jobs
}

func TestMethodRecordsAreWhole(t *testing.T) {
	seen := map[string]bool{}
	for _, m := range Methods() {
		if m.ID == "" || m.Title == "" || m.Valid == "" || m.Errs == "" || m.Source == "" || seen[m.ID] {
			t.Errorf("the record %q is not whole or stands twice", m.ID)
		}
		seen[m.ID] = true
	}
	for i := range outputs {
		if o := outputs[i].method; o != Entered && !seen[o] {
			t.Errorf("output %s names the method %s, which has no record", outputs[i].quantity, o)
		}
	}
}
