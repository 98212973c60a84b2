package main

import (
	"fmt"
	"strings"

	"github.com/spf13/cobra"
	"github.com/spf13/pflag"

	"sailby/report/agenda"
)

// newRoot makes the command with all its subcommands.
func newRoot(st streams) *cobra.Command {
	g := &globals{}
	root := &cobra.Command{
		Use:   "sailby",
		Short: "Plan the work that must fit a window set by others",
		Long: `Sailby plans work that is built at home and fitted somewhere else, inside a window set by
others: a ferry booking, a slip that dries, a closed road. It reads one job file, and says whether
the work fits, what to do when, and why.

` + agenda.Care,
		Args:               cobra.ArbitraryArgs,
		SilenceErrors:      true,
		SilenceUsage:       true,
		DisableSuggestions: true,
		RunE: func(c *cobra.Command, args []string) error {
			if len(args) == 0 {
				return c.Help()
			}
			return unknownCommand(c, args[0])
		},
	}
	root.SetOut(st.out)
	root.SetErr(st.err)
	root.SetFlagErrorFunc(flagError)
	g.flags(root.PersistentFlags())
	g.complete(root)
	root.AddCommand(newStart(st), newCheck(g, st), newFits(g, st), newWays(g, st), newDays(g, st), newWhy(g, st), newSheets(g, st),
		newBrowse(g, st), newExport(g, st), newPack(g, st), newSling(st), newJoint(st), newCoat(st), newSchema(st))
	root.InitDefaultCompletionCmd()
	root.SetHelpCommand(newHelp(root))
	return root
}

// newHelp makes the command that explains another one.
func newHelp(root *cobra.Command) *cobra.Command {
	return &cobra.Command{
		Use:   "help [COMMAND]",
		Short: "Say what a command does",
		RunE: func(_ *cobra.Command, args []string) error {
			c, rest, err := root.Find(args)
			if err != nil || len(rest) > 0 {
				return unknownCommand(root, strings.Join(args, " "))
			}
			c.InitDefaultHelpFlag()
			return c.Help()
		},
	}
}

func unknownCommand(root *cobra.Command, word string) error {
	var names []string
	for _, c := range root.Commands() {
		if c.IsAvailableCommand() {
			names = append(names, c.Name())
		}
	}
	hint := "sailby " + strings.Join(names, ", ")
	if n := nearest(word, names); n != "" {
		hint = "sailby " + n
	}
	return misuse(hint, "there is no command %q", word)
}

// flagError turns what cobra says of a wrong flag into the error of a wrong command line.
func flagError(c *cobra.Command, err error) error {
	text := err.Error()
	hint := fmt.Sprintf("%s --help", c.CommandPath())
	if word, ok := strings.CutPrefix(text, "unknown flag: --"); ok {
		var names []string
		c.Flags().VisitAll(func(f *pflag.Flag) { names = append(names, f.Name) })
		if n := nearest(word, names); n != "" {
			hint = "--" + n
		}
		return misuse(hint, "there is no flag --%s for %s", word, c.CommandPath())
	}
	if word, rest, ok := strings.Cut(text, " in -"); ok && strings.HasPrefix(word, "unknown shorthand flag: ") {
		return misuse(hint, "there is no flag -%s for %s", rest, c.CommandPath())
	}
	return misuse(hint, "%s", text)
}

// takes asks for so many arguments, named as in the usage line; more is 1 where the last may be
// several words.
func takes(more bool, names ...string) cobra.PositionalArgs {
	return func(c *cobra.Command, args []string) error {
		switch {
		case len(args) < len(names):
			return misuse("sailby "+c.Use, "%s: %s is missing", c.CommandPath(), names[len(args)])
		case len(args) > len(names) && !more:
			return misuse("sailby "+c.Use, "%s: %q is one word too many", c.CommandPath(), args[len(names)])
		}
		return nil
	}
}
