package learn

import (
	"sort"

	"sailby/plan/problem"
)

// grid is a timing written out as stretches of possible starts: from[k] to upto[k], both
// possible, where each start a minute later finishes a minute later, the first at ends[k]. All questions about it cost
// O(log stretches); there are about two stretches for each worked span.
type grid struct {
	from, upto, ends []int32
}

// newGrid writes out w for starts from 0 on with finishes up to end. Within a span, work on a
// calendar loses a worked minute with each later start, so that its finish rises by at least one:
// where it rises by k in k minutes it rises by one in each, and a stretch can be found by doubling.
// O(stretches x log length) calls of the timing; a film costs one for each minute.
func newGrid(w *problem.Timing, end int) *grid {
	g := &grid{}
	for s := w.Start(0); s <= end; {
		f := w.Finish(s)
		if f > end {
			break
		}
		stop := end // last start of the same span
		if cal := w.Calendar(); len(cal) > 0 {
			if i := sort.Search(len(cal), func(i int) bool { return int(cal[i].To) > s }); i < len(cal) {
				stop = int(cal[i].To) - 1
			}
		}
		same := func(k int) bool { return s+k <= stop && w.Start(s+k) == s+k && w.Finish(s+k) == f+k && f+k <= end }
		k, jump := 0, 1
		if w.Calendar() == nil && !isFixed(w) {
			for same(k + 1) {
				k++
			}
		} else {
			for same(k + jump) {
				k += jump
				jump *= 2
			}
			for ; jump > 0; jump /= 2 {
				if same(k + jump) {
					k += jump
				}
			}
		}
		g.from = append(g.from, int32(s))
		g.upto = append(g.upto, int32(s+k))
		g.ends = append(g.ends, int32(f))
		s = w.Start(s + k + 1)
	}
	return g
}

// isFixed says whether w takes the same clock time from any start: a film has length 0, but does
// not finish at once.
func isFixed(w *problem.Timing) bool {
	return w.Calendar() == nil && w.Finish(0) == w.Length()
}

// start gives the first possible start at or after t, far if there is none.
func (g *grid) start(t int32) int32 {
	k := sort.Search(len(g.upto), func(i int) bool { return g.upto[i] >= t })
	if k == len(g.upto) {
		return far
	}
	return max(t, g.from[k])
}

// last gives the last possible start at or before t, -far if there is none.
func (g *grid) last(t int32) int32 {
	k := sort.Search(len(g.from), func(i int) bool { return g.from[i] > t }) - 1
	if k < 0 {
		return -far
	}
	return min(t, g.upto[k])
}

// finish gives the finish of the first possible start at or after t, far if there is none.
func (g *grid) finish(t int32) int32 {
	k := sort.Search(len(g.upto), func(i int) bool { return g.upto[i] >= t })
	if k == len(g.upto) {
		return far
	}
	return g.ends[k] + max(t, g.from[k]) - g.from[k]
}

// latest gives the last possible start that finishes by f, -far if there is none.
func (g *grid) latest(f int32) int32 {
	k := sort.Search(len(g.ends), func(i int) bool { return g.ends[i] > f }) - 1
	if k < 0 {
		return -far
	}
	return min(g.upto[k], g.from[k]+f-g.ends[k])
}

// grids is a choice of timings: each question is answered for the kindest of them.
type grids []*grid

func (gs grids) start(t int32) int32 {
	best := far
	for _, g := range gs {
		best = min(best, g.start(t))
	}
	return best
}

func (gs grids) last(t int32) int32 {
	best := -far
	for _, g := range gs {
		best = max(best, g.last(t))
	}
	return best
}

func (gs grids) finish(t int32) int32 {
	best := far
	for _, g := range gs {
		best = min(best, g.finish(t))
	}
	return best
}

func (gs grids) latest(f int32) int32 {
	best := -far
	for _, g := range gs {
		best = max(best, g.latest(f))
	}
	return best
}

// back gives the least start from which a finish at f or later can come.
func (gs grids) back(f int32) int32 {
	best := far
	for _, g := range gs {
		best = min(best, g.latest(f-1)+1)
	}
	return best
}

// most gives the latest finish of the first starts at or after t, far if a timing has none.
func (gs grids) most(t int32) int32 {
	best := -far
	for _, g := range gs {
		best = max(best, g.finish(t))
	}
	return best
}
