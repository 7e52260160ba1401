package main

import (
	"fmt"
	"slices"
	"strings"

	"github.com/spf13/cobra"

	"arrestcheck/arrest/jobfile"
	"arrestcheck/reportgen"
)

const schemaLong = `Prints the JSON Schema (draft 2020-12) of a kind of file. An editor that takes
schemas for TOML completes the keys of a job or limit file with it, shows what
each holds and marks what is misspelt. check has the last word: no schema
compares figures. The schema of a result is that of one line of --format json.
`

// resultKind is the kind that the program writes and does not read.
const resultKind = "result"

func newSchema(o *outcome) *cobra.Command {
	kinds := append(jobfile.Schemas(), resultKind)
	return &cobra.Command{
		Use:                   "schema " + strings.Join(kinds, "|"),
		Short:                 "print the JSON Schema of a kind of file",
		Long:                  schemaLong,
		Example:               "  arrestcheck schema job > job.schema.json",
		DisableFlagsInUseLine: true,
		ValidArgs:             kinds,
		Args:                  exactly(1, strings.Join(kinds, ", ")),
		RunE: func(_ *cobra.Command, args []string) error {
			switch kind := args[0]; {
			case !slices.Contains(kinds, kind):
				return unknownWord(fmt.Sprintf("schema: unknown kind %q", kind), kind, kinds)
			case kind == resultKind:
				o.result = reportgen.JSONSchema()
				return nil
			}
			data, err := jobfile.Schema(args[0])
			o.result = data
			return err
		},
	}
}
