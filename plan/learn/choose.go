package learn

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
