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

// breed makes some schedules.
func (s *search) breed(b *breeder) outcome {
	for k := 0; k < breedAtOne; k++ {
		s.ticks += int64(b.n) * 16
		b.step()
		if b.best.end < s.value && !s.adopt(b.best) {
			return over
		}
		if s.stopped() {
			return stopped
		}
	}
	return tired
}

// breedAtOne is how many schedules are made in one turn.
const breedAtOne = 100

// adopt notes a schedule found outside the engine.
func (s *search) adopt(x *beast) bool {
	s.value = x.end
	if s.best == nil {
		s.best = make([]int32, len(s.now)/2)
	}
	s.starts = make([]int, 0, len(s.start))
	s.modes = make([]int, len(s.start))
	for i, side := range s.start {
		s.best[side/2] = x.start[i]
		s.starts = append(s.starts, int(x.start[i]))
	}
	s.base = s.starts
	if s.opt.Found != nil {
		s.opt.Found(append([]int(nil), s.starts...), int(s.value))
	}
	return s.tighten() && s.ok()
}

// ok settles the root.
func (s *search) ok() bool {
	if !s.settle() {
		s.dead = true
	}
	return !s.dead
}

// tighten asks for finishes before value; false if there are none.
func (s *search) tighten() bool {
	if !s.raise(s.end^1, 1-s.value, why{kind: whyRoot}) {
		s.dead = true
	}
	return !s.dead
}

// hint takes over a plan that is known; one that does not fit the problem is left alone.
func (s *search) hint() {
	n := len(s.start)
	if n == 0 || len(s.opt.Hint) != n || s.opt.Modes != nil && len(s.opt.Modes) != n {
		return
	}
	s.base, s.best = s.opt.Hint, make([]int32, len(s.now)/2)
	for i, v := range s.base {
		x, w := &s.acts[i], s.acts[i].times[0]
		if s.opt.Modes != nil {
			k := s.opt.Modes[i]
			if k < 0 || k >= len(s.p.Acts[i].Modes) {
				s.base, s.best = nil, nil
				return
			}
			w = s.p.Acts[i].Modes[k].Time
			if len(x.modes) > 0 {
				s.best[x.modes[k]/2] = 1
			}
		}
		s.best[s.start[i]/2] = clip(v)
		if s.start[i] != s.finish[i] {
			s.best[s.finish[i]/2] = s.grids[w].finish(clip(v))
		}
	}
}

// begin takes over what is known and settles the root; false if that is the end of the search.
func (s *search) begin() bool {
	s.value = int32(s.p.End) + 1
	s.room = firstKept
	s.actOf = map[side]int{}
	for i, x := range s.start {
		s.actOf[x] = i
	}
	s.hint()
	if s.opt.Best > 0 && s.opt.Best <= s.p.End {
		s.value = int32(s.opt.Best)
	}
	return s.tighten() && s.ok()
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

// choose gives the next decision, false if every start is settled. Where the best plan known has
// a say it is followed; else things are done early.
func (s *search) choose(early bool) (fact, bool) {
	for !early {
		f, ok := s.atoms.take(s.level())
		if !ok {
			break
		}
		if s.holds(f) || s.fails(f) {
			continue
		}
		if x := int(f.s / 2); x < len(s.best) && s.best[x] >= f.v {
			return f, true
		}
		return f.not(), true
	}
	pick := side(-1)
	for _, x := range s.start {
		if !s.fixed(x) && (pick < 0 || s.now[x] < s.now[pick] || s.now[x] == s.now[pick] && s.now[x^1] > s.now[pick^1]) {
			pick = x
		}
	}
	if pick >= 0 {
		if f, ok := s.modeFor(pick); ok {
			return f, true
		}
		return fact{pick ^ 1, -s.now[pick]}, true
	}
	if s.backs != s.turns { // a level was taken back since
		s.backs, s.modal, s.loose = s.turns, 0, 0
	}
	for ; s.modal < len(s.acts); s.modal++ {
		if f, ok := s.modeFor(s.start[s.modal]); ok {
			return f, true
		}
	}
	// what is left is as early as the starts allow; of two modes that both hold one is enough
	for ; s.loose < side(len(s.now)); s.loose += 2 {
		if x := s.loose; !s.fixed(x) {
			return fact{x ^ 1, -s.now[x]}, true
		}
	}
	return fact{}, false
}

// modeFor gives a decision on who does the activity that begins with side x, if that is open: the
// mode that is done first.
func (s *search) modeFor(x side) (fact, bool) {
	i := s.actOf[x]
	best, least := side(-1), far
	for k, y := range s.acts[i].modes {
		switch {
		case s.now[y] == 1:
			return fact{}, false
		case s.now[y^1] == 0: // ruled out
			continue
		}
		g := s.acts[i].byMode[k]
		if f := g.finish(s.now[x]); f < least {
			best, least = y, f
		}
	}
	if best < 0 {
		return fact{}, false
	}
	return fact{best, 1}, true
}
