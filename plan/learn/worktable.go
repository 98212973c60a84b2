package learn

import "sort"

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
		e.fell = why{kind: whyRule, id: c.id, at: c.from[k], who: -1}
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
			return e.raise(f.s, f.v, why{kind: whyRule, id: c.id, at: t, who: i})
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
		if !e.raise(w.start, t+1, why{kind: whyRule, id: c.id, at: t, who: i}) {
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
		if !e.raise(f.s, f.v, why{kind: whyRule, id: c.id, at: t, who: i}) {
			return false
		}
		k++
	}
	return true
}
