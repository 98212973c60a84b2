package solve

import (
	"slices"

	"sailby/plan/problem"
)

// Restore makes a schedule of starts, modes and fire watches found elsewhere; nil if they do not
// obey the problem.
func Restore(p *problem.Problem, start, mode []int, watches [][]Watch) *Schedule {
	if len(start) != len(p.Acts) || len(mode) != len(p.Acts) {
		return nil
	}
	g := newGenerator(p)
	g.reset()
	g.kept = watches
	order := make([]int, len(start))
	for i := range order {
		order[i] = i
	}
	slices.SortStableFunc(order, func(a, b int) int { return start[a] - start[b] })
	for _, i := range order {
		if mode[i] < 0 || mode[i] >= len(p.Acts[i].Modes) {
			return nil
		}
		w := p.Acts[i].Modes[mode[i]].Time
		if start[i] < p.Acts[i].From || w.Start(start[i]) != start[i] || w.Finish(start[i]) >= problem.Inf || g.fits(i, mode[i], start[i], nil).kind != free {
			return nil
		}
		g.put(i, mode[i], start[i])
	}
	if !g.whole() || !g.ordered() {
		return nil
	}
	return g.snapshot(g.score())
}

// ordered picks, for every order rule, a choice that the schedule obeys; false if one has none.
func (g *generator) ordered() bool {
	for o := range g.p.Orders {
		found := false
		for c, choice := range g.p.Orders[o].Choices {
			holds := true
			for _, b := range choice {
				holds = holds && g.finish[b.First] <= g.start[b.Then]
			}
			if holds {
				g.choice[o], found = c, true
				break
			}
		}
		if !found {
			return false
		}
	}
	return true
}
