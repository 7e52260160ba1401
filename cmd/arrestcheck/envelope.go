package main

import (
	"bytes"
	"context"
	"errors"
	"fmt"
	"strings"

	"github.com/spf13/cobra"

	"arrestcheck/arrest"
	"arrestcheck/arrest/quantity"
	"arrestcheck/arrest/study"
	"arrestcheck/limits"
	"arrestcheck/reportgen"
	"arrestcheck/reportgen/figure"
)

const envelopeLong = `Shows over which figures of two inputs each limit of a job is exceeded,
undecided or within as entered, if these two were measured so. The first --vary
runs across, the second up. A limit whose regions are not all alike gets a table
and a drawing.
`

// envelopeFlags are the flags of envelope that are not those of every study.
type envelopeFlags struct {
	studyFlags
	vary, limit []string
	steps       int
}

func newEnvelope(o *outcome, in surroundings) *cobra.Command {
	var flags envelopeFlags
	cmd := &cobra.Command{
		Use:   "envelope JOB --vary KEY=LOW..HIGH --vary KEY=LOW..HIGH [flags]",
		Short: "map where each limit is exceeded, over two inputs",
		Long:  envelopeLong,
		Example: `  arrestcheck envelope job.toml --vary 'stop.distance=0.2m..2m' \
      --vary 'fall.free_fall=0m..4m'
  arrestcheck envelope job.toml --vary 'stop.distance=0.2m..2m,log' \
      --vary 'worker.mass=60kg..140kg' --limit peak-on-body --figure e.svg`,
		DisableFlagsInUseLine: true,
		Args:                  exactly(1, "a job file, or - for standard input"),
		RunE: func(cmd *cobra.Command, names []string) error {
			return flags.run(cmd, names[0], o, in)
		},
	}
	flags.add(cmd, true)
	cmd.Flags().StringArrayVar(&flags.vary, varyFlag, nil, "move `KEY=LOW..HIGH`, ,log for even ratios; twice")
	cmd.Flags().StringArrayVar(&flags.limit, "limit", nil, "only this `LIMIT`, by id; may be repeated")
	cmd.Flags().IntVar(&flags.steps, "steps", study.DefaultSteps, "into how many parts each range is divided")
	return cmd
}

func (f *envelopeFlags) run(cmd *cobra.Command, name string, o *outcome, in surroundings) error {
	sheet, err := f.read(name, o, in)
	if err != nil {
		return err
	}
	layout, units, err := f.layout(sheet)
	if err != nil {
		return err
	}
	ctx, stop := showProgress(cmd.Context(), in, "envelope", 0)
	defer stop()
	envelope, err := f.envelop(ctx, sheet, layout, units)
	if err != nil {
		return err
	}
	return f.deliver(&studied{
		name:   "envelope",
		report: envelope.Report,
		csv:    func(b *bytes.Buffer) error { return envelope.CSV(b) },
		json:   func(b *bytes.Buffer) error { return envelope.JSON(b) },
		figure: func(u reportgen.UnitChoice) (*figure.Scene, error) { return oneRegion(envelope, u) },
	}, o, in)
}

func (f *envelopeFlags) envelop(ctx context.Context, s *reportgen.Sheet, l study.Layout, units [2]quantity.Unit) (*reportgen.Envelope, error) {
	found, err := study.Envelop(ctx, &s.File.Job, l)
	if err != nil {
		return nil, refusedStudy(err, quantity.Unit{})
	}
	return &reportgen.Envelope{Sheet: s, Found: found, Units: units, Log: [2]bool{l.Across.Logarithmic, l.Up.Logarithmic}}, nil
}

// oneRegion draws the one limit that comes to more than one zone.
func oneRegion(e *reportgen.Envelope, u reportgen.UnitChoice) (*figure.Scene, error) {
	changing := e.Changing()
	switch len(changing) {
	case 0:
		return nil, &usageError{"--figure: every limit comes to the same all over", "give wider ranges, or move other inputs"}
	case 1:
		return e.Figure(changing[0], u)
	}
	var ids []string
	for _, i := range changing {
		ids = append(ids, e.Found.Limits[i].ID)
	}
	return nil, &usageError{fmt.Sprintf("--figure: %d limits would need a figure each", len(ids)), "name one with --limit: " + strings.Join(ids, ", ")}
}

// layout reads both --vary and picks the limits.
func (f *envelopeFlags) layout(s *reportgen.Sheet) (l study.Layout, units [2]quantity.Unit, err error) {
	if len(f.vary) != 2 {
		return l, units, &usageError{fmt.Sprintf("envelope: %d --vary, and two are needed: across and up", len(f.vary)),
			"write: --vary 'stop.distance=0.2 m .. 2 m' --vary 'fall.free_fall=0 m .. 4 m'"}
	}
	var faults []error
	for i, text := range f.vary {
		r, unit, err := rangeFor(text, &s.File.Job)
		faults = append(faults, err)
		units[i] = unit
		if i == 0 {
			l.Across = r
		} else {
			l.Up = r
		}
	}
	named, err := limitsNamed(s, "limit", f.limit)
	if err := errors.Join(append(faults, err)...); err != nil {
		return l, units, err
	}
	if len(named) == 0 {
		return l, units, &usageError{"envelope: no limit is entered in this job", "add a limit file: --limits FILE"}
	}
	if f.steps < 2 || f.steps > study.MaxSteps {
		return l, units, &usageError{fmt.Sprintf("--steps %d", f.steps), fmt.Sprintf("give 2 to %d", study.MaxSteps)}
	}
	l.Sets, l.Steps, l.Workers = only(s.File.Sets, named), f.steps, workers()
	return l, units, nil
}

// rangeFor reads KEY=LOW..HIGH[,log].
func rangeFor(text string, j *arrest.Job) (study.Range, quantity.Unit, error) {
	v, err := parseVary(text, j)
	switch {
	case err != nil:
		return study.Range{}, v.unit, err
	case v.list != nil:
		err = &usageError{fmt.Sprintf("--vary %s: a range is needed, not a list", v.key), "write: --vary '" + v.key + "=LOW .. HIGH'"}
	case v.points != defaultPoints:
		err = &usageError{fmt.Sprintf("--vary %s: a number of figures says nothing here", v.key), "give the fineness of both ranges: --steps 512"}
	default:
		_, err = v.spread(2) // a range at all
	}
	return study.Range{Key: v.key, Low: v.low, High: v.high, Logarithmic: v.logarithmic}, v.unit, err
}

// only returns the sets with some limits left.
func only(sets []limits.Set, keep []*limits.Limit) []limits.Set {
	var left []limits.Set
	for i := range sets {
		set := sets[i]
		set.Limits = nil
		for k := range sets[i].Limits {
			for _, l := range keep {
				if l == &sets[i].Limits[k] {
					set.Limits = append(set.Limits, *l)
				}
			}
		}
		if len(set.Limits) > 0 {
			left = append(left, set)
		}
	}
	return left
}
