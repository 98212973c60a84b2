package solve

import (
	"sailby/tasks/expand"
)

// repair looks for maximum waits that the placing of i has broken. For each, the earlier
// activity's lower bound is raised and it is unscheduled with all that hangs on it. It gives the number
// of activities unscheduled.
func (g *generator) repair(i int) (undone int, ok bool) {
	for _, k := range g.into[i] {
		l := &g.p.Links[k]
		if l.From < 0 || !g.placed[i] || !g.placed[l.From] {
			continue
		}
		if g.end(i, l.ToEnd) <= l.LastAt(g.end(l.From, l.FromEnd)) {
			continue
		}
		lo := g.pulled(l, l.From, g.start[l.From])
		if lo <= g.start[l.From] {
			lo = g.start[l.From] + 1
		}
		if lo >= g.p.End {
			g.stuck = i
			return undone, false
		}
		from := l.From
		undone += g.drop(from)
		g.lo[from] = max(g.lo[from], lo)
	}
	for _, k := range g.from[i] { // something placed already comes too early after i
		l := &g.p.Links[k]
		if !g.placed[i] || !g.placed[l.To] || l.Min <= expand.NoMin {
			continue
		}
		if g.end(l.To, l.ToEnd) < l.Earliest(g.end(i, l.FromEnd)) {
			undone += g.drop(l.To)
		}
	}
	return undone, true
}

// drop unschedules activity i and everything placed that comes after it, and queues i again.
func (g *generator) drop(i int) int {
	n := g.undo(i)
	if n > 0 && g.pending[i] == 0 {
		g.push(i)
	}
	return n
}

func (g *generator) undo(i int) int {
	if !g.placed[i] {
		return 0
	}
	g.take(i)
	n := 1
	g.after(i, func(j int) {
		n += g.undo(j)
		g.pending[j]++
	})
	return n
}
