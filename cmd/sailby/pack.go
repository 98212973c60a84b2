package main

import (
	"context"
	"io"

	"github.com/spf13/cobra"

	"sailby/report/text"
)

type packOptions struct {
	*globals
	which
	json, csv bool
}

func newPack(g *globals, st streams) *cobra.Command {
	o := &packOptions{globals: g}
	c := &cobra.Command{
		Use:   "pack JOB",
		Short: "What to take: gear, consumables, gas, paint, papers; masses; what goes in which vehicle",
		Long: "Lists what the site's work needs, from the tasks themselves: consumables with their spare, rounded once to what they are\n" +
			"sold in; gear for each lift; tools and protective gear by kind of work; papers. Each with its mass, when it is first\n" +
			"needed, and whether the job stops without it. Where the job file gives vehicles, it says what goes in which, tied down\n" +
			"how, and flags what the rules of carriage and driving say of it. The printed pack has the same list.",
		Example:           "  sailby pack slip/job.yaml\n  sailby pack slip/job.yaml --csv > take.csv",
		Args:              takes(false, "JOB"),
		ValidArgsFunction: jobFiles,
		RunE:              func(c *cobra.Command, args []string) error { return runPack(c.Context(), o, st, args) },
	}
	o.which.flags(c.Flags())
	c.Flags().BoolVar(&o.json, "json", false, "print for machines")
	c.Flags().BoolVar(&o.csv, "csv", false, "print as a table for spreadsheets")
	return c
}

func runPack(ctx context.Context, o *packOptions, st streams, args []string) error {
	if o.json && o.csv {
		return misuse("one of them", "--json and --csv ask for two forms")
	}
	if err := o.which.check(); err != nil {
		return err
	}
	job, err := o.read(args[0])
	if err != nil {
		return err
	}
	r, err := o.ask(ctx, st, job)
	if err != nil {
		return err
	}
	return st.print(func(w io.Writer) error {
		switch {
		case o.json:
			return text.PackJSON(w, r, o.text(st))
		case o.csv:
			return text.PackCSV(w, r, o.text(st))
		}
		return text.Pack(w, r, o.text(st))
	})
}
