// Package solve finds plans and bounds for a problem: serial generation with unscheduling for
// maximum waits, forward-backward improvement and local search for plans; work content against
// open hours for bounds. Minutes count from the problem's base.
package solve

import (
	"slices"
	"sort"

	"sailby/plan/problem"
	"sailby/tasks"
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
		for _, t := range s.p.Res[i].Taken {
			s.change(i, t.From, t.To, t.Amount)
		}
	}
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

// saved is a copy of what is placed, to go back to.
type saved struct {
	people [][]busy
	use    [][]level
	placed []bool
}

// save copies what is placed into d.
func (s *state) save(d *saved) {
	d.people, d.use = copied(d.people, s.people), copied(d.use, s.use)
	d.placed = append(d.placed[:0], s.placed...)
}

// restore goes back to a copy: what was placed then, and nothing else. Starts and finishes of
// what is placed must not have changed since.
func (s *state) restore(d *saved) {
	s.people, s.use = copied(s.people, d.people), copied(s.use, d.use)
	copy(s.placed, d.placed)
}

// copied copies lists into the room of old ones.
func copied[T any](to, from [][]T) [][]T {
	if len(to) != len(from) {
		to = make([][]T, len(from))
	}
	for i := range from {
		to[i] = append(to[i][:0], from[i]...)
	}
	return to
}
