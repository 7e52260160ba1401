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
`

func newCheck(o *outcome, in surroundings) *cobra.Command {
	var limitFiles []string
	var flags reportFlags
	cmd := &cobra.Command{
		Use:   "check FILE... [flags]",
		Short: "check job files and print their reports",
		Long:  checkLong,
		Example: `  arrestcheck check job.toml
  arrestcheck check --limits site.toml --units us job.toml
  arrestcheck check --format json --out result.json job.toml
  generate-job | arrestcheck check -`,
		DisableFlagsInUseLine: true,
		Args:                  filesAndStdin,
		RunE: func(_ *cobra.Command, names []string) error {
			if err := flags.conflict(); err != nil {
				return err
			}
			sheets, inputs, err := read(names, limitFiles, in, o)
			dest, taken := flags.destination(inputs)
			if err := errors.Join(err, taken); err != nil {
				return flatten(err)
			}
			for i := range sheets {
				assess(&sheets[i])
				o.code = worst(o.code, codeOfAssessment(sheets[i].Assessment))
			}
			o.out = dest
			o.result, err = flags.render(sheets, in)
			return err
		},
	}
	cmd.Flags().StringArrayVar(&limitFiles, "limits", nil, "a limit `FILE` for every job; may be repeated")
	flags.add(cmd)
	return cmd
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
func read(names, limitFiles []string, in surroundings, o *outcome) ([]reportgen.Sheet, []fs.FileInfo, error) {
	var inputs []fs.FileInfo
	var failures []error
	sets, used, err := readLimitFiles(limitFiles)
	inputs, failures = append(inputs, used...), append(failures, err)

	sheets := make([]reportgen.Sheet, 0, len(names))
	for i, name := range names {
		file, used, err := readJob(name, in)
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
func readJob(name string, in surroundings) (*jobfile.File, []fs.FileInfo, error) {
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
	file, err := jobfile.Read(name, job.data, root.FS())
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
