package proof

import (
	"fmt"
	"sort"

	"sailby/plan/problem"
	"sailby/tasks"
	"sailby/tasks/hours"
)

// load is what is used of something between two minutes at least: of a resource, or of a set of people.
type load struct {
	c      *checker
	v      view
	win    hours.Span
	close  bool // look at every possible start, not only at what runs in any case
	total  int64
	shared map[*tasks.Workface]int64 // by workface: minutes of watching, which one person does for all
	acts   []int                     // in order
	avail  []hours.Span              // minutes in which any of them can be at work
	always bool                      // any minute
}

// newLoad takes the activities that the facts speak of.
func (c *checker) newLoad(v view, win hours.Span, close bool) *load {
	l := &load{c: c, v: v, win: win, close: close, shared: map[*tasks.Workface]int64{}}
	seen := map[int]bool{}
	for x := range v.seen {
		if m := c.means[x]; (m.kind == "start" || m.kind == "finish") && !seen[m.a] {
			seen[m.a] = true
			l.acts = append(l.acts, m.a)
		}
	}
	sort.Ints(l.acts)
	return l
}

// overlap gives the minutes of the window in which activity i is at work at least, pauses counted where
// what it uses stays.
func (l *load) overlap(i int, stays bool) int64 {
	s, f := l.v.act(i)
	if d := l.c.rigid[i]; d >= 0 {
		return min(l.inside(s.lo, s.lo+d), l.inside(s.hi, s.hi+d))
	}
	if !l.close {
		both := hours.Span{From: max(l.win.From, hours.Minute(s.hi)), To: min(l.win.To, hours.Minute(f.lo))}
		if stays {
			return int64(both.Len())
		}
		return int64(l.c.book.sure(i).Count(both))
	}
	least := int64(-1)
	for _, w := range l.v.timings(i) {
		n := int64(0)
		if stays {
			n = l.c.book.span(w, s, f, l.inside)
		} else {
			n = l.c.book.overlap(w, s, f, func(from, to int) int64 { return l.inside(int32(from), int32(to)) })
		}
		if n >= 0 && (least < 0 || n < least) {
			least = n
		}
	}
	if least < 0 { // no start is possible at all
		return int64(furthest)
	}
	return least
}

// inside gives the minutes of the window from a to b.
func (l *load) inside(a, b int32) int64 {
	return int64(hours.Span{From: max(l.win.From, hours.Minute(a)), To: min(l.win.To, hours.Minute(b))}.Len())
}

// overlap gives the least that the pieces from a possible start within bounds count for, -1 if there is no start.
func (b *book) overlap(w *problem.Timing, s, f span, count func(from, to int) int64) int64 {
	t := b.table(w)
	return t.least(s, f, func(s, f int32) int64 {
		n := int64(0)
		t.pieces(s, f, func(from, to int) { n += count(from, to) })
		return n
	})
}

// span gives the same for all of the time from start to finish.
func (b *book) span(w *problem.Timing, s, f span, count func(from, to int32) int64) int64 {
	return b.table(w).least(s, f, count)
}

// least gives the least of a count over all starts within bounds, -1 if there are none.
func (t *starts) least(s, f span, count func(s, f int32) int64) int64 {
	least := int64(-1)
	k := sort.Search(len(t.at), func(k int) bool { return t.at[k] >= s.lo })
	for ; k < len(t.at) && t.at[k] <= s.hi && least != 0; k++ {
		if t.end[k] < f.lo || t.end[k] > f.hi {
			continue
		}
		if n := count(t.at[k], t.end[k]); least < 0 || n < least {
			least = n
		}
	}
	return least
}

// watchAfter adds the fire watch that follows activity i, from its finish on.
func (l *load) watchAfter(i int) {
	w := l.c.book.watch(i)
	if w == 0 {
		return
	}
	_, f := l.v.act(i)
	l.share(i, min(l.inside(f.lo, f.lo+w), l.inside(f.hi, f.hi+w)))
}

// share adds minutes of watching: those of one workface may be one person's.
func (l *load) share(i int, n int64) {
	var face *tasks.Workface
	if s := l.c.p.Acts[i].Step; s != nil {
		face = s.Face
	}
	l.shared[face] = max(l.shared[face], n)
}

// sum gives all that is used.
func (l *load) sum() int64 {
	n := l.total
	for _, x := range l.shared {
		n += x
	}
	return n
}

// hoursOf adds the minutes in which a timing can be at work.
func (l *load) hoursOf(w *problem.Timing) {
	if w.Calendar() == nil {
		l.always = true
	}
	l.avail = append(l.avail, w.Calendar()...)
}

// open gives the minutes of the window in which something is there for the activities.
func (l *load) open() int64 {
	if l.always {
		return int64(l.win.Len())
	}
	return int64(hours.NewSet(l.avail...).Count(l.win))
}

// use verifies that more of resource r is used within the window than there is.
func (c *checker) use(r int, win hours.Span, v view) error {
	have, used := int64(0), int64(0)
	for _, close := range [2]bool{false, true} {
		l := c.newLoad(v, win, close)
		for _, i := range l.acts {
			a := &c.p.Acts[i]
			there := false
			for _, u := range a.Uses {
				if u.Res == r && u.Amount > 0 {
					l.total += int64(u.Amount) * l.overlap(i, u.Stays)
					l.always = l.always || u.Stays
					there = true
				}
			}
			if a.WatchRoom-1 == r {
				if least(a, func(md *problem.Mode, crew []int) int { return watchers(md, crew, nil) }) > 0 {
					l.share(i, l.overlap(i, false))
				}
				l.watchAfter(i)
				l.always = true
			}
			if there {
				for _, w := range a.Timings() {
					l.hoursOf(w)
				}
			}
		}
		used, have = l.sum(), int64(c.p.Res[r].Capacity)*int64(win.Len())
		if close {
			have = min(have, int64(c.p.Res[r].Capacity)*l.open())
		}
		if used > have {
			return nil
		}
	}
	return fmt.Errorf("of resource %d at least %d is used from %d to %d, and there is %d", r, used, win.From, win.To, have)
}

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

// excess verifies that activity i takes more of resource r than there is.
func (c *checker) excess(r, i int) error {
	if c.book.mayBeNothing(i) {
		return fmt.Errorf("activity %d need not take any time", i)
	}
	sum := 0
	for _, u := range c.p.Acts[i].Uses {
		if u.Res == r {
			sum += u.Amount
		}
	}
	if sum <= c.p.Res[r].Capacity {
		return fmt.Errorf("activity %d takes %d of resource %d, and there is %d", i, sum, r, c.p.Res[r].Capacity)
	}
	return nil
}

// shut verifies that activity i has no possible start: none in the hours of any team, or no team.
func (c *checker) shut(i int) error {
	a := &c.p.Acts[i]
	if len(a.Modes) > 0 {
		for _, w := range a.Timings() {
			if len(c.book.table(w).at) > 0 {
				return fmt.Errorf("activity %d has possible starts", i)
			}
		}
		return nil
	}
	for _, w := range a.Tried {
		if len(c.book.table(w).at) > 0 {
			return fmt.Errorf("activity %d has possible starts", i)
		}
	}
	if len(a.Tried) == 0 && (a.Step == nil || c.staffed(a)) {
		return fmt.Errorf("activity %d has people who can do it", i)
	}
	return nil
}

// staffed says whether different people can fill all of an activity's needs (augmenting paths: Kuhn 1955).
func (c *checker) staffed(a *problem.Act) bool {
	s := a.Step
	var places []*tasks.Need
	for k := range s.Needs {
		for range s.Needs[k].Count {
			places = append(places, &s.Needs[k])
		}
	}
	takes := make([]int, len(c.p.People)) // the place that each person fills, counted from 1
	var fill func(k int, tried []bool) bool
	fill = func(k int, tried []bool) bool {
		for p := range c.p.People {
			if tried[p] || !may(c.p.Work.Job.People[p], places[k]) || c.p.People[p].Shifts[s.Place].Total() == 0 {
				continue
			}
			tried[p] = true
			if takes[p] == 0 || fill(takes[p]-1, tried) {
				takes[p] = k + 1
				return true
			}
		}
		return false
	}
	for k := range places {
		if !fill(k, make([]bool, len(c.p.People))) {
			return false
		}
	}
	return true
}

// may says whether a person has what a need asks for: the name, the tickets.
func may(p *tasks.Person, n *tasks.Need) bool {
	if n.Who != nil {
		named := false
		for _, x := range n.Who {
			named = named || x == p.Name
		}
		if !named || n.Ticket.Name == "" {
			return named
		}
	}
	return p.Holds(n.Ticket) && p.HoldsAll(n.Also)
}
