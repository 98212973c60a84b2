package learn

import (
	"fmt"

	"sailby/tasks"
)

// resources makes a rule for each resource: a plain timetable where everything that uses it is
// held from start to finish, one that knows the pauses where not. It
// gives false if an activity asks for more than there is.
func (m *model) resources() bool {
	for k := range m.p.Res {
		var us []user
		var ws []worker
		calm := true
		for i := range m.p.Acts {
			for _, w := range m.uses(i, k) {
				if w.amount > clip(m.p.Res[k].Capacity) && !m.acts[i].empty && !m.guarded {
					m.never("excess %d %d", k, i)
					return false
				}
				calm = calm && w.mask == nil && w.team == 0
				us, ws = append(us, w.user), append(ws, w)
			}
		}
		capacity := clip(m.p.Res[k].Capacity)
		if len(us) > 0 && m.guarded {
			calm = m.only(ws, m.guard(ByResource, k)) && calm
		}
		switch {
		case len(us) == 0:
		case calm:
			m.titled("use %d", k)
			c := newTimetable(m.engine, capacity, us)
			m.titled("use %d", k)
			newEnergy(m.engine, c)
		default:
			m.titled("use %d", k)
			newWorktable(m.engine, capacity, ws)
		}
	}
	return true
}

// uses gives what activity i takes of resource k. In the room of a workface those who only watch
// hot work, during it or after it, may be the same for several works (R13): they are a team.
func (m *model) uses(i, k int) []worker {
	a, x := &m.p.Acts[i], &m.acts[i]
	var out []worker
	for _, u := range a.Uses {
		if u.Res != k || u.Amount <= 0 || m.start[i] == m.finish[i] && m.length[i] == 0 {
			continue
		}
		w := worker{user: m.user(i, clip(u.Amount)), on: always}
		if !u.Stays {
			w.mask = x.sure
		}
		if a.WatchRoom-1 != k {
			out = append(out, w)
			out = append(out, m.byTiming(i, w)...)
			continue
		}
		if n := m.watchers(i); n > 0 {
			one := w
			one.amount, one.team = 1, m.team[i]
			out = append(out, one)
			w.amount -= n
		}
		if w.amount > 0 {
			out = append(out, w)
			out = append(out, m.byTiming(i, w)...)
		}
		if x.watch > 0 {
			out = append(out, worker{user: m.afterWatch(i), on: always, team: m.team[i]})
		}
	}
	return out
}

// byTiming gives what activity i takes, with each of its timings, in the minutes in which it is at work with that one
// and need not be with another.
func (m *model) byTiming(i int, w worker) []worker {
	x := &m.acts[i]
	if w.mask == nil {
		return nil
	}
	var out []worker
	for k, on := range x.timed {
		if more := m.steady[x.times[k]].less(x.sure); len(more) > 0 {
			w.on, w.mask = fact{on, 1}, more
			out = append(out, w)
		}
	}
	return out
}

// watchers gives the number of people in activity i's crew who only watch.
func (m *model) watchers(i int) int32 {
	n := int32(0)
	for _, w := range m.p.Acts[i].Modes[0].Watch {
		if w {
			n++
		}
	}
	return n
}

// afterWatch is the fire watch after the last piece of activity i.
func (m *model) afterWatch(i int) user {
	return user{m.finish[i], m.finish[i], m.acts[i].watch, 1, m.acts[i].watch}
}

// workfaces numbers the workfaces, from 1 on, for the watches that may be shared in each. Hot work
// without a workface is taken to share one: that can only be too kind.
func (m *model) workfaces() {
	seen := map[*tasks.Workface]int{}
	for i := range m.p.Acts {
		var f *tasks.Workface
		if s := m.p.Acts[i].Step; s != nil {
			f = s.Face
		}
		if seen[f] == 0 {
			seen[f] = len(seen) + 1
		}
		m.team = append(m.team, seen[f])
	}
}

func (m *model) user(i int, amount int32) user {
	return user{m.start[i], m.finish[i], m.length[i], amount, m.least(i)}
}

// groups makes a rule for each set of people that some need leaves the choice among, and for all
// together: all work that needs at least so many of them, whoever they are, against their number. It
// leaves out who does what, so that it is only ever too kind.
func (m *model) groups() {
	seen := map[string]bool{}
	open := func(g []int) {
		if key := fmt.Sprint(g); len(g) > 0 && !seen[key] {
			seen[key] = true
			m.group(g)
		}
	}
	for i := range m.p.Acts {
		for _, g := range m.needs(i) {
			open(g)
		}
		open(m.keepers(i))
	}
	all := make([]int, len(m.p.People))
	for p := range all {
		all[p] = p
	}
	open(all)
}

func (m *model) group(g []int) {
	in := make([]bool, len(m.p.People))
	for _, p := range g {
		in[p] = true
	}
	var ws []worker
	total := int32(0)
	for j := range m.p.Acts {
		n, watch := m.atLeast(j, in)
		if n > 0 {
			ws = append(ws, worker{user: m.user(j, n), on: always, mask: m.acts[j].sure})
		}
		if watch {
			ws = append(ws, worker{user: m.user(j, 1), on: always, mask: m.acts[j].sure, team: m.team[j]})
			n++
		}
		if k := m.keepers(j); len(k) > 0 && allIn(k, in) {
			ws = append(ws, worker{user: m.afterWatch(j), on: always, team: m.team[j]})
			n++
		}
		total += n
	}
	if total > int32(len(g)) {
		on := m.guard(ByPeople, len(m.guards))
		if on.s >= 0 {
			m.guards[len(m.guards)-1].People = g
		}
		m.only(ws, on)
		m.titledCrew(g)
		newWorktable(m.engine, int32(len(g)), ws)
	}
}

func allIn(list []int, in []bool) bool {
	for _, p := range list {
		if !in[p] {
			return false
		}
	}
	return true
}

// keepers lists everybody who may keep the fire watch after activity i in some mode.
func (m *model) keepers(i int) []int {
	if m.acts[i].watch == 0 || m.p.Acts[i].Cut {
		return nil
	}
	who := make([]bool, len(m.p.People))
	for k := range m.p.Acts[i].Modes {
		for _, p := range m.p.Acts[i].Modes[k].Keepers {
			who[p] = true
		}
	}
	return listed(who)
}

func listed(who []bool) []int {
	var out []int
	for p, yes := range who {
		if yes {
			out = append(out, p)
		}
	}
	return out
}

// needs lists, for every place of activity i's crew, the people who fill it in some mode, in order.
func (m *model) needs(i int) [][]int {
	a := &m.p.Acts[i]
	var out [][]int
	for c := range a.Modes[0].Crew {
		who := make([]bool, len(m.p.People))
		for k := range a.Modes {
			md := &a.Modes[k]
			if c < len(md.Crew) {
				who[md.Crew[c]] = true
			}
			if c < len(md.Relief) {
				who[md.Relief[c]] = true
			}
		}
		out = append(out, listed(who))
	}
	return out
}

func watches(watch []bool, c int) bool { return c < len(watch) && watch[c] }

// atLeast gives the number of people of a group that work on activity j at every minute, whatever
// the mode and whichever team is at work, and whether one of the group watches.
func (m *model) atLeast(j int, in []bool) (work int32, watch bool) {
	a := &m.p.Acts[j]
	if a.Cut || m.start[j] == m.finish[j] && m.length[j] == 0 {
		return 0, false
	}
	work, watch = int32(len(in))+1, true
	see := func(team []int, w []bool) {
		n, one := int32(0), false
		for c, p := range team {
			if in[p] && watches(w, c) {
				one = true
			} else if in[p] {
				n++
			}
		}
		work, watch = min(work, n), watch && one
	}
	for k := range a.Modes {
		md := &a.Modes[k]
		see(md.Crew, md.Watch)
		if md.Relief != nil {
			see(md.Relief, md.Watch)
		}
	}
	return work, watch
}
