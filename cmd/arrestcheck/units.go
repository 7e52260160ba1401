package main

import (
	"strings"

	"github.com/spf13/cobra"

	"arrestcheck/arrest/quantity"
	"arrestcheck/reportgen"
)

const unitsLong = `Prints every unit a file may use, with its exact factor to SI, and the ways a
figure may be written.
`

var writingFigures = []reportgen.Line{
	{Label: "1.8 m", Text: "one figure: a decimal number, a blank, a unit; no comma in it"},
	{Label: "92 kg ± 1 kg", Text: "a figure and its tolerance; +/- is the same as ±, and the tolerance may be 0"},
	{Label: "0.34 s ± 10 %", Text: "a tolerance relative to the figure"},
	{Label: "86 kg .. 104 kg", Text: "a range; it has no middle figure"},
	{Label: "6 ft 4 1/2 in", Text: "feet and inches together"},
	{Label: "lb, lbf, kg, kgf", Text: "lb and kg are masses, lbf and kgf forces"},
}

func newUnits(o *outcome) *cobra.Command {
	var ascii bool
	cmd := &cobra.Command{
		Use:   "units",
		Short: "list the units with their exact factors",
		Long:  unitsLong,
		Args:  exactly(0, ""),
		RunE:  func(*cobra.Command, []string) error { return o.print(unitList(), ascii) },
	}
	cmd.Flags().BoolVar(&ascii, "ascii", false, "plain ASCII text")
	return cmd
}

func unitList() reportgen.Report {
	units := reportgen.Section{Heading: "Units, with their exact factors to SI"}
	var last quantity.Dimension
	for _, u := range quantity.Units() {
		if u.Dimension != last {
			last = u.Dimension
			units.Blocks = append(units.Blocks, reportgen.Block{Text: last.String()})
		}
		factor := u.Factor()
		if last != quantity.Ratio { // the SI unit of a ratio is the number 1
			factor += " " + last.SI().Symbol
		}
		block := &units.Blocks[len(units.Blocks)-1]
		block.Lines = append(block.Lines, reportgen.Line{Label: "  " + u.Symbol, Text: strings.TrimSpace(factor)})
	}
	return reportgen.Report{Sections: []reportgen.Section{
		units,
		{Heading: "How a figure is written, in quotes", Blocks: []reportgen.Block{{Lines: writingFigures}}},
	}}
}
