package solve

import (
	"slices"

	"sailby/plan/problem"
	"sailby/tasks"
	"sailby/tasks/hours"
)

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
		if s.keptBefore(i, nth) == p { // a watch that a delay adds goes to whoever keeps the others
			return p, block{}
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

// keptBefore gives who keeps the last watch of the step where people are kept and the nth is one
// more than the plan has, -1 otherwise.
func (s *state) keptBefore(i, nth int) int {
	if s.kept == nil || len(s.kept[i]) == 0 || nth < len(s.kept[i]) {
		return -1
	}
	return s.kept[i][len(s.kept[i])-1].Who
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
