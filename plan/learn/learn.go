// Package learn finds shortest schedules and proves that none is shorter: a search over the
// bounds of starts that learns a clause from every contradiction (lazy clause generation: Ohrimenko,
// Stuckey and Codish 2009; for scheduling Schutt, Feydy, Stuckey and Wallace 2011). Times are whole
// minutes from the problem's base, or the units of an open instance.
package learn

import (
	"sailby/plan/problem"
)

// Options say how long to search and what is known already. The zero value searches to the end.
type Options struct {
	Ticks int64       // most steps of work; 0: no limit. Equal limits give equal answers
	Stop  func() bool // asked every few milliseconds; true ends the search. nil: never
	Seed  uint64
	Best  int                            // a known finish: only better ones are looked for. 0: none known
	Hint  []int                          // starts of a known plan, taken where nothing else decides; nil: none
	Found func(starts []int, finish int) // called for each better plan; nil: not
}

// Status says what is known at the end of a search.
type Status uint8

// The four outcomes.
const (
	Unknown    Status = iota // stopped before anything was settled
	Feasible                 // a plan, not shown to be the best
	Optimal                  // a plan, and a proof that none is better
	Infeasible               // a proof that there is no plan (none better than Best)
)

// Result is what a search found.
type Result struct {
	Status    Status
	Starts    []int // of the best plan, nil if none was found
	Finish    int   // of that plan; problem.Inf without one
	Bound     int   // no plan finishes before it; problem.Inf if there is none
	Ticks     int64
	Conflicts int64
}

// pollEvery is how many ticks pass between two questions whether to stop: a tick is some 20 ns.
const pollEvery = 100_000

// Solve looks for the plan with the earliest finish.
func Solve(p *problem.Problem, o Options) Result {
	m, ok := build(p)
	if !ok {
		return Result{Status: Infeasible, Finish: problem.Inf, Bound: problem.Inf}
	}
	s := &search{model: m, opt: o}
	return s.minimise()
}
