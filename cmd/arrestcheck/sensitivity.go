package main

import (
	"bytes"
	"fmt"
	"slices"
	"strings"

	"github.com/spf13/cobra"

	"arrestcheck/limits"
	"arrestcheck/reportgen"
	"arrestcheck/reportgen/figure"
)

const sensitivityLong = `Says, row by row, which inputs move the demand, and how closely each would have
to be measured for the row to be decided: open inputs first. A report has the
same tables behind its page 1, but for jobs with a connector path, where each
figure takes a run of the model.
`

func newSensitivity(o *outcome, in surroundings) *cobra.Command {
	var flags studyFlags
	var limit string
	cmd := &cobra.Command{
		Use:   "sensitivity JOB [flags]",
		Short: "what to measure first, and how closely",
		Long:  sensitivityLong,
		Example: `  arrestcheck sensitivity job.toml
  arrestcheck sensitivity job.toml --limit peak-on-body --figure m.svg`,
		DisableFlagsInUseLine: true,
		Args:                  exactly(1, "a job file, or - for standard input"),
		RunE: func(cmd *cobra.Command, names []string) error {
			sheet, err := flags.read(names[0], o, in)
			if err != nil {
				return err
			}
			if limit != "" {
				if _, err := limitsNamed(sheet, "limit", []string{limit}); err != nil {
					return err
				}
			}
			_, stop := showProgress(cmd.Context(), in, "sensitivity", 0)
			defer stop()
			s := &reportgen.Sensitivity{Sheet: sheet, Limit: limit}
			s.Rank()
			return flags.deliver(&studied{
				name:   "sensitivity",
				report: s.Report,
				csv:    func(b *bytes.Buffer) error { return s.CSV(b) },
				json:   func(b *bytes.Buffer) error { return s.JSON(b) },
				figure: func(u reportgen.UnitChoice) (*figure.Scene, error) { return oneRow(s, u) },
			}, o, in)
		},
	}
	flags.add(cmd, true)
	cmd.Flags().StringVar(&limit, "limit", "", "only the row of this `LIMIT`, by id")
	return cmd
}

// oneRow draws the one row that something moves.
func oneRow(s *reportgen.Sensitivity, u reportgen.UnitChoice) (*figure.Scene, error) {
	rows := s.Rows()
	switch len(rows) {
	case 0:
		return nil, &usageError{"--figure: no entry with a band moves a row", "write entries with their bands, as 1.07 m ± 0.05 m"}
	case 1:
		return s.Figure(rows[0], u)
	}
	ids := idsOf(s.Sheet.Assessment, rows)
	return nil, &usageError{fmt.Sprintf("--figure: %d rows would need a figure each", len(rows)), "name one with --limit: " + strings.Join(ids, ", ")}
}

// idsOf names the limits of some rows, each once.
func idsOf(a *limits.Assessment, rows []int) []string {
	var ids []string
	for _, i := range rows {
		if id := a.Findings[i].Limit.ID; !slices.Contains(ids, id) {
			ids = append(ids, id)
		}
	}
	return ids
}
