package learn

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
