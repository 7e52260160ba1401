package jobfile

import (
	"fmt"
	"math"

	"arrestcheck/arrest"
	"arrestcheck/arrest/quantity"
)

// workers reads the [worker], or the several [[worker]] of whom one at a time
// hangs on the system.
func (in *inputs) workers(j *arrest.Job, list []*table) {
	j.Persons = 1
	if len(list) == 1 {
		in.worker(j, list[0])
		return
	}
	in.persons = 1
	in.lightestToHeaviest(list)
}

// worker reads the one [worker], who may stand for several persons at once.
func (in *inputs) worker(j *arrest.Job, s *table) {
	if n := s.integer("persons"); n > 0 {
		j.Persons = n
	}
	in.persons = float64(j.Persons)
	mass, tools := s.masses()
	in.add("worker.mass", arrest.OfWorker, mass, setMass)
	in.add("worker.tools", arrest.OfWorker, tools, setTools)
}

// masses reads the two masses of a worker, each with the worker's name.
func (s *table) masses() (mass, tools entry) {
	name := s.text("name")
	mass, tools = s.quantity("mass"), s.quantity("tools")
	for _, e := range []*entry{&mass, &tools} {
		switch {
		case name == "":
		case e.note == "":
			e.note = name
		default:
			e.note = name + ": " + e.note
		}
	}
	return mass, tools
}

// lightestToHeaviest reads several workers. The mechanics use one input made of
// theirs, the masses from the lightest worker to the heaviest.
func (in *inputs) lightestToHeaviest(list []*table) {
	var lightest, heaviest quantity.Band
	var sources []arrest.Source
	read := 0
	for i, s := range list {
		if n := s.integer("persons"); n > 1 {
			s.fault("persons", fmt.Sprint(n), "of several [[worker]] one at a time hangs on the system; persons who hang on it at once are one [worker]",
				"take out: "+s.key("persons")+or+"one [worker] with the masses of all of them together, and persons = "+fmt.Sprint(n))
		}
		mass, tools := s.masses()
		in.add(element("worker", i)+".mass", arrest.OfWorker, mass, nil)
		in.add(element("worker", i)+".tools", arrest.OfWorker, tools, nil)
		if !mass.given || !tools.given {
			continue
		}
		sources = append(sources, mass.src, tools.src)
		sum := quantity.Sum(mass.band, tools.band)
		if read == 0 || sum.Low < lightest.Low {
			lightest = sum
		}
		if read == 0 || sum.High > heaviest.High {
			heaviest = sum
		}
		read++
	}
	if read < len(list) {
		return
	}
	all := arrest.Input{Key: "workers.total_mass", Role: arrest.OfWorker, Derived: true, Source: common(sources),
		Band: spanOf(lightest, heaviest, fmt.Sprintf("lightest to heaviest of %d workers", read)), Note: "worked out from the workers",
		Set: func(c *arrest.Case, x float64) { c.Mass, c.Tools = x, 0 }}
	all.Set(in.point, all.Band.Low)
	in.inputs = append(in.inputs, all)
}

// spanOf returns the range from the low end of one band to the high end of
// another, in the unit of both where they have one.
func spanOf(low, high quantity.Band, text string) quantity.Band {
	b := quantity.Band{Low: low.Low, Value: math.NaN(), High: high.High, Tolerance: quantity.Range, Unit: quantity.Mass.SI(), Text: text}
	if low.Unit == high.Unit && low.Unit.Dimension != 0 {
		b.Unit = low.Unit
	}
	return b
}

// common returns the source of figures that were made into one: theirs where
// they agree, the plan that puts them together where each has another that
// settles a mass, and else none.
func common(sources []arrest.Source) arrest.Source {
	of := sources[0]
	for _, s := range sources {
		if s != arrest.FromMeasured && s != arrest.FromDrawing && s != arrest.FromPlan {
			return arrest.NoSource
		}
		if s != of {
			of = arrest.FromPlan
		}
	}
	return of
}
