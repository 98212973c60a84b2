// Package solve finds plans and bounds for a problem: serial generation with unscheduling for
// maximum waits, forward-backward improvement and local search for plans; work content against
// open hours for bounds. Minutes count from the problem's base.
package solve

import (
	"slices"
	"sort"

	"sailby/plan/problem"
	"sailby/tasks"
	"sailby/tasks/hours"
)

// busy is a stretch in which a person works or keeps a watch. Watches in one workface may
// overlap for one person (R13).
type busy struct {
	from, to int
	act      int
	watch    *tasks.Workface // nil: work of their own, which nothing may overlap
}

// level is a step of a resource's use: amount from minute at on.
type level struct{ at, amount int }

// state is a partial schedule.
type state struct {
	p       *problem.Problem
	start   []int
	finish  []int
	mode    []int
	placed  []bool
	people  [][]busy  // by person, sorted by from
	use     [][]level // by resource, sorted by at
	pairs   [][]int   // by activity: indices into Problem.Pairs
	ends    [][2]int  // by pair: when its placed A and B are clear, tails included
	watches [][]busy  // by activity: its fire watches; act is the person who keeps each
	weight  []int     // by person: how much they are wanted elsewhere
	kept    [][]Watch // by activity: who has to keep its watches, where people are kept; nil for anybody
	ticks   int64     // starts tried, the measure of work done
}

func newState(p *problem.Problem) *state {
	n := len(p.Acts)
	s := &state{p: p, start: make([]int, n), finish: make([]int, n), mode: make([]int, n), placed: make([]bool, n),
		people: make([][]busy, len(p.People)), use: make([][]level, len(p.Res)), pairs: make([][]int, n),
		ends: make([][2]int, len(p.Pairs)), watches: make([][]busy, n), weight: make([]int, len(p.People))}
	for i, pr := range p.Pairs {
		s.pairs[pr.A] = append(s.pairs[pr.A], i)
		s.pairs[pr.B] = append(s.pairs[pr.B], i)
	}
	return s
}

// reset empties the schedule.
func (s *state) reset() {
	for i := range s.placed {
		s.placed[i] = false
	}
	for i := range s.people {
		s.people[i] = s.people[i][:0]
	}
	for i := range s.use {
		s.use[i] = s.use[i][:0]
	}
}

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
	for _, k := range s.pairs[i] {
		if b := s.pairBlock(k, i, at, fin, skip); b.kind != free {
			return b
		}
	}
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
	return hit
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

// roomBlock looks whether a workface has room for a crew from one minute to another. Somebody
// who watches other work there already is not counted twice.
func (s *state) roomBlock(a *problem.Act, crew []int, watch []bool, from, to int) block {
	cuts := []int{from, to}
	for k, p := range crew {
		if watch[k] {
			for _, b := range s.people[p] {
				if b.watch == a.Step.Face && b.from < to && b.to > from {
					cuts = append(cuts, max(b.from, from), min(b.to, to))
				}
			}
		}
	}
	slices.Sort(cuts)
	for c := 1; c < len(cuts); c++ {
		if cuts[c-1] == cuts[c] {
			continue
		}
		count := 0
		for k, p := range crew {
			if !watch[k] || !s.watching(p, a.Step.Face, cuts[c-1]) {
				count++
			}
		}
		if b := s.useBlock(problem.Use{Res: a.WatchRoom - 1, Amount: count}, cuts[c-1], cuts[c]); b.kind != free {
			return b
		}
	}
	return block{}
}

// watching says whether p keeps a watch at a workface in the minute that begins at t.
func (s *state) watching(p int, face *tasks.Workface, t int) bool {
	for _, b := range s.people[p] {
		if b.watch == face && b.from <= t && t < b.to {
			return true
		}
	}
	return false
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

// watchBlock looks whether somebody can keep the fire watch after every stop, and whether the
// workface has room for it.
func (s *state) watchBlock(i int, md *problem.Mode, at, fin int, skip *skipper) block {
	a := &s.p.Acts[i]
	for k, e := range md.Time.Stops(at) {
		who, b := s.keeper(i, k, md, at, e, skip)
		if b.kind == free && a.WatchRoom > 0 && !skip.resource(a.WatchRoom-1) {
			b = s.roomBlock(a, []int{who}, []bool{true}, e, e+md.Time.Watch())
		}
		if b.kind == free {
			continue
		}
		if e == fin {
			b.next = firstFinishing(md.Time, b.next, at+1)
		} else {
			b.next = e
		}
		b.before = min(b.before-md.Time.Watch(), e-1)
		return b
	}
	return block{}
}

// keeper finds who keeps the nth watch of the step, which begins at e: of those who can, who is least wanted
// elsewhere. The block is that of whoever is free first.
func (s *state) keeper(i, nth int, md *problem.Mode, at, e int, skip *skipper) (who int, hit block) {
	until, face := e+md.Time.Watch(), s.p.Acts[i].Step.Face
	who, hit = -1, block{next: problem.Inf, before: -problem.Inf, kind: byPerson, who: -1, other: -1}
	for k, p := range md.Keepers {
		if s.kept != nil && nth < len(s.kept[i]) && s.kept[i][nth].Who != p {
			continue
		}
		if !md.Stay[k].Covers(hours.Span{From: hours.Minute(e), To: hours.Minute(until)}) || s.ownWork(md, p, at, e, until) {
			continue
		}
		if b := s.personBlock(p, e, until, face); b.kind != free && !skip.person(p) {
			if b.next < hit.next {
				hit = b
			}
			continue
		}
		if who < 0 || s.weight[p] < s.weight[who] {
			who = p
		}
	}
	if who >= 0 {
		return who, block{}
	}
	if hit.next >= problem.Inf {
		hit.next = e + 1
	}
	return -1, hit
}

// ownWork says whether p, who works on the step and does not only watch it, goes on with it
// before a watch from e to until is over.
func (s *state) ownWork(md *problem.Mode, p, at, e, until int) bool {
	works := hasPerson(md.Relief, p)
	for k, c := range md.Crew {
		works = works || c == p && !md.Watch[k]
	}
	if !works {
		return false
	}
	again := false
	md.Time.Pieces(at, func(from, to int) { again = again || from >= e && from < until })
	return again
}

// put places activity i.
func (s *state) put(i, m, at int) {
	a := &s.p.Acts[i]
	md := &a.Modes[m]
	fin := md.Time.Finish(at)
	s.placed[i], s.start[i], s.finish[i], s.mode[i] = true, at, fin, m
	for _, k := range s.pairs[i] {
		side, tail := 0, s.p.Pairs[k].TailA
		if s.p.Pairs[k].B == i {
			side, tail = 1, s.p.Pairs[k].TailB
		}
		s.ends[k][side] = fin
		if tail != nil {
			s.ends[k][side] = tail(fin)
		}
	}
	for _, u := range a.Uses {
		if u.Stays {
			s.occupy(u, at, fin)
		}
	}
	md.Time.Pieces(at, func(from, to int) {
		for _, u := range a.Uses {
			if !u.Stays {
				s.occupy(u, from, to)
			}
		}
		if md.Relief == nil {
			s.engage(i, md.Crew, md.Watch, from, to)
			return
		}
		turns(md, from, to, func(from, to int, second bool) {
			if second {
				s.engage(i, md.Relief, md.Watch, from, to)
			} else {
				s.engage(i, md.Crew, md.Watch, from, to)
			}
		})
	})
	s.watches[i] = s.watches[i][:0]
	if len(md.Keepers) > 0 {
		for k, e := range md.Time.Stops(at) {
			who, _ := s.keeper(i, k, md, at, e, nil)
			if who < 0 {
				who = md.Keepers[0] // asked for out of order: the checker will say so
			}
			s.watches[i] = append(s.watches[i], busy{e, e + md.Time.Watch(), who, a.Step.Face})
			s.engageOne(i, who, busy{e, e + md.Time.Watch(), i, a.Step.Face})
		}
	}
}

func (s *state) engage(i int, crew []int, watch []bool, from, to int) {
	for k, p := range crew {
		b := busy{from: from, to: to, act: i}
		if watch[k] && s.p.Acts[i].Step != nil {
			b.watch = s.p.Acts[i].Step.Face
		}
		s.engageOne(i, p, b)
	}
}

// engageOne puts one stretch of work or watch on a person, and a watcher into the workface's
// room unless they stand there already.
func (s *state) engageOne(i, p int, b busy) {
	if room := s.p.Acts[i].WatchRoom; room > 0 && b.watch != nil {
		s.fresh(p, b, func(from, to int) { s.change(room-1, from, to, 1) })
	}
	s.insert(p, b)
}

// fresh calls emit for the parts of a watch in which its person keeps no other in the workface.
func (s *state) fresh(p int, b busy, emit func(from, to int)) {
	at := b.from
	for _, o := range s.people[p] { // sorted by from
		if o.watch != b.watch || o.to <= at || o.from >= b.to {
			continue
		}
		if o.from > at {
			emit(at, o.from)
		}
		at = max(at, o.to)
	}
	if at < b.to {
		emit(at, b.to)
	}
}

func (s *state) insert(p int, b busy) {
	list := s.people[p]
	k := sort.Search(len(list), func(i int) bool { return list[i].from > b.from })
	list = append(list, busy{})
	copy(list[k+1:], list[k:])
	list[k] = b
	s.people[p] = list
}

// occupy adds amount to a resource's use in [from, to).
func (s *state) occupy(u problem.Use, from, to int) {
	if from >= to {
		return
	}
	s.change(u.Res, from, to, u.Amount)
}

func (s *state) change(res, from, to, by int) {
	list := s.use[res]
	list = split(list, from)
	list = split(list, to)
	for i := range list {
		if list[i].at >= from && list[i].at < to {
			list[i].amount += by
		}
	}
	s.use[res] = list
}

// split makes sure that a step of the use begins at minute at.
func split(list []level, at int) []level {
	k := sort.Search(len(list), func(i int) bool { return list[i].at >= at })
	if k < len(list) && list[k].at == at {
		return list
	}
	amount := 0
	if k > 0 {
		amount = list[k-1].amount
	}
	list = append(list, level{})
	copy(list[k+1:], list[k:])
	list[k] = level{at, amount}
	return list
}

// take removes activity i.
func (s *state) take(i int) {
	if !s.placed[i] {
		return
	}
	a := &s.p.Acts[i]
	md := &a.Modes[s.mode[i]]
	for _, u := range a.Uses {
		if u.Stays && s.start[i] < s.finish[i] {
			s.change(u.Res, s.start[i], s.finish[i], -u.Amount)
		}
	}
	md.Time.Pieces(s.start[i], func(from, to int) {
		for _, u := range a.Uses {
			if !u.Stays {
				s.change(u.Res, from, to, -u.Amount)
			}
		}
	})
	people := append(append([]int(nil), md.Crew...), md.Relief...)
	for _, w := range s.watches[i] {
		people = append(people, w.act)
	}
	for _, p := range people {
		s.release(i, p)
	}
	s.placed[i] = false
}

// release takes everything that activity i has put on a person off again.
func (s *state) release(i, p int) {
	room := s.p.Acts[i].WatchRoom
	for k := 0; k < len(s.people[p]); {
		b := s.people[p][k]
		if b.act != i {
			k++
			continue
		}
		s.people[p] = slices.Delete(s.people[p], k, k+1)
		if room > 0 && b.watch != nil {
			s.fresh(p, b, func(from, to int) { s.change(room-1, from, to, -1) })
		}
	}
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
