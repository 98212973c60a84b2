package learn

import "sort"

// A leaf is a state in which everything is settled. The masks of the worktables leave out spans
// that work may skip; here the pieces of the chosen modes are counted as they are, so that no plan
// gets through that uses a person or a resource twice. The clash of two activities is their starts
// and modes. O(pieces log pieces).

// holding is a stretch of use.
type holding struct {
	act      int
	from, to int32
	amount   int32
}

// leaf says whether the settled plan uses nobody and nothing more than there is; if not, the
// clash is filled.
func (m *model) leaf() bool {
	res := make([][]holding, len(m.p.Res))
	people := make([][]holding, len(m.p.People))
	for i := range m.p.Acts {
		a := &m.p.Acts[i]
		md := &a.Modes[m.chosen(i)]
		start, finish := m.now[m.start[i]], m.now[m.finish[i]]+m.length[i]
		for _, u := range a.Uses {
			if u.Stays {
				res[u.Res] = append(res[u.Res], holding{i, start, finish, clip(u.Amount)})
			}
		}
		md.Time.Pieces(int(start), func(from, to int) {
			h := holding{i, int32(from), int32(to), 1}
			for _, u := range a.Uses {
				if !u.Stays {
					h.amount = clip(u.Amount)
					res[u.Res] = append(res[u.Res], h)
				}
			}
			h.amount = 1
			if md.Relief == nil {
				for c, p := range md.Crew {
					if !watches(md.Watch, c) {
						people[p] = append(people[p], h)
					}
				}
				return
			}
			first := toSpans(md.First)
			team := md.Relief
			if first.has(h.from) {
				team = md.Crew
			}
			for c, p := range team {
				if !watches(md.Watch, c) {
					people[p] = append(people[p], h)
				}
			}
		})
	}
	for k, list := range res {
		if !m.within(list, clip(m.p.Res[k].Capacity)) {
			return false
		}
	}
	for _, list := range people {
		if !m.within(list, 1) {
			return false
		}
	}
	return true
}

// within says whether the holdings never add up to more than capacity; if they do, the clash is
// that of the activities that do so first.
func (m *model) within(list []holding, capacity int32) bool {
	sort.SliceStable(list, func(i, j int) bool { return list[i].from < list[j].from })
	for i := range list {
		used := int32(0)
		m.clash = m.clash[:0]
		for j := 0; j <= i; j++ {
			if list[j].to > list[i].from && list[j].from < list[j].to {
				used += list[j].amount
				m.place(list[j].act)
			}
		}
		if used > capacity && list[i].from < list[i].to {
			return false
		}
	}
	return true
}

// place adds to the clash that activity i is where and by whom it is.
func (m *model) place(i int) {
	s := m.start[i]
	m.clash = append(m.clash, fact{s, m.now[s]}, fact{s ^ 1, m.now[s^1]})
	if x := &m.acts[i]; len(x.modes) > 0 {
		m.clash = append(m.clash, fact{x.modes[m.chosen(i)], 1})
	}
}
