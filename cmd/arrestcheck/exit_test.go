package main

import (
	"context"
	"errors"
	"fmt"
	"io/fs"
	"testing"

	"arrestcheck/arrest/jobfile"
	"arrestcheck/limits"
)

// The order of the codes over several files is a promise of the help: 4, 3, 1,
// 2, 0.
func TestWorst(t *testing.T) {
	order := []exitCode{exitInterrupted, exitFile, exitRefused, exitExceeded, exitOtherwise, exitWithin}
	for i, a := range order {
		for j, b := range order {
			if got, want := worst(a, b), order[min(i, j)]; got != want {
				t.Errorf("worst(%d, %d) = %d, want %d", a, b, got, want)
			}
		}
	}
}

func TestCodeOfAssessment(t *testing.T) {
	groups := func(outcomes ...limits.Outcome) []limits.Group {
		var all []limits.Group
		for _, o := range outcomes {
			all = append(all, limits.Group{Outcome: o})
		}
		return all
	}
	left := []limits.Expected{{Subject: "mass"}}
	for _, c := range []struct {
		name string
		a    limits.Assessment
		want exitCode
	}{
		{"nothing compared", limits.Assessment{}, exitOtherwise},
		{"all within", limits.Assessment{Groups: groups(limits.Within, limits.Within)}, exitWithin},
		{"all within, one left out", limits.Assessment{Groups: groups(limits.Within), NotEntered: left}, exitOtherwise},
		{"one undecided", limits.Assessment{Groups: groups(limits.Within, limits.Undecided)}, exitOtherwise},
		{"one not compared", limits.Assessment{Groups: groups(limits.Within, limits.NotCompared)}, exitOtherwise},
		{"one exceeded", limits.Assessment{Groups: groups(limits.Undecided, limits.Exceeded, limits.Within), NotEntered: left}, exitExceeded},
	} {
		if got := codeOfAssessment(&c.a); got != c.want {
			t.Errorf("%s: %d, want %d", c.name, got, c.want)
		}
	}
}

func TestCodeOfError(t *testing.T) {
	refused := &jobfile.Faults{List: []jobfile.Fault{{Reason: "x"}}}
	unreadable := &jobfile.Faults{List: []jobfile.Fault{{Reason: "x"}, {Unreadable: true}}}
	usage, file := &usageError{reason: "x"}, &fileError{"read", "x", fs.ErrNotExist}
	for _, c := range []struct {
		err  error
		want exitCode
	}{
		{refused, exitRefused},
		{unreadable, exitFile},
		{usage, exitRefused},
		{file, exitFile},
		{&internalError{value: "x"}, exitFile},
		{errors.New("unforeseen"), exitFile},
		{fmt.Errorf("while: %w", usage), exitRefused},
		{context.Canceled, exitInterrupted},
		{errors.Join(refused, file), exitFile},
		{errors.Join(usage, refused), exitRefused},
		{errors.Join(errors.Join(usage), errors.Join(file, refused)), exitFile},
	} {
		if got := codeOfError(c.err); got != c.want {
			t.Errorf("%v: %d, want %d", c.err, got, c.want)
		}
	}
}
