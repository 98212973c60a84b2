package main

import (
	"context"
	"io"
	"time"

	"github.com/spf13/cobra"

	"sailby/plan"
	"sailby/plan/ways"
	"sailby/report/text"
	"sailby/tasks"
	"sailby/tasks/jobfile"
)

type waysOptions struct {
	*globals
	json bool
}

func newWays(g *globals, st streams) *cobra.Command {
	o := &waysOptions{globals: g}
	c := &cobra.Command{
		Use:   "ways JOB",
		Short: "What would make it fit: single changes, each with the least amount that is enough",
		Long: "For work that was not shown to fit: every limit that the proof rests on is given way to by itself, the job\n" +
			"read and planned with that, and the least amount found with which it fits. What keeps people safe, what a\n" +
			"material needs and what must come before what are never offered. The exit status is that of fits.",
		Example:           "  sailby ways slip/job.yaml\n  sailby ways pier/job.yaml --trip \"seven days\"",
		Args:              takes(false, "JOB"),
		ValidArgsFunction: jobFiles,
		RunE:              func(c *cobra.Command, args []string) error { return runWays(c.Context(), o, st, args) },
	}
	c.Flags().BoolVar(&o.json, "json", false, "print for machines, as fits --json does")
	return c
}

func runWays(ctx context.Context, o *waysOptions, st streams, args []string) error {
	job, err := o.read(args[0])
	if err != nil {
		return err
	}
	r, err := o.ask(ctx, st, job)
	if err != nil {
		return err
	}
	o.lookForWays(ctx, st, args[0], r, o.limit)
	write := func(w io.Writer) error { return text.Ways(w, r, text.Options{Width: st.width}) }
	if o.json {
		write = func(w io.Writer) error { return text.FitsJSON(w, r) }
	}
	if err := st.print(write); err != nil {
		return err
	}
	if r.Likely.Verdict != plan.Fits {
		return errNotShown
	}
	return nil
}

// lookForWays adds to a report what would make its job fit, within a limit.
func (g *globals) lookForWays(ctx context.Context, st streams, path string, r *plan.Report, limit time.Duration) {
	if r.Likely.Verdict == plan.Fits || ctx.Err() != nil {
		return
	}
	show, done := st.progress()
	defer done()
	limited, cancel := context.WithTimeout(ctx, limit)
	defer cancel()
	r.Ways = ways.Find(limited, r.Job, r.Likely, ways.Options{Trip: g.trip, Seed: g.seed, Progress: show, Read: g.rereader(path, r.Job)})
}

// rereader reads the job again with changes, those that were asked for with it first.
func (g *globals) rereader(path string, job *tasks.Job) func(sets []tasks.Setting) (*tasks.Job, error) {
	var with []tasks.Setting
	for _, want := range g.with {
		for _, c := range job.Changes {
			if c.Name == want {
				with = append(with, c.Sets...)
			}
		}
	}
	return func(sets []tasks.Setting) (*tasks.Job, error) {
		return jobfile.ReadChanged(jobPath(path), append(append([]tasks.Setting(nil), with...), sets...))
	}
}
