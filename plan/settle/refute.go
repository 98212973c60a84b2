package settle

import (
	"context"
	"errors"
	"fmt"
	"io"
	"slices"

	"sailby/plan"
	"sailby/plan/learn"
	"sailby/plan/network"
	"sailby/plan/problem"
	"sailby/plan/proof"
	"sailby/plan/solve"
	"sailby/tasks/hours"
)

// Refutation is what a log has shown when it was replayed.
type Refutation struct {
	Finish  hours.Minute // no plan finishes before it; hours.Far: there is no plan
	Clauses int
	Lemmas  int
}

// Refutation ticks: the search with who does what left out is tried first, for a shorter time.
const (
	relaxedTicks = 40_000_000
	namedTicks   = 200_000_000
)

// ErrNoRefutation says that no refutation was found in the time for it, or that there is nothing to refute.
var ErrNoRefutation = errors.New("no refutation was found")

// ErrReplay is a refutation that the second program has refused.
var ErrReplay = errors.New("the refutation was refused when it was replayed")

// Refute writes to log why no plan fits, if the answer says so, else why no plan finishes before its bound; and has
// the log verified by package proof, which knows nothing of the search. Who does what is left out
// if it can be (R22).
//
// Errors: ErrNoRefutation, wrapped with what was looked for; what log returns; and ErrReplay, where the log was
// refused: a fault of this program.
func Refute(ctx context.Context, a *plan.Answer, log Log) (*Refutation, error) {
	p := problem.Compile(a.Work)
	finish := problem.Inf
	if a.Verdict != plan.CannotFit {
		if a.Bound <= p.Base || a.Bound >= hours.Far {
			return nil, fmt.Errorf("%w: there is no proof and no bound", ErrNoRefutation)
		}
		finish = int(a.Bound-p.Base) - 1
	}
	if err := search(ctx, p, finish, log); err != nil {
		return nil, err
	}
	if _, err := log.Seek(0, io.SeekStart); err != nil {
		return nil, err
	}
	shown, err := proof.Replay(problem.Compile(a.Work), log)
	if err != nil {
		return nil, fmt.Errorf("%w: %w", ErrReplay, err)
	}
	if shown.Finish <= finish && finish < problem.Inf || finish == problem.Inf && shown.Finish < problem.Inf {
		return nil, fmt.Errorf("%w: it shows less than the answer says", ErrReplay)
	}
	out := &Refutation{Finish: hours.Far, Clauses: shown.Clauses, Lemmas: shown.Lemmas}
	if shown.Finish < problem.Inf {
		out.Finish = p.Base + hours.Minute(shown.Finish)
	}
	return out, nil
}

// Log is a file that a refutation is written to and read again from.
type Log interface {
	io.ReadWriteSeeker
	Truncate(size int64) error
}

// search writes a refutation: with who does what left out, else with people named.
func search(ctx context.Context, p *problem.Problem, finish int, log Log) error {
	stop := func() bool { return ctx.Err() != nil }
	busy := tooBusy(p, finish)
	r := learn.Refute(p, finish, false, busy, learn.Options{Ticks: relaxedTicks, Stop: stop, Log: log})
	if r.Status != learn.Infeasible && r.LogErr == nil && allNamed(p) {
		if _, err := log.Seek(0, io.SeekStart); err != nil {
			return err
		}
		if err := log.Truncate(0); err != nil {
			return err
		}
		r = learn.Refute(p, finish, true, nil, learn.Options{Ticks: namedTicks, Stop: stop, Log: log})
	}
	switch {
	case errors.Is(r.LogErr, learn.ErrUnsaid):
		return fmt.Errorf("%w: %w", ErrNoRefutation, r.LogErr)
	case r.LogErr != nil:
		return r.LogErr
	case r.Status != learn.Infeasible:
		return fmt.Errorf("%w in the time for it", ErrNoRefutation)
	}
	return nil
}

// allNamed says whether the problem holds every choice of people.
func allNamed(p *problem.Problem) bool {
	for i := range p.Acts {
		if p.Acts[i].Cut {
			return false
		}
	}
	return true
}

// tooBusy gives the plain reasons of work against hours.
func tooBusy(p *problem.Problem, finish int) []learn.Busy {
	for i := range p.Acts {
		if len(p.Acts[i].Modes) == 0 {
			return nil
		}
	}
	b, conflict := network.Propagate(p, network.Off{})
	if conflict != nil {
		return nil
	}
	loads := slices.DeleteFunc(solve.Loads(p), func(l *solve.Load) bool { // power is weighed there by what can run at once
		return l.People == nil && p.Res[l.Res].Kind == problem.Power
	})
	if o := solve.FindOverload(loads, b); o != nil {
		return []learn.Busy{{People: o.Load.People, Res: o.Load.Res, From: o.From, To: o.To, Acts: o.Acts}}
	}
	if t, why := solve.ContentBound(p, loads, b); why != nil && finish < t {
		return []learn.Busy{{People: why.Load.People, Res: why.Load.Res, From: why.From, To: finish, Acts: why.Acts}}
	}
	return nil
}
