package main

import (
	"bytes"
	"fmt"
	"runtime"
	"strings"

	"github.com/spf13/cobra"

	"arrestcheck/arrest"
	"arrestcheck/limits"
	"arrestcheck/reportgen"
	"arrestcheck/reportgen/figure"
)

const figureFlag = "figure"

// studyFlags are the flags of every command that studies a job.
type studyFlags struct {
	reportFlags
	limits, sets []string
}

// add adds them; drawn is false for a command without a figure.
func (f *studyFlags) add(cmd *cobra.Command, drawn bool) {
	f.reportFlags.add(cmd)
	f.format = oneOf("text", "markdown", "csv", "json")
	_ = cmd.RegisterFlagCompletionFunc("format", cobra.FixedCompletions(f.format.words, cobra.ShellCompDirectiveNoFileComp))
	if drawn {
		f.file(figureFlag, "draw to this new SVG `FILE`")
	}
	cmd.Flags().StringArrayVar(&f.limits, "limits", nil, "a limit `FILE` for the job; may be repeated")
	cmd.Flags().StringArrayVar(&f.sets, setFlag, nil, "put `KEY=VALUE` into the job; may be repeated")
}

// read reads and checks the one job of a study, and looks at the files that are
// to be written.
func (f *studyFlags) read(name string, o *outcome, in surroundings) (*reportgen.Sheet, error) {
	if err := f.conflict(); err != nil {
		return nil, err
	}
	overrides, err := overrides(f.sets)
	if err != nil {
		return nil, err
	}
	sheets, inputs, err := read([]string{name}, f.limits, overrides, in, o)
	if err != nil {
		return nil, flatten(err)
	}
	if err := f.check(inputs); err != nil {
		return nil, err
	}
	assess(&sheets[0])
	return &sheets[0], nil
}

// A studied is what a study came to, in every form.
type studied struct {
	name   string // of the figure, unique among those of a page
	report func(reportgen.UnitChoice) (reportgen.Report, error)
	csv    func(*bytes.Buffer) error
	json   func(*bytes.Buffer) error
	figure func(reportgen.UnitChoice) (*figure.Scene, error)
}

// deliver hands a study over in the form that was asked for.
func (f *studyFlags) deliver(s *studied, o *outcome, in surroundings) error {
	if to := f.destination(figureFlag); to != nil {
		scene, err := s.figure(f.unitChoice())
		if err != nil {
			return err
		}
		o.deliver(to, scene.SVG(s.name))
	}
	var b bytes.Buffer
	var err error
	switch f.format.word {
	case "csv":
		err = s.csv(&b)
	case "json":
		err = s.json(&b)
	default:
		var r reportgen.Report
		if r, err = s.report(f.unitChoice()); err == nil {
			err = f.write(&b, r, in)
		}
	}
	o.deliver(f.out(), b.Bytes())
	return err
}

// workers is on how many processors a study works. It does not change the
// result.
func workers() int { return min(runtime.GOMAXPROCS(0), 8) }

// limitsNamed returns the limits with some ids, of all sets; every one where no
// id is given.
func limitsNamed(s *reportgen.Sheet, flag string, ids []string) ([]*limits.Limit, error) {
	var all, named []*limits.Limit
	for i := range s.File.Sets {
		for k := range s.File.Sets[i].Limits {
			all = append(all, &s.File.Sets[i].Limits[k])
		}
	}
	if len(ids) == 0 {
		return all, nil
	}
	var names []string
	for _, l := range all {
		names = append(names, l.ID)
	}
	for _, id := range ids {
		found := false
		for _, l := range all {
			if l.ID == id {
				named, found = append(named, l), true
			}
		}
		if !found {
			return nil, noSuchName(flag, id, "limit of this job", names)
		}
	}
	return named, nil
}

// noSuchName refuses a name that is not among those there are.
func noSuchName(flag, name, what string, names []string) error {
	hint := "the job has none"
	if len(names) > 0 {
		hint = "there are: " + strings.Join(names, ", ")
	}
	if near := nearest(name, names); near != "" {
		hint = "did you mean: --" + flag + " " + near
	}
	return &usageError{fmt.Sprintf("--%s: %q is no %s", flag, name, what), hint}
}

// quantityNamed returns the quantity that a flag names.
func quantityNamed(flag, name string) (arrest.Quantity, error) {
	var names []string
	for _, r := range arrest.Quantities() {
		if string(r.ID) == name {
			return r.ID, nil
		}
		names = append(names, string(r.ID))
	}
	hint := "see the quantities of: " + programName + " check --format json"
	if near := nearest(name, names); near != "" {
		hint = "did you mean: --" + flag + " " + near
	}
	return "", &usageError{fmt.Sprintf("--%s: %q is no quantity", flag, name), hint}
}
