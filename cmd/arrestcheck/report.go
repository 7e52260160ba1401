package main

import (
	"bytes"
	"fmt"
	"os"
	"slices"
	"strings"

	"github.com/mattn/go-isatty"
	"github.com/spf13/cobra"

	"arrestcheck/reportgen"
)

// A choice is a flag that takes one of a few words.
type choice struct {
	word  string
	words []string
}

func oneOf(words ...string) choice { return choice{words[0], words} }

func (c *choice) String() string { return c.word }
func (c *choice) Type() string   { return strings.Join(c.words, "|") }

func (c *choice) Set(word string) error {
	if !slices.Contains(c.words, word) {
		return fmt.Errorf("choose one of: %s", strings.Join(c.words, ", "))
	}
	c.word = word
	return nil
}

// reportFlags are the flags of every command that prints reports.
type reportFlags struct {
	format, units, color choice
	ascii                bool
	drawn                []string // kinds of figures that stand in the report
	fileFlags
}

func (f *reportFlags) add(cmd *cobra.Command) {
	f.addLayout(cmd)
	f.units = oneOf("both", "si", "us")
	f.units.flag(cmd, "units", "units of the text")
}

// addLayout adds the flags of a report in which every figure has one unit.
func (f *reportFlags) addLayout(cmd *cobra.Command) {
	f.format, f.color = oneOf("text", "json", "markdown"), oneOf("auto", "always", "never")
	f.format.flag(cmd, "format", "what is written")
	cmd.Flags().BoolVar(&f.ascii, "ascii", false, "plain ASCII text")
	f.color.flag(cmd, "color", "colour; auto: on a terminal")
	f.fileFlags.add(cmd)
}

// flag adds the flag of a choice, with its words to complete.
func (c *choice) flag(cmd *cobra.Command, name, usage string) {
	cmd.Flags().Var(c, name, usage)
	_ = cmd.RegisterFlagCompletionFunc(name, cobra.FixedCompletions(c.words, cobra.ShellCompDirectiveNoFileComp))
}

// render writes the sheets in the chosen format.
func (f *reportFlags) render(sheets []reportgen.Sheet, in surroundings) ([]byte, error) {
	var b bytes.Buffer
	for i := range sheets {
		if f.format.word == "json" {
			if err := reportgen.JSON(&b, &sheets[i]); err != nil {
				return nil, err
			}
			continue
		}
		r := reportgen.Build(&sheets[i], f.unitChoice())
		for _, kind := range f.drawn {
			if err := r.Draw(kind, &sheets[i], f.unitChoice()); err != nil {
				return nil, noFigure(kind, &sheets[i], err)
			}
		}
		if err := f.write(&b, r, in); err != nil {
			return nil, err
		}
	}
	return b.Bytes(), nil
}

// write adds one report to what is written already.
func (f *reportFlags) write(b *bytes.Buffer, r reportgen.Report, in surroundings) error {
	if f.format.word == "markdown" {
		if b.Len() > 0 {
			b.WriteString("\n")
		}
		return reportgen.Markdown(b, r, reportgen.MarkdownOptions{ASCII: f.ascii})
	}
	if b.Len() > 0 {
		b.WriteString("\n\n")
	}
	return reportgen.Text(b, r, reportgen.TextOptions{ASCII: f.ascii, Color: f.colored(in)})
}

// print lays out a report of the program's own, the list of units and the
// like.
func (o *outcome) print(r reportgen.Report, ascii bool) error {
	var b bytes.Buffer
	err := reportgen.Text(&b, r, reportgen.TextOptions{ASCII: ascii})
	o.result = b.Bytes()
	return err
}

func (f *reportFlags) unitChoice() reportgen.UnitChoice {
	switch f.units.word {
	case "si":
		return reportgen.SIUnits
	case "us":
		return reportgen.USUnits
	}
	return reportgen.BothUnits
}

// colored says whether the text is coloured. With auto it is only on a
// terminal that shows colour, and only where NO_COLOR does not forbid it.
func (f *reportFlags) colored(in surroundings) bool {
	switch f.color.word {
	case "always":
		return true
	case "never":
		return false
	}
	terminal, ok := in.stdout.(*os.File)
	return ok && f.out() == nil && isatty.IsTerminal(terminal.Fd()) &&
		in.lookUp("NO_COLOR") == "" && in.lookUp("TERM") != "dumb"
}

// lookUp returns the value of a variable of the environment, empty where it
// is not set. The last of several counts, as for the shell.
func (in surroundings) lookUp(name string) string {
	value := ""
	for _, pair := range in.env {
		if v, ok := strings.CutPrefix(pair, name+"="); ok {
			value = v
		}
	}
	return value
}
