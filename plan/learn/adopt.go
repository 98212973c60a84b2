package learn

// breed makes some schedules.
func (s *search) breed(b *breeder) outcome {
	for k := 0; k < breedAtOne; k++ {
		s.ticks += int64(b.n) * 8
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
