package solve

import (
	"slices"

	"sailby/plan/problem"
	"sailby/tasks"
	"sailby/tasks/expand"
)

// generator makes schedules from priority lists: serial generation, with unscheduling where a
// maximum wait is missed. Cost: O(acts x modes x conflicts) for a schedule.
type generator struct {
	*state
	into, from [][]int // links by later and by earlier activity
	lo         []int   // lower bounds that unscheduling has raised, for this schedule
	choice     []int   // by order rule: which of its choices holds
	rank       []int   // by activity: place in the list
	order      []int   // activities by rank
	standing   []bool  // activities that nothing but links holds
	lean       leaning
	blocker    []int // by activity: what was last in its way when it was placed, -1 if nothing
	inWay      int
	stop       func() bool // asked while a schedule is made; nil never stops
	stuck      int         // the activity that found no place, -1 if none
	pending    []int       // by activity: unplaced activities that it waits for
	queue      queue
	quit       func() bool // true ends a schedule in the middle; nil for never
	trace      func(block) // told of what stands in the way; nil for none
}

func newGenerator(p *problem.Problem) *generator {
	n := len(p.Acts)
	g := &generator{state: newState(p), into: make([][]int, n), from: make([][]int, n), lo: make([]int, n),
		choice: make([]int, len(p.Orders)), rank: make([]int, n), order: make([]int, n), standing: make([]bool, n), pending: make([]int, n), blocker: make([]int, n), lean: newLeaning(n)}
	for k, l := range p.Links {
		g.into[l.To] = append(g.into[l.To], k)
		if l.From >= 0 {
			g.from[l.From] = append(g.from[l.From], k)
		}
	}
	for i := range p.Acts {
		a := &p.Acts[i]
		g.standing[i] = len(a.Modes) == 1 && len(a.Modes[0].Crew) == 0 && len(a.Uses) == 0
		share := map[int]bool{}
		for _, m := range a.Modes {
			for _, c := range m.Crew {
				share[c] = true
			}
		}
		for c := range share {
			g.weight[c] += a.Modes[0].Time.Length() * len(a.Modes[0].Crew) / len(share)
		}
	}
	return g
}

// run makes the schedule of a list; false where an activity finds no place or maximum waits
// cannot be met within a bounded number of attempts.
func (g *generator) run(order []int) bool {
	g.reset()
	g.stuck = -1
	for i, a := range order {
		g.rank[a] = i
	}
	g.prepare()
	tries := 40 + 20*len(order)
	for left, n := len(order), 0; left > 0; n++ {
		if n%32 == 31 && g.stop != nil && g.stop() {
			return false
		}
		i := g.next()
		if i < 0 || g.quits() {
			return false
		}
		if !g.place(i) {
			g.stuck = i
			return false
		}
		left--
		g.release(i)
		undone, ok := g.repair(i)
		if !ok {
			return false
		}
		left += undone
		if tries--; tries < 0 {
			return false
		}
	}
	return true
}

// lower gives the earliest start and the earliest finish that links, order rules and earlier
// attempts leave.
func (g *generator) lower(i int, skip *linkSkip) (lo, fin int) {
	lo, fin = g.lo[i], -problem.Inf
	if skip.from(i) {
		lo = 0
	}
	for _, k := range g.into[i] {
		l := &g.p.Links[k]
		if l.From >= 0 && !g.placed[l.From] || skip.link(k) {
			continue
		}
		t := l.Earliest(g.end(l.From, l.FromEnd))
		if l.ToEnd == tasks.Finish {
			fin = max(fin, t)
		} else {
			lo = max(lo, t)
		}
	}
	for _, k := range g.from[i] { // a maximum from i to something placed already
		l := &g.p.Links[k]
		if !g.placed[l.To] || skip.link(k) || l.Max >= expand.NoMax && l.Last == nil {
			continue
		}
		if t := g.pulledEnd(l, lo); l.FromEnd == tasks.Finish {
			fin = max(fin, t)
		} else {
			lo = max(lo, t)
		}
	}
	for o, c := range g.choice {
		if skip.order(o) {
			continue
		}
		for _, b := range g.p.Orders[o].Choices[c] {
			if b.Then == i && g.placed[b.First] {
				lo = max(lo, g.finish[b.First])
			}
		}
	}
	return lo, fin
}

// first gives the first start of i in mode m at or after lo with a finish of at least fin, by its
// own hours alone.
func (g *generator) first(i, m, lo, fin int) int {
	w := g.p.Acts[i].Modes[m].Time
	s := w.Start(lo)
	if s < problem.Inf && w.Finish(s) < fin {
		s = w.Start(firstFinishing(w, fin, s))
	}
	return s
}

// end gives a placed activity's start or finish; activity -1 is the base.
func (g *generator) end(i int, e tasks.LinkEnd) int {
	switch {
	case i < 0:
		return 0
	case e == tasks.Start:
		return g.start[i]
	}
	return g.finish[i]
}

// startFor gives the least start of i, over its timings, with a finish of at least f.
func (g *generator) startFor(i, f, lo int) int {
	best := problem.Inf
	for _, w := range g.p.Acts[i].Timings() {
		a, b := lo, max(lo, f)
		for a < b {
			mid := (a + b) / 2
			if s := w.Start(mid); s < problem.Inf && w.Finish(s) < f {
				a = mid + 1
			} else {
				b = mid
			}
		}
		best = min(best, w.Start(a))
	}
	return best
}

// pulled gives the least start of i from which the maximum of l reaches the placed later end.
func (g *generator) pulled(l *problem.Link, i, lo int) int {
	t := g.pulledEnd(l, lo)
	if l.FromEnd == tasks.Finish {
		return g.startFor(i, t, lo)
	}
	return t
}

// pulledEnd gives the least minute for the earlier end of l from which its maximum reaches the placed
// later end.
func (g *generator) pulledEnd(l *problem.Link, lo int) int {
	return pulledTo(l, g.end(l.To, l.ToEnd), lo)
}

// pulledTo is pulledEnd for a later end at the given minute.
func pulledTo(l *problem.Link, end, lo int) int {
	a, b := lo, max(lo, end)
	if l.FromEnd == tasks.Finish {
		a = 0
	}
	for a < b {
		mid := (a + b) / 2
		if l.LastAt(mid) >= end {
			b = mid
		} else {
			a = mid + 1
		}
	}
	return a
}

// place puts activity i at its earliest finish over all modes.
func (g *generator) place(i int) bool {
	lo, fin := g.lower(i, nil)
	g.inWay = -1
	m, at := g.best(i, lo, fin)
	if m < 0 {
		return false
	}
	g.blocker[i] = g.inWay
	g.put(i, m, at)
	return true
}

// manyModes is the number of choices of people from which on not all are looked at.
const manyModes = 40

// best finds the mode and start with the earliest finish, starts from lo and finishes from fin on; equal
// ones go to the people least wanted elsewhere.
func (g *generator) best(i, lo, fin int) (mode, at int) {
	a := &g.p.Acts[i]
	mode = -1
	bestFin, bestWeight := problem.Inf, 0
	many, least, turn := len(a.Modes) > manyModes, problem.Inf, 0
	if many { // with many choices the first that could not finish earlier will do, from another one each time
		for _, w := range a.Timings() {
			if s := w.Start(lo); s < problem.Inf {
				least = min(least, max(fin, w.Finish(s)))
			}
		}
		turn = (g.rank[i] * 31) % len(a.Modes)
	}
	for k := range a.Modes {
		m := k + turn
		if m >= len(a.Modes) {
			m -= len(a.Modes)
		}
		w := a.Modes[m].Time
		s := g.first(i, m, lo, fin)
		if s >= problem.Inf {
			continue
		}
		weight := 0
		for _, c := range a.Modes[m].Crew {
			weight += g.weight[c]
		}
		if f := w.Finish(s); f > bestFin || f == bestFin && weight >= bestWeight {
			continue
		}
		s = g.earliest(i, m, s, bestFin, nil)
		if s >= problem.Inf {
			continue
		}
		if f := w.Finish(s); mode < 0 || f < bestFin || f == bestFin && weight < bestWeight {
			mode, at, bestFin, bestWeight = m, s, f, weight
		}
		if many && bestFin <= least {
			break
		}
	}
	return mode, at
}

// earliest gives the first start of i at or after s in mode m that fits what is placed, giving
// up where the finish passes limit.
func (g *generator) earliest(i, m, s, limit int, skip *skipper) int {
	w := g.p.Acts[i].Modes[m].Time
	for s < problem.Inf {
		if w.Finish(s) > limit {
			return problem.Inf
		}
		b := g.fits(i, m, s, skip)
		if b.kind == free {
			return s
		}
		if g.trace != nil {
			g.trace(b)
		}
		if b.other >= 0 {
			g.inWay = b.other
		}
		s = w.Start(max(b.next, s+1))
	}
	return problem.Inf
}

// list gives the placed activities by start, then by rank.
func (g *generator) list() []int {
	out := make([]int, len(g.placed))
	for i := range out {
		out[i] = i
	}
	slices.SortStableFunc(out, func(a, b int) int {
		if g.start[a] != g.start[b] {
			return g.start[a] - g.start[b]
		}
		if g.finish[a] != g.finish[b] {
			return g.finish[a] - g.finish[b]
		}
		return g.rank[a] - g.rank[b]
	})
	return out
}

// linkSkip leaves out links, not-before times and order rules; nil leaves nothing out.
type linkSkip struct {
	links  map[int]bool
	begin  bool
	orders map[int]bool
}

func (k *linkSkip) link(i int) bool  { return k != nil && k.links[i] }
func (k *linkSkip) from(int) bool    { return k != nil && k.begin }
func (k *linkSkip) order(i int) bool { return k != nil && k.orders[i] }

// quits says whether a schedule is to end in the middle.
func (g *generator) quits() bool { return g.quit != nil && g.quit() }
