package connector

import (
	"fmt"
	"testing"
)

// Run with
//
//	go test -bench . -count 10 ./arrest/connector
//
// All work on the five-part path of fiveParts: slack, webbing, plateau,
// bottoming with what stays, dashpot; 0.5 s. BareFloor is the least that a
// modelled peak could cost, one evaluation of M-10.

func fivePath(b *testing.B) (*Path, *Result) {
	b.Helper()
	var p Path
	if err := p.Set(fiveParts()...); err != nil {
		b.Fatal(err)
	}
	return &p, new(Result)
}

func BenchmarkExact(b *testing.B) {
	p, r := fivePath(b)
	b.ReportAllocs()
	for b.Loop() {
		if err := Run(p, &fiveFall, r); err != nil {
			b.Fatal(err)
		}
	}
}

func BenchmarkSetAndExact(b *testing.B) {
	p, r := fivePath(b)
	parts := fiveParts()
	b.ReportAllocs()
	for b.Loop() {
		if err := p.Set(parts...); err != nil {
			b.Fatal(err)
		}
		if err := Run(p, &fiveFall, r); err != nil {
			b.Fatal(err)
		}
	}
}

func BenchmarkDormandPrince(b *testing.B) {
	p, r := fivePath(b)
	b.ReportAllocs()
	for b.Loop() {
		if err := Integrate(p, &fiveFall, 1e-8, r); err != nil {
			b.Fatal(err)
		}
	}
}

func BenchmarkBareFloor(b *testing.B) {
	v := fiveFall.speed()
	for b.Loop() {
		sink = ElasticPeak(fiveFall.Mass, v, 9000, fiveFall.Gravity)
	}
}

var sink float64

func ExampleRun() {
	var path Path
	err := path.Set(
		FromModulus(Rope, 22500, 2.5),
		NewAbsorber(Plateau{Force: 4000, Travel: 0.40}),
	)
	if err != nil {
		fmt.Println(err)
		return
	}
	var r Result
	if err := Run(&path, &Fall{Mass: 100, FreeFall: 1.8, Gravity: StandardGravity}, &r); err != nil {
		fmt.Println(err)
		return
	}
	fmt.Printf("%v, peak %.1f N, stopping distance %.4f m\n", r.Status, r.Peak, r.StoppingDistance)
	fmt.Printf("part %d is used up with %.1f J left\n", r.FirstExhausted+1, r.EnergyLeft)
	// Output:
	// stopped, peak 4296.7 N, stopping distance 0.8774 m
	// part 2 is used up with 104.4 J left
}
