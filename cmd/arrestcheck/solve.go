package main

import (
	"bytes"
	"errors"
	"fmt"
	"strings"

	"github.com/spf13/cobra"

	"arrestcheck/arrest"
	"arrestcheck/arrest/quantity"
	"arrestcheck/arrest/study"
	"arrestcheck/limits"
	"arrestcheck/reportgen"
)

const solveLong = `Looks for the figure of one input at which something equals a limit, or a figure
that --for names. All other inputs keep their bands; the least favourable of
what they allow is followed. The answer is printed on the side of the lower
demand, and stands beside what a check says with it typed in.

Without --limit and --for all limits of the job are followed, and those that
govern are named. --found goes backwards from an event: from the travel an
absorber was found torn by to the free fall behind it.
`

const holdsFlag = "deployment-force"

// solveFlags are the flags of solve that are not those of every study.
type solveFlags struct {
	studyFlags
	find, from, to string
	limit, target  []string
	end            choice
	found, holds   string
}

func newSolve(o *outcome, in surroundings) *cobra.Command {
	flags := solveFlags{end: choice{"", []string{"low", "high", "value"}}}
	cmd := &cobra.Command{
		Use:   "solve JOB --find KEY [flags]",
		Short: "find the figure of an input at which a limit is reached",
		Long:  solveLong,
		Example: `  arrestcheck solve job.toml --find fall.free_fall --limit peak-on-body
  arrestcheck solve job.toml --find fall.free_fall --from 0m --to 6m \
      --for mean_force_over_distance=4kN
  arrestcheck solve job.toml --find stop.distance
  arrestcheck solve path.toml --found absorber_travel=0.62m`,
		DisableFlagsInUseLine: true,
		Args:                  exactly(1, "a job file, or - for standard input"),
		RunE: func(cmd *cobra.Command, names []string) error {
			return flags.run(cmd, names[0], o, in)
		},
	}
	flags.add(cmd, false)
	f := cmd.Flags()
	f.StringVar(&flags.find, "find", "", "the input `KEY` to look for")
	f.StringVar(&flags.from, "from", "", "look from this `FIGURE`")
	f.StringVar(&flags.to, "to", "", "look up to this `FIGURE`")
	f.StringArrayVar(&flags.limit, "limit", nil, "the `LIMIT` to reach, by id; may be repeated")
	f.StringArrayVar(&flags.target, "for", nil, "`QUANTITY=FIGURE` to reach; may be repeated")
	f.Var(&flags.end, "end", "which end of a figure with a band")
	f.StringVar(&flags.found, "found", "", "absorber_travel=`FIGURE` found after an event")
	f.StringVar(&flags.holds, holdsFlag, "", "`FORCE` the absorber holds, for --found")
	return cmd
}

func (f *solveFlags) run(cmd *cobra.Command, name string, o *outcome, in surroundings) error {
	sheet, err := f.read(name, o, in)
	if err != nil {
		return err
	}
	_, stop := showProgress(cmd.Context(), in, "solve", 0)
	defer stop()
	answer, err := f.solve(sheet)
	if err != nil {
		return err
	}
	return f.deliver(&studied{
		report: answer.Report,
		csv:    func(b *bytes.Buffer) error { return answer.CSV(b) },
		json:   func(b *bytes.Buffer) error { return answer.JSON(b) },
	}, o, in)
}

// solve puts the question and answers it.
func (f *solveFlags) solve(s *reportgen.Sheet) (*reportgen.Solve, error) {
	j := &s.File.Job
	found, err := f.event(j)
	if err != nil {
		return nil, err
	}
	if f.find == "" && found != nil {
		f.find = "fall.free_fall"
	}
	if f.find == "" {
		return nil, &usageError{"solve: --find is missing", "the job has: " + strings.Join(study.Movable(j), ", ")}
	}
	in, err := movable("find", f.find, j)
	if err != nil {
		return nil, err
	}
	q := study.Question{Find: f.find}
	ranged, err := f.searched(j, in, &q)
	if err != nil {
		return nil, err
	}
	if found != nil {
		goals := study.TravelFound(found.Force, found.Travel)
		q.Goals = goals[:]
	} else if q.Goals, err = f.goals(s); err != nil {
		return nil, err
	}
	answer, err := study.Solve(j, q)
	if err != nil {
		return nil, refusedStudy(err, in.Band.Unit)
	}
	return &reportgen.Solve{Sheet: s, Answer: answer, Unit: in.Band.Unit, Ranged: ranged, Found: found}, nil
}

// tenTimes is how far from the entry a solution is looked for where nothing is
// said.
const tenTimes = 10

// searched sets the range that is looked over.
func (f *solveFlags) searched(j *arrest.Job, in *arrest.Input, q *study.Question) (ranged bool, err error) {
	q.Low, q.High = in.Band.Low/tenTimes, in.Band.High*tenTimes
	if _, err := study.Substitute(j, study.Move{Key: in.Key, To: 0}); err == nil && in.Band.Low >= 0 {
		q.Low = 0 // an input that can be nothing
	}
	if in.Band.Unit.Dimension == quantity.Ratio {
		q.High = min(q.High, 1)
	}
	var faults []error
	for _, end := range []struct {
		flag, text string
		to         *float64
	}{{"from", f.from, &q.Low}, {"to", f.to, &q.High}} {
		if end.text == "" {
			continue
		}
		b, err := single(end.flag, in.Band.Unit.Dimension, end.text)
		faults = append(faults, err)
		*end.to = b.Value
	}
	if err := errors.Join(faults...); err != nil {
		return false, err
	}
	if !(q.Low < q.High) {
		return false, &usageError{fmt.Sprintf("solve: nothing lies between %s and %s", quantity.Format(q.Low, in.Band.Unit, 6, quantity.Nearest),
			quantity.Format(q.High, in.Band.Unit, 6, quantity.Nearest)), "give a range: --from and --to"}
	}
	return f.from != "" || f.to != "", nil
}

// single reads one figure of a flag.
func single(flag string, d quantity.Dimension, text string) (quantity.Band, error) {
	b, err := figureOf(flag, d, text)
	if err == nil && b.Low != b.High {
		err = &usageError{fmt.Sprintf("--%s: %q is no single figure", flag, text), "write: --" + flag + " " + strings.ReplaceAll(d.Example(), " ", "")}
	}
	return b, err
}

// goals are the limits and figures to be reached: all limits with a figure here
// where none is named.
func (f *solveFlags) goals(s *reportgen.Sheet) ([]study.Goal, error) {
	end := study.End(f.end.word)
	var goals []study.Goal
	var faults []error
	for _, text := range f.target {
		g, err := target(text)
		g.End = end
		goals, faults = append(goals, g), append(faults, err)
	}
	if len(f.limit) > 0 || len(f.target) == 0 {
		named, err := limitsNamed(s, "limit", f.limit)
		faults = append(faults, err)
		for _, l := range named {
			if len(f.limit) > 0 || followed(s, l) {
				goals = append(goals, study.Goal{Limit: l, End: end})
			}
		}
	}
	if err := errors.Join(faults...); err != nil {
		return nil, err
	}
	if len(goals) == 0 {
		return nil, &usageError{"solve: no limit of the job has a figure to follow", "name a figure: --for mean_force_over_distance=4kN"}
	}
	return goals, nil
}

// followed reports whether the job gives an unconditional figure for a limit.
func followed(s *reportgen.Sheet, l *limits.Limit) bool {
	for _, c := range study.Columns(&s.File.Job, l.Quantity) {
		if c.Evidence != arrest.Shape {
			return true
		}
	}
	return false
}

const targetHint = "write: --for mean_force_over_distance=4kN"

// target reads QUANTITY=FIGURE.
func target(text string) (study.Goal, error) {
	name, value, found := strings.Cut(text, "=")
	if !found {
		return study.Goal{}, &usageError{fmt.Sprintf("--for %q is not QUANTITY=FIGURE", text), targetHint}
	}
	q, err := quantityNamed("for", strings.TrimSpace(name))
	if err != nil {
		return study.Goal{}, err
	}
	rec, _ := q.Record()
	b, err := single("for "+string(q), rec.Dimension, value)
	return study.Goal{Of: q, Target: b.Value}, err
}

const foundHint = "write: --found 'absorber_travel=0.60 m .. 0.64 m'"

// event reads what was found after an event, nil where nothing was. The force is
// that of --deployment-force, or of the one absorber of the job.
func (f *solveFlags) event(j *arrest.Job) (*reportgen.FoundTravel, error) {
	switch {
	case f.found == "" && f.holds == "":
		return nil, nil
	case f.found == "":
		return nil, &usageError{"--" + holdsFlag + " without --found", foundHint}
	case len(f.limit)+len(f.target) > 0 || f.end.word != "":
		return nil, &usageError{"--found with --limit, --for or --end", "--found asks a question of its own: leave them out"}
	}
	name, value, _ := strings.Cut(f.found, "=")
	if strings.TrimSpace(name) != string(arrest.AbsorberTravel) {
		return nil, &usageError{fmt.Sprintf("--found %q is not absorber_travel=FIGURE", f.found), foundHint}
	}
	travel, err := figureOf("found absorber_travel", quantity.Length, value)
	if err != nil {
		return nil, err
	}
	force, err := f.holding(j)
	return &reportgen.FoundTravel{Travel: travel, Force: force}, err
}

// holding is the force an absorber holds.
func (f *solveFlags) holding(j *arrest.Job) (quantity.Band, error) {
	if f.holds != "" {
		return figureOf(holdsFlag, quantity.Force, f.holds)
	}
	var have []quantity.Band
	for i := range j.Inputs {
		if strings.HasSuffix(j.Inputs[i].Key, ".deployment_force") {
			have = append(have, j.Inputs[i].Band)
		}
	}
	if len(have) != 1 {
		return quantity.Band{}, &usageError{fmt.Sprintf("--found: the job has %d absorbers with a deployment force", len(have)), "give the force of the one that tore: --" + holdsFlag + " '4 kN ± 10 %'"}
	}
	return have[0], nil
}
