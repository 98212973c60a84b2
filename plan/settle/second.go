package settle

import (
	"sailby/plan/learn"
	"sailby/plan/problem"
	"sailby/plan/solve"
)

// secondTicks is the work of the learning search for one question of the second aim.
const secondTicks = 1_500_000

// second looks for a plan with the same finish, or an earlier one, that has more time in hand at the tightest of the
// deadlines other than the window (R19), by halves: every deadline is moved earlier by as much, and a plan asked
// for. It says in the answer whether no more is possible. The first aim is never traded: the finish is a limit.
func (a *asked) second(best *solve.Schedule) *solve.Schedule {
	if best == nil || best.Score.Late > 0 || a.out.Proof != nil || a.stop() || len(a.bounds.Finish) < len(a.p.Acts) {
		return best
	}
	if a.carry != a.p && a.carry.Work.Trip != a.work.Trip {
		return best
	}
	dated, most := false, problem.Inf
	for i := range a.p.Acts {
		if act := &a.p.Acts[i]; a.hasDate(act) {
			dated = true
			most = min(most, act.By-a.bounds.Finish[i])
		}
	}
	if !dated {
		return best
	}
	a.say("time in hand")
	have, shown := -best.Score.Hand, !a.choicesLeftOut()
	for have < most && !a.stop() {
		more := have + (most-have+1)/2
		found, none := a.withHand(best, more)
		switch {
		case found != nil:
			best, have = found, -found.Score.Hand
		case none:
			most = more - 1
		default:
			shown, most = false, more-1
		}
	}
	a.out.HandBest = shown && have >= most && !a.stop()
	return best
}

// hasDate says whether an activity has a deadline other than the window's close, as the score counts them.
func (a *asked) hasDate(act *problem.Act) bool { return act.By < problem.Inf && act.By != a.p.Close }

// withHand asks for a plan that finishes no later than best with so many minutes in hand at every deadline; none says that
// there is no such plan.
func (a *asked) withHand(best *solve.Schedule, hand int) (found *solve.Schedule, none bool) {
	q := *a.p
	q.Acts = append([]problem.Act(nil), a.p.Acts...)
	for i := range q.Acts {
		if act := &q.Acts[i]; a.hasDate(act) {
			if act.By -= hand; act.By < 0 {
				return nil, true
			}
		}
	}
	got := false
	o := learn.Options{Ticks: secondTicks, Seed: a.o.Seed, Best: best.Score.Finish + 1, Hint: best.Start, Modes: best.Mode,
		Found: func([]int, int) { got = true }, Stop: func() bool { return got || a.stop() }}
	if a.o.Ticks > 0 {
		o.Ticks = min(o.Ticks, 8*a.o.Ticks)
	}
	r := learn.Solve(&q, o)
	a.out.Steps += r.Ticks
	if r.Starts == nil {
		return nil, r.Status == learn.Infeasible && !a.choicesLeftOut()
	}
	if !r.Exact {
		return nil, false
	}
	s := solve.Restore(a.carry, r.Starts, r.Modes, keptWatches(a.carry, r.Watches))
	if s == nil || s.Score.Late > 0 || s.Score.Finish > best.Score.Finish || -s.Score.Hand < hand {
		return nil, false
	}
	return s, false
}
