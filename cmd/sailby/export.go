package main

import (
	"bytes"
	"context"
	"errors"
	"fmt"
	"io"
	"slices"

	"github.com/spf13/cobra"

	"sailby/plan"
	"sailby/report/export"
	"sailby/tasks"
)

type exportOptions struct {
	*globals
	which
	to, out, person string
	tasks           bool
}

func newExport(g *globals, st streams) *cobra.Command {
	o := &exportOptions{globals: g}
	c := &cobra.Command{
		Use:               "export JOB --to ics|csv [-o FILE]",
		Short:             "The plan for other programs: a calendar file or a table",
		Long:              "Writes the plan as an iCalendar file (RFC 5545) or as CSV (RFC 4180), one entry for each person's piece of work\nor one for each task. Without -o it is printed.",
		Example:           "  sailby export slip/job.yaml --to ics -o slip.ics\n  sailby export slip/job.yaml --to csv --person Liss",
		Args:              takes(false, "JOB"),
		ValidArgsFunction: jobFiles,
		RunE:              func(c *cobra.Command, args []string) error { return runExport(c.Context(), o, st, args) },
	}
	f := c.Flags()
	f.StringVar(&o.to, "to", "", "ics for a calendar, csv for a table")
	f.StringVarP(&o.out, "out", "o", "", "the file to write")
	f.StringVar(&o.person, "person", "", "only this person's work")
	f.BoolVar(&o.tasks, "tasks", false, "one entry for each task")
	o.which.flags(f)
	_ = c.RegisterFlagCompletionFunc("to", cobra.FixedCompletions([]string{"ics", "csv"}, cobra.ShellCompDirectiveNoFileComp))
	return c
}

func runExport(ctx context.Context, o *exportOptions, st streams, args []string) error {
	write := map[string]func(io.Writer, *plan.Report, export.Options) error{"ics": export.Calendar, "csv": export.CSV}[o.to]
	switch {
	case o.to == "":
		return misuse("--to ics, or --to csv", "nothing says what to export to")
	case write == nil:
		return misuse("--to ics, or --to csv", "there is no export to %q", o.to)
	case o.which.check() != nil:
		return o.which.check()
	}
	job, err := o.read(args[0])
	if err != nil {
		return err
	}
	if err := knownPerson(job, o.person); err != nil {
		return err
	}
	stamp, err := o.moment(job)
	if err != nil {
		return err
	}
	r, err := o.ask(ctx, st, job)
	if err != nil {
		return err
	}
	var b bytes.Buffer
	err = write(&b, r, export.Options{Tasks: o.tasks, Person: o.person, Maybes: o.maybes, End: o.end(), Stamp: stamp})
	switch {
	case errors.Is(err, export.ErrNoPlan):
		return &advice{err, fmt.Sprintf("sailby fits %s, which says why", args[0])}
	case err != nil:
		return err
	case ctx.Err() != nil:
		return errStopped
	case o.out == "":
		return st.print(func(w io.Writer) error { _, err := w.Write(b.Bytes()); return err })
	}
	if err := writeWhole(o.out, b.Bytes()); err != nil {
		return err
	}
	st.say("wrote %s", o.out)
	return nil
}

func knownPerson(job *tasks.Job, name string) error {
	var names []string
	for _, p := range job.People {
		names = append(names, p.Name)
	}
	if name == "" || slices.Contains(names, name) {
		return nil
	}
	hint := fmt.Sprintf("one of %q", names)
	if n := nearest(name, names); n != "" {
		hint = fmt.Sprintf("--person %q", n)
	}
	return misuse(hint, "the job has nobody called %q", name)
}
