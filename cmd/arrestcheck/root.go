package main

import (
	"fmt"
	"slices"
	"strings"

	"github.com/spf13/cobra"

	"arrestcheck/arrest"
)

const rootLong = `Holds one fall and its stop against the limits you enter, and says what the
figures show, what they leave open and what was not looked at.

It is arithmetic. It holds no limit of its own and permits nothing.
`

// newRoot builds the command tree for a command line. The commands write what
// they come to into o and everything else to the tree's own output.
func newRoot(args []string, o *outcome, in surroundings) *cobra.Command {
	root := &cobra.Command{
		Use:   programName,
		Short: "holds a fall and its stop against the limits you enter",
		Long:  rootLong,
		Example: `  arrestcheck demo
  arrestcheck check job.toml
  arrestcheck check --limits site.toml --format json --out result.json job.toml`,
		RunE: func(*cobra.Command, []string) error {
			return &usageError{"a command is missing", "see: " + programName + " help"}
		},
		SilenceErrors:              true,
		SilenceUsage:               true,
		SuggestionsMinimumDistance: 2,
	}
	root.SetFlagErrorFunc(flagFault)
	root.SetHelpFunc(func(cmd *cobra.Command, _ []string) {
		fmt.Fprint(cmd.OutOrStdout(), helpText(cmd))
	})
	root.SetHelpCommand(newHelp())
	for _, c := range wanted(args) {
		root.AddCommand(c.build(o, in))
	}
	return root
}

// A command is one of the program's, made when it is wanted: to make all of
// them takes longer than to check a small job.
type command struct {
	name  string
	build func(*outcome, surroundings) *cobra.Command
}

// alone leaves out the surroundings, which few commands look at.
func alone(build func(*outcome) *cobra.Command) func(*outcome, surroundings) *cobra.Command {
	return func(o *outcome, _ surroundings) *cobra.Command { return build(o) }
}

// commands returns every command but help and completion, which look at all the
// others.
func commands() []command {
	return []command{
		{"check", newCheck}, {"demo", newDemo}, {"new", alone(newNew)}, {"schema", alone(newSchema)},
		{"register", newRegister}, {"archive", newArchive}, {"reproduce", newReproduce}, {"compare", newCompare},
		{"sweep", newSweep}, {"solve", newSolve}, {"envelope", newEnvelope}, {"sensitivity", newSensitivity},
		{"lesson", newLesson}, {"watch", newWatch},
		{"methods", alone(newMethods)}, {"units", alone(newUnits)}, {"version", alone(newVersion)},
	}
}

// wanted returns the one command that a command line begins with, and all of
// them where it begins with anything else.
func wanted(args []string) []command {
	all := commands()
	if len(args) > 0 {
		if i := slices.IndexFunc(all, func(c command) bool { return c.name == args[0] }); i >= 0 {
			return all[i : i+1]
		}
	}
	return append(all, command{"completion", func(*outcome, surroundings) *cobra.Command { return newCompletion() }})
}

// pageWidth is the greatest width of what the program lays out itself.
const pageWidth = 80

// helpText lays out the help of one command.
func helpText(cmd *cobra.Command) string {
	var b strings.Builder
	b.WriteString(cmd.Long)
	if cmd.HasParent() {
		fmt.Fprintf(&b, "\nUsage:\n  %s\n", cmd.UseLine())
	} else {
		fmt.Fprintf(&b, "\nUsage:\n  %s COMMAND\n\nCommands:\n", cmd.Name())
		for _, c := range cmd.Commands() {
			if c.IsAvailableCommand() || c.Name() == "help" {
				fmt.Fprintf(&b, "  %-11s %s\n", c.Name(), c.Short)
			}
		}
	}
	fmt.Fprintf(&b, "\nFlags:\n%s", cmd.LocalFlags().FlagUsagesWrapped(pageWidth))
	if cmd.Example != "" {
		fmt.Fprintf(&b, "\nExamples:\n%s\n", cmd.Example)
	}
	name := cmd.Name()
	if !cmd.HasParent() {
		name = ""
	}
	if exits := exitHelps[name]; exits != "" {
		b.WriteString("\n" + exits)
	}
	return b.String()
}

func newHelp() *cobra.Command {
	return &cobra.Command{
		Use:   "help [COMMAND]",
		Short: "the help of a command",
		Long:  "Prints the help of the program or of one command.\n",
		RunE: func(cmd *cobra.Command, args []string) error {
			about, rest, err := cmd.Root().Find(args)
			if err != nil || len(rest) > 0 {
				return unknownCommand(cmd.Root(), strings.Join(args, " "))
			}
			about.InitDefaultHelpFlag()
			return about.Help()
		},
	}
}

func newVersion(o *outcome) *cobra.Command {
	return &cobra.Command{
		Use:   "version",
		Short: "print the versions of the program and of its mechanics",
		Long:  "Prints the version of the program and that of its mechanics.\n",
		Args:  exactly(0, ""),
		RunE: func(*cobra.Command, []string) error {
			o.result = []byte(programName + " " + toolVersion + "\nmechanics " + arrest.ModelVersion + "\n")
			return nil
		},
	}
}

func newCompletion() *cobra.Command {
	shells := []string{"bash", "zsh", "fish", "powershell"}
	return &cobra.Command{
		Use:       "completion SHELL",
		Short:     "a completion script for bash, zsh, fish or powershell",
		Long:      "Prints a script that lets the shell complete commands, flags and files.\n",
		Example:   "  source <(arrestcheck completion bash)",
		ValidArgs: shells,
		Args:      exactly(1, "bash, zsh, fish or powershell"),
		RunE: func(cmd *cobra.Command, args []string) error {
			w, root := cmd.OutOrStdout(), cmd.Root()
			switch args[0] {
			case "bash":
				return root.GenBashCompletionV2(w, true)
			case "zsh":
				return root.GenZshCompletion(w)
			case "fish":
				return root.GenFishCompletion(w, true)
			case "powershell":
				return root.GenPowerShellCompletionWithDesc(w)
			}
			return &usageError{fmt.Sprintf("no completion for the shell %q", args[0]),
				"one of: " + strings.Join(shells, ", ")}
		},
	}
}

// exactly refuses another number of arguments than n; what says what they are.
func exactly(n int, what string) cobra.PositionalArgs {
	return func(cmd *cobra.Command, args []string) error {
		switch {
		case len(args) < n:
			return &usageError{cmd.Name() + ": missing: " + what, "see: " + cmd.CommandPath() + " --help"}
		case len(args) > n:
			return &usageError{fmt.Sprintf("%s: unexpected argument %q", cmd.Name(), args[n]),
				"see: " + cmd.CommandPath() + " --help"}
		}
		return nil
	}
}
