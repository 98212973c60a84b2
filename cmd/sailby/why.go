package main

import (
	"context"
	"errors"
	"fmt"
	"io"
	"slices"
	"strconv"
	"strings"

	"github.com/spf13/cobra"

	"sailby/plan"
	"sailby/report/clean"
	"sailby/report/text"
	"sailby/tasks"
	"sailby/tasks/jobfile"
)

type whyOptions struct {
	*globals
	which
	json bool
}

func newWhy(g *globals, st streams) *cobra.Command {
	o := &whyOptions{globals: g}
	c := &cobra.Command{
		Use:               "why JOB TASK",
		Short:             "What sets a task's dates and hours, back to the lines of the job file and the sources",
		Long:              "Prints what sets the dates of a task, its leeway and who shares it, and its hours with every number they\nwere made from. TASK is its name in the job file, or a word that only its name holds. \"way 2\" tells of the second line of\n`sailby ways` what it changes and what was tried above and below.",
		Example:           "  sailby why slip/job.yaml \"weld new plates\"\n  sailby why slip/job.yaml prime",
		Args:              takes(true, "JOB", "TASK"),
		ValidArgsFunction: taskNames,
		RunE:              func(c *cobra.Command, args []string) error { return runWhy(c.Context(), o, st, args) },
	}
	o.which.flags(c.Flags())
	c.Flags().BoolVar(&o.json, "json", false, "print for machines")
	return c
}

func runWhy(ctx context.Context, o *whyOptions, st streams, args []string) error {
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
	task := strings.Join(args[1:], " ")
	if n, ok := wayNumber(job, task); ok {
		return runWhyWay(ctx, o, st, args[0], r, n)
	}
	write := func(w io.Writer) error { return text.Why(w, r, task, o.text(st)) }
	if o.json {
		write = func(w io.Writer) error { return text.WhyJSON(w, r, task, o.text(st)) }
	}
	err = st.print(write)
	var unknown *text.UnknownTask
	if errors.As(err, &unknown) {
		hint := "sailby days " + args[0] + ", which lists the tasks"
		if len(unknown.Near) > 0 {
			hint = fmt.Sprintf("sailby why %s %q", args[0], unknown.Near[0])
		}
		return misuse(clean.Line(hint), "%s", unknown.Error())
	}
	return err
}

// wayNumber gives the number of "way 2", unless a task has that name.
func wayNumber(job *tasks.Job, word string) (int, bool) {
	text, ok := strings.CutPrefix(strings.TrimSpace(word), "way ")
	n, err := strconv.Atoi(strings.TrimSpace(text))
	named := slices.ContainsFunc(job.Tasks, func(t *tasks.Task) bool { return t.Name == word })
	return n, ok && err == nil && !named
}

// runWhyWay tells where a way comes from.
func runWhyWay(ctx context.Context, o *whyOptions, st streams, path string, r *plan.Report, n int) error {
	o.lookForWays(ctx, st, path, r, o.limit)
	write := func(w io.Writer) error { return text.WhyWay(w, r, n, o.text(st)) }
	if o.json {
		write = func(w io.Writer) error { return text.FitsJSON(w, r) }
	}
	err := st.print(write)
	var unknown *text.UnknownWay
	if errors.As(err, &unknown) {
		return misuse(clean.Line("sailby ways "+path), "%s", unknown.Error())
	}
	return err
}

// taskNames gives the shell the job files, then the names of the tasks of the one chosen.
func taskNames(c *cobra.Command, args []string, word string) ([]string, cobra.ShellCompDirective) {
	if len(args) == 0 {
		return jobFiles(c, args, word)
	}
	job, err := jobfile.Read(jobPath(args[0]))
	if err != nil || len(args) > 1 {
		return nil, cobra.ShellCompDirectiveNoFileComp
	}
	var out []string
	for _, t := range job.Tasks {
		if strings.HasPrefix(t.Name, word) {
			out = append(out, t.Name)
		}
	}
	return out, cobra.ShellCompDirectiveNoFileComp
}
