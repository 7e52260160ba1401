package connector

import (
	"flag"
	"math"
	"testing"

	"pgregory.net/rapid"
)

// Twenty times as many draws as rapid takes by itself.
func init() { flag.Set("rapid.checks", "2000") }

// gauss are points and weights of Gauss and Legendre with eight points on
// (-1, 1), positive half.
var gauss = [4][2]float64{
	{0.1834346424956498, 0.3626837833783620}, {0.5255324099163290, 0.3137066458778873},
	{0.7966664774136267, 0.2223810344533745}, {0.9602898564975363, 0.1012285362903763},
}

// quadrature returns impulse and work of the force on the body over a piece, by
// sums over its states: nothing of the closed forms of the ledger is in it.
func quadrature(p *piece, g float64) (impulse, work float64) {
	if p.free {
		return 0, 0
	}
	n := 1 + math.Ceil(p.last*(p.arc.sigma+math.Sqrt(p.arc.w2)+p.arc.root)*2)
	h := p.last / n
	for i := 0.0; i < n; i++ {
		for _, q := range gauss {
			for _, sign := range [...]float64{-1, 1} {
				s := p.at((i+0.5+sign*q[0]/2)*h, g)
				impulse += q[1] * h / 2 * s.F
				work += q[1] * h / 2 * s.F * s.V
			}
		}
	}
	return impulse, work
}

// TestLedgers: momentum and energy close in every run, and the impulse and the
// work in them are those of the force over the time and over the way.
func TestLedgers(t *testing.T) {
	most := 0.0
	rapid.Check(t, func(t *rapid.T) {
		d, p := drawn(t)
		f := d.fall()
		var r Result
		var pieces []piece
		if err := run(p, &f, &r, &pieces); err != nil {
			t.Fatal(err)
		}
		if open := r.Ledger.open(); open > 1e-11 {
			t.Fatalf("the ledger is open by %g: %+v", open, r.Ledger)
		}
		impulse, work := 0.0, 0.0
		for i := range pieces {
			j, w := quadrature(&pieces[i], f.Gravity)
			impulse += j
			work += w
		}
		if off := math.Abs(impulse - r.Ledger.Impulse); off > 1e-9*(1+r.Ledger.Impulse) {
			t.Fatalf("impulse %v, summed %v", r.Ledger.Impulse, impulse)
		}
		if off := math.Abs(work - r.Ledger.Work - r.Ledger.Viscous); off > 1e-9*(1+r.Ledger.Turned+r.Ledger.Viscous) {
			t.Fatalf("work %v and %v, summed %v", r.Ledger.Work, r.Ledger.Viscous, work)
		}
		most = max(most, r.Ledger.open())
	})
	t.Logf("ledgers are open by %.1e of what was turned over, at most", most)
}

// TestMeans: impulse over time and work over distance of a plain arrest.
func TestMeans(t *testing.T) {
	r := one(t, fall18, rope225)
	w, v := 980.665, fall18.speed()
	if want := w + 100*v/r.StoppingTime; !closeTo(r.MeanOverTime, want, 1e-12) {
		t.Errorf("mean over time %v, want %v", r.MeanOverTime, want)
	}
	if want := w + 100*v*v/2/r.StoppingDistance; !closeTo(r.MeanOverDistance, want, 1e-12) {
		t.Errorf("mean over distance %v, want %v", r.MeanOverDistance, want)
	}
	if want := r.Peak / (r.PeakTime - r.FirstPull); r.Onset != want || r.AnchorForce != r.Peak {
		t.Errorf("onset %v, want %v; anchor force %v", r.Onset, want, r.AnchorForce)
	}
}

// TestLedgerRefuses plants a fault in each account.
func TestLedgerRefuses(t *testing.T) {
	r := one(t, fall18, rope225)
	for name, plant := range map[string]func(l *Ledger){
		"impulse": func(l *Ledger) { l.Impulse *= 1 + 1e-8 },
		"motion":  func(l *Ledger) { l.Motion *= 1 + 1e-8 },
		"after":   func(l *Ledger) { l.After += 1e-4 },
		"viscous": func(l *Ledger) { l.Viscous += 1e-4 },
		"stored":  func(l *Ledger) { l.Stored *= 1 + 1e-8 },
		"NaN":     func(l *Ledger) { l.Work = math.NaN() },
	} {
		l := r.Ledger
		if err := l.settle(closes, 0); err != nil {
			t.Fatalf("without a fault: %v", err)
		}
		plant(&l)
		if err := l.settle(closes, 0); err != ErrLedger {
			t.Errorf("fault in %s: %v", name, err)
		}
	}
}
