package main

import (
	"bytes"
	"context"
	"errors"
	"fmt"
	"slices"
	"strings"

	"github.com/spf13/cobra"

	"arrestcheck/arrest"
	"arrestcheck/arrest/quantity"
	"arrestcheck/arrest/study"
	"arrestcheck/limits"
	"arrestcheck/reportgen"
	"arrestcheck/reportgen/figure"
)

const sweepLong = `Moves one or two inputs of a job over figures, and shows what comes of it: a
table, the places where a figure equals a limit or turns, and a drawing. Each
point is a check of the job with these figures typed in.

--vary KEY=LOW..HIGH takes 20 figures at even distances; ,log behind it takes
even ratios, ,40 another number. --vary KEY=FIGURE,FIGURE,... takes a list.
`

const (
	// mostRows bounds the table of a report; CSV and JSON have room for more.
	mostRows = 1000
	// drawnPoints is how finely a curve is drawn, whatever the table has;
	// dearPoints where each point is worked out in time.
	drawnPoints = 161
	dearPoints  = 41
)

// sweepFlags are the flags of sweep that are not those of every study.
type sweepFlags struct {
	studyFlags
	vary, show []string
	working    int
}

func newSweep(o *outcome, in surroundings) *cobra.Command {
	var flags sweepFlags
	cmd := &cobra.Command{
		Use:   "sweep JOB --vary KEY=FIGURES [flags]",
		Short: "move an input over a range, and see what comes of it",
		Long:  sweepLong,
		Example: `  arrestcheck sweep job.toml --vary 'stop.distance=0.1m..2m'
  arrestcheck sweep job.toml --vary 'stop.distance=0.1m..2m,log' --figure s.svg
  arrestcheck sweep job.toml --vary 'fall.free_fall=1 m, 1.8 m' --working 2
  arrestcheck sweep job.toml --vary 'stop.distance=0.1m..2m' --format csv`,
		DisableFlagsInUseLine: true,
		Args:                  exactly(1, "a job file, or - for standard input"),
		RunE: func(cmd *cobra.Command, names []string) error {
			return flags.run(cmd, names[0], o, in)
		},
	}
	flags.add(cmd, true)
	cmd.Flags().StringArrayVar(&flags.vary, varyFlag, nil, "move `KEY=FIGURES`; once or twice")
	cmd.Flags().StringSliceVar(&flags.show, "show", nil, "the `QUANTITIES` to show, by id")
	cmd.Flags().IntVar(&flags.working, "working", 0, "print the working of row `N` as well")
	return cmd
}

func (f *sweepFlags) run(cmd *cobra.Command, name string, o *outcome, in surroundings) error {
	sheet, err := f.read(name, o, in)
	if err != nil {
		return err
	}
	moved, err := f.varied(&sheet.File.Job)
	if err != nil {
		return err
	}
	columns, err := f.columns(sheet)
	if err != nil {
		return err
	}
	sweep, err := f.sweep(cmd.Context(), sheet, moved, columns, in)
	if err != nil {
		return err
	}
	return f.deliver(&studied{
		name:   "sweep",
		report: sweep.Report,
		csv:    func(b *bytes.Buffer) error { return sweep.CSV(b) },
		json:   func(b *bytes.Buffer) error { return sweep.JSON(b) },
		figure: func(u reportgen.UnitChoice) (*figure.Scene, error) { return oneScene(sweep, u) },
	}, o, in)
}

// oneScene returns the figure of a sweep, which must be one.
func oneScene(sweep *reportgen.Sweep, u reportgen.UnitChoice) (*figure.Scene, error) {
	scenes, err := sweep.Figures(u)
	switch {
	case err != nil:
		return nil, err
	case len(scenes) == 0:
		return nil, &usageError{"--figure: nothing that moves is shown", "name quantities with --show, and a range with --vary"}
	case len(scenes) > 1:
		return nil, &usageError{fmt.Sprintf("--figure: what is shown needs %d figures, one for each kind", len(scenes)),
			"name quantities of one kind, as --show peak_force,mean_force_over_distance"}
	}
	return scenes[0], nil
}

// varied reads all --vary.
func (f *sweepFlags) varied(j *arrest.Job) ([]varied, error) {
	if len(f.vary) == 0 {
		return nil, &usageError{"sweep: --vary is missing", varyHint}
	}
	var all []varied
	var faults []error
	for _, text := range f.vary {
		v, err := parseVary(text, j)
		all, faults = append(all, v), append(faults, err)
	}
	return all, errors.Join(faults...)
}

// columns are the estimates of the quantities that are shown: those that
// --show names, else those a limit bounds, with peaks and mean forces, and where
// the job gives none of these all that it gives.
func (f *sweepFlags) columns(s *reportgen.Sheet) ([]study.Column, error) {
	if len(f.show) == 0 {
		if columns := study.Columns(&s.File.Job, shownFirst(s.File.Sets)...); len(columns) > 0 {
			return columns, nil
		}
		return study.Columns(&s.File.Job), nil
	}
	var columns []study.Column
	var faults []error
	for _, name := range f.show {
		q, err := quantityNamed("show", strings.TrimSpace(name))
		faults = append(faults, err)
		if err != nil {
			continue
		}
		of := study.Columns(&s.File.Job, q)
		if len(of) == 0 {
			faults = append(faults, &usageError{fmt.Sprintf("--show: nothing entered in this job gives %s", q), "see the estimates of: " + programName + " check"})
		}
		columns = append(columns, of...)
	}
	return columns, errors.Join(faults...)
}

// shownFirst lists what a sweep shows where nothing is said.
func shownFirst(sets []limits.Set) []arrest.Quantity {
	shown := []arrest.Quantity{arrest.PeakForce, arrest.MeanForceOverDistance, arrest.MeanForceOverTime, arrest.StoppingForce}
	for i := range sets {
		for k := range sets[i].Limits {
			if q := sets[i].Limits[k].Quantity; !slices.Contains(shown, q) {
				shown = append(shown, q)
			}
		}
	}
	return shown
}

// sweep works the points of the table out, and those of the drawing where one
// is made.
func (f *sweepFlags) sweep(ctx context.Context, s *reportgen.Sheet, moved []varied, columns []study.Column, in surroundings) (*reportgen.Sweep, error) {
	plan := study.Plan{Columns: columns, Sets: s.File.Sets, Workers: workers()}
	var units []quantity.Unit
	points := 1
	for i := range moved {
		axis, err := moved[i].axis()
		if err != nil {
			return nil, err
		}
		plan.Axes = append(plan.Axes, axis)
		units = append(units, moved[i].unit)
		points *= len(axis.Values)
	}
	if err := f.room(points); err != nil {
		return nil, err
	}
	ctx, stop := showProgress(ctx, in, "sweep", points)
	defer stop()
	swept, err := study.Sweep(ctx, &s.File.Job, plan)
	if err != nil {
		return nil, refusedStudy(err, units[len(units)-1])
	}
	if f.working > swept.Len() || f.working < 0 {
		return nil, &usageError{fmt.Sprintf("--working %d: the table has %d rows", f.working, swept.Len()), "count them from 1"}
	}
	last := &moved[len(moved)-1]
	sweep := &reportgen.Sweep{Sheet: s, Swept: swept, Smooth: swept, Units: units, Log: last.logarithmic, Working: f.working}
	if f.draws() {
		sweep.Smooth, err = smooth(ctx, &s.File.Job, plan, last)
	}
	return sweep, err
}

// room refuses a table that nobody could read.
func (f *sweepFlags) room(points int) error {
	if points > mostRows && f.format.word != "csv" && f.format.word != "json" {
		return &usageError{fmt.Sprintf("a table of %d rows is too long to be read", points),
			fmt.Sprintf("ask for at most %d points, or add --format csv", mostRows)}
	}
	return nil
}

// draws reports whether a drawing is made.
func (f *sweepFlags) draws() bool {
	return f.destination(figureFlag) != nil || f.format.word == "text" || f.format.word == "markdown"
}

// smooth is the sweep of a drawing: the last axis finer, limits left aside.
func smooth(ctx context.Context, j *arrest.Job, plan study.Plan, last *varied) (*study.Swept, error) {
	n, points := len(plan.Axes)-1, drawnPoints
	if j.Point.Path != nil {
		points = dearPoints
	}
	plan.Sets = nil
	if have := len(plan.Axes[n].Values); have < 2 || have >= points {
		return study.Sweep(ctx, j, plan)
	}
	axis, err := last.spread(points)
	if err != nil {
		return nil, err
	}
	plan.Axes = append(slices.Clone(plan.Axes[:n]), axis)
	return study.Sweep(ctx, j, plan)
}
