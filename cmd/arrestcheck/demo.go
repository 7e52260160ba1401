package main

import (
	"embed"
	"fmt"
	"io/fs"

	"github.com/spf13/cobra"

	"arrestcheck/arrest/jobfile"
	"arrestcheck/reportgen"
)

// demoFiles holds the job and the limit sets of the demo: invented figures of
// an invented place, which the files themselves say.
//
//go:embed demo
var demoFiles embed.FS

const demoJob = "job.toml"

const demoLong = `Prints the report of an invented job. All its values are EXAMPLE VALUES: they
belong to no product, no site and no rule. With --input the files of the job
are printed instead, as a pattern for your own.

The exit code is 0; the one that check would give is named below the report.
`

func newDemo(o *outcome, in surroundings) *cobra.Command {
	var flags reportFlags
	var input bool
	cmd := &cobra.Command{
		Use:   "demo [flags]",
		Short: "print the report of an invented job",
		Long:  demoLong,
		Example: `  arrestcheck demo
  arrestcheck demo --input
  arrestcheck demo --units us --out demo.txt`,
		DisableFlagsInUseLine: true,
		Args:                  exactly(0, ""),
		RunE: func(*cobra.Command, []string) error {
			if err := flags.conflict(); err != nil {
				return err
			}
			if err := flags.check(nil); err != nil {
				return err
			}
			if input {
				files, err := demoInput()
				o.deliver(flags.out(), files)
				return err
			}
			sheet, err := demoSheet()
			if err != nil {
				return err
			}
			o.remarks = append(o.remarks, fmt.Sprintf("the demo ends with exit code %d; check would end with %d",
				exitWithin, codeOfAssessment(sheet.Assessment)))
			report, err := flags.render([]reportgen.Sheet{sheet}, in)
			o.deliver(flags.out(), report)
			return err
		},
	}
	flags.add(cmd)
	cmd.Flags().BoolVar(&input, "input", false, "print the job and limit files instead")
	return cmd
}

// demoSheet works the demo out, as check would.
func demoSheet() (reportgen.Sheet, error) {
	folder, err := fs.Sub(demoFiles, "demo")
	if err != nil {
		return reportgen.Sheet{}, err
	}
	data, err := fs.ReadFile(folder, demoJob)
	if err != nil {
		return reportgen.Sheet{}, err
	}
	file, err := jobfile.Read(demoJob, data, folder)
	if err != nil {
		return reportgen.Sheet{}, fmt.Errorf("internal error: the demo is refused: %w", err)
	}
	sheet := reportgen.Sheet{File: file, Tool: toolVersion, Number: 1, Of: 1}
	assess(&sheet)
	return sheet, nil
}

// demoInput returns the files of the demo one below the other, the job first,
// each headed by its name in a comment.
func demoInput() ([]byte, error) {
	var all []byte
	for _, name := range []string{demoJob, "site-limits.toml", "owner-limits.toml"} {
		data, err := demoFiles.ReadFile("demo/" + name)
		if err != nil {
			return nil, err
		}
		all = append(all, fmt.Sprintf("# ---- %s ----\n", name)...)
		all = append(append(all, data...), '\n')
	}
	return all, nil
}
