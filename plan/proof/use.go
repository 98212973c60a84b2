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
	if w.Standing() {
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
