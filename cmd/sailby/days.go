package main

import (
	"context"
	"io"

	"github.com/spf13/cobra"

	"sailby/report/text"
)

type daysOptions struct {
	*globals
	which
	json bool
}

func newDays(g *globals, st streams) *cobra.Command {
	o := &daysOptions{globals: g}
	c := &cobra.Command{
		Use:               "days JOB",
		Short:             "The plan, day by day and person by person",
		Example:           "  sailby days slip/job.yaml\n  sailby days slip/job.yaml --maybes",
		Args:              takes(false, "JOB"),
		ValidArgsFunction: jobFiles,
		RunE:              func(c *cobra.Command, args []string) error { return runDays(c.Context(), o, st, args) },
	}
	o.which.flags(c.Flags())
	c.Flags().BoolVar(&o.json, "json", false, "print for machines")
	return c
}

func runDays(ctx context.Context, o *daysOptions, st streams, args []string) error {
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
	if o.json {
		return st.print(func(w io.Writer) error { return text.DaysJSON(w, r, o.text(st)) })
	}
	return st.print(func(w io.Writer) error { return text.Days(w, r, o.text(st)) })
}
