package learn

import "fmt"

// resources makes a rule for each resource: a plain timetable where everything that uses it is
// held from start to finish, one that knows the pauses where not. It
// gives false if an activity asks for more than there is.
func (m *model) resources() bool {
	for k := range m.p.Res {
		var us []user
		var ws []worker
		calm := true
		for i := range m.p.Acts {
			for _, u := range m.p.Acts[i].Uses {
				if u.Res != k || u.Amount <= 0 || m.start[i] == m.finish[i] && m.length[i] == 0 {
					continue
				}
				if u.Amount > m.p.Res[k].Capacity && !m.acts[i].empty {
					return false
				}
				w := worker{user: m.user(i, clip(u.Amount)), on: always}
				if !u.Stays {
					w.mask = m.acts[i].sure
				}
				calm = calm && w.mask == nil
				us, ws = append(us, w.user), append(ws, w)
			}
		}
		capacity := clip(m.p.Res[k].Capacity)
		switch {
		case len(us) == 0:
		case calm:
			newTimetable(m.engine, capacity, us)
		default:
			newWorktable(m.engine, capacity, ws)
		}
	}
	return true
}

func (m *model) user(i int, amount int32) user {
	return user{m.start[i], m.finish[i], m.length[i], amount}
}

// groups makes a rule for each set of people that some need leaves the choice among: all work
// that needs at least so many of them, whoever they are, against their number. It leaves out who
// does what, so that it is only ever too kind. People who keep watch only are left out.
func (m *model) groups() {
	seen := map[string]bool{}
	for i := range m.p.Acts {
		for _, g := range m.needs(i) {
			key := fmt.Sprint(g)
			if seen[key] {
				continue
			}
			seen[key] = true
			var ws []worker
			total := int32(0)
			for j := range m.p.Acts {
				if n := m.atLeast(j, g); n > 0 {
					ws = append(ws, worker{user: m.user(j, n), on: always, mask: m.acts[j].sure})
					total += n
				}
			}
			if total > int32(len(g)) {
				newWorktable(m.engine, int32(len(g)), ws)
			}
		}
	}
}

// needs lists, for every place of activity i's crew, the people who fill it in some mode, in order.
func (m *model) needs(i int) [][]int {
	a := &m.p.Acts[i]
	var out [][]int
	for c := range a.Modes[0].Crew {
		who := make([]bool, len(m.p.People))
		for k := range a.Modes {
			md := &a.Modes[k]
			if c < len(md.Crew) && !watches(md.Watch, c) {
				who[md.Crew[c]] = true
				if c < len(md.Relief) {
					who[md.Relief[c]] = true
				}
			}
		}
		var list []int
		for p, yes := range who {
			if yes {
				list = append(list, p)
			}
		}
		if list != nil {
			out = append(out, list)
		}
	}
	return out
}

func watches(watch []bool, c int) bool { return c < len(watch) && watch[c] }

// atLeast gives the number of people of group that activity j takes at every minute, whatever
// the mode and whichever team is at work.
func (m *model) atLeast(j int, group []int) int32 {
	a := &m.p.Acts[j]
	if m.start[j] == m.finish[j] && m.length[j] == 0 {
		return 0
	}
	in := make(map[int]bool, len(group))
	for _, p := range group {
		in[p] = true
	}
	count := func(team []int, watch []bool) int32 {
		n := int32(0)
		for c, p := range team {
			if in[p] && !watches(watch, c) {
				n++
			}
		}
		return n
	}
	least := int32(len(group)) + 1
	for k := range a.Modes {
		md := &a.Modes[k]
		least = min(least, count(md.Crew, md.Watch))
		if md.Relief != nil {
			least = min(least, count(md.Relief, md.Watch))
		}
	}
	return least
}
