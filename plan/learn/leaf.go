package learn

import (
	"errors"
	"sort"
)

// A leaf is a state in which everything is settled. The masks of the worktables leave out spans
// that work may skip, and watches after stops on the way; here the pieces of the chosen modes are
// counted as they are, so that no plan gets through that uses a person or a resource twice. The
// clash is the starts, modes and keepers of those concerned. O(pieces log pieces), plus the search
// for keepers.

// holding is a stretch of use. Holdings of one team by one person count once.
type holding struct {
	act      int
	from, to int32
	amount   int32
	who      int
	team     int
	after    bool // a fire watch after a piece
}

// leaf says whether the settled plan uses nobody and nothing more than there is; if not, the
// clash is filled. It notes who keeps the watches.
func (m *model) leaf() bool {
	h := &holdings{model: m, res: make([][]holding, len(m.p.Res)), people: make([][]holding, len(m.p.People))}
	for i := range m.p.Acts {
		h.add(i)
	}
	for p, list := range h.people {
		if !m.within(list, 1, why{kind: whyLeaf, who: int32(p)}) {
			return false
		}
	}
	if !h.watchStops() {
		m.fell = nobody
		if m.log != nil {
			m.log.begin()
			m.log.lost = ErrUnsaid
		}
		return false
	}
	for k, list := range h.res {
		if !m.within(list, clip(m.p.Res[k].Capacity), why{kind: whyLeaf, id: 1, who: int32(k)}) {
			return false
		}
	}
	m.kept = m.kept[:0]
	for p, list := range h.people {
		for _, x := range list {
			if x.after {
				m.kept = append(m.kept, Kept{x.act, int(x.from), int(x.to), p})
			}
		}
	}
	sort.Slice(m.kept, func(i, j int) bool {
		a, b := m.kept[i], m.kept[j]
		return a.Act < b.Act || a.Act == b.Act && a.From < b.From
	})
	return true
}

// ErrUnsaid says that the log knows no lemma for what the search has come upon.
var ErrUnsaid = errors.New("the search rests on who keeps the fire watches at stops on the way, which logs do not tell")

// holdings collects the uses of a plan.
type holdings struct {
	*model
	res, people [][]holding
	tries       int
	crowded     bool // a keeper found no room
}

// add collects what activity i uses.
func (h *holdings) add(i int) {
	a := &h.p.Acts[i]
	md := &a.Modes[h.chosen(i)]
	start, finish := h.now[h.start[i]], h.now[h.finish[i]]+h.length[i]
	for _, u := range a.Uses {
		if u.Stays {
			h.res[u.Res] = append(h.res[u.Res], holding{i, start, finish, clip(u.Amount), -1, 0, false})
		}
	}
	md.Time.Pieces(int(start), func(from, to int) {
		for _, u := range a.Uses {
			if !u.Stays && u.Res != a.WatchRoom-1 {
				h.res[u.Res] = append(h.res[u.Res], holding{i, int32(from), int32(to), clip(u.Amount), -1, 0, false})
			}
		}
		if md.Relief == nil {
			h.crew(i, md.Crew, md.Watch, int32(from), int32(to))
			return
		}
		first := toSpans(md.First)
		piece := spans{{int32(from), int32(to)}}
		for _, s := range piece.and(first) {
			h.crew(i, md.Crew, md.Watch, s.from, s.to)
		}
		for _, s := range piece.less(first) {
			h.crew(i, md.Relief, md.Watch, s.from, s.to)
		}
	})
	for _, k := range h.acts[i].keepers {
		if h.now[k.on] == 1 {
			h.watch(i, k.who, finish, finish+h.acts[i].watch)
			break
		}
	}
}

// crew collects the people of a piece.
func (h *holdings) crew(i int, crew []int, watch []bool, from, to int32) {
	room := h.p.Acts[i].WatchRoom - 1
	for c, p := range crew {
		x := holding{i, from, to, 1, p, 0, false}
		if watches(watch, c) {
			x.team = h.team[i]
		}
		h.people[p] = append(h.people[p], x)
		if room >= 0 {
			h.res[room] = append(h.res[room], x)
		}
	}
}

// watch notes that p keeps a watch after a piece of activity i.
func (h *holdings) watch(i, p int, from, to int32) {
	x := holding{i, from, to, 1, p, h.team[i], true}
	h.people[p] = append(h.people[p], x)
	if room := h.p.Acts[i].WatchRoom - 1; room >= 0 {
		h.res[room] = append(h.res[room], x)
	}
}

// within says whether the holdings never add up to more than capacity; if they do, the clash is
// that of the activities at work when they first do; says names it.
func (m *model) within(list []holding, capacity int32, says why) bool {
	sort.SliceStable(list, func(i, j int) bool { return list[i].from < list[j].from })
	for i := range list {
		if list[i].from >= list[i].to {
			continue
		}
		used := int32(0)
		m.clash = m.clash[:0]
		for j := 0; j <= i; j++ {
			if list[j].to <= list[i].from || list[j].from >= list[j].to || again(list[:j], list[j], list[i].from) {
				continue
			}
			used += list[j].amount
			m.place(list[j].act)
		}
		if used > capacity {
			m.fell = says
			m.fell.at = list[i].from
			return false
		}
	}
	return true
}

// again says whether x is a watch by somebody who watches in that workface at t already.
func again(list []holding, x holding, t int32) bool {
	for _, y := range list {
		if x.team > 0 && x.team == y.team && x.who == y.who && y.to > t && y.from < y.to {
			return true
		}
	}
	return false
}

// place adds to the clash that activity i is where and by whom it is.
func (m *model) place(i int) {
	s, x := m.start[i], &m.acts[i]
	m.clash = append(m.clash, fact{s, m.now[s]}, fact{s ^ 1, m.now[s^1]})
	if len(x.modes) > 0 {
		m.clash = append(m.clash, fact{x.modes[m.chosen(i)], 1})
	}
	for _, k := range x.keepers {
		if m.now[k.on] == 1 {
			m.clash = append(m.clash, fact{k.on, 1})
		}
	}
}
