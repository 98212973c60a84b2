package learn

import "sort"

// explain gives the activities that leave worker w.who too little at a minute, and that it would
// be there.
func (c *worktable) explain(e *engine, f fact, w why, idx int32, out []fact) []fact {
	u := &c.all[w.who]
	base := len(out)
	try := func(t int32, there ...fact) bool {
		out = append(out[:base], there...)
		if u.on.s >= 0 && f.s != u.on.s^1 {
			out = append(out, u.on)
		}
		n := len(out)
		out = c.covers(e, t, w.who, idx, out)
		return len(out) > n
	}
	switch f.s {
	case u.start:
		if t := u.mask.firstFrom(f.v - 1); t >= w.at || !try(t, u.finishFrom(t+1)) {
			try(w.at, u.finishFrom(w.at+1))
		}
	case u.finish ^ 1:
		if t := u.mask.lastBefore(u.length - f.v + 1); t <= w.at || !try(t, u.startBy(t)) {
			try(w.at, u.startBy(w.at))
		}
	default:
		try(w.at, u.startBy(w.at), u.finishFrom(w.at+1))
	}
	return out
}

// covers adds the facts by which workers other than skip use so much at t that they leave too
// little for skip, as things were before entry idx.
func (c *worktable) covers(e *engine, t, skip, idx int32, out []fact) []fact {
	spare := -c.capacity - 1
	if skip >= 0 {
		spare += c.all[skip].amount
	}
	c.cover = c.cover[:0]
	for k := range c.all {
		w := &c.all[k]
		a, b := w.startBy(t), w.finishFrom(t+1)
		if int32(k) == skip || skip >= 0 && w.team > 0 && w.team == c.all[skip].team || !w.mask.has(t) || e.before(a.s, idx) < a.v || e.before(b.s, idx) < b.v {
			continue
		}
		last := max(e.entry(a), e.entry(b))
		if w.on.s >= 0 {
			if e.before(w.on.s, idx) < w.on.v {
				continue
			}
			last = max(last, e.entry(w.on))
		}
		if w.team > 0 && c.shared(w.team, int32(k), last) {
			continue
		}
		spare += w.amount
		c.cover = append(c.cover, covering{int32(k), w.amount, last})
	}
	if spare < 0 {
		return out
	}
	sort.SliceStable(c.cover, func(i, j int) bool { return c.cover[i].last > c.cover[j].last })
	for _, k := range c.cover {
		if k.amount <= spare && e.list[k.last].level > 0 {
			spare -= k.amount
			continue
		}
		w := &c.all[k.user]
		out = append(out, w.startBy(t), w.finishFrom(t+1))
		if w.on.s >= 0 {
			out = append(out, w.on)
		}
	}
	return out
}

// shared says whether somebody of the team is among those that cover already; the one with the
// earlier facts stays.
func (c *worktable) shared(team int, k, last int32) bool {
	for i := range c.cover {
		if v := &c.cover[i]; c.all[v.user].team == team {
			if last < v.last {
				v.user, v.last = k, last
			}
			return true
		}
	}
	return false
}

// witness gives the minute that the facts are about.
func (c *worktable) witness(f fact, w why, behind []fact) (from, to int32) {
	t := w.at
	if f.s >= 0 {
		if u := &c.all[w.who]; f.s == u.start || f.s == u.finish^1 {
			t = u.point(f, behind[0])
		}
	}
	return t, t + 1
}
