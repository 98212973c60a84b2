package learn

import (
	"sort"

	"sailby/plan/problem"
	"sailby/tasks/hours"
)

// spans is a sorted list of disjoint half-open spans of minutes; nil is every minute.
type spans []span

type span struct{ from, to int32 }

// steady gives the minutes in which work on w is at work for certain, if it runs over them at all:
// its worked spans without those that it may skip for being too short (R8). Whether a span is skipped
// is seen from the last start before it, which has most left to do: if that one works in the span,
// or is done before it, so do all earlier ones.
func steady(w *problem.Timing, g *grid) spans {
	if w.Calendar() == nil {
		return nil
	}
	out := spans{}
	for _, s := range w.Calendar() {
		from, to := int32(s.From), int32(s.To)
		if u := g.last(from - 1); u == -far || g.finish(u) <= from || worksAt(w, int(u), s) {
			out = append(out, span{from, to})
		}
	}
	return out
}

// worksAt says whether work begun at u is at work when span s begins.
func worksAt(w *problem.Timing, u int, s hours.Span) bool {
	yes := false
	w.Pieces(u, func(from, to int) {
		yes = yes || from <= int(s.From) && int(s.From) < to
	})
	return yes
}

// and gives the minutes in both.
func (a spans) and(b spans) spans {
	if a == nil {
		return b
	}
	if b == nil {
		return a
	}
	out := spans{}
	for i, j := 0, 0; i < len(a) && j < len(b); {
		from, to := max(a[i].from, b[j].from), min(a[i].to, b[j].to)
		if from < to {
			out = append(out, span{from, to})
		}
		if a[i].to < b[j].to {
			i++
		} else {
			j++
		}
	}
	return out
}

// has says whether t is in it.
func (a spans) has(t int32) bool {
	if a == nil {
		return true
	}
	k := a.find(t)
	return k < len(a) && a[k].from <= t
}

// find gives the first span that ends after t.
func (a spans) find(t int32) int {
	return sort.Search(len(a), func(i int) bool { return a[i].to > t })
}

// lastBefore gives the last minute before t that is in it, -far if there is none.
func (a spans) lastBefore(t int32) int32 {
	if a == nil {
		return t - 1
	}
	k := sort.Search(len(a), func(i int) bool { return a[i].from >= t }) - 1
	if k < 0 {
		return -far
	}
	return min(t, a[k].to) - 1
}

// firstFrom gives the first minute at or after t that is in it, far if there is none.
func (a spans) firstFrom(t int32) int32 {
	if a == nil {
		return t
	}
	k := a.find(t)
	if k == len(a) {
		return far
	}
	return max(t, a[k].from)
}
