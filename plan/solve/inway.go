package solve

import (
	"sort"

	"sailby/plan/problem"
	"sailby/tasks"
)

// block is what stands in the way of a start.
type block struct {
	next   int // no earlier start than this can do
	before int // no later finish than this can do (for schedules made backward)
	kind   blockKind
	who    int // person, resource or pair
	other  int // the activity in the way, -1 if none in particular
}

type blockKind uint8

const (
	free blockKind = iota
	byPerson
	byResource
	byPair
)

// fits says whether activity i can start at s in mode m, and if not what is in the way. skip
// leaves out one thing: see skipper.
func (s *state) fits(i, m, at int, skip *skipper) block {
	s.ticks++
	a := &s.p.Acts[i]
	md := &a.Modes[m]
	fin := md.Time.Finish(at)
	for _, u := range a.Uses {
		if u.Stays && !skip.resource(u.Res) {
			if b := s.useBlock(u, at, fin); b.kind != free {
				return b
			}
		}
	}
	var hit block
	md.Time.Pieces(at, func(from, to int) {
		if hit.kind == free {
			hit = s.pieceBlock(a, md, from, to, skip)
		}
	})
	if hit.kind == free && len(md.Keepers) > 0 {
		hit = s.watchBlock(i, md, at, fin, skip)
	}
	if hit.kind != free {
		return hit
	}
	var apart block // of all that must be over first, what is over last
	for _, k := range s.pairs[i] {
		if b := s.pairBlock(k, i, at, fin, skip); b.kind != free && (apart.kind == free || b.next > apart.next) {
			apart = b
		}
	}
	return apart
}

// pieceBlock looks for what is in the way of one hands-on piece.
func (s *state) pieceBlock(a *problem.Act, md *problem.Mode, from, to int, skip *skipper) block {
	for _, u := range a.Uses {
		if !u.Stays && !skip.resource(u.Res) && u.Res != a.WatchRoom-1 {
			if b := s.useBlock(u, from, to); b.kind != free {
				return b
			}
		}
	}
	if md.Relief == nil {
		return s.crewBlock(a, md.Crew, md.Watch, from, to, skip)
	}
	var hit block
	turns(md, from, to, func(from, to int, second bool) {
		crew := md.Crew
		if second {
			crew = md.Relief
		}
		if hit.kind == free {
			hit = s.crewBlock(a, crew, md.Watch, from, to, skip)
		}
	})
	return hit
}

// turns cuts a piece where the teams of a mode change over.
func turns(md *problem.Mode, from, to int, emit func(from, to int, second bool)) {
	at := from
	for _, f := range md.First {
		lo, hi := max(at, int(f.From)), min(to, int(f.To))
		if lo >= hi {
			continue
		}
		if at < lo {
			emit(at, lo, true)
		}
		emit(lo, hi, false)
		at = hi
	}
	if at < to {
		emit(at, to, true)
	}
}

func (s *state) crewBlock(a *problem.Act, crew []int, watch []bool, from, to int, skip *skipper) block {
	for k, p := range crew {
		if skip.person(p) {
			continue
		}
		var face *tasks.Workface
		if watch[k] && a.Step != nil {
			face = a.Step.Face
		}
		if b := s.personBlock(p, from, to, face); b.kind != free {
			return b
		}
	}
	if a.WatchRoom > 0 && !skip.resource(a.WatchRoom-1) {
		return s.roomBlock(a, crew, watch, from, to)
	}
	return block{}
}

// personBlock looks for work of person p that overlaps [from, to).
func (s *state) personBlock(p, from, to int, face *tasks.Workface) block {
	list := s.people[p]
	i := sort.Search(len(list), func(i int) bool { return list[i].from >= to })
	for i--; i >= 0; i-- { // entries overlap only where watches are shared: look a few back
		b := list[i]
		if b.to > from && (face == nil || b.watch != face) {
			return block{next: min(b.to, to), before: max(b.from, from), kind: byPerson, who: p, other: b.act}
		}
		if b.watch == nil && b.to <= from {
			break
		}
	}
	return block{}
}

// useBlock looks for a minute in [from, to) at which a resource has too little left.
func (s *state) useBlock(u problem.Use, from, to int) block {
	list, room := s.use[u.Res], s.p.Res[u.Res].Capacity-u.Amount
	i := sort.Search(len(list), func(i int) bool { return list[i].at > from }) - 1
	if i < 0 {
		i = 0
	}
	for ; i < len(list) && list[i].at < to; i++ {
		if list[i].amount <= room {
			continue
		}
		end := problem.Inf
		if i+1 < len(list) {
			end = list[i+1].at
		}
		if end > from {
			return block{next: min(end, to), before: max(list[i].at, from), kind: byResource, who: u.Res, other: -1}
		}
	}
	if room < 0 {
		return block{next: problem.Inf, before: -problem.Inf, kind: byResource, who: u.Res, other: -1}
	}
	return block{}
}

// pairBlock looks whether pair k keeps i from running from at to fin.
func (s *state) pairBlock(k, i, at, fin int, skip *skipper) block {
	pr := &s.p.Pairs[k]
	j, tailI, endJ := pr.B, pr.TailA, s.ends[k][1]
	if j == i {
		j, tailI, endJ = pr.A, pr.TailB, s.ends[k][0]
	}
	if !s.placed[j] || at >= endJ || at == fin || s.start[j] == s.finish[j] || skip.pair(k) {
		return block{}
	}
	endI := fin
	if tailI != nil && s.start[j] >= fin {
		endI = tailI(fin)
	}
	if s.start[j] < endI {
		return block{next: endJ, before: s.start[j], kind: byPair, who: k, other: j}
	}
	return block{}
}

// skipper leaves one thing out of what stands in the way, to see whether it sets a date. The
// nil skipper leaves nothing out.
type skipper struct {
	persons   map[int]bool
	resources map[int]bool
	pairs     map[int]bool
}

func (k *skipper) person(p int) bool   { return k != nil && k.persons[p] }
func (k *skipper) resource(r int) bool { return k != nil && k.resources[r] }
func (k *skipper) pair(i int) bool     { return k != nil && k.pairs[i] }
