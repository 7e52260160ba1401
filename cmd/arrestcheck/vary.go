package main

import (
	"errors"
	"fmt"
	"slices"
	"strconv"
	"strings"

	"arrestcheck/arrest"
	"arrestcheck/arrest/quantity"
	"arrestcheck/arrest/study"
)

const varyFlag = "vary"

// defaultPoints is over how many figures a range is moved where the command
// line says nothing.
const defaultPoints = 20

// A varied input is moved over the figures of a list or of a range.
type varied struct {
	key         string
	unit        quantity.Unit // of the first figure as typed
	list        []float64     // SI; nil for a range
	low, high   float64       // SI, of a range
	logarithmic bool
	points      int
}

const varyHint = "write: --vary 'stop.distance=0.1 m .. 2 m', also with ,log and ,40 behind it; or --vary 'stop.distance=0.1 m, 0.2 m, 1 m'"

// parseVary reads KEY=LOW..HIGH[,log][,N] or KEY=FIGURE,FIGURE...
func parseVary(text string, j *arrest.Job) (varied, error) {
	key, value, found := strings.Cut(text, "=")
	v := varied{key: strings.TrimSpace(key), points: defaultPoints}
	if !found || v.key == "" || strings.TrimSpace(value) == "" {
		return v, &usageError{fmt.Sprintf("--vary %q is not KEY=FIGURES", text), varyHint}
	}
	in, err := movable(varyFlag, v.key, j)
	if err != nil {
		return v, err
	}
	parts := strings.Split(value, ",")
	if strings.Contains(parts[0], "..") {
		return v, v.rangeOf(parts, in.Band.Unit.Dimension)
	}
	return v, v.listOf(parts, in.Band.Unit.Dimension)
}

// movable returns the input that a flag names, if a study can move it.
func movable(flag, key string, j *arrest.Job) (*arrest.Input, error) {
	for i := range j.Inputs {
		if in := &j.Inputs[i]; in.Key == key && in.Set != nil {
			return in, nil
		}
	}
	keys := study.Movable(j)
	hint := "the job has: " + strings.Join(keys, ", ")
	if near := nearest(key, keys); near != "" {
		hint = "did you mean: --" + flag + " " + near + "; " + hint
	}
	return nil, &usageError{fmt.Sprintf("--%s: %q is no input of this job that can be moved", flag, key), hint}
}

// rangeOf reads "0.1 m .. 2 m", "log", "40".
func (v *varied) rangeOf(parts []string, d quantity.Dimension) error {
	b, err := figureOf(varyFlag+" "+v.key, d, parts[0])
	if err != nil {
		return err
	}
	v.unit, v.low, v.high = b.Unit, b.Low, b.High
	for _, word := range parts[1:] {
		word = strings.TrimSpace(word)
		n, err := strconv.Atoi(word)
		switch {
		case word == "log":
			v.logarithmic = true
		case err == nil:
			v.points = n
		default:
			return &usageError{fmt.Sprintf("--vary %s: %q is neither log nor a number of figures", v.key, word), varyHint}
		}
	}
	return nil
}

// listOf reads "0.1 m", "0.2 m" and puts the figures in order.
func (v *varied) listOf(parts []string, d quantity.Dimension) error {
	var faults []error
	for i, part := range parts {
		b, err := figureOf(varyFlag+" "+v.key, d, part)
		switch {
		case err != nil:
			faults = append(faults, err)
		case b.Low != b.High:
			faults = append(faults, &usageError{fmt.Sprintf("--vary %s: %q is no single figure", v.key, strings.TrimSpace(part)), varyHint})
		case i == 0:
			v.unit = b.Unit
		}
		v.list = append(v.list, b.Value)
	}
	if len(faults) > 0 {
		return errors.Join(faults...)
	}
	return v.inOrder(parts)
}

// inOrder sorts the list; a figure that stands twice is refused.
func (v *varied) inOrder(parts []string) error {
	seen := map[float64]string{}
	for i, x := range v.list {
		if before, twice := seen[x]; twice {
			return &usageError{fmt.Sprintf("--vary %s: %q and %q are one figure", v.key, before, strings.TrimSpace(parts[i])), "take out: one of the two"}
		}
		seen[x] = strings.TrimSpace(parts[i])
	}
	slices.Sort(v.list)
	return nil
}

// figureOf reads a figure of a flag as a file would have it.
func figureOf(flag string, d quantity.Dimension, text string) (quantity.Band, error) {
	b, err := quantity.Parse(d, strings.TrimSpace(text))
	if err == nil {
		return b, nil
	}
	var wrong *quantity.Error
	if errors.As(err, &wrong) {
		return b, &usageError{fmt.Sprintf("--%s: %v", flag, wrong), "write: " + wrong.Example}
	}
	return b, &usageError{reason: fmt.Sprintf("--%s: %v", flag, err)}
}

// axis returns the figures the input is moved to.
func (v *varied) axis() (study.Axis, error) {
	if v.list != nil {
		return study.Axis{Key: v.key, Values: v.list}, nil
	}
	return v.spread(v.points)
}

// spread returns n figures over the range or over that of the list.
func (v *varied) spread(n int) (study.Axis, error) {
	low, high := v.ends()
	values, err := study.Linear(low, high, n)
	if v.logarithmic {
		values, err = study.Logarithmic(low, high, n)
	}
	if err != nil {
		return study.Axis{}, v.refused(err)
	}
	return study.Axis{Key: v.key, Values: values}, nil
}

func (v *varied) ends() (low, high float64) {
	if v.list != nil {
		return v.list[0], v.list[len(v.list)-1]
	}
	return v.low, v.high
}

// refused puts the refusal of an axis in words.
func (v *varied) refused(err error) error {
	var r *study.Refusal
	if errors.As(err, &r) && r.Key == "" {
		with := *r
		with.Key = v.key
		return refusedStudy(&with, v.unit)
	}
	return refusedStudy(err, v.unit)
}
