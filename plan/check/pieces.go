package check

import (
	"sailby/tasks/hours"
)

// pieces compares the pieces of a hands-on step with what the rules make of its start (R1, R5,
// R6, R8, R9, R13, R14, R15, R23).
func (c *checker) pieces(r *row) {
	if r.s.Working == 0 || !c.open(r) || !c.turns(r) {
		return
	}
	want, rule, why := c.expected(r)
	if rule != "" {
		c.add(rule, r, mins(r.s.SetUp+r.s.Working), r.spans(), "%s", why)
		return
	}
	c.compare(r, want)
}

// open checks that every planned minute can be worked; it reports each rule once.
func (c *checker) open(r *row) bool {
	told := map[string]bool{}
	for i, piece := range r.p.Pieces {
		team := r.teamOf(i)
		for t := piece.From; t < piece.To; t++ {
			rule, who, why := c.shut(r, r.team[team], t)
			if rule != "" && len(r.p.Relief) > 0 {
				if other, _, _ := c.shut(r, r.team[1-team], t); other == "" {
					rule, who, why = "R9", "the other team", "is on shift and should work"
				}
			}
			if rule != "" && !told[rule] {
				told[rule] = true
				c.add(rule, r, "", c.when(t, r.s.Place), "is worked when %s %s", who, why)
			}
		}
	}
	return len(told) == 0
}

// teamOf tells which team works piece i: 0 the first, 1 the relief.
func (r *row) teamOf(i int) int {
	if i < len(r.p.Shifts) && r.p.Shifts[i] == 1 {
		return 1
	}
	return 0
}

// turns checks that two teams take turns only where the task lets work change hands, and that
// the first works whenever all of it are on shift (R9).
func (c *checker) turns(r *row) bool {
	if len(r.p.Relief) == 0 {
		for i := range r.p.Shifts {
			if r.p.Shifts[i] != 0 {
				c.add("R9", r, "", "", "a second team works, but none is named")
				return false
			}
		}
		return true
	}
	if !r.s.ChangeHands {
		c.add("R9", r, "one team", "two", "may not change hands")
		return false
	}
	for i, piece := range r.p.Pieces {
		for t := piece.From; t < piece.To && r.teamOf(i) == 1; t++ {
			if rule, _, _ := c.shut(r, r.team[0], t); rule == "" {
				c.add("R9", r, "", c.when(t, r.s.Place), "the second team works while all of the first are on shift")
				return false
			}
		}
	}
	return true
}

// compare finds the first minute in which the planned pieces and the expected ones differ, and
// says what that breaks.
func (c *checker) compare(r *row, want []opening) {
	last := want[len(want)-1]
	end := last[len(last)-1].To
	total := 0
	for _, o := range want {
		total += o.room()
	}
	have := opening(r.p.Pieces)
	for t := r.p.Start; t < max(end, r.p.Finish); t++ {
		is, due := inAny(have, t), within(want, t)
		if is == due {
			continue
		}
		whole := t >= min(end, r.p.Finish) // as many pieces, but too few or too many minutes
		set := r.s.SetUp > 0 && (have.room()-total)%r.s.SetUp == 0
		switch need, has := mins(total), mins(have.room()); {
		case whole && set:
			c.add("R8", r, need, has, "set-up is not spent at its start and after every stop, or too often")
		case whole:
			c.add("R5", r, need, has, "its pieces are not as long as its working minutes and set-ups")
		case is:
			c.add("R8", r, "", c.when(t, r.s.Place), "is worked in an opening that is too short for set-up and the least piece")
		case !touched(want, have, t):
			c.add("R8", r, "", c.when(t, r.s.Place), "skips an opening that has room for set-up and the least piece")
		default:
			c.add("R5", r, "", c.when(t, r.s.Place), "pauses though everything is open")
		}
		return
	}
}

func within(os []opening, t hours.Minute) bool {
	for _, o := range os {
		if inAny(o, t) {
			return true
		}
	}
	return false
}

// touched says whether any of the opening that holds minute t is worked.
func touched(want []opening, have opening, t hours.Minute) bool {
	for _, o := range want {
		if inAny(o, t) {
			for _, s := range o {
				for _, h := range have {
					if s.Overlaps(h) {
						return true
					}
				}
			}
		}
	}
	return false
}

// spans writes when a step is planned.
func (r *row) spans() string { return mins(opening(r.p.Pieces).room()) }

// cure checks that a film is left until the sum of its rates reaches one, and no longer (R11).
func (c *checker) cure(r *row) {
	// The sums are of thousands of rates, each rounded to one part in 1e16; whether a sum within a
	// billionth of one has reached it is nobody's business.
	const near, clear = 1 - 2e-9, 1 - 5e-10
	before, sum := 0.0, 0.0
	for t := r.p.Start; t < r.p.Finish; t++ {
		before = sum
		if r.s.Rate != nil {
			sum += r.s.Rate(t)
		}
	}
	switch {
	case !(sum >= near):
		c.add("R11", r, "1", share(sum), "is taken for cured too early")
	case before >= clear:
		c.add("R11", r, "1", share(before), "was cured before its finish")
	}
}

// kept checks standing time that keeps people: in one go, on shift at the place (R1, R5, R15).
func (c *checker) kept(r *row) {
	told := map[string]bool{}
	for t := r.p.Start; t < r.p.Finish; t++ {
		for _, p := range r.team[0] {
			if rule, why := p.off(r.s.Place, t); rule != "" && !told[rule] {
				told[rule] = true
				c.add(rule, r, "", c.when(t, r.s.Place), "keeps %s when %s %s", p.Name, p.Name, why)
			}
		}
	}
}
