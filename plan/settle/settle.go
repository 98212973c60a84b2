// Package settle answers the question of a job end to end: a checked plan, a bound that no plan
// beats, a verdict, and what explains them.
package settle

import (
	"context"
	"errors"
	"sync/atomic"
	"time"

	"sailby/plan"
	"sailby/tasks"
	"sailby/tasks/expand"
)

// Options bound the work. The zero value uses the defaults.
type Options struct {
	Trip     string            // a trip by name; "" is the booked one, else the first
	Seed     uint64            // for the search; equal seeds and ticks give equal answers
	Ticks    int64             // starts tried for each basis; 0 is by the size of the job
	Thorough bool              // go on until the plan is proved to be the best, or the context ends
	Only     bool              // likely hours only: no maybes, no high end (for what-if)
	Progress func(text string) // called now and then with what is being done; may be nil

	Found func() // called each time a plan that fits, or a better one, is found; may be nil

	gone  *atomic.Bool       // nobody waits for the answer any more
	early func(*plan.Answer) // told of plans before the answer is whole; may be nil
}

// left says whether the asker has gone away: the rest of the work is for nobody.
func (o Options) left() bool { return o.gone != nil && o.gone.Load() }

// The work done for each basis before the search rests, in starts tried: a small job has its
// verdict within a second, a large one gets more. Where no fitting plan and no proof is found, the
// search goes on for longer.
const (
	leastTicks = 250_000
	ticksEach  = 15_000 // for each step
	mostTicks  = 4_000_000
	longer     = 4
)

// ticks gives the work done for n steps.
func (o Options) ticks(n int) int64 {
	switch {
	case o.Ticks > 0:
		return o.Ticks
	case n <= 120:
		return leastTicks
	}
	return min(mostTicks, ticksEach*int64(n))
}

// Ask settles a job for one window: likely hours, with every maybe, and at the high end.
//
// Errors: tasks.Faults where estimates or the choice of the window show faults in the job file;
// ErrStopped where a large job is cancelled before there is any plan. A cancelled context or
// a deadline otherwise gives the best answer so far, marked as cut short, and no error; after a
// cancel it comes within milliseconds, and what is still running ends by itself.
func Ask(ctx context.Context, job *tasks.Job, o Options) (*plan.Report, error) {
	type result struct {
		rep *plan.Report
		err error
	}
	var sofar atomic.Pointer[plan.Report]
	o.gone = &atomic.Bool{}
	done := make(chan result, 1)
	go func() {
		rep, err := settle(ctx, job, o, &sofar)
		done <- result{rep, err}
	}()
	select {
	case r := <-done:
		return r.rep, r.err
	case <-ctx.Done():
	}
	if !errors.Is(ctx.Err(), context.Canceled) { // a limit: what has been found is worth a moment
		r := <-done
		return r.rep, r.err
	}
	grace := time.NewTimer(patience(len(job.Tasks)))
	defer grace.Stop()
	select {
	case r := <-done:
		return r.rep, r.err
	case <-grace.C:
	}
	o.gone.Store(true)
	if rep := sofar.Load(); rep != nil {
		return rep, nil
	}
	return nil, ErrStopped
}

// ErrStopped says that a job was cancelled before there was any answer.
var ErrStopped = errors.New("stopped before there was an answer")

// patience is how long a cancel waits for the best answer so far: small jobs give it at once, a
// large one is left.
func patience(tasks int) time.Duration {
	if tasks <= 150 {
		return 2 * time.Second
	}
	return 25 * time.Millisecond
}

// settle answers each basis in turn, and leaves in sofar what is whole.
func settle(ctx context.Context, job *tasks.Job, o Options, sofar *atomic.Pointer[plan.Report]) (*plan.Report, error) {
	rep := &plan.Report{Job: job}
	keep := func() {
		whole := *rep
		sofar.Store(&whole)
	}
	likely := expand.Basis{Trip: o.Trip}
	var err error
	o.early = func(a *plan.Answer) { sofar.Store(&plan.Report{Job: job, Likely: a}) }
	if rep.Likely, err = answer(ctx, job, likely, o, true); err != nil {
		return nil, err
	}
	o.early = nil
	if rep.Likely.Verdict == plan.CannotFit {
		rep.LowToo = impossible(ctx, job, expand.Basis{Trip: o.Trip, End: expand.Low}, o)
		if rep.Likely.Proof != nil {
			rep.Likely.Proof.Even = rep.LowToo
		}
	}
	keep()
	if o.Only {
		return rep, nil
	}
	if hasMaybes(job) {
		if rep.Maybes, err = answer(ctx, job, expand.Basis{Trip: o.Trip, Maybes: true}, o, false); err != nil {
			return nil, err
		}
		keep()
	}
	if hasRanges(rep.Likely.Work) {
		if rep.High, err = answer(ctx, job, expand.Basis{Trip: o.Trip, End: expand.High}, o, false); err != nil {
			return nil, err
		}
	}
	return rep, nil
}

func hasMaybes(job *tasks.Job) bool {
	for _, t := range job.Tasks {
		if t.Maybe() || t.Group != "" {
			return true
		}
	}
	return false
}

func hasRanges(w *expand.Work) bool {
	for _, s := range w.Steps {
		if s.Estimate.Range[2] > s.Estimate.Range[1] {
			return true
		}
	}
	return false
}
