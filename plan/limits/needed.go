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
	Stop  func() bool // true ends the work; nil: never
}

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
	in    map[*expand.Step]bool
	list  []Limit
	off   []bool
	sure  []bool // shown to be needed
	asks  int
}

// Find gives a set of limits that cannot all hold, as small as was found, begun with all of those that
// bear on some steps of a work (on all steps where none is named); nil where they are not refuted within the
// bounds. Each limit that is marked Needed has been taken away by itself: then the others can hold, who does what
// left out. Method: deletion by halves (Bakker, Dikker, Tempelman and Wognum 1993; Junker 2004). Cost: some k log n
// questions for k limits left of n, each a network, a sum of work and a bounded search.
func Find(w *expand.Work, steps []*expand.Step, o Options) []plan.ProofLine {
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
	if f.ask() != refuted {
		return nil
	}
	f.fewer()
	f.list = list(w, f.has)
	f.off, f.sure = make([]bool, len(f.list)), make([]bool, len(f.list))
	f.leave(0, len(f.list))
	return f.lines()
}

func (f *finder) has(s *expand.Step) bool { return f.in[s] }

func (f *finder) stopped() bool { return f.ticks <= 0 || f.o.Stop != nil && f.o.Stop() }

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
	if lo >= hi || f.stopped() {
		return
	}
	for k := lo; k < hi; k++ {
		f.off[k] = true
	}
	v := f.ask()
	if v == refuted {
		return
	}
	for k := lo; k < hi; k++ {
		f.off[k] = false
	}
	if hi-lo == 1 {
		f.sure[lo] = v == holds
		return
	}
	mid := (lo + hi) / 2
	f.leave(lo, mid)
	f.leave(mid, hi)
}

// ask says what is known of the steps and limits that are left.
func (f *finder) ask() verdict {
	f.asks++
	s := cut(f.w, f.has)
	for k := range f.list {
		if f.off[k] {
			f.list[k].take(s)
		}
	}
	p := s.compile()
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
