package learn

import "sailby/tasks/hours"

// crews names the people: a variable for each mode of an activity, one for each timing that its
// modes have, and one for each person and timing; a mode brings its timing and its people with
// it. At least one mode holds. Each person works on one thing at a time, pauses left out. People
// who only watch hot work are left out, since they may watch several things at once.
func (m *model) crews() bool {
	byPerson := make([][]worker, len(m.p.People))
	for i := range m.p.Acts {
		if !m.crew(i, byPerson) {
			return false
		}
	}
	for _, ws := range byPerson {
		if len(ws) > 1 {
			newWorktable(m.engine, 1, ws)
		}
	}
	return true
}

// crew makes the modes of activity i; false if it has none.
func (m *model) crew(i int, byPerson [][]worker) bool {
	a, x := &m.p.Acts[i], &m.acts[i]
	if len(a.Modes) == 1 {
		m.team(i, 0, always, byPerson, nil)
		return true
	}
	times := make([]side, len(x.times))
	for k := range times {
		times[k] = -1
		if len(x.times) > 1 {
			times[k] = m.variable(0, 1)
			m.tie(i, grids{x.grids[k]}, fact{times[k], 1})
		}
	}
	known := map[[2]int]side{}
	var any []fact
	for k := range a.Modes {
		mode := m.variable(0, 1)
		x.modes = append(x.modes, mode)
		any = append(any, fact{mode, 1})
		for t := range x.times {
			if x.times[t] == a.Modes[k].Time && times[t] >= 0 {
				m.join(mode, times[t], 0, always)
			}
		}
		m.team(i, k, fact{mode, 1}, byPerson, known)
	}
	return m.add(any)
}

// team makes the work of the people of mode k, which holds if on does. Modes with the same
// timing share the variable of a person; known has those made so far.
func (m *model) team(i, k int, on fact, byPerson [][]worker, known map[[2]int]side) {
	md := &m.p.Acts[i].Modes[k]
	if m.start[i] == m.finish[i] && m.length[i] == 0 {
		return
	}
	sure := m.steady[md.Time]
	work := func(p int, on fact, mask spans) {
		byPerson[p] = append(byPerson[p], worker{user: m.user(i, 1), on: on, mask: mask})
	}
	if md.Relief != nil {
		first := toSpans(md.First)
		for c, p := range md.Crew {
			if !watches(md.Watch, c) {
				work(p, on, sure.and(first))
			}
		}
		for c, p := range md.Relief {
			if !watches(md.Watch, c) {
				work(p, on, sure.less(first))
			}
		}
		return
	}
	for c, p := range md.Crew {
		if watches(md.Watch, c) {
			continue
		}
		if known == nil {
			work(p, on, sure)
			continue
		}
		key := [2]int{p, m.timeOf(i, k)}
		y, ok := known[key]
		if !ok {
			y = m.variable(0, 1)
			known[key] = y
			work(p, fact{y, 1}, sure)
		}
		m.join(on.s, y, 0, always)
	}
}

// timeOf gives the number of mode k's timing among those of activity i.
func (m *model) timeOf(i, k int) int {
	for t, w := range m.acts[i].times {
		if w == m.p.Acts[i].Modes[k].Time {
			return t
		}
	}
	return 0
}

func toSpans(set hours.Set) spans {
	out := spans{}
	for _, s := range set {
		out = append(out, struct{ from, to int32 }{clip(int(s.From)), clip(int(s.To))})
	}
	return out
}

// less gives the minutes of a that are not in b.
func (a spans) less(b spans) spans {
	rest := spans{}
	at := -far
	for _, s := range b {
		if s.from > at {
			rest = append(rest, struct{ from, to int32 }{at, s.from})
		}
		at = s.to
	}
	return a.and(append(rest, struct{ from, to int32 }{at, far}))
}

// chosen gives the mode that holds for activity i, once everything is settled.
func (m *model) chosen(i int) int {
	for k, x := range m.acts[i].modes {
		if m.now[x] == 1 {
			return k
		}
	}
	return 0
}
