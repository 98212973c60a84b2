package main

import (
	"context"
	"fmt"
	"io"

	"github.com/spf13/cobra"

	"sailby/plan"
	"sailby/report/agenda"
	"sailby/report/text"
)

type fitsOptions struct {
	*globals
	json  bool
	proof string
}

func newFits(g *globals, st streams) *cobra.Command {
	o := &fitsOptions{globals: g}
	c := &cobra.Command{
		Use:               "fits JOB",
		Short:             "Whether the work fits the window, by how much, and what governs that",
		Long:              "Says whether the work fits: on likely hours, with every maybe, and at the high end of the hours. The exit\nstatus is 0 if it fits on likely hours, and 3 if that was not shown or a craft is neaped. With --limit the search goes on for so long\nwhere the answer for likely hours is not proved yet.",
		Example:           "  sailby fits slip/job.yaml\n  sailby fits pier/job.yaml --trip \"five days\"",
		Args:              takes(false, "JOB"),
		ValidArgsFunction: jobFiles,
		RunE: func(c *cobra.Command, args []string) error {
			o.thorough = c.Flags().Changed("limit")
			return runFits(c.Context(), o, st, args)
		},
	}
	c.Flags().BoolVar(&o.json, "json", false, "print for machines")
	c.Flags().StringVar(&o.proof, "proof", "", "write why no plan fits, or finishes earlier, to this file, step by step, and have a second program verify it")
	return c
}

func runFits(ctx context.Context, o *fitsOptions, st streams, args []string) error {
	job, err := o.read(args[0])
	if err != nil {
		return err
	}
	r, err := o.ask(ctx, st, job)
	if err != nil {
		return err
	}
	o.lookForWays(ctx, st, args[0], r, o.limit/2)
	write := func(w io.Writer) error { return text.Fits(w, r, text.Options{Width: st.width}) }
	if o.json {
		write = func(w io.Writer) error { return text.FitsJSON(w, r) }
	}
	if err := st.print(write); err != nil {
		return err
	}
	if o.proof != "" {
		if err := o.prove(ctx, st, r.Likely); err != nil {
			return err
		}
	}
	if r.Likely.Verdict != plan.Fits || agenda.Neaped(r.Likely) {
		return errNotShown
	}
	return nil
}

// prove writes the proof of the likely answer and says what came of it; for machines, to standard error.
func (o *fitsOptions) prove(ctx context.Context, st streams, a *plan.Answer) error {
	limited, cancel := context.WithTimeout(ctx, o.limit)
	defer cancel()
	text, err := writeProof(limited, o.proof, a)
	switch {
	case ctx.Err() != nil:
		return errStopped
	case err != nil:
		return err
	case o.json:
		st.say("%s", text)
		return nil
	}
	return st.print(func(w io.Writer) error {
		_, err := fmt.Fprintf(w, "\n%s\n", text)
		return err
	})
}
