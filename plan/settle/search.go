package settle

import (
	"fmt"
	"slices"
	"strings"

	"sailby/plan"
	"sailby/plan/learn"
	"sailby/plan/problem"
	"sailby/plan/solve"
	"sailby/tasks"
	"sailby/tasks/expand"
)

// The work of the learning search, in its own ticks: quick is a share of a second, enough
// to close most jobs (less beside the likely hours); thorough is for those that neither plan nor proof has settled. Each trial
// of a contradiction's member is bounded by a number of conflicts.
const (
	quickLearning    = 6_000_000
	besideLearning   = 2_000_000
	thoroughLearning = 40_000_000
	memberConflicts  = 2_000
)

const bySearch = "the search has shown that what follows cannot all hold"

const searched = "the search has shown that no plan does, whoever works"

// learning asks the learning search for what generation and bounds have left open: a plan that
// fits, a better one, a proof that none is better, or that none fits. It works so many times as long as usual.
func (a *asked) learning(best *solve.Schedule, times int64) *solve.Schedule {
	if a.out.Proof != nil || a.stop() {
		return best
	}
	fits := best != nil && best.Score.Late == 0
	if fits && a.at(best.Score.Finish) <= a.out.Bound {
		return best
	}
	a.say("proofs")
	o := learn.Options{Ticks: quickLearning, Stop: a.stop, Seed: a.o.Seed}
	if a.work.Basis.Maybes || a.work.Basis.End != expand.Likely {
		o.Ticks = besideLearning
	}
	if !fits {
		o.Ticks = thoroughLearning
	}
	if a.o.Ticks > 0 {
		o.Ticks = min(o.Ticks, 8*a.o.Ticks)
	}
	o.Ticks *= times
	if fits {
		o.Best, o.Hint, o.Modes = best.Score.Finish, best.Start, a.modes(best)
	}
	got := false
	o.Found = func([]int, int) { got = true; a.found() }
	if a.once {
		o.Stop = func() bool { return got || a.stop() }
	}
	r := learn.Solve(a.p, o)
	a.out.Steps += r.Ticks
	if a.choicesLeftOut() { // then it knows too little to prove anything
		r.Bound = problem.Inf
		if r.Status == learn.Infeasible {
			return best
		}
	}
	switch {
	case r.Status == learn.Infeasible && !fits && a.plain:
		a.out.Proof = &plan.Proof{Kind: plan.BySearch, Summary: bySearch}
		return best
	case r.Status == learn.Infeasible && !fits:
		a.out.Proof = a.contradiction(o)
		if late := learn.Relax(a.p, o); a.out.Proof != nil && len(a.out.Proof.Lines) == 0 && late.Status != learn.Infeasible {
			a.out.Proof = nil // shown only with people named one by one: too little for a proof (R22)
		}
		return best
	case r.Status == learn.Infeasible:
		a.out.Bound = a.at(best.Score.Finish)
		a.out.BoundWhy = searched
		return best
	case r.Bound < problem.Inf && a.at(r.Bound) > a.out.Bound:
		a.out.Bound = a.at(r.Bound)
		a.out.BoundWhy = searched
	}
	if r.Starts == nil || !r.Exact {
		return best
	}
	found := solve.Restore(a.carry, r.Starts, r.Modes, keptWatches(a.carry, r.Watches))
	switch {
	case found == nil, best != nil && found.Score.Compare(best.Score, false) >= 0 && (found.Score.Late > 0 || a.at(found.Score.Finish) > a.out.Bound):
		return best
	}
	return found
}

// modes gives the choices of people of a schedule in the problem of the window as it is; nil where one
// of them is none there.
func (a *asked) modes(s *solve.Schedule) []int {
	out := make([]int, len(s.Mode))
	for i, m := range s.Mode {
		old := &a.carry.Acts[i].Modes[m]
		out[i] = slices.IndexFunc(a.p.Acts[i].Modes, func(x problem.Mode) bool {
			return slices.Equal(x.Crew, old.Crew) && slices.Equal(x.Relief, old.Relief)
		})
		if out[i] < 0 {
			return nil
		}
	}
	return out
}

// choicesLeftOut says whether some step has more choices of people than the problem holds.
func (a *asked) choicesLeftOut() bool {
	for i := range a.p.Acts {
		if a.p.Acts[i].Cut {
			return true
		}
	}
	return false
}

func keptWatches(p *problem.Problem, kept []learn.Kept) [][]solve.Watch {
	out := make([][]solve.Watch, len(p.Acts))
	for _, k := range kept {
		out[k.Act] = append(out[k.Act], solve.Watch{From: k.From, To: k.To, Who: k.Who})
	}
	return out
}

// contradiction writes the set of limits that the search has shown cannot all hold.
func (a *asked) contradiction(o learn.Options) *plan.Proof {
	p := &plan.Proof{Kind: plan.BySearch,
		Summary: bySearch}
	a.say("what the proof needs")
	var acts []int
	for _, l := range learn.Contradiction(a.p, memberConflicts, o) {
		text, pos := a.limit(l)
		p.Lines = append(p.Lines, plan.ProofLine{Text: text, Pos: pos, Needed: l.Needed})
		acts = append(acts, a.bearsOn(l)...)
	}
	if len(acts) > 0 {
		a.members(p, acts, nil)
	}
	if len(p.Lines) == 0 {
		p.Summary = "the search has gone through every order of the work and found none that meets the window and the deadlines; a smaller reason was not found in the time allowed"
	}
	return p
}

// bearsOn gives the activities that a limit bears on.
func (a *asked) bearsOn(l learn.Limit) (out []int) {
	p := a.p
	switch l.Kind {
	case learn.ByPair:
		return []int{p.Pairs[l.Index].A, p.Pairs[l.Index].B}
	case learn.ByOrder:
		for _, c := range p.Orders[l.Index].Choices {
			for _, b := range c {
				out = append(out, b.First, b.Then)
			}
		}
	case learn.ByResource:
		for i := range p.Acts {
			for _, u := range p.Acts[i].Uses {
				if u.Res == l.Index {
					out = append(out, i)
				}
			}
		}
	case learn.ByPeople:
		for i := range p.Acts {
			for k := range p.Acts[i].Modes {
				if anyIn(p.Acts[i].Modes[k].Crew, l.People) || anyIn(p.Acts[i].Modes[k].Keepers, l.People) {
					out = append(out, i)
					break
				}
			}
		}
	case learn.ByLink:
		if out = []int{p.Links[l.Index].To}; p.Links[l.Index].From >= 0 {
			out = append(out, p.Links[l.Index].From)
		}
	default:
		return []int{l.Index}
	}
	return out
}

func anyIn(list, of []int) bool {
	for _, x := range list {
		for _, y := range of {
			if x == y {
				return true
			}
		}
	}
	return false
}

// limit says one limit in the job's words.
func (a *asked) limit(l learn.Limit) (string, tasks.Pos) {
	p := a.p
	switch l.Kind {
	case learn.ByPair:
		pr := p.Pairs[l.Index]
		return fmt.Sprintf("%s and %s not at once: %s", stepName(p.Acts[pr.A].Step), stepName(p.Acts[pr.B].Step), pr.Why), p.Acts[pr.A].Pos()
	case learn.ByOrder:
		return p.Orders[l.Index].Text, p.Orders[l.Index].Pos
	case learn.ByResource:
		return limitOfResource(&p.Res[l.Index]), p.Res[l.Index].Pos
	case learn.ByPeople:
		var names []string
		pos := tasks.Pos{}
		for _, i := range l.People {
			names = append(names, p.People[i].Name)
			pos = a.work.Job.People[i].Pos
		}
		if len(names) == 1 {
			return fmt.Sprintf("%s does one thing at a time", names[0]), pos
		}
		return fmt.Sprintf("there are only %s for some of the work", strings.Join(names, ", ")), pos
	case learn.ByFrom:
		act := &p.Acts[l.Index]
		return fmt.Sprintf("%s not before %s", stepName(act.Step), a.clockAt(act.From, act.Step.Place)), act.Pos()
	case learn.ByLink:
		return a.limitOfLink(&p.Links[l.Index]), p.Links[l.Index].Step.Pos
	case learn.ByHours:
		act := &p.Acts[l.Index]
		return fmt.Sprintf("%s: %s, in open hours and when its people are on shift", stepName(act.Step), a.length(act)), act.Pos()
	}
	act := &p.Acts[l.Index]
	return fmt.Sprintf("%s must be finished by %s", stepName(act.Step), a.clockAt(act.By, act.Step.Place)), a.byPos(act)
}

func limitOfResource(r *problem.Resource) string {
	switch r.Kind {
	case problem.Room:
		return fmt.Sprintf("room for %d at %s", r.Capacity, r.Name)
	case problem.Power:
		return fmt.Sprintf("%s: %g kVA", r.Name, float64(r.Capacity)/1000)
	}
	return fmt.Sprintf("there is %d of %s", r.Capacity, r.Name)
}

func (a *asked) limitOfLink(l *problem.Link) string {
	text := fmt.Sprintf("%s: %s", stepName(a.p.Acts[l.To].Step), l.Step.Why)
	if l.Min > 0 {
		text += ", at least " + span(l.Min)
	}
	if l.Max < expand.NoMax && l.Max > 0 {
		text += ", at most " + span(l.Max)
	}
	return text
}
