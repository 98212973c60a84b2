package learn

// timetable is a resource with a capacity at every minute, by compulsory parts: whatever the
// rest of the plan, an activity runs from its latest start to its earliest finish if these are in
// that order. The sum of these parts is the profile; where it is above the capacity there is no
// plan, and an activity cannot start where the profile leaves it too little.
//
// Explanation, by points (Schutt, Feydy, Stuckey and Wallace 2011): that activities o cover t is
// [start o <= t] and [finish o >= t+1] for each; if they leave less than j needs at t, then
// [finish j >= t+1] gives [start j >= t+1], and [start j <= t] gives [finish j <= t].
//
// Cost of a run: O(n) to look whose part has changed, O(segments) for each that has, and O(segments)
// for each activity that the highest part keeps from starting, unless it was looked at before and nothing that
// was read has changed.
type timetable struct {
	id       int32
	capacity int32
	users    []user
	from     []int32 // segments of the profile: where they begin
	level    []int32 // how much is used
	ends     []int32 // and how many parts begin or end where they begin
	cover    []covering
	parts    []stretch // by user: its compulsory part in the profile
	seen     []look    // by user: when it was last looked at in vain
	version  int32     // of the profile
	most     int32     // its greatest level
	news     reach     // where this version differs from the one before
	read     reach     // what has been read of the profile
}

func newTimetable(e *engine, capacity int32, users []user) *timetable {
	c := &timetable{id: int32(len(e.rules)), capacity: capacity, users: users,
		parts: make([]stretch, len(users)), seen: make([]look, len(users))}
	e.attach(c, c.sides())
	return c
}

// sides are those that the profile depends on.
func (c *timetable) sides() []side {
	var out []side
	for _, u := range c.users {
		out = append(out, u.start, u.start^1)
		if u.finish != u.start {
			out = append(out, u.finish, u.finish^1)
		}
	}
	return out
}

// build brings the profile up to date and gives its greatest level.
func (c *timetable) build(e *engine) int32 {
	changed, news := false, c.news // those of the version stay if there is no new one
	c.news = nothing
	for i := range c.users {
		u := &c.users[i]
		part := stretch{e.latestStart(u), e.earliestFinish(u)}
		if part.from >= part.to {
			part = stretch{}
		}
		if was := c.parts[i]; part != was {
			c.replace(was, part, u.amount)
			c.parts[i], changed = part, true
		}
	}
	if !changed {
		c.news = news
		return c.most
	}
	c.version++
	e.ticks += int64(len(c.users))
	c.most = 0
	for _, l := range c.level {
		c.most = max(c.most, l)
	}
	return c.most
}

// run checks the profile and pushes activities out of where it leaves them too little.
func (c *timetable) run(e *engine) bool {
	most := c.build(e)
	if most > c.capacity {
		k := 0
		for c.level[k] <= c.capacity {
			k++
		}
		t := c.from[k] + (c.from[k+1]-c.from[k])/2
		e.fell = why{kind: whyRule, id: c.id, at: t, who: -1}
		e.clash = c.covers(e, t, -1, int32(len(e.list)), e.clash[:0])
		return false
	}
	for i := range c.users {
		u := &c.users[i]
		if u.amount+most <= c.capacity || e.fixed(u.start) && e.fixed(u.finish) {
			continue
		}
		now, seen := e.view(u, c.version), &c.seen[i]
		if seen.view == now || c.again(e, seen, now) {
			continue
		}
		c.read = nothing
		before := e.ticks
		if !c.later(e, int32(i)) || !c.earlier(e, int32(i)) {
			return false
		}
		if e.view(u, c.version) == now {
			*seen = look{now, c.read, e.ticks - before}
		}
	}
	return true
}

// later raises the earliest start of user i over the segments that leave it too little.
func (c *timetable) later(e *engine, i int32) bool {
	u := &c.users[i]
	lst, end, room := e.latestStart(u), e.earliestFinish(u), c.capacity-u.amount
	own := lst < end
	if own {
		end = lst // its own part of the profile begins
	}
	k := c.at(e.now[u.start])
	if k >= 0 {
		c.read.from = c.from[k]
	} else {
		c.read.from, k = -far, 0
	}
	for ; k < len(c.from)-1; k++ {
		e.ticks++
		if c.from[k] >= end {
			c.read.to = max(c.read.to, c.from[k+1])
			return true // free so far
		}
		if c.level[k] <= room {
			continue
		}
		for e.now[u.start] < c.from[k+1] {
			t := min(c.from[k+1], e.earliestFinish(u)) - 1
			if t < c.from[k] || t < e.now[u.start] {
				break
			}
			if !e.raise(u.start, t+1, why{kind: whyRule, id: c.id, at: t, who: i}) {
				return false
			}
		}
		if !own {
			end = e.earliestFinish(u)
		}
	}
	c.read.to = far
	return true
}

// earlier lowers the latest finish of user i over the segments that leave it too little.
func (c *timetable) earlier(e *engine, i int32) bool {
	u := &c.users[i]
	ect, end, room := e.earliestFinish(u), e.latestStart(u), c.capacity-u.amount
	own := end < ect
	if own {
		end = ect
	}
	k := c.at(e.latestFinish(u) - 1)
	if k+1 < len(c.from) {
		c.read.to = max(c.read.to, c.from[k+1])
	} else {
		c.read.to, k = far, k-1
	}
	for ; k >= 0; k-- {
		e.ticks++
		if c.from[k+1] <= end {
			c.read.from = min(c.read.from, c.from[k])
			return true
		}
		if c.level[k] <= room {
			continue
		}
		for e.latestFinish(u) > c.from[k] {
			t := max(c.from[k], e.latestStart(u))
			if t >= c.from[k+1] || t >= e.latestFinish(u) {
				break
			}
			f := u.finishBy(t)
			if !e.raise(f.s, f.v, why{kind: whyRule, id: c.id, at: t, who: i}) {
				return false
			}
		}
		if !own {
			end = e.latestStart(u)
		}
	}
	c.read.from = -far
	return true
}
