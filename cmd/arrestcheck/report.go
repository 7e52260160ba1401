package main

import (
	"bytes"
	"fmt"
	"io/fs"
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
	out                  string
	outGiven             func() bool
	force                bool
}

func (f *reportFlags) add(cmd *cobra.Command) {
	f.format, f.units, f.color = oneOf("text", "json"), oneOf("both", "si", "us"), oneOf("auto", "always", "never")
	flags := cmd.Flags()
	flags.Var(&f.format, "format", "what is written")
	flags.Var(&f.units, "units", "units of the text")
	flags.BoolVar(&f.ascii, "ascii", false, "plain ASCII text")
	flags.Var(&f.color, "color", "colour; auto: on a terminal")
	flags.StringVar(&f.out, "out", "", "write to this new `FILE`")
	flags.BoolVar(&f.force, "force", false, "let --out replace an existing file")
	f.outGiven = func() bool { return flags.Changed("out") }
	for name, c := range map[string]*choice{"format": &f.format, "units": &f.units, "color": &f.color} {
		_ = cmd.RegisterFlagCompletionFunc(name, cobra.FixedCompletions(c.words, cobra.ShellCompDirectiveNoFileComp))
	}
}

// conflict refuses flags that contradict each other.
func (f *reportFlags) conflict() error {
	switch {
	case f.outGiven() && (f.out == "" || f.out == "-"):
		return &usageError{fmt.Sprintf("--out %q names no file", f.out),
			"without --out the report goes to standard output"}
	case f.force && !f.outGiven():
		return &usageError{"--force without --out", "--force lets --out FILE replace an existing file"}
	}
	return nil
}

// destination returns where the result goes, nil for standard output, and why
// it must not go there.
func (f *reportFlags) destination(inputs []fs.FileInfo) (*destination, error) {
	if !f.outGiven() {
		return nil, nil
	}
	d := &destination{f.out, f.force}
	return d, d.check(inputs)
}

// render writes the sheets in the chosen format.
func (f *reportFlags) render(sheets []reportgen.Sheet, in surroundings) ([]byte, error) {
	options := reportgen.TextOptions{ASCII: f.ascii, Color: f.colored(in)}
	var b bytes.Buffer
	for i := range sheets {
		if f.format.word == "json" {
			if err := reportgen.JSON(&b, &sheets[i]); err != nil {
				return nil, err
			}
			continue
		}
		if i > 0 {
			b.WriteString("\n\n")
		}
		if err := reportgen.Text(&b, reportgen.Build(&sheets[i], f.unitChoice()), options); err != nil {
			return nil, err
		}
	}
	return b.Bytes(), nil
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
	return ok && !f.outGiven() && isatty.IsTerminal(terminal.Fd()) &&
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
