package learn

import (
	"cmp"
	"slices"
)

// covering is an activity that covers a point, with the later entry of its two facts.
type covering struct{ user, amount, last int32 }

// explain gives the activities that leave the user too little at a point, and that it would be
// there. A point that is just enough for f is tried before the one of the run.
func (c *timetable) explain(e *engine, f fact, w why, idx int32, out []fact) []fact {
	u, base := &c.users[w.who], len(out)
	if f.s == u.start {
		out = append(out, u.finishFrom(f.v))
		if out = c.covers(e, f.v-1, w.who, idx, out); len(out) > base+1 {
			return out
		}
		out = append(out[:base], u.finishFrom(w.at+1))
		return c.covers(e, w.at, w.who, idx, out)
	}
	point := u.length - f.v // [finish <= point]
	out = append(out, u.startBy(point))
	if out = c.covers(e, point, w.who, idx, out); len(out) > base+1 {
		return out
	}
	out = append(out[:base], u.startBy(w.at))
	return c.covers(e, w.at, w.who, idx, out)
}

// covers adds the facts by which activities other than skip cover t so far that they leave too
// little for skip (for nobody, if skip is -1), as things were before entry idx. Of those that could
// be left out the ones that came last go. It adds nothing if they leave enough.
func (c *timetable) covers(e *engine, t, skip, idx int32, out []fact) []fact {
	spare := -c.capacity - 1
	if skip >= 0 {
		spare += c.users[skip].amount
	}
	c.cover = c.cover[:0]
	for k := range c.users {
		u := &c.users[k]
		a, b := u.startBy(t), u.finishFrom(t+1)
		if int32(k) == skip || !e.holds(a) || !e.holds(b) {
			continue
		}
		i, j := e.reached(a, idx), e.reached(b, idx)
		if i < 0 || j < 0 {
			continue
		}
		spare += u.amount
		c.cover = append(c.cover, covering{int32(k), u.amount, max(i, j)})
	}
	if spare < 0 {
		return out
	}
	slices.SortStableFunc(c.cover, func(x, y covering) int { return cmp.Compare(y.last, x.last) })
	for _, k := range c.cover {
		if k.amount <= spare && e.list[k.last].level > 0 {
			spare -= k.amount
			continue
		}
		u := &c.users[k.user]
		out = append(out, u.startBy(t), u.finishFrom(t+1))
	}
	return out
}

// witness gives the point that the facts are about.
func (c *timetable) witness(f fact, w why, behind []fact) (from, to int32) {
	t := w.at
	if f.s >= 0 {
		t = c.users[w.who].point(f, behind[0])
	}
	return t, t + 1
}

// point gives the minute that the first fact behind f, a bound of user u, is about.
func (u *user) point(f, first fact) int32 {
	if f.s == u.start {
		return first.v + u.length - 1 // it finishes after it
	}
	return -first.v // it starts at it or before
}
