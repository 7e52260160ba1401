package arrest

import (
	"math"
	"math/rand/v2"
	"testing"

	"arrestcheck/arrest/quantity"
)

// everySought asks for all that the closed forms of a fall give.
func everySought() []Sought {
	var list []Sought
	for i := range outputs {
		if outputs[i].rests&ofFall != 0 {
			list = append(list, Sought{Quantity: outputs[i].quantity, Evidence: outputs[i].evidence})
		}
	}
	return list
}

// applying leaves out what the job has no figures for.
func applying(j *Job, list []Sought) []Sought {
	var kept []Sought
	for _, s := range list {
		if s.Evidence != Shape || j.Point.Pulse != NoPulse && !(j.Point.Distance > 0 && j.Point.Time > 0) {
			kept = append(kept, s)
		}
	}
	return kept
}

// moveTo is the job with one input replaced by a single figure.
func moveTo(j *Job, k int, x float64) *Job {
	moved := *j
	moved.Inputs = append([]Input(nil), j.Inputs...)
	in := &moved.Inputs[k]
	in.Band = Single(in, x)
	in.Set(&moved.Point, x)
	return &moved
}

func sameFloat(a, b float64) bool { return a == b || math.IsNaN(a) && math.IsNaN(b) }

// same fails unless the ends are those of the estimate that Evaluate gives.
func same(t *testing.T, j *Job, want Sought, got Ends) {
	t.Helper()
	res := Evaluate(j)
	e := Estimate{Low: nan, Value: nan, High: nan, Reach: nan}
	if i := res.estimate(want.Quantity, want.Evidence); i >= 0 {
		e = res.Estimates[i]
	}
	if !sameFloat(got.Low, e.Low) || !sameFloat(got.Value, e.Value) || !sameFloat(got.High, e.High) || !sameFloat(got.Reach, e.Reach) {
		t.Fatalf("%s by %s: scanned %+v, evaluated %v %v %v reach %v at %+v",
			want.Quantity, want.Evidence, got, e.Low, e.Value, e.High, e.Reach, j.Point)
	}
}

// Random boxes, some of which cannot happen in part: every figure is that of
// Evaluate to the last bit.
func TestScanIsEvaluate(t *testing.T) {
	r := rand.New(rand.NewPCG(31, 32))
	var impossible, part int
	for n := range 1500 {
		j := randomBox(r)
		inUnits(j)
		switch n % 4 {
		case 0:
			drop(j, "stop.time")
		case 1:
			drop(j, "stop.distance")
		}
		if n%3 == 0 {
			j.Point.Pulse = Pulses()[n%5].Pulse
		}
		if n%7 == 0 {
			for i := range j.Inputs {
				b := &j.Inputs[i].Band
				b.Low, b.High = b.Value, b.Value
			}
		}
		k := r.IntN(len(j.Inputs))
		b := &j.Inputs[k].Band
		x := []float64{b.Low + r.Float64()*(b.High-b.Low)}
		if x[0] == 0 {
			continue
		}
		sought := applying(j, everySought())
		s, ok := NewScan(j, []int{k}, sought)
		if !ok {
			t.Fatalf("not scanned: %+v", j.Point)
		}
		to := make([]Ends, len(sought))
		moved := moveTo(j, k, x[0])
		if _, never := Impossible(moved); never == s.At(x, to) {
			t.Fatalf("impossible %v, but scanned", never)
		} else if never {
			impossible++
			continue
		}
		if math.IsInf(to[0].Reach, 1) {
			part++
		}
		for i := range sought {
			same(t, moved, sought[i], to[i])
		}
	}
	if impossible == 0 || part < 20 {
		t.Errorf("%d impossible and %d partly impossible boxes: not enough to try them", impossible, part)
	}
}

// inUnits gives the bands of a random box their dimensions.
func inUnits(j *Job) {
	for i := range j.Inputs {
		for _, s := range setters {
			if s.key == j.Inputs[i].Key {
				j.Inputs[i].Band.Unit = s.dim.SI()
			}
		}
	}
}

func drop(j *Job, key string) {
	for i := range j.Inputs {
		if j.Inputs[i].Key == key {
			j.Inputs[i].Set(&j.Point, 0)
			j.Inputs = append(j.Inputs[:i], j.Inputs[i+1:]...)
			return
		}
	}
}

func scanJob(t testing.TB) *Job {
	return figures{mass: "92 kg ± 1 kg", tools: "0 kg .. 10 kg", fall: "1.6 m .. 1.8 m", distance: "0.95 m .. 1.10 m", time: "0.34 s ± 10 %"}.job(t)
}

func TestScanOfAnyFunction(t *testing.T) {
	j := scanJob(t)
	s, _ := NewScan(j, []int{0}, []Sought{{Of: func(c *Case, p *Point) float64 { return p.TotalMass * c.FreeFall }}})
	to := make([]Ends, 1)
	s.At([]float64{90}, to)
	if to[0].Low != 90*1.6 || to[0].High != 100*1.8 || !math.IsNaN(to[0].Value) {
		t.Errorf("%+v", to[0])
	}
}

// Where a part of the entries cannot happen the ends of a function are still
// those of the corners. 90 kg and up to 10 kg of tools, 1.6 m to 1.8 m of fall.
func TestScanOfAFunctionWhereAPartCannotHappen(t *testing.T) {
	j := figures{mass: "92 kg ± 1 kg", tools: "0 kg .. 10 kg", fall: "1.6 m .. 1.8 m", distance: "0.5 m .. 2.2 m", time: "0.30 s .. 0.34 s"}.job(t)
	if _, part := overCorners(j); !part {
		t.Fatal("all of it can happen")
	}
	s, _ := NewScan(j, []int{0}, []Sought{{Of: func(c *Case, p *Point) float64 { return p.TotalMass * c.FreeFall }}, {Quantity: PeakForce, Evidence: Given}})
	to := make([]Ends, 2)
	if !s.At([]float64{90}, to) || to[0].Low != 90*1.6 || to[0].High != 100*1.8 || !math.IsInf(to[1].Reach, 1) {
		t.Errorf("%+v", to)
	}
}

// A range has no middle, wide or not, and neither has what rests on it; nor has
// what rests on masses of which one, that At does not read, is a range.
func TestScanOfRanges(t *testing.T) {
	sought := []Sought{{Quantity: PeakForce, Evidence: Given}, {Quantity: FallSpeed, Evidence: Given}, {Quantity: FallEnergy, Evidence: Given}, {Quantity: TotalMass, Evidence: Given}}
	several := figures{mass: "80 kg", fall: "1.8 m", distance: "1 m"}.job(t)
	several.Inputs = append(several.Inputs, Input{Key: "worker[2].mass", Role: OfWorker, Band: parse(t, quantity.Mass, "80 kg .. 90 kg")})
	for name, j := range map[string]*Job{
		"wide":    figures{mass: "80 kg", fall: "1.6 m .. 1.8 m", distance: "1 m"}.job(t),
		"no span": figures{mass: "80 kg", fall: "1.8 m .. 1.8 m", distance: "1 m"}.job(t),
		"masses":  several,
	} {
		const distance = 3
		s, ok := NewScan(j, []int{distance}, sought)
		if !ok || j.Inputs[distance].Key != "stop.distance" {
			t.Fatal(name)
		}
		to := make([]Ends, len(sought))
		for _, x := range []float64{0.5, 1.25} {
			s.At([]float64{x}, to)
			for i := range sought {
				same(t, moveTo(j, distance, x), sought[i], to[i])
			}
		}
		if !math.IsNaN(to[0].Value) && name != "masses" || !math.IsNaN(to[2].Value) {
			t.Errorf("%s: a middle of the peak %v, of the energy %v", name, to[0].Value, to[2].Value)
		}
	}
}

// The edge of the impossible is that of Impossible: with u = 1 m/s, g = 10 m/s2
// and t = 1 s a stop is shorter than 6 m, in exact figures.
func TestScanAtTheEdgeOfTheImpossible(t *testing.T) {
	j := figures{mass: "100 kg", fall: "0 m", speed: "1 m/s", distance: "5 m", time: "1 s", gravity: "10 m/s2"}.job(t)
	const distance = 4
	s, ok := NewScan(j, []int{distance}, []Sought{{Quantity: PeakForce, Evidence: Given}})
	if !ok || j.Inputs[distance].Key != "stop.distance" {
		t.Fatal("not scanned")
	}
	to := make([]Ends, 1)
	if !s.At([]float64{5.999}, to) || s.At([]float64{6}, to) {
		t.Error("5.999 m can happen, 6 m cannot")
	}
}

func TestScanRefusesWhatCornersCannotGive(t *testing.T) {
	j := scanJob(t)
	j.Point.Pulse = RisingRamp
	for _, s := range []Sought{{Quantity: PeakForce, Evidence: Shape}, {Quantity: PeakForce, Evidence: Rated}, {Quantity: StoppingDistance, Evidence: Given}} {
		if _, ok := NewScan(j, []int{0}, []Sought{s}); ok {
			t.Errorf("%s by %s is scanned", s.Quantity, s.Evidence)
		}
	}
}

func TestScanAllocatesNothing(t *testing.T) {
	sought := []Sought{{Quantity: PeakForce, Evidence: Given}, {Quantity: MeanForceOverDistance, Evidence: Given}}
	s, _ := NewScan(scanJob(t), []int{3}, sought)
	to, x := make([]Ends, len(sought)), []float64{1}
	if n := testing.AllocsPerRun(100, func() { s.At(x, to); x[0] += 1e-6 }); n != 0 {
		t.Errorf("%v allocations", n)
	}
}

// One point says it all of a connector path without bands; with bands its ends
// may lie between the corners, which a scan does not look for.
func TestScanOfAPath(t *testing.T) {
	sought := []Sought{{Quantity: PeakForce, Evidence: Modelled}, {Quantity: AbsorberTravel, Evidence: Modelled}, {Quantity: FallSpeed, Evidence: Given}}
	j := onPath(t, figures{mass: "100 kg", fall: "1.8 m"}.job(t), FromLabel, ropePart, absorber("4 kN", "0.45 m"))
	k := 2 // the free fall
	s, ok := NewScan(j, []int{k}, sought)
	if !ok {
		t.Fatal("not scanned")
	}
	to := make([]Ends, len(sought))
	for _, x := range []float64{0.5, 1.2, 2.5, 4} {
		s.At([]float64{x}, to)
		for i := range sought {
			same(t, moveTo(j, k, x), sought[i], to[i])
		}
	}
	j = onPath(t, figures{mass: "100 kg", fall: "1.8 m"}.job(t), FromLabel, ropePart, absorber("3 kN .. 8 kN", "0.45 m"))
	if _, ok := NewScan(j, []int{k}, sought); ok {
		t.Error("a path over bands is scanned")
	}
	if _, ok := NewScan(j, []int{k}, []Sought{{Of: func(c *Case, p *Point) float64 { return p.Speed }}}); !ok {
		t.Error("a function of the fall does not need the path")
	}
}

func TestScanSaysItsBounds(t *testing.T) {
	j := figures{mass: "100 kg", fall: "1.8 m", distance: "1 m"}.job(t)
	s, _ := NewScan(j, []int{3}, []Sought{{Quantity: PeakForce, Evidence: Given}, {Quantity: FallSpeed, Evidence: Given}})
	if s.Bound(0) != AtLeast || s.Bound(1) != Between || !s.Exact() {
		t.Errorf("%s, %s, exact %v", s.Bound(0), s.Bound(1), s.Exact())
	}
	if s, _ = NewScan(scanJob(t), []int{3}, nil); s.Exact() {
		t.Error("a job with bands is called exact")
	}
	if b := Single(&j.Inputs[3], 0.25); b.Text != "0.25 m" || b.Unit != quantity.Length.SI() {
		t.Errorf("%+v", b)
	}
}

// BenchmarkScan moves the distance of an exact job and of one with bands.
func BenchmarkScan(b *testing.B) {
	for name, j := range map[string]*Job{
		"exact": figures{mass: "100 kg", fall: "1.8 m", distance: "1 m"}.job(b),
		"bands": figures{mass: "92 kg ± 1 kg", tools: "0 kg .. 10 kg", fall: "1.6 m .. 1.8 m", distance: "1 m"}.job(b),
	} {
		b.Run(name, func(b *testing.B) {
			s, _ := NewScan(j, []int{3}, []Sought{{Quantity: MeanForceOverDistance, Evidence: Given}})
			to, x := make([]Ends, 1), []float64{1}
			b.ReportAllocs()
			for i := 0; b.Loop(); i++ {
				x[0] = 0.5 + float64(i&1023)/1024
				s.At(x, to)
				sink += to[0].High
			}
		})
	}
}
