package learn

import "sailby/plan/problem"

// search looks for better and better plans until there is none.
type search struct {
	*model
	opt    Options
	best   []int32 // starts of the best plan, nil if none
	value  int32   // its finish
	bound  int32
	polled int64
	first  bool // branch on starts, in the order of time
}

// minimise is the search for the best plan.
func (s *search) minimise() Result {
	s.value = int32(s.p.End) + 1
	if s.opt.Hint != nil {
		for _, v := range s.opt.Hint {
			s.best = append(s.best, int32(v))
		}
	}
	found := false
	if s.opt.Best > 0 && s.opt.Best <= s.p.End {
		s.value = int32(s.opt.Best)
	}
	status := Unknown
	restart, limit := int64(0), int64(100)
	first := true
	kept := int64(2000)
	for {
		if !s.settle() {
			if !s.learn() {
				break
			}
			s.atoms.bump *= 1 / 0.95
			s.bump *= 1 / 0.999
			restart++
			continue
		}
		if s.stopped() {
			status = Feasible
			break
		}
		if s.level() == 0 {
			s.bound = s.now[s.end]
		}
		if restart >= limit {
			restart, limit = 0, limit*11/10
			first = !first
			s.retreat(0)
			if int64(len(s.refs)) > kept {
				s.reduce()
				kept += 300
			}
			continue
		}
		f, ok := s.choose(first)
		if ok {
			s.decide(f)
			continue
		}
		s.value = s.now[s.end]
		found = true
		s.best = s.best[:0]
		for _, x := range s.start {
			s.best = append(s.best, s.now[x])
		}
		if s.opt.Found != nil {
			s.opt.Found(ints(s.best), int(s.value))
		}
		s.retreat(0)
		if !s.raise(s.end^1, 1-s.value, why{kind: whyRoot}) {
			break
		}
	}
	r := Result{Status: status, Finish: problem.Inf, Bound: int(s.bound), Ticks: s.ticks, Conflicts: s.conflicts}
	if found {
		r.Starts, r.Finish = ints(s.best), int(s.value)
	}
	switch {
	case status == Feasible && !found:
		r.Status = Unknown
	case status != Feasible && found:
		r.Status, r.Bound = Optimal, r.Finish
	case status != Feasible:
		r.Status, r.Bound = Infeasible, problem.Inf
	}
	return r
}

func ints(a []int32) []int {
	out := make([]int, len(a))
	for i, v := range a {
		out[i] = int(v)
	}
	return out
}

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

// choose gives the next decision, false if every start is settled.
func (s *search) choose(first bool) (fact, bool) {
	for !first {
		f, ok := s.atoms.take(s.level())
		if !ok {
			break
		}
		if s.holds(f) || s.fails(f) {
			continue
		}
		if s.best != nil && int(f.s/2) < len(s.best) {
			if s.best[f.s/2] >= f.v {
				return f, true
			}
			return f.not(), true
		}
		return f.not(), true
	}
	pick := side(-1)
	for _, x := range s.start {
		if !s.fixed(x) && (pick < 0 || s.now[x] < s.now[pick] || s.now[x] == s.now[pick] && s.now[x^1] > s.now[pick^1]) {
			pick = x
		}
	}
	if pick < 0 {
		// the finish of the whole is as early as the starts allow
		if !s.fixed(s.end) {
			return fact{s.end ^ 1, -s.now[s.end]}, true
		}
		return fact{}, false
	}
	return fact{pick ^ 1, -s.now[pick]}, true
}
