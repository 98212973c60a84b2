package main

import (
	"context"
	"errors"
	"fmt"
	"io"
	"os"

	"github.com/gdamore/tcell/v2"
	"github.com/spf13/cobra"

	"sailby/plan"
	"sailby/plan/ways"
	"sailby/report/screen"
	"sailby/tasks"
	"sailby/tasks/jobfile"
)

type browseOptions struct {
	*globals
	screen tcell.Screen // for tests; nil is the terminal
}

func newBrowse(g *globals, st streams) *cobra.Command {
	o := &browseOptions{globals: g}
	return &cobra.Command{
		Use:               "browse JOB",
		Short:             "Look at the plan in the terminal, and try what if",
		Long:              "Shows the plan on the terminal: the window, the days, the tasks, what governs the finish, and what-if. The keys\nstand on the screen; Esc always goes back. The job file is not written to.",
		Example:           "  sailby browse slip/job.yaml",
		Args:              takes(false, "JOB"),
		ValidArgsFunction: jobFiles,
		RunE:              func(c *cobra.Command, args []string) error { return runBrowse(c.Context(), o, st, args) },
	}
}

func runBrowse(ctx context.Context, o *browseOptions, st streams, args []string) error {
	noTerminal := fmt.Sprintf("sailby fits %s and sailby days %s, which print the same as text", args[0], args[0])
	if !st.outTerm && o.screen == nil {
		return &advice{errors.New("browse draws on a terminal, and this is none"), noTerminal}
	}
	job, err := o.read(args[0])
	if err != nil {
		return err
	}
	r, err := o.ask(ctx, st, job)
	if err != nil {
		return err
	}
	p := &planner{globals: o.globals, path: jobPath(args[0])}
	tried, err := screen.Run(ctx, r, p, screen.Options{Screen: o.screen, NoColour: os.Getenv("NO_COLOR") != ""})
	if errors.Is(err, screen.ErrNoTerminal) {
		return &advice{screen.ErrNoTerminal, noTerminal}
	}
	if err != nil {
		return err
	}
	return st.print(func(w io.Writer) error {
		if len(tried) > 0 {
			fmt.Fprintf(w, "tried, and not written to %s:\n", p.path)
		}
		for _, t := range tried {
			tell(w, "  "+t)
		}
		return nil
	})
}

// planner plans the job of a file again with some of its values replaced; the file stays as it is.
type planner struct {
	*globals
	path string
}

// Ways looks for what would make the job of a report fit.
func (p *planner) Ways(ctx context.Context, r *plan.Report) *plan.Ways {
	ctx, cancel := context.WithTimeout(ctx, p.limit)
	defer cancel()
	return ways.Find(ctx, r.Job, r.Likely, ways.Options{Trip: p.trip, Seed: p.seed, Read: p.rereader(p.path, r.Job)})
}

// Replan gives the plan on likely hours.
func (p *planner) Replan(ctx context.Context, sets []tasks.Setting) (*plan.Report, error) {
	return p.ReplanTelling(ctx, sets, nil)
}

// ReplanTelling is Replan with progress told.
func (p *planner) ReplanTelling(ctx context.Context, sets []tasks.Setting, tell func(string)) (*plan.Report, error) {
	job, err := jobfile.ReadChanged(p.path, sets)
	if err != nil {
		return nil, err
	}
	ctx, cancel := context.WithTimeout(ctx, p.limit)
	defer cancel()
	return p.settle(ctx, job, p.options(true, tell))
}
