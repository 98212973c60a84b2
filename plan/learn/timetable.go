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
// Cost of a run: O(n) where the orders by latest start and earliest finish have changed little,
// and O(n x segments) for the activities that the highest part keeps from starting.
type timetable struct {
	id       int32
	capacity int32
	users    []user
	byStart  []int32 // users by latest start
	byFinish []int32 // users by earliest finish
	from     []int32 // segments of the profile: where they begin
	level    []int32 // and how much is used
	key      []int32
	cover    []covering
	parts    []stretch // by user: its compulsory part in the profile
	seen     []view    // by user: the bounds for which it was last looked at in vain
	version  int32     // of the profile
	most     int32     // its greatest level
}

func newTimetable(e *engine, capacity int32, users []user) *timetable {
	c := &timetable{id: int32(len(e.rules)), capacity: capacity, users: users, key: make([]int32, len(users)),
		parts: make([]stretch, len(users)), seen: make([]view, len(users))}
	for i := range users {
		c.byStart = append(c.byStart, int32(i))
		c.byFinish = append(c.byFinish, int32(i))
	}
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

// order sorts ids by key; they are nearly in order already.
func order(ids, key []int32) {
	for i := 1; i < len(ids); i++ {
		x := ids[i]
		k := key[x]
		j := i
		for ; j > 0 && key[ids[j-1]] > k; j-- {
			ids[j] = ids[j-1]
		}
		ids[j] = x
	}
}

// build makes the profile and gives its greatest level.
func (c *timetable) build(e *engine) int32 {
	changed := false
	for i := range c.users {
		u := &c.users[i]
		part := stretch{e.latestStart(u), e.earliestFinish(u)}
		if part.from >= part.to {
			part = stretch{}
		}
		changed = changed || part != c.parts[i]
		c.parts[i] = part
	}
	if !changed {
		return c.most
	}
	c.version++
	for i := range c.users {
		c.key[i] = e.latestStart(&c.users[i])
	}
	order(c.byStart, c.key)
	for i := range c.users {
		c.key[i] = e.earliestFinish(&c.users[i])
	}
	order(c.byFinish, c.key)
	e.ticks += int64(len(c.users))
	c.from, c.level = c.from[:0], c.level[:0]
	used, most := int32(0), int32(0)
	i, j, n := 0, 0, len(c.users)
	for i < n || j < n {
		for i < n && !c.compulsory(e, c.byStart[i]) {
			i++
		}
		for j < n && !c.compulsory(e, c.byFinish[j]) {
			j++
		}
		if j == n {
			break
		}
		t := e.earliestFinish(&c.users[c.byFinish[j]])
		if i < n {
			t = min(t, e.latestStart(&c.users[c.byStart[i]]))
		}
		for i < n {
			u := &c.users[c.byStart[i]]
			if c.compulsory(e, c.byStart[i]) {
				if e.latestStart(u) != t {
					break
				}
				used += u.amount
			}
			i++
		}
		for j < n {
			u := &c.users[c.byFinish[j]]
			if c.compulsory(e, c.byFinish[j]) {
				if e.earliestFinish(u) != t {
					break
				}
				used -= u.amount
			}
			j++
		}
		most = max(most, used)
		c.from = append(c.from, t)
		c.level = append(c.level, used)
	}
	c.most = most
	return most
}

func (c *timetable) compulsory(e *engine, i int32) bool {
	u := &c.users[i]
	return e.latestStart(u) < e.earliestFinish(u)
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
		look := e.view(u, c.version)
		if c.seen[i] == look {
			continue
		}
		if !c.later(e, int32(i)) || !c.earlier(e, int32(i)) {
			return false
		}
		if e.view(u, c.version) == look {
			c.seen[i] = look
		}
	}
	return true
}

// at gives the segment that holds t, -1 if t is before the first.
func (c *timetable) at(t int32) int {
	lo, hi := 0, len(c.from)
	for lo < hi {
		if m := (lo + hi) / 2; c.from[m] <= t {
			lo = m + 1
		} else {
			hi = m
		}
	}
	return lo - 1
}

// later raises the earliest start of user i over the segments that leave it too little.
func (c *timetable) later(e *engine, i int32) bool {
	u := &c.users[i]
	lst := e.latestStart(u)
	own := lst < e.earliestFinish(u)
	for k := max(0, c.at(e.now[u.start])); k < len(c.from)-1; k++ {
		e.ticks++
		if c.from[k] >= e.earliestFinish(u) || own && c.from[k] >= lst {
			return true // free so far, or in its own part of the profile
		}
		if c.level[k]+u.amount <= c.capacity {
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
	}
	return true
}

// earlier lowers the latest finish of user i over the segments that leave it too little.
func (c *timetable) earlier(e *engine, i int32) bool {
	u := &c.users[i]
	ect := e.earliestFinish(u)
	own := e.latestStart(u) < ect
	for k := min(len(c.from)-2, c.at(e.latestFinish(u)-1)); k >= 0; k-- {
		e.ticks++
		if c.from[k+1] <= e.latestStart(u) || own && c.from[k+1] <= ect {
			return true
		}
		if c.level[k]+u.amount <= c.capacity {
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
	}
	return true
}
