package arrest

import (
	"math"
	"slices"
	"testing"

	"arrestcheck/arrest/connector"
	"arrestcheck/arrest/quantity"
)

// Of 0.8 of a travel an allowance of 25 % makes all of it and no more: 1.25*0.8
// = 1 in exact figures.
func TestEdgeOfATravelWithinTheAllowance(t *testing.T) {
	j := withAllowance(t, onPath(t, fall100(t), FromLabel, absorber("4 kN", "1.75 m")), "25 %")
	for used, want := range map[float64]bool{0.8: false, math.Nextafter(0.8, 1): true} {
		ev := evaluation{job: j, spans: &spans{path: pathNotes{used: used}}}
		if ev.exhaustedInAllowance() != want {
			t.Errorf("%.17g of the travel: used up %v", used, !want)
		}
	}
}

// Residuals are told as shares without a sign: 1 of 200 N*s, and 3 J of the
// 1000 J before and the 500 J that the fall added.
func TestSharesOfTheLedgers(t *testing.T) {
	for _, sign := range []float64{1, -1} {
		ev := evaluation{job: pathJobs(t)["rope alone"], spans: &spans{}}
		ev.res.Runs = []ModelRun{{Run: connector.Result{Ledger: connector.Ledger{
			Impulse: -sign * 200, MomentumLeft: sign * 1, Before: 1000, Fallen: sign * 500, EnergyLeft: -sign * 3}}}}
		ev.warnPath()
		at := slices.IndexFunc(ev.res.Warnings, func(w Warning) bool { return w.ID == LedgersClose })
		if at < 0 {
			t.Fatal("nothing told of the ledgers")
		}
		if args := ev.res.Warnings[at].Args; args[0].SI != 0.005 || args[1].SI != 0.002 {
			t.Errorf("shares %v", args)
		}
	}
}

// An absorber of 4 kN alone comes to a peak of 4 kN, in exact figures: a
// document that promises as much is not contradicted, one that promises less is.
func TestEdgeOfADocumentAgainstTheModel(t *testing.T) {
	for promise, told := range map[string]bool{"4 kN": false, "3.999999 kN": true} {
		peak := parse(t, quantity.Force, promise)
		j := pathJobs(t)["absorber alone"]
		j.Ratings = []Rating{{Document: "label", TotalMass: parse(t, quantity.Mass, "59 kg .. 140 kg"), FreeFallAtMost: parse(t, quantity.Length, "2 m"), PeakForceAtMost: &peak}}
		res := Evaluate(j)
		if hasWarning(&res, RatedAgainstModel) != told {
			t.Errorf("%s: told %v", promise, !told)
		}
	}
}
