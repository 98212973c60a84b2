package solve

import (
	"fmt"
	"slices"
	"sort"
	"strings"

	"sailby/plan/network"
	"sailby/plan/problem"
	"sailby/tasks/hours"
)

// Squeeze gives the earliest site finish from lo to hi that links, hours and work content leave
// possible: a finish is ruled out where, with it as a deadline of all site work, the links
// contradict each other, or some people, kit or power has more work to do between two minutes than there is time
// (destructive lower bounds after Klein and Scholl 1999; the work that must lie between two minutes as
// in the energetic reasoning of Baptiste, Le Pape and Nuijten 1999, with open hours in place of time). why is
// the load that rules the last one out, nil where the links do.
//
// Cost: O(log(hi - lo) x loads x starts x ends x acts), starts and ends kept few in large jobs.
func Squeeze(p *problem.Problem, loads []*Load, lo, hi int, stop func() bool) (finish int, why *Overload) {
	q := &squeezer{p: p, loads: slices.Clone(loads), byAct: make([]hours.Set, len(p.Acts)), shared: map[string]hours.Set{}}
	for lo < hi {
		mid := (lo + hi) / 2
		if stop != nil && stop() {
			return lo, why
		}
		if out, over := q.refutes(mid); out {
			lo, why = mid+1, over
		} else {
			hi = mid
		}
	}
	return lo, why
}

type squeezer struct {
	p      *problem.Problem
	loads  []*Load     // those that ruled something out last come first
	byAct  []hours.Set // by activity: when it may be worked on, nil where nobody has asked
	shared map[string]hours.Set
}

// by is the problem with a finish as a deadline of all site work.
func (q *squeezer) by(finish int) *problem.Problem {
	p := *q.p
	p.Acts = slices.Clone(q.p.Acts)
	for i := range p.Acts {
		if a := &p.Acts[i]; a.Site {
			a.By = min(a.By, finish-leastWatch(a))
		}
	}
	return &p
}

// leastWatch is the fire watch that follows an activity at least.
func leastWatch(a *problem.Act) int {
	if a.Step == nil || a.Step.Absent {
		return 0
	}
	least := problem.Inf
	for _, w := range a.Timings() {
		if w.Length() == 0 {
			return 0
		}
		least = min(least, w.Watch())
	}
	return least
}

// refutes says whether no plan finishes by then, and the load that shows it.
func (q *squeezer) refutes(finish int) (bool, *Overload) {
	b, conflict := network.Propagate(q.by(finish), network.Off{})
	if conflict != nil {
		return true, nil
	}
	for k, l := range q.loads {
		if over := q.over(l, b); over != nil {
			copy(q.loads[1:k+1], q.loads[:k])
			q.loads[0] = l
			return true, over
		}
	}
	return false, nil
}

// edges is how many starts and ends of one load are looked at.
func edges(n int) int {
	switch {
	case n <= 120:
		return n
	case n <= 400:
		return 60
	}
	return 24
}

// over looks for two minutes between which a load has more to do than time.
func (q *squeezer) over(l *Load, b network.Bounds) *Overload {
	n := len(l.acts)
	from, to := make([]int, n), make([]int, n)
	for k, i := range l.acts {
		from[k], to[k] = b.Start[i], b.Last[i]
	}
	starts, ends := spread(from, edges(n)), spread(to, edges(n))
	cover := q.covers(l)
	after := make([][]int, len(ends)) // by end and activity: minutes it may do after it
	for e, end := range ends {
		after[e] = make([]int, n)
		for k := range l.acts {
			if to[k] > end {
				after[e][k] = counted(cover[k], max(end, from[k]), to[k])
			}
		}
	}
	before := make([]int, n)
	for _, start := range starts {
		for k := range l.acts {
			before[k] = 0
			if from[k] < start {
				before[k] = counted(cover[k], from[k], min(start, to[k]))
			}
		}
		for e, end := range ends {
			if end <= start {
				continue
			}
			total := 0
			for k := range l.acts {
				total += l.inside(k, before[k]+after[e][k])
			}
			have := l.have(start, end)
			if total <= have {
				continue
			}
			o := &Overload{Load: l, From: start, To: end, Total: total, Have: have}
			for k, i := range l.acts {
				if part := l.inside(k, before[k]+after[e][k]); part > 0 {
					o.Acts, o.Need = append(o.Acts, i), append(o.Need, part)
				}
			}
			return o
		}
	}
	return nil
}

// inside is what is left of activity k for a stretch, with so many minutes possible outside it.
func (l *Load) inside(k, outside int) int { return max(0, l.need[k]-outside*l.count[k]) }

// spread gives the distinct values of a list, at most n of them.
func spread(list []int, n int) []int {
	s := slices.Clone(list)
	slices.Sort(s)
	s = slices.Compact(s)
	if len(s) <= n {
		return s
	}
	out := make([]int, n)
	for k := range out {
		out[k] = s[k*(len(s)-1)/(n-1)]
	}
	return out
}

// covers gives, for every activity of a load, all minutes in which it may be worked on. Activities with
// the same timings share them.
func (q *squeezer) covers(l *Load) []hours.Set {
	out := make([]hours.Set, len(l.acts))
	for k, i := range l.acts {
		if q.byAct[i] == nil {
			q.byAct[i] = q.coverOf(q.p.Acts[i].Timings())
		}
		out[k] = q.byAct[i]
	}
	return out
}

func (q *squeezer) coverOf(times []*problem.Timing) hours.Set {
	if len(times) == 1 {
		return times[0].Calendar()
	}
	var key strings.Builder
	for _, w := range times {
		fmt.Fprintf(&key, "%p ", w)
	}
	set, known := q.shared[key.String()]
	if !known {
		var spans []hours.Span
		for _, w := range times {
			spans = append(spans, w.Calendar()...)
		}
		set = hours.NewSet(spans...)
		q.shared[key.String()] = set
	}
	return set
}

// counted gives the minutes of a set from one minute to another.
func counted(set hours.Set, from, to int) int {
	n := 0
	for k := sort.Search(len(set), func(i int) bool { return int(set[i].To) > from }); k < len(set) && int(set[k].From) < to; k++ {
		n += min(int(set[k].To), to) - max(int(set[k].From), from)
	}
	return n
}
