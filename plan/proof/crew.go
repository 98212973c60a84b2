package proof

import (
	"fmt"

	"sailby/plan/problem"
	"sailby/tasks/hours"
)

// crew verifies that people of a set have more to do within the window than they can.
func (c *checker) crew(who []int, win hours.Span, v view) error {
	in := make([]bool, len(c.p.People))
	for _, p := range who {
		in[p] = true
	}
	have, used := int64(0), int64(0)
	for _, way := range [3]struct{ close, after bool }{{false, true}, {true, true}, {true, false}} {
		l := c.newLoad(v, win, way.close)
		for _, i := range l.acts {
			l.people(i, in, way.after)
		}
		used, have = l.sum(), int64(len(who))*int64(win.Len())
		if !way.after { // then all that is counted is done in the hours of the activities
			have = 0
			for _, p := range who {
				have += l.hoursFor(p)
			}
		}
		if used > have {
			return nil
		}
	}
	return fmt.Errorf("people %v have at least %d min to do from %d to %d, and %d to do it in", who, used, win.From, win.To, have)
}

// people adds what activity i asks of a set of people, whoever does it, with or without the watch after it.
func (l *load) people(i int, in []bool, after bool) {
	a := &l.c.p.Acts[i]
	if a.Cut {
		return
	}
	n := least(a, func(md *problem.Mode, crew []int) int {
		k := 0
		for _, p := range crew {
			if in[p] {
				k++
			}
		}
		return k - watchers(md, crew, in)
	})
	if n > 0 {
		l.total += int64(n) * l.overlap(i, false)
	}
	if least(a, func(md *problem.Mode, crew []int) int { return watchers(md, crew, in) }) > 0 {
		l.share(i, l.overlap(i, false))
	}
	for k := range a.Modes {
		if len(a.Modes[k].Keepers) == 0 || !after {
			return
		}
		for _, p := range a.Modes[k].Keepers {
			if !in[p] {
				return
			}
		}
	}
	l.watchAfter(i)
}

// hoursFor gives the minutes of the window in which person p can be at work on any of the activities.
func (l *load) hoursFor(p int) int64 {
	l.avail, l.always = l.avail[:0], false
	for _, i := range l.acts {
		a := &l.c.p.Acts[i]
		for k := range a.Modes {
			md := &a.Modes[k]
			if has(md.Crew, p) || has(md.Relief, p) {
				l.hoursOf(md.Time)
			}
		}
	}
	return l.open()
}

func has(list []int, p int) bool {
	for _, x := range list {
		if x == p {
			return true
		}
	}
	return false
}

// least gives the least of a count over all teams that may do an activity.
func least(a *problem.Act, count func(md *problem.Mode, crew []int) int) int {
	n := -1
	for k := range a.Modes {
		md := &a.Modes[k]
		for _, crew := range [2][]int{md.Crew, md.Relief} {
			if x := count(md, crew); n < 0 || x < n {
				n = x
			}
			if md.Relief == nil {
				break
			}
		}
	}
	return n
}

// watchers counts those of a team, and of a set if that is not nil, who only watch hot work.
func watchers(md *problem.Mode, crew []int, in []bool) int {
	n := 0
	for k, p := range crew {
		if k < len(md.Watch) && md.Watch[k] && (in == nil || in[p]) {
			n++
		}
	}
	return n
}
