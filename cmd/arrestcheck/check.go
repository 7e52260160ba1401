package main

import (
	"errors"
	"fmt"
	"io/fs"
	"path"
	"slices"

	"github.com/spf13/cobra"

	"arrestcheck/arrest"
	"arrestcheck/arrest/jobfile"
	"arrestcheck/limits"
	"arrestcheck/reportgen"
)

const checkLong = `Checks one or more job files and prints a report of each. A job names its own
limit files; --limits adds others to every job. All files are read and all
faults told before anything is printed; one refused file refuses the run.

--set puts a figure or word in the place of one in every job file given. The
report says so, and the figure is open: it has lost its source. --explain
prints, in place of the report, what keeps one row from being settled and what
would settle it. --series writes the modelled arrest of a job with a connector
path as CSV: time, force, speed and travel of a stop straight down.

--figure draws one job: elevation and plan of a layout to scale, force-time and
force-travel of a modelled arrest. With =FILE behind the kind it is a new SVG
file, else it stands in characters behind the report.
`

// checkFlags are the flags of check that are not those of a report.
type checkFlags struct {
	limits, sets []string
	explain      string
	figures      figureList
}

func newCheck(o *outcome, in surroundings) *cobra.Command {
	var flags reportFlags
	var more checkFlags
	cmd := &cobra.Command{
		Use:   "check FILE... [flags]",
		Short: "check job files and print their reports",
		Long:  checkLong,
		Example: `  arrestcheck check job.toml
  arrestcheck check --limits site.toml --units us job.toml
  arrestcheck check --format json --out result.json job.toml
  arrestcheck check --set 'worker.mass=104 kg ± 1 kg' job.toml
  arrestcheck check --explain peak-on-body job.toml
  arrestcheck check --series arrest.csv path.toml
  arrestcheck check --figure elevation=e.svg --figure plan=p.svg layout.toml
  generate-job | arrestcheck check -`,
		DisableFlagsInUseLine: true,
		Args:                  filesAndStdin,
		RunE: func(cmd *cobra.Command, names []string) error {
			return check(cmd, names, &flags, &more, o, in)
		},
	}
	flags.add(cmd)
	flags.file(seriesFlag, "write the modelled arrest to this new `FILE`")
	more.figures.add(cmd, &flags)
	cmd.Flags().StringArrayVar(&more.limits, "limits", nil, "a limit `FILE` for every job; repeatable")
	cmd.Flags().StringArrayVar(&more.sets, setFlag, nil, "put `KEY=VALUE` into every job; repeatable")
	cmd.Flags().StringVar(&more.explain, explainFlag, "", "print what would settle the row of `LIMIT`")
	return cmd
}

// check reads everything, works everything out and leaves the results in o.
func check(cmd *cobra.Command, names []string, flags *reportFlags, more *checkFlags, o *outcome, in surroundings) error {
	drawn := more.figures.parse(flags, cmd.Flags().Changed(explainFlag), names)
	if err := errors.Join(drawn, flags.conflict(), more.conflict(cmd, flags, names)); err != nil {
		return err
	}
	overrides, err := overrides(more.sets)
	if err != nil {
		return err
	}
	sheets, inputs, err := read(names, more.limits, overrides, in, o)
	if err := errors.Join(err, flags.check(inputs)); err != nil {
		return flatten(err)
	}
	for i := range sheets {
		assess(&sheets[i])
		o.code = worst(o.code, codeOfAssessment(sheets[i].Assessment))
	}
	if to := flags.destination(seriesFlag); to != nil {
		data, remark, err := series(&sheets[0])
		if err != nil {
			return err
		}
		o.deliver(to, data)
		o.remarks = append(o.remarks, remark)
	}
	if err := more.figures.draw(&sheets[0], flags.unitChoice(), o); err != nil {
		return err
	}
	result, err := more.result(cmd, sheets, flags, in)
	o.deliver(flags.out(), result)
	return err
}

// conflict refuses flags that contradict each other or the files.
func (f *checkFlags) conflict(cmd *cobra.Command, flags *reportFlags, names []string) error {
	var faults []error
	if cmd.Flags().Changed(explainFlag) && flags.format.word == "json" {
		faults = append(faults, &usageError{"--explain with --format json", "--explain writes text or markdown; the JSON without it holds the reasons of every row"})
	}
	if flags.destination(seriesFlag) != nil && len(names) > 1 {
		faults = append(faults, &usageError{fmt.Sprintf("--series with %d job files", len(names)), "name one job"})
	}
	return errors.Join(faults...)
}

// result writes the reports, or in their place the explanations of one row.
func (f *checkFlags) result(cmd *cobra.Command, sheets []reportgen.Sheet, flags *reportFlags, in surroundings) ([]byte, error) {
	if cmd.Flags().Changed(explainFlag) {
		return explain(sheets, f.explain, flags, in)
	}
	return flags.render(sheets, in)
}

// filesAndStdin wants at least one file, and standard input at most once.
func filesAndStdin(cmd *cobra.Command, names []string) error {
	if len(names) == 0 {
		return &usageError{cmd.Name() + ": missing: a job file, or - for standard input",
			"see: " + cmd.CommandPath() + " --help"}
	}
	stdin := 0
	for _, name := range names {
		if name == "-" {
			stdin++
		}
	}
	if stdin > 1 {
		return &usageError{"- stands for standard input and can be named only once", "name each job once"}
	}
	return nil
}

// read reads the limit files of the command line and the jobs, every one of
// them, and returns what is wrong with them all together.
func read(names, limitFiles []string, overrides []jobfile.Override, in surroundings, o *outcome) ([]reportgen.Sheet, []fs.FileInfo, error) {
	var inputs []fs.FileInfo
	var failures []error
	sets, used, err := readLimitFiles(limitFiles)
	inputs, failures = append(inputs, used...), append(failures, err)

	sheets := make([]reportgen.Sheet, 0, len(names))
	for i, name := range names {
		file, used, err := readJob(name, overrides, in)
		inputs, failures = append(inputs, used...), append(failures, err)
		if err == nil {
			remarks, err := addSets(file, sets)
			o.remarks, failures = append(o.remarks, remarks...), append(failures, err)
			sheets = append(sheets, reportgen.Sheet{File: file, Tool: toolVersion, Number: i + 1, Of: len(names)})
		}
	}
	return sheets, inputs, errors.Join(failures...)
}

func readLimitFiles(names []string) ([]limits.Set, []fs.FileInfo, error) {
	var sets []limits.Set
	var inputs []fs.FileInfo
	var failures []error
	for _, name := range names {
		file, err := readFile(name)
		if err != nil {
			failures = append(failures, &fileError{"read", fmt.Sprintf("%q", name), err})
			continue
		}
		inputs = append(inputs, file.info)
		set, err := jobfile.ReadLimits(name, file.data)
		if err != nil {
			failures = append(failures, err)
			continue
		}
		sets = append(sets, *set)
	}
	return sets, inputs, errors.Join(failures...)
}

// readJob reads a job and the limit files it names, and tells which files
// those were.
func readJob(name string, overrides []jobfile.Override, in surroundings) (*jobfile.File, []fs.FileInfo, error) {
	job, err := readInput(name, in.stdin)
	if err != nil {
		return nil, nil, err
	}
	inputs := []fs.FileInfo{job.info}
	root, err := job.folder()
	if err != nil {
		return nil, inputs, err
	}
	defer root.Close()
	file, err := jobfile.Read(name, job.data, root.FS(), overrides...)
	if err != nil {
		return nil, inputs, err
	}
	for _, set := range file.Sets {
		if info, err := fs.Stat(root.FS(), path.Clean(set.Name)); set.Name != "" && err == nil {
			inputs = append(inputs, info)
		}
	}
	return file, inputs, nil
}

// addSets adds the limit sets of the command line to those of the job. A set
// that is there already, byte for byte, counts once: counted twice it would
// only make the counts of the report wrong. Two limits of one name are
// refused, as they are within a job.
func addSets(file *jobfile.File, sets []limits.Set) (remarks []string, err error) {
	var faults jobfile.Faults
	for _, set := range sets {
		if double := named(file.Sets, set.SHA256); double != "" {
			remarks = append(remarks, fmt.Sprintf("%q: the limit files %q and %q are the same and count once",
				file.Name, double, set.Name))
			continue
		}
		faults.List = append(faults.List, sameIDs(file, &set)...)
		file.Sets = append(file.Sets, set)
	}
	if len(faults.List) > 0 {
		return nil, &faults
	}
	return remarks, nil
}

// sameIDs returns a fault for every limit of set whose name a limit of file has.
func sameIDs(file *jobfile.File, set *limits.Set) (faults []jobfile.Fault) {
	for i, l := range set.Limits {
		for _, before := range file.Sets {
			if !slices.ContainsFunc(before.Limits, func(b limits.Limit) bool { return b.ID == l.ID }) {
				continue
			}
			where := before.Name
			if where == "" {
				where = "the job " + file.Name
			}
			faults = append(faults, jobfile.Fault{File: set.Name, Key: fmt.Sprintf("limit[%d].id", i+1), Text: l.ID,
				Reason: "a limit of " + where + " has this name already", Hint: fmt.Sprintf("write: id = %q", l.ID+"-2")})
		}
	}
	return faults
}

// named returns the name of the set with these bytes, empty where there is none.
func named(sets []limits.Set, sha256 string) string {
	for _, s := range sets {
		if s.SHA256 == sha256 {
			return s.Name
		}
	}
	return ""
}

// assess works a sheet out.
func assess(s *reportgen.Sheet) {
	result := arrest.Evaluate(&s.File.Job)
	arrest.ShowWorking(&s.File.Job, &result)
	assessment := limits.Assess(&result, s.File.Sets, s.File.Elsewhere)
	s.Result, s.Assessment = &result, &assessment
}
