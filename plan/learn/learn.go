// Package learn finds shortest schedules and proves that none is shorter: a search over the
// bounds of starts that learns a clause from every contradiction (lazy clause generation: Ohrimenko,
// Stuckey and Codish 2009; for scheduling Schutt, Feydy, Stuckey and Wallace 2011). Times are whole
// minutes from the problem's base, or the units of an open instance.
package learn

import (
	"io"

	"sailby/plan/problem"
)

// Options say how long to search and what is known already. The zero value searches to the end.
type Options struct {
	Ticks int64       // most steps of work; 0: no limit. Equal limits give equal answers
	Stop  func() bool // asked every few milliseconds; true ends the search. nil: never
	Seed  uint64
	Best  int                            // a known finish: only better ones are looked for. 0: none known
	Hint  []int                          // starts of a known plan, where the search begins; nil: none
	Modes []int                          // its modes; nil: not known
	Found func(starts []int, finish int) // called for each better plan; nil: not
	Log   io.Writer                      // gets the refutation for plan/proof to replay; nil: nobody wants it
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
	Starts    []int  // of the best plan, nil if none was found
	Modes     []int  // of the best plan
	Watches   []Kept // the fire watches of the best plan, by activity and time
	Exact     bool   // nothing was left out: the plan obeys the whole problem
	Finish    int    // of that plan; problem.Inf without one
	Bound     int    // no plan finishes before it; problem.Inf if there is none
	Ticks     int64
	Conflicts int64
	LogErr    error // why Log is no good
}

// Kept is a fire watch after a piece of activity Act, kept by person Who.
type Kept struct{ Act, From, To, Who int }

// pollEvery is how many ticks pass between two questions whether to stop: a tick is some 20 ns.
const pollEvery = 100_000

// Solve looks for the plan with the earliest finish of the site activities (of all, where none
// is at the site), with named people. What the model leaves out can only make plans worse:
// a bound and an Infeasible hold for the problem as it is, and Exact says whether the plan does.
func Solve(p *problem.Problem, o Options) Result {
	log := newRecord(o.Log)
	m, ok := buildFor(p, named, log)
	if !ok {
		return log.close(none())
	}
	s := &search{model: m, opt: o, people: !m.plain}
	r := s.minimise()
	r.Exact = m.exact()
	return log.close(r)
}

// Relax looks for the earliest finish with who does what left out: of a set of people who can do
// some work only their number counts, and every activity takes the kindest of its timings. Its Bound
// holds for the problem, its Starts are no plan.
func Relax(p *problem.Problem, o Options) Result {
	log := newRecord(o.Log)
	m, ok := buildFor(p, relaxed, log)
	if !ok {
		return log.close(none())
	}
	s := &search{model: m, opt: o}
	return log.close(s.minimise())
}

// Within asks the same of one finish only: Infeasible is a proof that no plan finishes by then,
// Feasible that the relaxed problem has a solution that does.
func Within(p *problem.Problem, finish int, o Options) Result {
	log := newRecord(o.Log)
	m, ok := buildFor(p, relaxed, log)
	if !ok || finish < 0 {
		return log.close(none())
	}
	o.Best = min(finish, p.End) + 1
	s := &search{model: m, opt: o, once: true}
	return log.close(s.minimise())
}

func none() Result {
	return Result{Status: Infeasible, Finish: problem.Inf, Bound: problem.Inf}
}

// exact says whether the model leaves out nothing of the problem: a fire watch of a mode that is
// longer than that of another, or that nobody is named for, is counted short.
func (m *model) exact() bool {
	for i := range m.p.Acts {
		a := &m.p.Acts[i]
		for k := range a.Modes {
			if w := a.Modes[k].Time.Watch(); w > 0 && (int32(w) != m.acts[i].watch || len(a.Modes[k].Keepers) == 0) {
				return false
			}
		}
	}
	return true
}
