// Package settle answers the question of a job end to end: a checked plan, a bound that no plan
// beats, a verdict, and what explains them.
package settle

import (
	"context"

	"sailby/plan"
	"sailby/tasks"
)

// Options bound the work. The zero value uses the defaults.
type Options struct {
	Trip  string                // a trip by name; "" is the booked one, else the first
	Seed  uint64                // for the search; equal seeds and ticks give equal answers
	Ticks int64                 // starts tried for each basis; 0 is the default of 400,000
	Only  bool                  // likely hours only: no maybes, no high end (for what-if)
	Progress func(text string)  // called now and then with what is being done; may be nil
}

// Ask settles a job for one window: likely hours, with every maybe, and at the high end.
//
// Errors: tasks.Faults where estimates or the choice of the window show faults in the job file.
// A cancelled context or a deadline gives the best answer so far, marked as cut short, and no error.
func Ask(ctx context.Context, job *tasks.Job, o Options) (*plan.Report, error) {
	return nil, nil
}
