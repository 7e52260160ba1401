package main

import (
	"bytes"
	"errors"
	"fmt"
	"io/fs"
	"os"
	"path/filepath"

	"github.com/spf13/cobra"

	"arrestcheck/arrest/jobfile"
	"arrestcheck/reportgen/archive"
)

const compareLong = `Sets two jobs, two revisions of one, or two archives side by side: the inputs,
figures and outcomes that differ. Each of the two is a job file, the folder of
an archive, or a result file that "check --format json" wrote.

What was planned stands beside what was found, and an input that became narrower
while its source stayed the same is named.
`

func newCompare(o *outcome, in surroundings) *cobra.Command {
	var flags reportFlags
	var limitFiles []string
	cmd := &cobra.Command{
		Use:   "compare A B [flags]",
		Short: "set two jobs, revisions or archives side by side",
		Long:  compareLong,
		Example: `  arrestcheck compare plan.toml as-found.toml
  arrestcheck compare archive/RT-0417-B RT-0417-C.toml`,
		DisableFlagsInUseLine: true,
		Args:                  exactly(2, "two jobs, archives or result files"),
		RunE: func(_ *cobra.Command, names []string) error {
			if err := flags.conflict(); err != nil {
				return err
			}
			if names[0] == "-" && names[1] == "-" {
				return &usageError{"- stands for standard input and can be named only once", "name a job file beside it"}
			}
			a, usedA, errA := side(names[0], limitFiles, in)
			b, usedB, errB := side(names[1], limitFiles, in)
			if err := errors.Join(errA, errB, flags.check(append(usedA, usedB...))); err != nil {
				return flatten(err)
			}
			c := archive.Compare(a, b)
			var out bytes.Buffer
			var err error
			if flags.format.word == "json" {
				err = c.JSON(&out)
			} else {
				err = flags.write(&out, c.Report(), in)
			}
			o.code = codeOfSame(c.Same())
			o.deliver(flags.out(), out.Bytes())
			return err
		},
	}
	flags.addLayout(cmd)
	cmd.Flags().StringArrayVar(&limitFiles, "limits", nil, "a limit `FILE` for both jobs; repeatable")
	return cmd
}

// side returns the results of one of the two, and which files it was read from.
func side(name string, limitFiles []string, in surroundings) (*archive.Results, []fs.FileInfo, error) {
	info, err := os.Stat(name)
	switch {
	case err != nil && name != "-":
		return nil, nil, &fileError{"read", fmt.Sprintf("%q", name), err}
	case err == nil && info.IsDir():
		return sideOfArchive(name)
	case filepath.Ext(name) == ".json":
		return sideOfResults(name)
	}
	inputs, used, err := gather(name, limitFiles, nil, in)
	if err != nil {
		return nil, used, err
	}
	sheet, _, err := workOut(inputs)
	if err != nil {
		return nil, used, err
	}
	r := archive.Of(sheet)
	return &r, used, nil
}

// sideOfArchive takes the archived results, of an archive that nobody touched.
func sideOfArchive(name string) (*archive.Results, []fs.FileInfo, error) {
	opened, err := openArchive(name)
	if refusal := (*archive.Refusal)(nil); errors.As(err, &refusal) {
		return nil, nil, refusedArchive(name, refusal.Reasons...)
	}
	if err != nil {
		return nil, nil, err
	}
	if len(opened.Touched) > 0 {
		return nil, nil, refusedArchive(name, fmt.Sprintf("%q is not the file that was archived", opened.Touched[0].Path))
	}
	r, err := opened.Results()
	if err != nil {
		return nil, nil, refusedArchive(name, err.Error())
	}
	return &r, nil, nil
}

func refusedArchive(name string, reasons ...string) error {
	faults := &jobfile.Faults{}
	for _, reason := range reasons {
		faults.List = append(faults.List, jobfile.Fault{File: name, Reason: reason, Hint: "see: " + programName + " reproduce"})
	}
	return faults
}

func sideOfResults(name string) (*archive.Results, []fs.FileInfo, error) {
	file, err := openInput(name)
	if err != nil {
		return nil, nil, &fileError{"read", fmt.Sprintf("%q", name), err}
	}
	defer file.Close()
	info, err := file.Stat()
	if err != nil {
		return nil, nil, &fileError{"read", fmt.Sprintf("%q", name), err}
	}
	data, _, err := digested(file, archive.MaxSize("data/result.json"), true)
	if err != nil {
		return nil, nil, &fileError{"read", fmt.Sprintf("%q", name), err}
	}
	r, err := archive.ReadResults(data)
	if err != nil {
		return nil, nil, &jobfile.Faults{List: []jobfile.Fault{{
			File: name, Reason: err.Error(), Hint: "name: a file that check --format json wrote for one job"}}}
	}
	return &r, []fs.FileInfo{info}, nil
}
