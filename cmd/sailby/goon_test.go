package main

import (
	"context"
	"testing"
	"time"

	"sailby/plan"
	"sailby/plan/settle"
	"sailby/tasks/hours"
	"sailby/tasks/jobfile"
)

func TestBetterAnswers(t *testing.T) {
	at := func(v plan.Verdict, finish, bound int, best bool) *plan.Answer {
		a := &plan.Answer{Verdict: v, Best: best}
		a.Finish, a.Bound = hours.Minute(finish), hours.Minute(bound)
		return a
	}
	open := at(plan.Fits, 100, 80, false)
	for _, tc := range []struct {
		what string
		a, b *plan.Answer
		want bool
	}{
		{"an earlier finish", at(plan.Fits, 90, 80, false), open, true},
		{"a later finish with a better bound", at(plan.Fits, 110, 90, false), open, false},
		{"a better bound", at(plan.Fits, 100, 90, false), open, true},
		{"the same", at(plan.Fits, 100, 80, false), open, false},
		{"proved to be the best", at(plan.Fits, 100, 100, true), open, true},
		{"no verdict any more", at(plan.Unsettled, 0, 80, false), open, false},
		{"a verdict at last", at(plan.CannotFit, 0, 0, false), at(plan.Unsettled, 0, 70, false), true},
		{"a better bound, no verdict", at(plan.Unsettled, 0, 80, false), at(plan.Unsettled, 0, 70, false), true},
	} {
		if got := better(tc.a, tc.b); got != tc.want {
			t.Errorf("%s: better %v", tc.what, got)
		}
	}
}

// A search that is given its time keeps an answer that is proved, and betters one that is not.
func TestGoingOn(t *testing.T) {
	job, err := jobfile.Read("../../testdata/jobs/tarskay/job.yaml")
	if err != nil {
		t.Fatal(err)
	}
	g := &globals{thorough: true, limit: time.Minute}
	whole, err := settle.Ask(t.Context(), job, g.options(true, nil))
	if err != nil {
		t.Fatal(err)
	}
	if open(whole.Likely) {
		t.Fatal("the demo is not settled by the usual search, so that nothing is shown here")
	}
	before := whole.Likely
	g.goOn(t.Context(), job, whole, nil)
	if whole.Likely != before {
		t.Error("a proved answer was asked again")
	}
	r := &plan.Report{Job: job, Likely: &plan.Answer{Verdict: plan.Unsettled, Work: before.Work}}
	gone, cancel := context.WithCancel(t.Context())
	cancel()
	if g.goOn(gone, job, r, nil); r.Likely.Verdict != plan.Unsettled {
		t.Error("it went on without any time left")
	}
	if g.goOn(t.Context(), job, r, nil); r.Likely.Verdict != before.Verdict || r.Likely.Finish != before.Finish {
		t.Errorf("going on gave verdict %v, finish %v; the search gives %v, %v", r.Likely.Verdict, r.Likely.Finish, before.Verdict, before.Finish)
	}
}
