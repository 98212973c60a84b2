package limits

import (
	"sort"

	"sailby/plan"
	"sailby/plan/learn"
	"sailby/plan/network"
	"sailby/plan/problem"
	"sailby/plan/solve"
	"sailby/tasks/expand"
)

// Options bound the work.
type Options struct {
	Ticks int64       // of the learning search, in all; 0 is 30 million
	Each  int64       // of one question; 0 is 3 million
	Lines int         // most limits that are given where not all of them were tried; 0 is 60
	Stop  func() bool // true ends the work; nil: never
}

// Found is a set of limits that cannot all hold.
type Found struct {
	Lines   []plan.ProofLine
	Problem *problem.Problem // of these limits alone
	Over    *solve.Overload  // the work that is too much, where the set is refuted by that; nil else
}

// mostLines is how many limits are worth printing where not all of them were tried: more explain nothing.
const mostLines = 60

// stepTicks is the work of laying out one step, in ticks of the search.
const stepTicks = 5000

// verdict is what is known of a part of a job.
type verdict uint8

const (
	unknown verdict = iota
	holds           // it can be done, as far as the model goes
	refuted         // it cannot
)

// finder makes a contradiction small.
type finder struct {
	w     *expand.Work
	o     Options
	ticks int64 // left
	plain bool  // questions are put to the network and to sums of work only
	tired bool  // the bounds ended it before all was asked
	in    map[*expand.Step]bool
	list  []Limit
	off   []bool
	sure  []bool // shown to be needed
}

// Find gives a set of limits that cannot all hold, as small as was found, begun with all of those that
// bear on some steps of a work (on all steps where none is named); nil where they are not refuted within the
// bounds. Each limit that is marked Needed has been taken away by itself: then the others can hold, who does what
// left out. Method: deletion by halves (Bakker, Dikker, Tempelman and Wognum 1993; Junker 2004). Cost: some k log n
// questions for k limits left of n, each a network, a sum of work and a bounded search.
func Find(w *expand.Work, steps []*expand.Step, o Options) *Found {
	f := &finder{w: w, o: o, in: map[*expand.Step]bool{}}
	if f.ticks = o.Ticks; f.ticks == 0 {
		f.ticks = 30_000_000
	}
	if f.o.Each == 0 {
		f.o.Each = 3_000_000
	}
	for _, s := range steps {
		f.in[s] = true
	}
	if len(steps) == 0 {
		for _, s := range w.Steps {
			f.in[s] = true
		}
	}
	f.plain = true // what a sum or a chain shows is easier to follow than what a search has gone through
	if f.ask() != refuted {
		if f.plain = false; f.ask() != refuted {
			return nil
		}
	}
	f.fewer()
	f.list = list(w, f.has)
	f.off, f.sure = make([]bool, len(f.list)), make([]bool, len(f.list))
	f.leave(0, len(f.list))
	if f.plain {
		f.plain = false
		if !f.confirm() {
			f.leave(0, len(f.list)) // a search can do with less
		}
	}
	if f.o.Lines == 0 {
		f.o.Lines = mostLines
	}
	if f.tired && len(f.lines()) > f.o.Lines {
		return nil
	}
	out := &Found{Lines: f.lines(), Problem: f.left()}
	for i := range out.Problem.Acts {
		if len(out.Problem.Acts[i].Modes) == 0 {
			return out
		}
	}
	if b, c := network.Propagate(out.Problem, network.Off{}); c == nil {
		out.Over = solve.FindOverload(solve.Loads(out.Problem), b)
	}
	return out
}

func (f *finder) has(s *expand.Step) bool { return f.in[s] }

func (f *finder) stopped() bool {
	if f.ticks <= 0 || f.o.Stop != nil && f.o.Stop() {
		f.tired = true
	}
	return f.tired
}

// fewer leaves out steps, by halves, while what is left is refuted.
func (f *finder) fewer() {
	var all []*expand.Step
	for _, s := range f.w.Steps {
		if f.in[s] {
			all = append(all, s)
		}
	}
	var try func(part []*expand.Step)
	try = func(part []*expand.Step) {
		if len(part) == 0 || f.stopped() {
			return
		}
		for _, s := range part {
			delete(f.in, s)
		}
		if len(f.in) > 0 && f.ask() == refuted {
			return
		}
		for _, s := range part {
			f.in[s] = true
		}
		if len(part) > 1 {
			try(part[:len(part)/2])
			try(part[len(part)/2:])
		}
	}
	if len(all) > 1 {
		try(all[:len(all)/2])
		try(all[len(all)/2:])
	}
}

// leave leaves out limits lo to hi, by halves, while what is left is refuted.
func (f *finder) leave(lo, hi int) {
	var on []int // those that are still there
	for k := lo; k < hi; k++ {
		if !f.off[k] {
			on = append(on, k)
		}
	}
	if len(on) == 0 || len(on) == 1 && f.sure[on[0]] || f.stopped() {
		return
	}
	for _, k := range on {
		f.off[k] = true
	}
	v := f.ask()
	if v == refuted {
		return
	}
	for _, k := range on {
		f.off[k] = false
	}
	if len(on) == 1 {
		f.sure[on[0]] = v == holds
		return
	}
	mid := on[len(on)/2]
	f.leave(lo, mid)
	f.leave(mid, hi)
}

// confirm asks of every limit left whether the others can hold without it; false where it has found one that
// they do not need.
func (f *finder) confirm() bool {
	all := true
	for k := range f.list {
		if f.off[k] || f.stopped() {
			continue
		}
		f.off[k] = true
		v := f.ask()
		f.off[k] = false
		f.sure[k] = v == holds
		all = all && v != refuted
	}
	return all
}

// ask says what is known of the steps and limits that are left.
func (f *finder) ask() verdict {
	f.ticks -= stepTicks * int64(len(f.in))
	p := f.left()
	for i := range p.Acts {
		if len(p.Acts[i].Modes) == 0 {
			return refuted
		}
	}
	b, c := network.Propagate(p, network.Off{})
	if c != nil {
		return refuted
	}
	if solve.FindOverload(solve.Loads(p), b) != nil {
		return refuted
	}
	if f.plain {
		return unknown
	}
	r := learn.Within(p, p.End, learn.Options{Ticks: min(f.o.Each, f.ticks), Stop: f.o.Stop})
	f.ticks -= max(r.Ticks, 1000)
	switch r.Status {
	case learn.Infeasible:
		return refuted
	case learn.Feasible, learn.Optimal:
		return holds
	}
	return unknown
}

// left is the problem of the steps and limits that are left.
func (f *finder) left() *problem.Problem {
	s := cut(f.w, f.has)
	for k := range f.list {
		if f.off[k] {
			f.list[k].take(s)
		}
	}
	return s.compile()
}

// lines gives what is left, in the order in which it reads best.
func (f *finder) lines() []plan.ProofLine {
	var out []plan.ProofLine
	for k := range f.list {
		if l := &f.list[k]; !f.off[k] {
			out = append(out, plan.ProofLine{Text: l.Text, Minutes: l.Minutes, Pos: l.Pos, Needed: f.sure[k], Limit: l.Limit})
		}
	}
	rank := func(l plan.ProofLine) plan.LimitKind {
		if l.Limit.Kind == plan.LimitStanding {
			return plan.LimitLength
		}
		return l.Limit.Kind
	}
	sort.SliceStable(out, func(i, j int) bool { return rank(out[i]) < rank(out[j]) })
	return out
}

// Steps gives the steps of a work that bear on some activities of its problem.
func Steps(p *problem.Problem, acts []int) []*expand.Step {
	var out []*expand.Step
	for _, i := range acts {
		if s := p.Acts[i].Step; s != nil {
			out = append(out, s)
		}
	}
	return out
}
