package main

import (
	"bytes"
	"fmt"
	"math"
	"strconv"

	"arrestcheck/arrest"
	"arrestcheck/reportgen"
)

const seriesFlag = "series"

// seriesHeader names the columns with their units.
const seriesHeader = "t (s),F (N),v (m/s),x (m)\n"

// series writes the modelled arrest of a sheet as CSV, at the figures as
// written or, where some are ranges, at those of the greatest peak, and says
// which. Time counts from the end of the free fall, travel from the first pull
// downwards.
func series(s *reportgen.Sheet) (data []byte, remark string, err error) {
	run, at := seriesRun(s.Result)
	if run == nil && s.File.Job.Point.Path != nil {
		return nil, "", &usageError{fmt.Sprintf("--series: the body of %q swings, or does not fall at all: a series is that of a stop straight down", s.File.Name),
			"draw the force of a swing with --figure force-time=FILE, or leave --series out"}
	}
	if run == nil {
		return nil, "", &usageError{fmt.Sprintf("--series: %q has no connector path: nothing is worked out in time", s.File.Name),
			"describe the parts between anchor and body, [[connector]], or leave --series out"}
	}
	if rest := run.Run.RestTime; math.IsInf(run.Run.Peak, 0) || math.IsNaN(rest) || math.IsInf(rest, 0) {
		// Up to the blow the curve would look harmless.
		return nil, "", &usageError{fmt.Sprintf("--series: the model does not bring the body of %q to rest, or only by a blow on something rigid", s.File.Name),
			"change the path, or leave --series out"}
	}
	states, err := arrest.Series(&run.Case)
	if err != nil {
		return nil, "", fmt.Errorf("internal error: %w", err)
	}
	b := bytes.NewBufferString(seriesHeader)
	var row, last []byte
	for _, m := range states {
		row = row[:0]
		for _, x := range [...]float64{m.Time, m.F, m.V, m.X} {
			row = append(strconv.AppendFloat(row, x+0, 'g', 12, 64), ',') // + 0: no cell reads -0
		}
		row[len(row)-1] = '\n'
		if !bytes.Equal(row, last) { // one moment may end a stretch and begin the next
			b.Write(row)
			last = append(last[:0], row...)
		}
	}
	return b.Bytes(), "the series is worked out " + at, nil
}

// seriesRun returns the run at the figures as written, else that of the
// greatest peak, nil where there is no connector path.
func seriesRun(r *arrest.Result) (run *arrest.ModelRun, at string) {
	for i := range r.Runs {
		switch r.Runs[i].Corner {
		case arrest.AtWritten:
			return &r.Runs[i], "at the figures as written"
		case arrest.AtHigh:
			run, at = &r.Runs[i], "where the entries give the greatest peak: some are ranges and have no middle figure"
		}
	}
	return run, at
}
