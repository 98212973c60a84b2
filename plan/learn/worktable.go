package learn

import (
	"cmp"
	"slices"
	"sort"
)

// worker is a user that is only there in some minutes between its start and its finish, and only
// while a condition holds.
type worker struct {
	user
	on   fact  // s < 0: always
	mask spans // minutes in which it is at work for certain if it runs over them
	team int   // workers of one team above 0 count once between them: fire watches in one workface
}

// worktable is a resource with a capacity at every minute, used by activities that pause: the
// timetable for calendars (after Kreter, Schutt and Stuckey 2017). An activity counts at t if its
// condition holds, t is in its mask, and it starts at t or before and finishes after t; the
// explanations are those of the timetable, with the condition added. An activity whose condition
// is open loses it where its compulsory part would be too much.
//
// Cost of a run: O(n + s) for the s spans of compulsory parts, s log s of those that changed, and
// O(segments) for each activity that has changed or that a changed profile may push.
type worktable struct {
	id       int32
	capacity int32
	all      []worker
	events   []event   // of all compulsory parts, in order of time
	fresh    []event   // scratch: of those that have changed
	parts    []stretch // by worker: its compulsory part in events
	seen     []view    // by worker: the bounds for which it was last looked at in vain
	moved    []bool    // scratch: by worker, whether its part has changed
	version  int32     // of the profile
	most     int32     // its greatest level
	from     []int32
	level    []int32
	teams    []uint64 // by segment: the teams at work in it, a bit each; from 63 on they share the last
	crowd    []int32  // scratch: by team, how many of it are at work
	cover    []covering
}

// event is a change of use.
type event struct {
	at, by, who int32
	team        int
}

// stretch is a compulsory part; from is to where there is none.
type stretch struct{ from, to int32 }

// view is what a look at a user depends on: its bounds and the profile.
type view struct{ est, lst, ect, lct, version int32 }

func (e *engine) view(u *user, version int32) view {
	return view{e.now[u.start], e.latestStart(u), e.earliestFinish(u), e.latestFinish(u), version}
}

func teamBit(team int) uint64 {
	if team == 0 {
		return 0
	}
	return 1 << min(team, 63)
}

func newWorktable(e *engine, capacity int32, all []worker) {
	c := &worktable{id: int32(len(e.rules)), capacity: capacity, all: all, parts: make([]stretch, len(all)), seen: make([]view, len(all)), moved: make([]bool, len(all))}
	seen := map[side]bool{}
	var sides []side
	add := func(s side) {
		if !seen[s] {
			seen[s] = true
			sides = append(sides, s)
		}
	}
	for i := range all {
		w := &all[i]
		add(w.start)
		add(w.start ^ 1)
		add(w.finish)
		add(w.finish ^ 1)
		if w.on.s >= 0 {
			add(w.on.s)
		}
		if w.team >= len(c.crowd) {
			c.crowd = append(c.crowd, make([]int32, w.team+1-len(c.crowd))...)
		}
	}
	e.attach(c, sides)
}

// sure says whether the condition of w holds.
func (w *worker) sure(e *engine) bool { return w.on.s < 0 || e.holds(w.on) }

// update finds the compulsory parts that have changed and puts their events in the place of the
// old ones; false if there are none.
func (c *worktable) update(e *engine) bool {
	c.fresh = c.fresh[:0]
	changed := false
	for i := range c.all {
		w := &c.all[i]
		part := stretch{e.latestStart(&w.user), e.earliestFinish(&w.user)}
		if part.from >= part.to || !w.sure(e) {
			part = stretch{}
		}
		if part == c.parts[i] {
			continue
		}
		changed = true
		c.parts[i], c.moved[i] = part, true
		if part.from == part.to {
			continue
		}
		who := int32(i)
		if w.mask == nil {
			c.fresh = append(c.fresh, event{part.from, w.amount, who, w.team}, event{part.to, -w.amount, who, w.team})
			continue
		}
		for k := w.mask.find(part.from); k < len(w.mask) && w.mask[k].from < part.to; k++ {
			c.fresh = append(c.fresh, event{max(part.from, w.mask[k].from), w.amount, who, w.team},
				event{min(part.to, w.mask[k].to), -w.amount, who, w.team})
		}
	}
	e.ticks += int64(len(c.all))
	if !changed {
		return false
	}
	slices.SortFunc(c.fresh, func(a, b event) int { return cmp.Compare(a.at, b.at) })
	kept := c.events[:0]
	for _, ev := range c.events {
		if !c.moved[ev.who] {
			kept = append(kept, ev)
		}
	}
	c.events = mergeEvents(kept, c.fresh)
	clear(c.moved)
	e.ticks += int64(len(c.events))
	c.version++
	return true
}

// mergeEvents puts the events of b among those of a, from behind.
func mergeEvents(a, b []event) []event {
	i, j := len(a)-1, len(b)-1
	a = append(a, b...)
	for k := len(a) - 1; j >= 0; k-- {
		if i >= 0 && a[i].at > b[j].at {
			a[k] = a[i]
			i--
		} else {
			a[k] = b[j]
			j--
		}
	}
	return a
}

// build makes the profile and gives its greatest level.
func (c *worktable) build(e *engine) int32 {
	if !c.update(e) {
		return c.most
	}
	c.from, c.level, c.teams = c.from[:0], c.level[:0], c.teams[:0]
	clear(c.crowd)
	used, most, bits := int32(0), int32(0), uint64(0)
	for i := 0; i < len(c.events); {
		t := c.events[i].at
		for ; i < len(c.events) && c.events[i].at == t; i++ {
			ev := &c.events[i]
			if ev.team == 0 {
				used += ev.by
				continue
			}
			old := c.crowd[ev.team]
			c.crowd[ev.team] += ev.by
			switch {
			case old == 0:
				used++
				bits |= teamBit(ev.team)
			case c.crowd[ev.team] == 0:
				used--
				bits &^= teamBit(ev.team)
			}
		}
		c.from = append(c.from, t)
		c.level = append(c.level, used)
		c.teams = append(c.teams, bits)
		most = max(most, used)
	}
	c.most = most
	return most
}

// tight says whether segment k leaves worker w too little. One whose team is there already
// takes nothing more.
func (c *worktable) tight(k int, w *worker) bool {
	return c.level[k]+w.amount > c.capacity && c.teams[k]&teamBit(w.team) == 0
}

// run checks the profile and pushes activities out of where it leaves them too little.
func (c *worktable) run(e *engine) bool {
	most := c.build(e)
	if most > c.capacity {
		k := 0
		for c.level[k] <= c.capacity {
			k++
		}
		e.clash = c.covers(e, c.from[k], -1, int32(len(e.list)), e.clash[:0])
		return false
	}
	for i := range c.all {
		w := &c.all[i]
		if w.amount+most <= c.capacity || w.on.s >= 0 && e.fails(w.on) {
			continue
		}
		look := e.view(&w.user, c.version)
		if c.seen[i] == look {
			continue
		}
		switch {
		case !w.sure(e):
			if !c.deny(e, int32(i)) {
				return false
			}
			continue
		case e.fixed(w.start) && e.fixed(w.finish):
		case !c.later(e, int32(i)) || !c.earlier(e, int32(i)):
			return false
		}
		if e.view(&w.user, c.version) == look {
			c.seen[i] = look
		}
	}
	return true
}

// first gives the first segment that ends after t.
func (c *worktable) first(t int32) int {
	return max(0, sort.Search(len(c.from), func(i int) bool { return c.from[i] > t })-1)
}

// deny takes the condition from worker i if its compulsory part would be too much somewhere.
func (c *worktable) deny(e *engine, i int32) bool {
	w := &c.all[i]
	from, to := e.latestStart(&w.user), e.earliestFinish(&w.user)
	for k := c.first(from); k < len(c.from)-1 && c.from[k] < to; k++ {
		e.ticks++
		if !c.tight(k, w) {
			continue
		}
		if t := w.mask.firstFrom(max(from, c.from[k])); t < min(to, c.from[k+1]) {
			f := w.on.not()
			return e.raise(f.s, f.v, why{whyRule, c.id, t, i})
		}
	}
	return true
}

// later raises the earliest start of worker i over the minutes that leave it too little.
func (c *worktable) later(e *engine, i int32) bool {
	w := &c.all[i]
	lst := e.latestStart(&w.user)
	own := lst < e.earliestFinish(&w.user)
	for k := c.first(e.now[w.start]); k < len(c.from)-1; k++ {
		e.ticks++
		if c.from[k] >= e.earliestFinish(&w.user) || own && c.from[k] >= lst {
			return true
		}
		if !c.tight(k, w) {
			continue
		}
		upTo := min(c.from[k+1], e.earliestFinish(&w.user))
		if own {
			upTo = min(upTo, lst)
		}
		t := w.mask.lastBefore(upTo)
		if t < max(c.from[k], e.now[w.start]) {
			continue
		}
		if !e.raise(w.start, t+1, why{whyRule, c.id, t, i}) {
			return false
		}
		k-- // a fixed length has moved the finish too: the rest of the segment may be reached
	}
	return true
}

// earlier lowers the latest finish of worker i over the minutes that leave it too little.
func (c *worktable) earlier(e *engine, i int32) bool {
	w := &c.all[i]
	ect := e.earliestFinish(&w.user)
	own := e.latestStart(&w.user) < ect
	for k := min(len(c.from)-2, c.first(e.latestFinish(&w.user)-1)); k >= 0; k-- {
		e.ticks++
		if c.from[k+1] <= e.latestStart(&w.user) || own && c.from[k+1] <= ect {
			return true
		}
		if !c.tight(k, w) {
			continue
		}
		from := max(c.from[k], e.latestStart(&w.user))
		if own {
			from = max(from, ect)
		}
		t := w.mask.firstFrom(from)
		if t >= min(c.from[k+1], e.latestFinish(&w.user)) {
			continue
		}
		f := w.finishBy(t)
		if !e.raise(f.s, f.v, why{whyRule, c.id, t, i}) {
			return false
		}
		k++
	}
	return true
}

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
