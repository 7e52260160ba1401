package study_test

import (
	"context"
	"fmt"

	"arrestcheck/arrest"
	"arrestcheck/arrest/quantity"
	"arrestcheck/arrest/study"
	"arrestcheck/limits"
)

// input makes one input of a job; package jobfile does so for a file.
func input(j *arrest.Job, key string, role arrest.Role, d quantity.Dimension, text string, set func(*arrest.Case, float64)) {
	b, err := quantity.Parse(d, text)
	if err != nil {
		panic(err)
	}
	set(&j.Point, b.Value)
	j.Inputs = append(j.Inputs, arrest.Input{Key: key, Role: role, Band: b, Set: set})
}

// A job of 100 kg that falls 1.8 m.
func lampJob() *arrest.Job {
	j := &arrest.Job{Persons: 1, Point: arrest.Case{Gravity: arrest.StandardGravity}}
	input(j, "worker.mass", arrest.OfWorker, quantity.Mass, "100 kg", func(c *arrest.Case, x float64) { c.Mass = x })
	input(j, "fall.free_fall", arrest.OfFall, quantity.Length, "1.8 m", func(c *arrest.Case, x float64) { c.FreeFall = x })
	input(j, "stop.distance", arrest.OfStop, quantity.Length, "1 m", func(c *arrest.Case, x float64) { c.Distance = x })
	return j
}

// How distance buys force, and where a limit is met.
func ExampleSweep() {
	most, _ := quantity.Parse(quantity.Force, "6 kN")
	sets := []limits.Set{{Limits: []limits.Limit{{ID: "mean-on-body", Quantity: arrest.MeanForceOverDistance, Sense: limits.AtMost, Bound: most}}}}
	distances, _ := study.Linear(0.1, 1, 4)
	s, err := study.Sweep(context.Background(), lampJob(), study.Plan{
		Axes:    []study.Axis{{Key: "stop.distance", Values: distances}},
		Columns: []study.Column{{Quantity: arrest.MeanForceOverDistance, Evidence: arrest.Given}},
		Sets:    sets,
	})
	if err != nil {
		fmt.Println(err)
		return
	}
	newton, meter := quantity.Force.SI(), quantity.Length.SI()
	for i, f := range s.Series[0].Value {
		fmt.Println(quantity.Format(distances[i], meter, 3, quantity.Nearest), quantity.Format(f, newton, 5, quantity.Nearest))
	}
	c := s.Crossings[0]
	fmt.Println(c.Limit.ID, "at", quantity.Format(c.X, meter, 5, c.Lower))
	// Output:
	// 0.100 m 18633 N
	// 0.400 m 5393.7 N
	// 0.700 m 3502.4 N
	// 1.00 m 2745.9 N
	// mean-on-body at 0.35168 m
}

// Which free fall gives a mean of 4 kN over 1 m.
func ExampleSolve() {
	a, err := study.Solve(lampJob(), study.Question{Find: "fall.free_fall", Low: 0, High: 6,
		Goals: []study.Goal{{Of: arrest.MeanForceOverDistance, Target: 4000}}})
	if err != nil {
		fmt.Println(err)
		return
	}
	s := a.Goals[0].Solutions[0]
	meter := quantity.Length.SI()
	fmt.Println(quantity.Format(s.X, meter, 3, s.Lower), quantity.Format(s.X, meter, 5, s.Lower))
	// Output: 3.07 m 3.0788 m
}
