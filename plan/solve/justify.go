package solve

import (
	"slices"

	"sailby/tasks"
	"sailby/tasks/expand"
)

// justify shifts the best schedule right, then makes it again by the starts that gives, as long
// as that helps.
func (f *finder) justify() {
	for round := 0; round < 6 && !f.over(); round++ {
		before := f.best.Score
		order := f.rightList()
		f.try(order)
		if f.best.Score.Compare(before, false) >= 0 {
			return
		}
	}
}

// rightList gives the activities by the start each has when all are pushed as late as the
// finish allows, last first.
func (f *finder) rightList() []int {
	g, p, best := f.g, f.p, f.best
	g.reset()
	byFinish := make([]int, len(p.Acts))
	for i := range byFinish {
		byFinish[i] = i
	}
	slices.SortStableFunc(byFinish, func(a, b int) int {
		if best.Finish[a] != best.Finish[b] {
			return best.Finish[b] - best.Finish[a]
		}
		return best.Start[b] - best.Start[a]
	})
	for _, i := range byFinish {
		at := g.latest(i, best)
		g.put(i, best.Mode[i], at)
	}
	starts := slices.Clone(g.start)
	order := make([]int, len(p.Acts))
	for i := range order {
		order[i] = i
	}
	slices.SortStableFunc(order, func(a, b int) int {
		if starts[a] != starts[b] {
			return starts[a] - starts[b]
		}
		return best.Start[a] - best.Start[b]
	})
	return order
}

// latest gives the latest start of i, in its mode of best, with what is placed; its own start
// where no later one is found.
func (g *generator) latest(i int, best *Schedule) int {
	w := g.p.Acts[i].Modes[best.Mode[i]].Time
	hi := best.Score.Finish
	if !g.p.Acts[i].Site {
		hi = max(hi, best.Finish[i])
	}
	for _, k := range g.from[i] {
		l := &g.p.Links[k]
		if !g.placed[l.To] || l.Min <= expand.NoMin || l.Count != nil {
			if g.placed[l.To] && l.Count != nil {
				hi = min(hi, best.Finish[i])
			}
			continue
		}
		t := g.end(l.To, l.ToEnd) - l.Min
		if l.FromEnd == tasks.Start {
			t += max(0, w.Finish(best.Start[i])-best.Start[i])
		}
		hi = min(hi, t)
	}
	for tries := 0; tries < 200 && hi > best.Finish[i]; tries++ {
		s := w.Latest(hi, best.Start[i])
		if s <= best.Start[i] {
			break
		}
		b := g.fits(i, best.Mode[i], s, nil)
		if b.kind == free {
			return s
		}
		hi = min(w.Finish(s)-1, max(b.before, 0))
	}
	return best.Start[i]
}
