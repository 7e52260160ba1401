package main

import (
	"bytes"
	"errors"
	"fmt"
	"slices"
	"strings"

	"github.com/spf13/cobra"

	"arrestcheck/arrest"
	"arrestcheck/arrest/quantity"
	"arrestcheck/reportgen"
)

const lessonLong = `Teaches with one fall: the same fall stopped short, as on a label and long, in
four shapes, and the sums that go wrong most often beside the right ones. A
screen has 40 lines of 80 columns, for a projector. Without --answers the
results are blanks to be filled in.

The fall is that of a job, or of --mass and --free-fall.
`

// lessonFlags are the flags of lesson.
type lessonFlags struct {
	reportFlags
	mass, fall, stops, ring string
	answers                 bool
	screen                  int
}

func newLesson(o *outcome, in surroundings) *cobra.Command {
	var flags lessonFlags
	cmd := &cobra.Command{
		Use:   "lesson [JOB] [flags]",
		Short: "teach with one fall, stopped in several ways",
		Long:  lessonLong,
		Example: `  arrestcheck lesson --mass 100kg --free-fall 1.8m --answers
  arrestcheck lesson --mass 220lb --free-fall 6ft --screen 4 --answers
  arrestcheck lesson job.toml --format markdown --out questions.md`,
		DisableFlagsInUseLine: true,
		Args:                  cobra.ArbitraryArgs,
		RunE: func(cmd *cobra.Command, names []string) error {
			return flags.run(cmd, names, o, in)
		},
	}
	flags.add(cmd)
	flags.format = oneOf("text", "markdown")
	_ = cmd.RegisterFlagCompletionFunc("format", cobra.FixedCompletions(flags.format.words, cobra.ShellCompDirectiveNoFileComp))
	f := cmd.Flags()
	f.StringVar(&flags.mass, "mass", "", "moving `MASS`, where no job is named")
	f.StringVar(&flags.fall, "free-fall", "", "free `FALL`, where no job is named")
	f.StringVar(&flags.stops, "stops", "", "two to four stopping `DISTANCES`")
	f.StringVar(&flags.ring, "d-ring", "1.5m", "`HEIGHT` of the D-ring above the feet")
	f.BoolVar(&flags.answers, "answers", false, "with the answers")
	f.IntVar(&flags.screen, "screen", 0, "only screen `N`, from 1")
	return cmd
}

func (f *lessonFlags) run(cmd *cobra.Command, names []string, o *outcome, in surroundings) error {
	if err := f.conflict(); err != nil {
		return err
	}
	lesson, err := f.lesson(cmd, names, o, in)
	if err != nil {
		return err
	}
	report, err := lesson.Report(f.unitChoice())
	if err != nil {
		return err
	}
	var b bytes.Buffer
	if f.format.word == "markdown" {
		if f.screen != 0 {
			return &usageError{"--screen with --format markdown", "screens are of the text: leave one of the two out"}
		}
		err = f.write(&b, report, in)
	} else {
		err = f.screens(&b, report, in)
	}
	o.deliver(f.out(), b.Bytes())
	return err
}

// screens writes all screens, or the one that was asked for.
func (f *lessonFlags) screens(b *bytes.Buffer, r reportgen.Report, in surroundings) error {
	all := reportgen.Screens(r, reportgen.TextOptions{ASCII: f.ascii, Color: f.colored(in)})
	if f.screen < 0 || f.screen > len(all) {
		return &usageError{fmt.Sprintf("--screen %d: there are %d screens", f.screen, len(all)), "count them from 1"}
	}
	if f.screen > 0 {
		all = all[f.screen-1 : f.screen]
	}
	return reportgen.WriteScreens(b, all)
}

const lessonHint = "write: arrestcheck lesson --mass 100kg --free-fall 1.8m, or name a job"

// lesson gathers what is taught with.
func (f *lessonFlags) lesson(cmd *cobra.Command, names []string, o *outcome, in surroundings) (*reportgen.Lesson, error) {
	l := &reportgen.Lesson{Gravity: arrest.StandardGravity, Answers: f.answers}
	typed := f.mass != "" || f.fall != ""
	var err error
	switch {
	case len(names) > 1:
		return nil, exactly(1, "")(cmd, names)
	case len(names) == 1 && typed:
		return nil, &usageError{"lesson: a job, and --mass or --free-fall", "leave one of the two out"}
	case len(names) == 1:
		err = f.fromJob(l, names[0], o, in)
	case f.mass == "" || f.fall == "":
		return nil, &usageError{"lesson: missing: a job file, or --mass and --free-fall", lessonHint}
	default:
		err = f.fromFlags(l)
	}
	ring, wrong := single("d-ring", quantity.Length, f.ring)
	if wrong == nil && ring.Value <= 0 {
		wrong = &usageError{fmt.Sprintf("--d-ring %q is not above the feet", f.ring), "write: --d-ring 1.5m"}
	}
	if err := errors.Join(err, wrong, f.readStops(l)); err != nil {
		return nil, err
	}
	l.DRing = ring.Value
	return l, nil
}

// fromFlags takes the fall of the command line.
func (f *lessonFlags) fromFlags(l *reportgen.Lesson) error {
	mass, err := single("mass", quantity.Mass, f.mass)
	fall, wrong := single("free-fall", quantity.Length, f.fall)
	if err == nil && mass.Value <= 0 {
		err = &usageError{fmt.Sprintf("--mass %q is no mass of a body", f.mass), "write: --mass 100kg"}
	}
	if wrong == nil && fall.Value <= 0 {
		wrong = &usageError{fmt.Sprintf("--free-fall %q is no fall", f.fall), "write: --free-fall 1.8m"}
	}
	l.Mass, l.FreeFall, l.System = mass.Value, fall.Value, mass.Unit.System
	return errors.Join(err, wrong)
}

// fromJob takes the greatest mass and the deepest fall of a job.
func (f *lessonFlags) fromJob(l *reportgen.Lesson, name string, o *outcome, in surroundings) error {
	sheets, inputs, err := read([]string{name}, nil, nil, in, o)
	if err != nil {
		return flatten(err)
	}
	if err := f.check(inputs); err != nil {
		return err
	}
	s := &sheets[0]
	assess(s)
	j := &s.File.Job
	if j.Moving() || j.Persons == 0 {
		return &usageError{fmt.Sprintf("lesson: %q is no job of a person that falls", name), lessonHint}
	}
	for i := range j.Inputs {
		if in := &j.Inputs[i]; in.Key == "fall.free_fall" {
			l.FreeFall, l.System = in.Band.High, in.Band.Unit.System
		} else if in.Key == "fall.initial_speed" {
			l.InitialSpeed = in.Band.High
		}
	}
	if l.FreeFall <= 0 {
		return &usageError{fmt.Sprintf("lesson: %q has no free fall", name), lessonHint}
	}
	l.Mass, l.Gravity, l.Job = j.TotalMass().High, j.Point.Gravity, orName(s)
	l.Example = j.Example
	l.Stops = jobStops(j)
	return nil
}

func orName(s *reportgen.Sheet) string {
	if title := s.File.Document.Title; title != "" {
		return title
	}
	return s.File.Name
}

// The stops of a lesson where nothing else is said.
var lessonStops = []reportgen.LessonStop{{Name: "short", Distance: 0.1}, {Name: "label", Distance: 1}, {Name: "long", Distance: 2}}

// jobStops puts the stop of a job in the place of that of the label: the distance
// entered, at its least, or else the greatest travel that a document promises.
func jobStops(j *arrest.Job) []reportgen.LessonStop {
	stops := slices.Clone(lessonStops)
	for i := range j.Inputs {
		if in := &j.Inputs[i]; in.Key == "stop.distance" {
			stops[1] = reportgen.LessonStop{Name: "in the job", Distance: in.Band.Low}
			return inOrder(stops)
		}
	}
	for i := range j.Ratings {
		if travel := j.Ratings[i].TravelAtMost; travel != nil {
			stops[1].Distance = travel.High
			return inOrder(stops)
		}
	}
	return stops
}

// inOrder puts stops in the order of their distances, each distance once.
func inOrder(stops []reportgen.LessonStop) []reportgen.LessonStop {
	slices.SortStableFunc(stops, func(a, b reportgen.LessonStop) int {
		switch {
		case a.Distance < b.Distance:
			return -1
		case a.Distance > b.Distance:
			return 1
		}
		return 0
	})
	return slices.CompactFunc(stops, func(a, b reportgen.LessonStop) bool { return a.Distance == b.Distance })
}

// readStops reads --stops, and picks the stop whose shapes are shown.
func (f *lessonFlags) readStops(l *reportgen.Lesson) error {
	if l.Stops == nil {
		l.Stops = slices.Clone(lessonStops)
	}
	if f.stops != "" {
		v := varied{key: "stops"}
		if err := v.listOf(strings.Split(f.stops, ","), quantity.Length); err != nil {
			return err
		}
		if len(v.list) < 2 || len(v.list) > 4 || v.list[0] <= 0 {
			return &usageError{fmt.Sprintf("--stops %q: two to four distances above zero are needed", f.stops), "write: --stops '0.1 m, 1 m, 2 m'"}
		}
		l.Stops = nil
		for i, d := range v.list {
			l.Stops = append(l.Stops, reportgen.LessonStop{Name: stopName(i, len(v.list)), Distance: d})
		}
	}
	l.Label = len(l.Stops) / 2
	for i := range l.Stops {
		if n := l.Stops[i].Name; n == "label" || n == "in the job" {
			l.Label = i
		}
	}
	return nil
}

// stopName names one of several stops by its place.
func stopName(i, of int) string {
	switch i {
	case 0:
		return "short"
	case of - 1:
		return "long"
	}
	return fmt.Sprintf("stop %d", i+1)
}
