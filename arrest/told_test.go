package arrest

import (
	"slices"
	"testing"

	"arrestcheck/arrest/quantity"
)

// Each of these is told where there is reason to, and nowhere else.
func TestToldOnlyWithReason(t *testing.T) {
	plain := figures{mass: "100 kg ± 0 kg", fall: "1.8 m ± 0 m", distance: "1.07 m ± 0 m", time: "0.30 s ± 0 s"}
	change := func(f func(*figures)) *Job {
		c := plain
		f(&c)
		return c.job(t)
	}
	for _, c := range []struct {
		name string
		job  *Job
		want WarningID
	}{
		{"plain", plain.job(t), ""},
		{"one person", change(func(f *figures) { f.persons = 1 }), ""},
		{"two persons", change(func(f *figures) { f.persons = 2 }), SeveralPersons},
		{"speed at the start", change(func(f *figures) { f.fall, f.speed = "1.75 m ± 0 m", "1 m/s ± 0 m/s" }), RatingSpeedCounted},
		{"no speed at the start", change(func(f *figures) { f.speed = "0 m/s ± 0 m/s" }), ""},
		{"deep fall", change(func(f *figures) { f.fall, f.distance, f.time = "30 m ± 0 m", "4 m ± 0 m", "0.3 s ± 0 s" }), DragLeftOut},
		{"gravity", change(func(f *figures) { f.gravity = "9.80 m/s2" }), GravityStated},
		{"a range", change(func(f *figures) { f.mass = "95 kg .. 105 kg" }), NoMiddle},
		{"floor near the impossible", change(func(f *figures) { f.distance, f.time = "0.95 m ± 0 m", "0.151 s ± 0 s" }), FloorIllConditioned},
	} {
		res := Evaluate(c.job)
		for _, id := range []WarningID{SeveralPersons, RatingSpeedCounted, DragLeftOut, GravityStated, NoMiddle, FloorIllConditioned} {
			if hasWarning(&res, id) != (id == c.want) {
				t.Errorf("%s: %s told: %v", c.name, id, hasWarning(&res, id))
			}
		}
	}
}

// A contradiction names the document and the figures that stand against each
// other: of a floor its low end where the whole contradicts, its reach where a
// part does.
func TestFiguresOfAContradiction(t *testing.T) {
	peak := parse(t, quantity.Force, "3 kN")
	rating := Rating{Document: "label", TotalMass: parse(t, quantity.Mass, "59 kg .. 140 kg"), FreeFallAtMost: parse(t, quantity.Length, "2 m"), PeakForceAtMost: &peak}
	args := func(distance string, id WarningID) ([]Arg, *Estimate) {
		res := Evaluate(figures{mass: "100 kg", fall: "1.8 m", distance: distance, ratings: []Rating{rating}}.job(t))
		at := slices.IndexFunc(res.Warnings, func(w Warning) bool { return w.ID == id })
		if at < 0 {
			t.Fatalf("%s: %s is not told", distance, id)
		}
		return res.Warnings[at].Args, find(t, &res, PeakForce, Given)
	}
	whole, floor := args("0.5 m", EstimatesDisjoint)
	if whole[1].Text != "given" || whole[2].SI != floor.Low || whole[3].Text != "rated" || whole[4].SI != 3000 {
		t.Errorf("%+v", whole)
	}
	part, floor := args("0.8 m .. 1.2 m", CeilingBelowFloor)
	if part[0].Text != "label" || part[1].SI != 3000 || part[2].SI != floor.Reach {
		t.Errorf("%+v", part)
	}
}

// Which formulas a job is shown, and which it is spared.
func TestLinesOfTheWorking(t *testing.T) {
	fall := func(f figures) *Job {
		f.mass, f.fall = "100 kg", "1.8 m"
		return f.job(t)
	}
	loads, paths := loadJobs(t), pathJobs(t)
	const (
		tau, limit       = "tau = (2*d - v*t)/(v + g*t)", "d_limit = v*t + g*t^2/2"
		even, byTime     = "a = v^2/(2*d)", "a = v/t"
		equal            = "h_equal = h + u^2/(2*g)"
		elastic, rated   = "F_elastic = W + sqrt(W^2 + k_path*m*v^2)", "M_rope = U*(U - 2*W_0)/(2*W_0*f_0)"
		travel, sum      = "x_a = m*v^2/2/(F_a - W)", "m = m_worker + m_tools"
		plane3, plane2   = "F_stop_t = sqrt(F_x^2 + F_y^2 + F_z^2)", "F_stop_t = sqrt(F_x^2 + F_y^2)"
		ratioLoad        = "r_load = (v1 + v2)*t_load/(2*d_load)"
		slowD, slowT     = "a_mean = (v1^2 - v2^2)/(2*d_load)", "a_mean = J/(m*t_load)"
		maxFloor, dFloor = "F_floor = max(F_stop_d, F_stop_t)", "F_floor = F_stop_d"
	)
	all := []string{tau, limit, even, byTime, equal, elastic, rated, travel, sum, plane3, plane2, ratioLoad, slowD, slowT, maxFloor, dFloor}
	for _, c := range []struct {
		name string
		job  *Job
		want []string
	}{
		{"distance", fall(figures{distance: "1.07 m"}), []string{sum, even}},
		{"time", fall(figures{time: "0.3 s"}), []string{sum, byTime}},
		{"both, long time", fall(figures{distance: "0.80 m", time: "0.3 s"}), []string{sum, limit, even}},
		{"both, short time", fall(figures{distance: "1.07 m", time: "0.3 s"}), []string{sum, limit, tau}},
		{"speed", fall(figures{speed: "1 m/s", distance: "1.07 m"}), []string{sum, equal, even}},
		{"absorber", paths["absorber alone"], []string{sum, travel}},
		{"rope", paths["rope alone"], []string{sum, elastic}},
		{"rated rope", paths["rated rope"], []string{sum, rated, elastic}},
		{"rope and absorber", onPath(t, fall100(t), FromLabel, ropePart, absorber("4 kN", "1 m")), []string{sum}},
		{"bumper", loads["bumper"], []string{slowD, dFloor}},
		{"bumper, both routes", loads["both routes"], []string{ratioLoad, slowT, maxFloor}},
		{"plane", loads["plane"], []string{plane2, slowT}},
		{"space", loads["space"], []string{plane3, slowT}},
	} {
		res := Evaluate(c.job)
		ShowWorking(c.job, &res)
		for _, formula := range all {
			shown := slices.ContainsFunc(res.Working, func(w WorkingLine) bool { return w.Formula == formula })
			if shown != slices.Contains(c.want, formula) {
				t.Errorf("%s: %s is shown: %v", c.name, formula, shown)
			}
		}
	}
}

// A floor is rounded down all the way, but for what is no figure of force; means
// are rounded to the nearest. A job without bands is shown once, as written.
func TestRoundingOfTheWorking(t *testing.T) {
	j := figures{mass: "100 kg", fall: "1.8 m", distance: "1.07 m", time: "0.3 s"}.job(t)
	res := Evaluate(j)
	ShowWorking(j, &res)
	want := map[string]quantity.Rounding{"F_floor": quantity.Down, "a": quantity.Down, "n": quantity.Down,
		"tau": quantity.Nearest, "d_limit": quantity.Nearest, "F_d": quantity.Nearest, "F_t": quantity.Nearest}
	seen := map[string]bool{}
	for _, w := range res.Working {
		if round, is := want[w.Result.Symbol]; is && w.Rounding != round {
			t.Errorf("%s is rounded %v", w.Formula, w.Rounding)
		}
		if w.Corner != AtWritten {
			t.Errorf("%s is shown at the %s", w.Formula, w.Corner)
		}
		seen[w.Result.Symbol] = true
	}
	for symbol := range want {
		if !seen[symbol] {
			t.Errorf("no line for %s", symbol)
		}
	}
}

// The weight along the velocity slows a load that goes up and drives one that
// goes down; the figures put in for it must give the result that is printed.
func TestWeightAlongThePath(t *testing.T) {
	for _, up := range []float64{0.6, -0.6} {
		j := loadFigures{mass: "100 kg", before: []string{"2 m/s"}, after: []string{"1 m/s"}, distance: "0.5 m", driving: "50 N", up: [3]float64{up, 0, 0}}.job(t)
		res := Evaluate(j)
		ShowWorking(j, &res)
		at := slices.IndexFunc(res.Working, func(w WorkingLine) bool { return w.Result.Symbol == "F_stop_d" })
		w := res.Working[at]
		term := func(symbol string) float64 {
			return w.Terms[slices.IndexFunc(w.Terms, func(x Term) bool { return x.Symbol == symbol })].SI
		}
		near(t, "weight along the velocity", term("W_path"), -up*980.665, 1e-15)
		near(t, "force", w.Result.SI, -up*980.665+50+100*(4-1)/(2*0.5), 1e-14)
	}
}
