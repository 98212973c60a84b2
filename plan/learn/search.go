package learn

import "sailby/plan/problem"

// search looks for better and better plans until there is none.
type search struct {
	*model
	opt    Options
	best   []int32 // value of each variable in the best plan or the hint, nil if none
	starts []int   // the best plan found, nil if none
	base   []int   // the plan that slices are taken of: the best found, or the hint
	modes  []int
	keep   []Kept // the fire watches of the best plan
	value  int32  // only finishes before this are looked for
	polled int64
	room   int64 // clauses allowed
	assume []fact
	people bool         // the model names people: plans are checked piece by piece
	actOf  map[side]int // activity by the side of its start
	once   bool         // the first plan is enough
	silent bool         // plans are not taken, only counted as found
	last   outcome      // why a contradiction was not found
	core   []fact       // assumptions that cannot hold together, after refused
	modal  int          // activities before this one have their mode, since backs
	loose  side         // variables before this one are settled, since backs
	backs  int64
}

// outcome is how a run ended.
type outcome uint8

const (
	tired   outcome = iota // as many conflicts as it was allowed
	found                  // a better plan
	refused                // nothing under the assumptions
	over                   // nothing at all: the search is finished
	stopped
)

// Restarts begin short and grow by a tenth.
const (
	firstRun   = 100
	growth     = 10
	lowEvery   = 4
	firstKept  = 2000
	keptStep   = 300
	atomFade   = 1 / 0.95
	clauseFade = 1 / 0.999
)

// run searches until one of the outcomes; it begins and ends at level 0. With early it branches
// on the starts in the order of time, else on the atoms of the learnt clauses.
func (s *search) run(assume []fact, limit int64, early bool) outcome {
	from := s.conflicts
	for {
		if !s.settle() {
			if !s.learn() {
				return over
			}
			s.atoms.bump *= atomFade
			s.bump *= clauseFade
			continue
		}
		if s.stopped() {
			s.retreat(0)
			return stopped
		}
		if s.conflicts-from >= limit {
			s.retreat(0)
			return tired
		}
		if k := int(s.level()); k < len(assume) {
			if s.fails(assume[k]) {
				s.core = s.behind(assume[k])
				s.retreat(0)
				return refused
			}
			s.decide(assume[k])
			continue
		}
		f, ok := s.choose(early)
		if ok {
			s.decide(f)
			continue
		}
		if s.people && !s.leaf() {
			if !s.learn() {
				return over
			}
			continue
		}
		if s.silent {
			s.retreat(0)
			return found
		}
		if !s.take() {
			return over
		}
		if s.once {
			return stopped
		}
		return found
	}
}

// take notes the plan that the bounds have come down to, and asks for a better one from now on.
func (s *search) take() bool {
	s.value = s.now[s.end]
	s.best = s.best[:0]
	for x := 0; x < len(s.now); x += 2 {
		s.best = append(s.best, s.now[x])
	}
	s.starts = make([]int, 0, len(s.start))
	s.modes, s.keep = s.modes[:0], append(s.keep[:0], s.kept...)
	for i, x := range s.start {
		s.starts = append(s.starts, int(s.now[x]))
		s.modes = append(s.modes, s.chosen(i))
	}
	s.base = s.starts
	if s.opt.Found != nil {
		s.opt.Found(append([]int(nil), s.starts...), int(s.value))
	}
	s.retreat(0)
	return s.tighten()
}

// ok settles the root.
func (s *search) ok() bool {
	if !s.settle() {
		if s.log != nil {
			s.log.clash()
			s.log.none()
		}
		s.dead = true
	}
	return !s.dead
}

// tighten asks for finishes before value; false if there are none.
func (s *search) tighten() bool {
	if s.log != nil && int(s.value) <= s.p.End {
		s.log.line("until %d", s.value-1)
	}
	if !s.raise(s.end^1, 1-s.value, why{kind: whyRoot}) {
		if s.log != nil {
			s.log.none()
		}
		s.dead = true
	}
	return !s.dead
}

// result says what has been found out.
func (s *search) result() Result {
	r := Result{Finish: problem.Inf, Bound: problem.Inf, Ticks: s.ticks, Conflicts: s.conflicts}
	if !s.dead {
		r.Bound = int(s.now[s.end])
	}
	if s.starts != nil {
		r.Starts, r.Modes, r.Watches, r.Finish = s.starts, s.modes, s.keep, int(s.value)
		r.Status, r.Bound = Feasible, min(r.Bound, r.Finish)
		if s.dead {
			r.Status = Optimal
		}
	} else if s.dead {
		r.Status = Infeasible
	}
	return r
}

// stopped asks, not too often, whether to go on.
func (s *search) stopped() bool {
	if s.opt.Ticks > 0 && s.ticks >= s.opt.Ticks {
		return true
	}
	if s.opt.Stop != nil && s.ticks-s.polled > pollEvery {
		s.polled = s.ticks
		return s.opt.Stop()
	}
	return false
}
