package settle

import (
	"context"

	"sailby/plan"
	"sailby/plan/problem"
	"sailby/plan/solve"
	"sailby/tasks"
	"sailby/tasks/expand"
)

// The work of one trial: enough to find a plan or a proof for nearly all jobs of the size that ways are asked for.
const (
	trialTicks    = 150_000
	trialLearning = 8_000_000
)

// Try asks only whether a job fits on likely hours: the first plan that fits is taken, and no late one looked for. Why says
// whether a proof by search is to name its limits; others do not. Errors as for Ask. A cancel gives an answer that is cut
// short.
func Try(ctx context.Context, job *tasks.Job, o Options, why bool) (*plan.Answer, error) {
	a, err := ask(ctx, job, expand.Basis{Trip: o.Trip}, o)
	if err != nil {
		return nil, err
	}
	a.plain, a.once = true, true
	a.prove()
	a.plain = !why
	if a.out.Proof == nil && !a.stop() {
		if err := a.first(); err != nil {
			return nil, err
		}
	}
	a.out.CutShort = a.stop()
	a.verdict()
	return a.out, nil
}

// first looks for a plan that fits, or for a proof by search.
func (a *asked) first() error {
	carry := problem.Compile(a.work.Carry())
	o := solve.Options{Ticks: trialTicks, Stop: a.stop, Quit: a.o.left, Seed: a.o.Seed, Good: func(s solve.Score) bool { return s.Late == 0 }}
	for _, p := range []*problem.Problem{carry, a.p} { // with the window as it is, home work may follow the site's
		b, ok := undated(p)
		if !ok {
			continue
		}
		a.carry = p
		r := solve.Find(p, b, o)
		a.out.Steps += r.Ticks
		if r.Best != nil && r.Best.Score.Late == 0 {
			return a.keep(r.Best, false)
		}
		if p == carry && !a.homeAfter() {
			break
		}
	}
	a.carry = carry
	if _, ok := undated(carry); !ok {
		a.carry = a.p
	}
	if a.o.Ticks = trialTicks; a.stop() {
		return nil
	}
	if best := a.learning(nil, 1); best != nil && best.Score.Late == 0 {
		return a.keep(best, false)
	}
	return nil
}
