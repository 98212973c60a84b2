package proof

import (
	"fmt"

	"sailby/plan/problem"
	"sailby/tasks/hours"
)

// agrees says whether a mode of its activity can be the one where a variable has one value.
func (c *checker) agrees(k int, m meaning, s span) bool {
	a := &c.p.Acts[m.a]
	md := &a.Modes[k]
	is := false
	switch m.kind {
	case "mode":
		is = k == m.b
	case "timing":
		is = m.b < len(a.Timings()) && a.Timings()[m.b] == md.Time
	case "part":
		if m.time < len(a.Timings()) && a.Timings()[m.time] == md.Time && md.Relief == nil {
			for n, p := range md.Crew {
				is = is || p == m.b && (n < len(md.Watch) && md.Watch[n]) == m.watch
			}
		}
	default:
		return true
	}
	return is && s.hi > 0 || !is && s.lo < 1
}

// open gives the modes of activity i that agree with the facts.
func (v view) open(i int) []*problem.Mode {
	var out []*problem.Mode
	for k := range v.c.p.Acts[i].Modes {
		ok := true
		for x, s := range v.seen {
			if m := v.c.means[x]; m.a == i && ok {
				ok = v.c.agrees(k, m, s)
			}
		}
		if ok {
			out = append(out, &v.c.p.Acts[i].Modes[k])
		}
	}
	return out
}

// timings gives the timings of these modes; all of them where not every mode is known.
func (v view) timings(i int) []*problem.Timing {
	a := &v.c.p.Acts[i]
	if a.Cut {
		return a.Timings()
	}
	var out []*problem.Timing
	seen := map[*problem.Timing]bool{}
	for _, md := range v.open(i) {
		if !seen[md.Time] {
			seen[md.Time] = true
			out = append(out, md.Time)
		}
	}
	return out
}

// modes verifies that no mode of activity i agrees with the facts.
func (c *checker) modes(i int, v view) error {
	if n := len(v.open(i)); n > 0 || c.p.Acts[i].Cut {
		return fmt.Errorf("%d modes of activity %d agree with this", n, i)
	}
	return nil
}

// keepers verifies that somebody is needed to keep the watch after activity i, and nobody does.
func (c *checker) keepers(i int, v view) error {
	if c.p.Acts[i].Cut || c.book.watch(i) == 0 {
		return fmt.Errorf("activity %d has no watch that somebody keeps", i)
	}
	gone := map[int]bool{} // who does not keep it
	for x, s := range v.seen {
		if m := c.means[x]; m.kind == "keep" && m.a == i && s.hi < 1 {
			gone[m.b] = true
		}
	}
	for _, md := range v.open(i) {
		left := len(md.Keepers) == 0
		for _, p := range md.Keepers {
			left = left || !gone[p]
		}
		if left {
			return fmt.Errorf("the watch after activity %d may be kept", i)
		}
	}
	return nil
}

// stay verifies that somebody cannot keep a watch from any finish within the bounds to its end.
func (c *checker) stay(x int32, v view) error {
	m := c.means[x]
	if v.of(x).lo < 1 {
		return fmt.Errorf("nothing is said about who keeps the watch")
	}
	_, f := v.act(m.a)
	watch := c.book.watch(m.a)
	for _, md := range v.open(m.a) {
		for n, p := range md.Keepers {
			if p != m.b {
				continue
			}
			for _, s := range md.Stay[n] {
				if max(f.lo, int32(s.From)) <= min(f.hi, int32(s.To)-watch) {
					return fmt.Errorf("person %d can keep the watch after activity %d from %d", p, m.a, max(f.lo, int32(s.From)))
				}
			}
		}
	}
	return nil
}

// person verifies that one person has more to do within the window than there is time.
func (c *checker) person(p int, win hours.Span, v view) error {
	used := int64(0)
	for _, close := range [2]bool{false, true} {
		l := c.newLoad(v, win, close)
		for _, i := range l.acts {
			if a := &c.p.Acts[i]; a.Cut || len(a.Modes) == 0 {
				continue
			}
			if len(v.open(i)) == 0 {
				return nil // nobody can do it as the facts say
			}
			l.total += l.partOf(p, i, false)
			l.share(i, l.partOf(p, i, true))
		}
		for x, s := range v.seen {
			if m := c.means[x]; m.kind == "keep" && m.b == p && s.lo > 0 {
				l.watchAfter(m.a)
			}
		}
		if used = l.sum(); used > int64(win.Len()) {
			return nil
		}
	}
	return fmt.Errorf("person %d has at least %d min to do from %d to %d", p, used, win.From, win.To)
}

// partOf gives the minutes of the window in which person p works on activity i, or only watches it, at least, in
// every mode that agrees with the facts.
func (l *load) partOf(p, i int, watch bool) int64 {
	least := int64(-1)
	for _, md := range l.v.open(i) {
		n := int64(0)
		first, second := plays(md, md.Crew, p, watch), plays(md, md.Relief, p, watch)
		if first || second {
			n = l.within(i, md, first, second)
		}
		if n >= 0 && (least < 0 || n < least) { // below 0 the mode has no start there
			least = n
		}
	}
	return max(least, 0)
}

// plays says whether a person has that part in a team.
func plays(md *problem.Mode, team []int, p int, watch bool) bool {
	for k, q := range team {
		if q == p {
			return watch == (k < len(md.Watch) && md.Watch[k])
		}
	}
	return false
}

// within gives the least that a mode's first team, its second, or both in turn, are at work.
func (l *load) within(i int, md *problem.Mode, first, second bool) int64 {
	s, f := l.v.act(i)
	count := func(from, to int) int64 {
		part := hours.Span{From: max(l.win.From, hours.Minute(from)), To: min(l.win.To, hours.Minute(to))}
		n, own := part.Len(), 0
		if md.Relief != nil {
			own = md.First.Count(part)
		}
		switch {
		case md.Relief == nil || first && second:
			return int64(n)
		case first:
			return int64(own)
		}
		return int64(n - own)
	}
	if !l.close {
		n := int64(0)
		for _, w := range l.c.book.steady(md.Time) {
			n += count(max(int(w.From), int(s.hi)), min(int(w.To), int(f.lo)))
		}
		return n
	}
	return l.c.book.overlap(md.Time, s, f, count)
}
