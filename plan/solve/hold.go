package solve

import (
	"sailby/plan/problem"
	"sailby/tasks"
	"sailby/tasks/expand"
)

// leaning is what a schedule is made with beside its list: activities that begin no earlier than
// a minute though they could, so that something that may not come too early or too late has room
// elsewhere; and activities that wait for their place in the list though a maximum wait runs.
type leaning struct {
	hold []int
	calm []bool
}

func newLeaning(n int) leaning { return leaning{make([]int, n), make([]bool, n)} }

func (l *leaning) set(from leaning) {
	copy(l.hold, from.hold)
	copy(l.calm, from.calm)
}

// yielding lists the activities for which holding back or waiting can matter: those that a
// maximum wait runs from or to, and those that must not finish before something. Standing time that follows its
// work at once is left out.
func (g *generator) yielding() (hold, calm []int) {
	seen, late := make([]bool, len(g.p.Acts)), make([]bool, len(g.p.Acts))
	for k := range g.p.Links {
		l := &g.p.Links[k]
		limited := l.Max < expand.NoMax || l.Last != nil
		if l.From < 0 || g.standing[l.To] || !limited && l.ToEnd != tasks.Finish {
			continue
		}
		for _, i := range []int{l.From, l.To} {
			if !seen[i] {
				seen[i] = true
				hold = append(hold, i)
			}
		}
		if limited && !late[l.To] {
			late[l.To] = true
			calm = append(calm, l.To)
		}
	}
	return hold, calm
}

// holds are the steps, in minutes, by which an activity is held back.
var holds = []int{15, 30, 60, 120, 240, 480, 1440}

// lean changes what the next schedule is made with: in one of four changes an activity is held back a while after
// where it stands, or no longer.
func (f *finder) lean(from leaning) {
	f.g.lean.set(from)
	if n := len(f.holdable); n > 0 && f.rng.IntN(4) == 0 {
		i := f.holdable[f.rng.IntN(n)]
		if f.g.lean.hold[i] > 0 && f.rng.IntN(2) == 0 {
			f.g.lean.hold[i] = 0
		} else if f.best != nil {
			f.g.lean.hold[i] = min(f.best.Start[i]+holds[f.rng.IntN(len(holds))], problem.Inf)
		}
	}
	if n := len(f.calmable); n > 0 && f.rng.IntN(4) == 0 {
		i := f.calmable[f.rng.IntN(n)]
		f.g.lean.calm[i] = !f.g.lean.calm[i]
	}
}
