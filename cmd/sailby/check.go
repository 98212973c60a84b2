package main

import (
	"context"
	"encoding/json"
	"errors"
	"fmt"
	"io"
	"slices"

	"github.com/spf13/cobra"

	"sailby/plan/settle"
	"sailby/report/agenda"
	"sailby/report/clean"
	"sailby/tasks"
	"sailby/tasks/expand"
)

type checkOptions struct {
	*globals
	json bool
}

func newCheck(g *globals, st streams) *cobra.Command {
	o := &checkOptions{globals: g}
	c := &cobra.Command{
		Use:               "check JOB",
		Short:             "Every fault of the job file, with its place and a way out",
		Long:              "Reads the whole job file, works out the hours of every task for every trip, and prints every fault at once\nwith its line and column and a way out, then notes on what is no fault.",
		Example:           "  sailby check slip/job.yaml",
		Args:              takes(false, "JOB"),
		ValidArgsFunction: jobFiles,
		RunE:              func(c *cobra.Command, args []string) error { return runCheck(c.Context(), o, st, args) },
	}
	c.Flags().BoolVar(&o.json, "json", false, "print for machines")
	return c
}

func runCheck(ctx context.Context, o *checkOptions, st streams, args []string) error {
	job, err := o.read(args[0])
	var faults tasks.Faults
	var notes []tasks.Note
	switch {
	case errors.As(err, &faults):
	case err != nil:
		return err
	default:
		faults, notes = everyTrip(ctx, job, o.trip)
		notes = append(slices.Clone(job.Notes), notes...)
	}
	if ctx.Err() != nil {
		return errStopped
	}
	write := func(w io.Writer) error { return checkText(w, job, faults, notes) }
	if o.json {
		write = func(w io.Writer) error { return checkJSON(w, jobPath(args[0]), faults, notes) }
	}
	if err := st.print(write); err != nil {
		return err
	}
	if len(faults) == 0 {
		return nil
	}
	st.say("%s", counted(len(faults), "fault"))
	return errTold
}

// everyTrip gives the faults that only the hours and the choice of a window show, and what the
// estimates have to say beside them, each note once.
func everyTrip(ctx context.Context, job *tasks.Job, trip string) (tasks.Faults, []tasks.Note) {
	names := []string{trip}
	if trip == "" {
		for i, t := range job.Trips {
			if i == 0 {
				names = nil
			}
			names = append(names, t.Name)
		}
	}
	var out tasks.Faults
	var notes []tasks.Note
	for _, name := range names {
		for _, b := range []expand.Basis{{Trip: name}, {Trip: name, Maybes: true}} {
			if ctx.Err() != nil {
				return nil, nil
			}
			out = append(out, settle.Faults(job, b)...)
			work, _ := expand.Expand(job, b)
			if work == nil {
				continue
			}
			for _, n := range work.Notes {
				if !slices.Contains(notes, n) {
					notes = append(notes, n)
				}
			}
		}
	}
	return out.Sorted(), notes
}

func checkText(w io.Writer, job *tasks.Job, faults tasks.Faults, notes []tasks.Note) error {
	for _, f := range faults {
		tell(w, f.Error())
	}
	if job == nil {
		return nil
	}
	for _, n := range notes {
		at := agenda.At(n.Pos)
		if at != "" {
			at += ": "
		}
		tell(w, at+"note: "+n.Text)
	}
	if len(faults) > 0 {
		return nil
	}
	_, err := fmt.Fprintf(w, "%s: no fault; %s, %s, %s\n", clean.Line(job.File), counted(len(job.Tasks), "task"),
		counted(len(job.People), "name")+" under people", counted(len(job.Places), "place"))
	return err
}

func counted(n int, what string) string {
	if n == 1 {
		return "1 " + what
	}
	return fmt.Sprintf("%d %ss", n, what)
}

type faultForm struct {
	File string `json:"file"`
	Line int    `json:"line"`
	Col  int    `json:"column"`
	Text string `json:"text"`
	Hint string `json:"try,omitempty"`
}

type checkForm struct {
	File   string      `json:"file"`
	Faults []faultForm `json:"faults"`
	Notes  []faultForm `json:"notes"`
}

func checkJSON(w io.Writer, file string, faults tasks.Faults, notes []tasks.Note) error {
	f := checkForm{File: file, Faults: []faultForm{}, Notes: []faultForm{}}
	for _, x := range faults {
		f.Faults = append(f.Faults, faultForm{x.Pos.File, x.Pos.Line, x.Pos.Col, clean.Line(x.Text), clean.Line(x.Hint)})
	}
	for _, n := range notes {
		f.Notes = append(f.Notes, faultForm{File: n.Pos.File, Line: n.Pos.Line, Col: n.Pos.Col, Text: clean.Line(n.Text)})
	}
	e := json.NewEncoder(w)
	e.SetEscapeHTML(false)
	e.SetIndent("", "  ")
	return e.Encode(f)
}
