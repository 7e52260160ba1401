package main

import (
	"fmt"
	"slices"
	"strings"

	"github.com/spf13/cobra"

	"arrestcheck/arrest"
	"arrestcheck/arrest/study"
	"arrestcheck/reportgen"
)

const methodsLong = `Lists the methods the program calculates with, or prints the whole record of
one: its formulas, symbols with units, when it holds, which way it errs and
where it comes from.
`

func newMethods(o *outcome) *cobra.Command {
	var ascii bool
	cmd := &cobra.Command{
		Use:   "methods [ID]",
		Short: "list the methods, or print the record of one",
		Long:  methodsLong,
		Example: `  arrestcheck methods
  arrestcheck methods M-02`,
		DisableFlagsInUseLine: true,
		Args:                  cobra.ArbitraryArgs,
		ValidArgsFunction:     completeMethods,
		RunE: func(cmd *cobra.Command, args []string) error {
			report := methodList()
			if len(args) > 0 {
				if err := exactly(1, "")(cmd, args); err != nil {
					return err
				}
				m, err := methodOf(args[0])
				if err != nil {
					return err
				}
				report = methodRecord(m)
			}
			return o.print(report, ascii)
		},
	}
	cmd.Flags().BoolVar(&ascii, "ascii", false, "plain ASCII text")
	return cmd
}

// allMethods returns the methods of the evaluation and of the studies, in the
// order of their ids.
func allMethods() []arrest.Method {
	all := append(arrest.Methods(), study.Methods()...)
	slices.SortStableFunc(all, func(a, b arrest.Method) int { return strings.Compare(a.ID, b.ID) })
	return all
}

func completeMethods(*cobra.Command, []string, string) ([]string, cobra.ShellCompDirective) {
	var ids []string
	for _, m := range allMethods() {
		ids = append(ids, m.ID+"\t"+m.Title)
	}
	return ids, cobra.ShellCompDirectiveNoFileComp
}

// methodOf returns the method with the id, spelled exactly.
func methodOf(id string) (arrest.Method, error) {
	all := allMethods()
	if i := slices.IndexFunc(all, func(m arrest.Method) bool { return m.ID == id }); i >= 0 {
		return all[i], nil
	}
	hint := "see: " + programName + " methods"
	if near := slices.IndexFunc(all, func(m arrest.Method) bool { return strings.EqualFold(m.ID, id) }); near >= 0 {
		hint = "did you mean: " + programName + " methods " + all[near].ID
	}
	return arrest.Method{}, &usageError{fmt.Sprintf("unknown method %q", id), hint}
}

func methodList() reportgen.Report {
	var lines []reportgen.Line
	for _, m := range allMethods() {
		lines = append(lines, reportgen.Line{Label: m.ID, Text: m.Title})
	}
	return reportgen.Report{Sections: []reportgen.Section{{
		Heading: "Methods",
		Blocks: []reportgen.Block{{Lines: lines},
			{Text: fmt.Sprintf("Version of the mechanics: %s. One record in full: %s methods %s",
				arrest.ModelVersion, programName, lines[0].Label)}},
	}}}
}

func methodRecord(m arrest.Method) reportgen.Report {
	var formulas, symbols []reportgen.Line
	for _, f := range m.Formulas {
		formulas = append(formulas, reportgen.Line{Text: f})
	}
	for _, s := range m.Symbols {
		symbols = append(symbols, reportgen.Line{Label: s.Name, Text: s.Meaning + ", " + s.Dimension.SI().Symbol})
	}
	section := func(heading string, b reportgen.Block) reportgen.Section {
		return reportgen.Section{Heading: heading, Blocks: []reportgen.Block{b}}
	}
	sections := []reportgen.Section{section(m.ID+"  "+m.Title, reportgen.Block{Lines: formulas})}
	if len(symbols) > 0 {
		sections = append(sections, section("Symbols", reportgen.Block{Lines: symbols}))
	}
	return reportgen.Report{Sections: append(sections,
		section("Holds when", reportgen.Block{Text: m.Valid}),
		section("Errs", reportgen.Block{Text: m.Errs}),
		section("Source", reportgen.Block{Text: m.Source}),
	)}
}
