package check

import (
	"sailby/tasks"
	"sailby/tasks/hours"
)

// shut says why a hands-on step cannot be worked by a team in the minute that begins at t, and
// which rule that is, as who or what is in the way and how; no rule if it can.
func (c *checker) shut(r *row, team []*person, t hours.Minute) (rule, who, why string) {
	if rule, who, why = c.barred(r, team, t); rule == "" && r.watch > 0 && !c.mayStop(r, t) {
		return "R13", "nobody", "could stay the fire watch out after it"
	}
	return rule, who, why
}

// mayStop says whether the hot work of minute t could stop after it, or later in the same
// opening, with somebody there to stay the fire watch out (R13).
func (c *checker) mayStop(r *row, t hours.Minute) bool {
	pause := 0
	for x := t; pause <= meal && x < c.hi; x++ {
		if !c.toil(r, x) {
			if pause++; !r.accessible(x) {
				return false
			}
			continue
		}
		pause = 0
		if c.anyWatch(r, hours.Span{From: x + 1, To: x + 1 + hours.Minute(r.watch)}) {
			return true
		}
	}
	return false
}

// toil says whether one of the step's teams could work in minute t, the fire watch apart.
func (c *checker) toil(r *row, t hours.Minute) bool {
	if rule, _, _ := c.barred(r, r.team[0], t); rule == "" {
		return true
	}
	if len(r.p.Relief) == 0 {
		return false
	}
	rule, _, _ := c.barred(r, r.team[1], t)
	return rule == ""
}

// barred is shut without the fire watch.
func (c *checker) barred(r *row, team []*person, t hours.Minute) (rule, who, why string) {
	at := r.s.Place
	for _, p := range team {
		if !p.here[at].has(t) {
			return "R1", p.Name, "is not there"
		}
	}
	if !c.places[at].work.has(t) {
		return "R5", at.Name, "is closed, opening up or clearing up"
	}
	for _, g := range r.access {
		if !g.has(t) {
			return g.rule, g.who, g.why
		}
	}
	for _, p := range team {
		if rule, why := p.off(at, t); rule != "" {
			return rule, p.Name, why
		}
	}
	if r.alone && !c.company(r, team, t) {
		return "R14", "nobody else", "is on shift there"
	}
	return "", "", ""
}

// off says why somebody is not on shift at a place in the minute that begins at t.
func (p *person) off(at *tasks.Place, t hours.Minute) (rule, why string) {
	switch {
	case !p.here[at].has(t):
		return "R1", "is not there"
	case !p.open[at].has(t):
		return "R5", "is off"
	case !p.duty[at].has(t):
		return "R15", "is not on shift (longest duty and rest)"
	}
	return "", ""
}

// workable says whether one of the step's teams can work in the minute that begins at t.
func (c *checker) workable(r *row, t hours.Minute) bool {
	if rule, _, _ := c.shut(r, r.team[0], t); rule == "" {
		return true
	}
	if len(r.p.Relief) == 0 {
		return false
	}
	rule, _, _ := c.shut(r, r.team[1], t)
	return rule == ""
}

// accessible says whether all but opening hours and shifts is open (R6).
func (r *row) accessible(t hours.Minute) bool {
	for _, g := range r.access {
		if !g.has(t) {
			return false
		}
	}
	return true
}

// isMeal says whether a pause of a step is a meal; else it is a stop (R6).
func (r *row) isMeal(pause hours.Span) bool {
	for t := pause.From; t < pause.To; t++ {
		if t-pause.From >= meal || !r.accessible(t) {
			return false
		}
	}
	return true
}

// company says whether somebody besides the one who works is on shift at the place; people from
// outside make no company (R14).
func (c *checker) company(r *row, team []*person, t hours.Minute) bool {
	working, others := 0, 0
	for _, p := range c.inside {
		if !p.duty[r.s.Place].has(t) {
			continue
		}
		others++
		for _, q := range team {
			if p == q {
				working++
			}
		}
	}
	return others-min(working, 1) >= 1
}

// An opening is a run of working minutes with its meals: the minutes worked in it as spans (R8).
type opening []hours.Span

func (o opening) room() int {
	n := 0
	for _, s := range o {
		n += s.Len()
	}
	return n
}

// opening gives the first opening at or after t, cut once it has room for enough minutes.
func (c *checker) opening(r *row, t hours.Minute, enough int) opening {
	for t < c.hi && !c.workable(r, t) {
		t++
	}
	var out opening
	for n := 0; t < c.hi; {
		end := t
		for end < c.hi && n < enough && c.workable(r, end) {
			end++
			n++
		}
		out = append(out, hours.Span{From: t, To: end})
		if n >= enough {
			break
		}
		next := end
		for next < c.hi && next-end <= meal && !c.workable(r, next) {
			next++
		}
		if next == c.hi || !r.isMeal(hours.Span{From: end, To: next}) {
			break
		}
		t = next
	}
	return out
}

// expected works out the openings that a step started at its planned start goes through, each cut
// to what is worked in it, by R5, R6 and R8; rule tells which rule forbids that start.
func (c *checker) expected(r *row) (used []opening, rule, why string) {
	s := r.s
	left := s.Working
	for t := r.p.Start; left > 0; {
		o := c.opening(r, t, s.SetUp+left)
		if len(o) == 0 {
			return used, "R5", "there are not hours enough left to finish it"
		}
		room, least := o.room()-s.SetUp, max(s.LeastPiece, 1)
		t = o[len(o)-1].To
		switch {
		case len(used) == 0 && s.InOneGo && room < left:
			return nil, "R6", "goes in one go, and its opening is too short for it"
		case len(used) == 0 && s.InOneGo && !s.OverMeals && len(o) > 1:
			return nil, "R6", "goes in one go, and a meal would interrupt it"
		case len(used) == 0 && room < left && room < s.SafeStop:
			return nil, "R8", "would stop before its safe stopping point"
		case len(used) == 0 && room < left && room < least:
			return nil, "R8", "begins in an opening too short for set-up and the least piece"
		case room < left && room < least:
			continue // skipped
		}
		left -= min(room, left)
		used = append(used, o)
	}
	return used, "", ""
}
