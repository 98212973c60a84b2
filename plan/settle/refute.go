package settle

import (
	"context"
	"errors"
	"fmt"
	"io"

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

// refuteTicks bounds the search for a refutation: some seconds.
const refuteTicks = 120_000_000

// ErrNoRefutation says that no refutation was found: the answer may rest on who does what, which is not told to logs,
// or the search was too long.
var ErrNoRefutation = errors.New("no refutation was found")

// Refute writes to log why no plan fits, if the answer says so, else why no plan finishes before its bound, with who
// does what left out (R22); and has the log verified by package proof, which knows nothing of the search.
//
// Errors: ErrNoRefutation, wrapped with what was looked for; what log returns; and ErrReplay, where the log was
// refused: a fault of this program.
func Refute(ctx context.Context, a *plan.Answer, log io.ReadWriteSeeker) (*Refutation, error) {
	p := problem.Compile(a.Work)
	finish := problem.Inf
	if a.Verdict != plan.CannotFit {
		if a.Bound <= p.Base || a.Bound >= hours.Far {
			return nil, fmt.Errorf("%w: there is no proof and no bound", ErrNoRefutation)
		}
		finish = int(a.Bound-p.Base) - 1
	}
	stop := func() bool { return ctx.Err() != nil }
	r := learn.Refute(p, finish, tooBusy(p, finish), learn.Options{Ticks: refuteTicks, Stop: stop, Log: log})
	switch {
	case r.LogErr != nil:
		return nil, r.LogErr
	case r.Status != learn.Infeasible && finish < problem.Inf:
		return nil, fmt.Errorf("%w for a finish before %s, with who does what left out", ErrNoRefutation, a.Bound.In(a.Work.Window.Place.Zone).Format("Mon 2 Jan 15:04"))
	case r.Status != learn.Infeasible:
		return nil, fmt.Errorf("%w, with who does what left out", ErrNoRefutation)
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

// ErrReplay is a refutation that the second program has refused.
var ErrReplay = errors.New("the refutation was refused when it was replayed")

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
	loads := solve.Loads(p)
	if o := solve.FindOverload(loads, b); o != nil {
		return []learn.Busy{{People: o.Load.People, Res: o.Load.Res, From: o.From, To: o.To, Acts: o.Acts}}
	}
	if t, why := solve.ContentBound(p, loads, b); why != nil && finish < t {
		return []learn.Busy{{People: why.Load.People, Res: why.Load.Res, From: why.From, To: finish, Acts: why.Acts}}
	}
	return nil
}
