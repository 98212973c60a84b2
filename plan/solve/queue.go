package solve

import (
	"container/heap"

	"sailby/tasks/expand"
)

// prepare counts what every activity waits for, and queues those that wait for nothing.
func (g *generator) prepare() {
	clear(g.pending)
	g.queue = g.queue[:0]
	for i := range g.lo {
		g.lo[i] = max(g.p.Acts[i].From, g.lean.hold[i])
		g.after(i, func(j int) { g.pending[j]++ })
	}
	for i := range g.pending {
		if g.pending[i] == 0 {
			g.push(i)
		}
	}
}

// after calls visit for every activity that waits for i by a link or an order rule, once for each.
func (g *generator) after(i int, visit func(j int)) {
	for _, k := range g.from[i] {
		if l := &g.p.Links[k]; l.Min > expand.NoMin {
			visit(l.To)
		}
	}
	for o, c := range g.choice {
		for _, b := range g.p.Orders[o].Choices[c] {
			if b.First == i {
				visit(b.Then)
			}
		}
	}
}

// release tells those that wait for i that it is placed.
func (g *generator) release(i int) {
	g.after(i, func(j int) {
		if g.pending[j]--; g.pending[j] == 0 {
			g.push(j)
		}
	})
}

// push queues an activity that waits for nothing more.
func (g *generator) push(i int) {
	key := g.rank[i]
	if g.standing[i] || !g.lean.calm[i] && g.urgent(i) {
		key -= len(g.p.Acts)
	}
	heap.Push(&g.queue, entry{key, i})
}

// next gives the unplaced activity that comes first in the list among those whose earlier
// activities are placed. Standing time, and what must follow within a maximum wait, go first of all.
func (g *generator) next() int {
	for len(g.queue) > 0 {
		e := heap.Pop(&g.queue).(entry)
		if !g.placed[e.act] && g.pending[e.act] == 0 {
			return e.act
		}
	}
	return -1
}

// entry is an activity in the queue; queue is a heap of them, least key first.
type entry struct{ key, act int }

type queue []entry

func (q queue) Len() int { return len(q) }
func (q queue) Less(a, b int) bool {
	return q[a].key < q[b].key || q[a].key == q[b].key && q[a].act < q[b].act
}
func (q queue) Swap(a, b int) { q[a], q[b] = q[b], q[a] }
func (q *queue) Push(x any)   { *q = append(*q, x.(entry)) }
func (q *queue) Pop() any {
	old := *q
	x := old[len(old)-1]
	*q = old[:len(old)-1]
	return x
}

func (g *generator) urgent(i int) bool {
	for _, k := range g.into[i] {
		l := &g.p.Links[k]
		if l.From >= 0 && g.placed[l.From] && (l.Max < expand.NoMax || l.Last != nil) {
			return true
		}
	}
	return false
}
