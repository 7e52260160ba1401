package main

import (
	"fmt"
	"strings"

	"github.com/spf13/cobra"

	"arrestcheck/arrest/jobfile"
)

const newLong = `Prints a commented file to begin with: a job for a fall, for a moving load, for
a connector path or for a layout, or a set of limits. Every key is in it, with
what it holds and an example. All values are EXAMPLE VALUES and no limit is
within until you have put in your own and taken out the line example = true.

With limits, --example NAME prints the figures of published documents in place
of the pattern, each with its clause and how it was read. Hold them against the
current text: nobody has done it for you, and without it no row is within.
`

func newNew(o *outcome) *cobra.Command {
	var flags fileFlags
	var example string
	kinds := jobfile.Starters()
	cmd := &cobra.Command{
		Use:   "new " + strings.Join(kinds, "|") + " [flags]",
		Short: "print a commented file to begin with",
		Long:  newLong + "\nExamples of limits: " + wrapped(jobfile.Examples(), 20) + "\n",
		Example: `  arrestcheck new fall --out job.toml
  arrestcheck new limits --out site-limits.toml
  arrestcheck new limits --example ` + jobfile.Examples()[0],
		DisableFlagsInUseLine: true,
		ValidArgs:             kinds,
		Args:                  exactly(1, strings.Join(kinds, ", ")),
		RunE: func(cmd *cobra.Command, args []string) error {
			if err := flags.conflict(); err != nil {
				return err
			}
			text, err := begin(args[0], example, cmd.Flags().Changed("example"))
			if err != nil {
				return err
			}
			if err := flags.check(nil); err != nil {
				return err
			}
			o.deliver(flags.out(), []byte(text))
			return nil
		},
	}
	flags.add(cmd)
	cmd.Flags().StringVar(&example, "example", "", "the limits of published documents, by `NAME`")
	_ = cmd.RegisterFlagCompletionFunc("example", cobra.FixedCompletions(jobfile.Examples(), cobra.ShellCompDirectiveNoFileComp))
	return cmd
}

// begin returns the starter file of a kind, or in its place an example.
func begin(kind, example string, wanted bool) (string, error) {
	text, err := jobfile.Starter(kind)
	switch {
	case err != nil:
		return "", unknownWord(fmt.Sprintf("new: unknown kind %q", kind), kind, jobfile.Starters())
	case !wanted:
		return text, nil
	case kind != "limits":
		return "", &usageError{"--example belongs to new limits", "leave it out: the file of new " + kind + " is an example itself"}
	}
	if text, err = jobfile.Example(example); err != nil {
		return "", unknownWord(fmt.Sprintf("--example %q: there is no such set", example), example, jobfile.Examples())
	}
	return text, nil
}

// unknownWord refuses a word that is not one of a closed set, for the reason
// given.
func unknownWord(reason, word string, words []string) error {
	hint := "one of: " + wrapped(words, 2)
	if near := nearest(word, words); near != "" {
		hint = "did you mean: " + near
	}
	return &usageError{reason, hint}
}

// wrapped lists words in lines of a page, those below the first indented.
func wrapped(words []string, indent int) string {
	var b strings.Builder
	at := indent + len("one of: ")
	for i, w := range words {
		if i > 0 {
			w = " " + w
			b.WriteByte(',')
		}
		if at+len(w)+1 > pageWidth {
			b.WriteString("\n" + strings.Repeat(" ", indent))
			w, at = strings.TrimSpace(w), indent
		}
		b.WriteString(w)
		at += len(w) + 1
	}
	return b.String()
}
