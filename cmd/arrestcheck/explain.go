package main

import (
	"bytes"
	"errors"
	"fmt"
	"slices"
	"strings"

	"arrestcheck/reportgen"
)

const explainFlag = "explain"

// explain writes what would settle the row of one limit, for each sheet. A
// sheet without the limit refuses the run.
func explain(sheets []reportgen.Sheet, limit string, flags *reportFlags, in surroundings) ([]byte, error) {
	var b bytes.Buffer
	var faults []error
	for i := range sheets {
		r, ok := reportgen.Explain(&sheets[i], limit, flags.unitChoice())
		if !ok {
			faults = append(faults, noSuchLimit(&sheets[i], limit))
			continue
		}
		if err := flags.write(&b, r, in); err != nil {
			return nil, err
		}
	}
	return b.Bytes(), errors.Join(faults...)
}

// noSuchLimit names the limits that there are.
func noSuchLimit(s *reportgen.Sheet, limit string) error {
	var ids []string
	for _, f := range s.Assessment.Findings {
		if !slices.Contains(ids, f.Limit.ID) {
			ids = append(ids, f.Limit.ID)
		}
	}
	slices.Sort(ids)
	hint := "this job has no limits"
	if len(ids) > 0 {
		hint = "its limits: " + strings.Join(ids, ", ")
		if near := nearest(limit, ids); near != "" {
			hint = "did you mean: --explain " + near
		}
	}
	return &usageError{fmt.Sprintf("--explain %q: %q has no limit of this name", limit, s.File.Name), hint}
}
